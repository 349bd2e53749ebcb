import { ascending, mean } from 'd3-array'
import type { Measurement } from './measurement.ts'
import { medianOf } from './robust.ts'
import { dot } from './least-squares.ts'
import type { Ratios } from './ratio.ts'
import { twoSidedProbability } from './student.ts'

/** Probability by chance below which two methods are told apart. */
const SIGNIFICANT = 0.05
/** Passages that both must cover to be compared. Own choice. */
const LEAST_COMMON = 5
/** Share of the squared sums below which squared differences are rounding alone. Own choice. */
const ROUNDING = 1e-18

/**
 * Root mean square of leave-one-out errors: log ratio less the median of the others, outliers not among those. An
 * outlier counts as far as the bound of the outliers and no further: one wrong reading does not decide, and leaving out
 * many is no way to win (own choice).
 *
 * @source leave-one-out: Efron, B. & Tibshirani, R.J. (1993), An Introduction to the Bootstrap, ch. 17
 */
export function leftOutError({ all, kept, rule }: Ratios): number {
  const sorted = kept.map(({ logRatio }) => logRatio).toSorted(ascending)
  const whole = medianOf(sorted)
  const square = mean(all, ({ logRatio, isOutlier }) => {
    if (!isOutlier) return (logRatio - medianWithout(sorted, logRatio)) ** 2
    return Math.min(Math.abs(logRatio - whole), rule.bound) ** 2
  })
  return Math.sqrt(square ?? NaN)
}

/** Median of sorted values without one that is among them. */
function medianWithout(sorted: readonly number[], left: number): number {
  const others = sorted.length - 1
  const at = (place: number): number => {
    const value = sorted[place] ?? NaN
    return value < left ? value : (sorted[place + 1] ?? NaN)
  }
  return (at(Math.floor((others - 1) / 2)) + at(Math.floor(others / 2))) / 2
}

/** Scatter of a log ratio that can be told from rounding, dimensionless (own choice; doubles carry 1e-16). */
const LEAST_SCATTER = 1e-9

/**
 * Whether the scatter of two methods differs on the passages that both cover, at 95 %: log ratios in pairs have the same
 * variance exactly when their sums and their differences are uncorrelated (Pitman-Morgan test).
 *
 *   t = r √((n − 2)/(1 − r²)), r the correlation of sums and differences; Student's t of n − 2 degrees of freedom
 *
 * @returns false with fewer than five passages in common, and for methods that differ by a constant factor
 * @holds log ratios near normal; those of outliers are moved to the bound of the outliers
 * @error methods as good as each other come out as different in 5 to 7 % of samples of 6 to 40
 * @source Pitman, E.J.G. (1939), A note on normal correlation, Biometrika 31, 9-12; Morgan, W.A. (1939), A test for the
 *   significance of the difference between the two variances in a sample from a normal bivariate population, Biometrika
 *   31, 13-19
 */
export function isDifferent(some: Ratios, others: Ratios): boolean {
  const other = bounded(others)
  const pairs = [...bounded(some)].flatMap(([passage, one]) => {
    const against = other.get(passage)
    return against === undefined ? [] : [{ sum: one + against, difference: one - against }]
  })
  if (pairs.length < LEAST_COMMON) return false
  const sums = centred(pairs.map((pair) => pair.sum))
  const differences = centred(pairs.map((pair) => pair.difference))
  const [ofSums, ofDifferences] = [dot(sums, sums), dot(differences, differences)]
  // passages that are all alike scatter by rounding alone, which tells nothing
  const leastScatter = pairs.length * LEAST_SCATTER ** 2
  if (ofSums <= leastScatter || ofDifferences <= Math.max(leastScatter, ROUNDING * ofSums)) return false
  const correlation = dot(sums, differences) / Math.sqrt(ofSums * ofDifferences)
  const degrees = pairs.length - 2
  const statistic = correlation * Math.sqrt(degrees / (1 - correlation * correlation))
  return twoSidedProbability(statistic, degrees) < SIGNIFICANT
}

/** Log ratios by passage, those of outliers moved to the bound. */
function bounded({ all, rule }: Ratios): Map<Measurement, number> {
  return new Map(
    all.map(({ passage, logRatio }) => {
      const centre = rule.centreOf(passage.hull)
      return [passage, Math.min(centre + rule.bound, Math.max(centre - rule.bound, logRatio))]
    }),
  )
}

function centred(values: readonly number[]): number[] {
  const centre = mean(values) ?? NaN
  return values.map((value) => value - centre)
}
