import type { FaultItem } from '../domain/fault.ts'
import { impossible } from '../domain/fault.ts'
import type { LonLat } from '../domain/position.ts'
import type { Segment, Station } from '../domain/segment.ts'
import { measureBanks, type MeasuredBanks } from '../geo/banks.ts'
import { axisOf, type Axis } from '../geo/chainage.ts'
import { chainageScale, type ChainageScale } from '../geo/chainage-scale.ts'
import type { GeometryFinding } from '../geo/finding.ts'
import type { GivenStation, SingleFigures } from '../geo/station-figures.ts'
import { stationsOf } from '../geo/stations-of.ts'
import { receptorItems, wantedPlaces } from './receptor-places.ts'
import { isProfile, toShape } from './section-shape.ts'
import type { RegistrySegmentWire } from './segment.schema.ts'
import { assembled, stoneItems, type Identity } from './to-segment.ts'
import { toStations } from './to-stations.ts'

/** A registry segment as it is computed with, and what was noticed about its geometry. */
export interface Placed {
  readonly segment: Segment
  readonly findings: readonly GeometryFinding[]
}

/** The sailing line of a segment and its length, m. */
export interface Site {
  readonly line: readonly LonLat[]
  readonly length: number
}

/** What the figures of a segment come from, and what clashes among them. */
interface Sources {
  /** the one station of a segment that a single section describes */
  readonly only?: Station
  readonly given: readonly GivenStation[]
  readonly single: SingleFigures
  readonly items: readonly FaultItem[]
}

/** A station as it is given; where bank lines count, its own distances do not. */
function toGiven(station: NonNullable<RegistrySegmentWire['stations']>[number]): GivenStation {
  const { chainage_m: chainage, depth_m: depth, width_m: width } = station
  const left = station.left_distance_m ?? station.bank_distance_m ?? width / 2
  const right = station.right_distance_m ?? width - left
  return {
    chainage,
    depth,
    distances: [left, right],
    hasSides: station.left_distance_m !== undefined,
    ...(station.cross_section && { shape: toShape(station.cross_section) }),
  }
}

function itemOf({ pointer, detail, facts }: GeometryFinding, at: string): FaultItem {
  return { pointer: `${at}${pointer}`, code: 'clash', detail, ...(facts && { facts }) }
}

const faultsAt = (findings: readonly GeometryFinding[], at: string): FaultItem[] =>
  findings.filter(({ level }) => level === 'fault').map((finding) => itemOf(finding, at))

/** With one bank line the other bank needs distances of its own side. */
function otherSideItems(wire: RegistrySegmentWire): FaultItem[] {
  const { banks, stations = [] } = wire
  if (!banks || (banks.left.line && banks.right.line)) return []
  const other = banks.left.line ? 'right' : 'left'
  const isKnown =
    banks[other].distance_m !== undefined ||
    (stations.length > 0 && stations.every(({ left_distance_m: left }) => left !== undefined))
  if (isKnown) return []
  const detail = `The ${other} bank has no line: give its distance here, or left and right distances at every station`
  return [{ pointer: `#/segment/banks/${other}/distance_m`, code: 'clash', detail }]
}

function sourcesByLines(wire: RegistrySegmentWire): Sources {
  const distances = [wire.banks?.left.distance_m, wire.banks?.right.distance_m] as const
  return {
    given: (wire.stations ?? []).map(toGiven),
    single: { distances, ...(wire.depth_m !== undefined && { depth: wire.depth_m }) },
    items: otherSideItems(wire),
  }
}

/** Figures as they are described; a segment without stations is one section, and given as single figures. */
function sourcesAsDescribed(wire: RegistrySegmentWire): Sources {
  const { stations, items } = toStations(wire)
  const [first] = stations
  if (!wire.stations && first) {
    return { only: first, given: [], single: {}, items }
  }
  const given = stations.map(({ chainage = 0, depth, distances, shape }, i) => ({
    chainage,
    depth,
    distances,
    ...((shape.kind === 'profile' || wire.stations?.[i]?.cross_section) && { shape }),
  }))
  return { given, single: {}, items }
}

const hasLine = ({ banks }: RegistrySegmentWire): boolean =>
  banks?.left.line !== undefined || banks?.right.line !== undefined

function measured(wire: RegistrySegmentWire, axis: Axis, scale: ChainageScale): MeasuredBanks {
  const { left, right } = wire.banks ?? {}
  const stations = (wire.stations ?? []).map(({ chainage_m: chainage }) => chainage)
  const at = [...stations.map(scale.distanceAt), ...wantedPlaces(wire, scale, axis.length)]
  return measureBanks(
    axis,
    { ...(left?.line && { left: left.line }), ...(right?.line && { right: right.line }) },
    { at },
  )
}

const NO_BANKS: MeasuredBanks = { stations: [], findings: [] }

/**
 * The segment of a registry feature: distances from bank lines where it has them, the rest as described.
 *
 * @throws Fault `impossible-input` with every pair of figures that clash
 */
export function toRegistrySegment(wire: RegistrySegmentWire, site: Site, identity?: Identity): Placed {
  const axis = hasLine(wire) ? axisOf(site.line) : undefined
  const length = axis?.length ?? site.length
  const scale = chainageScale(length, wire.chainage_from_m, wire.chainage_to_m)
  const banks = axis ? measured(wire, axis, scale) : NO_BANKS
  // a surveyed profile of the whole segment is its section, whatever the lines say
  const byLines = axis !== undefined && !isProfile(wire.cross_section)
  const { only, given, single, items } = byLines ? sourcesByLines(wire) : sourcesAsDescribed(wire)
  const faults = [
    ...faultsAt(scale.findings, '#/segment'),
    ...faultsAt(banks.findings, '#/segment/banks'),
    ...items,
    ...stoneItems(wire),
    ...receptorItems(wire, scale, length),
  ]
  if (faults.length > 0) throw impossible(faults)
  if (only) {
    return { segment: assembled(wire, [only], identity), findings: [...scale.findings, ...banks.findings] }
  }
  const merged = stationsOf({
    given,
    single,
    banks: byLines ? banks.stations : [],
    shape: toShape(wire.cross_section),
    scale,
    length,
    wanted: wantedPlaces(wire, scale, length),
  })
  const wrong = faultsAt(merged.findings, '#/segment')
  if (wrong.length > 0) throw impossible(wrong)
  return {
    segment: assembled(wire, merged.stations, identity),
    findings: [...scale.findings, ...banks.findings, ...merged.findings],
  }
}
