import { deflateSync, inflateSync } from 'node:zlib'
import fc from 'fast-check'
import { expect, test } from 'vitest'
import { packJson, unpackJson } from '../../src/store/packed.ts'

const ELEMENTS: readonly unknown[] = [
  0,
  -0.1,
  null,
  true,
  '',
  '[',
  ',\n]',
  '\u0000',
  [],
  {},
  [[1]],
  { a: ['\n'] },
]

/** Elements of every kind, so many. */
const long = (count: number): unknown[] =>
  Array.from({ length: count }, (_, i) => ELEMENTS[i % ELEMENTS.length])

test.each([
  ['nothing', {}],
  ['a list', []],
  ['one more than a batch', long(101)],
  ['two batches', long(200)],
  ['long lists in objects', { a: long(150), b: { c: long(1000), d: 'x' }, e: [1], f: long(301) }],
  ['long lists below those that are cut', { a: { b: { c: long(500) } }, d: [[long(500)]] }],
  ['line breaks in names and texts', { '\n]': '\n[', ',': long(250) }],
])('%s is read as it was written', async (_, value) => {
  expect(await unpackJson(await packJson(value))).toEqual(value)
})

test('whatever is plain data is read as it was written, and is JSON for everyone else', async () => {
  const lists = fc.array(fc.jsonValue(), { minLength: 90, maxLength: 210, size: 'max' })
  const value = fc.record({ a: lists, b: fc.record({ c: lists, d: fc.jsonValue() }), e: fc.jsonValue() })
  await fc.assert(
    fc.asyncProperty(value, async (data) => {
      const packed = await packJson(data)
      const plain: unknown = JSON.parse(JSON.stringify(data))
      expect(JSON.parse(inflateSync(packed).toString())).toEqual(plain)
      expect(await unpackJson(packed)).toEqual(plain)
    }),
    { numRuns: 20 },
  )
})

test('fields that are undefined are left out, as in JSON', async () => {
  expect(await unpackJson(await packJson({ a: undefined, b: { c: undefined, d: 1 } }))).toEqual({
    b: { d: 1 },
  })
})

test('JSON that others packed is read too', async () => {
  expect(await unpackJson(deflateSync('{"a":[1,2]}'))).toEqual({ a: [1, 2] })
})
