import { appliesTo } from '../domain/group.ts'
import { DIRECTIONS, type Direction, type Segment } from '../domain/segment.ts'
import { SIGN_UNITS, type SignUnit } from '../domain/units.ts'
import type { Vessel } from '../domain/vessel.ts'

/** For whom and which way a posted limit is looked for. */
export interface Traffic {
  readonly vessels: readonly Vessel[]
  readonly direction: 'both' | Direction
  /** of the study, positive downstream, m/s */
  readonly currents: readonly number[]
}

/**
 * Lowest posted limit over the ground that applies to some vessel of the traffic, m/s; undefined where none does. Both
 * ways, a limit of either way counts. One through the water is what it leaves over the ground in the current of the
 * study that takes most from it; where nothing is left it says nothing about the ground, and does not count.
 */
export function lowestPosted(segment: Segment, traffic: Traffic): number | undefined {
  let lowest: number | undefined
  for (const { speed, reference, direction, appliesTo: group } of segment.postedLimits) {
    const ways = waysOf(direction).filter((way) => waysOf(traffic.direction).includes(way))
    if (ways.length === 0 || !traffic.vessels.some((vessel) => appliesTo(group, vessel))) continue
    const overGround = reference === 'over-ground' ? speed : speed + leastAlong(ways, traffic.currents)
    if (overGround > 0 && overGround < (lowest ?? Infinity)) lowest = overGround
  }
  return lowest
}

const waysOf = (direction: 'both' | Direction): readonly Direction[] =>
  direction === 'both' ? DIRECTIONS : [direction]

/** Current along the course that helps least, m/s. */
function leastAlong(ways: readonly Direction[], currents: readonly number[]): number {
  return ways
    .flatMap((way) => currents.map((current) => (way === 'downstream' ? current : -current)))
    .reduce((least, current) => Math.min(least, current), Infinity)
}

const SIGN_DIGITS = 9

/** A speed as the number of a unit, without binary noise. */
export const valueIn = (speed: number, unit: SignUnit): number =>
  Number((speed / SIGN_UNITS[unit]).toFixed(SIGN_DIGITS))

const isTenths = (value: number): boolean => Math.abs(value * 10 - Math.round(value * 10)) < 1e-6

/** A posted speed as its sign most likely has it: in the unit of the plan, or one in which it is whole tenths. */
export function postedSign(speed: number, unit: SignUnit): { value: number; unit: SignUnit } {
  const units = [unit, ...(Object.keys(SIGN_UNITS) as SignUnit[])]
  const found = units.find((candidate) => isTenths(valueIn(speed, candidate))) ?? unit
  return { value: valueIn(speed, found), unit: found }
}
