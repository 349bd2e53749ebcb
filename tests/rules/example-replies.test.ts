import { readdirSync, readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import { EXAMPLE_PATHS, exampleReply } from '../../scripts/example-replies.ts'

const EXAMPLES = new URL('../../openapi/examples/', import.meta.url)
const read = (name: string): string => readFileSync(new URL(name, EXAMPLES), 'utf8')

describe('the examples of the documentation', () => {
  test('have a request and a reply for each operation that is listed', () => {
    const names = readdirSync(EXAMPLES)
    for (const operation of Object.keys(EXAMPLE_PATHS)) {
      expect(names).toContain(`${operation}.request.json`)
      expect(names).toContain(`${operation}.reply.json`)
    }
  })

  test.each(Object.keys(EXAMPLE_PATHS))('%s is answered as its reply shows', async (operation) => {
    const reply = await exampleReply(operation, read(`${operation}.request.json`))
    expect(reply).toEqual(JSON.parse(read(`${operation}.reply.json`)))
  })
})
