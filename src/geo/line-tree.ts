import type { LonLat } from '../domain/position.ts'
import { longitudeDifference, type Plane } from './plane.ts'

/** Edges per leaf: fewer make the tree deeper, more make each visit longer. */
const LEAF_EDGES = 8

/** A line with boxes over runs of its edges, to look edges up by place. */
export interface LineTree {
  /** degrees, n each, without jumps: they run past 180 where the line crosses the antimeridian */
  readonly lons: Float64Array
  readonly lats: Float64Array
  /** west, south, east, north of each node in heap order; leaf j holds edges 8 j to 8 j + 7 */
  readonly boxes: Float64Array
  readonly leaves: number
  /** middle of the box of the line, degrees */
  readonly middle: LonLat
}

export interface EdgeSearch {
  /** least distance, m, that an edge inside a box can have; Infinity where none can matter. Corners in m */
  readonly bound: (west: number, south: number, east: number, north: number) => number
  /** looks at an edge from a to b, m; returns the distance up to which others still matter, m */
  readonly visit: (index: number, ax: number, ay: number, bx: number, by: number) => number
}

/**
 * Builds the tree over a line.
 *
 * @param line  n positions, n ≥ 2
 */
export function lineTree(line: readonly LonLat[]): LineTree {
  const lons = new Float64Array(line.length)
  const lats = new Float64Array(line.length)
  line.forEach(([lon, lat], i) => {
    lats[i] = lat
    const before = lons[i - 1]
    // a plain copy where nothing is crossed keeps the caller's digits
    const isNear = before === undefined || Math.abs(lon - before) <= 180
    lons[i] = isNear ? lon : before + longitudeDifference(before, lon)
  })
  const leaves = 2 ** Math.ceil(Math.log2(Math.max(1, Math.ceil((line.length - 1) / LEAF_EDGES))))
  const boxes = new Float64Array(4 * (2 * leaves - 1))
  const tree = { lons, lats, boxes, leaves, middle: [0, 0] as LonLat }
  for (let node = 2 * leaves - 2; node >= 0; node--) fillBox(tree, node)
  const [west = 0, south = 0, east = 0, north = 0] = boxes
  return { ...tree, middle: [(west + east) / 2, (south + north) / 2] }
}

/** First and last vertex of the edges in a leaf. */
function verticesOfLeaf({ lons, leaves }: LineTree, node: number): readonly [number, number] {
  const from = (node - leaves + 1) * LEAF_EDGES
  return [from, Math.min(from + LEAF_EDGES, lons.length - 1)]
}

function fillBox(tree: LineTree, node: number): void {
  const { lons, lats, boxes, leaves } = tree
  let [west, south, east, north] = [Infinity, Infinity, -Infinity, -Infinity]
  const widen = (w = NaN, s = NaN, e = NaN, n = NaN) => {
    west = Math.min(west, w)
    south = Math.min(south, s)
    east = Math.max(east, e)
    north = Math.max(north, n)
  }
  if (node < leaves - 1) {
    for (const child of [2 * node + 1, 2 * node + 2]) widen(...boxes.subarray(4 * child, 4 * child + 4))
  } else {
    const [from, to] = verticesOfLeaf(tree, node)
    for (let i = from; i <= to; i++) widen(lons[i], lats[i], lons[i], lats[i])
  }
  boxes.set([west, south, east, north], 4 * node)
}

/** Whole turns, degrees, between the longitudes of a tree and those near a plane's origin. */
function turnsBetween(tree: LineTree, plane: Plane): number {
  return 360 * Math.round((tree.middle[0] - plane.lon) / 360)
}

/**
 * Visits the edges of a line that a search cares for, nearer boxes first.
 *
 * The search gets plain numbers, since a list of corners for every box would be most of the work.
 *
 * @param plane   corners are given in its metres
 * @param search  what to skip and what to do; an edge whose own box is out of bounds is not visited
 */
export function visitEdges(tree: LineTree, plane: Plane, search: EdgeSearch): void {
  const { lons, lats, boxes, leaves } = tree
  const { metresPerLon, metresPerLat, lat: lat0 } = plane
  const lon0 = plane.lon + turnsBetween(tree, plane)
  const boundOf = (node: number) => {
    const west = boxes[4 * node] ?? Infinity
    if (west === Infinity) return Infinity
    return search.bound(
      (west - lon0) * metresPerLon,
      ((boxes[4 * node + 1] ?? NaN) - lat0) * metresPerLat,
      ((boxes[4 * node + 2] ?? NaN) - lon0) * metresPerLon,
      ((boxes[4 * node + 3] ?? NaN) - lat0) * metresPerLat,
    )
  }
  let limit = Infinity
  const visitLeaf = (node: number) => {
    const [from, to] = verticesOfLeaf(tree, node)
    let bx = ((lons[from] ?? NaN) - lon0) * metresPerLon
    let by = ((lats[from] ?? NaN) - lat0) * metresPerLat
    for (let i = from; i < to; i++) {
      const [ax, ay] = [bx, by]
      bx = ((lons[i + 1] ?? NaN) - lon0) * metresPerLon
      by = ((lats[i + 1] ?? NaN) - lat0) * metresPerLat
      const bound = search.bound(Math.min(ax, bx), Math.min(ay, by), Math.max(ax, bx), Math.max(ay, by))
      if (bound < Infinity && bound <= limit) limit = Math.min(limit, search.visit(i, ax, ay, bx, by))
    }
  }
  const descend = (node: number, bound: number): void => {
    if (bound === Infinity || bound > limit) return
    if (node >= leaves - 1) {
      visitLeaf(node)
      return
    }
    const [first, second] = [boundOf(2 * node + 1), boundOf(2 * node + 2)]
    const isInOrder = first <= second
    descend(2 * node + (isInOrder ? 1 : 2), Math.min(first, second))
    descend(2 * node + (isInOrder ? 2 : 1), Math.max(first, second))
  }
  descend(0, boundOf(0))
}
