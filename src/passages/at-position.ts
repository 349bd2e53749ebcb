import { sectionOf } from '../advisory/section-of.ts'
import type { Receptor, Segment, Side, Station } from '../domain/segment.ts'

/** Least water between hull and waterline of a position that is judged, m: below what positioning resolves (own choice). */
const LEAST_WATER = 0.1

/** A segment cut down to one place of it, seen from a vessel that is not on the sailing line. */
export interface ActualWater {
  readonly segment: Segment
  readonly station: Station
  /** from the position as reported to each waterline at the level, m; below zero beyond it */
  readonly distances: readonly [number, number]
  /** whether the hull as reported would reach over a waterline, so that it is judged beside it */
  readonly isMoved: boolean
}

/** A station seen from a place `offset` to the side of bank 1, m. */
function seenFrom(station: Station, offset: number): Station {
  const { shape, distances } = station
  return {
    ...station,
    distances: [distances[0] + offset, distances[1] - offset],
    shape: shape.kind === 'profile' ? { ...shape, offsets: shape.offsets.map((at) => at - offset) } : shape,
  }
}

/** Index of the bank that something stands on. */
function bankIndex(segment: Segment, side: Side, nearer: 0 | 1): 0 | 1 {
  const [first, second] = segment.banks
  if (side === first.side) return 0
  return side === second.side ? 1 : nearer
}

/** How far a vessel is off towards bank 1, and to the right; the same where sides are known. */
interface Shift {
  readonly toSecond: number
  readonly toRight: number
}

/** How much farther a receptor is from the vessel than from the sailing line, m. */
function fartherBy(
  { side }: Receptor,
  segment: Segment,
  { toSecond, toRight }: Shift,
  nearer: 0 | 1,
): number {
  if (side === 'left') return toRight
  if (side === 'right') return -toRight
  return bankIndex(segment, side, nearer) === 1 ? -toSecond : toSecond
}

function receptorsFrom(segment: Segment, shift: Shift, nearer: 0 | 1, least: number): readonly Receptor[] {
  if (segment.receptors.length === 0) return segment.receptors
  return segment.receptors.map((receptor) => ({
    ...receptor,
    distance: Math.max(least, receptor.distance + fartherBy(receptor, segment, shift, nearer)),
  }))
}

/** The water at a place along a segment, as it is on the sailing line. */
export function waterAt(segment: Segment, station: Station): Segment {
  return { ...segment, stations: [station] }
}

/**
 * The water at a place along a segment as it is for a vessel beside the sailing line: distances to the banks and to
 * receptors change by the offset, a surveyed profile is seen from the vessel.
 *
 * Where it is not known which bank is the nearer one, the vessel is taken to be off towards it: the stricter reading.
 *
 * @param station  at the datum, seen from the sailing line
 * @param offset   m, positive to the right looking downstream
 * @param level    water level above the datum, m
 * @param beam     of the hull, m: it is moved so far that it floats
 */
export function waterFrom(
  segment: Segment,
  station: Station,
  offset: number,
  level: number,
  beam: number,
): ActualWater {
  const { distances } = sectionOf(segment, station, level)
  const hasSides = segment.banks[1].side === 'right'
  const nearer = distances[0] <= distances[1] ? 0 : 1
  // towards bank 1
  const reported = hasSides ? offset : Math.abs(offset) * (nearer === 1 ? 1 : -1)
  const room = beam / 2 + LEAST_WATER
  const used = Math.max(room - distances[0], Math.min(distances[1] - room, reported))
  const place = seenFrom(station, used)
  return {
    segment: {
      ...segment,
      stations: [place],
      receptors: receptorsFrom(segment, { toSecond: used, toRight: hasSides ? used : offset }, nearer, room),
    },
    station: place,
    distances: [distances[0] + reported, distances[1] - reported],
    isMoved: used !== reported,
  }
}
