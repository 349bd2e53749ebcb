import { describe, expect, test } from 'vitest'
import { StudyRow } from '../../src/http/studies.schema.ts'
import { canal, registryService } from '../support/registry-service.ts'
import { expectProblem, faultsOf, type Json, linesOf } from '../support/service.ts'
import { ended, job, rowsOf, studied, STUDY, UNCERTAIN, WATERWAY } from '../support/study-service.ts'

describe('a study', () => {
  test('is accepted, works in the background, and says how far it is', async () => {
    const service = registryService()
    await service.post('/v1/segments/import', WATERWAY)
    const reply = await service.post('/v1/studies', STUDY)
    const made = job(reply, 202)
    expect(made).toMatchObject({ kind: 'study', name: 'Trial', cells_total: 4, registry_revision: 1 })
    expect(made.request).toEqual(STUDY)
    expect(reply.headers.location).toBe(`/v1/studies/${made.id}`)
    expect(reply.headers['retry-after']).toBe('1')
    const done = await ended(service, made.id)
    expect(done).toMatchObject({ state: 'succeeded', progress_ratio: 1, cells_done: 4 })
    expect(done.links).toEqual([
      { rel: 'self', href: `/v1/studies/${made.id}` },
      { rel: 'results', href: `/v1/studies/${made.id}/results` },
    ])
    expect((await service.get(`/v1/studies/${made.id}`)).headers).not.toHaveProperty('retry-after')
  })

  test('gives the same figures as the advisory of each cell', async () => {
    const service = registryService()
    const { id } = await studied(service, {
      ...STUDY,
      water_levels_m: [-0.2, 0.3],
      currents_mps: [0, 0.4],
    })
    const rows = await rowsOf(service, id)
    expect(rows).toHaveLength(2 * 2 * 2 * 2 * 2)
    for (const row of rows) {
      StudyRow.parse(row)
      const vessel = STUDY.vessels[row['vessel_index'] as number]
      const reply = await service.post('/v1/advisories', {
        segment: { id: row['segment_id'] },
        vessel,
        conditions: {
          water_level_m: row['water_level_m'],
          current_mps: row['current_mps'],
          direction: row['direction'],
        },
        options: { apply_posted_limit: false },
      })
      const advisory = reply.json<{
        outcome: string
        governing_criterion: string
        recommended_max_speed?: { over_ground: { mps: number; kn: number; kmh: number } }
      }>()
      const over = advisory.recommended_max_speed?.over_ground
      expect(row).toMatchObject({
        outcome: advisory.outcome,
        governing_criterion: advisory.governing_criterion,
        max_over_ground_mps: over?.mps ?? null,
        max_over_ground_kn: over?.kn ?? null,
        max_over_ground_kmh: over?.kmh ?? null,
      })
    }
  })

  test('orders its rows by segment, vessel, level, current and direction', async () => {
    const service = registryService()
    const { id } = await studied(service, {
      ...STUDY,
      segments: ['b', 'a'],
      water_levels_m: [0.3, -0.2],
      currents_mps: [0.4, 0],
    })
    const rows = await rowsOf(service, id)
    const places = rows.map((row) =>
      ['segment_id', 'vessel_index', 'water_level_m', 'current_mps', 'direction'].map((name) => row[name]),
    )
    expect(places.slice(0, 6)).toEqual([
      ['a', 0, 0.3, 0.4, 'upstream'],
      ['a', 0, 0.3, 0.4, 'downstream'],
      ['a', 0, 0.3, 0, 'upstream'],
      ['a', 0, 0.3, 0, 'downstream'],
      ['a', 0, -0.2, 0.4, 'upstream'],
      ['a', 0, -0.2, 0.4, 'downstream'],
    ])
    expect(places[8]?.slice(0, 2)).toEqual(['a', 1])
    expect(places[16]?.slice(0, 2)).toEqual(['b', 0])
  })

  test('has one row without a direction where there is no current', async () => {
    const service = registryService()
    const { id } = await studied(service)
    const rows = await rowsOf(service, id)
    expect(rows.map((row) => row['direction'])).toEqual([null, null, null, null])
    expect(rows.every((row) => row['samples'] === null && row['governed_by_drawdown_ratio'] === null)).toBe(
      true,
    )
    expect(Object.keys(rows[0] ?? {}).some((name) => name.includes('_p5_'))).toBe(false)
  })

  test('samples what is uncertain, with columns for each percentile', async () => {
    const service = registryService()
    const { id } = await studied(service, UNCERTAIN)
    const [row = {}] = await rowsOf(service, id)
    const names = Object.keys(row)
    const from = names.indexOf('no_safe_speed_ratio')
    expect(names.slice(from - 1, from + 5)).toEqual([
      'samples',
      'no_safe_speed_ratio',
      'max_over_ground_p5_mps',
      'max_over_ground_p5_kn',
      'max_over_ground_p5_kmh',
      'max_over_ground_p50_mps',
    ])
    expect(names.slice(-3)).toEqual(['governed_by_service_speed_ratio', 'problem_code', 'problem_detail'])
    expect(row['samples']).toBe(32)
    const speeds = [5, 50, 95].map((p) => row[`max_over_ground_p${p}_mps`] as number)
    expect(speeds).toEqual([...speeds].sort((a, b) => a - b))
    const shares = names.filter((name) => name.startsWith('governed_by_')).map((name) => row[name] as number)
    expect(shares.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 12)
  })

  test('is not moved by what becomes of the registry', async () => {
    const service = registryService()
    const { id } = await studied(service)
    const before = await rowsOf(service, id)
    await service.put('/v1/segments/a', canal('a', { waterway: 'W', depth_m: 6 }), { 'if-match': '*' })
    await service.remove('/v1/segments/b', { 'if-match': '*' })
    expect(await rowsOf(service, id)).toEqual(before)
  })

  test('shows a cell that cannot be as a row with a problem', async () => {
    const service = registryService()
    const { id } = await studied(service, { ...STUDY, vessels: [{ class: 'panamax' }] })
    for (const row of await rowsOf(service, id)) {
      expect(row).toMatchObject({
        problem_code: 'impossible-input',
        outcome: null,
        max_over_ground_mps: null,
      })
      expect(row['problem_detail']).toContain('draught')
    }
  })

  test('comes as CSV with the same figures', async () => {
    const service = registryService()
    const { id } = await studied(service, UNCERTAIN)
    const rows = await rowsOf(service, id)
    const reply = await service.get(`/v1/studies/${id}/results?format=csv`)
    expect(reply.headers['content-type']).toBe('text/csv; charset=utf-8')
    const [head = '', ...lines] = reply.body.trimEnd().split('\r\n')
    expect(head.split(',')).toEqual(Object.keys(rows[0] ?? {}))
    expect(lines).toHaveLength(rows.length)
    expect(lines[3]?.split(',')).toEqual(
      Object.values(rows[3] ?? {}).map((value) => (value === null ? '' : String(value as number))),
    )
  })
})

