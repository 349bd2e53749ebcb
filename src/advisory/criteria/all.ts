import type { Situation } from '../situation.ts'
import { bankWaveCriterion } from './bank-wave.ts'
import { clearanceCriterion } from './clearance.ts'
import type { Criterion } from './criterion.ts'
import { criticalRatioCriterion, depthFroudeCriterion } from './nearness.ts'
import { drawdownCriterion, returnCurrentCriterion } from './primary-wave.ts'
import { isAt, receptorWaveCriterion } from './receptor-wave.ts'
import { wakeWashCriterion } from './wake-wash.ts'

/**
 * Every criterion of the water and the vessel that applies, in the order in which they are reported and ties are
 * settled; posted limit and service speed follow them.
 */
export function waterCriteria(situation: Situation): Criterion[] {
  const criteria = [criticalRatioCriterion(situation), depthFroudeCriterion(situation)]
  addForBanks(criteria, situation, bankWaveCriterion)
  situation.segment.receptors.forEach((receptor, i) => {
    if (isAt(receptor, situation.station)) criteria.push(receptorWaveCriterion(situation, receptor, i))
  })
  criteria.push(clearanceCriterion(situation))
  addForBanks(criteria, situation, drawdownCriterion)
  addForBanks(criteria, situation, returnCurrentCriterion)
  addForBanks(criteria, situation, wakeWashCriterion)
  return criteria
}

/** Adds a criterion of each bank, where it applies. */
function addForBanks(
  criteria: Criterion[],
  situation: Situation,
  criterionOf: (situation: Situation, bank: 0 | 1) => Criterion | undefined,
): void {
  for (const bank of [0, 1] as const) {
    const criterion = criterionOf(situation, bank)
    if (criterion) criteria.push(criterion)
  }
}
