import { describe, expect, test } from 'vitest'
import { LimitPlanReply } from '../../src/http/limit-plans.schema.ts'
import { NoticeReply } from '../../src/http/notice.ts'
import { LimitPlanCollection } from '../../src/http/plan-exports.ts'
import { registryService, type Reply } from '../support/registry-service.ts'
import { expectOneSpeed, expectProblem, faultsOf, nullsIn, speedsIn, type Json } from '../support/service.ts'
import { job, PLAN, rowsOf, studied, STUDY, UNCERTAIN, WATERWAY } from '../support/study-service.ts'
import { strict } from '../support/strict.ts'

/** A plan in the documented form. */
function planOf(reply: Reply, status = 201) {
  expect(reply.statusCode, reply.body.slice(0, 2000)).toBe(status)
  const body = reply.json<Json>()
  expect(nullsIn(body)).toEqual(body['request'] ? ['/request/percentile'].filter(() => hasNull(body)) : [])
  for (const speed of speedsIn(body['stretches'])) expectOneSpeed(speed)
  return strict(LimitPlanReply).parse(body)
}

const hasNull = (body: Json): boolean => (body['request'] as Json)['percentile'] === null

/** Lowest maximum of a vessel on a segment in the results, km/h. */
const lowest = (
  rows: readonly Json[],
  segment: string,
  vessel: number,
  column = 'max_over_ground_kmh',
): number =>
  Math.min(
    ...rows
      .filter((row) => row['segment_id'] === segment && row['vessel_index'] === vessel)
      .map((row) => (row[column] ?? 0) as number),
  )

describe('a limit plan', () => {
  test('proposes by group and segment the lowest maximum, rounded down', async () => {
    const service = registryService()
    const { id: study } = await studied(service, { ...STUDY, water_levels_m: [-0.2, 0, 0.3] })
    const reply = await service.post('/v1/limit-plans', { ...PLAN, study_id: study })
    const plan = planOf(reply)
    expect(reply.headers.location).toBe(`/v1/limit-plans/${plan.id}`)
    expect(plan).toMatchObject({ name: 'Limits', state: 'draft', study_id: study, unassigned_vessels: [] })
    const rows = await rowsOf(service, study)
    const limits = plan.stretches.flatMap((stretch) =>
      stretch.segment_ids.map((id) => [stretch.group_id, id, stretch.limit?.value]),
    )
    expect(limits).toEqual([
      ['deep', 'a', Math.floor(lowest(rows, 'a', 0))],
      ['deep', 'b', Math.floor(lowest(rows, 'b', 0))],
      ['light', 'a', Math.floor(lowest(rows, 'a', 1))],
      ['light', 'b', Math.floor(lowest(rows, 'b', 1))],
    ])
    const [first] = plan.stretches
    expect(first?.margin_mps).toBeCloseTo((lowest(rows, 'a', 0) - Math.floor(lowest(rows, 'a', 0))) / 3.6, 12)
    expect(first?.governing).toMatchObject({ vessel_index: 0, vessel_class: 'cemt-ii' })
    expect(planOf(await service.get(`/v1/limit-plans/${plan.id}`), 200)).toEqual(plan)
    expect((await service.get('/v1/limit-plans')).json<{ items: unknown[] }>().items).toEqual([plan])
  })

  test('takes the percentile that it names', async () => {
    const service = registryService()
    const { id: study } = await studied(service, UNCERTAIN)
    const rows = await rowsOf(service, study)
    for (const percentile of [5, 50, 95]) {
      const plan = planOf(
        await service.post('/v1/limit-plans', { ...PLAN, study_id: study, percentile, sign_step: 0.1 }),
      )
      const column = `max_over_ground_p${percentile}_kmh`
      const deep = plan.stretches.find(({ group_id }) => group_id === 'deep')
      const first = lowest(rows, deep?.segment_ids[0] ?? '', 0, column)
      expect(deep?.lowest_maximum?.kmh).toBeCloseTo(first, 12)
      expect(deep?.limit?.value).toBeCloseTo(Math.floor(first * 10) / 10, 12)
    }
  })

  test('tells travel times, and who was faster according to a log', async () => {
    const service = registryService()
    const { id: study } = await studied(service)
    const plan = planOf(
      await service.post('/v1/limit-plans', {
        ...PLAN,
        study_id: study,
        groups: [{ id: 'all', name: 'All', applies_to: {} }],
        sign_unit: 'kn',
        passage_summary: {
          type: 'summary',
          complete: true,
          vessels: 3,
          groups: [
            {
              segment_id: 'a',
              vessel_class: 'cemt-ii',
              direction: 'upstream',
              passages: 3,
              // 1 passage each from 3 to 3.5, 3.5 to 4 and 4 to 4.5 kn
              histogram_kn: { step: 0.5, counts: [0, 0, 0, 0, 0, 0, 1, 1, 1] },
            },
          ],
        },
      }),
    )
    const [stretch] = plan.stretches
    expect(stretch?.segment_ids[0]).toBe('a')
    const speed = ((stretch?.limit?.value ?? NaN) * 1852) / 3600
    expect(stretch?.travel_time_s).toBeCloseTo((stretch?.length_m ?? NaN) / speed, 8)
    const limit = stretch?.limit?.value ?? NaN
    const above = [3, 3.5, 4].reduce(
      (sum, low) => sum + Math.min(1, Math.max(0, (low + 0.5 - limit) / 0.5)),
      0,
    )
    expect(stretch?.passages).toBe(3)
    expect(stretch?.exceeding_ratio).toBeCloseTo(above / 3, 12)
  })

  test('goes on the map, into a table and into code words of notices', async () => {
    const service = registryService()
    const { id: study } = await studied(service)
    const plan = planOf(
      await service.post('/v1/limit-plans', {
        ...PLAN,
        study_id: study,
        groups: [{ id: 'g', name: '=Boats', applies_to: { vessel_classes: ['cemt-ii'] } }],
        smallest_limit: 1,
      }),
    )
    const map = await service.get(`/v1/limit-plans/${plan.id}?format=geojson`)
    const { features } = strict(LimitPlanCollection).parse(map.json())
    expect(features).toHaveLength(plan.stretches.length)
    expect(features[0]?.geometry.coordinates[0]).toEqual([
      [3, 54],
      [3.01, 54],
      [3.02, 54.001],
    ])
    expect(features[0]?.properties).toMatchObject({
      limit_kmh: plan.stretches[0]?.limit?.value,
      number: null,
    })
    const table = await service.get(`/v1/limit-plans/${plan.id}?format=csv`)
    expect(table.body.split('\r\n')).toHaveLength(plan.stretches.length + 2)
    const notice = strict(NoticeReply).parse((await service.get(`/v1/limit-plans/${plan.id}/notice`)).json())
    expect(notice.legal_status).toBe('proposal')
    expect(notice.limitations[0]).toEqual({
      limitation_code: 'SPEED',
      indication_code: 'MAX',
      value: plan.stretches[0]?.limit?.value,
      exact_value_kmh: plan.stretches[0]?.limit?.value,
      unit: 'km/h',
      direction_code: 'ALL',
      target_group_code: 'COM',
      target_group_name: '=Boats',
      speed_reference: 'over-ground',
      waterway: 'W',
      chainage_from_m: 0,
      chainage_to_m: plan.stretches[0]?.chainage_to_m,
    })
  })

  test('below the smallest limit proposes none, and the notice asks for no wash', async () => {
    const service = registryService()
    const { id: study } = await studied(service)
    const plan = planOf(
      await service.post('/v1/limit-plans', { ...PLAN, study_id: study, smallest_limit: 90 }),
    )
    for (const stretch of plan.stretches) {
      expect(stretch).toMatchObject({ outcome: 'below-smallest-limit' })
      expect(stretch).not.toHaveProperty('limit')
    }
    const { limitations } = NoticeReply.parse((await service.get(`/v1/limit-plans/${plan.id}/notice`)).json())
    expect(limitations.map(({ limitation_code: code }) => code)).toEqual(plan.stretches.map(() => 'WAVWAS'))
    expect(limitations[0]).not.toHaveProperty('value')
  })
})

