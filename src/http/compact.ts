import type { Brief } from '../advisory/advise.ts'
import type { Decision } from '../advisory/decide.ts'
import type { Fault } from '../domain/fault.ts'
import { inputHash } from './input-hash.ts'
import { toPair } from './reply-parts.ts'
import type { Resolved } from './request.ts'

/** Columns of a flat advisory, in their order; a column that does not apply is null. */
export const COMPACT_COLUMNS = [
  'line',
  'label',
  'segment_id',
  'station_chainage_m',
  'vessel_class',
  'loading',
  'direction',
  'water_level_m',
  'current_mps',
  'outcome',
  'governing_criterion',
  'governing_at',
  'max_through_water_mps',
  'max_over_ground_mps',
  'max_over_ground_kn',
  'max_over_ground_kmh',
  'sign_value',
  'sign_unit',
  'critical_speed_mps',
  'critical_ratio',
  'depth_froude_number',
  'regime',
  'bank_wave_height_m',
  'drawdown_m',
  'return_current_mps',
  'squat_m',
  'under_keel_clearance_m',
  'uncalibrated_max_over_ground_mps',
  'cautions',
  'input_hash',
  'problem_code',
  'problem_detail',
] as const

type Cell = string | number | null
export type CompactRow = Record<(typeof COMPACT_COLUMNS)[number], Cell>

const EMPTY = Object.fromEntries(COMPACT_COLUMNS.map((column) => [column, null])) as CompactRow

const finite = (value: number): number | null => (Number.isFinite(value) ? value : null)

/** The recommended speed in each unit; empty when no speed is safe. */
export function maximumColumns(decision: Decision) {
  if (decision.outcome === 'no-safe-speed') return NO_MAXIMUM
  const { through_water, over_ground } = toPair(decision, decision.speed)
  return {
    max_through_water_mps: through_water.mps,
    max_over_ground_mps: over_ground.mps,
    max_over_ground_kn: over_ground.kn,
    max_over_ground_kmh: over_ground.kmh,
  }
}

const NO_MAXIMUM = {
  max_through_water_mps: null,
  max_over_ground_mps: null,
  max_over_ground_kn: null,
  max_over_ground_kmh: null,
} as const

/** An advisory as one row. */
export function toCompactRow(brief: Brief, resolved: Resolved, label: string | null): CompactRow {
  const { decision, effects, sign, uncalibrated } = brief
  const { situation } = decision
  return {
    ...EMPTY,
    label,
    segment_id: resolved.record?.id ?? null,
    station_chainage_m: situation.station.chainage ?? null,
    vessel_class: situation.vessel.classId ?? null,
    loading: situation.vessel.loading ?? null,
    direction: decision.direction ?? null,
    water_level_m: situation.conditions.waterLevel,
    current_mps: situation.conditions.current,
    outcome: decision.outcome,
    governing_criterion: decision.governing.criterion.id,
    governing_at: decision.governing.criterion.place,
    ...maximumColumns(decision),
    sign_value: sign?.value ?? null,
    sign_unit: sign?.unit ?? null,
    critical_speed_mps: situation.setting.criticalSpeed,
    critical_ratio: effects.criticalRatio,
    depth_froude_number: effects.depthFroudeNumber,
    regime: effects.regime,
    bank_wave_height_m: finite(effects.bankWaveHeight),
    drawdown_m: finite(effects.drawdown),
    return_current_mps: finite(effects.returnCurrent),
    squat_m: finite(effects.squat),
    under_keel_clearance_m: finite(effects.underKeelClearance),
    uncalibrated_max_over_ground_mps: uncalibrated
      ? maximumColumns(uncalibrated.decision).max_over_ground_mps
      : null,
    cautions: brief.cautions.map((caution) => caution.code).join(';'),
    input_hash: inputHash(resolved),
  }
}

/** A row that cannot be answered, with everything that is wrong with it in words. */
export function toProblemRow(fault: Fault, label: string | null): CompactRow {
  const items = fault.parts.errors ?? []
  const details = items.map((item) => `${item.pointer ?? item.parameter ?? ''} ${item.detail}`.trim())
  return {
    ...EMPTY,
    label,
    problem_code: fault.code,
    problem_detail: details.length > 0 ? details.join('; ') : fault.message,
  }
}
