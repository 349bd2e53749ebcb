import { heldFor } from '../held.ts'
import { risingFirstSpeed, type SquatMethod } from '../method.ts'
import { KNOT } from './knot.ts'

const DIVISOR = 15 // kn² / m, Norrbin (1986), from memory

/** Squat at one knot, m. */
const squatAtOneKnot = heldFor((setting) => {
  const beamRatio = setting.beam / setting.length
  return ((setting.blockCoefficient / DIVISOR) * beamRatio * setting.draught) / setting.depth
})

/**
 * Norrbin (1986): bow squat in open water at low depth Froude number.
 *
 *   s = (C_B / 15) (B/L) (T/h) V_k²
 */
export const norrbin1986: SquatMethod = {
  id: 'norrbin-1986',
  kind: 'squat',
  name: 'Norrbin 1986',
  law: 's = (C_B/15) (B/L) (T/h) V_k^2, with V_k the speed through the water in knots',
  quantities: [
    { symbol: 'C_B', name: 'block coefficient', unit: '1' },
    { symbol: 'B', name: 'beam', unit: 'm' },
    { symbol: 'L', name: 'waterline length', unit: 'm' },
    { symbol: 'T', name: 'draught', unit: 'm' },
    { symbol: 'h', name: 'depth at the sailing line', unit: 'm' },
    { symbol: 'V_k', name: 'speed through the water', unit: 'kn' },
  ],
  range: [{ quantity: 'depth_froude_number', max: 0.4 }],
  hulls: ['displacement'],
  channels: ['open'],
  nature: 'central',
  reference: 'Norrbin, N.H. (1986); as collected in PIANC WG121 (2014), Report 121, appendix D',
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
