import { quantileSorted } from 'd3-array'
import type { Random } from '../domain/random.ts'
import { normalBelow, studentBound } from './student.ts'

/** Resamples, own choice; Efron and Tibshirani (1993, ch. 14.2) ask for 1000 and more for an interval. */
const RESAMPLES = 2000
/** Values above which the medians of resamples are taken as normally distributed in rank. Own choice. */
const MOST_RESAMPLED = 500

/**
 * Medians of resamples, ascending. A resample is drawn as ranks of the sorted values, so that the order in which they
 * came cannot matter.
 *
 * @param sorted  values ascending, at least one
 */
export function resampledMedians(sorted: readonly number[], random: Random): number[] {
  const size = sorted.length
  const counts = new Uint32Array(size)
  const lower = Math.floor((size - 1) / 2)
  const upper = Math.floor(size / 2)
  const medians = new Float64Array(RESAMPLES)
  for (let resample = 0; resample < RESAMPLES; resample += 1) {
    counts.fill(0)
    for (let draw = 0; draw < size; draw += 1) {
      const rank = Math.floor(random() * size)
      counts[rank] = (counts[rank] ?? 0) + 1
    }
    const low = rankAt(counts, lower)
    const high = upper === lower ? low : rankAt(counts, upper)
    medians[resample] = ((sorted[low] ?? NaN) + (sorted[high] ?? NaN)) / 2
  }
  return Array.from(medians.sort())
}

/** Rank of the value at a place of the resample, both from 0. */
function rankAt(counts: Uint32Array, place: number): number {
  let rank = 0
  let passed = counts[0] ?? 0
  while (passed <= place) {
    rank += 1
    passed += counts[rank] ?? Infinity
  }
  return rank
}

/**
 * Interval of 95 % of a median from the medians of resamples: their percentiles at Φ(∓ √(n/(n−1)) t_(97.5 %, n−1)),
 * which makes up for resamples of a few values lying too close together.
 * Above 500 values the ranks of those medians are normal about the middle, and the interval follows without resampling:
 * from the share 1/2 − t/(2√n) to 1/2 + t/(2√n) of the values.
 *
 * @param sorted  values ascending, at least two
 * @error for normal scatter the truth is inside in 92 to 97 % of samples of 8 to 60; plain percentiles: 87 to 95 %
 * @source Efron, B. & Tibshirani, R.J. (1993), An Introduction to the Bootstrap, ch. 13; expanded percentiles: Hesterberg,
 *   T.C. (2015), What teachers should know about the bootstrap, The American Statistician 69, 371-386
 */
export function medianInterval(sorted: readonly number[], random: Random): [low: number, high: number] {
  const size = sorted.length
  const bound = studentBound(size - 1)
  if (size > MOST_RESAMPLED) return between([...sorted], 0.5 - bound / (2 * Math.sqrt(size)))
  const tail = normalBelow(-Math.sqrt(size / (size - 1)) * bound)
  return between(resampledMedians(sorted, random), tail)
}

/** Quantiles with a share of the sorted values outside at either end, type 7 of Hyndman and Fan (1996). */
function between(sorted: number[], tail: number): [low: number, high: number] {
  return [quantileSorted(sorted, tail) ?? NaN, quantileSorted(sorted, 1 - tail) ?? NaN]
}
