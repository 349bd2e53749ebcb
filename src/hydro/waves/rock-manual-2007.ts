import { GRAVITY } from '../constants.ts'
import { risingFirstSpeed, type WaveMethod } from '../method.ts'
import {
  ALL_HULLS,
  DEPTH_QUANTITY,
  DISPLACEMENT_MODE,
  HULL_SIDE_DISTANCE,
  quantities,
  SUBCRITICAL,
} from './shared.ts'

/** Upper envelope of the measurements, dimensionless (C683 (2007), 4.3.4, from memory). */
const ENVELOPE = 1.2

/**
 * Secondary waves by the Rock Manual.
 *
 *   H = 1.2 a_i h (s/h)^(-1/3) F^4, F = V/√(g h)
 *
 * @param speed        V, through the water, m/s, > 0
 * @param depth        h, m, > 0
 * @param hullSide     s, hull's side to the place, m, > 0
 * @param coefficient  a_i: 1 tugs, recreational craft and laden motor vessels, 0.5 empty barges, 0.35 empty motor vessels
 * @returns H, m
 * @holds see the range of `rockManual2007`
 * @error an envelope of model tests and Dutch canal measurements; scatter not reported
 * @source CIRIA, CUR, CETMEF (2007), The Rock Manual, C683, 2nd ed., section 4.3.4 (from memory)
 * @example rockManualWaveHeight(3, 4, 20, 1) // 0.147766
 */
export function rockManualWaveHeight(
  speed: number,
  depth: number,
  hullSide: number,
  coefficient: number,
): number {
  const f2 = (speed * speed) / (GRAVITY * depth)
  return (ENVELOPE * coefficient * depth * f2 * f2) / Math.cbrt(hullSide / depth)
}

export const rockManual2007: WaveMethod = {
  id: 'rock-manual-2007',
  kind: 'wave-height',
  name: 'Rock Manual, secondary waves',
  law: 'H = 1.2 a_i h (s/h)^(-1/3) F^4 with F = V/√(g h)',
  quantities: quantities(DEPTH_QUANTITY, HULL_SIDE_DISTANCE, {
    symbol: 'a_i',
    name: 'coefficient of the vessel type and loading',
    unit: '1',
  }),
  range: [SUBCRITICAL, DISPLACEMENT_MODE],
  hulls: ALL_HULLS,
  distanceFrom: 'hull-side',
  nature: 'envelope',
  reference: 'CIRIA, CUR, CETMEF (2007), The Rock Manual, C683, 2nd ed., section 4.3.4',
  isFromMemory: true,
  version: '1',
  hasCoefficients: (setting) => !Number.isNaN(setting.envelopeCoefficient),
  height: (setting, speed, distance) =>
    rockManualWaveHeight(speed, setting.depth, distance - setting.beam / 2, setting.envelopeCoefficient),
  firstSpeed(setting, height, distance, from, to) {
    const h = setting.depth
    const side = distance - setting.beam / 2
    const f4 = (height * Math.cbrt(side / h)) / (ENVELOPE * setting.envelopeCoefficient * h)
    return risingFirstSpeed(Math.sqrt(GRAVITY * h * Math.sqrt(f4)), from, to)
  },
}
