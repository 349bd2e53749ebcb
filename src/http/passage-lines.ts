import { toKnots } from '../domain/units.ts'
import type { CheckSummary, Finding } from '../passages/check.ts'
import type { PassageEvent } from '../passages/events.ts'
import type { PassageGroup } from '../passages/groups.ts'
import type { Judgement } from '../passages/judgement.ts'
import type { Placement } from '../passages/placement.ts'
import { timeText } from '../passages/time.ts'
import type { EventRow, GroupRow, ReportRow } from './passages.schema.ts'

const finite = (value: number): number | null => (Number.isFinite(value) ? value : null)
const knots = (speed: number): number | null => finite(toKnots(speed))
const timeOf = (time: number): string | null => (Number.isFinite(time) ? timeText(time) : null)

type Judged = Pick<
  ReportRow,
  | 'loading'
  | 'length_m'
  | 'beam_m'
  | 'draught_m'
  | 'through_water_kn'
  | 'water_level_m'
  | 'current_mps'
  | 'outcome'
  | 'governing_criterion'
  | 'max_over_ground_kn'
  | 'sailing_line_max_over_ground_kn'
  | 'excess_kn'
  | 'verdict'
  | 'posted_limit_kn'
  | 'posted_excess_kn'
  | 'depth_froude_number'
  | 'critical_ratio'
  | 'wave_height_left_m'
  | 'wave_height_right_m'
  | 'wave_energy_left_j_per_m'
  | 'wave_energy_right_j_per_m'
  | 'cautions'
>

const NOT_JUDGED: Judged = {
  loading: null,
  length_m: null,
  beam_m: null,
  draught_m: null,
  through_water_kn: null,
  water_level_m: null,
  current_mps: null,
  outcome: null,
  governing_criterion: null,
  max_over_ground_kn: null,
  sailing_line_max_over_ground_kn: null,
  excess_kn: null,
  verdict: null,
  posted_limit_kn: null,
  posted_excess_kn: null,
  depth_froude_number: null,
  critical_ratio: null,
  wave_height_left_m: null,
  wave_height_right_m: null,
  wave_energy_left_j_per_m: null,
  wave_energy_right_j_per_m: null,
  cautions: null,
}

function judgedColumns({ vessel, conditions, ...judgement }: Judgement): Judged {
  return {
    loading: vessel.loading ?? null,
    length_m: vessel.length,
    beam_m: vessel.beam,
    draught_m: judgement.draught,
    through_water_kn: toKnots(judgement.throughWater),
    water_level_m: conditions.waterLevel,
    current_mps: conditions.current,
    outcome: judgement.outcome,
    governing_criterion: judgement.governing,
    max_over_ground_kn: knots(judgement.maxOverGround),
    sailing_line_max_over_ground_kn: knots(judgement.sailingLineMax),
    excess_kn: knots(judgement.excess),
    verdict: judgement.verdict,
    posted_limit_kn: knots(judgement.postedLimit),
    posted_excess_kn: knots(judgement.postedExcess),
    depth_froude_number: finite(judgement.depthFroudeNumber),
    critical_ratio: finite(judgement.criticalRatio),
    wave_height_left_m: finite(judgement.waveHeights[0]),
    wave_height_right_m: finite(judgement.waveHeights[1]),
    wave_energy_left_j_per_m: finite(judgement.waveEnergies[0]),
    wave_energy_right_j_per_m: finite(judgement.waveEnergies[1]),
    cautions: judgement.cautions.join(';'),
  }
}

type Placed = Pick<ReportRow, 'segment_id' | 'chainage_m' | 'offset_m' | 'direction'>

const NOWHERE: Placed = { segment_id: null, chainage_m: null, offset_m: null, direction: null }

const placedColumns = ({ fairway, chainage, offset, direction }: Placement): Placed => ({
  segment_id: fairway?.id ?? null,
  chainage_m: finite(chainage),
  offset_m: finite(offset),
  direction: direction ?? null,
})

