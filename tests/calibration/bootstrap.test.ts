import { expect, test } from 'vitest'
import { medianInterval, resampledMedians } from '../../src/calibration/bootstrap.ts'
import { randomOf } from '../../src/domain/random.ts'
import { expectClose } from '../support/expect-close.ts'
import { COMPUTED, MEASURED } from './ten-passages.ts'

const SORTED = MEASURED.map((height, at) => Math.log(height / COMPUTED[at]!)).toSorted((a, b) => a - b)

test('medians of resamples of nine are distributed as the binomial law says', () => {
  // scipy 1.17.1, stats.binom.sf(4, 9, (k + 1) / 9): five of nine draws are up to rank k
  const below = [
    0.0014492806032259168, 0.030373282606640864, 0.14484580602550423, 0.3655069053407755, 0.6344930946592244,
    0.8551541939744958, 0.9696267173933591, 0.9985507193967741, 1,
  ]
  const nine = SORTED.slice(0, 9)
  const medians = resampledMedians(nine, randomOf(1, 'nine'))
  expect(medians.length).toBeGreaterThanOrEqual(1000)
  expect(medians).toEqual(medians.toSorted((a, b) => a - b))
  nine.forEach((value, rank) => {
    const share = medians.filter((median) => median <= value).length / medians.length
    // four standard deviations of a share of 2000
    expectClose(share, below[rank]!, {
      abs: 4 * Math.sqrt((below[rank]! * (1 - below[rank]!)) / 2000) + 1e-12,
    })
  })
})

test('medians of resamples of ten have mean and deviation of another library', () => {
  // scipy 1.17.1, stats.bootstrap of np.median with 200,000 resamples
  const medians = resampledMedians(SORTED, randomOf(2, 'ten'))
  const mean = medians.reduce((sum, median) => sum + median, 0) / medians.length
  const square = medians.reduce((sum, median) => sum + (median - mean) ** 2, 0) / medians.length
  expectClose(mean, 0.130236, { abs: 0.0035 })
  expectClose(Math.sqrt(square), 0.039153, { rel: 0.08 })
})

test('the interval of ten is that of another library at expanded percentiles', () => {
  // scipy 1.17.1: quantiles of those 200,000 at norm.cdf(-sqrt(10 / 9) * t.ppf(0.975, 9)) = 0.0085506
  const [low, high] = medianInterval(SORTED, randomOf(3, 'interval'))
  expectClose(Math.exp(low), 1.041976, { abs: 0.012 })
  expectClose(Math.exp(high), 1.246968, { abs: 0.012 })
})

test('the interval of 13 values goes from the third lowest to the third highest', () => {
  // scipy 1.17.1, stats.binom.sf(6, 13, 3 / 13): medians of resamples are up to the third with 0.0157, which lies
  // between the expanded 0.01167 and the plain 0.025, whose interval would start at the fourth
  const values = Array.from({ length: 13 }, (_, rank) => rank + 1)
  const seeds = [1, 2, 3, 4, 5, 6, 7, 8, 9]
  const intervals = seeds.map((seed) => medianInterval(values, randomOf(seed, 'thirteen')))
  // an end falls on the next value in one of twelve draws of 2000 resamples
  expect(intervals.map(([low]) => low).toSorted((a, b) => a - b)[4]).toBe(3)
  expect(intervals.map(([, high]) => high).toSorted((a, b) => a - b)[4]).toBe(11)
})

test('of many values the interval comes from their ranks, as wide as that of resamples', () => {
  const normal = (count: number): number[] =>
    Array.from({ length: count }, (_, at) => Math.sinh(6 * ((at + 0.5) / count - 0.5)))
  const [low, high] = medianInterval(normal(501), () => expect.unreachable('no random number is needed'))
  const [lowByResamples, highByResamples] = medianInterval(normal(500), randomOf(1, 'many'))
  // 1.9647 (t of 500 degrees of freedom) standard deviations of a rank, 1 / (2 sqrt 501), on the scale of the values
  expectClose(high, Math.sinh(6 * 0.04389), { rel: 0.01 })
  expectClose(low, -high, { rel: 1e-9 })
  expectClose(highByResamples - lowByResamples, high - low, { rel: 0.1 })
})
