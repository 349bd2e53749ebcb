import { MAX_LATITUDE, type Network } from './network.ts'
import { planeAt, wrapLongitude, type Plane } from './plane.ts'

const DEGREES = 180 / Math.PI

/** What lies within a centimetre of the ends of a line counts as alongside, m: digits of coordinates. */
const END_SLACK = 0.01

/** Two edges that run back on each other within this, as the length of the sum of their unit vectors, have no mean direction. */
const HAIRPIN = 1e-6

/** Where a position stands against one line of a network. */
export interface LineFoot {
  /** place of the line in the list that the network was made of */
  readonly line: number
  /** distance of the nearest place of the line from its first vertex, m */
  readonly along: number
  /** from the line to the position, m, positive to the right looking along the vertices; beyond its ends from its straight continuation */
  readonly offset: number
  /** bearing of the line there, degrees clockwise from north, 0 up to 360; at a vertex the mean of both edges */
  readonly bearing: number
  /** how far the position lies before the start, m, negative, or past the end, positive; 0 alongside */
  readonly beyond: number
}

/** The edge of a line that comes nearest so far. */
interface Nearest {
  readonly line: number
  edge: number
  /** of the foot on the endless straight line through the edge, 0 at its start, 1 at its end */
  share: number
  /** squared distance, m² */
  square: number
}

/** Degrees of longitude from one place to another by the shorter way round, both -180 to 180. */
function shorterWay(from: number, to: number): number {
  const difference = to - from
  return difference > 180 ? difference - 360 : difference < -180 ? difference + 360 : difference
}

/** Takes an edge when its line is new and has it within reach, or when it is nearer than what its line has. */
function note(found: Nearest[], network: Network, plane: Plane, edge: number): void {
  const { lons, lats, lonSteps, latSteps } = network
  const ax = shorterWay(plane.lon, lons[edge] ?? NaN) * plane.metresPerLon
  const ay = ((lats[edge] ?? NaN) - plane.lat) * plane.metresPerLat
  const ux = (lonSteps[edge] ?? NaN) * plane.metresPerLon
  const uy = (latSteps[edge] ?? NaN) * plane.metresPerLat
  const share = -(ax * ux + ay * uy) / (ux * ux + uy * uy)
  const held = share < 0 ? 0 : share > 1 ? 1 : share
  const x = ax + held * ux
  const y = ay + held * uy
  const square = x * x + y * y
  const line = network.lineOfEdge[edge] ?? 0
  for (const known of found) {
    if (known.line !== line) continue
    if (square < known.square) {
      known.edge = edge
      known.share = share
      known.square = square
    }
    return
  }
  const reach = network.reaches[line] ?? 0
  if (square <= reach * reach) found.push({ line, edge, share, square })
}

function bearingOf(x: number, y: number): number {
  const bearing = Math.atan2(x, y) * DEGREES
  // a tiny negative bearing plus 360 is 360
  return bearing < 0 ? (bearing + 360) % 360 : bearing
}

function footOn(network: Network, plane: Plane, { line, edge, share, square }: Nearest): LineFoot {
  const ax = shorterWay(plane.lon, network.lons[edge] ?? NaN) * plane.metresPerLon
  const ay = ((network.lats[edge] ?? NaN) - plane.lat) * plane.metresPerLat
  const ux = (network.lonSteps[edge] ?? NaN) * plane.metresPerLon
  const uy = (network.latSteps[edge] ?? NaN) * plane.metresPerLat
  const length = Math.sqrt(ux * ux + uy * uy)
  const held = share < 0 ? 0 : share > 1 ? 1 : share
  const along = (network.along[edge] ?? NaN) + held * (network.edgeLengths[edge] ?? NaN)
  // the position is the origin: from the line to it is the other way
  const offset = (ay * ux - ax * uy) / length
  if (share === held) return { line, along, offset, bearing: bearingOf(ux, uy), beyond: 0 }
  const other = edge + (share < 0 ? -1 : 1)
  if (network.lineOfEdge[other] !== line) {
    const beyond = (share - held) * length
    return {
      line,
      along,
      offset,
      bearing: bearingOf(ux, uy),
      beyond: Math.abs(beyond) > END_SLACK ? beyond : 0,
    }
  }
  const vx = (network.lonSteps[other] ?? NaN) * plane.metresPerLon
  const vy = (network.latSteps[other] ?? NaN) * plane.metresPerLat
  const otherLength = Math.sqrt(vx * vx + vy * vy)
  const meanX = ux / length + vx / otherLength
  const meanY = uy / length + vy / otherLength
  const isHairpin = Math.abs(meanX) + Math.abs(meanY) < HAIRPIN
  const [x, y] = isHairpin ? [ux, uy] : [meanX, meanY]
  const side = (ay + held * uy) * x - (ax + held * ux) * y
  return {
    line,
    along,
    offset: Math.sqrt(square) * (side < 0 ? -1 : 1),
    bearing: bearingOf(x, y),
    beyond: 0,
  }
}

/**
 * Where a position stands against every line that has it within reach, in no particular order.
 *
 * Looked up on the local plane at the position; across the antimeridian by the shorter way round.
 *
 * @param lon  degrees
 * @param lat  degrees; none are found beyond 85 north or south
 * @error offset and along below 0.2 m up to 500 m from the line at latitudes up to 70 degrees, against the geodesic
 */
export function feetOf(network: Network, lon: number, lat: number): LineFoot[] {
  const { index, edgeOfBox } = network
  if (!index || !Number.isFinite(lon) || !(Math.abs(lat) <= MAX_LATITUDE)) return []
  const at = wrapLongitude(lon)
  const boxes = index.search(at, lat, at, lat)
  if (boxes.length === 0) return []
  const plane = planeAt([at, lat])
  const found: Nearest[] = []
  for (const box of boxes) note(found, network, plane, edgeOfBox[box] ?? 0)
  return found.map((nearest) => footOn(network, plane, nearest))
}
