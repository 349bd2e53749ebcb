import { describe, expect, test } from 'vitest'
import { canal, registryService, type Headers, type RegistryService } from '../support/registry-service.ts'
import { CANAL } from '../support/requests.ts'
import { expectProblem, faultsOf, type Json } from '../support/service.ts'

const OURS = '/v1/vessel-classes/ours'
const matching = (etag: string): Headers => ({ 'if-match': etag })

const LADEN = {
  length_m: 40,
  beam_m: 6,
  draught_m: 1.8,
  block_coefficient: 0.82,
  midship_coefficient: 0.97,
  entrance_length_m: 6,
}

/** A workboat of our own, with these fields on top. */
const workboat = (changes: Json = {}) => ({
  name: 'Our workboat',
  hull: 'displacement',
  dimensions: { laden: LADEN, empty: { ...LADEN, draught_m: 1.1 } },
  max_speed_kmh: 16,
  min_steerage_speed_kmh: 4,
  source: 'measured on the slipway',
  ...changes,
})

async function withOurs(): Promise<RegistryService> {
  const made = registryService()
  const reply = await made.put(OURS, workboat())
  expect(reply.statusCode, reply.body).toBe(201)
  return made
}

interface Answer {
  readonly vessel: Json
  readonly recommended_max_speed: { readonly through_water: { readonly mps: number } }
  readonly reproducibility: Json
}

describe('a class of our own', () => {
  test('is created with its place and its tag, and read as it was written', async () => {
    const { put, get } = registryService()
    const reply = await put(OURS, workboat())
    expect(reply.statusCode).toBe(201)
    expect(reply.headers).toMatchObject({ location: OURS, etag: '"1"', 'registry-revision': '1' })
    const body = reply.json<Json>()
    expect(body).toMatchObject({
      id: 'ours',
      name: 'Our workboat',
      built_in: false,
      revision: 1,
      loadings: ['laden', 'empty'],
      hull: 'displacement',
      dimensions: { laden: LADEN, empty: { ...LADEN, draught_m: 1.1 } },
      source: 'measured on the slipway',
    })
    // 16 km/h are 4.444… m/s, 4 km/h 1.111… m/s
    expect((body['max_speed'] as Json)['mps']).toBeCloseTo(40 / 9, 12)
    expect((body['min_steerage_speed'] as Json)['mps']).toBeCloseTo(10 / 9, 12)
    const read = await get(OURS)
    expect(read.json()).toEqual(body)
    expect(read.headers.etag).toBe('"1"')
  })

  test('stands in the list behind the built-in ones', async () => {
    const { get } = await withOurs()
    const { items } = (await get('/v1/vessel-classes?limit=1000')).json<{ items: Json[] }>()
    expect(items.filter(({ built_in }) => built_in === false).map(({ id }) => id)).toEqual(['ours'])
    expect(items).toHaveLength(25)
  })

  test('is read page by page with the others', async () => {
    const { get } = await withOurs()
    let next: string | undefined = '/v1/vessel-classes?limit=10'
    const seen: unknown[] = []
    while (next !== undefined) {
      const body: { items: Json[]; links: { rel: string; href: string }[] } = (await get(next)).json()
      seen.push(...body.items.map(({ id }) => id))
      next = body.links.find(({ rel }) => rel === 'next')?.href
    }
    expect(new Set(seen).size).toBe(25)
    expect(seen).toHaveLength(25)
    expect(seen).toContain('ours')
  })

  test('is replaced by its tag only: 428, 412, 200, and nothing when nothing changes', async () => {
    const { put, get } = await withOurs()
    const faster = workboat({ max_speed_kmh: 18 })
    expect(expectProblem(await put(OURS, faster), 428, 'revision-required').facts).toEqual({ current: 1 })
    const stale = expectProblem(await put(OURS, faster, matching('"7"')), 412, 'stale-revision')
    expect(stale.facts).toEqual({ current: 1 })
    const same = await put(OURS, workboat(), matching('"1"'))
    expect([same.statusCode, same.headers.etag, same.headers['registry-revision']]).toEqual([200, '"1"', '1'])
    const reply = await put(OURS, faster, matching('"1"'))
    expect([reply.statusCode, reply.headers.etag, reply.headers['registry-revision']]).toEqual([
      200,
      '"2"',
      '2',
    ])
    expect((await get(OURS)).json<{ max_speed: Json }>().max_speed['kmh']).toBeCloseTo(18, 12)
    expect((await put(OURS, workboat(), matching('*'))).headers.etag).toBe('"3"')
  })

  test('with If-Match is not created', async () => {
    const { put } = registryService()
    expectProblem(await put(OURS, workboat(), matching('*')), 404, 'vessel-class-not-found')
  })

  test('is deleted by its tag only: 428, 412, 204, 404', async () => {
    const { remove, get } = await withOurs()
    expect(expectProblem(await remove(OURS), 428, 'revision-required').facts).toEqual({ current: 1 })
    expectProblem(await remove(OURS, matching('"2"')), 412, 'stale-revision')
    const reply = await remove(OURS, matching('"1"'))
    expect([reply.statusCode, reply.body, reply.headers['registry-revision']]).toEqual([204, '', '2'])
    expectProblem(await remove(OURS, matching('"1"')), 404, 'vessel-class-not-found')
    expectProblem(await get(OURS), 404, 'vessel-class-not-found')
  })

  test('that was read can be written back as it came, which changes nothing', async () => {
    const { put, get } = await withOurs()
    const read = await get(OURS)
    const reply = await put(OURS, read.body, matching('"1"'))
    expect([reply.statusCode, reply.headers.etag, reply.body]).toEqual([200, '"1"', read.body])
  })

  test('cannot take the id of a built-in one, nor change or delete that', async () => {
    const { put, remove, get } = registryService()
    for (const headers of [{}, matching('"1"'), matching('*')]) {
      const put1 = await put('/v1/vessel-classes/cemt-iv', workboat(), headers)
      expect(expectProblem(put1, 409, 'built-in-class').facts).toEqual({ vessel_class: 'cemt-iv' })
      expectProblem(await remove('/v1/vessel-classes/cemt-iv', headers), 409, 'built-in-class')
    }
    expect((await get('/v1/vessel-classes/cemt-iv')).json()).toMatchObject({ built_in: true, revision: 1 })
  })

  test.each([
    ['nothing', {}, ['# one-of', '# one-of', '#/dimensions required', '#/hull required', '#/name required']], // prettier-ignore
    ['a wrong hull', workboat({ hull: 'submarine' }), ['#/hull not-in-list']],
    ['an unknown field', workboat({ colour: 'red' }), ['#/colour unknown-field']],
    ['a negative beam', workboat({ dimensions: { laden: { ...LADEN, beam_m: -6 } } }), ['#/dimensions/laden/beam_m out-of-range']], // prettier-ignore
    ['a speed in two units', workboat({ max_speed_kn: 9 }), ['#/max_speed_kmh one-of']],
  ])('of %s is refused with its faults', async (_what, body, faults) => {
    const { put, get } = registryService()
    const problem = expectProblem(await put(OURS, body), 400, 'invalid-request')
    expect(faultsOf(problem).sort()).toEqual(faults)
    expect((await get(OURS)).statusCode).toBe(404)
  })
})

