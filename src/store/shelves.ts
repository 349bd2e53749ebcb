import type { VesselClass } from '../domain/vessel-classes.ts'
import type {
  CalibrationContent,
  CalibrationRecord,
  ClassRecord,
  SegmentContent,
  SegmentRecord,
} from './registry.ts'

type Fields = Readonly<Record<string, unknown>>

/** Where a kind of thing is kept, and by which fields two contents of it are compared. */
export interface Shelf {
  readonly items: 'segments'
  readonly revisions: 'segment_revisions'
  fieldsOf(content: string): Fields
}

/** A content on its way to its shelf. */
export interface Document {
  readonly id: string
  /** JSON, as it is stored */
  readonly content: string
  /** id of the calibration that it names */
  readonly calibrationId?: string
}

type StoredSegment = Omit<SegmentContent, 'id'>

export const SEGMENTS: Shelf = {
  items: 'segments',
  revisions: 'segment_revisions',
  // length and box follow from the line
  fieldsOf: (content) => {
    const { line, properties } = JSON.parse(content) as StoredSegment
    return { ...properties, geometry: line }
  },
}

export const CLASSES: Shelf = {
  // the tables have the same columns, and one type of query serves both
  items: 'vessel_classes' as 'segments',
  revisions: 'vessel_class_revisions' as 'segment_revisions',
  fieldsOf: (content) => JSON.parse(content) as Fields,
}

/** Calibrations never change, so that they have no revisions; their table is like the others. */
export const CALIBRATIONS = 'calibrations' as 'segments'

export function segmentDocument({ id, line, length, bbox, properties }: SegmentContent): Document {
  const content: StoredSegment = { line, length, bbox, properties }
  const { calibration_id: calibrationId } = properties
  const document = { id, content: JSON.stringify(content) }
  return typeof calibrationId === 'string' ? { ...document, calibrationId } : document
}

export const classDocument = (vesselClass: VesselClass): Document => ({
  id: vesselClass.id,
  content: JSON.stringify(vesselClass),
})

interface Row {
  readonly id: string
  readonly revision: number
  readonly updated: string
  readonly content: string
}

export function toSegment({ id, revision, updated, content }: Row): SegmentRecord {
  return Object.freeze({ id, revision, updated, ...(JSON.parse(content) as StoredSegment) })
}

export function toClass({ id, revision, updated, content }: Row): ClassRecord {
  return Object.freeze({ id, revision, updated, vesselClass: JSON.parse(content) as VesselClass })
}

type StoredCalibration = Omit<CalibrationContent, 'rows' | 'points'> & { readonly key?: string }

/** A calibration without its rows, as it is stored. */
export function calibrationText(
  { calibration, document }: StoredCalibration,
  key: string | undefined,
): string {
  const stored: StoredCalibration = { calibration, document, ...(key !== undefined && { key }) }
  return JSON.stringify(stored)
}

export function toCalibration({ id, updated, content }: Row): CalibrationRecord {
  const { calibration, ...stored } = JSON.parse(content) as StoredCalibration
  return Object.freeze({ id, created: updated, ...stored, calibration: { id, ...calibration } })
}

/** The calibration that a stored segment names. */
export const calibrationIdOf = (content: string): unknown =>
  (JSON.parse(content) as StoredSegment).properties['calibration_id']
