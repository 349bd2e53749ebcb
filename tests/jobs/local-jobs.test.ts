import type { Worker } from 'node:worker_threads'
import { setTimeout as pause } from 'node:timers/promises'
import { expect, onTestFinished, test } from 'vitest'
import { Fault } from '../../src/domain/fault.ts'
import { ended, expectResult, jobProcess, testReplica, textsOf, until } from '../support/jobs.ts'
import { temporaryFolder } from '../support/stores.ts'
import { jobContent, studyOf } from '../support/studies.ts'

/** Six chunks of 2000 cells. */
const STUDY = studyOf(750)
const TEXTS = textsOf(STUDY)
/** One chunk. */
const SMALL = studyOf(3)
const AUTHOR = { time: '2026-03-01T08:00:00.000Z' }

const fresh = (): string => `sqlite:${temporaryFolder()}/a.db`

test('the study of these tests has several chunks', () => {
  expect(TEXTS).toHaveLength(6)
})

test.each([1, 2])('a study on %i threads comes out as it is computed here', async (workers) => {
  const { store, jobs, stored, errors } = await testReplica(fresh(), { workers })
  await jobs.start()
  const job = await store.addJob(jobContent(STUDY), AUTHOR)
  await jobs.submit(job)
  await expectResult(store, job.id, TEXTS)
  expect(stored.toSorted()).toEqual([0, 1, 2, 3, 4, 5])
  const { started = '', finished = '' } = (await store.findJob(job.id))!
  expect(Date.parse(started)).toBeLessThanOrEqual(Date.parse(finished))
  expect(errors).toEqual([])
})

test('after a stop in the middle only the chunks that are missing are computed', async () => {
  const url = fresh()
  const first = await testReplica(url)
  const job = await first.store.addJob(jobContent(STUDY), AUTHOR)
  await first.jobs.submit(job)
  await until(() => first.stored.length >= 2)
  await first.close()
  const second = await testReplica(url)
  const before = [...(await second.store.chunksDone(job.id))]
  expect(before.length).toBeGreaterThanOrEqual(2)
  expect(before.length).toBeLessThan(6)
  await second.jobs.start()
  await expectResult(second.store, job.id, TEXTS)
  expect([...before, ...second.stored].sort()).toEqual([0, 1, 2, 3, 4, 5])
  expect([...first.errors, ...second.errors]).toEqual([])
})

test('after SIGKILL in the middle another process goes on where it was', async () => {
  const url = fresh()
  const first = await testReplica(url)
  const job = await first.store.addJob(jobContent(STUDY), AUTHOR)
  await first.close()
  const killed = jobProcess(url)
  await until(() => killed.stored.length >= 2)
  await killed.kill()
  const second = await testReplica(url)
  const before = [...(await second.store.chunksDone(job.id))]
  expect(before).toEqual(expect.arrayContaining(killed.stored))
  expect(before.length).toBeLessThan(6)
  await second.jobs.start()
  await expectResult(second.store, job.id, TEXTS)
  expect([...before, ...second.stored].sort()).toEqual([0, 1, 2, 3, 4, 5])
})

test('a process that stopped between the last chunk and the end leaves the end to the next', async () => {
  const { store, jobs } = await testReplica(fresh())
  const job = await store.addJob(jobContent(SMALL, { cellsTotal: 1, chunksTotal: 1 }), AUTHOR)
  await store.startJob(job.id, AUTHOR.time)
  await store.putChunk(job.id, { number: 0, cells: 1, content: new Uint8Array() })
  await jobs.start()
  expect(await ended(store, job.id)).toMatchObject({ state: 'succeeded' })
})

test('unfinished jobs are taken up oldest first', async () => {
  const { store, jobs } = await testReplica(fresh())
  const times = ['2026-03-03T08:00:00.000Z', '2026-03-01T08:00:00.000Z', '2026-03-02T08:00:00.000Z']
  const made = [
    await store.addJob(jobContent(studyOf(130)), { time: times[0]! }),
    await store.addJob(jobContent(studyOf(140)), { time: times[1]! }),
    await store.addJob(jobContent(studyOf(150)), { time: times[2]! }),
  ]
  await jobs.start()
  const finished: string[] = []
  for (const { id } of made) finished.push((await ended(store, id)).finished ?? '')
  expect(finished[1]! < finished[2]!).toBe(true)
  expect(finished[2]! < finished[0]!).toBe(true)
})

test('a job that is sent twice, before and after the start, is computed once', async () => {
  const { store, jobs, stored } = await testReplica(fresh())
  const job = await store.addJob(jobContent(STUDY), AUTHOR)
  await jobs.submit(job)
  await jobs.start()
  await jobs.submit(job)
  await expectResult(store, job.id, TEXTS)
  expect(stored).toHaveLength(6)
})

