import { GRAVITY } from '../constants.ts'

/**
 * Sinkage term of slender-body theory in shallow open water, which the Tuck family of squat laws multiplies.
 *
 *   D = (vol / L²) F² / √(1 - F²),   F² = V² / (g h)
 *
 * @param volume  vol, displaced volume, m³, > 0
 * @param length  L, m, > 0
 * @param depth  h, undisturbed depth, m, > 0
 * @param speed  V, through the water, m/s, ≥ 0
 * @returns D, m, ≥ 0; NaN for F ≥ 1, where the theory has no value
 * @holds slender hulls in shallow water of infinite extent, F well below 1; it grows without bound towards F = 1
 * @error exact within rounding for the term itself
 * @source Tuck (1966), Shallow-water flows past slender bodies, J. Fluid Mech. 26, 81-95, from memory
 * @example tuckTerm(73168.2, 225, 14.4, 4.11556) // 0.18479
 */
export function tuckTerm(volume: number, length: number, depth: number, speed: number): number {
  const f2 = (speed * speed) / (GRAVITY * depth)
  return f2 < 1 ? ((volume / (length * length)) * f2) / Math.sqrt(1 - f2) : NaN
}

/**
 * Speed at which `tuckTerm` takes a given value: its inverse in closed form.
 *
 *   A = D L² / vol;   F² = (√(A⁴ + 4 A²) - A²) / 2
 *
 * @param volume  vol, displaced volume, m³, > 0
 * @param length  L, m, > 0
 * @param depth  h, undisturbed depth, m, > 0
 * @param term  D, m, ≥ 0
 * @returns V, through the water, m/s, below √(g h)
 * @holds as `tuckTerm`
 * @error exact within rounding; written as 2 A / (√(A² + 4) + A), which does not cancel
 * @source algebra on `tuckTerm`
 * @example speedAtTuckTerm(73168.2, 225, 14.4, 0.18479) // 4.1156
 */
export function speedAtTuckTerm(volume: number, length: number, depth: number, term: number): number {
  const a = (term * length * length) / volume
  return Math.sqrt((GRAVITY * depth * 2 * a) / (Math.sqrt(a * a + 4) + a))
}
