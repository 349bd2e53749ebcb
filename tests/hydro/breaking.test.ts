import { describe, expect, it } from 'vitest'
import { breakingLimit, mccowanLimit, micheLimit, periodAtBreaking } from '../../src/hydro/breaking.ts'
import { expectClose } from '../support/expect-close.ts'

/** The rows were computed with 9.81 m/s²: a period longer by this ratio has the same length under 9.80665. */
const PERIOD = Math.sqrt(9.81 / 9.80665)

describe('breaking limits', () => {
  it('gives the three rows of Miche with 0.142, McCowan with 0.78, and the lower of them', () => {
    // computed independently in Python: T, d, Miche, McCowan, lower
    const rows = [
      [2, 0.5, 0.3741, 0.39, 0.3741],
      [2.5, 1, 0.7103, 0.78, 0.7103],
      [3, 0.3, 0.2558, 0.234, 0.234],
    ] as const
    for (const [T, d, miche, mccowan, lower] of rows) {
      expectClose(micheLimit(d, T * PERIOD), miche, { abs: 6e-5 })
      expectClose(mccowanLimit(d), mccowan, { abs: 1e-12 })
      expectClose(breakingLimit(d, T * PERIOD), lower, { abs: 6e-5 })
    }
  })

  it('lies within 1 % of the print 1/7 of Sorensen 2006, eq. 2.66', () => {
    // computed independently in Python with 1/7
    expectClose(micheLimit(0.5, 2 * PERIOD), 0.3764, { rel: 0.01 })
    expectClose(micheLimit(1, 2.5 * PERIOD), 0.7146, { rel: 0.01 })
  })

  it('is McCowan’s where the wave has no finite period', () => {
    expectClose(breakingLimit(0.5, NaN), 0.39, { abs: 1e-12 })
    expectClose(breakingLimit(0.5, Infinity), 0.39, { abs: 1e-12 })
  })

  it('is 0.142 of the length in deep water and 0.892 of the depth for the longest waves', () => {
    expectClose(micheLimit(100, 2), (0.142 * 9.80665 * 4) / (2 * Math.PI), { rel: 1e-12 })
    expectClose(micheLimit(1, 1e4), 0.8922, { abs: 5e-5 })
  })

  it('rises with depth and with period, without a step where the two limits meet', () => {
    for (let i = 1; i < 2000; i += 1) {
      const d = i / 1000
      expect(breakingLimit(d + 0.001, 2.5)).toBeGreaterThan(breakingLimit(d, 2.5))
      expectClose(breakingLimit(d + 0.001, 2.5), breakingLimit(d, 2.5), { abs: 7.9e-4 })
      expect(breakingLimit(1, d + 0.501)).toBeGreaterThanOrEqual(breakingLimit(1, d + 0.5))
    }
  })

  it('grows by k when depth grows by k and period by √k (Froude)', () => {
    expectClose(breakingLimit(4, 5), 4 * breakingLimit(1, 2.5), { rel: 1e-14 })
  })

  it('gives the period back from Miche’s limit', () => {
    // rows computed independently in Python: T, d, H; and the code against itself
    for (const [T, d, H] of [
      [2, 0.5, 0.3741],
      [2.5, 1, 0.7103],
      [3, 0.3, 0.2558],
    ] as const) {
      expectClose(periodAtBreaking(d, H) / PERIOD, T, { rel: 2e-3 })
      expectClose(periodAtBreaking(d, micheLimit(d, T)), T, { rel: 1e-13 })
    }
  })

  it('has no period at or above 0.142 · 2π of the depth, which the longest wave reaches', () => {
    expect(periodAtBreaking(1, 0.8923)).toBe(Infinity)
    expect(periodAtBreaking(1, 0.897)).toBe(Infinity)
    expect(periodAtBreaking(1, 0.8922)).toBeGreaterThan(20)
  })
})
