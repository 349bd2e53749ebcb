import type { Plan, PlanRules, Stretch } from '../limits/plan.ts'
import type { Study } from '../limits/study.ts'
import type { PlanRecord } from '../store/job-records.ts'
import { toGroup } from './group.schema.ts'
import type {
  LimitPlanReplyWire,
  LimitPlanWire,
  PlanContentWire,
  PublicationWire,
  StretchWire,
} from './limit-plans.schema.ts'
import { toSpeed } from './reply-parts.ts'

/** How limits are drawn, from a request. */
export function toPlanRules(wire: LimitPlanWire): PlanRules {
  return {
    groups: wire.groups.map(({ id, name, applies_to: group }) => ({ id, name, appliesTo: toGroup(group) })),
    percentile: wire.percentile,
    signUnit: wire.sign_unit ?? 'km/h',
    signStep: wire.sign_step ?? 1,
    ...(wire.smallest_limit !== undefined && { smallestLimit: wire.smallest_limit }),
    ...(wire.largest_limit !== undefined && { largestLimit: wire.largest_limit }),
    minRunLength: wire.min_run_length_m ?? 0,
    isByDirection: wire.by_direction ?? false,
    keepPosted: wire.keep_posted ?? [],
    ...(wire.passage_summary && { passages: toPassages(wire.passage_summary) }),
  }
}

function toPassages({ groups }: NonNullable<LimitPlanWire['passage_summary']>) {
  return groups.flatMap(({ segment_id, vessel_class, direction, histogram_kn: { step, counts } }) =>
    vessel_class === null || direction === null
      ? []
      : [{ segmentId: segment_id, vesselClass: vessel_class, direction, step, counts }],
  )
}

const speedOf = (speed: number | undefined) => (speed === undefined ? undefined : toSpeed(speed))

function toGoverning(governing: NonNullable<Stretch['governing']>): NonNullable<StretchWire['governing']> {
  const { stationChainage, vesselClass, loading, direction, criterion } = governing
  return {
    segment_id: governing.segmentId,
    ...(stationChainage !== undefined && { station_chainage_m: stationChainage }),
    vessel_index: governing.vessel,
    ...(vesselClass !== undefined && { vessel_class: vesselClass }),
    ...(loading && { loading }),
    water_level_m: governing.waterLevel,
    current_mps: governing.current,
    ...(direction && { direction }),
    ...(criterion && { criterion }),
  }
}

/** Fields that are left out where they do not apply. */
function present<Fields extends object>(
  fields: Fields,
): { [Name in keyof Fields]?: NonNullable<Fields[Name]> } {
  const entries = Object.entries(fields).filter(([, value]) => value !== undefined)
  return Object.fromEntries(entries) as { [Name in keyof Fields]?: NonNullable<Fields[Name]> }
}

function toStretch(stretch: Stretch, index: number): StretchWire {
  const { lowestMaximum, limitSpeed } = stretch
  const hasMargin = lowestMaximum !== undefined && limitSpeed !== undefined
  return {
    index,
    group_id: stretch.groupId,
    direction: stretch.direction,
    ...(stretch.waterway !== undefined && { waterway: stretch.waterway }),
    chainage_from_m: stretch.chainageFrom,
    chainage_to_m: stretch.chainageTo,
    length_m: stretch.length,
    segment_ids: [...stretch.segmentIds],
    outcome: stretch.outcome,
    ...present({
      limit: stretch.limit,
      limit_speed: speedOf(limitSpeed),
      ceiling: speedOf(stretch.ceiling),
      lowest_maximum: speedOf(lowestMaximum),
      margin_mps: hasMargin ? lowestMaximum - limitSpeed : undefined,
      governing: stretch.governing && toGoverning(stretch.governing),
      today: speedOf(stretch.today),
      travel_time_s: stretch.travelTime,
      travel_time_today_s: stretch.travelTimeToday,
      passages: stretch.passages,
      exceeding_ratio: stretch.exceedingRatio,
    }),
    cautions: stretch.cautions.map(({ facts, ...caution }) => ({
      ...caution,
      ...(facts && { facts: facts as Record<string, string | number | string[]> }),
    })),
  }
}

