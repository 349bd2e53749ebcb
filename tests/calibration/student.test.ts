import { expect, test } from 'vitest'
import { normalBelow, studentBound, twoSidedProbability } from '../../src/calibration/student.ts'
import { expectClose } from '../support/expect-close.ts'

// expected: scipy 1.17.1, 2 * stats.t.sf(t, df)
test.each([
  [2, 10, 0.07338803477074037],
  [0.5, 1, 0.7048327646991335],
  [3.2, 2, 0.08534087923995284],
  [2.5, 7, 0.04099221858575289],
  [-2.5, 7, 0.04099221858575289],
  [1.96, 1000, 0.050273184955748736],
  [4, 25, 0.0004954436705320874],
  [1.2, 9997, 0.2301677770476507],
  [12.3, 1, 0.05164411879318927],
])('t = %d of %d degrees of freedom has the probability %d', (statistic, degrees, expected) => {
  expectClose(twoSidedProbability(statistic, degrees), expected, { abs: 1e-12 })
})

test('at zero the probability is 1, at infinity 0, and never negative between', () => {
  expect(twoSidedProbability(0, 5)).toBe(1)
  expectClose(twoSidedProbability(Infinity, 5), 0, { abs: 1e-15 })
  expectClose(twoSidedProbability(Infinity, 6), 0, { abs: 1e-15 })
  for (let statistic = 10; statistic < 100; statistic += 1) {
    for (const degrees of [20, 21, 400]) {
      expect(twoSidedProbability(statistic, degrees)).toBeGreaterThanOrEqual(0)
    }
  }
})

// expected: scipy 1.17.1, stats.t.ppf(0.975, df)
test.each([
  [1, 12.706204736174694],
  [2, 4.302652729749462],
  [7, 2.364624251592784],
  [10, 2.228138851986274],
  [59, 2.000995378088267],
  [999, 1.9623414611334493],
])('of %d degrees of freedom a twentieth is beyond %d', (degrees, expected) => {
  expectClose(studentBound(degrees), expected, { rel: 1e-9 })
})

// expected: scipy 1.17.1, stats.norm.cdf(z)
test.each([
  [-1.96, 0.024997895148220435],
  [-3.103, 0.0009578482018283592],
  [0, 0.5],
  [0.7, 0.758036347776927],
  [2.5, 0.9937903346742238],
  [-5, 2.866515718791933e-7],
])('below %d is the share %d of a normal distribution', (z, expected) => {
  expectClose(normalBelow(z), expected, { abs: 1e-14 })
})
