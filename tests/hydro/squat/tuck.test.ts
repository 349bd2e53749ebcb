import { describe, expect, it } from 'vitest'
import { speedAtTuckTerm, tuckTerm } from '../../../src/hydro/squat/tuck.ts'
import { expectClose } from '../../support/expect-close.ts'

describe('tuckTerm', () => {
  it('is the squat of ICORELS over 2.4 for S1 at 8 kn', () => {
    // 0.4433/2.4 m, computed independently in Python with 9.81 m/s²
    const V = 8 * 0.5144444444 * Math.sqrt(9.80665 / 9.81)
    expectClose(tuckTerm(73165.68, 225, 14.4, V), 0.4433 / 2.4, { abs: 3e-5 })
  })

  it('is inverted to 2e-15 from creeping to within 1e-6 of √(g h)', () => {
    const celerity = Math.sqrt(9.80665 * 14.4)
    for (const F of [1e-6, 0.01, 0.3, 0.7, 0.99]) {
      const term = tuckTerm(73165.68, 225, 14.4, F * celerity)
      expectClose(speedAtTuckTerm(73165.68, 225, 14.4, term), F * celerity, { rel: 2e-15 })
    }
    expect(speedAtTuckTerm(73165.68, 225, 14.4, 1e12)).toBeLessThanOrEqual(celerity)
  })

  it('has no value at and above F = 1', () => {
    expect(tuckTerm(1, 1, 1, 3.14)).toBeNaN()
    expect(tuckTerm(1, 1, 1, 3.13)).toBeGreaterThan(0)
  })
})
