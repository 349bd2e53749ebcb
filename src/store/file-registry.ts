import type { LonLat } from '../domain/position.ts'
import { boundingBox, lineLength } from '../geo/measure.ts'
import type { Registry, SegmentRecord } from './registry.ts'
import { inOrder, registryOf } from './snapshot.ts'

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

/**
 * A registry that holds the features of a file and cannot be written.
 *
 * @param features  n features with unique ids
 * @param updated   when the file was made, RFC 3339 UTC
 */
export function fileRegistry(features: readonly SegmentFeature[], updated: string): Registry {
  return registryOf(1, inOrder(features.map((feature) => toRecord(feature, updated))), [], [])
}
