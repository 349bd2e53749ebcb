import { describe, expect, it } from 'vitest'
import { decide } from '../../src/advisory/decide.ts'
import type { Segment } from '../../src/domain/segment.ts'
import type { Vessel } from '../../src/domain/vessel.ts'
import { Judge } from '../../src/passages/judge.ts'
import type { Judging } from '../../src/passages/judgement.ts'
import type { PositionReport } from '../../src/passages/position-report.ts'
import type { Placement } from '../../src/passages/placement.ts'
import { fairway, guessOf, placement, positionReport, REACH } from '../support/passage-marks.ts'

const KNOT = 1852 / 3600
const JUDGING: Judging = {
  waterLevel: 0,
  current: 0,
  tolerance: KNOT / 2,
  position: 'actual',
  isFull: true,
}
const OPTIONS = {
  combine: 'highest',
  limits: {},
  applyPostedLimit: true,
  signUnit: 'km/h',
  signStep: 1,
  hasCurve: false,
} as const

const BARGE = guessOf({ shipType: 79, length: 84, beam: 9.4, draught: 2.4 })
const UNKNOWN_DRAUGHT = guessOf({ shipType: 79, length: 84, beam: 9.4 })
const [LADEN, EMPTY] = UNKNOWN_DRAUGHT.variants as readonly [Vessel, Vessel]

/** The maximum of a single advisory whose banks are where the vessel has them, m/s over ground. */
function maximum(vessel: Vessel, left: number, right: number, current = 0): number {
  const [station] = REACH.stations
  const segment: Segment = { ...REACH, stations: [{ ...station, distances: [left, right] }] }
  const conditions = {
    waterLevel: 0,
    current,
    direction: 'downstream' as const,
    isWaterLevelGiven: true,
    isCurrentGiven: true,
  }
  const { main } = decide(segment, vessel, conditions, OPTIONS)
  if (main.outcome === 'no-safe-speed') throw new Error('the water of the test allows no speed')
  return main.overGround
}

function judged(
  given: Partial<PositionReport>,
  where: Partial<Placement> = {},
  guess = BARGE,
  judging: Partial<Judging> = {},
) {
  const judge = new Judge({ ...JUDGING, ...judging })
  return judge.judge({ report: positionReport(given), placement: placement(where), guess })
}

describe('the maximum of a report', () => {
  it('is that of an advisory at its distances to the banks', () => {
    const [vessel] = BARGE.variants
    expect(judged({}, { offset: 5 })?.maxOverGround).toBe(maximum(vessel, 23, 17))
    expect(judged({}, { offset: -5 })?.maxOverGround).toBe(maximum(vessel, 13, 27))
    expect(judged({}, { offset: -5 })?.sailingLineMax).toBe(maximum(vessel, 18, 22))
  })

  it('is that of the sailing line when the call says so, waves staying those of the actual place', () => {
    const [vessel] = BARGE.variants
    const found = judged({}, { offset: -5 }, BARGE, { position: 'sailing-line' })
    expect(found?.maxOverGround).toBe(maximum(vessel, 18, 22))
    expect(found?.waveHeights).toEqual(judged({}, { offset: -5 })?.waveHeights)
    expect(found?.distances).toEqual([13, 27])
  })

  it('is over ground, the vessel being carried by the current', () => {
    const [vessel] = BARGE.variants
    const found = judged({ speed: 3, current: 0.5 })
    expect(found?.throughWater).toBe(2.5)
    expect(found?.maxOverGround).toBe(maximum(vessel, 18, 22, 0.5))
    expect(judged({ speed: 3 }, { direction: 'upstream' }, BARGE, { current: 0.5 })?.throughWater).toBe(3.5)
  })
})

