import { expect, test } from 'vitest'
import { z } from 'zod'
import type { App } from '../../src/http/app-type.ts'
import {
  booleanParameter,
  enumParameter,
  integerParameter,
  numberParameter,
} from '../../src/http/parameters.ts'
import { problemResponses } from '../../src/http/problems.ts'
import { buildTestApp } from '../support/app.ts'

const Same = z.strictObject({ lon: z.number() }).meta({ id: 'Same' })
const Inner = z.strictObject({ depth_m: z.number().default(3) }).meta({ id: 'Inner' })
const Outer = z
  .strictObject({ inner: Inner, place: Same.optional() })
  .meta({ id: 'Outer', description: 'Holds both.' })
const Tree = z.strictObject({ get branches() { return z.array(Tree) } }).meta({ id: 'Tree' }) // prettier-ignore

const routes = (app: App): void => {
  app.post('/outer/:n', {
    schema: {
      operationId: 'putOuter',
      params: z.strictObject({ n: integerParameter(1, 9).describe('number of it') }),
      querystring: z.strictObject({
        level_m: numberParameter(-5, 5).default(0).describe('level, m'),
        full: booleanParameter(),
        detail: enumParameter(['reports', 'events']).optional(),
      }),
      body: Outer,
      response: { 200: z.object({ outer: Outer, tree: Tree }), ...problemResponses(400) },
    },
    handler: () => ({}),
  })
}

interface Document {
  readonly openapi: string
  readonly paths: Record<string, Record<string, Record<string, unknown>>>
  readonly components: { readonly schemas: Record<string, unknown> }
}

async function documentOf(): Promise<{ document: Document; text: string }> {
  const { app } = buildTestApp([routes])
  const text = (await app.inject('/openapi.json')).body
  return { document: JSON.parse(text) as Document, text }
}

test('a named schema is one component, two when requests and replies differ, also by what it holds', async () => {
  const { document, text } = await documentOf()
  const { schemas } = document.components
  expect(Object.keys(schemas).filter((name) => /Same|Inner|Outer|Tree/.test(name))).toEqual([
    'Inner',
    'InnerInput',
    'Outer',
    'OuterInput',
    'Same',
    'Tree',
  ])
  expect(schemas['InnerInput']).not.toHaveProperty('required')
  expect(schemas['Inner']).toMatchObject({ required: ['depth_m'], additionalProperties: false })
  expect(schemas['OuterInput']).toMatchObject({
    properties: {
      inner: { $ref: '#/components/schemas/InnerInput' },
      place: { $ref: '#/components/schemas/Same' },
    },
  })
  expect(schemas['Tree']).toMatchObject({
    properties: { branches: { items: { $ref: '#/components/schemas/Tree' } } },
  })
  expect(text).not.toMatch(/placeholder|\$defs|input:|output:/)
})

test('requests refer to the schemas for requests, replies to those for replies', async () => {
  const { document } = await documentOf()
  const operation = document.paths['/outer/{n}']?.['post']
  expect(operation?.['requestBody']).toMatchObject({
    required: true,
    content: { 'application/json': { schema: { $ref: '#/components/schemas/OuterInput' } } },
  })
  expect(operation?.['responses']).toMatchObject({
    200: {
      content: {
        'application/json': { schema: { properties: { outer: { $ref: '#/components/schemas/Outer' } } } },
      },
    },
    400: { content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } } },
  })
})

test('parameters are documented as the values they stand for', async () => {
  const { document } = await documentOf()
  expect(document.paths['/outer/{n}']?.['post']?.['parameters']).toEqual([
    { in: 'query', name: 'level_m', required: false, description: 'level, m', schema: { type: 'number', minimum: -5, maximum: 5, default: 0, description: 'level, m' } }, // prettier-ignore
    { in: 'query', name: 'full', required: true, schema: { type: 'boolean' } },
    { in: 'query', name: 'detail', required: false, schema: { type: 'string', enum: ['reports', 'events'] } },
    { in: 'path', name: 'n', required: true, description: 'number of it', schema: { type: 'integer', minimum: 1, maximum: 9, description: 'number of it' } }, // prettier-ignore
  ])
})

test('replies may gain fields, so only strict objects are closed', async () => {
  const { document } = await documentOf()
  expect(document.openapi).toBe('3.1.0')
  expect(document.components.schemas['Problem']).not.toHaveProperty('additionalProperties')
})

test('the documentation page and all it loads come from this service', async () => {
  const { app } = buildTestApp()
  const page = await app.inject('/docs')
  expect(page.statusCode).toBe(200)
  const loaded = [...page.body.matchAll(/(?:src|href)="([^"]+)"/g)].map(([, address = '']) => address)
  expect(loaded.length).toBeGreaterThan(3)
  for (const address of loaded) {
    expect(address).not.toMatch(/^(https?:)?\/\//)
    const { pathname } = new URL(address, 'http://service/docs/')
    expect((await app.inject(pathname)).statusCode, address).toBe(200)
  }
  expect(page.headers['content-security-policy']).toMatch(/^default-src 'self';/)
  expect((await app.inject('/docs/static/swagger-initializer.js')).body).toContain('validatorUrl: null')
})