describe('answers for a class of our own', () => {
  const REQUEST = { segment: CANAL, vessel: { class: 'ours' } }
  const speedOf = ({ recommended_max_speed }: Answer) => recommended_max_speed.through_water.mps

  test('equal those for its description, by every way to ask, and name its revision', async () => {
    const { put, get, post } = await withOurs()
    await put('/v1/segments/a', canal('a'))
    const described = await post('/v1/advisories', {
      segment: CANAL,
      vessel: { ...LADEN, hull: 'displacement', max_speed_kmh: 16, min_steerage_speed_kmh: 4 },
    })
    expect(described.statusCode, described.body).toBe(200)
    const expected = speedOf(described.json())
    const named = (await post('/v1/advisories', REQUEST)).json<Answer>()
    expect(named.vessel).toMatchObject({ class: 'ours', loading: 'laden', draught_m: 1.8 })
    expect(speedOf(named)).toBe(expected)
    expect(named.reproducibility).toMatchObject({ vessel_class_revision: 1 })
    const ofSegment = (await get('/v1/segments/a/advisory?vessel_class=ours')).json<Answer>()
    expect(speedOf(ofSegment)).toBe(expected)
    const { features } = (await get('/v1/advisories.geojson?vessel_class=ours')).json<{
      features: { properties: Json }[]
    }>()
    expect(features.map(({ properties }) => properties['max_through_water_mps'])).toEqual([expected])
    const matrix = await post('/v1/advisories/matrix', { segments: 'all', vessels: [{ class: 'ours' }] })
    expect(matrix.statusCode, matrix.body).toBe(200)
    expect((JSON.parse(matrix.body.split('\n')[0]!) as Json)['max_through_water_mps']).toBe(expected)
    for (const url of ['/?vessel_class=ours', '/v1/segments/a/sheet?vessel_class=ours']) {
      const page = await get(url)
      expect(page.statusCode).toBe(200)
      expect(page.body).toContain('Our workboat')
    }
  })

  test('follow the loading, and change at once with the class', async () => {
    const { put, get, post, remove } = await withOurs()
    await put('/v1/segments/a', canal('a'))
    const url = '/v1/segments/a/advisory?vessel_class=ours'
    const before = await get(url)
    const empty = (await get(`${url}&loading=empty`)).json<Answer>()
    expect(empty.vessel).toMatchObject({ loading: 'empty', draught_m: 1.1 })
    const held = { 'if-none-match': String(before.headers.etag) }
    expect((await get(url, held)).statusCode).toBe(304)
    const deeper = workboat({ dimensions: { laden: { ...LADEN, draught_m: 2.6 } } })
    await put(OURS, deeper, matching('"1"'))
    const after = await get(url, held)
    expect(after.statusCode).toBe(200)
    expect(after.json()).toMatchObject({
      vessel: { draught_m: 2.6 },
      reproducibility: { vessel_class_revision: 2 },
    })
    expect(speedOf(after.json())).toBeLessThan(speedOf(before.json()))
    await remove(OURS, matching('"2"'))
    expectProblem(await get(url, held), 404, 'vessel-class-not-found')
    expectProblem(await post('/v1/advisories', REQUEST), 404, 'vessel-class-not-found')
  })

  test('for a misspelt id name the nearest, ours included', async () => {
    const { post } = await withOurs()
    const reply = await post('/v1/advisories', { ...REQUEST, vessel: { class: 'ourz' } })
    expect(expectProblem(reply, 404, 'vessel-class-not-found').facts).toMatchObject({ nearest: 'ours' })
  })
})
