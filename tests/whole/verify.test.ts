import { execFile } from 'node:child_process'
import { createHash } from 'node:crypto'
import { writeFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { promisify } from 'node:util'
import canonicalize from 'canonicalize'
import { beforeAll, describe, expect, test } from 'vitest'
import { registryService, type RegistryService } from '../support/registry-service.ts'
import type { Json } from '../support/service.ts'
import { PLAN, PUBLICATION, studied, UNCERTAIN } from '../support/study-service.ts'
import { temporaryFolder } from '../support/stores.ts'

const VERIFY = fileURLToPath(new URL('../../src/verify.ts', import.meta.url))
const TSX = import.meta.resolve('tsx')

let record = ''

beforeAll(async () => {
  const closing: (() => Promise<void>)[] = []
  const service: RegistryService = registryService({}, (close) => closing.push(close))
  const { id: study } = await studied(service, UNCERTAIN)
  const draft = await service.post('/v1/limit-plans', { ...PLAN, study_id: study, percentile: 5 })
  const { id } = draft.json<{ id: string }>()
  await service.post(`/v1/limit-plans/${id}/publish`, PUBLICATION)
  record = (await service.get(`/v1/limit-plans/${id}/record`)).body
  for (const close of closing) await close()
})

/** Runs the command in a folder that holds nothing but the record. */
async function verify(
  text: string,
  ...more: readonly string[]
): Promise<{ status: number; out: string; err: string }> {
  const folder = temporaryFolder()
  writeFileSync(`${folder}/record.json`, text)
  const command = ['--import', TSX, VERIFY, 'record.json', ...more]
  try {
    const { stdout, stderr } = await promisify(execFile)(process.execPath, command, { cwd: folder })
    return { status: 0, out: stdout, err: stderr }
  } catch (error) {
    const { code, stdout, stderr } = error as { code: number; stdout: string; stderr: string }
    return { status: code, out: stdout, err: stderr }
  }
}

describe('the command that verifies a record', () => {
  test('reproduces it without a database', async () => {
    const { status, out } = await verify(record)
    expect(out).toMatch(/^Limits, published as W-1\nreproduced: Every figure/)
    expect(out).toMatch(/ 0 different, by at most 0 m\/s\n$/)
    expect(status).toBe(0)
  })

  test('also when it was written out anew, with other spaces and another order of fields', async () => {
    const turned = Object.fromEntries(Object.entries(JSON.parse(record) as object).reverse())
    expect((await verify(JSON.stringify(turned, null, 2))).status).toBe(0)
  })

  test('tells a record that was altered, and which figures come out differently', async () => {
    const { status, out } = await verify(record.replaceAll('"depth":3.2', '"depth":3.3'))
    expect(out).toContain('record-altered')
    expect(out).toMatch(/\/results\/rows\/\d+\/\d+ max_over_ground_mps: [\d.]+, now [\d.]+/)
    expect(status).toBe(1)
  })

  /** The record with a change, under a hash that fits it. */
  const forged = (change: (record: Json) => void): string => {
    const { record_hash: _own, ...content } = JSON.parse(record) as Json
    change(content)
    const hash = createHash('sha256').update(canonicalize(content) ?? '')
    return JSON.stringify({ ...content, record_hash: `sha256:${hash.digest('hex')}` })
  }

  test('tells inputs that readers see and that are not those that were computed with, under a hash that fits', async () => {
    const deeper = forged((content) => {
      const [first] = content['segments'] as { properties: Json }[]
      if (first) first.properties['depth_m'] = 5
    })
    const { status, out } = await verify(deeper)
    expect(out).toContain('not-reproduced')
    expect(out).toMatch(/\/inputs\/study\/segments\/0\/segment\/stations\/0\/depth depth: 4, now 5/)
    expect(status).toBe(1)
    const other = forged((content) => {
      const { vessels } = (content['study'] as { request: { vessels: Json[] } }).request
      vessels[0] = { class: 'cemt-iv' }
    })
    expect((await verify(other)).status).toBe(1)
  })

  test('holds a record against the hash that was published', async () => {
    const { record_hash: hash } = JSON.parse(record) as { record_hash: string }
    expect((await verify(record, hash)).status).toBe(0)
    const { status, out } = await verify(record, `sha256:${'0'.repeat(64)}`)
    expect([status, out.includes('record-altered')]).toEqual([1, true])
    expect((await verify(record, 'abc')).status).toBe(2)
  })

  test('refuses what is no record', async () => {
    expect(await verify('{"name":"x"}')).toMatchObject({
      status: 2,
      err: expect.stringContaining('has no plan') as string,
    })
    expect((await verify('record')).status).toBe(2)
  })
})
