import { expect, test } from 'vitest'
import { drawsOf } from '../../src/limits/samples.ts'
import type { Uncertainty } from '../../src/limits/study.ts'
import { expectClose } from '../support/expect-close.ts'

const ALL: Uncertainty = {
  samples: 4096,
  seed: 1,
  percentiles: [50],
  spreads: {
    depth_m: { kind: 'standard-deviation', size: 0.2 },
    width_m: { kind: 'half-range', size: 3 },
    bank_distance_m: { kind: 'standard-deviation', size: 2 },
    draught_m: { kind: 'half-range', size: 0.1 },
    current_mps: { kind: 'standard-deviation', size: 0.3 },
  },
}

const mean = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length

function deviation(values: readonly number[]): number {
  const middle = mean(values)
  return Math.sqrt(mean(values.map((value) => (value - middle) ** 2)))
}

function correlation(a: readonly number[], b: readonly number[]): number {
  const [middleOfA, middleOfB] = [mean(a), mean(b)]
  const product = mean(a.map((value, i) => (value - middleOfA) * (b[i]! - middleOfB)))
  return product / (deviation(a) * deviation(b))
}

/** Every input with the standard deviation that its spread has by theory: of a uniform one the half range over √3. */
const EXPECTED = [
  ['depth_m', 0.2],
  ['width_m', 3 / Math.sqrt(3)],
  ['bank_distance_m', 2],
  ['draught_m', 0.1 / Math.sqrt(3)],
  ['current_mps', 0.3],
] as const

// 4096 points fill every 4096th part once: what is left is the shape within a part, and the ends of the normal
test.each(EXPECTED)('shifts of %s have mean 0 and standard deviation %d', (field, expected) => {
  const shifts = [...drawsOf(ALL).shifts[field]!]
  expectClose(mean(shifts), 0, { abs: 0.001 * expected })
  expectClose(deviation(shifts), expected, { rel: 0.003 })
})

test('scores of the wave height are standard normal', () => {
  const scores = [...drawsOf(ALL).waveHeight]
  expectClose(mean(scores), 0, { abs: 0.001 })
  expectClose(deviation(scores), 1, { rel: 0.003 })
  // share within one and two standard deviations, from tables of Φ
  const within = (bound: number): number => mean(scores.map((score) => (Math.abs(score) < bound ? 1 : 0)))
  expectClose(within(1), 0.6827, { abs: 0.001 })
  expectClose(within(2), 0.9545, { abs: 0.001 })
})

test('shifts of a half range fill it evenly and stay inside', () => {
  const shifts = drawsOf(ALL).shifts.width_m!
  expect(Math.max(...shifts.map(Math.abs))).toBeLessThan(3)
  for (const bound of [-1.5, 0, 1.5]) {
    expectClose(shifts.filter((shift) => shift < bound).length / 4096, (bound + 3) / 6, { abs: 0.001 })
  }
})

test('inputs scatter independently of each other', () => {
  const { shifts, waveHeight } = drawsOf(ALL)
  const all = [...EXPECTED.map(([field]) => [...shifts[field]!]), [...waveHeight]]
  all.forEach((a, i) => {
    // random samples would scatter by 1/√4096 = 0.016
    for (const b of all.slice(i + 1)) expectClose(correlation(a, b), 0, { abs: 0.02 })
  })
})

test('each input is turned by a shift of its own', () => {
  const { shifts, waveHeight } = drawsOf(ALL)
  // the sequence itself starts at the same point in every dimension
  const first = [
    shifts.depth_m![0]! / 0.2,
    shifts.bank_distance_m![0]! / 2,
    shifts.current_mps![0]! / 0.3,
    waveHeight[0]!,
  ].map((score) => score.toFixed(9))
  expect(new Set(first).size).toBe(4)
})

test('an input that is left out leaves the draws of the others as they are', () => {
  const whole = drawsOf(ALL)
  const { depth_m: _, ...rest } = ALL.spreads
  const fewer = drawsOf({ ...ALL, spreads: rest })
  expect(fewer.shifts.depth_m).toBe(undefined)
  for (const [field] of EXPECTED.slice(1)) expect(fewer.shifts[field]).toEqual(whole.shifts[field])
  expect(fewer.waveHeight).toEqual(whole.waveHeight)
})

test('draws repeat with the seed and differ with another in every input', () => {
  expect(drawsOf(ALL)).toEqual(drawsOf({ ...ALL }))
  const [one, other] = [drawsOf(ALL), drawsOf({ ...ALL, seed: 2 })]
  for (const [field] of EXPECTED) expect(other.shifts[field]).not.toEqual(one.shifts[field])
  expect(other.waveHeight).not.toEqual(one.waveHeight)
})

test('the first samples stay the same when more are drawn', () => {
  const more = drawsOf({ ...ALL, samples: 5000 })
  expect(more.waveHeight.subarray(0, 4096)).toEqual(drawsOf(ALL).waveHeight)
})
