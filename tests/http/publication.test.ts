import { createHash } from 'node:crypto'
import canonicalize from 'canonicalize'
import { describe, expect, test } from 'vitest'
import { PublicationReply } from '../../src/http/limit-plans.schema.ts'
import { addKey, registryService, type RegistryService, type Reply } from '../support/registry-service.ts'
import { expectProblem, type Json } from '../support/service.ts'
import { ended, job, PLAN, PUBLICATION, studied, UNCERTAIN } from '../support/study-service.ts'
import { strict } from '../support/strict.ts'

/** A draft on a study with uncertainty. */
async function drafted(service: RegistryService): Promise<string> {
  const { id } = await studied(service, UNCERTAIN)
  return draftedOn(service, id)
}

async function draftedOn(service: RegistryService, study: string): Promise<string> {
  const reply = await service.post('/v1/limit-plans', { ...PLAN, study_id: study, percentile: 5 })
  expect(reply.statusCode, reply.body).toBe(201)
  return reply.json<{ id: string }>().id
}

const publish = (service: RegistryService, plan: string, body: unknown = PUBLICATION): Promise<Reply> =>
  service.post(`/v1/limit-plans/${plan}/publish`, body)

async function verified(service: RegistryService, plan: string): Promise<Json> {
  const { id } = job(await service.post(`/v1/limit-plans/${plan}/verify`, {}), 202)
  expect((await ended(service, id)).state).toBe('succeeded')
  return (await service.get(`/v1/limit-plans/${plan}/verify`)).json<Json>()
}

describe('publishing', () => {
  test('numbers, dates and hashes a plan', async () => {
    const service = registryService()
    const plan = await drafted(service)
    const reply = await publish(service, plan)
    expect(reply.statusCode, reply.body).toBe(201)
    const publication = strict(PublicationReply).parse(reply.json())
    expect(publication).toMatchObject(PUBLICATION)
    const shown = (await service.get(`/v1/limit-plans/${plan}`)).json<Json>()
    expect(shown).toMatchObject({ state: 'published', publication })
  })

  test('again with the same body gives the same answer, with another is refused', async () => {
    const service = registryService()
    const plan = await drafted(service)
    const first = (await publish(service, plan)).json<Json>()
    const again = await publish(service, plan)
    expect([again.statusCode, again.json()]).toEqual([200, first])
    const other = await publish(service, plan, { ...PUBLICATION, title: 'Another' })
    expectProblem(other, 409, 'limit-plan-published')
    expectProblem(await service.remove(`/v1/limit-plans/${plan}`), 409, 'limit-plan-published')
    expect((await service.get(`/v1/limit-plans/${plan}`)).json()).toMatchObject({ publication: first })
  })

  test('takes each number once, and one plan the place of another', async () => {
    const service = registryService()
    const { id: study } = await studied(service, UNCERTAIN)
    const [old, next, third] = [
      await draftedOn(service, study),
      await draftedOn(service, study),
      await draftedOn(service, study),
    ]
    await publish(service, old)
    const taken = expectProblem(await publish(service, next), 409, 'number-taken')
    expect(taken.facts).toEqual({ limit_plan_id: old })
    const other = { ...PUBLICATION, number: 'W-2', supersedes: old }
    for (const supersedes of ['plan-x', third, next]) {
      const problem = expectProblem(
        await publish(service, next, { ...other, supersedes }),
        422,
        'impossible-input',
      )
      expect(problem.errors?.[0]?.pointer).toBe('#/supersedes')
    }
    expect((await publish(service, next, other)).statusCode).toBe(201)
    expect((await service.get(`/v1/limit-plans/${old}`)).json()).toMatchObject({ state: 'superseded' })
    // what was superseded still is what it was
    expect((await verified(service, old))['verdict']).toBe('reproduced')
    const late = await publish(service, third, { ...other, number: 'W-3' })
    expectProblem(late, 422, 'impossible-input')
    expect((await publish(service, old)).statusCode).toBe(200)
  })

  test('asks for a number and names that can be written on paper', async () => {
    const service = registryService()
    const plan = await drafted(service)
    for (const [field, value] of [
      ['number', ' '],
      ['number', 'W-1 '],
      ['title', ' '],
      ['authority', 'A\u0000'],
      ['signatory', '\ud800'],
      ['note', '\u0007'],
    ] as const) {
      const reply = await publish(service, plan, { ...PUBLICATION, [field]: value })
      const problem = expectProblem(reply, 400, 'invalid-request')
      expect(problem.errors).toEqual([
        {
          pointer: `#/${field}`,
          code: 'pattern',
          detail: expect.stringMatching(/^must be text without/) as string,
        },
      ])
    }
    expect((await publish(service, plan, { ...PUBLICATION, note: 'One\n\ttwo: ä, 水' })).statusCode).toBe(201)
  })

  test('needs a key that may publish, whose name is kept', async () => {
    const service = registryService({ ACCESS: 'keys' })
    const keys = {
      write: await addKey(service.service, { name: 'desk', role: 'write' }),
      publish: await addKey(service.service, { name: 'head', role: 'publish' }),
    }
    const as = (role: keyof typeof keys) => ({ authorization: `Bearer ${keys[role]}` })
    const asWriter: RegistryService = {
      ...service,
      get: (url) => service.get(url, as('write')),
      post: (url, body) => service.post(url, body, as('write')),
    }
    const plan = await drafted(asWriter)
    const refused = expectProblem(await publish(asWriter, plan), 403, 'role-too-small')
    expect(refused.facts).toEqual({ needed: 'publish', role: 'write' })
    const reply = await service.post(`/v1/limit-plans/${plan}/publish`, PUBLICATION, as('publish'))
    expect(reply.json()).toMatchObject({ published_by: 'head' })
    const page = await service.get(`/v1/limit-plans/${plan}/evidence`)
    expect([page.statusCode, page.headers['www-authenticate']]).toEqual([
      401,
      'Basic realm="Washlimit", charset="UTF-8"',
    ])
  })
})

