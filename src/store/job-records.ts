type Json = Readonly<Record<string, unknown>>

export type JobKind = 'study' | 'verification'
export type JobState = 'queued' | 'running' | 'succeeded' | 'failed' | 'cancelled'

/** Work that takes longer than a request: cells in chunks, each stored when it is done. */
export interface JobRecord {
  readonly id: string
  readonly kind: JobKind
  readonly state: JobState
  readonly name?: string
  /** the limit plan that is verified */
  readonly planId?: string
  /** RFC 3339 UTC */
  readonly created: string
  readonly started?: string
  readonly finished?: string
  /** name of the access key it was made with; absent without keys */
  readonly key?: string
  readonly cellsTotal: number
  readonly cellsDone: number
  readonly chunksTotal: number
  readonly chunksDone: number
  /** as received */
  readonly request: Json
  /** why it failed */
  readonly problem?: { readonly code: string; readonly detail: string }
  /** of a verification: what was found, as it goes out */
  readonly result?: Json
  readonly registryRevision: number
  readonly methodVersion: string
  readonly serviceVersion: string
}

/** A job without the request that made it, which may be large. */
export type JobHead = Omit<JobRecord, 'request'>

/** A part of the result of a job. */
export interface JobChunk {
  /** 0 to chunksTotal − 1 */
  readonly number: number
  readonly cells: number
  /** its text, deflated in the form of RFC 1950 where it was computed */
  readonly content: Uint8Array
}

/** What is kept of a new job; the store adds its id and time. */
export interface JobContent {
  readonly kind: JobKind
  readonly name?: string
  readonly planId?: string
  readonly request: Json
  /** everything it is computed from, frozen; plain data */
  readonly inputs: Json
  readonly cellsTotal: number
  readonly chunksTotal: number
  readonly registryRevision: number
  readonly methodVersion: string
  readonly serviceVersion: string
}

/** How a job ends. */
export type JobEnd =
  | { readonly state: 'succeeded'; readonly result?: Json }
  | { readonly state: 'failed'; readonly problem: { readonly code: string; readonly detail: string } }

export type JobRemoved =
  /** it was queued or running, and stops */
  | { readonly outcome: 'cancelled'; readonly job: JobRecord }
  | { readonly outcome: 'deleted' }
  | { readonly outcome: 'missing' }
  /** ids of the limit plans that rest on it */
  | { readonly outcome: 'in-use'; readonly usedBy: readonly string[] }

export type PlanState = 'draft' | 'published' | 'superseded'

/** A limit plan as it is kept. Once published nothing of it changes but its state. */
export interface PlanRecord {
  readonly id: string
  readonly name: string
  readonly state: PlanState
  readonly studyId: string
  readonly created: string
  readonly key?: string
  /** as received */
  readonly request: Json
  /** what was proposed, as it goes out */
  readonly content: Json
  /** absent from a draft */
  readonly publication?: Json
}

export interface PlanContent {
  readonly name: string
  readonly studyId: string
  readonly request: Json
  readonly content: Json
}

/** What publishing adds, with the whole record, which is stored as it is. */
export interface PlanPublication {
  /** unique among plans */
  readonly number: string
  /** id of the plan that it takes the place of */
  readonly supersedes?: string
  readonly publication: Json
  /** RFC 8785 text of the record */
  readonly record: string
}

export type PlanPublished =
  | { readonly outcome: 'published'; readonly plan: PlanRecord }
  /** it was published before; the caller compares */
  | { readonly outcome: 'already-published'; readonly plan: PlanRecord }
  | { readonly outcome: 'number-taken'; readonly by: string }
  | { readonly outcome: 'missing' }
  /** the plan to supersede is not a published one */
  | { readonly outcome: 'cannot-supersede'; readonly state: PlanState | 'missing' }

/** Jobs and limit plans of the database. They are no part of the registry, whose revision they leave alone. */
export interface JobStore {
  addJob(content: JobContent, author: { readonly time: string; readonly key?: string }): Promise<JobRecord>
  findJob(id: string): Promise<JobRecord | undefined>
  /** of a kind after an id, in the order of their ids; n ≤ limit */
  jobs(
    kind: JobKind,
    page: { readonly after?: string; readonly limit: number },
  ): Promise<readonly JobRecord[]>
  /** oldest first: queued and running */
  unfinishedJobs(): Promise<readonly JobHead[]>
  /** latest verification of a plan */
  findVerification(planId: string): Promise<JobRecord | undefined>
  jobInputs(id: string): Promise<Json | undefined>
  /** Queued becomes running; true when the job is to be worked on: it runs. */
  startJob(id: string, time: string): Promise<boolean>
  /** Numbers of the chunks that are stored. */
  chunksDone(id: string): Promise<ReadonlySet<number>>
  /**
   * A chunk that is there already stays as it is. Chunks of jobs that do not run are dropped.
   *
   * @returns the job after it, undefined when it is gone
   */
  putChunk(id: string, chunk: JobChunk): Promise<JobHead | undefined>
  /** Text of a chunk. */
  findChunk(id: string, number: number): Promise<string | undefined>
  /**
   * Only a running job ends; false when another replica was first. Of a job that ends, only a study that succeeded keeps
   * its inputs and chunks.
   */
  endJob(id: string, end: JobEnd, time: string): Promise<boolean>
  /** Cancels what is unfinished, whose inputs and chunks are dropped; deletes what has ended. */
  removeJob(id: string, time: string): Promise<JobRemoved>
  /** @returns undefined when the study is gone */
  addPlan(
    content: PlanContent,
    author: { readonly time: string; readonly key?: string },
  ): Promise<PlanRecord | undefined>
  findPlan(id: string): Promise<PlanRecord | undefined>
  plans(page: { readonly after?: string; readonly limit: number }): Promise<readonly PlanRecord[]>
  publishPlan(id: string, publication: PlanPublication): Promise<PlanPublished>
  /** Canonical text of the record of a published plan, as it is stored. */
  findRecord(id: string): Promise<string | undefined>
  /** Drafts only. */
  deletePlan(id: string): Promise<'deleted' | 'missing' | 'published'>
}