describe('a limit plan is refused', () => {
  test('with everything that is wrong with it', async () => {
    const { post } = registryService()
    const group = { id: 'g', name: 'G', applies_to: {} }
    const problem = expectProblem(
      await post('/v1/limit-plans', {
        name: 'P',
        study_id: 'study-x',
        groups: [group, group],
        sign_unit: 'knots',
        smallest_limit: 8,
        largest_limit: 6,
      }),
      400,
      'invalid-request',
    )
    expect(faultsOf(problem).sort()).toEqual([
      '#/groups/1/id clash',
      '#/percentile required',
      '#/sign_unit not-in-list',
      '#/smallest_limit clash',
    ])
  })

  test('on a study that is not there, or not done', async () => {
    const { post } = registryService()
    expectProblem(await post('/v1/limit-plans', { ...PLAN, study_id: 'study-x' }), 404, 'study-not-found')
    await post('/v1/segments/import', WATERWAY)
    const long = { ...STUDY, uncertainty: { samples: 10_000 } }
    const { id } = job(await post('/v1/studies', long), 202)
    expectProblem(await post('/v1/limit-plans', { ...PLAN, study_id: id }), 409, 'study-not-finished')
  })

  test('at a percentile that the study has not', async () => {
    const service = registryService()
    const { id } = await studied(service, UNCERTAIN)
    const ask = (fields: Json) => service.post('/v1/limit-plans', { ...PLAN, study_id: id, ...fields })
    const problem = expectProblem(await ask({ percentile: 10 }), 400, 'invalid-request')
    expect(problem.errors?.[0]).toMatchObject({ pointer: '#/percentile', allowed: ['5', '50', '95', 'null'] })
  })

  test('with groups that share a vessel, or have none', async () => {
    const service = registryService()
    const { id } = await studied(service)
    const ask = (groups: Json[]) => service.post('/v1/limit-plans', { ...PLAN, study_id: id, groups })
    const all = { id: 'all', name: 'All', applies_to: {} }
    const shared = expectProblem(await ask([all, PLAN.groups[0]]), 422, 'impossible-input')
    expect(shared.errors?.[0]?.detail).toMatch(/all.*deep/)
    const none = { id: 'none', name: 'None', applies_to: { min_length_m: 400 } }
    const empty = expectProblem(await ask([PLAN.groups[0], none]), 422, 'impossible-input')
    expect(empty.errors?.[0]?.pointer).toBe('#/groups/1/applies_to')
  })

  test('with a segment to keep that has no posted limit', async () => {
    const service = registryService()
    const { id } = await studied(service)
    const reply = await service.post('/v1/limit-plans', { ...PLAN, study_id: id, keep_posted: ['b'] })
    expect(expectProblem(reply, 422, 'impossible-input').errors?.[0]?.pointer).toBe('#/keep_posted/0')
  })

  test('when it is not there', async () => {
    const { get, remove } = registryService()
    for (const path of ['', '/notice', '/record', '/verify', '/evidence'])
      expectProblem(await get(`/v1/limit-plans/plan-x${path}`), 404, 'limit-plan-not-found')
    expectProblem(await remove('/v1/limit-plans/plan-x'), 404, 'limit-plan-not-found')
  })
})
