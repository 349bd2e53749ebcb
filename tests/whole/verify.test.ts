import { execFile } from 'node:child_process'
import { writeFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { promisify } from 'node:util'
import { beforeAll, describe, expect, test } from 'vitest'
import { registryService, type RegistryService } from '../support/registry-service.ts'
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
async function verify(text: string): Promise<{ status: number; out: string; err: string }> {
  const folder = temporaryFolder()
  writeFileSync(`${folder}/record.json`, text)
  const command = ['--import', TSX, VERIFY, 'record.json']
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

  test('refuses what is no record', async () => {
    expect(await verify('{"name":"x"}')).toMatchObject({
      status: 2,
      err: expect.stringContaining('has no plan') as string,
    })
    expect((await verify('record')).status).toBe(2)
  })
})
