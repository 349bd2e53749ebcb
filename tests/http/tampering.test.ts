import { deflateSync, inflateSync } from 'node:zlib'
import Database from 'better-sqlite3'
import { describe, expect, test } from 'vitest'
import { registryService } from '../support/registry-service.ts'
import type { Json } from '../support/service.ts'
import { ended, job, PLAN, PUBLICATION, studied, UNCERTAIN } from '../support/study-service.ts'
import { temporaryFolder } from '../support/stores.ts'

/** What someone with the database in hand could change, past every call of the service. */
const TAMPERINGS = {
  'a limit of the plan': {
    table: 'limit_plans',
    column: 'content',
    change: (plan: Json) => {
      const [stretch] = plan['stretches'] as Json[]
      ;(stretch?.['limit'] as Json)['value'] = 99
    },
  },
  'the request of the plan': {
    table: 'limit_plans',
    column: 'request',
    change: (request: Json) => {
      request['percentile'] = 50
    },
  },
  'the date of the publication': {
    table: 'limit_plan_publications',
    column: 'publication',
    change: (publication: Json) => {
      publication['effective_from'] = '2020-01-01'
    },
  },
  'the hash of the publication': {
    table: 'limit_plan_publications',
    column: 'publication',
    change: (publication: Json) => {
      publication['record_hash'] = `sha256:${'0'.repeat(64)}`
    },
  },
  'a depth in the record': {
    table: 'limit_plan_publications',
    column: 'record',
    change: (record: Json) => {
      const { segments } = (record['inputs'] as { study: { segments: Json[] } }).study
      const stations = (segments[0]?.['segment'] as { stations: Json[] }).stations
      for (const station of stations) station['depth'] = (station['depth'] as number) + 0.5
    },
  },
  'a figure of the record': {
    table: 'limit_plan_publications',
    column: 'record',
    change: (record: Json) => {
      const rows = (record['results'] as { rows: unknown[][] }).rows
      const [row] = rows
      if (row) row[row.findIndex((value) => typeof value === 'number' && value > 0)] = 42
    },
  },
} as const

function tamper(file: string, { table, column, change }: (typeof TAMPERINGS)[keyof typeof TAMPERINGS]): void {
  const database = new Database(file)
  const { bytes } = database.prepare(`select ${column} as bytes from ${table}`).get() as { bytes: Buffer }
  const value = JSON.parse(inflateSync(bytes).toString()) as Json
  const before = JSON.stringify(value)
  change(value)
  expect(JSON.stringify(value)).not.toBe(before)
  database.prepare(`update ${table} set ${column} = ?`).run(deflateSync(JSON.stringify(value)))
  database.close()
}

describe('a verification notices', () => {
  test.each(Object.keys(TAMPERINGS) as (keyof typeof TAMPERINGS)[])('%s that was changed', async (name) => {
    const file = `${temporaryFolder()}/registry.db`
    const service = registryService({ DATABASE_URL: `sqlite:${file}` })
    const { id: study } = await studied(service, UNCERTAIN)
    const draft = await service.post('/v1/limit-plans', { ...PLAN, study_id: study, percentile: 5 })
    const { id: plan } = draft.json<{ id: string }>()
    expect((await service.post(`/v1/limit-plans/${plan}/publish`, PUBLICATION)).statusCode).toBe(201)
    tamper(file, TAMPERINGS[name])
    const { id } = job(await service.post(`/v1/limit-plans/${plan}/verify`, {}), 202)
    expect((await ended(service, id)).state).toBe('succeeded')
    const found = (await service.get(`/v1/limit-plans/${plan}/verify`)).json<Json>()
    expect(found['verdict']).toBe('record-altered')
    expect(found['text']).toMatch(/not what was published/)
  })
})
