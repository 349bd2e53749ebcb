import { setTimeout as pause } from 'node:timers/promises'
import { expect, inject, onTestFinished, test } from 'vitest'
import { ended, expectResult, jobProcess, testReplica, textsOf, until } from '../support/jobs.ts'
import { emptyDatabase, onDatabase, startPostgres } from '../support/postgres.ts'
import { jobContent, studyOf } from '../support/studies.ts'

/** Six chunks of 2000 cells. */
const STUDY = studyOf(750)
const TEXTS = textsOf(STUDY)
const ALL = [0, 1, 2, 3, 4, 5]
/** One chunk. */
const SMALL = studyOf(3)
const AUTHOR = { time: '2026-03-01T08:00:00.000Z' }

const fresh = (): Promise<string> => emptyDatabase(inject('postgresUrl'))

/** What is left in the queue. */
const queued = (url: string): Promise<readonly Record<string, unknown>[]> =>
  onDatabase(url, `select name, state, data from washlimit_queue.job`)

test('a study comes out as it is computed here, and leaves nothing in the queue', async () => {
  const url = await fresh()
  const { store, jobs, stored, errors } = await testReplica(url, { workers: 2 })
  await jobs.start()
  const job = await store.addJob(jobContent(STUDY), AUTHOR)
  await jobs.submit(job)
  await expectResult(store, job.id, TEXTS)
  expect(stored.toSorted()).toEqual(ALL)
  await until(async () => (await queued(url)).length === 0)
  expect(errors).toEqual([])
})

test('two replicas that start together share a study, and each chunk is computed once', async () => {
  const url = await fresh()
  const [one, other] = [await testReplica(url), await testReplica(url)]
  await Promise.all([one.jobs.start(), other.jobs.start()])
  const job = await one.store.addJob(jobContent(STUDY), AUTHOR)
  await one.jobs.submit(job)
  await expectResult(other.store, job.id, TEXTS)
  expect([...one.stored, ...other.stored].sort()).toEqual(ALL)
  expect(Math.min(one.stored.length, other.stored.length)).toBeGreaterThan(0)
  expect([...one.errors, ...other.errors]).toEqual([])
})

test('the chunks of a replica that is killed with SIGKILL are computed by another', async () => {
  const url = await fresh()
  const { store, jobs, stored } = await testReplica(url)
  const job = await store.addJob(jobContent(STUDY), AUTHOR)
  const killed = jobProcess(url)
  await until(() => killed.stored.length >= 2)
  await killed.kill()
  const before = [...(await store.chunksDone(job.id))]
  expect(before.length).toBeLessThan(6)
  await jobs.start()
  await expectResult(store, job.id, TEXTS)
  // the one that was stored and not yet forgotten by the queue may be computed again: it stays as it is
  expect(before.filter((number) => stored.includes(number)).length).toBeLessThanOrEqual(1)
})

test('what a replica had in hand when it was stopped is taken up at once by another', async () => {
  const url = await fresh()
  const [one, other] = [await testReplica(url), await testReplica(url)]
  const job = await one.store.addJob(jobContent(STUDY), AUTHOR)
  await one.jobs.start()
  await until(() => one.stored.length >= 1)
  await one.close()
  expect((await queued(url)).filter(({ state }) => state !== 'created')).toEqual([])
  const before = [...(await other.store.chunksDone(job.id))]
  await other.jobs.start()
  await expectResult(other.store, job.id, TEXTS)
  expect([...before, ...other.stored].sort()).toEqual(ALL)
  expect([...one.errors, ...other.errors]).toEqual([])
})

test('chunks that got lost on their way are sent again, and those that are sent twice do no harm', async () => {
  const url = await fresh()
  const { store, jobs, stored } = await testReplica(url)
  await jobs.start()
  const job = await store.addJob(jobContent(STUDY), AUTHOR)
  await jobs.submit(job)
  await until(() => stored.length >= 1)
  await onDatabase(url, `delete from washlimit_queue.job where state = 'created'`)
  await jobs.submit(job)
  await expectResult(store, job.id, TEXTS)
  await until(async () => (await queued(url)).length === 0)
})

test('a job that no replica was told of is found', async () => {
  const { store, jobs } = await testReplica(await fresh())
  await jobs.start()
  const job = await store.addJob(jobContent(SMALL), AUTHOR)
  await expectResult(store, job.id, textsOf(SMALL))
})

