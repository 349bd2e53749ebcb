import { parse } from 'csv-parse/sync'
import { afterAll, expect, test } from 'vitest'
import { CANAL, SEGMENT_IDS } from '../support/requests.ts'
import { buildService, expectProblem, faultsOf, linesOf, post, type Json } from '../support/service.ts'

const { app, replyTo } = buildService(afterAll)
await app.ready()
const Row = replyTo('POST', '/v1/advisories/matrix')

const MATRIX = '/v1/advisories/matrix'
const IV = { class: 'cemt-iv' }

async function rows(request: object): Promise<Json[]> {
  const reply = await post(app, MATRIX, request)
  expect(reply.statusCode, reply.body.slice(0, 1000)).toBe(200)
  expect(reply.headers['content-type']).toBe('application/x-ndjson')
  const found = linesOf(reply.body)
  for (const row of found) expect(Row.safeParse(row).error?.issues ?? []).toEqual([])
  return found
}

const indicesOf = (found: readonly Json[]) =>
  found.map((row) => [row['segment_index'], row['vessel_index'], row['condition_index']].join(''))

const COLUMNS =
  'segment_index vessel_index condition_index label segment_id station_chainage_m vessel_class loading direction water_level_m current_mps outcome governing_criterion governing_at max_through_water_mps max_over_ground_mps max_over_ground_kn max_over_ground_kmh sign_value sign_unit critical_speed_mps critical_ratio depth_froude_number regime bank_wave_height_m drawdown_m return_current_mps squat_m under_keel_clearance_m uncalibrated_max_over_ground_mps cautions input_hash problem_code problem_detail'

test('cells come with segments outermost and conditions innermost', async () => {
  const found = await rows({
    segments: ['harrow-long-pound', CANAL],
    vessels: [IV, { class: 'cemt-ii' }],
    conditions: [{}, { water_level_m: 0.3 }, { current_mps: 0.2 }],
  })
  expect(indicesOf(found)).toEqual([
    ...['000', '001', '002', '010', '011', '012'],
    ...['100', '101', '102', '110', '111', '112'],
  ])
  expect(found.map(({ segment_id }) => segment_id)).toEqual([
    ...Array<string>(6).fill('harrow-long-pound'),
    ...Array<null>(6).fill(null),
  ])
  expect(found.map(({ water_level_m }) => water_level_m).slice(0, 3)).toEqual([0, 0.3, 0])
})

test('every row has every column in the order of the contract, in both forms', async () => {
  const request = { segments: [CANAL], vessels: [IV] }
  expect(Object.keys((await rows(request))[0]!).join(' ')).toBe(COLUMNS)
  const reply = await post(app, MATRIX, request, { accept: 'text/csv' })
  expect(reply.headers['content-type']).toBe('text/csv; charset=utf-8')
  expect(reply.headers.vary).toBe('Accept, Authorization')
  const [head, row, ...rest] = reply.body.split('\r\n')
  expect(head).toBe(COLUMNS.replaceAll(' ', ','))
  expect(row).toMatch(/^0,0,0,/)
  expect(rest).toEqual([''])
})

test('all segments of the registry come in the order of their ids', async () => {
  const found = await rows({ segments: 'all', vessels: [{ class: 'recreational-ra' }] })
  expect(found.map(({ segment_id }) => segment_id)).toEqual(SEGMENT_IDS)
  expect(found.map(({ segment_index }) => segment_index)).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11])
})

test('the segments of a waterway are those of that name, and of an unknown name there are none', async () => {
  const vessels = [{ class: 'recreational-ra' }]
  expect(await rows({ segments: { waterway: 'Harrowmere Navigation' }, vessels })).toHaveLength(12)
  expect(await rows({ segments: { waterway: 'Elsewhere' }, vessels })).toEqual([])
  const csv = await post(app, `${MATRIX}?format=csv`, { segments: { waterway: 'Elsewhere' }, vessels })
  expect(csv.body).toBe(`${COLUMNS.replaceAll(' ', ',')}\r\n`)
})

test('a cell that is impossible is a row with its problem, and the others stand', async () => {
  const found = await rows({
    segments: [
      CANAL,
      { ...CANAL, bank_distance_m: 40 },
      'harrow-head-cut',
      { id: 'harrow-docks', width_m: 3 },
    ],
    vessels: [IV, { class: 'cemt-iv', draught_m: 3 }],
  })
  expect(found.map(({ problem_code }) => problem_code)).toEqual([
    ...[null, null],
    ...['impossible-input', 'impossible-input'],
    ...[null, 'impossible-input'],
    ...['impossible-input', 'impossible-input'],
  ])
  expect(found[2]).toMatchObject({ outcome: null, input_hash: null, segment_index: 1 })
  expect(found[5]).toMatchObject({ segment_id: 'harrow-head-cut' })
  expect(found[5]!['problem_detail']).toContain('draught 3 m, depth 2.6 m')
})

