import { mkdirSync } from 'node:fs'
import { dirname, resolve } from 'node:path'
import { setTimeout as pause } from 'node:timers/promises'
import Database from 'better-sqlite3'
import { type CompiledQuery, Kysely, SqliteDialect } from 'kysely'
import type { Engine, Steps } from './engine.ts'
import { cannotOpen, codeOf, toFault } from './faults.ts'
import { migrate } from './migrations.ts'
import { builderFor, type State, stateQuery } from './schema.ts'

type Handle = Database.Database

/** ms that SQLite waits inside a call for the lock of another process; the event loop stands still meanwhile */
const BUSY_TIMEOUT = 20
/** ms that a call waits for the lock in all, letting others run in between */
const PATIENCE = 15_000
/** ms between two tries */
const PAUSE = 5
/** Longer texts are import batches of a varying number of rows: not worth keeping. */
const MAX_KEPT_TEXT = 1000

/** Opens the file, makes it and its folder where they are missing, and sets what durability rests on. */
export function openDatabase(path: string): Handle {
  if (path === ':memory:') return configured(new Database(path))
  const file = resolve(path)
  try {
    mkdirSync(dirname(file), { recursive: true })
    return configured(new Database(file))
  } catch (error) {
    throw cannotOpen(file, error)
  }
}

function configured(database: Handle): Handle {
  database.pragma(`busy_timeout = ${BUSY_TIMEOUT}`)
  // WAL syncs on every commit only with FULL; NORMAL may lose the last ones when the power fails
  database.pragma('synchronous = FULL')
  database.pragma('foreign_keys = ON')
  return database
}

/** Repeats what meets the lock of another writer. */
async function patiently<T>(attempt: () => T): Promise<T> {
  const end = performance.now() + PATIENCE
  for (;;) {
    try {
      return attempt()
    } catch (error) {
      if (!/^SQLITE_(BUSY|LOCKED)/.test(codeOf(error)) || performance.now() > end) throw toFault(error)
    }
    // not all at the same moment again
    await pause(PAUSE * (0.5 + Math.random()))
  }
}

/** Makes or updates the schema; of several processes one at a time. */
async function prepare(database: Handle): Promise<void> {
  try {
    await patiently(() => database.pragma('journal_mode = WAL'))
    await patiently(() => database.exec('begin immediate'))
    // not destroyed, since that would close the handle
    await migrate(new Kysely<unknown>({ dialect: new SqliteDialect({ database }) }))
    database.exec('commit')
  } catch (error) {
    // the file as it was, and free for others
    if (database.inTransaction) database.exec('rollback')
    database.close()
    throw cannotOpen(database.name, error)
  }
}

/** An engine on an open database, with its schema up to date. */
export async function sqliteEngine(database: Handle): Promise<Engine> {
  await prepare(database)
  const kept = new Map<string, Database.Statement>()
  const statementOf = (text: string): Database.Statement => {
    const known = kept.get(text)
    if (known) return known
    const statement = database.prepare(text)
    if (text.length <= MAX_KEPT_TEXT) kept.set(text, statement)
    return statement
  }
  const run = ({ sql, parameters }: CompiledQuery): readonly unknown[] => {
    const statement = statementOf(sql)
    if (statement.reader) return statement.all(...parameters)
    statement.run(...parameters)
    return []
  }
  const builder = builderFor('sqlite')
  const state = database.prepare(stateQuery(builder).sql)
  return {
    kind: 'sqlite',
    builder,
    state: () => patiently(() => state.get() as State),
    read: (steps) =>
      patiently(() => within(database, 'begin', () => ({ isKept: true, answer: driven(steps(), run) }))),
    write: (steps) => patiently(() => within(database, 'begin immediate', () => driven(steps(), run))),
    close: async () => {
      await Promise.resolve(database.close())
    },
  }
}

function within<T>(database: Handle, begin: string, act: () => { isKept: boolean; answer: T }): T {
  database.exec(begin)
  try {
    const { isKept, answer } = act()
    database.exec(isKept ? 'commit' : 'rollback')
    return answer
  } finally {
    // some errors, such as a full disk, end the transaction by themselves
    if (database.inTransaction) database.exec('rollback')
  }
}

function driven<T>(steps: Steps<T>, run: (query: CompiledQuery) => readonly unknown[]): T {
  let step = steps.next()
  while (step.done !== true) step = steps.next(run(step.value))
  return step.value
}
