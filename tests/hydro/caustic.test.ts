import { describe, expect, it } from 'vitest'
import {
  DEEP_FROUDE,
  cuspFroudeNumber,
  cuspHalfAngle,
  cuspTangentSquared,
  cuspWaveNumber,
} from '../../src/hydro/caustic.ts'
import { expectClose } from '../support/expect-close.ts'
import { DEGREE, WEDGE_ROWS } from '../support/wedge-table.ts'

describe('caustic', () => {
  it('gives the seven parametric points to the printed digits', () => {
    // computed independently in Python: kd, F, α, θ
    const rows = [
      [0.2, 0.995589, 75.02551, 3.78577],
      [0.5, 0.973521, 55.88772, 9.06144],
      [1, 0.908177, 36.02611, 16.06898],
      [1.5, 0.833255, 26.72153, 21.21043],
      [2, 0.768305, 22.64376, 25.35907],
      [3, 0.67504, 20.12751, 31.44232],
      [5, 0.546146, 19.49516, 35.03352],
    ] as const
    for (const [p, F, alpha, theta] of rows) {
      expectClose(cuspFroudeNumber(p), F, { abs: 6e-7 })
      expectClose(cuspHalfAngle(p, cuspTangentSquared(p)) / DEGREE, alpha, { abs: 6e-6 })
      expectClose(Math.atan(Math.sqrt(cuspTangentSquared(p))) / DEGREE, theta, { abs: 6e-6 })
    }
  })

  it('has m, N, A and cos² θ of the parametric points, from which its own form is rid of 0/0', () => {
    // computed independently in Python: kd, N, A, cos²θ
    const rows = [
      [0.2, 0.986911, -1.963221, 0.995641],
      [0.5, 0.925459, -1.786719, 0.975196],
      [1, 0.775721, -1.321108, 0.923385],
      [1.5, 0.649732, -0.861333, 0.869105],
      [2, 0.573287, -0.515706, 0.816568],
      [3, 0.514873, -0.153288, 0.727892],
      [5, 0.500454, -0.008179, 0.67046],
    ] as const
    for (const [p, N, A, cosine] of rows) {
      expectClose(1 / (1 + cuspTangentSquared(p)), cosine, { abs: 6e-7 })
      expectClose(1 / (1 + cuspTangentSquared(p)), (N - A) / (N * (2 - N) - A), { abs: 2e-6 })
    }
  })

  it('gives kd of the 14 rows of the wedge table to the printed digits', () => {
    expect(WEDGE_ROWS).toHaveLength(14)
    for (const [F, , , , p] of WEDGE_ROWS) expectClose(cuspWaveNumber(F), p, { abs: 6e-6 })
  })

  it('agrees with 40-digit arithmetic below the change to the series, at F = 0.975', () => {
    // mpmath, 40 digits: kd, α, θ
    const p = 0.485146211226604252
    expectClose(cuspWaveNumber(0.975), p, { rel: 3e-15 })
    expectClose(cuspHalfAngle(p, cuspTangentSquared(p)), 0.989691617529998008, { rel: 1e-15 })
    expectClose(Math.atan(Math.sqrt(cuspTangentSquared(p))), 0.15389351832928953, { rel: 1e-15 })
  })

  it('has a wave of infinite length at F = 1 and none beyond', () => {
    expect(cuspWaveNumber(1)).toBe(0)
    expect(cuspWaveNumber(1.005)).toBeNaN()
    expect(cuspWaveNumber(1.01)).toBeNaN()
    expect(cuspWaveNumber(NaN)).toBeNaN()
  })

  it('has tan² θ = p²/9 in the longest waves, and 1/2 in deep water', () => {
    expectClose(cuspTangentSquared(1e-5), 1e-10 / 9, { rel: 1e-9 })
    expectClose(cuspTangentSquared(1e-30), 1e-60 / 9, { rel: 1e-14 })
    expect(cuspTangentSquared(24)).toBe(0.5)
    expect(cuspTangentSquared(1e9)).toBe(0.5)
    expect(DEEP_FROUDE).toBe(0.25)
  })

  it('finds the cusp wave of any Froude number to the last bits', () => {
    for (let F = 0.01; F < 1; F += 0.00037)
      expectClose(cuspFroudeNumber(cuspWaveNumber(F)), F, { rel: 2e-15 })
    expect(cuspFroudeNumber(0)).toBe(1)
    expectClose(cuspFroudeNumber(1500), 0.0316227766, { rel: 1e-9 })
  })

  it('has a Froude number that falls with kd without a step where the series and where deep water take over', () => {
    for (const p of [0.5, 24]) {
      expectClose(cuspFroudeNumber(p - 1e-9), cuspFroudeNumber(p + 1e-9), { abs: 1e-9 })
      expectClose(cuspTangentSquared(p - 1e-13), cuspTangentSquared(p + 1e-13), { rel: 2e-12 })
    }
    let before = 1
    for (let p = 0.01; p < 30; p += 0.01) {
      const F = cuspFroudeNumber(p)
      expect(F).toBeLessThan(before)
      before = F
    }
  })
})
