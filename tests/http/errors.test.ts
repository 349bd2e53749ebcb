import { once } from 'node:events'
import { request as httpRequest, type IncomingMessage } from 'node:http'
import { connect } from 'node:net'
import type { AddressInfo } from 'node:net'
import { setTimeout as wait } from 'node:timers/promises'
import { gzipSync } from 'node:zlib'
import request from 'supertest'
import { expect, test } from 'vitest'
import { z } from 'zod'
import { Fault } from '../../src/domain/fault.ts'
import type { App } from '../../src/http/app-type.ts'
import { Problem } from '../../src/http/problems.ts'
import { buildTestApp } from '../support/app.ts'

const routes = (app: App): void => {
  app.post('/echo', { handler: ({ body }) => ({ body }) })
  app.post('/large', {
    bodyLimit: 4_000_000,
    handler: ({ body }) => ({ length: JSON.stringify(body).length }),
  })
  app.put('/things/:id', { handler: () => ({}) })
  app.get('/things/:id', { handler: () => ({ text: 'x'.repeat(5000) }) })
  app.get('/broken', { handler: () => { throw new Error('secret of the cellar') } }) // prettier-ignore
  app.get('/busy', { handler: () => { throw new Fault('overloaded', 'Too much to do') } }) // prettier-ignore
  app.get('/typed', { schema: { querystring: z.strictObject({}) }, handler: () => ({}) })
}

const json = { 'content-type': 'application/json' }

async function listening(app: App): Promise<string> {
  await app.listen({ host: '127.0.0.1', port: 0 })
  return `http://127.0.0.1:${(app.server.address() as AddressInfo).port}`
}

test('our own errors are answered with fixed text and logged with the request id', async () => {
  const { app, logged } = buildTestApp([routes])
  const reply = await app.inject({ url: '/broken', headers: { 'x-request-id': 'abc-1' } })
  expect(reply.statusCode).toBe(500)
  expect(reply.json()).toEqual({
    type: '/v1/problems/internal',
    title: 'The service failed',
    status: 500,
    detail: 'The service failed while answering; nothing in the request needs to change',
    instance: 'urn:request:abc-1',
    code: 'internal',
  })
  const line = logged.find(({ msg }) => msg === 'failed')
  expect(line).toMatchObject({ level: 50, request_id: 'abc-1', err: { message: 'secret of the cellar' } })
})

test('refusals are logged at info without a stack, and each reply once with its route', async () => {
  const { app, logged } = buildTestApp([routes])
  await app.inject({ method: 'POST', url: '/echo', payload: '{', headers: json })
  expect(logged.map(({ level, msg }) => [level, msg])).toEqual([
    [30, 'refused'],
    [30, 'answered'],
  ])
  expect(logged[1]).toMatchObject({ method: 'POST', route: '/echo', status: 400 })
  expect(JSON.stringify(logged)).not.toContain('stack')
})

test.each([['a.B_c-9'], ['x'.repeat(64)]])('the request id %s is taken over', async (id) => {
  const { app } = buildTestApp()
  const reply = await app.inject({ url: '/health/live', headers: { 'x-request-id': id } })
  expect(reply.headers['x-request-id']).toBe(id)
})

test.each([['x'.repeat(65)], ['a b'], ['é'], ['']])('the request id "%s" is replaced', async (id) => {
  const { app } = buildTestApp()
  const reply = await app.inject({ url: '/nowhere', headers: { 'x-request-id': id } })
  expect(reply.headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/)
  expect(reply.json()).toMatchObject({ instance: `urn:request:${String(reply.headers['x-request-id'])}` })
})

test('an unknown path is 404, also with a body that nothing reads', async () => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({
    method: 'POST',
    url: '/nowhere',
    payload: 'a,b',
    headers: { 'content-type': 'text/csv' },
  })
  expect(reply.statusCode).toBe(404)
  expect(reply.json()).toMatchObject({ code: 'route-not-found' })
})

test.each([
  ['DELETE', '/things/7', 'GET, HEAD, OPTIONS, PUT'],
  ['POST', '/things/7?x=1', 'GET, HEAD, OPTIONS, PUT'],
  ['HEAD', '/echo', 'OPTIONS, POST'],
  ['GET', '/echo', 'OPTIONS, POST'],
] as const)('%s %s is 405 with the methods it answers', async (method, url, allow) => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({ method, url })
  expect(reply.statusCode).toBe(405)
  expect(reply.headers.allow).toBe(allow)
})

test('OPTIONS of a known path tells its methods', async () => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({ method: 'OPTIONS', url: '/things/7' })
  expect([reply.statusCode, reply.headers.allow, reply.body]).toEqual([204, 'GET, HEAD, OPTIONS, PUT', ''])
  expect((await app.inject({ method: 'OPTIONS', url: '/nowhere' })).statusCode).toBe(404)
})

