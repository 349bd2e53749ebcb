import { afterAll, describe, expect, test } from 'vitest'
import { canal, registryService } from '../support/registry-service.ts'
import { SEGMENT_IDS } from '../support/requests.ts'
import { buildService, expectProblem, expectReply, faultsOf, post, type Json } from '../support/service.ts'

const { app, replyTo } = buildService(afterAll)

const get = (url: string, headers: Record<string, string> = {}) => app.inject({ url, headers })

interface Layer {
  readonly features: { readonly id: string; readonly geometry: unknown; readonly properties: Json }[]
}

const LAYER = '/v1/advisories.geojson'

async function layer(query: string): Promise<Layer> {
  const reply = await get(`${LAYER}?${query}`)
  expect(reply.statusCode, reply.body.slice(0, 1000)).toBe(200)
  expect(reply.headers['content-type']).toBe('application/geo+json; charset=utf-8')
  const parsed = replyTo('GET', LAYER).safeParse(reply.json())
  expect(parsed.success ? [] : parsed.error.issues).toEqual([])
  return reply.json()
}

const idsOf = ({ features }: Layer) => features.map(({ id }) => id)

interface Advisory {
  readonly station?: { readonly chainage_m?: number }
  readonly outcome: string
  readonly governing_criterion: string
  readonly conditions: { readonly direction?: string }
  readonly recommended_max_speed?: {
    readonly through_water: { readonly mps: number }
    readonly over_ground: { readonly kn: number; readonly kmh: number }
    readonly sign?: { readonly value: number; readonly unit: string }
  }
  readonly at_recommended_speed?: Json
  readonly at_minimum_steerage_speed?: Json
  readonly cautions: readonly { readonly code: string; readonly severity: string }[]
}

/** Columns of the layer that an advisory must agree with: what says where and how fast. */
const speedColumns = ({ recommended_max_speed: speed }: Advisory): Json => ({
  max_over_ground_kmh: speed?.over_ground.kmh ?? null,
  max_over_ground_kn: speed?.over_ground.kn ?? null,
  max_through_water_mps: speed?.through_water.mps ?? null,
  sign_value: speed?.sign?.value ?? null,
  sign_unit: speed?.sign?.unit ?? null,
})

const SEVERITIES = ['info', 'caution', 'warning']

function columnsOf(advisory: Advisory): Json {
  const effects = advisory.at_recommended_speed ?? advisory.at_minimum_steerage_speed ?? {}
  const ranks = advisory.cautions.map(({ severity }) => SEVERITIES.indexOf(severity))
  return {
    ...speedColumns(advisory),
    station_chainage_m: advisory.station?.chainage_m ?? null,
    direction: advisory.conditions.direction ?? null,
    outcome: advisory.outcome,
    governing_criterion: advisory.governing_criterion,
    critical_ratio: effects['critical_ratio'],
    depth_froude_number: effects['depth_froude_number'],
    bank_wave_height_m: effects['bank_wave_height_m'] ?? null,
    under_keel_clearance_m: effects['under_keel_clearance_m'] ?? null,
    cautions: advisory.cautions.map(({ code }) => code).join(';'),
    worst_severity: SEVERITIES[Math.max(...ranks)],
  }
}

const COLUMNS = [
  'name',
  'waterway',
  'gauge_id',
  'revision',
  'station_chainage_m',
  'vessel_class',
  'loading',
  'direction',
  'outcome',
  'governing_criterion',
  'max_over_ground_kmh',
  'max_over_ground_kn',
  'max_through_water_mps',
  'sign_value',
  'sign_unit',
  'critical_ratio',
  'depth_froude_number',
  'bank_wave_height_m',
  'under_keel_clearance_m',
  'posted_limit_kmh',
  'posted_limit_exceeds_computed',
  'worst_severity',
  'cautions',
  'problem_code',
  'problem_detail',
]

