import { z } from 'zod'
import { WAVE_METHOD_IDS } from '../advisory/catalogue.ts'
import { SEVERITIES } from '../advisory/caution.ts'
import { HULLS } from '../domain/vessel.ts'
import { PassageRow } from './calibration-row.schema.ts'
import { Id } from './fields.ts'
import { listOf } from './list.ts'
import { formatParameter } from './negotiate.ts'
import { booleanParameter, integerParameter } from './parameters.ts'

export const FEWEST_PASSAGES = 5
export const MOST_PASSAGES = 10_000

const DEFAULT_SEED = 1
const MOST_SEED = 4_294_967_295

const Name = z.string().min(1).max(200)
const MethodIds = z
  .array(z.enum(WAVE_METHOD_IDS))
  .min(1)
  .max(WAVE_METHOD_IDS.length)
  .refine((ids) => new Set(ids).size === ids.length, { error: 'must name each method once' })

const SEED = 'of the resampling; the same gives the same figures; default 1'
const CONFIRM = 'the heights are in metres although the ratio looks like feet; default false'

const ENVELOPE = {
  label: z.string().max(200).optional().describe("the caller's own mark, echoed unread"),
  name: Name,
  segment_id: Id.optional().describe('segment of the registry whose section and banks count'),
  method_ids: MethodIds.optional().describe('default all'),
  seed: z.int().min(0).max(MOST_SEED).optional().describe(SEED),
  confirm_units: z.boolean().optional().describe(CONFIRM),
} as const

/** What is documented. */
export const CalibrationRequest = z
  .strictObject({
    ...ENVELOPE,
    passages: z.array(PassageRow).max(MOST_PASSAGES).describe('5 to 10,000 measured passages'),
  })
  .meta({ id: 'CalibrationRequest', description: 'Measured passages on one water.' })

/** What is read first: passages follow one by one, so that each is told with its place. */
export const CalibrationEnvelope = z.strictObject({ ...ENVELOPE, passages: z.array(z.unknown()) })

const split = (text: unknown): unknown => (typeof text === 'string' ? text.split(',') : text)

/** With rows as NDJSON or CSV the query holds the rest. */
export const CalibrationQuery = z.strictObject({
  name: Name.optional().describe('with rows as NDJSON or CSV: required'),
  segment_id: Id.optional(),
  method_ids: z.preprocess(split, MethodIds).optional().describe('separated by commas; default all'),
  seed: integerParameter(0, MOST_SEED).optional().describe(SEED),
  confirm_units: booleanParameter().optional().describe(CONFIRM),
  format: formatParameter(['json']),
})

/** A request without its rows. */
export interface CalibrationOrder {
  readonly label?: string | undefined
  readonly name: string
  readonly segmentId?: string | undefined
  readonly methodIds: readonly string[]
  readonly seed: number
  readonly isConfirmed: boolean
}

type Wire = Omit<z.output<typeof CalibrationEnvelope>, 'passages'>

export const toOrder = (wire: Wire): CalibrationOrder => ({
  label: wire.label,
  name: wire.name,
  segmentId: wire.segment_id,
  // in the order of reports, however they are given
  methodIds: WAVE_METHOD_IDS.filter((id) => wire.method_ids?.includes(id) ?? true),
  seed: wire.seed ?? DEFAULT_SEED,
  isConfirmed: wire.confirm_units ?? false,
})

const count = z.int().min(0).max(MOST_PASSAGES)
const Interval = z.object({ level: z.number(), low: z.number(), high: z.number() })
const MinMax = z.object({ min: z.number(), max: z.number() })
const TrendReply = z
  .object({
    slope: z.number().optional().describe('exponent that the method misses'),
    p_value: z.number().optional().describe('two-sided'),
    flagged: z.boolean(),
  })
  .meta({
    id: 'CalibrationTrend',
    description: 'Of the error over a figure; without slope where that hardly varies.',
  })

const MethodReply = z
  .object({
    id: z.string(),
    rank: z.int().min(1).max(100),
    passages_in_range: count,
    factor: z.number().describe('median of measured over computed, outliers left out; the one applied'),
    factor_ml: z.number().describe('geometric mean of the same'),
    interval: Interval,
    scatter_log_sd: z.number(),
    bias_before_log: z.number(),
    scatter_before_log_sd: z.number(),
    trend: z.object({ speed: TrendReply, distance: TrendReply, depth: TrendReply }),
    cross_validated_log_error: z.number(),
    by_hull: z.array(
      z.object({
        hull: z.enum(HULLS),
        passages: count,
        factor: z.number(),
        interval: Interval,
        pooled_weight: z.number(),
      }),
    ),
  })
  .meta({ id: 'CalibratedMethod', description: 'What the measurements say of a method.' })

export const CALIBRATION_CAUTIONS = [
  'methods-not-told-apart',
  'speeds-cover-little',
  'trend-flagged',
  'scatter-large',
  'few-passages',
  'many-outliers',
] as const

const REPLY = {
  id: Id,
  label: z.string().optional(),
  name: z.string(),
  segment_id: Id.optional(),
  created: z.iso.datetime(),
  passages: count,
  used: count.describe('in the range of a method with a factor, outliers left out'),
  methods: z.array(MethodReply),
  recommended_method: z.string().optional(),
  distinguishable: z.boolean().describe('whether the passages tell the best method from the next'),
  coverage: z.object({
    speed_mps: MinMax,
    distance_m: MinMax,
    depth_m: MinMax,
    depth_froude_number: MinMax,
  }),
  outliers: z.array(
    z.object({
      index: count.describe('from 0'),
      label: z.string().optional(),
      log_residual: z.number(),
      reason: z.string(),
    }),
  ),
  cautions: z.array(
    z.object({
      code: z.enum(CALIBRATION_CAUTIONS),
      severity: z.enum(SEVERITIES),
      text: z.string(),
    }),
  ),
  reproducibility: z.object({
    service_version: z.string(),
    method_version: z.string(),
    seed: z.int().min(0).max(MOST_SEED),
    input_hash: z.string().describe('sha256 over the methods, the passages and the segment'),
    segment_revision: z.int().min(1).max(1e9).optional(),
  }),
} as const

export const CalibrationReply = z
  .object(REPLY)
  .meta({ id: 'Calibration', description: 'What measured waves say of the methods on one water.' })

const PointReply = z
  .object({
    index: count.describe('of the row, from 0'),
    label: z.string().optional(),
    hull: z.enum(HULLS),
    speed_mps: z.number().describe('through the water'),
    distance_m: z.number(),
    depth_m: z.number(),
    depth_froude_number: z.number(),
    max_wave_height_m: z.number(),
    computed_height_m: z.record(z.string(), z.number()).describe('by method, before any factor'),
    in_range: z.array(z.string()).describe('methods in whose range the passage lies'),
  })
  .meta({ id: 'CalibrationPoint', description: 'A passage with what each method computes for it.' })

export type PointWire = z.output<typeof PointReply>

export const FullCalibrationReply = z
  .object({
    ...REPLY,
    rows: z.array(PassageRow).describe('as received'),
    points: z.array(PointReply).describe('in the order of the rows'),
  })
  .meta({ id: 'FullCalibration', description: 'A calibration with the passages it was made from.' })

export const CalibrationList = listOf('CalibrationList', CalibrationReply)

/** A calibration as it is kept: what the registry adds left out. */
export type CalibrationDocument = Omit<z.output<typeof CalibrationReply>, 'id' | 'created'>
