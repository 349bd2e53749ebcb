/** Numerator and denominator from the constant term up, as the nearest doubles, by the three parts of the range. */
const CENTRE = {
  over: [
    3.3871328727963666, 133.14166789178438, 1971.5909503065514, 13731.693765509461, 45921.95393154987,
    67265.7709270087, 33430.57558358813, 2509.0809287301227,
  ],
  under: [
    1, 42.31333070160091, 687.1870074920579, 5394.196021424751, 21213.794301586597, 39307.89580009271,
    28729.085735721943, 5226.495278852854,
  ],
} as const
const SHOULDER = {
  over: [
    1.4234371107496835, 4.630337846156546, 5.769497221460691, 3.6478483247632045, 1.2704582524523684,
    0.2417807251774506, 0.022723844989269184, 7.745450142783414e-4,
  ],
  under: [
    1, 2.053191626637759, 1.6763848301838038, 0.6897673349851, 0.14810397642748008, 0.015198666563616457,
    5.475938084995345e-4, 1.0507500716444169e-9,
  ],
} as const
const TAIL = {
  over: [
    6.657904643501103, 5.463784911164114, 1.7848265399172913, 0.29656057182850487, 0.026532189526576124,
    0.0012426609473880784, 2.7115555687434876e-5, 2.0103343992922881e-7,
  ],
  under: [
    1, 0.599832206555888, 0.1369298809227358, 0.014875361290850615, 7.868691311456133e-4,
    1.8463183175100548e-5, 1.421511758316446e-7, 2.0442631033899397e-15,
  ],
} as const

/** Half width of the centre in p, and the square from which the centre counts. */
const CENTRE_HALF = 0.425
const CENTRE_SQUARE = 0.180625
/** √(−ln p) at which the shoulder ends, and where each rational function has its origin. */
const SHOULDER_END = 5
const SHOULDER_ORIGIN = 1.6

interface Rational {
  readonly over: readonly number[]
  readonly under: readonly number[]
}

const polynomial = (coefficients: readonly number[], x: number): number => {
  let sum = 0
  for (let i = coefficients.length - 1; i >= 0; i -= 1) sum = sum * x + (coefficients[i] ?? 0)
  return sum
}

const rational = ({ over, under }: Rational, x: number): number => polynomial(over, x) / polynomial(under, x)

/**
 * Quantile of the standard normal distribution: the inverse of its distribution function.
 *
 *   z = Φ⁻¹(p)
 *
 * A rational function of degree 7 over 7 in each of three parts: |p − ½| ≤ 0.425, up to √(−ln p) = 5, and beyond.
 *
 * @param p  probability, dimensionless, inside (0, 1)
 * @returns z, dimensionless; 0 at ½, −Φ⁻¹(1 − p) wherever 1 − p is exact
 * @holds p from the smallest double to 1 − 2⁻⁵³
 * @error 1 part in 10¹⁶ by the source, a few units in the last place as computed here
 * @throws RangeError when p is not inside (0, 1)
 * @source Wichura (1988), Algorithm AS 241: the percentage points of the normal distribution, Appl. Statist. 37,
 * 477–484, routine PPND16
 */
export function normalQuantile(p: number): number {
  if (!(p > 0 && p < 1)) throw new RangeError(`A probability is inside (0, 1), not ${p}`)
  const fromCentre = p - 0.5
  if (Math.abs(fromCentre) <= CENTRE_HALF) {
    return fromCentre * rational(CENTRE, CENTRE_SQUARE - fromCentre * fromCentre)
  }
  const root = Math.sqrt(-Math.log(Math.min(p, 1 - p)))
  const size =
    root <= SHOULDER_END ? rational(SHOULDER, root - SHOULDER_ORIGIN) : rational(TAIL, root - SHOULDER_END)
  return fromCentre < 0 ? -size : size
}
