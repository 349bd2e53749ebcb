import type { CriterionId } from '../advisory/criteria/criterion.ts'
import type { Outcome } from '../advisory/decide.ts'

/** Which cell of a study, by index of each axis. */
export interface CellPlace {
  readonly segment: number
  readonly vessel: number
  readonly waterLevel: number
  readonly current: number
  readonly direction: number
}

/** What the samples of a cell say. */
export interface Sampled {
  /** share of samples without a safe speed, impossible ones among them, 0 to 1 */
  readonly noSafeRatio: number
  /** speed over the ground at each percentile of the study, m/s; null where the samples have no safe speed */
  readonly percentiles: readonly (number | null)[]
  /** share of samples that each criterion governs; the rest is impossible */
  readonly governedBy: Partial<Readonly<Record<CriterionId, number>>>
}

/** The answer at the inputs as given. */
export interface CellAnswer {
  readonly outcome: Outcome
  readonly governing: CriterionId
  /** of the governing station, m along the waterway */
  readonly stationChainage?: number
  /** that was used, m */
  readonly draught: number
  /** m/s, through the water; absent without a safe speed */
  readonly throughWater?: number
  /** m/s, over the ground */
  readonly overGround?: number
  /** m/s, through the water, at the governing station */
  readonly criticalSpeed: number
}

/** A cell of a study: an answer, or why there is none; plain data. */
export interface Cell extends CellPlace {
  readonly answer?: CellAnswer
  /** absent without uncertainty, and where the inputs as given are impossible */
  readonly sampled?: Sampled
  readonly problem?: { readonly code: string; readonly detail: string }
}
