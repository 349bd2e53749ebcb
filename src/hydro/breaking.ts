import { relativeWaveNumber, relativeWaveNumberOfSpeed } from './dispersion.ts'
import { GRAVITY } from './constants.ts'

const BREAKER_INDEX = 0.78 // dimensionless, H/d of the solitary wave (McCowan 1894)
const LIMITING_STEEPNESS = 0.142 // dimensionless, H/L in deep water (Miche 1944, also printed as 1/7)

/**
 * Greatest height of a long wave on a level bed.
 *
 *   H = 0.78 d
 *
 * @param depth  d, undisturbed depth, m, ≥ 0
 * @returns H, m, ≥ 0
 * @holds solitary and very long waves (kd below about 0.5), level bed
 * @error the index of regular waves varies by 6 % on gentle slopes to 14 % at 1:10 (Goda 2010, Coastal Eng. J. 52, 71-106)
 * @source McCowan (1894), as quoted in coastal engineering texts; the 1894 paper was not read
 * @example mccowanLimit(0.5) // 0.39
 */
export function mccowanLimit(depth: number): number {
  return BREAKER_INDEX * depth
}

/**
 * Greatest height of a wave of given period, by its steepness.
 *
 *   H = 0.142 L tanh(k d)
 *
 * @param depth  d, undisturbed depth, m, > 0
 * @param period  T, s, > 0
 * @returns H, m, ≥ 0
 * @holds periodic waves on a level bed
 * @error as `mccowanLimit`; with the print 1/7 in place of 0.142 it is 0.6 % higher
 * @source Miche (1944); Sorensen (2006), Basic Coastal Engineering, eq. 2.66, prints 1/7
 * @example micheLimit(1, 2.5) // 0.7102
 */
export function micheLimit(depth: number, period: number): number {
  const p = relativeWaveNumber(((2 * Math.PI) / period) ** 2 * (depth / GRAVITY))
  return (LIMITING_STEEPNESS * 2 * Math.PI * depth * Math.tanh(p)) / p
}

/**
 * Greatest height of a wave that reaches the toe of a bank: the lower of McCowan's and Miche's limits.
 *
 *   H = min(0.78 d, 0.142 L tanh(k d))
 *
 * @param toeDepth  d, depth at the toe, m, > 0
 * @param period  T, s, > 0; without a finite period the limit is McCowan's
 * @returns H, m, ≥ 0
 * @holds level bed before the toe; refraction and shoaling left out
 * @error as `mccowanLimit`
 * @source as `mccowanLimit` and `micheLimit`; taking the lower of the two is our own choice
 * @example breakingLimit(0.3, 3) // 0.234
 */
export function breakingLimit(toeDepth: number, period: number): number {
  const longest = mccowanLimit(toeDepth)
  return Number.isFinite(period) ? Math.min(longest, micheLimit(toeDepth, period)) : longest
}

/**
 * Period of the wave whose limit by steepness is a given height: the inverse of `micheLimit`.
 *
 *   tanh(p)/p = H/(0.142 2π d), then T from the dispersion relation
 *
 * @param depth  d, undisturbed depth, m, > 0
 * @param height  H, m, > 0 and below 0.142 2π d = 0.892 d
 * @returns T, s, > 0; Infinity for a height that no wave reaches there
 * @holds as `micheLimit`
 * @error as `micheLimit`
 * @source as `micheLimit`
 * @example periodAtBreaking(1, 0.7102) // 2.4996
 */
export function periodAtBreaking(depth: number, height: number): number {
  const ratio = height / (LIMITING_STEEPNESS * 2 * Math.PI * depth)
  if (!(ratio < 1)) return Infinity
  const p = relativeWaveNumberOfSpeed(ratio)
  return (2 * Math.PI) / Math.sqrt((GRAVITY * p * Math.tanh(p)) / depth)
}
