import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Setting } from '../../../src/hydro/setting.ts'
import {
  weggelSorensen1986,
  weggelSorensenWaveHeight,
} from '../../../src/hydro/waves/weggel-sorensen-1986.ts'
import { expectClose } from '../../support/expect-close.ts'
import { aSetting, between, FROM_981, G, spread } from '../../support/setting.ts'
import {
  DISPLACEMENT_RULE,
  decayExponent,
  itAnswersAtTheEnds,
  itDeclares,
  itRisesAndIsInverted,
  itScales,
  SUBCRITICAL_RULE,
} from '../../support/wave-method.ts'

// Formula of Weggel & Sorensen (1986), from memory; rows computed independently, 4 to 5 decimals, with 9.81 m/s², all at
// F > 0.42, where the whole depth counts: V, d, W, x, F, n, a, H.
const ROWS = [
  [3.5, 5, 100, 30, 0.4997, -0.3613, 0.07106, 0.1681],
  [5, 6, 30, 30, 0.6517, -0.3107, 0.25601, 0.3933],
  [4, 4, 500, 50, 0.6386, -0.378, 0.04656, 0.1843],
  [6, 12, 343, 150, 0.553, -0.3161, 0.16999, 0.4516],
] as const

describe('weggelSorensenWaveHeight', () => {
  it('gives the four rows', () => {
    expect(ROWS).toHaveLength(4)
    for (const [V, d, W, x, , , , H] of ROWS) {
      // half a unit of the last digit, and what four digits of H leave open
      expectClose(weggelSorensenWaveHeight(V * FROM_981, d, W, x), H, { abs: 6e-5 })
    }
  })

  it('has the exponent n and the coefficient a of the four rows', () => {
    for (const [V, d, W, x, , n, a] of ROWS) {
      const height = (distance: number): number => weggelSorensenWaveHeight(V * FROM_981, d, W, distance)
      expectClose(decayExponent(height, x, 3 * x), n, { abs: 6e-5 })
      // at x* = 1 the height over W^(1/3) is a itself
      expectClose(height(Math.cbrt(W)) / Math.cbrt(W), a, { abs: 6e-6 })
    }
  })

  it('gives the heights of 5 m/s and 100 m³ at 30 m over rising depth, down to F = 0.42', () => {
    // computed independently, 3 decimals, with 9.81 m/s²: d, H; beyond 14 m the depth is capped
    const rows = [
      [4, 0.372],
      [5, 0.387],
      [6, 0.409],
      [8, 0.457],
      [10, 0.487],
      [12, 0.513],
    ] as const
    for (const [d, H] of rows)
      expectClose(weggelSorensenWaveHeight(5 * FROM_981, d, 100, 30), H, { abs: 6e-4 })
  })

  it('no longer grows with depth below F = 0.42, where the law as printed would diverge', () => {
    // the cap is an own choice: d_e = V²/(0.42² g) = 14.4518 m at 5 m/s
    const atCap = weggelSorensenWaveHeight(5, 14.451, 100, 30)
    for (const d of [14.452, 15, 20, 60, 500]) {
      expectClose(weggelSorensenWaveHeight(5, d, 100, 30), atCap, { rel: 5e-5 })
    }
    expect(weggelSorensenWaveHeight(5, 14, 100, 30)).toBeLessThan(atCap * 0.999)
    expect(weggelSorensenWaveHeight(5, 60, 100, 30)).toBe(weggelSorensenWaveHeight(5, 20, 100, 30))
    // computed independently for the printed law at 60 m: 4.22 m
    expect(weggelSorensenWaveHeight(5, 60, 100, 30)).toBeLessThan(0.56)
  })

  it('falls by 0.05 % at F = 0.55, where the coefficients change', () => {
    // computed independently, 5 decimals, with 9.81 m/s²: 0.43646 to 0.43625 m at d = 8 m, W = 100 m³, x = 30 m
    const V = 0.55 * Math.sqrt(G * 8)
    expectClose(weggelSorensenWaveHeight(V * (1 - 1e-9), 8, 100, 30), 0.43646, { abs: 6e-6 })
    expectClose(weggelSorensenWaveHeight(V * (1 + 1e-9), 8, 100, 30), 0.43625, { abs: 6e-6 })
  })

  it('is continuous where the depth begins to be capped', () => {
    for (const [d, W, x] of [
      [5, 100, 30],
      [2, 5000, 60],
      [20, 40, 400],
    ] as const) {
      const V = 0.42 * Math.sqrt(G * d)
      const below = weggelSorensenWaveHeight(V * (1 - 1e-9), d, W, x)
      expectClose(weggelSorensenWaveHeight(V * (1 + 1e-9), d, W, x), below, { rel: 1e-7 })
    }
  })

  it('decays with exponents between -0.25 and -0.38 above F = 0.55', () => {
    // computed independently, 2 decimals: d*, exponent
    for (const [d, n] of [
      [0.5, -0.38],
      [1, -0.34],
      [2, -0.31],
      [8, -0.25],
    ] as const) {
      const V = 0.7 * Math.sqrt(G * d * 5)
      expectClose(
        decayExponent((x) => weggelSorensenWaveHeight(V, d * 5, 125, x), 10, 90),
        n,
        { abs: 6e-3 },
      )
    }
  })

  it('rises with the powers 3.7 and 2.4 of speed at F of 0.48 and 0.64', () => {
    // computed independently, 1 decimal, for W = 100 m³ in 4 m; x not told, 30 m here
    const local = (F: number): number => {
      const V = F * Math.sqrt(G * 4)
      return decayExponent((v) => weggelSorensenWaveHeight(v, 4, 100, 30), V * 0.999, V * 1.001)
    }
    expectClose(local(0.48), 3.7, { abs: 0.1 })
    expectClose(local(0.64), 2.4, { abs: 0.1 })
  })

  it('rises with speed within its range for every size, depth and distance, but for the step at F = 0.55', () => {
    const place = fc.record({
      volume: spread(0.5, 150_000),
      depth: spread(0.3, 100),
      beamShare: spread(0.2, 1),
      far: between(0, 1),
      from: between(0, 1),
      to: between(0, 1),
    })
    let asked = 0
    fc.assert(
      fc.property(place, ({ volume, depth, beamShare, far, from, to }) => {
        const scale = Math.cbrt(volume)
        const nearest = (beamShare * scale) / 2
        const distance = nearest * (5000 / nearest) ** far
        const celerity = Math.sqrt(G * depth)
        // F(h) ≤ 0.8, 0.4 ≤ d_e* ≤ 8 with d_e = V²/(0.42² g) capped by the depth
        const low = 0.42 * Math.sqrt(0.4 * G * scale)
        const high = depth > 8 * scale ? 0.42 * Math.sqrt(8 * G * scale) : 0.8 * celerity
        if (depth < 0.4 * scale || !(low < high)) return
        const slow = low + (high - low) * Math.min(from, to)
        const fast = low + (high - low) * Math.max(from, to)
        if (fast - slow < 1e-9 * fast) return
        asked += 1
        const isAcross = slow < 0.55 * celerity && fast >= 0.55 * celerity
        const rise =
          weggelSorensenWaveHeight(fast, depth, volume, distance) /
          weggelSorensenWaveHeight(slow, depth, volume, distance)
        // |n| steps by 0.0003 to 0.0004 there: 0.28 % at x* = 6000, the farthest place of the smallest boat
        if (isAcross) expect(rise).toBeGreaterThan(0.997)
        else expect(rise).toBeGreaterThan(1)
      }),
      { numRuns: 20_000 },
    )
    expect(asked).toBeGreaterThan(10_000)
  })
})

