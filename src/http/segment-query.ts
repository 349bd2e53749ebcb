import { z } from 'zod'
import { Fault } from '../domain/fault.ts'
import type { BoundingBox } from '../domain/position.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { LOADINGS } from '../domain/vessel.ts'
import type { SegmentFilter, SegmentRecord } from '../store/registry.ts'
import { Id } from './fields.ts'
import { SIGN_UNIT_NAMES, toConditions, toOptions } from './options.schema.ts'
import { enumParameter, numberParameter } from './parameters.ts'
import { classRevisionOf, optionsOn, segmentNotFound, segmentOf, type Resolved } from './request.ts'
import type { View } from './service.ts'
import { toVessel } from './vessel.schema.ts'

const BBOX = /^-?\d+(?:\.\d+)?(?:,-?\d+(?:\.\d+)?){3}$/

/** Query parameters that choose segments. */
export const FILTER_FIELDS = {
  bbox: z
    .string()
    .regex(BBOX, { error: 'must be west,south,east,north in degrees' })
    .optional()
    .describe('west,south,east,north in degrees; west above east crosses the antimeridian'),
  waterway: z.string().max(2000).optional(),
  gauge_id: z.string().max(2000).optional(),
} as const

/** Query parameters of every answer for a class of vessels. */
export const ADVISORY_FIELDS = {
  vessel_class: Id.describe('id of a vessel class'),
  loading: z.enum(LOADINGS).optional(),
  draught_m: numberParameter(0.05, 30).optional().describe('m; default the draught of the class'),
  direction: enumParameter(DIRECTIONS).optional(),
  water_level_m: numberParameter(-50, 50).optional().describe('above the datum, m; default 0'),
  current_mps: numberParameter(-5, 5).optional().describe('positive downstream, m/s; default 0'),
  sign_unit: enumParameter(SIGN_UNIT_NAMES).optional(),
  sign_step: numberParameter(0.1, 10).optional(),
} as const

export const SegmentParams = z.strictObject({ id: Id })

function boxOf(text: string): BoundingBox {
  const [west = 0, south = 0, east = 0, north = 0] = text.split(',').map(Number)
  const isInRange =
    [west, east].every((x) => Math.abs(x) <= 180) && south >= -90 && north <= 90 && south <= north
  if (isInRange) return [west, south, east, north]
  throw new Fault('invalid-request', '1 field was refused: bbox must be west,south,east,north in degrees', {
    errors: [
      {
        parameter: 'bbox',
        code: 'out-of-range',
        detail:
          'must be west,south,east,north: longitudes within 180, latitudes within 90, south below north',
      },
    ],
  })
}

interface FilterQuery {
  readonly bbox?: string | undefined
  readonly waterway?: string | undefined
  readonly gauge_id?: string | undefined
}

export const toFilter = (query: FilterQuery): SegmentFilter => ({
  ...(query.bbox !== undefined && { bbox: boxOf(query.bbox) }),
  ...(query.waterway !== undefined && { waterway: query.waterway }),
  ...(query.gauge_id !== undefined && { gaugeId: query.gauge_id }),
})

export function recordOf(id: string, { registry }: View): SegmentRecord {
  const record = registry.findSegment(id)
  if (!record) throw segmentNotFound(id, registry)
  return record
}

export type AdvisoryQuery = z.output<z.ZodObject<typeof ADVISORY_FIELDS>>

/** What the query asks, without a segment: the same for every segment of a layer. */
export function askedOf(query: AdvisoryQuery, { registry }: View): Omit<Resolved, 'segment' | 'record'> {
  const { vessel_class, loading, draught_m, direction, water_level_m, current_mps, sign_unit, sign_step } =
    query
  return {
    classRevision: classRevisionOf(vessel_class, registry),
    vessel: toVessel(
      {
        class: vessel_class,
        ...(loading && { loading }),
        ...(draught_m !== undefined && { draught_m }),
      },
      registry,
    ),
    conditions: toConditions(
      {
        ...(water_level_m !== undefined && { water_level_m }),
        ...(current_mps !== undefined && { current_mps }),
        ...(direction && { direction }),
      },
      registry,
    ),
    options: toOptions({
      ...(sign_unit && { sign_unit }),
      ...(sign_step !== undefined && { sign_step }),
    }),
  }
}

/** What the query asks of a segment. */
export function resolveQuery(record: SegmentRecord, query: AdvisoryQuery, view: View): Resolved {
  const asked = askedOf(query, view)
  const options = optionsOn(asked.options, undefined, record.properties, view.registry)
  return { record, segment: segmentOf(record), ...asked, options }
}
