import {
  DEEP_FROUDE,
  cuspFroudeNumber,
  cuspHalfAngle,
  cuspTangentSquared,
  cuspWaveNumber,
} from './caustic.ts'
import { GRAVITY } from './constants.ts'
import { relativeWaveNumber, relativeWaveNumberOfSpeed } from './dispersion.ts'

/** α of the deep-water wedge, asin(1/3). */
const KELVIN_HALF_ANGLE = Math.asin(1 / 3) // rad

/** θ of the deep-water cusp, acos √(2/3). */
const KELVIN_PROPAGATION_ANGLE = Math.acos(Math.sqrt(2 / 3)) // rad

/**
 * Half-angle of the wake: between the sailing line and the edge along which the highest waves lie.
 *
 *   tan α = N sin θ cos θ / (1 - N cos²θ) at the cusp;   sin α = 1/F for F ≥ 1
 *
 * @param F  depth Froude number V/√(g d), dimensionless, > 0
 * @returns α, rad: asin(1/3) in deep water, π/2 at F = 1, asin(1/F) above
 * @holds linear waves far behind a point source, level bed of infinite extent; the line of highest waves that is seen behind fast
 *   craft may lie inside it
 * @error exact within rounding for linear theory
 * @source F < 1: as `cuspFroudeNumber`; deep water: Kelvin (1887), NIST DLMF 36.13.5 (19.47122 deg); F > 1: Sorensen (2006),
 *   Basic Coastal Engineering, p. 105
 * @example wedgeHalfAngle(0.9) // 0.60425
 */
export function wedgeHalfAngle(F: number): number {
  if (F >= 1) return Math.asin(1 / F)
  if (F <= DEEP_FROUDE) return KELVIN_HALF_ANGLE
  const p = cuspWaveNumber(F)
  return cuspHalfAngle(p, cuspTangentSquared(p))
}

/**
 * Direction in which the waves on the edge of the wake run, from the sailing line; their crests stand at π/2 minus it.
 *
 *   cos²θ = (N - A) / (N (2 - N) - A) at the cusp;   cos θ = 1/F for F ≥ 1
 *
 * @param F  depth Froude number V/√(g d), dimensionless, > 0
 * @returns θ, rad: acos √(2/3) in deep water, 0 at F = 1, acos(1/F) above
 * @holds as `wedgeHalfAngle`
 * @error exact within rounding for linear theory
 * @source as `wedgeHalfAngle`
 * @example cuspPropagationAngle(0.9) // 0.29148
 */
export function cuspPropagationAngle(F: number): number {
  if (F >= 1) return Math.acos(1 / F)
  if (F <= DEEP_FROUDE) return KELVIN_PROPAGATION_ANGLE
  return Math.atan(Math.sqrt(cuspTangentSquared(cuspWaveNumber(F))))
}

/**
 * Period of the waves on the edge of the wake.
 *
 *   T = 2π √( d / (g p tanh p) ),   p = kd at the cusp
 *
 * @param depth  d, undisturbed depth, m, > 0
 * @param F  depth Froude number V/√(g d), dimensionless, > 0
 * @returns T, s; 5.130 V/g in deep water; NaN for F ≥ 1, where no cusp wave has a finite period
 * @holds as `wedgeHalfAngle`
 * @error exact within rounding for linear theory
 * @source the dispersion relation, Sorensen (2006), Basic Coastal Engineering, eqs 2.12 to 2.14, at the cusp
 * @example cuspPeriod(3, 0.7) // 2.1277
 */
export function cuspPeriod(depth: number, F: number): number {
  return F < 1 ? periodOf(depth, cuspWaveNumber(F)) : NaN
}

/** Period of the wave of relative number p. */
function periodOf(depth: number, p: number): number {
  return 2 * Math.PI * Math.sqrt(depth / (GRAVITY * p * Math.tanh(p)))
}

/**
 * Length of the waves on the edge of the wake, across their crests.
 *
 *   L = 2π d / p,   p = kd at the cusp
 *
 * @param depth  d, undisturbed depth, m, > 0
 * @param F  depth Froude number V/√(g d), dimensionless, > 0
 * @returns L, m; 4.189 V²/g in deep water; NaN for F ≥ 1
 * @holds as `wedgeHalfAngle`
 * @error exact within rounding for linear theory
 * @source as `cuspFroudeNumber`
 * @example cuspWaveLength(3, 0.7) // 7.0012
 */
export function cuspWaveLength(depth: number, F: number): number {
  return F < 1 ? (2 * Math.PI * depth) / cuspWaveNumber(F) : NaN
}

/**
 * Period of the waves on the edge of the wake of a ship at a given speed: `cuspPeriod` with F = V/√(g d).
 *
 *   T = 2π √( d / (g p tanh p) ),   p = kd at the cusp
 *
 * @param speed  V, speed through the water, m/s, > 0
 * @param depth  d, undisturbed depth, m, > 0
 * @returns T, s; NaN at and above V = √(g d)
 * @holds as `wedgeHalfAngle`
 * @error exact within rounding for linear theory
 * @source as `cuspPeriod`
 * @example cuspPeriodAt(4, 3) // 2.3223
 */
