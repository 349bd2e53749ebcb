import { spawn } from 'node:child_process'
import { existsSync, mkdirSync, readdirSync, readFileSync, symlinkSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { setTimeout as pause } from 'node:timers/promises'
import { fileURLToPath } from 'node:url'
import Database from 'better-sqlite3'
import ts from 'typescript'
import { expect, test } from 'vitest'
import { openStore } from '../../src/store/open.ts'
import { temporaryFolder } from '../support/stores.ts'
import { IMPORTED } from '../support/write-storm.ts'

const ROOT = fileURLToPath(new URL('../../', import.meta.url))
const FILES = 2
const KILLS = 50 // of each file

/** The storm and what it imports as JavaScript: a process then starts in a fraction of the time. */
function compiledStorm(folder: string): string {
  const below = (name: string): string[] =>
    readdirSync(join(ROOT, name), { encoding: 'utf8' }).map((file) => `${name}/${file}`)
  const names = ['src/store', 'src/geo', 'src/domain'].flatMap(below)
  const compilerOptions: ts.CompilerOptions = {
    target: ts.ScriptTarget.ES2023,
    module: ts.ModuleKind.ESNext,
    rewriteRelativeImportExtensions: true,
    verbatimModuleSyntax: true,
  }
  for (const name of [...names, 'tests/support/write-storm.ts']) {
    if (!name.endsWith('.ts')) continue
    const { outputText } = ts.transpileModule(readFileSync(join(ROOT, name), 'utf8'), { compilerOptions })
    const target = join(folder, name.replace(/\.ts$/, '.js'))
    mkdirSync(dirname(target), { recursive: true })
    writeFileSync(target, outputText)
  }
  writeFileSync(join(folder, 'package.json'), '{ "type": "module" }')
  symlinkSync(join(ROOT, 'node_modules'), join(folder, 'node_modules'))
  return join(folder, 'tests/support/write-storm.js')
}

/** Starts a storm and kills it: every fifth at any time from its start, the others after some writes. */
async function killedStorm(script: string, file: string, run: number): Promise<readonly string[]> {
  const child = spawn(process.execPath, [script, `sqlite:${file}`, String(run)])
  let said = ''
  let failure = ''
  const lines = (): string[] => said.split('\n').filter((line) => line !== '')
  // `open` and some writes, however fast or slow the disk is
  const enough = 1 + Math.floor(Math.random() * 15)
  child.stderr.on('data', (text: Buffer) => (failure += text.toString()))
  const written = new Promise<void>((resolve) => {
    child.on('close', resolve)
    child.stdout.on('data', (text: Buffer) => {
      said += text.toString()
      if (lines().length >= enough) resolve()
    })
  })
  const ended = new Promise<NodeJS.Signals | null>((resolve) => {
    child.on('close', (_code, signal) => {
      resolve(signal)
    })
  })
  if (run % 5 === 0) await pause(100 + Math.random() * 300)
  else {
    await written
    await pause(Math.random() * 20)
  }
  child.kill('SIGKILL')
  expect(await ended, failure).toBe('SIGKILL')
  return lines().slice(1)
}

type Rows = readonly Record<string, unknown>[]

/** Faults of a file whose writer was killed: each query finds what must not be. */
const HALF_WRITTEN = [
  `select 'gap in the revisions of the registry' from state where registry_revision <>
     (select count(distinct registry_revision) from segment_revisions)`,
  `select 'revision beyond the state', segment_revisions.id from segment_revisions, state where segment_revisions.registry_revision > state.registry_revision`,
  `select 'gap in the revisions of a segment', id from segment_revisions group by id having count(*) <> max(revision)`,
  `select 'segment is not as its last revision left it', i.id from segments i
     left join segment_revisions r on r.id = i.id and r.revision = i.revision
     where r.id is null or r.registry_revision <> i.changed_at or (r.action = 'deleted') <> i.deleted
        or (i.deleted = 0 and r.content <> i.content)
        or i.revision <> (select max(revision) from segment_revisions where id = i.id)`,
  `select 'import in part', registry_revision from segment_revisions where action = 'imported'
     group by registry_revision having count(*) <> ${IMPORTED}`,
]

/** What is wrong with a file after a kill, given the lines that were acknowledged before. */
function faultsOf(file: string, lines: readonly string[]): unknown[] {
  // read and write, as the service opens it: the log is recovered
  const database = new Database(file)
  try {
    const check = database.pragma('integrity_check', { simple: true })
    if (database.prepare(`select 1 from sqlite_master where name = 'state'`).get() === undefined) {
      return [...(check === 'ok' ? [] : [check]), ...lines]
    }
    const half = HALF_WRITTEN.flatMap((query) => database.prepare(query).all() as Rows)
    const one = database.prepare(
      `select content from segment_revisions where id = ? and revision = ? and registry_revision = ?`,
    )
    const imported = database.prepare(
      `select count(*) from segment_revisions where registry_revision = ? and content like ?`,
    )
    const lost = lines.filter((line) => {
      const [kind, ...cells] = line.split(' ')
      if (kind === 'import') return imported.pluck().get(cells[0], `%"mark":"${cells[1]}"%`) !== IMPORTED
      const [id, revision, registryRevision, mark] = cells
      const row = one.get(id, Number(revision), Number(registryRevision)) as
        { content: string | null } | undefined
      if (row === undefined) return true
      return mark === '-' ? row.content !== null : row.content?.includes(`"mark":"${mark}"`) !== true
    })
    return [...(check === 'ok' ? [] : [check]), ...half, ...lost.map((line) => `lost: ${line}`)]
  } finally {
    database.close()
  }
}

test('after kill -9 at any time every acknowledged write is there and none is half-written, 100 times', async () => {
  const folder = temporaryFolder()
  const script = compiledStorm(folder)
  const counts = { kills: 0, acknowledged: 0, beforeFirst: 0 }

  const lane = async (number: number): Promise<void> => {
    const file = join(folder, `${number}.db`)
    const all: string[] = []
    for (let run = 0; run < KILLS; run += 1) {
      const lines = await killedStorm(script, file, run)
      all.push(...lines)
      counts.kills += 1
      counts.acknowledged += lines.length
      if (lines.length === 0) counts.beforeFirst += 1
      if (existsSync(file)) expect(faultsOf(file, lines), `file ${number}, run ${run}`).toEqual([])
    }
    expect(faultsOf(file, all)).toEqual([])
    const store = await openStore(`sqlite:${file}`)
    const last = Math.max(...all.map((line) => Number(line.split(' ')[line.startsWith('import') ? 1 : 3])))
    expect((await store.current()).revision).toBeGreaterThanOrEqual(last)
    await store.close()
  }

  // both to the end, so that no process writes into a folder that is removed
  const lanes = await Promise.allSettled(Array.from({ length: FILES }, (_, number) => lane(number)))
  for (const ended of lanes) if (ended.status === 'rejected') throw ended.reason
  console.log(
    `${counts.kills} kills, ${counts.acknowledged} acknowledged writes, ${counts.beforeFirst} runs killed before their first`,
  )
  expect(counts.kills).toBe(100)
  // kills that hit nothing would prove nothing
  expect(counts.acknowledged).toBeGreaterThan(200)
}, 240_000)
