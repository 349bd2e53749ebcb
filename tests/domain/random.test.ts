import { expect, test } from 'vitest'
import { randomOf } from '../../src/domain/random.ts'

test('numbers are those of mulberry32, started at the seed xor FNV-1a of the name', () => {
  // published: FNV-1a of 'foobar' is bf9cf968; mulberry32 from 0 and from 1
  expect(randomOf(0xbf9cf968, 'foobar')()).toBe(0.26642920868471265)
  expect(randomOf(0xbf9cf969, 'foobar')()).toBe(0.6270739405881613)
})

test('numbers repeat from the same seed and name, and differ with either', () => {
  const ten = (seed: number, name: string): number[] => {
    const random = randomOf(seed, name)
    return Array.from({ length: 10 }, random)
  }
  expect(ten(7, 'a')).toEqual(ten(7, 'a'))
  expect(ten(7, 'a')).not.toEqual(ten(8, 'a'))
  expect(ten(7, 'a')).not.toEqual(ten(7, 'b'))
})

test('numbers fill [0, 1) evenly', () => {
  const random = randomOf(1, 'even')
  const counts = Array.from({ length: 20 }, () => 0)
  for (let draw = 0; draw < 100_000; draw += 1) {
    const place = Math.floor(random() * 20)
    counts[place] = (counts[place] ?? NaN) + 1
  }
  const squares = counts.map((count) => (count - 5000) ** 2 / 5000)
  // 99.9 % of chi square with 19 degrees of freedom (Abramowitz and Stegun 1964, table 26.8)
  expect(squares.reduce((sum, square) => sum + square, 0)).toBeLessThan(43.82)
})
