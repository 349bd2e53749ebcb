import type { Situation } from '../situation.ts'
import { atMost, firstOfRising, type Criterion } from './criterion.ts'
import { POLICY } from './policy.ts'

/** A bound on the speed over a characteristic speed of the water. */
function ratioCriterion(
  id: 'critical-ratio' | 'depth-froude-number',
  scale: number,
  requested: number | undefined,
  policy: number,
): Criterion {
  const limit = requested ?? policy
  return {
    id,
    place: 'vessel',
    sense: 'at-most',
    unit: 'ratio',
    origin: requested === undefined ? 'policy' : 'request',
    firstSpeed: (from, to) => firstOfRising(limit * scale, from, to),
    evaluate: (speed) => atMost(speed / scale, limit),
  }
}

/** Nearness to the critical speed of the channel. */
export function criticalRatioCriterion(situation: Situation): Criterion {
  const { maxCriticalRatio } = situation.options.limits
  return ratioCriterion(
    'critical-ratio',
    situation.setting.criticalSpeed,
    maxCriticalRatio,
    POLICY.maxCriticalRatio,
  )
}

/** Nearness to the speed of the longest wave, on the depth at the sailing line. */
export function depthFroudeCriterion(situation: Situation): Criterion {
  const { maxDepthFroudeNumber } = situation.options.limits
  return ratioCriterion(
    'depth-froude-number',
    situation.shallowWaveSpeed,
    maxDepthFroudeNumber,
    POLICY.maxDepthFroudeNumber,
  )
}
