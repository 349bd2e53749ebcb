import { GRAVITY } from '../constants.ts'
import { risingFirstSpeed, type WaveMethod } from '../method.ts'
import { quantities, SAILING_LINE_DISTANCE } from './shared.ts'

/** K_w, bow wave over the velocity head per B/Le, dimensionless (Saunders (1957), from memory). */
const BOW_COEFFICIENT = 1.133
/** Distance of the first cusp from the sailing line over V²/g: π/√3, exact for deep water. */
const FIRST_CUSP = Math.PI / Math.sqrt(3)

/**
 * Bow wave of large sea-going hulls, carried to a distance along the cusp line.
 *
 *   H_0 = 1.133 (B/Le) V²/2g;  H = H_0 (y_0/y)^(1/3), y_0 = (π/√3) V²/g, never above H_0
 *
 * @param speed           V, through the water, m/s, > 0
 * @param beam            B, m, > 0
 * @param entranceLength  Le, m, > 0
 * @param distance        y, from the sailing line, m, > 0
 * @returns H, m
 * @holds see the range of `gatesHerbich1977`
 * @error not reported; made for deep water
 * @source Gates, E.T. & Herbich, J.B. (1977), TAMU-SG-77-206; bow coefficient: Saunders, H.E. (1957), Hydrodynamics in
 *   Ship Design, vol. 2 (both from memory)
 * @example gatesHerbichWaveHeight(5, 20, 40, 50) // 0.326539
 */
export function gatesHerbichWaveHeight(
  speed: number,
  beam: number,
  entranceLength: number,
  distance: number,
): number {
  const v2g = (speed * speed) / GRAVITY
  const bow = ((BOW_COEFFICIENT * beam) / entranceLength) * (v2g / 2)
  return bow * Math.min(1, Math.cbrt((FIRST_CUSP * v2g) / distance))
}

export const gatesHerbich1977: WaveMethod = {
  id: 'gates-herbich-1977',
  kind: 'wave-height',
  name: 'Gates & Herbich, bow wave at a distance',
  law: 'H_0 = 1.133 (B/Le) V²/2g; H = H_0 (y_0/y)^(1/3) with y_0 = (π/√3) V²/g, never above H_0',
  quantities: quantities(
    SAILING_LINE_DISTANCE,
    { symbol: 'B', name: 'beam', unit: 'm' },
    { symbol: 'Le', name: 'entrance length', unit: 'm' },
  ),
  // sea-going size is an own choice: the source speaks of large deep-draught ships
  range: [
    { quantity: 'depth_froude_number', max: 0.7 },
    { quantity: 'length_m', min: 130 },
    { quantity: 'draught_m', min: 7 },
  ],
  hulls: ['displacement'],
  distanceFrom: 'sailing-line',
  nature: 'central',
  reference:
    'Gates & Herbich (1977), Mathematical model to predict the behavior of deep-draft vessels in restricted waterways, TAMU-SG-77-206; Saunders (1957), Hydrodynamics in Ship Design, vol. 2',
  isFromMemory: true,
  version: '1',
  hasCoefficients: () => true,
  height: (setting, speed, distance) =>
    gatesHerbichWaveHeight(speed, setting.beam, setting.entranceLength, distance),
  firstSpeed(setting, height, distance, from, to) {
    // H = c v2g min(1, (k v2g/y)^(1/3)): whichever form is the lower is reached at the higher speed
    const c = (BOW_COEFFICIENT * setting.beam) / setting.entranceLength / 2
    const atBow = height / c
    const decayed = (atBow * atBow * atBow * distance) / FIRST_CUSP
    const v2g = Math.max(atBow, Math.sqrt(Math.sqrt(decayed)))
    return risingFirstSpeed(Math.sqrt(GRAVITY * v2g), from, to)
  },
}
