import { expect, test } from 'vitest'
import { CalibrationReply, FullCalibrationReply, type PointWire } from '../../src/http/calibrations.schema.ts'
import { calibrationOf, CSV, csvOf, NDJSON, ndjsonOf, tugs } from '../support/measured.ts'
import { canal, collection, registryService, type Reply } from '../support/registry-service.ts'
import { expectProblem, type Json, nullsIn } from '../support/service.ts'
import { temporaryFolder } from '../support/stores.ts'
import { strict } from '../support/strict.ts'

const URL = '/v1/calibrations'

/** A calibration that was made, in the documented form. */
function made(reply: Reply) {
  expect(reply.statusCode, reply.body.slice(0, 2000)).toBe(201)
  const body = reply.json<Json>()
  expect(nullsIn(body)).toEqual([])
  const calibration = strict(CalibrationReply).parse(body)
  expect(reply.headers.location).toBe(`${URL}/${calibration.id}`)
  expect(calibration.id).toMatch(/^cal-[0-9a-z]{10}$/)
  return calibration
}

async function full(get: (url: string) => Promise<Reply>, id: string) {
  const reply = await get(`${URL}/${id}`)
  expect(reply.statusCode).toBe(200)
  return strict(FullCalibrationReply).parse(reply.json())
}

test('the factor of a method is the median of measured over computed heights', async () => {
  const { post } = registryService()
  const calibration = made(await post(URL, calibrationOf(tugs(), { label: 'mine' })))
  expect(calibration).toMatchObject({
    label: 'mine',
    name: 'Trial',
    passages: 7,
    used: 7,
    recommended_method: 'blaauw-1984',
    distinguishable: false,
    outliers: [],
    coverage: {
      speed_mps: { min: 2, max: 3.2 },
      distance_m: { min: 34.5, max: 34.5 },
      depth_m: { min: 4, max: 4 },
    },
    reproducibility: { seed: 1 },
  })
  expect(calibration).not.toHaveProperty('segment_id')
  const [method] = calibration.methods
  expect(calibration.methods).toHaveLength(1)
  expect(method).toMatchObject({ id: 'blaauw-1984', rank: 1, passages_in_range: 7, by_hull: [] })
  expect(method?.factor).toBeCloseTo(1.25, 4)
  expect(method?.factor_ml).toBeCloseTo(1.239876, 4)
  expect(method?.interval.level).toBe(0.95)
  expect(method?.interval.low).toBeLessThanOrEqual(1.25)
  expect(method?.interval.high).toBeGreaterThanOrEqual(1.25)
  // one distance and one depth: there is no trend to see
  expect(method?.trend.distance).toEqual({ flagged: false })
  expect(method?.trend.depth).toEqual({ flagged: false })
  expect(method?.trend.speed.slope).toBeTypeOf('number')
  expect(calibration.cautions.map(({ code }) => code)).toEqual(['few-passages'])
})

test('a passage is computed on the water that its row describes', async () => {
  const { post, get } = registryService()
  const rows = tugs().map((row, i) => ({ ...row, ...(i > 0 && { width_m: 60 }) }))
  const { id } = made(await post(URL, { name: 'All methods', passages: rows }))
  const { points } = await full(get, id)
  const [open, confined] = points as [PointWire, PointWire]
  expect(open).toMatchObject({
    index: 0,
    label: 'tug 0',
    hull: 'displacement',
    speed_mps: 2,
    distance_m: 34.5,
    depth_m: 4,
  })
  // 2/√(9.80665 · 4)
  expect(open.depth_froude_number).toBeCloseTo(0.31933, 6)
  expect(open.computed_height_m['blaauw-1984']).toBeCloseTo(0.024338, 6)
  expect(open.in_range).toContain('blaauw-1984')
  expect(confined.computed_height_m['blaauw-1984']).toBeCloseTo(0.031381, 6)
})

test.each([
  ['through-water', { speed_mps: 3 }, 3],
  ['over-ground', { speed_kmh: 10.8 }, 3],
  ['over-ground', { speed_kn: 5, current_mps: 0.5, direction: 'downstream' }, 2.072222],
  ['over-ground', { speed_kn: 5, current_mps: 0.5, direction: 'upstream' }, 3.072222],
  ['over-ground', { speed_kn: 5, current_mps: -0.5, direction: 'upstream' }, 2.072222],
  ['through-water', { speed_kn: 5, current_mps: 0.5 }, 2.572222],
] as const)('a speed %s of %j is %d m/s through the water', async (reference, speed, expected) => {
  const { post, get } = registryService()
  const [{ speed_mps: _, ...first } = {}, ...rest] = tugs()
  const rows = [{ ...first, ...speed, speed_reference: reference }, ...rest]
  const { id } = made(await post(URL, calibrationOf(rows, { confirm_units: true })))
  const { points } = await full(get, id)
  expect(points[0]?.speed_mps).toBeCloseTo(expected, 6)
})