describe('the layer of advisories', () => {
  test('has every segment with its line and every column in the documented order', async () => {
    const found = await layer('vessel_class=cemt-ii')
    expect(idsOf(found)).toEqual(SEGMENT_IDS)
    for (const { id, geometry, properties } of found.features) {
      expect(Object.keys(properties), id).toEqual(COLUMNS)
      const { geometry: own } = (await get(`/v1/segments/${id}`)).json<{ geometry: unknown }>()
      expect(geometry).toEqual(own)
    }
  })

  test.each([
    'vessel_class=recreational-ra',
    'vessel_class=cemt-ii&loading=empty&water_level_m=0.3',
    'vessel_class=cemt-iv&current_mps=0.5&draught_m=1.9',
    'vessel_class=cemt-iii&current_mps=0.7&direction=upstream&sign_unit=kn&sign_step=0.5',
    'vessel_class=planing-boat',
  ])('with %s has the figures of each advisory to the last digit', async (query) => {
    const { features } = await layer(query)
    expect(features).toHaveLength(12)
    let answered = 0
    for (const { id, properties } of features) {
      const reply = await get(`/v1/segments/${id}/advisory?${query}`)
      if (properties['problem_code'] !== null) {
        expect([reply.statusCode, reply.json<Json>()['code']], id).toEqual([422, properties['problem_code']])
        continue
      }
      answered += 1
      expect(properties, id).toMatchObject(columnsOf(reply.json()))
    }
    expect(answered).toBeGreaterThan(5)
  })

  test('shows a segment that cannot be answered with the reason, and the others all the same', async () => {
    const { features } = await layer('vessel_class=cemt-vb')
    const unanswered = features.filter(({ properties }) => properties['problem_code'] !== null)
    expect(unanswered.map(({ id }) => id)).toContain('harrow-head-cut')
    expect(unanswered.length).toBeLessThan(12)
    const cut = unanswered.find(({ id }) => id === 'harrow-head-cut')!.properties
    expect(cut).toMatchObject({
      name: 'Head Cut',
      problem_code: 'impossible-input',
      outcome: null,
      max_over_ground_kmh: null,
      cautions: null,
    })
    expect(cut['problem_detail']).toMatch(/draught|channel/i)
  })

  test('is filtered by waterway, gauge and box', async () => {
    expect(idsOf(await layer('vessel_class=cemt-ii&waterway=Elsewhere'))).toEqual([])
    expect(idsOf(await layer('vessel_class=cemt-ii&waterway=Harrowmere%20Navigation'))).toHaveLength(12)
    expect(idsOf(await layer('vessel_class=cemt-ii&gauge_id=upper-harrow'))).toHaveLength(8)
    expect(idsOf(await layer('vessel_class=cemt-ii&bbox=3.4,54.09,3.41,54.11'))).toEqual(['harrow-head-cut'])
  })

  test.each([
    ['', ['vessel_class required']],
    ['vessel_class=cemt-ii&limit=5', ['limit unknown-field']],
    ['vessel_class=cemt-ii&bbox=1,2,3', ['bbox pattern']],
    ['vessel_class=cemt-ii&format=svg', ['format not-in-list']],
    ['vessel_class=cemt-ii&loading=half&current_mps=9', ['current_mps out-of-range', 'loading not-in-list']],
  ])('is refused with %j', async (query, faults) => {
    const problem = expectProblem(await get(`${LAYER}?${query}`), 400, 'invalid-request')
    expect(faultsOf(problem).sort()).toEqual(faults)
  })

  test('is 404 for an unknown class, without a tag', async () => {
    const reply = await get(`${LAYER}?vessel_class=cemt-9`)
    expectProblem(reply, 404, 'vessel-class-not-found')
    expect(reply.headers.etag).toBeUndefined()
  })

  test('tells whether a posted limit is above what was computed', async () => {
    const own = registryService()
    const canalWith = (id: string, speed_kmh: number) => canal(id, { posted_limits: [{ speed_kmh }] })
    await own.put('/v1/segments/high', canalWith('high', 30))
    await own.put('/v1/segments/low', canalWith('low', 5))
    await own.put('/v1/segments/none', canal('none'))
    const { features } = (await own.get(`${LAYER}?vessel_class=cemt-iv`)).json<Layer>()
    expect(
      features.map(({ id, properties }) => [
        id,
        properties['posted_limit_kmh'],
        properties['posted_limit_exceeds_computed'],
      ]),
    ).toEqual([
      ['high', expect.closeTo(30, 10), true],
      ['low', expect.closeTo(5, 10), false],
      ['none', null, null],
    ])
  })

  test('is 304 until a write, and another at once after it', async () => {
    const own = registryService()
    await own.put('/v1/segments/a', canal('a'))
    const url = `${LAYER}?vessel_class=cemt-iv`
    const first = await own.get(url)
    const etag = String(first.headers.etag)
    expect(first.headers).toMatchObject({
      'cache-control': 'private, no-cache',
      'registry-revision': '1',
      vary: 'Accept, Authorization',
    })
    const held = await own.get(url, { 'if-none-match': etag })
    expect([held.statusCode, held.body, held.headers.etag]).toEqual([304, '', etag])
    expect((await own.get(`${url}&loading=empty`)).headers.etag).not.toBe(etag)
    await own.put('/v1/segments/a', canal('a', { depth_m: 5 }), { 'if-match': '"1"' })
    const changed = await own.get(url, { 'if-none-match': etag })
    expect(changed.statusCode).toBe(200)
    expect(changed.headers.etag).not.toBe(etag)
    const speedOf = (text: string) =>
      (JSON.parse(text) as Layer).features[0]?.properties['max_through_water_mps'] as number
    expect(speedOf(changed.body)).toBeGreaterThan(speedOf(first.body))
  })
})