test('labels of a segment, a vessel and conditions are joined', async () => {
  const found = await rows({
    segments: [{ ...CANAL, label: 'km 12' }, 'harrow-long-pound'],
    vessels: [{ ...IV, label: '=laden' }],
    conditions: [{ label: 'low' }, {}],
  })
  expect(found.map(({ label }) => label)).toEqual([
    'km 12 / =laden / low',
    'km 12 / =laden',
    '=laden / low',
    '=laden',
  ])
  const csv = await post(app, `${MATRIX}?format=csv`, {
    segments: [CANAL],
    vessels: [{ ...IV, label: '=1' }],
  })
  expect(parse(csv.body, { columns: true })).toMatchObject([{ label: "'=1" }])
})

test('options hold for every cell', async () => {
  const open = { ...CANAL, bank_kind: 'reed', confinement: 'open' }
  const [plain] = await rows({ segments: [open], vessels: [IV] })
  const [found] = await rows({
    segments: [open],
    vessels: [IV],
    options: { sign_unit: 'mph', wave_factor: 2 },
  })
  expect(found).toMatchObject({ sign_unit: 'mph' })
  expect(found!['uncalibrated_max_over_ground_mps']).toBe(plain!['max_over_ground_mps'])
  expect(found!['max_over_ground_mps']).toBeLessThan(plain!['max_over_ground_mps'] as number)
})

test.each(['ndjson', 'csv'])('an unknown id is 404 before the first row of %s', async (format) => {
  const ask = (request: object) => post(app, `${MATRIX}?format=${format}`, request)
  const unknown = await ask({ segments: ['harrow-docks', 'harrow-dox'], vessels: [IV] })
  expect(expectProblem(unknown, 404, 'segment-not-found').facts).toEqual({
    segment_id: 'harrow-dox',
    nearest: 'harrow-docks',
  })
  const vessels = [IV, { class: 'cemt-8' }]
  expectProblem(await ask({ segments: 'all', vessels }), 404, 'vessel-class-not-found')
  const conditions = [{ meeting_vessel: { class: 'cemt-8' } }]
  expectProblem(await ask({ segments: 'all', vessels: [IV], conditions }), 404, 'vessel-class-not-found')
  const options = { calibration_id: 'fit-1' }
  expectProblem(await ask({ segments: [CANAL], vessels: [IV], options }), 404, 'calibration-not-found')
})

test('two million cells are the most', async () => {
  const vessels = Array.from({ length: 2000 }, () => IV)
  const conditions = Array.from({ length: 1001 }, () => ({}))
  const reply = await post(app, MATRIX, { segments: [CANAL], vessels, conditions })
  expect(expectProblem(reply, 413, 'too-many-cells').facts).toEqual({ limit: 2_000_000, cells: 2_002_000 })
})

test('a body may have 16 MiB and not a byte more', async () => {
  const text = JSON.stringify({ segments: [CANAL], vessels: [IV] })
  const padded = (length: number) => text.padEnd(length, ' ')
  expect((await post(app, MATRIX, padded(16_777_216))).statusCode).toBe(200)
  const reply = await post(app, MATRIX, padded(16_777_217))
  expect(expectProblem(reply, 413, 'payload-too-large').facts).toEqual({ limit: 16_777_216 })
})

test('all faults of a matrix come at once, each with its place', async () => {
  const request = {
    segments: [{ ...CANAL, depth_m: -1 }, 'bad id', {}],
    vessels: [{ class: 'cemt-iv', draft_m: 2 }, {}],
    conditions: [{ current_mps: 9 }],
    options: { sign_unit: 'km' },
    limit: 5,
  }
  const problem = expectProblem(await post(app, MATRIX, request), 400, 'invalid-request')
  expect(faultsOf(problem).sort()).toEqual([
    '#/conditions/0/current_mps out-of-range',
    '#/limit unknown-field',
    '#/options/sign_unit not-in-list',
    '#/segments/0/depth_m out-of-range',
    '#/segments/1 pattern',
    '#/segments/2/bank_distance_m required',
    '#/segments/2/depth_m required',
    '#/segments/2/width_m required',
    '#/vessels/0/draft_m unknown-field',
    '#/vessels/1/beam_m required',
    '#/vessels/1/draught_m required',
    '#/vessels/1/hull required',
    '#/vessels/1/length_m required',
  ])
})

test.each([
  ['segments', [], 'out-of-range'],
  ['segments', 'some', 'wrong-type'],
  ['segments', null, 'wrong-type'],
  ['vessels', [], 'out-of-range'],
  ['vessels', IV, 'wrong-type'],
  ['conditions', [], 'out-of-range'],
])('%s as %j are refused', async (field, value, code) => {
  const request = { segments: [CANAL], vessels: [IV], [field]: value }
  const problem = expectProblem(await post(app, MATRIX, request), 400, 'invalid-request')
  expect(faultsOf(problem)).toEqual([`#/${field} ${code}`])
})
