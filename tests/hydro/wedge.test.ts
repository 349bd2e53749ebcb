import { describe, expect, it } from 'vitest'
import { cuspWaveNumber } from '../../src/hydro/caustic.ts'
import {
  cuspPeriod,
  cuspPeriodAt,
  cuspPropagationAngle,
  cuspWaveLength,
  firstArrival,
  speedAtCuspPeriod,
  transverseWaveLength,
  wakeAt,
  wedgeHalfAngle,
} from '../../src/hydro/wedge.ts'
import { expectClose } from '../support/expect-close.ts'
import { DEGREE, WEDGE_ROWS, bisect } from '../support/wedge-table.ts'

const G = 9.80665

/** Tables were computed with 9.81 m/s²: speeds times this, periods over it, give the same waves under 9.80665. */
const TO_OUR_GRAVITY = Math.sqrt(9.80665 / 9.81)

/** tan α of the line on which the wave that runs at θ is found, from the dispersion relation and the group speed. */
function lineOf(F: number, theta: number): number {
  const c2 = Math.cos(theta) ** 2
  const p = bisect((q) => F * F * c2 * q - Math.tanh(q), 1e-9, 2 / (F * F * c2))
  const N = 0.5 + p / Math.sinh(2 * p)
  return (N * Math.sin(theta) * Math.cos(theta)) / (1 - N * c2)
}

/** Greatest α over all waves, by a scan and golden sections. */
function bruteForce(F: number): { alpha: number; theta: number } {
  let best = 0.001
  for (let theta = 0.001; theta < 1.4; theta += 0.001) if (lineOf(F, theta) > lineOf(F, best)) best = theta
  let low = best - 0.001
  let high = best + 0.001
  const share = (Math.sqrt(5) - 1) / 2
  for (let i = 0; i < 60; i += 1) {
    const a = high - share * (high - low)
    const b = low + share * (high - low)
    if (lineOf(F, a) > lineOf(F, b)) high = b
    else low = a
  }
  return { alpha: Math.atan(lineOf(F, low)), theta: low }
}

describe('wake in deep water', () => {
  it('has Kelvin’s half-angle, 19.47122 deg (NIST DLMF 36.13.5)', () => {
    for (const F of [0.01, 0.2, 0.25, 0.2501, 0.3])
      expectClose(wedgeHalfAngle(F) / DEGREE, 19.47122, { abs: 5e-6 })
  })

  it('has cusp waves that run at 35.26439 deg, their crests at 54.73561 deg or 0.304 pi', () => {
    for (const F of [0.01, 0.2, 0.25, 0.2501]) {
      const theta = cuspPropagationAngle(F)
      expectClose(theta / DEGREE, 35.26439, { abs: 5e-6 })
      expectClose(90 - theta / DEGREE, 54.73561, { abs: 5e-6 })
      expectClose(0.5 - theta / Math.PI, 0.304, { abs: 5e-4 })
    }
  })

  it('has the lengths, periods and cusp speeds of the deep-water table', () => {
    // computed independently in Python: V, L_t, L_d, T_d, C_d
    const rows = [
      [2, 2.562, 1.708, 1.046, 1.633],
      [3, 5.764, 3.843, 1.569, 2.449],
      [5, 16.012, 10.675, 2.615, 4.082],
      [5.1444, 16.95, 11.3, 2.69, 4.2],
      [10, 64.049, 42.699, 5.23, 8.165],
    ] as const
    for (const [V, transverse, length, period, celerity] of rows) {
      const wake = wakeAt(V * TO_OUR_GRAVITY, 1000)
      expectClose(wake.transverseWaveLength, transverse, { abs: 6e-4 })
      expectClose(wake.waveLength, length, { abs: 6e-4 })
      expectClose(wake.period * TO_OUR_GRAVITY, period, { abs: 6e-4 })
      expectClose(V * Math.cos(wake.propagationAngle), celerity, { abs: 6e-4 })
    }
  })

  it('has cusp waves of 4.18879 V²/g and 5.13020 V/g', () => {
    expectClose(cuspWaveLength(500, 3 / Math.sqrt(500 * G)), (4.18879 * 9) / G, { rel: 1e-6 })
    expectClose(cuspPeriodAt(3, 500), (5.1302 * 3) / G, { rel: 1e-6 })
    expectClose(transverseWaveLength(500, 3 / Math.sqrt(500 * G)), (2 * Math.PI * 9) / G, { rel: 1e-12 })
  })
})

