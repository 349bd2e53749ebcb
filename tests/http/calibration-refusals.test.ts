import { gzipSync } from 'node:zlib'
import { describe, expect, test } from 'vitest'
import { calibrationOf, CSV, csvOf, NDJSON, ndjsonOf, tugs } from '../support/measured.ts'
import { addKey, canal, registryService } from '../support/registry-service.ts'
import { expectProblem, faultsOf, type Json } from '../support/service.ts'

const URL = '/v1/calibrations'
const QUERY = `${URL}?name=Trial&method_ids=blaauw-1984`

/** Tugs of which one row is changed; fields that become undefined are left out. */
const changed = (index: number, changes: Json): Json[] =>
  tugs().map((row, i) => (i === index ? { ...row, ...changes } : row))

describe('rows', () => {
  test.each([
    ['a wave of no height', { max_wave_height_m: 0 }, 'max_wave_height_m out-of-range'],
    ['a negative height', { max_wave_height_m: -0.2 }, 'max_wave_height_m out-of-range'],
    ['a speed of no vessel', { speed_mps: 41 }, 'speed_mps out-of-range'],
    ['two speeds', { speed_kn: 5 }, 'speed_kn one-of'],
    ['no speed', { speed_mps: undefined }, ' one-of'],
    ['no reference', { speed_reference: undefined }, 'speed_reference required'],
    ['an unknown field', { depth: 4 }, 'depth unknown-field'],
    ['an unknown class', { vessel_class: 'tugg' }, 'vessel_class not-in-list'],
    [
      'a vessel without class and hull',
      { vessel_class: undefined, length_m: 20, beam_m: 5 },
      'hull required',
    ],
    ['a time without a zone', { time: '2026-03-01T12:00:00' }, 'time pattern'],
    [
      'a current and no direction',
      { speed_reference: 'over-ground', current_mps: 0.5 },
      'direction required',
    ],
  ])('%s is 400 with its place', async (_, changes, fault) => {
    const { post } = registryService()
    const problem = expectProblem(await post(URL, calibrationOf(changed(3, changes))), 400, 'invalid-request')
    const [field = '', code] = fault.split(' ')
    expect(faultsOf(problem)).toEqual([`#/passages/3${field === '' ? '' : `/${field}`} ${code}`])
  })

  test.each([
    ['a draught of the depth', { draught_m: 4 }, 'draught_m', { draught_m: 4, depth_m: 4 }],
    ['a hull wider than the water', { width_m: 8, distance_m: 6 }, 'beam_m', { beam_m: 9, width_m: 8 }],
    ['a gauge under the hull', { distance_m: 4.5 }, 'distance_m', { distance_m: 4.5, half_beam_m: 4.5 }],
    ['a gauge beyond the water', { width_m: 30 }, 'distance_m', { distance_m: 34.5, width_m: 30 }],
    [
      'a current that carries all',
      { speed_mps: 1, speed_reference: 'over-ground', current_mps: 1.5, direction: 'downstream' },
      'current_mps',
      { speed_over_ground_mps: 1, current_mps: 1.5 },
    ],
  ])('%s is 422 with both figures', async (_, changes, field, facts) => {
    const { post } = registryService()
    const reply = await post(URL, calibrationOf(changed(2, changes)))
    const problem = expectProblem(reply, 422, 'impossible-input')
    expect(problem.errors).toMatchObject([{ pointer: `#/passages/2/${field}`, code: 'clash', facts }])
  })

  test('every bad row is told at once, by pointer, by line, and by column and line', async () => {
    const { post } = registryService()
    const rows = changed(1, { max_wave_height_m: -1 }).map((row, i) =>
      i === 4 ? { ...row, depth_m: 0, vessel_class: 'none' } : i === 6 ? { ...row, draught_m: 9 } : row,
    )
    const json = expectProblem(await post(URL, calibrationOf(rows)), 400, 'invalid-request')
    expect(faultsOf(json)).toEqual([
      '#/passages/1/max_wave_height_m out-of-range',
      '#/passages/4/depth_m out-of-range',
      '#/passages/6/draught_m clash',
    ])
    const places = (problem: typeof json) =>
      problem.errors?.map(({ line, pointer, parameter }) => [line, pointer ?? parameter])
    const lines = expectProblem(await post(QUERY, ndjsonOf(rows), NDJSON), 400, 'invalid-request')
    expect(places(lines)).toEqual([
      [2, '#/max_wave_height_m'],
      [5, '#/depth_m'],
      [7, '#/draught_m'],
    ])
    const cells = expectProblem(await post(QUERY, csvOf(rows), CSV), 400, 'invalid-request')
    expect(places(cells)).toEqual([
      [3, 'max_wave_height_m'],
      [6, 'depth_m'],
      [8, 'draught_m'],
    ])
  })

  test('a line that cannot be read is told beside the others', async () => {
    const { post } = registryService()
    const text = `${ndjsonOf(tugs())}{"speed_mps":\n${ndjsonOf(changed(0, { depth_m: 0 }))}`
    const problem = expectProblem(await post(QUERY, text, NDJSON), 400, 'invalid-request')
    expect(problem.errors?.map(({ line }) => line)).toEqual([8, 9])
    const broken = expectProblem(await post(QUERY, `${csvOf(tugs())}1,2\r\n`, CSV), 400, 'invalid-request')
    expect(broken.errors).toMatchObject([{ line: 9 }])
  })

  test('a header with an unknown column is refused before the rows', async () => {
    const { post } = registryService()
    const text = csvOf(tugs()).replace('depth_m', 'depth')
    const problem = expectProblem(await post(QUERY, text, CSV), 400, 'invalid-request')
    expect(problem.errors).toMatchObject([{ parameter: 'depth', line: 1, code: 'unknown-field' }])
  })
})

