import { existsSync } from 'node:fs'
import { pino } from 'pino'
import { buildApp } from './app.ts'
import { type Config, ConfigError, readConfig } from './config.ts'
import type { App } from './http/app-type.ts'
import { serviceParts } from './parts.ts'

const STOP_TIMEOUT = 10_000 // ms that open streams have to end
const BACKLOG = 4096 // connections that wait to be taken in; the system may allow fewer
const TELLING = 1_000 // ms in which those that have not are told

/** Never logged, wherever an error or a request brings it along. */
const SECRETS = ['authorization', '*.authorization', '*.headers.authorization', '*.*.headers.authorization']

function settings(): Config {
  if (existsSync('.env')) process.loadEnvFile('.env')
  try {
    return readConfig(process.env)
  } catch (error) {
    if (!(error instanceof ConfigError)) throw error
    process.stderr.write(`${error.message}\n`)
    process.exit(1)
  }
}

function stopOnSignals(app: App): void {
  for (const signal of ['SIGTERM', 'SIGINT'] as const) {
    process.once(signal, () => {
      app.log.info({ signal }, 'stopping')
      setTimeout(() => {
        app.grace.abort()
      }, STOP_TIMEOUT).unref()
      setTimeout(() => {
        app.server.closeAllConnections()
      }, STOP_TIMEOUT + TELLING).unref()
      void app.close().then(() => {
        app.log.info('stopped')
      })
    })
  }
}

const config = settings()
const log = pino({ level: config.logLevel, redact: SECRETS })
const { opened, findExample, ...parts } = serviceParts(config, {
  onLostConnection: (error) => {
    log.error({ err: error }, 'a connection to the database was lost')
  },
  onJobError: (error) => {
    log.error({ err: error }, 'a job met an error')
  },
})
const app = buildApp({ ...parts, log })
stopOnSignals(app)

try {
  await opened
} catch (error) {
  // a schema that is too new, a database that does not answer: the sentence says which
  log.fatal(error instanceof Error ? error.message : String(error))
  await app.close()
  process.exit(1)
}
if (config.access === 'open') log.warn('Access is open: everyone who reaches this address may read and write')
const address = await app.listen({ host: config.host, port: config.port, backlog: BACKLOG })
const url = config.publicUrl ?? address
log.info(`Overview: ${url}/`)
log.info(`Documentation: ${url}/docs`)
const example = await findExample()
if (example !== undefined) {
  log.info(`An advisory: ${url}/v1/segments/${example}/advisory?vessel_class=cemt-iv`)
  log.info(`Its sheet: ${url}/v1/segments/${example}/sheet?vessel_class=cemt-iv`)
}
