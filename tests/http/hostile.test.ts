import { once } from 'node:events'
import { connect, type AddressInfo } from 'node:net'
import { gzipSync } from 'node:zlib'
import fc from 'fast-check'
import { afterAll, describe, expect, test } from 'vitest'
import { Problem } from '../../src/http/problems.ts'
import { CANAL, MOTOR_VESSEL, PLAIN, REQUESTS } from '../support/requests.ts'
import {
  buildService,
  expectProblem,
  expectReply,
  faultsOf,
  linesOf,
  post,
  type Json,
} from '../support/service.ts'
import { strict } from '../support/strict.ts'

const { app, replyTo } = buildService(afterAll)
await app.ready()

const SAILED = { speed_mps: 2, speed_reference: 'through-water' }
/** A valid body for every endpoint that takes one JSON value. */
const BODIES: Readonly<Record<string, Json>> = {
  '/v1/advisories': PLAIN,
  '/v1/effects': { ...PLAIN, ...SAILED },
  '/v1/advisories/sensitivity': { ...PLAIN, uncertainty: { depth_m: { sd: 0.2 } } },
  '/v1/advisories/inverse': { ...PLAIN, ...SAILED, vary: 'depth_m' },
  '/v1/advisories/matrix': { segments: [CANAL], vessels: [MOTOR_VESSEL], conditions: [{}], options: {} },
}
const ENDPOINTS = Object.entries(BODIES)
const STREAM = '/v1/advisories/stream'
const NDJSON = { 'content-type': 'application/x-ndjson' }

async function faults(url: string, body: unknown): Promise<string[]> {
  return faultsOf(expectProblem(await post(app, url, body), 400, 'invalid-request')).sort()
}

const on = (change: Json) => ({ ...PLAIN, segment: { ...CANAL, ...change } })
const by = (change: Json) => ({ ...PLAIN, vessel: { ...MOTOR_VESSEL, ...change } })
const under = (conditions: Json) => ({ ...PLAIN, conditions })
const told = (options: Json) => ({ ...PLAIN, options })

