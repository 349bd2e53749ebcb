import { expect, test } from 'vitest'
import { rowsBetween } from '../../src/geo/between.ts'
import type { Row } from '../../src/geo/thin.ts'
import { expectClose } from '../support/expect-close.ts'

const row = (along: number, ...figures: [number, number, number]): Row => ({ along, figures })

const placesBetween = (pairs: readonly (readonly [Row, Row])[]) =>
  rowsBetween(pairs).map(({ along: at }) => at)

const LARGEST_RATIO = 1.02

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

test('a depth that grows by half needs 20 places, each a fiftieth above the one before', () => {
  const places = placesBetween([[row(0, 2, 30, 30), row(1000, 3, 30, 30)]])
  // 2 m · 1.02^k up to 3 m, at 2000 m · (1.02^k - 1): ln 1.5 / ln 1.02 = 20.5
  expect(places).toHaveLength(20)
  expectClose(places[0]!, 40, { abs: 1e-6 })
  expectClose(places[1]!, 80.8, { abs: 1e-6 })
  expectClose(places[19]!, 971.894792, { abs: 1e-5 })
})

test('a depth that falls by as much needs as many, the nearest ones where it is least', () => {
  const places = placesBetween([[row(0, 3, 30, 30), row(1000, 2, 30, 30)]])
  expect(places).toHaveLength(20)
  // 3 m / 1.02
  expectClose(places[0]!, 58.82352941, { abs: 1e-6 })
})

test('figures within a fiftieth of each other need none', () => {
  expect(placesBetween([[row(0, 4, 30, 41), row(800, 4.07, 29.5, 40.3)]])).toEqual([])
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

test('a segment of very uneven stations gets at most 1000 more, farther apart and none without', () => {
  const rows = Array.from({ length: 401 }, (_, i) => row(i * 100, i % 2 === 0 ? 2 : 4, 30, 30))
  const pairs = rows.slice(1).map((b, i) => [rows[i]!, b] as const)
  const places = placesBetween(pairs)
  // at 1.02⁸ a doubling takes 4.4 steps, at 1.02¹⁶ 2.2: four between would be 1600, two are 800
  expect(places).toHaveLength(800)
  const first = places.filter((along) => along < 100)
  expectClose(largestRatio(rows[0]!, rows[1]!, first), 1.372785705, { abs: 1e-8 })
})
