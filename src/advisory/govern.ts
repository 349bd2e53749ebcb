import type { Conditions, Options } from '../domain/conditions.ts'
import type { Segment, Station } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import { waterCriteria } from './criteria/all.ts'
import { decideDirection, strictest, type Bound, type Decision } from './decide.ts'
import { directionsOf } from './direction.ts'
import { situationOf, type Situation } from './situation.ts'

/** What governs, without the bounds that do not. */
export type Governed = Omit<Decision, 'bounds'>

/**
 * The bounds of the water as far as they may govern: those above the lowest so far, or above `most`, are not solved.
 * Outcome, speeds and criterion that are decided from them are those of all bounds, in every current and direction.
 */
export function lowestBounds(situation: Situation, most = Infinity): Bound[] {
  const { maxSpeed } = situation.vessel
  let stop = Math.min(most, maxSpeed)
  return waterCriteria(situation).map((criterion) => {
    const firstSpeed = criterion.firstSpeed(0, maxSpeed, stop)
    stop = Math.min(stop, firstSpeed)
    return { criterion, firstSpeed }
  })
}

/**
 * What governs at a station, in the direction that is asked for or the stricter one: the same situation, outcome, speeds
 * and criterion as of `decide`, to the last digit, for callers that report no other bound.
 *
 * @param most  speed through the water up to which what governs is of interest, m/s; where nothing governs up to it, all
 *   that is told is that: some speed above it
 * @throws Fault `impossible-input` when the vessel does not fit
 */
export function govern(
  segment: Segment,
  station: Station,
  vessel: Vessel,
  conditions: Conditions,
  options: Options,
  most = Infinity,
): Governed {
  const situation = situationOf(segment, station, vessel, conditions, options)
  const bounds = { situation, water: lowestBounds(situation, most) }
  if (conditions.direction) return decideDirection(bounds, conditions.direction)
  const [first, ...rest] = directionsOf(conditions).map((direction) => decideDirection(bounds, direction))
  if (!first) throw new RangeError('There is a direction to answer for, or none is asked for')
  return strictest([first, ...rest])
}
