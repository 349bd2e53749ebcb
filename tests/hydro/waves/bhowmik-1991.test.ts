import { describe, expect, it } from 'vitest'
import { bhowmik1991, bhowmikWaveHeight } from '../../../src/hydro/waves/bhowmik-1991.ts'
import { expectClose } from '../../support/expect-close.ts'
import { aSetting, G, scaledSetting } from '../../support/setting.ts'
import { decayExponent, itDeclares } from '../../support/wave-method.ts'

// Formula of Bhowmik et al. (1991), from memory; rows computed independently, 5 decimals; no g in it: V, x, L, D, H.
const ROWS = [
  [10, 30, 7, 0.6, 0.18572],
  [5, 30, 7, 0.6, 0.23606],
  [12, 60, 5, 0.4, 0.09846],
  [8, 15, 10, 0.9, 0.35934],
] as const

describe('bhowmikWaveHeight', () => {
  it('gives the four rows', () => {
    expect(ROWS).toHaveLength(4)
    for (const [V, x, L, D, H] of ROWS) expectClose(bhowmikWaveHeight(V, x, L, D), H, { abs: 6e-6 })
  })

  it('is its coefficient when every quantity is 1', () => {
    expect(bhowmikWaveHeight(1, 1, 1, 1)).toBe(0.537)
  })

  it('has the exponents of the print', () => {
    expectClose(
      decayExponent((V) => bhowmikWaveHeight(V, 30, 7, 0.6), 5, 15),
      -0.346,
      { abs: 1e-12 },
    )
    expectClose(
      decayExponent((x) => bhowmikWaveHeight(9, x, 7, 0.6), 5, 150),
      -0.345,
      { abs: 1e-12 },
    )
    expectClose(
      decayExponent((L) => bhowmikWaveHeight(9, 30, L, 0.6), 4, 15),
      0.56,
      { abs: 1e-12 },
    )
    expectClose(
      decayExponent((D) => bhowmikWaveHeight(9, 30, 7, D), 0.2, 1.5),
      0.355,
      { abs: 1e-12 },
    )
    expectClose(bhowmikWaveHeight(9, 150, 7, 1) / bhowmikWaveHeight(9, 30, 7, 1), 0.5739, { abs: 5e-5 })
  })
})

describe('bhowmik-1991', () => {
  itDeclares(bhowmik1991, {
    id: 'bhowmik-1991',
    range: [{ quantity: 'volume_froude_number', min: 2 }],
    hulls: ['semi-displacement', 'planing'],
    distanceFrom: 'sailing-line',
    nature: 'central',
    symbols: ['y', 'L', 'D'],
  })

  const boat = aSetting({ hull: 'planing', length: 7, beam: 2.5, draught: 0.6, volume: 1 })
  // W^(1/3) = 1 m: F_vol is 2 at 2 √9.80665 = 6.263114 m/s
  const hump = 6.263114

  it('does not scale, for its coefficients have dimensions: the height grows by k^0.397 in place of k', () => {
    // 0.56 + 0.355 - 0.345 - 0.346/2 = 0.397 in place of 1
    const ratio = bhowmik1991.height(scaledSetting(boat, 4), 20, 120) / bhowmik1991.height(boat, 10, 30)
    expectClose(ratio, 4 ** 0.397, { rel: 1e-12 })
    expect(Math.abs(ratio / 4 - 1)).toBeGreaterThan(0.5)
  })

  it('has no value below a volume Froude number of 2, and the law’s from there on', () => {
    expect(bhowmik1991.height(boat, hump * 0.999, 30)).toBeNaN()
    expectClose(bhowmik1991.height(boat, hump * 1.000001, 30), bhowmikWaveHeight(hump, 30, 7, 0.6), {
      rel: 1e-6,
    })
    expectClose(bhowmik1991.height(boat, 10, 30), 0.18572, { abs: 6e-6 })
    expect(bhowmik1991.height(boat, 2 * Math.sqrt(G) * (1 - 1e-13), 30)).toBeGreaterThan(0)
  })

  it('exceeds a height at once or never, for it falls with speed', () => {
    expect(bhowmik1991.firstSpeed(boat, 0.1857, 30, 10, 20)).toBe(10)
    expect(bhowmik1991.firstSpeed(boat, 0.1858, 30, 10, 20)).toBe(Infinity)
    for (let V = 10; V <= 20; V += 0.1) expect(bhowmik1991.height(boat, V, 30)).toBeLessThan(0.1858)
  })

  it('can be computed for every vessel', () => {
    expect(bhowmik1991.hasCoefficients(aSetting({ envelopeCoefficient: NaN, centralCoefficient: NaN }))).toBe(
      true,
    )
  })
})
