import fc from 'fast-check'
import { expect, test } from 'vitest'
import { z } from 'zod'
import { advise } from '../../src/advisory/advise.ts'
import { advisoryText } from '../../src/http/advisory-text.ts'
import { jsonWriter } from '../../src/http/json-writer.ts'
import { toAdvisoryReply } from '../../src/http/reply.ts'
import { cases, ifPossible, type Case } from '../support/arbitraries.ts'

const CONTEXT = { serviceVersion: '1.0.0', registryRevision: 1 }

/** Labels with everything that JSON escapes, and halves of characters that stand alone. */
const labels = fc.oneof(
  fc.string({ unit: 'binary' }),
  fc.string({ unit: fc.integer({ min: 0, max: 0xffff }).map((code) => String.fromCharCode(code)) }),
  fc.constantFrom(
    '',
    '"',
    '\\',
    '\u0000\b\t\n\f\r\u001f\u007f',
    '\ud800',
    '\udc00x',
    '😀',
    '\u2028',
    '</script>',
  ),
)

function replyOf({ segment, vessel, conditions, options }: Case, label: string, line: number | undefined) {
  const resolved = { segment, vessel, conditions, options }
  const advisory = advise(segment, vessel, conditions, options)
  return toAdvisoryReply(advisory, resolved, CONTEXT, { label, ...(line !== undefined && { line }) })
}

test('An advisory is written as JSON.stringify writes it', () => {
  let answers = 0
  fc.assert(
    fc.property(
      cases(),
      labels,
      fc.option(fc.nat(), { nil: undefined }),
      fc.boolean(),
      (one, label, line, hasCurve) => {
        const reply = ifPossible(() =>
          replyOf({ ...one, options: { ...one.options, hasCurve } }, label, line),
        )
        if (!reply) return
        answers += 1
        expect(advisoryText(reply)).toBe(JSON.stringify(reply))
      },
    ),
    { numRuns: 500, seed: 21 },
  )
  expect(answers).toBeGreaterThan(400)
})

/** Every place of a value that holds a figure. */
function figurePaths(value: unknown, path: readonly string[] = []): string[][] {
  if (typeof value === 'number') return [[...path]]
  if (typeof value !== 'object' || value === null) return []
  return Object.entries(value).flatMap(([key, item]) => figurePaths(item, [...path, key]))
}

/** A copy with another value at a path. */
function replaced(value: unknown, [key, ...rest]: readonly string[], by: unknown): unknown {
  if (key === undefined) return by
  const copy = (Array.isArray(value) ? [...(value as unknown[])] : { ...(value as object) }) as Record<
    string,
    unknown
  >
  copy[key] = replaced(copy[key], rest, by)
  return copy
}

type Reply = Parameters<typeof advisoryText>[0]

test('A figure that is not finite is an error, wherever it stands', () => {
  const [one] = fc.sample(cases({ reach: [2, 4], depths: [1.6, 2] }), { numRuns: 1, seed: 3 })
  if (!one) throw new Error('there is a case')
  const reply = replyOf({ ...one, options: { ...one.options, hasCurve: true } }, 'a', 1)
  const paths = figurePaths(reply)
  expect(paths.length).toBeGreaterThan(300)
  for (const path of paths) {
    for (const bad of [NaN, Infinity, -Infinity]) {
      expect(() => advisoryText(replaced(reply, path, bad) as Reply), path.join('/')).toThrow(RangeError)
    }
    const withZero = replaced(reply, path, -0) as Reply
    expect(advisoryText(withZero)).toBe(JSON.stringify(withZero))
  }
})

const EVERYTHING = z.object({
  text: z.string(),
  choice: z.enum(['a', 'b']).optional(),
  count: z.int().nullable(),
  flags: z.array(z.boolean()),
  either: z.union([z.number(), z.string(), z.array(z.string()), z.boolean()]),
  named: z.record(z.string(), z.number().nullable()).optional(),
  inner: z.object({ only: z.string().optional() }),
})

test('Every kind of schema is written as JSON.stringify writes its values', () => {
  const write = jsonWriter(EVERYTHING)
  const double = fc.double({ noNaN: true, noDefaultInfinity: true })
  const values = fc.record(
    {
      text: labels,
      choice: fc.constantFrom('a', 'b'),
      count: fc.option(fc.integer()),
      flags: fc.array(fc.boolean()),
      either: fc.oneof(double, labels, fc.array(labels), fc.boolean()),
      named: fc.dictionary(labels, fc.option(double)),
      inner: fc.record({ only: labels }, { requiredKeys: [] }),
    },
    { requiredKeys: ['text', 'count', 'flags', 'either', 'inner'] },
  )
  fc.assert(
    fc.property(values, (value) => {
      expect(write(value)).toBe(JSON.stringify(value))
    }),
    { numRuns: 2000, seed: 22 },
  )
})

test('A figure that is null is an error, except where the schema allows it', () => {
  const write = jsonWriter(z.object({ figure: z.number(), free: z.number().nullable() }))
  expect(write({ figure: 1, free: null })).toBe('{"figure":1,"free":null}')
  expect(() => write({ figure: null, free: null })).toThrow(RangeError)
})
