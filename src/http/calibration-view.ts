import type { Fit, MethodFit, Trend } from '../calibration/measurement.ts'
import type { CalibrationPoint, CalibrationView } from '../report/calibration-view.ts'
import type { CalibrationRecord, CalibrationRows } from '../store/registry.ts'
import type { CalibrationDocument, PointWire } from './calibrations.schema.ts'

type MethodWire = CalibrationDocument['methods'][number]
type TrendWire = MethodWire['trend']['speed']

const toTrend = ({ slope = NaN, p_value: pValue = NaN, flagged }: TrendWire): Trend => ({
  slope,
  pValue,
  isFlagged: flagged,
})

const toMethod = (wire: MethodWire): MethodFit => ({
  id: wire.id,
  rank: wire.rank,
  passagesInRange: wire.passages_in_range,
  factor: wire.factor,
  factorMaximumLikelihood: wire.factor_ml,
  interval: [wire.interval.low, wire.interval.high],
  scatterLogSd: wire.scatter_log_sd,
  biasBeforeLog: wire.bias_before_log,
  scatterBeforeLogSd: wire.scatter_before_log_sd,
  trend: {
    speed: toTrend(wire.trend.speed),
    distance: toTrend(wire.trend.distance),
    depth: toTrend(wire.trend.depth),
  },
  crossValidatedLogError: wire.cross_validated_log_error,
  byHull: wire.by_hull.map(({ hull, passages, factor, interval, pooled_weight: pooledWeight }) => ({
    hull,
    passages,
    factor,
    interval: [interval.low, interval.high] as const,
    pooledWeight,
  })),
})

const toFit = (document: CalibrationDocument): Fit => ({
  methods: document.methods.map(toMethod),
  recommended: document.recommended_method,
  isDistinguishable: document.distinguishable,
  outliers: document.outliers.map(({ index, label, log_residual: logResidual, reason }) => ({
    index,
    label,
    logResidual,
    reason,
  })),
})

function toPoint(
  wire: PointWire,
  outliers: ReadonlySet<number>,
  methodIds: readonly string[],
): CalibrationPoint {
  return {
    index: wire.index,
    label: wire.label,
    hull: wire.hull,
    speed: wire.speed_mps,
    distance: wire.distance_m,
    depth: wire.depth_m,
    measured: wire.max_wave_height_m,
    computed: wire.computed_height_m,
    isInRange: Object.fromEntries(methodIds.map((id) => [id, wire.in_range.includes(id)])),
    isOutlier: outliers.has(wire.index),
  }
}

/** A calibration as its pictures and its sheet take it. */
export function calibrationViewOf(record: CalibrationRecord, { points }: CalibrationRows): CalibrationView {
  // written by this service, in the form of its replies
  const document = record.document as unknown as CalibrationDocument
  const wires = points as unknown as readonly PointWire[]
  const outliers = new Set(document.outliers.map(({ index }) => index))
  const methodIds = [...new Set(wires.flatMap((wire) => Object.keys(wire.computed_height_m)))]
  return {
    id: record.id,
    name: document.name,
    segmentId: document.segment_id,
    created: record.created,
    points: wires.map((wire) => toPoint(wire, outliers, methodIds)),
    fit: toFit(document),
    coverage: record.calibration.coverage,
    cautions: document.cautions,
    serviceVersion: document.reproducibility.service_version,
    methodVersion: document.reproducibility.method_version,
    seed: document.reproducibility.seed,
  }
}
