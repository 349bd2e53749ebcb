import { z } from 'zod'
import type { SegmentRecord } from '../store/registry.ts'
import { Link } from './list.ts'
import { RegistrySegmentFields } from './segment.schema.ts'

const Position = z.tuple([z.number(), z.number()])

export const SegmentFeature = z
  .object({
    type: z.literal('Feature'),
    id: z.string(),
    geometry: z.object({ type: z.literal('LineString'), coordinates: z.array(Position) }),
    bbox: z.array(z.number()),
    properties: z.looseObject({
      ...RegistrySegmentFields.shape,
      revision: z.int().min(1).max(1e9),
      updated: z.string(),
      length_m: z.number(),
    }),
  })
  .meta({
    id: 'SegmentFeature',
    description: 'A segment: its sailing line, drawn downstream, and the segment object.',
  })

export const SegmentCollection = z
  .object({
    type: z.literal('FeatureCollection'),
    features: z.array(SegmentFeature),
    links: z.array(Link),
    numberReturned: z.int().min(0).max(1e9),
    numberMatched: z.int().min(0).max(1e9),
  })
  .meta({ id: 'SegmentCollection' })

export function toFeature(record: SegmentRecord) {
  return {
    type: 'Feature',
    id: record.id,
    geometry: { type: 'LineString', coordinates: record.line },
    bbox: record.bbox,
    properties: {
      ...record.properties,
      revision: record.revision,
      updated: record.updated,
      length_m: record.length,
    },
  }
}
