import { median, rollup } from 'd3-array'
import type { Hull } from '../domain/vessel.ts'

/** Standard deviation of a normal distribution over its median absolute deviation: 1/Φ⁻¹(3/4), dimensionless. */
const SD_PER_MAD = 1.4826
/** Standard deviations from the median beyond which a value is an outlier (Iglewicz and Hoaglin 1993). */
const OUTLIER_DEVIATIONS = 3.5
/** Least standard deviation of a log ratio that is believed, dimensionless: a gauge reads to some 5 %. Own choice. */
export const LEAST_LOG_SD = 0.05
/** Passages of a hull from which on its own median counts for the scatter, and for its outliers. Own choices. */
const OWN_SCATTER_PASSAGES = 5
const OWN_MEDIAN_PASSAGES = 3

/** A value of one kind of hull. */
export interface HullValue {
  readonly hull: Hull
  /** natural logarithm of measured over computed height */
  readonly logRatio: number
}

export interface OutlierRule {
  /** distance of a log ratio from its centre beyond which it is an outlier, dimensionless, > 0 */
  readonly bound: number
  /** log ratio that distances of a hull count from */
  readonly centreOf: (hull: Hull) => number
}

/**
 * Modified z-score on log ratios: an outlier is further than 3.5 × 1.4826 × MAD from the median.
 *
 * With several hulls, a hull of at least three passages counts from its own median, so that another factor is not taken
 * for an error; the MAD is of distances from the median of the hull where it has at least five, from the common one
 * elsewhere. Those numbers and the least scale of 0.05 are own choices.
 *
 * @param values  at least one
 * @source Iglewicz, B. & Hoaglin, D.C. (1993), How to Detect and Handle Outliers, ASQC
 */
export function outlierRuleOf(values: readonly HullValue[]): OutlierRule {
  const common = medianOf(values.map(({ logRatio }) => logRatio))
  const medians = rollup(
    values,
    (own) => ({ passages: own.length, median: medianOf(own.map(({ logRatio }) => logRatio)) }),
    ({ hull }) => hull,
  )
  const centreFrom = (hull: Hull, passages: number): number => {
    const own = medians.get(hull)
    return own && own.passages >= passages ? own.median : common
  }
  const deviation = medianOf(
    values.map(({ hull, logRatio }) => Math.abs(logRatio - centreFrom(hull, OWN_SCATTER_PASSAGES))),
  )
  return {
    bound: OUTLIER_DEVIATIONS * Math.max(LEAST_LOG_SD, SD_PER_MAD * deviation),
    centreOf: (hull) => centreFrom(hull, OWN_MEDIAN_PASSAGES),
  }
}

/** The middle value, of an even number the mean of the two; NaN of none. */
export function medianOf(values: readonly number[]): number {
  return median(values) ?? NaN
}
