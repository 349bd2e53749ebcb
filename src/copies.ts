import { existsSync } from 'node:fs'
import { parseArgs } from 'node:util'
import { ConfigError, readConfig } from './config.ts'
import { backUp, type Copied, CopyRefused, restore } from './store/backup.ts'
import { SchemaTooNew } from './store/migrations.ts'

const USAGE = `Usage:
  npm run backup -- FILE            copies the registry, also while the service runs
  npm run restore -- FILE [--force] puts a backup in its place, while the service is stopped

DATABASE_URL says which registry.
`

const POSTGRES = `The registry is in PostgreSQL, whose own programs copy it, also while the service runs:
  pg_dump --format=custom --file=FILE "$DATABASE_URL"
  pg_restore --clean --if-exists --single-transaction --dbname="$DATABASE_URL" FILE
`

class UsageError extends Error {}

interface Order {
  readonly verb: 'backup' | 'restore'
  readonly file: string
  readonly isForced: boolean
}

function orderOf(args: readonly string[]): Order {
  try {
    const { positionals, values } = parseArgs({
      args: [...args],
      allowPositionals: true,
      options: { force: { type: 'boolean' } },
    })
    const [verb, file, ...rest] = positionals
    const isForced = values.force === true
    if ((verb === 'backup' && !isForced) || verb === 'restore') {
      if (file !== undefined && rest.length === 0) return { verb, file, isForced }
    }
  } catch (error) {
    if (!(error instanceof TypeError)) throw error
  }
  throw new UsageError(USAGE)
}

async function run({ verb, file, isForced }: Order): Promise<string> {
  const { databaseUrl } = readConfig(process.env)
  const [, registry] = /^sqlite:(?:\/\/)?(.+)$/.exec(databaseUrl) ?? []
  if (registry === undefined) throw new UsageError(POSTGRES)
  const told = ({ registryRevision, segments, bytes }: Copied): string =>
    `revision ${registryRevision}, ${segments} segments, ${bytes} bytes, every page and reference checked\n`
  if (verb === 'backup') return `${file}: ${told(await backUp(registry, file))}`
  return `${registry}: ${told(await restore(file, registry, isForced))}`
}

if (existsSync('.env')) process.loadEnvFile('.env')
try {
  process.stdout.write(await run(orderOf(process.argv.slice(2))))
} catch (error) {
  const isUsage = error instanceof UsageError
  const isExpected = isUsage || [ConfigError, SchemaTooNew, CopyRefused].some((kind) => error instanceof kind)
  if (!isExpected) throw error
  process.stderr.write(`${(error as Error).message.trimEnd()}\n`)
  process.exitCode = isUsage ? 2 : 1
}
