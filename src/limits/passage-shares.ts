import type { Direction } from '../domain/segment.ts'
import { toKnots } from '../domain/units.ts'
import type { PassageCounts } from './plan.ts'

export interface PassageShare {
  readonly passages: number
  /** share that was faster than the limit, 0 to 1; absent without a passage or a limit */
  readonly exceedingRatio?: number
}

/** Passages of a log by segment. */
export class PassageShares {
  readonly #bySegment = new Map<string, PassageCounts[]>()

  constructor(passages: readonly PassageCounts[]) {
    for (const counts of passages) {
      const found = this.#bySegment.get(counts.segmentId) ?? []
      found.push(counts)
      this.#bySegment.set(counts.segmentId, found)
    }
  }

  /**
   * Passages on some segments, and how many were faster than a limit over the ground, m/s. Within a bin passages count
   * as evenly spread. Logs know classes and not loadings: where two groups share a class, each has all its passages.
   */
  share(
    segmentIds: readonly string[],
    classes: ReadonlySet<string>,
    direction: 'both' | Direction,
    limit: number | undefined,
  ): PassageShare {
    let passages = 0
    let faster = 0
    for (const id of segmentIds) {
      for (const counts of this.#bySegment.get(id) ?? []) {
        if (!classes.has(counts.vesselClass)) continue
        if (direction !== 'both' && counts.direction !== direction) continue
        passages += counts.counts.reduce((sum, count) => sum + count, 0)
        if (limit !== undefined) faster += fasterThan(counts, toKnots(limit))
      }
    }
    const hasRatio = limit !== undefined && passages > 0
    return { passages, ...(hasRatio && { exceedingRatio: Math.min(1, faster / passages) }) }
  }
}

/** Passages above a speed, kn; a bin that the speed falls into counts by the part above it. */
function fasterThan({ step, counts }: PassageCounts, speed: number): number {
  return counts.reduce((sum, count, i) => {
    const part = i + 1 - speed / step
    return sum + count * Math.min(1, Math.max(0, part))
  }, 0)
}
