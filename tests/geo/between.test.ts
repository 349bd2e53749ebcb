import { expect, test } from 'vitest'
import { placesBetween } from '../../src/geo/between.ts'
import type { Row } from '../../src/geo/thin.ts'
import { expectClose } from '../support/expect-close.ts'

const row = (along: number, ...figures: [number, number, number]): Row => ({ along, figures })

const LARGEST_RATIO = 1.05

/** Largest ratio of a figure to that of the place before, with both rows. */
function largestRatio(a: Row, b: Row, places: readonly number[]): number {
  const alongs = [a.along, ...places, b.along]
  const figuresAt = (along: number) =>
    a.figures.map((from, i) => from + ((along - a.along) / (b.along - a.along)) * (b.figures[i]! - from))
  return Math.max(
    ...alongs.slice(1).flatMap((along, k) => {
      const before = figuresAt(alongs[k]!)
      return figuresAt(along).map((figure, i) => Math.max(figure / before[i]!, before[i]! / figure))
    }),
  )
}

test('a depth that doubles needs 14 places, each a twentieth above the one before', () => {
  const places = placesBetween([[row(0, 2, 30, 30), row(1000, 4, 30, 30)]])
  // 2 · 1.05^k up to 4, at 1000 m · (1.05^k - 1): ln 2 / ln 1.05 = 14.2
  expect(places).toHaveLength(14)
  expectClose(places[0]!, 50, { abs: 1e-6 })
  expectClose(places[1]!, 102.5, { abs: 1e-6 })
  expectClose(places[13]!, 979.93159944, { abs: 1e-6 })
})

test('a depth that halves needs as many, the nearest ones where it is least', () => {
  const places = placesBetween([[row(0, 4, 30, 30), row(1000, 2, 30, 30)]])
  expect(places).toHaveLength(14)
  // 4 / 1.05
  expectClose(places[0]!, 95.238095238, { abs: 1e-6 })
})

test('figures within a twentieth of each other need none', () => {
  expect(placesBetween([[row(0, 4, 30, 41), row(800, 4.19, 28.7, 40)]])).toEqual([])
  expect(placesBetween([[row(0, 4, 30, 41), row(800, 4, 30, 41)]])).toEqual([])
  expect(placesBetween([])).toEqual([])
})

test('the figure that changes most at a place decides, whichever way it goes', () => {
  const pair = [row(100, 8, 20, 300), row(1100, 3, 90, 120)] as const
  const places = placesBetween([pair])
  expectClose(largestRatio(...pair, places), LARGEST_RATIO, { abs: 1e-9 })
  expect(places).toEqual(places.toSorted((a, b) => a - b))
  expect(Math.min(...places)).toBeGreaterThan(100)
  expect(Math.max(...places)).toBeLessThan(1100)
})

test('a segment of very uneven stations gets at most 2000 more, farther apart and none without', () => {
  const rows = Array.from({ length: 401 }, (_, i) => row(i * 100, i % 2 === 0 ? 2 : 4, 30, 30))
  const pairs = rows.slice(1).map((b, i) => [rows[i]!, b] as const)
  const places = placesBetween(pairs)
  // at 1.05² a doubling takes 7.1 steps, at 1.05⁴ 3.6: seven between would be 2800, three are 1200
  expect(places).toHaveLength(1200)
  const first = places.filter((along) => along < 100)
  expectClose(largestRatio(rows[0]!, rows[1]!, first), 1.21550625, { abs: 1e-9 })
})
