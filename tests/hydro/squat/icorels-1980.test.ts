import { describe, expect, it } from 'vitest'
import { icorels1980 } from '../../../src/hydro/squat/icorels-1980.ts'
import { expectClose } from '../../support/expect-close.ts'
import { KNOT, S1_CANAL, S1_OPEN, S2, S3, TO_OUR_GRAVITY, itIsASquatMethod } from '../../support/squat.ts'

describe('icorels-1980', () => {
  itIsASquatMethod(icorels1980, {
    id: 'icorels-1980',
    range: [{ quantity: 'depth_froude_number', max: 0.7 }],
    channels: ['open'],
    scaleExponent: 1,
  })

  it('gives the situations (formula from memory, values computed independently in Python)', () => {
    const knot = KNOT * TO_OUR_GRAVITY
    expectClose(icorels1980.squat(S1_OPEN, 6 * knot), 0.2422, { abs: 6e-5 })
    expectClose(icorels1980.squat(S1_OPEN, 8 * knot), 0.4433, { abs: 6e-5 })
    expectClose(icorels1980.squat(S1_OPEN, 10 * knot), 0.7209, { abs: 6e-5 })
    expectClose(icorels1980.squat(S1_CANAL, 8 * knot), 0.4433, { abs: 6e-5 })
    expectClose(icorels1980.squat(S2, 8 * knot), 0.2583, { abs: 6e-5 })
    expectClose(icorels1980.squat(S3, (8 / 3.6) * TO_OUR_GRAVITY), 0.0825, { abs: 6e-5 })
  })

  it('gives the speeds of the three allowed squats', () => {
    // computed independently in Python: squat, V at 9.81 m/s², F
    const rows = [
      [0.3, 3.421, 0.2878],
      [0.5, 4.353, 0.3662],
      [0.8, 5.389, 0.4534],
    ] as const
    for (const [squat, V, F] of rows) {
      const speed = icorels1980.firstSpeed(S1_OPEN, squat, 0, 20)
      expectClose(speed, V * TO_OUR_GRAVITY, { abs: 6e-4 })
      expectClose(speed / Math.sqrt(9.80665 * 14.4), F, { abs: 6e-5 })
    }
  })

  it('has no value from F = 1 on, which counts as exceeded', () => {
    const celerity = Math.sqrt(9.80665 * 14.4)
    expect(icorels1980.squat(S1_OPEN, celerity * 1.0001)).toBeNaN()
    expect(icorels1980.firstSpeed(S1_OPEN, 50, celerity * 1.1, 20)).toBe(celerity * 1.1)
  })
})
