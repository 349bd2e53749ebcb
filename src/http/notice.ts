import { z } from 'zod'
import type { VesselClass } from '../domain/vessel-classes.ts'
import { toKmh } from '../domain/units.ts'
import type { PlanGroup, PlanRules } from '../limits/plan.ts'
import type { PlanRecord } from '../store/job-records.ts'
import type { StretchWire } from './limit-plans.schema.ts'
import { contentOf, publicationOf } from './plan-reply.ts'

/** Limits in notices are km/h, rounded down to this (common practice, no source). */
const NOTICE_STEP_KMH = 0.5

const TARGET_GROUPS = ['ALL', 'COM', 'PAX', 'PLE', 'CNV'] as const
type TargetGroup = (typeof TARGET_GROUPS)[number]

const DIRECTION_CODES = { both: 'ALL', upstream: 'UPS', downstream: 'DWN' } as const

const Limitation = z.object({
  limitation_code: z.enum(['SPEED', 'WAVWAS']).describe('speed limit, or no wash of waves'),
  indication_code: z.literal('MAX').optional(),
  value: z.number().optional(),
  unit: z.literal('km/h').optional(),
  exact_value_kmh: z.number().optional().describe('of the limit as it is on the sign'),
  direction_code: z.enum(['ALL', 'UPS', 'DWN']),
  target_group_code: z.enum(TARGET_GROUPS).describe('the nearest; ALL where none fits'),
  target_group_name: z.string().describe('of the group in the plan, which the code may widen'),
  speed_reference: z.literal('over-ground'),
  waterway: z.string().optional(),
  chainage_from_m: z.number(),
  chainage_to_m: z.number(),
  effective_from: z.iso.date().optional().describe('of a published plan'),
})

export const NoticeReply = z
  .object({
    legal_status: z.literal('proposal'),
    text: z.string(),
    limit_plan_id: z.string(),
    number: z.string().optional(),
    limitations: z.array(Limitation),
  })
  .meta({
    id: 'Notice',
    description:
      'A proposal in code words of the Notices to Skippers standard. It is no official message: an authority makes that.',
  })

type LimitationWire = z.output<typeof Limitation>

const TEXT =
  'A proposal, not an official message. A notice is made and sent by the competent authority; local rules come first.'

/** Families of classes by the start of their ids, with the code that names their vessels. */
const FAMILIES: readonly (readonly [RegExp, TargetGroup])[] = [
  [/^(?:recreational-|planing-boat$)/, 'PLE'],
  [/^(?:tow-|cemt-v(?:b|i))/, 'CNV'],
  [/^passenger-vessel$/, 'PAX'],
  [/^(?:cemt-|coaster$|handysize$|panamax$)/, 'COM'],
]

/** Code of a group whose classes are all of one family; ALL otherwise, which is the wider word. */
function targetGroupOf({ appliesTo }: PlanGroup): TargetGroup {
  const classes: readonly VesselClass['id'][] = appliesTo.vesselClasses ?? []
  const codes = new Set(classes.map((id) => FAMILIES.find(([pattern]) => pattern.test(id))?.[1] ?? 'ALL'))
  const [only] = codes
  if (codes.size === 1 && only) return only
  // pushed convoys are commercial traffic too
  return codes.size === 2 && codes.has('CNV') && codes.has('COM') ? 'COM' : 'ALL'
}

function toLimitation(
  stretch: StretchWire,
  group: PlanGroup,
  effectiveFrom: string | undefined,
): LimitationWire {
  const place = {
    direction_code: DIRECTION_CODES[stretch.direction],
    target_group_code: targetGroupOf(group),
    target_group_name: group.name,
    speed_reference: 'over-ground' as const,
    ...(stretch.waterway !== undefined && { waterway: stretch.waterway }),
    chainage_from_m: stretch.chainage_from_m,
    chainage_to_m: stretch.chainage_to_m,
    ...(effectiveFrom !== undefined && { effective_from: effectiveFrom }),
  }
  const { limit, limit_speed: speed } = stretch
  if (!limit || !speed) return { limitation_code: 'WAVWAS', ...place }
  const exact = limit.unit === 'km/h' ? limit.value : toKmh(speed.mps)
  const rounded = Math.floor(exact / NOTICE_STEP_KMH + 1e-9) * NOTICE_STEP_KMH
  return {
    limitation_code: 'SPEED',
    indication_code: 'MAX',
    value: limit.unit === 'km/h' ? exact : rounded,
    unit: 'km/h',
    exact_value_kmh: exact,
    ...place,
  }
}

/** The limits of a plan in the code words of notices. */
export function toNotice(plan: PlanRecord, rules: PlanRules): z.output<typeof NoticeReply> {
  const publication = publicationOf(plan)
  return {
    legal_status: 'proposal',
    text: TEXT,
    limit_plan_id: plan.id,
    ...(publication && { number: publication.number }),
    limitations: contentOf(plan).stretches.map((stretch) => {
      const group = rules.groups.find(({ id }) => id === stretch.group_id)
      if (!group) throw new RangeError(`A stretch of the unknown group ${stretch.group_id}`)
      return toLimitation(stretch, group, publication?.effective_from)
    }),
  }
}
