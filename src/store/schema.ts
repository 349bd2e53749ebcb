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
