import type { MethodDescription } from './method.ts'

const HULLS = ['displacement', 'semi-displacement', 'planing'] as const
const SPEED = { symbol: 'V', name: 'speed through the water', unit: 'm/s' } as const
const DEPTH = { symbol: 'h', name: 'undisturbed depth at the sailing line', unit: 'm' } as const
const BLOCKAGE = { symbol: 'm', name: 'blockage ratio', unit: '1' } as const
const MEAN_DEPTH = { symbol: 'h_m', name: 'mean depth of the section', unit: 'm' } as const

/** Methods of which there is one for each purpose: no choice among them, and so no common interface. */
export const OTHER_METHODS: readonly MethodDescription[] = [
  {
    id: 'schijf-1949',
    kind: 'critical-speed',
    name: 'Schijf, limit speeds of a hull in a channel',
    law: 'V_L = min(F_L √(g h_m), √(g h)), F_L = (2 sin(asin(1 - m)/3))^1.5; upper limit F_U = (2 sin((π - asin(1 - m))/3))^1.5',
    quantities: [BLOCKAGE, MEAN_DEPTH, DEPTH],
    range: [],
    hulls: HULLS,
    channels: ['confined'],
    nature: 'central',
    reference: 'Schijf, J.B. (1949), PIANC XVIIth Int. Navigation Congress Lisbon, Sec. I Q. 2, pp. 61-78',
    isFromMemory: true,
    version: '1',
  },
  {
    id: 'schijf-return-current',
    kind: 'primary-wave',
    name: 'Schijf, return current and drawdown, with alpha_s',
    law: 'U_r = V (w - 1), dh = V²/2g (alpha_s w² - 1), w by continuity and Bernoulli in closed form; alpha_s = 1 + r (0.4 - 0.4 V/V_L) for inland cargo hulls',
    quantities: [SPEED, BLOCKAGE, MEAN_DEPTH],
    range: [{ quantity: 'critical_ratio', max: 1 }],
    hulls: HULLS,
    channels: ['confined'],
    nature: 'central',
    reference:
      'Schijf (1949), PIANC Lisbon; alpha_s: CIRIA, CUR, CETMEF (2007), The Rock Manual, C683, section 4.3.4; fading of alpha_s: own choice',
    isFromMemory: true,
    version: '1',
  },
  {
    id: 'rock-manual-primary-wave',
    kind: 'primary-wave',
    name: 'Rock Manual, front wave, stern wave and eccentric sailing line',
    law: 'dh_max = dh (1 + (2 + 2 s) A_w*), U_max = U_r (1 + (1 + 2 s) A_w*); front wave 0.1 dh + dh_max; stern wave 1.5 dh_max',
    quantities: [SPEED, { symbol: 'A_w*', name: 'eccentricity of the sailing line', unit: '1' }],
    range: [{ quantity: 'critical_ratio', max: 1 }],
    hulls: HULLS,
    channels: ['confined'],
    nature: 'central',
    reference:
      'CIRIA, CUR, CETMEF (2007), The Rock Manual, C683, section 4.3.4; blend of its two sets of factors: own choice',
    isFromMemory: true,
    version: '1',
  },
  {
    id: 'finite-depth-wedge',
    kind: 'wake-geometry',
    name: 'Wake wedge and cusp waves at finite depth',
    law: 'the exact caustic of linear theory, by its parametric solution; asin(1/F) from F = 1 up',
    quantities: [SPEED, DEPTH],
    range: [],
    hulls: HULLS,
    nature: 'central',
    reference:
      'Havelock, T.H. (1908), Proc. Roy. Soc. London A 81, 398-430, for the problem; NIST DLMF 36.13 for the deep-water limit; the caustic is derived from linear theory',
    isFromMemory: true,
    version: '1',
  },
  {
    id: 'keown-1977',
    kind: 'bank-stability',
    name: 'Keown et al., permissible velocity by bed material',
    law: 'table by material and mean depth, linear between depths',
    quantities: [DEPTH],
    range: [],
    hulls: HULLS,
    nature: 'central',
    reference:
      'Keown et al. (1977), as reprinted in a river engineering manual of the US Federal Highway Administration',
    isFromMemory: false,
    version: '1',
  },
  {
    id: 'riprap-stability',
    kind: 'bank-stability',
    name: 'Riprap under secondary and stern waves',
    law: 'H/(Δ D50) = 1.8 ξ^(-1/2) for secondary waves; z_max/(Δ D50) = 1.5 cot(a)^(1/3) for the stern wave',
    quantities: [
      { symbol: 'D50', name: 'median stone size', unit: 'm' },
      { symbol: 'Δ', name: 'relative density of the stone', unit: '1' },
    ],
    range: [],
    hulls: HULLS,
    nature: 'central',
    reference: 'CIRIA, CUR, CETMEF (2007), The Rock Manual, C683, section 5.2; PIANC (1987)',
    isFromMemory: true,
    version: '1',
  },
]
