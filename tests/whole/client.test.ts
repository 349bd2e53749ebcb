import { readFileSync } from 'node:fs'
import type { AddressInfo } from 'node:net'
import { setTimeout as pause } from 'node:timers/promises'
import createClient from 'openapi-fetch'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import type { components, paths } from '../../openapi/client.ts'
import { clientTypes } from '../../scripts/client-types.ts'
import { buildService, type Service } from '../support/service.ts'

const read = (name: string): string => readFileSync(new URL(`../../openapi/${name}`, import.meta.url), 'utf8')

type Problem = components['schemas']['Problem']

let service: Service
let client: ReturnType<typeof createClient<paths>>
const closings: (() => Promise<void>)[] = []

beforeAll(async () => {
  service = buildService((close) => void closings.push(close))
  await service.app.listen({ host: '127.0.0.1', port: 0 })
  const { port } = service.app.server.address() as AddressInfo
  client = createClient<paths>({ baseUrl: `http://127.0.0.1:${port}` })
})

afterAll(async () => {
  for (const close of closings) await close()
})

/** What a call answered; fails with its problem when it was refused. */
function answered<Data>({ data, error }: { data?: Data; error?: unknown }): Data {
  if (data === undefined) expect.fail(JSON.stringify(error))
  return data
}

/** State in which a job ended. */
async function ended(id: string): Promise<string> {
  for (;;) {
    const { state } = answered(await client.GET('/v1/studies/{id}', { params: { path: { id } } }))
    if (state !== 'queued' && state !== 'running') return state
    await pause(100)
  }
}

test('client.ts is what openapi.json says: run npm run openapi after changing routes', async () => {
  expect(await clientTypes(read('openapi.json'))).toBe(read('client.ts'))
})

// The types of these calls are checked with the strict settings of the project; here they run.
describe('a typed client', () => {
  test('of a dashboard reads segments, a layer, an advisory, and its curve', async () => {
    const list = answered(await client.GET('/v1/segments', { params: { query: { limit: 3 } } }))
    expect(list.features).toHaveLength(3)
    const id = 'harrow-long-pound'
    const layer = answered(
      await client.GET('/v1/advisories.geojson', { params: { query: { vessel_class: 'cemt-iv' } } }),
    )
    const shown = layer.features.find((feature) => feature.id === id)
    const asked = { params: { path: { id }, query: { vessel_class: 'cemt-iv' } } } as const
    const reply = await client.GET('/v1/segments/{id}/advisory', asked)
    const advisory = answered(reply)
    const speed: number | undefined = advisory.recommended_max_speed?.over_ground.kmh
    expect(speed).toBeGreaterThan(0)
    expect(speed).toBe(shown?.properties.max_over_ground_kmh)
    const etag = reply.response.headers.get('etag') ?? ''
    const again = await client.GET('/v1/segments/{id}/advisory', {
      ...asked,
      headers: { 'if-none-match': etag },
    })
    expect(again.response.status).toBe(304)
    const curve = answered(await client.GET('/v1/segments/{id}/speed-curve', asked))
    expect(typeof curve === 'object' && curve.points.length).toBe(60)
  })

  test('of a script that watches ships checks a log and reads its summary', async () => {
    const { data, response } = await client.POST('/v1/passages/check', {
      params: { query: { detail: 'summary' } },
      body: read('examples/harrowmere-passages.csv'),
      bodySerializer: (text) => text as string,
      headers: { 'content-type': 'text/csv' },
      parseAs: 'text',
    })
    expect(response.status).toBe(200)
    const line = JSON.parse(String(data)) as components['schemas']['PassageSummary']
    expect([line.type, line.complete, line.reports.read]).toEqual(['summary', true, 170])
  })

  test('of an engineer calibrates, asks with the calibration and without, and cleans up', async () => {
    const body = JSON.parse(read('examples/createCalibration.request.json')) as components['schemas']['CalibrationRequest'] // prettier-ignore
    const made = answered(await client.POST('/v1/calibrations', { body }))
    const best = made.methods.find(({ rank }) => rank === 1)
    expect(best?.factor).toBeGreaterThan(0)
    const advisory = answered(
      await client.POST('/v1/advisories', {
        body: {
          segment: { id: 'harrow-long-pound' },
          vessel: { class: 'cemt-iii' },
          options: { calibration_id: made.id },
        },
      }),
    )
    expect(advisory.reproducibility.calibration_id).toBe(made.id)
    expect(advisory.uncalibrated?.outcome).toBeDefined()
    const path = { params: { path: { id: made.id } } }
    const removed = await client.DELETE('/v1/calibrations/{id}', path)
    expect(removed.response.status).toBe(204)
  })

  test('of a regulator studies a waterway, draws limits, publishes them and has them verified', async () => {
    const request = JSON.parse(
      read('examples/createStudy.request.json'),
    ) as components['schemas']['StudyRequest']
    const small = { ...request, water_levels_m: [0], uncertainty: { ...request.uncertainty, samples: 16 } }
    const { id: study } = answered(await client.POST('/v1/studies', { body: small }))
    expect(await ended(study)).toBe('succeeded')
    const rules = JSON.parse(
      read('examples/createLimitPlan.request.json'),
    ) as components['schemas']['LimitPlanRequest']
    const plan = answered(await client.POST('/v1/limit-plans', { body: { ...rules, study_id: study } }))
    expect(plan.stretches.map(({ outcome }) => outcome)).toContain('kept')
    const path = { params: { path: { id: plan.id } } }
    const body = JSON.parse(
      read('examples/publishLimitPlan.request.json'),
    ) as components['schemas']['PublishRequest']
    const publication = answered(await client.POST('/v1/limit-plans/{id}/publish', { ...path, body }))
    expect(publication.record_hash).toMatch(/^sha256:/)
    const { id: job } = answered(await client.POST('/v1/limit-plans/{id}/verify', path))
    expect(await ended(job)).toBe('succeeded')
    const found = answered(await client.GET('/v1/limit-plans/{id}/verify', path))
    expect(found.verdict).toBe('reproduced')
    const notice = answered(await client.GET('/v1/limit-plans/{id}/notice', path))
    expect(notice.limitations).toHaveLength(plan.stretches.length)
  })

  test('of a keeper of the registry writes a segment at its revision and is told of a stale one', async () => {
    const path = { id: 'client-arm' }
    const properties = { name: 'Arm', depth_m: 2.4, width_m: 20, bank_distance_m: 9 }
    const geometry = { type: 'LineString' as const, coordinates: [[3.5, 54], [3.51, 54.001]] } // prettier-ignore
    const body = { type: 'Feature' as const, geometry, properties }
    const created = await client.PUT('/v1/segments/{id}', { params: { path }, body })
    expect(created.response.status).toBe(201)
    const stale = await client.PUT('/v1/segments/{id}', {
      params: { path },
      body,
      headers: { 'if-match': '"7"' },
    })
    const problem: Problem | undefined = stale.error
    expect([problem?.status, problem?.code, problem?.facts?.['current']]).toEqual([412, 'stale-revision', 1])
  })

  test('of anyone sees every fault of a request, by type', async () => {
    const { error } = await client.POST('/v1/advisories', {
      body: { segment: { depth_m: -1, width_m: 55 }, vessel: { class: 'cemt-va' } },
    })
    const problem: Problem | undefined = error
    expect(problem?.errors?.map(({ pointer, code }) => `${pointer} ${code}`).sort()).toEqual([
      '#/segment/bank_distance_m required',
      '#/segment/depth_m out-of-range',
    ])
  })
})
