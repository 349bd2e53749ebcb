import { readFileSync } from 'node:fs'
import { expect, test } from 'vitest'
import { openApiText } from '../../scripts/openapi-text.ts'

const file = readFileSync(new URL('../../openapi/openapi.json', import.meta.url), 'utf8')

test('openapi.json is what the routes say: run npm run openapi after changing them', async () => {
  expect(JSON.parse(await openApiText())).toEqual(JSON.parse(file))
})

interface Operation {
  readonly operationId?: string
  readonly summary?: string
  readonly tags?: readonly string[]
}

test('every operation has an id of its own, a summary and a tag', () => {
  const { paths } = JSON.parse(file) as { paths: Record<string, Record<string, Operation>> }
  const operations = Object.values(paths).flatMap((path) => Object.values(path))
  expect(operations.length).toBeGreaterThan(3)
  for (const { operationId, summary, tags } of operations) {
    expect(operationId).toMatch(/^[a-z][A-Za-z]+$/)
    expect(summary, operationId).toMatch(/^[A-Z].*\.$/)
    expect(tags?.length, operationId).toBeGreaterThan(0)
  }
  expect(new Set(operations.map(({ operationId }) => operationId)).size).toBe(operations.length)
})
