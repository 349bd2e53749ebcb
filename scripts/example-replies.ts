import { pino } from 'pino'
import { buildApp } from '../src/app.ts'
import { readConfig } from '../src/config.ts'
import { serviceParts } from '../src/parts.ts'

/** Path of each operation that has an example. */
export const EXAMPLE_PATHS: Readonly<Record<string, string>> = {
  createAdvisory: '/v1/advisories',
  createEffects: '/v1/effects',
  createSensitivity: '/v1/advisories/sensitivity',
  createInverse: '/v1/advisories/inverse',
  createAdvisoryMatrix: '/v1/advisories/matrix',
  createCalibration: '/v1/calibrations',
}

const MADE = '2026-03-01T08:00:00.000Z'

/** What the service answers to an example; of rows, the first. */
export async function exampleReply(operation: string, request: string): Promise<unknown> {
  const path = EXAMPLE_PATHS[operation]
  if (path === undefined)
    throw new Error(`The example ${operation} has no path in scripts/example-replies.ts`)
  const parts = serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' }))
  // what is made has its time in it
  Object.assign(parts.service, { now: () => MADE })
  const app = buildApp({ ...parts, log: pino({ level: 'silent' }) })
  const reply = await app.inject({
    method: 'POST',
    url: path,
    headers: { 'content-type': 'application/json' },
    payload: request,
  })
  await app.close()
  if (reply.statusCode >= 300) throw new Error(`The example ${operation} is refused: ${reply.body}`)
  const [first = ''] = reply.body.split('\n')
  return JSON.parse(first) as unknown
}
