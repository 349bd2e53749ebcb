import { describe, expect, test } from 'vitest'
import { installRateLimit, networkOf, RateLimiter } from '../../src/http/rate-limit.ts'
import { buildTestApp } from '../support/app.ts'
import { addKey, registryService } from '../support/registry-service.ts'
import { expectProblem } from '../support/service.ts'

describe('a limiter', () => {
  test('counts each caller in minutes that begin with its first request', () => {
    let now = 1000
    const limiter = new RateLimiter(2, () => now)
    expect(limiter.take('a')).toEqual({ isWithin: true, remaining: 1, reset: 60 })
    now += 12.5
    expect(limiter.take('a')).toEqual({ isWithin: true, remaining: 0, reset: 48 })
    expect(limiter.take('b')).toEqual({ isWithin: true, remaining: 1, reset: 60 })
    now += 47.4
    expect(limiter.take('a')).toEqual({ isWithin: false, remaining: 0, reset: 1 })
    now += 0.1
    expect(limiter.take('a')).toEqual({ isWithin: true, remaining: 1, reset: 60 })
  })

  test('remembers so many callers and no more', () => {
    const limiter = new RateLimiter(1, () => 0)
    limiter.take('first')
    for (let i = 0; i < 20_000; i += 1) limiter.take(`caller ${i}`)
    expect(limiter.take('first').isWithin).toBe(true)
    expect(limiter.take('caller 19999').isWithin).toBe(false)
  })
})

test.each([
  ['192.0.2.7', '192.0.2.7'],
  ['::ffff:192.0.2.7', '192.0.2.7'],
  ['2001:db8:1:2:3:4:5:6', '2001:db8:1:2::/64'],
  ['2001:0DB8::7', '2001:db8:0:0::/64'],
  ['2001:db8:1:2::', '2001:db8:1:2::/64'],
  ['::1', '0:0:0:0::/64'],
  ['fe80::1%eth0', 'fe80:0:0:0::/64'],
])('the address %s counts as %s', (address, network) => {
  expect(networkOf(address)).toBe(network)
})

/** A minute with three requests. */
const limited = (trustedProxies: readonly string[] = []) =>
  buildTestApp([(app) => void app.get('/thing', () => ({}))], {
    trustedProxies,
    install: (app) => {
      installRateLimit(app, new RateLimiter(3))
    },
  }).app

test('replies say what is left, and one too many is refused with the time to wait', async () => {
  const app = limited()
  for (const left of [2, 1, 0]) {
    const reply = await app.inject('/thing')
    expect(reply.statusCode).toBe(200)
    expect(reply.headers['ratelimit-policy']).toBe('"per-minute";q=3;w=60')
    expect(reply.headers.ratelimit).toBe(`"per-minute";r=${left};t=60`)
  }
  const refused = await app.inject('/thing')
  const { facts } = expectProblem(refused, 429, 'too-many-requests')
  expect(refused.headers.ratelimit).toBe('"per-minute";r=0;t=60')
  expect([refused.headers['retry-after'], facts]).toEqual(['60', { limit: 3, retry_after_s: 60 }])
  // another address is another caller, and health is told to everyone
  expect((await app.inject({ url: '/thing', remoteAddress: '192.0.2.9' })).statusCode).toBe(200)
  const live = await app.inject('/health/live')
  expect([live.statusCode, live.headers.ratelimit]).toEqual([200, undefined])
})

test('an address is that of the caller where a balancer vouches for it, and otherwise that of the connection', async () => {
  const from = (address: string) => ({ url: '/thing', headers: { 'x-forwarded-for': address } })
  const behind = limited(['127.0.0.0/8'])
  for (let i = 0; i < 6; i += 1) expect((await behind.inject(from(`192.0.2.${i % 2}`))).statusCode).toBe(200)
  expect((await behind.inject(from('192.0.2.0'))).statusCode).toBe(429)
  const alone = limited()
  for (let i = 0; i < 3; i += 1) await alone.inject(from(`192.0.2.${i}`))
  expect((await alone.inject(from('192.0.2.77'))).statusCode).toBe(429)
})

test('each key has a count of its own, and guessing keys counts for the address', async () => {
  const { app, get, service } = registryService({ ACCESS: 'keys', RATE_LIMIT_PER_MINUTE: '2' })
  const bearer = (key: string) => ({ authorization: `Bearer ${key}` })
  const [one, other] = [
    await addKey(service, { name: 'one', role: 'read' }),
    await addKey(service, { name: 'other', role: 'read' }),
  ]
  const statuses = async (key: string, times: number): Promise<number[]> => {
    const seen: number[] = []
    for (let i = 0; i < times; i += 1) seen.push((await get('/v1/segments', bearer(key))).statusCode)
    return seen
  }
  expect(await statuses(one, 3)).toEqual([200, 200, 429])
  expect(await statuses(other, 3)).toEqual([200, 200, 429])
  expect([await statuses('wl_a', 1), await statuses('wl_b', 1), await statuses('wl_c', 1)].flat()).toEqual([
    401, 401, 429,
  ])
  expect((await app.inject({ url: '/metrics', headers: bearer(one) })).statusCode).toBe(200)
})

test('without a limit no reply speaks of one', async () => {
  const reply = await registryService().get('/v1/segments')
  expect([reply.headers.ratelimit, reply.headers['ratelimit-policy']]).toEqual([undefined, undefined])
})
