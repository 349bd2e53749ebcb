import type { Direction, Segment } from '../domain/segment.ts'
import type { Conditions, Options } from '../domain/conditions.ts'
import type { Vessel } from '../domain/vessel.ts'
import { waterCriteria } from './criteria/all.ts'
import type { Criterion } from './criteria/criterion.ts'
import { postedLimitCriterion, serviceSpeedCriterion } from './criteria/speed-limits.ts'
import { currentAlong, directionsOf } from './direction.ts'
import { situationOf, type Situation } from './situation.ts'

export type Outcome = 'limited' | 'service-speed' | 'no-safe-speed'

/** A criterion with the first speed at which it is reached, taken alone. */
export interface Bound {
  readonly criterion: Criterion
  /** m/s through the water; Infinity when not reached up to the top speed */
  readonly firstSpeed: number
}

/** What is decided for one station in one direction. */
export interface Decision {
  readonly situation: Situation
  readonly direction: Direction | undefined
  readonly outcome: Outcome
  /** largest speed through the water at which every criterion holds on the whole way up, m/s */
  readonly speed: number
  /** the same over the ground, m/s */
  readonly overGround: number
  readonly governing: Bound
  readonly bounds: readonly Bound[]
}

function boundsOf(criteria: readonly Criterion[], maxSpeed: number): Bound[] {
  return criteria.map((criterion) => ({ criterion, firstSpeed: criterion.firstSpeed(0, maxSpeed) }))
}

function lowest(bounds: readonly Bound[], last: Bound): Bound {
  let found = last
  // from the end, so that of equal ones the first in order stays
  for (let i = bounds.length - 1; i >= 0; i -= 1) {
    const bound = bounds[i]
    if (bound && bound.firstSpeed <= found.firstSpeed) found = bound
  }
  return found
}

/** A vessel at a station with the bounds that the water sets, whatever the current. */
export interface StationBounds {
  readonly situation: Situation
  readonly water: readonly Bound[]
}

/** The bounds of the water at every station of a segment, n ≥ 1, in the order of the stations. */
export type SegmentBounds = readonly [StationBounds, ...StationBounds[]]

const everyBound = (situation: Situation): Bound[] =>
  boundsOf(waterCriteria(situation), situation.vessel.maxSpeed)

/**
 * The bounds of the water at every station of a segment. Current and direction play no part in them, so that they serve
 * every current and direction alike.
 *
 * @param solve  finds the bounds at a station
 * @throws Fault `impossible-input` when the vessel does not fit one of the stations
 */
export function stationBounds(
  segment: Segment,
  vessel: Vessel,
  conditions: Conditions,
  options: Options,
  solve: (situation: Situation) => readonly Bound[] = everyBound,
): SegmentBounds {
  const [first, ...rest] = segment.stations.map((station) => {
    const situation = situationOf(segment, station, vessel, conditions, options)
    return { situation, water: solve(situation) }
  })
  if (!first) throw new RangeError('A segment has at least one station')
  return [first, ...rest]
}

export function decideDirection(
  { situation, water }: StationBounds,
  direction: Direction | undefined,
): Decision {
  const { maxSpeed, minSteerageSpeed } = situation.vessel
  const posted = postedLimitCriterion(situation, direction)
  const service: Bound = { criterion: serviceSpeedCriterion(situation), firstSpeed: maxSpeed }
  const bounds = [...water, ...(posted ? boundsOf([posted], maxSpeed) : []), service]
  const governing = lowest(bounds, service)
  const speed = governing.firstSpeed
  const overGround = speed + currentAlong(situation.conditions, direction)
  const isSafe = speed >= minSteerageSpeed && overGround > 0
  const isFree = governing.criterion.id === 'service-speed'
  return {
    situation,
    direction,
    outcome: isSafe ? (isFree ? 'service-speed' : 'limited') : 'no-safe-speed',
    speed,
    overGround,
    governing,
    bounds,
  }
}

/** Orders decisions by how little they allow: no safe speed first, then the lower speed over ground. */
function isStricter(a: Decision, b: Decision): boolean {
  const unsafeA = a.outcome === 'no-safe-speed'
  const unsafeB = b.outcome === 'no-safe-speed'
  return unsafeA === unsafeB ? a.overGround < b.overGround : unsafeA
}

export function strictest(decisions: readonly [Decision, ...Decision[]]): Decision {
  return decisions.reduce((found, next) => (isStricter(next, found) ? next : found))
}

/** The decision of a segment, with both directions where there is a current. */
export interface SegmentDecision {
  readonly main: Decision
  readonly byDirection?: Readonly<Record<Direction, Decision>>
}

/** The same bounds in another current, m/s, positive downstream. */
export function inCurrent(bounds: SegmentBounds, current: number): SegmentBounds {
  const [first, ...rest] = bounds
  const { conditions } = first.situation
  if (conditions.current === current) return bounds
  const changed = { ...conditions, current }
  const moved = ({ situation, water }: StationBounds): StationBounds => ({
    situation: { ...situation, conditions: changed },
    water,
  })
  return [moved(first), ...rest.map(moved)]
}

/**
 * The decision along a segment in one direction, or one answer for both where none is told apart; the lowest station
 * governs.
 */
export function decideInDirection(
  [first, ...rest]: SegmentBounds,
  direction: Direction | undefined,
): Decision {
  let found = decideDirection(first, direction)
  for (const bounds of rest) {
    const next = decideDirection(bounds, direction)
    if (isStricter(next, found)) found = next
  }
  return found
}

/** The decision along a segment, in every direction that is asked for; the lowest station governs. */
export function decideAlong(bounds: SegmentBounds, conditions: Conditions): SegmentDecision {
  const directions = directionsOf(conditions)
  if (directions.length === 1) return { main: decideInDirection(bounds, directions[0]) }
  const byDirection = {
    upstream: decideInDirection(bounds, 'upstream'),
    downstream: decideInDirection(bounds, 'downstream'),
  }
  const main = conditions.direction
    ? byDirection[conditions.direction]
    : strictest([byDirection.upstream, byDirection.downstream])
  return { main, byDirection }
}

/**
 * Decides the largest safe speed on a segment: at every station, in every direction that is asked for. Along a segment
 * the lowest station governs.
 *
 * @throws Fault `impossible-input` when the vessel does not fit one of the stations
 */
export function decide(
  segment: Segment,
  vessel: Vessel,
  conditions: Conditions,
  options: Options,
): SegmentDecision {
  return decideAlong(stationBounds(segment, vessel, conditions, options), conditions)
}
