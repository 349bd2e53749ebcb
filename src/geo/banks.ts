import { placeBanks, type SideName } from './bank-sides.ts'
import { bankDistancesAt, type BankDistance, type Reach } from './bank-station.ts'
import type { Axis } from './chainage.ts'
import { hasFault, type GeometryFinding } from './finding.ts'
import { checkLine, type Geometry } from './line.ts'

/** Default spacing of stations, reach and sector: own choices. */
const SPACING = 100
const REACH = 10_000
const SECTOR = 75

/** Distances this much larger at the next station, share and m, are worth a remark. */
const WIDENING_RATIO = 2
const WIDENING = 20

/** Distances at a place of the sailing line. */
export interface BankStation {
  /** m from the start of the sailing line */
  readonly along: number
  /** looking along the vertices; null where no line is given */
  readonly left: BankDistance | null
  readonly right: BankDistance | null
  /** left and right together, m; null unless both are there */
  readonly width: number | null
  /** `nearest` when either distance is */
  readonly source: 'normal' | 'nearest'
}

export interface BankOptions extends Partial<Reach> {
  /** most that two stations are apart, m, > 0 */
  readonly spacing?: number
  /** further places to measure at, m along the line, in any order */
  readonly at?: readonly number[]
}

export interface MeasuredBanks {
  /** n stations, `along` rising from 0 to the length; empty with a fault or without lines */
  readonly stations: readonly BankStation[]
  readonly findings: readonly GeometryFinding[]
}

/** Stations are not closer than this share of the spacing, so that a finely drawn line does not have one a metre. */
const LEAST_SPACING_SHARE = 1 / 20
/** Share of the spacing by which rounding may exceed it. */
const PIECE_SLACK = 1e-6
/** Asked-for places closer than this, m, are one station. */
const SAME_STATION = 0.01

/** Each vertex that is not too close to the station before, the further places, and what the spacing asks for. */
function placesOf(axis: Axis, spacing: number, at: readonly number[]): number[] {
  const asked = [0, ...at.filter((along) => along > 0 && along < axis.length), axis.length]
  const all = [
    ...asked.map((along) => ({ along, isAsked: true })),
    ...axis.vertices.map((along) => ({ along, isAsked: false })),
  ].sort((a, b) => a.along - b.along || Number(b.isAsked) - Number(a.isAsked))
  const places: number[] = []
  for (const { along, isAsked } of all) {
    const before = places.at(-1)
    const gap = before === undefined ? Infinity : along - before
    if (gap < (isAsked ? SAME_STATION : LEAST_SPACING_SHARE * spacing)) continue
    const pieces = before === undefined ? 1 : Math.ceil(gap / spacing - PIECE_SLACK)
    for (let piece = 1; piece < pieces; piece++) places.push((before ?? 0) + (piece * gap) / pieces)
    places.push(along)
  }
  return places
}

function toStation(along: number, left: BankDistance | null, right: BankDistance | null): BankStation {
  const isNormal = left?.source !== 'nearest' && right?.source !== 'nearest'
  return {
    along,
    left,
    right,
    width: left && right ? left.distance + right.distance : null,
    source: isNormal ? 'normal' : 'nearest',
  }
}

const REASONS = {
  opening: {
    code: 'bank-opens',
    what: 'the normal of the sailing line runs into an opening of the',
    facts: 'openings',
  },
  missed: { code: 'bank-missed', what: 'the normal of the sailing line does not meet the', facts: 'misses' },
} as const

/** Stations at which the nearest point of a bank had to stand in. */
function nearestFindings(
  stations: readonly BankStation[],
  side: SideName,
  pointer: string,
): GeometryFinding[] {
  return (['opening', 'missed'] as const).flatMap((reason): GeometryFinding[] => {
    const found = stations.filter((station) => station[side]?.found === reason)
    const [first] = found
    if (!first) return []
    const { code, what, facts } = REASONS[reason]
    const where =
      found.length === 1
        ? `at ${first.along.toFixed(0)} m`
        : `at ${found.length} stations, first at ${first.along.toFixed(0)} m`
    return [
      {
        level: 'remark',
        code,
        pointer,
        detail: `${where[0]?.toUpperCase() ?? ''}${where.slice(1)} along it ${what} ${side} bank: the distance to the nearest point of the bank was taken`,
        facts: { [facts]: found.length, first_along_m: first.along },
      },
    ]
  })
}

