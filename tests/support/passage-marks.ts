import type { Options } from '../../src/domain/conditions.ts'
import type { Segment } from '../../src/domain/segment.ts'
import { findVesselClass } from '../../src/domain/vessel-classes.ts'
import type { Judgement } from '../../src/passages/judgement.ts'
import type { Fairway, Placement } from '../../src/passages/placement.ts'
import type { PositionReport } from '../../src/passages/position-report.ts'
import type { Mark } from '../../src/passages/timeline.ts'
import { vesselGuess, type VesselGuess } from '../../src/passages/vessel-guess.ts'

export const UNSAID = {
  name: undefined,
  course: NaN,
  heading: NaN,
  navigationStatus: NaN,
  shipType: NaN,
  length: NaN,
  beam: NaN,
  draught: NaN,
  vesselClass: undefined,
  loading: undefined,
  convoyLength: NaN,
  convoyBeam: NaN,
  convoyDraught: NaN,
  waterLevel: NaN,
  current: NaN,
} as const

/** A report of an invented vessel: digits 000 begin no real vessel's number. */
export function positionReport(given: Partial<PositionReport> = {}): PositionReport {
  return {
    line: 2,
    time: 1_800_000_000,
    vesselKey: 'mmsi:000000101',
    mmsi: '000000101',
    eni: undefined,
    lon: 3.5,
    lat: 54.09,
    speed: 3,
    mobile: 'vessel',
    ...UNSAID,
    ...given,
  }
}

export const NO_CONVOY = { length: NaN, beam: NaN, draught: NaN }

export function guessOf(given: Partial<PositionReport>): VesselGuess {
  const guess = vesselGuess(positionReport(given), NO_CONVOY, findVesselClass)
  if (!guess) throw new Error('no such class')
  return guess
}

/** A reach of still water 40 m wide and 4 m deep between unprotected banks, 18 m to the left and 22 m to the right. */
export const REACH: Segment = {
  id: 'test-reach',
  stations: [{ index: 0, depth: 4, width: 40, distances: [18, 22], shape: { kind: 'trapezoid' } }],
  banks: [
    { side: 'left', kind: 'unprotected', isKindGiven: true, stoneRelativeDensity: 1.65 },
    { side: 'right', kind: 'unprotected', isKindGiven: true, stoneRelativeDensity: 1.65 },
  ],
  receptors: [],
  postedLimits: [],
  confinement: 'confined',
}

/** Of an advisory that is asked for without options. */
export const NO_OPTIONS: Options = {
  combine: 'highest',
  limits: {},
  applyPostedLimit: true,
  signUnit: 'km/h',
  signStep: 1,
  hasCurve: false,
}

export const fairway = (id: string, segment: Segment = REACH): Fairway => ({
  id,
  line: [
    [3.5, 54.09],
    [3.52, 54.09],
  ],
  segment,
  options: NO_OPTIONS,
  chainageFrom: undefined,
  chainageTo: undefined,
})

export function placement(given: Partial<Placement> = {}): Placement {
  return {
    status: 'matched',
    reason: undefined,
    fairway: fairway('test-reach'),
    along: 500,
    chainage: 500,
    offset: 0,
    direction: 'downstream',
    ...given,
  }
}

const GUESS = guessOf({ vesselClass: 'cemt-iii', loading: 'laden' })

/** A judgement as if made, with the verdict and figures that a test is about. */
export function judgement(given: Partial<Judgement> = {}): Judgement {
  return {
    guess: GUESS,
    vessel: GUESS.variants[0],
    draught: GUESS.variants[0].draught,
    conditions: { waterLevel: 0, current: 0, isWaterLevelGiven: true, isCurrentGiven: true },
    throughWater: 3,
    distances: [18, 22],
    outcome: 'limited',
    governing: 'bank-wave-height',
    maxOverGround: 2,
    sailingLineMax: NaN,
    excess: 1,
    verdict: 'exceeds',
    postedLimit: NaN,
    postedExcess: NaN,
    depthFroudeNumber: 0.48,
    criticalRatio: 0.8,
    waveHeights: [0.2, 0.3],
    waveEnergies: [100, 50],
    cautions: [],
    ...given,
  }
}

interface Given {
  readonly report?: Partial<PositionReport>
  readonly placement?: Partial<Placement>
  /** absent: not judged */
  readonly judgement?: Partial<Judgement> | undefined
}

export function mark(given: Given): Mark {
  return {
    report: positionReport(given.report),
    placement: placement(given.placement),
    judgement: given.judgement ? judgement(given.judgement) : undefined,
  }
}
