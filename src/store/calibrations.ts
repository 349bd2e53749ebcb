import { createHash } from 'node:crypto'
import { ask, discard, keep, type Steps, type Verdict } from './engine.ts'
import { idFrom } from './ids.ts'
import type { Author, CalibrationContent, CalibrationDeleted, CalibrationRows } from './registry.ts'
import { segmentsNaming } from './references.ts'
import type { Builder } from './schema.ts'
import { CALIBRATIONS, calibrationText } from './shelves.ts'
import { nextRevision } from './writes.ts'

/** An id that no other calibration has: each write has a number of its own. */
function idOf(content: string, rows: string, time: string, registryRevision: number): string {
  return idFrom(
    'cal',
    createHash('sha256').update(`${registryRevision} ${time}\n${content}\n${rows}`).digest(),
  )
}

export function* addCalibration(
  builder: Builder,
  { rows, points, ...light }: CalibrationContent,
  { time, key }: Author,
): Steps<Verdict<string>> {
  const registryRevision = yield* nextRevision(builder)
  const content = calibrationText(light, key)
  const rowText = JSON.stringify({ rows, points } satisfies CalibrationRows)
  const id = idOf(content, rowText, time, registryRevision)
  yield* ask(
    builder
      .insertInto(CALIBRATIONS)
      .values({ id, revision: 1, changed_at: registryRevision, deleted: 0, updated: time, content }),
  )
  yield* ask(builder.insertInto('calibration_rows').values({ id, content: rowText }))
  return keep(id)
}

/** Deletes one that no segment names. A write by which one would come to name it waits, and is refused after. */
export function* removeCalibration(
  builder: Builder,
  id: string,
  { time }: Author,
): Steps<Verdict<CalibrationDeleted>> {
  const registryRevision = yield* nextRevision(builder)
  const deleted = yield* ask(
    builder
      .updateTable(CALIBRATIONS)
      .set({ deleted: 1, revision: 2, changed_at: registryRevision, updated: time })
      .where('id', '=', id)
      .where('deleted', '=', 0)
      .returning('id'),
  )
  if (deleted.length === 0) return discard({ outcome: 'missing' })
  const usedBy = yield* segmentsNaming(builder, id)
  if (usedBy.length > 0) return discard({ outcome: 'in-use', usedBy })
  yield* ask(builder.deleteFrom('calibration_rows').where('id', '=', id))
  return keep({ outcome: 'deleted', registryRevision })
}

export function* calibrationRowsOf(builder: Builder, id: string): Steps<CalibrationRows | undefined> {
  const [row] = yield* ask(builder.selectFrom('calibration_rows').select('content').where('id', '=', id))
  return row && (JSON.parse(row.content) as CalibrationRows)
}
