import { heldFor } from '../../hydro/held.ts'
import { allowedWakeWashHeight } from '../../hydro/wake-wash.ts'
import { WAVE_METHODS } from '../../hydro/waves/all.ts'
import { cuspPeriodAt, speedAtCuspPeriod } from '../../hydro/wedge.ts'
import { firstExcess } from '../scan.ts'
import { secondaryWave, waveAt } from '../secondary-wave.ts'
import type { Situation } from '../situation.ts'
import { atMost, type Criterion, type Evaluation } from './criterion.ts'
import { POLICY } from './policy.ts'

/** Speed from which the waves are as long as the rule is meant for, m/s: one for both banks. */
const longWavesFrom = heldFor(({ depth }) => speedAtCuspPeriod(depth, POLICY.longWavePeriod))

/** Excess of the secondary wave over the rule at a speed; 1 where either is unknown, which counts as reached. */
function excessAt(situation: Situation, distance: number, speed: number): number {
  const period = cuspPeriodAt(speed, situation.section.depth)
  const excess = waveAt(situation, speed, distance).height - allowedWakeWashHeight(period)
  return Number.isNaN(excess) ? 1 : excess
}

/** The rule at a speed; up to `longFrom`, m/s, the waves are too short for it. */
function evaluateWash(situation: Situation, distance: number, longFrom: number, speed: number): Evaluation {
  const period = cuspPeriodAt(speed, situation.section.depth)
  // by speed and not by period: the period at `longFrom` may come out a unit in the last place above the rule's
  if (speed <= longFrom) {
    const wave = secondaryWave(situation, speed, distance)
    const limit = allowedWakeWashHeight(POLICY.longWavePeriod)
    return { ...(wave.method >= 0 && { value: wave.height }), limit, isMet: true }
  }
  const limit = allowedWakeWashHeight(Number.isNaN(period) ? POLICY.longWavePeriod : period)
  const wave = secondaryWave(situation, speed, distance)
  return Number.isNaN(period)
    ? { limit, isMet: false }
    : atMost(wave.height, limit, WAVE_METHODS[wave.method]?.id)
}

/**
 * Long wake wash at a bank. By default it counts only from the period on that the rule is meant for, and is left out
 * where the vessel cannot make such waves.
 */
export function wakeWashCriterion(situation: Situation, bank: 0 | 1): Criterion | undefined {
  const mode = situation.options.limits.wakeWash ?? 'when-long'
  if (mode === 'never') return undefined
  const longFrom = mode === 'always' ? 0 : longWavesFrom(situation.setting)
  if (longFrom >= situation.vessel.maxSpeed) return undefined
  const distance = situation.section.distances[bank]
  return {
    id: 'wake-wash',
    place: `${situation.segment.banks[bank].side}-bank`,
    sense: 'at-most',
    unit: 'm',
    origin: situation.options.limits.wakeWash === undefined ? 'policy' : 'request',
    firstSpeed: (from, to, most = Infinity) =>
      firstExcess(situation.waveBands, { from: Math.max(from, longFrom), to, most }, (speed) =>
        excessAt(situation, distance, speed),
      ),
    evaluate: (speed) => evaluateWash(situation, distance, longFrom, speed),
  }
}
