import type { Study } from '../limits/study.ts'
import type { CalibrationRecord, ClassRecord, Registry, SegmentRecord } from '../store/registry.ts'
import { fromDocument } from './calibration-reply.ts'
import type { CalibrationDocument } from './calibrations.schema.ts'
import { toVesselClass, VesselClassIn } from './own-class.ts'
import type { RecordWire } from './record.ts'
import { StudyRequest } from './studies.schema.ts'
import { inputsFrom, type StudyInputs } from './study-of.ts'
import { parse } from './validation.ts'

type Json = Readonly<Record<string, unknown>>

interface Feature {
  readonly id: string
  readonly geometry: { readonly coordinates: SegmentRecord['line'] }
  readonly bbox: SegmentRecord['bbox']
  readonly properties: Json & {
    readonly revision: number
    readonly updated: string
    readonly length_m: number
  }
}

function segmentFrom({ id, geometry, bbox, properties }: Feature): SegmentRecord {
  const { revision, updated, length_m: length, ...own } = properties
  return { id, revision, updated, line: geometry.coordinates, length, bbox, properties: own }
}

/** A class of the caller's own; those that are built in are the service's. */
function classesFrom(wire: readonly Json[]): ClassRecord[] {
  return wire
    .filter((item) => item['built_in'] !== true)
    .map((item) => {
      const id = String(item['id'])
      const vesselClass = toVesselClass(id, parse(VesselClassIn, item))
      return { id, revision: Number(item['revision']), updated: '', vesselClass }
    })
}

function calibrationFrom({ id, created, ...document }: Json): CalibrationRecord {
  const key = String(id)
  return {
    id: key,
    created: String(created),
    calibration: fromDocument(key, document as unknown as CalibrationDocument),
    document,
  }
}

/** The registry as far as a record shows it. */
function registryFrom(record: RecordWire): Registry {
  const segments = (record.segments as unknown as readonly Feature[]).map(segmentFrom)
  const classes = classesFrom(record.vessel_classes)
  const calibrations = record.calibrations.map(calibrationFrom)
  const byId = new Map(segments.map((segment) => [segment.id, segment]))
  return {
    revision: record.study.registry_revision,
    findSegment: (id) => byId.get(id),
    // those of the study, whatever they were chosen by
    segments: () => segments,
    findClass: (id) => classes.find((item) => item.id === id),
    classes: () => classes,
    findCalibration: (id) => calibrations.find((item) => item.id === id),
    calibrations: () => calibrations,
  }
}

/** The inputs in a form in which those of a record and those made anew can be compared field by field. */
export function comparableInputs({ study, ...shown }: StudyInputs): Json {
  const segments = study.segments.map(({ options, ...segment }) => {
    const { calibration } = options
    // their order says nothing
    const methods = calibration?.methods.toSorted((a, b) => (a.id < b.id ? -1 : 1))
    const sorted = calibration && methods ? { ...options, calibration: { ...calibration, methods } } : options
    return { ...segment, options: sorted }
  })
  const whole = { inputs: { study: { ...study, segments } satisfies Study }, ...shown }
  return JSON.parse(JSON.stringify(whole)) as Json
}

/**
 * The inputs of a record made anew from what it shows of request, segments, classes and calibrations.
 *
 * @throws Fault when these cannot be the request of a study on these segments
 */
export const inputsAnew = (record: RecordWire): StudyInputs =>
  inputsFrom(parse(StudyRequest, record.study.request), registryFrom(record))
