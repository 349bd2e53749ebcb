import type { Jobs } from '../../src/jobs/jobs.ts'
import { localJobs } from '../../src/jobs/local-jobs.ts'
import type { RunnerParts } from '../../src/jobs/runner.ts'
import { sharedJobs, type Timing } from '../../src/jobs/shared-jobs.ts'
import { openStore } from '../../src/store/open.ts'
import { openQueueDatabase } from '../../src/store/queue-database.ts'
import type { Store } from '../../src/store/registry.ts'
import { METHODS } from './studies.ts'

/** Times of replicas that do not let a test wait. */
const FAST: Timing = { poll: 100, sweep: 500, lostAfter: 20, maintenance: 1 }

export interface Replica {
  readonly store: Store
  readonly jobs: Jobs
  /** numbers of chunks that were stored here, in their order */
  readonly stored: number[]
  readonly errors: unknown[]
  close(): Promise<void>
}

export interface ReplicaOptions extends Partial<RunnerParts> {
  readonly onStored?: (number: number) => void
  /** s after which a chunk of a replica that was killed is computed by another */
  readonly lostAfter?: number
}

/** Store and jobs on a database, as a process has them; not started. */
export async function replica(
  url: string,
  { onStored, lostAfter = FAST.lostAfter, ...changes }: ReplicaOptions = {},
): Promise<Replica> {
  const store = await openStore(url)
  const stored: number[] = []
  const errors: unknown[] = []
  const parts: RunnerParts = {
    store: {
      ...store,
      putChunk: async (id, chunk) => {
        const job = await store.putChunk(id, chunk)
        stored.push(chunk.number)
        onStored?.(chunk.number)
        return job
      },
    },
    workers: 1,
    conclude: () => Promise.reject(new Error('nothing to conclude')),
    now: () => new Date().toISOString(),
    methodVersion: METHODS,
    onError: (error) => errors.push(error),
    ...changes,
  }
  const jobs = url.startsWith('sqlite:')
    ? localJobs(parts)
    : sharedJobs({ ...parts, database: openQueueDatabase(url), timing: { ...FAST, lostAfter } })
  return {
    store,
    jobs,
    stored,
    errors,
    close: async () => {
      await jobs.close()
      await store.close()
    },
  }
}
