import { describe, expect, it } from 'vitest'
import { tuck1966 } from '../../../src/hydro/squat/tuck-1966.ts'
import { expectClose } from '../../support/expect-close.ts'
import { KNOT, S1_CANAL, S1_OPEN, S2, S3, TO_OUR_GRAVITY, itIsASquatMethod } from '../../support/squat.ts'

describe('tuck-1966', () => {
  itIsASquatMethod(tuck1966, {
    id: 'tuck-1966',
    range: [{ quantity: 'depth_froude_number', max: 0.7 }],
    channels: ['open'],
    scaleExponent: 1,
  })

  it('gives the situations (1.46 of Hooft, from memory; values computed independently in Python)', () => {
    const knot = KNOT * TO_OUR_GRAVITY
    expectClose(tuck1966.squat(S1_OPEN, 6 * knot), 0.1474, { abs: 6e-5 })
    expectClose(tuck1966.squat(S1_OPEN, 8 * knot), 0.2697, { abs: 6e-5 })
    expectClose(tuck1966.squat(S1_OPEN, 10 * knot), 0.4385, { abs: 6e-5 })
    expectClose(tuck1966.squat(S1_CANAL, 8 * knot), 0.2697, { abs: 6e-5 })
    expectClose(tuck1966.squat(S2, 8 * knot), 0.1571, { abs: 6e-5 })
    expectClose(tuck1966.squat(S3, (8 / 3.6) * TO_OUR_GRAVITY), 0.0502, { abs: 6e-5 })
  })

  it('grows without bound towards F = 1 and has no value from there on', () => {
    const celerity = Math.sqrt(9.80665 * 14.4)
    expect(tuck1966.squat(S1_OPEN, celerity * (1 - 1e-9))).toBeGreaterThan(1000)
    expect(tuck1966.squat(S1_OPEN, celerity * 1.0001)).toBeNaN()
    expect(tuck1966.firstSpeed(S1_OPEN, 1e6, 0, 100)).toBeLessThanOrEqual(celerity)
  })
})
