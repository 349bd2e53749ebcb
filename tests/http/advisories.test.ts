import { afterAll, describe, expect, test } from 'vitest'
import { CANAL, MOTOR_VESSEL, PLAIN, REQUESTS, type Request } from '../support/requests.ts'
import { buildService, expectProblem, expectReply, faultsOf, post, type Json } from '../support/service.ts'

const { app, replyTo } = buildService(afterAll)

async function advisory(request: object): Promise<Json> {
  return expectReply(await post(app, '/v1/advisories', request), replyTo('POST', '/v1/advisories'))
}

interface Criterion {
  readonly id: string
  readonly at: string
  readonly limit: number
  readonly value?: number
  readonly margin_ratio?: number
  readonly sense: string
  readonly met: boolean
  readonly governing: boolean
  readonly origin: string
  readonly max_speed?: unknown
}
const criteriaOf = (reply: Json) => reply['criteria'] as Criterion[]
const governingOf = (reply: Json) => criteriaOf(reply).find(({ governing }) => governing)
const cautionsOf = (reply: Json) => (reply['cautions'] as { code: string }[]).map(({ code }) => code)
const fieldsOf = (reply: Json) => (reply['assumptions'] as { field: string }[]).map(({ field }) => field)

const ORDER = [
  'critical-ratio',
  'depth-froude-number',
  'bank-wave-height',
  'receptor-wave-height',
  'under-keel-clearance',
  'drawdown',
  'return-current',
  'wake-wash',
  'posted-limit',
  'service-speed',
]

describe.each(Object.entries(REQUESTS))('%s', (_name, request) => {
  test('has an advisory of documented fields, with units that agree and no null', async () => {
    const reply = await advisory(request)
    expect(cautionsOf(reply)[0]).toBe('local-rules-apply')
    const safe = reply['outcome'] !== 'no-safe-speed'
    expect('recommended_max_speed' in reply).toBe(safe)
    expect('at_recommended_speed' in reply).toBe(safe)
    expect('at_minimum_steerage_speed' in reply).toBe(!safe)
    expect('by_direction' in reply).toBe(request.conditions?.['current_mps'] !== undefined)
    expect('uncalibrated' in reply).toBe(request.options?.['wave_factor'] !== undefined)
    expect('speed_curve' in reply).toBe(request.options?.['curve'] === true)
    expect('segment' in reply).toBe('id' in request.segment)
    expect('station' in reply).toBe('id' in request.segment)
    expect(reply['label']).toBe(request['label'])
  })

  test('lists its criteria in the order of the contract, and exactly one of them governs', async () => {
    const reply = await advisory(request)
    const ids = criteriaOf(reply).map(({ id }) => ORDER.indexOf(id))
    expect(ids).not.toContain(-1)
    expect(ids).toEqual([...ids].sort((a, b) => a - b))
    expect(criteriaOf(reply).filter(({ governing }) => governing)).toHaveLength(1)
    expect([governingOf(reply)?.id, governingOf(reply)?.at]).toEqual([
      reply['governing_criterion'],
      reply['governing_at'],
    ])
    if (reply['outcome'] !== 'no-safe-speed') expect(criteriaOf(reply).every(({ met }) => met)).toBe(true)
    else expect(criteriaOf(reply).some(({ met }) => !met)).toBe(true)
  })

  test('tells the margin of every criterion that has a value', async () => {
    for (const { sense, value, limit, margin_ratio } of criteriaOf(await advisory(request))) {
      if (value === undefined) expect(margin_ratio).toBeUndefined()
      else expect(margin_ratio).toBe(sense === 'at-most' ? 1 - value / limit : value / limit - 1)
    }
  })
})

test('the reply has its type, and echoes the id of the request', async () => {
  const reply = await post(app, '/v1/advisories', PLAIN, { 'x-request-id': 'tug.7_B-1' })
  expect(reply.headers['content-type']).toBe('application/json; charset=utf-8')
  expect(reply.headers['x-request-id']).toBe('tug.7_B-1')
})

