import type { BoundingBox, LonLat } from '../domain/position.ts'

/** A segment as it is kept: its sailing line and its properties as they came, with what the registry adds. */
export interface SegmentRecord {
  readonly id: string
  readonly revision: number
  /** RFC 3339 UTC */
  readonly updated: string
  /** sailing line, drawn downstream, n ≥ 2 */
  readonly line: readonly LonLat[]
  /** geodesic length of the sailing line, m */
  readonly length: number
  readonly bbox: BoundingBox
  /** the segment object, as the schema of registry segments has it */
  readonly properties: Readonly<Record<string, unknown>>
}

export interface SegmentFilter {
  readonly bbox?: BoundingBox
  readonly waterway?: string
  readonly gaugeId?: string
}

/** The segments that the service knows. */
export interface Registry {
  /** rises by one with each write */
  readonly revision: number
  findSegment(id: string): SegmentRecord | undefined
  /** in the order of their ids */
  segments(filter?: SegmentFilter): readonly SegmentRecord[]
}
