import { extent, mean, rollup } from 'd3-array'
import { leastSquares, type Slope } from './least-squares.ts'
import type { MethodFit, Trend } from './measurement.ts'
import type { Ratio } from './ratio.ts'

/** Logarithm of the greatest over the least of a figure, from which on its trend is looked for: 10 %. Own choice. */
const LEAST_RANGE = Math.log(1.1)
/** Probability by chance below which a trend is flagged. Own choice. */
const SIGNIFICANT = 0.01
/** Change of the logarithm over what was measured above which a trend is flagged: some 10 % of height. Own choice. */
const RELEVANT = 0.1

/**
 * Trends of the log ratio over the logarithms of speed, distance and depth: multiple least squares, so that each is the
 * trend with the others held, about the means of each hull, so that hulls of other speeds are no trend.
 *
 * A figure within 10 % of itself, or one that goes along with the earlier of the three, has none: its influence cannot
 * be told, and shows in the earlier. A trend is flagged when it is significant (p < 0.01) and relevant (slope times the
 * range of the logarithm over 0.1). Bounds are own choices.
 *
 * @param ratios  of the passages that count, outliers left out
 */
export function trendOf(ratios: readonly Ratio[]): MethodFit['trend'] {
  const figures = [
    centred(ratios, ({ passage }) => Math.log(passage.speed)),
    centred(ratios, ({ passage }) => Math.log(passage.distance)),
    centred(ratios, ({ passage }) => Math.log(passage.depth)),
  ]
  const ranges = figures.map(rangeOf)
  const varied = figures.filter((_, at) => (ranges[at] ?? 0) > LEAST_RANGE)
  const response = centred(ratios, ({ logRatio }) => logRatio)
  const hulls = new Set(ratios.map(({ passage }) => passage.hull)).size
  const slopes = leastSquares(varied, response, hulls)
  let next = 0
  const trends = ranges.map((range) => trend(range > LEAST_RANGE ? slopes[next++] : undefined, range))
  const [speed = NO_TREND, distance = NO_TREND, depth = NO_TREND] = trends
  return { speed, distance, depth }
}

const NO_TREND: Trend = { slope: NaN, pValue: NaN, isFlagged: false }

function trend(found: Slope | undefined, range: number): Trend {
  if (!found) return NO_TREND
  const isFlagged = found.pValue < SIGNIFICANT && Math.abs(found.slope) * range > RELEVANT
  return { ...found, isFlagged }
}

/** Values less the mean of their hull. */
function centred(ratios: readonly Ratio[], of: (ratio: Ratio) => number): number[] {
  const means = rollup(
    ratios,
    (own) => mean(own, of) ?? NaN,
    ({ passage }) => passage.hull,
  )
  return ratios.map((ratio) => of(ratio) - (means.get(ratio.passage.hull) ?? NaN))
}

function rangeOf(values: readonly number[]): number {
  const [least = NaN, greatest = NaN] = extent(values)
  return greatest - least
}