test('every default that was used is an assumption', async () => {
  expect(fieldsOf(await advisory(PLAIN))).toEqual([
    'vessel.length_m',
    'vessel.beam_m',
    'vessel.draught_m',
    'vessel.block_coefficient',
    'vessel.midship_coefficient',
    'vessel.entrance_length_m',
    'vessel.displacement_m3',
    'vessel.max_speed_mps',
    'vessel.min_steerage_speed_mps',
    'vessel.rock_manual_coefficient',
    'vessel.blaauw_coefficient',
    'segment.nearer_bank.kind',
    'segment.nearer_bank.slope_h_per_v',
    'segment.farther_bank.kind',
    'segment.farther_bank.slope_h_per_v',
    'conditions.water_level_m',
    'conditions.current_mps',
    'conditions.meeting_vessel',
    'alpha_s_share',
    'bank_wave_height',
    'stern_wave_height',
    'wave_methods',
  ])
})

test('a class is laden where nothing is said, with the figures of the class', async () => {
  expect((await advisory(PLAIN))['vessel']).toMatchObject({
    class: 'cemt-iv',
    loading: 'laden',
    hull: 'displacement',
    length_m: 85,
    beam_m: 9.5,
    draught_m: 2.5,
    block_coefficient: 0.88,
    midship_coefficient: 1,
    entrance_length_m: 17,
    displacement_m3: 1776.5,
    max_speed: { mps: 5, kmh: 18 },
    min_steerage_speed: { kmh: 5 },
  })
})

test('a description takes the defaults of its size, and names no class', async () => {
  const { vessel } = await advisory({
    segment: CANAL,
    vessel: { length_m: 60, beam_m: 7, draught_m: 2, hull: 'displacement' },
  })
  expect(vessel).toMatchObject({
    block_coefficient: 0.85,
    midship_coefficient: 1,
    entrance_length_m: 12,
    displacement_m3: 714,
    max_speed: { kmh: 20 },
    min_steerage_speed: { kmh: 5 },
  })
  expect(vessel).not.toHaveProperty('class')
  expect(vessel).not.toHaveProperty('loading')
})

test.each([
  ['a level', { conditions: { water_level_m: 0 } }],
  ['a current', { conditions: { current_mps: 0 } }],
  ['the methods', { options: { wave_methods: 'applicable', combine: 'highest' } }],
  ['the rule for wake wash', { options: { limits: { wake_wash: 'when-long' } } }],
  ['the sign', { options: { sign_unit: 'km/h', sign_step: 1 } }],
  ['the posted limit and the curve', { options: { apply_posted_limit: true, curve: false } }],
  ['the calibration', { options: { calibration_id: null } }],
  ['the bank', { segment: { ...CANAL, bank_kind: 'unprotected' } }],
  ['the confinement', { segment: { ...CANAL, confinement: 'confined', receptors: [], posted_limits: [] } }],
  ['the loading', { vessel: { ...MOTOR_VESSEL, loading: 'laden' } }],
  ['the limits of the policy', { options: { limits: { max_critical_ratio: 0.9, max_depth_froude_number: 0.7, min_under_keel_clearance_ratio: 0.1 } } }], // prettier-ignore
])('%s given as by default changes no figure', async (_what, given) => {
  const plain = await advisory(PLAIN)
  const explicit = await advisory({ ...PLAIN, ...given })
  const figures = ['recommended_max_speed', 'critical_speed', 'at_recommended_speed', 'governing_criterion']
  for (const name of figures) expect(explicit[name]).toEqual(plain[name])
})

test.each([
  ['critical-ratio', 0.9],
  ['depth-froude-number', 0.7],
  ['bank-wave-height', 0.3],
  // a tenth of the draught of 2.5 m
  ['under-keel-clearance', 0.25],
])('the default limit of %s is that of the policy', async (id, limit) => {
  const found = criteriaOf(await advisory(PLAIN)).filter((criterion) => criterion.id === id)
  expect(found.length).toBeGreaterThan(0)
  for (const criterion of found) expect(criterion).toMatchObject({ limit, origin: 'policy' })
})

