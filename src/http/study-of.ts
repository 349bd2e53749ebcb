import { METHOD_VERSION } from '../advisory/catalogue.ts'
import { UNCERTAIN_FIELDS } from '../advisory/uncertainty.ts'
import type { Options } from '../domain/conditions.ts'
import { Fault } from '../domain/fault.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { chunksOf } from '../limits/chunks.ts'
import { cellCount, type Spread, type Study, type StudySegment, type Uncertainty } from '../limits/study.ts'
import type { JobContent } from '../store/job-records.ts'
import type { CalibrationRecord, Registry, SegmentRecord } from '../store/registry.ts'
import { toFeature } from './feature.schema.ts'
import { toOptions } from './options.schema.ts'
import { optionsOn, segmentNotFound, segmentOf } from './request.ts'
import type { View } from './service.ts'
import { DEFAULT_PERCENTILES, DEFAULT_SAMPLES, DEFAULT_SEED, type StudyWire } from './studies.schema.ts'
import { shownOf, toVesselClassReply } from './vessel-classes.ts'
import { toVessel } from './vessel.schema.ts'

const MAX_CELLS = 2_000_000
const MAX_EVALUATIONS = 1e9

/** Log standard deviation of a wave height that was never measured here (common practice, no source). */
const WAVE_HEIGHT_LOG_SD = 0.4

type Json = Readonly<Record<string, unknown>>

/**
 * Everything a study rests on, as it was when it was made: `study` for the machine, the rest for readers of a record.
 * Plain data.
 */
export interface StudyInputs {
  readonly study: Study
  /** registry features of the segments */
  readonly segments: readonly Json[]
  readonly vessel_classes: readonly Json[]
  readonly calibrations: readonly Json[]
}

function recordsOf({ segments }: StudyWire, registry: Registry): readonly SegmentRecord[] {
  if (Array.isArray(segments)) {
    refuseUnknown(segments, registry)
    return [...segments].sort(byText).flatMap((id) => registry.findSegment(id) ?? [])
  }
  const filter = segments === 'all' ? {} : { waterway: segments.waterway }
  const found = registry.segments(filter)
  if (found.length > 0) return found
  const where = filter.waterway === undefined ? 'the registry' : `the waterway ${filter.waterway}`
  throw new Fault('segment-not-found', `There is no segment in ${where}: import some, or name others`, {
    facts: filter.waterway === undefined ? {} : { waterway: filter.waterway },
  })
}

/** @throws Fault `segment-not-found` with every id that names nothing */
function refuseUnknown(ids: readonly string[], registry: Registry): void {
  const unknown = ids.flatMap((id, i) => (registry.findSegment(id) ? [] : [{ id, i }]))
  const [first] = unknown
  if (!first) return
  const { message, parts } = segmentNotFound(first.id, registry)
  const more = unknown.length > 1 ? ` (and ${unknown.length - 1} more)` : ''
  throw new Fault('segment-not-found', `${message}${more}`, {
    ...parts,
    errors: unknown.map(({ id, i }) => ({
      pointer: `#/segments/${i}`,
      code: 'not-in-list' as const,
      detail: `names the segment ${id}, which does not exist`,
    })),
  })
}

const byText = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0)

function toSpread(wire: { sd?: number | undefined; half_range?: number | undefined }): Spread {
  return wire.sd === undefined
    ? { kind: 'half-range', size: wire.half_range ?? 0 }
    : { kind: 'standard-deviation', size: wire.sd }
}

function toUncertainty(wire: NonNullable<StudyWire['uncertainty']>): Uncertainty {
  const spreads: Partial<Record<keyof Uncertainty['spreads'], Spread>> = {}
  for (const field of UNCERTAIN_FIELDS) {
    if (field === 'wave_height') continue
    const given = wire[field]
    if (given) spreads[field] = toSpread(given)
  }
  const percentiles = new Set(wire.percentiles ?? DEFAULT_PERCENTILES)
  return {
    samples: wire.samples ?? DEFAULT_SAMPLES,
    seed: wire.seed ?? DEFAULT_SEED,
    percentiles: [...percentiles].sort((a, b) => a - b),
    spreads,
  }
}

