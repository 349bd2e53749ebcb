import { describe, expect, it } from 'vitest'
import { blaauw1984, blaauwWaveHeight } from '../../../src/hydro/waves/blaauw-1984.ts'
import { rockManualWaveHeight } from '../../../src/hydro/waves/rock-manual-2007.ts'
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

// Formula of Blaauw et al. (1984), from memory; rows computed independently, 5 decimals, with 9.81 m/s² and exact thirds,
// then with the exponents 0.33 and 2.67 as printed: V, s, A'', H, h, H as printed.
const ROWS = [
  [3, 20, 0.25, 0.0821, 4, 0.08234],
  [4, 30, 0.25, 0.15447, 5, 0.1551],
  [4, 30, 0.8, 0.49429, 5, 0.49633],
  [5, 50, 0.25, 0.23622, 6, 0.23755],
] as const

describe('blaauwWaveHeight', () => {
  it('gives the four rows', () => {
    expect(ROWS).toHaveLength(4)
    for (const [V, s, A, H] of ROWS) expectClose(blaauwWaveHeight(V * FROM_981, s, A), H, { abs: 6e-6 })
  })

  it('lies within 0.6 % of the law with its exponents as printed', () => {
    for (const [V, s, A, , h, printed] of ROWS) {
      const height = blaauwWaveHeight(V * FROM_981, s, A)
      expectClose(height, printed, { rel: 0.006 })
      const f = (V * FROM_981) / Math.sqrt(G * h)
      expectClose(A * h * (s / h) ** -0.33 * f ** 2.67, printed, { abs: 6e-6 })
    }
  })

  it('agrees with the form in which the depth stands, at every depth', () => {
    for (const h of [0.5, 3, 20]) {
      const printed = 0.35 * h * (25 / h) ** (-1 / 3) * (4 / Math.sqrt(G * h)) ** (8 / 3)
      expectClose(blaauwWaveHeight(4, 25, 0.35), printed, { rel: 1e-13 })
    }
  })

  it('stands to the Rock Manual as 1 to 1.2 F^(4/3)/0.25', () => {
    // computed independently, 2 decimals: F, Rock Manual with a_i = 1 over this law with 0.25
    const rows = [
      [0.3, 0.96],
      [0.4, 1.42],
      [0.5, 1.91],
      [0.6, 2.43],
      [0.7, 2.98],
      [0.8, 3.57],
    ] as const
    for (const [F, ratio] of rows) {
      const V = F * Math.sqrt(G * 5)
      expectClose(rockManualWaveHeight(V, 5, 20, 1) / blaauwWaveHeight(V, 20, 0.25), ratio, { abs: 6e-3 })
    }
  })

  it('falls with the cube root of the distance and rises with the power 8/3 of speed', () => {
    expectClose(
      decayExponent((s) => blaauwWaveHeight(3, s, 1), 10, 80),
      -1 / 3,
      { abs: 1e-13 },
    )
    expectClose(
      decayExponent((V) => blaauwWaveHeight(V, 30, 1), 2, 4),
      8 / 3,
      { abs: 1e-13 },
    )
  })
})

describe('blaauw-1984', () => {
  itDeclares(blaauw1984, {
    id: 'blaauw-1984',
    range: [SUBCRITICAL_RULE, DISPLACEMENT_RULE],
    hulls: ['displacement', 'semi-displacement', 'planing'],
    distanceFrom: 'hull-side',
    nature: 'central',
    symbols: ['s', "A''"],
  })
  itRisesAndIsInverted(blaauw1984, () => 0)
  itScales(blaauw1984)
  itAnswersAtTheEnds(blaauw1984, aSetting(), 40)

  it('takes the distance from the hull’s side, and the coefficient of its own list', () => {
    const setting = aSetting({ beam: 9, centralCoefficient: 0.8, envelopeCoefficient: 0.35 })
    expectClose(blaauw1984.height(setting, 4 * FROM_981, 34.5), 0.49429, { abs: 6e-6 })
    // its inverse: computed independently with 9.81 m/s²
    expectClose(blaauw1984.firstSpeed(setting, 0.49429, 34.5, 0, 9), 4 * FROM_981, { rel: 5e-6 })
  })

  it('has no coefficient where the source gives none', () => {
    expect(blaauw1984.hasCoefficients(aSetting({ centralCoefficient: NaN }))).toBe(false)
    expect(blaauw1984.hasCoefficients(aSetting({ envelopeCoefficient: NaN }))).toBe(true)
  })
})
