import { describe, expect, it } from 'vitest'
import { advise } from '../../src/advisory/advise.ts'
import { assess } from '../../src/advisory/assess.ts'
import type { Segment } from '../../src/domain/segment.ts'
import { vesselOfDescription } from '../../src/domain/vessel-of.ts'
import type { Vessel } from '../../src/domain/vessel.ts'
import { PLAIN } from '../support/arbitraries.ts'
import { expectClose } from '../support/expect-close.ts'
import { atRest, canal } from '../support/places.ts'

// The reference rows were computed with 9.81 m/s² and printed to three or four digits: speeds move by 0.02 %, figures at a
// fixed speed by up to 0.1 %, on top of half a unit of the last digit.

/** Loaded large motor vessel of reference/primary-wave.md 2.3 and 8.4a, an inland hull: 110 x 11.4 x 2.8 m, C_m 1. */
const motorVessel = (draught: number): Vessel => ({
  ...vesselOfDescription({
    length: 110,
    beam: 11.4,
    draught,
    hull: 'displacement',
    blockCoefficient: 0.88,
    midshipCoefficient: 1,
  }),
  trade: 'inland-cargo',
  envelopeCoefficient: draught < 2 ? 0.35 : 1,
  centralCoefficient: 0.25,
})

/** German standard trapezoid of the same sections: 55 m x 4 m, 1:3; the sailing line off the axis by y. */
const trapezoid = (y = 0): Segment =>
  canal({ depth: 4, distances: [27.5 - y, 27.5 + y], shape: { kind: 'trapezoid', slope: 3 } })

const at = (segment: Segment, vessel: Vessel, speed: number) => {
  const found = assess(segment, vessel, atRest, PLAIN, { value: speed, reference: 'through-water' })
  if (!found) throw new Error('ahead')
  return found
}

