import { z } from 'zod'
import { CRITERION_IDS } from '../advisory/criteria/criterion.ts'
import { REGIMES } from '../advisory/regime.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { LOADINGS } from '../domain/vessel.ts'
import { SIGN_UNIT_NAMES } from './options.schema.ts'
import { Problem } from './problems.ts'
import { OutcomeField } from './reply-parts.schema.ts'
import { AdvisoryReply } from './reply.schema.ts'

const text = z.string().nullable()
const number = (what: string) => z.number().nullable().describe(what)
const index = z.int().min(0).max(2_000_000)
const LineNumber = z.int().min(1).max(1e12).describe('physical line of the body, from 1')

/** Columns of a flat advisory, in their order. */
const COLUMNS = {
  label: text,
  segment_id: text,
  station_chainage_m: number('of the governing station, m'),
  vessel_class: text,
  loading: z.enum(LOADINGS).nullable(),
  direction: z.enum(DIRECTIONS).nullable(),
  water_level_m: number('m'),
  current_mps: number('positive downstream, m/s'),
  outcome: OutcomeField.nullable(),
  governing_criterion: z.enum(CRITERION_IDS).nullable(),
  governing_at: text,
  max_through_water_mps: number('m/s'),
  max_over_ground_mps: number('m/s'),
  max_over_ground_kn: number('kn'),
  max_over_ground_kmh: number('km/h'),
  sign_value: number('in sign_unit'),
  sign_unit: z.enum(SIGN_UNIT_NAMES).nullable(),
  critical_speed_mps: number('through the water, m/s'),
  critical_ratio: number('at the recommended speed, or at minimum steerage'),
  depth_froude_number: number('likewise'),
  regime: z.enum(REGIMES).nullable(),
  bank_wave_height_m: number('likewise, m'),
  drawdown_m: number('likewise, m'),
  return_current_mps: number('likewise, m/s'),
  squat_m: number('likewise, m'),
  under_keel_clearance_m: number('likewise, m'),
  uncalibrated_max_over_ground_mps: number('without the factor that was applied, m/s'),
  cautions: text.describe('codes, joined by ;'),
  input_hash: text,
  problem_code: text,
  problem_detail: text,
} as const

const CompactAdvisory = z.object({ line: LineNumber, ...COLUMNS }).meta({
  id: 'AdvisoryRow',
  description: 'A flat advisory: every column present, null where it does not apply.',
})

export const MatrixRow = z
  .object({ segment_index: index, vessel_index: index, condition_index: index, ...COLUMNS })
  .meta({ id: 'AdvisoryMatrixRow', description: 'A cell of a matrix as a flat advisory.' })

const AdvisoryLine = z
  .object({ line: LineNumber, ...AdvisoryReply.shape })
  .meta({ id: 'AdvisoryLine', description: 'An advisory and the line of the request that it answers.' })

const ProblemLine = z
  .object({ line: LineNumber, problem: Problem })
  .meta({ id: 'ProblemLine', description: 'A line that cannot be answered.' })

/** A line of NDJSON out. */
export const StreamLine = z.union([AdvisoryLine, ProblemLine, CompactAdvisory])
