import { describe, expect, it } from 'vitest'
import { risingFirstSpeed } from '../../src/hydro/method.ts'

describe('risingFirstSpeed', () => {
  it('is the speed at which the bound is reached, inside the interval', () => {
    expect(risingFirstSpeed(3, 2, 4)).toBe(3)
  })

  it('is the start where the bound is reached there or sooner', () => {
    expect(risingFirstSpeed(2, 2, 4)).toBe(2)
    expect(risingFirstSpeed(1, 2, 4)).toBe(2)
    expect(risingFirstSpeed(0, 0, 4)).toBe(0)
  })

  it('is Infinity where the bound is reached at the end or beyond, for it is not exceeded before', () => {
    expect(risingFirstSpeed(4, 2, 4)).toBe(Infinity)
    expect(risingFirstSpeed(5, 2, 4)).toBe(Infinity)
    expect(risingFirstSpeed(Infinity, 2, 4)).toBe(Infinity)
  })

  it('counts a bound that cannot be computed as exceeded at once', () => {
    expect(risingFirstSpeed(NaN, 2, 4)).toBe(2)
  })
})
