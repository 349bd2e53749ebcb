import type { Advisory } from '../advisory/advise.ts'
import type { Assessment } from '../advisory/assess.ts'
import { METHOD_VERSION } from '../advisory/catalogue.ts'
import type { Curve } from '../advisory/curve.ts'
import type { Decision } from '../advisory/decide.ts'
import { inputHash } from './input-hash.ts'
import {
  known,
  recommendedPair,
  toCriterionReply,
  toCriticalReply,
  toCurvePoints,
  toDirectionReply,
  toEffectsReply,
  toSquatReply,
  toVesselReply,
  toWaveReply,
} from './reply-parts.ts'
import type { Resolved } from './request.ts'

/** What identifies an answer beside its inputs. */
export interface ReplyContext {
  readonly serviceVersion: string
  readonly registryRevision: number
}

/** What a caller knows an answer by. */
export interface Mark {
  readonly label?: string | undefined
  /** line of the stream that it answers */
  readonly line?: number
}

// Replies are written field by field, undefined where a field does not apply: spreading parts into one object would cost
// as much as the hydraulics.

const segmentReply = ({ record, segment }: Resolved) =>
  record && { id: record.id, name: segment.name, revision: record.revision }

const stationReply = ({ situation }: Decision, { record }: Resolved) =>
  record && { index: situation.station.index, chainage_m: situation.station.chainage }

const conditionsReply = ({ situation, direction }: Decision) => ({
  water_level_m: situation.conditions.waterLevel,
  current_mps: situation.conditions.current,
  direction,
})

function reproducibility(resolved: Resolved, context: ReplyContext) {
  const { record, classRevision } = resolved
  const isOfRegistry =
    record !== undefined || classRevision !== undefined || resolved.options.calibration !== undefined
  return {
    service_version: context.serviceVersion,
    method_version: METHOD_VERSION,
    input_hash: inputHash(resolved),
    segment_revision: record?.revision,
    vessel_class_revision: classRevision,
    calibration_id: resolved.options.calibration?.id,
    registry_revision: isOfRegistry ? context.registryRevision : undefined,
  }
}

function toUncalibratedReply({ decision, bankWaveHeight }: NonNullable<Advisory['uncalibrated']>) {
  return {
    outcome: decision.outcome,
    recommended_max_speed: recommendedPair(decision),
    bank_wave_height_m: known(bankWaveHeight),
  }
}

function recommendedReply({ decision, sign }: Advisory) {
  const pair = recommendedPair(decision)
  return pair && { through_water: pair.through_water, over_ground: pair.over_ground, sign }
}

/** The advisory as it goes out. */
export function toAdvisoryReply(
  advisory: Advisory,
  resolved: Resolved,
  context: ReplyContext,
  { line, label }: Mark,
) {
  const { decision, byDirection, uncalibrated, curve } = advisory
  const { situation, governing } = decision
  const isSafe = decision.outcome !== 'no-safe-speed'
  const effects = toEffectsReply(decision, advisory.effects)
  const critical = toCriticalReply(decision)
  const criteria = advisory.criteria.map((report) => toCriterionReply(decision, report))
  return {
    line,
    label,
    segment: segmentReply(resolved),
    station: stationReply(decision, resolved),
    vessel: toVesselReply(situation.vessel),
    conditions: conditionsReply(decision),
    outcome: decision.outcome,
    governing_criterion: governing.criterion.id,
    governing_at: governing.criterion.place,
    by_direction: byDirection && {
      upstream: toDirectionReply(byDirection.upstream),
      downstream: toDirectionReply(byDirection.downstream),
    },
    recommended_max_speed: recommendedReply(advisory),
    critical_speed: critical,
    at_recommended_speed: isSafe ? effects : undefined,
    at_minimum_steerage_speed: isSafe ? undefined : effects,
    criteria,
    wave_methods: advisory.waveMethods.map((report) => toWaveReply(decision, report)),
    squat_methods: advisory.squatMethods.map(toSquatReply),
    uncalibrated: uncalibrated && toUncalibratedReply(uncalibrated),
    speed_curve: curve && {
      points: toCurvePoints(curve),
      criteria,
      critical_speed: critical,
      recommended_max_speed: recommendedPair(decision),
    },
    cautions: advisory.cautions,
    assumptions: advisory.assumptions,
    reproducibility: reproducibility(resolved, context),
  }
}

/** A segment's curve, as it goes out: with what it is the curve of. */
export function toSegmentCurveReply(
  advisory: Advisory,
  curve: Curve,
  resolved: Resolved,
  context: ReplyContext,
) {
  const { decision } = advisory
  return {
    points: toCurvePoints(curve),
    criteria: advisory.criteria.map((report) => toCriterionReply(decision, report)),
    critical_speed: toCriticalReply(decision),
    recommended_max_speed: recommendedPair(decision),
    segment: segmentReply(resolved),
    station: stationReply(decision, resolved),
    vessel: toVesselReply(decision.situation.vessel),
    conditions: conditionsReply(decision),
    cautions: advisory.cautions,
    reproducibility: reproducibility(resolved, context),
  }
}

/** What a speed does, as it goes out. */
export function toAssessmentReply(
  assessment: Assessment,
  resolved: Resolved,
  context: ReplyContext,
  { label }: Mark,
) {
  const { decision, criteria } = assessment
  const exceeded = criteria.filter(({ evaluation }) => !evaluation.isMet).map(({ criterion }) => criterion.id)
  return {
    label,
    segment: segmentReply(resolved),
    station: stationReply(decision, resolved),
    vessel: toVesselReply(decision.situation.vessel),
    conditions: conditionsReply(decision),
    verdict: assessment.verdict,
    exceeded: [...new Set(exceeded)],
    effects: toEffectsReply(decision, assessment.effects),
    criteria: criteria.map((report) => toCriterionReply(decision, report)),
    wave_methods: assessment.waveMethods.map((report) => toWaveReply(decision, report)),
    squat_methods: assessment.squatMethods.map(toSquatReply),
    cautions: assessment.cautions,
    assumptions: assessment.assumptions,
    reproducibility: reproducibility(resolved, context),
  }
}
