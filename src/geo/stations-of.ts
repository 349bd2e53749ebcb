import type { SectionShape, Station } from '../domain/segment.ts'
import type { BankStation } from './banks.ts'
import type { ChainageScale } from './chainage-scale.ts'
import type { GeometryFinding } from './finding.ts'
import { interpolate, type Sample } from './interpolate.ts'
import { thinned, type Tolerances } from './thin.ts'
import { widthFindings } from './widths.ts'

/** A station as it is given, its figures complete: m at the datum. */
export interface GivenStation {
  /** m along the waterway */
  readonly chainage: number
  readonly depth: number
  /** to the waterlines, in the order of the segment's banks */
  readonly distances: readonly [number, number]
  /** its own cross-section, if it has one */
  readonly shape?: SectionShape
}

/** Figures that hold all along a segment, m; each takes the place of those of the stations. */
export interface SingleFigures {
  readonly depth?: number
  readonly distances?: readonly [number, number]
}

export interface StationSources {
  /** n ≥ 0, in any order of chainage */
  readonly given: readonly GivenStation[]
  readonly single: SingleFigures
  /** n ≥ 0, along rising */
  readonly banks: readonly BankStation[]
  /** of stations without their own */
  readonly shape: SectionShape
  readonly scale: Pick<ChainageScale, 'chainageAt' | 'distanceAt'>
  /** of the sailing line, m */
  readonly length: number
  /** what may be lost by leaving a station out, m; default 0.01 in depth and 0.1 in each distance */
  readonly tolerances?: Tolerances
}

export interface MergedStations {
  /** n ≥ 1 in the order of the sailing line */
  readonly stations: readonly [Station, ...Station[]]
  readonly findings: readonly GeometryFinding[]
}

/** Of depth and of a distance to a bank, m: a tenth of what a survey resolves (own choice). */
const DEPTH_TOLERANCE = 0.01
const DISTANCE_TOLERANCE = 0.1
const TOLERANCES: Tolerances = [DEPTH_TOLERANCE, DISTANCE_TOLERANCE, DISTANCE_TOLERANCE]

/** Places closer than this, m, are one station. */
const SAME_STATION = 0.01
/** Slack of the ends of a segment for stations, m. */
const END_SLACK = 1

/** A given station by its place along the sailing line. */
interface Placed extends GivenStation {
  readonly along: number
}

function outsideFindings(outside: readonly Placed[], length: number): GeometryFinding[] {
  const [first] = outside
  if (!first) return []
  const which = outside.length === 1 ? 'The station' : `${outside.length} stations, the first`
  return [
    {
      level: 'remark',
      code: 'station-outside',
      pointer: '/stations',
      detail: `${which} at chainage ${first.chainage} m lies outside the segment: it only serves to interpolate up to the end`,
      facts: {
        stations: outside.length,
        first_chainage_m: first.chainage,
        along_m: first.along,
        length_m: length,
      },
    },
  ]
}

/** One station where several are given at a place: the last, as in the order of the request. */
function placedStations({ given, scale }: StationSources): Placed[] {
  const placed = given.map((station): Placed => ({ ...station, along: scale.distanceAt(station.chainage) }))
  const sorted = placed.toSorted((a, b) => a.along - b.along)
  return sorted.filter((station, i) => (sorted[i + 1]?.along ?? Infinity) - station.along > SAME_STATION)
}

/** Distances at a place: from the bank lines where there are any, else single figures, else the stations. */
function distanceSamples(sources: StationSources, placed: readonly Placed[], bank: 0 | 1): Sample[] {
  const side = bank === 0 ? 'left' : 'right'
  const ofLines = sources.banks.flatMap(({ along, ...station }) => {
    const found = station[side]
    return found ? [{ along, value: found.distance }] : []
  })
  if (ofLines.length > 0) return ofLines
  const single = sources.single.distances?.[bank]
  if (single !== undefined) return [{ along: 0, value: single }]
  return placed.map(({ along, distances }) => ({ along, value: distances[bank] }))
}

function depthSamples({ single }: StationSources, placed: readonly Placed[]): Sample[] {
  if (single.depth !== undefined) return [{ along: 0, value: single.depth }]
  return placed.map(({ along, depth }) => ({ along, value: depth }))
}

