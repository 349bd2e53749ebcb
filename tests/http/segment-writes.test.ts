import { describe, expect, test } from 'vitest'
import {
  canal,
  CANAL_FEATURE,
  registryService,
  type Headers,
  type RegistryService,
} from '../support/registry-service.ts'
import { expectProblem, faultsOf, type Json } from '../support/service.ts'

const URL_A = '/v1/segments/a'
const matching = (etag: string): Headers => ({ 'if-match': etag })

interface Feature {
  readonly id: string
  readonly properties: Json
}

/** The segment `a`, written as often as there are depths: each is a revision. */
async function withRevisions(depths: readonly number[]): Promise<RegistryService> {
  const made = registryService()
  for (const [i, depth_m] of depths.entries()) {
    const reply = await made.put(URL_A, canal('a', { depth_m }), i > 0 ? matching(`"${i}"`) : {})
    expect(reply.statusCode).toBe(i > 0 ? 200 : 201)
  }
  return made
}

const listed = (body: unknown) => (body as { items: Json[] }).items

describe('putting a segment', () => {
  test('that is new answers 201 with its place, its tag and what the registry adds', async () => {
    const { put, get } = registryService()
    const reply = await put(URL_A, canal('a'))
    expect(reply.statusCode).toBe(201)
    expect(reply.headers).toMatchObject({
      location: '/v1/segments/a',
      etag: '"1"',
      'registry-revision': '1',
      'content-type': 'application/geo+json; charset=utf-8',
    })
    const body = reply.json<Feature & { bbox: number[] }>()
    expect(body).toMatchObject({
      type: 'Feature',
      id: 'a',
      bbox: [3, 54, 3.02, 54.001],
      geometry: CANAL_FEATURE.geometry,
      properties: { name: 'Canal', depth_m: 4, width_m: 60, bank_distance_m: 30, revision: 1 },
    })
    // 0.02 degrees of longitude at 54 degrees north are 1312 m, the second half a little slanted
    expect(body.properties['length_m']).toBeGreaterThan(1312)
    expect(body.properties['length_m']).toBeLessThan(1330)
    expect((await get(URL_A)).json()).toEqual(body)
  })

  test('takes the id from the path when the feature has none, and GeoJSON as a media type', async () => {
    const { put } = registryService()
    const reply = await put(URL_A, CANAL_FEATURE, { 'content-type': 'application/geo+json' })
    expect(reply.statusCode).toBe(201)
    expect(reply.json<Feature>().id).toBe('a')
  })

  test('that exists is 428 without If-Match, 412 with a stale one, and both tell the current revision', async () => {
    const { put, get } = await withRevisions([4, 5])
    const bare = expectProblem(await put(URL_A, canal('a', { depth_m: 6 })), 428, 'revision-required')
    expect(bare.facts).toEqual({ current: 2 })
    const stale = await put(URL_A, canal('a', { depth_m: 6 }), matching('"1"'))
    expect(expectProblem(stale, 412, 'stale-revision').facts).toEqual({ current: 2 })
    const future = await put(URL_A, canal('a', { depth_m: 6 }), matching('"3"'))
    expectProblem(future, 412, 'stale-revision')
    const kept = await get(URL_A)
    expect(kept.json<Feature>().properties).toMatchObject({ depth_m: 5, revision: 2 })
    expect(kept.headers['registry-revision']).toBe('2')
  })

  test('is replaced by If-Match with its tag, strong or weak, and with a star', async () => {
    const { put } = await withRevisions([4])
    const tags = ['"1"', 'W/"2"', '*', ' "4" ']
    for (const [i, tag] of tags.entries()) {
      const reply = await put(URL_A, canal('a', { depth_m: 5 + i }), matching(tag))
      expect([reply.statusCode, reply.headers.etag, reply.headers.location]).toEqual([
        200,
        `"${i + 2}"`,
        undefined,
      ])
      expect(reply.json<Feature>().properties['depth_m']).toBe(5 + i)
    }
  })

  test.each(['"*"', '1', '"1", "2"', '"x"', ''])(
    'refuses If-Match %j, which is no tag of a segment',
    async (tag) => {
      const { put } = await withRevisions([4])
      const problem = expectProblem(
        await put(URL_A, canal('a', { depth_m: 5 }), matching(tag)),
        400,
        'invalid-request',
      )
      expect(faultsOf(problem)).toEqual(['if-match pattern'])
    },
  )

  test('with If-Match makes none: there is nothing to replace', async () => {
    const { put, get } = registryService()
    expectProblem(await put(URL_A, canal('a'), matching('*')), 404, 'segment-not-found')
    expectProblem(await put(URL_A, canal('a'), matching('"1"')), 404, 'segment-not-found')
    expect((await get('/v1/segments')).json()).toMatchObject({ numberMatched: 0 })
  })

  test('without a change makes no revision, and what was read can be written back as it came', async () => {
    const { put, get } = registryService()
    const properties = {
      waterway: 'Test water',
      posted_limits: [{ speed_kmh: 8, applies_to: { loading: 'laden' } }],
      receptors: [{ kind: 'moored-small-craft', side: 'nearer', distance_m: 20 }],
      attributes: { inspector: 'ours', year: 2026, checked: true },
    }
    await put(URL_A, canal('a', properties))
    const read = await get(URL_A)
    const reply = await put(URL_A, read.body, matching(String(read.headers.etag)))
    expect([reply.statusCode, reply.headers.etag, reply.headers['registry-revision']]).toEqual([
      200,
      '"1"',
      '1',
    ])
    expect(reply.body).toBe(read.body)
    expect(listed((await get(`${URL_A}/revisions`)).json())).toHaveLength(1)
  })

  test('ignores what replies add, whatever it says', async () => {
    const { put } = registryService()
    const added = { revision: 77, updated: 'never', length_m: -1, bbox: 'none' }
    const reply = await put(URL_A, { ...canal('a', added), bbox: [1, 2, 3, 4] })
    expect(reply.statusCode).toBe(201)
    const body = reply.json<Feature & { bbox: number[] }>()
    expect(body.bbox).toEqual([3, 54, 3.02, 54.001])
    expect(body.properties['revision']).toBe(1)
    expect(body.properties['updated']).toMatch(/^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z$/)
    expect(body.properties).not.toHaveProperty('bbox')
  })

  test('under another id than that of the feature is refused', async () => {
    const { put, get } = registryService()
    const problem = expectProblem(await put(URL_A, canal('b')), 400, 'invalid-request')
    expect(faultsOf(problem)).toEqual(['#/id clash'])
    expect((await get('/v1/segments')).json()).toMatchObject({ numberMatched: 0 })
  })

  test('is refused with all of its faults at once, each with its place', async () => {
    const { put } = registryService()
    const wrong = canal('a', { depth_m: 'deep', widht_m: 3, confinement: 'wide' })
    const problem = expectProblem(
      await put(URL_A, { ...wrong, geometry: { type: 'Point', coordinates: [3, 54] } }),
      400,
      'invalid-request',
    )
    expect(faultsOf(problem).sort()).toEqual([
      '#/geometry/type wrong-type',
      '#/properties/confinement not-in-list',
      '#/properties/depth_m wrong-type',
      '#/properties/widht_m unknown-field',
    ])
    const unknown = problem.errors?.find(({ code }) => code === 'unknown-field')
    expect(unknown?.allowed?.[0]).toBe('width_m')
  })

  test('of figures that cannot be together is 422 with both figures', async () => {
    const { put } = registryService()
    const problem = expectProblem(
      await put(URL_A, canal('a', { bank_distance_m: 31 })),
      422,
      'impossible-input',
    )
    expect(faultsOf(problem)).toEqual(['#/properties/bank_distance_m clash'])
    expect(problem.errors?.[0]?.facts).toEqual({ bank_distance_m: 31, half_width_m: 30 })
  })

  test.each([
    ['not JSON', '{"type":', {}, 400, 'malformed-json'],
    ['a list', '[]', {}, 400, 'invalid-request'],
    ['text', 'a,b', { 'content-type': 'text/csv' }, 415, 'unsupported-media-type'],
    ['JSON for a caller of CSV', JSON.stringify(canal('a')), { accept: 'text/csv' }, 406, 'not-acceptable'],
    ['too much', JSON.stringify({ ...canal('a'), x: 'x'.repeat(1_048_576) }), {}, 413, 'payload-too-large'],
  ] as const)('that is %s is refused', async (_what, body, headers, status, code) => {
    const { put, get } = registryService()
    expectProblem(await put(URL_A, body, headers), status, code)
    expect((await get('/v1/segments')).json()).toMatchObject({ numberMatched: 0 })
  })
})

