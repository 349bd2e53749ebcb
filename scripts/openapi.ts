import { readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { exampleReply } from './example-replies.ts'
import { openApiText } from './openapi-text.ts'

/** Writes the replies of the examples, then the document that shows them. */

const EXAMPLES = new URL('../openapi/examples/', import.meta.url)

for (const name of readdirSync(EXAMPLES)) {
  const [, operation] = /^(\w+)\.request\.json$/.exec(name) ?? []
  if (operation === undefined) continue
  const request = readFileSync(new URL(name, EXAMPLES), 'utf8')
  const reply = await exampleReply(operation, request)
  writeFileSync(new URL(`${operation}.reply.json`, EXAMPLES), `${JSON.stringify(reply, null, 2)}\n`)
}

writeFileSync(new URL('../openapi/openapi.json', import.meta.url), await openApiText())
