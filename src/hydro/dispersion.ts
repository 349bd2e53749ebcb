import { GRAVITY } from './constants.ts'

/** Above this kd, tanh(kd) is 1 to the last bit of a double (2 e^-38 is 6e-17, below half a unit in the last place). */
const DEEP_WAVE_NUMBER = 19 // dimensionless

/** Newton steps from a start within 1.7 %: 9e-5, 3e-9, then rounding. */
const DISPERSION_STEPS = 3

/** Below this 1 - f2 the series is exact to rounding and Newton would divide two small differences. */
const LONG_WAVE_DEFICIT = 1e-4 // dimensionless

/** Newton steps from a start within 1 %. */
const SPEED_STEPS = 4

/**
 * Relative wave number kd of a wave of given frequency: the root of the linear dispersion relation.
 *
 *   p tanh p = x,   x = σ² d / g,   σ = 2π / T
 *
 * Start: Fenton & McKee, p = x / tanh(x^(3/4))^(2/3), within 1.7 %; then three Newton steps.
 *
 * @param x  σ² d / g, dimensionless, ≥ 0
 * @returns p = k d, dimensionless, ≥ 0; 0 at 0, x itself in deep water; NaN for a negative x
 * @holds linear waves on water at rest, any depth
 * @error exact within rounding (a few units in the last place)
 * @source Fenton & McKee (1990), On calculating the lengths of water waves, Coastal Engineering 14, 499-513, abstract
 *   for the start and its 1.7 %; the relation: Sorensen (2006), Basic Coastal Engineering, eqs 2.12 to 2.14
 * @example relativeWaveNumber(1) // 1.19967864
 */
export function relativeWaveNumber(x: number): number {
  if (!(x > 0)) return x === 0 ? 0 : NaN
  if (x >= DEEP_WAVE_NUMBER) return x
  const root = Math.sqrt(x)
  let p = x / Math.cbrt(Math.tanh(root * Math.sqrt(root)) ** 2)
  for (let step = 0; step < DISPERSION_STEPS; step += 1) {
    const t = Math.tanh(p)
    p -= (p * t - x) / (t + p * (1 - t * t))
  }
  return p
}

/**
 * Relative wave number kd of the wave whose phase speed keeps up with a given component of the ship's speed.
 *
 *   tanh(p) / p = f2,   f2 = F² cos²θ = C² / (g d)
 *
 * With θ = 0 this is the transverse wave. Start: p² = e (3 - 2.4 e + 0.4 e²) / f2², e = 1 - f2, which has the right first
 * two terms for long waves and the right first term for short ones; then four Newton steps.
 *
 * @param f2  F² cos²θ, dimensionless, 0 to 1
 * @returns p = k d, dimensionless; Infinity at 0, 0 at 1; NaN above 1, where no wave is so fast, and below 0
 * @holds linear waves on water at rest, any depth
 * @error exact within rounding of f2 (near 1, an error of f2 counts 1 / (2 - 2 f2) fold)
 * @source Sorensen (2006), Basic Coastal Engineering, eq. 2.12 for the phase speed; series by inversion of tanh(p) / p
 * @example relativeWaveNumberOfSpeed(0.36) // 2.75541
 */
export function relativeWaveNumberOfSpeed(f2: number): number {
  if (!(f2 >= 0 && f2 <= 1)) return NaN
  if (f2 * DEEP_WAVE_NUMBER <= 1) return 1 / f2
  const e = 1 - f2
  if (e < LONG_WAVE_DEFICIT) {
    // p² as a power series of e, by inversion of 1 - tanh(p)/p = p²/3 - 2p⁴/15 + ...; the next term is below 2e-16
    return Math.sqrt(e * (3 + e * (18 / 5 + e * (747 / 175 + e * (876 / 175)))))
  }
  let p = Math.sqrt(e * (3 - e * (2.4 - 0.4 * e))) / f2
  for (let step = 0; step < SPEED_STEPS; step += 1) {
    const t = Math.tanh(p)
    p -= (t - f2 * p) / (1 - t * t - f2)
  }
  return p
}

/**
 * Length of a wave of given period.
 *
 *   L = 2π d / p,   p tanh p = (2π/T)² d / g
 *
 * @param depth  d, undisturbed depth, m, > 0
 * @param period  T, s, > 0
 * @returns L, m, > 0
 * @holds linear waves on water at rest, any depth
 * @error exact within rounding
 * @source Sorensen (2006), Basic Coastal Engineering, eqs 2.12 to 2.14
 * @example waveLength(3, 10) // 53.146
 */
export function waveLength(depth: number, period: number): number {
  return (2 * Math.PI * depth) / relativeWaveNumber(((2 * Math.PI) / period) ** 2 * (depth / GRAVITY))
}

/**
 * Phase speed of a wave of given period: how fast its crests run.
 *
 *   C = L / T
 *
 * @param depth  d, undisturbed depth, m, > 0
 * @param period  T, s, > 0
 * @returns C, m/s, > 0
 * @holds linear waves on water at rest, any depth
 * @error exact within rounding
 * @source Sorensen (2006), Basic Coastal Engineering, eqs 2.12 to 2.14
 * @example phaseSpeed(3, 10) // 5.3146
 */
export function phaseSpeed(depth: number, period: number): number {
  return waveLength(depth, period) / period
}

/**
 * Group speed over phase speed: the pace of wave energy against that of the crests.
 *
 *   n = (1 + m) / 2,   m = 2p / sinh(2p)
 *
 * @param p  relative wave number k d, dimensionless, ≥ 0
 * @returns n, 1 in the longest waves to 1/2 in deep water
 * @holds linear waves on water at rest, any depth
 * @error exact within rounding
 * @source Sorensen (2006), Basic Coastal Engineering, eq. 2.38
 * @example groupRatio(1.19967864) // 0.71961
 */
export function groupRatio(p: number): number {
  if (p === 0) return 1
  // beyond kd = 355 the sinh overflows to Infinity and m is 0, as it should be
  return p === Infinity ? 0.5 : (1 + (2 * p) / Math.sinh(2 * p)) / 2
}

/**
 * Shoaling coefficient: wave height at a depth over the height of the same wave in deep water, without refraction.
 *
 *   Ks = √( L0 / (2 n L) ) = 1 / √(2 n tanh p)
 *
 * @param p  relative wave number k d, dimensionless, > 0
 * @returns Ks, dimensionless, ≥ 0.91299 (its minimum, at p tanh p = 1)
 * @holds linear waves, gentle slope, no breaking, no reflection
 * @error exact within rounding
 * @source Sorensen (2006), Basic Coastal Engineering, eq. 2.42
 * @example shoalingCoefficient(1.19967864) // 0.91299
 */
export function shoalingCoefficient(p: number): number {
  return 1 / Math.sqrt(2 * groupRatio(p) * Math.tanh(p))
}
