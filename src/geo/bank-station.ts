import type { LonLat } from '../domain/position.ts'
import { positionAt, smoothBearingAt, type Axis } from './chainage.ts'
import type { LineTree } from './line-tree.ts'
import { nearestOf } from './nearest.ts'
import { firstCrossing } from './normal.ts'
import { edgeLength, fromPlane, planeAt, type Plane, type Point } from './plane.ts'

/** Shares of the channel's width, m and m, over which the direction of the line is smoothed, to each side. */
const SMOOTHING_SHARE = 0.1
const SHORTEST_SMOOTHING = 2
const LONGEST_SMOOTHING = 50

/** A crossing this much farther than the nearest bank is not that bank: share, and m for narrow channels. */
const OPENING_RATIO = 1.5
const OPENING_SLACK = 5

/** Off the normal by less than this, degrees, the end or a corner of a bank counts as met: no remark. */
const MET = 10

/** What the normal came upon: the bank or a corner of it beside the normal; an opening; nothing; no bank any more. */
export type Found = 'crossing' | 'opening' | 'missed' | 'beyond-end'

/** Distance from the sailing line to a bank. */
export interface BankDistance {
  /** m */
  readonly distance: number
  /** whether the bank was met on the normal of the sailing line, or its nearest point stands in */
  readonly source: 'normal' | 'nearest'
  readonly found: Found
}

/** A bank line ready to be measured to. */
export interface BankLine {
  readonly tree: LineTree
  /** part of the sailing line beside it, m along that */
  readonly from: number
  readonly to: number
  /** offsets of the bank from the sailing line where that part begins and ends, m, > 0 */
  readonly offsetAtFrom: number
  readonly offsetAtTo: number
  /** length of the sailing line at its start and its end without this bank beside it, m; 0 within a slack */
  readonly missing: readonly [number, number]
}

export interface Reach {
  /** farthest bank that is looked for, m */
  readonly reach: number
  /** half angle around the normal in which a nearest point stands in for a missing crossing, degrees */
  readonly sector: number
}

const RADIANS = Math.PI / 180

/** The place of measurement: its plane and the direction to the bank. */
interface Place {
  readonly position: LonLat
  readonly plane: Plane
  /** unit vector across the line, to the side of the bank */
  readonly normal: Point
}

/** Distance of a point of the plane from its origin, m, better than the plane itself gives it. */
function distanceTo({ position, plane }: Place, point: Point): number {
  return edgeLength(position, fromPlane(plane, point))
}

function measure(bank: BankLine, place: Place, { reach, sector }: Reach): BankDistance {
  const { plane, normal } = place
  const crossing = firstCrossing(bank.tree, plane, normal, reach)
  const crossed = crossing ? distanceTo(place, crossing) : Infinity
  const around = { x: normal[0], y: normal[1], halfAngle: sector * RADIANS }
  // the crossing is itself in the sector; a little more, so that rounding does not lose it
  const within = Math.min(reach, 1.01 * crossed)
  const nearest =
    nearestOf(bank.tree, plane, around, within) ?? (crossing ? null : nearestOf(bank.tree, plane))
  const near = nearest ? distanceTo(place, [nearest.x, nearest.y]) : crossed
  if (crossing && crossed <= OPENING_RATIO * near + OPENING_SLACK) {
    return { distance: crossed, source: 'normal', found: 'crossing' }
  }
  const distance = Math.min(near, crossed, reach)
  const missed = crossing ? 'opening' : 'missed'
  if (!nearest) return { distance, source: 'nearest', found: missed }
  const ahead = (nearest.x * normal[0] + nearest.y * normal[1]) / nearest.distance
  return { distance, source: 'nearest', found: ahead >= Math.cos(MET * RADIANS) ? 'crossing' : missed }
}

/**
 * Distance to a bank where the sailing line is beside it, else what it was where the bank ends.
 *
 * Beyond the end the nearest point of the bank is the end itself, ever farther away. Its distance would grow with the
 * missing length and pass for a wide channel, so the offset of that end from the sailing line is held.
 */
function distanceOf(bank: BankLine, along: number, place: Place, reach: Reach): BankDistance {
  const isBefore = bank.missing[0] > 0 && along < bank.from
  if (isBefore || (bank.missing[1] > 0 && along > bank.to)) {
    const distance = isBefore ? bank.offsetAtFrom : bank.offsetAtTo
    return { distance: Math.min(distance, reach.reach), source: 'nearest', found: 'beyond-end' }
  }
  return measure(bank, place, reach)
}

/** Half of the length over which the line's direction is smoothed: a part of the channel's width, m. */
function smoothingAt(banks: readonly (BankLine | null)[], plane: Plane): number {
  const nearest = banks.flatMap((bank) => (bank ? [nearestOf(bank.tree, plane)?.distance ?? 0] : []))
  const width = (2 * nearest.reduce((sum, distance) => sum + distance, 0)) / nearest.length
  return Math.min(LONGEST_SMOOTHING, Math.max(SHORTEST_SMOOTHING, SMOOTHING_SHARE * width))
}

/**
 * Distances from a place of the sailing line to its banks, on the local normal.
 *
 * @param banks  left and right looking along the vertices; null where no line is given
 * @param along  m along the sailing line
 */
export function bankDistancesAt(
  axis: Axis,
  banks: readonly [BankLine | null, BankLine | null],
  along: number,
  reach: Reach,
): readonly [BankDistance | null, BankDistance | null] {
  const position = positionAt(axis, along)
  const plane = planeAt(position)
  const bearing = smoothBearingAt(axis, along, smoothingAt(banks, plane)) * RADIANS
  const [east, north] = [Math.sin(bearing), Math.cos(bearing)]
  const [left, right] = banks
  return [
    left && distanceOf(left, along, { position, plane, normal: [-north, east] }, reach),
    right && distanceOf(right, along, { position, plane, normal: [north, -east] }, reach),
  ]
}
