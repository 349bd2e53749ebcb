import { describe, expect, test } from 'vitest'
import type { AccessKey } from '../../src/store/registry.ts'
import { ENGINES, testStore } from '../support/stores.ts'

const NOW = '2026-03-01T08:00:00.000Z'
const LATER = '2026-03-01T09:00:00.000Z'
const HASHES = { ann: 'a'.repeat(64), bob: 'b'.repeat(64), eve: 'e'.repeat(64) }

const key = (name: string, more: Partial<AccessKey> = {}): AccessKey => ({
  name,
  role: 'write',
  created: NOW,
  ...more,
})

describe.each(ENGINES)('keys on $kind', ({ fresh }) => {
  test('a key is found by its hash and no other', async () => {
    const store = await testStore(await fresh())
    expect(await store.findKey(HASHES.ann, NOW)).toBeUndefined()
    expect(await store.addKey(key('ann', { role: 'publish' }), HASHES.ann)).toBe(true)
    expect(await store.findKey(HASHES.ann, NOW)).toEqual(key('ann', { role: 'publish' }))
    expect(await store.findKey(HASHES.bob, NOW)).toBeUndefined()
    expect(await store.findKey('', NOW)).toBeUndefined()
  })

  test('a name is used once, even after the key was revoked', async () => {
    const store = await testStore(await fresh())
    expect(await store.addKey(key('ann'), HASHES.ann)).toBe(true)
    expect(await store.addKey(key('ann'), HASHES.bob)).toBe(false)
    expect(await store.revokeKey('ann', NOW)).toBe(true)
    expect(await store.addKey(key('ann'), HASHES.bob)).toBe(false)
    expect(await store.findKey(HASHES.bob, NOW)).toBeUndefined()
  })

  test('a key is valid or revoked at once on every replica', async () => {
    const url = await fresh()
    const [a, b] = [await testStore(url), await testStore(url)]
    for (const name of ['ann', 'bob', 'eve'] as const) {
      expect(await b.findKey(HASHES[name], NOW)).toBeUndefined()
      await a.addKey(key(name), HASHES[name])
      expect(await b.findKey(HASHES[name], NOW)).toEqual(key(name))
      expect(await b.revokeKey(name, LATER)).toBe(true)
      expect(await a.findKey(HASHES[name], NOW)).toBeUndefined()
      expect(await b.findKey(HASHES[name], NOW)).toBeUndefined()
    }
  })

  test('a key with an end is valid before it and not from it on', async () => {
    const store = await testStore(await fresh())
    await store.addKey(key('ann', { expires: '2026-03-01T08:30:00Z' }), HASHES.ann)
    expect(await store.findKey(HASHES.ann, '2026-03-01T08:29:59.999Z')).toMatchObject({ name: 'ann' })
    expect(await store.findKey(HASHES.ann, '2026-03-01T08:30:00.000Z')).toBeUndefined()
    expect(await store.findKey(HASHES.ann, LATER)).toBeUndefined()
  })

  test('keys are listed by name with what became of them, and revoked once', async () => {
    const store = await testStore(await fresh())
    await store.addKey(key('eve', { expires: LATER }), HASHES.eve)
    await store.addKey(key('Bob'), HASHES.bob)
    await store.addKey(key('ann', { role: 'read' }), HASHES.ann)
    expect(await store.revokeKey('Bob', LATER)).toBe(true)
    expect(await store.revokeKey('Bob', NOW)).toBe(false)
    expect(await store.revokeKey('nobody', NOW)).toBe(false)
    expect(await store.keys()).toEqual([
      key('Bob', { revoked: LATER }),
      key('ann', { role: 'read' }),
      key('eve', { expires: LATER }),
    ])
  })

  test('changes of keys leave the revision of the registry alone', async () => {
    const store = await testStore(await fresh())
    const before = await store.current()
    await store.addKey(key('ann'), HASHES.ann)
    await store.revokeKey('ann', LATER)
    expect(await store.current()).toBe(before)
  })
})
