import { GRAVITY } from '../constants.ts'
import { heldFor } from '../held.ts'
import { risingFirstSpeed, type SquatMethod } from '../method.ts'

// Eryuzlu, Cao & D'Agnolo (1994), from memory
const COEFFICIENT = 0.298 // dimensionless
const SPEED_EXPONENT = 2.289 // dimensionless
const DEPTH_EXPONENT = -2.972 // dimensionless
const WIDTH_FACTOR = 3.1 // dimensionless, of K_b
const WIDE_CHANNEL = 9.61 // dimensionless, W/B from which K_b is 1

/** Squat at V = √(g T), m. */
const squatAtUnitSpeed = heldFor((setting) => {
  const h = setting.depth
  const T = setting.draught
  const widthRatio = setting.effectiveWidth / setting.beam
  const K_b = widthRatio < WIDE_CHANNEL ? WIDTH_FACTOR / Math.sqrt(widthRatio) : 1
  return COEFFICIENT * ((h * h) / T) * (h / T) ** DEPTH_EXPONENT * K_b
})

/**
 * Eryuzlu, Cao & D'Agnolo (1994): bow squat of full ships in open and dredged channels.
 *
 *   s = 0.298 (h²/T) (V/√(g T))^2.289 (h/T)^-2.972 K_b,   K_b = 3.1/√(W/B) for W/B < 9.61, else 1
 */
export const eryuzlu1994: SquatMethod = {
  id: 'eryuzlu-1994',
  kind: 'squat',
  name: "Eryuzlu, Cao and D'Agnolo 1994",
  law: 's = 0.298 (h^2/T) (V/sqrt(g T))^2.289 (h/T)^-2.972 K_b, with K_b = 3.1/sqrt(W/B) below W/B = 9.61, else 1; W is the effective strip',
  quantities: [
    { symbol: 'h', name: 'depth at the sailing line', unit: 'm' },
    { symbol: 'T', name: 'draught', unit: 'm' },
    { symbol: 'V', name: 'speed through the water', unit: 'm/s' },
    { symbol: 'W', name: 'effective width of the channel', unit: 'm' },
    { symbol: 'B', name: 'beam', unit: 'm' },
  ],
  range: [
    { quantity: 'block_coefficient', min: 0.8 },
    { quantity: 'beam_to_draught_ratio', min: 2.4, max: 2.9 },
    { quantity: 'length_to_beam_ratio', min: 6.7, max: 6.8 },
    { quantity: 'depth_to_draught_ratio', min: 1.1, max: 2.5 },
  ],
  hulls: ['displacement'],
  nature: 'central',
  reference:
    "Eryuzlu, N.E., Cao, Y.L. and D'Agnolo, F. (1994) Underkeel requirements for large vessels in shallow waterways, 28th PIANC Congress, Seville",
  isFromMemory: true,
  version: '1',
  squat(setting, speed) {
    return squatAtUnitSpeed(setting) * (speed / Math.sqrt(GRAVITY * setting.draught)) ** SPEED_EXPONENT
  },
  firstSpeed(setting, squat, from, to) {
    const ratio = (squat / squatAtUnitSpeed(setting)) ** (1 / SPEED_EXPONENT)
    return risingFirstSpeed(ratio * Math.sqrt(GRAVITY * setting.draught), from, to)
  },
}
