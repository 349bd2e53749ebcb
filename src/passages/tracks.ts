import { MAX_LATITUDE } from '../geo/network.ts'
import { choose, withoutEnded } from './choose.ts'
import { FairwayNetwork, type Candidate } from './fairway-network.ts'
import { courseWeight, directionByCourse, stationaryReason } from './motion.ts'
import type { Fairway, Placement } from './placement.ts'
import type { PositionReport, Status } from './position-report.ts'
import { Track } from './track.ts'

function nowhere(status: Status, reason: string): Placement {
  const figures = { along: NaN, chainage: NaN, offset: NaN }
  return { status, reason, fairway: undefined, ...figures, direction: undefined }
}

function at(
  candidate: Candidate,
  status: Status,
  reason: string | undefined,
  direction: Placement['direction'],
): Placement {
  const { fairway, foot, chainage } = candidate
  return { status, reason, fairway, along: foot.along, chainage, offset: foot.offset, direction }
}

const isInside = (candidate: Candidate): boolean => candidate.isInside

/** What is wrong with a position, kebab-case; undefined when it can be looked up. */
function positionFault({ lon, lat }: PositionReport): string | undefined {
  if (!Number.isFinite(lon) || !Number.isFinite(lat)) return 'position-missing'
  if (Math.abs(lon) > 180) return 'longitude-beyond-180'
  return Math.abs(lat) > MAX_LATITUDE ? 'latitude-beyond-85' : undefined
}

/** Outside all fairways, by the one whose bank is nearest. */
function placeOutside(candidates: readonly Candidate[], report: PositionReport): Placement {
  let nearest: Candidate | undefined
  for (const candidate of candidates)
    if (!(nearest && nearest.pastBank <= candidate.pastBank)) nearest = candidate
  if (!nearest) return nowhere('no-segment', 'no-fairway-within-reach')
  const { offset, beyond, bearing } = nearest.foot
  const reason = Math.abs(beyond) > Math.abs(offset) ? 'beyond-the-end' : 'beyond-the-bank'
  return at(nearest, 'outside-fairway', reason, directionByCourse(report, bearing))
}

/** Places the reports of a log on fairways, vessel by vessel. Reports of different vessels may come in any order. */
export class Tracks {
  readonly #fairways: FairwayNetwork
  readonly #maxGap: number
  readonly #tracks = new Map<string, Track>()
  readonly #areTouching = (a: number, b: number): boolean => this.#fairways.areTouching(a, b)

  /**
   * @param fairways        n ≥ 0
   * @param options.maxGap  s; a longer gap ends a track, and reports may be older than the newest by as much
   */
  constructor(fairways: readonly Fairway[], { maxGap }: { readonly maxGap: number }) {
    this.#fairways = new FairwayNetwork(fairways)
    this.#maxGap = maxGap
  }

  /** Places the next report of a log: every one gets exactly one status. */
  place(report: PositionReport): Placement {
    if (report.mobile !== 'vessel') return nowhere('not-a-vessel', report.mobile)
    const fault = positionFault(report)
    if (fault) return nowhere('invalid-position', fault)
    const track = this.#trackOf(report.vesselKey)
    const { recent } = track
    if (recent.isLate(report.time)) return nowhere('late', 'older-than-the-gap')
    if (recent.has(report.time)) return nowhere('duplicate', 'same-time')
    const isNewest = report.time > recent.newest
    if (!track.accepts({ time: report.time, lon: report.lon, lat: report.lat })) {
      return nowhere('implausible-jump', 'over-60-kn')
    }
    return this.#placeOn(track, report, isNewest)
  }

  #trackOf(vesselKey: string): Track {
    const known = this.#tracks.get(vesselKey)
    if (known) return known
    const track = new Track(this.#maxGap)
    this.#tracks.set(vesselKey, track)
    return track
  }

  #placeOn(track: Track, report: PositionReport, isNewest: boolean): Placement {
    const stationary = stationaryReason(report)
    const near = this.#fairways.near(report)
    const inside = withoutEnded(near.every(isInside) ? near : near.filter(isInside), this.#areTouching)
    const choice = choose(inside, track.route, this.#areTouching)
    if (!choice) return placeOutside(near, report)
    const { candidate, isDoubtful, route } = choice
    const { line, along, bearing } = candidate.foot
    const byCourse = directionByCourse(report, bearing)
    // an older report is placed beside the track, which it does not turn back
    if (isNewest) track.route = route
    const direction = isNewest ? track.moveTo(line, along, byCourse) : (byCourse ?? track.directionOn(line))
    if (stationary !== undefined) return at(candidate, 'stationary', stationary, direction)
    if (isDoubtful) return at(candidate, 'ambiguous', 'two-fairways', direction)
    const isCrossing = candidate.isAcross && courseWeight(report) === 1
    if (isCrossing) return at(candidate, 'ambiguous', 'crossing', direction)
    return at(candidate, 'matched', undefined, direction)
  }
}
