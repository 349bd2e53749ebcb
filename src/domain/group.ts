import type { Group } from './segment.ts'
import type { Vessel } from './vessel.ts'

/** Whether a rule's group holds for a vessel: every condition that is given holds, an empty group holds for all. */
export function appliesTo(group: Group, vessel: Vessel): boolean {
  return (
    (group.vesselClasses === undefined ||
      (vessel.classId !== undefined && group.vesselClasses.includes(vessel.classId))) &&
    (group.loading === undefined || group.loading === vessel.loading) &&
    vessel.draught >= (group.minDraught ?? 0) &&
    vessel.draught < (group.maxDraught ?? Infinity) &&
    vessel.length >= (group.minLength ?? 0) &&
    (group.hull === undefined || group.hull === vessel.hull)
  )
}
