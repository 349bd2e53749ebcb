import type { LonLat } from '../domain/position.ts'
import type { Point } from './chart.ts'

/** Metres in a degree of latitude on the mean sphere of the Earth: good to half a per cent, which a sketch is. */
const DEGREE = (Math.PI / 180) * 6_371_009

/** Metres east and north of a first position. */
export type Place = readonly [east: number, north: number]

/** Degrees to the east, the short way round. */
const eastward = (from: number, to: number): number => ((to - from + 540) % 360) - 180

/** A plane about a position. */
export function planeAbout(origin: LonLat): (position: LonLat) => Place {
  const [lon0, lat0] = origin
  const shrink = Math.max(0.01, Math.cos((lat0 * Math.PI) / 180))
  return ([lon, lat]) => [eastward(lon0, lon) * DEGREE * shrink, (lat - lat0) * DEGREE]
}

export interface Extent {
  readonly west: number
  readonly south: number
  readonly east: number
  readonly north: number
}

export function extentOf(places: readonly Place[]): Extent {
  let [west, south, east, north] = [Infinity, Infinity, -Infinity, -Infinity]
  for (const [x, y] of places) {
    west = Math.min(west, x)
    east = Math.max(east, x)
    south = Math.min(south, y)
    north = Math.max(north, y)
  }
  return { west, south, east, north }
}

/** A drawing of the plane with north up. */
export interface Fitted {
  readonly toPoint: (place: Place) => Point
  /** px per m */
  readonly scale: number
  readonly height: number
}

/** Fits an extent into a width, and a height between two bounds, with a margin, px. */
export function fitPlane(
  extent: Extent,
  width: number,
  [least, most]: readonly [number, number],
  margin: number,
): Fitted {
  const across = Math.max(extent.east - extent.west, 1)
  const up = Math.max(extent.north - extent.south, 1)
  const scale = Math.min((width - 2 * margin) / across, (most - 2 * margin) / up)
  const height = Math.max(least, Math.ceil(up * scale + 2 * margin))
  const left = (width - across * scale) / 2
  const top = (height - up * scale) / 2
  return {
    scale,
    height,
    toPoint: ([x, y]) => [left + (x - extent.west) * scale, top + (extent.north - y) * scale],
  }
}

/** A line with points left out that lie within a distance of the last one kept, px. */
export function thinned(points: readonly Point[], apart: number): Point[] {
  const kept: Point[] = []
  points.forEach((point, i) => {
    const last = kept.at(-1)
    const isEnd = i === points.length - 1
    if (!last || isEnd || Math.hypot(point[0] - last[0], point[1] - last[1]) >= apart) kept.push(point)
  })
  return kept
}

/** A place along a line of points: position, direction, both px, y down. */
export interface Along {
  readonly at: Point
  /** unit vector downstream */
  readonly course: Point
}

const between = ([ax, ay]: Point, [bx, by]: Point): number => Math.hypot(bx - ax, by - ay)

export function lengthOf(points: readonly Point[]): number {
  let sum = 0
  for (let i = 1; i < points.length; i += 1) sum += between(points[i - 1] ?? [0, 0], points[i] ?? [0, 0])
  return sum
}

/** The place at a share of the length of a line, 0 to 1. */
export function along(points: readonly Point[], share: number): Along {
  let left = Math.min(1, Math.max(0, share)) * lengthOf(points)
  for (let i = 1; i < points.length; i += 1) {
    const a = points[i - 1] ?? [0, 0]
    const b = points[i] ?? [0, 0]
    const step = between(a, b)
    if (step > 0 && (left <= step || i === points.length - 1)) {
      const t = Math.min(1, left / step)
      return {
        at: [a[0] + (b[0] - a[0]) * t, a[1] + (b[1] - a[1]) * t],
        course: [(b[0] - a[0]) / step, (b[1] - a[1]) / step],
      }
    }
    left -= step
  }
  return { at: points[0] ?? [0, 0], course: [1, 0] }
}

/** Mean course at each point of a line, so that offset lines turn with it. */
function courses(points: readonly Point[]): Point[] {
  return points.map((point, i) => {
    const before = points[i - 1] ?? point
    const after = points[i + 1] ?? point
    const size = between(before, after) || 1
    return [(after[0] - before[0]) / size, (after[1] - before[1]) / size]
  })
}

/** Moves a place across its course, px; positive to the right looking along it. */
export const aside = ([x, y]: Point, [cx, cy]: Point, distance: number): Point => [
  x - cy * distance,
  y + cx * distance,
]

/**
 * A line beside another one.
 *
 * @param points    n points, px
 * @param distance  px at a share of the length, positive to the right
 */
export function offsetLine(points: readonly Point[], distance: (share: number) => number): Point[] {
  const turned = courses(points)
  const whole = lengthOf(points) || 1
  let gone = 0
  return points.map((point, i) => {
    if (i > 0) gone += between(points[i - 1] ?? point, point)
    return aside(point, turned[i] ?? [1, 0], distance(gone / whole))
  })
}

/** A round length for a scale bar, m, at most a given one. */
export function roundLength(most: number): number {
  const power = 10 ** Math.floor(Math.log10(most))
  const factor = [5, 2, 1].find((step) => step * power <= most) ?? 1
  return factor * power
}
