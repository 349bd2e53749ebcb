import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { depthAt, profileSection, slopeScale, trapezoidArea } from '../../src/hydro/section.ts'
import { expectClose } from '../support/expect-close.ts'
import { between } from '../support/setting.ts'

describe('trapezoidArea', () => {
  it('gives the German standard section: 55 m at the surface, 4 m deep, 1:3, is 172 m², mean depth 3.127 m', () => {
    // computed independently
    expect(trapezoidArea(55, 4, 6)).toBe(172)
    expectClose(trapezoidArea(55, 4, 6) / 55, 3.127, { abs: 5e-4 })
  })

  it('is width by depth between walls, half of it in a triangle', () => {
    expect(trapezoidArea(137, 15, 0)).toBe(2055)
    expect(trapezoidArea(24, 4, 6)).toBe(48)
    expect(trapezoidArea(30, 3, 4)).toBe(72) // canal D of the check cases: 30 x 3 m, 1:2
  })
})

describe('slopeScale', () => {
  it('leaves slopes alone while the bottom keeps a quarter of the width', () => {
    expect(slopeScale(55, 4, 6)).toBe(1)
    expect(slopeScale(32, 4, 6)).toBe(1) // 24 m of 32: the bottom is a quarter exactly
    expect(slopeScale(20, 5, 0)).toBe(1)
  })

  it('shrinks them so that the bottom is a quarter of the width', () => {
    fc.assert(
      fc.property(between(1, 100), between(0.5, 20), between(0.1, 12), (b, h, n) => {
        const bottom = b - slopeScale(b, h, n) * n * h
        expectClose(bottom, Math.max(b / 4, b - n * h), { abs: 1e-12 * (b + n * h) })
      }),
    )
    expectClose(slopeScale(10, 4, 6), 0.3125, { abs: 1e-15 }) // 7.5 m over 24 m
  })
})

/** The trapezoid 55 x 4 m, 1:3, sailing line at the axis, with its slopes carried 3 m above the datum. */
const TRAPEZOID_X = [-36.5, -15.5, 15.5, 36.5]
const TRAPEZOID_D = [-3, 4, 4, -3]

