import Database from 'better-sqlite3'
import { describe, expect, test } from 'vitest'
import { openStore } from '../../src/store/open.ts'
import type { CalibrationContent } from '../../src/store/registry.ts'
import { at, AUTHOR, ENGINES, segment, temporaryFolder, testStore } from '../support/stores.ts'

const CONTENT: CalibrationContent = {
  calibration: {
    name: 'Long pound, spring',
    methods: [{ id: 'rock-manual-2007', factor: 0.75, factorByHull: { planing: 1.5 } }],
    scatter: 0.1 + 0.2,
    coverage: { speed: [1, 3], distance: [10, 30], depth: [2.5, 3], depthFroudeNumber: [0.2, 0.6] },
  },
  document: { name: 'Long pound, spring', passages: 2, note: 'ein Übergang \u0000 \ud83d\ude00' },
  rows: [{ speed_kn: 4.5, label: 'a' }, { speed_kn: 5 }],
  points: [{ index: 0 }, { index: 1 }],
}

describe.each(ENGINES)('calibrations on $kind', ({ fresh }) => {
  test('one is kept as it was made, without its rows in the snapshot', async () => {
    const store = await testStore(await fresh())
    expect((await store.current()).calibrations()).toEqual([])
    const id = await store.addCalibration(CONTENT, AUTHOR)
    expect(id).toMatch(/^cal-[0-9a-z]{10}$/)
    const registry = await store.current()
    expect(registry.revision).toBe(1)
    expect(registry.findCalibration(id)).toEqual({
      id,
      created: AUTHOR.time,
      key: 'surveyor',
      calibration: { id, ...CONTENT.calibration },
      document: CONTENT.document,
    })
    expect(registry.calibrations()).toEqual([registry.findCalibration(id)])
    expect(await store.findCalibrationRows(id)).toEqual({ rows: CONTENT.rows, points: CONTENT.points })
    expect(registry.findCalibration('cal-0')).toBeUndefined()
    expect(await store.findCalibrationRows('cal-0')).toBeUndefined()
  })

  test('without a key none is named', async () => {
    const store = await testStore(await fresh())
    const id = await store.addCalibration(CONTENT, { time: AUTHOR.time })
    expect((await store.current()).findCalibration(id)).not.toHaveProperty('key')
  })

  test('the same content sent again, at the same moment too, makes another', async () => {
    const store = await testStore(await fresh())
    const ids = [
      await store.addCalibration(CONTENT, AUTHOR),
      await store.addCalibration(CONTENT, AUTHOR),
      await store.addCalibration(CONTENT, at(1)),
    ]
    expect(new Set(ids).size).toBe(3)
    const registry = await store.current()
    expect(registry.revision).toBe(3)
    expect(registry.calibrations().map(({ id }) => id)).toEqual(ids.toSorted())
  })

  test('one that no segment names is deleted, and every replica learns of it', async () => {
    const url = await fresh()
    const store = await testStore(url)
    const other = await testStore(url)
    const id = await store.addCalibration(CONTENT, AUTHOR)
    const kept = await store.addCalibration(CONTENT, AUTHOR)
    const before = await other.current()
    expect(before.calibrations()).toHaveLength(2)
    expect(await store.deleteCalibration(id, at(1))).toEqual({ outcome: 'deleted', registryRevision: 3 })
    expect((await other.current()).calibrations().map((record) => record.id)).toEqual([kept])
    expect(before.calibrations()).toHaveLength(2)
    expect(await store.findCalibrationRows(id)).toBeUndefined()
    expect(await store.deleteCalibration(id, at(2))).toEqual({ outcome: 'missing' })
    expect(await store.deleteCalibration('cal-0', at(2))).toEqual({ outcome: 'missing' })
    expect((await store.current()).revision).toBe(3)
  })

  test('one that segments name stays, with all its rows, until none does', async () => {
    const store = await testStore(await fresh())
    const id = await store.addCalibration(CONTENT, AUTHOR)
    await store.importSegments(
      [
        segment('b', { calibration_id: id }),
        segment('a', { calibration_id: id }),
        segment('c', { attributes: { calibration_id: id } }),
        segment('d'),
      ],
      AUTHOR,
    )
    expect(await store.deleteCalibration(id, AUTHOR)).toEqual({ outcome: 'in-use', usedBy: ['a', 'b'] })
    expect((await store.current()).findCalibration(id)).toBeDefined()
    expect((await store.findCalibrationRows(id))?.rows).toHaveLength(2)
    await store.putSegment(segment('a'), 'any', AUTHOR)
    await store.deleteSegment('b', 'any', AUTHOR)
    expect(await store.deleteCalibration(id, AUTHOR)).toEqual({ outcome: 'deleted', registryRevision: 5 })
  })

  test('a segment cannot come to name one that does not exist, alone or in an import', async () => {
    const store = await testStore(await fresh())
    const id = await store.addCalibration(CONTENT, AUTHOR)
    await store.putSegment(segment('a', { calibration_id: id }), 'none', AUTHOR)
    await store.putSegment(segment('a'), 'any', AUTHOR)
    await store.deleteCalibration(id, AUTHOR)
    const naming = segment('a', { calibration_id: id })
    const refusal = { code: 'calibration-not-found', parts: { facts: { calibration_id: id } } }
    await expect(store.putSegment(naming, 'any', AUTHOR)).rejects.toMatchObject(refusal)
    await expect(store.importSegments([segment('b'), naming], AUTHOR)).rejects.toMatchObject(refusal)
    const registry = await store.current()
    expect(registry.revision).toBe(4)
    expect(registry.segments().map((record) => record.id)).toEqual(['a'])
  })

  test('deleting one and naming it at once never leaves a segment without it', async () => {
    const url = await fresh()
    const [store, other] = [await testStore(url), await testStore(url)]
    for (let run = 0; run < 10; run += 1) {
      const id = await store.addCalibration(CONTENT, AUTHOR)
      const naming = segment(`s${run}`, { calibration_id: id })
      const [written, deleted] = await Promise.allSettled([
        store.putSegment(naming, 'none', AUTHOR),
        other.deleteCalibration(id, AUTHOR),
      ])
      const isWritten = written.status === 'fulfilled'
      const outcome = deleted.status === 'fulfilled' ? deleted.value.outcome : String(deleted.reason)
      expect([isWritten, outcome]).toEqual(isWritten ? [true, 'in-use'] : [false, 'deleted'])
    }
  })

  test('they survive reopening', async () => {
    const url = await fresh()
    const first = await openStore(url)
    const id = await first.addCalibration(CONTENT, AUTHOR)
    const record = (await first.current()).findCalibration(id)
    await first.close()
    const second = await testStore(url)
    expect((await second.current()).findCalibration(id)).toEqual(record)
    expect((await second.findCalibrationRows(id))?.rows).toEqual(CONTENT.rows)
  })
})

test('a database of the version before is brought up to date with what it holds', async () => {
  const path = `${temporaryFolder()}/a.db`
  const before = await openStore(`sqlite:${path}`)
  await before.putSegment(segment('a'), 'none', AUTHOR)
  await before.close()
  const file = new Database(path)
  file.exec(
    `drop table limit_plan_publications; drop table limit_plans; drop table job_chunks; drop table job_inputs;
     drop table jobs; drop table calibration_rows; drop table calibrations;
     delete from kysely_migration where name > '001-registry'`,
  )
  file.close()
  const store = await testStore(`sqlite:${path}`)
  await store.addCalibration(CONTENT, AUTHOR)
  const registry = await store.current()
  expect(registry.findSegment('a')).toBeDefined()
  expect(registry.calibrations()).toHaveLength(1)
})
