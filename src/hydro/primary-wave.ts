import { GRAVITY } from './constants.ts'
import { CORRECTION_AT_REST, correctionFactor, flowRatio, supercriticalFlowRatio } from './flow-ratio.ts'
import { heldAt } from './held.ts'
import { risingRoot } from './root.ts'
import type { Setting } from './setting.ts'
import { smoothstep } from './smoothstep.ts'

/** Steps in which the way up to the critical speed is searched for a return current. */
const RISE_STEPS = 32

const meanWaveSpeed = (setting: Setting): number => Math.sqrt(GRAVITY * setting.meanDepth)

/** Whether the flow past the hull is steady at a speed: up to the critical speed, and again above the upper limit. */
export function isSteady(setting: Setting, speed: number): boolean {
  return speed <= setting.criticalSpeed || speed > setting.supercriticalOnset
}

/** w at a speed, NaN where no steady flow exists. */
const flowRatioAt = heldAt((setting: Setting, speed: number): number => {
  const froude = speed / meanWaveSpeed(setting)
  if (speed <= setting.criticalSpeed) {
    const alpha = correctionFactor(setting.correctionShare, speed / setting.criticalSpeed)
    return flowRatio(froude, setting.blockage, alpha)
  }
  return speed > setting.supercriticalOnset ? supercriticalFlowRatio(froude, setting.blockage) : NaN
})

/**
 * Mean return current beside the hull.
 *
 *   U_r = V (w - 1)
 *
 * @param setting  the vessel in its section
 * @param speed    V, through the water, m/s, > 0
 * @returns m/s, against the hull's course; negative (with it) above the upper limit; NaN where no steady flow exists
 * @holds b_w/B 2 to 12, A_c/A_m 3 to 35; outside the same law stands with alpha_s faded to 1
 * @error none reported for the law; Almstrom & Larson (2020), JMSE 8(10) 743: no published drawdown law satisfies
 *   in wide water
 * @source Schijf (1949); Rock Manual C683 (2007), 4.3.4 (from memory)
 */
export function returnCurrent(setting: Setting, speed: number): number {
  return (flowRatioAt(setting, speed) - 1) * speed
}

/**
 * Mean drawdown beside the hull.
 *
 *   dh = (V²/2g) (alpha_s w² - 1)
 *
 * @param setting  the vessel in its section
 * @param speed    V, through the water, m/s, > 0
 * @returns m; negative (a rise) above the upper limit; NaN where no steady flow exists
 * @holds as `returnCurrent`
 * @error as `returnCurrent`
 * @source as `returnCurrent`
 */
export function meanDrawdown(setting: Setting, speed: number): number {
  const w = flowRatioAt(setting, speed)
  const alpha =
    speed <= setting.criticalSpeed
      ? correctionFactor(setting.correctionShare, speed / setting.criticalSpeed)
      : 1
  return ((speed * speed) / (2 * GRAVITY)) * (alpha * w * w - 1)
}

/**
 * Speed at which the mean drawdown reaches a value on the way up, by the inverse in closed form: with w = 1/(1 - m - z),
 * 2 z = a F² - c F³, a = (1 + 0.4 r) w² - 1, c = 0.4 r w²/F_L.
 *
 * @param setting   the vessel in its section, confined
 * @param drawdown  dh, m, > 0
 * @returns V, m/s; the critical speed when the drawdown is not reached below it
 * @holds as `meanDrawdown`
 * @error exact within rounding
 * @source as `meanDrawdown`
 */
export function speedAtDrawdown(setting: Setting, drawdown: number): number {
  const critical = setting.criticalSpeed
  const z = drawdown / setting.meanDepth
  const w = 1 / (1 - setting.blockage - z)
  const celerity = meanWaveSpeed(setting)
  const c = (CORRECTION_AT_REST * setting.correctionShare * w * w * celerity) / critical
  const a = (1 + CORRECTION_AT_REST * setting.correctionShare) * w * w - 1
  // smallest positive F of c F³ - a F² + 2 z = 0 by y = 1/F; NaN when there is none
  const third = a / (6 * z)
  const sine = c / (4 * z * third * Math.sqrt(third))
  const y = 2 * Math.sqrt(third) * Math.sin((Math.PI - Math.asin(sine)) / 3)
  const speed = celerity / y
  if (!(w > 0 && speed < critical)) return critical
  // beyond the turn alpha F² w³ = 1 the same drawdown belongs to the flow that does not occur
  const scale = correctionFactor(setting.correctionShare, speed / critical) * (w / y) ** 2
  return scale * w > 1 ? critical : speed
}

/**
 * Speed at which the mean return current reaches a value on the way up: the root of a quadratic without alpha_s, found
 * by iteration with it.
 *
 * @param setting  the vessel in its section, confined
 * @param current  U_r, m/s, > 0
 * @returns V, m/s; the critical speed when the current is not reached below it
 * @holds as `returnCurrent`
 * @error 4 units in the last place
 * @source as `returnCurrent`
 */
