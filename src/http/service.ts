import type { FastifyReply } from 'fastify'
import type { Jobs } from '../jobs/jobs.ts'
import type { JobStore } from '../store/job-records.ts'
import type { Registry, Store } from '../store/registry.ts'
import type { Watch } from './metrics.ts'
import type { JudgeThreads } from '../threads/judge-threads.ts'

/** What routes answer from. */
export interface Service {
  readonly store: Store & JobStore
  readonly serviceVersion: string
  /** RFC 3339 UTC */
  readonly now: () => string
  /** ms in which a body that is read as a whole has to arrive */
  readonly bodyTimeout: number
  readonly judges: JudgeThreads
  readonly jobs: Jobs
  /** told of what is computed */
  readonly watch: Watch
}

/** What one request is answered from: the registry does not change under it. */
export interface View {
  readonly registry: Registry
  readonly serviceVersion: string
}

/** The registry as of now, for one request. */
export async function viewOf({ store, serviceVersion }: Service): Promise<View> {
  return { registry: await store.current(), serviceVersion }
}

/** A request that names nothing of the registry need not look at it. */
export const viewWithoutRegistry = ({ serviceVersion }: Service): View => ({
  registry: EMPTY,
  serviceVersion,
})

const EMPTY: Registry = {
  revision: 0,
  findSegment: () => undefined,
  segments: () => [],
  findClass: () => undefined,
  classes: () => [],
  findCalibration: () => undefined,
  calibrations: () => [],
}

/** The view of a request on the registry, whose revision its reply names. */
export async function openView(service: Service, reply: FastifyReply): Promise<View> {
  const view = await viewOf(service)
  void reply.header('registry-revision', String(view.registry.revision))
  return view
}
