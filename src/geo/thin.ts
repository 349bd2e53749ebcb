/** Figures of a place along a line: depth and the distances to both banks, m. */
export interface Row {
  readonly along: number
  readonly figures: readonly [number, number, number]
}

/** Most that each figure may move, m. */
export type Tolerances = readonly [number, number, number]

/** Places of the least and the greatest of each figure and of the width. */
function extremes(rows: readonly Row[]): number[] {
  const measures: readonly ((row: Row) => number)[] = [
    ({ figures }) => figures[0],
    ({ figures }) => figures[1],
    ({ figures }) => figures[2],
    ({ figures }) => figures[1] + figures[2],
  ]
  return measures.flatMap((measure) => {
    let [least, most] = [0, 0]
    rows.forEach((row, i) => {
      if (measure(row) < measure(rows[least] ?? row)) least = i
      if (measure(row) > measure(rows[most] ?? row)) most = i
    })
    // a constant figure has no extremes
    return least === most ? [] : [least, most]
  })
}

/** Most that a row leaves the straight line between two others, in tolerances. */
function departure(row: Row, a: Row, b: Row, tolerances: Tolerances): number {
  const share = (row.along - a.along) / (b.along - a.along)
  return Math.max(
    ...tolerances.map((tolerance, k) => {
      const [value = 0, from = 0, to = 0] = [row.figures[k], a.figures[k], b.figures[k]]
      return Math.abs(value - from - share * (to - from)) / tolerance
    }),
  )
}

/**
 * Rows that are needed so that linear interpolation between them reproduces all others within tolerances.
 *
 * The line is split at its worst row until no row is left out by more than the tolerance (Ramer 1972, Douglas and
 * Peucker 1973, with the departure measured in the figures at the same place). Extremes are kept exactly.
 *
 * @param rows        n ≥ 1, along rising strictly
 * @param isNeeded    n flags of rows to keep in any case
 * @returns indices, rising: the first, the last, and what lies between as needed
 */
export function thinned(
  rows: readonly Row[],
  tolerances: Tolerances,
  isNeeded: readonly boolean[],
): number[] {
  const kept = new Set([0, rows.length - 1, ...extremes(rows)])
  isNeeded.forEach((needed, i) => {
    if (needed) kept.add(i)
  })
  const fixed = [...kept].sort((a, b) => a - b)
  const open = fixed.slice(1).map((to, i) => [fixed[i] ?? 0, to] as const)
  for (let span = open.pop(); span; span = open.pop()) {
    const [from, to] = span
    const [a, b] = [rows[from], rows[to]]
    let [worst, most] = [-1, 1]
    for (let i = from + 1; i < to; i++) {
      const row = rows[i]
      const by = row && a && b ? departure(row, a, b, tolerances) : 0
      if (by > most) [worst, most] = [i, by]
    }
    if (worst < 0) continue
    kept.add(worst)
    open.push([from, worst], [worst, to])
  }
  return [...kept].sort((a, b) => a - b)
}
