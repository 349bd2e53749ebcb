import { z } from 'zod'
import { CRITERION_IDS } from '../advisory/criteria/criterion.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { LOADINGS } from '../domain/vessel.ts'
import { crossCheck } from './cross-check.ts'
import { figure, Id, Label, Name, Text } from './fields.ts'
import { GroupFields } from './group.schema.ts'
import { listOf } from './list.ts'
import { SIGN_UNIT_NAMES } from './options.schema.ts'
import { Speed } from './reply-parts.schema.ts'

const GroupIn = z
  .strictObject({ label: Label, id: Id, name: Name, applies_to: GroupFields })
  .meta({ id: 'PlanGroup', description: 'Vessels for which one limit is posted.' })

/** A summary of passages may have more than is read here. */
const SummaryIn = z
  .looseObject({
    type: z.literal('summary'),
    complete: z.literal(true),
    groups: z
      .array(
        z.looseObject({
          segment_id: z.string(),
          vessel_class: z.string().nullable(),
          direction: z.enum(DIRECTIONS).nullable(),
          passages: z.int().min(0).max(1e9),
          histogram_kn: z.looseObject({
            step: figure(0.01, 10, 'width of a bin, kn'),
            counts: z.array(z.int().min(0).max(1e9)).max(10_000),
          }),
        }),
      )
      .max(200_000),
  })
  .meta({
    id: 'PassageSummaryIn',
    description: 'The summary line of a check of passages, as it was received.',
  })

export const LimitPlanRequest = z
  .strictObject({
    label: Label,
    name: Name,
    study_id: Id,
    groups: z.array(GroupIn).min(1).max(50),
    percentile: z
      .int()
      .min(0)
      .max(100)
      .nullable()
      .describe('one of the study, the lower the more cautious; null takes the inputs as given'),
    sign_unit: z.enum(SIGN_UNIT_NAMES).optional().describe('default km/h'),
    sign_step: figure(0.1, 10, 'step of the sign, in its unit; default 1').optional(),
    smallest_limit: figure(0.1, 100, 'in the unit of the sign; below it no limit is proposed').optional(),
    largest_limit: figure(0.1, 100, 'in the unit of the sign').optional(),
    min_run_length_m: figure(
      0,
      1e6,
      'that a stretch higher than a neighbour is long at least, m; default 0',
    ).optional(),
    by_direction: z.boolean().optional().describe('limits by direction; default false: one for both'),
    keep_posted: z.array(Id).max(20_000).optional().describe('ids of segments whose posted limit stays'),
    passage_summary: SummaryIn.optional(),
  })
  .check(
    crossCheck((plan, report) => {
      const { smallest_limit: least, largest_limit: most } = plan
      if (typeof least === 'number' && typeof most === 'number' && least > most)
        report(['smallest_limit'], 'clash', 'is above largest_limit', {
          facts: { smallest_limit: least, largest_limit: most },
        })
      const ids = Array.isArray(plan.groups) ? plan.groups.map(({ id }) => id) : []
      ids.forEach((id, i) => {
        if (ids.indexOf(id) < i) report(['groups', i, 'id'], 'clash', `names the group ${id} a second time`)
      })
    }),
  )
  .meta({ id: 'LimitPlanRequest', description: 'How limits are drawn from a study.' })

export type LimitPlanWire = z.output<typeof LimitPlanRequest>

const ratio = z.number().min(0).max(1)
const optional = (what: string) => z.number().optional().describe(what)

const Caution = z.object({
  code: z.string(),
  severity: z.enum(['info', 'caution', 'warning']),
  text: z.string(),
  facts: z.record(z.string(), z.union([z.string(), z.number(), z.array(z.string())])).optional(),
})