test('NDJSON and CSV with the rest in the query give the same figures as JSON', async () => {
  const { post } = registryService()
  const whole = made(await post(URL, calibrationOf(tugs(), { seed: 7 })))
  const query = `${URL}?name=Trial&method_ids=blaauw-1984&seed=7`
  const bodies = [
    [`${ndjsonOf(tugs())}\n`, NDJSON],
    [csvOf(tugs()), CSV],
    [csvOf(tugs()).replaceAll(',', ';'), { 'content-type': 'text/csv; charset=utf-8' }],
  ] as const
  for (const [text, headers] of bodies) {
    const calibration = made(await post(query, text, headers))
    const { id, created: _, ...figures } = calibration
    expect(id).not.toBe(whole.id)
    expect({ ...figures, id: whole.id, created: whole.created }).toEqual(whole)
  }
})

test('on a segment its section counts, and the level follows from the depth of the row', async () => {
  const { post, put, get } = registryService()
  await put('/v1/segments/a', canal('a'))
  const calibration = made(await post(URL, calibrationOf(tugs(), { segment_id: 'a' })))
  expect(calibration.segment_id).toBe('a')
  expect(calibration.reproducibility.segment_revision).toBe(1)
  const high = tugs().map((row) => ({ ...row, depth_m: 4.5 }))
  const { id } = made(await post(URL, { name: 'High', segment_id: 'a', passages: high }))
  const { points } = await full(get, id)
  expect(points[0]?.depth_m).toBe(4.5)
  // the laws of this channel need the section, which is there
  expect(Object.keys(points[6]?.computed_height_m ?? {})).toContain('rock-manual-2007')
})

test('a calibration is listed without rows, page by page, and shown with them as received', async () => {
  const { post, get } = registryService()
  const ids = [
    made(await post(URL, calibrationOf(tugs()))).id,
    made(await post(URL, calibrationOf(tugs()))).id,
    made(await post(URL, calibrationOf(tugs()))).id,
  ]
  const first = (await get(`${URL}?limit=2`)).json<{
    items: Json[]
    links: { rel: string; href: string }[]
  }>()
  expect(first.items.map(({ id }) => id)).toEqual(ids.toSorted().slice(0, 2))
  expect(first.items[0]).not.toHaveProperty('rows')
  const next = first.links.find(({ rel }) => rel === 'next')?.href ?? ''
  const second = (await get(next)).json<{ items: Json[] }>()
  expect(second.items.map(({ id }) => id)).toEqual(ids.toSorted().slice(2))
  const shown = await full(get, ids[0] ?? '')
  expect(shown.rows).toEqual(tugs())
  expect(shown.points).toHaveLength(7)
})

test('the registry rises by one with each, and names its revision', async () => {
  const { post, remove } = registryService()
  const reply = await post(URL, calibrationOf(tugs()))
  expect(reply.headers['registry-revision']).toBe('1')
  const { id } = made(reply)
  expect((await remove(`${URL}/${id}`)).headers['registry-revision']).toBe('2')
})

test('one that no segment names is deleted; one that is named is 409 with who names it', async () => {
  const { post, put, get, remove } = registryService()
  const { id } = made(await post(URL, calibrationOf(tugs())))
  expect((await put('/v1/segments/a', canal('a', { calibration_id: id }))).statusCode).toBe(201)
  const problem = expectProblem(await remove(`${URL}/${id}`), 409, 'in-use')
  expect(problem.facts).toEqual({ used_by: ['a'] })
  expect((await get(`${URL}/${id}`)).statusCode).toBe(200)
  await put('/v1/segments/a', canal('a'), { 'if-match': '*' })
  const reply = await remove(`${URL}/${id}`)
  expect([reply.statusCode, reply.body]).toEqual([204, ''])
  expectProblem(await get(`${URL}/${id}`), 404, 'calibration-not-found')
  const again = expectProblem(await remove(`${URL}/${id}`), 404, 'calibration-not-found')
  expect(again.facts).toEqual({ calibration_id: id })
})