describe('deleting a segment', () => {
  test('needs the tag that it has: 428, 412, then 204 without a body, then 404', async () => {
    const { remove, get } = await withRevisions([4, 5])
    const bare = expectProblem(await remove(URL_A), 428, 'revision-required')
    expect(bare.facts).toEqual({ current: 2 })
    const stale = expectProblem(await remove(URL_A, matching('"1"')), 412, 'stale-revision')
    expect(stale.facts).toEqual({ current: 2 })
    expect((await get(URL_A)).statusCode).toBe(200)
    const reply = await remove(URL_A, matching('"2"'))
    expect([reply.statusCode, reply.body, reply.headers['registry-revision']]).toEqual([204, '', '3'])
    expectProblem(await remove(URL_A, matching('"2"')), 404, 'segment-not-found')
    expectProblem(await remove(URL_A), 404, 'segment-not-found')
    expectProblem(await get(URL_A), 404, 'segment-not-found')
    expectProblem(await get(`${URL_A}/advisory?vessel_class=cemt-iv`), 404, 'segment-not-found')
  })

  test('takes a star for whatever revision there is', async () => {
    const { remove } = await withRevisions([4, 5])
    expect((await remove(URL_A, matching('*'))).statusCode).toBe(204)
  })
})

describe('the revisions of a segment', () => {
  test('are listed newest first with what changed, and each is read by its link', async () => {
    const { get, put, remove } = await withRevisions([4, 5])
    const moved = { ...canal('a', { depth_m: 5, name: 'Moved' }), geometry: { type: 'LineString', coordinates: [[3, 54], [3.01, 54]] } } // prettier-ignore
    await put(URL_A, moved, matching('"2"'))
    await remove(URL_A, matching('"3"'))
    const items = listed((await get(`${URL_A}/revisions`)).json())
    expect(items.map(({ revision, action, changed, href }) => [revision, action, changed, href])).toEqual([
      [4, 'deleted', expect.any(Array), '/v1/segments/a?revision=4'],
      [3, 'updated', ['geometry', 'name'], '/v1/segments/a?revision=3'],
      [2, 'updated', ['depth_m'], '/v1/segments/a?revision=2'],
      [1, 'created', expect.any(Array), '/v1/segments/a?revision=1'],
    ])
    for (const { time, key } of items) {
      expect(time).toMatch(/^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z$/)
      expect(key).toBeUndefined()
    }
    const depths = []
    for (const revision of [1, 2, 3]) {
      const reply = await get(`${URL_A}?revision=${revision}`)
      expect(reply.headers.etag).toBe(`"${revision}"`)
      const { properties } = reply.json<Feature>()
      expect(properties['revision']).toBe(revision)
      depths.push(properties['depth_m'])
    }
    expect(depths).toEqual([4, 5, 5])
    expect((await get(`${URL_A}?revision=3`)).json()).toMatchObject({ geometry: moved.geometry })
  })

  test('that never were, and the one of a deletion, are 404', async () => {
    const { get, remove } = await withRevisions([4])
    await remove(URL_A, matching('"1"'))
    const problem = expectProblem(await get(`${URL_A}?revision=2`), 404, 'revision-not-found')
    expect(problem.facts).toEqual({ segment_id: 'a', revision: 2 })
    expectProblem(await get(`${URL_A}?revision=9`), 404, 'revision-not-found')
    expectProblem(await get('/v1/segments/b?revision=1'), 404, 'revision-not-found')
    expectProblem(await get('/v1/segments/b/revisions'), 404, 'segment-not-found')
    const wrong = expectProblem(await get(`${URL_A}?revision=0`), 400, 'invalid-request')
    expect(faultsOf(wrong)).toEqual(['revision out-of-range'])
  })

  test('are read a page at a time to the end', async () => {
    const { get } = await withRevisions([1, 2, 3, 4, 5])
    let next: string | undefined = `${URL_A}/revisions?limit=2`
    const pages: unknown[] = []
    while (next !== undefined) {
      const body: { items: Json[]; links: { rel: string; href: string }[] } = (await get(next)).json()
      expect(body.links[0]).toEqual({ rel: 'self', href: next })
      pages.push(body.items.map(({ revision }) => revision))
      next = body.links.find(({ rel }) => rel === 'next')?.href
    }
    expect(pages).toEqual([[5, 4], [3, 2], [1]])
  })

  test('go on counting when a segment is made again after its deletion', async () => {
    const { get, put, remove } = await withRevisions([4, 5])
    await remove(URL_A, matching('"2"'))
    const again = await put(URL_A, canal('a', { depth_m: 6 }))
    expect([again.statusCode, again.headers.etag]).toEqual([201, '"4"'])
    const items = listed((await get(`${URL_A}/revisions`)).json())
    expect(items.map(({ revision, action }) => [revision, action])).toEqual([
      [4, 'created'],
      [3, 'deleted'],
      [2, 'updated'],
      [1, 'created'],
    ])
    expect((await get(`${URL_A}?revision=2`)).json<Feature>().properties['depth_m']).toBe(5)
  })
})

