import { describe, it } from 'vitest'
import { allowedWakeWashHeight } from '../../src/hydro/wake-wash.ts'
import { expectClose } from '../support/expect-close.ts'

describe('allowedWakeWashHeight', () => {
  it('gives the five rows of the Danish rule (Parnell & Kofoed-Hansen 2001, from memory)', () => {
    // computed independently in Python
    const rows = [
      [3, 0.612],
      [4.5, 0.5],
      [6, 0.433],
      [9, 0.354],
      [12, 0.306],
    ] as const
    for (const [T, H] of rows) expectClose(allowedWakeWashHeight(T), H, { abs: 5.1e-4 })
  })

  it('halves when the period grows fourfold', () => {
    expectClose(allowedWakeWashHeight(18), 0.25, { rel: 1e-15 })
  })
})
