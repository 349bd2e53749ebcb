// The pattern is steady in the ship's frame, so a wave of number k runs at the angle θ at which V cos θ is its phase
// speed, and its energy lies on the line tan α = N sin θ cos θ / (1 - N cos²θ) behind the ship. The edge of the wake is
// the greatest α over all k. With s = 2p, m = s / sinh s, K = s coth s - 1 the condition dα/dk = 0 reads
//
//   tan²θ = R = (1 - m)² (1 + m) / (2 (1 - m²) + 4 m K),   F² = (1 + R) tanh(p) / p,   tan α = N √R / ((1 - m)/2 + R)
//
// which is cos²θ = (N - A) / (N (2 - N) - A), A = m (1 - 2p coth 2p) / (1 - m), rid of its 0/0 in long waves.

/** At and below this Froude number the caustic is Kelvin's to the last bit of a double: m is below 4e-19. */
export const DEEP_FROUDE = 0.25 // dimensionless

/** 1.5 / DEEP_FROUDE² = kd of the cusp there. */
const DEEP_WAVE_NUMBER = 24 // dimensionless

/** Below this s = 2 kd, differences of hyperbolic functions are taken from their series. */
const SERIES_BELOW = 1 // dimensionless

/** Where the start of the Newton steps changes. */
const START_FROUDE = 0.5 // dimensionless

/** Newton steps from a start within 0.7 %: 4e-5, 1e-9, then rounding. */
const CUSP_STEPS = 3

/** kd F² of the deep-water cusp: k = 3/2 g/V². */
const KELVIN_WAVE_NUMBER = 1.5 // dimensionless

/** 1 - m = 1 - s / sinh s; `S` is sinh s. */
function deficit(s: number, S: number): number {
  if (s >= SERIES_BELOW) return 1 - s / S
  const q = s * s
  const series =
    1 +
    (q / 20) *
      (1 + (q / 42) * (1 + (q / 72) * (1 + (q / 110) * (1 + (q / 156) * (1 + (q / 210) * (1 + q / 272))))))
  return ((s * q) / 6 / S) * series
}

/** s cosh s - sinh s; `S` and `C` are sinh s and cosh s. */
function moment(s: number, S: number, C: number): number {
  if (s >= SERIES_BELOW) return s * C - S
  // terms 2k s^(2k+1) / (2k+1)!
  const q = s * s
  const series =
    1 +
    (q / 10) *
      (1 + (q / 28) * (1 + (q / 54) * (1 + (q / 88) * (1 + (q / 130) * (1 + (q / 180) * (1 + q / 238))))))
  return ((s * q) / 3) * series
}

/**
 * Squared tangent of the direction in which the wave on the edge of the wake runs.
 *
 *   tan²θ = R = (1 - m)² (1 + m) / (2 (1 - m²) + 4 m K),   s = 2p,   m = s / sinh s,   K = s coth s - 1
 *
 * @param p  relative wave number k d at the cusp, dimensionless, > 0
 * @returns tan²θ, dimensionless: 1/2 in deep water, p²/9 in the longest waves
 * @holds linear waves far behind a point source, level bed, F < 1
 * @error exact within rounding
 * @source as `cuspFroudeNumber`
 * @example cuspTangentSquared(1) // 0.082972
 */
export function cuspTangentSquared(p: number): number {
  if (p >= DEEP_WAVE_NUMBER) return 0.5
  const s = 2 * p
  const S = Math.sinh(s)
  const u = deficit(s, S)
  const m = 1 - u
  return (u * u * (1 + m)) / (2 * u * (1 + m) + (4 * m * moment(s, S, Math.cosh(s))) / S)
}

/**
 * Depth Froude number at which the wave of a given length lies on the edge of the wake: the caustic in parametric form.
 *
 *   F² = tanh(p) / (p cos²θ),   cos²θ = (N - A) / (N (2 - N) - A)
 *
 *   N = (1 + m)/2,   m = 2p / sinh(2p),   A = m (1 - 2p coth 2p) / (1 - m)
 *
 * @param p  relative wave number k d at the cusp, dimensionless, ≥ 0
 * @returns F, dimensionless, 1 at p = 0, √(1.5 / p) in deep water; it falls as p rises
 * @holds linear waves far behind a point source, level bed, F < 1
 * @error exact within rounding
 * @source the caustic of the steady linear pattern, derived from the dispersion relation and the group speed (Havelock
 *   1908, Proc. Roy. Soc. London A 81, 398-430 poses the problem; volume and pages from memory, formula not his print)
 * @example cuspFroudeNumber(1) // 0.908177
 */
