import type { Calibration } from './calibration.ts'
import type { Direction } from './segment.ts'
import type { SignUnit } from './units.ts'
import type { Vessel } from './vessel.ts'

/** The water and the traffic of the moment. */
export interface Conditions {
  /** above the datum, m */
  readonly waterLevel: number
  /** along the segment, positive downstream, m/s */
  readonly current: number
  readonly direction?: Direction
  readonly meetingVessel?: Vessel
  /** false when the level is the default and not a statement of the caller */
  readonly isWaterLevelGiven: boolean
  /** false when still water is the default and not a statement of the caller */
  readonly isCurrentGiven: boolean
}

/** Limits that a caller sets in place of the segment's and the policy's. */
export interface RequestedLimits {
  readonly maxCriticalRatio?: number
  readonly maxDepthFroudeNumber?: number
  readonly minUnderKeelClearanceRatio?: number
  readonly maxBankWaveHeight?: number
  readonly maxReceptorWaveHeight?: number
  readonly maxDrawdown?: number
  readonly maxReturnCurrent?: number
  readonly wakeWash?: 'when-long' | 'always' | 'never'
}

/** How an advisory is made. */
export interface Options {
  /** wave methods to prefer; absent: every method that applies */
  readonly waveMethods?: readonly string[]
  readonly combine: 'highest' | 'median'
  readonly limits: RequestedLimits
  readonly applyPostedLimit: boolean
  readonly signUnit: SignUnit
  readonly signStep: number
  readonly hasCurve: boolean
  /** measured over computed wave height, for every method alike; in place of a calibration */
  readonly waveFactor?: number
  /** factors of the methods on this water; methods without one do not count */
  readonly calibration?: Calibration
  /** on top of every factor, as when an uncertain wave height is tried; default 1 */
  readonly waveScale?: number
}
