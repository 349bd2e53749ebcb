import { setImmediate as turn } from 'node:timers/promises'
import { promisify } from 'node:util'
import { deflate, inflate } from 'node:zlib'

/** Elements of an array that are written and read at once, so that others have their turn in between. Own choice. */
const BATCH = 100
/** Objects within objects in which long arrays are looked for. */
const DEPTH = 2
/** Name that stands for a long array while the rest is read. */
const MARK = '\u0000'

const deflated = promisify(deflate)
const inflated = promisify(inflate)

/** Text as it is stored, outside the event loop: deflated, form of RFC 1950. */
export const pack = (text: string): Promise<Uint8Array> => deflated(text)

export const unpack = async (bytes: Uint8Array): Promise<string> => (await inflated(bytes)).toString('utf8')

/** JSON of plain data, as it is stored. It may be large: other work goes on meanwhile. */
export const packJson = async (value: unknown): Promise<Uint8Array> => pack(await textOf(value))

export const unpackJson = async (bytes: Uint8Array): Promise<unknown> => valueOf(await unpack(bytes))

type Fields = Record<string, unknown>

const isFields = (value: unknown): value is Fields =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

/** JSON in which a long array is a line for each batch of its elements. Nothing else has a line break. */
async function textOf(value: unknown, depth = 0): Promise<string> {
  if (Array.isArray(value) && value.length > BATCH) return longText(value)
  if (!isFields(value) || depth === DEPTH) return JSON.stringify(value)
  const fields: string[] = []
  for (const [name, part] of Object.entries(value))
    if (part !== undefined) fields.push(`${JSON.stringify(name)}:${await textOf(part, depth + 1)}`)
  return `{${fields.join(',')}}`
}

async function longText(values: readonly unknown[]): Promise<string> {
  const lines: string[] = []
  for (let start = 0; start < values.length; start += BATCH) {
    lines.push(JSON.stringify(values.slice(start, start + BATCH)).slice(1, -1))
    await turn()
  }
  return `[\n${lines.join(',\n')}\n]`
}

async function valueOf(text: string): Promise<unknown> {
  const rest: string[] = []
  const arrays: unknown[][] = []
  for (const line of text.split('\n')) {
    if (rest.length === 0 || line.startsWith(']')) {
      rest.push(line)
      // only a long array leaves the end of a line open
      if (line.endsWith('[')) rest.push(JSON.stringify({ [MARK]: arrays.push([]) - 1 }))
    } else {
      const batch = JSON.parse(`[${line.endsWith(',') ? line.slice(0, -1) : line}]`) as unknown[]
      arrays.at(-1)?.push(...batch)
      await turn()
    }
  }
  const value: unknown = JSON.parse(rest.join(''))
  return arrays.length === 0 ? value : filled(value, arrays)
}

/** Puts long arrays in the place of their marks. */
function filled(value: unknown, arrays: readonly (readonly unknown[])[]): unknown {
  if (Array.isArray(value)) {
    const [first] = value as readonly unknown[]
    return isFields(first) && MARK in first ? arrays[first[MARK] as number] : value
  }
  if (!isFields(value)) return value
  for (const [name, part] of Object.entries(value)) {
    const whole = filled(part, arrays)
    if (whole !== part) value[name] = whole
  }
  return value
}
