import { z } from 'zod'
import type { Inputs } from '../advisory/uncertainty.ts'
import { Fault, type FaultItem } from '../domain/fault.ts'
import type { Options } from '../domain/conditions.ts'
import type { Segment } from '../domain/segment.ts'
import { findVesselClass } from '../domain/vessel-classes.ts'
import type { Registry, SegmentRecord } from '../store/registry.ts'
import { Label } from './fields.ts'
import { nearestFirst } from './nearest.ts'
import {
  ConditionsFields,
  OptionsFields,
  toConditions,
  toOptions,
  type OptionsWire,
} from './options.schema.ts'
import { checkGeometry, SegmentFields, type RegistrySegmentWire, type SegmentWire } from './segment.schema.ts'
import { toRegistrySegment } from './to-registry-segment.ts'
import { toSegment } from './to-segment.ts'
import { pointer, refused } from './validation.ts'
import { toVessel, VesselFields } from './vessel.schema.ts'

/** Fields that every request for an advisory has. */
export const ADVISORY_FIELDS = {
  label: Label,
  segment: SegmentFields,
  vessel: VesselFields,
  conditions: ConditionsFields.optional(),
  options: OptionsFields.optional(),
} as const

export const AdvisoryRequest = z
  .strictObject(ADVISORY_FIELDS)
  .meta({ id: 'AdvisoryRequest', description: 'A segment and a vessel, with the conditions of the moment.' })

export type AdvisoryWire = z.output<typeof AdvisoryRequest>

/** What a request rests on, and the registry segment it names. */
export interface Resolved extends Inputs {
  readonly record?: SegmentRecord
  /** of a class of the caller's own */
  readonly classRevision?: number | undefined
}

/** Revision of a class that the registry holds; undefined for built-in classes and described vessels. */
export const classRevisionOf = (id: string | undefined, registry: Registry): number | undefined =>
  id === undefined ? undefined : registry.findClass(id)?.revision

export function segmentNotFound(id: string, registry: Registry): Fault {
  const ids = registry.segments().map((segment) => segment.id)
  const [nearest] = nearestFirst(id, ids)
  const hint = nearest === undefined ? '' : `; the nearest is ${nearest}`
  return new Fault('segment-not-found', `There is no segment ${id}${hint}`, {
    facts: { segment_id: id, ...(nearest !== undefined && { nearest }) },
  })
}

/** A registry segment with the fields of a request in place of its own. */
function overridden(stored: RegistrySegmentWire, wire: SegmentWire): RegistrySegmentWire {
  const { id: _id, label: _label, ...given } = wire
  if (Object.keys(given).length === 0) return stored
  return withOther(given.cross_section ? withoutSections(stored) : stored, given)
}

/** Stations whose own cross-sections make way for one that holds all along. */
function withoutSections(stored: RegistrySegmentWire): RegistrySegmentWire {
  if (!stored.stations) return stored
  return { ...stored, stations: stored.stations.map(({ cross_section: _own, ...station }) => station) }
}

function withOther(
  stored: RegistrySegmentWire,
  given: Omit<SegmentWire, 'id' | 'label'>,
): RegistrySegmentWire {
  // distances are given in one of two ways: what the request has replaces either
  if (given.bank_distance_m !== undefined) {
    const { banks: _banks, ...kept } = stored
    return { ...kept, ...given }
  }
  if (given.banks !== undefined) {
    const { bank_distance_m: _distance, stations: _stations, width_m, ...kept } = stored
    const hasBoth = given.banks.left.distance_m !== undefined && given.banks.right.distance_m !== undefined
    return { ...kept, ...(!hasBoth && width_m !== undefined && { width_m }), ...given }
  }
  return { ...stored, ...given }
}

const segments = new WeakMap<SegmentRecord, Segment>()

/** The segment of a record, made once for each revision. */
export function segmentOf(record: SegmentRecord): Segment {
  const known = segments.get(record)
  if (known) return known
  const { segment } = toRegistrySegment(record.properties, record, record)
  segments.set(record, segment)
  return segment
}

/** What a request replaces may leave the stored segment without its geometry. */
function refuseIncomplete(merged: RegistrySegmentWire): void {
  const errors: FaultItem[] = []
  checkGeometry(merged, (path, code, detail) => {
    errors.push({ pointer: pointer(['segment', ...path]), code, detail })
  })
  if (errors.length > 0) throw refused(errors)
}

export function resolveSegment(
  wire: SegmentWire,
  registry: Registry,
): { segment: Segment; record?: SegmentRecord } {
  if (wire.id === undefined) return { segment: toSegment(wire) }
  const record = registry.findSegment(wire.id)
  if (!record) throw segmentNotFound(wire.id, registry)
  const stored: RegistrySegmentWire = record.properties
  const merged = overridden(stored, wire)
  if (merged === stored) return { segment: segmentOf(record), record }
  refuseIncomplete(merged)
  return { segment: toRegistrySegment(merged, record, record).segment, record }
}

/** Which calibration a call uses, by id: what it names, else that of its segment; null uses none. */
function calibrationIdOf(
  options: OptionsWire | undefined,
  segment: { readonly calibration_id?: unknown },
): string | undefined {
  const id = options?.calibration_id === undefined ? segment.calibration_id : options.calibration_id
  return typeof id === 'string' && options?.wave_factor === undefined ? id : undefined
}

/**
 * Options on a segment: those of the call with the calibration that it uses there.
 *
 * @throws Fault `calibration-not-found`
 */
export function optionsOn(
  options: Options,
  wire: OptionsWire | undefined,
  segment: { readonly calibration_id?: unknown },
  registry: Registry,
): Options {
  const id = calibrationIdOf(wire, segment)
  if (id === undefined) return options
  const found = registry.findCalibration(id)
  if (found) return { ...options, calibration: found.calibration }
  throw new Fault('calibration-not-found', `There is no calibration ${id}`, { facts: { calibration_id: id } })
}

/** Whether a request names a segment or a calibration of the registry, or a class that is not built in. */
export function namesRegistry({ segment, vessel, conditions, options }: AdvisoryWire): boolean {
  const classes = [vessel.class, conditions?.meeting_vessel?.class]
  const calibrations = [segment.calibration_id, options?.calibration_id]
  return (
    segment.id !== undefined ||
    calibrations.some((id) => typeof id === 'string') ||
    classes.some((id) => id !== undefined && !findVesselClass(id))
  )
}

/**
 * What a request rests on.
 *
 * @throws Fault `segment-not-found`, `vessel-class-not-found`, `calibration-not-found`, `impossible-input`
 */
export function resolve(wire: AdvisoryWire, registry: Registry): Resolved {
  const { segment, record } = resolveSegment(wire.segment, registry)
  const own = wire.segment.calibration_id === undefined ? (record?.properties ?? {}) : wire.segment
  return {
    segment,
    ...(record && { record }),
    vessel: toVessel(wire.vessel, registry),
    classRevision: classRevisionOf(wire.vessel.class, registry),
    conditions: toConditions(wire.conditions ?? {}, registry),
    options: optionsOn(toOptions(wire.options), wire.options, own, registry),
  }
}
