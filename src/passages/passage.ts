import type { Direction } from '../domain/segment.ts'
import type { Fairway } from './placement.ts'
import type { Mark, Pause } from './timeline.ts'

/** Matched reports of one vessel through one segment in one direction. SI; NaN where unknown. */
export interface Passage {
  readonly fairway: Fairway
  readonly classId: string
  readonly direction: Direction | undefined
  /** time-weighted mean over ground, m/s */
  readonly speed: number
  /** to the left and to the right bank, of the report with most to both together, J per metre of crest; NaN where none is known */
  readonly energies: readonly [left: number, right: number]
  /** whether a report has waves that no method covers, so that its energy is not among them */
  readonly hasUnknownEnergy: boolean
  /** whether a report is certainly above the recommended maximum; undefined where none is judged */
  readonly isAboveRecommended: boolean | undefined
  /** whether a report is above the posted limit; undefined where none is posted */
  readonly isAbovePosted: boolean | undefined
  readonly hasNoSafeSpeed: boolean
}

interface OpenPassage {
  fairway: Fairway
  classId: string
  direction: Direction | undefined
  first: Mark
  last: Mark
  /** speed times time, m */
  integral: number
  energies: readonly [number, number]
  hasUnknownEnergy: boolean
  isAboveRecommended: boolean | undefined
  isAbovePosted: boolean | undefined
  hasNoSafeSpeed: boolean
}

const UNKNOWN = [NaN, NaN] as const

/** Energy to each bank; none where the vessel does not move through the water, NaN where no method covers it. */
function energiesOf({ judgement }: Mark): readonly [left: number, right: number] {
  if (!judgement) return UNKNOWN
  return judgement.throughWater > 0 ? judgement.waveEnergies : [0, 0]
}

const isEnergyUnknown = (mark: Mark): boolean => Number.isNaN(total(energiesOf(mark)))

const total = ([left, right]: readonly [number, number]): number => left + right

function isMore(a: readonly [number, number], b: readonly [number, number]): boolean {
  return total(a) > total(b) || (Number.isNaN(total(b)) && !Number.isNaN(total(a)))
}

/** Finds the passages of one vessel in its reports, in the order of time. */
export class PassageFinder {
  #open: OpenPassage | undefined
  readonly #maxGap: number
  readonly #tolerance: number
  readonly #found: (passage: Passage) => void

  /**
   * @param maxGap     s between reports that still belong together
   * @param tolerance  by which a posted limit may be exceeded without being said to be, m/s
   * @param found      is given each passage as it ends
   */
  constructor(maxGap: number, tolerance: number, found: (passage: Passage) => void) {
    this.#maxGap = maxGap
    this.#tolerance = tolerance
    this.#found = found
  }

  /** @param classId  class of the vessel, as of this report */
  take(mark: Mark | Pause, classId: string): void {
    if (mark.placement === undefined || mark.placement.status !== 'matched') return
    if (this.#open && !this.#belongs(this.#open, mark)) this.end()
    if (this.#open) this.#extend(this.#open, mark, classId)
    else this.#open = this.#opened(mark, classId)
  }

  end(): void {
    const open = this.#open
    this.#open = undefined
    if (!open) return
    const duration = open.last.report.time - open.first.report.time
    this.#found({
      fairway: open.fairway,
      classId: open.classId,
      direction: open.direction,
      speed: duration > 0 ? open.integral / duration : open.first.report.speed,
      energies: open.energies,
      hasUnknownEnergy: open.hasUnknownEnergy,
      isAboveRecommended: open.isAboveRecommended,
      isAbovePosted: open.isAbovePosted,
      hasNoSafeSpeed: open.hasNoSafeSpeed,
    })
  }

  #belongs({ fairway, direction, last }: OpenPassage, { placement, report }: Mark): boolean {
    return (
      placement.fairway === fairway &&
      report.time - last.report.time <= this.#maxGap &&
      (direction === undefined || placement.direction === undefined || placement.direction === direction)
    )
  }

  #isAbovePosted({ judgement }: Mark): boolean | undefined {
    if (!judgement || Number.isNaN(judgement.postedExcess)) return undefined
    return judgement.postedExcess > this.#tolerance
  }

  #opened(mark: Mark, classId: string): OpenPassage {
    const { fairway, direction } = mark.placement
    if (!fairway) throw new RangeError('A matched report has a fairway')
    return {
      fairway,
      classId,
      direction,
      first: mark,
      last: mark,
      integral: 0,
      energies: energiesOf(mark),
      hasUnknownEnergy: isEnergyUnknown(mark),
      isAboveRecommended: mark.judgement && mark.judgement.verdict === 'exceeds',
      isAbovePosted: this.#isAbovePosted(mark),
      hasNoSafeSpeed: mark.judgement?.verdict === 'no-safe-speed',
    }
  }

  #extend(open: OpenPassage, mark: Mark, classId: string): void {
    const { report, placement, judgement } = mark
    const before = open.last.report
    open.integral += ((before.speed + report.speed) / 2) * (report.time - before.time)
    open.last = mark
    open.classId = classId
    open.direction ??= placement.direction
    const energies = energiesOf(mark)
    if (isMore(energies, open.energies)) open.energies = energies
    open.hasUnknownEnergy ||= isEnergyUnknown(mark)
    if (judgement)
      open.isAboveRecommended = open.isAboveRecommended === true || judgement.verdict === 'exceeds'
    open.hasNoSafeSpeed ||= judgement?.verdict === 'no-safe-speed'
    const isAbovePosted = this.#isAbovePosted(mark)
    if (isAbovePosted !== undefined) open.isAbovePosted = open.isAbovePosted === true || isAbovePosted
  }
}
