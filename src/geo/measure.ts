import type { BoundingBox, LonLat } from '../domain/position.ts'
import { densify } from './densify.ts'
import { edgeLength, longitudeDifference } from './plane.ts'

/**
 * Length of a line along its straight longitude/latitude edges, m.
 *
 * @param line  n positions, n ≥ 2
 * @error below 1e-6 relative at latitudes up to 70 degrees; edges over 1 km are measured in pieces
 */
export function lineLength(line: readonly LonLat[]): number {
  return densify(line).reduce((sum, position, i, positions) => {
    const before = positions[i - 1]
    return before ? sum + edgeLength(before, position) : sum
  }, 0)
}

/**
 * Smallest box around a line, its edges taken the short way round.
 *
 * @param line  n positions, n ≥ 1
 * @returns west above east for a line that crosses the antimeridian, as RFC 7946 (5.2) has it
 */
export function boundingBox(line: readonly LonLat[]): BoundingBox {
  const [lon0, lat0] = line[0] ?? [NaN, NaN]
  let [west, east, south, north] = [lon0, lon0, lat0, lat0]
  // degrees from the first position by the way the line takes; the corners themselves are the caller's digits
  let [turned, least, most, before] = [0, 0, 0, lon0]
  for (const [lon, lat] of line) {
    turned += longitudeDifference(before, lon)
    before = lon
    if (turned < least) [least, west] = [turned, lon]
    if (turned > most) [most, east] = [turned, lon]
    south = Math.min(south, lat)
    north = Math.max(north, lat)
  }
  return most - least >= 360 ? [-180, south, 180, north] : [west, south, east, north]
}

/** Whether two boxes share a point; a west above its east crosses the antimeridian. */
export function boxesMeet(a: BoundingBox, b: BoundingBox): boolean {
  if (a[1] > b[3] || b[1] > a[3]) return false
  return spans(a).some(([w1, e1]) => spans(b).some(([w2, e2]) => w1 <= e2 && w2 <= e1))
}

function spans([west, , east]: BoundingBox): readonly (readonly [number, number])[] {
  return west <= east
    ? [[west, east]]
    : [
        [west, 180],
        [-180, east],
      ]
}
