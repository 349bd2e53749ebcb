import { readFileSync } from 'node:fs'
import { setTimeout as pause } from 'node:timers/promises'
import { pino } from 'pino'
import { buildApp } from '../src/app.ts'
import { readConfig } from '../src/config.ts'
import type { App } from '../src/http/app-type.ts'
import { serviceParts } from '../src/parts.ts'

/** Path of each operation that has an example; a name in braces is the id of what an example before it made. */
export const EXAMPLE_PATHS: Readonly<Record<string, string>> = {
  createAdvisory: '/v1/advisories',
  createEffects: '/v1/effects',
  createSensitivity: '/v1/advisories/sensitivity',
  createInverse: '/v1/advisories/inverse',
  createAdvisoryMatrix: '/v1/advisories/matrix',
  createCalibration: '/v1/calibrations',
  createStudy: '/v1/studies',
  createLimitPlan: '/v1/limit-plans',
  publishLimitPlan: '/v1/limit-plans/{plan}/publish',
}

const MADE = '2026-03-01T08:00:00.000Z'

const readRequest = (operation: string): string =>
  readFileSync(new URL(`../openapi/examples/${operation}.request.json`, import.meta.url), 'utf8')

/** Ids of studies and plans are made by chance: the same one stands for all of them. */
const withoutChance = (text: string): string =>
  text
    .replaceAll(/\b(study|plan)-[0-9a-z]{10}\b/g, '$1-0123456789')
    .replaceAll(/"record_hash":"sha256:[0-9a-f]+"/g, `"record_hash":"sha256:${'0'.repeat(64)}"`)

async function post(app: App, operation: string, url: string, payload: string) {
  const headers = { 'content-type': 'application/json' }
  const reply = await app.inject({ method: 'POST', url, headers, payload })
  if (reply.statusCode >= 300) throw new Error(`The example ${operation} is refused: ${reply.body}`)
  return reply
}

const idIn = (body: string): string => (JSON.parse(body) as { id: string }).id

/** Makes a study that the example of a plan can be drawn from. */
async function madeStudy(app: App): Promise<string> {
  const id = idIn((await post(app, 'createStudy', '/v1/studies', readRequest('createStudy'))).body)
  for (;;) {
    const { state } = (await app.inject(`/v1/studies/${id}`)).json<{ state: string }>()
    if (state === 'succeeded') return id
    if (state !== 'queued' && state !== 'running') throw new Error(`The study of the example is ${state}`)
    await pause(100)
  }
}

const onStudy = (request: string, study: string): string =>
  request.replace(/"study_id": "[^"]*"/, `"study_id": "${study}"`)

/** The request as it is sent, and where to, once what it names has been made. */
async function prepared(app: App, operation: string, path: string, request: string) {
  if (operation === 'createLimitPlan') return { path, request: onStudy(request, await madeStudy(app)) }
  if (operation !== 'publishLimitPlan') return { path, request }
  const plan = onStudy(readRequest('createLimitPlan'), await madeStudy(app))
  const { body } = await post(app, 'createLimitPlan', '/v1/limit-plans', plan)
  return { path: path.replace('{plan}', idIn(body)), request }
}

/** What the service answers to an example; of rows, the first. */
export async function exampleReply(operation: string, request: string): Promise<unknown> {
  const path = EXAMPLE_PATHS[operation]
  if (path === undefined)
    throw new Error(`The example ${operation} has no path in scripts/example-replies.ts`)
  const parts = serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' }))
  // what is made has its time in it
  Object.assign(parts.service, { now: () => MADE })
  const app = buildApp({ ...parts, log: pino({ level: 'silent' }) })
  try {
    const sent = await prepared(app, operation, path, request)
    const { body } = await post(app, operation, sent.path, sent.request)
    const [first = ''] = body.split('\n')
    return JSON.parse(withoutChance(first)) as unknown
  } finally {
    await app.close()
  }
}
