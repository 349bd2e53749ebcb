/** Share of the lower of two maxima that those between them do not fall below (see `KnownMaxima`). */
export const CERTAIN = 0.9
/** Places so far apart that nothing is said of those between them: m, and share of the width. */
const APART = 1
const APART_SHARE = 0.02
/** Places that are kept: a hundred and those of hulls at the banks. */
const MOST_PLACES = 128

/**
 * Recommended maxima of one vessel across one section, at the offsets that were evaluated.
 *
 * Between two places close to each other a maximum is hardly below the lower one of theirs, so that a much slower report
 * needs none of its own. A bound only tells that: figures never come from it.
 *
 * @error of random vessels in random sections one in two hundred has a place between two that are 2 % of the width apart
 *   where the maximum falls below nine tenths of both, where one method's range ends and the next begins
 */
export class KnownMaxima {
  /** m, rising */
  readonly #offsets: number[] = []
  /** m/s over ground; NaN without a safe speed */
  readonly #maxima: number[] = []
  readonly #apart: number

  /** @param width  of the section, m */
  constructor(width: number) {
    this.#apart = Math.max(APART, APART_SHARE * width)
  }

  add(offset: number, max: number): void {
    const at = this.#placeOf(offset)
    if (this.#offsets[at] === offset || this.#offsets.length >= MOST_PLACES) return
    this.#offsets.splice(at, 0, offset)
    this.#maxima.splice(at, 0, max)
  }

  /** Maxima at the places to either side of an offset, m/s; NaN where none is known nearby. */
  around(offset: number): readonly [before: number, after: number] {
    const at = this.#placeOf(offset)
    const [before = NaN, after = NaN] = [this.#offsets[at - 1], this.#offsets[at]]
    if (after === offset) return [this.#maxima[at] ?? NaN, this.#maxima[at] ?? NaN]
    if (!(after - before <= this.#apart)) return [NaN, NaN]
    return [this.#maxima[at - 1] ?? NaN, this.#maxima[at] ?? NaN]
  }

  /** Index of the first place at or beyond an offset. */
  #placeOf(offset: number): number {
    let [low, high] = [-1, this.#offsets.length]
    while (high - low > 1) {
      const middle = (low + high) >> 1
      if ((this.#offsets[middle] ?? Infinity) < offset) low = middle
      else high = middle
    }
    return high
  }
}
