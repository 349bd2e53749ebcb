import type { LonLat } from '../domain/position.ts'
import type { GeometryFaultCode, GeometryFinding } from './finding.ts'
import { edgeLength, longitudeDifference, wrapLongitude } from './plane.ts'

/** Beyond it the local plane is not used, and no waterway is. Degrees. */
const HIGHEST_LATITUDE = 85

/** A line this far from its company, m, ... */
const FAR = 500_000
/** ... and with swapped axes this much nearer is doubtful. */
const NEARER_SHARE = 0.1

type Fault = readonly [code: GeometryFaultCode, sentence: string]

function isNumbers(position: unknown): position is readonly number[] {
  return Array.isArray(position) && position.every((part) => typeof part === 'number')
}

/** What is wrong with one position, or null. */
function faultOf(position: unknown, name: string): Fault | null {
  if (!isNumbers(position) || position.length < 2) {
    return ['not-a-position', `is not a position: a list of longitude and latitude in degrees is needed`]
  }
  const [x = NaN, y = NaN] = position
  const shown = `[${x}, ${y}]`
  if (!Number.isFinite(x) || !Number.isFinite(y))
    return ['not-finite', `is ${shown}: both figures must be finite`]
  const [width, height] = [Math.abs(x), Math.abs(y)]
  if (width > 360 || height > 180 || (width > 180 && height > 90)) {
    return [
      'looks-projected',
      `is ${shown}, which looks projected: give longitude and latitude in degrees on WGS 84, not metres of a national or UTM grid`,
    ]
  }
  if (height > 90) {
    return [
      'axes-swapped',
      `is ${shown}, which looks like latitude before longitude: GeoJSON puts the longitude first`,
    ]
  }
  if (width > 180) {
    return [
      'longitude-beyond-180',
      `is ${shown}: write the longitude as ${Number(wrapLongitude(x).toFixed(9))}. The ${name} may cross the antimeridian; each edge is taken the shorter way`,
    ]
  }
  if (height > HIGHEST_LATITUDE) {
    return [
      'latitude-beyond-85',
      `is ${shown}: latitudes beyond ${HIGHEST_LATITUDE} degrees are not supported. Is it latitude before longitude?`,
    ]
  }
  return null
}

/**
 * What is wrong with the positions of a line: each kind of fault once, where it occurs first; heights as a remark.
 *
 * @param coordinates  n ≥ 0 of whatever was received
 */
export function positionFindings(coordinates: readonly unknown[], name: string): GeometryFinding[] {
  const first = new Map<GeometryFaultCode, { index: number; sentence: string; count: number }>()
  let heights = 0
  coordinates.forEach((position, index) => {
    const fault = faultOf(position, name)
    if (Array.isArray(position) && position.length > 2) heights++
    if (!fault) return
    const found = first.get(fault[0])
    if (found) found.count++
    else first.set(fault[0], { index, sentence: fault[1], count: 1 })
  })
  const faults = [...first].map(([code, { index, sentence, count }]): GeometryFinding => {
    const more = count > 1 ? ` (and ${count - 1} more)` : ''
    return {
      level: 'fault',
      code,
      kind: code === 'not-a-position' ? 'wrong-type' : 'out-of-range',
      pointer: `/coordinates/${index}`,
      detail: `Position ${index} of the ${name} ${sentence}${more}`,
      facts: { positions: count },
    }
  })
  if (heights === 0) return faults
  const detail = `${heights} positions of the ${name} have a height or more, which is left out`
  const remark = { level: 'remark', code: 'height-dropped', pointer: '/coordinates', detail } as const
  return [...faults, { ...remark, facts: { positions: heights } }]
}

/** Distance on the plane, m: rough, and good enough to tell another part of the world. */
function isMuchNearer(swapped: LonLat, given: LonLat, near: LonLat): boolean {
  const distance = edgeLength(given, near)
  return distance > FAR && edgeLength(swapped, near) < NEARER_SHARE * distance
}

/** A remark when the line would lie with the other features if its axes were swapped. */
export function axesHint(line: readonly LonLat[], near: LonLat, name: string): GeometryFinding[] {
  const [first] = line
  if (!first || Math.abs(first[0]) > 90) return []
  const swapped: LonLat = [first[1], first[0]]
  if (!isMuchNearer(swapped, first, near)) return []
  return [
    {
      level: 'remark',
      code: 'axes-doubtful',
      pointer: '/coordinates',
      detail: `The ${name} lies ${Math.round(edgeLength(first, near) / 1000)} km from the other features, and would lie with them if latitude and longitude were swapped: GeoJSON puts the longitude first`,
    },
  ]
}

function median(values: readonly number[]): number {
  return values.toSorted((a, b) => a - b)[values.length >> 1] ?? NaN
}

/**
 * Where most of many lines lie: the median of their first positions, which a few swapped ones do not move.
 *
 * @param lines  n ≥ 0 lines
 * @returns null for n < 3: two lines do not tell which of them is out of place
 */
export function typicalPosition(lines: readonly (readonly LonLat[])[]): LonLat | null {
  const firsts = lines.flatMap(([first]) => (first ? [first] : []))
  const [origin] = firsts
  if (!origin || firsts.length < 3) return null
  const lon = origin[0] + median(firsts.map((position) => longitudeDifference(origin[0], position[0])))
  return [wrapLongitude(lon), median(firsts.map(([, lat]) => lat))]
}
