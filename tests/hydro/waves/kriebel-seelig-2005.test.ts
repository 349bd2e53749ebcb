import { describe, expect, it } from 'vitest'
import { kriebelSeelig2005, kriebelSeeligWaveHeight } from '../../../src/hydro/waves/kriebel-seelig-2005.ts'
import type { Setting } from '../../../src/hydro/setting.ts'
import { expectClose } from '../../support/expect-close.ts'
import { aSetting, FROM_981, G } from '../../support/setting.ts'
import {
  DISPLACEMENT_RULE,
  decayExponent,
  itAnswersAtTheEnds,
  itDeclares,
  itRisesAndIsInverted,
  itScales,
  SUBCRITICAL_RULE,
} from '../../support/wave-method.ts'

const vessel = (
  length: number,
  entranceLength: number,
  draught: number,
  depth: number,
  blockCoefficient: number,
): Setting => aSetting({ length, entranceLength, draught, depth, blockCoefficient })

// Formula of Kriebel & Seelig (2005), from memory; rows computed independently, 4 decimals, with 9.81 m/s²:
// V, vessel (L, Le, T, h, C_B), y, F*, b, H.
const ROWS = [
  [5, vessel(100, 25, 5, 12, 0.8), 50, 0.1942, 3.9402, 0.1122],
  [4, vessel(20, 8, 1.2, 6, 0.5), 30, 0.3612, 1.0867, 0.1056],
  [6, vessel(60, 20, 2.5, 8, 0.6), 40, 0.3318, 1.6008, 0.3612],
  [3.5, vessel(85, 17, 2.5, 5, 0.85), 25, 0.1446, 6.342, 0.0237],
] as const

describe('kriebelSeeligWaveHeight', () => {
  it('gives the four rows', () => {
    expect(ROWS).toHaveLength(4)
    for (const [V, setting, y, , , H] of ROWS) {
      expectClose(kriebelSeeligWaveHeight(setting, V * FROM_981, y), H, { abs: 6e-5 }) // half a unit of the last digit
    }
  })

  it('has the modified Froude number and the bow factor of the four rows', () => {
    for (const [V, setting, y, F, b] of ROWS) {
      // g H/V² (y/L)^(1/3) = b (F* - 0.1)² with F* = c V: its root is straight in V, so two speeds give c and b
      const root = (speed: number): number =>
        Math.sqrt(
          (G * kriebelSeeligWaveHeight(setting, speed, y) * Math.cbrt(y / setting.length)) / speed ** 2,
        )
      const slope = (root(2 * V * FROM_981) - root(V * FROM_981)) / (V * FROM_981)
      const cut = slope * V * FROM_981 - root(V * FROM_981)
      expectClose((cut / 0.1) ** 2, b, { abs: 6e-5 })
      expectClose((0.1 * slope * V * FROM_981) / cut, F, { abs: 6e-5 })
    }
  })

  it('makes no waves up to a modified Froude number of 0.1', () => {
    // C_B = 1 leaves F* = V/√(g L): 0.1 at 0.1 √(9.80665·100) = 3.131557 m/s
    const setting = vessel(100, 25, 5, 12, 1)
    expect(kriebelSeeligWaveHeight(setting, 3.1315, 50)).toBe(0)
    expect(kriebelSeeligWaveHeight(setting, 3.1317, 50)).toBeGreaterThan(0)
    expect(kriebelSeeligWaveHeight(setting, 3.1317, 50)).toBeLessThan(1e-7)
  })

  it('holds the bow factor at 1 for entrances over half the length', () => {
    const height = (entranceLength: number): number =>
      kriebelSeeligWaveHeight(vessel(20, entranceLength, 1.2, 6, 0.5), 4, 30)
    expect(height(12)).toBe(height(10))
    expect(height(20)).toBe(height(10))
    expect(height(8)).toBeGreaterThan(height(10))
    // b = 1: 4²/9.80665 (F* - 0.1)² (30/20)^(-1/3), F* = 4/√(9.80665·20) exp(2.35·0.5·0.2) = 0.36128 from the definition
    const excess = (4 / Math.sqrt(G * 20)) * Math.exp(0.235) - 0.1
    expectClose(height(10), (16 / G) * excess ** 2 * 1.5 ** (-1 / 3), { rel: 1e-13 })
  })

  it('tends to a bow factor of 9 for the bluffest bow', () => {
    const height = (Le: number): number => kriebelSeeligWaveHeight(vessel(100, Le, 5, 12, 0.8), 5, 50)
    expectClose(height(1) / height(50), 9, { abs: 1e-9 }) // tanh of 44.1 is 1
  })

  it('rises with the powers 6.0 and 4.8 of speed at F* of 0.2 and 0.36', () => {
    // 2 + 2 F*/(F* - 0.1), derived; one decimal
    const setting = vessel(100, 25, 5, 12, 1)
    const local = (F: number): number => {
      const V = F * Math.sqrt(G * 100)
      return decayExponent((v) => kriebelSeeligWaveHeight(setting, v, 50), V * 0.9999, V * 1.0001)
    }
    expectClose(local(0.2), 6, { abs: 1e-5 })
    expectClose(local(0.36), 4.769, { abs: 1e-3 })
  })

  it('falls with the cube root of the distance from the sailing line', () => {
    const [, setting] = ROWS[1]
    const height = (y: number): number => kriebelSeeligWaveHeight(setting, 4, y)
    expectClose(decayExponent(height, 10, 80), -1 / 3, { abs: 1e-13 })
    expect(kriebelSeelig2005.height(setting, 4, 30)).toBe(height(30))
  })
})

describe('kriebel-seelig-2005', () => {
  itDeclares(kriebelSeelig2005, {
    id: 'kriebel-seelig-2005',
    range: [SUBCRITICAL_RULE, DISPLACEMENT_RULE],
    hulls: ['displacement', 'semi-displacement', 'planing'],
    distanceFrom: 'sailing-line',
    nature: 'central',
    symbols: ['h', 'y', 'L', 'Le', 'T', 'C_B'],
  })
  itRisesAndIsInverted(kriebelSeelig2005, () => 0)
  itScales(kriebelSeelig2005)
  itAnswersAtTheEnds(kriebelSeelig2005, vessel(20, 8, 1.2, 6, 0.5), 30)

  it('can be computed for every vessel', () => {
    expect(
      kriebelSeelig2005.hasCoefficients(aSetting({ envelopeCoefficient: NaN, centralCoefficient: NaN })),
    ).toBe(true)
  })
})
