import { describe, it } from 'vitest'
import { yoshimura1986 } from '../../../src/hydro/squat/yoshimura-1986.ts'
import { expectClose } from '../../support/expect-close.ts'
import {
  KNOT,
  S1_CANAL,
  S1_OPEN,
  S2,
  S3,
  TO_OUR_GRAVITY,
  itIsASquatMethod,
  unconfined,
} from '../../support/squat.ts'

describe('yoshimura-1986', () => {
  itIsASquatMethod(yoshimura1986, {
    id: 'yoshimura-1986',
    range: [
      { quantity: 'block_coefficient', min: 0.55, max: 0.8 },
      { quantity: 'beam_to_draught_ratio', min: 2.5, max: 5.5 },
      { quantity: 'length_to_beam_ratio', min: 3.7, max: 6 },
      { quantity: 'depth_to_draught_ratio', min: 1.2 },
    ],
    scaleExponent: 1,
  })

  it('gives the situations with V (formula from memory, values computed independently in Python)', () => {
    const knot = KNOT * TO_OUR_GRAVITY
    expectClose(yoshimura1986.squat(S1_OPEN, 6 * knot), 0.2493, { abs: 6e-5 })
    expectClose(yoshimura1986.squat(S1_OPEN, 8 * knot), 0.4432, { abs: 6e-5 })
    expectClose(yoshimura1986.squat(S1_OPEN, 10 * knot), 0.6925, { abs: 6e-5 })
    expectClose(yoshimura1986.squat(unconfined(S2), 8 * knot), 0.2486, { abs: 6e-5 })
    expectClose(yoshimura1986.squat(unconfined(S3), (8 / 3.6) * TO_OUR_GRAVITY), 0.0844, { abs: 6e-5 })
  })

  it('gives the situations with V_e = V/(1 - m)', () => {
    const knot = KNOT * TO_OUR_GRAVITY
    expectClose(yoshimura1986.squat(S1_CANAL, 8 * knot), 0.6522, { abs: 6e-5 })
    expectClose(yoshimura1986.squat(S2, 8 * knot), 0.3759, { abs: 6e-5 })
    expectClose(yoshimura1986.squat(S3, (8 / 3.6) * TO_OUR_GRAVITY), 0.1272, { abs: 6e-5 })
  })
})
