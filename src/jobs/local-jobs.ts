import type { JobHead } from '../store/job-records.ts'
import type { Jobs } from './jobs.ts'
import { Runner, type RunnerParts } from './runner.ts'

/** Times that a chunk is tried before its job fails: a thread may be lost by accident. */
const ATTEMPTS = 3

/** What is still to be handed out of a job. */
interface Backlog {
  readonly job: JobHead
  /** numbers of chunks, the next one last */
  readonly waiting: number[]
  /** by number of the chunk, how often it went wrong */
  readonly failures: Map<number, number>
}

/** Jobs of a database that this process has to itself. */
export function localJobs(parts: RunnerParts): Jobs {
  return new LocalJobs(parts)
}

class LocalJobs implements Jobs {
  readonly #parts: RunnerParts
  readonly #runner: Runner
  /** oldest first */
  readonly #backlogs = new Map<string, Backlog>()
  readonly #inFlight = new Set<Promise<void>>()
  #starting: Promise<void> | undefined

  constructor(parts: RunnerParts) {
    this.#parts = parts
    this.#runner = new Runner(parts)
  }

  start(): Promise<void> {
    this.#starting = this.#start()
    return this.#starting
  }

  submit(job: JobHead): Promise<void> {
    this.#add(job, new Set())
    return Promise.resolve()
  }

  async close(): Promise<void> {
    this.#backlogs.clear()
    await this.#runner.close()
    // whoever started them hears of it
    await this.#starting?.catch(() => undefined)
    await Promise.all(this.#inFlight)
  }

  async #start(): Promise<void> {
    const { store } = this.#parts
    if (this.#runner.isClosed) return
    for (const job of await store.unfinishedJobs()) {
      const done = await store.chunksDone(job.id)
      if (job.state === 'running' && done.size === job.chunksTotal) this.#track(this.#finish(job))
      else this.#add(job, done)
    }
  }

  #track(work: Promise<void>): void {
    const running = work.finally(() => {
      this.#inFlight.delete(running)
      this.#handOut()
    })
    this.#inFlight.add(running)
  }

  async #finish(job: JobHead): Promise<void> {
    try {
      await this.#runner.finish(job)
    } catch (error) {
      if (!this.#runner.isClosed) this.#parts.onError(error)
    }
  }

  #add(job: JobHead, done: ReadonlySet<number>): void {
    if (this.#backlogs.has(job.id) || this.#runner.isClosed) return
    const waiting: number[] = []
    for (let number = job.chunksTotal - 1; number >= 0; number -= 1)
      if (!done.has(number)) waiting.push(number)
    this.#backlogs.set(job.id, { job, waiting, failures: new Map() })
    this.#handOut()
  }

  /** One more than there are threads, so that none waits for the database. */
  #handOut(): void {
    for (const backlog of this.#backlogs.values()) {
      while (this.#inFlight.size <= this.#parts.workers) {
        const number = backlog.waiting.pop()
        if (number === undefined) break
        this.#track(this.#run(backlog, number))
      }
    }
  }

  async #run(backlog: Backlog, number: number): Promise<void> {
    const { id, chunksTotal: chunks, methodVersion: methods } = backlog.job
    try {
      const outcome = await this.#runner.run({ job: id, chunk: number, chunks, methods })
      if (outcome !== 'stored') this.#backlogs.delete(id)
    } catch (error) {
      if (this.#runner.isClosed) return
      this.#parts.onError(error)
      await this.#retry(backlog, number)
    }
  }

  async #retry({ job, waiting, failures }: Backlog, number: number): Promise<void> {
    const failed = (failures.get(number) ?? 0) + 1
    failures.set(number, failed)
    if (failed < ATTEMPTS) {
      waiting.push(number)
      return
    }
    this.#backlogs.delete(job.id)
    try {
      await this.#runner.fail(job.id)
    } catch (error) {
      // it stays unfinished, and is taken up again at the next start
      this.#parts.onError(error)
    }
  }
}
