import { depthAt } from '../hydro/section.ts'
import type { Caution } from './caution.ts'
import { bankLimits } from './criteria/bank-wave.ts'
import type { Situation } from './situation.ts'

/** Depth over draught below which the static clearance is small (PIANC, from memory). */
const SMALL_CLEARANCE = 1.1
/** Depth change along a segment that makes long waves at subcritical speed (Grue 2017, JFM), ratio. */
const DEPTH_CHANGE = 1.5
/** Share of the depth that counts as level bed under the beam (own choice). */
const LEVEL_BED = 0.95

/** Cautions about the water and the vessel, whatever the speed. */
export function situationCautions(situation: Situation): Caution[] {
  return [
    reachOfBank(situation),
    hullOverSlope(situation),
    depthChange(situation),
    draughtAbovePermitted(situation),
    staticClearance(situation),
    ...walls(situation),
    noMethodEver(situation),
    assumedDraught(situation),
    assumedForm(situation),
  ].filter((caution) => caution !== undefined)
}

function reachOfBank({ setting, section, vessel }: Situation): Caution | undefined {
  const distance = Math.min(...section.distances)
  if (setting.isConfined || distance > 6 * vessel.beam) return undefined
  return {
    code: 'bank-within-reach',
    severity: 'caution',
    text: 'The water is taken as open although a bank lies within six beams: the primary wave at that bank is not computed.',
    facts: { bank_distance_m: distance, six_beams_m: 6 * vessel.beam },
  }
}

function hullOverSlope({ section, vessel, station, conditions }: Situation): Caution | undefined {
  const half = vessel.beam / 2
  const { slopes, depth } = section
  const { shape } = station
  let isOver: boolean
  if (shape.kind === 'profile') {
    const level = conditions.waterLevel
    const left = depthAt(shape.offsets, shape.bedDepths, -half, level)
    const right = depthAt(shape.offsets, shape.bedDepths, half, level)
    isOver = Math.min(left, right) < LEVEL_BED * depth
  } else {
    isOver =
      slopes !== null &&
      (slopes[0] * depth > section.distances[0] - half || slopes[1] * depth > section.distances[1] - half)
  }
  if (!isOver) return undefined
  return {
    code: 'hull-over-slope',
    severity: 'caution',
    text: 'Part of the hull passes over the slope of a bank, where the water is shallower than at the sailing line: clearance and waves there are worse than computed.',
  }
}

function depthChange({ segment, conditions }: Situation): Caution | undefined {
  const depths = segment.stations.map((station) => station.depth + conditions.waterLevel)
  const least = Math.min(...depths)
  const most = Math.max(...depths)
  if (most <= DEPTH_CHANGE * least) return undefined
  return {
    code: 'depth-change',
    severity: 'caution',
    text: 'The depth along this segment changes by more than half: a passing hull can send long waves ahead even at subcritical speed.',
    facts: { least_depth_m: least, greatest_depth_m: most },
  }
}

function draughtAbovePermitted({ segment, vessel }: Situation): Caution | undefined {
  if (segment.maxDraught === undefined || vessel.draught <= segment.maxDraught) return undefined
  return {
    code: 'draught-above-permitted',
    severity: 'warning',
    text: 'The draught is above the permitted draught of the segment.',
    facts: { draught_m: vessel.draught, max_draught_m: segment.maxDraught },
  }
}

function staticClearance({ section, vessel }: Situation): Caution | undefined {
  const ratio = section.depth / vessel.draught
  if (ratio >= SMALL_CLEARANCE) return undefined
  return {
    code: 'static-clearance-small',
    severity: 'warning',
    text: 'Even at rest the water under the keel is less than a tenth of the draught.',
    facts: { depth_to_draught_ratio: ratio },
  }
}

const REFLECTION: Caution = {
  code: 'wall-reflection',
  severity: 'caution',
  text: 'A wall reflects waves: before it they reach up to twice the height that is computed, and they cross to the other bank.',
}

const UNBOUND_WALL: Caution = {
  code: 'wall-has-no-criterion',
  severity: 'info',
  text: 'A wall has no wave height limit of its own: give one where people, moorings or the wall itself need it.',
}

function walls(situation: Situation): Caution[] {
  const own = ([0, 1] as const).filter((i) => situation.segment.banks[i].kind === 'wall')
  if (own.length === 0) return []
  return own.some((i) => bankLimits(situation, i) === undefined) ? [REFLECTION, UNBOUND_WALL] : [REFLECTION]
}

function noMethodEver({ waveBands, squatBands }: Situation): Caution | undefined {
  if (!waveBands.isOutOfRange && !squatBands.isOutOfRange) return undefined
  const families = [
    ...(waveBands.isOutOfRange ? ['wave height'] : []),
    ...(squatBands.isOutOfRange ? ['squat'] : []),
  ]
  return {
    code: 'no-method-in-range',
    severity: 'warning',
    text: `No published method for ${families.join(' and ')} covers this vessel in this water at any speed: the highest value of those out of range is used.`,
    facts: { families },
  }
}

function assumedDraught({ vessel }: Situation): Caution | undefined {
  if (vessel.basis.draught === 'given') return undefined
  return {
    code: 'assumed-value-matters',
    severity: 'warning',
    text: 'The draught is that of the class, not of the vessel: blockage, squat and waves follow from it. Give draught_m where it is known.',
    facts: { field: 'vessel.draught_m', value: vessel.draught },
  }
}

/** Form and speed of a described vessel, as they are named at the edge. */
const FORM_FIELDS = [
  ['blockCoefficient', 'vessel.block_coefficient'],
  ['midshipCoefficient', 'vessel.midship_coefficient'],
  ['entranceLength', 'vessel.entrance_length_m'],
  ['maxSpeed', 'vessel.max_speed_mps'],
  ['minSteerageSpeed', 'vessel.min_steerage_speed_mps'],
] as const

function assumedForm({ vessel }: Situation): Caution | undefined {
  if (vessel.classId !== undefined) return undefined
  const fields = FORM_FIELDS.filter(([field]) => vessel.basis[field] === 'typical').map(([, name]) => name)
  if (fields.length === 0) return undefined
  return {
    code: 'assumed-value-matters',
    severity: 'caution',
    text: 'Form, top speed or steerage of the described vessel are typical figures for its size and hull: give them where they are known.',
    facts: { fields },
  }
}
