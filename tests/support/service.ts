import type { LightMyRequestResponse } from 'fastify'
import { pino } from 'pino'
import { expect, onTestFinished } from 'vitest'
import { z } from 'zod'
import { buildApp } from '../../src/app.ts'
import { readConfig } from '../../src/config.ts'
import type { App } from '../../src/http/app-type.ts'
import { Problem } from '../../src/http/problems.ts'
import { serviceParts } from '../../src/parts.ts'
import { strict } from './strict.ts'

export type Json = Record<string, unknown>
type Response = LightMyRequestResponse

export interface Service {
  readonly app: App
  /** Schema of the 200 reply of a route, or of a line of it, closed at every level. */
  readonly replyTo: (method: string, url: string) => z.ZodType
}

/**
 * The service as it starts, with the demo waterway.
 *
 * @param whenDone  takes what closes it: the end of a test, or of a file with `afterAll`
 */
export function buildService(whenDone: (close: () => Promise<void>) => void = onTestFinished): Service {
  const app = buildApp({
    ...serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' })),
    log: pino({ level: 'silent' }),
  })
  const replies = new Map<string, z.ZodType>()
  app.addHook('onRoute', ({ method, url, schema }) => {
    const answer = (schema?.response as Record<number, unknown> | undefined)?.[200]
    const forms = (answer as { content?: Record<string, { schema?: unknown }> } | undefined)?.content
    const reply = forms?.['application/x-ndjson']?.schema ?? forms?.['application/json']?.schema ?? answer
    if (reply instanceof z.ZodType) for (const one of [method].flat()) replies.set(`${one} ${url}`, reply)
  })
  whenDone(async () => {
    app.server.closeAllConnections()
    await app.close()
  })
  return {
    app,
    replyTo: (method, url) => {
      const schema = replies.get(`${method} ${url}`)
      if (!schema) throw new Error(`${method} ${url} has no schema of its reply`)
      return strict(schema)
    },
  }
}

/** Posts a value as JSON, or text as it is. */
export function post(
  app: App,
  url: string,
  body: unknown,
  headers: Record<string, string> = {},
): Promise<Response> {
  const payload = typeof body === 'string' || Buffer.isBuffer(body) ? body : JSON.stringify(body)
  return app.inject({
    method: 'POST',
    url,
    payload,
    headers: { 'content-type': 'application/json', ...headers },
  })
}

const NDJSON = { 'content-type': 'application/x-ndjson' }

/** Sends values as lines and reads the lines that come back. */
export async function stream(app: App, query: string, requests: readonly unknown[]): Promise<Json[]> {
  const text = requests.map((request) => `${JSON.stringify(request)}\n`).join('')
  const reply = await post(app, `/v1/advisories/stream${query}`, text, NDJSON)
  expect(reply.statusCode).toBe(200)
  return linesOf(reply.body)
}

export const linesOf = (text: string): Json[] =>
  text
    .split('\n')
    .filter((line) => line !== '')
    .map((line) => JSON.parse(line) as Json)

const StrictProblem = strict(Problem)

/** A refusal in the documented form, with its status, type and request id; returns its body. */
export function expectProblem(reply: Response, status: number, code: string): z.output<typeof Problem> {
  expect([reply.statusCode, reply.json<Json>()['code']], reply.body.slice(0, 2000)).toEqual([status, code])
  expect(reply.headers['content-type']).toBe('application/problem+json; charset=utf-8')
  expect(reply.headers.vary).toBe('Accept, Authorization')
  const problem = StrictProblem.parse(reply.json())
  expect(problem.status).toBe(status)
  expect(problem.type).toBe(`/v1/problems/${code}`)
  expect(problem.instance).toBe(`urn:request:${String(reply.headers['x-request-id'])}`)
  return problem
}

/** Where and what kind each fault is: `#/segment/depth_m required`. */
export const faultsOf = (problem: z.output<typeof Problem>): string[] =>
  (problem.errors ?? []).map((item) => `${item.pointer ?? item.parameter ?? ''} ${item.code}`)

/** Paths of every null in a value, save below the points of a curve, which are flat rows. */
export function nullsIn(value: unknown, path = ''): string[] {
  if (value === null) return [path]
  if (typeof value !== 'object' || path.endsWith('/points')) return []
  return Object.entries(value).flatMap(([key, inner]) => nullsIn(inner, `${path}/${key}`))
}

/** Every speed in three units in a value. */
export function speedsIn(value: unknown): { mps: number; kn: number; kmh: number }[] {
  if (typeof value !== 'object' || value === null) return []
  if ('mps' in value) return [value as { mps: number; kn: number; kmh: number }]
  return Object.values(value).flatMap(speedsIn)
}

const isNear = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-15 * Math.abs(b)

/** One knot is 1852 m in an hour, and an hour has 3600 s. */
export function expectOneSpeed(speed: { mps: number; kn: number; kmh: number }): void {
  expect(isNear(speed.kn, (speed.mps * 3600) / 1852), `${speed.mps} m/s is not ${speed.kn} kn`).toBe(true)
  expect(isNear(speed.kmh, speed.mps * 3.6), `${speed.mps} m/s is not ${speed.kmh} km/h`).toBe(true)
}

/** Everything that holds for each nested reply of 200: documented fields alone, no null, units that agree, headers. */
export function expectReply(reply: Response, schema: z.ZodType): Json {
  expect(reply.statusCode, reply.body.slice(0, 2000)).toBe(200)
  const body = reply.json<Json>()
  const parsed = schema.safeParse(body)
  expect(parsed.success ? [] : parsed.error.issues).toEqual([])
  expect(nullsIn(body)).toEqual([])
  for (const speed of speedsIn(body)) expectOneSpeed(speed)
  expect(reply.headers.vary).toBe('Accept, Authorization')
  expect(reply.headers['x-request-id']).toMatch(/^[A-Za-z0-9._-]{1,64}$/)
  return body
}