test('the revision of the registry rises by one with each write and with nothing else', async () => {
  const { get, put, remove, post } = registryService()
  const revision = async () => (await get('/v1/segments')).headers['registry-revision']
  const seen = [await revision()]
  const acts = [
    () => put(URL_A, canal('a')),
    () => put('/v1/segments/b', canal('b')),
    () => put(URL_A, canal('a'), matching('"1"')), // unchanged
    () => put(URL_A, canal('a', { depth_m: 5 }), matching('"9"')), // stale
    () => put(URL_A, canal('a', { depth_m: -5 }), matching('"1"')), // refused
    () => post('/v1/segments/import', { type: 'FeatureCollection', features: [canal('c'), canal('d')] }),
    () => remove('/v1/segments/b', matching('"1"')),
  ]
  for (const act of acts) {
    await act()
    seen.push(await revision())
  }
  expect(seen).toEqual(['0', '1', '2', '2', '2', '2', '3', '4'])
})

test('an advisory is 304 until a write, and another at once after it', async () => {
  const { get, put } = await withRevisions([4])
  const url = `${URL_A}/advisory?vessel_class=cemt-iv`
  const before = await get(url)
  const etag = String(before.headers.etag)
  expect((await get(url, { 'if-none-match': etag })).statusCode).toBe(304)
  await put('/v1/segments/other', canal('other'))
  expect((await get(url, { 'if-none-match': etag })).statusCode).toBe(304)
  await put(URL_A, canal('a', { depth_m: 5 }), matching('"1"'))
  const after = await get(url, { 'if-none-match': etag })
  expect(after.statusCode).toBe(200)
  expect(after.headers.etag).not.toBe(etag)
  expect(after.json()).toMatchObject({
    segment: { id: 'a', revision: 2 },
    reproducibility: { segment_revision: 2, registry_revision: 3 },
  })
  const speedOf = (body: Json) =>
    (body['recommended_max_speed'] as { through_water: { mps: number } }).through_water.mps
  expect(speedOf(after.json())).toBeGreaterThan(speedOf(before.json()))
})
