import { deflateSync, inflateSync } from 'node:zlib'
import Database from 'better-sqlite3'
import { describe, expect, test } from 'vitest'
import type { JobChunk, JobContent } from '../../src/store/job-records.ts'
import { openStore } from '../../src/store/open.ts'
import { onDatabase } from '../support/postgres.ts'
import { at, AUTHOR, ENGINES, segment, temporaryFolder, testStore } from '../support/stores.ts'

const CONTENT: JobContent = {
  kind: 'study',
  name: 'All pounds, spring',
  request: { name: 'All pounds, spring', segments: 'all' },
  inputs: { study: { segments: [{ id: 'a', depth: 0.1 + 0.2 }] }, note: 'ein Übergang \u0000 \ud83d\ude00' },
  cellsTotal: 30,
  chunksTotal: 3,
  registryRevision: 7,
  methodVersion: '2026.1',
  serviceVersion: '1.2.3',
}

const VERIFICATION: JobContent = { ...CONTENT, kind: 'verification', planId: 'plan-0123456789' }

/** A chunk of ten cells. */
const chunk = (number: number, text = `[${number}]`): JobChunk => ({
  number,
  cells: 10,
  content: new Uint8Array(deflateSync(text)),
})

const time = (minute: number): string => at(minute).time

async function rowsOf(url: string, query: string): Promise<readonly unknown[]> {
  if (!url.startsWith('sqlite:')) return onDatabase(url, query)
  const file = new Database(url.slice('sqlite:'.length))
  try {
    return file.prepare(query).all()
  } finally {
    file.close()
  }
}

