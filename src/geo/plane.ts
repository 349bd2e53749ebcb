import type { LonLat } from '../domain/position.ts'

/** Semi-major axis, m, and flattening of WGS 84 (NIMA TR 8350.2). */
const SEMI_MAJOR = 6378137
const FLATTENING = 1 / 298.257223563
const ECCENTRICITY_SQUARED = FLATTENING * (2 - FLATTENING)

const RADIANS = Math.PI / 180

/** A point of a local plane, m: x to the east, y to the north. */
export type Point = readonly [x: number, y: number]

/**
 * The plane that touches WGS 84 at a position, as two scales.
 *
 * It maps longitude and latitude linearly, so a line that is straight in longitude and latitude, as RFC 7946
 * (3.1.1) has it, is straight on the plane.
 */
export interface Plane {
  /** of the origin, degrees */
  readonly lon: number
  readonly lat: number
  /** m per degree at the origin */
  readonly metresPerLon: number
  readonly metresPerLat: number
}

/** Degrees themselves as a plane, where only the topology of lines matters. */
export const DEGREES: Plane = { lon: 0, lat: 0, metresPerLon: 1, metresPerLat: 1 }

/** Difference of longitudes by the shorter way round, degrees, -180 to 180. */
export function longitudeDifference(from: number, to: number): number {
  return ((((to - from + 540) % 360) + 360) % 360) - 180
}

/** A longitude that has run past the antimeridian, brought back to -180 to 180 degrees. */
export function wrapLongitude(lon: number): number {
  return lon >= -180 && lon <= 180 ? lon : longitudeDifference(0, lon)
}

/**
 * The local plane at a position.
 *
 * @param origin  latitude -85 to 85 degrees
 * @holds some kilometres around the origin
 * @error distances from the origin: relative d tan(lat) / (2R), 2e-4 at 1 km and 70 degrees; `edgeLength` measures better
 * @source radii of curvature in the meridian and the prime vertical, any textbook of geodesy
 */
export function planeAt([lon, lat]: LonLat): Plane {
  const w = 1 - ECCENTRICITY_SQUARED * Math.sin(lat * RADIANS) ** 2
  const meridian = (SEMI_MAJOR * (1 - ECCENTRICITY_SQUARED)) / w ** 1.5
  const primeVertical = SEMI_MAJOR / Math.sqrt(w)
  return {
    lon,
    lat,
    metresPerLon: primeVertical * Math.cos(lat * RADIANS) * RADIANS,
    metresPerLat: meridian * RADIANS,
  }
}

/** A position on the plane, m, by the shorter way round the antimeridian. */
export function toPlane(plane: Plane, [lon, lat]: LonLat): Point {
  return [longitudeDifference(plane.lon, lon) * plane.metresPerLon, (lat - plane.lat) * plane.metresPerLat]
}

/** The position of a point of the plane, degrees, longitude -180 to 180. */
export function fromPlane(plane: Plane, [x, y]: Point): LonLat {
  return [wrapLongitude(plane.lon + x / plane.metresPerLon), plane.lat + y / plane.metresPerLat]
}

/** The position a share of the way along the straight longitude/latitude line; 0 and 1 give the ends as they are. */
export function between(a: LonLat, b: LonLat, share: number): LonLat {
  if (share <= 0) return a
  if (share >= 1) return b
  return [wrapLongitude(a[0] + share * longitudeDifference(a[0], b[0])), a[1] + share * (b[1] - a[1])]
}

/** From a to b on the local plane at their middle latitude, m: x to the east, y to the north. */
export function edgeVector(a: LonLat, b: LonLat): Point {
  const { metresPerLon, metresPerLat } = planeAt([a[0], (a[1] + b[1]) / 2])
  return [longitudeDifference(a[0], b[0]) * metresPerLon, (b[1] - a[1]) * metresPerLat]
}

/**
 * Length of an edge on the local plane of WGS 84 at its middle latitude.
 *
 * @param a  start, degrees
 * @param b  end, degrees
 * @returns m
 * @holds edges up to some kilometres, latitudes up to 85 degrees
 * @error below 1e-6 relative for edges of 1 km at latitudes up to 70 degrees, against the geodesic
 * @source radii of curvature in the meridian and the prime vertical, any textbook of geodesy
 */
export function edgeLength(a: LonLat, b: LonLat): number {
  const [x, y] = edgeVector(a, b)
  return Math.hypot(x, y)
}
