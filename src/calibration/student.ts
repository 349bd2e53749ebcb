import { risingRoot } from '../hydro/root.ts'

/**
 * Probability of a Student t at least as far from zero, both sides together.
 *
 *   p = 1 − A(t|ν), A by its finite series in θ = atan(t/√ν):
 *   ν odd:  A = 2/π (θ + sin θ (cos θ + 2/3 cos³θ + … + (2·4…(ν−3))/(1·3…(ν−2)) cos^(ν−2) θ)), ν = 1: 2θ/π
 *   ν even: A = sin θ (1 + 1/2 cos²θ + … + (1·3…(ν−3))/(2·4…(ν−2)) cos^(ν−2) θ)
 *
 * @param statistic         t, any, infinite too
 * @param degreesOfFreedom  ν, integer, ≥ 1
 * @returns p, 0 to 1
 * @error absolute, below 1e-12 for ν up to 10,000: smaller probabilities come as 0 or that noise
 * @source Abramowitz & Stegun (1964), Handbook of Mathematical Functions, 26.7.3 and 26.7.4
 * @example twoSidedProbability(2, 10) // 0.073388
 */
export function twoSidedProbability(statistic: number, degreesOfFreedom: number): number {
  const angle = Math.atan(Math.abs(statistic) / Math.sqrt(degreesOfFreedom))
  const cosine = Math.cos(angle)
  const isOdd = degreesOfFreedom % 2 === 1
  let sum = 0
  let term = isOdd ? cosine : 1
  for (let power = isOdd ? 1 : 0; power <= degreesOfFreedom - 2; power += 2) {
    sum += term
    term *= ((power + 1) / (power + 2)) * cosine * cosine
  }
  const inside = isOdd ? (2 / Math.PI) * (angle + Math.sin(angle) * sum) : Math.sin(angle) * sum
  return Math.max(0, 1 - inside)
}

/**
 * Distance from zero that a Student t exceeds, on both sides together, with a probability of 5 %.
 *
 * @param degreesOfFreedom  ν, integer, ≥ 1
 * @returns t, 1.96 to 12.71
 * @source by `twoSidedProbability`
 * @example studentBound(10) // 2.228139
 */
export function studentBound(degreesOfFreedom: number): number {
  return risingRoot((t) => 0.05 - twoSidedProbability(t, degreesOfFreedom), 0, 13)
}

/**
 * Share of a standard normal distribution below a value.
 *
 *   Φ(z) = 1/2 + e^(−z²/2)/√(2π) (z + z³/3 + z⁵/(3·5) + …)
 *
 * @param z  −6 to 6
 * @returns 0 to 1
 * @error absolute, below 1e-14
 * @source Abramowitz & Stegun (1964), Handbook of Mathematical Functions, 26.2.11
 * @example normalBelow(-1.96) // 0.024998
 */
export function normalBelow(z: number): number {
  let sum = 0
  let term = z
  for (let odd = 3; sum + term !== sum; odd += 2) {
    sum += term
    term *= (z * z) / odd
  }
  return 0.5 + (Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI)) * sum
}
