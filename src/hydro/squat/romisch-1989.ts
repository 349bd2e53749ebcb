import { GRAVITY } from '../constants.ts'
import { heldFor } from '../held.ts'
import { risingFirstSpeed, type SquatMethod } from '../method.ts'
import type { Setting } from '../setting.ts'

// Roemisch (1989), from memory
const OPEN_COEFFICIENT = 0.58 // dimensionless, K_U
const OPEN_EXPONENT = 0.125 // dimensionless, K_U
const SPEED_FACTOR = 8 // dimensionless, C_V
const SPEED_CENTRE = 0.5 // dimensionless, C_V
const SPEED_OFFSET = 0.0625 // dimensionless, C_V
const BOW_FACTOR = 10 // dimensionless, C_F
const DRAUGHT_FACTOR = 0.155 // dimensionless, K_dT

/** Share by which a squat is below a bound whatever rounding does. */
const SURELY_BELOW = 1e-9 // dimensionless

/** Steps after which bisection alone would have reached the last bit. */
const MOST_STEPS = 60

/**
 * Critical speed of Roemisch: the speed by which his squat law scales.
 *
 *   open:     V_cr = 0.58 (h/T · L/B)^0.125 √(g h)
 *   confined: V_cr = (2 cos(π/3 + acos(1 - m)/3))^1.5 √(g h_m)
 *
 * The confined coefficient is Schijf's limit Froude number.
 *
 * @param setting  h, h_m in m; T, L, B in m; m, dimensionless; which of the two by `isConfined`
 * @returns V_cr, m/s, > 0
 * @holds as the law `romisch-1989`
 * @error exact within rounding
 * @source Roemisch (1989), as collected in PIANC WG121 (2014), Report 121, appendix D, from memory
 * @example romischCriticalSpeed({ isConfined: true, meanDepth: 14.4, blockage: 0.1756 }) // 6.0119
 */
export function romischCriticalSpeed(
  setting: Pick<Setting, 'isConfined' | 'depth' | 'meanDepth' | 'blockage' | 'draught' | 'length' | 'beam'>,
): number {
  if (setting.isConfined) {
    const K_C = (2 * Math.cos((Math.PI + Math.acos(1 - setting.blockage)) / 3)) ** 1.5
    return K_C * Math.sqrt(GRAVITY * setting.meanDepth)
  }
  const shape = (setting.depth / setting.draught) * (setting.length / setting.beam)
  return OPEN_COEFFICIENT * shape ** OPEN_EXPONENT * Math.sqrt(GRAVITY * setting.depth)
}

/** The same, for as long as one setting is asked about. */
export const heldCriticalSpeed = heldFor(romischCriticalSpeed)

/** Greater of bow and stern squat at V = V_cr, m: there C_V is 1. */
const squatAtCriticalSpeed = heldFor((setting) => {
  const bow = (BOW_FACTOR * setting.blockCoefficient * (setting.beam / setting.length)) ** 2
  const K_dT = DRAUGHT_FACTOR * Math.sqrt(setting.depth / setting.draught)
  return Math.max(bow, 1) * K_dT * setting.draught
})

/** C_V at r = V/V_cr; it rises throughout. */
function speedCoefficient(r: number): number {
  const d = r - SPEED_CENTRE
  return SPEED_FACTOR * r * r * (d ** 4 + SPEED_OFFSET)
}

/** r at which C_V takes the value `c`: Newton's method on C_V between bounds, halving where a step leaves them. */
function speedRatio(c: number): number {
  // r²/2 ≤ C_V throughout, C_V ≤ r² up to r = 1 and ≥ r² beyond
  const root = Math.sqrt(c)
  let low = Math.min(root, 1)
  let high = c < 1 ? Math.SQRT2 * root : root
  let r = low
  for (let step = 0; step < MOST_STEPS; step += 1) {
    const miss = speedCoefficient(r) - c
    if (miss > 0) high = r
    else low = r
    const d = r - SPEED_CENTRE
    const slope = SPEED_FACTOR * r * (2 * (d ** 4 + SPEED_OFFSET) + 4 * r * d ** 3)
    const newton = r - miss / slope
    const next = newton >= low && newton <= high ? newton : (low + high) / 2
    if (Math.abs(next - r) <= 2 * Number.EPSILON * r) return next
    r = next
  }
  return r
}

/**
 * Roemisch (1989): greater of bow and stern squat, as a function of the share of his critical speed.
 *
 *   s = C_V max(C_F, 1) K_dT T
 *   C_V = 8 r² ((r - 0.5)⁴ + 0.0625),  r = V/V_cr;   C_F = (10 C_B B/L)²;   K_dT = 0.155 √(h/T)
 */
export const romisch1989: SquatMethod = {
  id: 'romisch-1989',
  kind: 'squat',
  name: 'Roemisch 1989',
  law: 's = C_V max(C_F, 1) K_dT T, with C_V = 8 r^2 ((r - 0.5)^4 + 0.0625), r = V/V_cr, C_F = (10 C_B B/L)^2, K_dT = 0.155 sqrt(h/T); open: V_cr = 0.58 (h/T L/B)^0.125 sqrt(g h); confined: V_cr = (2 cos(pi/3 + acos(1 - m)/3))^1.5 sqrt(g h_m)',
  quantities: [
    { symbol: 'C_B', name: 'block coefficient', unit: '1' },
    { symbol: 'h', name: 'depth at the sailing line', unit: 'm' },
    { symbol: 'h_m', name: 'mean depth', unit: 'm' },
    { symbol: 'm', name: 'blockage ratio', unit: '1' },
    { symbol: 'L', name: 'waterline length', unit: 'm' },
    { symbol: 'B', name: 'beam', unit: 'm' },
    { symbol: 'T', name: 'draught', unit: 'm' },
    { symbol: 'V', name: 'speed through the water', unit: 'm/s' },
  ],
  range: [
    { quantity: 'depth_to_draught_ratio', min: 1.19, max: 2.25 },
    { quantity: 'romisch_speed_ratio', max: 1 },
  ],
  hulls: ['displacement'],
  nature: 'central',
  reference:
    'Roemisch, K. (1989) Empfehlungen zur Bemessung von Hafeneinfahrten, Wasserbauliche Mitteilungen der Technischen Universitaet Dresden 1; as collected in PIANC WG121 (2014), Report 121, appendix D',
  isFromMemory: true,
  version: '1',
  squat(setting, speed) {
    return squatAtCriticalSpeed(setting) * speedCoefficient(speed / heldCriticalSpeed(setting))
  },
  firstSpeed(setting, squat, from, to) {
    const c = squat / squatAtCriticalSpeed(setting)
    const criticalSpeed = heldCriticalSpeed(setting)
    // the way to the root is spared where the end is clearly below it
    if (speedCoefficient(to / criticalSpeed) < c * (1 - SURELY_BELOW)) return Infinity
    return risingFirstSpeed(speedRatio(c) * criticalSpeed, from, to)
  },
}
