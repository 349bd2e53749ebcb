import { parse } from 'csv-parse/sync'
import fc from 'fast-check'
import { afterAll, expect, test } from 'vitest'
import {
  addressable,
  PLAIN,
  requestOf,
  REQUESTS,
  rows,
  type Cells,
  type Request,
} from '../support/requests.ts'
import { buildService, linesOf, post, stream, type Json } from '../support/service.ts'

const { app } = buildService(afterAll)

const COLUMNS =
  'line label segment_id station_chainage_m vessel_class loading direction water_level_m current_mps outcome governing_criterion governing_at max_through_water_mps max_over_ground_mps max_over_ground_kn max_over_ground_kmh sign_value sign_unit critical_speed_mps critical_ratio depth_froude_number regime bank_wave_height_m drawdown_m return_current_mps squat_m under_keel_clearance_m uncalibrated_max_over_ground_mps cautions input_hash problem_code problem_detail'.split(
    ' ',
  )

type Tree = Record<string, never>

/** The flat row that a nested advisory must have. */
function flattened(reply: Json, line: number): Json {
  const advisory = reply as unknown as Tree & Record<string, Record<string, unknown> | undefined>
  const at = (path: string): unknown => {
    let value: unknown = advisory
    for (const key of path.split('.')) value = (value as Json | undefined)?.[key]
    return value ?? null
  }
  const state = 'at_recommended_speed' in reply ? 'at_recommended_speed' : 'at_minimum_steerage_speed'
  const best = 'recommended_max_speed'
  return {
    line,
    label: at('label'),
    segment_id: at('segment.id'),
    station_chainage_m: at('station.chainage_m'),
    vessel_class: at('vessel.class'),
    loading: at('vessel.loading'),
    direction: at('conditions.direction'),
    water_level_m: at('conditions.water_level_m'),
    current_mps: at('conditions.current_mps'),
    outcome: at('outcome'),
    governing_criterion: at('governing_criterion'),
    governing_at: at('governing_at'),
    max_through_water_mps: at(`${best}.through_water.mps`),
    max_over_ground_mps: at(`${best}.over_ground.mps`),
    max_over_ground_kn: at(`${best}.over_ground.kn`),
    max_over_ground_kmh: at(`${best}.over_ground.kmh`),
    sign_value: at(`${best}.sign.value`),
    sign_unit: at(`${best}.sign.unit`),
    critical_speed_mps: at('critical_speed.through_water.mps'),
    critical_ratio: at(`${state}.critical_ratio`),
    depth_froude_number: at(`${state}.depth_froude_number`),
    regime: at(`${state}.regime`),
    bank_wave_height_m: at(`${state}.bank_wave_height_m`),
    drawdown_m: at(`${state}.drawdown_m`),
    return_current_mps: at(`${state}.return_current_mps`),
    squat_m: at(`${state}.squat_m`),
    under_keel_clearance_m: at(`${state}.under_keel_clearance_m`),
    uncalibrated_max_over_ground_mps: at(`uncalibrated.${best}.over_ground.mps`),
    cautions: (reply['cautions'] as { code: string }[]).map(({ code }) => code).join(';'),
    input_hash: at('reproducibility.input_hash'),
    problem_code: null,
    problem_detail: null,
  }
}

