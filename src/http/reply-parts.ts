import type { CriterionReport } from '../advisory/advise.ts'
import type { Curve } from '../advisory/curve.ts'
import type { Decision } from '../advisory/decide.ts'
import { currentAlong } from '../advisory/direction.ts'
import type { BankEffects, Effects } from '../advisory/effects.ts'
import type { SquatReport, WaveReport } from '../advisory/method-report.ts'
import type { Vessel } from '../domain/vessel.ts'
import { toKmh, toKnots } from '../domain/units.ts'

const DEGREES = 180 / Math.PI

export const toSpeed = (speed: number) => ({ mps: speed, kn: toKnots(speed), kmh: toKmh(speed) })

/** A speed through the water with what it is over the ground in the direction of a decision. */
export function toPair(decision: Decision, speed: number) {
  const { conditions } = decision.situation
  const overGround = speed + currentAlong(conditions, decision.direction)
  return { through_water: toSpeed(speed), over_ground: toSpeed(overGround) }
}

/** A figure under its name, or nothing where it does not apply. */
export function known<Name extends string>(name: Name, value: number): Partial<Record<Name, number>> {
  return Number.isFinite(value) ? ({ [name]: value } as Record<Name, number>) : {}
}

export function toVesselReply(vessel: Vessel) {
  return {
    ...(vessel.classId !== undefined && { class: vessel.classId }),
    ...(vessel.loading && { loading: vessel.loading }),
    hull: vessel.hull,
    length_m: vessel.length,
    beam_m: vessel.beam,
    draught_m: vessel.draught,
    block_coefficient: vessel.blockCoefficient,
    midship_coefficient: vessel.midshipCoefficient,
    entrance_length_m: vessel.entranceLength,
    displacement_m3: vessel.volume,
    max_speed: toSpeed(vessel.maxSpeed),
    min_steerage_speed: toSpeed(vessel.minSteerageSpeed),
  }
}

function toBankReply(bank: BankEffects) {
  return {
    side: bank.side,
    distance_m: bank.distance,
    ...known('wave_height_m', bank.waveHeight),
    ...known('drawdown_m', bank.drawdown),
    ...known('return_current_mps', bank.returnCurrent),
    ...known('wave_energy_j_per_m', bank.waveEnergy),
    first_arrival_s: bank.firstArrival,
  }
}

export function toEffectsReply(decision: Decision, effects: Effects) {
  const { wake } = effects
  return {
    speed: toPair(decision, effects.speed),
    depth_froude_number: effects.depthFroudeNumber,
    length_froude_number: effects.lengthFroudeNumber,
    critical_ratio: effects.criticalRatio,
    regime: effects.regime,
    ...known('blockage_ratio', effects.blockageRatio),
    ...known('return_current_mps', effects.returnCurrent),
    ...known('drawdown_m', effects.drawdown),
    ...known('front_wave_height_m', effects.frontWaveHeight),
    ...known('stern_wave_height_m', effects.sternWaveHeight),
    ...known('squat_m', effects.squat),
    ...known('under_keel_clearance_m', effects.underKeelClearance),
    wake: {
      half_angle_deg: wake.halfAngle * DEGREES,
      cusp_propagation_angle_deg: wake.propagationAngle * DEGREES,
      ...known('period_s', wake.period),
      ...known('length_m', wake.waveLength),
      ...known('transverse_length_m', wake.transverseWaveLength),
    },
    ...known('bank_wave_height_m', effects.bankWaveHeight),
    ...known('bank_wave_energy_j_per_m', effects.bankWaveEnergy),
    banks: effects.banks.map(toBankReply),
  }
}

/** Room that a criterion leaves, as a share of its limit. */
function marginOf(report: CriterionReport): number {
  const { value = NaN, limit } = report.evaluation
  return report.criterion.sense === 'at-most' ? 1 - value / limit : value / limit - 1
}

export function toCriterionReply(decision: Decision, report: CriterionReport) {
  const { criterion, evaluation, firstSpeed } = report
  return {
    id: criterion.id,
    at: criterion.place,
    ...(evaluation.component !== undefined && { component: evaluation.component }),
    sense: criterion.sense,
    limit: evaluation.limit,
    unit: criterion.unit,
    ...known('value', evaluation.value ?? NaN),
    ...known('margin_ratio', marginOf(report)),
    ...(firstSpeed < Infinity && { max_speed: toPair(decision, firstSpeed) }),
    met: evaluation.isMet,
    governing: report.isGoverning,
    origin: criterion.origin,
  }
}

export function toWaveReply(decision: Decision, report: WaveReport) {
  const { waveFactor } = decision.situation.options
  return {
    id: report.id,
    applicable: report.outside.length === 0,
    outside: report.outside,
    ...known('height_m', report.height),
    ...(waveFactor !== undefined && { factor: waveFactor }),
    ...(report.firstSpeed < Infinity && { max_speed: toPair(decision, report.firstSpeed) }),
    reference: report.reference,
  }
}

export function toSquatReply(report: SquatReport) {
  return {
    id: report.id,
    applicable: report.outside.length === 0,
    outside: report.outside,
    ...known('squat_m', report.squat),
    reference: report.reference,
  }
}

export function toCriticalReply(decision: Decision) {
  const { situation } = decision
  const { setting, meetingCriticalSpeed } = situation
  return {
    ...toPair(decision, setting.criticalSpeed),
    basis: setting.isConfined ? 'confined-channel' : 'open-water',
    shallow_water_wave_speed: toSpeed(situation.shallowWaveSpeed),
    ...(setting.isConfined && { supercritical_onset: toSpeed(setting.supercriticalOnset) }),
    ...(Number.isFinite(meetingCriticalSpeed) && { meeting_like_vessel: toSpeed(meetingCriticalSpeed) }),
  }
}

export const recommendedReply = (decision: Decision) =>
  decision.outcome !== 'no-safe-speed' && { recommended_max_speed: toPair(decision, decision.speed) }

export function toDirectionReply(decision: Decision) {
  return {
    outcome: decision.outcome,
    governing_criterion: decision.governing.criterion.id,
    ...recommendedReply(decision),
  }
}

const FLAT_NULL = (value: number): number | null => (Number.isFinite(value) ? value : null)

/** The points of a curve as flat rows: every column present, null where it does not apply. */
export function toCurveReply(curve: Curve) {
  const { decision } = curve
  return {
    points: curve.points.map(({ effects, heights }) => {
      const { over_ground } = toPair(decision, effects.speed)
      return {
        through_water_mps: effects.speed,
        over_ground_mps: over_ground.mps,
        over_ground_kn: over_ground.kn,
        over_ground_kmh: over_ground.kmh,
        depth_froude_number: effects.depthFroudeNumber,
        critical_ratio: effects.criticalRatio,
        regime: effects.regime,
        bank_wave_height_m: FLAT_NULL(effects.bankWaveHeight),
        stern_wave_height_m: FLAT_NULL(effects.sternWaveHeight),
        drawdown_m: FLAT_NULL(effects.drawdown),
        return_current_mps: FLAT_NULL(effects.returnCurrent),
        squat_m: FLAT_NULL(effects.squat),
        under_keel_clearance_m: FLAT_NULL(effects.underKeelClearance),
        wave_height_by_method_m: Object.fromEntries(heights.map(({ id, height }) => [id, FLAT_NULL(height)])),
      }
    }),
  }
}
