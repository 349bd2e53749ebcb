import { ascending, group, mean, sum } from 'd3-array'
import type { HullFit, Measurement } from './measurement.ts'
import { LEAST_LOG_SD } from './robust.ts'
import type { Ratio } from './ratio.ts'
import { studentBound } from './student.ts'

/** Standard deviation of the factors of hulls about the common one that is expected, of the logarithm. Own choice. */
const EXPECTED_BETWEEN = 0.2
/** Greatest such deviation that is looked at, of the logarithm, and steps up to it. Own choices. */
const GREATEST_BETWEEN = 2
const STEPS = 400

interface HullMean {
  readonly hull: Measurement['hull']
  readonly passages: number
  /** mean log ratio */
  readonly mean: number
  /** square of its standard error */
  readonly variance: number
}

/**
 * Factors of the hulls, each between its own mean and the common factor (partial pooling).
 *
 *   ȳ_j ~ N(θ_j, σ²/n_j);  θ_j ~ N(ln c, τ²);  τ ~ half-normal of scale 0.2
 *   θ_j given τ: w ln c + (1 − w) ȳ_j,  w = (σ²/n_j)/(σ²/n_j + τ²)
 *
 * and its mean over what the means of the hulls say of τ, integrated numerically. With two or three hulls they say
 * little: a point estimate of τ, by moments (DerSimonian and Laird 1986) or likelihood, would often be 0 or far too
 * large, hence the prior; its scale, factors some 20 % apart, is an own choice.
 *
 * @param ratios  of the passages that count, outliers left out
 * @param common  ln c, logarithm of the common factor
 * @returns in order of the hulls' names; none with one hull only
 * @error intervals of 95 % are normal about the mean, and take in what is not known of τ and c. For a hull at 1.5 times
 *   the others, two scales of the prior, the truth is inside in 93 % of samples of 20 and 73 % of samples of 3 beside 20
 * @source Gelman, Carlin, Stern, Dunson, Vehtari & Rubin (2013), Bayesian Data Analysis, 3rd ed., ch. 5.4; the prior:
 *   Gelman, A. (2006), Prior distributions for variance parameters in hierarchical models, Bayesian Analysis 1, 515-534
 */
export function hullFits(ratios: readonly Ratio[], common: number): HullFit[] {
  const groups = [...group(ratios, ({ passage }) => passage.hull)].sort(([a], [b]) => ascending(a, b))
  if (groups.length < 2) return []
  const scatter = scatterWithin(groups.map(([, own]) => own.map(({ logRatio }) => logRatio)))
  const means = groups.map(([hull, own]) => ({
    hull,
    passages: own.length,
    mean: mean(own, ({ logRatio }) => logRatio) ?? NaN,
    variance: scatter.variance / own.length,
  }))
  const weights = weightsOfBetween(means, common)
  // a median of normal scatter has π/2 times the variance of a mean
  const commonVariance = ((Math.PI / 2) * scatter.variance) / ratios.length
  return means.map((one) => {
    const pooledWeight = sum(weights, ({ variance, weight }) => weight * shareOfCommon(one, variance))
    const distance = one.mean - common
    const variance = sum(weights, ({ variance, weight }) => {
      const share = shareOfCommon(one, variance)
      const shift = (pooledWeight - share) * distance
      return weight * ((1 - share) * one.variance + share * share * commonVariance + shift * shift)
    })
    const centre = common + (1 - pooledWeight) * distance
    const reach = studentBound(scatter.degrees) * Math.sqrt(variance)
    return {
      hull: one.hull,
      passages: one.passages,
      factor: Math.exp(centre),
      interval: [Math.exp(centre - reach), Math.exp(centre + reach)],
      pooledWeight,
    }
  })
}

const shareOfCommon = (one: HullMean, between: number): number => one.variance / (one.variance + between)

/** σ² about the means of the hulls, or about the common mean where hulls have hardly more than one passage each. */
function scatterWithin(groups: readonly (readonly number[])[]): { variance: number; degrees: number } {
  const passages = sum(groups, (own) => own.length)
  const isWithin = passages - groups.length >= 2
  const parts = isWithin ? groups : [groups.flat()]
  const degrees = passages - parts.length
  const squares = sum(parts, (own) => {
    const centre = mean(own) ?? NaN
    return sum(own, (value) => (value - centre) ** 2)
  })
  return { variance: Math.max(LEAST_LOG_SD ** 2, squares / degrees), degrees }
}

/** Values of τ² with their posterior weights, which add up to 1; steps are narrow near 0. */
function weightsOfBetween(means: readonly HullMean[], common: number) {
  const steps = Array.from({ length: STEPS }, (_, at) => {
    const place = (at + 0.5) / STEPS
    const between = GREATEST_BETWEEN * place ** 3
    const variance = between * between
    const logLikelihood = sum(means, (one) => {
      const total = one.variance + variance
      return -(Math.log(total) + (one.mean - common) ** 2 / total) / 2
    })
    const logPrior = -variance / (2 * EXPECTED_BETWEEN ** 2)
    // width of the step in τ goes with place²
    return { variance, logWeight: logLikelihood + logPrior + 2 * Math.log(place) }
  })
  const greatest = Math.max(...steps.map(({ logWeight }) => logWeight))
  const raw = steps.map(({ variance, logWeight }) => ({ variance, weight: Math.exp(logWeight - greatest) }))
  const whole = sum(raw, ({ weight }) => weight)
  return raw.map(({ variance, weight }) => ({ variance, weight: weight / whole }))
}
