import type { UncertainField } from '../advisory/uncertainty.ts'
import type { Options } from '../domain/conditions.ts'
import type { Direction, Segment } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'

/** How an input scatters about its value: normal with a standard deviation, or uniform within half of its range. */
export interface Spread {
  readonly kind: 'standard-deviation' | 'half-range'
  /** in the unit of the input; of wave height the standard deviation of the logarithm */
  readonly size: number
}

/** What is not known exactly, and how it is sampled. */
export interface Uncertainty {
  /** n samples of each cell, 16 to 10,000 */
  readonly samples: number
  /** integer, 0 to 2³² − 1 */
  readonly seed: number
  /** whole per cents, 0 to 100, rising */
  readonly percentiles: readonly number[]
  /** inputs that scatter; wave height is with the segment, whose calibration knows it */
  readonly spreads: Partial<Readonly<Record<Exclude<UncertainField, 'wave_height'>, Spread>>>
}

/** A segment of a study as it was when the study was made, with the options that hold on it. */
export interface StudySegment {
  readonly id: string
  readonly waterway?: string
  /** m along the waterway, at the upstream and the downstream end; may fall */
  readonly chainageFrom: number
  readonly chainageTo: number
  /** along the sailing line, m */
  readonly length: number
  readonly segment: Segment
  /** with the calibration that is used here */
  readonly options: Options
  /** standard deviation of the logarithm of the wave height; absent without uncertainty */
  readonly waveHeightLogSd?: number
}

/**
 * Every segment with every vessel at every level, in every current and direction: plain data, which may be sent to a
 * thread, stored as JSON and read again without loss. SI.
 *
 * Cells are ordered by segment, vessel, level, current, direction, the last one fastest.
 */
export interface Study {
  /** in the order of their ids, n ≥ 1 */
  readonly segments: readonly StudySegment[]
  readonly vessels: readonly Vessel[]
  /** above the datum, m */
  readonly waterLevels: readonly number[]
  /** positive downstream, m/s */
  readonly currents: readonly number[]
  /** null alone where all currents are 0: one answer for both */
  readonly directions: readonly (Direction | null)[]
  readonly uncertainty?: Uncertainty
}

export function cellCount({ segments, vessels, waterLevels, currents, directions }: Study): number {
  return segments.length * vessels.length * waterLevels.length * currents.length * directions.length
}