/** Places of stations, m along the line, rising: those of the banks and of the given stations within the segment. */
function placesOf(sources: StationSources, inside: readonly Placed[]): number[] {
  const all = [...sources.banks.map(({ along }) => along), ...inside.map(({ along }) => along)]
  const places = all
    .sort((a, b) => a - b)
    .filter((along, i, sorted) => i === 0 || along - (sorted[i - 1] ?? 0) > SAME_STATION)
  if (places.length > 0 || sources.given.length === 0) return places
  return [0, sources.length]
}

type Figures = readonly [depth: number, first: number, second: number]

interface Candidate {
  readonly along: number
  readonly figures: Figures
  readonly shape: SectionShape | undefined
}

function candidatesOf(
  sources: StationSources,
  placed: readonly Placed[],
  places: readonly number[],
): Candidate[] {
  const samples = [
    depthSamples(sources, placed),
    distanceSamples(sources, placed, 0),
    distanceSamples(sources, placed, 1),
  ] as const
  if (samples.some(({ length }) => length === 0)) {
    throw new RangeError('Depth and both distances need a station, a bank line or a single figure each')
  }
  return places.map((along) => {
    const at = placed.find((station) => Math.abs(station.along - along) <= SAME_STATION)
    // a surveyed profile is the whole section: its own waterlines count, not those of the bank lines
    const figures: Figures =
      at?.shape?.kind === 'profile'
        ? [at.depth, ...at.distances]
        : [interpolate(samples[0], along), interpolate(samples[1], along), interpolate(samples[2], along)]
    return { along, figures, shape: at?.shape }
  })
}

function toStation(figures: Figures, shape: SectionShape, index: number, chainage?: number): Station {
  const [depth, first, second] = figures
  return {
    index,
    ...(chainage !== undefined && { chainage }),
    depth,
    width: first + second,
    distances: [first, second],
    shape,
  }
}

function bottomFindings(stations: readonly Station[]): GeometryFinding[] {
  return stations
    .flatMap(({ shape, width, chainage = 0 }): GeometryFinding[] => {
      if (shape.kind !== 'trapezoid' || shape.bottomWidth === undefined || shape.bottomWidth <= width)
        return []
      return [
        {
          level: 'fault',
          code: 'bottom-wider-than-banks',
          kind: 'clash',
          pointer: '/cross_section/bottom_width_m',
          detail: `At chainage ${chainage.toFixed(0)} m the bottom is wider than the water between the bank lines`,
          facts: { bottom_width_m: shape.bottomWidth, width_m: width, chainage_m: chainage },
        },
      ]
    })
    .slice(0, 1)
}

/**
 * The stations of a segment from everything that is known about it.
 *
 * Depth is interpolated linearly by chainage between given stations and held beyond them. Distances come from the
 * bank lines where there are any, else from the single figures, else interpolated from the stations. A station with
 * its own cross-section is kept as it is.
 *
 * @error stations are left out where linear interpolation between those kept gives the depth within 0.01 m and each
 *   distance within 0.1 m (the width within 0.2 m); the least and the greatest depth, distances and width are kept exactly
 * @throws RangeError when depth or a distance has no source at all
 * @returns without bank lines and given stations one station without a chainage. Faults: `bottom-wider-than-banks`;
 *   remarks: `station-outside`, `widths-differ`
 */
export function stationsOf(sources: StationSources): MergedStations {
  const placed = placedStations(sources)
  const isInside = ({ along }: Placed) => along >= -END_SLACK && along <= sources.length + END_SLACK
  const inside = placed.filter(isInside)
  const places = placesOf(sources, inside)
  const isUniform = places.length === 0
  const candidates = candidatesOf(sources, placed, isUniform ? [0] : places)
  const kept = thinned(
    candidates.map(({ along, figures }) => ({ along, figures })),
    sources.tolerances ?? TOLERANCES,
    candidates.map(({ shape }) => shape !== undefined),
  )
  const stations = kept.flatMap((i, index) => {
    const candidate = candidates[i]
    if (!candidate) return []
    const { along, figures, shape } = candidate
    const chainage = isUniform ? undefined : sources.scale.chainageAt(along)
    return [toStation(figures, shape ?? sources.shape, index, chainage)]
  })
  const [first, ...rest] = stations
  if (!first) throw new RangeError('A segment without a station')
  return {
    stations: [first, ...rest],
    findings: [
      ...outsideFindings(
        placed.filter((station) => !isInside(station)),
        sources.length,
      ),
      ...widthFindings(sources, inside),
      ...bottomFindings(stations),
    ],
  }
}
