import type { z } from 'zod'
import { toFiniteJson } from './json.ts'

// JSON of values whose fields are known beforehand. JSON.stringify walks every object anew and quotes every name and text;
// here names are quoted once and texts that come again are looked up, which takes two thirds of the time (own measurement).

type Schema = z.core.$ZodType
type Write<Value> = (value: Value) => string

/** Texts that are remembered for each field. More than constants take, so that only what callers write wears it out. */
const REMEMBERED = 200

/** What JSON escapes, and halves of characters, which it escapes when they stand alone. */
const ESCAPED = /["\\\u0000-\u001f\ud800-\udfff]/

const quoted = (text: string): string => (ESCAPED.test(text) ? JSON.stringify(text) : `"${text}"`)

/** Texts in one piece, for keeping: the engine keeps a sum as a tree, to be walked with every reply it is part of. */
const flat = (...pieces: readonly string[]): string => pieces.join('')

/** Text as JSON after a fixed beginning, one flat string for each text. */
function textAfter(beginning: string): Write<string> {
  const known = new Map<string, string>()
  return (text) => {
    const found = known.get(text)
    if (found !== undefined) return found
    if (known.size === REMEMBERED) known.clear()
    const made = flat(beginning, quoted(text))
    known.set(text, made)
    return made
  }
}

function figure(value: number): string {
  // nor is null: what is not known is left out
  if (!Number.isFinite(value)) throw new RangeError('a figure of the reply is not finite')
  return `${value}`
}

/** Whatever a union allows, mostly a figure or a text. */
function anyValue(value: unknown): string {
  if (typeof value === 'number') return figure(value)
  return typeof value === 'string' ? quoted(value) : toFiniteJson(value)
}

function arrayOf(write: Write<unknown>): Write<readonly unknown[]> {
  return (items) => {
    let text = '['
    for (let i = 0; i < items.length; i += 1) {
      if (i > 0) text += ','
      text += write(items[i])
    }
    return `${text}]`
  }
}

interface Field {
  readonly name: string
  /** its name as JSON, as that of the first field and as that of a later one */
  readonly first: string
  readonly later: string
  readonly write: Write<unknown>
  /** name and text in one, of a field that holds texts */
  readonly whole: Write<unknown> | undefined
}

function fieldOf([name, schema]: [string, Schema]): Field {
  const first = flat('{', JSON.stringify(name), ':')
  const later = flat(',', JSON.stringify(name), ':')
  const whole = holdsText(schema) ? (textAfter(later) as Write<unknown>) : undefined
  return { name, first, later, write: jsonWriter(schema), whole }
}

function holdsText(schema: Schema): boolean {
  const { def } = (schema as z.core.$ZodTypes)._zod
  return def.type === 'optional' ? holdsText(def.innerType) : def.type === 'string' || def.type === 'enum'
}

function objectOf(shape: Readonly<Record<string, Schema>>): Write<Readonly<Record<string, unknown>>> {
  const fields = Object.entries(shape).map(fieldOf)
  return (object) => {
    let text = ''
    for (const { name, first, later, write, whole } of fields) {
      const value = object[name]
      if (value === undefined) continue
      if (text === '') text = first + write(value)
      else if (whole) text += whole(value)
      else {
        // one after the other: the sum of both would be a tree of its own
        text += later
        text += write(value)
      }
    }
    return text === '' ? '{}' : `${text}}`
  }
}

function recordOf(write: Write<unknown>): Write<Readonly<Record<string, unknown>>> {
  return (record) => {
    let text = ''
    for (const name in record) {
      const value = record[name]
      if (value !== undefined) text += `${text === '' ? '{' : ','}${quoted(name)}:${write(value)}`
    }
    return text === '' ? '{}' : `${text}}`
  }
}

/**
 * Writer of the values of a schema, as JSON.stringify writes them, with fields in the order of the schema. It writes what
 * the schema has and nothing else.
 *
 * @throws RangeError from the writer, for a figure that is not finite
 */
export function jsonWriter(schema: Schema): Write<unknown> {
  const { def } = (schema as z.core.$ZodTypes)._zod
  if (holdsText(schema)) return textAfter('') as Write<unknown>
  if (def.type === 'number') return figure as Write<unknown>
  if (def.type === 'boolean') return (value) => (value === true ? 'true' : 'false')
  if (def.type === 'array') return arrayOf(jsonWriter(def.element)) as Write<unknown>
  if (def.type === 'object') return objectOf(def.shape) as Write<unknown>
  if (def.type === 'record') return recordOf(jsonWriter(def.valueType)) as Write<unknown>
  if (def.type === 'optional') return jsonWriter(def.innerType)
  if (def.type === 'nullable') {
    const write = jsonWriter(def.innerType)
    return (value) => (value === null ? 'null' : write(value))
  }
  return anyValue
}