test.each([
  // of secondary waves, which are all there are in open water
  ['reed', 'open', [0.15, 0.15]],
  // of the stern wave, which is judged as on soil
  ['reed', 'confined', [0.3, 0.3]],
  ['riprap', 'confined', [0.5, 0.5]],
  ['wall', 'confined', []],
] as const)('a %s bank in %s water has the wave limits %j', async (bank_kind, confinement, limits) => {
  const reply = await advisory({ segment: { ...CANAL, bank_kind, confinement }, vessel: MOTOR_VESSEL })
  const found = criteriaOf(reply).filter(({ id }) => id === 'bank-wave-height')
  expect(found.map(({ limit }) => limit)).toEqual(limits)
})

test('a limit comes from the request, else the segment, else the policy', async () => {
  const banks = { left: { distance_m: 30, max_wave_height_m: 0.2 }, right: { distance_m: 30 } }
  const segment = { depth_m: 4, banks }
  const limitsOf = async (request: object) =>
    criteriaOf(await advisory({ vessel: MOTOR_VESSEL, ...request }))
      .filter(({ id }) => id === 'bank-wave-height')
      .map(({ at, limit, origin }) => [at, limit, origin])
  expect(await limitsOf({ segment })).toEqual([
    ['left-bank', 0.2, 'segment'],
    ['right-bank', 0.3, 'policy'],
  ])
  const options = { limits: { max_bank_wave_height_m: 0.4 } }
  expect(await limitsOf({ segment, options })).toEqual([
    ['left-bank', 0.4, 'request'],
    ['right-bank', 0.4, 'request'],
  ])
})

test('the invariant holds: met at the recommended speed, and the governing criterion is met no more just above', async () => {
  const reply = await advisory(PLAIN)
  const { through_water } = reply['recommended_max_speed'] as { through_water: { mps: number } }
  const asked = { ...PLAIN, speed_mps: through_water.mps * (1 + 1e-6), speed_reference: 'through-water' }
  const above = (await post(app, '/v1/effects', asked)).json<Json>()
  expect(above['exceeded']).toContain(reply['governing_criterion'])
})

test('posted limits count by direction, and the lowest that applies wins', async () => {
  const segment = {
    ...CANAL,
    posted_limits: [
      { speed_kmh: 7 },
      { speed_kmh: 6, direction: 'downstream' },
      { speed_kmh: 5.5, applies_to: { hull: 'planing' } },
      { speed_kmh: 5.2, applies_to: { loading: 'empty' } },
      { speed_kmh: 5.1, applies_to: { min_length_m: 85.1 } },
      { speed_kmh: 5, applies_to: { max_draught_m: 2.5 } },
    ],
  }
  const limitFor = async (conditions?: Json, vessel: Json = MOTOR_VESSEL) =>
    criteriaOf(await advisory({ segment, vessel, ...(conditions && { conditions }) })).find(
      ({ id }) => id === 'posted-limit',
    )?.limit
  expect(await limitFor({ direction: 'upstream' })).toBe(7 / 3.6)
  expect(await limitFor({ direction: 'downstream' })).toBe(6 / 3.6)
  // without a direction every limit that may apply does
  expect(await limitFor()).toBe(6 / 3.6)
  expect(await limitFor({ direction: 'upstream' }, { class: 'cemt-iv', draught_m: 2.4 })).toBe(5 / 3.6)
})

test('a posted limit that governs is the recommendation to the last digit, and its sign', async () => {
  const reply = await advisory({
    segment: { ...CANAL, posted_limits: [{ speed_kmh: 7 }] },
    vessel: MOTOR_VESSEL,
  })
  expect(reply).toMatchObject({ outcome: 'limited', governing_criterion: 'posted-limit' })
  expect(reply['recommended_max_speed']).toMatchObject({
    through_water: { mps: 7 / 3.6 },
    over_ground: { mps: 7 / 3.6 },
    sign: { value: 7, unit: 'km/h' },
  })
})

