import type { Direction } from '../domain/segment.ts'
import { fromKnots } from '../domain/units.ts'
import { edgeLength } from '../geo/plane.ts'
import { NO_ROUTE, type Route } from './choose.ts'
import { RecentPositions, type Fix } from './recent-positions.ts'

/** No vessel on a fairway is faster, m/s: own choice; the fastest ferries make 58 kn. */
const MAX_SPEED = fromKnots(60)

/** What two positions may be apart at any speed, m: own choice, positioning noise and times rounded to seconds. */
const POSITION_SLACK = 50

/** Reports farther apart do not belong to one track, m: own choice. */
const MAX_STEP = 2000

/** Change along a fairway that tells the direction, m: own choice, three times the error of a position. */
const DIRECTION_STEP = 30

/** Above the length of a degree anywhere on WGS 84, m: 111694 of latitude at the poles. */
const MOST_METRES_PER_DEGREE = 111_700

/** Whether two positions are within a distance, m. Most are by far, which is told without measuring. */
function areWithin(a: Fix, b: Fix, distance: number): boolean {
  const most = MOST_METRES_PER_DEGREE * (Math.abs(b.lon - a.lon) + Math.abs(b.lat - a.lat))
  return most <= distance || edgeLength([a.lon, a.lat], [b.lon, b.lat]) <= distance
}

function isReachable(a: Fix, b: Fix): boolean {
  return areWithin(a, b, POSITION_SLACK + MAX_SPEED * Math.abs(b.time - a.time))
}

/** What is remembered of one vessel. */
export class Track {
  readonly recent: RecentPositions
  route: Route = NO_ROUTE
  readonly #maxGap: number
  /** newest accepted position */
  #last: Fix | undefined
  /** newest position, when it was not accepted */
  #suspect: Fix | undefined
  /** the line that the direction is known on, -1 for none */
  #line = -1
  #direction: Direction | undefined
  /** where along that line the direction was told last, or the vessel seen first, m */
  #along = NaN

  /** @param maxGap  s */
  constructor(maxGap: number) {
    this.#maxGap = maxGap
    this.recent = new RecentPositions(maxGap)
  }

  /** Whether the vessel can have come here. Two reports in a row that agree with each other begin a new track. */
  accepts(fix: Fix): boolean {
    const isAccepted = fix.time < this.recent.newest ? this.#fitsBetween(fix) : this.#follows(fix)
    if (isAccepted) this.recent.accept(fix)
    else this.recent.refuse(fix)
    return isAccepted
  }

  #fitsBetween(fix: Fix): boolean {
    const [before, after] = this.recent.around(fix.time)
    const [fitsBefore, fitsAfter] = [!before || isReachable(before, fix), !after || isReachable(fix, after)]
    // between two tracks it belongs to either
    if (before && after && !isReachable(before, after)) return fitsBefore || fitsAfter
    return fitsBefore && fitsAfter
  }

  #follows(fix: Fix): boolean {
    const last = this.#last
    const isGap = !last || fix.time - last.time > this.#maxGap
    if (!isGap && !isReachable(last, fix) && !this.#agreesWithSuspect(fix)) {
      this.#suspect = fix
      return false
    }
    if (isGap || !areWithin(last, fix, MAX_STEP)) {
      this.route = NO_ROUTE
      this.#line = -1
    }
    this.#last = fix
    this.#suspect = undefined
    return true
  }

  #agreesWithSuspect(fix: Fix): boolean {
    const suspect = this.#suspect
    return suspect !== undefined && fix.time - suspect.time <= this.#maxGap && isReachable(suspect, fix)
  }

  /** The direction last told on a line, as long as the track has no gap. */
  directionOn(line: number): Direction | undefined {
    return this.#line === line ? this.#direction : undefined
  }

  /**
   * Goes on to a place along a line.
   *
   * @param along    m
   * @param byCourse  direction that the course tells
   * @returns the direction that is known now
   */
  moveTo(line: number, along: number, byCourse: Direction | undefined): Direction | undefined {
    const isSame = this.#line === line
    const step = along - this.#along
    const byStep =
      isSame && Math.abs(step) >= DIRECTION_STEP ? (step > 0 ? 'downstream' : 'upstream') : undefined
    const told = byCourse ?? byStep
    if (!isSame || told) this.#along = along
    this.#direction = told ?? (isSame ? this.#direction : undefined)
    this.#line = line
    return this.#direction
  }
}