describe('profileSection', () => {
  it('gives the numbers of a trapezoid that the profile draws, at several levels', () => {
    // by hand: b = 55 + 6 z, h = 4 + z, A = b h - 3 h²
    for (const [level, area, width, depth] of [
      [0, 172, 55, 4],
      [1, 230, 61, 5],
      [-1, 120, 49, 3],
      [2.5, 328.25, 70, 6.5],
      [-3.5, 16.25, 34, 0.5],
    ] as const) {
      const section = profileSection(TRAPEZOID_X, TRAPEZOID_D, level)
      expectClose(section.area, area, { rel: 1e-13 })
      expectClose(section.width, width, { rel: 1e-13 })
      expectClose(section.distances[0], width / 2, { rel: 1e-13 })
      expectClose(section.distances[1], width / 2, { rel: 1e-13 })
      expectClose(section.depth, depth, { rel: 1e-13 })
    }
  })

  it('agrees with trapezoidArea wherever the sailing line lies on the bottom', () => {
    fc.assert(
      fc.property(between(-15, 15), between(-3.9, 2.9), (shift, level) => {
        const section = profileSection(
          TRAPEZOID_X.map((x) => x + shift),
          TRAPEZOID_D,
          level,
        )
        const width = 55 + 6 * level
        const depth = 4 + level
        expectClose(section.area, width * depth - 3 * depth ** 2, { rel: 1e-11 })
        expectClose(section.distances[0], width / 2 - shift, { rel: 1e-11 })
        expectClose(section.distances[1], width / 2 + shift, { rel: 1e-11 })
        expectClose(section.depth, depth, { rel: 1e-11 })
      }),
    )
  })

  it('stands walls where the profile ends under water', () => {
    const section = profileSection([-10, 0, 20], [2, 3, 1], 0.5)
    // by hand: 10·(2.5 + 3.5)/2 = 30 and 20·(3.5 + 1.5)/2 = 50 m²
    expect(section).toEqual({ area: 80, width: 30, distances: [10, 20], depth: 3.5 })
  })

  it('takes the sailing line’s own pool and leaves out what lies beyond an island', () => {
    const x = [-40, -30, -20, -10, 0, 10, 20]
    const d = [3, 3, -1, 1, 3, 3, -3]
    const low = profileSection(x, d, 0)
    // left: 10·(3 + 1)/2 = 20, then 5 m to the shore of the island, 2.5; right: 30, then 5 m to the bank, 7.5
    expect(low).toEqual({ area: 60, width: 30, distances: [15, 15], depth: 3 })
    // a metre and a half higher the island is under water: the pools join, and the left end is a wall
    const high = profileSection(x, d, 1.5)
    // left: 10·(4.5+2.5)/2 + 10·(2.5+0.5)/2 + 10·(0.5+4.5)/2 + 10·4.5; right: 45 + 7.5·4.5/2
    expectClose(high.area, 35 + 15 + 25 + 45 + 45 + 16.875, { rel: 1e-14 })
    expect(high.distances).toEqual([40, 17.5])
  })

  it('ends the pool where the bed just touches the water', () => {
    const section = profileSection([-10, -5, 0, 10, 20], [2, 0, 2, 2, 2], 0)
    expect(section).toEqual({ area: 45, width: 25, distances: [5, 20], depth: 2 })
  })

  it('is all zero when the sailing line is dry', () => {
    const dry = { area: 0, width: 0, distances: [0, 0], depth: 0 }
    expect(profileSection([-10, 0, 10], [3, -1, 3], 0)).toEqual(dry)
    expect(profileSection([-10, 0, 10], [3, 1, 3], -1)).toEqual(dry)
    expect(profileSection([-10, 0, 10], [3, NaN, 3], 0)).toEqual(dry)
  })

  it('takes a sailing line on the first and on the last point, and between points', () => {
    expect(profileSection([0, 10, 20], [2, 2, -2], 0)).toEqual({
      area: 25,
      width: 15,
      distances: [0, 15],
      depth: 2,
    })
    expect(profileSection([-20, -10, 0], [-2, 2, 2], 0)).toEqual({
      area: 25,
      width: 15,
      distances: [15, 0],
      depth: 2,
    })
    // depth between points is on the straight line: 1 + 3·(4/10)
    expectClose(profileSection([-4, 6, 7], [1, 4, 4], 0).depth, 2.2, { rel: 1e-15 })
  })

  it('agrees with a sum over thin strips for random beds and levels', () => {
    const bed = fc.record({
      steps: fc.array(between(0.5, 12), { minLength: 3, maxLength: 9 }),
      // no depth within 0.1 m of the level, so that no shoal is thinner than a strip
      depths: fc.array(fc.integer({ min: -8, max: 24 }), { minLength: 10, maxLength: 10 }),
      share: between(0, 1),
      quarters: fc.integer({ min: -8, max: 8 }),
    })
    fc.assert(
      fc.property(bed, ({ steps, depths, share, quarters }) => {
        const level = quarters / 4 + 0.1
        const total = steps.reduce((a, b) => a + b, 0)
        let x = -share * total
        const offsets = [x, ...steps.map((step) => (x += step))]
        if (offsets.at(-1)! < 0) return
        const beds = depths.slice(0, offsets.length).map((quarter) => quarter / 4)
        const section = profileSection(offsets, beds, level)
        // independent: walk outwards in strips of a thousandth of the profile, depths by linear interpolation
        const strip = total / 20_000
        const water = (at: number): number => {
          const i = Math.min(Math.max(offsets.findIndex((o) => o > at) - 1, 0), offsets.length - 2)
          const last = at >= offsets.at(-1)! ? offsets.length - 2 : i
          const t = (at - offsets[last]!) / (offsets[last + 1]! - offsets[last]!)
          return beds[last]! + t * (beds[last + 1]! - beds[last]!) + level
        }
        let area = 0
        const reach: [number, number] = [0, 0]
        if (water(0) > 0) {
          for (const [side, sign, end] of [
            [0, -1, -offsets[0]!],
            [1, 1, offsets.at(-1)!],
          ] as const) {
            for (let at = strip / 2; at < end && water(sign * at) > 0; at += strip) {
              area += strip * water(sign * at)
              reach[side] = at + strip / 2
            }
          }
        }
        expectClose(section.distances[0], reach[0], { abs: 2 * strip })
        expectClose(section.distances[1], reach[1], { abs: 2 * strip })
        expectClose(section.area, area, { abs: 20 * strip })
        expectClose(section.width, reach[0] + reach[1], { abs: 4 * strip })
      }),
      { numRuns: 100 },
    )
  })
})

describe('depthAt', () => {
  it('is on the straight line between points, the points themselves included', () => {
    const x = [-10, 0, 10, 30]
    const d = [1, 3, 5, -5]
    for (const [offset, depth] of [
      [-10, 1],
      [-5, 2],
      [0, 3],
      [2.5, 3.5],
      [10, 5],
      [20, 0],
      [30, -5],
    ] as const) {
      expectClose(depthAt(x, d, offset, 0), depth, { abs: 1e-15 })
      expectClose(depthAt(x, d, offset, 1.25), depth + 1.25, { abs: 1e-15 })
    }
  })

  it('holds the end points beyond the ends', () => {
    expect(depthAt([-10, 0, 10], [1, 3, 5], -99, 0.5)).toBe(1.5)
    expect(depthAt([-10, 0, 10], [1, 3, 5], 99, 0.5)).toBe(5.5)
  })
})
