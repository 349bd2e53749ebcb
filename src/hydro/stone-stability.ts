import { GRAVITY } from './constants.ts'

const SECONDARY_COEFFICIENT = 1.8 // dimensionless, Rock Manual (2007) sec. 5.2, from memory
const STERN_COEFFICIENT = 1.5 // dimensionless, the same

// 1.8 ξ^-1/2 with ξ = tan a / √(H/L0) is 1.8 (H/L0)^1/4 cot^1/2 a, so that H^(3/4) = 1.8 Δ D50 cot^1/2 a L0^-1/4.

/**
 * Greatest secondary wave that a riprap bank withstands.
 *
 *   H / (Δ D50) = 1.8 ξ^-0.5,   ξ = tan a / √(H/L0),   L0 = g T²/(2π);   solved for H
 *
 *   H = (1.8 Δ D50)^(4/3) cot^(2/3) a / L0^(1/3)
 *
 * @param stoneSize  D50, m, > 0
 * @param relativeDensity  Δ, (ρ_s - ρ)/ρ, dimensionless, > 0
 * @param slope  cot a, horizontal over vertical, dimensionless, > 0
 * @param period  T of the wave, s, > 0
 * @returns H, m, > 0
 * @holds riprap on a plane slope, waves square to the bank: the factor √cos β for oblique waves is left out, which is the
 *   careful side
 * @error a design rule; its scatter was not read
 * @source CIRIA, CUR, CETMEF (2007), The Rock Manual, C683, sec. 5.2, and PIANC (1987), Suppl. to Bulletin 57, from memory
 * @example secondaryWaveForStone(0.0919, 1.65, 3, 2) // 0.20001
 */
export function secondaryWaveForStone(
  stoneSize: number,
  relativeDensity: number,
  slope: number,
  period: number,
): number {
  const deepLength = (GRAVITY * period * period) / (2 * Math.PI)
  const strength = SECONDARY_COEFFICIENT * relativeDensity * stoneSize
  return Math.cbrt((strength ** 4 * slope * slope) / deepLength)
}

/**
 * Stone size that withstands a secondary wave: the inverse of `secondaryWaveForStone`.
 *
 *   D50 = H ξ^0.5 / (1.8 Δ)
 *
 * @param height  H, m, > 0
 * @param relativeDensity  Δ, (ρ_s - ρ)/ρ, dimensionless, > 0
 * @param slope  cot a, horizontal over vertical, dimensionless, > 0
 * @param period  T of the wave, s, > 0
 * @returns D50, m, > 0
 * @holds as `secondaryWaveForStone`
 * @error as `secondaryWaveForStone`
 * @source as `secondaryWaveForStone`
 * @example stoneForSecondaryWave(0.2, 1.65, 3, 2) // 0.09190
 */
export function stoneForSecondaryWave(
  height: number,
  relativeDensity: number,
  slope: number,
  period: number,
): number {
  const deepLength = (GRAVITY * period * period) / (2 * Math.PI)
  const breakerParameter = Math.sqrt(deepLength / height) / slope
  return (height * Math.sqrt(breakerParameter)) / (SECONDARY_COEFFICIENT * relativeDensity)
}

/**
 * Greatest transversal stern wave that a riprap bank withstands.
 *
 *   z_max / (Δ D50) = 1.5 cot^(1/3) a
 *
 * @param stoneSize  D50, m, > 0
 * @param relativeDensity  Δ, (ρ_s - ρ)/ρ, dimensionless, > 0
 * @param slope  cot a, horizontal over vertical, dimensionless, ≥ 0
 * @returns z_max, m, ≥ 0
 * @holds riprap on a plane slope beside the ship
 * @error a design rule; its scatter was not read
 * @source CIRIA, CUR, CETMEF (2007), The Rock Manual, C683, sec. 5.2, and PIANC (1987), Suppl. to Bulletin 57, from memory
 * @example sternWaveForStone(0.2, 1.65, 8) // 0.99
 */
export function sternWaveForStone(stoneSize: number, relativeDensity: number, slope: number): number {
  return STERN_COEFFICIENT * Math.cbrt(slope) * relativeDensity * stoneSize
}

/**
 * Stone size that withstands a transversal stern wave: the inverse of `sternWaveForStone`.
 *
 *   D50 = z_max / (1.5 cot^(1/3) a Δ)
 *
 * @param height  z_max, m, ≥ 0
 * @param relativeDensity  Δ, (ρ_s - ρ)/ρ, dimensionless, > 0
 * @param slope  cot a, horizontal over vertical, dimensionless, > 0
 * @returns D50, m, ≥ 0
 * @holds as `sternWaveForStone`
 * @error as `sternWaveForStone`
 * @source as `sternWaveForStone`
 * @example stoneForSternWave(0.3, 1.65, 3) // 0.0840
 */
export function stoneForSternWave(height: number, relativeDensity: number, slope: number): number {
  return height / (STERN_COEFFICIENT * Math.cbrt(slope) * relativeDensity)
}