function toStudySegment(
  record: SegmentRecord,
  options: Options,
  uncertainty: StudyWire['uncertainty'],
): StudySegment {
  const { waterway, chainage_from_m: from, chainage_to_m: to } = record.properties
  const chainageFrom = typeof from === 'number' ? from : 0
  return {
    id: record.id,
    ...(typeof waterway === 'string' && { waterway }),
    chainageFrom,
    chainageTo: typeof to === 'number' ? to : chainageFrom + record.length,
    length: record.length,
    segment: segmentOf(record),
    options,
    ...(uncertainty && {
      waveHeightLogSd: uncertainty.wave_height_log_sd ?? options.calibration?.scatter ?? WAVE_HEIGHT_LOG_SD,
    }),
  }
}

function studyOf(wire: StudyWire, records: readonly SegmentRecord[], registry: Registry): Study {
  const given = { ...wire.options, apply_posted_limit: wire.options?.apply_posted_limit ?? false }
  const options = { ...toOptions(given), hasCurve: false }
  const currents = wire.currents_mps ?? [0]
  const hasCurrent = currents.some((current) => current !== 0)
  return {
    segments: records.map((record) =>
      toStudySegment(record, optionsOn(options, given, record.properties, registry), wire.uncertainty),
    ),
    vessels: wire.vessels.map((vessel) => toVessel(vessel, registry)),
    waterLevels: wire.water_levels_m ?? [0],
    currents,
    directions: hasCurrent ? (wire.directions ?? DIRECTIONS) : [null],
    ...(wire.uncertainty && { uncertainty: toUncertainty(wire.uncertainty) }),
  }
}

function assertSize(study: Study): void {
  const cells = cellCount(study)
  if (cells > MAX_CELLS) {
    throw new Fault('too-many-cells', `The study has ${cells} cells; at most ${MAX_CELLS} are computed`, {
      facts: { limit: MAX_CELLS, cells },
    })
  }
  const evaluations = cells * (study.uncertainty?.samples ?? 1)
  if (evaluations > MAX_EVALUATIONS) {
    throw new Fault(
      'too-many-cells',
      `${cells} cells with ${study.uncertainty?.samples ?? 1} samples each make ${evaluations} evaluations; at most ${MAX_EVALUATIONS} are computed: take fewer samples or fewer cells`,
      { facts: { limit: MAX_EVALUATIONS, evaluations } },
    )
  }
}

/** Calibrations that some segment of the study uses. */
function calibrationsOf({ segments }: Study, registry: Registry): readonly CalibrationRecord[] {
  const ids = new Set(segments.flatMap(({ options }) => options.calibration?.id ?? []))
  return registry.calibrations().filter(({ id }) => ids.has(id))
}

/** Everything a study rests on, as it is in the registry. */
export function inputsFrom(wire: StudyWire, registry: Registry): StudyInputs {
  const records = recordsOf(wire, registry)
  const study = studyOf(wire, records, registry)
  const classes = new Set(study.vessels.flatMap(({ classId }) => classId ?? []))
  return {
    study,
    segments: records.map(toFeature),
    vessel_classes: [...classes].sort(byText).map((id) => toVesselClassReply(shownOf(id, { registry }))),
    calibrations: calibrationsOf(study, registry).map(({ id, created, document }) => ({
      id,
      created,
      ...document,
    })),
  }
}

/**
 * A study as a job: everything it rests on is read from the registry once, here.
 *
 * @throws Fault `segment-not-found`, `vessel-class-not-found`, `calibration-not-found`, `too-many-cells`,
 * `impossible-input`
 */
export function studyJob(wire: StudyWire, { registry, serviceVersion }: View): JobContent {
  const inputs = inputsFrom(wire, registry)
  const { study } = inputs
  assertSize(study)
  return {
    kind: 'study',
    name: wire.name,
    request: wire,
    inputs: inputs as unknown as Json,
    cellsTotal: cellCount(study),
    chunksTotal: chunksOf(study).length,
    registryRevision: registry.revision,
    methodVersion: METHOD_VERSION,
    serviceVersion,
  }
}
