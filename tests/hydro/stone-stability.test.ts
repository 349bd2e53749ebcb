import { describe, it } from 'vitest'
import {
  secondaryWaveForStone,
  sternWaveForStone,
  stoneForSecondaryWave,
  stoneForSternWave,
} from '../../src/hydro/stone-stability.ts'
import { expectClose } from '../support/expect-close.ts'

/** The rows were computed with 9.81 m/s²: a period longer by this ratio has the same length under 9.80665. */
const PERIOD = Math.sqrt(9.81 / 9.80665)

// Formula of the Rock Manual (2007), from memory; rows computed independently in Python, Δ 1.65: H, T, cot a, D50.
const SECONDARY_ROWS = [
  [0.2, 2, 3, 0.0919],
  [0.3, 2.5, 3, 0.1393],
  [0.5, 3, 2, 0.2741],
] as const

// The same for the stern wave: z_max, cot a, D50.
const STERN_ROWS = [
  [0.3, 3, 0.084],
  [0.54, 3, 0.1513],
  [0.8, 2, 0.2565],
] as const

describe('stone under secondary waves', () => {
  it('needs the stones of the three rows', () => {
    for (const [H, T, cot, D50] of SECONDARY_ROWS) {
      expectClose(stoneForSecondaryWave(H, 1.65, cot, T * PERIOD), D50, { abs: 6e-5 })
    }
  })

  it('bears the waves of the three rows', () => {
    for (const [H, T, cot, D50] of SECONDARY_ROWS) {
      // D50 has four digits; H goes with its power 4/3
      expectClose(secondaryWaveForStone(D50, 1.65, cot, T * PERIOD), H, { rel: 8e-4 })
    }
  })

  it('meets the law as printed: H/(Δ D50) = 1.8 at a breaker parameter of 1', () => {
    // L0 = 9.80665·3²/(2π) = 14.0469 m, cot a = 5, hence H = L0/25 = 0.561874 m
    expectClose(stoneForSecondaryWave(0.561874, 1.65, 5, 3), 0.561874 / (1.8 * 1.65), { rel: 1e-5 })
    expectClose(secondaryWaveForStone(0.189183, 1.65, 5, 3), 0.561874, { rel: 1e-5 })
  })

  it('is inverted in closed form', () => {
    for (const H of [0.01, 0.2, 1.7]) {
      const D50 = stoneForSecondaryWave(H, 1.6, 2.5, 2.2)
      expectClose(secondaryWaveForStone(D50, 1.6, 2.5, 2.2), H, { rel: 1e-14 })
    }
  })

  it('scales: k times the stone and √k times the period bear k times the wave (Froude)', () => {
    expectClose(secondaryWaveForStone(0.4, 1.65, 3, 4), 4 * secondaryWaveForStone(0.1, 1.65, 3, 2), {
      rel: 1e-14,
    })
  })
})

describe('stone under the stern wave', () => {
  it('needs the stones and bears the waves of the three rows', () => {
    for (const [z, cot, D50] of STERN_ROWS) {
      expectClose(stoneForSternWave(z, 1.65, cot), D50, { abs: 6e-5 })
      expectClose(sternWaveForStone(D50, 1.65, cot), z, { rel: 6e-4 })
    }
  })

  it('is inverted in closed form', () => {
    expectClose(sternWaveForStone(stoneForSternWave(0.37, 1.6, 2.5), 1.6, 2.5), 0.37, { rel: 1e-15 })
  })
})
