import { expect, test } from 'vitest'
import { z } from 'zod'
import { Fault, type FaultItem } from '../../src/domain/fault.ts'
import {
  booleanParameter,
  enumParameter,
  integerParameter,
  numberParameter,
} from '../../src/http/parameters.ts'
import { parse, pointer } from '../../src/http/validation.ts'
import type { App } from '../../src/http/app-type.ts'
import { buildTestApp } from '../support/app.ts'

function errorsOf(schema: z.ZodType, input: unknown): readonly FaultItem[] {
  try {
    parse(schema, input)
  } catch (error) {
    if (error instanceof Fault) return error.parts.errors ?? []
    throw error
  }
  throw new Error('nothing was refused')
}

const Water = z.strictObject({
  depth_m: z.number().min(0.3).max(100),
  width_m: z.number().max(20_000),
  kind: z.enum(['reed', 'riprap', 'wall']).default('reed'),
  profile: z
    .array(z.tuple([z.number(), z.number()]))
    .min(3)
    .optional(),
})

test('every fault of a value is reported at once, each with its place', () => {
  const errors = errorsOf(Water, { depth_m: 0.1, widht_m: 3, kind: 'rip-rap', profile: [[0, '1']] })
  expect(errors).toEqual([
    { pointer: '#/depth_m', code: 'out-of-range', detail: 'must be at least 0.3' },
    { pointer: '#/width_m', code: 'required', detail: 'is required: a finite number' },
    {
      pointer: '#/kind',
      code: 'not-in-list',
      detail: 'must be one of reed, riprap, wall; did you mean riprap?',
      allowed: ['riprap', 'reed', 'wall'],
    },
    { pointer: '#/profile/0/1', code: 'wrong-type', detail: 'must be a finite number, not text' },
    { pointer: '#/profile', code: 'out-of-range', detail: 'must have at least 3 items' },
    {
      pointer: '#/widht_m',
      code: 'unknown-field',
      detail: 'is not a known field; did you mean width_m?',
      allowed: ['width_m', 'depth_m', 'kind', 'profile'],
    },
  ])
})

test.each([
  ['2', 'wrong-type', 'must be a finite number, not text'],
  [null, 'wrong-type', 'must be a finite number, not null'],
  [true, 'wrong-type', 'must be a finite number, not true'],
  [[1], 'wrong-type', 'must be a finite number, not a list'],
  [{}, 'wrong-type', 'must be a finite number, not an object'],
  [Infinity, 'out-of-range', 'must be a finite number'],
  [NaN, 'out-of-range', 'must be a finite number'],
  [101, 'out-of-range', 'must be at most 100'],
])('a depth of %j is refused as %s', (value, code, detail) => {
  const [error] = errorsOf(Water, { depth_m: value, width_m: 1 })
  expect(error).toEqual({ pointer: '#/depth_m', code, detail })
})

test('lengths, exclusive bounds, whole numbers, steps and dates have their own sentences', () => {
  const schema = z.strictObject({
    a: z.string().min(1),
    b: z.string().max(2),
    c: z.number().positive(),
    d: z.int().max(9),
    e: z.number().multipleOf(5),
    f: z.iso.datetime({ offset: true }),
    g: z.string().regex(/^[a-z]+$/, { error: 'must be small letters' }),
    h: z.array(z.int().max(1)).length(2),
  })
  const errors = errorsOf(schema, { a: '', b: 'abc', c: 0, d: 1.5, e: 4, f: 'today', g: 'X', h: [1] })
  expect(errors.map(({ code, detail }) => `${code}: ${detail}`)).toEqual([
    'out-of-range: must have at least 1 character',
    'out-of-range: must have at most 2 characters',
    'out-of-range: must be more than 0',
    'wrong-type: must be a whole number',
    'out-of-range: must be a multiple of 5',
    'pattern: must be a date and time with a zone, such as 2026-03-01T12:00:00Z',
    'pattern: must be small letters',
    'out-of-range: must have exactly 2 items',
  ])
})

test('a pointer escapes ~ and /, and the whole body is #', () => {
  expect(pointer([])).toBe('#')
  expect(pointer(['a/b', 'm~n', 0, ''])).toBe('#/a~1b/m~0n/0/')
})

const Section = z.union([
  z.strictObject({ bottom_width_m: z.number() }),
  z.strictObject({ profile: z.array(z.number()), offset_m: z.number() }),
])

