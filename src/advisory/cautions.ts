import type { BedKind } from '../domain/segment.ts'
import { outsideAt } from '../hydro/bands.ts'
import { permissibleVelocity } from '../hydro/permissible-velocity.ts'
import { isSteady } from '../hydro/primary-wave.ts'
import { depthAt } from '../hydro/section.ts'
import { WAVE_METHODS } from '../hydro/waves/all.ts'
import type { Caution } from './caution.ts'
import { bankLimits } from './criteria/bank-wave.ts'
import { bankOfReceptor } from './criteria/receptor-wave.ts'
import { currentAlong } from './direction.ts'
import type { Effects } from './effects.ts'
import { bankDrawdown } from './primary.ts'
import type { Situation } from './situation.ts'
import type { Direction } from '../domain/segment.ts'

const LOCAL_RULES: Caution = {
  code: 'local-rules-apply',
  severity: 'info',
  text: 'This is a computed advisory, not an order. Local rules, posted signs and the judgement of licensed navigators and engineers come first.',
}

const REGIME_CAUTIONS: Readonly<Record<Effects['regime'], Caution | undefined>> = {
  subcritical: undefined,
  elevated: {
    code: 'elevated',
    severity: 'info',
    text: 'The flow is noticeably affected by the channel: drawdown and waves grow faster than the speed.',
  },
  'near-critical': {
    code: 'near-critical',
    severity: 'caution',
    text: 'The speed is close to the critical speed: drawdown, squat and waves grow steeply, a small error in depth or speed matters.',
  },
  transcritical: {
    code: 'transcritical',
    severity: 'warning',
    text: 'Between the limit speeds water piles up ahead of the hull and no method holds. Do not sustain such a speed.',
  },
  supercritical: {
    code: 'supercritical',
    severity: 'warning',
    text: 'The speed is above the critical range: only light fast craft reach it, and the waves they leave are long.',
  },
}

/** Severe enough to be seen against the rest of a list. */
const NO_STEADY_FLOW: Caution = {
  code: 'no-steady-flow',
  severity: 'warning',
  text: 'At this speed no steady flow past the hull exists: drawdown, return current, stern wave and the squat that follows from them are left out.',
}

/** Speed over the critical speed above which suction towards a bank is likely (Lataire & Vantorre, from memory). */
const SUCTION_RATIO = 0.8
/** Depth over draught below which the static clearance is small (PIANC, from memory). */
const SMALL_CLEARANCE = 1.1
/** Share of the meeting vessels' critical speed above which meeting is dangerous, as for one vessel. */
const MEETING_RATIO = 0.9
/** Depth change along a segment that makes long waves at subcritical speed (Grue 2017, JFM), ratio. */
const DEPTH_CHANGE = 1.5
/** Drawdown at a mooring that loads lines (convention, no published limit), m. */
const MOORING_DRAWDOWN = 0.2
/** Share of the depth that counts as level bed under the beam (own choice). */
const LEVEL_BED = 0.95
/** Speed of the steerage test of ES-TRIN for inland motor vessels, m/s: 6.5 km/h through the water. */
const TYPE_TEST_SPEED = 6.5 / 3.6

