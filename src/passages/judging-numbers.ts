import { CRITERION_IDS } from '../advisory/criteria/criterion.ts'
import type { Outcome } from '../advisory/decide.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { conditionsOf, type MatchedReport } from './judge.ts'
import { VERDICTS, type Judgement, type Judging } from './judgement.ts'
import type { Fairway } from './placement.ts'
import type { VesselGuess } from './vessel-guess.ts'

/** Numbers of a report to be judged and of a judgement: what moves between threads without being copied. */
export const REPORT_SIZE = 8
export const JUDGEMENT_SIZE = 19

const OUTCOMES: readonly Outcome[] = ['limited', 'service-speed', 'no-safe-speed']

/** Fairways and vessels by number, the same on both sides. */
export interface Numbered {
  readonly fairways: readonly Fairway[]
  readonly guesses: readonly VesselGuess[]
}

function at<Item>(items: readonly Item[], index: number | undefined): Item {
  const item = items[index ?? -1]
  if (item === undefined) throw new RangeError('A number stands for nothing')
  return item
}

/** Writes a report as REPORT_SIZE numbers. */
export function writeReport(
  numbers: Float64Array,
  from: number,
  { report, placement }: MatchedReport,
  guess: number,
  fairway: number,
): void {
  numbers.set(
    [
      guess,
      fairway,
      placement.chainage,
      placement.offset,
      placement.direction ? DIRECTIONS.indexOf(placement.direction) : NaN,
      report.speed,
      report.waterLevel,
      report.current,
    ],
    from,
  )
}

export function readReport(
  numbers: Float64Array,
  from: number,
  { fairways, guesses }: Numbered,
): MatchedReport {
  const [
    guess,
    fairway,
    chainage = NaN,
    offset = NaN,
    direction,
    speed = NaN,
    waterLevel = NaN,
    current = NaN,
  ] = numbers.subarray(from, from + REPORT_SIZE)
  return {
    report: { speed, waterLevel, current },
    placement: { fairway: at(fairways, fairway), chainage, offset, direction: DIRECTIONS[direction ?? NaN] },
    guess: at(guesses, guess),
  }
}

/** Writes a judgement as JUDGEMENT_SIZE numbers; its cautions go beside them. */
export function writeJudgement(
  numbers: Float64Array,
  from: number,
  { guess }: MatchedReport,
  judgement: Judgement | undefined,
): void {
  if (!judgement) {
    numbers[from] = -1
    return
  }
  const { distances, waveHeights, waveEnergies } = judgement
  numbers.set(
    [
      guess.variants.findIndex((vessel) => vessel === judgement.vessel),
      VERDICTS.indexOf(judgement.verdict),
      OUTCOMES.indexOf(judgement.outcome),
      CRITERION_IDS.indexOf(judgement.governing),
      judgement.throughWater,
      distances[0],
      distances[1],
      judgement.maxOverGround,
      judgement.sailingLineMax,
      judgement.excess,
      judgement.postedLimit,
      judgement.postedExcess,
      judgement.depthFroudeNumber,
      judgement.criticalRatio,
      waveHeights[0],
      waveHeights[1],
      waveEnergies[0],
      waveEnergies[1],
      judgement.draught,
    ],
    from,
  )
}

export function readJudgement(
  numbers: Float64Array,
  from: number,
  { report, placement, guess }: MatchedReport,
  judging: Judging,
  cautions: readonly string[],
): Judgement | undefined {
  const figure = (index: number): number => numbers[from + index] ?? NaN
  if (figure(0) < 0) return undefined
  return {
    guess,
    vessel: at(guess.variants, figure(0)),
    conditions: conditionsOf(report, placement, judging),
    verdict: at(VERDICTS, figure(1)),
    outcome: at(OUTCOMES, figure(2)),
    governing: at(CRITERION_IDS, figure(3)),
    throughWater: figure(4),
    distances: [figure(5), figure(6)],
    maxOverGround: figure(7),
    sailingLineMax: figure(8),
    excess: figure(9),
    postedLimit: figure(10),
    postedExcess: figure(11),
    depthFroudeNumber: figure(12),
    criticalRatio: figure(13),
    waveHeights: [figure(14), figure(15)],
    waveEnergies: [figure(16), figure(17)],
    draught: figure(18),
    cautions,
  }
}
