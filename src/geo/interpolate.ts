/** A figure at a place along a line. */
export interface Sample {
  /** m */
  readonly along: number
  readonly value: number
}

/** Index of the last sample at or before a place; -1 before all of them. */
function indexAt(samples: readonly Sample[], along: number): number {
  let [low, high] = [-1, samples.length]
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((samples[middle]?.along ?? Infinity) <= along) low = middle
    else high = middle
  }
  return low
}

/**
 * Linear between samples, held beyond the first and the last.
 *
 * @param samples  n ≥ 1, along rising strictly
 */
export function interpolate(samples: readonly Sample[], along: number): number {
  const i = indexAt(samples, along)
  const [a, b] = [samples[i], samples[i + 1]]
  if (!a || !b) return (a ?? b)?.value ?? NaN
  return a.value + ((along - a.along) / (b.along - a.along)) * (b.value - a.value)
}
