import { z } from 'zod'
import { CRITERION_IDS } from '../advisory/criteria/criterion.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { LOADINGS } from '../domain/vessel.ts'
import { crossCheck } from './cross-check.ts'
import { figure, Id, Label, Name, Text } from './fields.ts'
import { listOf } from './list.ts'
import { OptionsFields } from './options.schema.ts'
import { OutcomeField } from './reply-parts.schema.ts'
import { SPREADS } from './uncertainty.schema.ts'
import { VesselFields } from './vessel.schema.ts'

const MOST_SEED = 2 ** 32 - 1
export const DEFAULT_SAMPLES = 200
export const DEFAULT_SEED = 1
export const DEFAULT_PERCENTILES = [5, 50, 95] as const

const LISTS = ['segments', 'water_levels_m', 'currents_mps', 'directions'] as const

const StudyUncertainty = z
  .strictObject({
    label: Label,
    samples: z.int().min(16).max(10_000).optional().describe(`of each cell; default ${DEFAULT_SAMPLES}`),
    seed: z.int().min(0).max(MOST_SEED).optional().describe(`default ${DEFAULT_SEED}`),
    percentiles: z
      .array(z.int().min(0).max(100))
      .min(1)
      .max(20)
      .optional()
      .describe(
        `per cents of the samples that do not reach a speed; default ${DEFAULT_PERCENTILES.join(', ')}`,
      ),
    ...SPREADS,
    wave_height_log_sd: figure(
      0,
      2,
      'standard deviation of the logarithm of the wave height; default the scatter of the calibration, else 0.4 (common practice)',
    ).optional(),
  })
  .meta({ id: 'StudyUncertainty', description: 'What is not known exactly, and how it is sampled.' })

export const StudyRequest = z
  .strictObject({
    label: Label,
    name: Name,
    segments: z
      .union([
        z.literal('all'),
        z.strictObject({ label: Label, waterway: Text }),
        z.array(Id).min(1).max(20_000),
      ])
      .describe('"all", those of a waterway, or ids; of the registry'),
    vessels: z.array(VesselFields).min(1).max(2000),
    water_levels_m: z
      .array(figure(-50, 50, 'above the datum, m'))
      .min(1)
      .max(100)
      .optional()
      .describe('default [0]'),
    currents_mps: z
      .array(figure(-5, 5, 'positive downstream, m/s'))
      .min(1)
      .max(100)
      .optional()
      .describe('default [0]'),
    directions: z
      .array(z.enum(DIRECTIONS))
      .min(1)
      .max(2)
      .optional()
      .describe('default both; without any current there is one row for both'),
    options: OptionsFields.optional().describe('of every cell; apply_posted_limit is false by default here'),
    uncertainty: StudyUncertainty.optional(),
  })
  .check(
    crossCheck((study, report) => {
      for (const name of LISTS) {
        const list: unknown = study[name]
        if (!Array.isArray(list)) continue
        const seen = new Set<unknown>()
        list.forEach((value, i) => {
          if (seen.has(value)) report([name, i], 'clash', `names ${String(value)} a second time`)
          seen.add(value)
        })
      }
    }),
  )
  .meta({ id: 'StudyRequest', description: 'Segments by vessels by levels by currents and directions.' })

export type StudyWire = z.output<typeof StudyRequest>

const JobLink = z.object({ rel: z.enum(['self', 'results', 'limit-plan']), href: z.string() })

export const JOB_STATES = ['queued', 'running', 'succeeded', 'failed', 'cancelled'] as const

export const JobReply = z
  .object({
    id: z.string(),
    kind: z.enum(['study', 'verification']),
    name: z.string().optional(),
    state: z.enum(JOB_STATES),
    progress_ratio: z.number().min(0).max(1).describe('of the cells'),
    cells_done: z.int().min(0).max(2e6),
    cells_total: z.int().min(0).max(2e6),
    created: z.iso.datetime(),
    started: z.iso.datetime().optional(),
    finished: z.iso.datetime().optional(),
    remaining_s: z.number().optional().describe('at the rate so far; while running'),
    problem: z
      .object({
        type: z.string(),
        title: z.string(),
        status: z.int().min(400).max(599),
        detail: z.string(),
        code: z.string(),
      })
      .optional()
      .describe('why it failed'),
    request: z.record(z.string(), z.unknown()).describe('as received'),
    registry_revision: z.int().min(0).max(1e9).describe('that it was made from'),
    method_version: z.string(),
    service_version: z.string(),
    links: z.array(JobLink),
  })
  .meta({ id: 'Job', description: 'Work that goes on after the reply.' })

export const JobList = listOf('JobList', JobReply)

const text = z.string().nullable()
const number = (what: string) => z.number().nullable().describe(what)
const index = z.int().min(0).max(2000)

/** Columns of a row of results, but for those of percentiles, which come after `no_safe_speed_ratio`. */
export const StudyRow = z
  .looseObject({
    segment_id: z.string(),
    waterway: text,
    chainage_from_m: z.number(),
    chainage_to_m: z.number(),
    station_chainage_m: number('of the governing station, m'),
    vessel_index: index,
    vessel_class: text,
    loading: z.enum(LOADINGS).nullable(),
    draught_m: z.number().describe('as used, m'),
    water_level_m: z.number(),
    current_mps: z.number().describe('positive downstream'),
    direction: z.enum(DIRECTIONS).nullable().describe('null where one answer holds for both'),
    outcome: OutcomeField.nullable(),
    governing_criterion: z.enum(CRITERION_IDS).nullable(),
    max_through_water_mps: number('with the inputs as given, m/s'),
    max_over_ground_mps: number('m/s'),
    max_over_ground_kn: number('kn'),
    max_over_ground_kmh: number('km/h'),
    critical_speed_mps: number('through the water, m/s'),
    samples: z.int().min(16).max(10_000).nullable(),
    no_safe_speed_ratio: number('share of the samples'),
    problem_code: text,
    problem_detail: text,
  })
  .meta({
    id: 'StudyRow',
    description:
      'A cell of a study. For each percentile p there are `max_over_ground_p<p>_mps`, `_kn` and `_kmh`, the speed that p per cent of the samples do not reach; for each criterion `governed_by_<id>_ratio`, the share of the samples that it governs.',
  })
