import { describe, expect, test } from 'vitest'
import { readConfig } from '../../src/config.ts'
import {
  addKey,
  canal,
  collection,
  registryService,
  type Headers,
  type RegistryService,
} from '../support/registry-service.ts'
import { expectProblem, type Json } from '../support/service.ts'
import { PLAIN } from '../support/requests.ts'

const bearer = (key: string): Headers => ({ authorization: `Bearer ${key}` })
const basic = (user: string, key: string): Headers => ({
  authorization: `Basic ${Buffer.from(`${user}:${key}`).toString('base64')}`,
})

interface Keyed extends RegistryService {
  readonly read: string
  readonly write: string
  readonly publish: string
}

async function keyed(environment: Readonly<Record<string, string>> = {}): Promise<Keyed> {
  const made = registryService({ ACCESS: 'keys', DEMO: 'true', ...environment })
  const [read, write, publish] = [
    await addKey(made.service, { name: 'reader', role: 'read' }),
    await addKey(made.service, { name: 'surveyor', role: 'write' }),
    await addKey(made.service, { name: 'authority', role: 'publish' }),
  ]
  return { ...made, read, write, publish }
}

const QUERY = 'vessel_class=cemt-ii'
const SHEET = `/v1/segments/harrow-long-pound/sheet?${QUERY}`

const READ_URLS = [
  '/v1/segments',
  '/v1/segments/harrow-long-pound',
  '/v1/segments/harrow-long-pound/revisions',
  `/v1/segments/harrow-long-pound/advisory?${QUERY}`,
  `/v1/segments/harrow-long-pound/speed-curve?${QUERY}&points=5`,
  `/v1/advisories.geojson?${QUERY}`,
  '/v1/vessel-classes',
  '/v1/vessel-classes/cemt-iv',
]

describe('with access by keys', () => {
  test('a request without a key, or with one that nobody was given, is 401 without a hint for browsers', async () => {
    const { get, post, put, remove } = await keyed()
    const unknown = [
      {},
      bearer('wl_unknown'),
      bearer(''),
      { authorization: 'Bearer' },
      { authorization: 'wl_unknown' },
    ]
    for (const headers of unknown) {
      for (const reply of [
        ...(await Promise.all(READ_URLS.map((url) => get(url, headers)))),
        await post('/v1/advisories', PLAIN, headers),
        await put('/v1/segments/a', canal('a'), headers),
        await remove('/v1/segments/harrow-long-pound', { ...headers, 'if-match': '*' }),
      ]) {
        expect(expectProblem(reply, 401, 'key-required').detail).toContain('Authorization: Bearer')
        expect(reply.headers['www-authenticate']).toBeUndefined()
      }
    }
  })

  test('a path that is not there, or a method that it lacks, is told as such with and without a key', async () => {
    const { app, get, read } = await keyed()
    for (const headers of [{}, bearer(read)]) {
      expectProblem(await get('/v1/nothing', headers), 404, 'route-not-found')
      const patch = await app.inject({ method: 'PATCH', url: '/v1/segments', headers })
      expectProblem(patch, 405, 'method-not-allowed')
    }
  })

  test('a body is refused before it is read', async () => {
    const { post } = await keyed()
    expectProblem(await post('/v1/advisories', '{"not json'), 401, 'key-required')
  })

  test('a key that may read gets everything and asks for advisories, and writes nothing', async () => {
    const { app, get, post, put, remove, read } = await keyed()
    const headers = bearer(read)
    for (const url of READ_URLS) expect((await get(url, headers)).statusCode, url).toBe(200)
    expect((await app.inject({ method: 'HEAD', url: '/v1/segments', headers })).statusCode).toBe(200)
    expect((await post('/v1/advisories', PLAIN, headers)).statusCode).toBe(200)
    const effects = await post(
      '/v1/effects',
      { ...PLAIN, speed_kmh: 8, speed_reference: 'through-water' },
      headers,
    )
    expect(effects.statusCode, effects.body).toBe(200)
    const matrix = { segments: 'all', vessels: [{ class: 'cemt-ii' }] }
    expect((await post('/v1/advisories/matrix', matrix, headers)).statusCode).toBe(200)
    const lines = await post('/v1/advisories/stream', `${JSON.stringify(PLAIN)}\n`, {
      ...headers,
      'content-type': 'application/x-ndjson',
    })
    expect(lines.statusCode).toBe(200)
    for (const reply of [
      await put('/v1/segments/a', canal('a'), headers),
      await remove('/v1/segments/harrow-long-pound', { ...headers, 'if-match': '*' }),
      await post('/v1/segments/import', collection(canal('a')), headers),
      await post('/v1/segments/import?dry_run=true', collection(canal('a')), headers),
      await put('/v1/vessel-classes/ours', {}, headers),
      await remove('/v1/vessel-classes/ours', headers),
    ]) {
      expect(expectProblem(reply, 403, 'role-too-small').facts).toEqual({ needed: 'write', role: 'read' })
    }
    expect((await get('/v1/segments', headers)).headers['registry-revision']).toBe('1')
  })

  test.each(['write', 'publish'] as const)('a key that may %s reads and writes', async (role) => {
    const service = await keyed()
    const headers = bearer(service[role])
    const name = role === 'write' ? 'surveyor' : 'authority'
    expect((await service.get('/v1/segments', headers)).statusCode).toBe(200)
    expect((await service.put('/v1/segments/a', canal('a'), headers)).statusCode).toBe(201)
    expect((await service.post('/v1/segments/import', collection(canal('b')), headers)).statusCode).toBe(200)
    const revisions = await service.get('/v1/segments/a/revisions', headers)
    expect(revisions.json<{ items: Json[] }>().items.map(({ key }) => key)).toEqual([name])
    const reply = await service.remove('/v1/segments/a', { ...headers, 'if-match': '"1"' })
    expect(reply.statusCode).toBe(204)
  })

  test('the scheme is read in either letter case', async () => {
    const { get, read } = await keyed()
    expect((await get('/v1/segments', { authorization: `bearer ${read}` })).statusCode).toBe(200)
  })

  test.each([
    '/health/live',
    '/health/ready',
    '/openapi.json',
    '/docs/',
    '/v1/problems',
    '/v1/problems/key-required',
  ])('%s is open to everyone, with any key or none', async (url) => {
    const { get } = await keyed()
    expect((await get(url)).statusCode).toBe(200)
    expect((await get(url, bearer('wl_unknown'))).statusCode).toBe(200)
  })

  test('no spelling of a path gets around the key', async () => {
    const { get } = await keyed()
    for (const url of [
      '/v1/problems/../segments',
      '/health/../v1/segments',
      '/docs/..%2f..%2fv1/segments',
      '//v1/segments',
      '/v1//segments',
      '/v1/segments/',
      '/v1/segments?x=/health/',
      '/V1/segments',
      '/v1/segments#/health/live',
      '/%76%31/segments',
    ]) {
      const reply = await get(url)
      expect(reply.statusCode, `${url}: ${reply.body.slice(0, 200)}`).not.toBe(200)
      expect(reply.body).not.toContain('harrow')
    }
  })
})

