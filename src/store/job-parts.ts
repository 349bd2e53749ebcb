import { ask, discard, keep, type Steps, type Verdict } from './engine.ts'
import type { JobChunk, JobHead, JobKind } from './job-records.ts'
import type { Builder, JobTable } from './schema.ts'

/** All but the request. */
export const HEAD_COLUMNS = [
  'id',
  'kind',
  'state',
  'name',
  'plan_id',
  'created',
  'started',
  'finished',
  'key',
  'cells_total',
  'cells_done',
  'chunks_total',
  'chunks_done',
  'problem',
  'registry_revision',
  'method_version',
  'service_version',
  'result',
] as const satisfies readonly (keyof JobTable)[]

export type HeadRow = Omit<JobTable, 'request'>

/** A row as a job, but for what is packed. */
export function headOf(row: Omit<HeadRow, 'result'>): JobHead {
  return {
    id: row.id,
    kind: row.kind,
    state: row.state,
    ...(row.name !== null && { name: row.name }),
    ...(row.plan_id !== null && { planId: row.plan_id }),
    created: row.created,
    ...(row.started !== null && { started: row.started }),
    ...(row.finished !== null && { finished: row.finished }),
    ...(row.key !== null && { key: row.key }),
    cellsTotal: row.cells_total,
    cellsDone: row.cells_done,
    chunksTotal: row.chunks_total,
    chunksDone: row.chunks_done,
    ...(row.problem !== null && { problem: JSON.parse(row.problem) as NonNullable<JobHead['problem']> }),
    registryRevision: row.registry_revision,
    methodVersion: row.method_version,
    serviceVersion: row.service_version,
  }
}

/** Adds a chunk and counts it. The counts come first, which lets one writer in for each job. */
export function* addChunk(
  builder: Builder,
  id: string,
  { number, cells, content }: JobChunk,
): Steps<Verdict<HeadRow | undefined>> {
  const [counted] = yield* ask(
    builder
      .updateTable('jobs')
      .set((column) => ({
        cells_done: column('cells_done', '+', cells),
        chunks_done: column('chunks_done', '+', 1),
      }))
      .where('id', '=', id)
      .where('state', '=', 'running')
      .returning(HEAD_COLUMNS),
  )
  if (counted === undefined) {
    const [ended] = yield* ask(builder.selectFrom('jobs').select(HEAD_COLUMNS).where('id', '=', id))
    return discard(ended)
  }
  const added = yield* ask(
    builder
      .insertInto('job_chunks')
      .values({ job_id: id, number, cells, content })
      .onConflict((conflict) => conflict.doNothing())
      .returning('number'),
  )
  if (added.length > 0) return keep(counted)
  return discard({
    ...counted,
    cells_done: counted.cells_done - cells,
    chunks_done: counted.chunks_done - 1,
  })
}

export function* chunkNumbers(builder: Builder, id: string): Steps<ReadonlySet<number>> {
  const rows = yield* ask(builder.selectFrom('job_chunks').select('number').where('job_id', '=', id))
  return new Set(rows.map(({ number }) => number))
}

export function* chunkOf(builder: Builder, id: string, number: number): Steps<Uint8Array | undefined> {
  const [row] = yield* ask(
    builder.selectFrom('job_chunks').select('content').where('job_id', '=', id).where('number', '=', number),
  )
  return row?.content
}

export function* inputsOf(builder: Builder, id: string): Steps<Uint8Array | undefined> {
  const [row] = yield* ask(builder.selectFrom('job_inputs').select('content').where('id', '=', id))
  return row?.content
}

/** Drops inputs and chunks of a job. */
export function* dropParts(builder: Builder, id: string): Steps<void> {
  yield* ask(builder.deleteFrom('job_chunks').where('job_id', '=', id))
  yield* ask(builder.deleteFrom('job_inputs').where('id', '=', id))
}

/** Keeps others from deleting a job until the transaction ends, by an update that changes nothing; false without one. */
export function* lockJob(builder: Builder, id: string, kind?: JobKind): Steps<boolean> {
  const locking = builder
    .updateTable('jobs')
    .set((column) => ({ state: column.ref('state') }))
    .where('id', '=', id)
    .returning('id')
  const rows = yield* ask(kind === undefined ? locking : locking.where('kind', '=', kind))
  return rows.length > 0
}
