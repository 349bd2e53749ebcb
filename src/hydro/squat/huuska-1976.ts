import { risingFirstSpeed, type SquatMethod } from '../method.ts'
import type { Setting } from '../setting.ts'
import { speedAtTuckTerm, tuckTerm } from './tuck.ts'

const BOW_COEFFICIENT = 2.4 // dimensionless, Huuska (1976), from memory
const CONFINEMENT_SLOPE = 7.45 // dimensionless, K_s per blockage, Huuska (1976) after Guliev (1971), from memory
const CONFINEMENT_OFFSET = 0.76 // dimensionless, the same
// K_s is printed for a blockage above 0.03, where it would fall from 1 to 0.98 in a step; it is held at 1 or above instead.
const LEAST_CONFINEMENT = 1 // dimensionless

/** 2.4 K_s, dimensionless. */
function bowCoefficient(setting: Setting): number {
  return (
    BOW_COEFFICIENT * Math.max(LEAST_CONFINEMENT, CONFINEMENT_SLOPE * setting.blockage + CONFINEMENT_OFFSET)
  )
}

/**
 * Huuska (1976), after Guliev: bow squat with a factor for confinement.
 *
 *   s = 2.4 K_s (vol/L²) F² / √(1 - F²),   K_s = 7.45 m + 0.76, at least 1   (K_1 = 1)
 */
export const huuska1976: SquatMethod = {
  id: 'huuska-1976',
  kind: 'squat',
  name: 'Huuska and Guliev 1976',
  law: 's = 2.4 K_s (vol/L^2) F_nh^2 / sqrt(1 - F_nh^2), with K_s = 7.45 m + 0.76, at least 1 (K_1 = 1: canal); no value at F_nh >= 1',
  quantities: [
    { symbol: 'vol', name: 'displaced volume', unit: 'm3' },
    { symbol: 'L', name: 'waterline length', unit: 'm' },
    { symbol: 'm', name: 'blockage ratio', unit: '1' },
    { symbol: 'F_nh', name: 'depth Froude number', unit: '1' },
  ],
  range: [
    { quantity: 'block_coefficient', min: 0.6, max: 0.8 },
    { quantity: 'beam_to_draught_ratio', min: 2.19, max: 3.5 },
    { quantity: 'length_to_beam_ratio', min: 5.5, max: 8.5 },
    { quantity: 'depth_froude_number', max: 0.7 },
  ],
  hulls: ['displacement'],
  nature: 'central',
  reference:
    'Huuska, O. (1976) On the evaluation of underkeel clearances in Finnish waterways, Helsinki University of Technology, Otaniemi, Report 9, after Guliev (1971)',
  isFromMemory: true,
  version: '1',
  squat(setting, speed) {
    return bowCoefficient(setting) * tuckTerm(setting.volume, setting.length, setting.depth, speed)
  },
  firstSpeed(setting, squat, from, to) {
    const term = squat / bowCoefficient(setting)
    return risingFirstSpeed(speedAtTuckTerm(setting.volume, setting.length, setting.depth, term), from, to)
  },
}
