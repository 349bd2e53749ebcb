import { expect, test } from 'vitest'
import { fitOf } from '../../src/calibration/fit.ts'
import type { HullFit, MethodFit } from '../../src/calibration/measurement.ts'
import { joined, passagesOf, type Water } from './passages.ts'

const FACTOR = 1.3
const SCATTERS = [0.1, 0.3, 0.5]

/** The first method's fit of one trial. */
function trial(water: Omit<Water, 'seed' | 'factor'>, at: number): MethodFit {
  const passages = passagesOf({ factor: FACTOR, seed: 1 + at * 7919 + water.passages * 104_729, ...water })
  return fitOf(passages, ['first'], { seed: at }).methods[0]!
}

test.each([
  [8, 0],
  [9, 0],
  [12, 0.1],
  [21, 0.1],
  [40, 0.1],
  [60, 0.05],
])(
  'the interval of %d passages with a share %d of blunders covers the truth at its rate',
  (count, blunders) => {
    const trials = 450
    let covered = 0
    for (let at = 0; at < trials; at += 1) {
      const { interval } = trial({ passages: count, scatter: SCATTERS[at % 3]!, blunders }, at)
      if (interval[0] <= FACTOR && FACTOR <= interval[1]) covered += 1
    }
    console.info(`coverage of ${count} passages: ${(covered / trials).toFixed(3)}`)
    expect(covered / trials).toBeGreaterThanOrEqual(0.92)
    expect(covered / trials).toBeLessThanOrEqual(0.98)
  },
)

test.each([5, 6, 7])('the interval of %d passages covers the truth at least at its exact rate', (count) => {
  const trials = 450
  let covered = 0
  for (let at = 0; at < trials; at += 1) {
    const { interval } = trial({ passages: count, scatter: 0.3 }, at)
    if (interval[0] <= FACTOR && FACTOR <= interval[1]) covered += 1
  }
  // 1 - 2^(1 - n), less three standard deviations of a share of 450 trials
  const exact = 1 - 2 ** (1 - count)
  expect(covered / trials).toBeGreaterThanOrEqual(exact - 3 * Math.sqrt((exact * (1 - exact)) / trials))
})

test('a wrong power of the speed is flagged in 95 % of trials, a right one left alone in 95 %', () => {
  const trials = 300
  let flagged = 0
  let falselyFlagged = 0
  for (let at = 0; at < trials; at += 1) {
    const water = { passages: 40, scatter: [0.1, 0.2, 0.3][at % 3]!, blunders: 0.05 }
    if (trial({ ...water, missedPower: 1 }, at).trend.speed.isFlagged) flagged += 1
    const { speed, distance, depth } = trial(water, at).trend
    if (speed.isFlagged || distance.isFlagged || depth.isFlagged) falselyFlagged += 1
  }
  console.info(`flagged: wrong power ${flagged / trials}, any of three right ones ${falselyFlagged / trials}`)
  expect(flagged / trials).toBeGreaterThanOrEqual(0.95)
  expect(falselyFlagged / trials).toBeLessThanOrEqual(0.05)
})

/** Rates over trials of two hulls whose factors are 1 and 1.5. */
function hulls(displacement: number, planing: number) {
  const trials = 300
  let apart = 0
  let weights = 0
  let gaps = 0
  for (let at = 0; at < trials; at += 1) {
    const passages = joined(
      passagesOf({ passages: displacement, seed: 11 + at * 7919, factor: 1, scatter: 0.25 }),
      passagesOf({
        passages: planing,
        seed: 77 + at * 104_729,
        factor: 1.5,
        scatter: 0.25,
        hull: 'planing',
      }),
    )
    const [slow, fast] = fitOf(passages, ['first'], { seed: at }).methods[0]!.byHull as [HullFit, HullFit]
    if (fast.interval[0] > slow.interval[1]) apart += 1
    weights += fast.pooledWeight
    gaps += Math.log(fast.factor / slow.factor)
  }
  const rates = { apart: apart / trials, weight: weights / trials, gap: gaps / trials / Math.log(1.5) }
  console.info(`hulls of ${displacement} and ${planing} passages:`, rates)
  return rates
}

test('two hulls with different factors are told apart with 20 passages each', () => {
  const { apart, weight, gap } = hulls(20, 20)
  expect(apart).toBeGreaterThanOrEqual(0.9)
  expect(weight).toBeLessThan(0.2)
  expect(gap).toBeGreaterThan(0.85)
})

test.each([20, 3])('with %d and 3 passages they are pooled', (count) => {
  const { apart, weight, gap } = hulls(count, 3)
  expect(apart).toBeLessThan(0.2)
  expect(weight).toBeGreaterThan(0.4)
  expect(gap).toBeLessThan(0.65)
})
