import { expect, test } from 'vitest'
import { isDifferent, leftOutError } from '../../src/calibration/cross-validation.ts'
import type { Measurement } from '../../src/calibration/measurement.ts'
import { ratiosOf } from '../../src/calibration/ratio.ts'
import { expectClose } from '../support/expect-close.ts'
import { normalFrom, passagesOf, uniformOf } from './passages.ts'
import { COMPUTED, COMPUTED_BY_ANOTHER, MEASURED } from './ten-passages.ts'

const [PASSAGE] = passagesOf({ passages: 1, seed: 1, factor: 1, scatter: 0.1 })

function measured(heights: readonly number[], ...methods: readonly (readonly number[])[]): Measurement[] {
  return heights.map((height, index) => ({
    ...PASSAGE!,
    index,
    height,
    computed: methods.map((computed) => computed[index]!),
    isInRange: methods.map(() => true),
  }))
}

test('the error of ten passages is that of another library', () => {
  // numpy 2.4.6: r[i] - median(delete(r, i)), root of the mean square
  expectClose(leftOutError(ratiosOf(measured(MEASURED, COMPUTED), 0)), 0.11775602249523083, { rel: 1e-12 })
})

test('an outlier counts as far as the bound, and not in the median of the others', () => {
  // the same ten and one at three times the computed height; numpy 2.4.6
  const eleven = ratiosOf(measured([...MEASURED, 0.9], [...COMPUTED, 0.3]), 0)
  expect(eleven.all.filter(({ isOutlier }) => isOutlier).map(({ passage }) => passage.index)).toEqual([10])
  expectClose(leftOutError(eleven), 0.15014523447509862, { rel: 1e-9 })
})

test('equal ratios leave each other out without an error', () => {
  expectClose(leftOutError(ratiosOf(measured([1, 2, 3, 4, 5], [2, 4, 6, 8, 10]), 0)), 0, { abs: 1e-15 })
})

test('methods that another library tells apart are told apart, others are not', () => {
  // scipy 1.17.1, stats.pearsonr of sums and differences: p = 0.102 and, for the wider method, 0.00022
  const wider = COMPUTED.map((height, at) => height * (at % 2 === 0 ? 1.6 : 0.7))
  const passages = measured(MEASURED, COMPUTED, COMPUTED_BY_ANOTHER, wider)
  const [one, another, wide] = [0, 1, 2].map((method) => ratiosOf(passages, method))
  expect(isDifferent(one!, another!)).toBe(false)
  expect(isDifferent(one!, wide!)).toBe(true)
  expect(isDifferent(wide!, one!)).toBe(true)
})

test('methods that differ by a constant factor are the same', () => {
  const passages = measured(
    MEASURED,
    COMPUTED,
    COMPUTED.map((height) => 1.37 * height),
  )
  expect(isDifferent(ratiosOf(passages, 0), ratiosOf(passages, 1))).toBe(false)
})

test('with fewer than five passages in common it cannot be told', () => {
  const wider = COMPUTED.map((height, at) => height * (at % 2 === 0 ? 3 : 0.3))
  const passages = measured(MEASURED, COMPUTED, wider)
  const some = passages.map((passage) => ({ ...passage, isInRange: [true, passage.index < 4] }))
  const more = passages.map((passage) => ({ ...passage, isInRange: [true, passage.index < 5] }))
  expect(isDifferent(ratiosOf(some, 0), ratiosOf(some, 1))).toBe(false)
  expect(isDifferent(ratiosOf(more, 0), ratiosOf(more, 1))).toBe(true)
})

test('methods as good as each other are told apart in one of twenty samples, a worse one in most', () => {
  const rate = (scatter: number): number => {
    let different = 0
    for (let trial = 0; trial < 400; trial += 1) {
      const uniform = uniformOf(5 + trial * 15_485_863)
      const passages = passagesOf({ passages: 40, seed: trial * 7919, factor: 1.3, scatter: 0.1 })
      const erring = passages.map((passage) => {
        const [computed = NaN] = passage.computed
        const errs = [0.2, scatter].map((deviation) => computed * Math.exp(deviation * normalFrom(uniform)))
        return { ...passage, computed: errs }
      })
      if (isDifferent(ratiosOf(erring, 0), ratiosOf(erring, 1))) different += 1
    }
    return different / 400
  }
  const [equal, worse] = [rate(0.2), rate(0.4)]
  console.info(`told apart: as good ${equal}, worse ${worse}`)
  expect(equal).toBeLessThan(0.08)
  expect(worse).toBeGreaterThan(0.9)
})

// 2026-12-01: rounding of the mean was taken for scatter, and methods were told apart by it
test('passages that are all alike tell no methods apart', () => {
  for (const count of [6, 50, 77, 100, 333]) {
    for (const height of [0.037, 0.046, 0.05, 0.071]) {
      const alike = (value: number) => Array.from({ length: count }, () => value)
      const passages = measured(alike(height), alike(0.029), alike(0.037))
      expect(isDifferent(ratiosOf(passages, 0), ratiosOf(passages, 1)), `${count} of ${height}`).toBe(false)
    }
  }
})
