import { describe, it } from 'vitest'
import { barrass2004 } from '../../../src/hydro/squat/barrass-2004.ts'
import { expectClose } from '../../support/expect-close.ts'
import { KNOT, S1_CANAL, S1_OPEN, S2, S3, itIsASquatMethod } from '../../support/squat.ts'

describe('barrass-2004', () => {
  itIsASquatMethod(barrass2004, {
    id: 'barrass-2004',
    range: [
      { quantity: 'block_coefficient', min: 0.5, max: 0.9 },
      { quantity: 'depth_to_draught_ratio', min: 1.1, max: 1.4 },
    ],
    scaleExponent: 1,
  })

  it('gives the situations (formula from memory, values computed independently in Python)', () => {
    expectClose(barrass2004.squat(S1_OPEN, 6 * KNOT), 0.3024, { abs: 6e-5 })
    expectClose(barrass2004.squat(S1_OPEN, 8 * KNOT), 0.5376, { abs: 6e-5 })
    expectClose(barrass2004.squat(S1_OPEN, 10 * KNOT), 0.84, { abs: 6e-5 })
    expectClose(barrass2004.squat(S1_CANAL, 8 * KNOT), 0.8228, { abs: 6e-5 })
    expectClose(barrass2004.squat(S2, 8 * KNOT), 0.616, { abs: 6e-5 })
    expectClose(barrass2004.squat(S3, 8 / 3.6), 0.262, { abs: 6e-5 })
  })

  it('holds K between 1 and 2: at 10 kn and C_B 1 the squat is K', () => {
    // computed independently in Python: m, K; 0.9975, 2.0015 and 2.0921 before they are held
    const rows = [
      [0, 1],
      [0.1, 1],
      [0.15, 1.3575],
      [0.2, 1.6893],
      [0.25, 2],
      [0.265, 2],
    ] as const
    for (const [blockage, K] of rows) {
      const setting = { ...S1_CANAL, blockCoefficient: 1, blockage }
      expectClose(barrass2004.squat(setting, 10 * KNOT), K, { abs: 6e-5 })
    }
  })

  it('has no step from open to confined water', () => {
    for (let m = 0; m < 0.3; m += 0.001) {
      const here = barrass2004.squat({ ...S1_CANAL, blockage: m }, 4)
      const there = barrass2004.squat({ ...S1_CANAL, blockage: m + 0.001 }, 4)
      expectClose(there, here, { rel: 0.009 })
    }
  })
})
