/** Numbers of a seeded generator. */
export interface Random {
  /** from `low` up to `high` */
  readonly between: (low: number, high: number) => number
  /** a whole number from `low` to `high`, both included */
  readonly whole: (low: number, high: number) => number
}

/**
 * The same numbers for the same seed on every machine.
 *
 * @param seed  whole, 0 up to 2^32
 * @source mulberry32, Tommy Ettinger 2017, in the public domain
 */
export function randomOf(seed: number): Random {
  let state = seed >>> 0
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), state | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32
  }
  const between = (low: number, high: number): number => low + (high - low) * next()
  return { between, whole: (low, high) => Math.floor(between(low, high + 1)) }
}
