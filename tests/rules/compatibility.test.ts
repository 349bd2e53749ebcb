import { readFileSync } from 'node:fs'
import { expect, test } from 'vitest'
import { breaks } from '../support/compatibility.ts'

const read = (name: string): unknown =>
  JSON.parse(readFileSync(new URL(`../../openapi/${name}`, import.meta.url), 'utf8'))

test('openapi.json breaks no caller of released.json', () => {
  expect(breaks(read('released.json'), read('openapi.json'))).toEqual([])
})

/** A small interface with one of each thing. */
const DOCUMENT = {
  paths: {
    '/a': {
      get: {
        parameters: [
          { in: 'query', name: 'limit', schema: { type: 'integer', minimum: 1, maximum: 9 } },
          { in: 'query', name: 'kind', required: true, schema: { type: 'string', enum: ['x', 'y'] } },
        ],
        responses: {
          '200': { content: { 'application/json': { schema: { $ref: '#/components/schemas/Reply' } } } },
          '404': { content: { 'application/problem+json': { schema: { type: 'object' } } } },
        },
      },
      post: {
        requestBody: {
          content: {
            'application/json': { schema: { $ref: '#/components/schemas/Request' } },
            'text/csv': { schema: { type: 'string' } },
          },
        },
        responses: {},
      },
    },
    '/b': { get: { responses: {} } },
  },
  components: {
    schemas: {
      Request: {
        type: 'object',
        additionalProperties: false,
        required: ['depth_m'],
        properties: {
          depth_m: { type: 'number', minimum: 0, maximum: 100 },
          id: { type: 'string', pattern: '^a', maxLength: 9 },
          kind: { type: 'string', enum: ['reed', 'wall'] },
          section: { anyOf: [{ type: 'number' }, { type: 'string' }] },
          points: {
            type: 'array',
            maxItems: 5,
            items: { type: 'array', prefixItems: [{ type: 'number' }, { type: 'number' }] },
          },
          own: { type: 'object', additionalProperties: { type: 'number' } },
          free: {},
          again: { $ref: '#/components/schemas/Request' },
        },
      },
      Reply: {
        type: 'object',
        required: ['outcome', 'speed'],
        properties: {
          outcome: { type: 'string', enum: ['limited', 'no-safe-speed'] },
          speed: { type: 'number' },
          count: { type: 'integer' },
          height: { anyOf: [{ type: 'number' }, { type: 'null' }] },
          cautions: {
            type: 'array',
            items: { type: 'object', properties: { code: { type: 'string', enum: ['elevated'] } } },
          },
          inner: { $ref: '#/components/schemas/Reply' },
        },
      },
    },
  },
}

type Tree = Record<string, unknown>

/** A copy with another value at the end of a path of keys; undefined takes the member away. */
function changed(path: string, value: unknown): unknown {
  const copy = structuredClone(DOCUMENT) as Tree
  const keys = path.split(' ')
  const holder = keys.slice(0, -1).reduce<Tree>((tree, key) => tree[key] as Tree, copy)
  const last = keys.at(-1)!
  if (value !== undefined) holder[last] = value
  else if (Array.isArray(holder)) holder.splice(Number(last), 1)
  else Reflect.deleteProperty(holder, last)
  return copy
}

const REQUEST = 'components schemas Request'
const REPLY = 'components schemas Reply'
const BODY = '/a post body application/json #'
const ANSWER = '/a get 200 application/json #'

test('a document breaks none of its own callers', () => {
  expect(breaks(DOCUMENT, structuredClone(DOCUMENT))).toEqual([])
})

