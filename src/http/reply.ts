import type { Advisory } from '../advisory/advise.ts'
import type { Assessment } from '../advisory/assess.ts'
import { METHOD_VERSION } from '../advisory/catalogue.ts'
import type { Decision } from '../advisory/decide.ts'
import { inputHash } from './input-hash.ts'
import {
  known,
  recommendedReply,
  toCriterionReply,
  toCriticalReply,
  toCurveReply,
  toDirectionReply,
  toEffectsReply,
  toPair,
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

/** What both kinds of answer begin with. */
function headOf(decision: Decision, resolved: Resolved, label: string | undefined) {
  const { situation } = decision
  const { record } = resolved
  const { chainage, index } = situation.station
  return {
    ...(label !== undefined && { label }),
    ...(record && {
      segment: {
        id: record.id,
        ...(resolved.segment.name !== undefined && { name: resolved.segment.name }),
        revision: record.revision,
      },
      station: { index, ...(chainage !== undefined && { chainage_m: chainage }) },
    }),
    vessel: toVesselReply(situation.vessel),
    conditions: {
      water_level_m: situation.conditions.waterLevel,
      current_mps: situation.conditions.current,
      ...(decision.direction && { direction: decision.direction }),
    },
  }
}

export function reproducibility(resolved: Resolved, context: ReplyContext) {
  return {
    service_version: context.serviceVersion,
    method_version: METHOD_VERSION,
    input_hash: inputHash(resolved),
    ...(resolved.record && {
      segment_revision: resolved.record.revision,
      registry_revision: context.registryRevision,
    }),
  }
}

/** The advisory as it goes out. */
export function toAdvisoryReply(
  advisory: Advisory,
  resolved: Resolved,
  context: ReplyContext,
  label: string | undefined,
) {
  const { decision, byDirection, sign, effects, uncalibrated, curve } = advisory
  const isSafe = decision.outcome !== 'no-safe-speed'
  const effectsReply = toEffectsReply(decision, effects)
  return {
    ...headOf(decision, resolved, label),
    outcome: decision.outcome,
    governing_criterion: decision.governing.criterion.id,
    governing_at: decision.governing.criterion.place,
    ...(byDirection && {
      by_direction: {
        upstream: toDirectionReply(byDirection.upstream),
        downstream: toDirectionReply(byDirection.downstream),
      },
    }),
    ...(isSafe && {
      recommended_max_speed: { ...toPair(decision, decision.speed), ...(sign && { sign }) },
    }),
    critical_speed: toCriticalReply(decision),
    ...(isSafe ? { at_recommended_speed: effectsReply } : { at_minimum_steerage_speed: effectsReply }),
    criteria: advisory.criteria.map((report) => toCriterionReply(decision, report)),
    wave_methods: advisory.waveMethods.map((report) => toWaveReply(decision, report)),
    squat_methods: advisory.squatMethods.map(toSquatReply),
    ...(uncalibrated && {
      uncalibrated: {
        outcome: uncalibrated.decision.outcome,
        ...recommendedReply(uncalibrated.decision),
        ...known('bank_wave_height_m', uncalibrated.bankWaveHeight),
      },
    }),
    ...(curve && {
      speed_curve: {
        ...toCurveReply(curve),
        criteria: advisory.criteria.map((report) => toCriterionReply(decision, report)),
        critical_speed: toCriticalReply(decision),
        ...recommendedReply(decision),
      },
    }),
    cautions: advisory.cautions,
    assumptions: advisory.assumptions,
    reproducibility: reproducibility(resolved, context),
  }
}

/** What a speed does, as it goes out. */
export function toAssessmentReply(
  assessment: Assessment,
  resolved: Resolved,
  context: ReplyContext,
  label: string | undefined,
) {
  const { decision, criteria } = assessment
  return {
    ...headOf(decision, resolved, label),
    verdict: assessment.verdict,
    exceeded: [
      ...new Set(criteria.filter(({ evaluation }) => !evaluation.isMet).map(({ criterion }) => criterion.id)),
    ],
    effects: toEffectsReply(decision, assessment.effects),
    criteria: criteria.map((report) => toCriterionReply(decision, report)),
    wave_methods: assessment.waveMethods.map((report) => toWaveReply(decision, report)),
    squat_methods: assessment.squatMethods.map(toSquatReply),
    cautions: assessment.cautions,
    assumptions: assessment.assumptions,
    reproducibility: reproducibility(resolved, context),
  }
}
