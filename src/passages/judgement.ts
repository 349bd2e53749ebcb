import type { CriterionId } from '../advisory/criteria/criterion.ts'
import type { Outcome } from '../advisory/decide.ts'
import type { Effects } from '../advisory/effects.ts'
import type { Conditions } from '../domain/conditions.ts'
import type { Vessel } from '../domain/vessel.ts'
import type { VesselGuess } from './vessel-guess.ts'

export const VERDICTS = ['within', 'exceeds', 'depends-on-draught', 'no-safe-speed'] as const
export type PassageVerdict = (typeof VERDICTS)[number]

/** How reports are judged. SI. */
export interface Judging {
  /** where a row does not say: above the datum, m */
  readonly waterLevel: number
  /** where a row does not say: positive downstream, m/s */
  readonly current: number
  /** by which a maximum may be exceeded without being said to be, m/s, ≥ 0 */
  readonly tolerance: number
  /** which maximum the verdict uses */
  readonly position: 'actual' | 'sailing-line'
  /**
   * whether cautions, figures as sailed and the maximum on the sailing line are wanted beside the verdict, and the maximum
   * where the verdict can do without
   */
  readonly isFull: boolean
}

/** A matched report as it was judged. SI; NaN and undefined where something does not apply. */
export interface Judgement {
  readonly guess: VesselGuess
  /** the loading that the figures are for, before a permitted draught caps it */
  readonly vessel: Vessel
  /** that was computed with, m */
  readonly draught: number
  readonly conditions: Conditions
  readonly throughWater: number
  /** to the left and to the right waterline at the level, from the position as reported, m */
  readonly distances: readonly [left: number, right: number]
  /** of the maximum that the verdict uses; of a report within, where totals only are wanted, of one above its speed */
  readonly outcome: Outcome
  readonly governing: CriterionId
  /** that the verdict uses, over ground, m/s; NaN without a safe speed, and where totals do not need it */
  readonly maxOverGround: number
  readonly sailingLineMax: number
  readonly excess: number
  readonly verdict: PassageVerdict
  /** over ground, m/s */
  readonly postedLimit: number
  readonly postedExcess: number
  /** as sailed; NaN when the vessel does not move through the water, no method covers it, or totals do not need it */
  readonly depthFroudeNumber: number
  readonly criticalRatio: number
  readonly waveHeights: readonly [left: number, right: number]
  /** J per metre of crest */
  readonly waveEnergies: readonly [left: number, right: number]
  readonly cautions: readonly string[]
}

export type SailedFigures = Pick<
  Judgement,
  'depthFroudeNumber' | 'criticalRatio' | 'waveHeights' | 'waveEnergies'
>

export const UNMOVED: SailedFigures = {
  depthFroudeNumber: NaN,
  criticalRatio: NaN,
  waveHeights: [NaN, NaN],
  waveEnergies: [NaN, NaN],
}

/** What is kept of a report as sailed: a log may hold many at a time. */
export function sailedFigures(effects: Effects, leftBank: 0 | 1): SailedFigures {
  const left = effects.banks[leftBank]
  const right = effects.banks[leftBank === 0 ? 1 : 0]
  return {
    depthFroudeNumber: effects.depthFroudeNumber,
    criticalRatio: effects.criticalRatio,
    waveHeights: [left.waveHeight, right.waveHeight],
    waveEnergies: [left.waveEnergy, right.waveEnergy],
  }
}

/** What totals need of a report. */
export const energiesOnly = (energies: readonly [number, number], leftBank: 0 | 1): SailedFigures => ({
  ...UNMOVED,
  waveEnergies: leftBank === 0 ? energies : [energies[1], energies[0]],
})
