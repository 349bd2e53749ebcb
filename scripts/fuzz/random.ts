/** Numbers that a seed decides (mulberry32). */
export class Random {
  #state: number

  constructor(seed: number) {
    this.#state = seed >>> 0
  }

  /** @returns 0 to 1, 1 excluded */
  next(): number {
    this.#state = (this.#state + 0x6d2b79f5) >>> 0
    let t = this.#state
    t = Math.imul(t ^ (t >>> 15), t | 1)
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61)
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296
  }

  chance(share: number): boolean {
    return this.next() < share
  }

  below(count: number): number {
    return Math.floor(this.next() * count)
  }

  pick<T>(items: readonly T[]): T {
    return items[this.below(items.length)] as T
  }
}
