import { EventFinder, type PassageEvent } from './events.ts'
import { Groups, type PassageGroup } from './groups.ts'
import { conditionsOf, Judge, type MatchedReport } from './judge.ts'
import type { Judgement, Judging } from './judgement.ts'
import { bankDistances } from './maxima.ts'
import { PassageFinder } from './passage.ts'
import type { Fairway, Placement } from './placement.ts'
import { STATUSES, type LogRow, type PositionReport, type Status } from './position-report.ts'
import { Timeline, type Mark, type Pause } from './timeline.ts'
import { Tracks } from './tracks.ts'
import { Fleet, type Convoy, type FindClass, type VesselGuess } from './vessel-guess.ts'

/** Rejected rows that are told one by one; all are counted. */
const MOST_REJECTED = 1000

/** What a log is checked against, and how. */
export interface CheckSettings {
  readonly fairways: readonly Fairway[]
  readonly findClass: FindClass
  readonly judging: Judging
  readonly convoy: Convoy
  /** s between reports that still belong together, and that reports may go back in time */
  readonly maxGap: number
  readonly minEventReports: number
}

/** What became of a row of a log. */
export interface Finding {
  readonly row: LogRow
  readonly status: Status
  readonly reason: string | undefined
  readonly placement: Placement | undefined
  readonly guess: VesselGuess | undefined
  readonly judgement: Judgement | undefined
  /** to the left and to the right waterline, m; undefined where the position is not in the water of a fairway, or it is not asked for */
  readonly distances: readonly [left: number, right: number] | undefined
}

/** A row of a log in its place. */
export interface PlacedRow extends Omit<Finding, 'judgement' | 'distances'> {
  /** what is judged; undefined unless the status is `matched` */
  readonly matched: MatchedReport | undefined
}

/** Everything that a log says, added up. Times in s since 1970; not finite for an empty log. */
export interface CheckSummary {
  readonly from: number
  readonly to: number
  readonly read: number
  readonly byStatus: Readonly<Record<Status, number>>
  readonly rejected: readonly { readonly line: number; readonly reason: string }[]
  /** with a matched report */
  readonly vessels: number
  readonly passages: number
  readonly certainEvents: number
  readonly doubtfulEvents: number
  readonly groups: readonly PassageGroup[]
}

const NO_EVENTS: readonly PassageEvent[] = []

/** Reports that say that a vessel was elsewhere or lay still. They enter its timeline as the matched ones do, others do not. */
const PAUSES: ReadonlySet<Status> = new Set<Status>([
  'stationary',
  'outside-fairway',
  'ambiguous',
  'no-segment',
])

/** Reports whose position is within a fairway. */
const IN_WATER: ReadonlySet<Status> = new Set<Status>(['matched', 'stationary', 'ambiguous'])

interface Followed {
  readonly timeline: Timeline<Mark | Pause>
  readonly events: EventFinder
  readonly passages: PassageFinder
  /** takes a report whose turn has come */
  readonly settle: (mark: Mark | Pause) => void
  classId: string
  isMatched: boolean
}

/**
 * Checks the reports of a log one after the other: places each, holds it against the recommended maximum, and gathers
 * events, passages and totals. Memory grows with the vessels and passages, not with the rows.
 */
export class PassageCheck {
  readonly #settings: CheckSettings
  readonly #tracks: Tracks
  readonly #fleet: Fleet
  readonly #judge: Judge
  readonly #vessels = new Map<string, Followed>()
  readonly #groups = new Groups()
  readonly #byStatus = Object.fromEntries(STATUSES.map((status) => [status, 0])) as Record<Status, number>
  readonly #rejected: { line: number; reason: string }[] = []
  #events: PassageEvent[] = []
  #certain = 0
  #doubtful = 0
  #from = Infinity
  #to = -Infinity

  constructor(settings: CheckSettings) {
    this.#settings = settings
    this.#tracks = new Tracks(settings.fairways, { maxGap: settings.maxGap })
    this.#fleet = new Fleet(settings.convoy, settings.findClass)
    this.#judge = new Judge(settings.judging)
  }

