import { z } from 'zod'
import { CAUTION_CODES, SEVERITIES } from '../advisory/caution.ts'
import { CRITERION_IDS } from '../advisory/criteria/criterion.ts'
import { REGIMES } from '../advisory/regime.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { HULLS, LOADINGS } from '../domain/vessel.ts'

const number = (what: string) => z.number().describe(what)
const optional = (what: string) => z.number().optional().describe(what)

export const Speed = z
  .object({ mps: number('m/s'), kn: number('kn'), kmh: number('km/h') })
  .meta({ id: 'Speed', description: 'One speed in three units.' })

export const Pair = z
  .object({ through_water: Speed, over_ground: Speed })
  .meta({ id: 'SpeedPair', description: 'A speed through the water and what it is over the ground.' })

export const OutcomeField = z.enum(['limited', 'service-speed', 'no-safe-speed'])
export const CriterionIdField = z.enum(CRITERION_IDS)
const SideField = z.enum(['left', 'right', 'nearer', 'farther'])

export const VesselReply = z
  .object({
    class: z.string().optional(),
    loading: z.enum(LOADINGS).optional(),
    hull: z.enum(HULLS),
    length_m: number('m'),
    beam_m: number('m'),
    draught_m: number('as used, m'),
    block_coefficient: number('displaced volume over length, beam and draught'),
    midship_coefficient: number('immersed midship section over beam and draught'),
    entrance_length_m: number('m'),
    displacement_m3: number('displaced volume, m3'),
    max_speed: Speed,
    min_steerage_speed: Speed,
  })
  .meta({ id: 'VesselUsed', description: 'The vessel as it was computed with.' })

export const ConditionsReply = z.object({
  water_level_m: number('above the datum, m'),
  current_mps: number('positive downstream, m/s'),
  direction: z.enum(DIRECTIONS).optional(),
})

const BankReply = z.object({
  side: SideField,
  distance_m: number('sailing line to the waterline at the actual level, m'),
  wave_height_m: optional('m'),
  drawdown_m: optional('magnitude, m'),
  return_current_mps: optional('magnitude, m/s'),
  wave_energy_j_per_m: optional('of the highest secondary wave, J per metre of crest'),
  first_arrival_s: number('of the first wave after the bow passes abeam, s'),
})

export const EffectsReply = z
  .object({
    speed: Pair,
    depth_froude_number: number('V/√(g h)'),
    length_froude_number: number('V/√(g L)'),
    critical_ratio: number('speed over critical speed'),
    regime: z.enum(REGIMES),
    blockage_ratio: optional('immersed midship section over effective section'),
    return_current_mps: optional('highest over the banks, m/s'),
    drawdown_m: optional('highest over the banks, m'),
    front_wave_height_m: optional('m'),
    stern_wave_height_m: optional('m'),
    squat_m: optional('highest of the methods in range, m'),
    under_keel_clearance_m: optional('after squat, m'),
    wake: z.object({
      half_angle_deg: number('of the wedge'),
      cusp_propagation_angle_deg: number('of the cusp waves to the sailing line'),
      period_s: optional('of the cusp waves, s'),
      length_m: optional('of the cusp waves, m'),
      transverse_length_m: optional('of the transverse waves, m'),
    }),
    bank_wave_height_m: optional('highest over the banks, m'),
    bank_wave_energy_j_per_m: optional('highest over the banks, J per metre of crest'),
    banks: z.array(BankReply),
  })
  .meta({
    id: 'Effects',
    description: 'What a passage does at a speed; figures that do not apply are left out.',
  })

export const CriterionReply = z
  .object({
    id: CriterionIdField,
    at: z.string().describe('vessel, a bank, or receptor-<index>'),
    component: z.string().optional().describe('stern-wave, or the wave method behind the value'),
    sense: z.enum(['at-most', 'at-least']),
    limit: number('in the unit of the criterion'),
    unit: z.enum(['m', 'm/s', 'ratio']),
    value: optional('at the speed of the answer; left out where it cannot be evaluated'),
    margin_ratio: optional('1 - value/limit, or value/limit - 1 for at-least'),
    max_speed: Pair.optional().describe('first speed at which it is reached, taken alone'),
    met: z.boolean(),
    governing: z.boolean(),
    origin: z.enum(['policy', 'segment', 'request', 'vessel']),
  })
  .meta({ id: 'Criterion', description: 'One bound on the speed and how it stands.' })

const OutsideReply = z.object({
  quantity: z.string(),
  value: z.union([z.number(), z.string()]),
  min: z.number().optional(),
  max: z.number().optional(),
})

export const WaveMethodReply = z
  .object({
    id: z.string(),
    applicable: z.boolean(),
    outside: z.array(OutsideReply),
    height_m: optional('at the nearer bank, m; a value out of range does not govern'),
    factor: optional('applied to the height'),
    max_speed: Pair.optional().describe(
      'first speed at which it alone, in its range, reaches the limit of a bank',
    ),
    reference: z.string(),
  })
  .meta({ id: 'WaveMethodValue' })

export const SquatMethodReply = z
  .object({
    id: z.string(),
    applicable: z.boolean(),
    outside: z.array(OutsideReply),
    squat_m: optional('m; a value out of range does not govern'),
    reference: z.string(),
  })
  .meta({ id: 'SquatMethodValue' })

const FactValue = z.union([z.string(), z.number(), z.boolean(), z.array(z.string())])

export const CautionReply = z
  .object({
    code: z.enum(CAUTION_CODES),
    severity: z.enum(SEVERITIES),
    text: z.string(),
    facts: z.record(z.string(), FactValue).optional(),
  })
  .meta({ id: 'Caution', description: 'Something to know before using the figure.' })

export const AssumptionReply = z
  .object({
    field: z.string(),
    value: z.union([z.string(), z.number(), z.boolean()]),
    text: z.string(),
    source: z.string(),
  })
  .meta({ id: 'Assumption', description: 'A value that was not given, with where it comes from.' })

export const Reproducibility = z
  .object({
    service_version: z.string(),
    method_version: z.string(),
    input_hash: z.string().describe('sha256 over the canonical form of everything the answer follows from'),
    segment_revision: z.int().min(1).max(1e9).optional(),
    vessel_class_revision: z.int().min(1).max(1e9).optional(),
    calibration_id: z.string().optional(),
    registry_revision: z.int().min(0).max(1e9).optional(),
  })
  .meta({ id: 'Reproducibility' })

export const CriticalReply = z
  .object({
    through_water: Speed,
    over_ground: Speed,
    basis: z.enum(['confined-channel', 'open-water']),
    shallow_water_wave_speed: Speed,
    supercritical_onset: Speed.optional(),
    meeting_like_vessel: Speed.optional(),
  })
  .meta({ id: 'CriticalSpeed' })