function toUnassigned(vessel: number, { vessels }: Study) {
  const { classId, loading, draught = 0 } = vessels[vessel] ?? {}
  return {
    vessel_index: vessel,
    ...(classId !== undefined && { vessel_class: classId }),
    ...(loading && { loading }),
    draught_m: draught,
  }
}

/** A plan as it is kept and goes out. */
export function toPlanContent({ stretches, totals, unassignedVessels }: Plan, study: Study): PlanContentWire {
  return {
    stretches: stretches.map(toStretch),
    totals: {
      stretches: stretches.length,
      length_m: totals.length,
      length_with_limit_m: totals.lengthWithLimit,
      length_below_smallest_m: totals.lengthBelowSmallest,
      travel_time_s: totals.travelTime,
      travel_time_comparable_s: totals.travelTimeComparable,
      travel_time_today_s: totals.travelTimeToday,
    },
    unassigned_vessels: unassignedVessels.map((vessel) => toUnassigned(vessel, study)),
  }
}

export const contentOf = (plan: PlanRecord): PlanContentWire => plan.content as unknown as PlanContentWire

export const publicationOf = (plan: PlanRecord): PublicationWire | undefined =>
  plan.publication as unknown as PublicationWire | undefined

/** A plan as it goes out. */
export function toPlanReply(plan: PlanRecord): LimitPlanReplyWire {
  const publication = publicationOf(plan)
  return {
    id: plan.id,
    name: plan.name,
    state: plan.state,
    study_id: plan.studyId,
    created: plan.created,
    request: plan.request,
    ...contentOf(plan),
    ...(publication && { publication }),
  }
}

/** The stretches of a plan as the drawings have them. */
export function fromStretch(wire: StretchWire): Stretch {
  const { governing } = wire
  return {
    groupId: wire.group_id,
    direction: wire.direction,
    ...(wire.waterway !== undefined && { waterway: wire.waterway }),
    chainageFrom: wire.chainage_from_m,
    chainageTo: wire.chainage_to_m,
    length: wire.length_m,
    segmentIds: wire.segment_ids,
    outcome: wire.outcome,
    ...present({
      limit: wire.limit,
      limitSpeed: wire.limit_speed?.mps,
      ceiling: wire.ceiling?.mps,
      lowestMaximum: wire.lowest_maximum?.mps,
      governing: governing && fromGoverning(governing),
      today: wire.today?.mps,
      travelTime: wire.travel_time_s,
      travelTimeToday: wire.travel_time_today_s,
      passages: wire.passages,
      exceedingRatio: wire.exceeding_ratio,
    }),
    cautions: wire.cautions.map(({ facts, ...caution }) => ({ ...caution, ...(facts && { facts }) })),
  }
}

function fromGoverning(wire: NonNullable<StretchWire['governing']>): NonNullable<Stretch['governing']> {
  return {
    segmentId: wire.segment_id,
    vessel: wire.vessel_index,
    waterLevel: wire.water_level_m,
    current: wire.current_mps,
    ...present({
      stationChainage: wire.station_chainage_m,
      vesselClass: wire.vessel_class,
      loading: wire.loading,
      direction: wire.direction,
      criterion: wire.criterion,
    }),
  }
}

/** A kept plan as the drawings have it. */
export function fromPlanContent({ stretches, totals, unassigned_vessels }: PlanContentWire): Plan {
  return {
    stretches: stretches.map(fromStretch),
    totals: {
      length: totals.length_m,
      lengthWithLimit: totals.length_with_limit_m,
      lengthBelowSmallest: totals.length_below_smallest_m,
      travelTime: totals.travel_time_s,
      travelTimeComparable: totals.travel_time_comparable_s,
      travelTimeToday: totals.travel_time_today_s,
    },
    unassignedVessels: unassigned_vessels.map(({ vessel_index }) => vessel_index),
  }
}
