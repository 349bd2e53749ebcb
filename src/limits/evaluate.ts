import {
  decideAlong,
  decideInDirection,
  inCurrent,
  stationBounds,
  type Decision,
  type SegmentBounds,
} from '../advisory/decide.ts'
import { lowestBounds } from '../advisory/govern.ts'
import { boundsIfPossible } from '../advisory/if-possible.ts'
import { ShiftedInputs, type Shifts } from '../advisory/shifted-inputs.ts'
import type { Inputs } from '../advisory/uncertainty.ts'
import { Fault } from '../domain/fault.ts'
import type { Direction } from '../domain/segment.ts'
import type { Cell, CellAnswer, CellPlace } from './cell.ts'
import { blockSize, partOf, type StudyPart } from './chunks.ts'
import { drawsOf, SHIFTED_FIELDS, type Draws } from './samples.ts'
import type { Study } from './study.ts'
import { Tally } from './tally.ts'

/** Item of a list that the order of cells was made from. */
function itemAt<T>(items: readonly T[], index: number): T {
  const item = items[index]
  if (item === undefined) throw new RangeError(`No item ${index} among ${items.length}`)
  return item
}

/** Where the cell of a number lies in a study; the last axis fastest. */
function placeOf(study: Study, number: number): CellPlace {
  let rest = number
  const indexIn = (axis: readonly unknown[]): number => {
    const index = rest % axis.length
    rest = (rest - index) / axis.length
    return index
  }
  const direction = indexIn(study.directions)
  const current = indexIn(study.currents)
  const waterLevel = indexIn(study.waterLevels)
  const vessel = indexIn(study.vessels)
  return { segment: rest, vessel, waterLevel, current, direction }
}

/** Inputs of a cell as given, without its direction. */
function inputsAt(study: Study, place: CellPlace): Inputs {
  const { segment, options } = itemAt(study.segments, place.segment)
  return {
    segment,
    vessel: itemAt(study.vessels, place.vessel),
    conditions: {
      waterLevel: itemAt(study.waterLevels, place.waterLevel),
      current: itemAt(study.currents, place.current),
      isWaterLevelGiven: true,
      isCurrentGiven: true,
    },
    options,
  }
}

/** What sample `index` adds to the inputs of a segment. */
function shiftsOf({ shifts, waveHeight }: Draws, waveHeightLogSd: number, index: number): Shifts {
  const sample: Shifts = {}
  for (const field of SHIFTED_FIELDS) {
    const shift = shifts[field]?.[index]
    if (shift !== undefined) sample[field] = shift
  }
  if (waveHeightLogSd > 0) sample.wave_height = waveHeightLogSd * (waveHeight[index] ?? NaN)
  return sample
}

/** Without a direction the answer holds both ways, also in a sample whose current is not zero. */
function decideTowards(bounds: SegmentBounds, direction: Direction | null): Decision {
  return direction === null
    ? decideAlong(bounds, bounds[0].situation.conditions).main
    : decideInDirection(bounds, direction)
}

/** Decisions at places of one segment, vessel and level, which share the bounds of the water. */
function decisionsAt(
  study: Study,
  places: readonly CellPlace[],
  bounds: SegmentBounds,
  currentShift: number,
): Decision[] {
  let index = -1
  let ofCurrent = bounds
  return places.map((place) => {
    if (place.current !== index) {
      index = place.current
      ofCurrent = inCurrent(bounds, itemAt(study.currents, index) + currentShift)
    }
    return decideTowards(ofCurrent, itemAt(study.directions, place.direction))
  })
}

function talliesOf(study: Study, places: readonly CellPlace[], inputs: Inputs, draws: Draws): Tally[] {
  const waveHeightLogSd = study.segments[places[0]?.segment ?? 0]?.waveHeightLogSd ?? 0
  const tallies = places.map(() => new Tally(draws.count))
  const samples = new ShiftedInputs(inputs)
  for (let index = 0; index < draws.count; index += 1) {
    const shifts = shiftsOf(draws, waveHeightLogSd, index)
    const bounds = boundsIfPossible(samples.by(shifts), lowestBounds)
    if (!bounds) continue
    const decisions = decisionsAt(study, places, bounds, shifts.current_mps ?? 0)
    decisions.forEach((decision, i) => tallies[i]?.add(index, decision))
  }
  return tallies
}

function answerOf({ outcome, governing, situation, speed, overGround }: Decision): CellAnswer {
  const { chainage } = situation.station
  return {
    outcome,
    governing: governing.criterion.id,
    ...(chainage !== undefined && { stationChainage: chainage }),
    draught: situation.vessel.draught,
    ...(outcome !== 'no-safe-speed' && { throughWater: speed, overGround }),
    criticalSpeed: situation.setting.criticalSpeed,
  }
}

/** Cells of one segment, vessel and level. */
function evaluateBlock(study: Study, places: readonly CellPlace[], draws: Draws | undefined): Cell[] {
  const [first] = places
  if (!first) return []
  const inputs = inputsAt(study, first)
  let bounds: SegmentBounds
  try {
    bounds = stationBounds(inputs.segment, inputs.vessel, inputs.conditions, inputs.options)
  } catch (error) {
    if (!(error instanceof Fault)) throw error
    const problem = { code: error.code, detail: error.message }
    return places.map((place) => ({ ...place, problem }))
  }
  const decisions = decisionsAt(study, places, bounds, 0)
  const tallies = draws && talliesOf(study, places, inputs, draws)
  return places.map((place, i) => ({
    ...place,
    answer: answerOf(itemAt(decisions, i)),
    ...(tallies && { sampled: itemAt(tallies, i).sampled(study.uncertainty?.percentiles ?? []) }),
  }))
}

/**
 * Cells of a part of a study, numbered as in the whole study. A cell that is impossible at its inputs as given is a cell
 * with a problem.
 *
 * @returns `to − from` cells in order; each depends on the study and its place alone, not on the range
 */
export function evaluatePart({ study, firstSegment, from, to }: StudyPart): Cell[] {
  const draws = study.uncertainty && drawsOf(study.uncertainty)
  const size = blockSize(study)
  const before = firstSegment * study.vessels.length * study.waterLevels.length * size
  const cells: Cell[] = []
  let number = from - before
  while (number < to - before) {
    const end = Math.min(to - before, number - (number % size) + size)
    const places: CellPlace[] = []
    for (; number < end; number += 1) places.push(placeOf(study, number))
    for (const cell of evaluateBlock(study, places, draws))
      cells.push({ ...cell, segment: cell.segment + firstSegment })
  }
  return cells
}

/**
 * Cells [from, to) of a study, in the order segment, vessel, level, current, direction.
 *
 * Every sample is decided at every station and the lowest counts. A sample that cannot be is one without a safe speed.
 *
 * @throws RangeError when the study does not have these cells
 */
export function evaluateCells(study: Study, from: number, to: number): Cell[] {
  return evaluatePart(partOf(study, from, to))
}
