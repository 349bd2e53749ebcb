import { describe, expect, it } from 'vitest'
import { barrass1979 } from '../../../src/hydro/squat/barrass-1979.ts'
import { expectClose } from '../../support/expect-close.ts'
import { KNOT, S1_CANAL, S1_OPEN, S2, S3, itIsASquatMethod } from '../../support/squat.ts'

describe('barrass-1979', () => {
  itIsASquatMethod(barrass1979, {
    id: 'barrass-1979',
    range: [
      { quantity: 'block_coefficient', min: 0.5, max: 0.9 },
      { quantity: 'blockage_ratio', min: 0.1, max: 0.265 },
      { quantity: 'depth_to_draught_ratio', min: 1.1, max: 1.4 },
    ],
    channels: ['confined'],
    scaleExponent: 1.04,
  })

  it('gives the three situations (formula from memory, values computed independently in Python)', () => {
    expectClose(barrass1979.squat(S1_CANAL, 8 * KNOT), 0.755, { abs: 6e-5 })
    expectClose(barrass1979.squat(S2, 8 * KNOT), 0.5671, { abs: 6e-5 })
    expectClose(barrass1979.squat(S3, 8 / 3.6), 0.2296, { abs: 6e-5 })
  })

  it('gives the fourteen cells of the table for C_B 0.78 to the printed centimetre', () => {
    // computed independently in Python; the second row with the blockage of an equivalent strip
    const knots = [4, 6, 8, 9, 10, 12, 15]
    const rows = [
      [0.137105, 0.14, 0.32, 0.58, 0.74, 0.92, 1.34, 2.13],
      [0.104936, 0.11, 0.26, 0.47, 0.6, 0.75, 1.09, 1.74],
    ] as const
    for (const [blockage, ...squats] of rows) {
      for (const [i, V] of knots.entries()) {
        const setting = { ...S1_CANAL, blockCoefficient: 0.78, blockage }
        expectClose(barrass1979.squat(setting, V * KNOT), squats[i]!, { abs: 5.1e-3 })
      }
    }
  })

  it('has no squat without blockage, so that no speed is the first', () => {
    expect(barrass1979.squat(S1_OPEN, 4)).toBe(0)
    expect(barrass1979.firstSpeed(S1_OPEN, 0.1, 0, 10)).toBe(Infinity)
  })
})
