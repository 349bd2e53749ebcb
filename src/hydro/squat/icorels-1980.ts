import { risingFirstSpeed, type SquatMethod } from '../method.ts'
import { speedAtTuckTerm, tuckTerm } from './tuck.ts'

const BOW_COEFFICIENT = 2.4 // dimensionless, ICORELS (1980), from memory; kept for every block coefficient

/**
 * ICORELS (1980): bow squat in open water.
 *
 *   s = 2.4 (vol/L²) F² / √(1 - F²)
 */
export const icorels1980: SquatMethod = {
  id: 'icorels-1980',
  kind: 'squat',
  name: 'ICORELS 1980',
  law: 's = 2.4 (vol/L^2) F_nh^2 / sqrt(1 - F_nh^2), with 2.4 for every block coefficient; no value at F_nh >= 1',
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
    'ICORELS (1980) International Commission for the Reception of Large Ships, supplement to PIANC Bulletin 35; as collected in PIANC WG121 (2014), Report 121, appendix D',
  isFromMemory: true,
  version: '1',
  squat(setting, speed) {
    return BOW_COEFFICIENT * tuckTerm(setting.volume, setting.length, setting.depth, speed)
  },
  firstSpeed(setting, squat, from, to) {
    const term = squat / BOW_COEFFICIENT
    return risingFirstSpeed(speedAtTuckTerm(setting.volume, setting.length, setting.depth, term), from, to)
  },
}
