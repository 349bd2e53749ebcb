import { afterAll, describe, expect, test } from 'vitest'
import { SEGMENT_IDS } from '../support/requests.ts'
import { buildService, expectProblem, expectReply, faultsOf, type Json } from '../support/service.ts'

const { app, replyTo } = buildService(afterAll)

const get = (url: string, headers: Record<string, string> = {}) => app.inject({ url, headers })

interface Collection {
  readonly features: { id: string; properties: Json }[]
  readonly links: { rel: string; href: string }[]
  readonly numberReturned: number
  readonly numberMatched: number
}

async function list(query: string): Promise<Collection> {
  const reply = await get(`/v1/segments${query}`)
  expect(reply.headers['registry-revision']).toBe('1')
  return expectReply(reply, replyTo('GET', '/v1/segments')) as unknown as Collection
}

const idsOf = ({ features }: Collection) => features.map(({ id }) => id)

describe('the list of segments', () => {
  test('is a GeoJSON collection of all of them in the order of their ids', async () => {
    const found = await list('')
    expect(found).toMatchObject({ type: 'FeatureCollection', numberReturned: 12, numberMatched: 12 })
    expect(idsOf(found)).toEqual(SEGMENT_IDS)
    expect(found.links).toEqual([{ rel: 'self', href: '/v1/segments' }])
    expect((await get('/v1/segments')).headers['content-type']).toContain('application/geo+json')
  })

  test.each([1, 5, 12, 1000])('is whole when it is read %i at a time', async (limit) => {
    const seen: string[] = []
    let next: string | undefined = `?limit=${limit}`
    while (next !== undefined) {
      const page: Collection = await list(next)
      expect(page.numberReturned).toBe(page.features.length)
      expect(page.numberMatched).toBe(12)
      expect(page.links[0]).toEqual({ rel: 'self', href: `/v1/segments${next}` })
      seen.push(...idsOf(page))
      next = page.links.find(({ rel }) => rel === 'next')?.href.replace('/v1/segments', '')
    }
    expect(seen).toEqual(SEGMENT_IDS)
  })

  test('is filtered by waterway, gauge and box, and pages keep the filter', async () => {
    expect((await list('?waterway=Elsewhere')).numberMatched).toBe(0)
    expect((await list('?waterway=Harrowmere%20Navigation')).numberMatched).toBe(12)
    const upper = await list('?gauge_id=upper-harrow&limit=2')
    expect(upper.numberMatched).toBe(8)
    expect(upper.links[1]?.href).toContain('gauge_id=upper-harrow')
    expect(idsOf(await list('?bbox=3.4,54.09,3.41,54.11'))).toEqual(['harrow-head-cut'])
    expect(idsOf(await list('?bbox=-180,-90,180,90'))).toHaveLength(12)
    expect(idsOf(await list('?bbox=170,54,-170,55'))).toEqual([])
  })

  test.each([
    ['limit=0', 'limit out-of-range'],
    ['limit=1001', 'limit out-of-range'],
    ['limit=1.5', 'limit wrong-type'],
    ['limit=1e2', 'limit wrong-type'],
    ['limit=', 'limit wrong-type'],
    ['limit=1&limit=2', 'limit wrong-type'],
    ['cursor=x', 'cursor pattern'],
    ['cursor=', 'cursor pattern'],
    ['cursor=%00%ff', 'cursor pattern'],
    ['bbox=1,2,3', 'bbox pattern'],
    ['bbox=1,2,3,NaN', 'bbox pattern'],
    ['bbox=0,50,10,40', 'bbox out-of-range'],
    ['bbox=-181,50,10,60', 'bbox out-of-range'],
    ['bbox=0,50,10,91', 'bbox out-of-range'],
    ['format=csv', 'format not-in-list'],
    ['gauge=1', 'gauge unknown-field'],
    ['__proto__=1', '__proto__ unknown-field'],
  ])('is refused with %s', async (query, fault) => {
    const problem = expectProblem(await get(`/v1/segments?${query}`), 400, 'invalid-request')
    expect(faultsOf(problem)).toEqual([fault])
  })
})

describe('a segment', () => {
  test.each(SEGMENT_IDS)('%s has its revision as its tag, and documented fields alone', async (id) => {
    const reply = await get(`/v1/segments/${id}`)
    const feature = expectReply(reply, replyTo('GET', '/v1/segments/:id'))
    expect(feature).toMatchObject({ type: 'Feature', id, properties: { revision: 1 } })
    expect(reply.headers.etag).toBe('"1"')
    expect(reply.headers['registry-revision']).toBe('1')
  })

  test('that is unknown is 404 with the nearest', async () => {
    const problem = expectProblem(await get('/v1/segments/harrow-dox'), 404, 'segment-not-found')
    expect(problem.facts).toEqual({ segment_id: 'harrow-dox', nearest: 'harrow-docks' })
  })

  test('is served as JSON to a caller that takes nothing else', async () => {
    const reply = await get('/v1/segments/harrow-docks', { accept: 'application/json' })
    expect(reply.statusCode).toBe(200)
    expectProblem(await get('/v1/segments/harrow-docks', { accept: 'text/csv' }), 406, 'not-acceptable')
  })
})

