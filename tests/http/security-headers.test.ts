import { once } from 'node:events'
import { connect, type AddressInfo } from 'node:net'
import { expect, test } from 'vitest'
import { buildTestApp } from '../support/app.ts'
import { buildService, post } from '../support/service.ts'
import { canal, registryService } from '../support/registry-service.ts'
import { PLAIN } from '../support/requests.ts'

const CURVE = '/v1/segments/harrow-long-pound/speed-curve?vessel_class=cemt-iv'

test('no reply lets a browser guess, frame or run it', async () => {
  const { app } = buildService()
  const replies = [
    await app.inject('/health/live'),
    await app.inject('/v1/segments?limit=1'),
    await app.inject(`${CURVE}&format=svg`),
    await app.inject('/'),
    await app.inject('/nowhere'),
    await app.inject('/v1/segments/%zz'),
    await app.inject('/docs/'),
    await post(app, '/v1/advisories', PLAIN),
    await post(app, '/v1/advisories', '{'),
  ]
  expect(replies.map(({ statusCode }) => statusCode)).toEqual([200, 200, 200, 200, 404, 400, 200, 200, 400])
  for (const { headers } of replies) {
    expect(headers['x-content-type-options']).toBe('nosniff')
    expect(headers['x-frame-options']).toBe('SAMEORIGIN')
    expect(headers['referrer-policy']).toBe('no-referrer')
    const policy = String(headers['content-security-policy'])
    expect(policy).toMatch(/^default-src '(none|self)'/)
    expect(policy).not.toMatch(/script-src[^;]*'unsafe/)
    for (const name of ['server', 'x-powered-by', 'strict-transport-security'])
      expect(headers[name], name).toBeUndefined()
  }
})

test('pages of ours run nothing, and the one that shows the interface runs its own scripts alone', async () => {
  const { app } = buildService()
  const policyOf = async (url: string) => (await app.inject(url)).headers['content-security-policy']
  for (const url of ['/', '/v1/segments/harrow-long-pound/sheet?vessel_class=cemt-iv', `${CURVE}&format=svg`])
    expect(await policyOf(url), url).not.toMatch(/script-src|default-src (?!'none')/)
  expect(await policyOf('/docs/')).toMatch(/^default-src 'self';/)
})

test('callers that come over TLS are told to keep to it', async () => {
  const { app } = buildTestApp([], { publicUrl: 'https://limits.example.org' })
  expect((await app.inject('/health/live')).headers['strict-transport-security']).toBe('max-age=15552000')
})

test('what is no HTTP at all is refused with neither version nor stack', async () => {
  const { app } = buildService()
  await app.listen({ host: '127.0.0.1', port: 0 })
  const socket = connect((app.server.address() as AddressInfo).port, '127.0.0.1')
  socket.end('\x16\x03\x01 hello\r\n\r\n')
  let text = ''
  socket.on('data', (piece: Buffer) => (text += piece.toString()))
  await once(socket, 'close')
  expect(text).toMatch(/^HTTP\/1\.1 400 Bad Request\r\n[\s\S]*x-content-type-options: nosniff/)
  expect(text).not.toMatch(/node|fastify|llhttp|\.js|at \S+:\d+/i)
})

test('names that every object has are refused, or are text like any other', async () => {
  const service = registryService()
  const url = '/v1/segments/a'
  const text = (properties: string) =>
    JSON.stringify(canal('a')).replace('"properties":{', `"properties":{${properties},`)
  for (const name of ['constructor', 'prototype', 'toString']) {
    const reply = await service.put(url, text(`"${name}":{"depth_m":1}`))
    expect([reply.statusCode, reply.json<{ code: string }>().code], name).toEqual([400, 'invalid-request'])
    expect((await service.get(`/v1/segments?${name}=1`)).statusCode, name).toBe(400)
  }
  const kept = await service.put(url, text('"attributes":{"constructor":"a","toString":"b"}'))
  expect(kept.statusCode, kept.body).toBe(201)
  expect((await service.get(url)).json()).toMatchObject({
    properties: { attributes: { constructor: 'a', toString: 'b' } },
  })
  // no field of anything: what is read leaves it out
  const polluting = await service.put(url, text('"attributes":{"__proto__":"x"}'), { 'if-match': '*' })
  expect(polluting.statusCode).toBe(200)
  expect((await service.get(url)).body).not.toContain('__proto__')
  const imported = await service.post('/v1/segments/import?unknown=keep', {
    type: 'FeatureCollection',
    features: [JSON.parse(text('"__proto__":{"polluted":1},"constructor":"c"'))],
  })
  expect(imported.statusCode, imported.body).toBe(200)
  expect(({} as Record<string, unknown>)['polluted']).toBeUndefined()
  expect((await service.get(url)).statusCode).toBe(200)
})
