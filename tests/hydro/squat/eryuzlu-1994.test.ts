import { describe, expect, it } from 'vitest'
import { eryuzlu1994 } from '../../../src/hydro/squat/eryuzlu-1994.ts'
import { expectClose } from '../../support/expect-close.ts'
import { KNOT, S1_CANAL, S1_OPEN, S2, S3, TO_OUR_GRAVITY, itIsASquatMethod } from '../../support/squat.ts'

describe('eryuzlu-1994', () => {
  itIsASquatMethod(eryuzlu1994, {
    id: 'eryuzlu-1994',
    range: [
      { quantity: 'block_coefficient', min: 0.8 },
      { quantity: 'beam_to_draught_ratio', min: 2.4, max: 2.9 },
      { quantity: 'length_to_beam_ratio', min: 6.7, max: 6.8 },
      { quantity: 'depth_to_draught_ratio', min: 1.1, max: 2.5 },
    ],
    scaleExponent: 1,
  })

  it('gives the situations (formula from memory, values computed independently in Python)', () => {
    const knot = KNOT * TO_OUR_GRAVITY
    expectClose(eryuzlu1994.squat(S1_OPEN, 6 * knot), 0.1686, { abs: 6e-5 })
    expectClose(eryuzlu1994.squat(S1_OPEN, 8 * knot), 0.3257, { abs: 6e-5 })
    expectClose(eryuzlu1994.squat(S1_OPEN, 10 * knot), 0.5427, { abs: 6e-5 })
    expectClose(eryuzlu1994.squat(S1_CANAL, 8 * knot), 0.4682, { abs: 6e-5 })
    expectClose(eryuzlu1994.squat(S2, 8 * knot), 0.4689, { abs: 6e-5 })
    // out of its range (B/T 4.07) and with the bottom width of the trapezoid: a check of the arithmetic
    expectClose(eryuzlu1994.squat({ ...S3, effectiveWidth: 31 }, (8 / 3.6) * TO_OUR_GRAVITY), 0.1556, {
      abs: 6e-5,
    })
  })

  it('has a width factor of 2.192, 1.550 and 1.000 at W/B = 2, 4 and 9.61, and 1 beyond', () => {
    // computed independently in Python; 9.55 and 9.65 lie on either side of the change
    const open = eryuzlu1994.squat(S1_OPEN, 4)
    const rows = [
      [2, 2.192, 6e-4],
      [4, 1.55, 6e-4],
      [9.55, 1.003137, 1e-6],
      [9.61, 1, 1e-12],
      [9.65, 1, 1e-12],
      [30, 1, 1e-12],
    ] as const
    for (const [ratio, K_b, abs] of rows) {
      const setting = { ...S1_CANAL, effectiveWidth: ratio * 32.26 }
      expectClose(eryuzlu1994.squat(setting, 4) / open, K_b, { abs })
    }
    expect(eryuzlu1994.squat({ ...S1_CANAL, effectiveWidth: 1e9 }, 4)).toBe(open)
  })
})
