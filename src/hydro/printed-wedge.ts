import { groupRatio } from './dispersion.ts'

/** Direction of the diverging waves in deep water as printed: 35.27 deg (Weggel & Sorensen 1986). */
const PRINTED_DEEP_DIRECTION = (35.27 * Math.PI) / 180 // rad

/** Decay of that direction towards F = 1 (Weggel & Sorensen 1986). */
const PRINTED_DIRECTION_RATE = 12 // dimensionless

/**
 * Half-angle of the wake by the closed form that is widely printed, for comparison only: the group ratio is held constant while
 * the angle is maximised, although it depends on the wave, so that for 0.6 < F < 1 the line lies inside the exact edge (28.5
 * against 34.6 deg at F = 0.9).
 *
 *   sin α = (1 + m) / (3 - m),   that is cos²α = 8 (1 - m) / (3 - m)²,   m = 2p / sinh(2p) = 2N - 1
 *
 * @param p  relative wave number k d at the cusp of that form, see `printedFroudeNumber`, dimensionless, > 0
 * @returns α, rad: asin(1/3) for large p, π/2 for p = 0
 * @holds not used in the answers of this service; agrees with `wedgeHalfAngle` to 0.01 deg below F = 0.6
 * @error up to 17.4 deg low (near F = 0.995) against the caustic of linear theory
 * @source as printed, attributed to Havelock (1908), in an appendix of the US National Park Service's environmental impact
 *   statement on vessel quotas, Glacier Bay (c. 2003), p. 194
 * @example printedWedgeHalfAngle(1) // 0.68622
 */
export function printedWedgeHalfAngle(p: number): number {
  const N = groupRatio(p)
  return Math.asin(N / (2 - N))
}

/**
 * Depth Froude number that belongs to `printedWedgeHalfAngle`, for comparison only.
 *
 *   F² = (3 - m)/2 · tanh(p) / p
 *
 * @param p  relative wave number k d at the cusp of that form, dimensionless, > 0
 * @returns F, dimensionless, 0 to 1
 * @holds not used in the answers of this service
 * @error as `printedWedgeHalfAngle`
 * @source follows from the closed form with cos²θ = 2/(3 - m); the source of `printedWedgeHalfAngle` leaves it implicit
 * @example printedFroudeNumber(1) // 0.96561
 */
export function printedFroudeNumber(p: number): number {
  return Math.sqrt(((2 - groupRatio(p)) * Math.tanh(p)) / p)
}

/**
 * Direction of the diverging waves by an eye-fitted approximation, for comparison only.
 *
 *   θ = 35.27 deg (1 - exp(12 (F - 1)))
 *
 * @param F  depth Froude number V/√(g d), dimensionless, > 0
 * @returns θ, rad, 0 for F ≥ 1
 * @holds not used in the answers of this service; F < 1
 * @error up to 9.3 deg high (near F = 0.84) against the exact cusp
 * @source Weggel & Sorensen (1986), Ship wave prediction for port and channel design, Ports '86, from memory; the same
 *   relation: US Army Corps of Engineers, Coastal Engineering Manual, Part II ch. 7, eqs II-7-21 to II-7-23
 * @example weggelSorensenPropagationAngle(0.73) // 0.59147
 */
export function weggelSorensenPropagationAngle(F: number): number {
  if (F >= 1) return 0
  return PRINTED_DEEP_DIRECTION * (1 - Math.exp(PRINTED_DIRECTION_RATE * (F - 1)))
}
