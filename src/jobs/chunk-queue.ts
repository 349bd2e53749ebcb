import { createHash } from 'node:crypto'
import PgBoss from 'pg-boss'
import { partOf } from '../limits/chunks.ts'
import type { JobHead } from '../store/job-records.ts'
import type { QueueDatabase } from '../store/queue-database.ts'
import type { Task, Work } from './runner.ts'

/** Schema of the database that is the queue's own. */
const SCHEMA = 'washlimit_queue'
/** Chunks to be computed, and those that were given up. */
const CHUNKS = 'study-chunks'
const GIVEN_UP = 'study-chunks-given-up'
/** Times that a chunk is tried after the first. */
const RETRIES = 2
/** Messages of one statement. */
const BATCH = 1000
/** s in which one decision at one station is made, of one sample: 6 to 8 µs of a core of 2026, 33 µs of one that others share */
const DECISION = 30e-6
/** A chunk that takes so many times what is expected counts as lost. */
const SLOWNESS = 10
/** s, less than a day, beyond which the queue does not count */
const LONGEST = 80_000

export interface QueueTiming {
  /** s that a chunk may take beside computing it, before it counts as lost with its replica */
  readonly lostAfter: number
  /** s between two looks for lost chunks */
  readonly maintenance: number
}

/** A chunk that was taken from the queue. */
export interface Message {
  readonly id: string
  readonly task: Task
}

/** Id of the message of a chunk: the same whoever sends it, so that it is in the queue once. In the order of the chunks. */
function messageId(job: string, chunk: number): string {
  const hash = createHash('sha256').update(job).digest('hex')
  const parts = [hash.slice(0, 8), hash.slice(8, 12), `8${hash.slice(12, 15)}`, `8${hash.slice(15, 18)}`]
  return [...parts, chunk.toString(16).padStart(12, '0')].join('-')
}

/** s after which a chunk that was taken counts as lost. */
function expiryOf({ study, chunks }: Work, chunk: number, lostAfter: number): number {
  const [from, to] = chunks[chunk] ?? [0, 0]
  // of its own segments: another may have hundreds of stations
  const { segments } = partOf(study, from, to).study
  const stations = Math.max(1, ...segments.map(({ segment }) => segment.stations.length))
  const decisions = (to - from) * stations * (1 + (study.uncertainty?.samples ?? 0))
  return Math.min(LONGEST, Math.ceil(lostAfter + SLOWNESS * DECISION * decisions))
}

/** Chunks of jobs on their way to the replicas that compute them, in the database that they share. */
export class ChunkQueue {
  readonly #boss: PgBoss
  readonly #timing: QueueTiming

  private constructor(boss: PgBoss, timing: QueueTiming) {
    this.#boss = boss
    this.#timing = timing
  }

  /** Makes the queue where it is missing. */
  static async open(
    database: QueueDatabase,
    timing: QueueTiming,
    onError: (error: unknown) => void,
  ): Promise<ChunkQueue> {
    const boss = new PgBoss({
      db: database,
      schema: SCHEMA,
      schedule: false,
      maintenanceIntervalSeconds: timing.maintenance,
    })
    // an error that nobody listens for ends the process
    boss.on('error', onError)
    const queue = new ChunkQueue(boss, timing)
    try {
      await boss.start()
      await boss.createQueue(GIVEN_UP)
      await boss.createQueue(CHUNKS, {
        name: CHUNKS,
        retryLimit: RETRIES,
        retryDelay: 1,
        deadLetter: GIVEN_UP,
      })
    } catch (error) {
      await queue.close()
      throw error
    }
    return queue
  }

  /** Sends the chunks of a job that are not done; those that are in the queue stay as they are. */
  async send(
    { id, chunksTotal: chunks, methodVersion: methods }: JobHead,
    work: Work,
    done: ReadonlySet<number>,
  ): Promise<void> {
    const waiting = Array.from({ length: chunks }, (_, chunk) => chunk).filter((chunk) => !done.has(chunk))
    for (let start = 0; start < waiting.length; start += BATCH) {
      await this.#boss.insert(
        waiting.slice(start, start + BATCH).map((chunk) => ({
          id: messageId(id, chunk),
          name: CHUNKS,
          data: { job: id, chunk, chunks, methods } satisfies Task,
          expireInSeconds: expiryOf(work, chunk, this.#timing.lostAfter),
        })),
      )
    }
  }

  /** Takes up to so many chunks, those of the oldest job first; none while the database does not answer. */
  async take(count: number): Promise<readonly Message[]> {
    const found = await this.#boss.fetch<Task>(CHUNKS, { batchSize: count })
    return found.map(({ id, data }) => ({ id, task: data }))
  }

  /** Forgets a chunk that is done. */
  async done({ id }: Message): Promise<void> {
    await this.#boss.deleteJob(CHUNKS, id)
  }

  /** A chunk that went wrong is tried again after a second, or given up. */
  async failed({ id }: Message): Promise<void> {
    await this.#boss.fail(CHUNKS, id)
  }

  /** Puts back a chunk that was not computed, for the next who asks. */
  async putBack({ id, task }: Message, work: Work): Promise<void> {
    await this.#boss.deleteJob(CHUNKS, id)
    const expireInSeconds = expiryOf(work, task.chunk, this.#timing.lostAfter)
    await this.#boss.insert([{ id, name: CHUNKS, data: task, expireInSeconds }])
  }

  /** Forgets every chunk of a job. */
  async forget({ job, chunks }: Task): Promise<void> {
    for (let start = 0; start < chunks; start += BATCH) {
      const count = Math.min(BATCH, chunks - start)
      const ids = Array.from({ length: count }, (_, i) => messageId(job, start + i))
      await this.#boss.deleteJob(CHUNKS, ids)
    }
  }

  /** Chunks that wait or are being computed. */
  size(): Promise<number> {
    return this.#boss.getQueueSize(CHUNKS, { before: 'completed' })
  }

  /** Hands on chunks that were tried for the last time, each once. */
  async takeGivenUp(take: (task: Task) => Promise<void>): Promise<void> {
    const found = await this.#boss.fetch<Task>(GIVEN_UP, { batchSize: BATCH })
    for (const { id, data } of found) {
      await take(data)
      await this.#boss.deleteJob(GIVEN_UP, id)
    }
  }

  async close(): Promise<void> {
    await this.#boss.stop({ graceful: false, close: false })
  }
}
