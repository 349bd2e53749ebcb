import { LRUCache } from 'lru-cache'
import { Fault } from '../domain/fault.ts'
import type { Cell } from '../limits/cell.ts'
import type { JobRecord, JobStore } from '../store/job-records.ts'
import { csvRow } from './csv-write.ts'
import { studyNotFound } from './job-reply.ts'
import { toFiniteJson } from './json.ts'
import type { StudyInputs } from './study-of.ts'
import { studyColumns, studyRow, type StudyValue } from './study-rows.ts'
import { turn } from './turns.ts'

/** Studies whose inputs are held; those of a large one take some tens of megabytes. */
const HELD = 4
/** Rows that are made before others have their turn. */
const ROWS_AT_ONCE = 500

const held = new LRUCache<string, StudyInputs>({ max: HELD })

/** What a study rests on; it never changes. */
export async function inputsOf(id: string, store: JobStore): Promise<StudyInputs> {
  const known = held.get(id)
  if (known) return known
  const inputs = (await store.jobInputs(id)) as unknown as StudyInputs | undefined
  if (!inputs) throw studyNotFound(id)
  held.set(id, inputs)
  return inputs
}

/** @throws Fault `study-not-finished` */
export function assertSucceeded({ id, state, cellsDone, cellsTotal }: JobRecord): void {
  if (state === 'succeeded') return
  const what =
    state === 'failed' || state === 'cancelled'
      ? `was ${state === 'failed' ? 'not finished: it failed' : 'cancelled'}; make it again`
      : `is at ${cellsDone} of ${cellsTotal} cells; ask again when it has succeeded`
  throw new Fault('study-not-finished', `The study ${id} ${what}`, {
    facts: { state, cells_done: cellsDone, cells_total: cellsTotal },
  })
}

/** The cells of a study that has succeeded, chunk by chunk in their order. */
export async function* cellsOf(
  { id, chunksTotal }: JobRecord,
  store: JobStore,
): AsyncGenerator<readonly Cell[]> {
  for (let number = 0; number < chunksTotal; number += 1) {
    const text = await store.findChunk(id, number)
    // deleted while it is read: the answer must not look whole
    if (text === undefined) throw studyNotFound(id)
    yield JSON.parse(text) as Cell[]
  }
}

/** The results of a study as text, a line for each cell. */
export async function* resultLines(
  job: JobRecord,
  format: 'ndjson' | 'csv',
  store: JobStore,
): AsyncGenerator<string> {
  const { study } = await inputsOf(job.id, store)
  const columns = studyColumns(study)
  const lineOf = format === 'csv' ? csvRow : jsonLineOf(columns)
  if (format === 'csv') yield csvRow(columns)
  for await (const cells of cellsOf(job, store)) {
    for (let from = 0; from < cells.length; from += ROWS_AT_ONCE) {
      yield cells
        .slice(from, from + ROWS_AT_ONCE)
        .map((cell) => lineOf(studyRow(study, cell)))
        .join('')
      await turn()
    }
  }
}

/** Writes a row under its columns as a line of NDJSON. */
function jsonLineOf(columns: readonly string[]): (row: readonly StudyValue[]) => string {
  const starts = columns.map((column, i) => `${i === 0 ? '{' : ','}${JSON.stringify(column)}:`)
  return (row) => `${starts.map((start, i) => start + toFiniteJson(row[i] ?? null)).join('')}}\n`
}
