import { expect, it } from 'vitest'
import type { RangeRule, SquatMethod } from '../../src/hydro/method.ts'
import type { Setting } from '../../src/hydro/setting.ts'
import { expectClose } from './expect-close.ts'

/** International knot, m/s, restated. */
export const KNOT = 0.5144444444444445

/** Rows were computed with 9.81 m/s²; at speeds times this, the Froude numbers under 9.80665 are the same. */
export const TO_OUR_GRAVITY = Math.sqrt(9.80665 / 9.81)

const BASE = {
  criticalSpeed: NaN,
  supercriticalOnset: NaN,
  correctionShare: 0,
  hull: 'displacement',
  isInland: false,
  entranceLength: NaN,
  envelopeCoefficient: NaN,
  centralCoefficient: NaN,
} as const

/** S1: 225 x 32.26 x 12.0 m, C_B 0.84, in 14.4 m; A_m = 0.98 B T. */
export const S1_OPEN: Setting = {
  ...BASE,
  depth: 14.4,
  meanDepth: 14.4,
  blockage: 0,
  effectiveWidth: Infinity,
  isConfined: false,
  length: 225,
  beam: 32.26,
  draught: 12,
  blockCoefficient: 0.84,
  volume: 0.84 * 225 * 32.26 * 12,
}

/** S1 in a rectangular canal 150 m wide. */
export const S1_CANAL: Setting = {
  ...S1_OPEN,
  blockage: (0.98 * 32.26 * 12) / (150 * 14.4),
  effectiveWidth: 150,
  isConfined: true,
}

/** S2: the C9 container ship of the CEM, 262 x 32 x 12 m, C_B 0.60, in a rectangular canal of 137 x 15 m. */
export const S2: Setting = {
  ...BASE,
  depth: 15,
  meanDepth: 15,
  blockage: (32 * 12) / (137 * 15),
  effectiveWidth: 137,
  isConfined: true,
  length: 262,
  beam: 32,
  draught: 12,
  blockCoefficient: 0.6,
  volume: 0.6 * 262 * 32 * 12,
}

/** S3: 110 x 11.4 x 2.8 m, C_B 0.88, in the German standard trapezoid, 55 m x 4 m, 1:3. */
export const S3: Setting = {
  ...BASE,
  depth: 4,
  meanDepth: 172 / 55,
  blockage: (11.4 * 2.8) / 172,
  effectiveWidth: 55,
  isConfined: true,
  isInland: true,
  length: 110,
  beam: 11.4,
  draught: 2.8,
  blockCoefficient: 0.88,
  volume: 0.88 * 110 * 11.4 * 2.8,
}

/** The same section without its banks. */
export const unconfined = (setting: Setting): Setting => ({
  ...setting,
  blockage: 0,
  effectiveWidth: Infinity,
  isConfined: false,
})

/** All lengths times k. */
const scaled = (setting: Setting, k: number): Setting => ({
  ...setting,
  depth: setting.depth * k,
  meanDepth: setting.meanDepth * k,
  effectiveWidth: setting.effectiveWidth * k,
  length: setting.length * k,
  beam: setting.beam * k,
  draught: setting.draught * k,
  volume: setting.volume * k ** 3,
})

/** What every squat method must do. */
export function itIsASquatMethod(
  method: SquatMethod,
  expected: {
    readonly id: string
    readonly range: readonly RangeRule[]
    readonly channels?: readonly ('open' | 'confined')[]
    readonly scaleExponent: number
  },
): void {
  it('declares its range, its channels and that it is from memory', () => {
    expect(method.id).toBe(expected.id)
    expect(method.kind).toBe('squat')
    expect(method.range).toEqual(expected.range)
    expect(method.channels).toEqual(expected.channels)
    expect(method.hulls).toEqual(['displacement'])
    expect(method.isFromMemory).toBe(true)
  })

  it('is 0 at rest and rises with speed', () => {
    for (const setting of [S1_OPEN, S1_CANAL, S2, S3]) {
      if (method.id === 'barrass-1979' && !setting.isConfined) continue
      expect(method.squat(setting, 0)).toBe(0)
      let before = 0
      for (let V = 0.05; V < 5; V += 0.05) {
        const squat = method.squat(setting, V)
        expect(squat).toBeGreaterThan(before)
        before = squat
      }
    }
  })

  it('has an inverse that agrees with the law to 1e-12', () => {
    for (const setting of [S1_OPEN, S1_CANAL, S2, S3]) {
      if (method.id === 'barrass-1979' && !setting.isConfined) continue
      for (let V = 0.02; V < 6; V *= 1.11) {
        const squat = method.squat(setting, V)
        expectClose(method.firstSpeed(setting, squat, 0, 100), V, { rel: 1e-12 })
      }
    }
  })

  it('answers from where the bound is already exceeded, and Infinity where it never is', () => {
    const squat = method.squat(S1_CANAL, 3)
    expect(method.firstSpeed(S1_CANAL, squat, 3.5, 6)).toBe(3.5)
    expect(method.firstSpeed(S1_CANAL, squat, 0, 2.5)).toBe(Infinity)
  })

  it(`grows by k^${expected.scaleExponent} when lengths grow by k and speeds by √k`, () => {
    // 1 is Froude's scale; a law with a dimensional coefficient and another power of speed than 2 misses it by nature
    const ratio = method.squat(scaled(S1_CANAL, 4), 6) / method.squat(S1_CANAL, 3)
    expectClose(ratio, 4 ** expected.scaleExponent, { rel: 1e-13 })
  })
}
