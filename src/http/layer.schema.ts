import { z } from 'zod'
import { SEVERITIES } from '../advisory/caution.ts'
import { CRITERION_IDS } from '../advisory/criteria/criterion.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { LOADINGS } from '../domain/vessel.ts'
import { SIGN_UNIT_NAMES } from './options.schema.ts'
import { OutcomeField } from './reply-parts.schema.ts'

const text = z.string().nullable()
const number = (what: string) => z.number().nullable().describe(what)

const LayerFeature = z.object({
  type: z.literal('Feature'),
  id: z.string(),
  geometry: z.object({
    type: z.literal('LineString'),
    coordinates: z.array(z.tuple([z.number(), z.number()])),
  }),
  properties: z.object({
    name: text,
    waterway: text,
    gauge_id: text,
    revision: z.int().min(1).max(1e9),
    station_chainage_m: number('of the governing station, m'),
    vessel_class: text,
    loading: z.enum(LOADINGS).nullable(),
    direction: z.enum(DIRECTIONS).nullable(),
    outcome: OutcomeField.nullable(),
    governing_criterion: z.enum(CRITERION_IDS).nullable(),
    max_over_ground_kmh: number('km/h'),
    max_over_ground_kn: number('kn'),
    max_through_water_mps: number('m/s'),
    sign_value: number('in sign_unit'),
    sign_unit: z.enum(SIGN_UNIT_NAMES).nullable(),
    critical_ratio: number('at the recommended speed, or at minimum steerage'),
    depth_froude_number: number('likewise'),
    bank_wave_height_m: number('likewise, m'),
    under_keel_clearance_m: number('likewise, m'),
    posted_limit_kmh: number('that binds, over ground, km/h'),
    posted_limit_exceeds_computed: z
      .boolean()
      .nullable()
      .describe('whether the posted limit is above what the other criteria allow'),
    worst_severity: z.enum(SEVERITIES).nullable(),
    cautions: text.describe('codes, joined by ;'),
    problem_code: text,
    problem_detail: text,
  }),
})

export const LayerReply = z
  .object({ type: z.literal('FeatureCollection'), features: z.array(LayerFeature) })
  .meta({ id: 'AdvisoryLayer', description: 'Every matching segment with its advisory in brief, not paged.' })