describe('wake at finite depth', () => {
  it('gives the 14 rows of the wedge table to the printed digits', () => {
    expect(WEDGE_ROWS).toHaveLength(14)
    for (const [F, alpha, theta, crest, p, length, period] of WEDGE_ROWS) {
      expectClose(wedgeHalfAngle(F) / DEGREE, alpha, { abs: 6e-5 })
      expectClose(cuspPropagationAngle(F) / DEGREE, theta, { abs: 6e-5 })
      expectClose(90 - cuspPropagationAngle(F) / DEGREE, crest, { abs: 6e-5 })
      expectClose(cuspWaveNumber(F), p, { abs: 6e-6 })
      expectClose(cuspWaveLength(1, F), length, { abs: 6e-5 })
      expectClose(cuspPeriod(G, F), period, { abs: 6e-5 })
    }
  })

  it('agrees with 40-digit arithmetic to 1e-14 on both sides of every change of branch', () => {
    // mpmath, 40 digits: F, kd, α, θ
    const rows = [
      [0.55, 4.92670496747136047, 0.340312472776068436, 0.610958346056771294],
      [0.83, 1.52279135459259628, 0.461672269461437122, 0.373784646213143101],
      [0.975, 0.485146211226604252, 0.989691617529998008, 0.15389351832928953],
      [0.9999, 0.0300025507273472087, 1.53081144974911577, 0.00999881716224789359],
      [1 - 2 ** -40, 2.86102294922096177e-6, 1.57079251209763101, 9.53674316405223622e-7],
    ] as const
    for (const [F, p, alpha, theta] of rows) {
      expectClose(cuspWaveNumber(F), p, { rel: 3e-15 })
      expectClose(wedgeHalfAngle(F), alpha, { rel: 3e-15 })
      expectClose(cuspPropagationAngle(F), theta, { rel: 5e-15 })
    }
  })

  it('is the greatest angle over all waves, found by brute force', () => {
    for (const F of [0.4, 0.55, 0.65, 0.75, 0.85, 0.9, 0.97]) {
      const { alpha, theta } = bruteForce(F)
      // the maximum is flat: its place is known to about the root of its precision
      expectClose(wedgeHalfAngle(F), alpha, { abs: 1e-12 })
      expectClose(cuspPropagationAngle(F), theta, { abs: 1e-6 })
    }
  })

  it('approaches tan α = 1/(2 √(2 (1 - F²))) and sin θ = √((1 - F²)/2) towards F = 1', () => {
    for (const [F, rel] of [
      [0.999, 2.5e-3],
      [0.9999, 2.5e-4],
      [0.999999, 2.5e-6],
    ] as const) {
      const rest = 1 - F * F
      expectClose(Math.tan(wedgeHalfAngle(F)), 1 / (2 * Math.sqrt(2 * rest)), { rel })
      expectClose(Math.sin(cuspPropagationAngle(F)), Math.sqrt(rest / 2), { rel })
    }
  })

  it('keeps the wedge within 1.06 deg and turns the waves by 5.3 deg at F = 0.7, the end of the deep pattern in CEM II-7', () => {
    expectClose(wedgeHalfAngle(0.7) / DEGREE - 19.4712, 1.06, { abs: 5e-3 })
    expectClose(cuspPropagationAngle(0.7) / DEGREE - 35.2644, -5.34, { abs: 5e-3 })
  })

  it('is asin(1/F) with acos(1/F) for faster ships (Sorensen 2006, p. 105)', () => {
    // computed independently in Python: F, α, θ in degrees
    const rows = [
      [1, 90, 0],
      [1.05, 72.2472, 17.7528],
      [1.1, 65.38, 24.62],
      [1.2, 56.4427, 33.5573],
      [1.5, 41.8103, 48.1897],
      [2, 30, 60],
    ] as const
    for (const [F, alpha, theta] of rows) {
      expectClose(wedgeHalfAngle(F) / DEGREE, alpha, { abs: 6e-5 })
      expectClose(cuspPropagationAngle(F) / DEGREE, theta, { abs: 6e-5 })
    }
  })

  it('has no finite cusp wave and no transverse wave at and above F = 1', () => {
    for (const F of [1, 1.0001, 2, Infinity]) {
      expect(cuspPeriod(3, F)).toBeNaN()
      expect(cuspWaveLength(3, F)).toBeNaN()
      expect(transverseWaveLength(3, F)).toBeNaN()
    }
    expect(cuspWaveNumber(1)).toBe(0)
    expect(cuspWaveNumber(1.1)).toBeNaN()
    expect(cuspWaveNumber(NaN)).toBeNaN()
    expect(cuspPeriodAt(1.005 * Math.sqrt(G * 3), 3)).toBeNaN()
    const wake = wakeAt(1.005 * Math.sqrt(G * 3), 3)
    expect([wake.period, wake.waveLength, wake.transverseWaveLength]).toEqual([NaN, NaN, NaN])
    expect([wake.halfAngle, wake.propagationAngle]).toEqual([
      wedgeHalfAngle(wake.froudeNumber),
      cuspPropagationAngle(wake.froudeNumber),
    ])
  })

  it('opens, turns and lengthens without a step from deep water to F = 1', () => {
    let alpha = wedgeHalfAngle(0.1)
    let theta = cuspPropagationAngle(0.1)
    let p = Infinity
    for (let F = 0.1; F < 1; F += 0.0001) {
      expect(wedgeHalfAngle(F)).toBeGreaterThanOrEqual(alpha - 1e-15)
      expect(cuspPropagationAngle(F)).toBeLessThanOrEqual(theta + 1e-15)
      expect(cuspWaveNumber(F)).toBeLessThan(p)
      alpha = wedgeHalfAngle(F)
      theta = cuspPropagationAngle(F)
      p = cuspWaveNumber(F)
    }
    expectClose(wedgeHalfAngle(1 - 1e-12), Math.PI / 2, { abs: 1e-5 })
    expectClose(cuspPropagationAngle(1 - 1e-12), 0, { abs: 1e-5 })
  })

  it('gives the three rows with dimensions', () => {
    // computed independently in Python: V, d, F, α, θ, C, L, T
    const rows = [
      [4, 3, 0.73734, 21.4665, 27.4321, 3.5502, 8.241, 2.3213],
      [3, 2, 0.67729, 20.1574, 31.3151, 2.563, 4.2294, 1.6502],
      [5, 10, 0.50482, 19.4762, 35.2084, 4.0853, 10.6897, 2.6166],
    ] as const
    for (const [V, d, F, alpha, theta, C, L, T] of rows) {
      const wake = wakeAt(V * TO_OUR_GRAVITY, d)
      expectClose(wake.froudeNumber, F, { abs: 6e-6 })
      expectClose(wake.halfAngle / DEGREE, alpha, { abs: 6e-5 })
      expectClose(wake.propagationAngle / DEGREE, theta, { abs: 6e-5 })
      expectClose(wake.waveLength, L, { abs: 6e-5 })
      expectClose(wake.period * TO_OUR_GRAVITY, T, { abs: 6e-5 })
      expectClose(wake.waveLength / wake.period / TO_OUR_GRAVITY, C, { abs: 6e-5 })
    }
  })

  it('says the same through wakeAt as through its parts', () => {
    for (const [V, d] of [
      [4, 3],
      [1, 30],
      [2.4, 0.7],
    ] as const) {
      const wake = wakeAt(V, d)
      const F = wake.froudeNumber
      expect(wake).toEqual({
        froudeNumber: V / Math.sqrt(G * d),
        halfAngle: wedgeHalfAngle(F),
        propagationAngle: cuspPropagationAngle(F),
        period: cuspPeriod(d, F),
        waveLength: cuspWaveLength(d, F),
        transverseWaveLength: transverseWaveLength(d, F),
      })
      expect(cuspPeriodAt(V, d)).toBe(wake.period)
    }
  })

  it('has cusp crests that keep up with the ship: L / T = V cos θ', () => {
    for (const [V, d] of [
      [1, 20],
      [3, 2],
      [4, 3],
      [5.4, 3],
    ] as const) {
      const wake = wakeAt(V, d)
      expectClose(wake.waveLength / wake.period, V * Math.cos(wake.propagationAngle), { rel: 1e-14 })
    }
  })

  it('gives the speed back from the cusp period', () => {
    for (let F = 0.05; F < 0.999; F += 0.013) {
      const V = F * Math.sqrt(G * 4.2)
      expectClose(speedAtCuspPeriod(4.2, cuspPeriodAt(V, 4.2)), V, { rel: 2e-15 })
    }
    expect(speedAtCuspPeriod(4, Infinity)).toBe(Math.sqrt(G * 4))
    expectClose(speedAtCuspPeriod(5000, 2), (2 * G) / 5.1301993, { rel: 1e-7 })
  })

  it('keeps angles, and multiplies lengths by k and periods by √k, under Froude’s scale', () => {
    const small = wakeAt(3, 2)
    const large = wakeAt(3 * Math.sqrt(9), 2 * 9)
    expectClose(large.halfAngle, small.halfAngle, { rel: 1e-14 })
    expectClose(large.propagationAngle, small.propagationAngle, { rel: 1e-14 })
    expectClose(large.waveLength, 9 * small.waveLength, { rel: 1e-14 })
    expectClose(large.transverseWaveLength, 9 * small.transverseWaveLength, { rel: 1e-14 })
    expectClose(large.period, 3 * small.period, { rel: 1e-14 })
  })
})

