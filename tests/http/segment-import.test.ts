import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import { makeChannel } from '../support/geodesic.ts'
import { canal, collection, registryService } from '../support/registry-service.ts'
import { expectProblem, faultsOf, type Json } from '../support/service.ts'

const IMPORT = '/v1/segments/import'

interface Told {
  readonly pointer: string
  readonly feature_id?: string
  readonly code: string
  readonly detail: string
  readonly facts?: Json
}

interface Imported {
  readonly faults: Told[]
  readonly remarks: Told[]
}

const lineString = (coordinates: unknown) => ({ type: 'LineString', coordinates })
const along = (id: string, coordinates: unknown, properties: Json = {}) => ({
  ...canal(id, properties),
  geometry: lineString(coordinates),
})
const told = (items: readonly Told[]) => items.map(({ pointer, code }) => `${pointer} ${code}`)

async function imported(...features: readonly unknown[]): Promise<Imported> {
  const reply = await registryService().post(IMPORT, collection(...features))
  expect(reply.statusCode, reply.body).toBe(200)
  return reply.json()
}

describe('an import', () => {
  test('creates, replaces and leaves alone by id, as one write', async () => {
    const { post, get } = registryService()
    const first = await post(IMPORT, collection(canal('a'), canal('b')), {
      'content-type': 'application/geo+json',
    })
    expect(first.headers['registry-revision']).toBe('1')
    expect(first.json()).toEqual({
      dry_run: false,
      features: 2,
      created: 2,
      updated: 0,
      unchanged: 0,
      registry_revision: 1,
      faults: [],
      remarks: [],
    })
    const again = await post(IMPORT, collection(canal('a'), canal('b', { depth_m: 5 }), canal('c')))
    expect(again.json()).toMatchObject({ created: 1, updated: 1, unchanged: 1, registry_revision: 2 })
    const list: { features: { id: string; properties: Json }[] } = (await get('/v1/segments')).json()
    expect(list.features.map(({ id, properties }) => [id, properties['revision']])).toEqual([
      ['a', 1],
      ['b', 2],
      ['c', 1],
    ])
    const revisions = (await get('/v1/segments/b/revisions')).json<{ items: Json[] }>().items
    expect(revisions.map(({ action, changed }) => [action, changed])).toEqual([
      ['imported', ['depth_m']],
      ['imported', expect.any(Array)],
    ])
  })

  test('of what is there already makes no revision', async () => {
    const { post } = registryService()
    await post(IMPORT, collection(canal('a')))
    expect((await post(IMPORT, collection(canal('a')))).json()).toMatchObject({
      unchanged: 1,
      registry_revision: 1,
    })
  })

  test('with one fault among many features writes nothing', async () => {
    const { post, get } = registryService()
    const features = Array.from({ length: 120 }, (_, i) => canal(`s${i}`, i === 117 ? { depth_m: 0 } : {}))
    const reply = await post(IMPORT, collection(...features))
    const problem = expectProblem(reply, 400, 'invalid-request')
    expect(problem.errors).toHaveLength(1)
    expect(problem.errors?.[0]).toMatchObject({
      pointer: '#/features/117/properties/depth_m',
      feature_id: 's117',
      code: 'out-of-range',
    })
    const list = await get('/v1/segments')
    expect(list.json()).toMatchObject({ numberMatched: 0 })
    expect(list.headers['registry-revision']).toBe('0')
  })

  test('tells every fault at once: 400 when a field is wrong by itself, 422 when fields only clash', async () => {
    const { post } = registryService()
    const clashing = canal('b', { bank_distance_m: 31 })
    const both = await post(
      IMPORT,
      collection(canal('a', { depth: 3 }), clashing, { ...canal('c'), id: 'no good' }),
    )
    expect(faultsOf(expectProblem(both, 400, 'invalid-request')).sort()).toEqual([
      '#/features/0/properties/depth unknown-field',
      '#/features/1/properties/bank_distance_m clash',
      '#/features/2/id pattern',
    ])
    const one = expectProblem(await post(IMPORT, collection(canal('a'), clashing)), 422, 'impossible-input')
    expect(one.errors?.[0]).toMatchObject({
      pointer: '#/features/1/properties/bank_distance_m',
      feature_id: 'b',
      facts: { bank_distance_m: 31, half_width_m: 30 },
    })
  })

  test('as a dry run writes nothing, foresees what it would make and lists every fault with its feature', async () => {
    const { post, get } = registryService()
    await post(IMPORT, collection(canal('a'), canal('b')))
    const features = [canal('a'), canal('b', { depth_m: 5 }), canal('c'), canal('d', { width_m: 'wide' })]
    const reply = await post(
      `${IMPORT}?dry_run=true`,
      collection(...features, canal('e', { bank_distance_m: 31 })),
    )
    expect(reply.statusCode).toBe(200)
    const body = reply.json<Imported>()
    expect(body).toMatchObject({
      dry_run: true,
      features: 5,
      created: 1,
      updated: 1,
      unchanged: 1,
      registry_revision: 1,
    })
    expect(body.faults.map(({ pointer, feature_id, code }) => [pointer, feature_id, code])).toEqual([
      ['#/features/3/properties/width_m', 'd', 'wrong-type'],
      ['#/features/4/properties/bank_distance_m', 'e', 'clash'],
    ])
    expect((await get('/v1/segments')).json()).toMatchObject({ numberMatched: 2 })
    expect((await get('/v1/segments/b')).headers.etag).toBe('"1"')
  })

  test('names each id once: a repeated one is told with its feature', async () => {
    const { post, get } = registryService()
    const features = collection(canal('a'), canal('b'), canal('a', { depth_m: 5 }))
    const problem = expectProblem(await post(IMPORT, features), 422, 'impossible-input')
    expect(problem.errors?.map(({ pointer, feature_id, facts }) => [pointer, feature_id, facts])).toEqual([
      ['#/features/2/id', 'a', { first: 0 }],
    ])
    const dry = (await post(`${IMPORT}?dry_run=true`, features)).json<Imported>()
    expect(told(dry.faults)).toEqual(['#/features/2/id clash'])
    expect((await get('/v1/segments')).json()).toMatchObject({ numberMatched: 0 })
  })

  test('refuses foreign properties, or keeps them as attributes that never count', async () => {
    const { post, get } = registryService()
    const foreign = canal('a', {
      OBJECTID: 17,
      remark: 'old',
      locked: false,
      empty: null,
      list: [1, 2],
      attributes: { remark: 'own' },
    })
    const problem = expectProblem(await post(IMPORT, collection(foreign)), 400, 'invalid-request')
    expect(faultsOf(problem).sort()).toEqual([
      '#/features/0/properties/OBJECTID unknown-field',
      '#/features/0/properties/empty unknown-field',
      '#/features/0/properties/list unknown-field',
      '#/features/0/properties/locked unknown-field',
      '#/features/0/properties/remark unknown-field',
    ])
    expect((await post(`${IMPORT}?unknown=keep`, collection(foreign))).json()).toMatchObject({ created: 1 })
    const { properties } = (await get('/v1/segments/a')).json<{ properties: Json }>()
    expect(properties['attributes']).toEqual({ OBJECTID: 17, remark: 'own', locked: false, list: '[1,2]' })
    expect(properties).not.toHaveProperty('OBJECTID')
    // a misspelt field of ours is foreign too, so the segment still lacks its depth
    const { depth_m, ...rest } = canal('b').properties
    const misspelt = { ...canal('b'), properties: { ...rest, depht_m: depth_m } }
    const lacking = await post(`${IMPORT}?unknown=keep`, collection(misspelt))
    expect(faultsOf(expectProblem(lacking, 400, 'invalid-request'))).toEqual([
      '#/features/0/properties/depth_m required',
    ])
  })

  test.each([
    ['another type', '', { type: 'Feature', features: [canal('a')] }, '#/type not-in-list'],
    ['no features', '', collection(), '#/features out-of-range'],
    ['no list of features', '', { type: 'FeatureCollection' }, '#/features required'],
    ['another word for true', '?dry_run=yes', collection(canal('a')), 'dry_run wrong-type'],
    ['an unknown way with the unknown', '?unknown=drop', collection(canal('a')), 'unknown not-in-list'],
    ['a misspelt parameter', '?dryrun=true', collection(canal('a')), 'dryrun unknown-field'],
  ])('with %s is refused', async (_what, query, body, fault) => {
    const { post, get } = registryService()
    const problem = expectProblem(await post(`${IMPORT}${query}`, body), 400, 'invalid-request')
    expect(faultsOf(problem)).toEqual([fault])
    expect((await get('/v1/segments')).json()).toMatchObject({ numberMatched: 0 })
  })

  test('without an id is refused', async () => {
    const { id: _, ...nameless } = canal('a')
    const reply = await registryService().post(IMPORT, collection(nameless))
    expect(faultsOf(expectProblem(reply, 400, 'invalid-request'))).toEqual(['#/features/0/id required'])
  })

  test('may be larger than other bodies, and tells at most 1000 of its faults', async () => {
    const { post } = registryService()
    const features = Array.from({ length: 1200 }, (_, i) =>
      canal(`s${i}`, { depth_m: -1, attributes: { note: 'x'.repeat(1000) } }),
    )
    const problem = expectProblem(await post(IMPORT, collection(...features)), 400, 'invalid-request')
    expect(problem.errors).toHaveLength(1000)
    expect(problem.errors_truncated).toBe(true)
  })

  test('tells that there are more than 1000 faults or remarks', async () => {
    const { post } = registryService()
    const features = (number: number, properties: Json) =>
      Array.from({ length: number }, (_, i) => canal(`s${i}`, properties))
    const dry = async (number: number, properties: Json) => {
      const reply = await post(`${IMPORT}?dry_run=true`, collection(...features(number, properties)))
      const { faults, remarks, ...rest } = reply.json<Imported & Json>()
      return [faults.length, rest['faults_truncated'], remarks.length, rest['remarks_truncated']]
    }
    const doubtful = { chainage_from_m: 0, chainage_to_m: 9000 }
    expect(await dry(1000, { depth_m: -1 })).toEqual([1000, undefined, 0, undefined])
    expect(await dry(1001, { depth_m: -1 })).toEqual([1000, true, 0, undefined])
    expect(await dry(1000, doubtful)).toEqual([0, undefined, 1000, undefined])
    expect(await dry(1001, doubtful)).toEqual([0, undefined, 1000, true])
  })
})

