import { closeSync, existsSync, fsyncSync, openSync, renameSync, rmSync, statSync } from 'node:fs'
import { dirname, resolve } from 'node:path'
import Database from 'better-sqlite3'
import { Kysely, SqliteDialect } from 'kysely'
import { codeOf } from './faults.ts'
import { migrate } from './migrations.ts'

/** Why a copy was not made, in words for whoever asked for it. */
export class CopyRefused extends Error {
  constructor(message: string) {
    super(message)
    this.name = 'CopyRefused'
  }
}

/** What a file holds, after it was found whole. */
export interface Copied {
  readonly registryRevision: number
  readonly segments: number
  readonly bytes: number
}

/** Pages that are copied at a time: all, since a copy by parts begins anew whenever someone writes in between. */
const ALL = { progress: () => 2 ** 31 - 1 }

/** Looks through a whole file: every page, every reference, and whether it is a registry at all. */
function inspected(file: string): Copied {
  let database: Database.Database | undefined
  try {
    database = new Database(file, { readonly: true, fileMustExist: true })
    const check = database.pragma('integrity_check', { simple: true })
    if (check !== 'ok') throw new CopyRefused(`${file} is damaged: ${String(check)}`)
    const broken = database.pragma('foreign_key_check') as unknown[]
    if (broken.length > 0) throw new CopyRefused(`${file} is damaged: ${broken.length} rows refer to nothing`)
    const registryRevision = database.prepare('select registry_revision from state').pluck().get() as number
    const segments = database
      .prepare('select count(*) from segments where deleted = 0')
      .pluck()
      .get() as number
    return { registryRevision, segments, bytes: statSync(file).size }
  } catch (error) {
    if (error instanceof CopyRefused) throw error
    throw new CopyRefused(`${file} is no registry that can be read: ${(error as Error).message}`)
  } finally {
    database?.close()
  }
}

/** Has what was written to a file, or to the list of a folder, on the disk. */
function sync(path: string): void {
  const descriptor = openSync(path, 'r')
  try {
    fsyncSync(descriptor)
  } finally {
    closeSync(descriptor)
  }
}

/**
 * Copies a registry while it is in use, as of one moment, and inspects the copy before it gets its name.
 *
 * @param from  the file of the registry
 * @param to    a file that must not be there yet
 * @throws CopyRefused
 */
export async function backUp(from: string, to: string): Promise<Copied> {
  if (!existsSync(from)) throw new CopyRefused(`There is no registry at ${resolve(from)}`)
  if (existsSync(to)) throw new CopyRefused(`${to} is there already: name another file`)
  const partial = `${to}.part`
  rmSync(partial, { force: true })
  const source = new Database(from, { readonly: true })
  try {
    await source.backup(partial, ALL)
  } finally {
    source.close()
  }
  // one file by itself, without a log beside it
  const copy = new Database(partial)
  copy.pragma('journal_mode = DELETE')
  copy.close()
  const copied = inspected(partial)
  sync(partial)
  renameSync(partial, to)
  sync(dirname(resolve(to)))
  return copied
}

/** Refuses a file that another process has open: a log that is not folded in cannot be put away while it is. */
function refuseInUse(file: string): void {
  const database = new Database(file)
  try {
    database.pragma('busy_timeout = 500')
    const mode = database.pragma('journal_mode = DELETE', { simple: true })
    if (mode !== 'delete') throw new CopyRefused(`${file} is in use: stop the service first`)
  } catch (error) {
    if (/^SQLITE_(BUSY|LOCKED)/.test(codeOf(error)))
      throw new CopyRefused(`${file} is in use: stop the service first`)
    // what is no database at all holds nothing that could be in use
    if (!/^SQLITE_(NOTADB|CORRUPT)/.test(codeOf(error))) throw error
    rmSync(file)
  } finally {
    database.close()
  }
}

/** Refuses a backup whose schema this version does not know; asked of a copy, which it brings up to date. */
async function refuseNewer(file: string): Promise<void> {
  const database = new Database(file)
  try {
    await migrate(new Kysely<unknown>({ dialect: new SqliteDialect({ database }) }))
  } finally {
    database.close()
  }
}

/**
 * Puts a backup in the place of a registry. What was there is replaced in one transaction, so that a power failure leaves
 * the one or the other.
 *
 * @param isForced  whether a registry that is there may be replaced
 * @throws CopyRefused when the backup is damaged, the registry is in use, or it is there and may not be replaced
 * @throws SchemaTooNew
 */
export async function restore(from: string, to: string, isForced: boolean): Promise<Copied> {
  if (!existsSync(from)) throw new CopyRefused(`There is no file ${from}`)
  const isThere = existsSync(to)
  if (isThere && !isForced) throw new CopyRefused(`${resolve(to)} is there already: --force replaces it`)
  if (isThere && statSync(from).ino === statSync(to).ino) throw new CopyRefused('Both files are the same')
  inspected(from)
  if (isThere) refuseInUse(to)
  const trial = `${to}.part`
  rmSync(trial, { force: true })
  try {
    const source = new Database(from, { readonly: true })
    try {
      await source.backup(trial, ALL)
      await refuseNewer(trial)
      await source.backup(to, ALL)
    } finally {
      source.close()
    }
  } finally {
    for (const end of ['', '-wal', '-shm', '-journal']) rmSync(`${trial}${end}`, { force: true })
  }
  const restored = inspected(to)
  sync(to)
  sync(dirname(resolve(to)))
  return restored
}