describe('requests', () => {
  test.each([
    ['no name', { name: undefined }, '#/name required'],
    ['an unknown method', { method_ids: ['blaauw'] }, '#/method_ids/0 not-in-list'],
    ['a method twice', { method_ids: ['blaauw-1984', 'blaauw-1984'] }, '#/method_ids clash'],
    ['a seed that is no whole number', { seed: 1.5 }, '#/seed wrong-type'],
    ['an unknown field', { unit: 'm' }, '#/unit unknown-field'],
    ['no list', { passages: 'none' }, '#/passages wrong-type'],
  ])('%s is 400', async (_, changes, fault) => {
    const { post } = registryService()
    const problem = expectProblem(await post(URL, calibrationOf(tugs(), changes)), 400, 'invalid-request')
    expect(faultsOf(problem)).toEqual([fault])
  })

  test('what is wrong beside the rows is told with what is wrong with them', async () => {
    const { post } = registryService()
    const rows = changed(2, { depth_m: 0 })
    const json = expectProblem(await post(URL, calibrationOf(rows, { name: '' })), 400, 'invalid-request')
    expect(faultsOf(json)).toEqual(['#/name out-of-range', '#/passages/2/depth_m out-of-range'])
    const cells = expectProblem(await post(URL, csvOf(rows), CSV), 400, 'invalid-request')
    expect(faultsOf(cells)).toEqual(['name required', 'depth_m out-of-range'])
  })

  test('what belongs in the query is asked for there, and refused beside a JSON body', async () => {
    const { post } = registryService()
    const nameless = expectProblem(await post(URL, csvOf(tugs()), CSV), 400, 'invalid-request')
    expect(faultsOf(nameless)).toEqual(['name required'])
    const both = expectProblem(await post(QUERY, calibrationOf(tugs())), 400, 'invalid-request')
    expect(faultsOf(both)).toEqual(['name clash', 'method_ids clash'])
    expectProblem(await post(`${URL}?name=a&method_ids=x`, csvOf(tugs()), CSV), 400, 'invalid-request')
  })

  test('a segment that does not exist is 404', async () => {
    const { post, put } = registryService()
    await put('/v1/segments/a', canal('a'))
    const reply = await post(URL, calibrationOf(tugs(), { segment_id: 'b' }))
    expect(expectProblem(reply, 404, 'segment-not-found').facts).toEqual({ segment_id: 'b', nearest: 'a' })
  })

  test('fewer than five passages are 422, sent or in range', async () => {
    const { post, get } = registryService()
    for (const count of [0, 4]) {
      const reply = await post(URL, calibrationOf(tugs().slice(0, count)))
      expect(expectProblem(reply, 422, 'too-few-passages').facts).toEqual({ passages: count, needed: 5 })
    }
    // above 0.8 of √(g h), where Blaauw et al. end
    const fast = tugs().map((row, i) => (i > 2 ? { ...row, speed_mps: 6 } : row))
    const problem = expectProblem(await post(URL, calibrationOf(fast)), 422, 'too-few-passages')
    expect(problem.facts).toEqual({ passages: 3, needed: 5, in_range: ['blaauw-1984: 3'] })
    expect(problem.detail).toContain('blaauw-1984: 3')
    expect((await get(URL)).json<Json>()['items']).toEqual([])
  })

  test.each([
    ['feet', 3.3, /feet/],
    ['metres for feet', 0.3, /metres/],
  ])('heights like %s are 422 unless they are confirmed', async (_, ratio, detail) => {
    const { post } = registryService()
    const rows = tugs(Array.from({ length: 7 }, () => ratio))
    const problem = expectProblem(await post(URL, calibrationOf(rows)), 422, 'units-doubtful')
    expect(problem.facts?.['ratio']).toBeCloseTo(ratio, 3)
    expect(problem.detail).toMatch(detail)
    const confirmed = await post(URL, calibrationOf(rows, { confirm_units: true }))
    expect(confirmed.statusCode).toBe(201)
    expect((await post(`${QUERY}&confirm_units=true`, csvOf(rows), CSV)).statusCode).toBe(201)
  })

  test.each([2.9, 3.65, 0.27, 0.34])('a factor of %d is not like feet', async (ratio) => {
    const { post } = registryService()
    const rows = tugs(Array.from({ length: 7 }, () => ratio))
    expect((await post(URL, calibrationOf(rows))).statusCode).toBe(201)
  })

  test('ten thousand passages are taken, and one more is 413', async () => {
    const { post } = registryService()
    const many = Array.from({ length: 10_001 }, (_, i) => tugs()[i % 7] ?? {})
    for (const reply of [
      await post(URL, calibrationOf(many)),
      await post(QUERY, ndjsonOf(many), NDJSON),
      await post(QUERY, csvOf(many), CSV),
    ]) {
      expect(expectProblem(reply, 413, 'payload-too-large').facts).toEqual({ limit: 10_000 })
    }
    const reply = await post(QUERY, csvOf(many.slice(1)), CSV)
    expect(reply.json<Json>()['passages'], reply.body.slice(0, 500)).toBe(10_000)
  }, 60_000)

  test('a body over 16 MiB, packed or not, is 413; one that is no text of rows is refused', async () => {
    const { app, post } = registryService()
    const long = csvOf(tugs()) + '\n'.repeat(17 * 1024 * 1024)
    expectProblem(await post(QUERY, long, CSV), 413, 'payload-too-large')
    const packed = await app.inject({
      method: 'POST',
      url: QUERY,
      headers: { ...CSV, 'content-encoding': 'gzip' },
      payload: gzipSync(long),
    })
    expectProblem(packed, 413, 'payload-too-large')
    expectProblem(await post(QUERY, '', CSV), 400, 'malformed-csv')
    expectProblem(await post(QUERY, '\n', NDJSON), 400, 'invalid-request')
    expectProblem(await post(URL, '{', {}), 400, 'malformed-json')
    const other = expectProblem(
      await post(QUERY, 'a', { 'content-type': 'text/plain' }),
      415,
      'unsupported-media-type',
    )
    expect(other.facts).toEqual({ accepted: ['application/json', 'application/x-ndjson', 'text/csv'] })
  })
})

test('writing asks for a key that may write, reading for one that may read', async () => {
  const { post, get, remove, service } = registryService({ ACCESS: 'keys' })
  const bearer = async (role: 'read' | 'write') => ({
    authorization: `Bearer ${await addKey(service, { name: role, role })}`,
  })
  const [reader, writer] = [await bearer('read'), await bearer('write')]
  const body = calibrationOf(tugs())
  expectProblem(await post(URL, body), 401, 'key-required')
  expectProblem(await post(URL, body, reader), 403, 'role-too-small')
  const reply = await post(URL, body, writer)
  expect(reply.statusCode).toBe(201)
  const at = reply.headers.location ?? ''
  for (const url of [URL, at, `${at}/fit`, `${at}/residuals`, `${at}/sheet`]) {
    expectProblem(await get(url), 401, 'key-required')
    expect((await get(url, reader)).statusCode).toBe(200)
  }
  expect((await get(`${at}/sheet`)).headers['www-authenticate']).toContain('Basic')
  expectProblem(await remove(at, reader), 403, 'role-too-small')
  expect((await remove(at, writer)).statusCode).toBe(204)
})
