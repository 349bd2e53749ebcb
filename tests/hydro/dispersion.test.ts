import { describe, expect, it } from 'vitest'
import {
  groupRatio,
  phaseSpeed,
  relativeWaveNumber,
  relativeWaveNumberOfSpeed,
  shoalingCoefficient,
  waveLength,
} from '../../src/hydro/dispersion.ts'
import { expectClose } from '../support/expect-close.ts'

// Layout of Shore Protection Manual (1984), App. C, Table C-1; rows computed independently in Python and rounded as the
// table prints them. Columns: d/L0, d/L, kd, tanh kd, sinh kd, cosh kd, Ks, 1/cosh kd, n, Cg/C0.
const SPM_ROWS = [
  [0.001, 0.01263, 0.0793, 0.0792, 0.0794, 1.0031, 2.5155, 0.9969, 0.9979, 0.079],
  [0.005, 0.02836, 0.1782, 0.1763, 0.1791, 1.0159, 1.6928, 0.9843, 0.9896, 0.1745],
  [0.01, 0.04032, 0.2533, 0.248, 0.256, 1.0323, 1.4348, 0.9688, 0.9792, 0.2429],
  [0.015, 0.04964, 0.3119, 0.3022, 0.317, 1.049, 1.3068, 0.9533, 0.969, 0.2928],
  [0.02, 0.05763, 0.3621, 0.3471, 0.3701, 1.0663, 1.2258, 0.9378, 0.9588, 0.3328],
  [0.03, 0.07135, 0.4483, 0.4205, 0.4634, 1.1022, 1.1254, 0.9073, 0.9388, 0.3948],
  [0.05, 0.09415, 0.5916, 0.531, 0.6267, 1.1802, 1.0229, 0.8473, 0.8999, 0.4779],
  [0.08, 0.1232, 0.7741, 0.6493, 0.8538, 1.3149, 0.9547, 0.7605, 0.8448, 0.5485],
  [0.1, 0.141, 0.8858, 0.7093, 1.0063, 1.4187, 0.9327, 0.7049, 0.8102, 0.5747],
  [0.15, 0.1833, 1.1517, 0.8183, 1.4238, 1.7399, 0.9133, 0.5748, 0.7325, 0.5994],
  [0.1592, 0.191, 1.1999, 0.8336, 1.5093, 1.8105, 0.913, 0.5523, 0.7196, 0.5998],
  [0.2, 0.2251, 1.4144, 0.8884, 1.9356, 2.1786, 0.9181, 0.459, 0.6677, 0.5932],
  [0.25, 0.2679, 1.6831, 0.9333, 2.5983, 2.7841, 0.9323, 0.3592, 0.6163, 0.5752],
  [0.3, 0.3121, 1.9611, 0.9612, 3.4832, 3.6239, 0.9489, 0.2759, 0.5777, 0.5553],
  [0.35, 0.3579, 2.2487, 0.978, 4.6847, 4.7903, 0.9641, 0.2088, 0.5501, 0.538],
  [0.4, 0.405, 2.5445, 0.9877, 6.3289, 6.4074, 0.976, 0.1561, 0.5314, 0.5249],
  [0.5, 0.5018, 3.1531, 0.9964, 11.6827, 11.7254, 0.9905, 0.0853, 0.5115, 0.5096],
  [0.6, 0.6006, 3.7739, 0.9989, 21.7631, 21.786, 0.9966, 0.0459, 0.504, 0.5034],
  [1, 1, 6.2832, 1, 267.76, 267.76, 1, 0.0037, 0.5, 0.5],
] as const

/** One unit of the last printed digit: the table is meant to be compared so. */
const UNIT = 1e-4

