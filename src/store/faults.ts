import { Fault } from '../domain/fault.ts'
import { SchemaTooNew } from './migrations.ts'

const UNAVAILABLE = 'The database of the registry does not answer'
const FULL = 'The database of the registry has no room left'

/** A fault of the database with what it said as the cause: for the log, never for the caller. */
export function unavailable(cause: unknown, message = UNAVAILABLE): Fault {
  return withCause(new Fault('store-unavailable', message), cause)
}

function withCause(fault: Fault, cause: unknown): Fault {
  fault.cause = cause
  return fault
}

/** Why a database cannot be opened, in words for whoever starts the service. */
export function cannotOpen(what: string, error: unknown): unknown {
  if (error instanceof SchemaTooNew) return error
  const cause = error instanceof Fault ? error.cause : error
  // Node tries every address of a host name, and tells of all of them at once
  const first: unknown = cause instanceof AggregateError ? cause.errors[0] : cause
  const reason = first instanceof Error ? first.message : String(first)
  return unavailable(cause, `The database ${what} cannot be opened: ${reason}`)
}

/** The code that SQLite, PostgreSQL or the operating system gives an error. */
export function codeOf(error: unknown): string {
  const code = error instanceof Error && 'code' in error ? error.code : undefined
  return typeof code === 'string' ? code : ''
}

const FULL_CODES = ['SQLITE_FULL', '53100']
const LOST_SQLITE = /^SQLITE_(BUSY|LOCKED|IOERR|CANTOPEN|READONLY|CORRUPT|NOTADB|NOMEM|PROTOCOL)/
/**
 * Connection exceptions, refused logins, unknown databases, exhausted resources, cancelled or timed out statements,
 * locks not to be had, servers that stop or start or only read.
 */
const LOST_POSTGRES = /^(08...|28...|3D000|53...|57...|58...|55P03|25006|25P0[34])$/
const LOST_SYSTEM = /^(ECONN|EPIPE|ETIMEDOUT|EHOST|ENET|ENOTFOUND|EAI_|EADDR|ENOENT|EACCES)/
// pg gives these no code
const LOST_TEXT =
  /^(Connection terminated|timeout exceeded|Query read timeout|Client has encountered|Connection ended)/

/** Whether the database cannot be used now, though it may be later. */
export function isLost(error: unknown): boolean {
  const code = codeOf(error)
  if (code !== '') return LOST_SQLITE.test(code) || LOST_POSTGRES.test(code) || LOST_SYSTEM.test(code)
  return error instanceof Error && LOST_TEXT.test(error.message)
}

/** What the database threw as a `Fault`; anything that is not its doing as it is. */
export function toFault(error: unknown): unknown {
  if (error instanceof Fault) return error
  if (FULL_CODES.includes(codeOf(error))) return withCause(new Fault('storage-full', FULL), error)
  return isLost(error) ? unavailable(error) : error
}

/** Transactions that lost against another and may be run again: serialisation failure, deadlock. */
export const isConflict = (error: unknown): boolean => ['40001', '40P01'].includes(codeOf(error))