test('a segment that names none that exists is refused with the nearest', async () => {
  const { post, put, get } = registryService()
  const { id } = made(await post(URL, calibrationOf(tugs())))
  const naming = canal('a', { calibration_id: 'cal-0' })
  const item = { code: 'not-in-list', allowed: [id] }
  const single = expectProblem(await put('/v1/segments/a', naming), 400, 'invalid-request')
  expect(single.errors).toMatchObject([{ pointer: '#/properties/calibration_id', ...item }])
  const many = await post('/v1/segments/import', collection(canal('b'), naming))
  expect(expectProblem(many, 400, 'invalid-request').errors).toMatchObject([
    { pointer: '#/features/1/properties/calibration_id', feature_id: 'a', ...item },
  ])
  const dry = await post('/v1/segments/import?dry_run=true', collection(naming))
  expect(dry.json<Json>()['faults']).toMatchObject([{ feature_id: 'a', code: 'not-in-list' }])
  expect((await get('/v1/segments')).json<Json>()['numberMatched']).toBe(0)
})

test('calibrations survive reopening', async () => {
  const url = `sqlite:${temporaryFolder()}/registry.db`
  const closing: (() => Promise<void>)[] = []
  const before = registryService({ DATABASE_URL: url }, (close) => closing.push(close))
  const { id } = made(await before.post(URL, calibrationOf(tugs())))
  const shown = await full(before.get, id)
  for (const close of closing) await close()
  const after = registryService({ DATABASE_URL: url })
  expect(await full(after.get, id)).toEqual(shown)
})

test('drawings and the sheet show it', async () => {
  const { post, get } = registryService()
  const { id } = made(await post(URL, calibrationOf(tugs())))
  for (const name of ['fit', 'residuals', 'fit?method_id=blaauw-1984&format=svg']) {
    const reply = await get(`${URL}/${id}/${name}`)
    expect(reply.statusCode, reply.body.slice(0, 500)).toBe(200)
    expect(reply.headers['content-type']).toBe('image/svg+xml')
    expect(reply.body).toMatch(/^<svg /)
  }
  const sheet = await get(`${URL}/${id}/sheet`)
  expect(sheet.headers['content-type']).toBe('text/html; charset=utf-8')
  expect(sheet.body).toContain(id)
  expectProblem(await get(`${URL}/${id}/fit?method_id=none`), 400, 'invalid-request')
  for (const name of ['', '/fit', '/residuals', '/sheet']) {
    expectProblem(await get(`${URL}/cal-0${name}`), 404, 'calibration-not-found')
  }
})

interface CurvePoint {
  readonly through_water_mps: number
  readonly wave_height_by_method_m: Readonly<Record<string, number | null>>
}

/** Canals of the same banks: as the registry has it 0.5 m above its datum, and of another width at its datum. */
test.each([
  [
    'at the level of its depth',
    { depth_m: 4.5 },
    { depth_m: 4, width_m: 60, bank_distance_m: 30 },
    0.5,
    31.5,
  ],
  ['of its width', { depth_m: 4, width_m: 44 }, { depth_m: 4, width_m: 44, bank_distance_m: 22 }, 0, 22],
])('a passage %s has the heights of the curve there', async (_, row, segment, level, distance) => {
  const { post, put, get } = registryService()
  await put('/v1/segments/a', canal('a'))
  const vessel = { class: 'tug', draught_m: 2 }
  const conditions = { water_level_m: level }
  const advisory = await post('/v1/advisories', { segment, vessel, conditions, options: { curve: true } })
  const { speed_curve: curve } = advisory.json<{ speed_curve: { points: CurvePoint[] } }>()
  const wanted = curve.points.slice(20, 30)
  const passages = wanted.map(({ through_water_mps: speed }) => ({
    ...tugs()[0],
    ...row,
    speed_mps: speed,
    distance_m: distance,
  }))
  const body = { name: 'Curve', segment_id: 'a', passages, confirm_units: true }
  const { points } = await full(get, made(await post(URL, body)).id)
  for (const [i, { wave_height_by_method_m: heights }] of wanted.entries()) {
    for (const [id, height] of Object.entries(points[i]?.computed_height_m ?? {})) {
      expect(height, `${id} at point ${i}`).toBeCloseTo(heights[id] ?? NaN, 12)
    }
    expect(points[i]?.in_range).toContain('blaauw-1984')
  }
})
