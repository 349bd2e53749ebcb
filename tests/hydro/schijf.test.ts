import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { lowerLimitFroude, upperLimitFroude } from '../../src/hydro/schijf.ts'
import { romischCriticalSpeed } from '../../src/hydro/squat/romisch-1989.ts'
import { expectClose } from '../support/expect-close.ts'
import { aSetting, G, spread } from '../support/setting.ts'

// Formula of Schijf (1949), from memory; computed independently, 5 decimals: m, F_L, F_U.
const LIMITS = [
  [0.01, 0.87841, 1.12327],
  [0.02, 0.8286, 1.17475],
  [0.03, 0.79063, 1.21442],
  [0.05, 0.73089, 1.27758],
  [0.08, 0.6615, 1.3522],
  [0.1, 0.62281, 1.39443],
  [0.12, 0.58813, 1.4327],
  [0.15, 0.54162, 1.4847],
  [0.18, 0.50008, 1.53185],
  [0.2, 0.47455, 1.56118],
  [0.25, 0.41668, 1.62883],
  [0.3, 0.36549, 1.6902],
  [0.4, 0.27777, 1.79958],
  [0.5, 0.20467, 1.89638],
] as const

describe('lowerLimitFroude and upperLimitFroude', () => {
  it('give the fourteen rows of the table', () => {
    expect(LIMITS).toHaveLength(14)
    for (const [m, lower, upper] of LIMITS) {
      expectClose(lowerLimitFroude(m), lower, { abs: 5.1e-6 }) // half a unit of the last digit
      expectClose(upperLimitFroude(m), upper, { abs: 5.1e-6 })
    }
  })

  it('bound the critical band around 1 for small blockage', () => {
    // computed independently, 3 decimals: m, F_L, F_U
    for (const [m, lower, upper] of [
      [0.005, 0.914, 1.087],
      [0.01, 0.878, 1.123],
      [0.02, 0.829, 1.175],
      [0.05, 0.731, 1.278],
      [0.1, 0.623, 1.394],
    ] as const) {
      expectClose(lowerLimitFroude(m), lower, { abs: 5.1e-4 })
      expectClose(upperLimitFroude(m), upper, { abs: 5.1e-4 })
    }
  })

  it('are both 1 in open water', () => {
    // asin(1)/3 = π/6; near m = 0 the limits part with √m, and rounding of π/6 is all that remains
    expectClose(lowerLimitFroude(0), 1, { abs: 1e-15 })
    expectClose(upperLimitFroude(0), 1, { abs: 1e-15 })
  })

  it('are 0 and 3^0.75 when the hull fills the section', () => {
    // m = 1: q³ - 3 q = 0 with q = F^(2/3), so q = 0 or √3
    expectClose(lowerLimitFroude(1), 0, { abs: 0 })
    expectClose(upperLimitFroude(1), 3 ** 0.75, { rel: 1e-14 })
  })

  it('solve 1 - m + F²/2 - (3/2) F^(2/3) = 0 for every blockage', () => {
    fc.assert(
      fc.property(spread(1e-6, 0.999), (m) => {
        for (const F of [lowerLimitFroude(m), upperLimitFroude(m)]) {
          // terms up to 3, each within rounding
          expectClose(1 - m + (F * F) / 2 - 1.5 * Math.cbrt(F * F), 0, { abs: 4e-15 })
        }
        expect(lowerLimitFroude(m)).toBeLessThan(1)
        expect(upperLimitFroude(m)).toBeGreaterThan(1)
      }),
    )
  })

  it('are fixed points of the form that the Rock Manual prints', () => {
    // F = ((2/3)(1 - m + F²/2))^1.5, from memory
    for (const [m] of LIMITS) {
      const F = lowerLimitFroude(m)
      expectClose(((2 / 3) * (1 - m + 0.5 * F * F)) ** 1.5, F, { rel: 1e-13 })
    }
  })

  it('fall and rise with blockage', () => {
    fc.assert(
      fc.property(spread(1e-4, 0.98), spread(1.0001, 1.02), (m, factor) => {
        expect(lowerLimitFroude(m * factor)).toBeLessThan(lowerLimitFroude(m))
        expect(upperLimitFroude(m * factor)).toBeGreaterThan(upperLimitFroude(m))
      }),
    )
  })

  it('keep within 1.5 % of the power law 0.78 (1 - m)^2.25 for blockages of 0.10 to 0.20, and not at 0.01', () => {
    // quoted in US and PIANC literature, from memory; the figures in the table computed independently
    for (const m of [0.1, 0.12, 0.15, 0.18, 0.2]) {
      expectClose(lowerLimitFroude(m), 0.78 * (1 - m) ** 2.25, { rel: 0.015 })
    }
    expectClose((0.78 * 0.99 ** 2.25) / lowerLimitFroude(0.01), 0.87, { abs: 0.005 })
  })

  it('give the canal coefficient of Roemisch, (2 cos(π/3 + acos(1 - m)/3))^1.5', () => {
    fc.assert(
      fc.property(spread(1e-3, 0.9), (m) => {
        const K_C = (2 * Math.cos(Math.PI / 3 + Math.acos(1 - m) / 3)) ** 1.5
        expectClose(lowerLimitFroude(m), K_C, { rel: 1e-13 })
        const speed = romischCriticalSpeed(aSetting({ blockage: m, meanDepth: 3 }))
        expectClose(lowerLimitFroude(m) * Math.sqrt(G * 3), speed, { rel: 1e-13 })
      }),
    )
  })

  it('have no value for a blockage below 0 or that is no number', () => {
    expect(lowerLimitFroude(-0.01)).toBeNaN()
    expect(upperLimitFroude(-0.01)).toBeNaN()
    expect(lowerLimitFroude(NaN)).toBeNaN()
  })
})
