import { writeSync } from 'node:fs'
import { openStore } from '../../src/store/open.ts'
import type { SegmentContent } from '../../src/store/registry.ts'

// A process that writes as fast as it can until it is killed, and prints a line for each write that was acknowledged:
// table, id, revision, revision of the registry, mark. A deletion has no mark.

/** Segments of one import; every import changes them all. */
export const IMPORTED = 20
const author = { time: '2026-03-01T08:00:00Z' }
const [, , url = '', run = ''] = process.argv

const segment = (id: string, mark: string): SegmentContent => ({
  id,
  line: [
    [5, 52],
    [5.01, 52],
  ],
  length: 686.6,
  bbox: [5, 52, 5.01, 52],
  // long enough for a row to spread over several pages
  properties: { mark, filling: 'x'.repeat(Math.floor(Math.random() * 6000)) },
})

function acknowledge(...cells: readonly (string | number)[]): void {
  // one call for a line this short is written whole or not at all
  writeSync(1, `${cells.join(' ')}\n`)
}

async function storm(): Promise<never> {
  const store = await openStore(url)
  acknowledge('open')
  for (let i = 0; ; i += 1) {
    const mark = `${run}-${i}`
    const id = `s${Math.floor(Math.random() * 8)}`
    const chance = Math.random()
    if (chance < 0.15) {
      const contents = Array.from({ length: IMPORTED }, (_, n) => segment(`imported-${n}`, mark))
      const { registryRevision } = await store.importSegments(contents, author)
      acknowledge('import', registryRevision, mark)
      continue
    }
    const isThere = (await store.current()).findSegment(id) !== undefined
    const written =
      isThere && chance < 0.35
        ? await store.deleteSegment(id, 'any', author)
        : await store.putSegment(segment(id, mark), isThere ? 'any' : 'none', author)
    if (!('registryRevision' in written)) throw new Error(`${id} is ${written.outcome}`)
    const shown = written.outcome === 'deleted' ? '-' : mark
    acknowledge('segment', id, written.revision, written.registryRevision, shown)
  }
}

// the test imports the number above
if (process.argv[1]?.endsWith('write-storm.js')) await storm()