describe('pages', () => {
  test.each(['/', SHEET])(
    '%s asks a browser for the key and takes it as password of any user',
    async (url) => {
      const { get, read } = await keyed()
      const bare = await get(url)
      expectProblem(bare, 401, 'key-required')
      expect(bare.headers['www-authenticate']).toMatch(/^Basic realm="[^"]+", charset="UTF-8"$/)
      const wrong = await get(url, basic('anyone', 'wl_unknown'))
      expectProblem(wrong, 401, 'key-required')
      expect(wrong.headers['www-authenticate']).toMatch(/^Basic /)
      for (const headers of [basic('anyone', read), basic('', read), bearer(read)]) {
        const reply = await get(url, headers)
        expect(reply.statusCode, reply.body.slice(0, 500)).toBe(200)
        expect(reply.headers['content-type']).toBe('text/html; charset=utf-8')
        expect(reply.headers['www-authenticate']).toBeUndefined()
      }
    },
  )

  test('alone take Basic: nothing else does, nor asks for it', async () => {
    const { get, put, read, write } = await keyed()
    for (const url of READ_URLS) {
      const reply = await get(url, basic('anyone', read))
      expectProblem(reply, 401, 'key-required')
      expect(reply.headers['www-authenticate']).toBeUndefined()
    }
    expectProblem(await put('/v1/segments/a', canal('a'), basic('anyone', write)), 401, 'key-required')
  })

  test('take no password that is not Base64 of a user and a key', async () => {
    const { get, read } = await keyed()
    for (const authorization of ['Basic', 'Basic ', `Basic ${read}`, 'Basic ====', 'Digest x']) {
      expectProblem(await get('/', { authorization }), 401, 'key-required')
    }
  })
})

describe('a key', () => {
  test('that is revoked is refused at once', async () => {
    const { get, service, read, write } = await keyed()
    expect((await get('/v1/segments', bearer(read))).statusCode).toBe(200)
    expect(await service.store.revokeKey('reader', service.now())).toBe(true)
    expectProblem(await get('/v1/segments', bearer(read)), 401, 'key-required')
    expectProblem(await get('/', basic('anyone', read)), 401, 'key-required')
    expect((await get('/v1/segments', bearer(write))).statusCode).toBe(200)
  })

  test('that is added is taken at once, and not beyond its day', async () => {
    const { get, service } = await keyed()
    const soon = new Date(Date.now() + 600_000).toISOString()
    const valid = await addKey(service, { name: 'guest', role: 'read', expires: soon })
    const past = new Date(Date.now() - 1).toISOString()
    const expired = await addKey(service, { name: 'former', role: 'write', expires: past })
    expect((await get('/v1/segments', bearer(valid))).statusCode).toBe(200)
    expectProblem(await get('/v1/segments', bearer(expired)), 401, 'key-required')
  })

  test('is in no line of the log and in no reply, whether it is taken or not', async () => {
    const { get, put, logged, read, write } = await keyed()
    const stranger = 'wl_stranger-9f2c7d41'
    const replies = [
      await get('/v1/segments', bearer(read)),
      await get('/v1/nothing', bearer(read)),
      await get('/', basic('anyone', read)),
      await get('/', basic('anyone', stranger)),
      await get('/v1/segments', bearer(stranger)),
      await put('/v1/segments/a', canal('a'), bearer(write)),
      await put('/v1/segments/b', canal('b'), bearer(read)),
      await put('/v1/segments/b', '{"broken', bearer(write)),
    ]
    expect(replies.map(({ statusCode }) => statusCode)).toEqual([200, 404, 200, 401, 401, 201, 403, 400])
    expect(logged.length).toBeGreaterThanOrEqual(8)
    const text = [...logged, ...replies.map(({ body, headers }) => JSON.stringify(headers) + body)].join('\n')
    for (const key of [read, write, stranger]) {
      for (const form of [key, Buffer.from(`anyone:${key}`).toString('base64')]) {
        expect(text).not.toContain(form)
      }
    }
  })
})

