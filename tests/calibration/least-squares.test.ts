import { expect, test } from 'vitest'
import { leastSquares } from '../../src/calibration/least-squares.ts'
import { expectClose } from '../support/expect-close.ts'
import { COMPUTED, DEPTHS, DISTANCES, MEASURED, SPEEDS } from './ten-passages.ts'

function centred(values: readonly number[]): number[] {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length
  return values.map((value) => value - mean)
}

const FIGURES = [SPEEDS, DISTANCES, DEPTHS].map((values) => centred(values.map(Math.log)))
const RESPONSE = centred(MEASURED.map((height, at) => Math.log(height / COMPUTED[at]!)))

test('slopes and probabilities are those of another library', () => {
  // numpy 2.4.6, linalg.lstsq with a column of ones; scipy 1.17.1, 2 * stats.t.sf(|b / se|, 6)
  const slopes = [0.24317037721308304, -0.03421920816145517, 0.13293360474498747]
  const probabilities = [0.004615673167700516, 0.5019386693454755, 0.23719209780658077]
  const found = leastSquares(FIGURES, RESPONSE, 1)
  expect(found).toHaveLength(3)
  found.forEach(({ slope, pValue }, at) => {
    expectClose(slope, slopes[at]!, { rel: 1e-11 })
    expectClose(pValue, probabilities[at]!, { rel: 1e-9 })
  })
})

test('a column that goes along with an earlier one has no slope and does not disturb', () => {
  const [speed, distance] = FIGURES
  const along = speed!.map((value, at) => -2 * value + 0.001 * at)
  const [first, second, third] = leastSquares([speed!, centred(along), distance!], RESPONSE, 1)
  const [alone, other] = leastSquares([speed!, distance!], RESPONSE, 1)
  expect(second).toEqual({ slope: NaN, pValue: NaN })
  expect(first).toEqual(alone)
  expect(third).toEqual(other)
})

test('columns that would leave fewer than two degrees of freedom stay out', () => {
  const cut = FIGURES.map((values) => centred(values.slice(0, 5)))
  const found = leastSquares(cut, centred(RESPONSE.slice(0, 5)), 1)
  expect(found.map(({ slope }) => Number.isNaN(slope))).toEqual([false, false, true])
})

test('a constant response has slopes of 0 by chance alone', () => {
  const found = leastSquares(FIGURES, new Array<number>(10).fill(0), 1)
  expect(found).toEqual([1, 2, 3].map(() => ({ slope: 0, pValue: 1 })))
})
