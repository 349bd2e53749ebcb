import type { LonLat } from '../domain/position.ts'
import type { Station } from '../domain/segment.ts'
import { chainageScale } from '../geo/chainage-scale.ts'
import { feetOf, type LineFoot } from '../geo/feet.ts'
import { networkOf, type Network } from '../geo/network.ts'
import { edgeLength } from '../geo/plane.ts'
import { axisAngle, courseWeight, CROSSING_ANGLE } from './motion.ts'
import type { Fairway } from './placement.ts'
import type { PositionReport } from './position-report.ts'
import { stationAt } from './station-at.ts'

/**
 * A position belongs to a fairway up to this many times the distance to the bank, and this much farther, m: own choice;
 * bank lines are drawn roughly, and 25 m hold 10 m of positioning (IMO resolution A.915(22), 95 %) and the place of the
 * antenna on the ship.
 */
const INSIDE_TIMES = 1.5
const INSIDE_MARGIN = 25

/**
 * Past an end a position belongs to a fairway no farther than this, m: the gap to one that goes on, and the margin; and as
 * far as it is aside, since at a bend it may lie past the ends of both. Own choice.
 */
const END_MARGIN = 75

/** A fairway is near up to this much more than half its width, m: own choice, for harbours and moorings beside it. */
const NEAR_MARGIN = 500

/** Lines whose ends are this close go on into each other, m: own choice, as drawn by different hands. */
const TOUCHING = 50

/** Nearer banks count as this far, m, so that a score stays finite: own choice. */
const LEAST_BANK_DISTANCE = 1

/** From this angle on between course and axis, degrees, it counts against a fairway: own choice, 95 % are within. */
const SLANTING_ANGLE = 30

/** What counts against a fairway just under the crossing angle and beyond it, beside 1 for a position at its bank: own choice. */
const SLANTING_SCORE = 4
const CROSSING_SCORE = 100

/** What counts against a fairway that does not reach the position, as for one at its bank: own choice. */
const BEYOND_SCORE = 1

/** A fairway that a position may belong to. */
export interface Candidate {
  readonly fairway: Fairway
  readonly foot: LineFoot
  /** m along the waterway */
  readonly chainage: number
  /** what speaks against it, ≥ 0; 1 at the bank */
  readonly score: number
  /** whether the vessel is across it, as far as its course tells */
  readonly isAcross: boolean
  /** of the position from the bank, m, negative in the water */
  readonly pastBank: number
  readonly isInside: boolean
}

/** To the bank on the side of an offset, m; the larger one when it is not known which bank is on which side. */
function bankDistance({ segment: { banks } }: Fairway, { distances }: Station, offset: number): number {
  const hasSides = banks[0].side === 'left' && banks[1].side === 'right'
  const distance = hasSides ? distances[offset < 0 ? 0 : 1] : Math.max(distances[0], distances[1])
  return Math.max(LEAST_BANK_DISTANCE, distance)
}

const insideDistance = (bank: number): number => INSIDE_TIMES * bank + INSIDE_MARGIN

/** How far from its line a position may be to be inside or near a fairway, m. */
function reachOf({ segment: { stations } }: Fairway): number {
  let [farthest, widest] = [LEAST_BANK_DISTANCE, 0]
  for (const { distances, width } of stations) {
    farthest = Math.max(farthest, ...distances)
    widest = Math.max(widest, width)
  }
  // to the side and beyond the end at once
  return Math.max(Math.SQRT2 * insideDistance(farthest), widest / 2 + NEAR_MARGIN)
}

/** What the angle between course and axis counts against a fairway, for a vessel fast enough that it tells. */
function angleScore(angle: number): number {
  if (angle >= CROSSING_ANGLE) return CROSSING_SCORE
  return (SLANTING_SCORE * Math.max(0, angle - SLANTING_ANGLE)) / (CROSSING_ANGLE - SLANTING_ANGLE)
}

function endsOf({ line }: Fairway): LonLat[] {
  return [line[0], line.at(-1)].filter((end) => end !== undefined)
}

/** Fairways by place. */
export class FairwayNetwork {
  readonly #fairways: readonly Fairway[]
  readonly #network: Network
  readonly #chainages: readonly ((along: number) => number)[]
  /** whether two lines touch, by the pair, as far as it was asked */
  readonly #touching = new Map<number, boolean>()

  constructor(fairways: readonly Fairway[]) {
    this.#fairways = fairways
    this.#network = networkOf(fairways.map((fairway) => ({ line: fairway.line, reach: reachOf(fairway) })))
    this.#chainages = fairways.map(
      ({ chainageFrom, chainageTo }, i) =>
        chainageScale(this.#network.lengths[i] ?? 0, chainageFrom, chainageTo).chainageAt,
    )
  }

  /** Whether an end of one line is at an end of the other. */
  areTouching(a: number, b: number): boolean {
    const pair = Math.min(a, b) * this.#fairways.length + Math.max(a, b)
    const known = this.#touching.get(pair)
    if (known !== undefined) return known
    const [first, second] = [this.#fairways[a], this.#fairways[b]]
    const others = second ? endsOf(second) : []
    const isTouching = first
      ? endsOf(first).some((end) => others.some((other) => edgeLength(end, other) <= TOUCHING))
      : false
    this.#touching.set(pair, isTouching)
    return isTouching
  }

  /** The fairways that a report is inside of, or near. */
  near(report: PositionReport): Candidate[] {
    const weight = courseWeight(report)
    const candidates: Candidate[] = []
    for (const foot of feetOf(this.#network, report.lon, report.lat)) {
      const candidate = this.#candidate(foot, report, weight)
      if (candidate) candidates.push(candidate)
    }
    return candidates
  }

  #candidate(foot: LineFoot, report: PositionReport, weight: number): Candidate | undefined {
    const fairway = this.#fairways[foot.line]
    const chainage = this.#chainages[foot.line]?.(foot.along)
    if (!fairway || chainage === undefined) return undefined
    const station = stationAt(fairway.segment, chainage)
    const bank = bankDistance(fairway, station, foot.offset)
    const aside = Math.abs(foot.offset)
    const beyond = Math.abs(foot.beyond)
    const distance = beyond === 0 ? aside : Math.hypot(aside, beyond)
    const inside = insideDistance(bank)
    const isInside = aside <= inside && beyond <= Math.min(inside, END_MARGIN + aside)
    if (!isInside && distance > station.width / 2 + NEAR_MARGIN) return undefined
    const angle = weight > 0 ? axisAngle(report, foot.bearing) : 0
    const score =
      (distance / bank) ** 2 + (beyond > 0 ? BEYOND_SCORE : 0) + (weight > 0 ? weight * angleScore(angle) : 0)
    return {
      fairway,
      foot,
      chainage,
      score,
      isAcross: angle >= CROSSING_ANGLE,
      pastBank: distance - bank,
      isInside,
    }
  }
}
