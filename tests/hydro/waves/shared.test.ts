import { describe, expect, it } from 'vitest'
import { WAVE_METHODS } from '../../../src/hydro/waves/all.ts'
import { fallingFirstSpeed, isPlaning } from '../../../src/hydro/waves/shared.ts'

describe('the wave methods', () => {
  it('are the seven of the documentation, in their order', () => {
    expect(WAVE_METHODS.map(({ id }) => id)).toEqual([
      'rock-manual-2007',
      'blaauw-1984',
      'weggel-sorensen-1986',
      'kriebel-seelig-2005',
      'gates-herbich-1977',
      'bhowmik-1991',
      'maynord-2005',
    ])
  })
})

describe('isPlaning', () => {
  it('begins at a volume Froude number of 2, within a few units in the last place', () => {
    expect(isPlaning(2)).toBe(true)
    expect(isPlaning(2 * (1 - 1e-13))).toBe(true)
    expect(isPlaning(2 * (1 - 1e-11))).toBe(false)
    expect(isPlaning(NaN)).toBe(false)
  })
})

describe('fallingFirstSpeed', () => {
  it('is the start where the height is exceeded there, and Infinity where it is only reached', () => {
    expect(fallingFirstSpeed(0.3, 0.2, 5)).toBe(5)
    expect(fallingFirstSpeed(0.2, 0.2, 5)).toBe(Infinity)
    expect(fallingFirstSpeed(0.1, 0.2, 5)).toBe(Infinity)
  })
})
