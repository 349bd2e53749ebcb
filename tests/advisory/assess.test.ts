import fc from 'fast-check'
import { expect, it } from 'vitest'
import { assess, type SailedSpeed } from '../../src/advisory/assess.ts'
import { decide, type Decision } from '../../src/advisory/decide.ts'
import { inverseOf, VARIED } from '../../src/advisory/inverse.ts'
import { sensitivityOf } from '../../src/advisory/sensitivity.ts'
import type { UncertainField } from '../../src/advisory/uncertainty.ts'
import { findVesselClass } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass } from '../../src/domain/vessel-of.ts'
import { cases, evenly, ifPossible, logEvenly, PLAIN, type Case } from '../support/arbitraries.ts'
import { deeper, wider } from '../support/changes.ts'
import { atRest, canal } from '../support/places.ts'

const decideCase = (c: Case) => ifPossible(() => decide(c.segment, c.vessel, c.conditions, c.options))
const assessCase = (c: Case, sailed: SailedSpeed) =>
  ifPossible(() => assess(c.segment, c.vessel, c.conditions, c.options, sailed))

const motorVessel = vesselOfClass(findVesselClass('cemt-va')!, 'laden', {})

it('a speed is within exactly where it is at most the recommendation, through the water and over ground, in any direction', () => {
  const verdicts = { within: 0, exceeds: 0, 'no-safe-speed': 0 }
  const inputs = fc.tuple(
    cases(),
    fc.oneof(evenly(0.2, 3), fc.constantFrom(1, 1 - 1e-6, 1 + 1e-6)),
    fc.constantFrom('through-water' as const, 'over-ground' as const),
  )
  for (const [c, share, reference] of fc.sample(inputs, { numRuns: 3000, seed: 40 })) {
    const found = decideCase(c)
    if (!found) continue
    const limit = reference === 'over-ground' ? found.main.overGround : found.main.speed
    const value = share * limit
    if (!(value > 0.05)) continue
    const assessment = assessCase(c, { value, reference })
    if (!assessment) continue
    const { current } = c.conditions
    const along = found.main.direction === 'upstream' ? -current : current
    // over ground no vessel can sail so slowly the way of the main answer: held against the other way alone
    if (reference === 'over-ground' && found.byDirection && value - along <= 0) continue
    verdicts[assessment.verdict] += 1
    // the same request is advised `main`: API 7
    const expected =
      found.main.outcome === 'no-safe-speed' ? 'no-safe-speed' : share > 1 ? 'exceeds' : 'within'
    if (assessment.verdict !== expected) {
      throw new Error(`${assessment.verdict} at ${share} of ${limit} ${reference}: ${JSON.stringify(c)}`)
    }
    const broken = assessment.criteria.some((report) => !report.evaluation.isMet)
    if (assessment.verdict === 'within') expect(broken).toBe(false)
  }
  console.info('verdicts', verdicts)
  expect(Math.min(...Object.values(verdicts))).toBeGreaterThan(300)
})

it('a speed over ground that a limit of one direction forbids exceeds, whichever direction is faster through the water', () => {
  const posted = { speed: 2, reference: 'over-ground', direction: 'downstream', appliesTo: {} } as const
  const segment = canal({ depth: 6, distances: [60, 60] }, { postedLimits: [posted] })
  const c: Case = { segment, vessel: motorVessel, conditions: { ...atRest, current: 0.5 }, options: PLAIN }
  expect(assessCase(c, { value: 1.99, reference: 'over-ground' })?.verdict).toBe('within')
  const over = assessCase(c, { value: 2.01, reference: 'over-ground' })
  expect(over?.verdict).toBe('exceeds')
  expect(over?.decision.direction).toBe('downstream')
  expect(over?.speed).toBeCloseTo(1.51, 9)
})

it('over ground without a direction, the figures are those of the higher speed through the water', () => {
  const c: Case = {
    segment: canal({ depth: 6, distances: [60, 60] }),
    vessel: motorVessel,
    conditions: { ...atRest, current: -0.4 },
    options: PLAIN,
  }
  const found = assessCase(c, { value: 2.5, reference: 'over-ground' })
  expect(found?.decision.direction).toBe('downstream')
  expect(found?.speed).toBeCloseTo(2.9, 9)
})

it('a speed over ground below the current gives no answer where it is no speed ahead through the water', () => {
  const c: Case = {
    segment: canal({ depth: 6, distances: [60, 60] }),
    vessel: motorVessel,
    conditions: { ...atRest, current: 2, direction: 'downstream' },
    options: PLAIN,
  }
  expect(assessCase(c, { value: 1.9, reference: 'over-ground' })).toBeUndefined()
})

it('at the required value a speed is within, and a millimetre beyond it is not, where the value lies inside the searched range', () => {
  const tally = { interior: 0, none: 0, atEnd: 0 }
  const inputs = fc.tuple(cases({ stations: 1 }), fc.constantFrom(...VARIED), evenly(0.7, 1.3), fc.boolean())
  for (const [c, vary, share, isOverGround] of fc.sample(inputs, { numRuns: 300, seed: 41 })) {
    const main = decideCase(c)?.main
    const reference = isOverGround ? 'over-ground' : 'through-water'
    const value = share * (isOverGround ? (main?.overGround ?? 0) : (main?.speed ?? 0))
    if (!main || value < 0.1) continue
    const sailed = { value, reference } as const
    const { required, searched } = inverseOf(c, sailed, vary)
    const isWithin = (x: number): boolean => {
      const changed = at(c, vary, x)
      return assessCase(changed, sailed)?.verdict === 'within'
    }
    const [hard, easy] = vary === 'draught_m' ? [searched[1], searched[0]] : searched
    if (required === undefined) {
      tally.none += 1
      if (isWithin(easy)) throw new Error(`${vary} ${easy} would do: ${JSON.stringify({ c, sailed })}`)
      continue
    }
    if (!isWithin(required))
      throw new Error(`not within at ${vary} ${required}: ${JSON.stringify({ c, sailed })}`)
    const beyond = required + (vary === 'draught_m' ? 1e-3 : -1e-3)
    if (Math.abs(required - hard) < 2e-3) tally.atEnd += 1
    else {
      tally.interior += 1
      if (isWithin(beyond))
        throw new Error(`within at ${vary} ${beyond} too: ${JSON.stringify({ c, sailed })}`)
    }
  }
  console.info('inverse', tally)
  expect(tally.interior).toBeGreaterThan(60)
})