describe('weggel-sorensen-1986', () => {
  itDeclares(weggelSorensen1986, {
    id: 'weggel-sorensen-1986',
    range: [SUBCRITICAL_RULE, { quantity: 'effective_relative_depth', min: 0.4, max: 8 }, DISPLACEMENT_RULE],
    hulls: ['displacement', 'semi-displacement', 'planing'],
    distanceFrom: 'sailing-line',
    nature: 'central',
    symbols: ['h', 'y', 'W'],
  })

  const slowest = (setting: Setting): number =>
    setting.depth < 0.4 * Math.cbrt(setting.volume)
      ? Infinity
      : 0.42 * Math.sqrt(0.4 * G * Math.cbrt(setting.volume))
  const fastest = (setting: Setting): number =>
    setting.depth > 8 * Math.cbrt(setting.volume)
      ? 0.42 * Math.sqrt(8 * G * Math.cbrt(setting.volume))
      : Infinity
  itRisesAndIsInverted(weggelSorensen1986, slowest, fastest)
  itScales(weggelSorensen1986)
  itAnswersAtTheEnds(weggelSorensen1986, aSetting({ depth: 5, volume: 100 }), 30)

  it('finds the speed just below the change of coefficients for a height inside the step', () => {
    const setting = aSetting({ depth: 8, volume: 100 })
    const change = 0.55 * Math.sqrt(G * 8)
    // the law steps from 0.43646 down to 0.43625 m at 9.81 m/s²; at equal F the heights are the same under 9.80665
    for (const height of [0.43628, 0.43635, 0.43644]) {
      const speed = weggelSorensen1986.firstSpeed(setting, height, 30, 0, 7)
      expect(speed).toBeLessThan(change)
      expectClose(speed, change, { rel: 5e-4 })
      expectClose(weggelSorensen1986.height(setting, speed, 30), height, { rel: 1e-12 })
    }
    // starting at the change or within 1e-12 of it, the height is exceeded only beyond
    const beyond = weggelSorensen1986.firstSpeed(setting, 0.43635, 30, change, 7)
    expect(beyond).toBeGreaterThan(change * (1 + 1e-6))
    expectClose(weggelSorensen1986.height(setting, beyond, 30), 0.43635, { rel: 1e-12 })
  })

  it('tells the speed at which it steps down: the last before the change, to a few units in the last place', () => {
    fc.assert(
      fc.property(spread(0.3, 100), (depth) => {
        const step = weggelSorensen1986.stepSpeed!(aSetting({ depth }))
        expectClose(step, 0.55 * Math.sqrt(G * depth), { rel: 8 * Number.EPSILON })
        // far from the hull the step is a fall of 0.1 to 0.3 %
        const height = (speed: number): number => weggelSorensenWaveHeight(speed, depth, 1, 1000)
        expect(height(step * (1 + 1e-12))).toBeLessThan(height(step) * 0.9995)
        expectClose(height(step * (1 - 1e-12)), height(step), { rel: 1e-10 })
      }),
    )
  })

  it('finds the crossing in the piece with capped depth, in each of the others, and beyond the range', () => {
    const setting = aSetting({ depth: 5, volume: 100 })
    const celerity = Math.sqrt(G * 5)
    for (const F of [0.2, 0.3, 0.419, 0.421, 0.5, 0.549, 0.551, 0.7, 0.79, 0.95]) {
      const height = weggelSorensen1986.height(setting, F * celerity, 30)
      expectClose(weggelSorensen1986.firstSpeed(setting, height, 30, 0, 2 * celerity), F * celerity, {
        rel: 1e-13,
      })
      expect(weggelSorensen1986.firstSpeed(setting, height, 30, 0, F * celerity * 0.999)).toBe(Infinity)
    }
  })

  it('tells what it finds to the last digit whatever the most that it is asked for, and may leave out what is above', () => {
    fc.assert(
      fc.property(
        spread(1, 20),
        spread(1, 3000),
        between(0.1, 1),
        between(0.2, 1.6),
        (depth, volume, F, share) => {
          const setting = aSetting({ depth, volume })
          const celerity = Math.sqrt(G * depth)
          const height = weggelSorensen1986.height(setting, F * celerity, 30)
          const found = weggelSorensen1986.firstSpeed(setting, height, 30, 0, 2 * celerity)
          const told = (most: number): number =>
            weggelSorensen1986.firstSpeed(setting, height, 30, 0, 2 * celerity, most)
          expect([told(found), told(found * 1.0001), told(Infinity)]).toEqual([found, found, found])
          const bounded = told(share * found)
          expect(bounded === found || (share < 1 && bounded === Infinity)).toBe(true)
        },
      ),
    )
  })

  it('spares the search where the height is not reached by the most that is asked for', () => {
    const setting = aSetting({ depth: 5, volume: 100 })
    const height = weggelSorensen1986.height(setting, 4, 30)
    expect(weggelSorensen1986.isIterated).toBe(true)
    expect(weggelSorensen1986.firstSpeed(setting, height, 30, 0, 6, 3.9)).toBe(Infinity)
  })

  it('can be computed for every vessel', () => {
    expect(
      weggelSorensen1986.hasCoefficients(aSetting({ envelopeCoefficient: NaN, centralCoefficient: NaN })),
    ).toBe(true)
  })
})
