import { boxesMeet } from '../geo/measure.ts'
import { ask, type Engine, type Steps } from './engine.ts'
import type { CalibrationRecord, ClassRecord, Registry, SegmentFilter, SegmentRecord } from './registry.ts'
import { CALIBRATIONS, CLASSES, SEGMENTS, type Shelf, toCalibration, toClass, toSegment } from './shelves.ts'
import { type Builder, stateQuery } from './schema.ts'

interface Identified {
  readonly id: string
}

/**
 * A registry of these records.
 *
 * @param segments      in the order of their ids
 * @param classes       in the order of their ids
 * @param calibrations  in the order of their ids
 */
export function registryOf(
  revision: number,
  segments: readonly SegmentRecord[],
  classes: readonly ClassRecord[],
  calibrations: readonly CalibrationRecord[],
): Registry {
  return Object.freeze({
    revision,
    findSegment: (id: string) => findIn(segments, id),
    findClass: (id: string) => findIn(classes, id),
    classes: () => classes,
    findCalibration: (id: string) => findIn(calibrations, id),
    calibrations: () => calibrations,
    segments: (filter?: SegmentFilter) =>
      filter === undefined || Object.keys(filter).length === 0
        ? segments
        : segments.filter((record) => matches(record, filter)),
  })
}

/** By halving: a map would have to be copied whole at each write. */
function findIn<T extends Identified>(records: readonly T[], id: string): T | undefined {
  let from = 0
  let to = records.length
  while (from < to) {
    const middle = (from + to) >>> 1
    const record = records[middle] as T
    if (record.id === id) return record
    if (record.id < id) from = middle + 1
    else to = middle
  }
  return undefined
}

function matches(record: SegmentRecord, filter: SegmentFilter): boolean {
  const { waterway, gauge_id: gaugeId } = record.properties
  return (
    (filter.bbox === undefined || boxesMeet(record.bbox, filter.bbox)) &&
    (filter.waterway === undefined || waterway === filter.waterway) &&
    (filter.gaugeId === undefined || gaugeId === filter.gaugeId)
  )
}

/** Records in the order in which ids are compared everywhere; the databases' own orders depend on their locale. */
export const inOrder = <T extends Identified>(records: readonly T[]): readonly T[] =>
  Object.freeze([...records].sort((a, b) => (a.id < b.id ? -1 : 1)))

/** The registry as of each call, of which only what changed since the call before is loaded. */
export function snapshotsOf(engine: Engine): () => Promise<Registry> {
  let latest: Registry | undefined
  let refreshing: Promise<Registry> | undefined

  const refresh = async (): Promise<Registry> => {
    try {
      latest = await engine.read(() => load(engine.builder, latest))
      return latest
    } finally {
      refreshing = undefined
    }
  }

  return async () => {
    const before = latest
    const { registry_revision: revision } = await engine.state()
    // Lower than a snapshot that was there before the question: the database was put back to an older state.
    if (before !== undefined && latest === before && revision < before.revision) latest = undefined
    const current = (): Registry | undefined =>
      latest !== undefined && latest.revision >= revision ? latest : undefined
    // A refresh that runs already may have looked before the write that this call has to see.
    if (current() === undefined && refreshing !== undefined) await refreshing.catch(() => undefined)
    return current() ?? (await (refreshing ??= refresh()))
  }
}

function* load(builder: Builder, latest: Registry | undefined): Steps<Registry> {
  const rows = yield* ask<{ registry_revision: number }>({ compile: () => stateQuery(builder) })
  const revision = rows[0]?.registry_revision ?? 0
  const base = latest !== undefined && latest.revision <= revision ? latest : registryOf(-1, [], [], [])
  const segments = yield* changedSince(builder, SEGMENTS.items, base.revision, base.segments(), toSegment)
  const classes = yield* changedSince(builder, CLASSES.items, base.revision, base.classes(), toClass)
  const calibrations = yield* changedSince(
    builder,
    CALIBRATIONS,
    base.revision,
    base.calibrations(),
    toCalibration,
  )
  return registryOf(revision, segments, classes, calibrations)
}

function* changedSince<T extends Identified>(
  builder: Builder,
  items: Shelf['items'],
  since: number,
  records: readonly T[],
  toRecord: (row: { id: string; revision: number; updated: string; content: string }) => T,
): Steps<readonly T[]> {
  const rows = yield* ask(
    builder
      .selectFrom(items)
      .select(['id', 'revision', 'updated', 'deleted', 'content'])
      .where('changed_at', '>', since),
  )
  if (rows.length === 0) return records
  const touched = new Set(rows.map(({ id }) => id))
  const present = rows.filter(({ deleted }) => deleted === 0).map(toRecord)
  return inOrder([...records.filter(({ id }) => !touched.has(id)), ...present])
}