describe.each(ENDPOINTS)('%s', (url, body) => {
  test('answers its valid body', async () => {
    expect((await post(app, url, body)).statusCode).toBe(200)
  })

  test('refuses unknown fields, also those that every object has', async () => {
    const text = JSON.stringify({ ...body, extra: 1, constructor: 2, toString: 3 })
    const polluted = text.replace('{', '{"__proto__":{"polluted":true},')
    expect(await faults(url, polluted)).toEqual([
      '#/__proto__ unknown-field',
      '#/constructor unknown-field',
      '#/extra unknown-field',
      '#/toString unknown-field',
    ])
    expect({}).not.toHaveProperty('polluted')
  })

  test.each(Object.keys(body))('refuses null and other types in the place of %s', async (field) => {
    for (const value of [null, true, -1, 'text', [[]]]) {
      const answer = await post(app, url, { ...body, [field]: value })
      const problem = expectProblem(answer, 400, 'invalid-request')
      for (const item of problem.errors ?? []) expect(item.pointer).toMatch(/^#/)
      expect(problem.errors?.some(({ pointer = '' }) => pointer.startsWith(`#/${field}`))).toBe(true)
    }
  })

  test.each(['null', '1', '"x"', '[]', 'true', '[{}]'])('refuses the body %s', async (text) => {
    expect(await faults(url, text)).toEqual(['# wrong-type'])
  })

  test.each([
    ['', 0],
    ['{', 1],
    ['{"segment":NaN}', 11],
    ['{"segment":Infinity}', 11],
    ['{"segment":-Infinity}', 12],
    ["{'segment':1}", 1],
    ['{"segment":1,}', 13],
    ['{"segment":01}', 12],
    ['{"a":1}{"a":1}', 7],
    ['// x\n{}', 0],
    ['\u0000', 0],
  ])('refuses %j, which is not JSON', async (text, position) => {
    const answer = await post(app, url, text)
    if (text === '') expectProblem(answer, 400, answer.json<Json>()['code'] as string)
    else expect(expectProblem(answer, 400, 'malformed-json').facts).toMatchObject({ position })
  })

  test('refuses bytes that are not UTF-8, and text in UTF-16', async () => {
    expectProblem(await post(app, url, Buffer.from([0x7b, 0xff, 0x7d])), 400, 'malformed-json')
    expectProblem(await post(app, url, Buffer.from(JSON.stringify(body), 'utf16le')), 400, 'malformed-json')
  })

  test('refuses what is nested 10,000 deep', async () => {
    const lists = `{"segment":${'['.repeat(10_000)}${']'.repeat(10_000)}}`
    const objects = `{"vessel":${'{"a":'.repeat(10_000)}1${'}'.repeat(10_000)}}`
    for (const text of [lists, objects]) expectProblem(await post(app, url, text), 400, 'invalid-request')
    expectProblem(await post(app, url, '['.repeat(1_000_000)), 400, 'malformed-json')
  })

  test('refuses a body over its limit, plain and compressed', async () => {
    const limit = url.endsWith('matrix') ? 16_777_216 : 1_048_576
    const large = Buffer.alloc(limit + 1, ' ')
    const plain = await post(app, url, large)
    expect(expectProblem(plain, 413, 'payload-too-large').facts).toEqual({ limit })
    const zipped = await post(app, url, gzipSync(large), { 'content-encoding': 'gzip' })
    expect(expectProblem(zipped, 413, 'payload-too-large').facts).toEqual({ limit })
  })

  test('tells at most 1000 faults of a body that is full of them', async () => {
    const many = Object.fromEntries(Array.from({ length: 5000 }, (_, i) => [`f${i}`, i]))
    const problem = expectProblem(await post(app, url, { ...body, ...many }), 400, 'invalid-request')
    expect(problem.errors).toHaveLength(1000)
    expect(problem.errors_truncated).toBe(true)
  })

  test.each(['text/plain', 'application/xml', 'application/x-www-form-urlencoded', 'text/csv'])(
    'refuses a body of type %s',
    async (type) => {
      const answer = await post(app, url, JSON.stringify(body), { 'content-type': type })
      expect(expectProblem(answer, 415, 'unsupported-media-type').facts).toEqual({
        accepted: ['application/json'],
      })
    },
  )

  test('refuses other methods and says which it takes', async () => {
    for (const method of ['GET', 'PUT', 'DELETE', 'PATCH'] as const) {
      const answer = await app.inject({ method, url })
      expectProblem(answer, 405, 'method-not-allowed')
      expect(answer.headers.allow).toBe('OPTIONS, POST')
    }
  })

  test('refuses unknown and repeated query parameters', async () => {
    const unknown = expectProblem(await post(app, `${url}?dry_run=true`, body), 400, 'invalid-request')
    expect(faultsOf(unknown)).toEqual(['dry_run unknown-field'])
    const twice = expectProblem(
      await post(app, `${url}?format=json&format=json`, body),
      400,
      'invalid-request',
    )
    expect(faultsOf(twice)).toEqual(['format wrong-type'])
  })
})

test.each([
  // numbers out of every bound
  [on({ depth_m: 0 }), ['#/segment/depth_m out-of-range']],
  [on({ depth_m: -4 }), ['#/segment/depth_m out-of-range']],
  [on({ depth_m: 1e308 }), ['#/segment/depth_m out-of-range']],
  [on({ depth_m: 100.01 }), ['#/segment/depth_m out-of-range']],
  [on({ depth_m: 0.29 }), ['#/segment/depth_m out-of-range']],
  [on({ depth_m: '4' }), ['#/segment/depth_m wrong-type']],
  [on({ depth_m: [4] }), ['#/segment/depth_m wrong-type']],
  [on({ depth_m: null }), ['#/segment/depth_m wrong-type']],
  [on({ width_m: 1.99 }), ['#/segment/width_m out-of-range']],
  [on({ width_m: 20_001 }), ['#/segment/width_m out-of-range']],
  [on({ bank_distance_m: 0 }), ['#/segment/bank_distance_m out-of-range']],
  [on({ bank_kind: 'concrete' }), ['#/segment/bank_kind not-in-list']],
  [on({ bank_kind: '' }), ['#/segment/bank_kind not-in-list']],
  [on({ confinement: 'closed' }), ['#/segment/confinement not-in-list']],
  [on({ bed_kind: 'mud' }), ['#/segment/bed_kind not-in-list']],
  [on({ attributes: { a: {} } }), ['#/segment/attributes/a wrong-type']],
  [on({ attributes: [] }), ['#/segment/attributes wrong-type']],
  [on({ name: 7 }), ['#/segment/name wrong-type']],
  [on({ name: 'x'.repeat(2001) }), ['#/segment/name out-of-range']],
  [on({ id: '' }), ['#/segment/id pattern']],
  [on({ id: 'größe' }), ['#/segment/id pattern']],
  [on({ id: '../../etc/passwd' }), ['#/segment/id pattern']],
  [on({ id: 'x'.repeat(65) }), ['#/segment/id pattern']],
  [on({ id: '-x' }), ['#/segment/id pattern']],
  [on({ id: 'a\nb' }), ['#/segment/id pattern']],
  [on({ stations: [] }), ['#/segment/stations unknown-field']],
  [on({ revision: 3 }), ['#/segment/revision unknown-field']],
  // what belongs together
  [{ ...PLAIN, segment: {} }, ['#/segment/bank_distance_m required', '#/segment/depth_m required', '#/segment/width_m required']], // prettier-ignore
  [{ ...PLAIN, segment: { depth_m: 4, banks: { left: {}, right: {} } } }, ['#/segment/banks/left/distance_m required']], // prettier-ignore
  [{ ...PLAIN, segment: { depth_m: 4, banks: { left: { distance_m: 9 } } } }, ['#/segment/banks/right required', '#/segment/banks/right/distance_m required']], // prettier-ignore
  [on({ banks: { left: {}, right: {} } }), ['#/segment/bank_distance_m clash', '#/segment/banks/left/distance_m required']], // prettier-ignore
  [on({ receptors: [{ kind: 'reed-bed', side: 'left', distance_m: 5 }] }), ['#/segment/receptors/0/max_wave_height_m required']], // prettier-ignore
  [on({ receptors: [{}] }), ['#/segment/receptors/0/distance_m required', '#/segment/receptors/0/kind required', '#/segment/receptors/0/max_wave_height_m required', '#/segment/receptors/0/side required']], // prettier-ignore
  [on({ posted_limits: [{}] }), ['#/segment/posted_limits/0 one-of']],
  [on({ posted_limits: [{ speed_kmh: 7, speed_kn: 4 }] }), ['#/segment/posted_limits/0/speed_kmh one-of']],
  [on({ posted_limits: [{ speed_kmh: 0 }] }), ['#/segment/posted_limits/0/speed_kmh out-of-range']],
  [on({ posted_limits: [{ speed_kmh: 7, applies_to: { hull: 'x', length_m: 5 } }] }), ['#/segment/posted_limits/0/applies_to/hull not-in-list', '#/segment/posted_limits/0/applies_to/length_m unknown-field']], // prettier-ignore
  // sections
  [on({ cross_section: {} }), ['#/segment/cross_section/bottom_width_m required']],
  [on({ cross_section: { profile: [[-1, 0], [1, 1]] } }), ['#/segment/cross_section/profile out-of-range']], // prettier-ignore
  [on({ cross_section: { profile: [[-9, 0], [5, 4], [3, 4], [9, 0]] } }), ['#/segment/cross_section/profile/2/0 out-of-range']], // prettier-ignore
  [on({ cross_section: { profile: [[-9, 0], [-9, 4], [9, 0]] } }), ['#/segment/cross_section/profile/1/0 out-of-range']], // prettier-ignore
  [on({ cross_section: { profile: [[1, 0], [5, 4], [9, 0]] } }), ['#/segment/cross_section/profile out-of-range']], // prettier-ignore
  [on({ cross_section: { profile: [[-9, 0], [-5, 4], [-1, 0]] } }), ['#/segment/cross_section/profile out-of-range']], // prettier-ignore
  [on({ cross_section: { profile: [[-9, 0, 1], [0, 4], [9, 0]] } }), ['#/segment/cross_section/profile/0 out-of-range']], // prettier-ignore
  [on({ cross_section: { profile: [[-9, null], [0, 4], [9, 0]] } }), ['#/segment/cross_section/profile/0/1 wrong-type']], // prettier-ignore
  [on({ cross_section: { profile: Array.from({ length: 2001 }, (_, i) => [i - 1000, 1]) } }), ['#/segment/cross_section/profile out-of-range']], // prettier-ignore
  // vessels
  [{ ...PLAIN, vessel: {} }, ['#/vessel/beam_m required', '#/vessel/draught_m required', '#/vessel/hull required', '#/vessel/length_m required']], // prettier-ignore
  [{ ...PLAIN, vessel: { length_m: 60, beam_m: 7, draught_m: 2, hull: 'displacement', loading: 'laden' } }, ['#/vessel/loading clash']], // prettier-ignore
  [by({ loading: 'half' }), ['#/vessel/loading not-in-list']],
  [by({ draught_m: 0 }), ['#/vessel/draught_m out-of-range']],
  [by({ block_coefficient: 1.01 }), ['#/vessel/block_coefficient out-of-range']],
  [by({ max_speed_kn: 9, max_speed_kmh: 16 }), ['#/vessel/max_speed_kmh one-of']],
  [by({ min_steerage_speed_mps: 0 }), ['#/vessel/min_steerage_speed_mps out-of-range']],
  [by({ class: 'größe' }), ['#/vessel/class pattern']],
  // conditions and options
  [under({ water_level_m: 51 }), ['#/conditions/water_level_m out-of-range']],
  [under({ current_mps: -5.01 }), ['#/conditions/current_mps out-of-range']],
  [under({ direction: 'up' }), ['#/conditions/direction not-in-list']],
  [under({ meeting_vessel: { class: 4 } }), ['#/conditions/meeting_vessel/class wrong-type']],
  [told({ wave_methods: [] }), ['#/options/wave_methods out-of-range']],
  [told({ wave_methods: ['rock-manual'] }), ['#/options/wave_methods/0 not-in-list']],
  [told({ wave_methods: 'all' }), ['#/options/wave_methods wrong-type']],
  [told({ combine: 'mean' }), ['#/options/combine not-in-list']],
  [told({ sign_unit: 'kmh' }), ['#/options/sign_unit not-in-list']],
  [told({ sign_step: 0.09 }), ['#/options/sign_step out-of-range']],
  [told({ sign_step: 10.1 }), ['#/options/sign_step out-of-range']],
  [told({ wave_factor: 0 }), ['#/options/wave_factor out-of-range']],
  [told({ curve: 1 }), ['#/options/curve wrong-type']],
  [told({ limits: { wake_wash: true } }), ['#/options/limits/wake_wash not-in-list']],
  [told({ limits: { max_critical_ratio: 0 } }), ['#/options/limits/max_critical_ratio out-of-range']],
  [{ ...PLAIN, label: 'x'.repeat(201) }, ['#/label out-of-range']],
  [{ ...PLAIN, label: 5 }, ['#/label wrong-type']],
] as const)('%j is refused', async (request, expected) => {
  expect(await faults('/v1/advisories', request)).toEqual([...expected].sort())
})

test('a number that no double holds is refused where it stands', async () => {
  const text = JSON.stringify(PLAIN).replace('"depth_m":4', '"depth_m":1e999')
  expect(await faults('/v1/advisories', text)).toEqual(['#/segment/depth_m out-of-range'])
  const negative = JSON.stringify(PLAIN).replace('"depth_m":4', '"depth_m":-1e999')
  expect(await faults('/v1/advisories', negative)).toEqual(['#/segment/depth_m out-of-range'])
})

test('all faults of a request come at once, each once, with its nearest name', async () => {
  const request = {
    segment: { depht_m: 4, width_m: -1, bank_kind: 'rip-rap', receptors: [{ kind: 'other' }] },
    vessel: { clas: 'cemt-iv' },
    conditions: { current: 1 },
    options: { sign_step: 0, limits: { wake_wash: 'sometimes' } },
    more: true,
  }
  const problem = expectProblem(await post(app, '/v1/advisories?pretty', request), 400, 'invalid-request')
  expect(faultsOf(problem).sort()).toEqual([
    '#/conditions/current unknown-field',
    '#/more unknown-field',
    '#/options/limits/wake_wash not-in-list',
    '#/options/sign_step out-of-range',
    '#/segment/bank_distance_m required',
    '#/segment/bank_kind not-in-list',
    '#/segment/depht_m unknown-field',
    '#/segment/depth_m required',
    '#/segment/receptors/0/distance_m required',
    '#/segment/receptors/0/max_wave_height_m required',
    '#/segment/receptors/0/side required',
    '#/segment/width_m out-of-range',
    '#/vessel/beam_m required',
    '#/vessel/clas unknown-field',
    '#/vessel/draught_m required',
    '#/vessel/hull required',
    '#/vessel/length_m required',
    'pretty unknown-field',
  ])
  const nearest = (pointer: string) => problem.errors?.find((item) => item.pointer === pointer)?.allowed?.[0]
  expect(nearest('#/segment/depht_m')).toBe('depth_m')
  expect(nearest('#/vessel/clas')).toBe('class')
  expect(nearest('#/segment/bank_kind')).toBe('riprap')
  expect(nearest('#/conditions/current')).toBe('current_mps')
  expect(problem.detail).toBe('18 fields were refused')
})

const DEEP = [[-30, 0], [-20, 4], [0, 4.5], [20, 4], [30, 0]] // prettier-ignore

test.each([
  [
    'a draught over the depth',
    by({ draught_m: 4.5 }),
    ['#/vessel/draught_m'],
    { draught_m: 4.5, depth_m: 4 },
  ],
  ['a draught of the depth', by({ draught_m: 4 }), ['#/vessel/draught_m'], { draught_m: 4, depth_m: 4 }],
  [
    'a class that is too deep',
    { segment: CANAL, vessel: { class: 'handysize', beam_m: 9 } },
    ['#/vessel/draught_m'],
    { draught_m: 9, depth_m: 4 },
  ],
  ['a hull as wide as the channel', by({ beam_m: 60 }), ['#/vessel/beam_m'], { beam_m: 60, width_m: 60 }],
  [
    'a hull over the waterline',
    on({ bank_distance_m: 4 }),
    ['#/segment/bank_distance_m'],
    { distance_m: 4, half_beam_m: 4.75 },
  ],
  [
    'a sailing line beyond the bank',
    on({ bank_distance_m: 61 }),
    ['#/segment/bank_distance_m'],
    { bank_distance_m: 61, half_width_m: 30 },
  ],
  [
    'a nearer bank that is the farther one',
    on({ bank_distance_m: 31 }),
    ['#/segment/bank_distance_m'],
    { bank_distance_m: 31, half_width_m: 30 },
  ],
  [
    'distances that do not add up',
    {
      vessel: MOTOR_VESSEL,
      segment: { depth_m: 4, width_m: 60, banks: { left: { distance_m: 30 }, right: { distance_m: 31 } } },
    },
    ['#/segment/width_m'],
    { width_m: 60, left_distance_m: 30, right_distance_m: 31 },
  ],
  [
    'a distance of the whole width',
    {
      vessel: MOTOR_VESSEL,
      segment: { depth_m: 4, width_m: 60, banks: { left: { distance_m: 60 }, right: {} } },
    },
    ['#/segment/width_m'],
    { width_m: 60, left_distance_m: 60, right_distance_m: 0 },
  ],
  [
    'a bottom wider than the water',
    on({ cross_section: { bottom_width_m: 61 } }),
    ['#/segment/cross_section/bottom_width_m'],
    { bottom_width_m: 61, width_m: 60 },
  ],
  [
    'a dry sailing line',
    {
      vessel: MOTOR_VESSEL,
      segment: {
        cross_section: {
          profile: [
            [-9, 4],
            [0, -1],
            [9, 4],
          ],
        },
      },
    },
    ['#/segment/cross_section/profile'],
    { profile_depth_m: 0 },
  ],
  [
    'a depth beside a profile',
    { vessel: MOTOR_VESSEL, segment: { depth_m: 4, cross_section: { profile: DEEP } } },
    ['#/segment/depth_m'],
    { given_m: 4, profile_m: 4.5 },
  ],
  [
    'a width beside a profile',
    { vessel: MOTOR_VESSEL, segment: { width_m: 61, cross_section: { profile: DEEP } } },
    ['#/segment/width_m'],
    { given_m: 61, profile_m: 60 },
  ],
  [
    'stones on an upright wall',
    {
      vessel: MOTOR_VESSEL,
      segment: {
        depth_m: 4,
        banks: { left: { distance_m: 30, stone_d50_m: 0.2, slope_h_per_v: 0 }, right: { distance_m: 30 } },
      },
    },
    ['#/segment/banks/left/slope_h_per_v'],
    { slope_h_per_v: 0, stone_d50_m: 0.2 },
  ],
  [
    'a level below the bed',
    under({ water_level_m: -4 }),
    ['#/conditions/water_level_m'],
    { water_level_m: -4, depth_m: 0 },
  ],
  [
    'a volume larger than the box',
    by({ displacement_m3: 2020 }),
    ['#/vessel/displacement_m3'],
    { displacement_m3: 2020, box_m3: 2018.75 },
  ],
  [
    'a receptor under the hull',
    on({ receptors: [{ kind: 'moored-small-craft', side: 'nearer', distance_m: 4 }] }),
    ['#/segment/receptors/0/distance_m'],
    { distance_m: 4, half_beam_m: 4.75 },
  ],
  [
    'a vessel that is met and too deep',
    under({ meeting_vessel: { class: 'cemt-iv', draught_m: 5 } }),
    ['#/conditions/meeting_vessel/draught_m'],
    { draught_m: 5, depth_m: 4 },
  ],
  [
    'two vessels as wide as the water',
    under({ meeting_vessel: { class: 'cemt-iv', beam_m: 50.5 } }),
    ['#/conditions/meeting_vessel/beam_m'],
    { beams_m: 60, width_m: 60 },
  ],
] as const)('%s is impossible, with both figures', async (_what, request, pointers, facts) => {
  // prettier-ignore
  const problem = expectProblem(await post(app, '/v1/advisories', request), 422, 'impossible-input')
  expect(problem.errors?.map(({ pointer }) => pointer)).toEqual(pointers)
  expect(problem.errors?.[0]).toMatchObject({ code: 'clash', facts })
})

test('everything that is impossible comes at once', async () => {
  const request = { ...by({ draught_m: 5, beam_m: 70, displacement_m3: 99_000 }) }
  const problem = expectProblem(await post(app, '/v1/advisories', request), 422, 'impossible-input')
  expect(problem.errors?.map(({ pointer }) => pointer)).toEqual([
    '#/vessel/draught_m',
    '#/vessel/beam_m',
    '#/vessel/displacement_m3',
  ])
})

test.each([
  [{}, '#/uncertainty required'],
  [{ depth_m: {} }, '#/uncertainty/depth_m one-of'],
  [{ depth_m: { sd: 1, half_range: 1 } }, '#/uncertainty/depth_m one-of'],
  [{ depth_m: { sd: 0 } }, '#/uncertainty/depth_m/sd out-of-range'],
  [{ depth_m: 0.3 }, '#/uncertainty/depth_m wrong-type'],
  [{ beam_m: { sd: 1 } }, '#/uncertainty/beam_m unknown-field'],
  [{ samples: 100, depth_m: { sd: 1 } }, '#/uncertainty/samples unknown-field'],
])('an uncertainty of %j is refused', async (uncertainty, fault) => {
  expect(await faults('/v1/advisories/sensitivity', { ...PLAIN, uncertainty })).toContain(fault)
})

test('an uncertainty that reaches below nothing is answered without that end', async () => {
  const body = { ...PLAIN, uncertainty: { draught_m: { sd: 9 }, depth_m: { half_range: 40 } } }
  const reply = expectReply(
    await post(app, '/v1/advisories/sensitivity', body),
    replyTo('POST', '/v1/advisories/sensitivity'),
  )
  for (const input of reply['inputs'] as Json[]) expect(input).not.toHaveProperty('at_low')
})

describe('addresses', () => {
  test.each([
    ['/v1/segments/..%2f..%2fetc%2fpasswd', 400, 'invalid-request'],
    ['/v1/segments/%2e%2e%2f', 400, 'invalid-request'],
    ['/v1/segments/%00', 400, 'invalid-request'],
    ['/v1/segments/gr%C3%B6%C3%9Fe', 400, 'invalid-request'],
    ['/v1/segments/a%0d%0ax-evil:1', 400, 'invalid-request'],
    ['/v1/segments/__proto__', 400, 'invalid-request'],
    ['/v1/segments/constructor', 404, 'segment-not-found'],
    [`/v1/segments/${'x'.repeat(65)}`, 400, 'invalid-request'],
    [`/v1/segments/${'x'.repeat(201)}`, 404, 'route-not-found'],
    ['/v1/segments/../../etc/passwd', 404, 'route-not-found'],
    ['/v1/segments/%zz', 400, 'invalid-request'],
    ['/v1/segments/%ff', 400, 'invalid-request'],
    ['/v1/segments/', 400, 'invalid-request'],
    ['/v1//segments', 404, 'route-not-found'],
    ['/V1/segments', 404, 'route-not-found'],
    ['/v1/segments/x/y/z', 404, 'route-not-found'],
    ['/v1/problems/internal-error', 404, 'problem-not-found'],
    ['/v1/problems/constructor', 404, 'problem-not-found'],
    ['/docs/static/..%2f..%2fpackage.json', 404, 'route-not-found'],
    ['/docs/static/../../package.json', 404, 'route-not-found'],
    ['/.env', 404, 'route-not-found'],
  ])('%s is %i', async (url, status, code) => {
    expectProblem(await app.inject(url), status, code)
  })

  test('a parameter given twice is refused, also when both are the same', async () => {
    const url = '/v1/segments/harrow-docks/advisory?vessel_class=tug&direction=upstream&direction=upstream'
    const problem = expectProblem(await app.inject(url), 400, 'invalid-request')
    expect(faultsOf(problem)).toEqual(['direction wrong-type'])
  })

  test('percent signs that stand for nothing do no harm in a query', async () => {
    const reply = await app.inject('/v1/segments?waterway=%zz%ff')
    expect(reply.json()).toMatchObject({ numberMatched: 0 })
  })
})

describe('headers', () => {
  test.each(['a b', 'a;b', 'é', 'x'.repeat(65), '<script>', '../x', ''])(
    'the request id %j is replaced by one of our own',
    async (id) => {
      const reply = await app.inject({ url: '/v1/segments/x', headers: { 'x-request-id': id } })
      expectProblem(reply, 404, 'segment-not-found')
      expect(reply.headers['x-request-id']).toMatch(/^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/)
    },
  )

  test('line ends in a header end the request with a problem, and reach no reply', async () => {
    const service = buildService()
    await service.app.listen({ host: '127.0.0.1', port: 0 })
    const socket = connect((service.app.server.address() as AddressInfo).port, '127.0.0.1')
    socket.end('GET /v1/segments/x HTTP/1.1\r\nhost: a\r\nx-request-id: a\rx-evil: 1\r\n\r\n')
    const chunks: Buffer[] = []
    socket.on('data', (chunk: Buffer) => chunks.push(chunk))
    await once(socket, 'close')
    const text = String(Buffer.concat(chunks))
    expect(text).toMatch(/^HTTP\/1\.1 400 /)
    expect(text.toLowerCase()).not.toContain('x-evil')
  })
})

/** One place of a value, with a way to put something else there. */
interface Place {
  readonly holder: Record<string, unknown>
  readonly key: string
}

function placesIn(value: unknown): Place[] {
  if (typeof value !== 'object' || value === null) return []
  const holder = value as Record<string, unknown>
  return Object.keys(holder).flatMap((key) => [{ holder, key }, ...placesIn(holder[key])])
}

const EXTREMES: readonly unknown[] = [
  ...[null, true, false, 0, -0, 1, -1, 0.1, 1e-300, 5e-324, 1e308, -1e308, Number.MAX_SAFE_INTEGER],
  ...['', '4', 'NaN', '__proto__', 'x'.repeat(300), '\u0000', '\ud800', 'größe'],
  ...[[], {}, [[]], [null], { a: 1 }, [0, 0, 0]],
]

const nearby = fc.double({ min: 0.01, max: 400, noNaN: true })

type Change = { readonly at: number } & (
  | { readonly kind: 'delete' }
  | { readonly kind: 'put'; readonly value: unknown }
  | { readonly kind: 'swap'; readonly with: number }
  | { readonly kind: 'add'; readonly name: string; readonly value: unknown }
)

const values = fc.oneof(
  { weight: 2, arbitrary: fc.constantFrom(...EXTREMES) },
  { weight: 5, arbitrary: nearby },
  { weight: 1, arbitrary: fc.jsonValue({ maxDepth: 3 }) },
)

const changes: fc.Arbitrary<Change> = fc.oneof(
  fc.record({ kind: fc.constant('delete' as const), at: fc.nat() }),
  fc.record({ kind: fc.constant('put' as const), at: fc.nat(), value: values }),
  fc.record({ kind: fc.constant('swap' as const), at: fc.nat(), with: fc.nat() }),
  fc.record({
    kind: fc.constant('add' as const),
    at: fc.nat(),
    name: fc.constantFrom('depth_m', 'banks', 'class', 'profile', 'label', 'id', 'hull', 'x', '__proto__'),
    value: values,
  }),
)

function applied(body: Json, change: Change): void {
  const places = placesIn(body)
  const place = places[change.at % places.length]
  if (!place) return
  const { holder, key } = place
  switch (change.kind) {
    case 'delete':
      Reflect.deleteProperty(holder, key)
      return
    case 'put':
      holder[key] = change.value
      return
    case 'add':
      holder[change.name] = change.value
      return
    case 'swap': {
      const other = places[change.with % places.length]!
      const kept = structuredClone(holder[key])
      holder[key] = structuredClone(other.holder[other.key])
      other.holder[other.key] = kept
    }
  }
}

const StrictProblem = strict(Problem)
const ALLOWED = [200, 400, 404, 413, 415, 422]

function isFinite(value: unknown): boolean {
  if (typeof value === 'number') return Number.isFinite(value)
  return typeof value !== 'object' || value === null || Object.values(value).every(isFinite)
}

const requests = Object.values(REQUESTS).filter(({ options }) => options?.['curve'] !== true)
const seeds = fc.constantFrom(
  ...requests.map((request) => ['/v1/advisories', request] as const),
  ...requests.map((request) => ['/v1/effects', { ...request, ...SAILED }] as const),
  ...requests.slice(0, 6).map((request) => ['/v1/advisories/inverse', { ...request, ...SAILED, vary: 'depth_m' }] as const),
  ...requests.map((request) => ['/v1/advisories/sensitivity', { ...request, uncertainty: { depth_m: { sd: 0.1 } } }] as const),
  ...requests.map(({ segment, vessel }) => ['/v1/advisories/matrix', { segments: [segment], vessels: [vessel] }] as const),
  ...requests.map((request) => [STREAM, request] as const),
) // prettier-ignore

test('thousands of mutated requests are each answered or refused as documented, soon, and never fail', async () => {
  const seen = new Map<number, number>()
  await fc.assert(
    fc.asyncProperty(seeds, fc.array(changes, { minLength: 1, maxLength: 4 }), async ([url, seed], list) => {
      const body = structuredClone(seed) as Json
      for (const change of list) applied(body, change)
      const started = performance.now()
      const reply = await post(app, url, body, url === STREAM ? NDJSON : {})
      const took = performance.now() - started
      const status = reply.statusCode
      seen.set(status, (seen.get(status) ?? 0) + 1)
      expect(ALLOWED, reply.body.slice(0, 500)).toContain(status)
      expect(took).toBeLessThan(2000)
      if (status !== 200) {
        expect(StrictProblem.safeParse(reply.json()).error?.issues ?? []).toEqual([])
        return
      }
      const schema = replyTo('POST', url)
      for (const answer of linesOf(reply.body)) {
        expect(schema.safeParse(answer).error?.issues ?? []).toEqual([])
        expect(isFinite(answer)).toBe(true)
        const { problem, problem_code: code } = answer as { problem?: Json; problem_code?: unknown }
        expect(problem?.['status'] ?? 200).not.toBe(500)
        expect(code).not.toBe('internal')
      }
    }),
    { seed: 20_261_203, numRuns: 3000 },
  )
  // Both ends are reached often, or the mutations are too tame or too wild.
  expect(seen.get(200)).toBeGreaterThan(500)
  expect(seen.get(400)).toBeGreaterThan(500)
  expect(seen.get(422)).toBeGreaterThan(20)
  expect(seen.get(404)).toBeGreaterThan(0)
})
