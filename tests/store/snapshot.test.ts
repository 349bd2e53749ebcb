import { setTimeout as pause } from 'node:timers/promises'
import { expect, onTestFinished, test } from 'vitest'
import type { Engine } from '../../src/store/engine.ts'
import { storeOn } from '../../src/store/open.ts'
import { openDatabase, sqliteEngine } from '../../src/store/sqlite.ts'
import { AUTHOR, segment, temporaryFolder } from '../support/stores.ts'

/** A store whose snapshots take a while to arrive after they were read, as over a slow network. */
async function slowStore() {
  const counts = { reads: 0 }
  const engine = await sqliteEngine(openDatabase(`${temporaryFolder()}/a.db`))
  const slow: Engine = {
    ...engine,
    read: async (steps) => {
      counts.reads += 1
      const answer = await engine.read(steps)
      await pause(50)
      return answer
    },
  }
  const store = storeOn(slow)
  onTestFinished(() => store.close())
  return { store, counts }
}

test('a call does not share a refresh that looked before the write that the call has to see', async () => {
  const { store } = await slowStore()
  await store.putSegment(segment('a'), 'none', AUTHOR)
  const early = store.current()
  await pause(10)
  await store.putSegment(segment('a', { depth_m: 9 }), 1, AUTHOR)
  const late = await store.current()
  expect(late.revision).toBe(2)
  expect(late.findSegment('a')?.properties['depth_m']).toBe(9)
  expect((await early).revision).toBe(1)
})

test('calls at the same time share one refresh, and those without a change need none', async () => {
  const { store, counts } = await slowStore()
  await store.putSegment(segment('a'), 'none', AUTHOR)
  const registries = await Promise.all(Array.from({ length: 20 }, () => store.current()))
  expect(new Set(registries).size).toBe(1)
  expect(counts.reads).toBe(1)
  await store.current()
  expect(counts.reads).toBe(1)
})

test('a refresh that fails fails those who wait for it, and the next call tries again', async () => {
  const engine = await sqliteEngine(openDatabase(`${temporaryFolder()}/a.db`))
  let isBroken = true
  const store = storeOn({
    ...engine,
    read: (steps) => (isBroken ? Promise.reject(new Error('broken')) : engine.read(steps)),
  })
  onTestFinished(() => store.close())
  const outcomes = await Promise.allSettled([store.current(), store.current()])
  expect(outcomes.map(({ status }) => status)).toEqual(['rejected', 'rejected'])
  isBroken = false
  expect((await store.current()).revision).toBe(0)
})
