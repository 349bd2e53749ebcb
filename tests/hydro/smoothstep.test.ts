import { describe, expect, it } from 'vitest'
import { smoothstep } from '../../src/hydro/smoothstep.ts'
import { expectClose } from '../support/expect-close.ts'

describe('smoothstep', () => {
  it('is t² (3 - 2 t) between 0 and 1', () => {
    // 1/16 · 2.5, 1/4 · 2, 9/16 · 1.5
    expect(smoothstep(0.25)).toBe(0.15625)
    expect(smoothstep(0.5)).toBe(0.5)
    expect(smoothstep(0.75)).toBe(0.84375)
  })

  it('is held at 0 and 1 outside', () => {
    for (const t of [-Infinity, -3, -1e-9, 0]) expect(smoothstep(t)).toBe(0)
    for (const t of [1, 1 + 1e-9, 1.005, 7, Infinity]) expect(smoothstep(t)).toBe(1)
  })

  it('rises throughout, without a step at its ends', () => {
    for (let t = -0.2; t < 1.2; t += 0.01) {
      expect(smoothstep(t + 0.01)).toBeGreaterThanOrEqual(smoothstep(t))
      expectClose(smoothstep(t + 0.01), smoothstep(t), { abs: 0.0151 }) // the slope is 1.5 at most
    }
    expectClose(smoothstep(1e-4), 3e-8, { abs: 1e-11 })
  })

  it('is symmetric about its middle', () => {
    for (const t of [0.1, 0.3, 0.45]) expectClose(smoothstep(t) + smoothstep(1 - t), 1, { abs: 1e-15 })
  })
})