test('a cancelled job stops, and the one behind it goes on', async () => {
  const { store, jobs, stored } = await testReplica(fresh())
  const job = await store.addJob(jobContent(STUDY), AUTHOR)
  await jobs.submit(job)
  const next = await store.addJob(jobContent(SMALL), AUTHOR)
  await jobs.submit(next)
  await until(() => stored.length >= 1)
  const removed = await store.removeJob(job.id, AUTHOR.time)
  expect(removed.outcome).toBe('cancelled')
  await expectResult(store, next.id, textsOf(SMALL))
  // those that a thread had in hand, and the one that waited for it
  expect(stored.length).toBeLessThanOrEqual(5)
  expect(await store.findJob(job.id)).toMatchObject({ state: 'cancelled' })
  expect(await store.chunksDone(job.id)).toEqual(new Set())
})

test('threads that are killed lose nothing', async () => {
  const threads: Worker[] = []
  const note = (worker: Worker): void => void threads.push(worker)
  process.on('worker', note)
  onTestFinished(() => void process.off('worker', note))
  const { store, jobs, stored, errors } = await testReplica(fresh())
  const job = await store.addJob(jobContent(STUDY), AUTHOR)
  await jobs.submit(job)
  for (const chunks of [1, 3]) {
    await until(() => stored.length >= chunks)
    await pause(30)
    await threads.at(-1)!.terminate()
  }
  await expectResult(store, job.id, TEXTS)
  expect(threads.length).toBeGreaterThan(1)
  expect(errors.length).toBeGreaterThan(0)
})

test('a job that cannot be computed fails after three tries, and the next one is computed', async () => {
  const { store, jobs, errors } = await testReplica(fresh())
  const broken = { ...SMALL, segments: SMALL.segments.map((segment) => ({ ...segment, options: null })) }
  const job = await store.addJob(jobContent(SMALL, { inputs: { study: broken } }), AUTHOR)
  const next = await store.addJob(jobContent(SMALL), AUTHOR)
  await jobs.start()
  expect(await ended(store, job.id)).toMatchObject({
    state: 'failed',
    problem: {
      code: 'internal',
      detail: 'A part of it could not be computed; the log of the service says why',
    },
  })
  expect(errors).toHaveLength(3)
  await expectResult(store, next.id, textsOf(SMALL))
})

test.each([{ methodVersion: 'methods-before' }, { chunksTotal: 2 }])(
  'a job that was begun otherwise is not mixed with this service: %j',
  async (changes) => {
    const { store, jobs, stored } = await testReplica(fresh())
    const job = await store.addJob(jobContent(SMALL, changes), AUTHOR)
    await jobs.start()
    const { state, problem } = await ended(store, job.id)
    expect([state, problem?.code]).toEqual(['failed', 'internal'])
    expect(problem?.detail).toMatch(/^It was begun with another version of the service/)
    expect(stored).toEqual([])
  },
)

test('a verification is concluded from its cells', async () => {
  const { store, jobs } = await testReplica(fresh(), {
    conclude: async ({ id, planId = '' }) => ({ planId, text: await store.findChunk(id, 0) }),
  })
  const content = jobContent(SMALL, { kind: 'verification', planId: 'plan-1' })
  const job = await store.addJob(content, AUTHOR)
  await jobs.submit(job)
  const [text] = textsOf(SMALL)
  expect(await ended(store, job.id)).toMatchObject({ state: 'succeeded', result: { planId: 'plan-1', text } })
})

test.each([
  [
    new Fault('limit-plan-not-found', 'There is no limit plan plan-1'),
    { code: 'limit-plan-not-found', detail: 'There is no limit plan plan-1' },
  ],
  [
    new Error('secret'),
    { code: 'internal', detail: 'A part of it could not be computed; the log of the service says why' },
  ],
])('a verification that cannot be concluded fails: %s', async (error, problem) => {
  const { store, jobs, errors } = await testReplica(fresh(), { conclude: () => Promise.reject(error) })
  const job = await store.addJob(jobContent(SMALL, { kind: 'verification' }), AUTHOR)
  await jobs.submit(job)
  expect(await ended(store, job.id)).toMatchObject({ state: 'failed', problem })
  expect(errors).toEqual([error])
})

test('jobs that are closed before they have started compute nothing any more', async () => {
  const threads: Worker[] = []
  const note = (worker: Worker): void => void threads.push(worker)
  process.on('worker', note)
  onTestFinished(() => void process.off('worker', note))
  const { store, jobs, stored } = await testReplica(fresh())
  await store.addJob(jobContent(STUDY), AUTHOR)
  const starting = jobs.start()
  await jobs.close()
  await starting
  await jobs.start()
  await pause(200)
  expect(stored).toEqual([])
  expect(threads).toEqual([])
})
