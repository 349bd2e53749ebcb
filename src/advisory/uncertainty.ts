import type { Conditions, Options } from '../domain/conditions.ts'
import type { Segment } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'

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

/** Draught that a decision uses, m: an assumed one is capped by the permitted draught of the segment. */
export function draughtUsed({ segment, vessel }: Inputs): number {
  const cap = vessel.basis.draught === 'given' ? Infinity : (segment.maxDraught ?? Infinity)
  return Math.min(vessel.draught, cap)
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