describe('a study is refused', () => {
  test('with everything that is wrong with it', async () => {
    const { post } = registryService()
    const problem = expectProblem(
      await post('/v1/studies', {
        name: '',
        segments: ['a', 'a'],
        vessels: [],
        water_levels_m: [0, 0],
        uncertainty: { samples: 10, depth_m: { sd: 1, half_range: 2 } },
      }),
      400,
      'invalid-request',
    )
    expect(faultsOf(problem).sort()).toEqual([
      '#/name out-of-range',
      '#/segments/1 clash',
      '#/uncertainty/depth_m one-of',
      '#/uncertainty/samples out-of-range',
      '#/vessels out-of-range',
      '#/water_levels_m/1 clash',
    ])
  })

  test('when it names what is not there', async () => {
    const { post } = registryService()
    await post('/v1/segments/import', WATERWAY)
    const other = (fields: Json) => post('/v1/studies', { ...STUDY, ...fields })
    expectProblem(await other({ segments: ['a', 'c'] }), 404, 'segment-not-found')
    expectProblem(await other({ segments: { waterway: 'V' } }), 404, 'segment-not-found')
    expectProblem(await other({ vessels: [{ class: 'raft' }] }), 404, 'vessel-class-not-found')
    expectProblem(await other({ options: { calibration_id: 'cal-x' } }), 404, 'calibration-not-found')
  })

  test('when the registry is empty', async () => {
    const { post } = registryService()
    expectProblem(await post('/v1/studies', STUDY), 404, 'segment-not-found')
  })

  test('beyond the number of evaluations', async () => {
    const { post } = registryService()
    await post('/v1/segments/import', WATERWAY)
    const vessels = Array.from({ length: 600 }, () => ({ class: 'cemt-ii' }))
    const levels = Array.from({ length: 100 }, (_, i) => i / 100)
    const wide = { ...STUDY, vessels, water_levels_m: levels }
    const problem = expectProblem(
      await post('/v1/studies', { ...wide, uncertainty: { samples: 10_000 } }),
      413,
      'too-many-cells',
    )
    expect(problem.facts).toEqual({ limit: 1e9, evaluations: 1.2e9 })
    const currents = Array.from({ length: 20 }, (_, i) => i / 10)
    const cells = expectProblem(
      await post('/v1/studies', { ...wide, currents_mps: currents }),
      413,
      'too-many-cells',
    )
    expect(cells.facts).toEqual({ limit: 2e6, cells: 2 * 600 * 100 * 20 * 2 })
  })
})