  /** Places the next row of the log. */
  place(row: LogRow): PlacedRow {
    if (row.rejected) return refused(row, row.rejected.reason)
    const { report } = row
    const guess = this.#fleet.guess(report)
    if (!guess) return refused(row, 'vessel-class-unknown')
    const placement = this.#tracks.place(report)
    const matched = placement.status === 'matched' ? { report, placement, guess } : undefined
    return { row, status: placement.status, reason: placement.reason, placement, guess, matched }
  }

  /**
   * Takes a placed row up, in the order of the log.
   *
   * @param judgement  of a matched report; undefined when the vessel does not fit the water
   */
  conclude(placed: PlacedRow, judgement: Judgement | undefined): Finding {
    const { row, status, placement, guess } = placed
    const reason = status === 'matched' && !judgement ? 'vessel-does-not-fit' : placed.reason
    this.#byStatus[status] += 1
    if (row.rejected || !placement || !guess) {
      const { line } = row.rejected ?? row.report
      if (this.#rejected.length < MOST_REJECTED) this.#rejected.push({ line, reason: reason ?? '' })
      return { row, status, reason, placement, guess, judgement: undefined, distances: undefined }
    }
    const { report } = row
    this.#from = Math.min(this.#from, report.time)
    this.#to = Math.max(this.#to, report.time)
    if (status === 'matched') this.#follow(report, { report, placement, judgement }, guess)
    else if (PAUSES.has(status)) this.#follow(report, { report: { time: report.time } }, guess)
    const distances = judgement?.distances ?? this.#distances(report, placement)
    return { row, status, reason, placement, guess, judgement, distances }
  }

  #distances(report: PositionReport, placement: Placement): Finding['distances'] {
    const { judging } = this.#settings
    if (!judging.isFull || !IN_WATER.has(placement.status)) return undefined
    return bankDistances(placement, conditionsOf(report, placement, judging).waterLevel)
  }

  /** What judges the matched reports of this log. */
  get judge(): Judge {
    return this.#judge
  }

  /** Events that have closed since the last call. */
  takeEvents(): readonly PassageEvent[] {
    const events = this.#events
    if (events.length === 0) return NO_EVENTS
    this.#events = []
    return events
  }

  /** After the last row: closes what is open. */
  end(): void {
    for (const { timeline, events, passages, settle } of this.#vessels.values()) {
      timeline.end(settle)
      events.end()
      passages.end()
    }
  }

  /** Totals, after `end`. */
  summary(): CheckSummary {
    return {
      from: this.#from,
      to: this.#to,
      read: Object.values(this.#byStatus).reduce((sum, count) => sum + count, 0),
      byStatus: { ...this.#byStatus },
      rejected: this.#rejected,
      vessels: [...this.#vessels.values()].filter(({ isMatched }) => isMatched).length,
      passages: this.#groups.passages,
      certainEvents: this.#certain,
      doubtfulEvents: this.#doubtful,
      groups: this.#groups.summed(),
    }
  }

  #follow({ vesselKey }: PositionReport, mark: Mark | Pause, guess: VesselGuess): void {
    const vessel = this.#vesselOf(vesselKey)
    vessel.classId = guess.classId
    vessel.isMatched ||= mark.placement !== undefined
    vessel.timeline.add(mark, vessel.settle)
  }

  #vesselOf(key: string): Followed {
    const known = this.#vessels.get(key)
    if (known) return known
    const { maxGap, minEventReports, judging } = this.#settings
    const vessel: Followed = {
      timeline: new Timeline<Mark | Pause>(maxGap),
      events: new EventFinder(this.#judge, maxGap, minEventReports, (event) => {
        this.#events.push(event)
        if (event.certainty === 'certain') this.#certain += 1
        else this.#doubtful += 1
      }),
      passages: new PassageFinder(maxGap, judging.tolerance, (passage) => {
        this.#groups.add(passage)
      }),
      settle: (mark) => {
        vessel.events.take(mark)
        vessel.passages.take(mark, mark.judgement?.guess.classId ?? vessel.classId)
      },
      classId: '',
      isMatched: false,
    }
    this.#vessels.set(key, vessel)
    return vessel
  }
}

const refused = (row: LogRow, reason: string): PlacedRow => ({
  row,
  status: 'rejected',
  reason,
  placement: undefined,
  guess: undefined,
  matched: undefined,
})