test('of a union only the faults of the closest branch are told', () => {
  const errors = errorsOf(z.strictObject({ section: Section.optional() }), {
    section: { profile: 3, ofset_m: 1, offset_m: 0 },
  })
  expect(errors).toEqual([
    { pointer: '#/section/profile', code: 'wrong-type', detail: 'must be a list, not a number' },
    {
      pointer: '#/section/ofset_m',
      code: 'unknown-field',
      detail: 'is not a known field; did you mean offset_m?',
      allowed: ['offset_m', 'profile'],
    },
  ])
})

test('of a union told apart by a literal, the branch with that literal is meant, however much else is wrong', () => {
  const schema = z.union([
    z.strictObject({ kind: z.literal('slope'), slope: z.number() }),
    z.strictObject({ kind: z.literal('width'), a: z.number(), b: z.number(), c: z.number() }),
  ])
  expect(errorsOf(schema, { kind: 'width', slope: 1 }).map((error) => error.pointer)).toEqual([
    '#/a',
    '#/b',
    '#/c',
    '#/slope',
  ])
})

test('a union that takes no such kind of value says which kinds it takes', () => {
  const schema = z.strictObject({
    segments: z.union([z.literal('all'), z.strictObject({ w: z.string() }), z.array(z.string())]),
  })
  expect(errorsOf(schema, { segments: 5 })).toEqual([
    {
      pointer: '#/segments',
      code: 'wrong-type',
      detail: 'must be "all" or an object or a list, not a number',
      allowed: ['all'],
    },
  ])
  expect(errorsOf(schema, { segments: { w: 3 } })).toEqual([
    { pointer: '#/segments/w', code: 'wrong-type', detail: 'must be text, not a number' },
  ])
})

test('a discriminator outside its list is told with the list', () => {
  const schema = z.discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('study') }),
    z.strictObject({ kind: z.literal('plan'), n: z.number() }),
  ])
  expect(errorsOf(schema, { kind: 'sudy' })).toEqual([
    {
      pointer: '#/kind',
      code: 'not-in-list',
      detail: 'must be one of study, plan; did you mean study?',
      allowed: ['study', 'plan'],
    },
  ])
  expect(errorsOf(schema, {})).toEqual([
    {
      pointer: '#/kind',
      code: 'required',
      detail: 'is required: one of study, plan',
      allowed: ['study', 'plan'],
    },
  ])
})

test('known fields are found behind lists, defaults, unions and schemas that contain themselves', () => {
  const Node = z.strictObject({ length_m: z.number(), get next() { return Node.optional() } }) // prettier-ignore
  const schema = z.strictObject({ items: z.array(z.union([z.string(), Node])).default([]) })
  const errors = errorsOf(schema, { items: [{ length_m: 1, next: { length_m: 2, lenght_m: 1 } }] })
  expect(errors).toEqual([
    {
      pointer: '#/items/0/next/lenght_m',
      code: 'unknown-field',
      detail: 'is not a known field; did you mean length_m?',
      allowed: ['length_m', 'next'],
    },
  ])
})

test('a check of our own chooses its code, what is allowed and its facts', () => {
  const schema = z
    .strictObject({ speed_kn: z.number().optional(), speed_kmh: z.number().optional() })
    .superRefine((value, context) => {
      context.addIssue({
        code: 'custom',
        path: ['speed_kn'],
        message: 'is given besides speed_kmh; keep one of them',
        params: {
          code: 'one-of',
          allowed: ['speed_kn', 'speed_kmh'],
          facts: { fields: Object.keys(value).length },
        },
      })
    })
  expect(errorsOf(schema, { speed_kn: 1, speed_kmh: 2 })).toEqual([
    {
      pointer: '#/speed_kn',
      code: 'one-of',
      detail: 'is given besides speed_kmh; keep one of them',
      allowed: ['speed_kn', 'speed_kmh'],
      facts: { fields: 2 },
    },
  ])
})

test('members named __proto__ and constructor are unknown fields and change nothing', () => {
  const input: unknown = JSON.parse(
    '{"depth_m":1,"width_m":1,"__proto__":{"polluted":1},"constructor":{"prototype":{}}}',
  )
  expect(errorsOf(Water, input).map((error) => [error.pointer, error.code])).toEqual([
    ['#/__proto__', 'unknown-field'],
    ['#/constructor', 'unknown-field'],
  ])
  expect({}).not.toHaveProperty('polluted')
})