describe('linear dispersion', () => {
  it('gives the 19 rows of the dispersion table to one unit of the last digit', () => {
    expect(SPM_ROWS).toHaveLength(19)
    for (const [ratio, relativeDepth, kd, tanh, sinh, cosh, Ks, K, n, group] of SPM_ROWS) {
      const p = relativeWaveNumber(2 * Math.PI * ratio)
      expectClose(p / (2 * Math.PI), relativeDepth, { abs: ratio < 0.08 ? 1e-5 : UNIT })
      expectClose(p, kd, { abs: UNIT })
      expectClose(Math.tanh(p), tanh, { abs: UNIT })
      expectClose(Math.sinh(p), sinh, { abs: ratio === 1 ? 1e-2 : UNIT * 1.05 })
      expectClose(Math.cosh(p), cosh, { abs: ratio === 1 ? 1e-2 : UNIT * 1.05 })
      expectClose(shoalingCoefficient(p), Ks, { abs: UNIT })
      expectClose(1 / Math.cosh(p), K, { abs: UNIT })
      expectClose(groupRatio(p), n, { abs: UNIT })
      expectClose(groupRatio(p) * Math.tanh(p), group, { abs: UNIT })
    }
  })

  it('agrees with the pairs d/L (d/L0) on the axis of Sorensen 2006, fig. 2.5, to their three digits', () => {
    const pairs = [
      [0.1, 0.056],
      [0.2, 0.17],
      [0.3, 0.287],
      [0.4, 0.395],
      [0.5, 0.498],
      [0.6, 0.599],
      [0.7, 0.7],
    ] as const
    for (const [relativeDepth, ratio] of pairs) {
      expectClose(relativeWaveNumber(2 * Math.PI * ratio) / (2 * Math.PI), relativeDepth, { abs: 1e-3 })
    }
  })

  it('reproduces Sorensen 2006, example 2.3-1: 156 m and 15.6 m/s at 10 s in 100 m', () => {
    expectClose(waveLength(100, 10), 156, { abs: 0.5 })
    expectClose(phaseSpeed(100, 10), 15.6, { abs: 0.05 })
  })

  it('comes within 2 % of Sorensen 2006, example 2.3-2, which uses the shallow-water formula', () => {
    expectClose(phaseSpeed(2.3, 10), 4.75, { rel: 0.02 })
    expectClose(waveLength(2.3, 10), 47.5, { rel: 0.02 })
  })

  it('comes within 1.5 % of the length of Sorensen 2006, example 2.5-1, and meets its n and its height', () => {
    // printed 93.3 m by trial and error; an independent solution with g = 9.81 gives 92.37 m
    expectClose(waveLength(10, 10), 93.3, { rel: 0.015 })
    expectClose(waveLength(10, 10 * Math.sqrt(9.81 / 9.80665)), 92.37, { abs: 5e-3 })
    const p = (2 * Math.PI * 10) / waveLength(10, 10)
    expectClose(p / 10, 0.06802, { abs: 2e-5 })
    expectClose(groupRatio(p), 0.874, { abs: 5e-4 })
    expectClose(2 * shoalingCoefficient(p), 1.97, { abs: 5e-3 })
  })

  it('reproduces CEM example II-1-1: 53.2 m and 5.32 m/s at 10 s in 3 m', () => {
    // the page prints 53.2 and 53.3 m for the same length
    expectClose(waveLength(3, 10), 53.2, { abs: 0.1 })
    expectClose(phaseSpeed(3, 10), 5.32, { abs: 0.01 })
    expectClose(3 / waveLength(3, 10), 0.05641, { abs: 1e-4 })
  })

  it('satisfies p tanh p = x to the last bits from the longest to the shortest wave', () => {
    for (let x = 1e-12; x < 1e3; x *= 1.037) {
      const p = relativeWaveNumber(x)
      expectClose(p * Math.tanh(p), x, { rel: 1e-15 })
    }
  })

  it('agrees with 40-digit arithmetic to 4e-16', () => {
    // mpmath findroot, 40 digits
    expectClose(relativeWaveNumber(0.001), 0.031628048030808898, { rel: 4e-16 })
    expectClose(relativeWaveNumber(0.3), 0.57666221654507642, { rel: 4e-16 })
    expectClose(relativeWaveNumber(2), 2.0653381389747047, { rel: 4e-16 })
  })

  it('has exact limits and refuses what is no wave', () => {
    expect(relativeWaveNumber(0)).toBe(0)
    expect(relativeWaveNumber(1e-200)).toBe(1e-100)
    expect(relativeWaveNumber(40)).toBe(40)
    expect(relativeWaveNumber(Infinity)).toBe(Infinity)
    expect(relativeWaveNumber(-1)).toBeNaN()
    expect(relativeWaveNumber(NaN)).toBeNaN()
    expect(groupRatio(0)).toBe(1)
    expect(groupRatio(Infinity)).toBe(0.5)
    expect(groupRatio(1000)).toBe(0.5)
  })

  it('rises with x without a step where deep water begins', () => {
    let before = 0
    for (let x = 0.001; x < 30; x += 0.001) {
      const p = relativeWaveNumber(x)
      expect(p).toBeGreaterThan(before)
      before = p
    }
  })

  it('has its least shoaling coefficient, 0.912993, where p tanh p = 1', () => {
    // condition derived from dKs/d(kd) = 0; Sorensen 2006 prints 0.913 at d/L = 0.189
    expectClose(relativeWaveNumber(1), 1.19968, { abs: 5e-6 })
    expectClose(shoalingCoefficient(1.19967864), 0.912993, { abs: 5e-7 })
    expect(shoalingCoefficient(1.19)).toBeGreaterThan(shoalingCoefficient(1.19967864))
    expect(shoalingCoefficient(1.21)).toBeGreaterThan(shoalingCoefficient(1.19967864))
  })

  it('grows in length by k and in speed by √k when depth grows by k and period by √k (Froude)', () => {
    expectClose(waveLength(7 * 3, Math.sqrt(7) * 2.5), 7 * waveLength(3, 2.5), { rel: 1e-14 })
    expectClose(phaseSpeed(7 * 3, Math.sqrt(7) * 2.5), Math.sqrt(7) * phaseSpeed(3, 2.5), { rel: 1e-14 })
  })
})

