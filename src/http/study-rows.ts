import { CRITERION_IDS } from '../advisory/criteria/criterion.ts'
import { toKmh, toKnots } from '../domain/units.ts'
import type { Cell, CellAnswer, Sampled } from '../limits/cell.ts'
import type { Study } from '../limits/study.ts'

type Value = string | number | null

/** A cell as a flat row: every column present, null where it does not apply. */
export type StudyRowWire = Record<string, Value>

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

const percentileColumns = (percentile: number) =>
  [
    `max_over_ground_p${percentile}_mps`,
    `max_over_ground_p${percentile}_kn`,
    `max_over_ground_p${percentile}_kmh`,
  ] as const

const GOVERNED = CRITERION_IDS.map((id) => [id, `governed_by_${id.replaceAll('-', '_')}_ratio`] as const)

/** Columns of the results of a study, in their order. */
export function studyColumns({ uncertainty }: Study): readonly string[] {
  return [
    ...FIRST,
    ...(uncertainty?.percentiles ?? []).flatMap(percentileColumns),
    ...GOVERNED.map(([, column]) => column),
    ...LAST,
  ]
}

const knots = (speed: number | null): number | null => (speed === null ? null : toKnots(speed))
const kmh = (speed: number | null): number | null => (speed === null ? null : toKmh(speed))

function placeColumns(study: Study, cell: Cell): StudyRowWire {
  const segment = study.segments[cell.segment]
  const vessel = study.vessels[cell.vessel]
  if (!segment || !vessel) throw new RangeError('A cell that is not of this study')
  return {
    segment_id: segment.id,
    waterway: segment.waterway ?? null,
    chainage_from_m: segment.chainageFrom,
    chainage_to_m: segment.chainageTo,
    station_chainage_m: cell.answer?.stationChainage ?? null,
    vessel_index: cell.vessel,
    vessel_class: vessel.classId ?? null,
    loading: vessel.loading ?? null,
    draught_m: cell.answer?.draught ?? vessel.draught,
    water_level_m: study.waterLevels[cell.waterLevel] ?? null,
    current_mps: study.currents[cell.current] ?? null,
    direction: study.directions[cell.direction] ?? null,
  }
}

function answerColumns(answer: CellAnswer | undefined): StudyRowWire {
  const overGround = answer?.overGround ?? null
  return {
    outcome: answer?.outcome ?? null,
    governing_criterion: answer?.governing ?? null,
    max_through_water_mps: answer?.throughWater ?? null,
    max_over_ground_mps: overGround,
    max_over_ground_kn: knots(overGround),
    max_over_ground_kmh: kmh(overGround),
    critical_speed_mps: answer?.criticalSpeed ?? null,
  }
}

function sampledColumns({ uncertainty }: Study, sampled: Sampled | undefined): StudyRowWire {
  const row: StudyRowWire = {
    samples: sampled && uncertainty ? uncertainty.samples : null,
    no_safe_speed_ratio: sampled?.noSafeRatio ?? null,
  }
  uncertainty?.percentiles.forEach((percentile, i) => {
    const speed = sampled?.percentiles[i] ?? null
    const [inMps, inKnots, inKmh] = percentileColumns(percentile)
    row[inMps] = speed
    row[inKnots] = knots(speed)
    row[inKmh] = kmh(speed)
  })
  for (const [id, column] of GOVERNED) row[column] = sampled ? (sampled.governedBy[id] ?? 0) : null
  return row
}

/** A cell of a study as a row of its results. */
export function toStudyRow(study: Study, cell: Cell): StudyRowWire {
  return {
    ...placeColumns(study, cell),
    ...answerColumns(cell.answer),
    ...sampledColumns(study, cell.sampled),
    problem_code: cell.problem?.code ?? null,
    problem_detail: cell.problem?.detail ?? null,
  }
}
