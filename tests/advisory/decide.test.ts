import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { advise } from '../../src/advisory/advise.ts'
import { decide, type Decision, type SegmentDecision } from '../../src/advisory/decide.ts'
import type { Direction, Group } from '../../src/domain/segment.ts'
import type { Vessel } from '../../src/domain/vessel.ts'
import { cases, ifPossible, logEvenly, type Case } from '../support/arbitraries.ts'
import { expectClose } from '../support/expect-close.ts'

const decideCase = (c: Case): SegmentDecision | undefined =>
  ifPossible(() => decide(c.segment, c.vessel, c.conditions, c.options))

const every = ({ main, byDirection }: SegmentDecision): Decision[] =>
  byDirection ? [main, byDirection.upstream, byDirection.downstream] : [main]

/** All conditions hold, minima included, maxima not. */
function isInGroup(vessel: Vessel, group: Group): boolean {
  return [
    !group.vesselClasses || group.vesselClasses.includes(vessel.classId ?? ''),
    !group.loading || group.loading === vessel.loading,
    vessel.draught >= (group.minDraught ?? -Infinity),
    vessel.draught < (group.maxDraught ?? Infinity),
    vessel.length >= (group.minLength ?? -Infinity),
    !group.hull || group.hull === vessel.hull,
  ].every(Boolean)
}

describe('the outcome', () => {
  it('is no-safe-speed exactly where the speed is below steerage or not ahead over ground', () => {
    const outcomes = { limited: 0, 'service-speed': 0, 'no-safe-speed': 0 }
    for (const c of fc.sample(cases(), { numRuns: 2500, seed: 5 })) {
      const found = decideCase(c)
      for (const decision of found ? every(found) : []) {
        const { current } = c.conditions
        const along =
          decision.direction === undefined ? 0 : decision.direction === 'upstream' ? -current : current
        expect(decision.overGround).toBe(decision.speed + along)
        const isUnsafe = decision.speed < c.vessel.minSteerageSpeed || decision.speed + along <= 0
        expect(decision.outcome === 'no-safe-speed').toBe(isUnsafe)
        const isService = decision.governing.criterion.id === 'service-speed'
        if (!isUnsafe) expect(decision.outcome).toBe(isService ? 'service-speed' : 'limited')
        outcomes[decision.outcome] += 1
      }
    }
    console.info('outcomes', outcomes)
    expect(Math.min(...Object.values(outcomes))).toBeGreaterThan(100)
  })

  it('answers both directions with a current, the lower over ground being the main one unless a direction is asked for', () => {
    for (const c of fc.sample(cases(), { numRuns: 2000, seed: 6 })) {
      const found = decideCase(c)
      if (!found) continue
      expect(found.byDirection !== undefined).toBe(c.conditions.current !== 0)
      if (!found.byDirection) {
        expect(found.main.direction).toBe(c.conditions.direction)
        continue
      }
      const { upstream, downstream } = found.byDirection
      expect([upstream.direction, downstream.direction]).toEqual(['upstream', 'downstream'])
      if (c.conditions.direction) {
        expect(found.main).toBe(found.byDirection[c.conditions.direction])
        continue
      }
      const unsafe = [upstream, downstream].filter((d) => d.outcome === 'no-safe-speed')
      const pool = unsafe.length > 0 ? unsafe : [upstream, downstream]
      expect(found.main.overGround).toBe(Math.min(...pool.map((d) => d.overGround)))
      expect(pool).toContain(found.main)
    }
  })

  it('keeps every posted limit that applies, over ground or through the water, in its direction', () => {
    let bound = 0
    for (const c of fc.sample(cases(), { numRuns: 2500, seed: 7 })) {
      const found = decideCase(c)
      for (const decision of found ? every(found) : []) {
        const along = decision.overGround - decision.speed
        const { vessel } = decision.situation
        let lowest = Infinity
        for (const posted of c.segment.postedLimits) {
          const { direction, reference, speed } = posted
          const isSameWay = !decision.direction || direction === 'both' || direction === decision.direction
          const applies = isInGroup(vessel, posted.appliesTo)
          if (isSameWay && applies)
            lowest = Math.min(lowest, reference === 'over-ground' ? speed - along : speed)
        }
        const own = decision.bounds.find(({ criterion }) => criterion.id === 'posted-limit')
        expect(own !== undefined).toBe(c.options.applyPostedLimit && lowest < Infinity)
        if (!own) continue
        bound += 1
        expect(decision.speed).toBeLessThanOrEqual(Math.max(0, lowest))
        if (lowest < vessel.maxSpeed) expectClose(own.firstSpeed, Math.max(0, lowest), { abs: 1e-12 })
      }
    }
    console.info('posted limits that applied', bound)
    expect(bound).toBeGreaterThan(500)
  })

  it('with a sign, has the over-ground speed rounded down to the step, and never a sign below steerage', () => {
    const METRES = { 'km/h': 1 / 3.6, kn: 1852 / 3600, mph: 0.44704 }
    let signs = 0
    for (const c of fc.sample(cases(), { numRuns: 2500, seed: 8 })) {
      const advisory = ifPossible(() => advise(c.segment, c.vessel, c.conditions, c.options))
      if (!advisory) continue
      const { decision, sign } = advisory
      const { signUnit, signStep } = c.options
      const inUnit = decision.overGround / METRES[signUnit]
      const expected = Math.floor(inUnit / signStep + 1e-9) * signStep
      const metres = expected * METRES[signUnit]
      const throughWater = metres - (decision.overGround - decision.speed)
      const isSteerable = throughWater >= c.vessel.minSteerageSpeed * (1 - 1e-9) && metres > 0
      const hasSign = decision.outcome !== 'no-safe-speed' && isSteerable
      expect(sign !== undefined).toBe(hasSign)
      const codes = advisory.cautions.map((caution) => caution.code)
      expect(codes.includes('sign-below-steerage')).toBe(decision.outcome !== 'no-safe-speed' && !hasSign)
      if (!sign) continue
      signs += 1
      expectClose(sign.value, expected, { abs: 1e-9 })
      expect(sign.unit).toBe(signUnit)
    }
    expect(signs).toBeGreaterThan(500)
  })
})

