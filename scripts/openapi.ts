import { readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { clientTypes } from './client-types.ts'
import { exampleReply } from './example-replies.ts'
import { openApiText } from './openapi-text.ts'

/** Writes the replies of the examples, then the document that shows them, and the types of a client by it. */

const EXAMPLES = new URL('../openapi/examples/', import.meta.url)

for (const name of readdirSync(EXAMPLES)) {
  const [, operation] = /^(\w+)\.request\.json$/.exec(name) ?? []
  if (operation === undefined) continue
  const request = readFileSync(new URL(name, EXAMPLES), 'utf8')
  const reply = await exampleReply(operation, request)
  writeFileSync(new URL(`${operation}.reply.json`, EXAMPLES), `${JSON.stringify(reply, null, 2)}\n`)
}

const text = await openApiText()
writeFileSync(new URL('../openapi/openapi.json', import.meta.url), text)
writeFileSync(new URL('../openapi/client.ts', import.meta.url), await clientTypes(text))