describe('access that is not set', () => {
  test.each([
    [undefined, 'open'],
    ['127.0.0.1', 'open'],
    ['localhost', 'open'],
    ['::1', 'open'],
    ['0.0.0.0', 'keys'],
    ['::', 'keys'],
    ['192.168.1.7', 'keys'],
    ['limits.example.org', 'keys'],
    ['127.0.0.1.example.org', 'keys'],
  ])('on the host %s is by %s', (host, access) => {
    expect(readConfig({ HOST: host }).access).toBe(access)
  })

  test('is as the setting says on every host', () => {
    expect(readConfig({ HOST: '0.0.0.0', ACCESS: 'open' }).access).toBe('open')
    expect(readConfig({ HOST: '127.0.0.1', ACCESS: 'keys' }).access).toBe('keys')
  })

  test('asks nobody for a key on a loopback address, and names no key in revisions', async () => {
    const { get, put } = registryService()
    expect((await put('/v1/segments/a', canal('a'))).statusCode).toBe(201)
    expect((await get('/')).statusCode).toBe(200)
    expect((await put('/v1/segments/b', canal('b'), bearer('wl_unknown'))).statusCode).toBe(201)
  })
})

describe('pages of other origins', () => {
  const ORIGIN = 'https://map.example.org'
  const SETTING = { CORS_ORIGINS: `${ORIGIN}, https://desk.example.org/` }
  const PREFLIGHT = {
    'access-control-request-method': 'PUT',
    'access-control-request-headers': 'authorization,content-type,if-match',
  }
  const allowed = (headers: object) => (headers as Headers)['access-control-allow-origin']

  test('are let in from the configured origins alone', async () => {
    const { get, read } = await keyed(SETTING)
    for (const origin of [ORIGIN, 'https://desk.example.org']) {
      const reply = await get('/v1/segments', { ...bearer(read), origin })
      expect(reply.statusCode).toBe(200)
      expect(allowed(reply.headers)).toBe(origin)
      expect(reply.headers['access-control-expose-headers']).toContain('etag')
      expect(String(reply.headers.vary)).toContain('Origin')
      expect(String(reply.headers.vary)).toContain('Accept, Authorization')
    }
    for (const origin of [
      'https://other.example.org',
      'http://map.example.org',
      `${ORIGIN}.evil.org`,
      'null',
    ]) {
      const reply = await get('/v1/segments', { ...bearer(read), origin })
      expect(allowed(reply.headers)).toBeUndefined()
    }
  })

  test('may ask beforehand, without a key, whether they may write', async () => {
    const { app } = await keyed(SETTING)
    const reply = await app.inject({
      method: 'OPTIONS',
      url: '/v1/segments/a',
      headers: { origin: ORIGIN, ...PREFLIGHT },
    })
    expect(reply.statusCode).toBe(204)
    expect(allowed(reply.headers)).toBe(ORIGIN)
    expect(String(reply.headers['access-control-allow-methods'])).toContain('PUT')
    expect(String(reply.headers['access-control-allow-headers'])).toContain('if-match')
  })

  test('can read why they were refused', async () => {
    const { get } = await keyed(SETTING)
    const reply = await get('/v1/segments', { origin: ORIGIN })
    expect([reply.statusCode, reply.json<Json>()['code']]).toEqual([401, 'key-required'])
    expect(allowed(reply.headers)).toBe(ORIGIN)
  })

  test('are kept out by browsers when none is configured', async () => {
    const { app, get } = registryService()
    const reply = await get('/v1/segments', { origin: ORIGIN })
    expect(allowed(reply.headers)).toBeUndefined()
    expect(reply.headers.vary).toBe('Accept, Authorization')
    const asked = await app.inject({
      method: 'OPTIONS',
      url: '/v1/segments/a',
      headers: { origin: ORIGIN, ...PREFLIGHT },
    })
    expect(allowed(asked.headers)).toBeUndefined()
  })
})
