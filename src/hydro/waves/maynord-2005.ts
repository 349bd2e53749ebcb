import { GRAVITY } from '../constants.ts'
import { QUANTITIES } from '../quantity.ts'
import type { WaveMethod } from '../method.ts'
import {
  FAST_HULLS,
  fallingFirstSpeed,
  isPlaning,
  PLANING_MODE,
  quantities,
  SAILING_LINE_DISTANCE,
} from './shared.ts'

/** C for V-shaped hulls, dimensionless, the higher of two: 0.6 flat bottom, 0.8 V-hull (Maynord (2005), from memory). */
const HULL_COEFFICIENT = 0.8

/**
 * Highest wave of planing and semi-planing small boats.
 *
 *   H/W^(1/3) = 0.8 F_vol^(-0.58) (x/W^(1/3))^(-0.42), F_vol = V/√(g W^(1/3))
 *
 * @param speed     V, through the water, m/s, > 0
 * @param distance  x, from the sailing line, m, > 0
 * @param volume    W, displaced volume at rest, m³, > 0
 * @returns H, m; falls with speed
 * @holds see the range of `maynord2005`: boats on the plane alone
 * @error not recalled; the coefficient is recalled poorly, the exponents well
 * @source Maynord, S.T. (2005), Wave height from planing and semi-planing small boats, River Research and Applications
 *   21, 1-17 (from memory)
 * @example maynordWaveHeight(11, 30, 1.5) // 0.116575
 */
export function maynordWaveHeight(speed: number, distance: number, volume: number): number {
  const scale = Math.cbrt(volume)
  const froude = speed / Math.sqrt(GRAVITY * scale)
  return HULL_COEFFICIENT * scale * froude ** -0.58 * (distance / scale) ** -0.42
}

export const maynord2005: WaveMethod = {
  id: 'maynord-2005',
  kind: 'wave-height',
  name: 'Maynord, planing and semi-planing boats',
  law: 'H/W^(1/3) = 0.8 F_vol^(-0.58) (x/W^(1/3))^(-0.42) with F_vol = V/√(g W^(1/3))',
  quantities: quantities(SAILING_LINE_DISTANCE, {
    symbol: 'W',
    name: 'displaced volume at rest',
    unit: 'm3',
  }),
  range: [PLANING_MODE],
  hulls: FAST_HULLS,
  distanceFrom: 'sailing-line',
  nature: 'central',
  reference:
    'Maynord (2005), Wave height from planing and semi-planing small boats, River Research and Applications 21, 1-17',
  isFromMemory: true,
  version: '1',
  hasCoefficients: () => true,
  height: (setting, speed, distance) =>
    isPlaning(QUANTITIES.volume_froude_number.at(setting, speed))
      ? maynordWaveHeight(speed, distance, setting.volume)
      : NaN,
  firstSpeed(setting, height, distance, from) {
    return fallingFirstSpeed(maynordWaveHeight(from, distance, setting.volume), height, from)
  },
}