const cell = (value: string | number): string => {
  const text = String(value)
  return /[",;\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}

/** The request as a CSV with the columns it needs. */
const csvOf = (cells: Cells): string =>
  `${Object.keys(cells).join(',')}\r\n${Object.values(cells).map(cell).join(',')}\r\n`

const asText = (row: Json): Record<string, string> =>
  Object.fromEntries(
    Object.entries(row).map(([name, value]) => [
      name,
      value === null ? '' : String(value as string | number),
    ]),
  )

const records = (text: string): Record<string, string>[] => parse(text, { columns: true })

function without(row: Json, ...names: readonly string[]): Json {
  return Object.fromEntries(Object.entries(row).filter(([name]) => !names.includes(name)))
}

const INDICES = { segment_index: 0, vessel_index: 0, condition_index: 0 }

/** The matrix of one cell for a request. */
function matrixOf({ segment, vessel, conditions = {}, options = {} }: Request): Json {
  return { segments: [segment], vessels: [vessel], conditions: [conditions], options }
}

/** Asks every endpoint the same and holds their answers against each other; returns the advisory, if there is one. */
async function expectOneAnswer(request: Request, cells?: Cells): Promise<Json | undefined> {
  const single = await post(app, '/v1/advisories', request)
  const [full] = await stream(app, '?detail=full', [request])
  const [compact] = await stream(app, '?detail=compact', [request])
  const asCsv = await post(app, '/v1/advisories/stream?format=csv', JSON.stringify(request), {
    'content-type': 'application/x-ndjson',
  })
  const matrix = await post(app, '/v1/advisories/matrix', matrixOf(request))
  const matrixCsv = await post(app, '/v1/advisories/matrix?format=csv', matrixOf(request))
  expect(Object.keys(compact!)).toEqual(COLUMNS)
  expect(records(asCsv.body)).toEqual([asText(compact!)])
  const [row] = linesOf(matrix.body)
  expect(records(matrixCsv.body)).toEqual([asText(row!)])

  if (cells) {
    const csv = await post(app, '/v1/advisories/stream', csvOf(cells), { 'content-type': 'text/csv' })
    const expected = asText({ ...compact, line: 2 })
    const given = records(csv.body)[0]!
    expect(without(given, 'problem_detail')).toEqual(without(expected, 'problem_detail'))
  }
  if (single.statusCode !== 200) {
    expect(single.statusCode).toBe(422)
    const problem = single.json<Json>()
    expect(without((full!['problem'] ?? {}) as Json, 'instance')).toEqual(without(problem, 'instance'))
    expect(compact!['problem_code']).toBe('impossible-input')
    expect(row!['problem_code']).toBe('impossible-input')
    return undefined
  }
  const advisory = single.json<Json>()
  expect(full).toEqual({ line: 1, ...advisory })
  expect(compact).toEqual(flattened(advisory, 1))
  // A matrix has labels of its own.
  expect(without(row!, 'label')).toEqual({ ...INDICES, ...without(compact!, 'line', 'label') })
  return advisory
}

interface Recommended {
  readonly through_water: { readonly mps: number }
}

/** At the recommendation the effects are those of the advisory; a millionth faster is too fast. */
async function expectSameEffects(request: Request, advisory: Json): Promise<void> {
  const recommended = advisory['recommended_max_speed'] as Recommended | undefined
  if (!recommended || recommended.through_water.mps < 0.1) return
  const { mps } = recommended.through_water
  const asked = { ...request, speed_reference: 'through-water' }
  const at = (await post(app, '/v1/effects', { ...asked, speed_mps: mps })).json<Json>()
  expect(at['verdict']).toBe('within')
  expect(at['exceeded']).toEqual([])
  expect(at['effects']).toEqual(advisory['at_recommended_speed'])
  for (const same of [
    'segment',
    'station',
    'vessel',
    'conditions',
    'criteria',
    'wave_methods',
    'squat_methods',
  ])
    expect(at[same]).toEqual(advisory[same])
  expect(at['reproducibility']).toEqual(advisory['reproducibility'])
  const above = (await post(app, '/v1/effects', { ...asked, speed_mps: mps * (1 + 1e-6) })).json<Json>()
  expect(above['verdict']).toBe('exceeds')
  const governing = advisory['governing_criterion'] as string
  if (governing !== 'posted-limit' && governing !== 'service-speed')
    expect(above['exceeded']).toContain(governing)
}

test.each(Object.entries(REQUESTS))('every endpoint has the same digits for %s', async (_name, request) => {
  const advisory = await expectOneAnswer(request)
  if (advisory) await expectSameEffects(request, advisory)
})

test('every endpoint has the same digits for any request that a row of CSV can hold', async () => {
  let answered = 0
  await fc.assert(
    fc.asyncProperty(rows, async (cells) => {
      const request = requestOf(cells)
      const advisory = await expectOneAnswer(request, cells)
      if (!advisory) return
      answered += 1
      await expectSameEffects(request, advisory)
    }),
    { seed: 20_261_201, numRuns: 60 },
  )
  expect(answered).toBeGreaterThan(30)
})

test('the address of a registry advisory has the same digits as the request that it stands for', async () => {
  let answered = 0
  await fc.assert(
    fc.asyncProperty(addressable, async ({ segment_id, ...query }) => {
      const text = new URLSearchParams()
      for (const [name, value] of Object.entries(query)) text.set(name, String(value))
      const url = `/v1/segments/${String(segment_id)}/advisory?${text.toString()}`
      const got = await app.inject(url)
      const posted = await post(app, '/v1/advisories', requestOf({ segment_id: segment_id!, ...query }))
      expect(got.statusCode).toBe(posted.statusCode)
      expect(without(got.json<Json>(), 'instance')).toEqual(without(posted.json<Json>(), 'instance'))
      if (got.statusCode === 200) answered += 1
    }),
    { seed: 20_261_202, numRuns: 60 },
  )
  expect(answered).toBeGreaterThan(30)
})

async function hashOf(request: object): Promise<string> {
  const reply = await post(app, '/v1/advisories', request)
  expect(reply.statusCode, reply.body).toBe(200)
  return reply.json<{ reproducibility: { input_hash: string } }>().reproducibility.input_hash
}

const RICH: Request = {
  segment: {
    depth_m: 4.2,
    banks: {
      left: { distance_m: 25, kind: 'riprap', stone_d50_m: 0.2, slope_h_per_v: 2, toe_depth_m: 1.5 },
      right: { distance_m: 30, kind: 'reed', max_wave_height_m: 0.25, max_drawdown_m: 0.4 },
    },
    receptors: [{ name: 'moorings', kind: 'moored-small-craft', side: 'left', distance_m: 20 }],
    bed_kind: 'loess',
    min_under_keel_clearance_m: 0.4,
    max_draught_m: 2.3,
    posted_limits: [{ speed_kmh: 9, direction: 'upstream', applies_to: { min_length_m: 20 } }],
  },
  vessel: { class: 'cemt-iv', draught_m: 2, block_coefficient: 0.85, max_speed_kmh: 17 },
  conditions: { water_level_m: 0.2, current_mps: 0.3, direction: 'upstream' },
  options: { wave_factor: 1.2, sign_step: 0.5, limits: { max_critical_ratio: 0.85 } },
}

/** The value at the end of a path replaced in a copy; undefined takes the field away. */
function changed(request: Request, path: string, value: unknown): Request {
  const copy = structuredClone(request)
  const keys = path.split('.')
  let holder: Record<string, unknown> = copy
  for (const key of keys.slice(0, -1)) holder = (holder[key] ??= {}) as Record<string, unknown>
  const last = keys.at(-1)!
  if (value === undefined) holder[last] = undefined
  else holder[last] = value
  return copy
}

test('the input hash is a sha256 in hexadecimal', async () => {
  expect(await hashOf(PLAIN)).toMatch(/^sha256:[0-9a-f]{64}$/)
})

test.each([
  ['segment.bank_kind', 'unprotected'],
  ['segment.confinement', 'confined'],
  ['segment.receptors', []],
  ['segment.posted_limits', []],
  ['vessel.loading', 'laden'],
  ['vessel.length_m', 85],
  ['vessel.beam_m', 9.5],
  ['vessel.draught_m', 2.5],
  ['vessel.block_coefficient', 0.88],
  ['vessel.midship_coefficient', 1],
  ['vessel.entrance_length_m', 17],
  ['vessel.displacement_m3', 1776.5],
  ['vessel.max_speed_kmh', 18],
  ['vessel.min_steerage_speed_kmh', 5],
  ['vessel.hull', 'displacement'],
  ['conditions', {}],
  ['conditions.water_level_m', 0],
  ['conditions.current_mps', 0],
  ['options', {}],
  ['options.wave_methods', 'applicable'],
  ['options.combine', 'highest'],
  ['options.limits', {}],
  ['options.limits.wake_wash', 'when-long'],
  ['options.apply_posted_limit', true],
  ['options.sign_unit', 'km/h'],
  ['options.sign_step', 1],
  ['options.curve', false],
  ['options.calibration_id', null],
])('the input hash is the same with the default of %s given, %j', async (path, value) => {
  expect(await hashOf(changed(PLAIN, path, value))).toBe(await hashOf(PLAIN))
})

test.each([
  ['label', 'run 7'],
  ['segment.label', 'a'],
  ['segment.name', 'Long Pound'],
  ['segment.source', 'survey'],
  ['segment.attributes', { owner: 'trust', depth_m: 9 }],
  ['segment.receptors', [{ kind: 'moored-small-craft', side: 'left', distance_m: 20 }]],
  ['segment.posted_limits', [{ label: 'x', speed_mps: 2.5, direction: 'upstream', applies_to: { min_length_m: 20 } }]], // prettier-ignore
  ['vessel.label', 'b'],
  ['vessel.max_speed_kmh', 17],
  ['conditions.label', 'c'],
  ['options.limits.label', 'd'],
])('the input hash does not depend on %s', async (path, value) => {
  expect(await hashOf(changed(RICH, path, value))).toBe(await hashOf(RICH))
})

function reversed(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(reversed)
  if (typeof value !== 'object' || value === null) return value
  return Object.fromEntries(
    Object.entries(value)
      .reverse()
      .map(([key, inner]) => [key, reversed(inner)]),
  )
}

test('the input hash does not depend on the order of fields', async () => {
  const other = reversed(RICH) as Request
  expect(JSON.stringify(other)).not.toBe(JSON.stringify(RICH))
  expect(await hashOf(other)).toBe(await hashOf(RICH))
})

test.each([
  ['segment.depth_m', 4.2000000001],
  ['segment.banks.left.distance_m', 25.01],
  ['segment.banks.left.kind', 'unprotected'],
  ['segment.banks.left.stone_d50_m', 0.21],
  ['segment.banks.left.stone_relative_density', 1.6],
  ['segment.banks.left.slope_h_per_v', 2.1],
  ['segment.banks.left.toe_depth_m', 1.6],
  ['segment.banks.right.max_wave_height_m', 0.26],
  ['segment.banks.right.max_drawdown_m', 0.41],
  ['segment.banks.right.max_return_current_mps', 2],
  ['segment.receptors.0.distance_m', 21],
  ['segment.receptors.0.side', 'right'],
  ['segment.receptors.0.max_wave_height_m', 0.2],
  ['segment.receptors', []],
  ['segment.bed_kind', 'fine-sand'],
  ['segment.min_under_keel_clearance_m', 0.41],
  ['segment.max_draught_m', 2.4],
  ['segment.posted_limits.0.speed_kmh', 9.1],
  ['segment.posted_limits.0.direction', 'both'],
  ['segment.posted_limits.0.reference', 'through-water'],
  ['segment.posted_limits.0.applies_to', {}],
  ['segment.confinement', 'open'],
  ['segment.cross_section', { bottom_width_m: 30 }],
  ['vessel.class', 'cemt-iii'],
  ['vessel.loading', 'empty'],
  ['vessel.draught_m', 2.1],
  ['vessel.block_coefficient', 0.86],
  ['vessel.midship_coefficient', 0.99],
  ['vessel.entrance_length_m', 16],
  ['vessel.displacement_m3', 1200],
  ['vessel.max_speed_kmh', 17.1],
  ['vessel.min_steerage_speed_kmh', 4.9],
  ['vessel.hull', 'semi-displacement'],
  ['conditions.water_level_m', 0.21],
  ['conditions.current_mps', 0.31],
  ['conditions.direction', 'downstream'],
  ['conditions.direction', undefined],
  ['conditions.meeting_vessel', { class: 'cemt-i' }],
  ['options.wave_factor', 1.3],
  ['options.wave_factor', undefined],
  ['options.sign_step', 1],
  ['options.sign_unit', 'kn'],
  ['options.combine', 'median'],
  ['options.wave_methods', ['blaauw-1984']],
  ['options.apply_posted_limit', false],
  ['options.limits.max_critical_ratio', 0.86],
  ['options.limits.max_depth_froude_number', 0.69],
  ['options.limits.min_under_keel_clearance_ratio', 0.2],
  ['options.limits.max_bank_wave_height_m', 0.2],
  ['options.limits.max_receptor_wave_height_m', 0.2],
  ['options.limits.max_drawdown_m', 0.3],
  ['options.limits.max_return_current_mps', 1],
  ['options.limits.wake_wash', 'never'],
])('the input hash changes with %s, %j', async (path, value) => {
  expect(await hashOf(changed(RICH, path, value))).not.toBe(await hashOf(RICH))
})

test('where a permitted draught may cap them, the input hash tells figures of the vessel from those of its class', async () => {
  const capped = { ...PLAIN, segment: { ...PLAIN.segment, max_draught_m: 2.4 } }
  const hashes = await Promise.all(
    [{}, { draught_m: 2.5 }, { displacement_m3: 1776.5 }].map((own) =>
      hashOf({ ...capped, vessel: { ...PLAIN.vessel, ...own } }),
    ),
  )
  expect(new Set(hashes).size).toBe(3)
})

test('an id has the input hash of the same content given in the request', async () => {
  const vessel = { class: 'cemt-ii', draught_m: 1.5 }
  let compared = 0
  for (const feature of (await app.inject('/v1/segments')).json<{
    features: { id: string; properties: Json }[]
  }>().features) {
    const { revision: _, updated: __, length_m: ___, ...content } = feature.properties
    if ('stations' in content) continue
    compared += 1
    expect(await hashOf({ segment: content, vessel }), feature.id).toBe(
      await hashOf({ segment: { id: feature.id }, vessel }),
    )
  }
  expect(compared).toBe(11)
})