/** A row of the log with what became of it. */
export function toReportRow({
  row,
  status,
  reason,
  placement,
  guess,
  judgement,
  distances,
}: Finding): ReportRow {
  const said = row.report ?? row.rejected
  const placed = placement ? placedColumns(placement) : NOWHERE
  const judged = judgement ? judgedColumns(judgement) : NOT_JUDGED
  return {
    line: said.line,
    time: timeOf(said.time),
    mmsi: said.mmsi ?? null,
    eni: said.eni ?? null,
    vessel_name: said.name ?? null,
    status,
    reason: reason ?? null,
    segment_id: placed.segment_id,
    chainage_m: placed.chainage_m,
    offset_m: placed.offset_m,
    bank_distance_left_m: finite(distances?.[0] ?? NaN),
    bank_distance_right_m: finite(distances?.[1] ?? NaN),
    direction: placed.direction,
    vessel_class: guess?.classId ?? null,
    loading: judged.loading,
    length_m: judged.length_m,
    beam_m: judged.beam_m,
    draught_m: judged.draught_m,
    vessel_basis: guess?.basis ?? null,
    over_ground_kn: knots(row.report?.speed ?? NaN),
    through_water_kn: judged.through_water_kn,
    water_level_m: judged.water_level_m,
    current_mps: judged.current_mps,
    outcome: judged.outcome,
    governing_criterion: judged.governing_criterion,
    max_over_ground_kn: judged.max_over_ground_kn,
    sailing_line_max_over_ground_kn: judged.sailing_line_max_over_ground_kn,
    excess_kn: judged.excess_kn,
    verdict: judged.verdict,
    posted_limit_kn: judged.posted_limit_kn,
    posted_excess_kn: judged.posted_excess_kn,
    depth_froude_number: judged.depth_froude_number,
    critical_ratio: judged.critical_ratio,
    wave_height_left_m: judged.wave_height_left_m,
    wave_height_right_m: judged.wave_height_right_m,
    wave_energy_left_j_per_m: judged.wave_energy_left_j_per_m,
    wave_energy_right_j_per_m: judged.wave_energy_right_j_per_m,
    cautions: judged.cautions,
  }
}

export function toEventRow(event: PassageEvent): EventRow {
  const { first, last, peak, fairway } = event
  const { report, judgement } = peak
  const { mmsi, eni } = report
  return {
    event_id: `${mmsi ?? eni ?? 'vessel'}.${fairway.id}.${timeText(first.report.time)}`,
    mmsi: mmsi ?? null,
    eni: eni ?? null,
    vessel_name: report.name ?? null,
    vessel_class: judgement.guess.classId,
    loading: judgement.vessel.loading ?? null,
    segment_id: fairway.id,
    direction: event.direction ?? null,
    certainty: event.certainty,
    start: timeOf(first.report.time),
    end: timeOf(last.report.time),
    duration_s: last.report.time - first.report.time,
    distance_m: event.distance,
    reports: event.reports,
    peak_time: timeOf(report.time),
    peak_lat: report.lat,
    peak_lon: report.lon,
    peak_over_ground_kn: toKnots(report.speed),
    peak_max_over_ground_kn: knots(judgement.maxOverGround),
    peak_excess_kn: knots(judgement.excess),
    mean_excess_kn: knots(event.meanExcess),
    governing_criterion: judgement.governing,
    peak_bank_wave_height_m: finite(Math.max(...judgement.waveHeights)),
    peak_critical_ratio: finite(judgement.criticalRatio),
    posted_peak_excess_kn: knots(event.postedPeakExcess),
    first_line: event.firstLine,
    last_line: event.lastLine,
    confidence: finite(event.confidence),
  }
}

export function toGroupRow(group: PassageGroup): GroupRow {
  const [p50, p85, p95] = group.speedPercentiles
  return {
    segment_id: group.segmentId,
    vessel_class: group.classId,
    direction: group.direction ?? null,
    passages: group.passages,
    speed_p50_kn: toKnots(p50),
    speed_p85_kn: toKnots(p85),
    speed_p95_kn: toKnots(p95),
    histogram_kn: { step: 0.5, counts: [...group.histogram] },
    above_recommended_ratio: finite(group.aboveRecommendedRatio),
    above_posted_ratio: finite(group.abovePostedRatio),
    no_safe_speed_passages: group.noSafeSpeedPassages,
    wave_energy_left_j_per_m: finite(group.energies[0]),
    wave_energy_right_j_per_m: finite(group.energies[1]),
    worst_tenth_energy_ratio: finite(group.worstTenthRatio),
    unknown_energy_passages: group.unknownEnergyPassages,
  }
}

/** What a summary says of the log itself. */
export function summaryParts(summary: CheckSummary) {
  return {
    from: timeOf(summary.from),
    to: timeOf(summary.to),
    read: summary.read,
    by_status: { ...summary.byStatus },
    rejected: summary.rejected.map((row) => ({ ...row })),
    vessels: summary.vessels,
    passages: summary.passages,
    events: { certain: summary.certainEvents, depends_on_draught: summary.doubtfulEvents },
    groups: summary.groups.map(toGroupRow),
  }
}
