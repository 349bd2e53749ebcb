import { existsSync } from 'node:fs'
import { pino } from 'pino'
import { buildApp } from './app.ts'
import { type Config, ConfigError, readConfig } from './config.ts'
import type { App } from './http/app-type.ts'
import { serviceParts } from './parts.ts'

const STOP_TIMEOUT = 10_000 // ms that open streams have to end

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
        app.server.closeAllConnections()
      }, STOP_TIMEOUT).unref()
      void app.close().then(() => {
        app.log.info('stopped')
      })
    })
  }
}

const config = settings()
const { exampleSegment, ...parts } = serviceParts(config)
const app = buildApp({ ...parts, log: pino({ level: config.logLevel }) })
stopOnSignals(app)

const address = await app.listen({ host: config.host, port: config.port })
const url = config.publicUrl ?? address
app.log.info(`Documentation: ${url}/docs`)
if (exampleSegment !== undefined) {
  app.log.info(`An advisory: ${url}/v1/segments/${exampleSegment}/advisory?vessel_class=cemt-iv`)
}
