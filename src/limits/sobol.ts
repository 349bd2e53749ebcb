/**
 * Primitive polynomial and first direction numbers of the dimensions after the first: its degree is the number of m,
 * the bits of a are its inner coefficients.
 */
const DIRECTIONS = [
  { a: 0, m: [1] },
  { a: 1, m: [1, 3] },
  { a: 1, m: [1, 3, 1] },
  { a: 2, m: [1, 1, 1] },
  { a: 1, m: [1, 1, 3, 3] },
] as const

/** Dimensions that have direction numbers here. */
export const SOBOL_DIMENSIONS = DIRECTIONS.length + 1

const BITS = 32

/** The 32 direction numbers of a dimension, each with its binary point before the first bit. */
function directionNumbers(dimension: number): Uint32Array {
  const numbers = new Uint32Array(BITS)
  const at = (k: number): number => numbers[k] ?? 0
  const { a, m } = dimension === 0 ? { a: 0, m: [] } : (DIRECTIONS[dimension - 1] ?? { a: NaN, m: [] })
  const degree = m.length
  for (let k = 0; k < BITS; k += 1) {
    const given = dimension === 0 ? 1 : m[k]
    if (given !== undefined) {
      numbers[k] = given << (BITS - 1 - k)
      continue
    }
    let number = at(k - degree) ^ (at(k - degree) >>> degree)
    for (let j = 1; j < degree; j += 1) {
      if (((a >>> (degree - 1 - j)) & 1) === 1) number ^= at(k - j)
    }
    numbers[k] = number
  }
  return numbers
}

/**
 * The first points of a Sobol' sequence in one of its dimensions, in the order of the Gray code, as integers: divided by
 * 2³² they are the numbers of the sequence.
 *
 *   x₀ = 0,  xᵢ₊₁ = xᵢ xor v_c,  c the place of the lowest zero bit of i
 *
 * @param dimension  0 to 5
 * @param count      n points, n ≥ 0
 * @returns n integers, 0 to 2³² − 1; of the first 2ᵏ, k ≤ 32, each of the 2ᵏ equal parts of the range holds one
 * @throws RangeError for a dimension without direction numbers
 * @source Joe & Kuo (2008), Constructing Sobol sequences with better two-dimensional projections, SIAM J. Sci. Comput.
 * 30, 2635–2654; direction numbers of its file new-joe-kuo-6.21201; order of Antonov & Saleev (1979)
 */
export function sobolIntegers(dimension: number, count: number): Uint32Array {
  if (!Number.isInteger(dimension) || dimension < 0 || dimension >= SOBOL_DIMENSIONS)
    throw new RangeError(`No direction numbers for dimension ${dimension}`)
  const numbers = directionNumbers(dimension)
  const points = new Uint32Array(count)
  let point = 0
  for (let i = 0; i + 1 < count; i += 1) {
    // the lowest zero bit of i is the lowest set bit of its complement
    const place = 31 - Math.clz32(~i & (i + 1))
    point ^= numbers[place] ?? 0
    points[i + 1] = point
  }
  return points
}

/**
 * The first points of a Sobol' sequence in one of its dimensions, moved by a digital shift.
 *
 * @param dimension  0 to 5
 * @param count      n points, n ≥ 0
 * @param shift      integer, 0 to 2³² − 1: its bits turn those of every point
 * @returns n numbers inside (0, 1), the middles of 2³² equal parts: neither end is reached. A shift leaves each part of
 * 2ᵏ with as many points as before
 * @throws RangeError for a dimension without direction numbers
 * @source L'Ecuyer & Lemieux (2002), Recent advances in randomized quasi-Monte Carlo methods, in Modeling Uncertainty,
 * 419–474, for the digital shift
 */
export function shiftedSobol(dimension: number, count: number, shift: number): Float64Array {
  const integers = sobolIntegers(dimension, count)
  const points = new Float64Array(count)
  integers.forEach((point, i) => {
    points[i] = (((point ^ shift) >>> 0) + 0.5) / 2 ** BITS
  })
  return points
}
