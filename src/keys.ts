import { existsSync } from 'node:fs'
import { runKeys } from './access/command.ts'
import { ConfigError, readConfig } from './config.ts'
import { SchemaTooNew } from './store/migrations.ts'
import { openStore } from './store/open.ts'

if (existsSync('.env')) process.loadEnvFile('.env')
try {
  process.exitCode = await runKeys(process.argv.slice(2), {
    openStore: () => openStore(readConfig(process.env).databaseUrl),
    now: () => new Date(),
    out: (text) => void process.stdout.write(text),
    err: (text) => void process.stderr.write(text),
  })
} catch (error) {
  if (!(error instanceof ConfigError) && !(error instanceof SchemaTooNew)) throw error
  process.stderr.write(`${error.message}\n`)
  process.exitCode = 1
}
