/**
 * Percentile of speeds by linear interpolation between order statistics, at (n − 1) p / 100.
 *
 * @param sorted   n speeds, rising, n ≥ 1; 0 stands for none, below all others
 * @param percent  p, 0 to 100
 * @returns in the unit of the speeds; null when a speed it lies between, with a weight above 0, is none: a speed
 * interpolated with none would allow what no sample allows
 * @source Hyndman & Fan (1996), Sample quantiles in statistical packages, Am. Stat. 50, 361–365, definition 7
 */
export function percentileOf(sorted: Float64Array, percent: number): number | null {
  const place = ((sorted.length - 1) * percent) / 100
  const index = Math.floor(place)
  // the lower neighbour has a weight above 0 wherever the place lies, and is none if the upper one is
  const lower = sorted[index] ?? NaN
  if (lower === 0) return null
  const weight = place - index
  return weight === 0 ? lower : lower + weight * ((sorted[index + 1] ?? NaN) - lower)
}
