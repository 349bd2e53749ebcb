import { expect, it } from 'vitest'
import { FRESH_WATER_DENSITY, GRAVITY, SEA_WATER_DENSITY } from '../../src/hydro/constants.ts'

it('gravity is the standard acceleration of the CGPM of 1901, and the densities are those of common practice', () => {
  expect(GRAVITY).toBe(9.80665)
  expect(FRESH_WATER_DENSITY).toBe(1000)
  expect(SEA_WATER_DENSITY).toBe(1025)
})