test('a cancelled job stops and leaves the queue, and the one behind it goes on', async () => {
  const url = await fresh()
  const { store, jobs, stored } = await testReplica(url)
  await jobs.start()
  const job = await store.addJob(jobContent(STUDY), AUTHOR)
  await jobs.submit(job)
  const next = await store.addJob(jobContent(SMALL), AUTHOR)
  await jobs.submit(next)
  await until(() => stored.length >= 1)
  expect((await store.removeJob(job.id, AUTHOR.time)).outcome).toBe('cancelled')
  await expectResult(store, next.id, textsOf(SMALL))
  expect(stored.length).toBeLessThanOrEqual(5)
  expect(await store.findJob(job.id)).toMatchObject({ state: 'cancelled' })
  await until(async () => (await queued(url)).length === 0)
})

test('a job that cannot be computed fails when its chunk was tried three times', async () => {
  const url = await fresh()
  const { store, jobs, errors } = await testReplica(url)
  const broken = { ...SMALL, segments: SMALL.segments.map((segment) => ({ ...segment, options: null })) }
  const job = await store.addJob(jobContent(SMALL, { inputs: { study: broken } }), AUTHOR)
  await jobs.start()
  const problem = {
    code: 'internal',
    detail: 'A part of it could not be computed; the log of the service says why',
  }
  expect(await ended(store, job.id)).toMatchObject({ state: 'failed', problem })
  expect(errors).toHaveLength(3)
  await until(async () => (await queued(url)).length === 0)
})

test('a verification is concluded once, from its cells', async () => {
  const url = await fresh()
  let concluded = 0
  const conclude = (): Promise<{ verdict: string }> => {
    concluded += 1
    return Promise.resolve({ verdict: 'reproduced' })
  }
  const [one, other] = [await testReplica(url, { conclude }), await testReplica(url, { conclude })]
  await Promise.all([one.jobs.start(), other.jobs.start()])
  const job = await one.store.addJob(jobContent(STUDY, { kind: 'verification', planId: 'plan-1' }), AUTHOR)
  await one.jobs.submit(job)
  const done = await ended(other.store, job.id)
  expect(done).toMatchObject({ state: 'succeeded', result: { verdict: 'reproduced' }, chunksDone: 6 })
  expect(concluded).toBe(1)
})

test('a job that was begun with other methods is not mixed with this service', async () => {
  const { store, jobs, stored } = await testReplica(await fresh())
  const job = await store.addJob(jobContent(SMALL, { methodVersion: 'methods-before' }), AUTHOR)
  await jobs.start()
  const { state, problem } = await ended(store, job.id)
  expect([state, problem?.code]).toEqual(['failed', 'internal'])
  expect(stored).toEqual([])
})

test('a study goes on when the database comes back, and nothing ends the process meanwhile', async () => {
  const server = await startPostgres()
  onTestFinished(() => server.remove())
  const replica = await testReplica(server.url)
  const { store, jobs, stored } = replica
  await jobs.start()
  const job = await store.addJob(jobContent(STUDY), AUTHOR)
  await jobs.submit(job)
  await until(() => stored.length >= 1)
  await server.stop()
  await pause(2000)
  await server.start()
  await expectResult(store, job.id, TEXTS)
  expect(stored.length).toBeGreaterThanOrEqual(6)
  await replica.close()
})

test('replicas that make the queue at the same moment all come up', async () => {
  const url = await fresh()
  const replicas = await Promise.all(Array.from({ length: 5 }, () => testReplica(url)))
  await Promise.all(replicas.map(({ jobs }) => jobs.start()))
  const job = await replicas[0]!.store.addJob(jobContent(SMALL), AUTHOR)
  await replicas[4]!.jobs.submit(job)
  await expectResult(replicas[0]!.store, job.id, textsOf(SMALL))
  expect(replicas.flatMap(({ errors }) => errors)).toEqual([])
})

test('jobs that are closed before they have started, or without it, leave nothing behind', async () => {
  const url = await fresh()
  const [early, never] = [await testReplica(url), await testReplica(url)]
  const starting = early.jobs.start()
  await Promise.all([early.close(), never.close()])
  await starting
  await never.jobs.start()
  await until(
    async () =>
      (
        await onDatabase(
          url,
          `select 1 from pg_stat_activity where application_name = 'washlimit-queue'
        and datname = current_database()`,
        )
      ).length === 0,
  )
})