const routes = (app: App): void => {
  app.post('/water/:id', {
    schema: {
      params: z.strictObject({ id: integerParameter(1, 9) }),
      querystring: z.strictObject({
        level_m: numberParameter(-5, 5).default(0),
        full: booleanParameter().optional(),
        detail: enumParameter(['reports', 'events']).default('events'),
      }),
      body: Water,
    },
    handler: (request) => ({ params: request.params, query: request.query, body: request.body }),
  })
  app.get('/figures', () => ({ deep: [{ depth_m: Number.NaN }] }))
}
const good = { depth_m: 3, width_m: 30 }

test('values in path and query arrive typed, with defaults', async () => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({ method: 'POST', url: '/water/7?level_m=-0.25&full=true', payload: good })
  expect(reply.json()).toEqual({
    params: { id: 7 },
    query: { level_m: -0.25, full: true, detail: 'events' },
    body: { ...good, kind: 'reed' },
  })
})

test('faults of path, query and body are told together', async () => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({
    method: 'POST',
    url: '/water/x?level_m=9&detial=events',
    payload: { ...good, depth_m: '3' },
  })
  expect(reply.statusCode).toBe(400)
  expect(reply.json()).toMatchObject({
    code: 'invalid-request',
    detail: '4 fields were refused',
    errors: [
      { parameter: 'id', code: 'wrong-type', detail: 'must be a whole number such as 2' },
      { parameter: 'level_m', code: 'out-of-range', detail: 'must be at most 5' },
      {
        parameter: 'detial',
        code: 'unknown-field',
        detail: 'is not a known parameter; did you mean detail?',
      },
      { pointer: '#/depth_m', code: 'wrong-type', detail: 'must be a finite number, not text' },
    ],
  })
})

test.each(['', '0x10', ' 1', '1e2', '1,5', 'NaN', 'Infinity', '1.'])(
  'a query number of "%s" is refused',
  async (text) => {
    const { app } = buildTestApp([routes])
    const url = `/water/1?level_m=${encodeURIComponent(text)}`
    const reply = await app.inject({ method: 'POST', url, payload: good })
    expect(reply.json()).toMatchObject({
      detail: '1 field was refused: level_m must be a decimal number such as 2.5',
      errors: [{ parameter: 'level_m', code: 'wrong-type' }],
    })
  },
)

test.each([
  ['level_m=1&level_m=2', 'level_m must be given once only'],
  ['full=1', 'full must be true or false'],
  ['detail=event', 'detail must be one of reports, events; did you mean events?'],
])('the query %s is refused', async (query, detail) => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({ method: 'POST', url: `/water/1?${query}`, payload: good })
  expect(reply.json()).toMatchObject({ detail: `1 field was refused: ${detail}` })
})

test('a request without a body is told that it needs one', async () => {
  const { app } = buildTestApp([routes])
  const reply = await app.inject({ method: 'POST', url: '/water/1' })
  expect(reply.json()).toMatchObject({
    errors: [{ pointer: '#', code: 'required', detail: 'is required: send a JSON body' }],
  })
})

test('a body nested 10,000 deep is refused as any other', async () => {
  const { app } = buildTestApp([routes])
  const deep = `${'{"depth_m":'.repeat(10_000)}1${'}'.repeat(10_000)}`
  const headers = { 'content-type': 'application/json' }
  const reply = await app.inject({ method: 'POST', url: '/water/1', payload: deep, headers })
  expect(reply.statusCode).toBe(400)
  expect(reply.json()).toMatchObject({
    errors: [{ pointer: '#/depth_m', code: 'wrong-type' }, { pointer: '#/width_m' }],
  })
})

test('a body with 50,000 unknown fields is refused within two seconds, 1000 of them told', async () => {
  const { app } = buildTestApp([routes])
  const payload = Object.fromEntries(Array.from({ length: 50_000 }, (_, index) => [`field_${index}`, 1]))
  const start = performance.now()
  const reply = await app.inject({ method: 'POST', url: '/water/1', payload })
  expect(performance.now() - start).toBeLessThan(2000)
  expect(reply.json()).toMatchObject({ detail: '50002 fields were refused', errors_truncated: true })
})

test('a reply with a figure that is not finite becomes an internal problem', async () => {
  const { app, logged } = buildTestApp([routes])
  const reply = await app.inject('/figures')
  expect(reply.statusCode).toBe(500)
  expect(reply.json()).toMatchObject({ code: 'internal' })
  expect(JSON.stringify(logged)).toContain('a figure of the reply is not finite')
})