/** A recommended speed without its sign, which only the advisory has. */
const pairOf = (speed: unknown) => {
  const { through_water, over_ground } = speed as Json
  return { through_water, over_ground }
}

describe('the speed curve of a segment', () => {
  const CURVE = '/v1/segments/harrow-long-pound/speed-curve'
  const QUERY = 'vessel_class=cemt-iv&current_mps=0.4&direction=upstream'

  interface Curve {
    readonly points: (Json & { readonly through_water_mps: number; readonly wave_height_by_method_m: Json })[]
    readonly critical_speed: { readonly through_water: { readonly mps: number } }
    readonly reproducibility: { readonly input_hash: string }
    readonly recommended_max_speed: unknown
    readonly criteria: unknown
    readonly cautions: unknown
  }

  test('has as many points as asked, evenly up to the end, and the head of the advisory', async () => {
    const reply = await get(`${CURVE}?${QUERY}&points=9`)
    const curve = expectReply(reply, replyTo('GET', '/v1/segments/:id/speed-curve')) as unknown as Curve
    expect(reply.headers).toMatchObject({
      'content-type': 'application/json; charset=utf-8',
      'cache-control': 'private, no-cache',
      'registry-revision': '1',
    })
    expect(curve.points).toHaveLength(9)
    const speeds = curve.points.map(({ through_water_mps }) => through_water_mps)
    const last = speeds.at(-1)!
    speeds.forEach((speed, i) => {
      expect(Math.abs(speed - ((i + 1) / 9) * last) / last, speeds.join(' ')).toBeLessThan(1e-12)
    })
    expect(last).toBeGreaterThanOrEqual(1.1 * curve.critical_speed.through_water.mps * (1 - 1e-12))
    const advisory = (await get(`/v1/segments/harrow-long-pound/advisory?${QUERY}`)).json<Curve & Json>()
    expect(curve).toMatchObject({
      segment: advisory['segment'],
      station: advisory['station'],
      vessel: advisory['vessel'],
      conditions: advisory['conditions'],
      criteria: advisory.criteria,
      cautions: advisory.cautions,
      critical_speed: advisory.critical_speed,
      recommended_max_speed: pairOf(advisory.recommended_max_speed),
      reproducibility: { input_hash: advisory.reproducibility.input_hash },
    })
    expect((await get(`${CURVE}?${QUERY}`)).json<Curve>().points).toHaveLength(60)
  })

  test('has at each point the figures of the effects at that speed', async () => {
    const { points } = (await get(`${CURVE}?${QUERY}&points=7`)).json<Curve>()
    for (const point of points.slice(0, 5)) {
      const reply = await post(app, '/v1/effects', {
        segment: { id: 'harrow-long-pound' },
        vessel: { class: 'cemt-iv' },
        conditions: { current_mps: 0.4, direction: 'upstream' },
        speed_mps: point.through_water_mps,
        speed_reference: 'through-water',
      })
      expect(reply.statusCode, reply.body).toBe(200)
      const { effects } = reply.json<{ effects: Json & { speed: { over_ground: Json } } }>()
      expect(point).toMatchObject({
        over_ground_mps: effects.speed.over_ground['mps'],
        over_ground_kn: effects.speed.over_ground['kn'],
        over_ground_kmh: effects.speed.over_ground['kmh'],
        regime: effects['regime'],
      })
      for (const field of [
        'depth_froude_number',
        'critical_ratio',
        'bank_wave_height_m',
        'stern_wave_height_m',
        'drawdown_m',
        'return_current_mps',
        'squat_m',
        'under_keel_clearance_m',
      ]) {
        expect(point[field], field).toBe(effects[field] ?? null)
      }
    }
  })

  test('is drawn as SVG for a link or a caller that asks for it', async () => {
    for (const reply of [
      await get(`${CURVE}?${QUERY}&format=svg`),
      await get(`${CURVE}?${QUERY}`, { accept: 'image/svg+xml' }),
    ]) {
      expect(reply.statusCode).toBe(200)
      expect(reply.headers['content-type']).toMatch(/^image\/svg\+xml/)
      expect(reply.headers.vary).toBe('Accept, Authorization')
      expect(reply.body).toMatch(/^<svg [^>]*xmlns="http:\/\/www\.w3\.org\/2000\/svg"/)
      expect(reply.body.trimEnd()).toMatch(/<\/svg>$/)
    }
  })

  test('has a tag for each form and number of points, and is 304 to who holds it', async () => {
    const urls = [`${CURVE}?${QUERY}`, `${CURVE}?${QUERY}&points=61`, `${CURVE}?${QUERY}&format=svg`]
    const tags = await Promise.all(urls.map(async (url) => String((await get(url)).headers.etag)))
    expect(new Set(tags).size).toBe(3)
    for (const [i, url] of urls.entries()) {
      const reply = await get(url, { 'if-none-match': tags[i]! })
      expect([reply.statusCode, reply.body]).toEqual([304, ''])
    }
  })

  test.each([
    ['points=1', 'points out-of-range'],
    ['points=501', 'points out-of-range'],
    ['points=2.5', 'points wrong-type'],
    ['format=csv', 'format not-in-list'],
  ])('is refused with %s', async (query, fault) => {
    const reply = await get(`${CURVE}?vessel_class=cemt-iv&${query}`)
    expect(faultsOf(expectProblem(reply, 400, 'invalid-request'))).toEqual([fault])
  })
})

