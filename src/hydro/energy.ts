import { GRAVITY } from './constants.ts'

/**
 * Energy of one wave per metre of its crest, with the length it has in deep water.
 *
 *   E = ρ g H²/8 · g T²/(2π) = ρ g² H² T² / (16 π)
 *
 * @param height  H, trough to crest, m, ≥ 0
 * @param period  T, s, > 0
 * @param density  ρ, of the water, kg/m³, > 0
 * @returns E, J/m, ≥ 0
 * @holds linear waves; the length is that of deep water whatever the depth, as the criteria that use it are stated
 * @error exact within rounding for linear theory
 * @source Sorensen (2006), Basic Coastal Engineering, eqs 2.36 and 2.14
 * @example waveEnergy(0.2, 2, 1000) // 306.12
 */
export function waveEnergy(height: number, period: number, density: number): number {
  return (density * (GRAVITY * height * period) ** 2) / (16 * Math.PI)
}
