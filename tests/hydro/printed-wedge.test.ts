import { describe, expect, it } from 'vitest'
import { cuspPropagationAngle, wedgeHalfAngle } from '../../src/hydro/wedge.ts'
import { phaseSpeed } from '../../src/hydro/dispersion.ts'
import {
  printedFroudeNumber,
  printedWedgeHalfAngle,
  weggelSorensenPropagationAngle,
} from '../../src/hydro/printed-wedge.ts'
import { expectClose } from '../support/expect-close.ts'
import { DEGREE, WEDGE_ROWS, bisect } from '../support/wedge-table.ts'

const G = 9.80665

/** Tables were computed with 9.81 m/s²: speeds times this, periods over it, give the same waves under 9.80665. */
const TO_OUR_GRAVITY = Math.sqrt(9.80665 / 9.81)

describe('printed forms kept for comparison', () => {
  it('gives the half-angle and direction columns of the widely printed closed form', () => {
    for (const [F, , , , , , , alpha, theta] of WEDGE_ROWS) {
      const p = bisect((q) => F - printedFroudeNumber(q), 1e-6, 100)
      expectClose(printedWedgeHalfAngle(p) / DEGREE, alpha, { abs: 6e-5 })
      // cos²θ = F-independent 2/(3 - m) is F² p / tanh p upside down
      expectClose(Math.acos(Math.sqrt(Math.tanh(p) / (p * F * F))) / DEGREE, theta, { abs: 6e-5 })
    }
  })

  it('is the same line in both of its printings, sin α and cos² α', () => {
    for (const p of [0.01, 0.3, 1, 4, 30]) {
      const m = (2 * p) / Math.sinh(2 * p)
      expectClose(Math.cos(printedWedgeHalfAngle(p)) ** 2, (8 * (1 - m)) / (3 - m) ** 2, { rel: 1e-9 })
    }
    expectClose(printedWedgeHalfAngle(1e-9), Math.PI / 2, { abs: 1e-8 })
    expectClose(printedWedgeHalfAngle(500) / DEGREE, 19.47122, { abs: 5e-6 })
  })

  it('lies inside the exact edge above F = 0.6: 28.5 against 34.6 deg at F = 0.9', () => {
    const p = bisect((q) => 0.9 - printedFroudeNumber(q), 1e-6, 100)
    expectClose(printedWedgeHalfAngle(p) / DEGREE, 28.5, { abs: 1e-3 })
    expectClose(wedgeHalfAngle(0.9) / DEGREE, 34.62, { abs: 5e-3 })
  })

  it('strays from the exact edge by no more than the docstrings say: 17.4 deg, and 9.3 deg for Weggel & Sorensen', () => {
    let closed = 0
    let fitted = 0
    for (let p = 0.01; p < 20; p += 0.01) {
      const F = printedFroudeNumber(p)
      closed = Math.max(closed, (wedgeHalfAngle(F) - printedWedgeHalfAngle(p)) / DEGREE)
    }
    for (let F = 0.3; F < 1; F += 0.002) {
      fitted = Math.max(fitted, (weggelSorensenPropagationAngle(F) - cuspPropagationAngle(F)) / DEGREE)
    }
    expectClose(closed, 17.4, { abs: 0.05 })
    expectClose(fitted, 9.3, { abs: 0.05 })
  })

  it('gives the direction column of Weggel & Sorensen 1986 (from memory)', () => {
    for (const row of WEDGE_ROWS) {
      expectClose(weggelSorensenPropagationAngle(row[0]) / DEGREE, row[9], { abs: 6e-4 })
    }
    expect(weggelSorensenPropagationAngle(1)).toBe(0)
    expect(weggelSorensenPropagationAngle(1.005)).toBe(0)
  })

  it('gives the rows with dimensions by Weggel & Sorensen’s direction: L and T follow from V cos θ', () => {
    // computed independently in Python: V, d, F, θ, C, L, T
    const rows = [
      [4, 3, 0.73734, 33.7616, 3.3254, 7.1562, 2.152],
      [3, 2, 0.67729, 34.5362, 2.4713, 3.9246, 1.5881],
      [5, 10, 0.50482, 35.1774, 4.0869, 10.6979, 2.6176],
    ] as const
    for (const [V, d, F, theta, C, L, T] of rows) {
      const direction = weggelSorensenPropagationAngle(F)
      expectClose(direction / DEGREE, theta, { abs: 2e-4 })
      expectClose(V * Math.cos(direction), C, { abs: 6e-5 })
      const celerity = phaseSpeed(d, T / TO_OUR_GRAVITY) / TO_OUR_GRAVITY
      expectClose(celerity, C, { abs: 3e-4 })
      expectClose(celerity * T, L, { abs: 6e-4 })
    }
  })

  it('reproduces CEM example II-7-5: 10 kn in 5 m, F 0.73, 33.88 deg, 2.8 s', () => {
    // the page prints 5.157 m/s for 10 kn (5.144 m/s is right) and truncates F = 0.736 to 0.73
    expectClose(5.157 / Math.sqrt(G * 5), 0.736, { abs: 5e-4 })
    const theta = weggelSorensenPropagationAngle(0.73)
    expectClose(theta / DEGREE, 33.88, { abs: 0.015 })
    const celerity = 5.157 * Math.cos(theta)
    expectClose(celerity, 4.281, { abs: 1e-3 })
    const period = bisect((T) => phaseSpeed(5, T) - celerity, 1, 10)
    expectClose(period, 2.8, { abs: 0.05 })
    expectClose(period, 2.769, { abs: 3e-3 })
  })
})