describe('geometry', () => {
  const HERE = [canal('p'), canal('q'), canal('r')]

  test('with swapped axes is refused where a latitude cannot be, and doubted where it lies far from the others', async () => {
    const { post } = registryService()
    const wrong = await post(IMPORT, collection(along('a', [[54, 103], [54, 103.01]]))) // prettier-ignore
    const problem = expectProblem(wrong, 400, 'invalid-request')
    expect(faultsOf(problem)).toEqual(['#/features/0/geometry/coordinates/0 out-of-range'])
    expect(problem.errors?.[0]?.detail).toContain('latitude before longitude')
    const { remarks } = await imported(...HERE, along('a', [[54, 3], [54, 3.01]])) // prettier-ignore
    expect(remarks.map(({ pointer, feature_id, code }) => [pointer, feature_id, code])).toEqual([
      ['#/features/3/geometry/coordinates', 'a', 'axes-doubtful'],
    ])
  })

  test.each([
    ['of a national grid', [[155_000, 463_000], [156_000, 463_000]], 'looks projected'], // prettier-ignore
    ['of UTM', [[500_000, 5_984_000], [500_900, 5_984_100]], 'looks projected'], // prettier-ignore
    ['north of 85 degrees', [[3, 85.01], [3.1, 85.01]], 'latitudes beyond 85 degrees'], // prettier-ignore
    ['south of 85 degrees', [[3, -85.01], [3.1, -85.01]], 'latitudes beyond 85 degrees'], // prettier-ignore
    ['beyond 180 degrees', [[179.9, 10], [180.1, 10]], 'write the longitude as -179.9'], // prettier-ignore
    ['of one place', [[3, 54], [3, 54]], 'no length'], // prettier-ignore
    ['of one position', [[3, 54]], 'two positions'],
    ['that runs back', [[3, 54], [3.02, 54], [3.01, 54]], 'runs back on itself'], // prettier-ignore
    ['that is text', [['3', '54'], ['3.1', '54']], 'not a position'], // prettier-ignore
    ['that is null', [[3, null], [3.1, 54]], 'not a position'], // prettier-ignore
  ])('%s is refused in words that say what to do', async (_what, coordinates, words) => {
    const { post } = registryService()
    const problem = expectProblem(
      await post(IMPORT, collection(along('a', coordinates))),
      400,
      'invalid-request',
    )
    expect(problem.errors).toHaveLength(1)
    expect(problem.errors?.[0]?.pointer).toMatch(/^#\/features\/0\/geometry\/coordinates/)
    expect(problem.errors?.[0]?.feature_id).toBe('a')
    expect(problem.errors?.[0]?.detail).toContain(words)
  })

  test('at 85 degrees and across the antimeridian is taken, and found on both sides of it', async () => {
    const { post, get } = registryService()
    const features = collection(
      along('far-north', [[3, 85], [3.1, 85]]), // prettier-ignore
      along('dateline', [[179.99, 0], [-179.99, 0]]), // prettier-ignore
    )
    expect((await post(IMPORT, features)).json()).toMatchObject({ created: 2, remarks: [] })
    const { properties, bbox } = (await get('/v1/segments/dateline')).json<{
      properties: Json
      bbox: number[]
    }>()
    // 0.02 degrees of the equator, whose radius is 6378137 m
    expect(properties['length_m']).toBeCloseTo(2226.39, 2)
    expect(bbox).toEqual([179.99, 0, -179.99, 0])
    for (const box of ['179.98,-1,179.995,1', '-179.995,-1,-179.98,1', '179,-1,-179,1']) {
      const list = (await get(`/v1/segments?bbox=${box}`)).json<{ features: { id: string }[] }>()
      expect(list.features.map(({ id }) => id)).toEqual(['dateline'])
    }
    expect((await get('/v1/segments?bbox=-1,-1,1,1')).json()).toMatchObject({ numberMatched: 0 })
  })

  test('that crosses itself, repeats a vertex or has heights is taken with a remark', async () => {
    const loop = [[3, 54], [3.02, 54.01], [3.02, 54], [3, 54.01]] // prettier-ignore
    const repeated = [[3, 54], [3, 54], [3.01, 54]] // prettier-ignore
    const heights = [[3, 54, 7], [3.01, 54, 7]] // prettier-ignore
    const { remarks } = await imported(along('a', loop), along('b', repeated), along('c', heights))
    expect(remarks.map(({ feature_id, code }) => [feature_id, code])).toEqual([
      ['a', 'crosses-itself'],
      ['b', 'positions-dropped'],
      ['c', 'height-dropped'],
    ])
  })

  test('of another kind than a line is refused', async () => {
    const area = { type: 'Polygon', coordinates: [[[3, 54], [3.1, 54], [3.1, 54.1], [3, 54]]] } // prettier-ignore
    const reply = await registryService().post(IMPORT, collection({ ...canal('a'), geometry: area }))
    const problem = expectProblem(reply, 400, 'invalid-request')
    expect(faultsOf(problem)).toEqual(['#/features/0/geometry/type wrong-type'])
    expect(problem.errors?.[0]?.detail).toContain('Polygon')
  })

  test('whose chainage differs from its length is taken with a remark, one without a span is not', async () => {
    const { remarks } = await imported(withLines('a', CHANNEL, { chainage_from_m: 0, chainage_to_m: 9000 }))
    expect(remarks.map(({ code }) => code)).toEqual(['chainage-differs-from-length'])
    const noSpan = withLines('a', CHANNEL, { chainage_from_m: 500, chainage_to_m: 500 })
    const reply = await registryService().post(IMPORT, collection(noSpan))
    expect(expectProblem(reply, 422, 'impossible-input').errors?.[0]?.feature_id).toBe('a')
  })
})

// 1500 m straight, the left bank at 20 m and the right one at 40 m, made by geodesics alone
const CHANNEL = makeChannel([3, 54], 60, [{ length: 1500 }], () => [20, 40])

interface Banks {
  readonly axis: readonly LonLat[]
  readonly left: readonly LonLat[]
  readonly right: readonly LonLat[]
}

const withLines = (id: string, { axis, left, right }: Banks, properties: Json = {}) => ({
  type: 'Feature',
  id,
  geometry: lineString(axis),
  properties: {
    depth_m: 4,
    banks: { left: { line: lineString(left), kind: 'riprap' }, right: { line: lineString(right) } },
    ...properties,
  },
})

interface Answer {
  readonly outcome: string
  readonly governing_criterion: string
  readonly governing_at: string
  readonly recommended_max_speed: { readonly through_water: { readonly mps: number } }
  readonly at_recommended_speed: {
    readonly bank_wave_height_m: number
    readonly drawdown_m: number
    readonly return_current_mps: number
    readonly banks: { readonly side: string; readonly distance_m: number; readonly wave_height_m: number }[]
  }
}

async function answers(feature: unknown): Promise<{ answer: Answer; remarks: string[] }> {
  const { post, get } = registryService()
  const reply = await post(IMPORT, collection(feature))
  expect(reply.statusCode, reply.body).toBe(200)
  const answer = await get('/v1/segments/a/advisory?vessel_class=cemt-iii')
  expect(answer.statusCode, answer.body).toBe(200)
  return { answer: answer.json(), remarks: reply.json<Imported>().remarks.map(({ code }) => code) }
}

describe('bank lines', () => {
  const described = {
    type: 'Feature',
    id: 'a',
    geometry: lineString(CHANNEL.axis),
    properties: {
      depth_m: 4,
      banks: { left: { distance_m: 20, kind: 'riprap' }, right: { distance_m: 40 } },
    },
  }

  const figuresOf = ({ recommended_max_speed, at_recommended_speed }: Answer) => {
    const { banks, bank_wave_height_m, drawdown_m, return_current_mps } = at_recommended_speed
    return [
      recommended_max_speed.through_water.mps,
      bank_wave_height_m,
      drawdown_m,
      return_current_mps,
      ...banks.flatMap(({ distance_m, wave_height_m }) => [distance_m, wave_height_m]),
    ]
  }

  function expectSame(found: Answer, expected: Answer): void {
    expect([found.outcome, found.governing_criterion, found.governing_at]).toEqual([
      expected.outcome,
      expected.governing_criterion,
      expected.governing_at,
    ])
    expect(found.at_recommended_speed.banks.map(({ side }) => side)).toEqual(['left', 'right'])
    const figures = figuresOf(expected)
    figuresOf(found).forEach((figure, i) => {
      expect(Math.abs(figure / figures[i]! - 1)).toBeLessThan(1e-3)
    })
  }

  test('give the distances: parallel ones answer as the distances themselves do', async () => {
    const expected = (await answers(described)).answer
    expect(expected.at_recommended_speed.banks.map(({ distance_m }) => distance_m)).toEqual([20, 40])
    const { answer, remarks } = await answers(withLines('a', CHANNEL))
    expect(remarks).toEqual([])
    expectSame(answer, expected)
    const nearer = withLines(
      'a',
      makeChannel([3, 54], 60, [{ length: 1500 }], () => [16, 40]),
    )
    const closer = (await answers(nearer)).answer
    expect(closer.recommended_max_speed.through_water.mps).toBeLessThan(
      expected.recommended_max_speed.through_water.mps - 0.01,
    )
  })

  test('may run in either order of vertices, and swapped ones are swapped back with a remark', async () => {
    const expected = (await answers(described)).answer
    const { axis, left, right } = CHANNEL
    const reversed = await answers(
      withLines('a', { axis, left: left.toReversed(), right: right.toReversed() }),
    )
    expect(reversed.remarks).toEqual([])
    expectSame(reversed.answer, expected)
    const swapped = await answers(withLines('a', { axis, left: right, right: left }))
    expect(swapped.remarks).toEqual(['banks-swapped'])
    const distances = swapped.answer.at_recommended_speed.banks.map(({ side, distance_m }) => [
      side,
      Math.round(distance_m),
    ])
    expect(distances).toEqual([
      ['left', 20],
      ['right', 40],
    ])
  })

  test('on one side, across the sailing line or far away are 422 with their place', async () => {
    const { axis, left, right } = CHANNEL
    const across = [left[0]!, right.at(-1)!]
    const away = left.map(([lon, lat]): LonLat => [lon, lat + 1])
    for (const [lines, pointer] of [
      [{ axis, left, right: left }, '#/features/0/properties/banks'],
      [{ axis, left: across, right }, '#/features/0/properties/banks/left/line'],
      [{ axis, left: away, right }, '#/features/0/properties/banks/left/line'],
    ] as const) {
      const reply = await registryService().post(IMPORT, collection(withLines('a', lines)))
      const problem = expectProblem(reply, 422, 'impossible-input')
      expect(problem.errors?.[0]?.code).toBe('clash')
      expect(problem.errors?.[0]?.pointer?.startsWith(pointer)).toBe(true)
    }
  })

  test('of one bank and nothing of the other are refused, and short ones and other widths are remarks', async () => {
    const one = { banks: { left: { line: lineString(CHANNEL.left) }, right: {} } }
    const reply = await registryService().post(IMPORT, collection(withLines('a', CHANNEL, one)))
    expect(faultsOf(expectProblem(reply, 400, 'invalid-request'))).toEqual([
      '#/features/0/properties/banks/right/distance_m required',
    ])
    const short = { ...CHANNEL, left: CHANNEL.left.slice(0, 20) }
    const stations = [{ chainage_m: 0, depth_m: 4, width_m: 90, left_distance_m: 30, right_distance_m: 60 }]
    const { remarks } = await imported(
      withLines('a', short),
      withLines('b', CHANNEL, { depth_m: undefined, stations }),
    )
    expect(remarks.map(({ feature_id, code }) => [feature_id, code])).toEqual([
      ['a', 'bank-too-short'],
      ['b', 'widths-differ'],
    ])
  })
})

const DATA = new URL('../../../shared/data/', import.meta.url)
const CENTRE_LINES = existsSync(DATA) ? readdirSync(DATA).filter((name) => name.endsWith('.geojson')) : []

interface CentreLine {
  readonly type: 'Feature'
  readonly id: string
  readonly geometry: unknown
  readonly properties: Json & { readonly ctrl_depth_ft: number }
}

const FOOT = 0.3048 // m
/** Project width of this canal: 125 feet. The data have none, so the sailing line is taken to lie in the middle. */
const WIDTH = 125 * FOOT

/** A link of the published centre lines as a segment: what the service needs beside what the data hold. */
const toSegment = ({ type, id, geometry, properties }: CentreLine) => ({
  type,
  id,
  geometry,
  properties: {
    ...properties,
    depth_m: properties.ctrl_depth_ft * FOOT,
    width_m: WIDTH,
    bank_distance_m: WIDTH / 2,
  },
})

describe('published centre lines', () => {
  test.skipIf(CENTRE_LINES.length === 0)('are all imported and answered for a small boat', async () => {
    const { post, get } = registryService()
    const features = CENTRE_LINES.flatMap((name) => {
      const file = JSON.parse(readFileSync(new URL(name, DATA), 'utf8')) as { features: CentreLine[] }
      return file.features.map(toSegment)
    })
    expect(features.length).toBeGreaterThan(50)
    const dry = await post(`${IMPORT}?dry_run=true&unknown=keep`, collection(...features))
    expect(told(dry.json<Imported>().faults)).toEqual([])
    const reply = await post(`${IMPORT}?unknown=keep`, collection(...features))
    expect(reply.json()).toMatchObject({ created: features.length, registry_revision: 1 })
    for (const { id, properties } of features) {
      const advisory = await get(`/v1/segments/${id}/advisory?vessel_class=recreational-ra`)
      expect(advisory.statusCode, `${id}: ${advisory.body}`).toBe(200)
      expect(['limited', 'service-speed', 'no-safe-speed']).toContain(advisory.json<Answer>().outcome)
      const kept = (await get(`/v1/segments/${id}`)).json<{ properties: Json }>().properties
      expect(kept['attributes']).toMatchObject({ ctrl_depth_ft: properties.ctrl_depth_ft })
    }
  })
})
