import { describe, expect, it } from 'vitest'
import { huuska1976 } from '../../../src/hydro/squat/huuska-1976.ts'
import { expectClose } from '../../support/expect-close.ts'
import { KNOT, S1_CANAL, S1_OPEN, S2, S3, TO_OUR_GRAVITY, itIsASquatMethod } from '../../support/squat.ts'

describe('huuska-1976', () => {
  itIsASquatMethod(huuska1976, {
    id: 'huuska-1976',
    range: [
      { quantity: 'block_coefficient', min: 0.6, max: 0.8 },
      { quantity: 'beam_to_draught_ratio', min: 2.19, max: 3.5 },
      { quantity: 'length_to_beam_ratio', min: 5.5, max: 8.5 },
      { quantity: 'depth_froude_number', max: 0.7 },
    ],
    scaleExponent: 1,
  })

  it('gives the situations (formula from memory, values computed independently in Python)', () => {
    const knot = KNOT * TO_OUR_GRAVITY
    expectClose(huuska1976.squat(S1_OPEN, 6 * knot), 0.2422, { abs: 6e-5 })
    expectClose(huuska1976.squat(S1_OPEN, 8 * knot), 0.4433, { abs: 6e-5 })
    expectClose(huuska1976.squat(S1_OPEN, 10 * knot), 0.7209, { abs: 6e-5 })
    expectClose(huuska1976.squat(S1_CANAL, 8 * knot), 0.917, { abs: 6e-5 })
    expectClose(huuska1976.squat(S2, 8 * knot), 0.5558, { abs: 6e-5 })
    expectClose(huuska1976.squat(S3, (8 / 3.6) * TO_OUR_GRAVITY), 0.1767, { abs: 6e-5 })
  })

  it('never falls below open water: the printed step from 1.000 to 0.9835 at a blockage of 0.03 is left out', () => {
    const open = huuska1976.squat(S1_OPEN, 4)
    for (const m of [0.01, 0.03, 0.0301, 0.0322]) {
      expect(huuska1976.squat({ ...S1_CANAL, blockage: m }, 4)).toBe(open)
    }
    expectClose(huuska1976.squat({ ...S1_CANAL, blockage: 0.04 }, 4), 1.058 * open, { rel: 1e-12 })
  })

  it('has no value from F = 1 on', () => {
    expect(huuska1976.squat(S1_CANAL, 1.0001 * Math.sqrt(9.80665 * 14.4))).toBeNaN()
  })
})
