import { setTimeout as pause } from 'node:timers/promises'
import { Fault } from '../domain/fault.ts'
import { type CellRange, chunksOf, partOf } from '../limits/chunks.ts'
import type { Study } from '../limits/study.ts'
import type { JobEnd, JobHead, JobStore } from '../store/job-records.ts'
import { StudyPool } from '../threads/study-pool.ts'
import type { Conclude } from './jobs.ts'

/** Jobs whose studies are held; those of a large one take some tens of megabytes. Own choice. */
const HELD = 3
/** ms before what the database refused is tried again, at first and at most */
const FIRST_PAUSE = 500
const LONGEST_PAUSE = 15_000

export interface RunnerParts {
  readonly store: JobStore
  /** threads, n ≥ 1 */
  readonly workers: number
  readonly conclude: Conclude
  /** RFC 3339 UTC */
  readonly now: () => string
  /** of this service: jobs that were begun with others are not mixed with it */
  readonly methodVersion: string
  /** for the log */
  readonly onError: (error: unknown) => void
}

/** A chunk to be computed, and what its job expects of whoever computes it. */
export interface Task {
  readonly job: string
  /** number of the chunk, from 0 */
  readonly chunk: number
  /** n chunks of the job */
  readonly chunks: number
  /** method version of the job */
  readonly methods: string
}

/** What is computed: a study in ranges of cells. */
export interface Work {
  readonly study: Study
  readonly chunks: readonly CellRange[]
}

/** `stored`: the job goes on. `finished`: it was the last chunk. `dropped`: the job has ended or is gone. */
export type Outcome = 'stored' | 'finished' | 'dropped'

const UNAVAILABLE = ['store-unavailable', 'storage-full']
const OTHER_VERSION =
  'It was begun with another version of the service, whose figures would be mixed with those of this one; make it again'
const NOT_COMPUTED = 'A part of it could not be computed; the log of the service says why'

/** Computes chunks of jobs and stores them, and ends the jobs whose chunks are all there. */
export class Runner {
  readonly #parts: RunnerParts
  readonly #pool: StudyPool
  readonly #held = new Map<string, Promise<Work | undefined>>()
  readonly #closing = new AbortController()

  constructor(parts: RunnerParts) {
    this.#parts = parts
    this.#pool = new StudyPool(parts.workers)
  }

  get isClosed(): boolean {
    return this.#closing.signal.aborted
  }

  /** Computes a chunk and stores it. Throws when it cannot be computed, and when the runner is closed. */
  async run({ job: id, chunk: number, chunks, methods }: Task): Promise<Outcome> {
    const { store, now, methodVersion } = this.#parts
    if (!(await this.patiently(() => store.startJob(id, now())))) return 'dropped'
    const work = await this.workOf(id)
    if (!work) return 'dropped'
    const range = work.chunks[number]
    if (methods !== methodVersion || chunks !== work.chunks.length || !range) {
      await this.#end(id, { state: 'failed', problem: { code: 'internal', detail: OTHER_VERSION } })
      return 'dropped'
    }
    if (this.isClosed) throw new Error('The jobs are closed')
    const computed = await this.#pool.compute(partOf(work.study, ...range))
    const job = await this.patiently(() => store.putChunk(id, { number, ...computed }))
    if (job?.state !== 'running') return 'dropped'
    if (job.chunksDone < job.chunksTotal) return 'stored'
    await this.finish(job)
    return 'finished'
  }

  /** Ends a job whose chunks are all there. */
  async finish(job: JobHead): Promise<void> {
    await this.#end(job.id, await this.#endOf(job))
  }

  /** Ends a job of which a chunk cannot be computed. */
  async fail(id: string): Promise<void> {
    await this.#end(id, { state: 'failed', problem: { code: 'internal', detail: NOT_COMPUTED } })
  }

  /** The work of a job, held for the chunks that follow; undefined when it is gone. */
  workOf(id: string): Promise<Work | undefined> {
    const known = this.#held.get(id)
    if (known) return known
    const loading = this.#load(id)
    // what cannot be loaded is asked for again
    loading.catch(() => this.#held.delete(id))
    this.#held.set(id, loading)
    const [oldest] = this.#held.keys()
    if (this.#held.size > HELD && oldest !== undefined) this.#held.delete(oldest)
    return loading
  }

  /** Repeats what the database does not take now, until it does or the runner is closed. */
  async patiently<T>(act: () => Promise<T>): Promise<T> {
    for (let wait = FIRST_PAUSE; ; wait = Math.min(2 * wait, LONGEST_PAUSE)) {
      try {
        return await act()
      } catch (error) {
        if (this.isClosed || !(error instanceof Fault && UNAVAILABLE.includes(error.code))) throw error
      }
      await pause(wait, undefined, { signal: this.#closing.signal })
    }
  }

  /** Ends the threads; what they compute is lost, and rejects. */
  async close(): Promise<void> {
    this.#closing.abort()
    await this.#pool.close()
  }

  async #load(id: string): Promise<Work | undefined> {
    const inputs = await this.patiently(() => this.#parts.store.jobInputs(id))
    if (!inputs) return undefined
    const study = inputs['study'] as Study
    return { study, chunks: chunksOf(study) }
  }

  async #endOf({ id, kind }: JobHead): Promise<JobEnd> {
    if (kind === 'study') return { state: 'succeeded' }
    try {
      const result = await this.patiently(async () => {
        const job = await this.#parts.store.findJob(id)
        return job && this.#parts.conclude(job)
      })
      return { state: 'succeeded', ...(result && { result }) }
    } catch (error) {
      if (this.isClosed) throw error
      this.#parts.onError(error)
      const problem =
        error instanceof Fault
          ? { code: error.code, detail: error.message }
          : { code: 'internal', detail: NOT_COMPUTED }
      return { state: 'failed', problem }
    }
  }

  async #end(id: string, end: JobEnd): Promise<void> {
    const { store, now } = this.#parts
    await this.patiently(() => store.endJob(id, end, now()))
    this.#held.delete(id)
  }
}
