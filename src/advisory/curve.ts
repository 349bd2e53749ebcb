import type { Decision } from './decide.ts'
import { effectsAt, type Effects } from './effects.ts'
import { heightByMethod } from './secondary-wave.ts'
import { WAVE_METHODS } from '../hydro/waves/all.ts'

/** Points of a curve where the caller does not say. */
export const DEFAULT_POINTS = 60

/** A curve runs to this share of the critical speed at least. */
const REACH = 1.1

export interface CurvePoint {
  readonly effects: Effects
  /** height at the nearer bank by method, whatever its range, m; NaN where it has no value */
  readonly heights: readonly { readonly id: string; readonly height: number }[]
}

/** Effects over speed, from the first step up. */
export interface Curve {
  readonly decision: Decision
  readonly points: readonly CurvePoint[]
}

/**
 * The effects of a passage over its speed, evenly spaced up to the larger of the top speed and 1.1 times the critical
 * speed.
 *
 * @param count  number of points, ≥ 2
 */
export function speedCurve(decision: Decision, count: number = DEFAULT_POINTS): Curve {
  const { situation } = decision
  const top = Math.max(situation.vessel.maxSpeed, REACH * situation.setting.criticalSpeed)
  const distance = situation.section.distances[situation.nearer]
  const points = Array.from({ length: count }, (_, i) => {
    const speed = (top * (i + 1)) / count
    return {
      effects: effectsAt(situation, speed),
      heights: WAVE_METHODS.map((method, k) => ({
        id: method.id,
        height: heightByMethod(situation, k, speed, distance),
      })),
    }
  })
  return { decision, points }
}
