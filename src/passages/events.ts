import type { Direction } from '../domain/segment.ts'
import type { Judge } from './judge.ts'
import type { Judgement } from './judgement.ts'
import type { Fairway } from './placement.ts'
import type { Mark, Pause } from './timeline.ts'

/** Standard deviation of a speed over ground from satellite positioning, kn: 0.5 (own choice), in m/s. */
const SPEED_ERROR = (0.5 * 1852) / 3600
/** Error of a position that a maximum is tried with, m: what positioning gives without corrections (own choice). */
const POSITION_ERROR = 10

/** Consecutive reports of one vessel on one segment that are faster than was advisable. SI; NaN where unknown. */
export interface PassageEvent {
  readonly fairway: Fairway
  readonly direction: Direction | undefined
  readonly certainty: 'certain' | 'depends-on-draught'
  readonly first: Mark
  readonly last: Mark
  readonly reports: number
  /** along the sailing line, m */
  readonly distance: number
  readonly peak: Mark & { readonly judgement: Judgement }
  readonly meanExcess: number
  readonly postedPeakExcess: number
  readonly firstLine: number
  readonly lastLine: number
  /** probability that the peak excess is above zero, 0 to 1 */
  readonly confidence: number
}

type JudgedMark = PassageEvent['peak']

interface OpenEvent {
  fairway: Fairway
  direction: Direction | undefined
  isCertain: boolean
  first: JudgedMark
  last: JudgedMark
  peak: JudgedMark
  reports: number
  distance: number
  excessSum: number
  excessCount: number
  postedPeak: number
  firstLine: number
  lastLine: number
}

/**
 * Standard normal distribution function.
 *
 * @error below 7.5e-8
 * @source Abramowitz and Stegun, Handbook of Mathematical Functions, eq. 26.2.17
 */
export function normalDistribution(x: number): number {
  const t = 1 / (1 + 0.2316419 * Math.abs(x))
  const series =
    t * (0.31938153 + t * (-0.356563782 + t * (1.781477937 + t * (-1.821255978 + t * 1.330274429))))
  const tail = (Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI)) * series
  return x >= 0 ? 1 - tail : tail
}

const isJudged = (mark: Mark | Pause): mark is JudgedMark => mark.judgement !== undefined

function isExceeding(mark: Mark | Pause): mark is JudgedMark {
  return (
    isJudged(mark) &&
    (mark.judgement.verdict === 'exceeds' || mark.judgement.verdict === 'depends-on-draught')
  )
}

const isHigher = (a: number, b: number): boolean => a > b || (Number.isNaN(b) && !Number.isNaN(a))

/** Finds the events of one vessel in its reports, in the order of time. */
export class EventFinder {
  #open: OpenEvent | undefined
  readonly #judge: Judge
  readonly #maxGap: number
  readonly #minReports: number
  readonly #found: (event: PassageEvent) => void

  /**
   * @param maxGap      s between reports that still belong together
   * @param minReports  least number of reports of an event
   * @param found       is given each event as it closes
   */
  constructor(judge: Judge, maxGap: number, minReports: number, found: (event: PassageEvent) => void) {
    this.#judge = judge
    this.#maxGap = maxGap
    this.#minReports = minReports
    this.#found = found
  }

  take(mark: Mark | Pause): void {
    if (this.#open && !this.#belongs(this.#open, mark)) this.end()
    if (!isExceeding(mark)) return
    if (this.#open) extend(this.#open, mark)
    else this.#open = opened(mark)
  }

  end(): void {
    const open = this.#open
    this.#open = undefined
    if (open && open.reports >= this.#minReports) this.#found(this.#closed(open))
  }

  #belongs({ last, fairway, direction }: OpenEvent, mark: Mark | Pause): boolean {
    if (!isExceeding(mark)) return false
    const { report, placement } = mark
    return (
      placement.fairway === fairway &&
      report.time - last.report.time <= this.#maxGap &&
      (direction === undefined || placement.direction === undefined || placement.direction === direction)
    )
  }

  #closed(open: OpenEvent): PassageEvent {
    const { judgement, placement } = open.peak
    const { excess } = judgement
    const figures = this.#judge.asSailed(judgement, placement)
    const ofPosition = this.#judge.effectOfOffset(judgement, placement, POSITION_ERROR)
    return {
      fairway: open.fairway,
      direction: open.direction,
      certainty: open.isCertain ? 'certain' : 'depends-on-draught',
      first: open.first,
      last: open.last,
      reports: open.reports,
      distance: open.distance,
      peak: { ...open.peak, judgement: { ...judgement, ...figures } },
      meanExcess: open.excessSum / open.excessCount,
      postedPeakExcess: open.postedPeak,
      firstLine: open.firstLine,
      lastLine: open.lastLine,
      confidence: normalDistribution(excess / Math.hypot(SPEED_ERROR, ofPosition)),
    }
  }
}

function opened(mark: JudgedMark): OpenEvent {
  const { placement, judgement, report } = mark
  const { fairway, direction } = placement
  if (!fairway) throw new RangeError('A judged report has a fairway')
  const hasExcess = !Number.isNaN(judgement.excess)
  return {
    fairway,
    direction,
    isCertain: judgement.verdict === 'exceeds',
    first: mark,
    last: mark,
    peak: mark,
    reports: 1,
    distance: 0,
    excessSum: hasExcess ? judgement.excess : 0,
    excessCount: hasExcess ? 1 : 0,
    postedPeak: judgement.postedExcess,
    firstLine: report.line,
    lastLine: report.line,
  }
}

function extend(open: OpenEvent, mark: JudgedMark): void {
  const { placement, judgement, report } = mark
  open.direction ??= placement.direction
  open.isCertain ||= judgement.verdict === 'exceeds'
  open.distance += Math.abs(placement.along - open.last.placement.along)
  open.last = mark
  open.reports += 1
  if (!Number.isNaN(judgement.excess)) {
    open.excessSum += judgement.excess
    open.excessCount += 1
  }
  if (isHigher(judgement.excess, open.peak.judgement.excess)) open.peak = mark
  if (isHigher(judgement.postedExcess, open.postedPeak)) open.postedPeak = judgement.postedExcess
  open.firstLine = Math.min(open.firstLine, report.line)
  open.lastLine = Math.max(open.lastLine, report.line)
}
