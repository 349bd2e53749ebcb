import { describe, expect, it } from 'vitest'
import { maynord2005, maynordWaveHeight } from '../../../src/hydro/waves/maynord-2005.ts'
import { expectClose } from '../../support/expect-close.ts'
import { aSetting, FROM_981, G, scaledSetting } from '../../support/setting.ts'
import { decayExponent, itDeclares } from '../../support/wave-method.ts'

// Formula of Maynord (2005), from memory; rows computed independently, 4 decimals, with 9.81 m/s² and C = 0.82, where the
// service takes 0.8: V, x, W, H at 0.82.
const ROWS = [
  [11, 30, 1.5, 0.1195],
  [9, 15, 1, 0.1426],
] as const

describe('maynordWaveHeight', () => {
  it('gives both rows times 0.8/0.82', () => {
    expect(ROWS).toHaveLength(2)
    // 0.1195 · 0.8/0.82 = 0.116585 and 0.1426 · 0.8/0.82 = 0.139122 m
    for (const [V, x, W, H] of ROWS) {
      expectClose(maynordWaveHeight(V * FROM_981, x, W), (H * 0.8) / 0.82, { abs: 5e-5 })
    }
  })

  it('is 0.8 of the length scale at F_vol = 1 one length scale away', () => {
    expectClose(maynordWaveHeight(Math.sqrt(G * 2), 2, 8), 1.6, { rel: 1e-14 })
  })

  it('has the exponents of the print: -0.58 in speed, -0.42 in distance', () => {
    expectClose(
      decayExponent((V) => maynordWaveHeight(V, 30, 2), 5, 15),
      -0.58,
      { abs: 1e-12 },
    )
    expectClose(
      decayExponent((x) => maynordWaveHeight(9, x, 2), 5, 150),
      -0.42,
      { abs: 1e-12 },
    )
    expectClose(maynordWaveHeight(9, 150, 1) / maynordWaveHeight(9, 30, 1), 0.5087, { abs: 5e-5 })
  })
})

describe('maynord-2005', () => {
  itDeclares(maynord2005, {
    id: 'maynord-2005',
    range: [{ quantity: 'volume_froude_number', min: 2 }],
    hulls: ['semi-displacement', 'planing'],
    distanceFrom: 'sailing-line',
    nature: 'central',
    symbols: ['y', 'W'],
  })

  const boat = aSetting({ hull: 'planing', length: 6, beam: 2.2, draught: 0.35, volume: 1 })

  it('grows by k when lengths grow by k and speeds by √k (Froude)', () => {
    for (const k of [0.1, 2, 30]) {
      const large = maynord2005.height(scaledSetting(boat, k), 9 * Math.sqrt(k), 15 * k)
      expectClose(large, k * maynord2005.height(boat, 9, 15), { rel: 1e-13 })
    }
  })

  it('has no value below a volume Froude number of 2, and the law’s from there on', () => {
    // W^(1/3) = 1 m: F_vol is 2 at 2 √9.80665 = 6.263114 m/s
    expect(maynord2005.height(boat, 6.2631, 15)).toBeNaN()
    expect(maynord2005.height(boat, 6.2632, 15)).toBeGreaterThan(0.15)
    expect(maynord2005.height(boat, 2 * Math.sqrt(G) * (1 - 1e-13), 15)).toBeGreaterThan(0)
    expectClose(maynord2005.height(boat, 9 * FROM_981, 15), (0.1426 * 0.8) / 0.82, { abs: 5e-5 })
  })

  it('exceeds a height at once or never, for it falls with speed', () => {
    // 0.139122 m at 9 m/s, see the rows
    expect(maynord2005.firstSpeed(boat, 0.139, 15, 9, 20)).toBe(9)
    expect(maynord2005.firstSpeed(boat, 0.1392, 15, 9, 20)).toBe(Infinity)
    for (let V = 9; V <= 20; V += 0.1) expect(maynord2005.height(boat, V, 15)).toBeLessThan(0.1392)
  })

  it('can be computed for every vessel', () => {
    expect(maynord2005.hasCoefficients(aSetting({ envelopeCoefficient: NaN, centralCoefficient: NaN }))).toBe(
      true,
    )
  })
})
