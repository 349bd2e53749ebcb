type Json = Record<string, unknown>

/** A request and its reply, by the `operationId` of the route that they show. */
export type Examples = Readonly<Record<string, { readonly request?: unknown; readonly reply?: unknown }>>

const asJson = (value: unknown): Json | undefined =>
  typeof value === 'object' && value !== null && !Array.isArray(value) ? (value as Json) : undefined

/** The first media type of a body or a reply, which is the one that examples are written in. */
function firstMedia(part: unknown): Json | undefined {
  const content = asJson(asJson(part)?.['content'])
  return content && asJson(Object.values(content)[0])
}

function show(part: unknown, example: unknown): void {
  const media = firstMedia(part)
  if (media && example !== undefined) media['examples'] = { example: { value: example } }
}

/** Puts examples into an OpenAPI document, in place. */
export function addExamples(document: Json, examples: Examples): Json {
  for (const path of Object.values(asJson(document['paths']) ?? {})) {
    for (const operation of Object.values(asJson(path) ?? {})) {
      const { operationId, requestBody, responses } = asJson(operation) ?? {}
      const example = typeof operationId === 'string' ? examples[operationId] : undefined
      if (!example) continue
      show(requestBody, example.request)
      show(asJson(responses)?.['200'] ?? asJson(responses)?.['201'], example.reply)
    }
  }
  return document
}