test.each([
  // what can be asked
  ['paths /b', undefined, '/b: removed'],
  ['paths /a get', undefined, '/a get: removed'],
  ['paths /a get parameters 0', undefined, '/a get query limit: removed'],
  ['paths /a get parameters 0 required', true, '/a get query limit: newly required'],
  [
    'paths /a get parameters 2',
    { in: 'query', name: 'new', required: true },
    '/a get query new: newly required',
  ],
  ['paths /a get parameters 0 schema minimum', 2, '/a get query limit: minimum became 2, from 1'],
  ['paths /a get parameters 1 schema enum', ['x'], '/a get query kind: value y removed'],
  ['paths /a post requestBody required', true, '/a post body: newly required'],
  ['paths /a post requestBody content text/csv', undefined, '/a post body text/csv: removed'],
  [`${REQUEST} required`, ['depth_m', 'id'], `${BODY}/id: newly required`],
  [`${REQUEST} properties kind`, undefined, `${BODY}/kind: removed`],
  [`${REQUEST} properties kind enum`, ['reed'], `${BODY}/kind: value wall removed`],
  [`${REQUEST} properties free enum`, ['x'], `${BODY}/free: now one of a list`],
  [`${REQUEST} properties free type`, 'string', `${BODY}/free: type any became string`],
  [`${REQUEST} properties depth_m type`, 'integer', `${BODY}/depth_m: type number became integer`],
  [`${REQUEST} properties depth_m type`, 'string', `${BODY}/depth_m: type number became string`],
  [`${REQUEST} properties depth_m minimum`, 0.1, `${BODY}/depth_m: minimum became 0.1, from 0`],
  [`${REQUEST} properties depth_m maximum`, 99, `${BODY}/depth_m: maximum became 99, from 100`],
  [`${REQUEST} properties depth_m multipleOf`, 2, `${BODY}/depth_m: multipleOf became 2, from null`],
  [`${REQUEST} properties id pattern`, '^b', `${BODY}/id: pattern became "^b", from "^a"`],
  [`${REQUEST} properties id minLength`, 1, `${BODY}/id: minLength became 1, from null`],
  [`${REQUEST} properties points maxItems`, 4, `${BODY}/points: maxItems became 4, from 5`],
  [
    `${REQUEST} properties points items prefixItems 1`,
    undefined,
    `${BODY}/points[]: a list of another length`,
  ],
  [
    `${REQUEST} properties points items prefixItems 1 type`,
    'string',
    `${BODY}/points[]/1: type number became string`,
  ],
  [
    `${REQUEST} properties own additionalProperties type`,
    'string',
    `${BODY}/own/*: type number became string`,
  ],
  [`${REQUEST} properties own additionalProperties`, false, `${BODY}/own: now takes named fields alone`],
  [
    `${REQUEST} properties section anyOf`,
    [{ type: 'number' }],
    `${BODY}/section: 1 alternatives removed or changed`,
  ],
  [`${REQUEST} properties section`, { type: 'string' }, `${BODY}/section: 1 alternatives removed or changed`],
  // what is answered
  ['paths /a get responses 404', undefined, '/a get 404: removed'],
  ['paths /a get responses 200 content application/json', undefined, '/a get 200 application/json: removed'],
  [`${REPLY} properties speed`, undefined, `${ANSWER}/speed: removed`],
  [`${REPLY} properties count`, undefined, `${ANSWER}/count: removed`],
  [`${REPLY} required`, ['outcome'], `${ANSWER}/speed: no longer in every reply`],
  [`${REPLY} properties count type`, 'number', `${ANSWER}/count: type integer became number`],
  [`${REPLY} properties speed type`, 'string', `${ANSWER}/speed: type number became string`],
  [`${REPLY} properties speed type`, ['number', 'null'], `${ANSWER}/speed: type number became number,null`],
  [`${REPLY} properties speed type`, undefined, `${ANSWER}/speed: type number became any`],
  [
    `${REPLY} properties outcome enum`,
    ['limited', 'no-safe-speed', 'none'],
    `${ANSWER}/outcome: value none new`,
  ],
  [`${REPLY} properties outcome enum`, ['limited'], `${ANSWER}/outcome: value no-safe-speed removed`],
  [`${REPLY} properties outcome enum`, undefined, `${ANSWER}/outcome: no longer one of a list`],
  [`${REPLY} properties height anyOf 2`, { type: 'string' }, `${ANSWER}/height: 1 alternatives new`],
  [`${REPLY} properties height`, { type: 'string' }, `${ANSWER}/height: 2 alternatives removed or changed`],
  [`${REPLY} properties cautions items type`, 'string', `${ANSWER}/cautions[]: type object became string`],
  [
    `${REPLY} properties cautions items properties code enum`,
    [],
    `${ANSWER}/cautions[]/code: value elevated removed`,
  ],
] as const)('%s as %j is found to break callers', (path, value, sentence) => {
  // prettier-ignore
  expect(breaks(DOCUMENT, changed(path, value))).toContain(sentence)
})

test.each([
  ['paths /c', { get: {} }],
  ['paths /b post', { responses: {} }],
  ['paths /a get parameters 2', { in: 'query', name: 'new', schema: { type: 'string' } }],
  ['paths /a get parameters 1 required', false],
  ['paths /a get parameters 0 schema maximum', 10],
  ['paths /a get responses 422', {}],
  ['paths /a get responses 200 content text/csv', {}],
  ['paths /a post requestBody content application/x-ndjson', {}],
  [`${REQUEST} properties more`, { type: 'string' }],
  [`${REQUEST} properties kind enum`, ['reed', 'wall', 'riprap']],
  [`${REQUEST} properties kind enum`, undefined],
  [`${REQUEST} properties depth_m minimum`, -1],
  [`${REQUEST} properties depth_m maximum`, undefined],
  [`${REQUEST} properties depth_m type`, ['number', 'string']],
  [`${REQUEST} properties depth_m description`, 'm'],
  [`${REQUEST} properties id pattern`, undefined],
  [`${REQUEST} properties section anyOf 2`, { type: 'boolean' }],
  [`${REQUEST} properties free`, { anyOf: [{}, { type: 'null' }] }],
  [`${REQUEST} required`, []],
  [`${REQUEST} additionalProperties`, true],
  [`${REPLY} properties more`, { type: 'string' }],
  [`${REPLY} required`, ['outcome', 'speed', 'count']],
  [`${REPLY} properties speed type`, 'integer'],
  [`${REPLY} properties cautions items properties code enum`, ['elevated', 'near-critical']],
  [`${REPLY} properties cautions items properties facts`, { type: 'object' }],
] as const)('%s as %j is an addition', (path, value) => {
  expect(breaks(DOCUMENT, changed(path, value))).toEqual([])
})
