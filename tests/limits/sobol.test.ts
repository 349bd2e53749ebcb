import { expect, test } from 'vitest'
import { shiftedSobol, sobolIntegers } from '../../src/limits/sobol.ts'

const DIMENSIONS = [0, 1, 2, 3, 4, 5]

const pointsAt = (index: number): number[] =>
  DIMENSIONS.map((dimension) => sobolIntegers(dimension, index + 1).at(-1)! / 2 ** 32)

// scipy 1.17.1, qmc.Sobol(d=6, scramble=False, bits=32).random(16), which has the same direction numbers
const FIRST_SIXTEEN = [
  [0, 0, 0, 0, 0, 0],
  [0.5, 0.5, 0.5, 0.5, 0.5, 0.5],
  [0.75, 0.25, 0.25, 0.25, 0.75, 0.75],
  [0.25, 0.75, 0.75, 0.75, 0.25, 0.25],
  [0.375, 0.375, 0.625, 0.875, 0.375, 0.125],
  [0.875, 0.875, 0.125, 0.375, 0.875, 0.625],
  [0.625, 0.125, 0.875, 0.625, 0.625, 0.875],
  [0.125, 0.625, 0.375, 0.125, 0.125, 0.375],
  [0.1875, 0.3125, 0.9375, 0.4375, 0.5625, 0.3125],
  [0.6875, 0.8125, 0.4375, 0.9375, 0.0625, 0.8125],
  [0.9375, 0.0625, 0.6875, 0.1875, 0.3125, 0.5625],
  [0.4375, 0.5625, 0.1875, 0.6875, 0.8125, 0.0625],
  [0.3125, 0.1875, 0.3125, 0.5625, 0.9375, 0.4375],
  [0.8125, 0.6875, 0.8125, 0.0625, 0.4375, 0.9375],
  [0.5625, 0.4375, 0.0625, 0.8125, 0.1875, 0.6875],
  [0.0625, 0.9375, 0.5625, 0.3125, 0.6875, 0.1875],
]

// the same sequence further on, times 2³²
const FURTHER = [
  [100, [1778384896, 1107296256, 3321888768, 3120562176, 3791650816, 3187671040]],
  [1000, [943718400, 415236096, 2227175424, 2906652672, 1203765248, 3896508416]],
  [2047, [2097152, 2694840320, 3999268864, 1507852288, 2707423232, 2824863744]],
] as const

test('the first sixteen points are those of another implementation', () => {
  expect(FIRST_SIXTEEN.map((_, i) => pointsAt(i))).toEqual(FIRST_SIXTEEN)
})

test.each(FURTHER)('point %i is that of another implementation', (index, expected) => {
  expect(pointsAt(index).map((point) => point * 2 ** 32)).toEqual(expected)
})

test('each power of two points has one in each part of every dimension, whatever the shift', () => {
  for (const dimension of DIMENSIONS) {
    for (const shift of [0, 1, 0x9e3779b9, 2 ** 32 - 1]) {
      const points = shiftedSobol(dimension, 4096, shift)
      for (let parts = 1; parts <= 4096; parts *= 2) {
        const found = new Set(points.subarray(0, parts).map((point) => Math.floor(point * parts)))
        expect(found.size, `${dimension} ${shift} ${parts}`).toBe(parts)
      }
    }
  }
})

test('every pair of dimensions fills the square evenly, which dimensions alike would not', () => {
  for (const a of DIMENSIONS) {
    for (const b of DIMENSIONS.slice(a + 1)) {
      const [xs, ys] = [shiftedSobol(a, 4096, 0x12345678), shiftedSobol(b, 4096, 0x87654321)]
      const counts = new Map<number, number>()
      xs.forEach((x, i) => {
        const box = Math.floor(x * 8) * 8 + Math.floor(ys[i]! * 8)
        counts.set(box, (counts.get(box) ?? 0) + 1)
      })
      // 64 in each of 64 boxes; random points would scatter by 8
      expect(counts.size).toBe(64)
      expect([...counts.values()].every((count) => Math.abs(count - 64) <= 8)).toBe(true)
    }
  }
})

test('no shift moves a point to an end of the range', () => {
  for (const shift of [0, 2 ** 32 - 1]) {
    const [first] = shiftedSobol(0, 1, shift)
    // half of a part of 2⁻³² from the end
    expect(Math.min(first!, 1 - first!)).toBe(2 ** -33)
  }
})

test('a dimension without direction numbers is refused', () => {
  for (const dimension of [-1, 6, 0.5, NaN]) expect(() => sobolIntegers(dimension, 4)).toThrow(RangeError)
})
