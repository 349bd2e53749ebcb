import type { Fit, MethodFit } from '../calibration/measurement.ts'
import type { Calibration } from '../domain/calibration.ts'
import type { CalibrationDocument } from './calibrations.schema.ts'

type CalibrationCaution = CalibrationDocument['cautions'][number]

/** Highest over lowest speed below which a factor says little of other speeds (own choice). */
const LITTLE_RANGE = 1.3
/** Standard deviation of the logarithm above which a factor says little of a single passage: a factor of 2.2 (own choice). */
const LARGE_SCATTER = 0.8
/** Passages below which a factor is a first guess (own choice). */
const FEW_PASSAGES = 15
/** Share of outliers above which the passages or their description are doubtful (own choice). */
const MANY_OUTLIERS = 0.2

const TRENDS = ['speed', 'distance', 'depth'] as const

function trendCautions({ id, trend }: MethodFit): CalibrationCaution[] {
  return TRENDS.filter((figure) => trend[figure].isFlagged).map((figure) => ({
    code: 'trend-flagged',
    severity: 'caution',
    text: `The error of ${id} grows or falls with ${figure}, more than chance explains: its factor holds in the middle of what was measured, and less at the ends.`,
  }))
}

function scatterCautions({ id, scatterLogSd }: MethodFit): CalibrationCaution[] {
  if (!(scatterLogSd > LARGE_SCATTER)) return []
  return [
    {
      code: 'scatter-large',
      severity: 'warning',
      text: `${id} does not follow the measurements: its heights miss by a factor of ${Math.exp(scatterLogSd).toFixed(1)} either way after its own. Leave it out with method_ids.`,
    },
  ]
}

function tellingCaution({ methods, isDistinguishable, recommended }: Fit): CalibrationCaution[] {
  if (isDistinguishable || methods.length < 2) return []
  const which = recommended === undefined ? '' : ` ${recommended} is recommended for want of a better reason.`
  return [
    {
      code: 'methods-not-told-apart',
      severity: 'info',
      text: `The passages do not tell the best method from the next.${which}`,
    },
  ]
}

/**
 * What a reader must know before using the factors.
 *
 * @param used  passages that they rest on
 */
export function calibrationCautions(
  fit: Fit,
  used: number,
  coverage: Calibration['coverage'],
): CalibrationCaution[] {
  const cautions: CalibrationCaution[] = [
    ...tellingCaution(fit),
    ...fit.methods.flatMap(trendCautions),
    ...fit.methods.flatMap(scatterCautions),
  ]
  const [lowest, highest] = coverage.speed
  if (highest / lowest < LITTLE_RANGE) {
    cautions.push({
      code: 'speeds-cover-little',
      severity: 'caution',
      text: `The passages are from ${lowest.toFixed(2)} to ${highest.toFixed(2)} m/s through the water: too little to say how the methods do at other speeds.`,
    })
  }
  if (used < FEW_PASSAGES) {
    cautions.push({
      code: 'few-passages',
      severity: 'caution',
      text: `The factors rest on ${used} passages: measure more, ${FEW_PASSAGES} or better 30, before a limit rests on them.`,
    })
  }
  const outliers = fit.outliers.length
  if (outliers > MANY_OUTLIERS * (used + outliers)) {
    cautions.push({
      code: 'many-outliers',
      severity: 'warning',
      text: `${outliers} of ${used + outliers} passages are outliers: look at gauge, distances and vessels before using the factors.`,
    })
  }
  return cautions
}
