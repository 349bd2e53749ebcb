import { describe, expect, it } from 'vitest'
import { meanDrawdown } from '../../../src/hydro/primary-wave.ts'
import { schijfDrawdown } from '../../../src/hydro/squat/schijf-drawdown.ts'
import { expectClose } from '../../support/expect-close.ts'
import { aSetting, FROM_981, G } from '../../support/setting.ts'

// F_L = 0.62281, F_U = 1.39443 and z_L = 0.1707 at m = 0.10, computed independently, 5 decimals
const CANAL = aSetting({
  blockage: 0.1,
  meanDepth: 3,
  criticalSpeed: 0.62281 * Math.sqrt(G * 3),
  supercriticalOnset: 1.39443 * Math.sqrt(G * 3),
})

describe('schijf-drawdown', () => {
  it('declares that it is for inland hulls in confined water, up to the critical speed', () => {
    expect(schijfDrawdown.id).toBe('schijf-drawdown')
    expect(schijfDrawdown.range).toEqual([{ quantity: 'critical_ratio', max: 1 }])
    expect(schijfDrawdown.channels).toEqual(['confined'])
    expect(schijfDrawdown.isInlandOnly).toBe(true)
  })

  it('is the mean drawdown: z of Schijf’s diagram at m = 0.10', () => {
    // computed independently, 4 decimals: V/V_L, z
    for (const [ratio, z] of [
      [0.5, 0.0132],
      [0.75, 0.0376],
      [0.9, 0.0721],
    ] as const) {
      expectClose(schijfDrawdown.squat(CANAL, ratio * CANAL.criticalSpeed) / 3, z, { abs: 6e-5 })
    }
    // with the correction, from the narrowing section of the reference: 0.247 m at 8 km/h; 3 % for the vertical walls
    const corrected = aSetting({ correctionShare: 1, criticalSpeed: 2.7295 * FROM_981 })
    expectClose(schijfDrawdown.squat(corrected, (8 / 3.6) * FROM_981), 0.247, { rel: 0.03 })
  })

  it('has no value above the critical speed, not even beyond the upper limit, where the level rises', () => {
    expect(schijfDrawdown.squat(CANAL, CANAL.criticalSpeed * 1.001)).toBeNaN()
    expect(meanDrawdown(CANAL, 10)).toBeLessThan(0)
    expect(schijfDrawdown.squat(CANAL, 10)).toBeNaN()
  })

  it('first exceeds a squat where it reaches it, and at the critical speed, where it ends, in any case', () => {
    const squat = schijfDrawdown.squat(CANAL, 2)
    expectClose(schijfDrawdown.firstSpeed(CANAL, squat, 0, 9), 2, { rel: 1e-12 })
    expect(schijfDrawdown.firstSpeed(CANAL, squat, 2.5, 9)).toBe(2.5)
    expect(schijfDrawdown.firstSpeed(CANAL, squat, 0, 1.9)).toBe(Infinity)
    expect(schijfDrawdown.firstSpeed(CANAL, 2, 0, 9)).toBe(CANAL.criticalSpeed)
    expect(schijfDrawdown.firstSpeed(CANAL, 2, 0, 3)).toBe(Infinity)
    expect(schijfDrawdown.firstSpeed(CANAL, 2, 5, 9)).toBe(5)
  })
})