export function cuspPeriodAt(speed: number, depth: number): number {
  return cuspPeriod(depth, speed / Math.sqrt(GRAVITY * depth))
}

/**
 * Speed of the ship whose cusp waves have a given period: the inverse of `cuspPeriodAt`, in closed form but for the
 * dispersion relation.
 *
 *   p tanh p = (2π/T)² d / g;   V = √(g d) F(p), F the caustic in parametric form
 *
 * @param depth  d, undisturbed depth, m, > 0
 * @param period  T, s, > 0
 * @returns V, m/s; it rises with T towards √(g d)
 * @holds as `wedgeHalfAngle`
 * @error exact within rounding for linear theory
 * @source as `cuspFroudeNumber` and `relativeWaveNumber`
 * @example speedAtCuspPeriod(3, 2.32235) // 4.0000
 */
export function speedAtCuspPeriod(depth: number, period: number): number {
  const p = relativeWaveNumber(((2 * Math.PI) / period) ** 2 * (depth / GRAVITY))
  return Math.sqrt(GRAVITY * depth) * cuspFroudeNumber(p)
}

/**
 * Length of the transverse waves, which follow the ship with their crests square to the sailing line.
 *
 *   F² = tanh(p) / p,   L = 2π d / p
 *
 * @param depth  d, undisturbed depth, m, > 0
 * @param F  depth Froude number V/√(g d), dimensionless, > 0
 * @returns L, m; 2π V²/g in deep water; NaN for F ≥ 1, where there are no transverse waves
 * @holds linear waves, level bed
 * @error exact within rounding of F²
 * @source Sorensen (2006), Basic Coastal Engineering, eq. 2.12 with C = V; no transverse waves for F > 1: the same, p. 105
 * @example transverseWaveLength(1, 0.8) // 4.5710
 */
export function transverseWaveLength(depth: number, F: number): number {
  return F < 1 ? (2 * Math.PI * depth) / relativeWaveNumberOfSpeed(F * F) : NaN
}

/**
 * Time from the passing of the bow abeam to the arrival of the first cusp wave.
 *
 *   t = y / (V tan α)
 *
 * @param distance  y, from the sailing line, m, ≥ 0
 * @param speed  V, speed through the water, m/s, > 0
 * @param halfAngle  α, of the wake, rad, 0 to π/2
 * @returns t, s, ≥ 0
 * @holds a wake whose edge starts at the bow; water at rest
 * @error exact within rounding; the ship's beam and the curved start of the edge are left out
 * @source geometry of the wedge
 * @example firstArrival(25, 4, 0.37466) // 15.894
 */
export function firstArrival(distance: number, speed: number, halfAngle: number): number {
  return distance / (speed * Math.tan(halfAngle))
}

/** Figures of the wake of a ship, from one solution for the cusp. */
export interface Wake {
  /** F = V/√(g d) */
  readonly froudeNumber: number
  /** α, rad */
  readonly halfAngle: number
  /** θ of the cusp waves, rad; their crests stand at π/2 - θ */
  readonly propagationAngle: number
  /** T of the cusp waves, s; NaN for F ≥ 1 */
  readonly period: number
  /** L of the cusp waves, m; NaN for F ≥ 1 */
  readonly waveLength: number
  /** L of the transverse waves, m; NaN for F ≥ 1 */
  readonly transverseWaveLength: number
}

/**
 * Shape of the wake of a ship: the functions above together, with one solution for the cusp.
 *
 *   F = V / √(g d), then the caustic
 *
 * @param speed  V, speed through the water, m/s, > 0
 * @param depth  d, undisturbed depth, m, > 0
 * @returns angles in rad, lengths in m, period in s; period and lengths NaN for F ≥ 1
 * @holds as `wedgeHalfAngle`
 * @error exact within rounding for linear theory
 * @source as `wedgeHalfAngle`
 * @example wakeAt(4, 3).waveLength // 8.2455
 */
export function wakeAt(speed: number, depth: number): Wake {
  const F = speed / Math.sqrt(GRAVITY * depth)
  if (!(F < 1)) {
    return {
      froudeNumber: F,
      halfAngle: Math.asin(1 / F),
      propagationAngle: Math.acos(1 / F),
      period: NaN,
      waveLength: NaN,
      transverseWaveLength: NaN,
    }
  }
  const p = cuspWaveNumber(F)
  const R = cuspTangentSquared(p)
  return {
    froudeNumber: F,
    halfAngle: F <= DEEP_FROUDE ? KELVIN_HALF_ANGLE : cuspHalfAngle(p, R),
    propagationAngle: F <= DEEP_FROUDE ? KELVIN_PROPAGATION_ANGLE : Math.atan(Math.sqrt(R)),
    period: periodOf(depth, p),
    waveLength: (2 * Math.PI * depth) / p,
    transverseWaveLength: transverseWaveLength(depth, F),
  }
}
