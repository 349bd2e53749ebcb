import { afterAll, expect, test } from 'vitest'
import { PLAIN } from '../support/requests.ts'
import { buildService, expectProblem, expectReply, faultsOf, post, type Json } from '../support/service.ts'

const { app, replyTo } = buildService(afterAll)

interface Method {
  readonly id: string
  readonly kind: string
  readonly range: { quantity: string; min?: number; max?: number }[]
  readonly reference: string
}

interface Page {
  readonly items: Method[]
  readonly links: { rel: string; href: string }[]
}

async function list(query = ''): Promise<Page> {
  return expectReply(
    await app.inject(`/v1/methods${query}`),
    replyTo('GET', '/v1/methods'),
  ) as unknown as Page
}

const WAVES =
  'bhowmik-1991 blaauw-1984 gates-herbich-1977 kriebel-seelig-2005 maynord-2005 rock-manual-2007 weggel-sorensen-1986'
const SQUAT =
  'barrass-1979 barrass-2004 eryuzlu-1994 huuska-1976 icorels-1980 norrbin-1986 romisch-1989 schijf-drawdown tuck-1966 yoshimura-1986'

test.each([
  ['wave-height', WAVES],
  ['squat', SQUAT],
])('the methods of kind %s are those of the contract', async (kind, ids) => {
  const { items } = await list(`?kind=${kind}`)
  expect(items.map(({ id }) => id).join(' ')).toBe(ids)
  expect(new Set(items.map((item) => item.kind))).toEqual(new Set([kind]))
})

test('every kind of method has one at least, and the kinds together are all of them', async () => {
  const kinds = ['wave-height', 'squat', 'primary-wave', 'critical-speed', 'wake-geometry', 'bank-stability']
  const { items } = await list()
  expect(new Set(items.map(({ kind }) => kind))).toEqual(new Set(kinds))
  expect(items.map(({ id }) => id)).toEqual(items.map(({ id }) => id).sort())
})

test('every method can be opened, with a law, quantities and something to read', async () => {
  const { items } = await list()
  for (const item of items) {
    const found = expectReply(await app.inject(`/v1/methods/${item.id}`), replyTo('GET', '/v1/methods/:id'))
    expect(found).toEqual(item)
    expect((found['law'] as string).length).toBeGreaterThan(10)
    expect((found['quantities'] as Json[]).length).toBeGreaterThan(0)
    expect(item.reference).toMatch(/\d{4}/)
    for (const { min, max } of item.range)
      if (min !== undefined && max !== undefined) expect(min).toBeLessThan(max)
  }
})

test('every method that an advisory names can be opened', async () => {
  const reply = (await post(app, '/v1/advisories', PLAIN)).json<Record<string, Method[]>>()
  const named = [...reply['wave_methods']!, ...reply['squat_methods']!]
  expect(named).toHaveLength(17)
  for (const { id, reference } of named) {
    expect((await app.inject(`/v1/methods/${id}`)).json()).toMatchObject({ id, reference })
  }
})

test('pages are cut at the limit and keep the kind', async () => {
  const first = await list('?kind=squat&limit=3')
  expect(first.items).toHaveLength(3)
  expect(first.links[1]?.href).toMatch(/^\/v1\/methods\?kind=squat&limit=3&cursor=/)
})

test('a method that does not exist is 404 with the nearest, and a kind that does not 400', async () => {
  const unknown = expectProblem(await app.inject('/v1/methods/barrass-1980'), 404, 'method-not-found')
  expect(unknown.facts).toEqual({ method_id: 'barrass-1980', nearest: 'barrass-1979' })
  expectProblem(await app.inject('/v1/methods/constructor'), 404, 'method-not-found')
  const wrong = expectProblem(await app.inject('/v1/methods?kind=waves'), 400, 'invalid-request')
  expect(faultsOf(wrong)).toEqual(['kind not-in-list'])
})

test('the one form that there is can be asked for, and no other', async () => {
  for (const url of ['/v1/methods', '/v1/methods/barrass-1979']) {
    expect((await app.inject(`${url}?format=json`)).statusCode).toBe(200)
    expectProblem(await app.inject({ url, headers: { accept: 'text/csv' } }), 406, 'not-acceptable')
  }
})
