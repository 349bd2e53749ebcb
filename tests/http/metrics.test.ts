import type { AddressInfo } from 'node:net'
import { expect, test } from 'vitest'
import { Admission } from '../../src/http/admission.ts'
import { Metrics } from '../../src/http/metrics.ts'
import { addKey, registryService } from '../support/registry-service.ts'
import { PLAIN } from '../support/requests.ts'
import { buildService, post, stream } from '../support/service.ts'

/** Value of a line of figures: the name with its labels as they stand there. */
function figure(text: string, name: string): number {
  const line = text.split('\n').find((candidate) => candidate.startsWith(`${name} `))
  return Number(line?.slice(name.length + 1))
}

test('requests are counted by route and status, never by path', async () => {
  const { app } = buildService()
  await app.inject('/v1/segments/harrow-long-pound')
  await app.inject('/v1/segments/nothing-1')
  await app.inject('/v1/segments/nothing-2')
  await app.inject('/no/such/path')
  const reply = await app.inject('/metrics')
  expect(reply.headers['content-type']).toBe('text/plain; version=0.0.4; charset=utf-8')
  const count = (labels: string) => figure(reply.body, `washlimit_request_duration_seconds_count{${labels}}`)
  expect(count('method="GET",route="/v1/segments/:id",status="200"')).toBe(1)
  expect(count('method="GET",route="/v1/segments/:id",status="404"')).toBe(2)
  expect(count('method="GET",route="unknown",status="404"')).toBe(1)
  expect(reply.body).not.toMatch(/nothing-1|harrow|such/)
  expect(figure(reply.body, 'washlimit_database_up')).toBe(1)
  expect(figure(reply.body, 'washlimit_registry_revision')).toBe(1)
  expect(reply.body).toContain('washlimit_build_info{service_version="0.1.0",method_version="2"} 1')
})

test('advisories are counted by what governs, how they end and what they caution, rows by what became of them', async () => {
  const { app } = buildService()
  const single = (await post(app, '/v1/advisories', PLAIN)).json<{
    governing_criterion: string
    outcome: string
    cautions: { code: string }[]
  }>()
  await stream(app, '', [PLAIN, {}, PLAIN])
  await post(app, '/v1/passages/check', 'time,lat,lon,sog_kn,mmsi\nnever,1,2,3,4\n', {
    'content-type': 'text/csv',
  })
  const text = (await app.inject('/metrics')).body
  expect(figure(text, `washlimit_governing_criteria_total{criterion="${single.governing_criterion}"}`)).toBe(
    3,
  )
  expect(figure(text, `washlimit_outcomes_total{outcome="${single.outcome}"}`)).toBe(3)
  for (const { code } of single.cautions)
    expect(figure(text, `washlimit_cautions_total{code="${code}"}`), code).toBeGreaterThanOrEqual(3)
  expect(figure(text, 'washlimit_rows_total{stream="advisories",result="answered"}')).toBe(2)
  expect(figure(text, 'washlimit_rows_total{stream="advisories",result="refused"}')).toBe(1)
  expect(figure(text, 'washlimit_rows_total{stream="passages",result="rejected"}')).toBe(1)
  expect(figure(text, 'washlimit_advisory_duration_seconds_count')).toBe(1)
})

test('figures need a key that may read, and come from a listening process with its own', async () => {
  const { app, get, service } = registryService({ ACCESS: 'keys' })
  expect((await get('/metrics')).statusCode).toBe(401)
  const authorization = `Bearer ${await addKey(service, { name: 'monitor', role: 'read' })}`
  await app.listen({ host: '127.0.0.1', port: 0 })
  const { port } = app.server.address() as AddressInfo
  const reply = await fetch(`http://127.0.0.1:${port}/metrics`, { headers: { authorization } })
  expect(reply.status).toBe(200)
  const text = await reply.text()
  expect(figure(text, 'process_resident_memory_bytes')).toBeGreaterThan(1e7)
  expect(text).toMatch(/^nodejs_eventloop_lag_p99_seconds \S+$/m)
  expect(figure(text, 'washlimit_in_hand{kind="request"}')).toBe(0)
})

test('a database that is down or says nothing, and jobs, are figures too', async () => {
  const sources = { versions: { service: '1', methods: '1' }, admission: new Admission({ maxRequests: 1, maxStreams: 1 }) } // prettier-ignore
  const down = new Metrics({ ...sources, revision: () => Promise.reject(new Error('gone')) })
  expect(figure(await down.text(), 'washlimit_database_up')).toBe(0)
  const silent = new Metrics({
    ...sources,
    revision: () => new Promise(() => undefined),
    jobs: () => Promise.resolve({ queued: 3 }),
  })
  const begun = performance.now()
  const text = await silent.text()
  expect(performance.now() - begun).toBeLessThan(5000)
  expect(figure(text, 'washlimit_database_up')).toBe(0)
  expect(figure(text, 'washlimit_jobs{state="queued"}')).toBe(3)
})

test('each reply is logged with its route and the name of its key, never with the key', async () => {
  const { get, logged, service } = registryService({ ACCESS: 'keys' })
  const key = await addKey(service, { name: 'desk', role: 'read' })
  await get('/v1/segments?limit=7', { authorization: `Bearer ${key}`, 'x-request-id': 'seen-1' })
  const line = logged.map((text) => JSON.parse(text) as object).find((entry) => 'duration_ms' in entry)
  expect(line).toMatchObject({
    request_id: 'seen-1',
    route: '/v1/segments',
    key: 'desk',
    status: 200,
    msg: 'answered',
  })
  expect(logged.join('\n')).not.toContain(key)
})