export const StretchReply = z
  .object({
    index: z.int().min(0).max(1e6),
    group_id: z.string(),
    direction: z.enum(['both', ...DIRECTIONS]),
    waterway: z.string().optional(),
    chainage_from_m: z.number().describe('at the upstream end'),
    chainage_to_m: z.number(),
    length_m: z.number().describe('along the sailing line'),
    segment_ids: z.array(z.string()).describe('from upstream'),
    outcome: z.enum(['limit', 'kept', 'below-smallest-limit']),
    limit: z.object({ value: z.number(), unit: z.enum(SIGN_UNIT_NAMES) }).optional(),
    limit_speed: Speed.optional().describe('over ground'),
    ceiling: Speed.optional().describe('that no proposed limit exceeds: rounded down to the step'),
    lowest_maximum: Speed.optional().describe('the ceiling before it was rounded and cut'),
    margin_mps: optional('lowest maximum less limit; negative where a kept limit is above'),
    governing: z
      .object({
        segment_id: z.string(),
        station_chainage_m: optional('m'),
        vessel_index: z.int().min(0).max(2000),
        vessel_class: z.string().optional(),
        loading: z.enum(LOADINGS).optional(),
        water_level_m: z.number(),
        current_mps: z.number(),
        direction: z.enum(DIRECTIONS).optional(),
        criterion: z.enum(CRITERION_IDS).optional(),
      })
      .optional()
      .describe('the cell that allows least'),
    today: Speed.optional().describe('lowest posted limit that applies today, over ground'),
    travel_time_s: optional('at the limit'),
    travel_time_today_s: optional('at the posted limits of today, where every segment has one'),
    passages: z.int().min(0).max(1e12).optional(),
    exceeding_ratio: ratio.optional().describe('share of the passages that were faster than the limit'),
    cautions: z.array(Caution),
  })
  .meta({ id: 'Stretch', description: 'One limit over consecutive segments.' })

export type StretchWire = z.output<typeof StretchReply>

const PUBLICATION = {
  number: Name.max(100).describe('unique among the plans'),
  title: Name,
  authority: Name,
  signatory: Name.optional(),
  effective_from: z.iso.date(),
  supersedes: Id.optional().describe('id of the published plan that it takes the place of'),
  note: Text.optional(),
} as const

export const PublishRequest = z
  .strictObject({ label: Label, ...PUBLICATION })
  .meta({ id: 'PublishRequest', description: 'Under which number, title and name a plan is published.' })

export type PublishWire = z.output<typeof PublishRequest>

export const PublicationReply = z
  .object({
    ...PUBLICATION,
    published_at: z.iso.datetime(),
    published_by: z.string().optional().describe('name of the access key; left out without keys'),
    service_version: z.string(),
    method_version: z.string(),
    record_hash: z.string().describe('sha256 over the canonical form of the record'),
  })
  .meta({ id: 'Publication' })

export type PublicationWire = z.output<typeof PublicationReply>

export const LimitPlanReply = z
  .object({
    id: z.string(),
    name: z.string(),
    state: z.enum(['draft', 'published', 'superseded']),
    study_id: z.string(),
    created: z.iso.datetime(),
    request: z.record(z.string(), z.unknown()).describe('as received'),
    stretches: z.array(StretchReply),
    totals: z.object({
      stretches: z.int().min(0).max(1e6),
      length_m: z.number().describe('of every group and direction'),
      length_with_limit_m: z.number(),
      length_below_smallest_m: z.number(),
      travel_time_s: z.number(),
      travel_time_comparable_s: z.number().describe('of the stretches with a time of today'),
      travel_time_today_s: z.number(),
    }),
    unassigned_vessels: z.array(
      z.object({
        vessel_index: z.int().min(0).max(2000),
        vessel_class: z.string().optional(),
        loading: z.enum(LOADINGS).optional(),
        draught_m: z.number(),
      }),
    ),
    publication: PublicationReply.optional(),
  })
  .meta({ id: 'LimitPlan', description: 'Proposed limits, and what they follow from.' })

export type LimitPlanReplyWire = z.output<typeof LimitPlanReply>
/** What is kept of a plan beside its request. */
export type PlanContentWire = Pick<LimitPlanReplyWire, 'stretches' | 'totals' | 'unassigned_vessels'>

export const LimitPlanList = listOf('LimitPlanList', LimitPlanReply)