export function cuspFroudeNumber(p: number): number {
  if (p === 0) return 1
  return Math.sqrt(((1 + cuspTangentSquared(p)) * Math.tanh(p)) / p)
}

/**
 * Relative wave number kd of the wave on the edge of the wake: the inverse of `cuspFroudeNumber`.
 *
 * Newton's method on 1/F² as a function of p, which rises throughout, from a start within 0.7 %; the difference 1 - F² is
 * formed without cancellation, so that the last digits hold up to F = 1.
 *
 * @param F  depth Froude number V/√(g d), dimensionless, > 0
 * @returns p = k d at the cusp, dimensionless; 1.5 / F² in deep water, 0 at F = 1; NaN above, where the edge has no wave of
 *   finite length
 * @holds linear waves far behind a point source, level bed
 * @error exact within rounding of F
 * @source as `cuspFroudeNumber`
 * @example cuspWaveNumber(0.5) // 5.99309
 */
export function cuspWaveNumber(F: number): number {
  if (F !== heldFroude) {
    heldWaveNumber = solvedWaveNumber(F)
    heldFroude = F
  }
  return heldWaveNumber
}

/** The last one: angle, period and length of one wake ask for the same. */
let heldFroude = NaN
let heldWaveNumber = NaN

function solvedWaveNumber(F: number): number {
  if (!(F < 1)) return F === 1 ? 0 : NaN
  if (F <= DEEP_FROUDE) return KELVIN_WAVE_NUMBER / (F * F)
  const e = (1 - F) * (1 + F)
  // A start only: Kelvin's value, within 0.2 % up to START_FROUDE, and a fit of p² F² / e within 0.7 % beyond.
  let p =
    F < START_FROUDE
      ? KELVIN_WAVE_NUMBER / (F * F)
      : Math.sqrt(e * (4.55 + e * (-0.125 + e * (1.11 + e * 16.55)))) / F
  for (let step = 0; step < CUSP_STEPS; step += 1) p += cuspStep(p, e)
  return p
}

/** Newton step in p for 1/F²(p) = 1/(1 - e). */
function cuspStep(p: number, e: number): number {
  const s = 2 * p
  const E = s < SERIES_BELOW ? 0 : Math.exp(s)
  const S = s < SERIES_BELOW ? Math.sinh(s) : (E - 1 / E) / 2
  const C = s < SERIES_BELOW ? Math.cosh(s) : (E + 1 / E) / 2
  const t = S / (1 + C) // tanh p
  const u = deficit(s, S)
  const m = 1 - u
  const K = moment(s, S, C) / S
  const D = 2 * u * (1 + m) + 4 * m * K
  const R = (u * u * (1 + m)) / D
  // 1 - F²(p); p - tanh p = (p cosh p - sinh p) / cosh p, whose numerator needs only p below SERIES_BELOW
  const complement =
    s < SERIES_BELOW ? (moment(p, 0, 0) / Math.sqrt((C + 1) / 2) - R * t) / p : 1 - ((1 + R) * t) / p
  // d/ds: m' = -m K / s, K' = (K + 1 - m²) / s
  const dm = (-m * K) / s
  const dK = (K + u * (1 + m)) / s
  const dR = (-u * (1 + 3 * m) * dm - R * (4 * dm * (K - m) + 4 * m * dK)) / D
  const slope = u / p - (2 * dR) / (1 + R) // of ln(1/F²), per p
  return (e - complement) / ((1 - e) * slope)
}

/**
 * Half-angle of the wake whose edge carries a given wave.
 *
 *   tan α = N sin θ cos θ / (1 - N cos²θ) = N √R / ((1 - m)/2 + R)
 *
 * @param p  relative wave number k d at the cusp, dimensionless, > 0
 * @param R  tan²θ of that wave, `cuspTangentSquared(p)`, dimensionless, > 0
 * @returns α, rad
 * @holds linear waves far behind a point source, level bed, F < 1
 * @error exact within rounding
 * @source as `cuspFroudeNumber`
 * @example cuspHalfAngle(1, 0.082972) // 0.62877
 */
export function cuspHalfAngle(p: number, R: number): number {
  const u = deficit(2 * p, Math.sinh(2 * p))
  return Math.atan2((1 - u / 2) * Math.sqrt(R), u / 2 + R)
}
