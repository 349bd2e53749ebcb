import { heldFor } from '../held.ts'
import { risingFirstSpeed, type SquatMethod } from '../method.ts'
import { KNOT } from './knot.ts'

const SPEED_EXPONENT = 2.08 // dimensionless, Barrass (1979), from memory
const BLOCKAGE_EXPONENT = 2 / 3 // dimensionless, Barrass (1979), from memory
const DIVISOR = 30 // kn^2.08 / m, Barrass (1979), from memory

/** Squat at one knot, m. */
const squatAtOneKnot = heldFor((setting) => {
  const velocityReturn = setting.blockage / (1 - setting.blockage)
  return (setting.blockCoefficient * velocityReturn ** BLOCKAGE_EXPONENT) / DIVISOR
})

/**
 * Barrass (1979): greatest squat from block coefficient, blockage and speed in knots.
 *
 *   s = C_B S2^(2/3) V_k^2.08 / 30,   S2 = m / (1 - m)
 */
export const barrass1979: SquatMethod = {
  id: 'barrass-1979',
  kind: 'squat',
  name: 'Barrass 1979',
  law: 's = C_B S2^(2/3) V_k^2.08 / 30, with S2 = m/(1 - m) and V_k the speed through the water in knots',
  quantities: [
    { symbol: 'C_B', name: 'block coefficient', unit: '1' },
    { symbol: 'm', name: 'blockage ratio', unit: '1' },
    { symbol: 'V_k', name: 'speed through the water', unit: 'kn' },
  ],
  range: [
    { quantity: 'block_coefficient', min: 0.5, max: 0.9 },
    { quantity: 'blockage_ratio', min: 0.1, max: 0.265 },
    { quantity: 'depth_to_draught_ratio', min: 1.1, max: 1.4 },
  ],
  hulls: ['displacement'],
  channels: ['confined'],
  nature: 'envelope',
  reference:
    'Barrass, C.B. (1979) The phenomena of ship squat, International Shipbuilding Progress 26; as collected in PIANC WG121 (2014), Report 121, appendix D',
  isFromMemory: true,
  version: '1',
  squat(setting, speed) {
    return squatAtOneKnot(setting) * (speed / KNOT) ** SPEED_EXPONENT
  },
  firstSpeed(setting, squat, from, to) {
    return risingFirstSpeed(KNOT * (squat / squatAtOneKnot(setting)) ** (1 / SPEED_EXPONENT), from, to)
  },
}
