import { z } from 'zod'
import { CRITERION_IDS } from '../advisory/criteria/criterion.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { LOADINGS } from '../domain/vessel.ts'
import { VERDICTS } from '../passages/judgement.ts'
import { PASSAGE_CAUTIONS } from '../passages/passage-cautions.ts'
import { STATUSES } from '../passages/position-report.ts'
import { VESSEL_BASES } from '../passages/vessel-guess.ts'
import { formatParameter } from './negotiate.ts'
import { integerParameter, numberParameter } from './parameters.ts'
import { OutcomeField } from './reply-parts.schema.ts'

/** How a log is checked; every one of these has a default. */
export const PassageQuery = z.strictObject({
  waterway: z.string().max(2000).optional().describe('only its segments; default all'),
  water_level_m: numberParameter(-50, 50)
    .optional()
    .describe('above the datum, m, where a row does not say; default 0'),
  current_mps: numberParameter(-5, 5)
    .optional()
    .describe('positive downstream, m/s, where a row does not say; default 0'),
  tolerance_kn: numberParameter(0, 20)
    .optional()
    .describe('by which a maximum may be exceeded without being said to be, kn; default 0.5'),
  detail: z
    .enum(['reports', 'events', 'summary'])
    .optional()
    .describe('default events; the summary comes last in each'),
  position: z
    .enum(['actual', 'sailing-line'])
    .optional()
    .describe('where the vessel is taken to be by the maximum that the verdict uses; default actual'),
  min_event_reports: integerParameter(1, 1000)
    .optional()
    .describe('least number of consecutive reports of an event; default 2'),
  max_gap_s: numberParameter(10, 86_400)
    .optional()
    .describe(
      'between reports that still belong together, and that rows may go back in time, s; default 600',
    ),
  tow_length_m: numberParameter(1, 500).optional().describe('convoy of ship types 31, 32 and 52, m'),
  tow_beam_m: numberParameter(0.3, 100).optional().describe('likewise, m'),
  tow_draught_m: numberParameter(0.05, 30).optional().describe('likewise, m'),
  format: formatParameter(['ndjson', 'csv']),
})

export type PassageQueryWire = z.output<typeof PassageQuery>

const CAUTION_TEXTS = Object.entries(PASSAGE_CAUTIONS)
  .map(([code, meaning]) => `${code} (${meaning})`)
  .join(', ')

const text = z.string().nullable()
const number = (what: string) => z.number().nullable().describe(what)
const line = z.int().min(1).max(1e12).describe('physical line of the log, from 1')
const count = (what: string) => z.int().min(0).max(1e12).describe(what)
const time = z.iso.datetime().nullable().describe('RFC 3339 UTC')
const direction = z.enum(DIRECTIONS).nullable()
const loading = z.enum(LOADINGS).nullable()

/** Columns of a report, in their order. */
const REPORT_COLUMNS = {
  line,
  time,
  mmsi: text,
  eni: text,
  vessel_name: text,
  status: z.enum(STATUSES),
  reason: text.describe('why it is not judged'),
  segment_id: text,
  chainage_m: number('m along the waterway'),
  offset_m: number('from the sailing line, positive to the right looking downstream, m'),
  bank_distance_left_m: number('to the waterline at the water level, m'),
  bank_distance_right_m: number('likewise, m'),
  direction,
  vessel_class: text,
  loading,
  length_m: number('that was computed with, m'),
  beam_m: number('likewise, m'),
  draught_m: number('likewise, m'),
  vessel_basis: z.enum(VESSEL_BASES).nullable(),
  over_ground_kn: number('kn'),
  through_water_kn: number('kn'),
  water_level_m: number('above the datum, m'),
  current_mps: number('positive downstream, m/s'),
  outcome: OutcomeField.nullable(),
  governing_criterion: z.enum(CRITERION_IDS).nullable(),
  max_over_ground_kn: number('recommended maximum that the verdict uses, kn'),
  sailing_line_max_over_ground_kn: number('the same on the sailing line beside the position, kn'),
  excess_kn: number('over ground above the maximum, kn; negative below it'),
  verdict: z.enum(VERDICTS).nullable(),
  posted_limit_kn: number('over ground, kn'),
  posted_excess_kn: number('kn'),
  depth_froude_number: number('as sailed'),
  critical_ratio: number('speed through the water over the critical speed'),
  wave_height_left_m: number('at the left bank, m'),
  wave_height_right_m: number('at the right bank, m'),
  wave_energy_left_j_per_m: number('per metre of crest at the left bank, J/m'),
  wave_energy_right_j_per_m: number('likewise at the right bank, J/m'),
  cautions: text.describe(`codes, joined by ;: those of an advisory, and ${CAUTION_TEXTS}`),
} as const