/** Addresses of other hosts that a page would go to or load from; names of formats are none. */
function foreignAddresses(page: string): string[] {
  const found = page.match(/(?:href|src|action|srcset|poster|data)\s*=\s*["']?[^"'\s>]+/gi) ?? []
  const styles = page.match(/url\([^)]*\)|@import[^;]*/gi) ?? []
  return [...found, ...styles].filter((text) => /(?:["'(=]|\s)(?:[a-z]+:)?\/\//i.test(text))
}

describe('pages', () => {
  const SHEET = '/v1/segments/harrow-long-pound/sheet?vessel_class=cemt-iv'

  test.each(['/', '/?vessel_class=cemt-va&loading=empty&water_level_m=0.5&sign_unit=mph', SHEET])(
    '%s is a page that runs nothing and reaches no other host',
    async (url) => {
      const reply = await get(url)
      expect(reply.statusCode, reply.body.slice(0, 500)).toBe(200)
      expect(reply.headers).toMatchObject({
        'content-type': 'text/html; charset=utf-8',
        'registry-revision': '1',
        'cache-control': 'private, no-cache',
        vary: 'Accept, Authorization',
      })
      const policy = String(reply.headers['content-security-policy'])
      expect(policy).toContain("default-src 'none'")
      expect(policy).not.toMatch(/script|http|\*|unsafe-eval/)
      expect(reply.body).toMatch(/^<!doctype html>/i)
      expect(reply.body).not.toMatch(/<script|\son\w+\s*=|javascript:/i)
      expect(foreignAddresses(reply.body)).toEqual([])
    },
  )

  test('see an address of another host', () => {
    expect(foreignAddresses('<a href="https://a.example">')).toHaveLength(1)
    expect(foreignAddresses('<img src=//a.example/b>')).toHaveLength(1)
    expect(foreignAddresses('<style>a{background:url(https://a.example/b)}</style>')).toHaveLength(1)
    expect(foreignAddresses('<svg xmlns="http://www.w3.org/2000/svg"><a href="/v1/x">')).toEqual([])
  })

  test('show every segment on the plan, with a link to its sheet', async () => {
    const { body } = await get('/')
    for (const id of SEGMENT_IDS) expect(body).toContain(`/v1/segments/${id}/sheet?`)
  })

  test('show names that look like markup as text', async () => {
    const own = registryService()
    const name = '<script>alert("1")</script>&amp;'
    await own.put('/v1/segments/a', canal('a', { name, waterway: name, source: name }))
    for (const url of ['/', '/v1/segments/a/sheet?vessel_class=cemt-iv']) {
      const { body, statusCode } = await own.get(url)
      expect(statusCode).toBe(200)
      expect(body).not.toContain('<script')
      expect(body).toContain('&lt;script&gt;')
    }
  })

  test('show an empty registry too', async () => {
    expect((await registryService().get('/')).statusCode).toBe(200)
  })

  test('refuse what they do not know', async () => {
    expectProblem(await get('/?vessel_class=cemt-9'), 404, 'vessel-class-not-found')
    expect(faultsOf(expectProblem(await get('/?speed=1'), 400, 'invalid-request'))).toEqual([
      'speed unknown-field',
    ])
    expectProblem(await get('/v1/segments/x/sheet?vessel_class=cemt-iv'), 404, 'segment-not-found')
    const bare = await get('/v1/segments/harrow-long-pound/sheet')
    expect(faultsOf(expectProblem(bare, 400, 'invalid-request'))).toEqual(['vessel_class required'])
  })
})
