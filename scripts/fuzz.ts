import { readFileSync } from 'node:fs'
import { parseArgs } from 'node:util'
import { pino } from 'pino'
import { buildApp } from '../src/app.ts'
import { readConfig } from '../src/config.ts'
import { serviceParts } from '../src/parts.ts'
import { type Json, KNOWN } from './fuzz/from-schema.ts'
import { Random } from './fuzz/random.ts'
import { ReplyCheck } from './fuzz/replies.ts'
import { operationsOf, requestTo } from './fuzz/requests.ts'

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
let app = fresh()
for (let i = 0; i < REQUESTS; i += 1) {
  if (i % FRESH_EVERY === FRESH_EVERY - 1) {
    await app.close()
    app = fresh()
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
  if (operation.id === 'createCalibration' && reply.statusCode === 201)
    KNOWN['id']?.splice(6, 4, (JSON.parse(reply.body) as { id: string }).id)
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