describe('relativeWaveNumberOfSpeed', () => {
  it('gives the transverse waves of seven Froude numbers to the printed digits', () => {
    // computed independently in Python: F, p
    const rows = [
      [0.5, 3.9973],
      [0.6, 2.75541],
      [0.7, 1.96167],
      [0.8, 1.37458],
      [0.9, 0.85884],
      [0.95, 0.57549],
      [0.99, 0.24731],
    ] as const
    for (const [F, p] of rows) expectClose(relativeWaveNumberOfSpeed(F * F), p, { abs: 5.1e-6 })
  })

  it('satisfies tanh(p)/p = f2 to the last bits', () => {
    for (let e = 1e-12; e < 1; e *= 1.017) {
      const p = relativeWaveNumberOfSpeed(1 - e)
      expectClose(Math.tanh(p) / p, 1 - e, { rel: 6e-16 })
    }
  })

  it('agrees with 40-digit arithmetic in the longest waves, where a difference would cancel', () => {
    // mpmath findroot, 40 digits, at the doubles nearest to these f2
    expectClose(relativeWaveNumberOfSpeed(0.999901), 0.017234711710445062, { rel: 1e-15 })
    expectClose(relativeWaveNumberOfSpeed(0.99995), 0.012247816153649033, { rel: 1e-15 })
  })

  it('has exact limits and no wave that is faster than √(g d)', () => {
    expect(relativeWaveNumberOfSpeed(0)).toBe(Infinity)
    expect(relativeWaveNumberOfSpeed(0.001)).toBe(1000)
    expect(relativeWaveNumberOfSpeed(1)).toBe(0)
    expect(relativeWaveNumberOfSpeed(1.0001)).toBeNaN()
    expect(relativeWaveNumberOfSpeed(-0.1)).toBeNaN()
    expect(relativeWaveNumberOfSpeed(NaN)).toBeNaN()
  })

  it('falls with f2 without a step where the series and where deep water take over', () => {
    let before = Infinity
    for (let f2 = 0.01; f2 < 1; f2 += 0.00001) {
      const p = relativeWaveNumberOfSpeed(f2)
      expect(p).toBeLessThan(before)
      before = p
    }
  })
})