describe('the loaded motor vessel in the German standard trapezoid', () => {
  // reference/primary-wave.md 8.4a: V km/h, V/V_L, F_nh, dh, U_r, z_max, dh_f, H_i. It takes the slopes into account as the
  // level falls; METHODS 4 asks for vertical walls over the drawdown (section 1.1): up to 0.3 % more at 6 km/h, 1.1 % at 8,
  // 3 % at 9 and 6 % at 9.5, on the safe side. Its H_i is at 0.5 b_w - B, ours at the distance less B/2.
  it.each([
    [5, 0.509, 0.222, 0.093, 0.38, 0.139, 0.102, 0.007, 0.003],
    [6, 0.611, 0.266, 0.133, 0.491, 0.199, 0.146, 0.015, 0.004],
    [7, 0.712, 0.31, 0.183, 0.626, 0.274, 0.201, 0.028, 0.007],
    [8, 0.814, 0.355, 0.247, 0.795, 0.37, 0.271, 0.048, 0.013],
    [9, 0.916, 0.399, 0.337, 1.028, 0.506, 0.371, 0.077, 0.032],
    [9.5, 0.967, 0.421, 0.406, 1.2, 0.609, 0.447, 0.095, 0.065],
  ])('at %d km/h has the figures of the end-to-end illustration', (kmh, ratio, froude, ...row) => {
    const [dh, u, stern, front, secondary, excess] = row
    const { effects, waveMethods } = at(trapezoid(), motorVessel(2.8), kmh / 3.6)
    // half a unit of the third decimal, and 0.05 % for g
    const near = (actual: number, expected: number): void => {
      expectClose(actual, expected, { abs: 0.0005 + 0.0005 * expected })
    }
    const above = (actual: number, expected: number): void => {
      expect(actual).toBeGreaterThan(expected - 0.0005)
      expect(actual).toBeLessThan(expected * (1 + excess) + 0.0005)
    }
    near(effects.criticalRatio, ratio)
    near(effects.depthFroudeNumber, froude)
    above(effects.drawdown, dh)
    above(effects.returnCurrent, u)
    above(effects.sternWaveHeight, stern)
    above(effects.frontWaveHeight, front)
    const rock = waveMethods.find((method) => method.id === 'rock-manual-2007')?.height ?? NaN
    near(rock, secondary * Math.cbrt((27.5 - 11.4) / (27.5 - 5.7)))
  })

  // Computed apart from this project, by stepping dh up to the first root of (V²/2g)(alpha (A_c/A_c*)² - 1) = dh with
  // vertical walls, A_c* = 172 - 31.92 - 55 dh, V_L 2.7295 m/s and g = 9.81
  it.each([
    [6, 0.133075],
    [7, 0.18352],
    [8, 0.249225],
    [9, 0.346565],
  ])('at %d km/h has the drawdown %d m of an iteration with vertical walls', (kmh, dh) => {
    const { effects } = at(trapezoid(), motorVessel(2.8), kmh / 3.6)
    // g: 0.034 % of F² is up to 0.12 % of a drawdown that grows with F^3.5 near V_L
    expectClose(effects.drawdown, dh, { rel: 1.5e-3 })
    expectClose(effects.sternWaveHeight, 1.5 * dh, { rel: 1.5e-3 })
  })

  // reference/primary-wave.md 2.3: columns A (f_v 0.75, on the axis), B (8 km/h, 10 m off), C (empty, f_v 0.9); heights
  // and walls as above
  it.each([
    { of: 'A', y: 0, draught: 2.8, speed: 2.0471, critical: 2.7295, dh: 0.2043, stern: 0.3065, rock: 0.0344 },
    { of: 'B', y: 10, draught: 2.8, speed: 2.2222, critical: 2.7295, dh: 0.3614, stern: 0.5421, rock: 0.066 },
    { of: 'C', y: 0, draught: 1.3, speed: 3.2356, critical: 3.5951, dh: 0.2811, stern: 0.4216, rock: 0.0752 },
  ])('has the figures of check case $of', ({ y, draught, speed, critical, dh, stern, rock }) => {
    const { effects, waveMethods, decision } = at(trapezoid(y), motorVessel(draught), speed)
    expectClose(decision.situation.setting.criticalSpeed, critical, { rel: 5e-4 })
    expect(effects.drawdown).toBeGreaterThan(dh)
    expect(effects.drawdown).toBeLessThan(1.03 * dh)
    expect(effects.sternWaveHeight).toBeGreaterThan(stern)
    expect(effects.sternWaveHeight).toBeLessThan(1.03 * stern)
    const height = waveMethods.find((m) => m.id === 'rock-manual-2007')?.height ?? NaN
    expectClose(height, rock * Math.cbrt((27.5 - y - 11.4) / (27.5 - y - 5.7)), { rel: 2.5e-3 })
  })

  it('is advised a speed for a soil bank of 0.30 m: between the 7 and 8 km/h of the illustration, signed 7', () => {
    // reference/primary-wave.md 8.4a: "Unlined sandy bank, H <= 0.30 m (Nanson): 7 km/h"; z_max 0.274 at 7, 0.370 at 8
    const { decision, sign, effects } = advise(trapezoid(), motorVessel(2.8), atRest, PLAIN)
    expect(decision.outcome).toBe('limited')
    expect(decision.governing.criterion.id).toBe('bank-wave-height')
    expect(decision.speed * 3.6).toBeGreaterThan(7)
    expect(decision.speed * 3.6).toBeLessThan(7.5)
    expect(sign).toEqual({ value: 7, unit: 'km/h' })
    expectClose(effects.bankWaveHeight, 0.3, { rel: 1e-9 })
  })

  it('is advised 8.8 km/h by 0.90 of the critical speed where riprap takes the waves, signed 8', () => {
    // reference/primary-wave.md 8.4a: "Riprap-lined: P1 <= 0.9 -> 8.8, rounded down 8 km/h"; V_L 9.83 km/h
    const options = { ...PLAIN, limits: { maxBankWaveHeight: 0.6 } }
    const { decision, sign } = advise(trapezoid(), motorVessel(2.8), atRest, options)
    expect(decision.governing.criterion.id).toBe('critical-ratio')
    expectClose(decision.speed * 3.6, 0.9 * 9.83, { rel: 1e-3 })
    expect(sign).toEqual({ value: 8, unit: 'km/h' })
  })
})

