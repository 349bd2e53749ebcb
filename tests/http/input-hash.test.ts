import { createHash } from 'node:crypto'
import canonicalize from 'canonicalize'
import fc from 'fast-check'
import { expect, test } from 'vitest'
import { inputContent, inputHash } from '../../src/http/input-hash.ts'
import { DEFAULT_OPTIONS } from '../../src/http/options.schema.ts'
import { cases as inputCases } from '../support/arbitraries.ts'

// canonicalize is the reference implementation of RFC 8785 by one of its authors.

test('The content is written in canonical form, as a library for RFC 8785 writes it', () => {
  let cases = 0
  fc.assert(
    fc.property(inputCases(), (inputs) => {
      cases += 1
      expect(JSON.stringify(inputContent(inputs))).toBe(canonicalize(inputContent(inputs)))
    }),
    { numRuns: 500, seed: 4 },
  )
  expect(cases).toBe(500)
})

test('The hash is SHA-256 over that form', () => {
  fc.assert(
    fc.property(inputCases(), (inputs) => {
      const digest = createHash('sha256')
        .update(canonicalize(inputContent(inputs)) ?? '')
        .digest('hex')
      expect(inputHash(inputs)).toBe(`sha256:${digest}`)
    }),
    { numRuns: 50, seed: 5 },
  )
})

test('The hash is the same where parts of it are kept from an earlier request', () => {
  fc.assert(
    fc.property(inputCases(), (inputs) => {
      const kept = { ...inputs, options: DEFAULT_OPTIONS, segment: { ...inputs.segment, revision: 3 } }
      const digest = createHash('sha256')
        .update(canonicalize(inputContent(kept)) ?? '')
        .digest('hex')
      expect([inputHash(kept), inputHash(kept)]).toEqual([`sha256:${digest}`, `sha256:${digest}`])
    }),
    { numRuns: 50, seed: 6 },
  )
})