describe('studies', () => {
  test('are listed page by page', async () => {
    const service = registryService()
    await service.post('/v1/segments/import', WATERWAY)
    const ids: string[] = []
    for (let i = 0; i < 3; i += 1) ids.push(job(await service.post('/v1/studies', STUDY), 202).id)
    const first = (await service.get('/v1/studies?limit=2')).json<{ items: Json[]; links: Json[] }>()
    expect(first.items.map(({ id }) => id)).toEqual([...ids].sort().slice(0, 2))
    const next = String(first.links[1]?.['href'])
    const second = (await service.get(next)).json<{ items: Json[]; links: Json[] }>()
    expect(second.items.map(({ id }) => id)).toEqual([...ids].sort().slice(2))
    expect(second.links).toHaveLength(1)
  })

  test('that are not finished give no results, and are cancelled rather than deleted', async () => {
    const service = registryService()
    await service.post('/v1/segments/import', WATERWAY)
    const long = { ...STUDY, uncertainty: { samples: 10_000 }, water_levels_m: [0, 0.1, 0.2, 0.3] }
    const { id } = job(await service.post('/v1/studies', long), 202)
    const early = await service.get(`/v1/studies/${id}/results`)
    expectProblem(early, 409, 'study-not-finished')
    expect(early.headers['retry-after']).toBe('1')
    expect(job(await service.remove(`/v1/studies/${id}`), 200).state).toBe('cancelled')
    expectProblem(await service.get(`/v1/studies/${id}/results`), 409, 'study-not-finished')
    expect((await service.remove(`/v1/studies/${id}`)).statusCode).toBe(204)
    expectProblem(await service.get(`/v1/studies/${id}`), 404, 'study-not-found')
    expectProblem(await service.remove(`/v1/studies/${id}`), 404, 'study-not-found')
  })

  test('that a plan rests on stay', async () => {
    const service = registryService()
    const { id } = await studied(service)
    const plan = await service.post('/v1/limit-plans', {
      name: 'P',
      study_id: id,
      groups: [{ id: 'all', name: 'All', applies_to: {} }],
      percentile: null,
    })
    const { id: planId } = plan.json<{ id: string }>()
    const problem = expectProblem(await service.remove(`/v1/studies/${id}`), 409, 'in-use')
    expect(problem.facts).toEqual({ used_by: [planId] })
    expect((await service.remove(`/v1/limit-plans/${planId}`)).statusCode).toBe(204)
    expect((await service.remove(`/v1/studies/${id}`)).statusCode).toBe(204)
  })
})

test('the wave height is uncertain unless it is said to be certain', async () => {
  const service = registryService()
  // a boat whose waves govern, long before the critical speed does
  const strict = { ...STUDY, vessels: [{ class: 'planing-boat' }] }
  const { id } = await studied(service, { ...strict, uncertainty: { samples: 64 } })
  const { id: sure } = job(
    await service.post('/v1/studies', { ...strict, uncertainty: { samples: 64, wave_height_log_sd: 0 } }),
    202,
  )
  await ended(service, sure)
  const spread = (row: Json) =>
    (row['max_over_ground_p95_mps'] as number) - (row['max_over_ground_p5_mps'] as number)
  const [uncertain = {}] = await rowsOf(service, id)
  const [certain = {}] = linesOf((await service.get(`/v1/studies/${sure}/results`)).body)
  expect(spread(certain)).toBeCloseTo(0, 12)
  expect(spread(uncertain)).toBeGreaterThan(0.05)
})
