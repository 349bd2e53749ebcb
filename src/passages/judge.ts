import { cautionsAt } from '../advisory/cautions.ts'
import { currentAlong, directionsOf } from '../advisory/direction.ts'
import { effectsAt, waveEnergies, type Effects } from '../advisory/effects.ts'
import type { Situation } from '../advisory/situation.ts'
import type { Conditions } from '../domain/conditions.ts'
import type { Vessel } from '../domain/vessel.ts'
import { maxOf, Maxima, postedOverGround, type Maximum } from './maxima.ts'
import {
  energiesOnly,
  sailedFigures,
  UNMOVED,
  type Judgement,
  type Judging,
  type PassageVerdict,
  type SailedFigures,
} from './judgement.ts'
import type { PassageCaution } from './passage-cautions.ts'
import type { Whereabouts } from './placement.ts'
import type { PositionReport } from './position-report.ts'
import type { VesselGuess } from './vessel-guess.ts'

/** What of a report a judgement depends on, besides where it is. */
export type Sailed = Pick<PositionReport, 'speed' | 'waterLevel' | 'current'>

/** A report to be judged. */
export interface MatchedReport {
  readonly report: Sailed
  readonly placement: Whereabouts
  readonly guess: VesselGuess
}

/** One loading of the vessel, held against its own maximum. */
interface Assessed {
  readonly maximum: Maximum
  readonly max: number
  readonly exceeds: boolean
}

/** The stricter of two: without a safe speed before any, else the lower maximum. */
function stricter(a: Assessed, b: Assessed): Assessed {
  if (Number.isNaN(a.max)) return a
  return Number.isNaN(b.max) || b.max < a.max ? b : a
}

function verdictOf(all: readonly Assessed[]): PassageVerdict {
  if (all.every(({ max }) => Number.isNaN(max))) return 'no-safe-speed'
  const exceeding = all.filter(({ exceeds }) => exceeds).length
  if (exceeding === 0) return 'within'
  return exceeding === all.length ? 'exceeds' : 'depends-on-draught'
}

/** The loading whose figures are shown: the stricter one; where both are exceeded, one that has a maximum. */
function shown(first: Assessed, second: Assessed): Assessed {
  const strict = stricter(first, second)
  const other = strict === first ? second : first
  return Number.isNaN(strict.max) && other.exceeds && !Number.isNaN(other.max) ? other : strict
}

const NO_CAUTIONS: readonly string[] = []

/** Holds matched reports against the recommended maximum. */
export class Judge {
  readonly #judging: Judging
  readonly #maxima = new Maxima()

  constructor(judging: Judging) {
    this.#judging = judging
  }

  /**
   * @param placement  of status `matched`
   * @returns undefined when the vessel does not fit the water in any loading
   */
  judge({ report, placement, guess }: MatchedReport): Judgement | undefined {
    const conditions = conditionsOf(report, placement, this.#judging)
    const all = this.#assessAll(report, placement, guess, conditions)
    const [first, second] = all
    if (!first) return undefined
    const chosen = second ? shown(first, second) : first
    const { maximum } = chosen
    const { situation, vessel, decision, leftBank } = maximum
    const throughWater = report.speed - currentAlong(conditions, decision.direction)
    const verdict = verdictOf(all)
    const { isFull } = this.#judging
    const effects = isFull && throughWater > 0 ? effectsAt(situation, throughWater) : undefined
    const figures = effects ? sailedFigures(effects, leftBank) : totalsOf(situation, throughWater, leftBank)
    const postedLimit = postedOverGround(decision)
    // a maximum that the verdict did not need may be of another speed above the one sailed
    const max = isFull || verdict !== 'within' ? chosen.max : NaN
    return {
      guess,
      vessel,
      draught: decision.situation.vessel.draught,
      conditions,
      throughWater,
      distances: maximum.distances,
      outcome: decision.outcome,
      governing: decision.governing.criterion.id,
      maxOverGround: max,
      sailingLineMax: isFull ? this.#lineMax(maximum, placement, conditions) : NaN,
      excess: report.speed - max,
      verdict,
      postedLimit,
      postedExcess: report.speed - postedLimit,
      depthFroudeNumber: figures.depthFroudeNumber,
      criticalRatio: figures.criticalRatio,
      waveHeights: figures.waveHeights,
      waveEnergies: figures.waveEnergies,
      cautions: isFull ? cautionsOf(chosen, effects, guess, all.length) : NO_CAUTIONS,
    }
  }

  /**
   * What an error of position to the side does to a maximum over ground, m/s: mean of both ways.
   *
   * @param shift  m
   */
  effectOfOffset(judgement: Judgement, placement: Whereabouts, shift: number): number {
    const { vessel, conditions, maxOverGround } = judgement
    if (this.#judging.position === 'sailing-line') return 0
    const changes = [-shift, shift]
      .map((by) => {
        const moved = { ...placement, offset: placement.offset + by }
        const found = this.#maxima.actual(moved, vessel, conditions)
        return found ? Math.abs(maxOf(found.decision) - maxOverGround) : NaN
      })
      .filter((change) => !Number.isNaN(change))
    return changes.length === 0 ? 0 : changes.reduce((sum, change) => sum + change, 0) / changes.length
  }

  /** Figures of a judged report as sailed, whether or not totals needed them. */
  asSailed(judgement: Judgement, placement: Whereabouts): SailedFigures {
    const { vessel, conditions, throughWater } = judgement
    if (this.#judging.isFull) return judgement
    const found = throughWater > 0 ? this.#maxima.situation(placement, vessel, conditions) : undefined
    return found ? sailedFigures(effectsAt(found.situation, throughWater), found.leftBank) : UNMOVED
  }

  /** Each loading that fits. */
  #assessAll(
    report: Sailed,
    placement: Whereabouts,
    guess: VesselGuess,
    conditions: Conditions,
  ): readonly Assessed[] {
    const { isFull, tolerance } = this.#judging
    const mostOf = (vessel: Vessel) =>
      isFull ? Infinity : mostOfInterest(report, conditions, vessel, tolerance)
    const [vessel, other] = guess.variants
    // of two the stricter one is told, so that one of them has to be known
    const first = this.#assess(report, placement, conditions, {
      vessel,
      most: other ? Infinity : mostOf(vessel),
    })
    if (!other) return first ? [first] : []
    const most = first ? Math.max(mostOf(other), first.maximum.decision.speed) : Infinity
    const second = this.#assess(report, placement, conditions, { vessel: other, most })
    return [first, second].filter((assessed) => assessed !== undefined)
  }

