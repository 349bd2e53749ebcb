import { fileURLToPath } from 'node:url'
import { Piscina } from 'piscina'
import type { StudyPart } from '../limits/chunks.ts'
import type { ComputedChunk } from './study-thread.ts'

/** ms after which a thread without work ends (own choice) */
const IDLE_TIMEOUT = 30_000
/** Threads yield to the one that answers requests. Only Linux counts niceness by thread; elsewhere it is the process's. */
const NICENESS = process.platform === 'linux' ? 5 : 0

/** Threads that compute parts of studies, started when there is something to compute. */
export class StudyPool {
  readonly #threads: number
  #pool: Piscina<StudyPart, ComputedChunk> | undefined

  /** @param threads  at most at work at once, n ≥ 1 */
  constructor(threads: number) {
    this.#threads = threads
  }

  /** Computes a part on a thread. Rejects when evaluating it fails, and when its thread is lost. */
  compute(part: StudyPart): Promise<ComputedChunk> {
    this.#pool ??= this.#open()
    return this.#pool.run(part)
  }

  /** Ends the threads; what they have in hand rejects. */
  async close(): Promise<void> {
    const pool = this.#pool
    this.#pool = undefined
    await pool?.destroy()
  }

  #open(): Piscina<StudyPart, ComputedChunk> {
    // the file beside this one, as it runs: compiled, or as it is written where a loader reads it
    const isWritten = import.meta.url.endsWith('.ts')
    const pool = new Piscina<StudyPart, ComputedChunk>({
      filename: fileURLToPath(new URL(`./study-thread.${isWritten ? 'ts' : 'js'}`, import.meta.url)),
      name: 'computeChunk',
      execArgv: isWritten ? ['--import', import.meta.resolve('tsx')] : [],
      minThreads: 0,
      maxThreads: this.#threads,
      idleTimeout: IDLE_TIMEOUT,
      niceIncrement: NICENESS,
    })
    // A thread that cannot start leaves its tasks waiting: they reject with the pool, and the next one gets another.
    pool.on('error', () => {
      if (this.#pool === pool) this.#pool = undefined
      void pool.destroy()
    })
    return pool
  }
}
