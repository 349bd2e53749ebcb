import { advise, criterionReports, type Advisory, type CriterionReport } from '../advisory/advise.ts'
import { speedCurve, type Curve } from '../advisory/curve.ts'
import { currentAlong } from '../advisory/direction.ts'
import { sensitivityOf, type Sensitivity } from '../advisory/sensitivity.ts'
import type { Inputs, UncertainField } from '../advisory/uncertainty.ts'
import { Fault } from '../domain/fault.ts'
import type { Sampled } from '../limits/cell.ts'
import type { GoverningCell, Stretch } from '../limits/plan.ts'
import type { Study } from '../limits/study.ts'
import type { EvidenceView } from './evidence-view.ts'
import { ruleSpeed } from './evidence-words.ts'

/** Points of a curve that is drawn low. */
const POINTS = 48

/** The governing cell of a stretch, computed again at the inputs as given. */
export interface CellEvidence {
  readonly inputs: Inputs
  readonly advisory: Advisory
  readonly curve: Curve
  /** what each uncertain input does; absent without uncertainty */
  readonly sensitivity?: Sensitivity
  /** the limit, or the smallest limit where none is proposed, m/s through the water, > 0 */
  readonly limitWater?: number
  /** criteria at that speed */
  readonly atLimit?: readonly CriterionReport[]
}

/** A stretch with everything that its sheet shows. */
export interface StretchCase {
  readonly stretch: Stretch
  /** from 0 */
  readonly index: number
  readonly sampled?: Sampled | undefined
  readonly cell?: CellEvidence
  /** why the cell has no answer */
  readonly problem?: string
}

/** What a cell of a study rests on; undefined where the study has no such cell. */
export function inputsOf(
  study: Study,
  cell: Omit<GoverningCell, 'stationChainage' | 'criterion'>,
): Inputs | undefined {
  const found = study.segments.find(({ id }) => id === cell.segmentId)
  const vessel = study.vessels[cell.vessel]
  if (!found || !vessel) return undefined
  const conditions = {
    waterLevel: cell.waterLevel,
    current: cell.current,
    isWaterLevelGiven: true,
    isCurrentGiven: true,
    ...(cell.direction && { direction: cell.direction }),
  }
  return { segment: found.segment, vessel, conditions, options: { ...found.options, hasCurve: false } }
}

/** Standard deviations and half ranges of a study, by input. */
function halvesOf({ uncertainty, segments }: Study, segmentId: string): Map<UncertainField, number> {
  const halves = new Map<UncertainField, number>()
  if (!uncertainty) return halves
  for (const [field, spread] of Object.entries(uncertainty.spreads)) {
    if (spread.size > 0) halves.set(field as UncertainField, spread.size)
  }
  const logSd = segments.find(({ id }) => id === segmentId)?.waveHeightLogSd
  if (logSd !== undefined && logSd > 0) halves.set('wave_height', logSd)
  return halves
}

/** Speed over ground that the criteria of a stretch are held against, m/s. */
function triedSpeed({ rules }: EvidenceView, stretch: Stretch): number | undefined {
  if (stretch.limitSpeed !== undefined) return stretch.limitSpeed
  return rules.smallestLimit === undefined ? undefined : ruleSpeed(rules, rules.smallestLimit)
}

function cellOf(
  view: EvidenceView,
  stretch: Stretch,
  governing: GoverningCell,
  inputs: Inputs,
): CellEvidence {
  const { segment, vessel, conditions, options } = inputs
  const advisory = advise(segment, vessel, conditions, options)
  const { decision } = advisory
  const halves = halvesOf(view.study, governing.segmentId)
  const tried = triedSpeed(view, stretch)
  const limitWater =
    tried === undefined ? NaN : tried - currentAlong(decision.situation.conditions, decision.direction)
  return {
    inputs,
    advisory,
    curve: speedCurve(decision, POINTS),
    ...(halves.size > 0 && { sensitivity: sensitivityOf(inputs, halves) }),
    ...(limitWater > 0 && { limitWater, atLimit: criterionReports(decision, limitWater) }),
  }
}

/** Everything that the sheet of a stretch shows. */
export function stretchCase(view: EvidenceView, index: number): StretchCase {
  const stretch = view.plan.stretches[index]
  if (!stretch) throw new RangeError(`There is no stretch ${index}`)
  const { governing } = stretch
  const base = { stretch, index, sampled: view.sampled?.[index] }
  const inputs = governing && inputsOf(view.study, governing)
  if (!inputs) return base
  try {
    return { ...base, cell: cellOf(view, stretch, governing, inputs) }
  } catch (error) {
    if (error instanceof Fault && error.code === 'impossible-input') {
      return { ...base, problem: error.message }
    }
    throw error
  }
}
