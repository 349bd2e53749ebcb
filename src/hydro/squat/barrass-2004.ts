import { heldFor } from '../held.ts'
import { risingFirstSpeed, type SquatMethod } from '../method.ts'
import { KNOT } from './knot.ts'

const CONFINEMENT_FACTOR = 5.74 // dimensionless, Barrass (2004), from memory
const CONFINEMENT_EXPONENT = 0.76 // dimensionless, Barrass (2004), from memory
const OPEN_WATER_FACTOR = 1 // dimensionless, least K, reached at a blockage of 0.10 (Barrass 2004, from memory)
const CONFINED_FACTOR = 2 // dimensionless, greatest K, reached at a blockage of 0.25 (Barrass 2004, from memory)
const DIVISOR = 100 // kn² / m, Barrass (2004), from memory

/** Squat at one knot, m. */
const squatAtOneKnot = heldFor((setting) => {
  const K = CONFINEMENT_FACTOR * setting.blockage ** CONFINEMENT_EXPONENT
  return (Math.min(Math.max(K, OPEN_WATER_FACTOR), CONFINED_FACTOR) * setting.blockCoefficient) / DIVISOR
})

/**
 * Barrass (2004): greatest squat, with one factor that leads from open to confined water.
 *
 *   s = K C_B V_k² / 100,   K = 5.74 m^0.76 between 1 and 2
 */
export const barrass2004: SquatMethod = {
  id: 'barrass-2004',
  kind: 'squat',
  name: 'Barrass 2004',
  law: 's = K C_B V_k^2 / 100, with K = 5.74 m^0.76 held between 1 (open) and 2 (confined) and V_k the speed through the water in knots',
  quantities: [
    { symbol: 'C_B', name: 'block coefficient', unit: '1' },
    { symbol: 'm', name: 'blockage ratio', unit: '1' },
    { symbol: 'V_k', name: 'speed through the water', unit: 'kn' },
  ],
  range: [
    { quantity: 'block_coefficient', min: 0.5, max: 0.9 },
    { quantity: 'depth_to_draught_ratio', min: 1.1, max: 1.4 },
  ],
  hulls: ['displacement'],
  nature: 'envelope',
  reference:
    'Barrass, C.B. (2004) Thirty-two years of research into ship squat; as collected in PIANC WG121 (2014), Report 121, appendix D',
  isFromMemory: true,
  version: '1',
  squat(setting, speed) {
    const V_k = speed / KNOT
    return squatAtOneKnot(setting) * V_k * V_k
  },
  firstSpeed(setting, squat, from, to) {
    return risingFirstSpeed(KNOT * Math.sqrt(squat / squatAtOneKnot(setting)), from, to)
  },
}
