import type { CriterionId } from '../advisory/criteria/criterion.ts'
import type { Direction, Group } from '../domain/segment.ts'
import type { SignUnit } from '../domain/units.ts'
import type { Loading } from '../domain/vessel.ts'

/** Vessels for which a limit is posted together. */
export interface PlanGroup {
  readonly id: string
  readonly name: string
  readonly appliesTo: Group
}

/** Passages of a class on a segment, as the summary of a log has them. */
export interface PassageCounts {
  readonly segmentId: string
  readonly vesselClass: string
  readonly direction: Direction
  /** passages by mean speed over the ground: bin i from i × step to (i + 1) × step, kn */
  readonly step: number
  readonly counts: readonly number[]
}

/** How limits are drawn from a study. */
export interface PlanRules {
  readonly groups: readonly PlanGroup[]
  /** one of the study's; null takes the inputs as given */
  readonly percentile: number | null
  readonly signUnit: SignUnit
  /** in the unit of the sign */
  readonly signStep: number
  /** in the unit of the sign */
  readonly smallestLimit?: number
  readonly largestLimit?: number
  /** m that a stretch higher than a neighbour is long at least */
  readonly minRunLength: number
  readonly isByDirection: boolean
  /** segments whose posted limit stays */
  readonly keepPosted: readonly string[]
  readonly passages?: readonly PassageCounts[]
}

export type StretchOutcome = 'limit' | 'kept' | 'below-smallest-limit'

export interface PlanCaution {
  readonly code: string
  readonly severity: 'info' | 'caution' | 'warning'
  readonly text: string
  readonly facts?: Readonly<Record<string, string | number | readonly string[]>>
}

/** The cell of a stretch that allows least. */
export interface GoverningCell {
  readonly segmentId: string
  readonly stationChainage?: number
  /** index in the study */
  readonly vessel: number
  readonly vesselClass?: string
  readonly loading?: Loading
  readonly waterLevel: number
  readonly current: number
  readonly direction?: Direction
  /** at a percentile the one that governs most samples; absent where the cell has no answer */
  readonly criterion?: CriterionId
}

/** One limit over consecutive segments. Speeds over the ground, m/s. */
export interface Stretch {
  readonly groupId: string
  readonly direction: 'both' | Direction
  readonly waterway?: string
  /** m along the waterway, at the upstream and the downstream end */
  readonly chainageFrom: number
  readonly chainageTo: number
  /** along the sailing line, m */
  readonly length: number
  /** from upstream */
  readonly segmentIds: readonly string[]
  readonly outcome: StretchOutcome
  /** in the unit of the sign; of a kept one in its own terms */
  readonly limit?: { readonly value: number; readonly unit: SignUnit }
  readonly limitSpeed?: number
  /** lowest ceiling of its segments, rounded down to the step and cut to the largest limit */
  readonly ceiling?: number
  /** lowest maximum of its cells, not rounded */
  readonly lowestMaximum?: number
  readonly governing?: GoverningCell
  /** lowest posted limit of today */
  readonly today?: number
  /** s at the limit */
  readonly travelTime?: number
  /** s at the posted limits of today; absent unless every segment has one */
  readonly travelTimeToday?: number
  readonly passages?: number
  readonly exceedingRatio?: number
  readonly cautions: readonly PlanCaution[]
}

export interface PlanTotals {
  /** m of waterway, each group and direction counted */
  readonly length: number
  readonly lengthWithLimit: number
  readonly lengthBelowSmallest: number
  /** s */
  readonly travelTime: number
  /** over the stretches that have both times, s */
  readonly travelTimeComparable: number
  readonly travelTimeToday: number
}

export interface Plan {
  /** by group, direction, waterway, from upstream */
  readonly stretches: readonly Stretch[]
  readonly totals: PlanTotals
  /** indices of study vessels in no group */
  readonly unassignedVessels: readonly number[]
}
