import { describe, expect, test } from 'vitest'
import { canal, registryService } from '../support/registry-service.ts'
import { expectProblem, faultsOf } from '../support/service.ts'

const IMPORT = '/v1/segments/import'
const MOST_FEATURES = 20_000
const MOST_BYTES = 67_108_864

/** A collection of copies of the canal, as text. */
const copies = (number: number): string =>
  `{"type":"FeatureCollection","features":[${Array.from({ length: number }, (_, i) => JSON.stringify(canal(`s${i}`))).join(',')}]}`

/** One feature, with blanks up to a number of bytes. */
function padded(bytes: number): string {
  const text = copies(1)
  return text + ' '.repeat(bytes - Buffer.byteLength(text))
}

describe('an import', () => {
  test('takes 20,000 features and not one more', async () => {
    const { post, get } = registryService()
    const reply = await post(IMPORT, copies(MOST_FEATURES))
    expect(reply.statusCode, reply.body.slice(0, 500)).toBe(200)
    expect(reply.json()).toMatchObject({
      features: MOST_FEATURES,
      created: MOST_FEATURES,
      registry_revision: 1,
    })
    expect((await get('/v1/segments?limit=1')).json()).toMatchObject({ numberMatched: MOST_FEATURES })

    const problem = expectProblem(await post(IMPORT, copies(MOST_FEATURES + 1)), 400, 'invalid-request')
    expect(faultsOf(problem)).toEqual(['#/features out-of-range'])
    expect(problem.errors?.[0]?.detail).toContain('20000')
    expect((await get('/health/ready')).json()).toMatchObject({ registry_revision: 1 })
  })

  test('takes a body of 64 MiB and not one byte more', async () => {
    const { post } = registryService()
    expect((await post(`${IMPORT}?dry_run=true`, padded(MOST_BYTES))).statusCode).toBe(200)
    const problem = expectProblem(
      await post(`${IMPORT}?dry_run=true`, padded(MOST_BYTES + 1)),
      413,
      'payload-too-large',
    )
    expect(problem.facts).toEqual({ limit: MOST_BYTES })
  })
})
