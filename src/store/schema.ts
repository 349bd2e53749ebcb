import {
  type CompiledQuery,
  DummyDriver,
  Kysely,
  PostgresAdapter,
  PostgresIntrospector,
  PostgresQueryCompiler,
  SqliteAdapter,
  SqliteIntrospector,
  SqliteQueryCompiler,
} from 'kysely'
import type { JobKind, JobState, PlanState } from './job-records.ts'
import type { Action, Role } from './registry.ts'

/** The only row of its table. Every write of the registry starts by raising a number here, which lets one writer in. */
export interface StateTable {
  id: 1
  registry_revision: number
  access_revision: number
}

/** A segment or a class as it is now. */
export interface ItemTable {
  id: string
  revision: number
  /** registry revision of the latest write */
  changed_at: number
  /** 0 or 1: a deleted item stays, so that replicas learn of it and its revisions go on counting */
  deleted: number
  updated: string
  /** JSON; of a deleted item the last content */
  content: string
}

export interface RevisionTable {
  id: string
  revision: number
  registry_revision: number
  action: Action
  time: string
  key: string | null
  /** JSON list of names */
  changed: string
  /** JSON; null where the action is `deleted` */
  content: string | null
}

/** Apart from the calibration, which is held in memory. */
export interface CalibrationRowTable {
  id: string
  /** JSON */
  content: string
}

export interface AccessKeyTable {
  name: string
  role: Role
  /** SHA-256 of the key, hex */
  hash: string
  created: string
  expires: string | null
  revoked: string | null
}

/** Bytes hold JSON, deflated. */
export interface JobTable {
  id: string
  kind: JobKind
  state: JobState
  name: string | null
  plan_id: string | null
  created: string
  started: string | null
  finished: string | null
  key: string | null
  cells_total: number
  cells_done: number
  chunks_total: number
  chunks_done: number
  /** JSON */
  problem: string | null
  registry_revision: number
  method_version: string
  service_version: string
  result: Uint8Array | null
  request: Uint8Array
}

/** What a job is computed from, apart from it: large, and asked for once. */
export interface JobInputTable {
  id: string
  content: Uint8Array
}

export interface JobChunkTable {
  job_id: string
  number: number
  cells: number
  content: Uint8Array
}

export interface PlanTable {
  id: string
  name: string
  state: PlanState
  study_id: string
  created: string
  key: string | null
  request: Uint8Array
  content: Uint8Array
}

/** Rows are added and never changed. */
export interface PublicationTable {
  plan_id: string
  number: string
  publication: Uint8Array
  record: Uint8Array
}

export interface Tables {
  state: StateTable
  segments: ItemTable
  segment_revisions: RevisionTable
  vessel_classes: ItemTable
  vessel_class_revisions: RevisionTable
  /** of revision 1, as they never change */
  calibrations: ItemTable
  calibration_rows: CalibrationRowTable
  access_keys: AccessKeyTable
  jobs: JobTable
  job_inputs: JobInputTable
  job_chunks: JobChunkTable
  limit_plans: PlanTable
  limit_plan_publications: PublicationTable
}

/** Writes queries of either engine; runs none. */
export type Builder = Kysely<Tables>

const DIALECTS = {
  sqlite: { Adapter: SqliteAdapter, Introspector: SqliteIntrospector, Compiler: SqliteQueryCompiler },
  postgres: { Adapter: PostgresAdapter, Introspector: PostgresIntrospector, Compiler: PostgresQueryCompiler },
} as const

export function builderFor(kind: keyof typeof DIALECTS): Builder {
  const { Adapter, Introspector, Compiler } = DIALECTS[kind]
  return new Kysely<Tables>({
    dialect: {
      createAdapter: () => new Adapter(),
      createDriver: () => new DummyDriver(),
      createIntrospector: (db) => new Introspector(db),
      createQueryCompiler: () => new Compiler(),
    },
  })
}

/** Both numbers of the state, in one small query. */
export const stateQuery = (builder: Builder): CompiledQuery<State> =>
  builder.selectFrom('state').select(['registry_revision', 'access_revision']).compile()

export type State = Pick<StateTable, 'registry_revision' | 'access_revision'>
