import { isDeepStrictEqual } from 'node:util'
import { z } from 'zod'

type Io = 'input' | 'output'
type Json = Record<string, unknown>

const PLACE = 'x-placeholder'
const REF = '#/components/schemas/'

/**
 * Turns the Zod schemas of routes into JSON Schema for one document. Schemas with an id become components, once
 * each; one that reads differently in requests and in replies (a default is optional there, present here) becomes
 * two, the one for requests with `Input` after its name.
 *
 * The generator rewrites references it does not know, so it is given placeholders that are filled at the end.
 */
export class SchemaBook {
  readonly #held: Json[] = []
  readonly #named: Record<Io, Map<string, Json>> = { input: new Map(), output: new Map() }

  /** A placeholder for a whole schema. */
  hold(schema: z.ZodType, io: Io): Json {
    return this.#placeholder(this.#convert(schema, io))
  }

  /** An object schema whose properties are placeholders, for parameters, which are listed one by one. */
  holdProperties(schema: z.ZodType): Json {
    const { properties = {}, required = [] } = this.#convert(schema, 'input') as {
      properties?: Json
      required?: string[]
    }
    const held = Object.entries(properties).map(([name, property]) => [
      name,
      this.#placeholder(property as Json),
    ])
    return { type: 'object', properties: Object.fromEntries(held) as Json, required }
  }

  /** The document with every placeholder filled and every named schema among its components. */
  fill(document: Json): Json {
    const split = this.#differing()
    const finish = (node: unknown): unknown => this.#finish(node, split)
    const schemas: Json = {}
    for (const io of ['output', 'input'] as const) {
      for (const [name, schema] of this.#named[io]) schemas[finalName(name, io, split)] ??= finish(schema)
    }
    const components = document['components'] as Json | undefined
    const sorted = Object.fromEntries(Object.entries(schemas).sort(([a], [b]) => (a < b ? -1 : 1)))
    return { ...(finish(document) as Json), components: { ...components, schemas: sorted } }
  }

  #placeholder(schema: Json): Json {
    this.#held.push(schema)
    // The generator reads the description of a parameter beside its schema.
    const described = 'description' in schema ? { description: schema['description'] } : {}
    return { ...described, [PLACE]: this.#held.length - 1 }
  }

  #convert(schema: z.ZodType, io: Io): Json {
    const { $defs = {}, ...root } = z.toJSONSchema(schema, {
      target: 'draft-2020-12',
      io,
      override: adjust,
    })
    for (const [name, definition] of Object.entries($defs)) {
      if (name.startsWith('__')) throw new Error('a schema that contains itself needs an id')
      this.#named[io].set(name, markRefs(definition, io) as Json)
    }
    // The dialect is that of the whole document.
    delete root.$schema
    return markRefs(root, io) as Json
  }

  #finish(node: unknown, split: ReadonlySet<string>): unknown {
    if (Array.isArray(node)) return node.map((item) => this.#finish(item, split))
    if (typeof node !== 'object' || node === null) return node
    const index = (node as Json)[PLACE]
    if (typeof index === 'number') return this.#finish(this.#held[index], split)
    return Object.fromEntries(
      Object.entries(node).map(([key, value]) =>
        key === '$ref' && typeof value === 'string'
          ? [key, finalRef(value, split)]
          : [key, this.#finish(value, split)],
      ),
    )
  }

  /** Names whose schemas differ between requests and replies, by themselves or by what they refer to. */
  #differing(): ReadonlySet<string> {
    const both = [...this.#named.output.keys()].filter((name) => this.#named.input.has(name))
    const split = new Set<string>()
    for (let before = -1; before < split.size;) {
      before = split.size
      for (const name of both) {
        const [input, output] = [this.#named.input.get(name), this.#named.output.get(name)]
        if (!isDeepStrictEqual(this.#finish(input, split), this.#finish(output, split))) split.add(name)
      }
    }
    return split
  }
}

function adjust({ zodSchema, jsonSchema }: { zodSchema: z.core.$ZodTypes; jsonSchema: Json }): void {
  const { def } = zodSchema._zod
  // Replies may gain fields, so only objects that are declared strict say that they have no others.
  if (def.type === 'object' && !def.catchall) delete jsonSchema['additionalProperties']
  // Defaults of parameters are left out by the converter, which takes them for results of a transform.
  if (def.type === 'default') jsonSchema['default'] ??= def.defaultValue
}

const markRefs = (node: unknown, io: Io): unknown => {
  if (Array.isArray(node)) return node.map((item) => markRefs(item, io))
  if (typeof node !== 'object' || node === null) return node
  return Object.fromEntries(
    Object.entries(node).map(([key, value]: [string, unknown]) =>
      key === '$ref' && typeof value === 'string'
        ? [key, `${io}:${value.replace('#/$defs/', '')}`]
        : [key, markRefs(value, io)],
    ),
  )
}

const finalName = (name: string, io: Io, split: ReadonlySet<string>): string =>
  io === 'input' && split.has(name) ? `${name}Input` : name

function finalRef(ref: string, split: ReadonlySet<string>): string {
  const [io, name] = ref.split(':', 2)
  return name === undefined ? ref : `${REF}${finalName(name, io === 'input' ? 'input' : 'output', split)}`
}