/** The same request with one input at a value, made without the code under test. */
function at(c: Case, vary: (typeof VARIED)[number], x: number): Case {
  const [first] = c.segment.stations
  switch (vary) {
    case 'depth_m':
      return deeper(c, x - first.depth)
    case 'bank_distance_m': {
      const [a, b] = first.distances
      const shift = x - Math.min(a, b)
      const sign = a <= b ? 1 : -1
      const shape =
        first.shape.kind === 'profile'
          ? { ...first.shape, offsets: first.shape.offsets.map((o) => o - sign * shift) }
          : first.shape
      const moved = { ...first, shape, distances: [a + sign * shift, b - sign * shift] as [number, number] }
      return { ...c, segment: { ...c.segment, stations: [moved] } }
    }
    case 'draught_m': {
      const { length, beam, blockCoefficient, basis, volume } = c.vessel
      const follows = basis.volume === 'given' ? volume : blockCoefficient * length * beam * x
      const vessel = {
        ...c.vessel,
        draught: x,
        volume: follows,
        basis: { ...basis, draught: 'given' as const },
      }
      return { ...c, vessel }
    }
  }
}

it('the greatest draught is found above the permitted draught of the segment, which caps assumed draughts only', () => {
  const open = canal({ depth: 6, distances: [60, 60] })
  const capped = { ...open, maxDraught: 2 }
  const inputs = { vessel: motorVessel, conditions: atRest, options: PLAIN }
  const sailed = { value: 3.2, reference: 'through-water' } as const
  const free = inverseOf({ ...inputs, segment: open }, sailed, 'draught_m').required
  expect(free).toBeLessThan(6)
  expect(inverseOf({ ...inputs, segment: capped }, sailed, 'draught_m').required).toBe(free)
})

it('the sensitivity has the swings of decisions with each input shifted, the largest first', () => {
  const halves = new Map<UncertainField, number>([
    ['depth_m', 0.2],
    ['width_m', 2],
    ['draught_m', 0.1],
    ['current_mps', 0.15],
    ['wave_height', 0.4],
    ['bank_distance_m', 0.5],
  ])
  const changes: Record<UncertainField, (c: Case, shift: number) => Case> = {
    depth_m: deeper,
    // without `bottomWidth`, which `wider` moves too
    width_m: (c, shift) => wider(c, shift / 2),
    draught_m: (c, shift) => at(c, 'draught_m', Math.min(c.vessel.draught, cap(c)) + shift),
    current_mps: (c, shift) => ({
      ...c,
      conditions: { ...c.conditions, current: c.conditions.current + shift },
    }),
    wave_height: (c, shift) => ({
      ...c,
      options: { ...c.options, waveFactor: (c.options.waveFactor ?? 1) * Math.exp(shift) },
    }),
    bank_distance_m: (c, shift) =>
      at(c, 'bank_distance_m', Math.min(...c.segment.stations[0].distances) + shift),
  }
  const speedOf = (decision: Decision | undefined): number =>
    decision && decision.outcome !== 'no-safe-speed' ? decision.overGround : 0
  let compared = 0
  const list = fc.sample(fc.tuple(cases({ stations: 1, shapes: ['by-kind', 'slope'] }), logEvenly(0.1, 1)), {
    numRuns: 700,
    seed: 42,
  })
  for (const [c] of list) {
    const base = decideCase(c)?.main
    if (!base) continue
    const { inputs, base: own } = sensitivityOf(c, halves)
    expect(own.speed).toBe(base.speed)
    expect(inputs.map((input) => input.field).sort()).toEqual([...halves.keys()].sort())
    inputs.forEach((input, i) => {
      if (i > 0) expect(input.swing).toBeLessThanOrEqual(inputs[i - 1]!.swing)
      const half = halves.get(input.field)!
      for (const [decision, shift] of [
        [input.atLow, -half],
        [input.atHigh, half],
      ] as const) {
        const expected = decideSane(changes[input.field](c, shift))
        expect(decision === undefined, input.field).toBe(expected === undefined)
        // the shifted inputs are not the same to the last digit
        if (decision && expected)
          expect(Math.abs(decision.speed - expected.speed)).toBeLessThan(1e-9 + 1e-9 * expected.speed)
      }
      expect(input.swing).toBe(Math.abs(speedOf(input.atHigh) - speedOf(input.atLow)))
      compared += 1
    })
  }
  console.info('sensitivity inputs', compared)
  expect(compared).toBeGreaterThan(3000)
})

const cap = (c: Case): number =>
  c.vessel.basis.draught === 'given' ? Infinity : (c.segment.maxDraught ?? Infinity)

function decideSane(c: Case): Decision | undefined {
  const { depth, width, distances } = c.segment.stations[0]
  if (!(Math.min(depth, width, ...distances, c.vessel.draught) > 0)) return undefined
  return decideCase(c)?.main
}