test('with a current both directions are answered, and the main one is the lower over ground', async () => {
  const reply = await advisory({ ...PLAIN, conditions: { current_mps: 0.5 } })
  const by = reply['by_direction'] as Record<
    string,
    { recommended_max_speed: Record<string, { mps: number }> }
  >
  const [upstream, downstream] = ['upstream', 'downstream'].map((d) => by[d]!.recommended_max_speed)
  expect(upstream!['over_ground']!.mps).toBe(upstream!['through_water']!.mps - 0.5)
  expect(downstream!['over_ground']!.mps).toBe(downstream!['through_water']!.mps + 0.5)
  expect(reply['conditions']).toEqual({ water_level_m: 0, current_mps: 0.5, direction: 'upstream' })
  expect(reply['recommended_max_speed']).toMatchObject(upstream!)
  const down = await advisory({ ...PLAIN, conditions: { current_mps: 0.5, direction: 'downstream' } })
  expect(down['recommended_max_speed']).toMatchObject(downstream!)
  expect(down['by_direction']).toEqual(by)
})

test('a sign below steerage is left out with a caution, and the outcome stays', async () => {
  const request: Request = {
    segment: CANAL,
    vessel: { ...MOTOR_VESSEL, min_steerage_speed_kmh: 8.5 },
  }
  const reply = await advisory(request)
  expect(reply['outcome']).toBe('limited')
  expect(reply['recommended_max_speed']).not.toHaveProperty('sign')
  expect(cautionsOf(reply)).toContain('sign-below-steerage')
  const finer = await advisory({ ...request, options: { sign_step: 0.1 } })
  expect(finer['recommended_max_speed']).toMatchObject({ sign: { value: 8.7, unit: 'km/h' } })
  expect(cautionsOf(finer)).not.toContain('sign-below-steerage')
})

test('without a safe speed the answer is still 200 and says what would satisfy each criterion', async () => {
  const reply = await advisory(REQUESTS['no safe speed']!)
  expect(reply['outcome']).toBe('no-safe-speed')
  expect(reply['at_minimum_steerage_speed']).toMatchObject({ speed: { through_water: { kmh: 5 } } })
  expect(governingOf(reply)).toMatchObject({ id: 'bank-wave-height', at: 'nearer-bank', met: false })
  expect(governingOf(reply)?.max_speed).toBeDefined()
  expect(governingOf(reply)!.margin_ratio!).toBeLessThan(0)
})

test('a fast channel limits a slow vessel by its own top speed alone', async () => {
  const reply = await advisory({
    segment: { depth_m: 10, width_m: 400, bank_distance_m: 200 },
    vessel: { ...MOTOR_VESSEL, max_speed_kmh: 6 },
  })
  expect(reply).toMatchObject({ outcome: 'service-speed', governing_criterion: 'service-speed' })
  expect(reply['recommended_max_speed']).toMatchObject({ sign: { value: 6, unit: 'km/h' } })
})

test('a wave factor is told at every method, and the answer without it beside', async () => {
  const plain = await advisory(PLAIN)
  const reply = await advisory({ ...PLAIN, options: { wave_factor: 3 } })
  const { sign: _, ...without } = plain['recommended_max_speed'] as Json
  expect(reply['uncalibrated']).toMatchObject({ outcome: 'limited', recommended_max_speed: without })
  const factors = (reply['wave_methods'] as Json[]).map(({ factor }) => factor)
  expect(new Set(factors)).toEqual(new Set([3]))
  expect((plain['wave_methods'] as Json[]).some((method) => 'factor' in method)).toBe(false)
})

test('the curve is evenly spread to the larger of top speed and 1.1 times critical speed, every column present', async () => {
  const { speed_curve } = await advisory({ ...PLAIN, options: { curve: true } })
  const { points } = speed_curve as { points: Record<string, unknown>[] }
  expect(points).toHaveLength(60)
  const speeds = points.map((point) => point['through_water_mps'] as number)
  expect(speeds.at(-1)).toBeCloseTo(5, 12)
  for (const [i, speed] of speeds.entries()) expect(speed).toBeCloseTo(((i + 1) * 5) / 60, 12)
  for (const point of points) {
    expect(Object.keys(point)).toEqual([
      'through_water_mps',
      'over_ground_mps',
      'over_ground_kn',
      'over_ground_kmh',
      'depth_froude_number',
      'critical_ratio',
      'regime',
      'bank_wave_height_m',
      'stern_wave_height_m',
      'drawdown_m',
      'return_current_mps',
      'squat_m',
      'under_keel_clearance_m',
      'wave_height_by_method_m',
    ])
  }
})

