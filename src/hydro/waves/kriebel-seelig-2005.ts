import { GRAVITY } from '../constants.ts'
import { heldFor } from '../held.ts'
import { risingFirstSpeed, type WaveMethod } from '../method.ts'
import type { Setting } from '../setting.ts'
import {
  ALL_HULLS,
  DEPTH_QUANTITY,
  DISPLACEMENT_MODE,
  quantities,
  SAILING_LINE_DISTANCE,
  SUBCRITICAL,
} from './shared.ts'

/** Modified Froude number below which a hull makes no waves, dimensionless (Kriebel & Seelig (2005), from memory). */
const THRESHOLD = 0.1
/** Growth with draught over depth per fineness, dimensionless (same). */
const DEPTH_EFFECT = 2.35
/** Bow form: amplitude and slope of the tanh³ law over L/Le, dimensionless (same). */
const BOW_AMPLITUDE = 8
const BOW_SLOPE = 0.45

/** b = 1 + 8 tanh³(0.45 (L/Le - 2)), L/Le held at 2 or more (the cube is odd: below 2 it would fall under 1). */
function bowFactor(lengthToEntrance: number): number {
  return 1 + BOW_AMPLITUDE * Math.tanh(BOW_SLOPE * (Math.max(2, lengthToEntrance) - 2)) ** 3
}

const bowFactorOf = heldFor((setting) => bowFactor(setting.length / setting.entranceLength))

/** F* over V: exp(2.35 (1 - C_B) T/h)/√(g L), s/m. */
const froudePerSpeed = heldFor((setting) => {
  const a = DEPTH_EFFECT * (1 - setting.blockCoefficient)
  return Math.exp((a * setting.draught) / setting.depth) / Math.sqrt(GRAVITY * setting.length)
})

/**
 * Secondary waves by Kriebel & Seelig.
 *
 *   g H/V² = b (F* - 0.1)² (y/L)^(-1/3), F* = V/√(g L) exp(2.35 (1 - C_B) T/h), b = 1 + 8 tanh³(0.45 (L/Le - 2))
 *
 * @param setting   the vessel in its water: L, Le, T, C_B, h
 * @param speed     V, through the water, m/s, > 0
 * @param distance  y, from the sailing line, m, > 0
 * @returns H, m; 0 for F* ≤ 0.1
 * @holds see the range of `kriebelSeelig2005`
 * @error ±30 to 50 % (from memory)
 * @source Kriebel, D.L. & Seelig, W.N. (2005), An empirical model for ship-generated waves, 5th Int. Symp. on Ocean
 *   Wave Measurement and Analysis, Madrid (from memory)
 */
export function kriebelSeeligWaveHeight(setting: Setting, speed: number, distance: number): number {
  const excess = Math.max(0, froudePerSpeed(setting) * speed - THRESHOLD)
  const b = bowFactorOf(setting)
  return (b * speed * speed * excess * excess) / (GRAVITY * Math.cbrt(distance / setting.length))
}

export const kriebelSeelig2005: WaveMethod = {
  id: 'kriebel-seelig-2005',
  kind: 'wave-height',
  name: 'Kriebel & Seelig, secondary waves',
  law: 'g H/V² = b (F* - 0.1)² (y/L)^(-1/3) with F* = V/√(g L) exp(2.35 (1 - C_B) T/h), b = 1 + 8 tanh³(0.45 (L/Le - 2))',
  quantities: quantities(
    DEPTH_QUANTITY,
    SAILING_LINE_DISTANCE,
    { symbol: 'L', name: 'waterline length', unit: 'm' },
    { symbol: 'Le', name: 'entrance length', unit: 'm' },
    { symbol: 'T', name: 'draught', unit: 'm' },
    { symbol: 'C_B', name: 'block coefficient', unit: '1' },
  ),
  range: [SUBCRITICAL, DISPLACEMENT_MODE],
  hulls: ALL_HULLS,
  distanceFrom: 'sailing-line',
  nature: 'central',
  reference:
    'Kriebel & Seelig (2005), An empirical model for ship-generated waves, 5th Int. Symp. on Ocean Wave Measurement and Analysis, Madrid',
  isFromMemory: true,
  version: '1',
  hasCoefficients: () => true,
  height: kriebelSeeligWaveHeight,
  firstSpeed(setting, height, distance, from, to) {
    // V (k V - 0.1) = √(g H (y/L)^(1/3)/b)
    const k = froudePerSpeed(setting)
    const b = bowFactorOf(setting)
    const root = Math.sqrt((GRAVITY * height * Math.cbrt(distance / setting.length)) / b)
    return risingFirstSpeed((THRESHOLD + Math.sqrt(THRESHOLD * THRESHOLD + 4 * k * root)) / (2 * k), from, to)
  },
}
