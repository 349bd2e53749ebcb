import type { Random } from './random.ts'

export type Json = Readonly<Record<string, unknown>>

const isObject = (value: unknown): value is Json =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

/** Values that names stand for in the demo waterway, so that requests get past the first check. */
export const KNOWN: Readonly<Record<string, string[]>> = {
  id: [
    'harrow-long-pound',
    'harrow-long-pound',
    'cemt-iv',
    'own-1',
    'own-2',
    'weggel-sorensen-1986',
    'nothing',
  ],
  study_id: [],
  slug: ['impossible-input', 'nothing'],
  class: ['cemt-iv', 'cemt-va', 'recreational-ra', 'planing-boat', 'own-1'],
  vessel_class: ['cemt-iv', 'cemt-ii', 'handysize', 'own-1'],
  waterway: ['Harrowmere Navigation', 'nowhere'],
  if_match: ['*', '"1"'],
}

const TEXTS = [
  '',
  'a',
  'Canal',
  '=1+1',
  '\u0000',
  '💧',
  'x'.repeat(300),
  '<b>',
  '"',
  '../..',
  '1e5',
  '%00',
  "'; --",
]

const MOST_DEPTH = 7

/** Values of JSON Schema, mostly valid: bounds are kept, and patterns by known names or not at all. */
export class FromSchema {
  constructor(
    readonly document: Json,
    readonly random: Random,
  ) {}

  value(schema: unknown, name = '', depth = 0): unknown {
    const found = this.#resolved(schema)
    if ('const' in found) return found['const']
    if (Array.isArray(found['enum'])) return this.random.pick(found['enum'] as unknown[])
    const branches = found['anyOf'] ?? found['oneOf']
    if (Array.isArray(branches)) return this.value(this.random.pick(branches as unknown[]), name, depth)
    if (Array.isArray(found['allOf'])) return this.#all(found, found['allOf'] as unknown[], name, depth)
    const types = [found['type'] ?? (found['properties'] ? 'object' : 'string')].flat() as string[]
    return this.#typed(this.random.pick(types), found, name, depth)
  }

  #all(schema: Json, parts: readonly unknown[], name: string, depth: number): unknown {
    const { allOf: _, ...own } = schema
    const values = [...parts, ...(Object.keys(own).length > 1 ? [own] : [])].map((part) =>
      this.value(part, name, depth),
    )
    return values.every(isObject) ? (Object.assign({}, ...values) as unknown) : values[0]
  }

  #resolved(schema: unknown): Json {
    let found = isObject(schema) ? schema : {}
    while (typeof found['$ref'] === 'string') {
      const path = found['$ref'].replace(/^#\//, '').split('/')
      found = path.reduce<Json>((node, step) => node[step] as Json, this.document)
    }
    return found
  }

  #typed(type: string, schema: Json, name: string, depth: number): unknown {
    if (type === 'number' || type === 'integer') return this.#number(schema, type === 'integer')
    if (type === 'boolean') return this.random.chance(0.5)
    if (type === 'null') return null
    if (type === 'array') return this.#array(schema, name, depth)
    if (type === 'object') return this.#object(schema, depth)
    return this.#text(schema, name)
  }

  #number(schema: Json, isWhole: boolean): number {
    const low = Number(schema['minimum'] ?? schema['exclusiveMinimum'] ?? -1000)
    const high = Number(schema['maximum'] ?? schema['exclusiveMaximum'] ?? 1000)
    const chance = this.random.next()
    if (chance < 0.03) return low
    if (chance < 0.06) return high
    if (low < 0 && high > 0 && !isWhole) return (this.random.next() - 0.5) * Math.min(1, high)
    // small figures are the usual ones where the range is wide
    const share = this.random.next() ** 3
    const value = low + (high - low) * share
    return isWhole ? Math.round(value) : value
  }

  #text(schema: Json, name: string): string {
    const known = KNOWN[name]
    if (known && this.random.chance(0.9)) return this.random.pick(known)
    if (schema['format'] === 'date-time') return '2026-05-04T06:00:00Z'
    if (schema['pattern'] !== undefined)
      return this.random.pick(['own-1', 'own-2', 'a', 'b.c', '2026-05-04', '1', '*'])
    const longest = Number(schema['maxLength'] ?? 400)
    return this.random
      .pick(TEXTS)
      .slice(0, longest)
      .padEnd(Number(schema['minLength'] ?? 0), 'x')
  }

  #array(schema: Json, name: string, depth: number): unknown[] {
    const tuple = schema['prefixItems']
    if (Array.isArray(tuple)) return tuple.map((item) => this.value(item, name, depth + 1))
    const least = Number(schema['minItems'] ?? 0)
    const count = Math.min(Number(schema['maxItems'] ?? 4), least + this.random.below(depth > 4 ? 1 : 4))
    return Array.from({ length: count }, () => this.value(schema['items'], name, depth + 1))
  }

  #object(schema: Json, depth: number): Json {
    const required = new Set((schema['required'] as string[] | undefined) ?? [])
    const share = depth > MOST_DEPTH ? 0 : 0.25
    const entries = Object.entries((schema['properties'] as Json | undefined) ?? {})
      .filter(([name]) => required.has(name) || this.random.chance(share))
      .map(([name, inner]) => [name, this.value(inner, name, depth + 1)])
    return Object.fromEntries(entries) as Json
  }
}

const JUNK: readonly unknown[] = [
  null,
  '',
  'NaN',
  '0x10',
  ' 1',
  -1,
  0,
  1e308,
  5e-324,
  -0,
  1.5,
  9007199254740993,
  true,
  [],
  {},
  [[[[[]]]]],
  { id: 1 },
  'x'.repeat(5000),
  '\ud800',
  JSON.parse('{"__proto__":{"depth_m":1},"constructor":{"prototype":{}}}'),
]

/** The value with one thing changed somewhere: junk in its place, a member gone, one too many. */
export function broken(value: unknown, random: Random): unknown {
  if (!isObject(value) && !Array.isArray(value)) return random.pick(JUNK)
  const keys = Object.keys(value)
  if (keys.length === 0 || random.chance(0.15)) return random.pick(JUNK)
  const copy = (Array.isArray(value) ? [...(value as unknown[])] : { ...value }) as Record<string, unknown>
  const key = random.pick(keys)
  const chance = random.next()
  if (chance < 0.6) copy[key] = broken(copy[key], random)
  else if (chance < 0.75) copy[key] = random.pick(JUNK)
  else if (chance < 0.9 && !Array.isArray(value)) Reflect.deleteProperty(copy, key)
  else copy[random.pick(['depth', 'dept_m', '__proto__x', 'toString', 'hasOwnProperty'])] = random.pick(JUNK)
  return copy
}