export function speedAtReturnCurrent(setting: Setting, current: number): number {
  const critical = setting.criticalSpeed
  if (setting.correctionShare > 0) return correctedSpeedAtReturnCurrent(setting, current)
  if (!(returnCurrent(setting, critical) > current)) return critical
  const celerity = meanWaveSpeed(setting)
  const u = current / celerity
  const b = setting.blockage + 1.5 * u * u
  const c = u * (1 - setting.blockage - (u * u) / 2)
  // u v² + b v - u (1 - m - u²/2) = 0, in the form that does not cancel
  return Math.min(critical, (celerity * 2 * c) / (b + Math.sqrt(b * b + 4 * u * c)))
}

/**
 * The same with alpha_s. Where √(g h) is the critical speed, below the limit of Schijf, alpha_s falls faster than the
 * flow grows and the current may sink again by 1 % before that speed: the crossing is looked for on the way up.
 */
function correctedSpeedAtReturnCurrent(setting: Setting, current: number): number {
  const critical = setting.criticalSpeed
  const excess = (v: number): number => returnCurrent(setting, v) - current
  const low = critical * 1e-9
  let before = -Infinity
  for (let i = 1; i <= RISE_STEPS; i += 1) {
    const speed = (critical * i) / RISE_STEPS
    const value = excess(speed)
    const isPastHump = value < before || i === RISE_STEPS
    const top = value > 0 || !isPastHump ? speed : highest(excess, (critical * (i - 2)) / RISE_STEPS, speed)
    if (excess(top) > 0) return risingRoot(excess, low, top)
    before = value
  }
  return critical
}

/** Where a function with one hump between two points is highest, to 1e-8 of their distance, by golden sections. */
function highest(f: (x: number) => number, low: number, high: number): number {
  let a = low
  let b = high
  while (b - a > 1e-8 * (high - low)) {
    const x = a + 0.382 * (b - a)
    const y = b - 0.382 * (b - a)
    if (f(x) > f(y)) b = y
    else a = x
  }
  return b
}

/** Factors by which the mean drawdown and return current grow on the side of the nearer bank. */
export interface SideFactors {
  drawdown: number
  returnCurrent: number
}

/**
 * Growth of drawdown and return current between an eccentric hull and the nearer bank.
 *
 *   dh_max/dh = 1 + (2 + 2 s) A_w*,  U_max/U = 1 + (1 + 2 s) A_w*,  s = S((b_w/L - 1.25)/0.5)
 *
 * @param eccentricity   A_w* = y_e h/A_e, dimensionless, ≥ 0; 0 on the axis
 * @param widthToLength  b_w/L, > 0
 * @returns both factors, ≥ 1
 * @holds the published factors are 2 and 1 below b_w/L = 1.5, 4 and 3 above; blended here over 1.25 to 1.75
 * @error the blend is an own choice; the factors: not reported
 * @source Rock Manual C683 (2007), 4.3.4 (from memory); blend: own choice
 * @example eccentricityFactors(0.2, 1).drawdown // 1.4
 */
export function eccentricityFactors(eccentricity: number, widthToLength: number): SideFactors {
  const s = smoothstep((widthToLength - 1.25) / 0.5)
  return {
    drawdown: 1 + (2 + 2 * s) * eccentricity,
    returnCurrent: 1 + (1 + 2 * s) * eccentricity,
  }
}

/** Front wave over the mean drawdown, and transversal stern wave over the greatest (same source). */
const FRONT_WAVE_SHARE = 0.1
const STERN_WAVE_FACTOR = 1.5

/**
 * Front wave.
 *
 *   dh_f = 0.1 dh + dh_max
 *
 * @param drawdown     dh, mean, m, ≥ 0
 * @param drawdownMax  dh_max at the bank, m, ≥ 0
 * @returns m
 * @holds as `meanDrawdown`
 * @error not reported
 * @source Rock Manual C683 (2007), 4.3.4 (from memory)
 * @example frontWaveHeight(0.2, 0.3) // 0.32
 */
export function frontWaveHeight(drawdown: number, drawdownMax: number): number {
  return FRONT_WAVE_SHARE * drawdown + drawdownMax
}

/**
 * Transversal stern wave.
 *
 *   z_max = 1.5 dh_max
 *
 * @param drawdownMax  dh_max at the bank, m, ≥ 0
 * @returns m
 * @holds as `meanDrawdown`
 * @error not reported; a field survey found predictions of this kind above what was measured
 * @source Rock Manual C683 (2007), 4.3.4 (from memory)
 * @example sternWaveHeight(0.2) // 0.3
 */
export function sternWaveHeight(drawdownMax: number): number {
  return STERN_WAVE_FACTOR * drawdownMax
}

/**
 * Greatest drawdown that gives a stern wave of a height: the inverse of `sternWaveHeight`, m.
 *
 * @example drawdownOfSternWave(0.3) // 0.2
 */
export function drawdownOfSternWave(height: number): number {
  return height / STERN_WAVE_FACTOR
}
