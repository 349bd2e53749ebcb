import { mkdirSync } from 'node:fs'
import { dirname } from 'node:path'
import Database from 'better-sqlite3'
import { describe, expect, test } from 'vitest'
import { SchemaTooNew } from '../../src/store/migrations.ts'
import { openStore } from '../../src/store/open.ts'
import type { Store } from '../../src/store/registry.ts'
import { onDatabase } from '../support/postgres.ts'
import { AUTHOR, ENGINES, segment, testStore, vesselClass } from '../support/stores.ts'

/** Numbers from 0 to 1, the same in every run (Park and Miller). */
function randomNumbers(seed: number): () => number {
  let state = seed
  return () => {
    state = (state * 48271) % 2147483647
    return state / 2147483647
  }
}

async function execute(url: string, text: string): Promise<void> {
  if (url.startsWith('sqlite:')) {
    const database = new Database(url.slice('sqlite:'.length))
    database.exec(text)
    database.close()
  } else await onDatabase(url, text)
}

describe.each(ENGINES)('several replicas on $kind', ({ kind, fresh }) => {
  test('of many writers that expect the same revision exactly one succeeds', async () => {
    const url = await fresh()
    const stores = [await testStore(url), await testStore(url), await testStore(url)]
    await stores[0]!.putSegment(segment('a'), 'none', AUTHOR)
    for (let round = 1; round <= 5; round += 1) {
      const written = await Promise.all(
        Array.from({ length: 12 }, (_, i) =>
          stores[i % 3]!.putSegment(segment('a', { depth_m: round + i / 100 }), round, AUTHOR),
        ),
      )
      expect(written.filter(({ outcome }) => outcome === 'updated')).toHaveLength(1)
      expect(written.filter(({ outcome }) => outcome === 'stale')).toHaveLength(11)
    }
    expect((await stores[1]!.current()).revision).toBe(6)
    expect(await stores[2]!.revisions('a')).toHaveLength(6)
  })

  test('writers of different segments all succeed, each with a registry revision of its own', async () => {
    const url = await fresh()
    const stores = [await testStore(url), await testStore(url)]
    const written = await Promise.all(
      Array.from({ length: 40 }, (_, i) => stores[i % 2]!.putSegment(segment(`s${i}`), 'none', AUTHOR)),
    )
    const revisions = written.map((one) => ('registryRevision' in one ? one.registryRevision : 0))
    expect(revisions.sort((a, b) => a - b)).toEqual(Array.from({ length: 40 }, (_, i) => i + 1))
    expect((await stores[0]!.current()).segments()).toHaveLength(40)
  })

  test('each sees at once what the other wrote, through 200 random writes', async () => {
    const url = await fresh()
    const stores = [await testStore(url), await testStore(url)]
    const random = randomNumbers(20260301)
    const expected = new Map<string, number>()
    for (let i = 0; i < 200; i += 1) {
      const [writer, reader] = random() < 0.5 ? stores : stores.toReversed()
      const written = await randomWrite(writer!, expected, random, i)
      const registry = await reader!.current()
      expect(registry.revision).toBe(written)
      const seen = registry.segments().map(({ id, properties }) => [id, properties['depth_m']])
      expect(seen).toEqual([...expected].sort(([a], [b]) => (a < b ? -1 : 1)))
    }
    expect(expected.size).toBeGreaterThan(5)
  })

  /** Makes one write that changes something; returns the revision of the registry after it. */
  async function randomWrite(
    store: Store,
    expected: Map<string, number>,
    random: () => number,
    depth: number,
  ): Promise<number> {
    const id = `s${Math.floor(random() * 20)}`
    if (random() < 0.1) {
      const ids = [id, 'imported-1', 'imported-2']
      for (const one of ids) expected.set(one, depth)
      const contents = ids.map((one) => segment(one, { depth_m: depth }))
      return (await store.importSegments(contents, AUTHOR)).registryRevision
    }
    const isRemoval = expected.has(id) && random() < 0.4
    const written = isRemoval
      ? await store.deleteSegment(id, 'any', AUTHOR)
      : await store.putSegment(segment(id, { depth_m: depth }), expected.has(id) ? 'any' : 'none', AUTHOR)
    if (isRemoval) expected.delete(id)
    else expected.set(id, depth)
    return 'registryRevision' in written ? written.registryRevision : -1
  }

  test('calls of current at the same time as writes never miss an acknowledged one', async () => {
    const url = await fresh()
    const writer = await testStore(url)
    const reader = await testStore(url)
    let acknowledged = 0
    let isWriting = true
    const read = async (): Promise<void> => {
      while (isWriting) {
        const least = acknowledged
        const { revision } = await reader.current()
        expect(revision).toBeGreaterThanOrEqual(least)
        await new Promise(setImmediate)
      }
    }
    const readers = Array.from({ length: 6 }, read)
    for (let i = 1; i <= 100; i += 1) {
      await writer.putSegment(segment('a', { depth_m: i }), i === 1 ? 'none' : i - 1, AUTHOR)
      acknowledged = i
    }
    isWriting = false
    await Promise.all(readers)
    expect((await reader.current()).revision).toBe(100)
  })

  test('replicas that start together on a new database bring up one schema', async () => {
    const url = await fresh()
    const stores = await Promise.all(Array.from({ length: 6 }, () => testStore(url)))
    const written = await Promise.all(
      stores.map((store, i) => store.putSegment(segment(`s${i}`), 'none', AUTHOR)),
    )
    expect(written.map(({ outcome }) => outcome)).toEqual(Array.from({ length: 6 }, () => 'created'))
    for (const store of stores) expect((await store.current()).revision).toBe(6)
  })

  test('a store opened again finds everything', async () => {
    const url = await fresh()
    const first = await openStore(url)
    await first.importSegments([segment('b'), segment('a')], AUTHOR)
    await first.putClass(vesselClass('ours'), 'none', AUTHOR)
    await first.deleteSegment('b', 1, AUTHOR)
    const before = await first.current()
    await first.close()
    const again = await (await testStore(url)).current()
    expect(again.revision).toBe(3)
    expect(again.segments()).toEqual(before.segments())
    expect(again.classes()).toEqual(before.classes())
  })

  test('a database put back to an older state is read anew', async () => {
    const url = await fresh()
    const store = await testStore(url)
    await store.putSegment(segment('a', { depth_m: 1 }), 'none', AUTHOR)
    await store.putSegment(segment('a', { depth_m: 2 }), 1, AUTHOR)
    await store.putSegment(segment('b'), 'none', AUTHOR)
    expect((await store.current()).revision).toBe(3)
    await execute(
      url,
      `delete from segment_revisions where registry_revision > 1; delete from segments where id = 'b';
       update segments set revision = 1, changed_at = 1, content = replace(content, '"depth_m":2', '"depth_m":1');
       update state set registry_revision = 1`,
    )
    const registry = await store.current()
    expect(registry.revision).toBe(1)
    expect(registry.segments().map(({ id, properties }) => [id, properties['depth_m']])).toEqual([['a', 1]])
  })

  test('a database with a newer schema is refused in plain words and left alone', async () => {
    const url = await fresh()
    await (await openStore(url)).close()
    await execute(url, `insert into kysely_migration values ('999-later', '2030-01-01T00:00:00.000Z')`)
    const opening = openStore(url)
    await expect(opening).rejects.toThrow(SchemaTooNew)
    await expect(opening).rejects.toThrow(
      'The database was written by a newer version of the service (schema 999-later), which this version would ' +
        'damage. Start the newer version, or set DATABASE_URL to another database.',
    )
  })

  test('a database that something else uses is refused with the reason and left alone', async () => {
    const url = await fresh()
    if (kind === 'sqlite') mkdirSync(dirname(url.slice('sqlite:'.length)))
    await execute(url, 'create table segments (id integer)')
    const opening = openStore(url)
    await expect(opening).rejects.toMatchObject({ name: 'Fault', code: 'store-unavailable' })
    await expect(opening).rejects.toThrow(/^The database \S+ cannot be opened: .*"segments" already exists$/)
    // an earlier table of the same migration is not left behind
    await execute(url, 'create table state (id integer)')
  })

  test('10,000 segments are imported, opened and refreshed', async () => {
    const url = await fresh()
    const writer = await testStore(url)
    const contents = Array.from({ length: 10_000 }, (_, i) =>
      segment(`segment-${i}`, { attributes: { remark: 'x'.repeat(1000) } }),
    )
    const times: string[] = []
    const timed = async <T>(what: string, act: () => Promise<T>, calls = 1): Promise<T> => {
      const start = performance.now()
      const result = await act()
      times.push(`${what} ${((performance.now() - start) / calls).toFixed(3)} ms`)
      return result
    }
    await timed('import', () => writer.importSegments(contents, AUTHOR))
    const store = await timed('open', () => testStore(url))
    const registry = await timed('first current()', () => store.current())
    expect(registry.segments()).toHaveLength(10_000)
    const repeat = async (): Promise<void> => {
      for (let i = 0; i < 1000; i += 1) await store.current()
    }
    await timed('current() without a change', repeat, 1000)
    await writer.putSegment(segment('segment-5000', { depth_m: 9 }), 1, AUTHOR)
    const after = await timed('current() after one change', () => store.current())
    expect(after.findSegment('segment-5000')?.properties['depth_m']).toBe(9)
    expect(after.findSegment('segment-4999')).toBe(registry.findSegment('segment-4999'))
    await timed('one write', () => store.putSegment(segment('segment-1', { depth_m: 9 }), 1, AUTHOR))
    console.log(`${kind}, 10,000 segments of 1.3 kB: ${times.join(', ')}`)
  })
})
