import type { FaultItem } from '../domain/fault.ts'
import { impossible } from '../domain/fault.ts'
import type { LonLat } from '../domain/position.ts'
import type { Segment } from '../domain/segment.ts'
import { measureBanks } from '../geo/banks.ts'
import { axisOf } from '../geo/chainage.ts'
import { chainageScale } from '../geo/chainage-scale.ts'
import type { GeometryFinding } from '../geo/finding.ts'
import { stationsOf, type GivenStation } from '../geo/stations-of.ts'
import { toShape } from './section-shape.ts'
import type { RegistrySegmentWire } from './segment.schema.ts'
import { assembled, stoneItems, toSegment, type Identity } from './to-segment.ts'

/** A registry segment as it is computed with, and what was noticed about its geometry. */
export interface Placed {
  readonly segment: Segment
  readonly findings: readonly GeometryFinding[]
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
    ...(station.cross_section && { shape: toShape(station.cross_section) }),
  }
}

function itemOf({ pointer, detail, facts }: GeometryFinding, at: string): FaultItem {
  return { pointer: `${at}${pointer}`, code: 'clash', detail, ...(facts && { facts }) }
}

/** Stations along the line, with the distances that its bank lines give. */
function placedByLines(wire: RegistrySegmentWire, line: readonly LonLat[], identity?: Identity): Placed {
  const { banks } = wire
  if (!banks?.left.line || !banks.right.line) throw new RangeError('Both banks have a line')
  const axis = axisOf(line)
  const scale = chainageScale(axis.length, wire.chainage_from_m, wire.chainage_to_m)
  const given = (wire.stations ?? []).map(toGiven)
  const at = given.map(({ chainage }) => scale.distanceAt(chainage))
  const measured = measureBanks(axis, { left: banks.left.line, right: banks.right.line }, { at })
  const faults = measured.findings.filter(({ level }) => level === 'fault')
  if (faults.length > 0) throw impossible(faults.map((finding) => itemOf(finding, '#/segment/banks')))
  const merged = stationsOf({
    given,
    single: { ...(wire.depth_m !== undefined && { depth: wire.depth_m }) },
    banks: measured.stations,
    shape: toShape(wire.cross_section),
    scale,
    length: axis.length,
  })
  const wrong = [
    ...[...scale.findings, ...merged.findings]
      .filter(({ level }) => level === 'fault')
      .map((finding) => itemOf(finding, '#/segment')),
    ...stoneItems(wire),
  ]
  if (wrong.length > 0) throw impossible(wrong)
  return {
    segment: assembled(wire, merged.stations, identity),
    findings: [...scale.findings, ...measured.findings, ...merged.findings],
  }
}

/**
 * The segment of a registry feature: from bank lines where it has them, else as described.
 *
 * @throws Fault `impossible-input` with every pair of figures that clash
 */
export function toRegistrySegment(
  wire: RegistrySegmentWire,
  line: readonly LonLat[],
  identity?: Identity,
): Placed {
  const hasLines = wire.banks?.left.line !== undefined && wire.banks.right.line !== undefined
  if (hasLines) return placedByLines(wire, line, identity)
  return { segment: toSegment(wire, identity), findings: [] }
}
