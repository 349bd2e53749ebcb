import { CRITERION_IDS } from '../advisory/criteria/criterion.ts'
import { toKmh, toKnots } from '../domain/units.ts'
import type { Cell, CellAnswer, Sampled } from '../limits/cell.ts'
import type { Study } from '../limits/study.ts'

export type StudyValue = string | number | null

const FIRST = [
  'segment_id',
  'waterway',
  'chainage_from_m',
  'chainage_to_m',
  'station_chainage_m',
  'vessel_index',
  'vessel_class',
  'loading',
  'draught_m',
  'water_level_m',
  'current_mps',
  'direction',
  'outcome',
  'governing_criterion',
  'max_through_water_mps',
  'max_over_ground_mps',
  'max_over_ground_kn',
  'max_over_ground_kmh',
  'critical_speed_mps',
  'samples',
  'no_safe_speed_ratio',
] as const
const LAST = ['problem_code', 'problem_detail'] as const

const percentileColumns = (percentile: number) => [
  `max_over_ground_p${percentile}_mps`,
  `max_over_ground_p${percentile}_kn`,
  `max_over_ground_p${percentile}_kmh`,
]

/** Columns of the results of a study, in their order. */
export function studyColumns({ uncertainty }: Study): readonly string[] {
  return [
    ...FIRST,
    ...(uncertainty?.percentiles ?? []).flatMap(percentileColumns),
    ...CRITERION_IDS.map((id) => `governed_by_${id.replaceAll('-', '_')}_ratio`),
    ...LAST,
  ]
}

/** A speed in its units; null in each where there is none. */
function pushSpeed(row: StudyValue[], speed: number | null | undefined): void {
  if (typeof speed === 'number') row.push(speed, toKnots(speed), toKmh(speed))
  else row.push(null, null, null)
}

function pushPlace(row: StudyValue[], study: Study, cell: Cell): void {
  const segment = study.segments[cell.segment]
  const vessel = study.vessels[cell.vessel]
  if (!segment || !vessel) throw new RangeError('A cell that is not of this study')
  row.push(
    segment.id,
    segment.waterway ?? null,
    segment.chainageFrom,
    segment.chainageTo,
    cell.answer?.stationChainage ?? null,
    cell.vessel,
    vessel.classId ?? null,
    vessel.loading ?? null,
    cell.answer?.draught ?? vessel.draught,
    study.waterLevels[cell.waterLevel] ?? null,
    study.currents[cell.current] ?? null,
    study.directions[cell.direction] ?? null,
  )
}

function pushAnswer(row: StudyValue[], answer: CellAnswer | undefined): void {
  row.push(answer?.outcome ?? null, answer?.governing ?? null, answer?.throughWater ?? null)
  pushSpeed(row, answer?.overGround)
  row.push(answer?.criticalSpeed ?? null)
}

function pushSampled(row: StudyValue[], { uncertainty }: Study, sampled: Sampled | undefined): void {
  row.push(sampled && uncertainty ? uncertainty.samples : null, sampled?.noSafeRatio ?? null)
  uncertainty?.percentiles.forEach((_, i) => {
    pushSpeed(row, sampled?.percentiles[i])
  })
  for (const id of CRITERION_IDS) row.push(sampled ? (sampled.governedBy[id] ?? 0) : null)
}

/** The values of a cell in the order of the columns, null where one does not apply. */
export function studyRow(study: Study, cell: Cell): StudyValue[] {
  const row: StudyValue[] = []
  pushPlace(row, study, cell)
  pushAnswer(row, cell.answer)
  pushSampled(row, study, cell.sampled)
  row.push(cell.problem?.code ?? null, cell.problem?.detail ?? null)
  return row
}
