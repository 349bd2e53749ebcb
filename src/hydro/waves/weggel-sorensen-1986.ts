import { GRAVITY } from '../constants.ts'
import { risingFirstSpeed, type WaveMethod } from '../method.ts'
import { DEPTH_CAP_FROUDE } from '../quantity.ts'
import { risingRoot } from '../root.ts'
import type { Setting } from '../setting.ts'
import {
  ALL_HULLS,
  DEPTH_QUANTITY,
  DISPLACEMENT_MODE,
  quantities,
  SAILING_LINE_DISTANCE,
  SUBCRITICAL,
} from './shared.ts'

/** Depth Froude number at which the coefficients change (Weggel & Sorensen (1986), from memory). */
const CHANGE = 0.55

/**
 * Secondary waves by Weggel & Sorensen, with the depth capped where the law would grow without bound.
 *
 *   H* = a x*^n, n = b d*^e, log10 a = A + B log10 d* + C (log10 d*)²
 *   A = -0.6/F, B = 0.75 F^(-1.125), C = 2.653 F - 1.95
 *   F < 0.55: b = -0.225 F^(-0.699), e = -0.118 F^(-0.356); else b = -0.342, e = -0.146
 *   lengths over W^(1/3); d_e = min(h, V²/(0.42² g)) in place of the depth throughout
 *
 * @param speed     V, through the water, m/s, > 0
 * @param depth     h, m, > 0
 * @param volume    W, displaced volume at rest, m³, > 0
 * @param distance  x, from the sailing line, m, > 0
 * @returns H, m
 * @holds see the range of `weggelSorensen1986`
 * @error factor 1.5 to 2; conservative beside other laws and measurements (National Park Service, Glacier Bay EIS)
 * @source Weggel, J.R. & Sorensen, R.M. (1986), Ship wave prediction for port and channel design, Ports '86, ASCE,
 *   pp. 797-814 (from memory); the depth cap is an own choice
 * @example weggelSorensenWaveHeight(3.5, 5, 100, 30) // 0.168144
 */
export function weggelSorensenWaveHeight(
  speed: number,
  depth: number,
  volume: number,
  distance: number,
): number {
  const scale = Math.cbrt(volume)
  const capped = (speed * speed) / (DEPTH_CAP_FROUDE * DEPTH_CAP_FROUDE * GRAVITY)
  const effective = capped < depth ? capped : depth
  const f = capped < depth ? DEPTH_CAP_FROUDE : speed / Math.sqrt(GRAVITY * depth)
  const log = Math.log10(effective / scale)
  const b = f < CHANGE ? -0.225 * f ** -0.699 : -0.342
  const e = f < CHANGE ? -0.118 * f ** -0.356 : -0.146
  const n = b * 10 ** (e * log)
  const logA = -0.6 / f + 0.75 * f ** -1.125 * log + (2.653 * f - 1.95) * log * log
  return scale * 10 ** (logA + n * Math.log10(distance / scale))
}

/** Where the law exceeds a height within one of its pieces, in which it rises. */
function firstSpeedInPiece(
  setting: Setting,
  height: number,
  distance: number,
  from: number,
  to: number,
): number {
  if (!(from < to)) return Infinity
  const excess = (speed: number): number =>
    Math.log(weggelSorensenWaveHeight(speed, setting.depth, setting.volume, distance) / height)
  const justAbove = from * (1 + 4 * Number.EPSILON)
  if (justAbove > 0 && excess(justAbove) > 0) return from
  if (!(excess(to) > 0)) return Infinity
  // far below any height of interest, and above zero, where the logarithm has no value
  const low = Math.max(
    justAbove,
    Math.min(0.1 * DEPTH_CAP_FROUDE * Math.sqrt(GRAVITY * setting.depth), to / 2),
  )
  return risingFirstSpeed(excess(low) > 0 ? low : risingRoot(excess, low, to), from, to)
}

export const weggelSorensen1986: WaveMethod = {
  id: 'weggel-sorensen-1986',
  kind: 'wave-height',
  name: 'Weggel & Sorensen, secondary waves',
  law: 'H* = a x*^n with lengths over the cube root of the displaced volume, a and n functions of depth and depth Froude number; effective depth min(h, V²/(0.42² g))',
  quantities: quantities(DEPTH_QUANTITY, SAILING_LINE_DISTANCE, {
    symbol: 'W',
    name: 'displaced volume at rest',
    unit: 'm3',
  }),
  range: [SUBCRITICAL, { quantity: 'effective_relative_depth', min: 0.4, max: 8 }, DISPLACEMENT_MODE],
  hulls: ALL_HULLS,
  distanceFrom: 'sailing-line',
  nature: 'central',
  reference:
    "Weggel & Sorensen (1986), Ship wave prediction for port and channel design, Ports '86, ASCE, pp. 797-814; cap of the depth: own choice",
  isFromMemory: true,
  version: '1',
  hasCoefficients: () => true,
  height: (setting, speed, distance) =>
    weggelSorensenWaveHeight(speed, setting.depth, setting.volume, distance),
  stepSpeed: (setting) => CHANGE * Math.sqrt(GRAVITY * setting.depth) * (1 - 4 * Number.EPSILON),
  firstSpeed(setting, height, distance, from, to) {
    // three pieces: depth capped, first and second set of coefficients (the law falls by up to 0.3 % at the change)
    const celerity = Math.sqrt(GRAVITY * setting.depth)
    let start = from
    for (const end of [DEPTH_CAP_FROUDE * celerity, CHANGE * celerity * (1 - Number.EPSILON), to]) {
      const stop = Math.min(end, to)
      const speed = firstSpeedInPiece(setting, height, distance, start, stop)
      if (speed < Infinity) return speed
      start = Math.max(start, stop)
    }
    return Infinity
  },
}
