import type { LonLat } from '../../src/domain/position.ts'
import type { Station } from '../../src/domain/segment.ts'
import type { Fairway, Placement } from '../../src/passages/placement.ts'
import type { PositionReport } from '../../src/passages/position-report.ts'
import { Tracks } from '../../src/passages/tracks.ts'
import { geodesicEnd } from './geodesic.ts'
import { NO_OPTIONS, positionReport } from './passage-marks.ts'
import { canal, soil } from './places.ts'

const KNOT = 1852 / 3600

/** Metres to the east and to the south of a place: a line to the east has its right side to the south. */
export type Place = readonly [east: number, south: number]

export function positionAt([east, south]: Place): LonLat {
  const { position, azimuth } = geodesicEnd([4, 52], 90, east)
  return geodesicEnd(position, azimuth + 90, south).position
}

/** A line through places with a vertex every 500 m or less, so that it keeps within 7 mm of the geodesics. */
export function lineThrough(places: readonly Place[]): LonLat[] {
  return places.flatMap(([east, south], i) => {
    const [nextEast, nextSouth] = places[i + 1] ?? [east, south]
    const pieces = Math.max(1, Math.ceil(Math.hypot(nextEast - east, nextSouth - south) / 500))
    return Array.from({ length: pieces }, (_, k) =>
      positionAt([east + (k / pieces) * (nextEast - east), south + (k / pieces) * (nextSouth - south)]),
    )
  })
}

export interface Description {
  /** left, right, m */
  readonly distances?: readonly [number, number]
  readonly stations?: readonly [Station, ...Station[]]
  readonly hasSides?: boolean
  readonly chainages?: readonly [number, number]
}

export function fairway(id: string, places: readonly Place[], description: Description = {}): Fairway {
  const { distances = [30, 30], stations, hasSides = true, chainages } = description
  const banks = hasSides
    ? ([soil('left'), soil('right')] as const)
    : ([soil('nearer'), soil('farther')] as const)
  return {
    id,
    line: lineThrough(places),
    segment: canal({ depth: 4, distances }, { banks, ...(stations && { stations }) }),
    options: NO_OPTIONS,
    chainageFrom: chainages?.[0],
    chainageTo: chainages?.[1],
  }
}

export interface Sighting extends Partial<Omit<PositionReport, 'speed'>> {
  /** over ground, kn */
  readonly knots?: number
}

/** A vessel under way to the east at 6 kn. */
export function report(time: number, place: Place, { knots = 6, ...more }: Sighting = {}): PositionReport {
  const [lon, lat] = positionAt(place)
  return positionReport({
    line: 1,
    time: 1_700_000_000 + time,
    lon,
    lat,
    speed: knots * KNOT,
    course: 90,
    ...more,
  })
}

export const EAST = fairway('east', [
  [0, 0],
  [5000, 0],
])

export function place(
  fairways: readonly Fairway[],
  reports: readonly PositionReport[],
  maxGap = 600,
): Placement[] {
  const tracks = new Tracks(fairways, { maxGap })
  return reports.map((one) => tracks.place(one))
}

export const lastOf = (fairways: readonly Fairway[], ...reports: readonly PositionReport[]): Placement =>
  place(fairways, reports).at(-1)!

/** What became of each report, in short. */
export const told = (placements: readonly Placement[]): string[] =>
  placements.map(({ status, reason, fairway: on }) => [status, reason, on?.id].filter(Boolean).join(' '))

export const narrow = { distances: [15, 15] as const }
export const NORTH_CANAL = fairway(
  'north',
  [
    [0, 0],
    [5000, 0],
  ],
  narrow,
)
export const SOUTH_CANAL = fairway(
  'south',
  [
    [0, 60],
    [5000, 60],
  ],
  narrow,
)
export const CANALS = [NORTH_CANAL, SOUTH_CANAL]

export const BEFORE = fairway('before', [
  [0, 0],
  [1000, 0],
])
export const AFTER = fairway('after', [
  [1000, 0],
  [2000, 0],
])
