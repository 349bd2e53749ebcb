import { GRAVITY } from './constants.ts'

/**
 * Depth Froude number: speed over the speed of the longest wave that the water carries.
 *
 *   F_nh = V / √(g h)
 *
 * @param speed  V, through the water, m/s, ≥ 0
 * @param depth  h, undisturbed depth at the sailing line, m, > 0
 * @returns F_nh, dimensionless, ≥ 0
 * @holds any depth; level bed
 * @error exact within rounding
 * @source definition; CEM, EM 1110-2-1100 Part II ch. 7, p. II-7-61
 * @example depthFroudeNumber(2, 3) // 0.368730
 */
export function depthFroudeNumber(speed: number, depth: number): number {
  return speed / Math.sqrt(GRAVITY * depth)
}

/**
 * Length Froude number.
 *
 *   F_L = V / √(g L)
 *
 * @param speed   V, through the water, m/s, ≥ 0
 * @param length  L, waterline length, m, > 0
 * @returns dimensionless, ≥ 0
 * @holds any hull
 * @error exact within rounding
 * @source definition
 * @example lengthFroudeNumber(4, 20) // 0.285617
 */
export function lengthFroudeNumber(speed: number, length: number): number {
  return speed / Math.sqrt(GRAVITY * length)
}

/**
 * Speed of the longest wave that the water carries.
 *
 *   c = √(g h)
 *
 * @param depth  h, m, > 0
 * @returns c, m/s, > 0
 * @holds wave length large against the depth, height small against it
 * @error exact within rounding
 * @source definition
 * @example shallowWaterWaveSpeed(4) // 6.263114
 */
export function shallowWaterWaveSpeed(depth: number): number {
  return Math.sqrt(GRAVITY * depth)
}
