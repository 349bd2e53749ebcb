import type { JobRecord } from '../store/job-records.ts'

/** Works on the jobs of the database, in the background, on every core that it may use. */
export interface Jobs {
  /** Resumes what an earlier process left unfinished, and is ready for more. */
  start(): Promise<void>
  /** Takes up a job that was stored. */
  submit(job: JobRecord): Promise<void>
  /** Stops without waiting for what is being computed: it is computed again. */
  close(): Promise<void>
}

/** What is done with a verification whose cells are all computed. @returns its result, as it goes out */
export type Conclude = (job: JobRecord) => Promise<Readonly<Record<string, unknown>>>
