import type { Hull } from '../domain/vessel.ts'

/** A measured passage with what each method computes for it. SI. */
export interface Measurement {
  /** place in the request, from 0 */
  readonly index: number
  readonly label: string | undefined
  readonly hull: Hull
  /** through the water, m/s, > 0 */
  readonly speed: number
  /** gauge to sailing line, m, > 0 */
  readonly distance: number
  /** m, > 0 */
  readonly depth: number
  readonly depthFroudeNumber: number
  /** highest wave of the passage at the gauge, m, > 0 */
  readonly height: number
  /** height by each method in the order of the methods, m; NaN where it cannot be computed */
  readonly computed: readonly number[]
  /** whether the passage is within the range of each method */
  readonly isInRange: readonly boolean[]
}

/** Slope of log(measured/computed) over the logarithm of a figure, with the probability of one as steep by chance. */
export interface Trend {
  /** dimensionless: the exponent that the method misses; NaN where the figure hardly varies */
  readonly slope: number
  /** two-sided, 0 to 1 */
  readonly pValue: number
  readonly isFlagged: boolean
}

export interface HullFit {
  readonly hull: Hull
  /** outliers left out */
  readonly passages: number
  /** shrunk towards the common factor */
  readonly factor: number
  readonly interval: readonly [low: number, high: number]
  /** weight of the common factor, 0 to 1 */
  readonly pooledWeight: number
}

/** What the measurements say of one method. */
export interface MethodFit {
  readonly id: string
  /** from 1, by cross-validated error; methods on under 80 % of the passages of the widest come after the others */
  readonly rank: number
  /** passages in its range, outliers among them */
  readonly passagesInRange: number
  /** median of measured over computed, outliers left out; the one that is applied */
  readonly factor: number
  /** maximum likelihood under log-normal scatter: the geometric mean, outliers left out */
  readonly factorMaximumLikelihood: number
  /** 95 %: bootstrap, of fewer than eight passages the lowest and the highest ratio */
  readonly interval: readonly [low: number, high: number]
  /** standard deviation of the logarithm of measured over computed, after the factor */
  readonly scatterLogSd: number
  /** mean and standard deviation of that logarithm before any factor */
  readonly biasBeforeLog: number
  readonly scatterBeforeLogSd: number
  readonly trend: { readonly speed: Trend; readonly distance: Trend; readonly depth: Trend }
  /** root mean square of the leave-one-out error of the logarithm */
  readonly crossValidatedLogError: number
  /** empty with one hull only */
  readonly byHull: readonly HullFit[]
}

export interface Outlier {
  readonly index: number
  readonly label: string | undefined
  /** of the recommended method, from its factor */
  readonly logResidual: number
  readonly reason: string
}

/** The whole fit. Methods with fewer than five passages in range have none. */
export interface Fit {
  readonly methods: readonly MethodFit[]
  readonly recommended: string | undefined
  /** whether the data tell the best method from the next, at 95 %; false where there is no next */
  readonly isDistinguishable: boolean
  readonly outliers: readonly Outlier[]
}
