import { sum } from 'd3-array'
import { twoSidedProbability } from './student.ts'

/** Share of a column that the earlier ones must leave for it to count; 0.1 is R² of 0.99. Own choice. */
const LEAST_REST = 0.1
/** Degrees of freedom that must be left after a column. Own choice. */
const LEAST_DEGREES = 2

export interface Slope {
  /** NaN where the column cannot be told from earlier ones or too few rows are left */
  readonly slope: number
  /** two-sided, 0 to 1; NaN with the slope */
  readonly pValue: number
}

const NO_SLOPE: Slope = { slope: NaN, pValue: NaN }

interface Entered {
  readonly column: number
  /** of length one, at right angles to those before */
  readonly direction: readonly number[]
  /** parts of the column along the directions up to its own: a column of R */
  readonly parts: readonly number[]
}

/**
 * Multiple least squares of centred columns, by modified Gram-Schmidt: X = Q R, slopes b = R⁻¹ Qᵀ y, their standard
 * errors s ‖row of R⁻¹‖ with s² the residual sum over the degrees of freedom, each slope by Student's t.
 *
 * Columns enter in their order; one of which the earlier leave less than a tenth, or that would leave fewer than two
 * degrees of freedom, stays out (own choices).
 *
 * @param columns   figures, each centred
 * @param response  y, centred in the same way
 * @param centres   number of means that were taken off, ≥ 1
 * @returns in the order of the columns
 * @source Björck, Å. (1996), Numerical Methods for Least Squares Problems, ch. 2.4; t of a slope: Draper & Smith (1998),
 *   Applied Regression Analysis
 */
export function leastSquares(
  columns: readonly (readonly number[])[],
  response: readonly number[],
  centres: number,
): Slope[] {
  const entered: Entered[] = []
  columns.forEach((values, column) => {
    if (response.length - centres - entered.length - 1 < LEAST_DEGREES) return
    const taken = project(values, entered)
    const length = Math.sqrt(dot(taken.rest, taken.rest))
    if (!(length > LEAST_REST * Math.sqrt(dot(values, values)))) return
    const direction = taken.rest.map((value) => value / length)
    entered.push({ column, direction, parts: [...taken.parts, length] })
  })
  const slopes = columns.map(() => NO_SLOPE)
  const { parts, rest } = project(response, entered)
  const degrees = response.length - centres - entered.length
  const variance = dot(rest, rest) / degrees
  const inverse = inverted(entered.map((one) => one.parts))
  entered.forEach(({ column }, at) => {
    const row = inverse[at] ?? []
    const slope = dot(row, parts)
    const standardError = Math.sqrt(variance * dot(row, row))
    slopes[column] = { slope, pValue: slope === 0 ? 1 : twoSidedProbability(slope / standardError, degrees) }
  })
  return slopes
}

/** Sum of the products, place by place. */
export function dot(a: readonly number[], b: readonly number[]): number {
  return sum(a, (value, at) => value * (b[at] ?? 0))
}

/** Parts of values along the directions, and what is left at right angles to all. */
function project(values: readonly number[], entered: readonly Entered[]) {
  let rest = [...values]
  const parts = entered.map(({ direction }) => {
    const part = dot(rest, direction)
    rest = rest.map((value, at) => value - part * (direction[at] ?? 0))
    return part
  })
  return { parts, rest }
}

/** Rows of the inverse of an upper triangle that is given by its columns. */
function inverted(triangle: readonly (readonly number[])[]): number[][] {
  const inverse = triangle.map(() => triangle.map(() => 0))
  triangle.forEach((column, j) => {
    const diagonal = column[j] ?? NaN
    inverse.forEach((row, i) => {
      if (i > j) return
      const above = i === j ? -1 : dot(row.slice(i, j), column.slice(i, j))
      row[j] = -above / diagonal
    })
  })
  return inverse
}
