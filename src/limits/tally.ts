import { CRITERION_IDS, type CriterionId } from '../advisory/criteria/criterion.ts'
import type { Decision } from '../advisory/decide.ts'
import type { Sampled } from './cell.ts'
import { percentileOf } from './percentile.ts'

/** Gathers the samples of one cell. A sample that is not added is impossible. */
export class Tally {
  /** over the ground, m/s; 0 without a safe speed */
  readonly #speeds: Float64Array
  readonly #governed = new Map<CriterionId, number>()

  /** @param count  n samples of the cell, n ≥ 1 */
  constructor(count: number) {
    this.#speeds = new Float64Array(count)
  }

  /** Adds what sample `index` decides, 0 ≤ index < n; each sample once. */
  add(index: number, { outcome, overGround, governing }: Decision): void {
    // a safe speed over the ground is above 0
    if (outcome !== 'no-safe-speed') this.#speeds[index] = overGround
    const { id } = governing.criterion
    this.#governed.set(id, (this.#governed.get(id) ?? 0) + 1)
  }

  /** @param percentiles  per cents, 0 to 100 */
  sampled(percentiles: readonly number[]): Sampled {
    const sorted = this.#speeds.slice().sort()
    const count = sorted.length
    const firstSafe = sorted.findIndex((speed) => speed > 0)
    const governedBy: Partial<Record<CriterionId, number>> = {}
    for (const id of CRITERION_IDS) {
      const governed = this.#governed.get(id)
      if (governed !== undefined) governedBy[id] = governed / count
    }
    return {
      noSafeRatio: (firstSafe === -1 ? count : firstSafe) / count,
      percentiles: percentiles.map((percent) => percentileOf(sorted, percent)),
      governedBy,
    }
  }
}