test.each(['/%zz', '/things/%ff', '/things/%'])('the path %s is a problem, not a crash', async (url) => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({ url })
  expect(reply.statusCode).toBe(400)
  expect(Problem.parse(reply.json())).toMatchObject({ code: 'invalid-request' })
  expect(reply.headers['x-request-id']).toBeDefined()
})

test('a path step longer than any id is an unknown path', async () => {
  const { app } = buildTestApp([routes])
  expect((await app.inject(`/things/${'x'.repeat(300)}`)).json()).toMatchObject({ code: 'route-not-found' })
})

test('a busy service says when to come back', async () => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject('/busy')
  expect([reply.statusCode, reply.headers['retry-after']]).toEqual([503, '2'])
})

test('a request that arrives while the service stops is told to come back', async () => {
  const { app } = buildTestApp([routes])
  app.addHook('preClose', async () => {
    await wait(300)
  })
  const url = await listening(app)
  const closed = app.close()
  await wait(50)
  const reply = await fetch(`${url}/health/live`)
  expect([reply.status, reply.headers.get('retry-after'), reply.headers.get('connection')]).toEqual([
    503,
    '5',
    'close',
  ])
  expect(await reply.json()).toMatchObject({ code: 'stopping' })
  await closed
})

test('readiness is a problem while there is nothing to answer from', async () => {
  const { app } = buildTestApp([], { isReady: () => undefined })
  expect((await app.inject('/health/ready')).statusCode).toBe(503)
  expect((await app.inject('/health/live')).json()).toEqual({ status: 'live' })
})

test.each([
  ['{"a":1,}', { position: 7, line: 1, column: 8 }, 'The text is not JSON at line 1, column 8'],
  ['{"a":\n tru}', { position: 10, line: 2, column: 5 }, 'The text is not JSON at line 2, column 5'],
  ['{"a":1', { position: 6, line: 1, column: 7 }, 'The text ends too early at line 1, column 7'],
  ['', undefined, 'The body is empty: send a JSON value'],
  ['NaN', { position: 0, line: 1, column: 1 }, 'The text is not JSON at line 1, column 1'],
  [
    '{"a":nulx, "b": "at position 2"}',
    { position: 8, line: 1, column: 9 },
    'The text is not JSON at line 1, column 9',
  ],
])('the body %j is malformed JSON', async (payload, facts, detail) => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({ method: 'POST', url: '/echo', payload, headers: json })
  expect(reply.statusCode).toBe(400)
  expect(reply.json()).toMatchObject({ code: 'malformed-json', detail, ...(facts && { facts }) })
})

test('a body that is not UTF-8 is malformed JSON', async () => {
  const { app } = buildTestApp([routes])
  const payload = Buffer.from([0x22, 0xff, 0x22])
  const reply = await app.inject({ method: 'POST', url: '/echo', payload, headers: json })
  expect(reply.json()).toMatchObject({
    code: 'malformed-json',
    detail: 'The body is not UTF-8: convert it and send it again',
  })
})

test('of a repeated member the last counts, and a byte order mark is skipped', async () => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({
    method: 'POST',
    url: '/echo',
    payload: '\ufeff{"a":1,"a":2}',
    headers: json,
  })
  expect(reply.json()).toEqual({ body: { a: 2 } })
})

test.each([
  'text/csv',
  'application/xml',
  'application/jsonx',
  'nonsense',
  'application/x-www-form-urlencoded',
])('a body of type %s is 415 with the type that is read', async (type) => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({
    method: 'POST',
    url: '/echo',
    payload: '{}',
    headers: { 'content-type': type },
  })
  expect(reply.statusCode).toBe(415)
  expect(reply.json()).toMatchObject({
    code: 'unsupported-media-type',
    facts: { accepted: ['application/json'] },
  })
})

test('a body without a type, or in an encoding other than gzip, is 415', async () => {
  const { app } = buildTestApp([routes])
  const untyped = await app.inject({ method: 'POST', url: '/echo', payload: Buffer.from('{}') })
  expect(untyped.statusCode).toBe(415)
  const headers = { ...json, 'content-encoding': 'br' }
  const encoded = await app.inject({ method: 'POST', url: '/echo', payload: '{}', headers })
  expect(encoded.json()).toMatchObject({ status: 415, facts: { accepted: ['gzip', 'identity'] } })
})

test('a gzip body is read, and a broken one is refused', async () => {
  const { app } = buildTestApp([routes])
  const headers = { ...json, 'content-encoding': 'gzip' }
  const whole = gzipSync('{"a":1}')
  const reply = await app.inject({ method: 'POST', url: '/echo', payload: whole, headers })
  expect(reply.json()).toEqual({ body: { a: 1 } })
  for (const payload of [whole.subarray(0, 15), Buffer.from('{"a":1}')]) {
    const broken = await app.inject({ method: 'POST', url: '/echo', payload, headers })
    expect(broken.json()).toMatchObject({ status: 400, detail: 'The body is not whole gzip data' })
  }
})