// reference/primary-wave.md 3.12, column S1 canal 8 kn (225 x 32.26 x 12 m, C_B 0.84, A_m 0.98 B T; canal 150 x 14.4 m)
it('has the squats of the check rows for a bulk carrier in a canal at 8 kn', () => {
  const bulk = vesselOfDescription({
    length: 225,
    beam: 32.26,
    draught: 12,
    hull: 'displacement',
    blockCoefficient: 0.84,
    midshipCoefficient: 0.98,
  })
  const segment = canal({ depth: 14.4, distances: [75, 75], shape: { kind: 'trapezoid', slope: 0 } })
  const { squatMethods } = at(segment, bulk, 8 * 0.5144444444)
  const squat = (id: string): number => squatMethods.find((method) => method.id === id)?.squat ?? NaN
  expectClose(squat('barrass-1979'), 0.755, { rel: 1e-3 })
  expectClose(squat('barrass-2004'), 0.8228, { rel: 1e-3 })
  expectClose(squat('huuska-1976'), 0.917, { rel: 1e-3 })
  expectClose(squat('eryuzlu-1994'), 0.4682, { rel: 1.5e-3 })
  expectClose(squat('romisch-1989'), 0.7052, { rel: 1.5e-3 })
  expectClose(squat('yoshimura-1986'), 0.6522, { rel: 1e-3 })
})

// reference/ship-waves.md 4.3: V, h, y_s (from the hull's side), a_i, H
it.each([
  [3, 4, 20, 1, 0.14767],
  [4, 5, 30, 1, 0.35134],
  [5, 6, 50, 1, 0.64067],
  [3.5, 3.5, 15, 0.5, 0.16457],
  [3, 3.5, 25, 0.35, 0.05245],
])(
  'at %d m/s in %d m has the Rock Manual height of the table %d m from the side, a_i %d',
  (speed, depth, side, a, height) => {
    const boat: Vessel = {
      ...vesselOfDescription({ length: 20, beam: 4, draught: 1, hull: 'displacement', maxSpeed: 8 }),
      envelopeCoefficient: a,
    }
    const segment = canal({ depth, distances: [side + 2, side + 2], shape: { kind: 'trapezoid', slope: 0 } })
    const found = at({ ...segment, confinement: 'open' }, boat, speed)
    // V^4/g^2: 9.81 for 9.80665 is 0.07 %
    expectClose(found.waveMethods.find((m) => m.id === 'rock-manual-2007')?.height ?? NaN, height, {
      rel: 1e-3,
    })
  },
)

it('is advised the speeds of the inverse rows of the Rock Manual where only that law is asked for', () => {
  // reference/ship-waves.md 4.3: (H 0.20, h 4, y 20) -> 3.23638; (0.30, 5, 30) -> 3.84510; (0.10, 3, 15) -> 2.53260
  for (const [height, depth, side, speed] of [
    [0.2, 4, 20, 3.23638],
    [0.3, 5, 30, 3.8451],
    [0.1, 3, 15, 2.5326],
  ] as const) {
    const boat = vesselOfDescription({ length: 20, beam: 4, draught: 1, hull: 'displacement', maxSpeed: 8 })
    const place = canal({ depth, distances: [side + 2, side + 2], shape: { kind: 'trapezoid', slope: 0 } })
    const limits = { maxBankWaveHeight: height }
    const options = { ...PLAIN, waveMethods: ['rock-manual-2007'], limits }
    const { decision } = advise({ ...place, confinement: 'open' }, boat, atRest, options)
    expect(decision.governing.criterion.id).toBe('bank-wave-height')
    expectClose(decision.speed, speed, { rel: 5e-4 })
  }
})

// reference/ship-waves.md 4.3, Blaauw/BAW with exact thirds: (3, 20, 0.25) 0.08210; (4, 30, 0.80) 0.49429
it.each([
  [3, 20, 0.25, 0.0821],
  [4, 30, 0.8, 0.49429],
])('at %d m/s has the height of Blaauw %d m from the side, A %d', (speed, side, a, height) => {
  const vessel: Vessel = {
    ...vesselOfDescription({ length: 60, beam: 8, draught: 2, hull: 'displacement' }),
    centralCoefficient: a,
  }
  const place = canal({ depth: 6, distances: [side + 4, side + 4], shape: { kind: 'trapezoid', slope: 0 } })
  const found = at({ ...place, confinement: 'open' }, vessel, speed)
  expectClose(found.waveMethods.find((m) => m.id === 'blaauw-1984')?.height ?? NaN, height, { rel: 1e-3 })
})
