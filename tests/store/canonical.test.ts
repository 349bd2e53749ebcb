import { expect, test } from 'vitest'
import { canonical, changedNames } from '../../src/store/canonical.ts'

test('canonical sorts names at every level, keeps the order of lists and leaves absent fields out', () => {
  expect(canonical({ b: [{ d: 1, c: undefined, a: null }], a: 'x' })).toBe('{"a":"x","b":[{"a":null,"d":1}]}')
})

test('canonical takes a field named like a part of JavaScript for a field', () => {
  const fields: unknown = JSON.parse('{"__proto__":{"b":1,"a":2},"constructor":3}')
  expect(canonical(fields)).toBe('{"__proto__":{"a":2,"b":1},"constructor":3}')
})

test('changedNames are sorted, whether a field came, went or differs', () => {
  expect(
    changedNames({ kept: [1], gone: 1, other: { a: 1 } }, { other: { a: 2 }, kept: [1], added: 0 }),
  ).toEqual(['added', 'gone', 'other'])
  expect(changedNames({ a: undefined }, {})).toEqual([])
})
