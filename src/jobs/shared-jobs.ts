import { setTimeout as pause } from 'node:timers/promises'
import { Fault } from '../domain/fault.ts'
import type { JobHead } from '../store/job-records.ts'
import type { QueueDatabase } from '../store/queue-database.ts'
import { ChunkQueue, type Message, type QueueTiming } from './chunk-queue.ts'
import type { Jobs } from './jobs.ts'
import { Runner, type RunnerParts, type Task } from './runner.ts'

export interface Timing extends QueueTiming {
  /** ms between two questions for chunks while there are none */
  readonly poll: number
  /** ms between two looks for jobs that nobody works on */
  readonly sweep: number
}

/** A chunk of a replica that was killed is computed by another within a minute. Own choice. */
const TIMING: Timing = { poll: 1000, sweep: 15_000, lostAfter: 20, maintenance: 15 }

export interface SharedJobsParts extends RunnerParts {
  /** on the database of the store; closed with the jobs */
  readonly database: QueueDatabase
  readonly timing?: Partial<Timing>
}

/** Jobs of a database that any number of replicas share. */
export function sharedJobs(parts: SharedJobsParts): Jobs {
  return new SharedJobs(parts)
}

class SharedJobs implements Jobs {
  readonly #parts: SharedJobsParts
  readonly #timing: Timing
  readonly #runner: Runner
  readonly #inFlight = new Set<Promise<void>>()
  readonly #loops: Promise<void>[] = []
  /** chunks that were in hand when the jobs were closed */
  readonly #interrupted: Message[] = []
  readonly #closing = new AbortController()
  #queue: ChunkQueue | undefined
  /** chunks in hand */
  #taken = 0
  #taking: Promise<void> | undefined
  #starting: Promise<void> | undefined

  constructor(parts: SharedJobsParts) {
    this.#parts = parts
    this.#timing = { ...TIMING, ...parts.timing }
    this.#runner = new Runner(parts)
  }

  start(): Promise<void> {
    this.#starting = this.#start()
    return this.#starting
  }

  /** Does not wait for the queue. */
  submit(job: JobHead): Promise<void> {
    const sending = this.#sendNew(job).finally(() => this.#inFlight.delete(sending))
    this.#inFlight.add(sending)
    return Promise.resolve()
  }

  async close(): Promise<void> {
    this.#closing.abort()
    await this.#runner.close()
    // whoever started them hears of it
    await this.#starting?.catch(() => undefined)
    await Promise.all([...this.#loops, this.#taking, ...this.#inFlight])
    try {
      for (const message of this.#interrupted) await this.#putBack(message)
    } catch (error) {
      // they count as lost after a while
      this.#parts.onError(error)
    }
    await this.#queue?.close()
    await this.#parts.database.close()
  }

  async #open(): Promise<void> {
    this.#queue = await ChunkQueue.open(this.#parts.database, this.#timing, this.#parts.onError)
  }

  async #start(): Promise<void> {
    if (this.#isClosed) return
    try {
      await this.#open()
    } catch (error) {
      // the database may come back; a right that is missing does not come by itself
      if (!(error instanceof Fault)) throw error
      this.#report(error)
    }
    const { poll, sweep } = this.#timing
    this.#loops.push(
      this.#repeatedly(poll, () => this.#take()),
      this.#repeatedly(sweep, () => this.#sweep()),
    )
  }

  get #isClosed(): boolean {
    return this.#closing.signal.aborted
  }

  async #repeatedly(interval: number, act: () => Promise<void>): Promise<void> {
    const { signal } = this.#closing
    while (!this.#isClosed) {
      try {
        await act()
      } catch (error) {
        this.#report(error)
      }
      await pause(interval, undefined, { signal, ref: false }).catch(() => undefined)
    }
  }

  async #sendNew(job: JobHead): Promise<void> {
    try {
      await this.#send(job, new Set())
      await this.#take()
    } catch (error) {
      // the job is stored: it is sent by the next sweep
      this.#report(error)
    }
  }

  /** What goes wrong while the threads end is no news. */
  #report(error: unknown): void {
    if (!this.#isClosed) this.#parts.onError(error)
  }

  /** Takes chunks for threads that have none, and one more, so that none waits for the database. */
  async #take(): Promise<void> {
    this.#taking ??= this.#takeOnce().finally(() => {
      this.#taking = undefined
    })
    await this.#taking
  }

  async #takeOnce(): Promise<void> {
    const free = this.#parts.workers + 1 - this.#taken
    const queue = this.#queue
    if (!queue || free <= 0 || this.#isClosed) return
    const messages = await queue.take(free)
    if (this.#closing.signal.aborted) {
      this.#interrupted.push(...messages)
      return
    }
    for (const message of messages) {
      this.#taken += 1
      const running = this.#run(message, queue).finally(() => {
        this.#taken -= 1
        this.#inFlight.delete(running)
        this.#take().catch(this.#parts.onError)
      })
      this.#inFlight.add(running)
    }
  }

  async #run(message: Message, queue: ChunkQueue): Promise<void> {
    try {
      const outcome = await this.#compute(message, queue)
      if (outcome === 'dropped') await queue.forget(message.task)
      else if (outcome !== 'failed') await queue.done(message)
      else await this.#sweep()
    } catch (error) {
      // the message counts as lost after a while; computing it twice does no harm
      if (this.#isClosed) this.#interrupted.push(message)
      else this.#parts.onError(error)
    }
  }

  async #compute(message: Message, queue: ChunkQueue) {
    try {
      return await this.#runner.run(message.task)
    } catch (error) {
      if (this.#isClosed) throw error
      this.#parts.onError(error)
      await queue.failed(message)
      return 'failed'
    }
  }

  async #send(job: JobHead, done: ReadonlySet<number>): Promise<void> {
    const work = await this.#runner.workOf(job.id)
    if (work) await this.#queue?.send(job, work, done)
  }

  async #putBack(message: Message): Promise<void> {
    const work = await this.#runner.workOf(message.task.job)
    if (work) await this.#queue?.putBack(message, work)
  }

  /** Sends chunks that are neither stored nor in the queue, and ends jobs that are all stored or given up. */
  async #sweep(): Promise<void> {
    const { store } = this.#parts
    if (!this.#queue) await this.#open()
    await this.#queue?.takeGivenUp((task) => this.#giveUp(task))
    const jobs = await store.unfinishedJobs()
    if (jobs.length === 0) return
    for (const job of jobs)
      if (job.state === 'running' && job.chunksDone === job.chunksTotal) await this.#runner.finish(job)
    const missing = jobs.reduce((sum, job) => sum + job.chunksTotal - job.chunksDone, 0)
    if (((await this.#queue?.size()) ?? 0) >= missing) return
    for (const job of jobs) await this.#send(job, await store.chunksDone(job.id))
  }

  async #giveUp(task: Task): Promise<void> {
    // a replica that took too long may have stored it all the same
    if ((await this.#parts.store.chunksDone(task.job)).has(task.chunk)) return
    await this.#runner.fail(task.job)
    await this.#queue?.forget(task)
  }
}
