import { Fault } from '../domain/fault.ts'
import { ask, type Steps } from './engine.ts'
import type { Builder } from './schema.ts'
import { CALIBRATIONS, calibrationIdOf, type Document, SEGMENTS } from './shelves.ts'

/** Ids of one question to the database: far below the numbers of parameters that the engines take. */
const BATCH = 500

/**
 * Inside a write: what it brings may only name calibrations that exist.
 *
 * @throws Fault `calibration-not-found`
 */
export function* assertCalibrations(builder: Builder, documents: readonly Document[]): Steps<void> {
  const ids = [...new Set(documents.flatMap(({ calibrationId }) => calibrationId ?? []))]
  for (let start = 0; start < ids.length; start += BATCH) {
    const batch = ids.slice(start, start + BATCH)
    const rows = yield* ask(
      builder.selectFrom(CALIBRATIONS).select('id').where('id', 'in', batch).where('deleted', '=', 0),
    )
    const known = new Set(rows.map(({ id }) => id))
    const unknown = batch.find((id) => !known.has(id))
    if (unknown === undefined) continue
    throw new Fault('calibration-not-found', `There is no calibration ${unknown}`, {
      facts: { calibration_id: unknown },
    })
  }
}

/** Ids, in their order, of the segments that name a calibration. */
export function* segmentsNaming(builder: Builder, calibrationId: string): Steps<readonly string[]> {
  // finds more than it should, such as attributes of the same name and, on SQLite, ids in other letters
  const pattern = `%"calibration_id":"${calibrationId}"%`
  const rows = yield* ask(
    builder
      .selectFrom(SEGMENTS.items)
      .select(['id', 'content'])
      .where('deleted', '=', 0)
      .where('content', 'like', pattern),
  )
  return rows
    .filter(({ content }) => calibrationIdOf(content) === calibrationId)
    .map(({ id }) => id)
    .sort()
}
