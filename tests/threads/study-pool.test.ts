import { inflateSync } from 'node:zlib'
import type { Worker } from 'node:worker_threads'
import { expect, onTestFinished, test } from 'vitest'
import { cellCount } from '../../src/limits/study.ts'
import { partOf } from '../../src/limits/chunks.ts'
import { evaluateCells } from '../../src/limits/evaluate.ts'
import { StudyPool } from '../../src/threads/study-pool.ts'
import { studyOf } from '../support/studies.ts'

const STUDY = studyOf(4, 16)
const CELLS = cellCount(STUDY)

function testPool(threads: number): StudyPool {
  const pool = new StudyPool(threads)
  onTestFinished(() => pool.close())
  return pool
}

/** Threads that are started from now on, in their order. */
function threadsOfTest(): Worker[] {
  const threads: Worker[] = []
  const note = (worker: Worker): void => void threads.push(worker)
  process.on('worker', note)
  onTestFinished(() => void process.off('worker', note))
  return threads
}

const textOf = (content: Uint8Array): string => inflateSync(content).toString()

test('a thread gives the cells that are computed here, to the last digit', async () => {
  const pool = testPool(2)
  const middle = 37
  const [first, second] = await Promise.all([
    pool.compute(partOf(STUDY, 0, middle)),
    pool.compute(partOf(STUDY, middle, CELLS)),
  ])
  expect([first.cells, second.cells]).toEqual([middle, CELLS - middle])
  expect(textOf(first.content)).toBe(JSON.stringify(evaluateCells(STUDY, 0, middle)))
  expect(textOf(second.content)).toBe(JSON.stringify(evaluateCells(STUDY, middle, CELLS)))
})

test('threads start with the first task, and are not more than asked for', async () => {
  const threads = threadsOfTest()
  const pool = testPool(1)
  expect(threads).toHaveLength(0)
  await Promise.all([1, 2, 3].map((to) => pool.compute(partOf(STUDY, 0, to))))
  expect(threads).toHaveLength(1)
})

test('a task whose thread is lost rejects, and the next gets another thread', async () => {
  const threads = threadsOfTest()
  const pool = testPool(1)
  await pool.compute(partOf(STUDY, 0, 1))
  const lost = pool.compute(partOf(studyOf(60, 200), 0, 960))
  lost.catch(() => undefined)
  await threads[0]!.terminate()
  await expect(lost).rejects.toThrow()
  expect((await pool.compute(partOf(STUDY, 0, 5))).cells).toBe(5)
  expect(threads).toHaveLength(2)
})

test('a part that cannot be evaluated rejects, and the thread goes on', async () => {
  const threads = threadsOfTest()
  const pool = testPool(1)
  const part = partOf(STUDY, 0, 4)
  const broken = { ...part, study: { ...part.study, vessels: [] } }
  await expect(pool.compute(broken)).rejects.toThrow()
  expect((await pool.compute(part)).cells).toBe(4)
  expect(threads).toHaveLength(1)
})

test('closing ends what is being computed, and a closed pool can be closed again', async () => {
  const pool = new StudyPool(1)
  const lost = pool.compute(partOf(studyOf(60, 200), 0, 960))
  lost.catch(() => undefined)
  await pool.close()
  await expect(lost).rejects.toThrow()
  await pool.close()
})
