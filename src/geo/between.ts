import type { Row } from './thin.ts'

/**
 * Most that a figure changes from one station to the next, as a ratio: own choice.
 *
 * Over 2500 random pairs of stations, every built-in class and figures up to 2.5 times apart, the lowest speed of the
 * stations lies above that of 400 places between them by 0.1 % at the 95th percentile, 0.4 % at the 99th and 15 % at
 * most; with the pair alone by 1.5, 7 and 30 %. The rest is lost in narrow windows where the range of a method ends.
 */
const LARGEST_RATIO = 1.05

/** Most stations that are put between those of one segment; beyond it they lie farther apart: own choice. */
const MOST_PLACES = 2000

/** A place this near to the next station, as a share of the way there, is that station. */
const SAME_PLACE_SHARE = 1e-9

/** Share of the way between two rows at which a figure has changed by the ratio, seen from a share before. */
function nextShare(a: Row, b: Row, share: number, ratio: number): number {
  let least = Infinity
  a.figures.forEach((from, i) => {
    const change = (b.figures[i] ?? from) - from
    const value = from + share * change
    if (change > 0) least = Math.min(least, (value * (ratio - 1)) / change)
    if (change < 0) least = Math.min(least, (value * (1 - 1 / ratio)) / -change)
  })
  return share + least
}

function placesAt(pairs: readonly (readonly [Row, Row])[], ratio: number): number[] | null {
  const places: number[] = []
  for (const [a, b] of pairs) {
    let share = nextShare(a, b, 0, ratio)
    while (share < 1 - SAME_PLACE_SHARE) {
      if (places.length === MOST_PLACES) return null
      places.push(a.along + share * (b.along - a.along))
      share = nextShare(a, b, share, ratio)
    }
  }
  return places
}

/**
 * Places between neighbouring rows at which a station is needed too.
 *
 * Figures are straight between rows, the speed that they allow is not: one place may be deep and narrow, the next
 * shallow and wide, and one between them stricter than both. So no figure changes by more than a twentieth between one
 * station and the next, or by as little as 2000 stations make of it.
 *
 * @param pairs  neighbours between which figures are straight, all figures > 0, m
 * @returns m along the line, rising within each pair
 */
export function placesBetween(pairs: readonly (readonly [Row, Row])[]): number[] {
  let ratio = LARGEST_RATIO
  let places = placesAt(pairs, ratio)
  while (!places) {
    ratio *= ratio
    places = placesAt(pairs, ratio)
  }
  return places
}
