import { discard, ask, type Engine, keep, type Steps, type Verdict } from './engine.ts'
import { newId } from './ids.ts'
import {
  addChunk,
  chunkNumbers,
  chunkOf,
  dropParts,
  HEAD_COLUMNS,
  type HeadRow,
  headOf,
  inputsOf,
  lockJob,
} from './job-parts.ts'
import type { JobContent, JobEnd, JobHead, JobKind, JobRecord, JobRemoved, JobStore } from './job-records.ts'
import { packJson, unpack, unpackJson } from './packed.ts'
import type { Builder, JobTable } from './schema.ts'

type Json = Readonly<Record<string, unknown>>
type JobAuthor = Parameters<JobStore['addJob']>[1]

const toHead = async ({ result, ...row }: HeadRow): Promise<JobHead> => ({
  ...headOf(row),
  ...(result !== null && { result: (await unpackJson(result)) as Json }),
})

const toRecord = async ({ request, ...row }: JobTable): Promise<JobRecord> => ({
  ...(await toHead(row)),
  request: (await unpackJson(request)) as Json,
})

function* add(builder: Builder, row: JobTable, inputs: Uint8Array): Steps<Verdict<void>> {
  yield* ask(builder.insertInto('jobs').values(row))
  yield* ask(builder.insertInto('job_inputs').values({ id: row.id, content: inputs }))
  return keep(undefined)
}

function* find(builder: Builder, id: string): Steps<JobTable | undefined> {
  const [row] = yield* ask(builder.selectFrom('jobs').selectAll().where('id', '=', id))
  return row
}

function* page(
  builder: Builder,
  kind: JobKind,
  { after = '', limit }: { readonly after?: string; readonly limit: number },
): Steps<readonly JobTable[]> {
  return yield* ask(
    builder
      .selectFrom('jobs')
      .selectAll()
      .where('kind', '=', kind)
      .where('id', '>', after)
      .orderBy('id')
      .limit(limit),
  )
}

function* unfinished(builder: Builder): Steps<readonly HeadRow[]> {
  return yield* ask(
    builder
      .selectFrom('jobs')
      .select(HEAD_COLUMNS)
      .where('state', 'in', ['queued', 'running'])
      .orderBy('created')
      .orderBy('id'),
  )
}

function* latestVerification(builder: Builder, planId: string): Steps<JobTable | undefined> {
  const [row] = yield* ask(
    builder
      .selectFrom('jobs')
      .selectAll()
      .where('plan_id', '=', planId)
      .where('kind', '=', 'verification')
      .orderBy('created', 'desc')
      .orderBy('id', 'desc')
      .limit(1),
  )
  return row
}

function* start(builder: Builder, id: string, time: string): Steps<Verdict<boolean>> {
  const started = yield* ask(
    builder
      .updateTable('jobs')
      .set({ state: 'running', started: time })
      .where('id', '=', id)
      .where('state', '=', 'queued')
      .returning('id'),
  )
  if (started.length > 0) return keep(true)
  const [job] = yield* ask(builder.selectFrom('jobs').select('state').where('id', '=', id))
  return discard(job?.state === 'running')
}

interface Ending {
  readonly end: JobEnd
  readonly result: Uint8Array | null
  readonly time: string
}

function* end(builder: Builder, id: string, { end: how, result, time }: Ending): Steps<Verdict<boolean>> {
  const problem = how.state === 'failed' ? JSON.stringify(how.problem) : null
  const [ended] = yield* ask(
    builder
      .updateTable('jobs')
      .set({ state: how.state, finished: time, problem, result })
      .where('id', '=', id)
      .where('state', '=', 'running')
      .returning('kind'),
  )
  if (ended === undefined) return discard(false)
  if (ended.kind === 'verification' || how.state === 'failed') yield* dropParts(builder, id)
  return keep(true)
}

type Removed =
  Exclude<JobRemoved, { readonly outcome: 'cancelled' }> | { outcome: 'cancelled'; row: JobTable }

