import { describe, it } from 'vitest'
import { norrbin1986 } from '../../../src/hydro/squat/norrbin-1986.ts'
import { expectClose } from '../../support/expect-close.ts'
import { KNOT, S1_OPEN, S2, S3, itIsASquatMethod } from '../../support/squat.ts'

describe('norrbin-1986', () => {
  itIsASquatMethod(norrbin1986, {
    id: 'norrbin-1986',
    range: [{ quantity: 'depth_froude_number', max: 0.4 }],
    channels: ['open'],
    scaleExponent: 1,
  })

  it('gives the situations (formula from memory, values computed independently in Python)', () => {
    expectClose(norrbin1986.squat(S1_OPEN, 6 * KNOT), 0.2409, { abs: 6e-5 })
    expectClose(norrbin1986.squat(S1_OPEN, 8 * KNOT), 0.4282, { abs: 6e-5 })
    expectClose(norrbin1986.squat(S1_OPEN, 10 * KNOT), 0.6691, { abs: 6e-5 })
    expectClose(norrbin1986.squat(S2, 8 * KNOT), 0.2501, { abs: 6e-5 })
    expectClose(norrbin1986.squat(S3, 8 / 3.6), 0.0794, { abs: 6e-5 })
  })
})
