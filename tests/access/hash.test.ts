import { expect, test } from 'vitest'
import { hashOf, newKey } from '../../src/access/hash.ts'

test('a key is wl_ and 32 random bytes, and no two are alike', () => {
  const keys = Array.from({ length: 1000 }, newKey)
  for (const key of keys) {
    expect(key).toMatch(/^wl_[A-Za-z0-9_-]{43}$/)
    expect(Buffer.from(key.slice(3), 'base64url')).toHaveLength(32)
  }
  expect(new Set(keys).size).toBe(1000)
})

test('the hash of a key is SHA-256 in hexadecimal digits', () => {
  // FIPS 180-2, appendix B.1
  expect(hashOf('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad')
})
