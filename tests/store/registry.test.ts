import { describe, expect, test } from 'vitest'
import { at, AUTHOR, ENGINES, segment, testStore, vesselClass } from '../support/stores.ts'

describe.each(ENGINES)('the registry on $kind', ({ kind, fresh }) => {
  const emptyStore = async () => testStore(await fresh())

  test('a new database holds nothing, at revision 0', async () => {
    const store = await emptyStore()
    const registry = await store.current()
    expect(store.kind).toBe(kind)
    expect(registry.revision).toBe(0)
    expect(registry.segments()).toEqual([])
    expect(registry.classes()).toEqual([])
    expect(registry.findSegment('a')).toBeUndefined()
    expect(await store.revisions('a')).toEqual([])
  })

  test('a segment is created, read as it was written, updated and deleted', async () => {
    const store = await emptyStore()
    const content = segment('a', {
      depth_m: 0.1 + 0.2,
      attributes: { note: 'ein Übergang \u0000 \ud83d\ude00' },
    })
    expect(await store.putSegment(content, 'none', AUTHOR)).toEqual({
      outcome: 'created',
      revision: 1,
      registryRevision: 1,
    })
    expect((await store.current()).findSegment('a')).toEqual({
      ...content,
      revision: 1,
      updated: AUTHOR.time,
    })

    expect(await store.putSegment(segment('a', { depth_m: 4 }), 1, at(5))).toEqual({
      outcome: 'updated',
      revision: 2,
      registryRevision: 2,
    })
    const updated = (await store.current()).findSegment('a')
    expect(updated).toMatchObject({
      revision: 2,
      updated: '2026-03-01T09:05:00Z',
      properties: { depth_m: 4 },
    })
    expect(updated?.properties).not.toHaveProperty('attributes')

    expect(await store.deleteSegment('a', 2, at(6))).toEqual({
      outcome: 'deleted',
      revision: 3,
      registryRevision: 3,
    })
    const registry = await store.current()
    expect(registry.revision).toBe(3)
    expect(registry.findSegment('a')).toBeUndefined()
    expect(registry.segments()).toEqual([])
  })

  test('a write that expects another revision changes nothing and names the current one', async () => {
    const store = await emptyStore()
    expect(await store.putSegment(segment('a'), 1, AUTHOR)).toEqual({ outcome: 'missing' })
    expect(await store.putSegment(segment('a'), 'any', AUTHOR)).toEqual({ outcome: 'missing' })
    expect(await store.deleteSegment('a', 'any', AUTHOR)).toEqual({ outcome: 'missing' })
    expect(await store.deleteSegment('a', 'none', AUTHOR)).toEqual({ outcome: 'missing' })
    await store.putSegment(segment('a'), 'none', AUTHOR)
    await store.putSegment(segment('a', { depth_m: 4 }), 'any', AUTHOR)
    const stale = { outcome: 'stale', current: 2 }
    expect(await store.putSegment(segment('a', { depth_m: 5 }), 'none', AUTHOR)).toEqual(stale)
    expect(await store.putSegment(segment('a', { depth_m: 5 }), 1, AUTHOR)).toEqual(stale)
    expect(await store.putSegment(segment('a', { depth_m: 4 }), 1, AUTHOR)).toEqual(stale)
    expect(await store.putSegment(segment('a', { depth_m: 5 }), 3, AUTHOR)).toEqual(stale)
    expect(await store.deleteSegment('a', 1, AUTHOR)).toEqual(stale)
    const registry = await store.current()
    expect(registry.revision).toBe(2)
    expect(registry.findSegment('a')?.properties['depth_m']).toBe(4)
    expect(await store.revisions('a')).toHaveLength(2)
  })

  test('unchanged content makes no revision, whatever the order of its fields', async () => {
    const store = await emptyStore()
    const content = segment('a', { attributes: { b: 1, a: [{ y: 1, x: 2 }] } })
    await store.putSegment(content, 'none', AUTHOR)
    const turned = {
      ...content,
      properties: Object.fromEntries(Object.entries(content.properties).reverse()),
    }
    const same = {
      ...turned,
      properties: { ...turned.properties, attributes: { a: [{ x: 2, y: 1 }], b: 1 } },
    }
    for (const again of [content, turned, same]) {
      expect(await store.putSegment(again, 1, at(1))).toEqual({
        outcome: 'unchanged',
        revision: 1,
        registryRevision: 1,
      })
    }
    const registry = await store.current()
    expect(registry.revision).toBe(1)
    expect(registry.findSegment('a')?.updated).toBe(AUTHOR.time)
    const other = segment('a', { attributes: { b: 1, a: [{ y: 1 }, { x: 2 }] } })
    expect(await store.putSegment(other, 1, AUTHOR)).toMatchObject({ outcome: 'updated', revision: 2 })
  })

  test('revisions come newest first, with author, action and the names that changed', async () => {
    const store = await emptyStore()
    const first = segment('a')
    await store.putSegment(first, 'none', { time: at(0).time })
    await store.putSegment(segment('a', { depth_m: 4, datum: 'NAP' }), 1, at(1))
    const { name: _, ...nameless } = segment('a', { depth_m: 4, datum: 'NAP' }).properties
    const moved = { ...first, line: [...first.line].reverse(), properties: nameless }
    await store.putSegment(moved, 2, at(2))
    await store.deleteSegment('a', 'any', at(3))
    await store.importSegments([first], at(4))
    const all = ['bank_distance_m', 'depth_m', 'geometry', 'name', 'width_m']
    const key = 'surveyor'
    expect(await store.revisions('a')).toEqual([
      { revision: 5, action: 'imported', time: at(4).time, key, changed: all },
      {
        revision: 4,
        action: 'deleted',
        time: at(3).time,
        key,
        changed: ['bank_distance_m', 'datum', 'depth_m', 'geometry', 'width_m'],
      },
      { revision: 3, action: 'updated', time: at(2).time, key, changed: ['geometry', 'name'] },
      { revision: 2, action: 'updated', time: at(1).time, key, changed: ['datum', 'depth_m'] },
      { revision: 1, action: 'created', time: at(0).time, changed: all },
    ])
  })

  test('every revision stays readable, and a segment made again goes on counting', async () => {
    const store = await emptyStore()
    await store.putSegment(segment('a', { depth_m: 3 }), 'none', at(0))
    await store.putSegment(segment('a', { depth_m: 4 }), 1, at(1))
    await store.deleteSegment('a', 2, at(2))
    expect(await store.findRevision('a', 1)).toEqual({
      ...segment('a', { depth_m: 3 }),
      revision: 1,
      updated: at(0).time,
    })
    expect(await store.findRevision('a', 2)).toMatchObject({ revision: 2, properties: { depth_m: 4 } })
    expect(await store.findRevision('a', 3)).toBeUndefined()
    expect(await store.findRevision('a', 4)).toBeUndefined()
    expect(await store.putSegment(segment('a', { depth_m: 4 }), 'none', at(3))).toEqual({
      outcome: 'created',
      revision: 4,
      registryRevision: 4,
    })
    expect((await store.current()).findSegment('a')?.revision).toBe(4)
    expect((await store.revisions('a')).map(({ revision }) => revision)).toEqual([4, 3, 2, 1])
  })

  test('an import creates, replaces and leaves alone, in one revision of the registry', async () => {
    const store = await emptyStore()
    await store.putSegment(segment('a'), 'none', AUTHOR)
    await store.putSegment(segment('b'), 'none', AUTHOR)
    const contents = [segment('b', { depth_m: 9 }), segment('a'), segment('c'), segment('d')]
    expect(await store.importSegments(contents, at(1))).toEqual({
      created: 2,
      updated: 1,
      unchanged: 1,
      registryRevision: 3,
    })
    const registry = await store.current()
    expect(registry.segments().map(({ id, revision }) => [id, revision])).toEqual([
      ['a', 1],
      ['b', 2],
      ['c', 1],
      ['d', 1],
    ])
    const unchanged = { created: 0, updated: 0, unchanged: 4, registryRevision: 3 }
    expect(await store.importSegments(contents, at(2))).toEqual(unchanged)
    expect(await store.importSegments([], at(2))).toEqual({ ...unchanged, unchanged: 0 })
    expect((await store.current()).revision).toBe(3)
  })

  test('an import that fails in the middle leaves nothing, and the store goes on', async () => {
    const store = await emptyStore()
    await store.putSegment(segment('s0', { depth_m: 1 }), 'none', AUTHOR)
    const contents = Array.from({ length: 1200 }, (_, i) => segment(`s${i}`))
    // no database takes a row without an id; it stands in the last batch
    const broken = contents.with(1150, { ...segment('x'), id: null as unknown as string })
    await expect(store.importSegments(broken, AUTHOR)).rejects.toThrow(/null/i)
    const registry = await store.current()
    expect(registry.revision).toBe(1)
    expect(registry.segments()).toHaveLength(1)
    expect(await store.revisions('s1')).toEqual([])
    expect(await store.importSegments(contents, AUTHOR)).toMatchObject({ created: 1199, updated: 1 })
  })

  test('an import that names a segment twice is refused before anything is written', async () => {
    const store = await emptyStore()
    await expect(store.importSegments([segment('a'), segment('a')], AUTHOR)).rejects.toThrow(RangeError)
    expect((await store.current()).revision).toBe(0)
  })

  test('segments come in the order of their characters and are filtered by box, waterway and gauge', async () => {
    const store = await emptyStore()
    const far = { ...segment('a1', { waterway: 'north' }), bbox: [6, 53, 6.1, 53.1] as const }
    await store.importSegments(
      [
        segment('b', { waterway: 'north', gauge_id: 'g1' }),
        segment('a_2'),
        far,
        segment('A'),
        segment('a.2'),
      ],
      AUTHOR,
    )
    const registry = await store.current()
    const ids = (filter = {}) => registry.segments(filter).map(({ id }) => id)
    expect(ids()).toEqual(['A', 'a.2', 'a1', 'a_2', 'b'])
    expect(ids({ waterway: 'north' })).toEqual(['a1', 'b'])
    expect(ids({ waterway: 'north', gaugeId: 'g1' })).toEqual(['b'])
    expect(ids({ bbox: [5.99, 52.9, 6.01, 53.05] })).toEqual(['a1'])
    expect(ids({ bbox: [7, 50, 8, 51] })).toEqual([])
    for (const { id } of registry.segments()) expect(registry.findSegment(id)?.id).toBe(id)
  })

  test('a snapshot never changes, and what did not change is shared with the next', async () => {
    const store = await emptyStore()
    await store.importSegments([segment('a'), segment('b'), segment('c')], AUTHOR)
    const before = await store.current()
    const text = JSON.stringify(before.segments())
    await store.putSegment(segment('b', { depth_m: 9 }), 1, AUTHOR)
    await store.deleteSegment('c', 1, AUTHOR)
    const after = await store.current()
    expect(before.revision).toBe(1)
    expect(JSON.stringify(before.segments())).toBe(text)
    expect(before.findSegment('c')).toBeDefined()
    expect(after.segments().map(({ id }) => id)).toEqual(['a', 'b'])
    expect(after.findSegment('a')).toBe(before.findSegment('a'))
    expect(await store.current()).toBe(after)
    expect(() => (after.segments() as unknown[]).pop()).toThrow(TypeError)
  })

  test('classes of one’s own are created, updated and deleted by the same rules', async () => {
    const store = await emptyStore()
    const mine = vesselClass('ours', { name: 'Ours' })
    expect(await store.putClass(mine, 1, AUTHOR)).toEqual({ outcome: 'missing' })
    expect(await store.putClass(mine, 'none', AUTHOR)).toMatchObject({ outcome: 'created', revision: 1 })
    expect(await store.putClass(mine, 1, AUTHOR)).toMatchObject({ outcome: 'unchanged', revision: 1 })
    expect(await store.putClass({ ...mine, maxSpeedKmh: 21 }, 1, at(1))).toEqual({
      outcome: 'updated',
      revision: 2,
      registryRevision: 2,
    })
    expect(await store.putClass({ ...mine, maxSpeedKmh: 22 }, 1, AUTHOR)).toEqual({
      outcome: 'stale',
      current: 2,
    })
    await store.putSegment(segment('ours'), 'none', AUTHOR)
    const registry = await store.current()
    expect(registry.findClass('ours')).toEqual({
      id: 'ours',
      revision: 2,
      updated: at(1).time,
      vesselClass: { ...mine, maxSpeedKmh: 21 },
    })
    expect(await store.deleteClass('ours', 'any', AUTHOR)).toMatchObject({ outcome: 'deleted', revision: 3 })
    const after = await store.current()
    expect(after.classes()).toEqual([])
    expect(after.findSegment('ours')).toBeDefined()
    expect(registry.classes()).toHaveLength(1)
  })
})
