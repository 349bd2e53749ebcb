import { impossible, type FaultItem } from '../domain/fault.ts'
import { appliesTo } from '../domain/group.ts'
import type { Vessel } from '../domain/vessel.ts'
import type { PlanGroup } from './plan.ts'

/** Which vessels of a study a plan is for. */
export interface Members {
  /** for each group the indices of its vessels, rising, at least one */
  readonly byGroup: readonly (readonly number[])[]
  /** indices of vessels in no group */
  readonly unassigned: readonly number[]
}

/** A vessel as texts name it. */
export function vesselName({ className, classId, loading }: Vessel, index: number): string {
  const name = className ?? classId
  const parts = [name, loading].filter((part) => part !== undefined)
  return parts.length > 0 ? `vessel ${index} (${parts.join(', ')})` : `vessel ${index}`
}

/**
 * Puts every vessel of a study into its group.
 *
 * @throws Fault `impossible-input` when a vessel belongs to two groups, or a group has none
 */
export function membersOf(groups: readonly PlanGroup[], vessels: readonly Vessel[]): Members {
  const places = vessels.map((vessel) =>
    groups.flatMap((group, i) => (appliesTo(group.appliesTo, vessel) ? [i] : [])),
  )
  const errors = [
    ...vessels.flatMap((vessel, index) => overlap(groups, vessel, index, places[index] ?? [])),
    ...groups.flatMap((group, i) => (places.some((found) => found.includes(i)) ? [] : [nobody(group, i)])),
  ]
  if (errors.length > 0) throw impossible(errors)
  const indices = vessels.map((_, index) => index)
  return {
    byGroup: groups.map((_, i) => indices.filter((index) => places[index]?.[0] === i)),
    unassigned: indices.filter((index) => places[index]?.length === 0),
  }
}

function overlap(
  groups: readonly PlanGroup[],
  vessel: Vessel,
  index: number,
  places: readonly number[],
): FaultItem[] {
  const [first, second] = places
  const [a, b] = [groups[first ?? -1], groups[second ?? -1]]
  if (second === undefined || !a || !b) return []
  return [
    {
      pointer: `#/groups/${second}/applies_to`,
      code: 'clash',
      detail: `${vesselName(vessel, index)} of the study belongs to the groups ${a.id} and ${b.id}: narrow one of them`,
      facts: {
        vessel_index: index,
        ...(vessel.classId !== undefined && { vessel_class: vessel.classId }),
        groups: places.map((i) => groups[i]?.id ?? ''),
      },
    },
  ]
}

function nobody({ id }: PlanGroup, i: number): FaultItem {
  return {
    pointer: `#/groups/${i}/applies_to`,
    code: 'clash',
    detail: `no vessel of the study belongs to the group ${id}: widen applies_to, or take a study with such a vessel`,
    facts: { group: id },
  }
}
