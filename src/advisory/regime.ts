import type { Situation } from './situation.ts'

export const REGIMES = ['subcritical', 'elevated', 'near-critical', 'supercritical', 'transcritical'] as const
export type Regime = (typeof REGIMES)[number]

/** Bounds of the regimes; an advisory that stands on a bound must not fall over it by the last digit. */
const TOLERANCE = 1 + 1e-9

/** Rank by nearness to the critical speed; transcritical, where no steady flow exists, is the most severe. */
function rankOfRatio(ratio: number, upperRatio: number): number {
  if (ratio < 0.75) return 0
  if (ratio <= 0.9 * TOLERANCE) return 1
  if (ratio < 1) return 2
  return ratio > upperRatio ? 3 : 4
}

function rankOfFroude(froude: number): number {
  if (froude < 0.6) return 0
  if (froude <= 0.7 * TOLERANCE) return 1
  if (froude < 0.85) return 2
  return froude > 1.15 ? 3 : 4
}

/** Regime of the flow at a speed by V/V_L and by the depth Froude number: the more severe of the two counts. */
export function regimeAt(situation: Situation, speed: number): Regime {
  const { criticalSpeed, supercriticalOnset } = situation.setting
  const rank = Math.max(
    rankOfRatio(speed / criticalSpeed, supercriticalOnset / criticalSpeed),
    rankOfFroude(speed / situation.shallowWaveSpeed),
  )
  return REGIMES[rank] ?? 'transcritical'
}
