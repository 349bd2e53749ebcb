import { copyFileSync, existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import Database from 'better-sqlite3'
import { expect, test } from 'vitest'
import { backUp, CopyRefused, restore } from '../../src/store/backup.ts'
import { SchemaTooNew } from '../../src/store/migrations.ts'
import { openStore } from '../../src/store/open.ts'
import { AUTHOR, segment, temporaryFolder } from '../support/stores.ts'

/** A registry of 300 segments, still open. */
async function filled(folder: string) {
  const file = `${folder}/registry.db`
  const store = await openStore(`sqlite:${file}`)
  await store.importSegments(
    Array.from({ length: 300 }, (_, i) => segment(`s${i}`, { note: 'x'.repeat(500) })),
    AUTHOR,
  )
  return { file, store }
}

async function idsIn(file: string): Promise<string[]> {
  const store = await openStore(`sqlite:${file}`)
  try {
    return (await store.current()).segments().map(({ id }) => id)
  } finally {
    await store.close()
  }
}

test('a backup that is made while others write is whole, of one moment, and one file', async () => {
  const folder = temporaryFolder()
  const { file, store } = await filled(folder)
  const state = { isOver: false }
  let written = 0
  const writing = (async () => {
    while (!state.isOver) {
      await store.importSegments(
        Array.from({ length: 20 }, (_, i) => segment(`later-${i}`, { depth_m: 1 + written / 100 })),
        AUTHOR,
      )
      written += 1
      await new Promise(setImmediate)
    }
  })()
  const copied = await backUp(file, `${folder}/copy.db`)
  state.isOver = true
  await writing
  await store.close()
  expect(written).toBeGreaterThan(0)
  // imports are all or nothing in the copy too
  expect([300, 320]).toContain(copied.segments)
  expect(await idsIn(`${folder}/copy.db`)).toHaveLength(copied.segments)
  const copy = new Database(`${folder}/copy.db`, { readonly: true })
  const depths = copy
    .prepare(
      `select distinct json_extract(content, '$.properties.depth_m') from segments where id like 'later-%'`,
    )
    .all()
  copy.close()
  expect(depths.length).toBeLessThanOrEqual(1)
  expect(readdirSync(folder).filter((name) => name.includes('.part'))).toEqual([])
})

test('a backup overwrites nothing, and needs a registry', async () => {
  const folder = temporaryFolder()
  const { file, store } = await filled(folder)
  await store.close()
  writeFileSync(`${folder}/kept`, 'precious')
  await expect(backUp(file, `${folder}/kept`)).rejects.toThrow(/is there already/)
  expect(readFileSync(`${folder}/kept`, 'utf8')).toBe('precious')
  await expect(backUp(`${folder}/missing.db`, `${folder}/copy.db`)).rejects.toThrow(/There is no registry/)
  expect(existsSync(`${folder}/missing.db`)).toBe(false)
})

test('a restore brings back what was backed up, into an empty place or over what is there when it is forced', async () => {
  const folder = temporaryFolder()
  const { file, store } = await filled(folder)
  await backUp(file, `${folder}/copy.db`)
  for (let i = 0; i < 300; i += 1) await store.deleteSegment(`s${i}`, 'any', AUTHOR)
  await store.putSegment(segment('wrong'), 'none', AUTHOR)
  await store.close()
  await expect(restore(`${folder}/copy.db`, file, false)).rejects.toThrow(/--force replaces it/)
  expect(await idsIn(file)).toEqual(['wrong'])
  expect(await restore(`${folder}/copy.db`, file, true)).toMatchObject({ segments: 300, registryRevision: 1 })
  expect(await idsIn(file)).toHaveLength(300)
  expect(await restore(`${folder}/copy.db`, `${folder}/new.db`, false)).toMatchObject({ segments: 300 })
  expect(await idsIn(`${folder}/new.db`)).toHaveLength(300)
})

test('a restore is refused while the registry is in use', async () => {
  const folder = temporaryFolder()
  const { file, store } = await filled(folder)
  await backUp(file, `${folder}/copy.db`)
  await expect(restore(`${folder}/copy.db`, file, true)).rejects.toThrow(/is in use: stop the service first/)
  expect(await store.putSegment(segment('after'), 'none', AUTHOR)).toMatchObject({ outcome: 'created' })
  await store.close()
  expect(await idsIn(file)).toHaveLength(301)
})

test('a backup that is damaged, foreign or of a newer version replaces nothing', async () => {
  const folder = temporaryFolder()
  const { file, store } = await filled(folder)
  await store.close()
  await backUp(file, `${folder}/copy.db`)
  const bytes = readFileSync(`${folder}/copy.db`)
  bytes.fill(0x5a, Math.floor(bytes.length / 2), Math.floor(bytes.length / 2) + 40_000)
  writeFileSync(`${folder}/damaged.db`, bytes)
  writeFileSync(`${folder}/text.db`, 'no database, '.repeat(100))
  new Database(`${folder}/other.db`).exec('create table a (b)').close()
  for (const name of ['damaged', 'text', 'other'])
    await expect(restore(`${folder}/${name}.db`, file, true), name).rejects.toThrow(CopyRefused)
  copyFileSync(`${folder}/copy.db`, `${folder}/newer.db`)
  const newer = new Database(`${folder}/newer.db`)
  newer.exec(`insert into kysely_migration values ('999-later', '2030-01-01T00:00:00Z')`).close()
  await expect(restore(`${folder}/newer.db`, file, true)).rejects.toThrow(SchemaTooNew)
  expect(await idsIn(file)).toHaveLength(300)
})
