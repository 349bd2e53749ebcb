import { once } from 'node:events'
import { request as httpRequest, type IncomingMessage } from 'node:http'
import type { AddressInfo } from 'node:net'
import { setTimeout as wait } from 'node:timers/promises'
import request from 'supertest'
import { expect, onTestFinished, test } from 'vitest'
import { PLAIN } from '../support/requests.ts'
import { buildService, linesOf } from '../support/service.ts'

async function listening() {
  const service = buildService()
  await service.app.listen({ host: '127.0.0.1', port: 0 })
  const { port } = service.app.server.address() as AddressInfo
  return { app: service.app, port, origin: `http://127.0.0.1:${port}` }
}

test('the service tells that it is alive and ready', async () => {
  const { origin } = await listening()
  await request(origin).get('/health/live').expect(200, { status: 'live' })
  const ready = await request(origin).get('/health/ready').expect(200)
  expect(ready.body).toEqual({
    status: 'ready',
    service_version: '0.1.0',
    method_version: '2',
    registry_revision: 1,
    database: 'sqlite',
  })
})

test('one advisory is answered from request to reply', async () => {
  const { origin } = await listening()
  const reply = await request(origin)
    .post('/v1/advisories')
    .set('x-request-id', 'first')
    .send(PLAIN)
    .expect(200)
  expect(reply.headers['x-request-id']).toBe('first')
  expect(reply.body).toMatchObject({ outcome: 'limited', recommended_max_speed: { sign: { value: 8 } } })
})

test('the document of the interface is OpenAPI 3.1 with every path', async () => {
  const { origin } = await listening()
  const reply = await request(origin)
    .get('/openapi.json')
    .expect(200)
    .expect('content-type', /^application\/json/)
  const { openapi, paths } = reply.body as { openapi: string; paths: Record<string, unknown> }
  expect(openapi).toMatch(/^3\.1\./)
  expect(Object.keys(paths)).toEqual(
    expect.arrayContaining([
      '/v1/advisories',
      '/v1/advisories/inverse',
      '/v1/advisories/matrix',
      '/v1/advisories/sensitivity',
      '/v1/advisories/stream',
      '/v1/effects',
      '/v1/methods',
      '/v1/methods/{id}',
      '/v1/problems',
      '/v1/problems/{slug}',
      '/v1/segments',
      '/v1/segments/{id}',
      '/v1/segments/{id}/advisory',
      '/v1/vessel-classes',
      '/v1/vessel-classes/{id}',
      '/health/live',
      '/health/ready',
      '/openapi.json',
    ]),
  )
})

const COMMENTS = /\/\*[\s\S]*?\*\/|(?<!:)\/\/.*$/gm
// Names of dialects and licences, which nothing loads.
const NOT_LOADED = /^https?:\/\/(www\.w3\.org|json-schema\.org|www\.apache\.org)\//

test('the documentation and all that its page loads come from this host alone', async () => {
  const { origin } = await listening()
  const page = await fetch(`${origin}/docs`)
  expect(page.status).toBe(200)
  expect(page.headers.get('content-security-policy')).toMatch(/^default-src 'self';/)
  const html = await page.text()
  const loaded = [...html.matchAll(/(?:src|href)="([^"]+)"/g)].map(
    ([, address]) => new URL(address!, page.url),
  )
  expect(loaded.length).toBeGreaterThan(3)
  expect(loaded.map((address) => address.origin)).toEqual(loaded.map(() => origin))
  const addresses = new Set<string>(html.match(/https?:\/\/[^\s"'<>)]+/g))
  let scripts = 0
  for (const address of loaded) {
    const asset = await fetch(address)
    expect(asset.status, address.href).toBe(200)
    const text = (await asset.text()).replaceAll(COMMENTS, '')
    // The bundle of the viewer names many addresses in its texts; what the page itself is made of is read whole.
    if (!/(index|initializer)[^/]*\.(js|css)$/.test(address.pathname)) continue
    scripts += 1
    for (const found of text.match(/https?:\/\/[^\s"'<>)]+/g) ?? []) addresses.add(found)
  }
  expect(scripts).toBeGreaterThan(1)
  expect([...addresses].filter((address) => !NOT_LOADED.test(address))).toEqual([])
  const initializer = loaded.find(({ pathname }) => pathname.endsWith('swagger-initializer.js'))
  expect(initializer).toBeDefined()
  expect(await (await fetch(initializer!)).text()).toContain('validatorUrl: null')
})

test('a service that stops lets a stream come to its end, and takes nothing new', async () => {
  const { app, port, origin } = await listening()
  const sender = httpRequest({
    port,
    host: '127.0.0.1',
    method: 'POST',
    path: '/v1/advisories/stream?detail=compact',
    headers: { 'content-type': 'application/x-ndjson' },
  })
  sender.on('error', () => undefined)
  onTestFinished(() => void sender.destroy())
  const line = `${JSON.stringify(PLAIN)}\n`
  sender.write(line)
  const [reply] = (await once(sender, 'response')) as [IncomingMessage]
  const chunks: Buffer[] = []
  reply.on('data', (chunk: Buffer) => chunks.push(chunk))
  await once(reply, 'data')

  let isClosed = false
  const closed = app.close().then(() => (isClosed = true))
  await expect(fetch(`${origin}/health/live`)).rejects.toThrow()
  expect(isClosed).toBe(false)
  sender.end(line)
  await once(reply, 'end')
  expect(reply.complete).toBe(true)
  expect(linesOf(String(Buffer.concat(chunks))).map(({ line: number }) => number)).toEqual([1, 2])
  sender.destroy()
  await closed
})

test('streams that outlast the grace of a service that stops are told before their reply, and reset after it began', async () => {
  const { app, port } = await listening()
  const opened = (path: string, type: string) => {
    const sender = httpRequest({
      port,
      host: '127.0.0.1',
      method: 'POST',
      path,
      headers: { 'content-type': type },
    })
    sender.on('error', () => undefined)
    onTestFinished(() => void sender.destroy())
    return sender
  }
  const answered = opened('/v1/advisories/stream?detail=compact', 'application/x-ndjson')
  answered.write(`${JSON.stringify(PLAIN)}\n`)
  const [reply] = (await once(answered, 'response')) as [IncomingMessage]
  const unanswered = opened('/v1/passages/check', 'text/csv')
  unanswered.write('time,lat,lon,sog_kn,mmsi\n')
  await once(reply, 'data')
  while (!(await app.inject('/metrics')).body.includes('in_hand{kind="stream"} 2')) await wait(10)
  const closed = app.close()
  const broken = once(reply.resume(), 'error')
  const told = once(unanswered, 'response')
  app.grace.abort()
  const [problem] = (await told) as [IncomingMessage]
  expect(problem.statusCode).toBe(503)
  expect(JSON.parse(String(Buffer.concat(await problem.toArray())))).toMatchObject({ code: 'stopping' })
  await broken
  expect(reply.complete).toBe(false)
  app.server.closeAllConnections()
  await closed
})
