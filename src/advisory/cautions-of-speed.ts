import type { Extent } from '../domain/calibration.ts'
import type { BedKind, Direction } from '../domain/segment.ts'
import { isInRange } from '../hydro/bands.ts'
import { permissibleVelocity } from '../hydro/permissible-velocity.ts'
import { isSteady } from '../hydro/primary-wave.ts'
import { WAVE_METHODS } from '../hydro/waves/all.ts'
import type { Caution } from './caution.ts'
import { bankOfReceptor, isAt } from './criteria/receptor-wave.ts'
import { currentAlong } from './direction.ts'
import type { Effects } from './effects.ts'
import { bankDrawdown } from './primary.ts'
import type { Situation } from './situation.ts'

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
/** Share of the meeting vessels' critical speed above which meeting is dangerous, as for one vessel. */
const MEETING_RATIO = 0.9
/** Drawdown at a mooring that loads lines (convention, no published limit), m. */
const MOORING_DRAWDOWN = 0.2
/** Speed of the steerage test of ES-TRIN for inland motor vessels, m/s: 6.5 km/h through the water. */
const TYPE_TEST_SPEED = 6.5 / 3.6

/** Cautions about the speed that is advised or asked about. */
export function speedCautions(situation: Situation, effects: Effects): Caution[] {
  const found: (Caution | undefined)[] = [
    REGIME_CAUTIONS[effects.regime],
    situation.setting.isConfined && !isSteady(situation.setting, effects.speed) ? NO_STEADY_FLOW : undefined,
    outsideRange(situation, effects.speed),
    beyondCalibration(situation, effects.speed),
    bankSuction(situation, effects),
    meeting(situation, effects.speed),
    ...mooringDrawdown(situation, effects.speed),
    typeTest(situation, effects.speed),
  ]
  return found.filter((caution) => caution !== undefined)
}

function outsideRange(situation: Situation, speed: number): Caution | undefined {
  const { setting, waveBands } = situation
  const methods: string[] = []
  WAVE_METHODS.forEach((method, i) => {
    const isMeant = method.hulls.includes(setting.hull) && method.hasCoefficients(setting)
    if (isMeant && !isInRange(waveBands, i, speed)) methods.push(method.id)
  })
  if (methods.length === 0) return undefined
  return {
    code: 'outside-method-range',
    severity: 'info',
    text: 'Some wave methods are outside their range here; their values are shown and do not count.',
    facts: { methods },
  }
}

/** Times by which depth or distance may leave what was measured before a factor counts as extrapolated: own choice. */
const MEASURED_SLACK = 2

const isFarFrom = ([least, greatest]: Extent, value: number): boolean =>
  value < least / MEASURED_SLACK || value > greatest * MEASURED_SLACK

/** Factors hold for what was measured: another speed is extrapolated, and a much different depth or distance. */
function beyondCalibration({ options, section }: Situation, speed: number): Caution | undefined {
  if (!options.calibration || options.waveFactor !== undefined) return undefined
  const { coverage } = options.calibration
  const distance = Math.min(...section.distances)
  const beyond = [
    ...(speed < coverage.speed[0] || speed > coverage.speed[1] ? ['speed'] : []),
    ...(isFarFrom(coverage.depth, section.depth) ? ['depth'] : []),
    ...(isFarFrom(coverage.distance, distance) ? ['distance'] : []),
  ]
  if (beyond.length === 0) return undefined
  return {
    code: 'beyond-calibration',
    severity: 'caution',
    text: `The ${beyond.join(' and the ')} lies outside what was measured on this water: the factors are extrapolated.`,
    facts: {
      beyond,
      speed_mps: speed,
      measured_from_mps: coverage.speed[0],
      measured_to_mps: coverage.speed[1],
    },
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
    if (receptor.kind !== 'moored-small-craft' || !isAt(receptor, situation.station)) return
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
