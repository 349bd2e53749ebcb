import type { Random } from '../passage-log/random.ts'

/** Choices of a seeded generator. */
export class Draw {
  readonly #random: Random

  constructor(random: Random) {
    this.#random = random
  }

  between(low: number, high: number): number {
    return this.#random.between(low, high)
  }

  /** Even in the logarithm. */
  logEvenly(low: number, high: number): number {
    return Math.exp(this.#random.between(Math.log(low), Math.log(high)))
  }

  /** From `low` to `high`, both included. */
  whole(low: number, high: number): number {
    return this.#random.whole(low, high)
  }

  /** @param items  n ≥ 1 */
  of<const Item>(items: readonly Item[]): Item {
    return items[this.#random.whole(0, items.length - 1)] as Item
  }

  /** What is made, or nothing. */
  sometimes<Made extends object>(share: number, make: () => Made): Made | Record<string, never> {
    return this.#random.between(0, 1) < share ? make() : {}
  }
}
