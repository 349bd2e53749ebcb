import type { LonLat } from '../domain/position.ts'
import { boundingBox, boxesMeet, lineLength } from '../geo/measure.ts'
import type { Registry, SegmentFilter, SegmentRecord } from './registry.ts'

/** A feature as a GeoJSON file holds it. */
export interface SegmentFeature {
  readonly id: string
  readonly geometry: { readonly coordinates: readonly LonLat[] }
  readonly properties: Readonly<Record<string, unknown>>
}

function toRecord(feature: SegmentFeature, updated: string): SegmentRecord {
  const line = feature.geometry.coordinates
  return {
    id: feature.id,
    revision: 1,
    updated,
    line,
    length: lineLength(line),
    bbox: boundingBox(line),
    properties: feature.properties,
  }
}

function matches(record: SegmentRecord, filter: SegmentFilter): boolean {
  const { waterway, gauge_id: gaugeId } = record.properties
  return (
    (filter.bbox === undefined || boxesMeet(record.bbox, filter.bbox)) &&
    (filter.waterway === undefined || waterway === filter.waterway) &&
    (filter.gaugeId === undefined || gaugeId === filter.gaugeId)
  )
}

/**
 * A registry that holds the features of a file and cannot be written.
 *
 * @param features  n features with unique ids
 * @param updated   when the file was made, RFC 3339 UTC
 */
export function fileRegistry(features: readonly SegmentFeature[], updated: string): Registry {
  const records = features.map((feature) => toRecord(feature, updated)).sort((a, b) => (a.id < b.id ? -1 : 1))
  const byId = new Map(records.map((record) => [record.id, record]))
  return {
    revision: 1,
    findSegment: (id) => byId.get(id),
    findClass: () => undefined,
    classes: () => [],
    segments: (filter = {}) => records.filter((record) => matches(record, filter)),
  }
}
