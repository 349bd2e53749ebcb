import { parseArgs } from 'node:util'
import { Fault } from '../domain/fault.ts'
import type { AccessKey, Role, Store } from '../store/registry.ts'
import { hashOf, newKey } from './hash.ts'
import { ROLES } from './role.ts'

export const USAGE = `Usage:
  npm run keys -- add --name NAME --role read|write|publish [--expires DATE]
  npm run keys -- list
  npm run keys -- revoke --name NAME

NAME is 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit.
DATE is a day, which still counts (2027-03-31), or a time in UTC (2027-03-31T12:00:00Z).
DATABASE_URL says which database.
`

/** A command line that cannot be carried out as it stands. */
class UsageError extends Error {}

const NAME = /^[A-Za-z0-9][A-Za-z0-9._-]{0,63}$/
const DAY = /^\d{4}-\d{2}-\d{2}$/
const INSTANT = /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}:\d{2}(\.\d{1,3})?Z$/
const DAY_LENGTH = 86_400_000 // ms

export interface Surroundings {
  readonly openStore: () => Promise<Store>
  readonly now: () => Date
  readonly out: (text: string) => void
  readonly err: (text: string) => void
}

interface Options {
  readonly name?: string | undefined
  readonly role?: string | undefined
  readonly expires?: string | undefined
}

type Act = (store: Store) => Promise<number>

/**
 * Adds, lists or revokes keys.
 *
 * @param args  what follows the name of the command
 * @returns the exit code: 0 done, 1 not done, 2 a command line that cannot be read
 */
export async function runKeys(args: readonly string[], surroundings: Surroundings): Promise<number> {
  let act: Act
  try {
    act = actOf(args, surroundings)
  } catch (error) {
    if (!(error instanceof UsageError)) throw error
    surroundings.err(`${error.message}\n\n${USAGE}`)
    return 2
  }
  try {
    const store = await surroundings.openStore()
    try {
      return await act(store)
    } finally {
      await store.close()
    }
  } catch (error) {
    if (!(error instanceof Fault)) throw error
    surroundings.err(`${error.message}\n`)
    return 1
  }
}

/** What to do, decided before the database is opened. */
function actOf(args: readonly string[], surroundings: Surroundings): Act {
  const { verb, options } = parsed(args)
  switch (verb) {
    case 'add': {
      allow(options, ['name', 'role', 'expires'])
      const key = { name: nameOf(options), role: roleOf(options), ...expiry(options, surroundings.now()) }
      return (store) => add(store, { ...key, created: surroundings.now().toISOString() }, surroundings)
    }
    case 'list':
      allow(options, [])
      return (store) => list(store, surroundings)
    case 'revoke': {
      allow(options, ['name'])
      const name = nameOf(options)
      return (store) => revoke(store, name, surroundings)
    }
    case undefined:
      throw new UsageError('Say what to do.')
    default:
      throw new UsageError(`There is no command ${verb}.`)
  }
}

function parsed(args: readonly string[]): { verb: string | undefined; options: Options } {
  const text = { type: 'string' } as const
  try {
    const { positionals, values } = parseArgs({
      args: [...args],
      allowPositionals: true,
      options: { name: text, role: text, expires: text },
    })
    if (positionals.length > 1) throw new UsageError(`${positionals[1]} is one word too many.`)
    return { verb: positionals[0], options: values }
  } catch (error) {
    if (error instanceof UsageError || !(error instanceof TypeError)) throw error
    // the first sentence says which option; those after it are about the syntax of Node
    throw new UsageError(`${error.message.split('. ')[0] ?? ''}.`)
  }
}

function allow(options: Options, names: readonly string[]): void {
  const other = Object.keys(options).find((name) => !names.includes(name))
  if (other !== undefined) throw new UsageError(`--${other} does not belong to this command.`)
}

function nameOf({ name }: Options): string {
  if (name === undefined) throw new UsageError('--name is missing.')
  if (!NAME.test(name)) throw new UsageError(`--name cannot be "${name}".`)
  return name
}

function roleOf({ role }: Options): Role {
  const found = ROLES.find((known) => known === role)
  if (found === undefined) throw new UsageError(`--role must be one of ${ROLES.join(', ')}.`)
  return found
}

function expiry({ expires }: Options, now: Date): { expires?: string } {
  if (expires === undefined) return {}
  const isDay = DAY.test(expires)
  const start = new Date(isDay || INSTANT.test(expires) ? expires : Number.NaN)
  // Date takes the 30th of February for the 2nd of March
  if (Number.isNaN(start.getTime()) || start.toISOString().slice(0, 10) !== expires.slice(0, 10)) {
    throw new UsageError(`--expires cannot be "${expires}": write 2027-03-31 or 2027-03-31T12:00:00Z.`)
  }
  const end = new Date(start.getTime() + (isDay ? DAY_LENGTH : 0))
  if (end <= now) throw new UsageError(`--expires ${expires} is past already.`)
  return { expires: end.toISOString() }
}

async function add(store: Store, key: AccessKey, { out, err }: Surroundings): Promise<number> {
  const secret = newKey()
  if (!(await store.addKey(key, hashOf(secret)))) {
    err(`There is a key named ${key.name} already; names of revoked keys are not used again.\n`)
    return 1
  }
  const until = key.expires === undefined ? 'until it is revoked' : `before ${key.expires}`
  err(`Key ${key.name} with role ${key.role}, valid ${until}. It is shown this once:\n`)
  out(`${secret}\n`)
  return 0
}

async function list(store: Store, { now, out }: Surroundings): Promise<number> {
  const time = now().getTime()
  const rows = (await store.keys()).map((key) => [
    key.name,
    key.role,
    stateOf(key, time),
    key.created,
    key.expires ?? '-',
    key.revoked ?? '-',
  ])
  const table = [['NAME', 'ROLE', 'STATE', 'CREATED', 'EXPIRES', 'REVOKED'], ...rows]
  const widths = table[0]?.map((_, i) => Math.max(...table.map((row) => row[i]?.length ?? 0))) ?? []
  for (const row of table)
    out(
      `${row
        .map((cell, i) => cell.padEnd(widths[i] ?? 0))
        .join('  ')
        .trimEnd()}\n`,
    )
  return 0
}

function stateOf({ expires, revoked }: AccessKey, time: number): string {
  if (revoked !== undefined) return 'revoked'
  return expires !== undefined && Date.parse(expires) <= time ? 'expired' : 'valid'
}

async function revoke(store: Store, name: string, { now, out, err }: Surroundings): Promise<number> {
  if (await store.revokeKey(name, now().toISOString())) {
    out(`Key ${name} is revoked; every replica refuses it from now on.\n`)
    return 0
  }
  const isKnown = (await store.keys()).some((key) => key.name === name)
  err(isKnown ? `Key ${name} was revoked before.\n` : `There is no key named ${name}.\n`)
  return 1
}