/** A plan that comes to rest on the job at the same moment waits for its row, or is waited for. */
function* remove(builder: Builder, id: string, time: string): Steps<Verdict<Removed>> {
  const [row] = yield* ask(
    builder
      .updateTable('jobs')
      .set({ state: 'cancelled', finished: time })
      .where('id', '=', id)
      .where('state', 'in', ['queued', 'running'])
      .returningAll(),
  )
  if (row !== undefined) {
    yield* dropParts(builder, id)
    return keep({ outcome: 'cancelled', row })
  }
  if (!(yield* lockJob(builder, id))) return discard({ outcome: 'missing' })
  const plans = yield* ask(builder.selectFrom('limit_plans').select('id').where('study_id', '=', id))
  const usedBy = plans.map((plan) => plan.id).sort()
  if (usedBy.length > 0) return discard({ outcome: 'in-use', usedBy })
  yield* dropParts(builder, id)
  yield* ask(builder.deleteFrom('jobs').where('id', '=', id))
  return keep({ outcome: 'deleted' })
}

const PREFIXES: Readonly<Record<JobKind, string>> = { study: 'study', verification: 'verify' }

async function rowOf(content: JobContent, { time, key }: JobAuthor): Promise<JobTable> {
  return {
    id: newId(PREFIXES[content.kind]),
    kind: content.kind,
    state: 'queued',
    name: content.name ?? null,
    plan_id: content.planId ?? null,
    created: time,
    started: null,
    finished: null,
    key: key ?? null,
    cells_total: content.cellsTotal,
    cells_done: 0,
    chunks_total: content.chunksTotal,
    chunks_done: 0,
    problem: null,
    registry_revision: content.registryRevision,
    method_version: content.methodVersion,
    service_version: content.serviceVersion,
    result: null,
    request: await packJson(content.request),
  }
}

type OfJobs =
  | 'addJob'
  | 'findJob'
  | 'jobs'
  | 'unfinishedJobs'
  | 'findVerification'
  | 'jobInputs'
  | 'startJob'
  | 'chunksDone'
  | 'putChunk'
  | 'findChunk'
  | 'endJob'
  | 'removeJob'

/** Jobs of a database. What is large is packed before a transaction and unpacked after it. */
export function jobsOf(engine: Engine): Pick<JobStore, OfJobs> {
  const { builder } = engine
  return {
    addJob: async (content, author) => {
      const row = await rowOf(content, author)
      const inputs = await packJson(content.inputs)
      await engine.write(() => add(builder, row, inputs))
      return { ...(await toHead(row)), request: content.request }
    },
    findJob: async (id) => {
      const row = await engine.read(() => find(builder, id))
      return row && toRecord(row)
    },
    jobs: async (kind, bounds) =>
      Promise.all((await engine.read(() => page(builder, kind, bounds))).map(toRecord)),
    unfinishedJobs: async () => Promise.all((await engine.read(() => unfinished(builder))).map(toHead)),
    findVerification: async (planId) => {
      const row = await engine.read(() => latestVerification(builder, planId))
      return row && toRecord(row)
    },
    jobInputs: async (id) => {
      const content = await engine.read(() => inputsOf(builder, id))
      return content && ((await unpackJson(content)) as Json)
    },
    startJob: (id, time) => engine.write(() => start(builder, id, time)),
    chunksDone: (id) => engine.read(() => chunkNumbers(builder, id)),
    putChunk: async (id, chunk) => {
      const row = await engine.write(() => addChunk(builder, id, chunk))
      return row && toHead(row)
    },
    findChunk: async (id, number) => {
      const content = await engine.read(() => chunkOf(builder, id, number))
      return content && unpack(content)
    },
    endJob: async (id, how, time) => {
      const found = how.state === 'succeeded' ? how.result : undefined
      const result = found === undefined ? null : await packJson(found)
      return engine.write(() => end(builder, id, { end: how, result, time }))
    },
    removeJob: async (id, time) => {
      const removed = await engine.write(() => remove(builder, id, time))
      if (removed.outcome !== 'cancelled') return removed
      return { outcome: 'cancelled', job: await toRecord(removed.row) }
    },
  }
}
