import { METHOD_VERSION } from '../advisory/catalogue.ts'
import type { Fit, HullFit, Measurement, MethodFit, Trend } from '../calibration/measurement.ts'
import type { Calibration, CalibratedMethod, Extent } from '../domain/calibration.ts'
import type { CalibrationDocument, CalibrationOrder } from './calibrations.schema.ts'
import { calibrationCautions } from './calibration-cautions.ts'

const LEVEL = 0.95

/** What a fit was made from and what it found. */
export interface Fitted {
  readonly order: CalibrationOrder
  readonly measurements: readonly Measurement[]
  readonly fit: Fit
  readonly inputHash: string
  readonly serviceVersion: string
  readonly segmentRevision?: number | undefined
}

/** Passages that a factor rests on: in the range of a method that has one, outliers left out. */
export function usedMeasurements({ order, measurements, fit }: Fitted): readonly Measurement[] {
  const outliers = new Set(fit.outliers.map(({ index }) => index))
  const fitted = new Set(fit.methods.map(({ id }) => id))
  const counts = order.methodIds.map((id) => fitted.has(id))
  return measurements.filter(
    ({ index, isInRange }) => !outliers.has(index) && isInRange.some((isIn, i) => isIn && counts[i] === true),
  )
}

function extentOf(
  measurements: readonly Measurement[],
  figureOf: (measurement: Measurement) => number,
): Extent {
  let least = Infinity
  let greatest = -Infinity
  for (const measurement of measurements) {
    const figure = figureOf(measurement)
    least = Math.min(least, figure)
    greatest = Math.max(greatest, figure)
  }
  return [least, greatest]
}

export const coverageOf = (measurements: readonly Measurement[]): Calibration['coverage'] => ({
  speed: extentOf(measurements, ({ speed }) => speed),
  distance: extentOf(measurements, ({ distance }) => distance),
  depth: extentOf(measurements, ({ depth }) => depth),
  depthFroudeNumber: extentOf(measurements, ({ depthFroudeNumber }) => depthFroudeNumber),
})

const toCalibratedMethod = ({ id, factor, byHull }: MethodFit): CalibratedMethod => ({
  id,
  factor,
  factorByHull: Object.fromEntries(byHull.map((own) => [own.hull, own.factor])),
})

/** The method that is recommended, else the one of the first rank. */
export const leadingMethod = ({ methods, recommended }: Fit): MethodFit | undefined =>
  methods.find(({ id }) => id === recommended) ?? methods.find(({ rank }) => rank === 1) ?? methods[0]

/** What advisories take from a fit. */
export const toCalibration = (
  fitted: Fitted,
  coverage: Calibration['coverage'],
): Omit<Calibration, 'id'> => ({
  name: fitted.order.name,
  methods: fitted.fit.methods.map(toCalibratedMethod),
  scatter: leadingMethod(fitted.fit)?.scatterLogSd ?? NaN,
  coverage,
})

const toMinMax = ([min, max]: Extent) => ({ min, max })
const toInterval = ([low, high]: MethodFit['interval']) => ({ level: LEVEL, low, high })

const toTrend = ({ slope, pValue, isFlagged }: Trend) => ({
  ...(Number.isFinite(slope) && { slope }),
  ...(Number.isFinite(pValue) && { p_value: pValue }),
  flagged: isFlagged,
})

const toHull = ({ hull, passages, factor, interval, pooledWeight }: HullFit) => ({
  hull,
  passages,
  factor,
  interval: toInterval(interval),
  pooled_weight: pooledWeight,
})

const toMethod = (method: MethodFit): CalibrationDocument['methods'][number] => ({
  id: method.id,
  rank: method.rank,
  passages_in_range: method.passagesInRange,
  factor: method.factor,
  factor_ml: method.factorMaximumLikelihood,
  interval: toInterval(method.interval),
  scatter_log_sd: method.scatterLogSd,
  bias_before_log: method.biasBeforeLog,
  scatter_before_log_sd: method.scatterBeforeLogSd,
  trend: {
    speed: toTrend(method.trend.speed),
    distance: toTrend(method.trend.distance),
    depth: toTrend(method.trend.depth),
  },
  cross_validated_log_error: method.crossValidatedLogError,
  by_hull: method.byHull.map(toHull),
})

const fromMinMax = ({ min, max }: { readonly min: number; readonly max: number }): Extent => [min, max]

/** What advisories take from a calibration that went out: the same as from its fit. */
export function fromDocument(id: string, document: CalibrationDocument): Calibration {
  const { name, methods, recommended_method: recommended, coverage } = document
  const leading = methods.find((method) => method.id === recommended)
  return {
    id,
    name,
    methods: methods.map((method) => ({
      id: method.id,
      factor: method.factor,
      factorByHull: Object.fromEntries(method.by_hull.map(({ hull, factor }) => [hull, factor])),
    })),
    scatter: leading?.scatter_log_sd ?? NaN,
    coverage: {
      speed: fromMinMax(coverage.speed_mps),
      distance: fromMinMax(coverage.distance_m),
      depth: fromMinMax(coverage.depth_m),
      depthFroudeNumber: fromMinMax(coverage.depth_froude_number),
    },
  }
}

/** A calibration as it goes out, but for id and time. */
export function toDocument(
  fitted: Fitted,
  used: readonly Measurement[],
  coverage: Calibration['coverage'],
): CalibrationDocument {
  const { order, measurements, fit, inputHash, serviceVersion, segmentRevision } = fitted
  return {
    ...(order.label !== undefined && { label: order.label }),
    name: order.name,
    ...(order.segmentId !== undefined && { segment_id: order.segmentId }),
    passages: measurements.length,
    used: used.length,
    methods: fit.methods.toSorted((a, b) => a.rank - b.rank).map(toMethod),
    ...(fit.recommended !== undefined && { recommended_method: fit.recommended }),
    distinguishable: fit.isDistinguishable,
    coverage: {
      speed_mps: toMinMax(coverage.speed),
      distance_m: toMinMax(coverage.distance),
      depth_m: toMinMax(coverage.depth),
      depth_froude_number: toMinMax(coverage.depthFroudeNumber),
    },
    outliers: fit.outliers.map(({ index, label, logResidual, reason }) => ({
      index,
      ...(label !== undefined && { label }),
      log_residual: logResidual,
      reason,
    })),
    cautions: calibrationCautions(fit, used.length, coverage),
    reproducibility: {
      service_version: serviceVersion,
      method_version: METHOD_VERSION,
      seed: order.seed,
      input_hash: inputHash,
      ...(segmentRevision !== undefined && { segment_revision: segmentRevision }),
    },
  }
}
