import { GRAVITY } from './constants.ts'
import { heldFor } from './held.ts'
import type { Setting } from './setting.ts'
import { heldCriticalSpeed } from './squat/romisch-1989.ts'

/** What the ranges of validity are stated in. */
export type QuantityName =
  | 'depth_froude_number'
  | 'volume_froude_number'
  | 'effective_relative_depth'
  | 'critical_ratio'
  | 'romisch_speed_ratio'
  | 'length_m'
  | 'draught_m'
  | 'block_coefficient'
  | 'depth_to_draught_ratio'
  | 'beam_to_draught_ratio'
  | 'length_to_beam_ratio'
  | 'blockage_ratio'

/** A quantity of a setting; one that depends on speed rises with it, and is stated by the speed at which it is reached. */
export interface Quantity {
  at(setting: Setting, speed: number): number
  /** speed at which the quantity first takes `value`, Infinity when never; absent when speed plays no part */
  speedAt?(setting: Setting, value: number): number
}

/** Depth Froude number below which `weggel-sorensen-1986` takes less than the whole depth (own choice, see that method). */
export const DEPTH_CAP_FROUDE = 0.42

const shallowWaveSpeed = (setting: Setting): number => Math.sqrt(GRAVITY * setting.depth)
/** Edge of the cube of the displaced volume, m. */
const volumeLength = heldFor((setting) => Math.cbrt(setting.volume))
const volumeWaveSpeed = (setting: Setting): number => Math.sqrt(GRAVITY * volumeLength(setting))

/** d_e = min(h, V²/(0.42² g)), the depth that `weggel-sorensen-1986` is evaluated at, m. */
function effectiveDepth(setting: Setting, speed: number): number {
  return Math.min(setting.depth, speed ** 2 / (DEPTH_CAP_FROUDE ** 2 * GRAVITY))
}

export const QUANTITIES: Readonly<Record<QuantityName, Quantity>> = {
  depth_froude_number: {
    at: (setting, speed) => speed / shallowWaveSpeed(setting),
    speedAt: (setting, value) => value * shallowWaveSpeed(setting),
  },
  volume_froude_number: {
    at: (setting, speed) => speed / volumeWaveSpeed(setting),
    speedAt: (setting, value) => value * volumeWaveSpeed(setting),
  },
  effective_relative_depth: {
    at: (setting, speed) => effectiveDepth(setting, speed) / volumeLength(setting),
    speedAt: (setting, value) =>
      value <= setting.depth / volumeLength(setting)
        ? DEPTH_CAP_FROUDE * Math.sqrt(value * GRAVITY * volumeLength(setting))
        : Infinity,
  },
  critical_ratio: {
    at: (setting, speed) => speed / setting.criticalSpeed,
    speedAt: (setting, value) => value * setting.criticalSpeed,
  },
  romisch_speed_ratio: {
    at: (setting, speed) => speed / heldCriticalSpeed(setting),
    speedAt: (setting, value) => value * heldCriticalSpeed(setting),
  },
  length_m: { at: (setting) => setting.length },
  draught_m: { at: (setting) => setting.draught },
  block_coefficient: { at: (setting) => setting.blockCoefficient },
  depth_to_draught_ratio: { at: (setting) => setting.depth / setting.draught },
  beam_to_draught_ratio: { at: (setting) => setting.beam / setting.draught },
  length_to_beam_ratio: { at: (setting) => setting.length / setting.beam },
  blockage_ratio: { at: (setting) => setting.blockage },
}