/** Sudden steps from one station to the next. */
function wideningFindings(
  stations: readonly BankStation[],
  side: SideName,
  pointer: string,
): GeometryFinding[] {
  const steps = stations.flatMap((station, i) => {
    const [a, b] = [stations[i - 1]?.[side], station[side]]
    if (!a || !b) return []
    const [less, more] = [Math.min(a.distance, b.distance), Math.max(a.distance, b.distance)]
    return more > WIDENING_RATIO * less && more - less > WIDENING
      ? [{ along: station.along, less, more }]
      : []
  })
  const [first] = steps
  if (!first) return []
  const { along, less, more } = first
  return [
    {
      level: 'remark',
      code: 'bank-widens',
      pointer,
      detail: `The distance to the ${side} bank steps between ${less.toFixed(0)} m and ${more.toFixed(0)} m at ${along.toFixed(0)} m along the sailing line: a basin or a mouth? It was taken as drawn`,
      facts: { steps: steps.length, first_along_m: along, less_m: less, more_m: more },
    },
  ]
}

/**
 * Distances from the sailing line to its banks, across it.
 *
 * At each vertex (unless within a twentieth of the spacing of another) and at most every `spacing` the normal of the smoothed line is intersected with the bank of that
 * side, and the first crossing counts. The nearest point of the bank within a sector around the normal stands in
 * where the crossing is missing or more than one and a half times as far (the far limb of a bend, a harbour mouth).
 *
 * @param lines  GeoJSON geometries as received, in either vertex order; left and right looking along the sailing line
 * @error below 0.2 m for widths up to 500 m, bends from 1.5 widths and latitudes up to 70 degrees (against banks made
 *   by geodesics; the smoothing where a bend turns over is the most of it), beside the chords of coarsely drawn lines:
 *   c² / (8R) for vertices c apart on a bend of radius R
 * @returns faults: those of `checkLine`, `bank-crosses-line`, `bank-out-of-reach`, `banks-on-one-side`,
 *   `bank-on-wrong-side`; remarks: `banks-swapped`, `bank-too-short`, `bank-opens`, `bank-missed`, `bank-widens`
 */
export function measureBanks(
  axis: Axis,
  lines: Readonly<Partial<Record<SideName, Geometry>>>,
  options: BankOptions = {},
): MeasuredBanks {
  const { spacing = SPACING, reach = REACH, sector = SECTOR, at = [] } = options
  const checked = (['left', 'right'] as const).flatMap((side) => {
    const geometry = lines[side]
    if (!geometry) return []
    const { line, findings } = checkLine(geometry, { name: `${side} bank`, mayCross: true })
    const placed = findings.map((finding) => ({ ...finding, pointer: `/${side}/line${finding.pointer}` }))
    return [{ side, line, findings: placed }]
  })
  const ofLines = checked.flatMap(({ findings }) => findings)
  if (checked.length === 0 || hasFault(ofLines)) return { stations: [], findings: ofLines }
  const usable = Object.fromEntries(checked.flatMap(({ side, line }) => (line ? [[side, line]] : [])))
  const { banks, names, findings } = placeBanks(axis, usable, reach)
  if (hasFault(findings)) return { stations: [], findings: [...ofLines, ...findings] }
  const stations = placesOf(axis, spacing, at).map((along) =>
    toStation(along, ...bankDistancesAt(axis, banks, along, { reach, sector })),
  )
  const ofStations = (['left', 'right'] as const).flatMap((side) => [
    ...nearestFindings(stations, side, `/${names[side]}/line`),
    ...wideningFindings(stations, side, `/${names[side]}/line`),
  ])
  return { stations, findings: [...ofLines, ...findings, ...ofStations] }
}
