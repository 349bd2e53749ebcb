import { setTimeout as pause } from 'node:timers/promises'
import { type CompiledQuery, Kysely, PostgresDialect } from 'kysely'
import pg from 'pg'
import type { Engine, Steps, Verdict } from './engine.ts'
import { cannotOpen, isConflict, isLost, toFault } from './faults.ts'
import { migrate } from './migrations.ts'
import { builderFor, type State, stateQuery } from './schema.ts'

/** ms after which the database counts as not answering */
const CONNECT_TIMEOUT = 5_000
const STATEMENT_TIMEOUT = 30_000
/** A little more than the server's own, which tells why. */
const QUERY_TIMEOUT = STATEMENT_TIMEOUT + 5_000
/** ms in which a replica that stands still inside a transaction loses it, so that others may write */
const IDLE_TIMEOUT = 60_000
const CONNECTIONS = 10
/** Runs of a transaction that loses against others. */
const ATTEMPTS = 5
/** ms before the second run */
const PAUSE = 10

const READ = 'begin isolation level repeatable read read only'
// READ COMMITTED: the first statement waits for the writer before, and those after it see what that one wrote
const WRITE = 'begin isolation level read committed read write'

/** Connects, and brings the schema up to date; one replica at a time does. */
export async function openPostgres(
  url: string,
  onLostConnection: (error: Error) => void = () => undefined,
): Promise<Engine> {
  const common = { connectionString: url, connectionTimeoutMillis: CONNECT_TIMEOUT, keepAlive: true }
  try {
    await prepare(new pg.Pool({ ...common, max: 1, application_name: 'washlimit-schema' }))
  } catch (error) {
    throw cannotOpen(shown(url), error)
  }
  const pool = new pg.Pool({
    ...common,
    application_name: 'washlimit',
    max: CONNECTIONS,
    statement_timeout: STATEMENT_TIMEOUT,
    query_timeout: QUERY_TIMEOUT,
    idle_in_transaction_session_timeout: IDLE_TIMEOUT,
  })
  listen(pool, onLostConnection)
  return postgresEngine(pool)
}

/** On connections of its own, since waiting for another replica and changing large tables may take longer than a request. */
async function prepare(pool: pg.Pool): Promise<void> {
  listen(pool, () => undefined)
  const db = new Kysely<unknown>({ dialect: new PostgresDialect({ pool }) })
  try {
    await migrate(db)
  } finally {
    await db.destroy()
  }
}

/**
 * An error that nobody listens for ends the process. The pool listens while a connection lies idle and passes on what it
 * hears; between two statements of a transaction nobody would.
 */
function listen(pool: pg.Pool, onLostConnection: (error: Error) => void): void {
  pool.on('error', () => undefined)
  pool.on('connect', (client) => client.on('error', onLostConnection))
}

/** An address without its password. */
function shown(url: string): string {
  const { hostname, port, pathname } = new URL(url)
  return `${hostname}${port === '' ? '' : `:${port}`}${pathname}`
}

function postgresEngine(pool: pg.Pool): Engine {
  const builder = builderFor('postgres')
  const stateText = stateQuery(builder).sql
  return {
    kind: 'postgres',
    builder,
    state: () =>
      mapped(async () => {
        const { client, answer } = await begun(pool, (fresh) => fresh.query<State>(stateText))
        client.release()
        return answer.rows[0] as State
      }),
    read: (steps) =>
      mapped(() =>
        transact(pool, READ, async (run) => ({ isKept: true, answer: await driven(steps(), run) })),
      ),
    write: (steps) => mapped(() => repeatedly(() => transact(pool, WRITE, (run) => driven(steps(), run)))),
    close: () => pool.end(),
  }
}

async function mapped<T>(act: () => Promise<T>): Promise<T> {
  try {
    return await act()
  } catch (error) {
    throw toFault(error)
  }
}

/** Runs again what lost against another transaction. */
export async function repeatedly<T>(act: () => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await act()
    } catch (error) {
      if (!isConflict(error) || attempt === ATTEMPTS) throw error
    }
    await pause(PAUSE * 2 ** attempt * (0.5 + Math.random()))
  }
}

/**
 * A connection on which the first statement succeeded. A pooled one may have died unnoticed, so that statement, which
 * changes nothing, is tried on a second one.
 */
async function begun<T>(
  pool: pg.Pool,
  first: (client: pg.PoolClient) => Promise<T>,
): Promise<{ client: pg.PoolClient; answer: T }> {
  for (let attempt = 1; ; attempt += 1) {
    const client = await pool.connect()
    try {
      return { client, answer: await first(client) }
    } catch (error) {
      client.release(true)
      if (!isLost(error) || attempt === 2) throw error
    }
  }
}

type Run = (query: CompiledQuery) => Promise<readonly unknown[]>

async function transact<T>(pool: pg.Pool, begin: string, act: (run: Run) => Promise<Verdict<T>>): Promise<T> {
  const { client } = await begun(pool, (fresh) => fresh.query(begin))
  let isUsable = false
  try {
    const { isKept, answer } = await act(async ({ sql, parameters }) => {
      const { rows } = await client.query<Record<string, unknown>>(sql, [...parameters])
      return rows
    })
    await client.query(isKept ? 'commit' : 'rollback')
    isUsable = true
    return answer
  } catch (error) {
    if (!isLost(error)) {
      await client.query('rollback')
      isUsable = true
    }
    throw error
  } finally {
    // a connection in an unknown state is closed, which rolls back whatever was open on it
    client.release(!isUsable)
  }
}

async function driven<T>(steps: Steps<T>, run: Run): Promise<T> {
  let step = steps.next()
  while (step.done !== true) step = steps.next(await run(step.value))
  return step.value
}