describe('the verdict', () => {
  const [vessel] = BARGE.variants
  const max = maximum(vessel, 18, 22)

  it('exceeds by more than the tolerance only', () => {
    expect(judged({ speed: max + 0.49 * KNOT })?.verdict).toBe('within')
    expect(judged({ speed: max + 0.51 * KNOT })).toMatchObject({ verdict: 'exceeds' })
    expect(judged({ speed: max + 0.51 * KNOT })?.excess).toBeCloseTo(0.51 * KNOT, 9)
  })

  it('depends on the draught between the maxima of laden and empty, with the figures of the lower one', () => {
    const laden = maximum(LADEN, 18, 22)
    const empty = maximum(EMPTY, 18, 22)
    expect(empty - laden).toBeGreaterThan(1.2 * KNOT)
    const between = judged({ speed: (laden + empty) / 2 }, {}, UNKNOWN_DRAUGHT)
    expect(between).toMatchObject({ verdict: 'depends-on-draught', maxOverGround: laden })
    expect(between?.vessel.loading).toBe('laden')
    expect(judged({ speed: empty + KNOT }, {}, UNKNOWN_DRAUGHT)).toMatchObject({
      verdict: 'exceeds',
      maxOverGround: laden,
    })
    expect(judged({ speed: laden }, {}, UNKNOWN_DRAUGHT)?.verdict).toBe('within')
  })

  it('is told where no speed is safe', () => {
    const shallow = guessOf({ shipType: 79, length: 84, beam: 9.4, draught: 3.9 })
    expect(judged({}, {}, shallow)).toMatchObject({ verdict: 'no-safe-speed', outcome: 'no-safe-speed' })
    expect(judged({}, {}, shallow)?.maxOverGround).toBeNaN()
  })

  it('is none where the vessel does not fit the water', () => {
    expect(judged({}, {}, guessOf({ shipType: 79, length: 84, beam: 9.4, draught: 4.2 }))).toBeUndefined()
    expect(judged({}, {}, guessOf({ shipType: 79, length: 84, beam: 44, draught: 2 }))).toBeUndefined()
  })

  it('is that of the empty vessel where the laden one does not fit, and says so', () => {
    const [station] = REACH.stations
    const shoal: Segment = { ...REACH, stations: [{ ...station, depth: 2.4 }] }
    const found = judged({}, { fairway: fairway('shoal', shoal) }, UNKNOWN_DRAUGHT)
    expect(found?.vessel.loading).toBe('empty')
    expect(found?.cautions).toContain('laden-does-not-fit')
  })
})

describe('what is told beside', () => {
  it('a posted limit stands over ground, whatever it refers to', () => {
    const posted = (reference: 'over-ground' | 'through-water'): Segment => ({
      ...REACH,
      postedLimits: [{ speed: 2, reference, direction: 'both', appliesTo: {} }],
    })
    const on = (segment: Segment) =>
      judged({ speed: 3, current: 0.5 }, { fairway: fairway('posted', segment) })
    expect(on(posted('over-ground'))).toMatchObject({ postedLimit: 2, postedExcess: 1 })
    expect(on(posted('through-water'))).toMatchObject({ postedLimit: 2.5, postedExcess: 0.5 })
  })

  it('cautions defer to local rules, and tell a towboat without its convoy', () => {
    expect(judged({})?.cautions).toContain('local-rules-apply')
    const towboat = guessOf({ shipType: 31, length: 23, beam: 8, draught: 2.6 })
    expect(judged({}, {}, towboat)?.cautions).toContain('convoy-size-unknown')
  })

  it('the effect of ten metres to the side is that of the maxima there', () => {
    const judge = new Judge(JUDGING)
    const where = placement({ offset: 0 })
    const found = judge.judge({ report: positionReport(), placement: where, guess: BARGE })
    if (!found) throw new Error('the barge fits')
    const [vessel] = BARGE.variants
    const here = maximum(vessel, 18, 22)
    const changes = [maximum(vessel, 8, 32), maximum(vessel, 28, 12)].map((there) => Math.abs(there - here))
    expect(judge.effectOfOffset(found, where, 10)).toBeCloseTo(
      ((changes[0] ?? 0) + (changes[1] ?? 0)) / 2,
      12,
    )
  })
})
