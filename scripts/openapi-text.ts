import { pino } from 'pino'
import { buildApp } from '../src/app.ts'
import { readConfig } from '../src/config.ts'
import { serviceParts } from '../src/parts.ts'

/** The OpenAPI document as the file holds it, made from the routes with the default configuration. */
export async function openApiText(): Promise<string> {
  const app = buildApp({
    ...serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' })),
    log: pino({ level: 'silent' }),
  })
  const reply = await app.inject('/openapi.json')
  await app.close()
  return `${JSON.stringify(reply.json(), null, 2)}\n`
}
