import { describe, expect, it } from 'vitest'
import { advise } from '../../src/advisory/advise.ts'
import { decide } from '../../src/advisory/decide.ts'
import { heightByMethod } from '../../src/advisory/secondary-wave.ts'
import { situationOf } from '../../src/advisory/situation.ts'
import type { Calibration } from '../../src/domain/calibration.ts'
import type { Options } from '../../src/domain/conditions.ts'
import type { Vessel } from '../../src/domain/vessel.ts'
import { WAVE_METHODS } from '../../src/hydro/waves/all.ts'
import { guessOf, NO_OPTIONS, REACH } from '../support/passage-marks.ts'

const BARGE = guessOf({ vesselClass: 'cemt-iii', loading: 'laden' }).variants[0]
const BOAT = guessOf({ vesselClass: 'recreational-rc' }).variants[0]
const STILL = { waterLevel: 0, current: 0, isWaterLevelGiven: true, isCurrentGiven: true }

const calibration = (methods: Calibration['methods']): Calibration => ({
  id: 'cal-test',
  name: 'a morning at the reach',
  methods,
  scatter: 0.25,
  coverage: { speed: [1, 2.5], distance: [10, 20], depth: [4, 4], depthFroudeNumber: [0.16, 0.4] },
})

const calibrated = (methods: Calibration['methods'], rest: Partial<Options> = {}): Options => ({
  ...NO_OPTIONS,
  calibration: calibration(methods),
  ...rest,
})

const situation = (options: Options, vessel: Vessel = BOAT) =>
  situationOf(REACH, REACH.stations[0], vessel, STILL, options)

/** Methods that count for the boat without a calibration. */
const COUNTING = advise(REACH, BOAT, STILL, NO_OPTIONS)
  .waveMethods.filter(({ outside }) => outside.length === 0)
  .map(({ id }) => id)
const [FIRST = ''] = COUNTING

describe('a calibrated water', () => {
  it('multiplies the height of each method by its own factor', () => {
    expect(COUNTING.length).toBeGreaterThan(1)
    const options = calibrated(COUNTING.map((id, i) => ({ id, factor: 1.5 + i, factorByHull: {} })))
    COUNTING.forEach((id, i) => {
      const index = WAVE_METHODS.findIndex((method) => method.id === id)
      const bare = heightByMethod(situation(NO_OPTIONS), index, 2, 18)
      expect(heightByMethod(situation(options), index, 2, 18)).toBeCloseTo((1.5 + i) * bare, 12)
    })
  })

  it('allows what the same factor for all would, when each has it', () => {
    const all = WAVE_METHODS.map(({ id }) => ({ id, factor: 1.7, factorByHull: {} }))
    const ofAll = decide(REACH, BOAT, STILL, calibrated(all)).main
    const alike = decide(REACH, BOAT, STILL, { ...NO_OPTIONS, waveFactor: 1.7 }).main
    expect(ofAll.speed).toBe(alike.speed)
    expect(ofAll.speed).toBeLessThan(decide(REACH, BOAT, STILL, NO_OPTIONS).main.speed)
  })

  it('leaves methods without a factor out, whatever they would say', () => {
    const options = calibrated([{ id: FIRST, factor: 0.01, factorByHull: {} }])
    const { waveMethods, decision, criteria } = advise(REACH, BOAT, STILL, options)
    const [own] = waveMethods.filter(({ id }) => id === FIRST)
    expect(own).toMatchObject({ factor: 0.01 })
    for (const report of waveMethods.filter(({ id }) => id !== FIRST)) {
      expect(report.factor).toBeUndefined()
      expect(report.outside).toContainEqual({ quantity: 'calibration', value: 'none' })
    }
    const waves = criteria.filter(({ criterion }) => criterion.id === 'bank-wave-height')
    for (const { evaluation } of waves)
      expect(['stern-wave', FIRST, undefined]).toContain(evaluation.component)
    expect(decision.speed).toBeGreaterThan(0)
  })

  it('uses the factor of the hull where one is listed', () => {
    const options = calibrated([{ id: FIRST, factor: 2, factorByHull: { displacement: 0.5 } }])
    const index = WAVE_METHODS.findIndex(({ id }) => id === FIRST)
    expect(situation(options).waveFactors.byMethod[index]).toBe(2)
    expect(situation(options, BARGE).waveFactors.byMethod[index]).toBe(0.5)
  })

  it('gives way to a factor of the call', () => {
    const given = calibrated([{ id: FIRST, factor: 9, factorByHull: {} }], { waveFactor: 1.2 })
    const plain = { ...NO_OPTIONS, waveFactor: 1.2 }
    expect(decide(REACH, BOAT, STILL, given).main.speed).toBe(decide(REACH, BOAT, STILL, plain).main.speed)
  })

  it('shows what it would be without', () => {
    const all = WAVE_METHODS.map(({ id }) => ({ id, factor: 2.5, factorByHull: {} }))
    const { uncalibrated, decision } = advise(REACH, BOAT, STILL, calibrated(all))
    expect(uncalibrated?.decision.speed).toBe(decide(REACH, BOAT, STILL, NO_OPTIONS).main.speed)
    expect(uncalibrated?.decision.speed).toBeGreaterThan(decision.speed)
    expect(advise(REACH, BOAT, STILL, NO_OPTIONS).uncalibrated).toBeUndefined()
  })

  it('cautions where the speed is beyond those that were measured', () => {
    const codes = (factor: number) => {
      const all = WAVE_METHODS.map(({ id }) => ({ id, factor, factorByHull: {} }))
      const { decision, cautions } = advise(REACH, BOAT, STILL, calibrated(all))
      return { speed: decision.speed, isBeyond: cautions.some(({ code }) => code === 'beyond-calibration') }
    }
    const found = [0.2, 1, 3, 10].map(codes)
    // measured from 1 to 2.5 m/s
    for (const { speed, isBeyond } of found) expect(isBeyond).toBe(speed < 1 || speed > 2.5)
    expect(new Set(found.map(({ isBeyond }) => isBeyond)).size).toBe(2)
  })
})
