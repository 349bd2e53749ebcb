import type { LonLat } from '../domain/position.ts'
import { between, longitudeDifference, planeAt } from './plane.ts'

/** Longest piece, m. A geodesic leaves the straight longitude/latitude line by L² tan(lat) / (8R): 0.05 m at 1 km and 70 degrees. */
export const LONGEST_PIECE = 1000

/** Upper bound of the length of any part of an edge per its share, m: the scales at their largest along the edge. */
function longestLength(a: LonLat, b: LonLat): number {
  const isAcrossEquator = a[1] < 0 !== b[1] < 0
  const nearest = isAcrossEquator ? 0 : Math.min(Math.abs(a[1]), Math.abs(b[1]))
  const farthest = Math.max(Math.abs(a[1]), Math.abs(b[1]))
  const x = longitudeDifference(a[0], b[0]) * planeAt([0, nearest]).metresPerLon
  const y = (b[1] - a[1]) * planeAt([0, farthest]).metresPerLat
  return Math.hypot(x, y)
}

/**
 * Cuts edges so that no piece is longer than 1 km.
 *
 * The new positions lie on the straight line in longitude and latitude, which is what RFC 7946 (3.1.1) means by an
 * edge, not on the geodesic or the great circle. After that the two cannot be told apart. Across the antimeridian an
 * edge takes the shorter way.
 *
 * @param line          n positions, n ≥ 1, latitudes -85 to 85 degrees
 * @param longestPiece  m, > 0
 * @returns at least n positions; the given ones are among them, unchanged and in order
 */
export function densify(line: readonly LonLat[], longestPiece = LONGEST_PIECE): LonLat[] {
  const positions: LonLat[] = []
  line.forEach((b, i) => {
    const a = line[i - 1]
    if (a) {
      const pieces = Math.ceil(longestLength(a, b) / longestPiece)
      for (let piece = 1; piece < pieces; piece++) positions.push(between(a, b, piece / pieces))
    }
    positions.push(b)
  })
  return positions
}