describe.each(ENGINES)('jobs on $kind', ({ fresh }) => {
  test('one is kept as it was made, and leaves the registry alone', async () => {
    const store = await testStore(await fresh())
    const job = await store.addJob(CONTENT, AUTHOR)
    expect(job.id).toMatch(/^study-[0-9a-z]{10}$/)
    expect(job).toEqual({
      id: job.id,
      kind: 'study',
      state: 'queued',
      name: 'All pounds, spring',
      created: AUTHOR.time,
      key: 'surveyor',
      cellsTotal: 30,
      cellsDone: 0,
      chunksTotal: 3,
      chunksDone: 0,
      request: CONTENT.request,
      registryRevision: 7,
      methodVersion: '2026.1',
      serviceVersion: '1.2.3',
    })
    expect(await store.findJob(job.id)).toEqual(job)
    expect(await store.jobInputs(job.id)).toEqual(CONTENT.inputs)
    expect((await store.current()).revision).toBe(0)
  })

  test('what is not there is not found', async () => {
    const store = await testStore(await fresh())
    expect(await store.findJob('study-0')).toBeUndefined()
    expect(await store.jobInputs('study-0')).toBeUndefined()
    expect(await store.findChunk('study-0', 0)).toBeUndefined()
    expect(await store.chunksDone('study-0')).toEqual(new Set())
    expect(await store.putChunk('study-0', chunk(0))).toBeUndefined()
    expect(await store.startJob('study-0', time(1))).toBe(false)
    expect(await store.endJob('study-0', { state: 'succeeded' }, time(1))).toBe(false)
    expect(await store.removeJob('study-0', time(1))).toEqual({ outcome: 'missing' })
    expect(await store.findVerification('plan-0')).toBeUndefined()
  })

  test('the same content sent again makes another, and no key is named without one', async () => {
    const store = await testStore(await fresh())
    const jobs = [await store.addJob(CONTENT, AUTHOR), await store.addJob(CONTENT, { time: AUTHOR.time })]
    expect(new Set(jobs.map(({ id }) => id)).size).toBe(2)
    expect(jobs[1]).not.toHaveProperty('key')
  })

  test('lists of a kind go by id, page by page, in the order of bytes', async () => {
    const store = await testStore(await fresh())
    const studies: string[] = []
    for (let i = 0; i < 12; i += 1) studies.push((await store.addJob(CONTENT, AUTHOR)).id)
    const verification = await store.addJob(VERIFICATION, AUTHOR)
    studies.sort((a, b) => (a < b ? -1 : 1))
    const first = await store.jobs('study', { limit: 5 })
    expect(first.map(({ id }) => id)).toEqual(studies.slice(0, 5))
    expect(first[0]).toEqual(await store.findJob(studies[0]!))
    const rest = await store.jobs('study', { after: studies[4]!, limit: 50 })
    expect(rest.map(({ id }) => id)).toEqual(studies.slice(5))
    expect((await store.jobs('verification', { limit: 5 })).map(({ id }) => id)).toEqual([verification.id])
  })

  test('it goes from queued to running to succeeded, each once', async () => {
    const store = await testStore(await fresh())
    const { id } = await store.addJob(CONTENT, AUTHOR)
    expect(await store.endJob(id, { state: 'succeeded' }, time(1))).toBe(false)
    expect(await store.startJob(id, time(1))).toBe(true)
    expect(await store.startJob(id, time(2))).toBe(true)
    expect(await store.findJob(id)).toMatchObject({ state: 'running', started: time(1) })
    for (const number of [2, 0, 1]) await store.putChunk(id, chunk(number))
    expect(await store.endJob(id, { state: 'succeeded' }, time(3))).toBe(true)
    const failure = { state: 'failed', problem: { code: 'internal', detail: 'late' } } as const
    expect(await store.endJob(id, failure, time(4))).toBe(false)
    expect(await store.startJob(id, time(5))).toBe(false)
    const job = await store.findJob(id)
    expect(job).toMatchObject({ state: 'succeeded', started: time(1), finished: time(3), cellsDone: 30 })
    expect(job).not.toHaveProperty('problem')
    expect(await store.findChunk(id, 2)).toBe('[2]')
    expect(await store.jobInputs(id)).toEqual(CONTENT.inputs)
  })

  test('a chunk is kept and counted once, whoever sends it again', async () => {
    const url = await fresh()
    const [store, other] = [await testStore(url), await testStore(url)]
    const { id } = await store.addJob(CONTENT, AUTHOR)
    await store.startJob(id, time(1))
    expect(await store.putChunk(id, chunk(1, 'first ☃'))).toMatchObject({ chunksDone: 1, cellsDone: 10 })
    expect(await other.putChunk(id, chunk(1, 'second'))).toMatchObject({ chunksDone: 1, cellsDone: 10 })
    const counts = await Promise.all(
      Array.from({ length: 10 }, (_, i) => (i % 2 === 0 ? store : other).putChunk(id, chunk(0))),
    )
    for (const job of counts) expect(job).toMatchObject({ state: 'running', chunksDone: 2, cellsDone: 20 })
    expect(await store.findJob(id)).toMatchObject({ chunksDone: 2, cellsDone: 20 })
    expect(await store.findChunk(id, 1)).toBe('first ☃')
    expect(await store.chunksDone(id)).toEqual(new Set([0, 1]))
  })

  test('chunks that replicas bring at the same time are all counted', async () => {
    const url = await fresh()
    const stores = [await testStore(url), await testStore(url), await testStore(url)]
    const { id } = await stores[0]!.addJob({ ...CONTENT, cellsTotal: 300, chunksTotal: 30 }, AUTHOR)
    await stores[0]!.startJob(id, time(1))
    const after = await Promise.all(
      Array.from({ length: 30 }, (_, number) => stores[number % 3]!.putChunk(id, chunk(number))),
    )
    const counts = after.map((job) => job?.chunksDone ?? -1).sort((a, b) => a - b)
    expect(counts).toEqual(Array.from({ length: 30 }, (_, i) => i + 1))
    expect(await stores[1]!.findJob(id)).toMatchObject({ chunksDone: 30, cellsDone: 300 })
  })

  test('a job that does not run takes no chunks', async () => {
    const store = await testStore(await fresh())
    const queued = await store.addJob(CONTENT, AUTHOR)
    expect(await store.putChunk(queued.id, chunk(0))).toMatchObject({ state: 'queued', chunksDone: 0 })
    await store.startJob(queued.id, time(1))
    await store.putChunk(queued.id, chunk(0))
    await store.removeJob(queued.id, time(2))
    expect(await store.putChunk(queued.id, chunk(1))).toMatchObject({ state: 'cancelled', chunksDone: 1 })
    expect(await store.chunksDone(queued.id)).toEqual(new Set())
  })

  test('those that are unfinished are listed oldest first', async () => {
    const store = await testStore(await fresh())
    const [late, early, ended, middle] = [
      await store.addJob(CONTENT, at(9)),
      await store.addJob(CONTENT, at(1)),
      await store.addJob(CONTENT, at(2)),
      await store.addJob(VERIFICATION, at(5)),
    ]
    await store.startJob(ended.id, time(3))
    await store.endJob(ended.id, { state: 'succeeded' }, time(4))
    await store.startJob(late.id, time(10))
    const unfinished = await store.unfinishedJobs()
    expect(unfinished.map(({ id }) => id)).toEqual([early.id, middle.id, late.id])
    expect(unfinished[2]).toMatchObject({ state: 'running', chunksTotal: 3, methodVersion: '2026.1' })
  })

  test('a failed one says why, and keeps neither inputs nor chunks', async () => {
    const store = await testStore(await fresh())
    const { id } = await store.addJob(CONTENT, AUTHOR)
    await store.startJob(id, time(1))
    await store.putChunk(id, chunk(0))
    const problem = { code: 'internal', detail: 'A part cannot be computed' }
    expect(await store.endJob(id, { state: 'failed', problem }, time(2))).toBe(true)
    expect(await store.findJob(id)).toMatchObject({
      state: 'failed',
      problem,
      cellsDone: 10,
      finished: time(2),
    })
    expect(await store.findChunk(id, 0)).toBeUndefined()
    expect(await store.jobInputs(id)).toBeUndefined()
  })

  test('a verification keeps what was found, and the latest of its plan is found', async () => {
    const store = await testStore(await fresh())
    const [first, second] = [await store.addJob(VERIFICATION, at(1)), await store.addJob(VERIFICATION, at(2))]
    await store.addJob({ ...VERIFICATION, planId: 'plan-other' }, at(3))
    expect(first.id).toMatch(/^verify-[0-9a-z]{10}$/)
    expect(first.planId).toBe('plan-0123456789')
    for (const { id } of [second, first]) {
      await store.startJob(id, time(4))
      await store.putChunk(id, chunk(0))
      expect(await store.findChunk(id, 0)).toBe('[0]')
      await store.endJob(id, { state: 'succeeded', result: { verdict: 'reproduced', of: id } }, time(5))
    }
    const found = await store.findVerification('plan-0123456789')
    expect(found).toMatchObject({ id: second.id, result: { verdict: 'reproduced', of: second.id } })
    expect(await store.findChunk(first.id, 0)).toBeUndefined()
  })

  test('removing cancels what is unfinished and deletes what has ended', async () => {
    const url = await fresh()
    const store = await testStore(url)
    const [queued, running] = [await store.addJob(CONTENT, AUTHOR), await store.addJob(CONTENT, AUTHOR)]
    await store.startJob(running.id, time(1))
    await store.putChunk(running.id, chunk(0))
    for (const [before, changes] of [
      [queued, {}],
      [running, { started: time(1), cellsDone: 10, chunksDone: 1 }],
    ] as const) {
      const job = { ...before, ...changes, state: 'cancelled', finished: time(2) }
      expect(await store.removeJob(before.id, time(2))).toEqual({ outcome: 'cancelled', job })
      expect(await store.findJob(before.id)).toEqual(job)
      expect(await store.startJob(before.id, time(3))).toBe(false)
      expect(await store.removeJob(before.id, time(4))).toEqual({ outcome: 'deleted' })
      expect(await store.findJob(before.id)).toBeUndefined()
      expect(await store.removeJob(before.id, time(5))).toEqual({ outcome: 'missing' })
    }
    expect(await rowsOf(url, 'select id from job_inputs')).toEqual([])
    expect(await rowsOf(url, 'select job_id from job_chunks')).toEqual([])
  })

  test('they survive reopening, packed', async () => {
    const url = await fresh()
    const first = await openStore(url)
    const text = JSON.stringify(Array.from({ length: 2000 }, (_, i) => ({ segment: i % 50, speed: i / 7 })))
    const job = await first.addJob(CONTENT, AUTHOR)
    await first.startJob(job.id, time(1))
    await first.putChunk(job.id, chunk(0, text))
    await first.close()
    const second = await testStore(url)
    expect(await second.findJob(job.id)).toMatchObject({ id: job.id, state: 'running', chunksDone: 1 })
    expect(await second.findChunk(job.id, 0)).toBe(text)
    const [row] = (await rowsOf(url, 'select content from job_chunks')) as [{ content: Buffer }]
    expect(row.content.length).toBeLessThan(text.length / 2)
    expect(inflateSync(row.content).toString()).toBe(text)
  })
})

test('a database of the version before is brought up to date with what it holds', async () => {
  const path = `${temporaryFolder()}/a.db`
  const before = await openStore(`sqlite:${path}`)
  await before.putSegment(segment('a'), 'none', AUTHOR)
  await before.close()
  const file = new Database(path)
  file.exec(
    `drop table limit_plan_publications; drop table limit_plans; drop table job_chunks; drop table job_inputs;
     drop table jobs; delete from kysely_migration where name = '003-jobs'`,
  )
  file.close()
  const store = await testStore(`sqlite:${path}`)
  const { id } = await store.addJob(CONTENT, AUTHOR)
  expect(await store.findJob(id)).toBeDefined()
  expect((await store.current()).findSegment('a')).toBeDefined()
})
