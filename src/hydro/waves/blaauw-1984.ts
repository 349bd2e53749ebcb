import { GRAVITY } from '../constants.ts'
import { risingFirstSpeed, type WaveMethod } from '../method.ts'
import { ALL_HULLS, DISPLACEMENT_MODE, HULL_SIDE_DISTANCE, quantities, SUBCRITICAL } from './shared.ts'

/**
 * Secondary waves by Blaauw et al.; the depth cancels from the printed form.
 *
 *   H = A'' h (s/h)^(-1/3) F^(8/3) = A'' V^(8/3) g^(-4/3) s^(-1/3)
 *
 * @param speed        V, through the water, m/s, > 0
 * @param hullSide     s, hull's side to the place, m, > 0
 * @param coefficient  A'': 0.80 laden pushing units, 0.35 empty ones, 0.25 motor vessels and tugs
 * @returns H, m
 * @holds see the range of `blaauw1984`
 * @error a central estimate; scatter not reported. The source rounds the exponents to 0.33 and 2.67, 0.3 to 0.6 % apart
 * @source Blaauw, van der Knaap, de Groot & Pilarczyk (1984), Design of bank protection of inland navigation fairways,
 *   Delft Hydraulics Publ. 320 (from memory)
 * @example blaauwWaveHeight(4, 30, 0.25) // 0.154537
 */
export function blaauwWaveHeight(speed: number, hullSide: number, coefficient: number): number {
  // (V⁸/(g⁴ s))^(1/3): one root for the three thirds
  const v2g = (speed * speed) / GRAVITY
  const v4g2 = v2g * v2g
  return coefficient * Math.cbrt((v4g2 * v4g2) / hullSide)
}

export const blaauw1984: WaveMethod = {
  id: 'blaauw-1984',
  kind: 'wave-height',
  name: 'Blaauw et al., secondary waves',
  law: "H = A'' h (s/h)^(-1/3) F^(8/3), the depth cancels",
  quantities: quantities(HULL_SIDE_DISTANCE, {
    symbol: "A''",
    name: 'coefficient of the vessel type and loading',
    unit: '1',
  }),
  range: [SUBCRITICAL, DISPLACEMENT_MODE],
  hulls: ALL_HULLS,
  distanceFrom: 'hull-side',
  nature: 'central',
  reference:
    'Blaauw, van der Knaap, de Groot & Pilarczyk (1984), Design of bank protection of inland navigation fairways, Delft Hydraulics Publ. 320',
  isFromMemory: true,
  version: '1',
  hasCoefficients: (setting) => !Number.isNaN(setting.centralCoefficient),
  height: (setting, speed, distance) =>
    blaauwWaveHeight(speed, distance - setting.beam / 2, setting.centralCoefficient),
  firstSpeed(setting, height, distance, from, to) {
    const ratio = height / setting.centralCoefficient
    const v8g4 = ratio * ratio * ratio * (distance - setting.beam / 2)
    return risingFirstSpeed(Math.sqrt(GRAVITY * Math.sqrt(Math.sqrt(v8g4))), from, to)
  },
}