describe('the advisory of a segment', () => {
  const ADVISORY = '/v1/segments/harrow-long-pound/advisory'

  test('is an advisory with a tag, for this caller alone and asked again each time', async () => {
    const reply = await get(`${ADVISORY}?vessel_class=cemt-iv`)
    const body = expectReply(reply, replyTo('GET', '/v1/segments/:id/advisory'))
    expect(body).toMatchObject({
      segment: { id: 'harrow-long-pound', name: 'Long Pound', revision: 1 },
      station: { index: 0 },
      vessel: { class: 'cemt-iv', loading: 'laden' },
    })
    expect(body).not.toHaveProperty('label')
    expect(reply.headers).toMatchObject({
      'cache-control': 'private, no-cache',
      'registry-revision': '1',
      'content-type': 'application/json; charset=utf-8',
    })
    expect(reply.headers.etag).toMatch(/^"[\w-]{20,}"$/)
  })

  test.each(SEGMENT_IDS)('on %s is answered for a small boat', async (id) => {
    const reply = await get(`/v1/segments/${id}/advisory?vessel_class=recreational-ra`)
    expectReply(reply, replyTo('GET', '/v1/segments/:id/advisory'))
  })

  test('is 304 without a body to a caller that holds it', async () => {
    const url = `${ADVISORY}?vessel_class=cemt-iv`
    const { headers } = await get(url)
    const etag = String(headers.etag)
    for (const held of [etag, `W/${etag}`, `"x", ${etag}`, '*']) {
      const reply = await get(url, { 'if-none-match': held })
      expect([reply.statusCode, reply.body]).toEqual([304, ''])
      expect(reply.headers).toMatchObject({
        etag,
        'cache-control': 'private, no-cache',
        vary: 'Accept, Authorization',
      })
    }
    for (const held of ['"x"', etag.slice(1, -1), '']) {
      expect((await get(url, { 'if-none-match': held })).statusCode).toBe(200)
    }
  })

  test('has another tag for everything that changes it, and the same for the order of the query', async () => {
    const queries = [
      'vessel_class=cemt-iv',
      'vessel_class=cemt-iii',
      'vessel_class=cemt-iv&loading=empty',
      'vessel_class=cemt-iv&draught_m=2',
      'vessel_class=cemt-iv&direction=upstream',
      'vessel_class=cemt-iv&water_level_m=0.1',
      'vessel_class=cemt-iv&current_mps=0.1',
      'vessel_class=cemt-iv&sign_unit=kn',
      'vessel_class=cemt-iv&sign_step=0.5',
    ]
    const tagOf = async (query: string) => String((await get(`${ADVISORY}?${query}`)).headers.etag)
    const tags = await Promise.all(queries.map(tagOf))
    expect(new Set(tags).size).toBe(queries.length)
    expect(await tagOf('loading=empty&vessel_class=cemt-iv')).toBe(tags[2])
    const other = await get('/v1/segments/harrow-docks/advisory?vessel_class=cemt-iv')
    expect(tags).not.toContain(other.headers.etag)
  })

  test('all parameters count', async () => {
    const query =
      'vessel_class=cemt-iv&loading=empty&draught_m=1.2&direction=downstream&water_level_m=-0.2&current_mps=0.4&sign_unit=mph&sign_step=0.5'
    const body = (await get(`${ADVISORY}?${query}`)).json<Json>()
    expect(body).toMatchObject({
      vessel: { loading: 'empty', draught_m: 1.2 },
      conditions: { direction: 'downstream', water_level_m: -0.2, current_mps: 0.4 },
      recommended_max_speed: { sign: { unit: 'mph' } },
    })
  })

  test.each([
    ['', ['vessel_class required']],
    ['vessel_class=cemt iv', ['vessel_class pattern']],
    ['vessel_class=cemt-iv&vessel_class=cemt-va', ['vessel_class wrong-type']],
    ['vessel_class=cemt-iv&loading=half', ['loading not-in-list']],
    ['vessel_class=cemt-iv&draught_m=NaN', ['draught_m wrong-type']],
    ['vessel_class=cemt-iv&draught_m=1e0', ['draught_m wrong-type']],
    ['vessel_class=cemt-iv&draught_m=0', ['draught_m out-of-range']],
    ['vessel_class=cemt-iv&current_mps=5.01', ['current_mps out-of-range']],
    ['vessel_class=cemt-iv&sign_unit=m/s', ['sign_unit not-in-list']],
    ['vessel_class=cemt-iv&sign_step=0.05', ['sign_step out-of-range']],
    ['vessel_class=cemt-iv&depth_m=4', ['depth_m unknown-field']],
    [
      'loading=x&draught_m=x&y=1',
      ['draught_m wrong-type', 'loading not-in-list', 'vessel_class required', 'y unknown-field'],
    ],
  ])('is refused with %j, all faults at once', async (query, faults) => {
    const problem = expectProblem(await get(`${ADVISORY}?${query}`), 400, 'invalid-request')
    expect(faultsOf(problem).sort()).toEqual(faults)
  })

  test('is 404 for an unknown class or segment and 422 for a vessel that cannot be there, none of it with a tag', async () => {
    const noClass = await get(`${ADVISORY}?vessel_class=cemt-9`)
    expectProblem(noClass, 404, 'vessel-class-not-found')
    expectProblem(await get('/v1/segments/x/advisory?vessel_class=cemt-iv'), 404, 'segment-not-found')
    const aground = await get(`${ADVISORY}?vessel_class=cemt-iv&draught_m=4`)
    const problem = expectProblem(aground, 422, 'impossible-input')
    expect(problem.errors?.[0]?.facts).toEqual({ draught_m: 4, depth_m: 4 })
    expect(aground.headers.etag).toBeUndefined()
    expect(aground.headers['cache-control']).toBeUndefined()
  })

  test('is answered by HEAD with the same headers and no body', async () => {
    const url = `${ADVISORY}?vessel_class=cemt-iv`
    const head = await app.inject({ method: 'HEAD', url })
    expect([head.statusCode, head.body]).toEqual([200, ''])
    expect(head.headers.etag).toBe((await get(url)).headers.etag)
  })
})
