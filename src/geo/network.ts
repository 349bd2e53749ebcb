import Flatbush from 'flatbush'
import type { LonLat } from '../domain/position.ts'
import { densify } from './densify.ts'
import { edgeLength, longitudeDifference, planeAt, wrapLongitude } from './plane.ts'

/** Farthest north or south that the local plane serves, degrees: own choice, as for the lines of the registry. */
export const MAX_LATITUDE = 85

/** Below the length of a degree of latitude anywhere on WGS 84, m: 110574 at the equator, 111694 at the poles. */
const LEAST_METRES_PER_LAT = 110_500

/** A sailing line as it takes part in a network. */
export interface NetworkLine {
  /** n positions, n ≥ 2, latitudes -85 to 85 degrees */
  readonly line: readonly LonLat[]
  /** how far from the line a position may belong to it, m, ≥ 0 */
  readonly reach: number
}

/**
 * Many lines, ready to be asked which of them are near a position. Edges are at most 1 km long; those of a line follow
 * each other, edges without length are left out.
 */
export interface Network {
  /** none without edges */
  readonly index: Flatbush | undefined
  /** edge of each box of the index; an edge near the antimeridian has two */
  readonly edgeOfBox: Uint32Array
  /** line of each edge */
  readonly lineOfEdge: Uint32Array
  /** start of each edge and the way to its end, degrees */
  readonly lons: Float64Array
  readonly lats: Float64Array
  readonly lonSteps: Float64Array
  readonly latSteps: Float64Array
  /** distance of the start of each edge from the first vertex of its line, m */
  readonly along: Float64Array
  /** of each edge, m */
  readonly edgeLengths: Float64Array
  /** of each line, m, measured as by `axisOf` */
  readonly lengths: Float64Array
  /** of each line, m */
  readonly reaches: Float64Array
}

interface Edge {
  readonly line: number
  readonly lon: number
  readonly lat: number
  readonly lonStep: number
  readonly latStep: number
  readonly along: number
  readonly length: number
}

function edgesOf({ line }: NetworkLine, number: number): Edge[] {
  if (!line.every(([lon, lat]) => Number.isFinite(lon) && Math.abs(lat) <= MAX_LATITUDE)) {
    throw new RangeError(
      `Line ${number} has a position that is not within ${MAX_LATITUDE} degrees of the equator`,
    )
  }
  const edges: Edge[] = []
  let before: LonLat | undefined
  let along = 0
  for (const position of densify(line)) {
    const length = before ? edgeLength(before, position) : 0
    // squared, since that is what shares are divided by
    if (before && length * length > 0) {
      const [lon, lat] = before
      const lonStep = longitudeDifference(lon, position[0])
      edges.push({ line: number, lon, lat, lonStep, latStep: position[1] - lat, along, length })
      along += length
    }
    before = position
  }
  return edges
}

type Box = readonly [west: number, south: number, east: number, north: number, edge: number]

/** Boxes of degrees that hold every position from which the edge is within reach; a second one across the antimeridian. */
function boxesOf({ lon, lat, lonStep, latStep }: Edge, reach: number, edge: number): Box[] {
  const highest = Math.max(Math.abs(lat), Math.abs(lat + latStep))
  const marginLat = reach / LEAST_METRES_PER_LAT
  // a degree of longitude is shortest at the far end of the box
  const marginLon = Math.min(180, reach / planeAt([0, Math.min(highest + marginLat, 89)]).metresPerLon)
  const west = Math.min(lon, lon + lonStep) - marginLon
  const east = Math.max(lon, lon + lonStep) + marginLon
  const south = Math.min(lat, lat + latStep) - marginLat
  const north = Math.max(lat, lat + latStep) + marginLat
  const boxes: Box[] = [[west, south, east, north, edge]]
  if (west < -180) boxes.push([west + 360, south, east + 360, north, edge])
  if (east > 180) boxes.push([west - 360, south, east - 360, north, edge])
  return boxes
}

/**
 * Builds the index over the edges of many lines.
 *
 * @param lines  n ≥ 0; known later by their place in this list
 * @throws RangeError for a position that is not finite or beyond 85 degrees north or south
 */
export function networkOf(lines: readonly NetworkLine[]): Network {
  const edges = lines.flatMap(edgesOf)
  const boxes = edges.flatMap((edge, i) => boxesOf(edge, lines[edge.line]?.reach ?? 0, i))
  const index = boxes.length > 0 ? new Flatbush(boxes.length) : undefined
  for (const [west, south, east, north] of boxes) index?.add(west, south, east, north)
  index?.finish()
  const lengths = new Float64Array(lines.length)
  for (const { line, along, length } of edges) lengths[line] = along + length
  return {
    index,
    edgeOfBox: Uint32Array.from(boxes, (box) => box[4]),
    lineOfEdge: Uint32Array.from(edges, ({ line }) => line),
    lons: Float64Array.from(edges, ({ lon }) => wrapLongitude(lon)),
    lats: Float64Array.from(edges, ({ lat }) => lat),
    lonSteps: Float64Array.from(edges, ({ lonStep }) => lonStep),
    latSteps: Float64Array.from(edges, ({ latStep }) => latStep),
    along: Float64Array.from(edges, ({ along }) => along),
    edgeLengths: Float64Array.from(edges, ({ length }) => length),
    lengths,
    reaches: Float64Array.from(lines, ({ reach }) => reach),
  }
}
