import type { Situation } from '../situation.ts'
import { bankWaveCriterion } from './bank-wave.ts'
import { clearanceCriterion } from './clearance.ts'
import type { Criterion } from './criterion.ts'
import { criticalRatioCriterion, depthFroudeCriterion } from './nearness.ts'
import { drawdownCriterion, returnCurrentCriterion } from './primary-wave.ts'
import { receptorWaveCriterion } from './receptor-wave.ts'
import { wakeWashCriterion } from './wake-wash.ts'

/**
 * Every criterion of the water and the vessel that applies, in the order in which they are reported and ties are
 * settled; posted limit and service speed follow them.
 */
export function waterCriteria(situation: Situation): Criterion[] {
  const candidates = [
    criticalRatioCriterion(situation),
    depthFroudeCriterion(situation),
    bankWaveCriterion(situation, 0),
    bankWaveCriterion(situation, 1),
    ...situation.segment.receptors.map((receptor, i) => receptorWaveCriterion(situation, receptor, i)),
    clearanceCriterion(situation),
    drawdownCriterion(situation, 0),
    drawdownCriterion(situation, 1),
    returnCurrentCriterion(situation, 0),
    returnCurrentCriterion(situation, 1),
    wakeWashCriterion(situation, 0),
    wakeWashCriterion(situation, 1),
  ]
  return candidates.filter((criterion) => criterion !== undefined)
}
