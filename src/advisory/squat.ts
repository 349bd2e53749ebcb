import { activeAt } from '../hydro/bands.ts'
import { heldAt } from '../hydro/held.ts'
import { SQUAT_METHODS } from '../hydro/squat/all.ts'
import type { Situation } from './situation.ts'

/** Greatest squat of the methods that count at a speed, m; NaN where none does. */
export const squatAt = heldAt((situation: Situation, speed: number): number => {
  const active = activeAt(situation.squatBands, speed)
  let squat = active === 0 ? NaN : 0
  for (let i = 0; i < SQUAT_METHODS.length; i += 1) {
    if ((active & (1 << i)) === 0) continue
    const own = SQUAT_METHODS[i]?.squat(situation.setting, speed) ?? NaN
    // a method that counts and has no value leaves the squat unknown
    if (Number.isNaN(own)) return NaN
    squat = Math.max(squat, own)
  }
  return squat
})

/** First speed in (from, to] above which the squat exceeds a value, or cannot be evaluated; Infinity when never. */
export function squatFirstSpeed(situation: Situation, squat: number, from: number, to: number): number {
  for (const band of situation.squatBands.list) {
    const start = Math.max(band.from, from)
    const end = Math.min(band.to, to)
    if (!(start < end)) continue
    if (band.active === 0) return start
    // from the last, which is in closed form: each need only be solved up to the lowest of those before
    let first = Infinity
    for (let i = SQUAT_METHODS.length - 1; i >= 0; i -= 1) {
      if ((band.active & (1 << i)) === 0) continue
      const stop = Math.min(end, first)
      if (!(start < stop)) return first
      first = Math.min(first, SQUAT_METHODS[i]?.firstSpeed(situation.setting, squat, start, stop) ?? Infinity)
    }
    if (first < Infinity) return first
  }
  return Infinity
}