/** RFC 8785 by the package that its authors list, over the record without its hash. */
function hashOf(record: Json): string {
  const { record_hash: _own, ...content } = record
  return `sha256:${createHash('sha256')
    .update(canonicalize(content) ?? '')
    .digest('hex')}`
}

describe('the record', () => {
  test('holds everything a plan rests on, under its hash', async () => {
    const service = registryService()
    const plan = await drafted(service)
    const publication = (await publish(service, plan)).json<Json>()
    const record = (await service.get(`/v1/limit-plans/${plan}/record`)).json<Json>()
    expect(record['record_hash']).toBe(publication['record_hash'])
    expect(hashOf(record)).toBe(record['record_hash'])
    const { record_hash: _hash, ...particulars } = publication
    expect(record['publication']).toEqual(particulars)
    expect(record).toMatchObject({
      plan: { id: plan, name: 'Limits' },
      segments: [{ id: 'a', properties: { depth_m: 4, revision: 1 } }, { id: 'b' }],
      vessel_classes: [{ id: 'cemt-ii', built_in: true }],
      calibrations: [],
    })
    const results = record['results'] as { columns: string[]; rows: unknown[][] }
    expect(results.rows).toHaveLength(4)
    expect(results.rows[0]).toHaveLength(results.columns.length)
    expect(JSON.stringify(record['sources'])).toContain('Blaauw')
  })

  test('of a draft is what it would be', async () => {
    const service = registryService()
    const plan = await drafted(service)
    const record = (await service.get(`/v1/limit-plans/${plan}/record`)).json<Json>()
    expect(record).not.toHaveProperty('publication')
    expect(hashOf(record)).toBe(record['record_hash'])
  })

  test('is frozen: neither the registry nor anything else changes it', async () => {
    const service = registryService()
    const plan = await drafted(service)
    await publish(service, plan)
    const before = (await service.get(`/v1/limit-plans/${plan}/record`)).body
    await service.remove('/v1/segments/a', { 'if-match': '*' })
    expect((await service.get(`/v1/limit-plans/${plan}/record`)).body).toBe(before)
  })
})

describe('verifying', () => {
  test('reproduces every figure', async () => {
    const service = registryService()
    const plan = await drafted(service)
    const problem = expectProblem(await service.get(`/v1/limit-plans/${plan}/verify`), 404, 'study-not-found')
    expect(problem.detail).toContain('never verified')
    await publish(service, plan)
    const found = await verified(service, plan)
    expect(found).toMatchObject({
      verdict: 'reproduced',
      figures: { different: 0 },
      largest_difference_mps: 0,
      differences: [],
      job: { kind: 'verification', state: 'succeeded' },
    })
    expect(found['computed_hash']).toBe(found['record_hash'])
    const { compared, equal } = found['figures'] as { compared: number; equal: number }
    expect(compared).toBe(equal)
    // 4 rows of 42 columns and more
    expect(compared).toBeGreaterThan(4 * 42)
  })
})