/** Columns of an event, in their order. */
const EVENT_COLUMNS = {
  event_id: z.string().describe('the same for the same event in another run'),
  mmsi: text,
  eni: text,
  vessel_name: text,
  vessel_class: z.string(),
  loading,
  segment_id: z.string(),
  direction,
  certainty: z.enum(['certain', 'depends-on-draught']),
  start: time,
  end: time,
  duration_s: z.number().min(0).describe('s'),
  distance_m: z.number().min(0).describe('along the sailing line, m'),
  reports: count('consecutive reports above the maximum'),
  peak_time: time,
  peak_lat: z.number().describe('degrees'),
  peak_lon: z.number().describe('degrees'),
  peak_over_ground_kn: z.number().describe('kn'),
  peak_max_over_ground_kn: number('recommended maximum at the peak, kn'),
  peak_excess_kn: number('kn'),
  mean_excess_kn: number('mean of the reports, kn'),
  governing_criterion: z.enum(CRITERION_IDS),
  peak_bank_wave_height_m: number('higher one of both banks, m'),
  peak_critical_ratio: number('at the peak'),
  posted_peak_excess_kn: number('highest excess over the posted limit, kn'),
  first_line: line,
  last_line: line,
  confidence: number('probability that the peak excess is above zero, 0 to 1'),
} as const

/** Columns of a group of passages, in their order. */
const GROUP_COLUMNS = {
  segment_id: z.string(),
  vessel_class: z.string(),
  direction,
  passages: count('of this class through this segment in this direction'),
  speed_p50_kn: z.number().describe('median of the speeds of the passages over ground, kn'),
  speed_p85_kn: z.number().describe('kn'),
  speed_p95_kn: z.number().describe('kn'),
  histogram_kn: z
    .strictObject({ step: z.number(), counts: z.array(count('passages')) })
    .describe('passages by speed, bins from zero'),
  above_recommended_ratio: number(
    'of the judged passages, those with a report that certainly exceeds the maximum',
  ),
  above_posted_ratio: number('of those for which a limit is posted, passages with a report above it'),
  no_safe_speed_passages: count('passages with a report where no speed is safe'),
  wave_energy_left_j_per_m: number('sum of the highest reports of the passages, per metre of crest, J/m'),
  wave_energy_right_j_per_m: number('likewise, J/m'),
  worst_tenth_energy_ratio: number('share of the energy that the worst tenth of the passages brings'),
  unknown_energy_passages: count(
    'passages with a report whose waves no method covers, left out of the energies',
  ),
} as const

const keysOf = <Key extends string>(columns: Readonly<Record<Key, unknown>>): readonly Key[] =>
  Object.keys(columns) as Key[]

export const REPORT_COLUMN_NAMES = keysOf(REPORT_COLUMNS)
export const EVENT_COLUMN_NAMES = keysOf(EVENT_COLUMNS)
export const GROUP_COLUMN_NAMES = keysOf(GROUP_COLUMNS)

const PassageReport = z
  .strictObject({ type: z.literal('report'), ...REPORT_COLUMNS })
  .meta({ id: 'PassageReport', description: 'A position report and what became of it.' })
const PassageEventWire = z
  .strictObject({ type: z.literal('event'), ...EVENT_COLUMNS })
  .meta({ id: 'PassageEvent', description: 'Consecutive reports of a vessel above the maximum.' })
const PassageSummary = z
  .strictObject({
    type: z.literal('summary'),
    complete: z.literal(true),
    from: time,
    to: time,
    reports: z.strictObject({
      read: count('rows with data'),
      by_status: z.record(z.enum(STATUSES), count('rows')),
      rejected: z.array(z.strictObject({ line, reason: z.string() })).describe('the first 1000'),
      ignored_columns: z.array(z.string()),
    }),
    vessels: count('vessels with a matched report'),
    passages: count('through all segments'),
    events: z.strictObject({ certain: count('events'), depends_on_draught: count('events') }),
    groups: z.array(z.strictObject(GROUP_COLUMNS)),
    parameters: z.record(z.string(), z.union([z.string(), z.number(), z.null()])),
    reproducibility: z.strictObject({
      service_version: z.string(),
      method_version: z.string(),
      registry_revision: z.int().min(0),
    }),
  })
  .meta({ id: 'PassageSummary', description: 'Totals of a log; without this line an answer is incomplete.' })

export const PassageLine = z.discriminatedUnion('type', [PassageReport, PassageEventWire, PassageSummary])

type Without<Line> = Omit<Line, 'type'>
export type ReportRow = Without<z.output<typeof PassageReport>>
export type EventRow = Without<z.output<typeof PassageEventWire>>
export type GroupRow = z.output<typeof PassageSummary>['groups'][number]
export type SummaryWire = z.output<typeof PassageSummary>
