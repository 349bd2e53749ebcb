import type { Judgement } from './judgement.ts'
import type { Placement } from './placement.ts'
import type { PositionReport } from './position-report.ts'

/** A report in its place, with what was found about it. */
export interface Mark {
  readonly report: PositionReport
  readonly placement: Placement
  /** undefined when it is not judged */
  readonly judgement: Judgement | undefined
}

/** A report that is not matched: all that is kept of it is that the vessel was elsewhere, or lay still. */
export interface Pause {
  readonly report: { readonly time: number }
  readonly placement?: undefined
  readonly judgement?: undefined
}

/**
 * Reports of one vessel in the order of their times: each is handed on when no earlier one may come any more.
 * Holds the reports of the last `maxGap` seconds.
 */
export class Timeline<Item extends Mark | Pause = Mark> {
  #waiting: Item[] = []
  #newest = -Infinity
  readonly #maxGap: number

  /** @param maxGap  s that reports may go back in time */
  constructor(maxGap: number) {
    this.#maxGap = maxGap
  }

  /** Takes a report and hands on those that have had their time. */
  add(mark: Item, settle: (mark: Item) => void): void {
    const waiting = this.#waiting
    const { time } = mark.report
    this.#newest = Math.max(this.#newest, time)
    let at = waiting.length
    while (at > 0 && (waiting[at - 1] as Item).report.time > time) at -= 1
    if (at === waiting.length) waiting.push(mark)
    else waiting.splice(at, 0, mark)
    let settled = 0
    // one that is as old as the gap may still have a neighbour of the same time
    for (const { report } of waiting) {
      if (report.time >= this.#newest - this.#maxGap) break
      settled += 1
    }
    // one for one as a rule
    if (settled === 1) settle(waiting.shift() as Item)
    else if (settled > 1) for (const old of waiting.splice(0, settled)) settle(old)
  }

  /** Hands on all that is left. */
  end(settle: (mark: Item) => void): void {
    const left = this.#waiting
    this.#waiting = []
    for (const mark of left) settle(mark)
  }
}
