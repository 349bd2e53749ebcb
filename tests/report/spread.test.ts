import fc from 'fast-check'
import { expect, test } from 'vitest'
import { spread } from '../../src/report/spread.ts'

const label = (at: number, width = 10, weight = 1) => ({ at, width, weight })

test('labels with room stay where they belong', () => {
  expect(spread([label(20), label(50), label(80)], [0, 100])).toEqual([20, 50, 80])
})

test('labels that would touch move apart evenly', () => {
  // two of 10 px and a gap of 3 about 50: middles at 50 - 6.5 and 50 + 6.5
  expect(spread([label(50), label(50)], [0, 100])).toEqual([43.5, 56.5])
})

test('labels at the ends stay on the row', () => {
  expect(spread([label(0), label(100)], [0, 100])).toEqual([5, 95])
})

test('where not all have room, the weightiest stay', () => {
  expect(spread([label(5, 10, 1), label(10, 10, 3), label(15, 10, 2)], [0, 23])).toEqual([undefined, 5, 18])
})

test('labels never touch, leave the row or change their order', () => {
  const wanted = fc.array(
    fc.record({
      at: fc.double({ min: -50, max: 650, noNaN: true }),
      width: fc.integer({ min: 1, max: 60 }),
      weight: fc.integer({ min: 0, max: 9 }),
    }),
    { maxLength: 40 },
  )
  fc.assert(
    fc.property(wanted, (all) => {
      const sorted = [...all].sort((a, b) => a.at - b.at)
      let edge = 0
      spread(sorted, [0, 600], 2).forEach((middle, i) => {
        if (middle === undefined) return
        const { width } = sorted[i]!
        // sums of doubles
        expect(middle - width / 2).toBeGreaterThanOrEqual(edge - 1e-6)
        expect(middle + width / 2).toBeLessThanOrEqual(600 + 1e-6)
        edge = middle + width / 2 + 2
      })
    }),
  )
})
