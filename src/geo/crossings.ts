import type { LonLat } from '../domain/position.ts'
import { visitEdges, type LineTree } from './line-tree.ts'
import { DEGREES, planeAt, wrapLongitude, type Plane } from './plane.ts'

/** Stop here: the first crossings are what a reader looks at. */
const ENOUGH = 100
/** Pairs of edges that are looked at before a line counts as too tangled to be a waterway; about a second. */
const MOST_PAIRS = 5_000_000
/** Edges closer than this, m, over more than that, m, run on one another; less where the edges are short. */
const OVERLAP_GAP = 0.01
const OVERLAP_LENGTH = 1
const OVERLAP_SHARE = 0.5

/** An edge in metres of a plane. */
type Corners = readonly [ax: number, ay: number, bx: number, by: number]

/** Where two edges meet. */
export interface Crossing {
  readonly position: LonLat
  /** edge i runs from vertex i to vertex i + 1 */
  readonly edge: number
  readonly other: number
}

export interface Tangle {
  /** the first ones, at most 100 */
  readonly crossings: readonly Crossing[]
  /** pairs of edges that run on one another */
  readonly overlaps: readonly Crossing[]
  /** whether the search was given up */
  readonly isTooTangled: boolean
}

type Pair = (other: number, corners: Corners) => void

/** Visits the edges of a line whose boxes meet that of an edge. */
function pairsOf(tree: LineTree, plane: Plane, edge: Corners, padding: number, visit: Pair): void {
  const [ax, ay, bx, by] = edge
  const [west, east] = [Math.min(ax, bx) - padding, Math.max(ax, bx) + padding]
  const [south, north] = [Math.min(ay, by) - padding, Math.max(ay, by) + padding]
  visitEdges(tree, plane, {
    bound: (w, s, e, n) => (w > east || e < west || s > north || n < south ? Infinity : 0),
    visit: (other, cx, cy, dx, dy) => {
      visit(other, [cx, cy, dx, dy])
      return Infinity
    },
  })
}

/** Twice the area of a triangle, positive when c lies to the left of a to b. */
const turn = (ax: number, ay: number, bx: number, by: number, cx: number, cy: number): number =>
  (bx - ax) * (cy - ay) - (by - ay) * (cx - ax)

/**
 * Share of the first edge at which the second crosses it, or null.
 *
 * A vertex on the other edge counts with the side to its left, so a line that passes through a vertex crosses once
 * and one that only touches it crosses twice or never.
 */
function crossingShare([ax, ay, bx, by]: Corners, [cx, cy, dx, dy]: Corners): number | null {
  const c = turn(ax, ay, bx, by, cx, cy)
  const d = turn(ax, ay, bx, by, dx, dy)
  if (c >= 0 === d >= 0) return null
  const a = turn(cx, cy, dx, dy, ax, ay)
  const b = turn(cx, cy, dx, dy, bx, by)
  return a >= 0 === b >= 0 ? null : a / (a - b)
}

/** Length over which the second edge lies on the first, m. */
function overlapLength([ax, ay, bx, by]: Corners, [cx, cy, dx, dy]: Corners): number {
  const length = Math.hypot(bx - ax, by - ay)
  const along = (x: number, y: number) => ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / length
  const across = (x: number, y: number) => turn(ax, ay, bx, by, x, y) / length
  const [c, d] = [along(cx, cy), along(dx, dy)]
  const [from, to] = [Math.max(0, Math.min(c, d)), Math.min(length, Math.max(c, d))]
  const shorter = Math.min(length, Math.hypot(dx - cx, dy - cy))
  if (to - from <= Math.min(OVERLAP_LENGTH, OVERLAP_SHARE * shorter)) return 0
  const gapAt = (s: number) => across(cx, cy) + ((s - c) / (d - c)) * (across(dx, dy) - across(cx, cy))
  return Math.max(Math.abs(gapAt(from)), Math.abs(gapAt(to))) <= OVERLAP_GAP * Math.min(1, shorter)
    ? to - from
    : 0
}

function edgeOf(tree: LineTree, plane: Plane, index: number): Corners {
  const x = (i: number) => ((tree.lons[i] ?? NaN) - plane.lon) * plane.metresPerLon
  const y = (i: number) => ((tree.lats[i] ?? NaN) - plane.lat) * plane.metresPerLat
  return [x(index), y(index), x(index + 1), y(index + 1)]
}

function placeOf(tree: LineTree, edge: number, share: number): LonLat {
  const at = (values: Float64Array) => {
    const [from = NaN, to = NaN] = [values[edge], values[edge + 1]]
    return from + share * (to - from)
  }
  return [wrapLongitude(at(tree.lons)), at(tree.lats)]
}

/**
 * Where a line crosses itself or runs back on itself.
 *
 * The edges are those of RFC 7946, straight in longitude and latitude. Turf's kinks tests every pair (100,000 vertices
 * would be 5e9 of them) and its sweep grows with the square as well for lines that run north, hence the tree.
 */
export function tangleOf(tree: LineTree): Tangle {
  const crossings: Crossing[] = []
  const overlaps: Crossing[] = []
  const plane = planeAt(tree.middle)
  const last = tree.lons.length - 2
  const isRing = tree.lons[0] === tree.lons[last + 1] && tree.lats[0] === tree.lats[last + 1]
  let pairs = 0
  for (let edge = 0; edge <= last; edge++) {
    const corners = edgeOf(tree, plane, edge)
    pairsOf(tree, plane, corners, OVERLAP_GAP, (other, others) => {
      if (other <= edge || pairs++ > MOST_PAIRS) return
      const isNeighbour = other === edge + 1 || (isRing && edge === 0 && other === last)
      const share = isNeighbour ? null : crossingShare(corners, others)
      if (share !== null) crossings.push({ position: placeOf(tree, edge, share), edge, other })
      else if (overlapLength(corners, others) > 0) {
        overlaps.push({ position: placeOf(tree, edge, 1), edge, other })
      }
    })
    if (pairs > MOST_PAIRS || crossings.length + overlaps.length >= ENOUGH) break
  }
  return { crossings, overlaps, isTooTangled: pairs > MOST_PAIRS }
}

/** Where one line crosses another: the first crossings along it, at most about 100. */
export function crossingsOf(line: LineTree, other: LineTree): readonly Crossing[] {
  const crossings: Crossing[] = []
  const plane = { ...DEGREES, lon: line.middle[0] }
  let pairs = 0
  for (let edge = 0; edge < line.lons.length - 1; edge++) {
    const corners = edgeOf(line, plane, edge)
    pairsOf(other, plane, corners, 0, (index, others) => {
      if (pairs++ > MOST_PAIRS) return
      const share = crossingShare(corners, others)
      if (share !== null) crossings.push({ position: placeOf(line, edge, share), edge, other: index })
    })
    if (crossings.length >= ENOUGH || pairs > MOST_PAIRS) break
  }
  return crossings
}
