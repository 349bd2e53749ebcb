import { profileExtent } from '../advisory/section-of.ts'
import type { FaultItem } from '../domain/fault.ts'
import type { Station } from '../domain/segment.ts'
import { isProfile, toShape, type SectionWire } from './section-shape.ts'
import type { AnySegmentWire } from './to-segment.ts'

/** Slack of figures that must add up: half a metre or a hundredth. */
const WIDTH_SLACK = 0.5
const WIDTH_SLACK_SHARE = 0.01
/** Slack of a depth given beside a profile, m. */
const DEPTH_SLACK = 0.05

type Extent = Pick<Station, 'depth' | 'width' | 'distances'>

/** Figures of one place as they are given, m: what is missing follows from the rest. */
interface Place {
  readonly chainage?: number | undefined
  readonly depth?: number | undefined
  readonly width?: number | undefined
  readonly nearer?: number | undefined
  readonly left?: number | undefined
  readonly right?: number | undefined
  readonly section: SectionWire
  readonly pointer: string
}

type Facts = NonNullable<FaultItem['facts']>

function clash(place: Place, field: string, detail: string, facts: Facts): FaultItem {
  return { pointer: `${place.pointer}/${field}`, code: 'clash', detail, facts }
}

/** Distances by side: as given, or the rest of the width. */
function extentOfSides(place: Place, items: FaultItem[]): Extent {
  const width = place.width ?? (place.left ?? 0) + (place.right ?? 0)
  const left = place.left ?? width - (place.right ?? 0)
  const right = place.right ?? width - left
  const slack = Math.max(WIDTH_SLACK, WIDTH_SLACK_SHARE * width)
  if (left <= 0 || right <= 0 || Math.abs(left + right - width) > slack) {
    items.push(
      clash(place, 'width_m', 'The distances to the banks do not add up to the width', {
        width_m: width,
        left_distance_m: left,
        right_distance_m: right,
      }),
    )
  }
  return { depth: place.depth ?? NaN, width: left + right, distances: [left, right] }
}

/** Distances by the nearer bank and the width. */
function extentOfNearer(place: Place, items: FaultItem[]): Extent {
  const { depth = NaN, width = NaN, nearer = NaN } = place
  if (nearer > width / 2) {
    items.push(
      clash(place, 'bank_distance_m', 'The nearer bank is farther than half the width', {
        bank_distance_m: nearer,
        half_width_m: width / 2,
      }),
    )
  }
  return { depth, width, distances: [nearer, width - nearer] }
}

/** The extent of a surveyed profile at the datum, held against what is given beside it. */
function extentOfProfile(place: Place, items: FaultItem[]): Extent {
  const shape = toShape(place.section)
  if (shape.kind !== 'profile') throw new RangeError('A profile was looked for before')
  const extent = profileExtent(shape.offsets, shape.bedDepths)
  if (!(extent.depth > 0)) {
    items.push(
      clash(place, 'cross_section/profile', 'The sailing line, offset 0, is dry at the datum', {
        profile_depth_m: extent.depth,
      }),
    )
    return extent
  }
  const given: readonly (readonly [string, number | undefined, number, number])[] = [
    ['depth_m', place.depth, extent.depth, DEPTH_SLACK],
    ['width_m', place.width, extent.width, WIDTH_SLACK],
    ['bank_distance_m', place.nearer, Math.min(...extent.distances), WIDTH_SLACK],
    ['banks/left/distance_m', place.left, extent.distances[0], WIDTH_SLACK],
    ['banks/right/distance_m', place.right, extent.distances[1], WIDTH_SLACK],
  ]
  for (const [field, value, found, slack] of given) {
    if (value === undefined || Math.abs(value - found) <= slack) continue
    items.push(
      clash(place, field, 'The figure differs from that of the profile at the datum', {
        given_m: value,
        profile_m: found,
      }),
    )
  }
  return extent
}

function extentOf(place: Place, items: FaultItem[]): Extent {
  if (isProfile(place.section)) return extentOfProfile(place, items)
  const hasSides = place.left !== undefined || place.right !== undefined
  const extent = hasSides ? extentOfSides(place, items) : extentOfNearer(place, items)
  const { section } = place
  if (section && 'bottom_width_m' in section && section.bottom_width_m > extent.width) {
    items.push(
      clash(place, 'cross_section/bottom_width_m', 'The bottom is wider than the water surface', {
        bottom_width_m: section.bottom_width_m,
        width_m: extent.width,
      }),
    )
  }
  return extent
}

/** Places of a segment: its stations, or the one that its own figures describe. */
function placesOf(wire: AnySegmentWire): Place[] {
  if (wire.stations) {
    return wire.stations.map((station, i) => ({
      chainage: station.chainage_m,
      depth: wire.depth_m ?? station.depth_m,
      width: wire.width_m ?? station.width_m,
      nearer: wire.bank_distance_m ?? station.bank_distance_m,
      left: station.left_distance_m,
      right: station.right_distance_m,
      section: station.cross_section ?? wire.cross_section,
      pointer: `#/segment/stations/${i}`,
    }))
  }
  return [
    {
      depth: wire.depth_m,
      width: wire.width_m,
      nearer: wire.bank_distance_m,
      left: wire.banks?.left.distance_m,
      right: wire.banks?.right.distance_m,
      section: wire.cross_section,
      pointer: '#/segment',
    },
  ]
}

/** The stations of a segment, and every pair of figures that clash in them. */
export function toStations(wire: AnySegmentWire): {
  readonly stations: readonly Station[]
  readonly items: readonly FaultItem[]
} {
  const items: FaultItem[] = []
  const stations = placesOf(wire).map((place, index) => ({
    index,
    ...(place.chainage !== undefined && { chainage: place.chainage }),
    ...extentOf(place, items),
    shape: toShape(place.section),
  }))
  return { stations, items }
}
