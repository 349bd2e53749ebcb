import swagger from '@fastify/swagger'
import swaggerUi from '@fastify/swagger-ui'
import { z } from 'zod'
import type { App } from './app-type.ts'
import { addExamples, type Examples } from './openapi-examples.ts'
import { SchemaBook } from './openapi-schemas.ts'
import { Problem, PROBLEM_TYPE } from './problems.ts'

type Json = Record<string, unknown>

export interface ApiDescription {
  readonly version: string
  /** Address that callers use, when the service stands behind another one. */
  readonly publicUrl?: string | undefined
  readonly examples?: Examples | undefined
}

const TAGS = [
  {
    name: 'advisories',
    description: 'The highest speed at which a vessel meets every criterion of a segment.',
  },
  { name: 'batches', description: 'The same answer for many lines or combinations at once.' },
  { name: 'segments', description: 'Stretches of waterway in the registry and what holds on them.' },
  { name: 'vessels', description: 'Classes of vessels and their dimensions.' },
  { name: 'calibrations', description: 'Measured waves that correct the methods of one water.' },
  { name: 'methods', description: 'Published formulas, with their ranges and sources.' },
  { name: 'service', description: 'Health, documentation and kinds of problems.' },
]

const DESCRIPTION = `Speed limits for waterways from hydraulics.

Figures are SI unless the name of a field says otherwise; the unit is the end of the name (\`_m\`, \`_mps\`, \`_kn\`).
A request that cannot be answered gets a problem (RFC 9457): decide on \`code\`, and show \`detail\` to people.
An advisory never replaces local rules or the judgement of the authority that applies it.`

// The page itself sets styles in its elements; nothing comes from elsewhere.
const CONTENT_POLICY =
  "default-src 'self'; style-src 'self' 'unsafe-inline'; img-src 'self' data:; font-src 'self' data:"

const LOGO = `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 200 40"><text x="0" y="28" fill="#fff"
  font-family="sans-serif" font-size="26">Washlimit</text></svg>`

/** Writes the OpenAPI document from the routes, and shows it at /docs without asking any other host for anything. */
export function installOpenApi(app: App, api: ApiDescription): void {
  const book = new SchemaBook()
  void app.register(swagger, {
    openapi: {
      openapi: '3.1.0',
      info: { title: 'Washlimit', version: api.version, description: DESCRIPTION },
      servers: [{ url: api.publicUrl ?? '/' }],
      tags: TAGS,
      // The empty alternative: where the service runs without keys, none is asked for.
      security: [{ key: [] }, {}],
      components: {
        securitySchemes: {
          key: {
            type: 'http',
            scheme: 'bearer',
            description: 'An access key, where the service asks for one.',
          },
        },
      },
    },
    transform: ({ schema, url }) => ({ schema: documented(schema as Json | undefined, book), url }),
    transformObject: (document) =>
      'openapiObject' in document
        ? addExamples(book.fill(document.openapiObject as Json), api.examples ?? {})
        : {},
  })
  void app.register(swaggerUi, {
    routePrefix: '/docs',
    uiConfig: { docExpansion: 'list', tryItOutEnabled: true },
    staticCSP: CONTENT_POLICY,
    theme: { title: 'Washlimit' },
    logo: { type: 'image/svg+xml', content: Buffer.from(LOGO) },
  })
  app.after(() => {
    app.get('/openapi.json', {
      schema: {
        operationId: 'getOpenApi',
        tags: ['service'],
        summary: 'Describe this interface as an OpenAPI 3.1 document.',
        response: {
          200: {
            description: 'The document.',
            content: { 'application/json': { schema: { type: 'object' } } },
          },
        },
      },
      handler: () => app.swagger(),
    })
  })
}

/** Refusals that no route makes and any may meet: no key, too many requests, too much work, a service that stops. */
const REFUSED = {
  description: 'Why the request was refused; any status from 400 on that is not listed.',
  content: { [PROBLEM_TYPE]: { schema: Problem } },
}

function documented(schema: Json | undefined, book: SchemaBook): Json {
  const { querystring, params, headers, body, response, ...rest } = schema ?? {}
  const result: Json = rest
  for (const [part, value] of Object.entries({ querystring, params, headers })) {
    if (value instanceof z.ZodType) result[part] = book.holdProperties(value)
  }
  if (body !== undefined) result['body'] = content(body, book, 'input')
  if (response !== undefined) {
    const replies = Object.entries({ ...(response as Json), default: REFUSED }).map(([status, reply]) => [
      status,
      content(reply, book, 'output'),
    ])
    result['response'] = Object.fromEntries(replies) as Json
  }
  return result
}

/** A request body or a reply: one schema for JSON, or one for each media type under `content`. */
function content(part: unknown, book: SchemaBook, io: 'input' | 'output'): unknown {
  if (part instanceof z.ZodType) {
    const description = part.description ?? 'The answer.'
    return { description, content: { 'application/json': { schema: book.hold(part, io) } } }
  }
  if (typeof part !== 'object' || part === null || !('content' in part)) return part
  const types = Object.entries(part.content as Record<string, { readonly schema?: unknown }>)
  const held = types.map(([type, media]) => [
    type,
    media.schema instanceof z.ZodType ? { ...media, schema: book.hold(media.schema, io) } : media,
  ])
  return { ...part, content: Object.fromEntries(held) as Json }
}
