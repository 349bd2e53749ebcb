import { describe, expect, it } from 'vitest'
import { rockManual2007, rockManualWaveHeight } from '../../../src/hydro/waves/rock-manual-2007.ts'
import { expectClose } from '../../support/expect-close.ts'
import { aSetting, FROM_981 } from '../../support/setting.ts'
import {
  DISPLACEMENT_RULE,
  decayExponent,
  itAnswersAtTheEnds,
  itDeclares,
  itRisesAndIsInverted,
  itScales,
  SUBCRITICAL_RULE,
} from '../../support/wave-method.ts'

// Formula of the Rock Manual, C683 (2007), 4.3.4, from memory; rows computed independently, 5 decimals, with 9.81 m/s²:
// V, h, s, a_i, H.
const ROWS = [
  [3, 4, 20, 1, 0.14767],
  [4, 5, 30, 1, 0.35134],
  [5, 6, 50, 1, 0.64067],
  [3.5, 3.5, 15, 0.5, 0.16457],
  [3, 3.5, 25, 0.35, 0.05245],
] as const

// The same, from the four cases of the whole chain: V, h, s = b_w/2 - B - y as the Manual prints it, a_i, H (4 decimals).
const CHAIN = [
  [2.0471, 4, 16.1, 1, 0.0344], // A: 110 m motor vessel laden, 55 x 4 m canal, on the axis
  [2.2222, 4, 6.1, 1, 0.066], // B: the same 10 m off the axis
  [3.2356, 4, 16.1, 0.35, 0.0752], // C: empty
  [1.6667, 3, 9.95, 1, 0.0215], // D: 38.5 m peniche, 30 x 3 m canal
  [8 / 3.6, 3, 11.2, 1, 0.0653], // 12 m recreational craft in the canal of D
] as const

describe('rockManualWaveHeight', () => {
  it('gives the five rows', () => {
    expect(ROWS).toHaveLength(5)
    for (const [V, h, s, a, H] of ROWS) {
      expectClose(rockManualWaveHeight(V * FROM_981, h, s, a), H, { abs: 6e-6 }) // half a unit of the last digit
    }
  })

  it('gives the secondary waves of the five cases of the chain', () => {
    expect(CHAIN).toHaveLength(5)
    // V and H have four digits, and H goes with the fourth power of V
    for (const [V, h, s, a, H] of CHAIN)
      expectClose(rockManualWaveHeight(V * FROM_981, h, s, a), H, { abs: 6.5e-5 })
  })

  it('gives the column H_i of the illustration with a laden motor vessel', () => {
    // computed independently, 3 decimals: km/h, m; s = 55/2 - 11.4 m
    const rows = [
      [5, 0.007],
      [6, 0.015],
      [7, 0.028],
      [8, 0.048],
      [9, 0.077],
      [9.5, 0.095],
    ] as const
    for (const [kmh, H] of rows)
      expectClose(rockManualWaveHeight((kmh / 3.6) * FROM_981, 4, 16.1, 1), H, { abs: 6e-4 })
  })

  it('is exactly 1.2 a_i h at F = 1 a depth away from the hull', () => {
    expectClose(rockManualWaveHeight(Math.sqrt(9.80665 * 2.5), 2.5, 2.5, 0.5), 1.5, { rel: 1e-14 })
  })

  it('falls with the cube root of the distance: 0.5848 from 30 to 150 m', () => {
    const height = (s: number): number => rockManualWaveHeight(3, 4, s, 1)
    expectClose(decayExponent(height, 10, 80), -1 / 3, { abs: 1e-13 }) // rounding
    expectClose(height(150) / height(30), 0.5848, { abs: 5e-5 }) // computed independently, 4 decimals
  })
})

describe('rock-manual-2007', () => {
  itDeclares(rockManual2007, {
    id: 'rock-manual-2007',
    range: [SUBCRITICAL_RULE, DISPLACEMENT_RULE],
    hulls: ['displacement', 'semi-displacement', 'planing'],
    distanceFrom: 'hull-side',
    nature: 'envelope',
    symbols: ['h', 's', 'a_i'],
  })
  itRisesAndIsInverted(rockManual2007, () => 0)
  itScales(rockManual2007)
  itAnswersAtTheEnds(rockManual2007, aSetting(), 40)

  it('takes the distance from the hull’s side: half the beam less than from the sailing line', () => {
    // the first row, 20 m from the side of a hull 9 m wide
    const height = rockManual2007.height(aSetting({ beam: 9 }), 3 * FROM_981, 24.5)
    expectClose(height, 0.14767, { abs: 6e-6 })
  })

  it('first exceeds a height at the speeds of the three inverse rows', () => {
    // computed independently, 5 decimals, with 9.81 m/s²: H, h, s, V
    const rows = [
      [0.2, 4, 20, 3.23638],
      [0.3, 5, 30, 3.8451],
      [0.1, 3, 15, 2.5326],
    ] as const
    for (const [H, depth, s, V] of rows) {
      const speed = rockManual2007.firstSpeed(aSetting({ depth, beam: 6 }), H, s + 3, 0, 10)
      expectClose(speed, V * FROM_981, { abs: 6e-6 })
    }
  })

  it('has no coefficient where the Manual gives none', () => {
    expect(rockManual2007.hasCoefficients(aSetting({ envelopeCoefficient: NaN }))).toBe(false)
    expect(rockManual2007.hasCoefficients(aSetting({ centralCoefficient: NaN }))).toBe(true)
  })
})
