import { visitEdges, type LineTree } from './line-tree.ts'
import type { Plane } from './plane.ts'

/** Where a line comes nearest to the origin of a plane. */
export interface Nearest {
  /** edge i runs from vertex i to vertex i + 1 */
  readonly edge: number
  /** how far along the edge, 0 to 1 */
  readonly share: number
  /** the place itself, m on the plane */
  readonly x: number
  readonly y: number
  readonly distance: number
}

/** A sector around the origin of a plane: within `halfAngle` of a unit vector. */
export interface Sector {
  readonly x: number
  readonly y: number
  /** radians, below π/2 */
  readonly halfAngle: number
}

/** Distance of a box from the origin. */
function boxDistance(west: number, south: number, east: number, north: number): number {
  return Math.hypot(Math.max(west, 0, -east), Math.max(south, 0, -north))
}

/** The part of an edge inside a sector, as shares of its length; null where none is. */
function clip(
  ax: number,
  ay: number,
  bx: number,
  by: number,
  sector: Sector,
): readonly [number, number] | null {
  let [from, to] = [0, 1]
  const slope = Math.tan(sector.halfAngle)
  for (const hand of [-1, 1]) {
    // along · slope ± across ≥ 0, both measured from the axis of the sector
    const [px, py] = [sector.x * slope - hand * sector.y, sector.y * slope + hand * sector.x]
    const [a, b] = [px * ax + py * ay, px * bx + py * by]
    if (a < 0 && b < 0) return null
    if (a < 0) from = Math.max(from, a / (a - b))
    if (b < 0) to = Math.min(to, a / (a - b))
  }
  return from <= to ? [from, to] : null
}

/**
 * The place of a line that is nearest to the origin of a plane.
 *
 * @param sector  look only inside it
 * @param within  m; farther places do not count
 */
export function nearestOf(
  tree: LineTree,
  plane: Plane,
  sector: Sector | null = null,
  within = Infinity,
): Nearest | null {
  let best: Nearest | null = null
  let limit = within
  visitEdges(tree, plane, {
    bound: (west, south, east, north) => {
      const distance = boxDistance(west, south, east, north)
      return distance > limit ? Infinity : distance
    },
    visit: (edge, ax, ay, bx, by) => {
      const [from, to] = (sector ? clip(ax, ay, bx, by, sector) : [0, 1]) ?? [1, 0]
      if (from > to) return limit
      const [ux, uy] = [bx - ax, by - ay]
      const square = ux * ux + uy * uy
      const foot = square > 0 ? -(ax * ux + ay * uy) / square : 0
      const share = Math.min(to, Math.max(from, foot))
      const [x, y] = [ax + share * ux, ay + share * uy]
      const distance = Math.hypot(x, y)
      if (distance < limit || (best === null && distance <= limit)) {
        limit = distance
        best = { edge, share, x, y, distance }
      }
      return limit
    },
  })
  return best
}