describe('a segment of the registry', () => {
  const id = 'harrow-head-cut'
  const at = async (segment: object) => advisory({ segment: { id, ...segment }, vessel: { class: 'cemt-i' } })

  test('is named with its revision, and so is the revision of the registry', async () => {
    const reply = await at({})
    expect(reply['segment']).toEqual({ id, name: 'Head Cut', revision: 1 })
    expect(reply['station']).toEqual({ index: 0 })
    expect(reply['reproducibility']).toMatchObject({ segment_revision: 1, registry_revision: 1 })
  })

  test('gives way to any field of the request for this call alone', async () => {
    const stored = await at({})
    const deeper = await at({ depth_m: 3.5 })
    expect(deeper['segment']).toEqual(stored['segment'])
    expect((deeper['critical_speed'] as Json)['through_water']).not.toEqual(
      (stored['critical_speed'] as Json)['through_water'],
    )
    expect(await at({})).toEqual(stored)
  })

  test('takes banks in place of its bank distance, and the other way about', async () => {
    const sides = await at({ banks: { left: { distance_m: 10 }, right: { distance_m: 14 } } })
    const { banks } = sides['at_recommended_speed'] as { banks: { side: string; distance_m: number }[] }
    expect(banks.map(({ side, distance_m }) => [side, distance_m])).toEqual([
      ['left', 10],
      ['right', 14],
    ])
    const nearer = await advisory({
      segment: { id: 'harrow-upper-reach', bank_distance_m: 15 },
      vessel: { class: 'cemt-i' },
    })
    expect((nearer['at_recommended_speed'] as { banks: unknown }).banks).toMatchObject([
      { side: 'nearer', distance_m: 15 },
      { side: 'farther', distance_m: 23 },
    ])
  })

  test('with stations names the one that governs', async () => {
    const reply = await advisory({ segment: { id: 'harrow-lower-cut' }, vessel: MOTOR_VESSEL })
    // the nearer bank comes from 30 m to 22 m: ln(30/22) / ln 1.02 is 15.7, so 15 are put between
    expect(reply['station']).toEqual({ index: 16, chainage_m: 18150 })
  })

  test('that is unknown is 404 with the nearest id', async () => {
    const reply = await post(app, '/v1/advisories', { segment: { id: 'harrow-dock' }, vessel: MOTOR_VESSEL })
    expect(expectProblem(reply, 404, 'segment-not-found').facts).toEqual({
      segment_id: 'harrow-dock',
      nearest: 'harrow-docks',
    })
  })
})

test('a permitted draught caps one that is assumed, and one that is given above it is a caution', async () => {
  const segment = { ...CANAL, max_draught_m: 2 }
  const assumed = await advisory({ segment, vessel: MOTOR_VESSEL })
  expect(assumed['vessel']).toMatchObject({ draught_m: 2 })
  const given = await advisory({ segment, vessel: { ...MOTOR_VESSEL, draught_m: 2.2 } })
  expect(given['vessel']).toMatchObject({ draught_m: 2.2 })
  expect(cautionsOf(given)).toContain('draught-above-permitted')
  expect(cautionsOf(assumed)).not.toContain('draught-above-permitted')
})

