import { GRAVITY } from '../constants.ts'
import { heldFor } from '../held.ts'
import { risingFirstSpeed, type SquatMethod } from '../method.ts'

// Yoshimura (1986), from memory
const BASE = 0.7 // dimensionless
const DRAUGHT_SLOPE = 1.5 // dimensionless
const CUBIC = 15 // dimensionless

/** Squat over V_e²/g, dimensionless. */
const squatNumber = heldFor((setting) => {
  const T_h = setting.draught / setting.depth
  const fullness = (setting.blockCoefficient * setting.beam) / setting.length
  return (BASE + DRAUGHT_SLOPE * T_h) * fullness + CUBIC * T_h * fullness ** 3
})

/**
 * Yoshimura (1986), with the speed of Ohtsu et al. (2006) for confined water: bow squat.
 *
 *   s = ((0.7 + 1.5 T/h) φ + 15 (T/h) φ³) V_e²/g,   φ = C_B B/L,   V_e = V/(1 - m)
 */
export const yoshimura1986: SquatMethod = {
  id: 'yoshimura-1986',
  kind: 'squat',
  name: 'Yoshimura 1986',
  law: 's = ((0.7 + 1.5 T/h) (C_B B/L) + 15 (T/h) (C_B B/L)^3) V_e^2/g, with V_e = V/(1 - m)',
  quantities: [
    { symbol: 'C_B', name: 'block coefficient', unit: '1' },
    { symbol: 'h', name: 'depth at the sailing line', unit: 'm' },
    { symbol: 'L', name: 'waterline length', unit: 'm' },
    { symbol: 'B', name: 'beam', unit: 'm' },
    { symbol: 'T', name: 'draught', unit: 'm' },
    { symbol: 'm', name: 'blockage ratio', unit: '1' },
    { symbol: 'V', name: 'speed through the water', unit: 'm/s' },
  ],
  range: [
    { quantity: 'block_coefficient', min: 0.55, max: 0.8 },
    { quantity: 'beam_to_draught_ratio', min: 2.5, max: 5.5 },
    { quantity: 'length_to_beam_ratio', min: 3.7, max: 6 },
    { quantity: 'depth_to_draught_ratio', min: 1.2 },
  ],
  hulls: ['displacement'],
  nature: 'central',
  reference:
    'Yoshimura, Y. (1986) and, for confined water, Ohtsu et al. (2006); as collected in PIANC WG121 (2014), Report 121, appendix D',
  isFromMemory: true,
  version: '1',
  squat(setting, speed) {
    const V_e = speed / (1 - setting.blockage)
    return (squatNumber(setting) * V_e * V_e) / GRAVITY
  },
  firstSpeed(setting, squat, from, to) {
    const V_e = Math.sqrt((GRAVITY * squat) / squatNumber(setting))
    return risingFirstSpeed(V_e * (1 - setting.blockage), from, to)
  },
}