it('along a segment, the strictest of the decisions of its stations taken alone governs, in each direction', () => {
  let several = 0
  const list = fc.sample(cases({ stations: 4 }), { numRuns: 4000, seed: 9 })
  for (const c of list.filter((one) => one.segment.stations.length > 1)) {
    const whole = decideCase(c)
    const alone = c.segment.stations.map((station) =>
      decideCase({ ...c, segment: { ...c.segment, stations: [station] } }),
    )
    if (!whole || alone.some((one) => one === undefined)) {
      expect(whole).toBeUndefined()
      expect(alone).toContain(undefined)
      continue
    }
    several += 1
    const pick = (direction: Direction | undefined): void => {
      const of = (found: SegmentDecision | undefined): Decision | undefined =>
        direction ? found?.byDirection?.[direction] : found?.main
      const own = of(whole)
      const decisions = alone.map(of).filter((one) => one !== undefined)
      const unsafe = decisions.filter((one) => one.outcome === 'no-safe-speed')
      const pool = unsafe.length > 0 ? unsafe : decisions
      expect(own?.overGround).toBe(Math.min(...pool.map((one) => one.overGround)))
      expect(own?.outcome === 'no-safe-speed').toBe(unsafe.length > 0)
      const from = decisions.find((one) => one.situation.station === own?.situation.station)
      expect(from?.speed).toBe(own?.speed)
    }
    if (whole.byDirection) {
      pick('upstream')
      pick('downstream')
    } else pick(undefined)
  }
  console.info('segments of several stations', several)
  expect(several).toBeGreaterThan(300)
})

/** Everything that is a number anywhere in a value, with the path to it. */
function* numbersIn(value: unknown, path: string): Generator<[string, number]> {
  if (typeof value === 'number') yield [path, value]
  else if (Array.isArray(value))
    for (const [i, item] of value.entries()) yield* numbersIn(item, `${path}[${i}]`)
  else if (value !== null && typeof value === 'object') {
    for (const [key, item] of Object.entries(value)) {
      // the bands and settings behind a decision are not part of an answer
      if (key !== 'situation' && key !== 'criterion') yield* numbersIn(item, `${path}.${key}`)
    }
  }
}

/** Figures that the types declare NaN or Infinity for. */
const MAY_BE_NAN =
  /\.(returnCurrent|drawdown|frontWaveHeight|sternWaveHeight|squat|underKeelClearance|blockageRatio|bankWaveHeight|bankWaveEnergy|waveHeight|waveEnergy|height|period|waveLength|transverseWaveLength)$/
const MAY_BE_INFINITE = /\.firstSpeed$/

it('every number of an advisory is finite, or NaN only where its type says so, and only impossible-input is thrown', () => {
  const tally = { advisories: 0, impossible: 0 }
  const inputs = fc.tuple(cases({ stations: 4 }), logEvenly(0.2, 5))
  for (const [one, factor] of fc.sample(inputs, { numRuns: 2500, seed: 10 })) {
    const isFactored = tally.advisories % 3 === 0
    const extra = { hasCurve: tally.advisories % 20 === 0, ...(isFactored && { waveFactor: factor }) }
    const options = { ...one.options, ...extra }
    const advisory = ifPossible(() => advise(one.segment, one.vessel, one.conditions, options))
    if (!advisory) {
      tally.impossible += 1
      continue
    }
    tally.advisories += 1
    for (const [path, value] of numbersIn(advisory, '')) {
      if (Number.isFinite(value)) continue
      const isAllowed = Number.isNaN(value) ? MAY_BE_NAN.test(path) : MAY_BE_INFINITE.test(path)
      if (!isAllowed) throw new Error(`${path} is ${value}: ${JSON.stringify({ ...one, options })}`)
    }
  }
  console.info('advisories', tally)
  expect(tally.impossible).toBeLessThan(0.2 * tally.advisories)
})
