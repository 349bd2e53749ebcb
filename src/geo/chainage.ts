import type { LonLat } from '../domain/position.ts'
import { densify } from './densify.ts'
import { lineTree, type LineTree } from './line-tree.ts'
import { nearestOf } from './nearest.ts'
import { between, edgeLength, edgeVector, fromPlane, planeAt, type Point } from './plane.ts'

const DEGREES = 180 / Math.PI

/** A sailing line made ready to be measured along. */
export interface Axis {
  /** n positions, no two more than 1 km apart, the given vertices among them */
  readonly positions: readonly LonLat[]
  /** distance of each position along the line from its start, m, rising, n */
  readonly along: Float64Array
  /** distance of each given vertex along the line, m, rising */
  readonly vertices: readonly number[]
  /** m */
  readonly length: number
  readonly tree: LineTree
}

/**
 * Measures a line: distances along it, edge by edge on the local plane.
 *
 * @param line  n positions, n ≥ 2, no two consecutive ones equal
 * @error below 1e-6 relative of the geodesic at latitudes up to 70 degrees
 */
export function axisOf(line: readonly LonLat[]): Axis {
  const positions = densify(line)
  const along = new Float64Array(positions.length)
  const vertices: number[] = []
  positions.forEach((position, i) => {
    const before = positions[i - 1]
    if (before) along[i] = (along[i - 1] ?? 0) + edgeLength(before, position)
    // densify hands the given positions on as the same objects
    if (position === line[vertices.length]) vertices.push(along[i] ?? 0)
  })
  return { positions, along, vertices, length: along.at(-1) ?? 0, tree: lineTree(positions) }
}

/** Index of the edge that holds a distance along the line; ends hold what lies beyond them. */
function edgeAt({ along }: Axis, distance: number): number {
  let [low, high] = [0, along.length - 1]
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((along[middle] ?? 0) <= distance) low = middle
    else high = middle
  }
  return low
}

/** The position at a distance along the line, m; 0 and the length give the ends as they are, beyond them too. */
export function positionAt(axis: Axis, distance: number): LonLat {
  const { positions, along } = axis
  const edge = edgeAt(axis, distance)
  const [from = 0, to = 0] = [along[edge], along[edge + 1]]
  return between(positions[edge] as LonLat, positions[edge + 1] as LonLat, (distance - from) / (to - from))
}

/** Clockwise from north, degrees, 0 up to 360. */
function bearingOf([x, y]: Point): number {
  return (Math.atan2(x, y) * DEGREES + 360) % 360
}

/** Bearing of the edge at a distance along the line, degrees clockwise from north; at a vertex that of the next edge. */
export function bearingAt(axis: Axis, distance: number): number {
  const edge = edgeAt(axis, distance)
  return bearingOf(edgeVector(axis.positions[edge] as LonLat, axis.positions[edge + 1] as LonLat))
}

/** Bearing from one distance along the line to another, straight, degrees clockwise from north. */
function chord(axis: Axis, from: number, to: number): number {
  return bearingOf(edgeVector(positionAt(axis, from), positionAt(axis, to)))
}

/** Largest turn over half a window, degrees, that still passes for a smooth bend and is carried on to the end of the line. */
const SMOOTH_TURN = 10

/**
 * Direction of the line around a place, so that a kink at a vertex does not mislead.
 *
 * It is the bearing of the chord over `halfWindow` to both sides: the tangent itself on a circular arc, the bisector
 * at a kink. Near an end, where the window has no room, it follows from the two windows inside, extrapolated along a
 * smooth bend.
 *
 * @param distance    along the line, m, 0 to its length
 * @param halfWindow  m, > 0
 * @returns degrees clockwise from north, 0 up to 360
 */
export function smoothBearingAt(axis: Axis, distance: number, halfWindow: number): number {
  const half = Math.min(halfWindow, axis.length / 4)
  const room = Math.min(distance, axis.length - distance)
  if (room >= half / 2) {
    const reach = Math.min(half, room)
    return chord(axis, distance - reach, distance + reach)
  }
  const inward = distance < axis.length / 2 ? 1 : -1
  const ordered = (a: number, b: number) => (a < b ? chord(axis, a, b) : chord(axis, b, a))
  const first = ordered(distance, distance + inward * half)
  const second = ordered(distance + inward * half, distance + 2 * inward * half)
  const turn = ((((first - second + 540) % 360) + 360) % 360) - 180
  return Math.abs(turn) > 2 * SMOOTH_TURN ? first : (first + turn / 2 + 360) % 360
}

/** Where a position stands against a line. */
export interface Foot {
  /** nearest position of the line */
  readonly position: LonLat
  /** its distance along the line, m */
  readonly along: number
  /** from the line to the position, m, positive to the right looking along the vertices */
  readonly offset: number
  /** whether the position lies before the start or after the end of the line, by more than a centimetre */
  readonly isBeyond: boolean
}

/** Direction of the line at its nearest place: at a vertex the mean of both edges, so that the side is the same from either. */
function directionAt({ positions }: Axis, edge: number, share: number): Point {
  const unit = (i: number): Point => {
    const [a, b] = [positions[i], positions[i + 1]]
    if (!a || !b) return [0, 0]
    const [x, y] = edgeVector(a, b)
    const length = Math.hypot(x, y)
    return [x / length, y / length]
  }
  const [x, y] = unit(edge)
  const [otherX, otherY] = share <= 0 ? unit(edge - 1) : share >= 1 ? unit(edge + 1) : [0, 0]
  return [x + otherX, y + otherY]
}

/**
 * The nearest place of a line to a position, looked up in the plane at the position.
 *
 * @error offsets below 1e-3 relative up to 1 km; equally near places: the one found first
 */
export function footOf(axis: Axis, position: LonLat): Foot {
  const plane = planeAt(position)
  const nearest = nearestOf(axis.tree, plane)
  if (!nearest) throw new RangeError('A line without edges has no nearest place')
  const { edge, share, x, y } = nearest
  const [from = 0, to = 0] = [axis.along[edge], axis.along[edge + 1]]
  const [dx, dy] = directionAt(axis, edge, share)
  const place = fromPlane(plane, [x, y])
  // the position is the origin: from its foot to it is (-x, -y)
  const isRight = dx * y - dy * x >= 0
  const isStart = edge === 0 && share === 0
  const isEnd = edge === axis.positions.length - 2 && share === 1
  const forward = -(x * dx + y * dy)
  // digits of coordinates, and the turn of the plane's north over the distance
  const slack = 0.01 + 1e-3 * nearest.distance
  return {
    position: place,
    along: from + share * (to - from),
    offset: edgeLength(place, position) * (isRight ? 1 : -1),
    isBeyond: (isStart && forward < -slack) || (isEnd && forward > slack),
  }
}
