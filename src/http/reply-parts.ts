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

/** A figure, or undefined, which is not written, where it does not apply. */
export const known = (value: number): number | undefined => (Number.isFinite(value) ? value : undefined)

export function toVesselReply(vessel: Vessel) {
  return {
    class: vessel.classId,
    loading: vessel.loading,
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
    wave_height_m: known(bank.waveHeight),
    drawdown_m: known(bank.drawdown),
    return_current_mps: known(bank.returnCurrent),
    wave_energy_j_per_m: known(bank.waveEnergy),
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
    blockage_ratio: known(effects.blockageRatio),
    return_current_mps: known(effects.returnCurrent),
    drawdown_m: known(effects.drawdown),
    front_wave_height_m: known(effects.frontWaveHeight),
    stern_wave_height_m: known(effects.sternWaveHeight),
    squat_m: known(effects.squat),
    under_keel_clearance_m: known(effects.underKeelClearance),
    wake: {
      half_angle_deg: wake.halfAngle * DEGREES,
      cusp_propagation_angle_deg: wake.propagationAngle * DEGREES,
      period_s: known(wake.period),
      length_m: known(wake.waveLength),
      transverse_length_m: known(wake.transverseWaveLength),
    },
    bank_wave_height_m: known(effects.bankWaveHeight),
    bank_wave_energy_j_per_m: known(effects.bankWaveEnergy),
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
    component: evaluation.component,
    sense: criterion.sense,
    limit: evaluation.limit,
    unit: criterion.unit,
    value: known(evaluation.value ?? NaN),
    margin_ratio: known(marginOf(report)),
    max_speed: firstSpeed < Infinity ? toPair(decision, firstSpeed) : undefined,
    met: evaluation.isMet,
    governing: report.isGoverning,
    origin: criterion.origin,
  }
}

export function toWaveReply(decision: Decision, report: WaveReport) {
  return {
    id: report.id,
    applicable: report.outside.length === 0,
    outside: report.outside,
    height_m: known(report.height),
    factor: report.factor,
    max_speed: report.firstSpeed < Infinity ? toPair(decision, report.firstSpeed) : undefined,
    reference: report.reference,
  }
}

export function toSquatReply(report: SquatReport) {
  return {
    id: report.id,
    applicable: report.outside.length === 0,
    outside: report.outside,
    squat_m: known(report.squat),
    reference: report.reference,
  }
}

export function toCriticalReply(decision: Decision) {
  const { situation } = decision
  const { setting, meetingCriticalSpeed } = situation
  const { through_water, over_ground } = toPair(decision, setting.criticalSpeed)
  return {
    through_water,
    over_ground,
    basis: setting.isConfined ? 'confined-channel' : 'open-water',
    shallow_water_wave_speed: toSpeed(situation.shallowWaveSpeed),
    supercritical_onset: setting.isConfined ? toSpeed(setting.supercriticalOnset) : undefined,
    meeting_like_vessel: Number.isFinite(meetingCriticalSpeed) ? toSpeed(meetingCriticalSpeed) : undefined,
  }
}

/** The recommended speed, or undefined when no speed is safe. */
export const recommendedPair = (decision: Decision) =>
  decision.outcome === 'no-safe-speed' ? undefined : toPair(decision, decision.speed)

export function toDirectionReply(decision: Decision) {
  return {
    outcome: decision.outcome,
    governing_criterion: decision.governing.criterion.id,
    recommended_max_speed: recommendedPair(decision),
  }
}

const orNull = (value: number): number | null => (Number.isFinite(value) ? value : null)

/** The points of a curve as flat rows: every column present, null where it does not apply. */
export function toCurvePoints({ decision, points }: Curve) {
  return points.map(({ effects, heights }) => {
    const { over_ground } = toPair(decision, effects.speed)
    return {
      through_water_mps: effects.speed,
      over_ground_mps: over_ground.mps,
      over_ground_kn: over_ground.kn,
      over_ground_kmh: over_ground.kmh,
      depth_froude_number: effects.depthFroudeNumber,
      critical_ratio: effects.criticalRatio,
      regime: effects.regime,
      bank_wave_height_m: orNull(effects.bankWaveHeight),
      stern_wave_height_m: orNull(effects.sternWaveHeight),
      drawdown_m: orNull(effects.drawdown),
      return_current_mps: orNull(effects.returnCurrent),
      squat_m: orNull(effects.squat),
      under_keel_clearance_m: orNull(effects.underKeelClearance),
      wave_height_by_method_m: Object.fromEntries(heights.map(({ id, height }) => [id, orNull(height)])),
    }
  })
}