  #assess(
    report: Sailed,
    placement: Whereabouts,
    conditions: Conditions,
    { vessel, most }: { readonly vessel: Vessel; readonly most: number },
  ): Assessed | undefined {
    const { position, tolerance } = this.#judging
    const maximum =
      position === 'actual'
        ? this.#maxima.actual(placement, vessel, conditions, most)
        : this.#maxima.onSailingLine(placement, vessel, conditions)
    if (!maximum) return undefined
    const max = maxOf(maximum.decision)
    // without a safe speed every speed exceeds
    return { maximum, max, exceeds: Number.isNaN(max) || report.speed - max > tolerance }
  }

  #lineMax({ vessel, decision }: Maximum, placement: Whereabouts, conditions: Conditions): number {
    if (this.#judging.position === 'sailing-line') return maxOf(decision)
    const found = this.#maxima.onSailingLine(placement, vessel, conditions)
    return found ? maxOf(found.decision) : NaN
  }
}

/** The water of a report: what its row says, else what the call says. */
export function conditionsOf(report: Sailed, { direction }: Whereabouts, judging: Judging): Conditions {
  const waterLevel = Number.isNaN(report.waterLevel) ? judging.waterLevel : report.waterLevel
  const current = Number.isNaN(report.current) ? judging.current : report.current
  return direction
    ? { waterLevel, current, isWaterLevelGiven: true, isCurrentGiven: true, direction }
    : { waterLevel, current, isWaterLevelGiven: true, isCurrentGiven: true }
}

/** What totals need of a report as sailed. */
function totalsOf(situation: Situation, throughWater: number, leftBank: 0 | 1): SailedFigures {
  return throughWater > 0 ? energiesOnly(waveEnergies(situation, throughWater), leftBank) : UNMOVED
}

/** Margin of a comparison of speeds, m/s: rounding is far below it. */
const SPEED_MARGIN = 1e-6

/**
 * Speed through the water up to which what governs decides the verdict, m/s: a maximum above it is safe and not exceeded.
 * Infinity where the direction that the maximum is for follows from it.
 */
function mostOfInterest(
  report: Sailed,
  conditions: Conditions,
  { minSteerageSpeed }: Vessel,
  tolerance: number,
): number {
  const { direction } = conditions
  if (direction === undefined && directionsOf(conditions).length > 1) return Infinity
  const current = currentAlong(conditions, direction)
  return Math.max(report.speed - tolerance - current, minSteerageSpeed, -current) + SPEED_MARGIN
}

function cautionsOf(
  { maximum }: Assessed,
  effects: Effects | undefined,
  guess: VesselGuess,
  fitting: number,
): string[] {
  const own: PassageCaution[] = [...maximum.cautions]
  if (guess.basis === 'tow-hull-only') own.push('convoy-size-unknown')
  if (fitting < guess.variants.length) own.push('laden-does-not-fit')
  const { situation, decision } = maximum
  const ofAdvisory = effects ? cautionsAt(situation, effects, decision.direction) : []
  return [...ofAdvisory.map(({ code }) => code), ...own]
}
