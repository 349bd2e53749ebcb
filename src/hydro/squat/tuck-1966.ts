import { risingFirstSpeed, type SquatMethod } from '../method.ts'
import { speedAtTuckTerm, tuckTerm } from './tuck.ts'

const SINKAGE_COEFFICIENT = 1.46 // dimensionless, c_z, Hooft (1974), from memory; 1.4 to 1.53 in print

/**
 * Tuck (1966): mean sinkage of a slender hull in shallow open water, with Hooft's coefficient.
 *
 *   s = 1.46 (vol/L²) F² / √(1 - F²)
 */
export const tuck1966: SquatMethod = {
  id: 'tuck-1966',
  kind: 'squat',
  name: 'Tuck 1966, mean sinkage',
  law: 's = 1.46 (vol/L^2) F_nh^2 / sqrt(1 - F_nh^2); mean sinkage, without trim; no value at F_nh >= 1',
  quantities: [
    { symbol: 'vol', name: 'displaced volume', unit: 'm3' },
    { symbol: 'L', name: 'waterline length', unit: 'm' },
    { symbol: 'F_nh', name: 'depth Froude number', unit: '1' },
  ],
  range: [{ quantity: 'depth_froude_number', max: 0.7 }],
  hulls: ['displacement'],
  channels: ['open'],
  nature: 'central',
  reference:
    'Tuck, E.O. (1966) Shallow-water flows past slender bodies, J. Fluid Mech. 26, 81-95; coefficient of Hooft, J.P. (1974) The behavior of a ship in head waves at restricted water depth',
  isFromMemory: true,
  version: '1',
  squat(setting, speed) {
    return SINKAGE_COEFFICIENT * tuckTerm(setting.volume, setting.length, setting.depth, speed)
  },
  firstSpeed(setting, squat, from, to) {
    const term = squat / SINKAGE_COEFFICIENT
    return risingFirstSpeed(speedAtTuckTerm(setting.volume, setting.length, setting.depth, term), from, to)
  },
}
