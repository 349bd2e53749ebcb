import { afterAll, expect, test } from 'vitest'
import { buildService, expectProblem, expectReply, faultsOf, type Json } from '../support/service.ts'

const { app, replyTo } = buildService(afterAll)

const IDS = [
  'cemt-i cemt-ii cemt-iii cemt-iv cemt-va cemt-vb cemt-via cemt-vib cemt-vic cemt-vii',
  'coaster handysize panamax passenger-vessel patrol-boat planing-boat',
  'recreational-ra recreational-rb recreational-rc recreational-rd',
  'tow-1-jumbo tow-15-jumbo tow-4-jumbo tug',
].flatMap((line) => line.split(' '))

interface Page {
  readonly items: (Json & { id: string })[]
  readonly links: { rel: string; href: string }[]
}

async function list(query = ''): Promise<Page> {
  const reply = await app.inject(`/v1/vessel-classes${query}`)
  return expectReply(reply, replyTo('GET', '/v1/vessel-classes')) as unknown as Page
}

test('the classes are those of the contract, in the order of their ids', async () => {
  const { items, links } = await list()
  expect(items.map(({ id }) => id)).toEqual(IDS)
  expect(links).toEqual([{ rel: 'self', href: '/v1/vessel-classes' }])
})

test('pages are cut at the limit and go on from the cursor', async () => {
  const first = await list('?limit=20')
  expect(first.items.map(({ id }) => id)).toEqual(IDS.slice(0, 20))
  const next = first.links.find(({ rel }) => rel === 'next')?.href.replace('/v1/vessel-classes', '')
  const second = await list(next)
  expect(second.items.map(({ id }) => id)).toEqual(IDS.slice(20))
  expect(second.links.map(({ rel }) => rel)).toEqual(['self'])
})

test.each(IDS)('%s is shown with its figures and where they come from', async (id) => {
  const reply = await app.inject(`/v1/vessel-classes/${id}`)
  const found = expectReply(reply, replyTo('GET', '/v1/vessel-classes/:id'))
  expect(found).toMatchObject({ id, built_in: true, revision: 1 })
  expect(reply.headers.etag).toBe('"1"')
  const { dimensions, basis, loadings } = found as {
    dimensions: { laden: Json; empty?: Json }
    basis: Json
    loadings: string[]
  }
  expect(loadings).toEqual(dimensions.empty ? ['laden', 'empty'] : [])
  for (const field of Object.keys(dimensions.laden)) expect(basis).toHaveProperty([field])
})

test('a class has the figures of the tables', async () => {
  expect((await app.inject('/v1/vessel-classes/cemt-va')).json()).toMatchObject({
    hull: 'displacement',
    dimensions: {
      laden: { length_m: 110, beam_m: 11.4, draught_m: 3.5, block_coefficient: 0.88, entrance_length_m: 22 },
      empty: { draught_m: 1.3, block_coefficient: 0.8 },
    },
    max_speed: { kmh: 20 },
    min_steerage_speed: { kmh: 5 },
    basis: { length_m: 'standard', draught_m: 'standard', block_coefficient: 'typical' },
  })
})

test('a class that does not exist is 404 with the nearest', async () => {
  const problem = expectProblem(await app.inject('/v1/vessel-classes/cemt-8'), 404, 'vessel-class-not-found')
  expect(problem.facts).toMatchObject({ vessel_class: 'cemt-8' })
  expect(problem.facts?.['nearest']).toMatch(/^cemt-/)
})

test.each(['constructor', 'toString', 'hasOwnProperty', 'valueOf'])('%s is no class', async (id) => {
  expectProblem(await app.inject(`/v1/vessel-classes/${id}`), 404, 'vessel-class-not-found')
})

test('the one form that there is can be asked for, and no other', async () => {
  for (const url of ['/v1/vessel-classes', '/v1/vessel-classes/tug']) {
    expect((await app.inject(`${url}?format=json`)).statusCode).toBe(200)
    const csv = expectProblem(await app.inject(`${url}?format=csv`), 400, 'invalid-request')
    expect(faultsOf(csv)).toEqual(['format not-in-list'])
    expectProblem(await app.inject({ url, headers: { accept: 'text/csv' } }), 406, 'not-acceptable')
  }
})
