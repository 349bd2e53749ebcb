import { ascending, deviation, mean } from 'd3-array'
import { randomOf } from '../domain/random.ts'
import { medianInterval } from './bootstrap.ts'
import { isDifferent, leftOutError } from './cross-validation.ts'
import { hullFits } from './hulls.ts'
import type { Fit, Measurement, MethodFit, Outlier } from './measurement.ts'
import { canonical, type Ratios, ratiosOf } from './ratio.ts'
import { medianOf } from './robust.ts'
import { trendOf } from './trend.ts'

/** Passages in its range below which a method is not fitted. Own choice. */
export const LEAST_PASSAGES = 5
/** Passages below which the interval of the factor is from the lowest to the highest ratio. Own choice. */
const LEAST_RESAMPLED = 8
/** Share of the passages of the widest method that a method must cover to rank with it. Own choice. */
const COMPARABLE = 0.8

interface Candidate {
  readonly ratios: Ratios
  readonly fit: Omit<MethodFit, 'rank'>
}

/**
 * What measured passages say of the wave-height methods on one water.
 *
 * Every figure follows from the values of the passages and the seed alone, to the last digit: passages are put in an
 * order of their own first, so that the order of the request matters only to the places that outliers are listed with;
 * each method has its own sequence of random numbers, so that it does not matter which others are asked.
 *
 * A method ranks by its leave-one-out error, after all those that cover at least 80 % of the passages of the widest if it
 * does not: errors on few passages do not compare.
 *
 * @param passages   as measured, each with a height by every method
 * @param methodIds  in the order of the heights
 * @param seed       of the random numbers, integer, 0 to 2³² − 1
 * @returns methods in the order of their ids; without those that have fewer than five passages
 */
export function fitOf(
  passages: readonly Measurement[],
  methodIds: readonly string[],
  { seed }: { readonly seed: number },
): Fit {
  const ordered = canonical(passages)
  const candidates = methodIds.flatMap((id, method) => {
    const ratios = ratiosOf(ordered, method)
    return ratios.all.length < LEAST_PASSAGES ? [] : [candidateOf(id, ratios, seed)]
  })
  const ranked = rankedOf(candidates)
  const [best, second] = ranked
  return {
    methods: candidates.map((candidate) => ({ ...candidate.fit, rank: ranked.indexOf(candidate) + 1 })),
    recommended: best?.fit.id,
    isDistinguishable: best !== undefined && second !== undefined && isDifferent(best.ratios, second.ratios),
    outliers: best ? outliersOf(best) : [],
  }
}

function candidateOf(id: string, ratios: Ratios, seed: number): Candidate {
  const logs = ratios.all.map(({ logRatio }) => logRatio)
  const kept = ratios.kept.map(({ logRatio }) => logRatio).toSorted(ascending)
  const common = medianOf(kept)
  return {
    ratios,
    fit: {
      id,
      passagesInRange: logs.length,
      factor: Math.exp(common),
      factorMaximumLikelihood: Math.exp(mean(kept) ?? NaN),
      interval: intervalOf(logs, kept, id, seed),
      scatterLogSd: deviation(kept) ?? NaN,
      biasBeforeLog: mean(logs) ?? NaN,
      scatterBeforeLogSd: deviation(logs) ?? NaN,
      trend: trendOf(ratios.kept),
      crossValidatedLogError: leftOutError(ratios),
      byHull: hullFits(ratios.kept, common),
    },
  }
}

/**
 * Interval of 95 % of the factor. With fewer than eight passages resamples tell too little: the lowest and the highest
 * ratio, outliers too, which has a median outside with probability 2^(1−n), 6 % of five passages and 2 % of seven.
 */
function intervalOf(
  logs: readonly number[],
  kept: readonly number[],
  id: string,
  seed: number,
): readonly [low: number, high: number] {
  const [low, high] =
    logs.length < LEAST_RESAMPLED
      ? [Math.min(...logs), Math.max(...logs)]
      : medianInterval(kept, randomOf(seed, id))
  return [Math.exp(low), Math.exp(high)]
}

/** Best first; equal ones in the order of the methods. */
function rankedOf(candidates: readonly Candidate[]): Candidate[] {
  const widest = Math.max(...candidates.map(({ ratios }) => ratios.all.length))
  const isNarrow = ({ ratios }: Candidate): boolean => ratios.all.length < COMPARABLE * widest
  return candidates.toSorted(
    (a, b) =>
      Number(isNarrow(a)) - Number(isNarrow(b)) ||
      ascending(a.fit.crossValidatedLogError, b.fit.crossValidatedLogError),
  )
}

/** In the order of the request. */
function outliersOf({ ratios, fit }: Candidate): Outlier[] {
  const { all, rule } = ratios
  const [least, greatest] = [Math.exp(-rule.bound), Math.exp(rule.bound)]
  return all
    .filter(({ isOutlier }) => isOutlier)
    .map(({ passage, logRatio }) => ({
      index: passage.index,
      label: passage.label,
      logResidual: logRatio - Math.log(fit.factor),
      reason:
        `measured ${Math.exp(logRatio - rule.centreOf(passage.hull)).toPrecision(3)} times what comparable passages ` +
        `lead to expect; ${least.toPrecision(3)} to ${greatest.toPrecision(3)} times counts as scatter`,
    }))
    .toSorted((a, b) => a.index - b.index)
}
