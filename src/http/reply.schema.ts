import { z } from 'zod'
import { REGIMES } from '../advisory/regime.ts'
import { SIGN_UNIT_NAMES } from './options.schema.ts'
import {
  AssumptionReply,
  CautionReply,
  ConditionsReply,
  CriterionIdField,
  CriterionReply,
  CriticalReply,
  EffectsReply,
  OutcomeField,
  Pair,
  Reproducibility,
  Speed,
  SquatMethodReply,
  VesselReply,
  WaveMethodReply,
} from './reply-parts.schema.ts'

const flat = z.number().nullable()

const CurvePoint = z.object({
  through_water_mps: z.number(),
  over_ground_mps: z.number(),
  over_ground_kn: z.number(),
  over_ground_kmh: z.number(),
  depth_froude_number: z.number(),
  critical_ratio: z.number(),
  regime: z.enum(REGIMES),
  bank_wave_height_m: flat,
  stern_wave_height_m: flat,
  drawdown_m: flat,
  return_current_mps: flat,
  squat_m: flat,
  under_keel_clearance_m: flat,
  wave_height_by_method_m: z.record(z.string(), flat),
})

const CurveReply = z
  .object({
    points: z.array(CurvePoint),
    criteria: z.array(CriterionReply),
    critical_speed: CriticalReply,
    recommended_max_speed: Pair.optional(),
  })
  .meta({ id: 'SpeedCurve' })

const Head = {
  label: z.string().optional(),
  segment: z
    .object({ id: z.string(), name: z.string().optional(), revision: z.int().min(1).max(1e9) })
    .optional(),
  station: z
    .object({ index: z.int().min(0).max(1e6), chainage_m: z.number().optional() })
    .optional()
    .describe(
      'that governs along a registry segment. The index counts the stations that are computed with, in the order of the sailing line: those given and of the bank lines as far as they are needed, one at each receptor with a chainage, and those put between',
    ),
  vessel: VesselReply,
  conditions: ConditionsReply,
} as const

const Lists = {
  criteria: z.array(CriterionReply),
  wave_methods: z.array(WaveMethodReply),
  squat_methods: z.array(SquatMethodReply),
} as const

const Reasons = {
  cautions: z.array(CautionReply),
  assumptions: z.array(AssumptionReply),
  reproducibility: Reproducibility,
} as const

const DirectionReply = z.object({
  outcome: OutcomeField,
  governing_criterion: CriterionIdField,
  recommended_max_speed: Pair.optional(),
})

export const AdvisoryReply = z
  .object({
    ...Head,
    outcome: OutcomeField,
    governing_criterion: CriterionIdField,
    governing_at: z.string(),
    by_direction: z
      .object({ upstream: DirectionReply, downstream: DirectionReply })
      .optional()
      .describe('with a current'),
    recommended_max_speed: z
      .object({
        through_water: Speed,
        over_ground: Speed,
        sign: z.object({ value: z.number(), unit: z.enum(SIGN_UNIT_NAMES) }).optional(),
      })
      .optional()
      .describe('left out when no speed is safe'),
    critical_speed: CriticalReply,
    at_recommended_speed: EffectsReply.optional(),
    at_minimum_steerage_speed: EffectsReply.optional().describe('only when no speed is safe'),
    ...Lists,
    uncalibrated: z
      .object({
        outcome: OutcomeField,
        recommended_max_speed: Pair.optional(),
        bank_wave_height_m: z.number().optional(),
      })
      .optional()
      .describe('without the factor that was applied'),
    speed_curve: CurveReply.optional(),
    ...Reasons,
  })
  .meta({
    id: 'Advisory',
    description: 'A recommended maximum speed with its reasons, cautions and assumptions.',
  })

export const AssessmentReply = z
  .object({
    ...Head,
    verdict: z.enum(['within', 'exceeds', 'no-safe-speed']),
    exceeded: z.array(CriterionIdField),
    effects: EffectsReply,
    ...Lists,
    ...Reasons,
  })
  .meta({ id: 'Assessment', description: 'What a speed does, and whether it is faster than advised.' })

export const SensitivityReply = z
  .object({
    label: z.string().optional(),
    base: Pair.optional().describe('left out when no speed is safe'),
    inputs: z.array(
      z.object({
        field: z.string(),
        low: z.number(),
        high: z.number(),
        at_low: Pair.optional(),
        at_high: Pair.optional(),
        swing_mps: z.number().describe('difference of the recommended speeds over ground; none counts as 0'),
      }),
    ),
  })
  .meta({
    id: 'Sensitivity',
    description: 'Which uncertain input moves the answer most, largest swing first.',
  })

export const InverseReply = z
  .object({
    label: z.string().optional(),
    vary: z.enum(['depth_m', 'bank_distance_m', 'draught_m']),
    attainable: z.boolean(),
    required: z.number().optional(),
    unit: z.literal('m'),
    searched: z.tuple([z.number(), z.number()]),
    governing_criterion: CriterionIdField.optional(),
    text: z.string(),
  })
  .meta({
    id: 'Inverse',
    description: 'What an input would have to be for a speed to be within the recommendation.',
  })

export const SegmentCurveReply = z
  .object({
    ...CurveReply.shape,
    segment: Head.segment,
    station: Head.station,
    vessel: Head.vessel,
    conditions: Head.conditions,
    cautions: Reasons.cautions,
    reproducibility: Reasons.reproducibility,
  })
  .meta({ id: 'SegmentSpeedCurve', description: 'Effects over speed on a registry segment.' })
