import pg from 'pg'
import { toFault } from './faults.ts'
import { repeatedly } from './postgres.ts'

/** Connections of a replica for its queue, beside those of the store. */
const CONNECTIONS = 3
/** ms after which the database counts as not answering */
const CONNECT_TIMEOUT = 5_000
const STATEMENT_TIMEOUT = 30_000

/** Where a queue runs its statements. */
export interface QueueDatabase {
  /** One text, which may hold several statements when there are no values. */
  executeSql(text: string, values?: unknown[]): Promise<{ rows: unknown[] }>
  close(): Promise<void>
}

/**
 * Connections for a queue in a PostgreSQL database. A connection on which a statement failed is closed: a text of several
 * statements may have left a transaction open on it.
 *
 * @param onLostConnection  told when a connection breaks while no statement runs on it
 */
export function openQueueDatabase(
  url: string,
  onLostConnection: (error: Error) => void = () => undefined,
): QueueDatabase {
  const pool = new pg.Pool({
    connectionString: url,
    application_name: 'washlimit-queue',
    max: CONNECTIONS,
    keepAlive: true,
    connectionTimeoutMillis: CONNECT_TIMEOUT,
    statement_timeout: STATEMENT_TIMEOUT,
    query_timeout: STATEMENT_TIMEOUT + 5_000,
  })
  // an error that nobody listens for ends the process
  pool.on('error', () => undefined)
  pool.on('connect', (client) => client.on('error', onLostConnection))
  return {
    executeSql: async (text, values) => {
      try {
        // replicas that make the queue at the same moment may lock each other out
        return await repeatedly(() => execute(pool, text, values))
      } catch (error) {
        throw toFault(error)
      }
    },
    close: () => pool.end(),
  }
}

async function execute(pool: pg.Pool, text: string, values?: unknown[]): Promise<{ rows: unknown[] }> {
  const client = await pool.connect()
  let isUsable = false
  try {
    const result = await client.query<Record<string, unknown>>(text, values)
    isUsable = true
    return result
  } finally {
    client.release(!isUsable)
  }
}
