import type { Conditions, Options } from '../domain/conditions.ts'
import type { Segment, Station } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import { atDraught } from '../domain/vessel-of.ts'

/** Everything a decision rests on. */
export interface Inputs {
  readonly segment: Segment
  readonly vessel: Vessel
  readonly conditions: Conditions
  readonly options: Options
}

export const UNCERTAIN_FIELDS = [
  'depth_m',
  'width_m',
  'bank_distance_m',
  'draught_m',
  'current_mps',
  'wave_height',
] as const
export type UncertainField = (typeof UNCERTAIN_FIELDS)[number]

function mapStations(segment: Segment, change: (station: Station) => Station): Segment {
  const [first, ...rest] = segment.stations
  return { ...segment, stations: [change(first), ...rest.map(change)] }
}

/** Station with its bed moved down by `shift`, m; a profile moves as a whole. */
function deepened(station: Station, shift: number): Station {
  const { shape } = station
  return {
    ...station,
    depth: station.depth + shift,
    shape:
      shape.kind === 'profile'
        ? { ...shape, bedDepths: shape.bedDepths.map((depth) => depth + shift) }
        : shape,
  }
}

/** Station widened by `shift`, m, each waterline receding by half; a profile is stretched in proportion. */
function widened(station: Station, shift: number): Station {
  const { shape, width, distances } = station
  const stretch = (width + shift) / width
  return {
    ...station,
    width: width + shift,
    distances: [distances[0] + shift / 2, distances[1] + shift / 2],
    shape:
      shape.kind === 'profile'
        ? { ...shape, offsets: shape.offsets.map((offset) => offset * stretch) }
        : shape,
  }
}

/** Station with the sailing line moved away from the nearer bank by `shift`, m, at the same width. */
function moved(station: Station, shift: number): Station {
  const { shape, distances } = station
  const isFirstNearer = distances[0] <= distances[1]
  const sign = isFirstNearer ? 1 : -1
  return {
    ...station,
    distances: [distances[0] + sign * shift, distances[1] - sign * shift],
    shape:
      shape.kind === 'profile'
        ? { ...shape, offsets: shape.offsets.map((offset) => offset - sign * shift) }
        : shape,
  }
}

/** Vessel at a draught that is tried: it counts as given, so that no permitted draught caps it. */
function withDraught(vessel: Vessel, draught: number): Vessel {
  const { basis } = vessel
  return { ...atDraught(vessel, draught), basis: { ...basis, draught: 'given' } }
}

/** Draught that a decision uses, m: an assumed one is capped by the permitted draught of the segment. */
function draughtUsed({ segment, vessel }: Inputs): number {
  const cap = vessel.basis.draught === 'given' ? Infinity : (segment.maxDraught ?? Infinity)
  return Math.min(vessel.draught, cap)
}

/**
 * The same inputs with one of them shifted: lengths in m, current in m/s, `wave_height` as the natural logarithm of a
 * factor on the computed height.
 */
export function shifted(inputs: Inputs, field: UncertainField, shift: number): Inputs {
  const { segment, vessel, conditions, options } = inputs
  switch (field) {
    case 'depth_m':
      return { ...inputs, segment: mapStations(segment, (station) => deepened(station, shift)) }
    case 'width_m':
      return { ...inputs, segment: mapStations(segment, (station) => widened(station, shift)) }
    case 'bank_distance_m':
      return { ...inputs, segment: mapStations(segment, (station) => moved(station, shift)) }
    case 'draught_m':
      return { ...inputs, vessel: withDraught(vessel, baseValue(inputs, field) + shift) }
    case 'current_mps':
      return { ...inputs, conditions: { ...conditions, current: conditions.current + shift } }
    case 'wave_height':
      return { ...inputs, options: { ...options, waveScale: (options.waveScale ?? 1) * Math.exp(shift) } }
  }
}

/** Base value of an uncertain input at the nearest station to rest on; a factor of 1 for wave height. */
export function baseValue(inputs: Inputs, field: UncertainField): number {
  const [station] = inputs.segment.stations
  switch (field) {
    case 'depth_m':
      return station.depth
    case 'width_m':
      return station.width
    case 'bank_distance_m':
      return Math.min(...station.distances)
    case 'draught_m':
      return draughtUsed(inputs)
    case 'current_mps':
      return inputs.conditions.current
    case 'wave_height':
      return 1
  }
}
