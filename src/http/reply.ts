import type { Advisory } from '../advisory/advise.ts'
import type { Assessment } from '../advisory/assess.ts'
import { METHOD_VERSION } from '../advisory/catalogue.ts'
import type { Decision } from '../advisory/decide.ts'
import { inputHash } from './input-hash.ts'
import {
  known,
  recommendedPair,
  toCriterionReply,
  toCriticalReply,
  toCurveReply,
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

/** What both kinds of answer begin with. Fields that are undefined are not written. */
function headOf(decision: Decision, { record, segment }: Resolved, label: string | undefined) {
  const { situation } = decision
  const { chainage, index } = situation.station
  return {
    label,
    segment: record && { id: record.id, name: segment.name, revision: record.revision },
    station: record && { index, chainage_m: chainage },
    vessel: toVesselReply(situation.vessel),
    conditions: {
      water_level_m: situation.conditions.waterLevel,
      current_mps: situation.conditions.current,
      direction: decision.direction,
    },
  }
}

function reproducibility(resolved: Resolved, context: ReplyContext) {
  const { record } = resolved
  return {
    service_version: context.serviceVersion,
    method_version: METHOD_VERSION,
    input_hash: inputHash(resolved),
    segment_revision: record?.revision,
    registry_revision: record && context.registryRevision,
  }
}

/** Lists that both kinds of answer hold. */
function listsOf(decision: Decision, answer: Advisory | Assessment) {
  return {
    criteria: answer.criteria.map((report) => toCriterionReply(decision, report)),
    wave_methods: answer.waveMethods.map((report) => toWaveReply(decision, report)),
    squat_methods: answer.squatMethods.map(toSquatReply),
  }
}

function toUncalibratedReply({ decision, bankWaveHeight }: NonNullable<Advisory['uncalibrated']>) {
  return {
    outcome: decision.outcome,
    recommended_max_speed: recommendedPair(decision),
    bank_wave_height_m: known(bankWaveHeight),
  }
}

/** The advisory as it goes out. */
export function toAdvisoryReply(
  advisory: Advisory,
  resolved: Resolved,
  context: ReplyContext,
  label: string | undefined,
) {
  const { decision, byDirection, sign, uncalibrated, curve } = advisory
  const recommended = recommendedPair(decision)
  const effects = toEffectsReply(decision, advisory.effects)
  const critical = toCriticalReply(decision)
  const lists = listsOf(decision, advisory)
  return {
    ...headOf(decision, resolved, label),
    outcome: decision.outcome,
    governing_criterion: decision.governing.criterion.id,
    governing_at: decision.governing.criterion.place,
    by_direction: byDirection && {
      upstream: toDirectionReply(byDirection.upstream),
      downstream: toDirectionReply(byDirection.downstream),
    },
    recommended_max_speed: recommended && { ...recommended, sign },
    critical_speed: critical,
    at_recommended_speed: recommended && effects,
    at_minimum_steerage_speed: recommended ? undefined : effects,
    ...lists,
    uncalibrated: uncalibrated && toUncalibratedReply(uncalibrated),
    speed_curve: curve && {
      ...toCurveReply(curve),
      criteria: lists.criteria,
      critical_speed: critical,
      recommended_max_speed: recommended,
    },
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
  const exceeded = criteria.filter(({ evaluation }) => !evaluation.isMet).map(({ criterion }) => criterion.id)
  return {
    ...headOf(decision, resolved, label),
    verdict: assessment.verdict,
    exceeded: [...new Set(exceeded)],
    effects: toEffectsReply(decision, assessment.effects),
    ...listsOf(decision, assessment),
    cautions: assessment.cautions,
    assumptions: assessment.assumptions,
    reproducibility: reproducibility(resolved, context),
  }
}
