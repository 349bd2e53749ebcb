import type { Conditions } from '../domain/conditions.ts'
import type { Direction } from '../domain/segment.ts'

/** Current along the course, m/s: positive with the vessel. Without a direction there is none to count. */
export function currentAlong(conditions: Conditions, direction: Direction | undefined): number {
  if (direction === undefined) return 0
  return direction === 'downstream' ? conditions.current : -conditions.current
}

/** Directions to answer: both with a current, the one asked for, or one answer for either. */
export function directionsOf(conditions: Conditions): readonly (Direction | undefined)[] {
  if (conditions.current !== 0) return ['upstream', 'downstream']
  return [conditions.direction]
}