/** Cautions about the water and the vessel, whatever the speed. */
function situationCautions(situation: Situation): Caution[] {
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

function walls(situation: Situation): Caution[] {
  const isWall = situation.segment.banks.map((bank) => bank.kind === 'wall')
  if (!isWall[0] && !isWall[1]) return []
  const reflection: Caution = {
    code: 'wall-reflection',
    severity: 'caution',
    text: 'A wall reflects waves: before it they reach up to twice the height that is computed, and they cross to the other bank.',
  }
  const isUnbound = (isWall[0] && !bankLimits(situation, 0)) || (isWall[1] && !bankLimits(situation, 1))
  if (!isUnbound) return [reflection]
  const unbound: Caution = {
    code: 'wall-has-no-criterion',
    severity: 'info',
    text: 'A wall has no wave height limit of its own: give one where people, moorings or the wall itself need it.',
  }
  return [reflection, unbound]
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

/** Cautions about the speed that is advised or asked about. */
function speedCautions(situation: Situation, effects: Effects): Caution[] {
  const found: (Caution | undefined)[] = [
    REGIME_CAUTIONS[effects.regime],
    situation.setting.isConfined && !isSteady(situation.setting, effects.speed) ? NO_STEADY_FLOW : undefined,
    outsideRange(situation, effects.speed),
    bankSuction(situation, effects),
    meeting(situation, effects.speed),
    ...mooringDrawdown(situation, effects.speed),
    typeTest(situation, effects.speed),
  ]
  return found.filter((caution) => caution !== undefined)
}

function outsideRange(situation: Situation, speed: number): Caution | undefined {
  const methods = WAVE_METHODS.filter(
    (method) =>
      method.hulls.includes(situation.setting.hull) &&
      method.hasCoefficients(situation.setting) &&
      outsideAt(method, situation.setting, speed).length > 0,
  ).map((method) => method.id)
  if (methods.length === 0) return undefined
  return {
    code: 'outside-method-range',
    severity: 'info',
    text: 'Some wave methods are outside their range here; their values are shown and do not count.',
    facts: { methods },
  }
}

function bankSuction({ setting, section }: Situation, effects: Effects): Caution | undefined {
  if (!setting.isConfined || effects.criticalRatio <= SUCTION_RATIO) return undefined
  return {
    code: 'bank-suction',
    severity: 'caution',
    text: 'Above eight tenths of the critical speed the stern is drawn to a near bank: keep to the sailing line, and slow down before leaving it.',
    facts: {
      critical_ratio: effects.criticalRatio,
      bank_distance_m: Math.min(...section.distances),
    },
  }
}

function meeting(situation: Situation, speed: number): Caution | undefined {
  if (situation.conditions.meetingVessel || !situation.setting.isConfined) return undefined
  const { meetingCriticalSpeed } = situation
  const isDangerous = !(speed <= MEETING_RATIO * meetingCriticalSpeed)
  return {
    code: 'meeting-not-considered',
    severity: isDangerous ? 'warning' : 'info',
    text: isDangerous
      ? 'The figure holds for one vessel alone. Meeting or overtaking a vessel like it at this speed would come close to the critical speed of both together.'
      : 'The figure holds for one vessel alone: meeting and overtaking traffic are not considered.',
    ...(!Number.isNaN(meetingCriticalSpeed) && {
      facts: { meeting_critical_speed_mps: meetingCriticalSpeed },
    }),
  }
}

function mooringDrawdown(situation: Situation, speed: number): Caution[] {
  const cautions: Caution[] = []
  situation.segment.receptors.forEach((receptor, i) => {
    if (receptor.kind !== 'moored-small-craft') return
    const drawdown = bankDrawdown(situation, bankOfReceptor(situation, receptor), speed)
    if (!(drawdown > MOORING_DRAWDOWN)) return
    cautions.push({
      code: 'mooring-drawdown',
      severity: 'caution',
      text: 'The drawdown at a mooring is large enough to load lines and ground boats.',
      facts: { receptor: i, drawdown_m: drawdown },
    })
  })
  return cautions
}

function typeTest({ vessel }: Situation, speed: number): Caution | undefined {
  if (!vessel.isInlandMotorVessel || speed >= TYPE_TEST_SPEED) return undefined
  return {
    code: 'below-type-test-steerage',
    severity: 'caution',
    text: 'Inland motor vessels are type-tested for steerage at 6.5 km/h through the water; this speed is lower.',
    facts: { type_test_kmh: 6.5 },
  }
}

/** Velocity at the bed near a bank against what the bed withstands, with the current of the water itself. */
export function bedCaution(
  situation: Situation,
  effects: Effects,
  direction: Direction | undefined,
): Caution | undefined {
  const bed: BedKind | undefined = situation.segment.bedKind
  if (bed === undefined || Number.isNaN(effects.returnCurrent)) return undefined
  const permissible = permissibleVelocity(bed, situation.section.depth)
  const velocity = Math.abs(effects.returnCurrent - currentAlong(situation.conditions, direction))
  if (velocity <= permissible) return undefined
  return {
    code: 'permissible-velocity-exceeded',
    severity: 'caution',
    text: 'The return current, with the current of the water, is above the velocity that the bed withstands for long: repeated passages may scour it.',
    facts: { velocity_mps: velocity, permissible_mps: permissible, bed_kind: bed },
  }
}

/** Caution of a course against the current: little remains over the ground. */
export function currentCaution(situation: Situation, direction: Direction | undefined): Caution | undefined {
  const current = currentAlong(situation.conditions, direction)
  if (!(current < 0)) return undefined
  return {
    code: 'against-current',
    severity: 'info',
    text: 'The course is against the current: the speed over the ground is the lower one by as much.',
    facts: { current_mps: current },
  }
}

/** All cautions of a vessel at a speed, the deferral to local rules first. */
export function cautionsAt(
  situation: Situation,
  effects: Effects,
  direction: Direction | undefined,
): Caution[] {
  const bed = bedCaution(situation, effects, direction)
  const current = currentCaution(situation, direction)
  return [
    LOCAL_RULES,
    ...speedCautions(situation, effects),
    ...situationCautions(situation),
    ...(bed ? [bed] : []),
    ...(current ? [current] : []),
  ]
}
