import type { SectionShape, Station } from '../domain/segment.ts'
import { rowsBetween } from './between.ts'
import type { GeometryFinding } from './finding.ts'
import {
  figuresAlong,
  isBesideProfile,
  placedStations,
  SAME_STATION,
  shapeBetween,
  type Figures,
  type Placed,
  type StationSources,
} from './station-figures.ts'
import { thinned, type Tolerances } from './thin.ts'
import { widthFindings } from './widths.ts'

export interface MergedStations {
  /** n ≥ 1 in the order of the sailing line */
  readonly stations: readonly [Station, ...Station[]]
  readonly findings: readonly GeometryFinding[]
}

/** Of depth and of a distance to a bank, m: a tenth of what a survey resolves (own choice). */
const DEPTH_TOLERANCE = 0.01
const DISTANCE_TOLERANCE = 0.1
const TOLERANCES: Tolerances = [DEPTH_TOLERANCE, DISTANCE_TOLERANCE, DISTANCE_TOLERANCE]

/** Slack of the ends of a segment for stations, m. */
const END_SLACK = 1

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

/** A place of the line with what is known there. */
interface Candidate {
  readonly along: number
  readonly figures: Figures
  readonly shape: SectionShape
  /** whether it is kept even where it says nothing new */
  readonly isNeeded: boolean
  readonly isBetween?: boolean
}

/** Rising, and none so near to the one before that it is the same station. */
const distinct = (places: readonly number[]): number[] =>
  places
    .toSorted((a, b) => a - b)
    .filter((along, i, sorted) => i === 0 || along - (sorted[i - 1] ?? 0) > SAME_STATION)

/** Whether the segment is one section all along. */
const isUniform = ({ banks, given }: StationSources): boolean => banks.length === 0 && given.length === 0

/** Places of stations, m along the line, rising: those of the banks, of the given stations, and the wanted ones. */
function placesOf(sources: StationSources, placed: readonly Placed[], inside: readonly Placed[]): number[] {
  if (isUniform(sources)) return [0]
  const known = [...sources.banks.map(({ along }) => along), ...inside.map(({ along }) => along)]
  // figures run on to a station outside, so that the ends have their own
  const ends = inside.length < placed.length || known.length === 0 ? [0, sources.length] : []
  const wanted = (sources.wanted ?? []).filter((along) => !isBesideProfile(placed, along))
  return distinct([...known, ...ends, ...wanted])
}

function candidateAt(
  sources: StationSources,
  placed: readonly Placed[],
  figuresAt: (along: number) => Figures,
  along: number,
): Candidate {
  const at = placed.find((station) => Math.abs(station.along - along) <= SAME_STATION)
  const isWanted = sources.wanted?.some((place) => Math.abs(place - along) <= SAME_STATION) === true
  return {
    along,
    // a surveyed profile is the whole section: its own waterlines count, not those of the bank lines
    figures: at?.shape?.kind === 'profile' ? [at.depth, ...at.distances] : figuresAt(along),
    shape: at ? (at.shape ?? sources.shape) : shapeBetween(sources, placed, along),
    isNeeded: isWanted || at?.shape !== undefined,
  }
}

/** Candidates with those put between them where figures change much; none beside a surveyed profile. */
function withBetween(
  sources: StationSources,
  placed: readonly Placed[],
  candidates: readonly Candidate[],
): Candidate[] {
  const pairs = candidates.slice(1).flatMap((b, i) => {
    const a = candidates[i]
    return a && a.shape.kind !== 'profile' && b.shape.kind !== 'profile' ? [[a, b] as const] : []
  })
  const made = rowsBetween(pairs).map(({ along, figures }): Candidate => {
    const shape = shapeBetween(sources, placed, along)
    const bottomWidth = shape.kind === 'trapezoid' ? shape.bottomWidth : undefined
    const width = figures[1] + figures[2]
    return {
      along,
      figures,
      // a bottom that is the segment's may be wider than the water where stations have their own
      shape:
        bottomWidth !== undefined && bottomWidth > width ? { kind: 'trapezoid', bottomWidth: width } : shape,
      isNeeded: false,
      isBetween: true,
    }
  })
  return [...candidates, ...made].sort((a, b) => a.along - b.along)
}

function toStation(candidate: Candidate, index: number, chainage: number | undefined): Station {
  const [depth, first, second] = candidate.figures
  return {
    index,
    ...(chainage !== undefined && { chainage }),
    ...(candidate.isBetween && { isBetween: true }),
    depth,
    width: first + second,
    distances: [first, second],
    shape: candidate.shape,
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
 * its own cross-section is kept as it is; between two trapezoids described alike their measure is interpolated.
 * Where figures change much, stations are put between: see `rowsBetween`.
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
  const figuresAt = figuresAlong(sources, placed)
  const candidates = placesOf(sources, placed, inside).map((along) =>
    candidateAt(sources, placed, figuresAt, along),
  )
  const indices = new Set(
    thinned(
      candidates,
      sources.tolerances ?? TOLERANCES,
      candidates.map(({ isNeeded }) => isNeeded),
    ),
  )
  const kept = candidates.filter((_, i) => indices.has(i))
  const stations = withBetween(sources, placed, kept).map((candidate, index) =>
    toStation(candidate, index, isUniform(sources) ? undefined : sources.scale.chainageAt(candidate.along)),
  )
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
