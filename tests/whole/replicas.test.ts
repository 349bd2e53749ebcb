import { beforeEach, describe, expect, inject, test } from 'vitest'
import { emptyDatabase } from '../support/postgres.ts'
import { addKey, canal, registryService, type RegistryService } from '../support/registry-service.ts'
import { expectProblem, type Json } from '../support/service.ts'

/** Numbers from 0 to 1, the same in every run (Park and Miller). */
function randomNumbers(seed: number): () => number {
  let state = seed
  return () => {
    state = (state * 48271) % 2147483647
    return state / 2147483647
  }
}

interface Shown {
  readonly features: { readonly id: string; readonly properties: Json }[]
}

describe('two replicas on one database', () => {
  let url: string

  beforeEach(async () => {
    url = await emptyDatabase(inject('postgresUrl'))
  })

  const replica = (environment: Readonly<Record<string, string>> = {}): RegistryService =>
    registryService({ DATABASE_URL: url, ...environment })

  test('show 100 writes through one in the very next answer of the other', async () => {
    const [one, other] = [replica(), replica()]
    expect((await other.get('/v1/segments')).json()).toMatchObject({ numberMatched: 0 })
    const random = randomNumbers(20261201)
    const expected = new Map<string, number>()
    for (let i = 1; i <= 100; i++) {
      const [writer, reader] = random() < 0.5 ? [one, other] : [other, one]
      const id = `s${Math.floor(random() * 8)}`
      const depth_m = 2 + i / 100
      const path = `/v1/segments/${id}`
      if (expected.has(id) && random() < 0.25) {
        expect((await writer.remove(path, { 'if-match': '*' })).statusCode).toBe(204)
        expected.delete(id)
      } else {
        const headers: Record<string, string> = expected.has(id) ? { 'if-match': '*' } : {}
        const reply = await writer.put(path, canal(id, { depth_m }), headers)
        expect(reply.statusCode, reply.body).toBe(expected.has(id) ? 200 : 201)
        expected.set(id, depth_m)
      }
      const seen = await reader.get('/v1/segments')
      expect(seen.headers['registry-revision']).toBe(String(i))
      const shown = seen
        .json<Shown>()
        .features.map(({ id: name, properties }) => [name, properties['depth_m']])
      expect(shown).toEqual([...expected].sort(([a], [b]) => (a < b ? -1 : 1)))
    }
    expect(expected.size).toBeGreaterThan(3)
  })

  test('let one of two writers with the same tag through, and refuse the other', async () => {
    const [one, other] = [replica(), replica()]
    await one.put('/v1/segments/a', canal('a'))
    for (let round = 1; round <= 10; round++) {
      const replies = await Promise.all(
        [one, other].map((service, i) =>
          service.put('/v1/segments/a', canal('a', { depth_m: 4 + round + i / 2 }), {
            'if-match': `"${round}"`,
          }),
        ),
      )
      expect(replies.map(({ statusCode }) => statusCode).sort()).toEqual([200, 412])
      const winner = replies.find(({ statusCode }) => statusCode === 200)!
      const loser = replies.find(({ statusCode }) => statusCode === 412)!
      expect(winner.headers.etag).toBe(`"${round + 1}"`)
      expect(expectProblem(loser, 412, 'stale-revision').facts).toEqual({ current: round + 1 })
      for (const service of [one, other]) {
        const kept = (await service.get('/v1/segments/a')).json<{ properties: Json }>().properties
        expect(kept).toEqual(winner.json<{ properties: Json }>().properties)
      }
    }
  })

  test('let one of two creators through', async () => {
    const [one, other] = [replica(), replica()]
    const replies = await Promise.all(
      [one, other].map((service, i) => service.put('/v1/segments/a', canal('a', { depth_m: 4 + i }))),
    )
    expect(replies.map(({ statusCode }) => statusCode).sort()).toEqual([201, 428])
  })

  test('give one tag for an advisory, and both another after a write through either', async () => {
    const [one, other] = [replica(), replica()]
    await one.put('/v1/segments/a', canal('a'))
    const advisory = '/v1/segments/a/advisory?vessel_class=cemt-iv'
    const first = await one.get(advisory)
    const held = { 'if-none-match': String(first.headers.etag) }
    expect((await other.get(advisory, held)).statusCode).toBe(304)
    await other.put('/v1/segments/a', canal('a', { depth_m: 5 }), { 'if-match': '"1"' })
    const [here, there] = [await one.get(advisory, held), await other.get(advisory, held)]
    expect([here.statusCode, there.statusCode]).toEqual([200, 200])
    expect(here.headers.etag).toBe(there.headers.etag)
    expect(here.body).toBe(there.body)
  })

  test('both take a new key and refuse a revoked one at once', async () => {
    const [one, other] = [replica({ ACCESS: 'keys' }), replica({ ACCESS: 'keys' })]
    for (const [i, through] of [one, other, one].entries()) {
      const name = `key-${i}`
      const key = await addKey(through.service, { name, role: 'read' })
      const headers = { authorization: `Bearer ${key}` }
      for (const service of [one, other])
        expect((await service.get('/v1/segments', headers)).statusCode).toBe(200)
      expect(await through.service.store.revokeKey(name, through.service.now())).toBe(true)
      for (const service of [other, one]) {
        expectProblem(await service.get('/v1/segments', headers), 401, 'key-required')
      }
    }
  })

  test('tell that they are ready on PostgreSQL at the same revision', async () => {
    const [one, other] = [replica(), replica()]
    await one.put('/v1/segments/a', canal('a'))
    for (const service of [one, other]) {
      const ready = await service.get('/health/ready')
      expect(ready.statusCode).toBe(200)
      expect(ready.json()).toMatchObject({ status: 'ready', database: 'postgres', registry_revision: 1 })
    }
  })
})