describe('transverseWaveLength', () => {
  it('gives the seven rows of the table, and its ratio to the deep length', () => {
    // computed independently in Python: F, L/d, L/(2π V²/g)
    const rows = [
      [0.5, 1.5719, 1.0007],
      [0.6, 2.2803, 1.0081],
      [0.7, 3.203, 1.0403],
      [0.8, 4.571, 1.1367],
      [0.9, 7.3159, 1.4375],
      [0.95, 10.918, 1.9254],
      [0.99, 25.4066, 4.1257],
    ] as const
    for (const [F, length, ratio] of rows) {
      expectClose(transverseWaveLength(1, F), length, { abs: 6e-5 })
      expectClose(transverseWaveLength(1, F) / (2 * Math.PI * F * F), ratio, { abs: 6e-5 })
    }
  })
})

describe('firstArrival', () => {
  it('gives the three rows of the table', () => {
    // computed independently in Python: V, d, y, t
    const rows = [
      [4, 3, 25, 15.894],
      [3, 2, 20, 18.161],
      [5, 10, 40, 22.621],
    ] as const
    for (const [V, d, y, t] of rows) {
      const alpha = wakeAt(V * TO_OUR_GRAVITY, d).halfAngle
      expectClose(firstArrival(y, V, alpha), t, { abs: 6e-4 })
    }
  })

  it('is at once where the wedge is a right angle', () => {
    expectClose(firstArrival(25, 4, Math.PI / 2), 0, { abs: 1e-12 })
  })
})