test('a calibration that does not exist is 404, unless a factor or null sets it aside', async () => {
  const unknown = { ...PLAIN, options: { calibration_id: 'fit-7' } }
  const problem = expectProblem(await post(app, '/v1/advisories', unknown), 404, 'calibration-not-found')
  expect(problem.facts).toEqual({ calibration_id: 'fit-7' })
  const segment = { ...CANAL, calibration_id: 'fit-7' }
  expectProblem(
    await post(app, '/v1/advisories', { segment, vessel: MOTOR_VESSEL }),
    404,
    'calibration-not-found',
  )
  await advisory({ segment, vessel: MOTOR_VESSEL, options: { calibration_id: null } })
  await advisory({ segment, vessel: MOTOR_VESSEL, options: { wave_factor: 1 } })
})

test('the form of the reply can be asked for by address and by header, and no other is offered', async () => {
  expect((await post(app, '/v1/advisories?format=json', PLAIN, { accept: 'text/csv' })).statusCode).toBe(200)
  const refused = await post(app, '/v1/advisories', PLAIN, { accept: 'text/csv' })
  expect(expectProblem(refused, 406, 'not-acceptable').facts).toEqual({ available: ['application/json'] })
  const problem = expectProblem(await post(app, '/v1/advisories?format=csv', PLAIN), 400, 'invalid-request')
  expect(faultsOf(problem)).toEqual(['format not-in-list'])
})

describe('sensitivity and inverse', () => {
  test('the largest swing comes first, at the mean less and plus the spread', async () => {
    const uncertainty = { depth_m: { sd: 0.3 }, draught_m: { half_range: 0.1 }, wave_height_log_sd: 0.4 }
    const reply = expectReply(
      await post(app, '/v1/advisories/sensitivity', { ...PLAIN, label: 'x', uncertainty }),
      replyTo('POST', '/v1/advisories/sensitivity'),
    )
    const inputs = reply['inputs'] as { field: string; low: number; high: number; swing_mps: number }[]
    expect(reply['label']).toBe('x')
    expect(inputs.map(({ swing_mps }) => swing_mps)).toEqual(
      inputs.map(({ swing_mps }) => swing_mps).sort((a, b) => b - a),
    )
    expect(inputs.find(({ field }) => field === 'depth_m')).toMatchObject({ low: 3.7, high: 4.3 })
    expect(inputs.find(({ field }) => field === 'draught_m')).toMatchObject({ low: 2.4, high: 2.6 })
    const { sign: _, ...base } = (await advisory(PLAIN))['recommended_max_speed'] as Json
    expect(reply['base']).toEqual(base)
  })

  test.each(['depth_m', 'bank_distance_m', 'draught_m'] as const)(
    'the %s that a speed needs makes it one that is within, and a little less favourable does not',
    async (vary) => {
      const wide = { depth_m: 4, width_m: 200, bank_distance_m: 30 }
      const asked = { vessel: MOTOR_VESSEL, speed_kmh: 8.8, speed_reference: 'through-water' }
      const reply = expectReply(
        await post(app, '/v1/advisories/inverse', { ...asked, segment: wide, vary }),
        replyTo('POST', '/v1/advisories/inverse'),
      )
      expect(reply).toMatchObject({ vary, attainable: true, unit: 'm' })
      const verdictAt = async (value: number) => {
        const isDraught = vary === 'draught_m'
        const request = {
          ...asked,
          segment: isDraught ? wide : { ...wide, [vary]: value },
          vessel: isDraught ? { ...MOTOR_VESSEL, draught_m: value } : MOTOR_VESSEL,
        }
        return (await post(app, '/v1/effects', request)).json<Json>()['verdict']
      }
      const required = reply['required'] as number
      expect(await verdictAt(required)).toBe('within')
      expect(await verdictAt(required + (vary === 'draught_m' ? 0.01 : -0.01))).toBe('exceeds')
    },
  )

  test('a speed that no depth makes safe is not attainable', async () => {
    const asked = { ...PLAIN, speed_kmh: 17, speed_reference: 'over-ground', vary: 'bank_distance_m' }
    const reply = expectReply(
      await post(app, '/v1/advisories/inverse', asked),
      replyTo('POST', '/v1/advisories/inverse'),
    )
    expect(reply).toMatchObject({ attainable: false, searched: [4.75, 30] })
    expect(reply).not.toHaveProperty('required')
  })
})
