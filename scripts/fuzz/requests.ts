import { readFileSync } from 'node:fs'
import { gzipSync } from 'node:zlib'
import { broken, FromSchema, type Json } from './from-schema.ts'
import type { Random } from './random.ts'

const read = (name: string): Json =>
  JSON.parse(readFileSync(new URL(`../../openapi/examples/${name}`, import.meta.url), 'utf8')) as Json
const waterway = read('harrowmere-navigation.geojson')
const advisory = read('createAdvisory.request.json')

/** Small enough to be computed between two requests. */
export const SMALL_STUDY = {
  name: 'Small',
  segments: ['harrow-long-pound', 'harrow-aqueduct'],
  vessels: [{ class: 'cemt-ii', loading: 'empty' }, { class: 'recreational-rb' }],
  uncertainty: { samples: 16, percentiles: [5, 50] },
}
export const SMALL_PLAN: Record<string, unknown> = {
  name: 'Small',
  study_id: '',
  groups: [{ id: 'all', name: 'All', applies_to: {} }],
  percentile: 5,
}

/** Bodies that are answered as they are: what is changed in them goes deep. */
const EXAMPLES: Readonly<Record<string, readonly unknown[]>> = {
  createAdvisory: [advisory],
  streamAdvisories: [advisory],
  createEffects: [read('createEffects.request.json')],
  createSensitivity: [read('createSensitivity.request.json')],
  createInverse: [read('createInverse.request.json')],
  createAdvisoryMatrix: [read('createAdvisoryMatrix.request.json')],
  createCalibration: [read('createCalibration.request.json')],
  createStudy: [SMALL_STUDY],
  createLimitPlan: [SMALL_PLAN],
  publishLimitPlan: [read('publishLimitPlan.request.json')],
  putSegment: (waterway['features'] as Json[]).map(({ id: _, ...feature }) => feature),
  importSegments: [waterway],
}

export interface Operation {
  readonly id: string
  readonly method: string
  readonly path: string
  readonly parameters: readonly { in: string; name: string; required?: boolean; schema: unknown }[]
  readonly body: Readonly<Record<string, { schema?: unknown }>>
  readonly responses: Readonly<Record<string, { content?: Readonly<Record<string, { schema?: unknown }>> }>>
}

export interface FuzzRequest {
  readonly method: string
  readonly url: string
  readonly headers: Readonly<Record<string, string>>
  readonly payload?: string | Buffer
  /** whether its compressed body breaks off: a stream that was begun is then reset */
  readonly isCut?: boolean
}

/** Every operation of the document. */
export function operationsOf(document: Json): Operation[] {
  const paths = document['paths'] as Record<string, Record<string, Json>>
  return Object.entries(paths).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, operation]) => ({
      id: String(operation['operationId']),
      method: method.toUpperCase(),
      path,
      parameters: (operation['parameters'] ?? []) as Operation['parameters'],
      body: ((operation['requestBody'] as Json | undefined)?.['content'] ?? {}) as Operation['body'],
      responses: operation['responses'] as Operation['responses'],
    })),
  )
}

const asText = (value: unknown): string => (typeof value === 'string' ? value : JSON.stringify(value))

// half of a pair is no character
const encoded = (text: string): string => encodeURIComponent(text.replaceAll(/\p{Cs}/gu, '?'))

const ACCEPTS = [
  '*/*',
  'application/json',
  'text/csv',
  'image/svg+xml',
  'application/x-ndjson',
  'text/html;q=0.1',
  'a/b',
]

const CELLS = [
  '',
  '1',
  '4',
  '54.09267',
  '3.43946',
  'cemt-iv',
  '2026-05-04T06:00:00Z',
  'nonsense',
  '=1+1',
  '"',
  '1e999',
  '-',
]

function csvOf(operation: Operation, random: Random): string {
  const columns =
    operation.id === 'checkPassages'
      ? ['time', 'lat', 'lon', 'sog_kn', 'mmsi', 'length_m', 'beam_m', 'draught_m', 'ship_type']
      : operation.id === 'streamAdvisories'
        ? ['segment_id', 'depth_m', 'width_m', 'bank_distance_m', 'vessel_class', 'draught_m', 'label']
        : [
            'speed_kmh',
            'speed_reference',
            'distance_m',
            'depth_m',
            'vessel_class',
            'loading',
            'max_wave_height_m',
          ]
  const kept = columns.filter(() => random.chance(0.95))
  const rows = Array.from({ length: random.below(8) }, () => kept.map(() => random.pick(CELLS)).join(','))
  return [kept.join(','), ...rows].join(random.pick(['\n', '\r\n']))
}

function bodyOf(
  operation: Operation,
  type: string,
  source: FromSchema,
  random: Random,
  breaks: boolean,
): string {
  if (type === 'text/csv') return csvOf(operation, random)
  const { schema } = operation.body[type] ?? {}
  const examples = EXAMPLES[operation.id]
  const one = (): string => {
    const value = examples && random.chance(0.6) ? random.pick(examples) : source.value(schema)
    return JSON.stringify(breaks && random.chance(0.7) ? broken(value, random) : value)
  }
  if (type !== 'application/x-ndjson') return one()
  return Array.from({ length: random.below(6) }, one).join('\n')
}

function targetOf(operation: Operation, source: FromSchema, random: Random, breaks: boolean): string {
  let path = operation.path
  const query: string[] = []
  for (const { in: place, name, required, schema } of operation.parameters) {
    const whole = source.value(schema, name)
    const value = encoded(asText(breaks && random.chance(0.2) ? broken(whole, random) : whole))
    if (place === 'path') path = path.replace(`{${name}}`, value || 'x')
    else if (place === 'query' && (required === true || random.chance(0.2))) query.push(`${name}=${value}`)
  }
  if (breaks && random.chance(0.1))
    query.push(random.pick(['x=1', '__proto__=1', 'format=csv', 'limit=%zz', '=']))
  return query.length > 0 ? `${path}?${query.join('&')}` : path
}

/** A body as it is, cut off, compressed, or compressed and cut off. */
function wrapped(
  text: string,
  random: Random,
  breaks: boolean,
): Pick<FuzzRequest, 'headers' | 'payload' | 'isCut'> {
  const payload = breaks && random.chance(0.1) ? text.slice(0, random.below(text.length)) : text
  if (!random.chance(0.05)) return { payload, headers: {} }
  const zipped = gzipSync(payload)
  const isCut = breaks && random.chance(0.3)
  return {
    payload: isCut ? zipped.subarray(0, random.below(zipped.length)) : zipped,
    headers: { 'content-encoding': 'gzip' },
    isCut,
  }
}

/** A request to an operation, valid or broken in some way, as the numbers say. */
export function requestTo(operation: Operation, document: Json, random: Random): FuzzRequest {
  const source = new FromSchema(document, random)
  const breaks = random.chance(0.5)
  const url = targetOf(operation, source, random, breaks)
  const headers: Record<string, string> = {}
  if (random.chance(0.3)) headers['accept'] = random.pick(ACCEPTS)
  if (random.chance(0.4)) headers['if-match'] = random.pick(['*', '"1"', '"2"', 'W/"1"', 'x'])
  if (random.chance(0.05)) headers['if-none-match'] = '*'
  const types = Object.keys(operation.body)
  const { method } = operation
  if (types.length === 0) return { method, url, headers }
  const type = random.pick(types)
  headers['content-type'] = breaks && random.chance(0.05) ? 'text/plain' : type
  const body = wrapped(bodyOf(operation, type, source, random, breaks), random, breaks)
  return { ...body, method, url, headers: { ...headers, ...body.headers } }
}
