import { once } from 'node:events'
import { request as httpRequest, type ClientRequest, type IncomingMessage } from 'node:http'
import { connect, type AddressInfo } from 'node:net'
import { setTimeout as wait } from 'node:timers/promises'
import { expect, onTestFinished, test } from 'vitest'
import { Admission, installAdmission } from '../../src/http/admission.ts'
import type { App } from '../../src/http/app-type.ts'
import { acceptLines, bodyStream, readLines } from '../../src/http/lines.ts'
import { sendStream } from '../../src/http/stream.ts'
import { buildTestApp } from '../support/app.ts'

async function* echoed(stream: ReturnType<typeof bodyStream>): AsyncGenerator<string> {
  for await (const lines of readLines(stream)) yield `${lines.length}\n`
}

/** A service with places for two requests and one stream, a route that waits to be let go, and one that answers at length. */
async function busyService() {
  const waiting: (() => void)[] = []
  const admission = new Admission({ maxRequests: 2, maxStreams: 1 })
  const routes = (app: App): void => {
    app.post('/slow', { handler: () => new Promise<object>((go) => waiting.push(() => { go({}) })) }) // prettier-ignore
    app.post('/echo', { handler: ({ body }) => ({ body }) })
    app.get('/large', { handler: () => 'x'.repeat(30_000_000) })
    app.get('/broken', { handler: () => { throw new Error('broken') } }) // prettier-ignore
    void app.register((scope: App, _options, done) => {
      acceptLines(scope)
      scope.post('/stream', { config: { place: 'stream' } }, (request, reply) =>
        sendStream(reply, echoed(bodyStream(request))),
      )
      done()
    })
  }
  const { app } = buildTestApp([routes], {
    install: (made) => {
      installAdmission(made, admission)
    },
  })
  await app.listen({ host: '127.0.0.1', port: 0 })
  const { port } = app.server.address() as AddressInfo
  const origin = `http://127.0.0.1:${port}`
  const post = (path: string, body = '{}'): Promise<Response> =>
    fetch(origin + path, { method: 'POST', body, headers: { 'content-type': 'application/json' } })
  return { admission, origin, port, post, waiting }
}

async function until(holds: () => boolean): Promise<void> {
  while (!holds()) await wait(5)
}

function openStream(port: number): ClientRequest {
  const sender = httpRequest({
    port,
    host: '127.0.0.1',
    method: 'POST',
    path: '/stream',
    headers: { 'content-type': 'application/x-ndjson' },
  })
  sender.on('error', () => undefined)
  onTestFinished(() => void sender.destroy())
  return sender
}

async function expectOverloaded(reply: Response): Promise<void> {
  expect([reply.status, reply.headers.get('retry-after')]).toEqual([503, '2'])
  expect(await reply.json()).toMatchObject({ code: 'overloaded' })
}

test('what is more than can be answered soon is refused at once, and health is always told', async () => {
  const { origin, post, waiting, admission } = await busyService()
  const slow = [post('/slow'), post('/slow')]
  await until(() => waiting.length === 2)
  await expectOverloaded(await post('/echo'))
  await expectOverloaded(await fetch(`${origin}/large`))
  for (const path of ['/health/live', '/health/ready']) expect((await fetch(origin + path)).status).toBe(200)
  for (const go of waiting) go()
  expect((await Promise.all(slow)).map(({ status }) => status)).toEqual([200, 200])
  expect((await post('/echo')).status).toBe(200)
  expect(admission.inHand).toEqual({ request: 0, stream: 0 })
})

test('a place is given back when a request fails, is refused, or its caller goes away', async () => {
  const { origin, port, post, waiting, admission } = await busyService()
  for (let i = 0; i < 5; i += 1) {
    expect((await fetch(`${origin}/broken`)).status).toBe(500)
    expect((await post('/echo', '{')).status).toBe(400)
    expect((await post('/nowhere')).status).toBe(404)
  }
  const leaver = connect(port, '127.0.0.1')
  leaver.write(
    'POST /slow HTTP/1.1\r\nhost: a\r\ncontent-type: application/json\r\ncontent-length: 2\r\n\r\n{}',
  )
  await until(() => waiting.length === 1)
  expect(admission.inHand.request).toBe(1)
  leaver.destroy()
  await until(() => admission.inHand.request === 0)
})

test('senders that are slow and readers that are slow hold no place', async () => {
  const { port, post, admission } = await busyService()
  const head =
    'POST /echo HTTP/1.1\r\nhost: a\r\ncontent-type: application/json\r\ncontent-length: 9\r\n\r\n{'
  const senders = Array.from({ length: 5 }, () => connect(port, '127.0.0.1'))
  const readers = Array.from({ length: 5 }, () => connect(port, '127.0.0.1'))
  onTestFinished(() => {
    for (const socket of [...senders, ...readers]) socket.destroy()
  })
  for (const sender of senders) sender.write(head)
  for (const reader of readers) {
    reader.pause()
    reader.write('GET /large HTTP/1.1\r\nhost: a\r\n\r\n')
    await until(() => admission.inHand.request === 0)
  }
  await wait(50)
  expect((await post('/echo')).status).toBe(200)
  expect(admission.inHand.request).toBe(0)
})

test('a stream holds a place among streams as long as it lasts, and none among requests', async () => {
  const { port, post, admission } = await busyService()
  const first = openStream(port)
  first.write('{}\n')
  const [reply] = (await once(first, 'response')) as [IncomingMessage]
  reply.resume()
  expect(admission.inHand).toEqual({ request: 0, stream: 1 })
  expect((await post('/echo')).status).toBe(200)
  const second = openStream(port)
  second.write('{}\n')
  const [refused] = (await once(second, 'response')) as [IncomingMessage]
  expect(refused.statusCode).toBe(503)
  refused.resume()
  first.end()
  await once(reply, 'end')
  await until(() => admission.inHand.stream === 0)
  const third = openStream(port)
  third.end('{}\n')
  const [answer] = (await once(third, 'response')) as [IncomingMessage]
  expect(answer.statusCode).toBe(200)
  answer.resume()
  await until(() => admission.inHand.stream === 0)
})
