import { Fault } from '../domain/fault.ts'

/** Reply text. A figure that is not finite is our own error: JSON would write it as null without a word. */
export function toFiniteJson(value: unknown): string {
  const text = JSON.stringify(value)
  // without a null in the text every figure was finite, and looking for one is much cheaper than walking the reply
  if (text.includes('null')) assertFinite(value)
  return text
}

function assertFinite(value: unknown): void {
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new RangeError('a figure of the reply is not finite')
  } else if (Array.isArray(value)) {
    for (const item of value) assertFinite(item)
  } else if (typeof value === 'object' && value !== null) {
    // Not Object.values: a list for each object would double what a reply costs.
    for (const key in value) assertFinite((value as Readonly<Record<string, unknown>>)[key])
  }
}

const UTF8 = new TextDecoder('utf-8', { fatal: true })

/** JSON from the bytes of a body or a line; a Fault says where reading stopped, when that is known. */
export function parseJsonBytes(bytes: Uint8Array): unknown {
  let text: string
  try {
    text = UTF8.decode(bytes)
  } catch {
    throw new Fault('malformed-json', 'The body is not UTF-8: convert it and send it again')
  }
  return parseJson(text)
}

/** JSON from text. Repeated members: the last one counts. */
export function parseJson(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch (error) {
    throw malformed(text, error)
  }
}

// Above this, looking for the place would cost more than the answer is worth.
const MAX_SEARCHED = 1_048_576

function malformed(text: string, error: unknown): Fault {
  if (text.trim() === '') return new Fault('malformed-json', 'The body is empty: send a JSON value')
  const position =
    statedPosition(error, text) ?? (text.length <= MAX_SEARCHED ? searchedPosition(text) : undefined)
  if (position === undefined) return new Fault('malformed-json', 'The text is not JSON')
  const before = text.slice(0, position).split('\n')
  const line = before.length
  const column = (before.at(-1)?.length ?? 0) + 1
  const what = position >= text.length ? 'ends too early' : 'is not JSON'
  return new Fault('malformed-json', `The text ${what} at line ${line}, column ${column}`, {
    facts: { position, line, column },
  })
}

/** Where the parser says it stopped, which it does for some faults only. */
function statedPosition(error: unknown, text: string): number | undefined {
  const reason = error instanceof Error ? error.message : ''
  if (reason.includes('end of JSON input')) return text.length
  const stated = /at position (\d+)(?: \(line \d+ column \d+\))?$/.exec(reason)?.[1]
  return stated === undefined ? undefined : Number(stated)
}

/** The first character with which the text can no longer become JSON, by halving. */
function searchedPosition(text: string): number {
  let possible = 0
  let impossible = text.length
  while (impossible - possible > 1) {
    const middle = (possible + impossible) >> 1
    if (canBecomeJson(text.slice(0, middle))) possible = middle
    else impossible = middle
  }
  return possible
}

function canBecomeJson(start: string): boolean {
  try {
    JSON.parse(start)
    return true
  } catch (error) {
    return (statedPosition(error, start) ?? -1) >= start.length
  }
}