test('a gzip bomb stops at the limit of decoded bytes', async () => {
  const { app } = buildTestApp([routes])
  const payload = gzipSync(Buffer.alloc(200_000_000, ' '))
  const before = process.memoryUsage().rss
  const reply = await app.inject({
    method: 'POST',
    url: '/echo',
    payload,
    headers: { ...json, 'content-encoding': 'gzip' },
  })
  expect(reply.statusCode).toBe(413)
  expect(process.memoryUsage().rss - before).toBeLessThan(100_000_000)
})

test('a body of 10 MB is 413 on a real connection, which stays usable', async () => {
  const { app } = buildTestApp([routes])
  const url = await listening(app)
  const agent = request.agent(url)
  const sent = JSON.stringify('x'.repeat(10_000_000))
  const reply = await agent.post('/echo').set('content-type', 'application/json').send(sent)
  expect(reply.status).toBe(413)
  expect(reply.body).toMatchObject({ code: 'payload-too-large', facts: { limit: 1_048_576 } })
  expect(reply.headers['connection']).not.toBe('close')
  expect((await agent.get('/health/live')).status).toBe(200)
})

test('a caller that closes after each request can send all of it and read its 413', async () => {
  const { app } = buildTestApp([routes])
  const url = await listening(app)
  const headers = { ...json, connection: 'close' }
  const sent = httpRequest(`${url}/echo`, { method: 'POST', headers, agent: false })
  sent.on('error', () => undefined)
  sent.write(`"${'x'.repeat(2_000_000)}`)
  const [reply] = (await once(sent, 'response')) as [IncomingMessage]
  expect(reply.statusCode).toBe(413)
  const endings: string[] = []
  reply.socket.once('end', () => endings.push('the service hung up'))
  for (let part = 0; part < 10; part += 1) {
    sent.write('x'.repeat(1_000_000))
    await wait(10)
  }
  expect(endings).toEqual([])
  sent.end('"')
  await expect.poll(() => sent.writableFinished).toBe(true)
})

test('a route may take larger bodies than others', async () => {
  const { app } = buildTestApp([routes])
  const payload = JSON.stringify('x'.repeat(3_000_000))
  expect((await app.inject({ method: 'POST', url: '/large', payload, headers: json })).json()).toEqual({
    length: 3_000_002,
  })
})

test('a chunked body without a length is counted too', async () => {
  const { app } = buildTestApp([routes], { bodyLimit: 1024 })
  const url = await listening(app)
  const body = new ReadableStream({ start: (c) => { c.enqueue(Buffer.alloc(2000, ' ')); c.close() } }) // prettier-ignore
  const reply = await fetch(`${url}/echo`, { method: 'POST', headers: json, body, duplex: 'half' })
  expect(reply.status).toBe(413)
})

test('a body that never ends is 408', async () => {
  const { app } = buildTestApp([routes], { requestTimeout: 200 })
  const text = await raw(
    app,
    'POST /echo HTTP/1.1\r\nhost: a\r\ncontent-type: application/json\r\ncontent-length: 9\r\n\r\n{"a"',
  )
  expect(text).toMatch(/^HTTP\/1\.1 408 /)
  expect(text).toContain('"code":"request-timeout"')
})

/** Sends bytes and gives what comes back until a whole JSON body is in. */
async function raw(app: App, bytes: string): Promise<string> {
  const url = new URL(await listening(app))
  const socket = connect(Number(url.port), url.hostname)
  socket.write(bytes)
  let text = ''
  for await (const chunk of socket) {
    text += String(chunk)
    if (text.endsWith('}')) break
  }
  return text
}

test.each([
  ['not HTTP at all\r\n\r\n', 'This is not an HTTP/1.1 request'],
  [
    `GET / HTTP/1.1\r\nhost: a\r\nx: ${'y'.repeat(20_000)}\r\n\r\n`,
    'The header lines and the path are longer than this service reads',
  ],
])('bytes that are no request are still answered with a problem', async (bytes, detail) => {
  const { app } = buildTestApp()
  const text = await raw(app, bytes)
  expect(text).toMatch(/^HTTP\/1\.1 400 Bad Request\r\ncontent-type: application\/problem\+json/)
  expect(Problem.parse(JSON.parse(text.slice(text.indexOf('{'))))).toMatchObject({
    code: 'invalid-request',
    detail,
  })
})

test('replies are compressed when asked and large enough, and say what they depend on', async () => {
  const { app } = buildTestApp([routes])
  const large = await app.inject({ url: '/things/1', headers: { 'accept-encoding': 'gzip' } })
  expect(large.headers).toMatchObject({ 'content-encoding': 'gzip', vary: 'accept-encoding' })
  expect(large.rawPayload.length).toBeLessThan(200)
  expect((await app.inject('/things/1')).headers).not.toHaveProperty('content-encoding')
  const small = await app.inject({ url: '/health/live', headers: { 'accept-encoding': 'gzip' } })
  expect(small.headers).not.toHaveProperty('content-encoding')
})
