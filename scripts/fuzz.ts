import { readFileSync } from 'node:fs'
import { setTimeout as pause } from 'node:timers/promises'
import { parseArgs } from 'node:util'
import { pino } from 'pino'
import { buildApp } from '../src/app.ts'
import { readConfig } from '../src/config.ts'
import type { App } from '../src/http/app-type.ts'
import { serviceParts } from '../src/parts.ts'
import { type Json, KNOWN } from './fuzz/from-schema.ts'
import { Random } from './fuzz/random.ts'
import { ReplyCheck } from './fuzz/replies.ts'
import { operationsOf, requestTo, SMALL_PLAN, SMALL_STUDY } from './fuzz/requests.ts'

/**
 * Sends requests that are made from the document of the interface, valid and broken, and holds each reply against that
 * document: `npm run fuzz -- --requests 100000 --seed 1`. Fails on a 5xx and on a reply that is not as documented. What a
 * request meets depends on the writes before it, so a failure is told with the whole request.
 */

const { values } = parseArgs({
  options: { requests: { type: 'string', default: '10000' }, seed: { type: 'string', default: '1' } },
})
const REQUESTS = Number(values.requests)
const SEED = Number(values.seed)
const MOST_TOLD = 10
/** A registry that grows for ever would be all that is measured. */
const FRESH_EVERY = 5000

const document = JSON.parse(readFileSync(new URL('../openapi/openapi.json', import.meta.url), 'utf8')) as Json
const operations = operationsOf(document)
const check = new ReplyCheck(document)

const fresh = () => {
  const parts = serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' }))
  return buildApp({ ...parts, log: pino({ level: 'silent' }) })
}

const statuses = new Map<number, number>()
const reached = new Set<string>()
let failures = 0
let resets = 0
/** Ids of what was made, by operation: the latest one is asked for. */
const made = new Map<string, string>()
const OTHERS = [...(KNOWN['id'] ?? [])]

function remember(operation: string, body: string): void {
  made.set(operation, (JSON.parse(body) as { id: string }).id)
  KNOWN['id']?.splice(0, Infinity, ...OTHERS, ...made.values(), ...made.values())
  const study = made.get('studied')
  if (study !== undefined) {
    KNOWN['study_id']?.splice(0, Infinity, study)
    SMALL_PLAN['study_id'] = study
  }
}

async function post(target: App, url: string, payload: unknown): Promise<string> {
  const headers = { 'content-type': 'application/json' }
  const reply = await target.inject({ method: 'POST', url, headers, payload: JSON.stringify(payload) })
  if (reply.statusCode >= 300) throw new Error(`${url} is refused: ${reply.body}`)
  return reply.body
}

/** The service with a study that has succeeded, and a plan. */
async function prepared(): Promise<App> {
  const target = fresh()
  const study = await post(target, '/v1/studies', SMALL_STUDY)
  remember('studied', study)
  const { id } = JSON.parse(study) as { id: string }
  for (let state = 'queued'; state !== 'succeeded';) {
    await pause(50)
    state = (await target.inject(`/v1/studies/${id}`)).json<{ state: string }>().state
    if (state === 'failed') throw new Error('The study failed')
  }
  const plan = await post(target, '/v1/limit-plans', SMALL_PLAN)
  remember('createLimitPlan', plan)
  await post(target, `/v1/limit-plans/${(JSON.parse(plan) as { id: string }).id}/verify`, {})
  return target
}

/** Operations whose reply names what they made. */
const MAKERS = new Set(['createCalibration', 'createStudy', 'createLimitPlan'])

let app = await prepared()
for (let i = 0; i < REQUESTS; i += 1) {
  if (i % FRESH_EVERY === FRESH_EVERY - 1) {
    await app.close()
    app = await prepared()
  }
  const random = new Random(SEED + i)
  const operation = random.pick(operations)
  const { isCut = false, ...request } = requestTo(operation, document, random)
  const reply = await app
    .inject({ ...request, method: request.method as 'GET' })
    .catch((error: unknown) => ({ statusCode: 599, headers: {}, body: `broken off: ${String(error)}` }))
  if (isCut && reply.statusCode === 599) {
    resets += 1
    continue
  }
  statuses.set(reply.statusCode, (statuses.get(reply.statusCode) ?? 0) + 1)
  if (reply.statusCode < 300) reached.add(operation.id)
  if (MAKERS.has(operation.id) && reply.statusCode < 300) remember(operation.id, reply.body)
  const fault = check.fault(operation, reply)
  if (fault === undefined) continue
  failures += 1
  if (failures > MOST_TOLD) continue
  const { method, url, headers, payload } = request
  process.stdout.write(
    `! --seed ${SEED + i} --requests 1: ${method} ${url.slice(0, 300)}\n  ${JSON.stringify(headers)}\n  ${String(payload).slice(0, 600)}\n  ${fault}\n`,
  )
}
await app.close()
process.stdout.write(`reset, as their bodies broke off: ${resets}\n`)
for (const [status, count] of [...statuses].sort()) process.stdout.write(`${status}: ${count}\n`)
const never = operations.filter(({ id }) => !reached.has(id)).map(({ id }) => id)
process.stdout.write(`operations that succeeded at least once: ${reached.size} of ${operations.length}`)
process.stdout.write(never.length > 0 ? `; never: ${never.join(', ')}\n` : '\n')
process.stdout.write(`${REQUESTS} requests from seed ${SEED}, ${failures} failures\n`)
process.exitCode = failures === 0 ? 0 : 1
