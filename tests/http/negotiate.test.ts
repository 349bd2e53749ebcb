import { expect, test } from 'vitest'
import { z } from 'zod'
import { chosenByHeader, formatParameter, negotiate } from '../../src/http/negotiate.ts'
import type { App } from '../../src/http/app-type.ts'
import { buildTestApp } from '../support/app.ts'

const OFFERED = ['json', 'csv', 'svg'] as const

test.each([
  [undefined, 'json'],
  ['', 'json'],
  ['*/*', 'json'],
  ['text/csv', 'csv'],
  ['TEXT/CSV', 'csv'],
  ['text/*', 'csv'],
  ['application/json, text/csv', 'json'],
  ['text/csv, application/json', 'json'],
  ['application/json;q=0.5, text/csv;q=0.9', 'csv'],
  ['application/json;q=0, */*;q=0.1', 'csv'],
  ['text/csv;header=present;q=0.4, image/*;q=0.6', 'svg'],
  ['text/html,application/xhtml+xml,application/xml;q=0.9,image/avif,*/*;q=0.8', 'json'],
  ['text/csv;q=2, image/svg+xml;q=0.1', 'svg'],
  ['application/xml', undefined],
  ['application/json;q=0', undefined],
])('accept %j chooses %s', (accept, chosen) => {
  expect(chosenByHeader(accept, OFFERED)).toBe(chosen)
})

test('a caller that asks for JSON is served GeoJSON where there is no other JSON', () => {
  expect(chosenByHeader('application/json', ['geojson'])).toBe('geojson')
  expect(chosenByHeader('application/geo+json', ['json', 'geojson'])).toBe('geojson')
})

const routes = (app: App): void => {
  app.get('/curve', {
    schema: { querystring: z.strictObject({ format: formatParameter(OFFERED) }) },
    handler: (request, reply) => {
      const format = negotiate(request, reply, OFFERED)
      return format === 'json' ? { format } : reply.send(`<${format}>`)
    },
  })
}

test('format in the query overrides the header, and caches are told what matters', async () => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({ url: '/curve?format=csv', headers: { accept: 'image/svg+xml' } })
  expect(reply.body).toBe('<csv>')
  expect(reply.headers['content-type']).toBe('text/csv; charset=utf-8')
  expect(reply.headers.vary).toBe('Accept, Authorization')
})

test('a form that is not offered is 406 with the forms that are', async () => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({ url: '/curve', headers: { accept: 'application/xml' } })
  expect(reply.statusCode).toBe(406)
  expect(reply.headers['content-type']).toMatch(/^application\/problem\+json/)
  expect(reply.headers.vary).toBe('Accept, Authorization')
  expect(reply.json()).toMatchObject({
    code: 'not-acceptable',
    facts: { available: ['application/json', 'text/csv', 'image/svg+xml'] },
  })
})

test('an unknown format in the query is 400 with the ones that exist', async () => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject('/curve?format=cvs')
  expect(reply.json()).toMatchObject({
    status: 400,
    errors: [{ parameter: 'format', allowed: ['csv', 'svg', 'json'] }],
  })
})
