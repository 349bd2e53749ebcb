import { expect, test } from 'vitest'
import { percentileOf } from '../../src/limits/percentile.ts'
import { expectClose } from '../support/expect-close.ts'

/** Sixteen speeds in m/s, rising; the first of them are none. */
const sixteen = (none: number): Float64Array =>
  Float64Array.from([1, 1.2, 1.3, 2, 2.4, 2.5, 2.9, 3, 3.6, 3.8, 4, 4.1, 4.5, 5, 6, 8], (speed, i) =>
    i < none ? 0 : speed,
  )

// place (16 - 1) p / 100, worked by hand
test.each([
  // 0.75: 1 + 0.75 × 0.2
  [5, 1.15],
  // 3.75: 2 + 0.75 × 0.4
  [25, 2.3],
  // 7.5: half way from 3 to 3.6
  [50, 3.3],
  // 14.25: 6 + 0.25 × 2
  [95, 6.5],
  // 14.85: 6 + 0.85 × 2
  [99, 7.7],
  // 3, 6 and 12: order statistics
  [20, 2],
  [40, 2.9],
  [80, 4.5],
  [0, 1],
  [100, 8],
])('of sixteen speeds percentile %i is %d', (percent, expected) => {
  expectClose(percentileOf(sixteen(0), percent)!, expected, { rel: 1e-15 })
})

test('a percentile among speeds that are none is null', () => {
  // place 0, 2.25, 2.85
  expect([0, 15, 19].map((percent) => percentileOf(sixteen(3), percent))).toEqual([null, null, null])
})

test('a percentile between none and a speed is null: no speed lies between them', () => {
  // place 2.85 lies between the last of three that are none, and 2
  expect(percentileOf(sixteen(3), 19)).toBe(null)
  // place 3.9 with four that are none
  expect(percentileOf(sixteen(4), 26)).toBe(null)
})

test('a percentile that is the lowest speed itself is that speed, although the one below is none', () => {
  // place 3 with three that are none
  expect(percentileOf(sixteen(3), 20)).toBe(2)
})

test('all percentiles of speeds that are none are null', () => {
  expect([0, 50, 100].map((percent) => percentileOf(sixteen(16), percent))).toEqual([null, null, null])
})
