import type { SquatMethod } from '../method.ts'
import { meanDrawdown, speedAtDrawdown } from '../primary-wave.ts'

/** Mean drawdown taken as the sinkage of an inland hull, which sits in the lowered level beside it. */
export const schijfDrawdown: SquatMethod = {
  id: 'schijf-drawdown',
  kind: 'squat',
  name: 'Drawdown as squat of inland hulls',
  law: 'squat = dh, the mean drawdown of the primary wave with alpha_s',
  quantities: [
    { symbol: 'dh', name: 'mean drawdown', unit: 'm' },
    { symbol: 'V', name: 'speed through the water', unit: 'm/s' },
    { symbol: 'm', name: 'blockage ratio', unit: '1' },
    { symbol: 'h_m', name: 'mean depth of the section', unit: 'm' },
  ],
  range: [{ quantity: 'critical_ratio', max: 1 }],
  hulls: ['displacement', 'semi-displacement', 'planing'],
  channels: ['confined'],
  isInlandOnly: true,
  nature: 'central',
  reference:
    'Schijf (1949), PIANC XVIIth Int. Navigation Congress Lisbon, Sec. I Q. 2; use as squat: common practice',
  isFromMemory: true,
  version: '1',
  squat: (setting, speed) => (speed <= setting.criticalSpeed ? meanDrawdown(setting, speed) : NaN),
  firstSpeed(setting, squat, from, to) {
    const reached = speedAtDrawdown(setting, squat)
    if (!(reached > from)) return from
    return reached < to ? reached : Infinity
  },
}
