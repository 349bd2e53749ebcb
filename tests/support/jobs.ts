import { spawn } from 'node:child_process'
import { createInterface } from 'node:readline'
import { setTimeout as pause } from 'node:timers/promises'
import { fileURLToPath } from 'node:url'
import { expect, onTestFinished } from 'vitest'
import { chunksOf } from '../../src/limits/chunks.ts'
import { evaluateCells } from '../../src/limits/evaluate.ts'
import type { Study } from '../../src/limits/study.ts'
import type { JobRecord } from '../../src/store/job-records.ts'
import type { Store } from '../../src/store/registry.ts'
import { replica, type Replica } from './replica.ts'

/** Waits until something holds. */
export async function until(holds: () => boolean | Promise<boolean>, patience = 40_000): Promise<void> {
  const end = performance.now() + patience
  while (!(await holds())) {
    if (performance.now() > end) throw new Error('waited in vain')
    await pause(20)
  }
}

/** A job that has ended. */
export async function ended(store: Store, id: string): Promise<JobRecord> {
  const find = async (): Promise<JobRecord> => {
    const job = await store.findJob(id)
    if (!job) throw new Error(`${id} is gone`)
    return job
  }
  await until(async () => !['queued', 'running'].includes((await find()).state))
  return find()
}

/** Texts of the chunks of a study, computed here. */
export const textsOf = (study: Study): readonly string[] =>
  chunksOf(study).map(([from, to]) => JSON.stringify(evaluateCells(study, from, to)))

/** The job has succeeded, and each of its chunks is stored to the last digit. */
export async function expectResult(store: Store, id: string, texts: readonly string[]): Promise<void> {
  const job = await ended(store, id)
  expect(job).toMatchObject({ state: 'succeeded', chunksDone: texts.length, cellsDone: job.cellsTotal })
  for (const [number, text] of texts.entries()) {
    const kept = await store.findChunk(id, number)
    expect(kept === text, `chunk ${number}`).toBe(true)
  }
}

/** A replica that is closed at the end of the test, when it was not before. */
export async function testReplica(...parameters: Parameters<typeof replica>): Promise<Replica> {
  const made = await replica(...parameters)
  let closing: Promise<void> | undefined
  const close = (): Promise<void> => (closing ??= made.close())
  onTestFinished(close)
  return { ...made, close }
}

/** A process of its own that computes jobs, until it is killed. */
export interface JobProcess {
  /** numbers of chunks that it stored */
  readonly stored: number[]
  /** Ends it with SIGKILL, and waits until it is gone. */
  kill(): Promise<void>
}

const SCRIPT = fileURLToPath(new URL('job-process.ts', import.meta.url))

/** Starts a process that resumes the jobs of a database. */
export function jobProcess(url: string): JobProcess {
  const child = spawn(process.execPath, ['--import', 'tsx', SCRIPT, url])
  const stored: number[] = []
  let failure = ''
  createInterface(child.stdout).on('line', (line) => stored.push(Number(line)))
  child.stderr.on('data', (text: Buffer) => (failure += text.toString()))
  const gone = new Promise<NodeJS.Signals | null>((resolve) => {
    child.on('close', (_code, signal) => {
      resolve(signal)
    })
  })
  const kill = async (): Promise<void> => {
    child.kill('SIGKILL')
    expect(await gone, failure).toBe('SIGKILL')
  }
  onTestFinished(() => void child.kill('SIGKILL'))
  return { stored, kill }
}
