import { Readable } from 'node:stream'
import { Fault, type FaultItem } from '../domain/fault.ts'
import { passageOfCells, PassageRow, ROW_COLUMNS, type RowWire } from './calibration-row.schema.ts'
import { MOST_PASSAGES } from './calibrations.schema.ts'
import { readCsvRows } from './csv.ts'
import { parseJson } from './json.ts'
import { readLines } from './lines.ts'
import { turn } from './turns.ts'
import { parse } from './validation.ts'

/** A row of a body, still to be read, and how what is wrong with it is told. */
export interface RowSource {
  readonly read: () => unknown
  readonly told: (item: FaultItem) => FaultItem
}

const afterRoot = (pointer: string | undefined): string => (pointer ?? '#').slice(1)

/** Rows in the list of a JSON body. */
export const rowsOfList = (rows: readonly unknown[]): readonly RowSource[] =>
  rows.map((row, index) => ({
    read: () => row,
    told: (item) => ({ ...item, pointer: `#/passages/${index}${afterRoot(item.pointer)}` }),
  }))

const rethrow = (fault: Fault) => (): never => {
  throw fault
}

function ofLine(line: number, read: () => unknown): RowSource {
  return { read, told: (item) => ({ ...item, line }) }
}

/** By column in place of a pointer. */
function ofCells(line: number, read: () => unknown): RowSource {
  return {
    read,
    told: ({ pointer, ...item }) => {
      const column = afterRoot(pointer).slice(1)
      return { ...item, ...(column !== '' && { parameter: column }), line }
    },
  }
}

async function* ndjsonBatches(bytes: Buffer): AsyncGenerator<RowSource[]> {
  for await (const lines of readLines(Readable.from([bytes]))) {
    yield lines
      .filter(({ fault, text }) => fault !== undefined || text.trim() !== '')
      .map(({ number, fault, text }) => ofLine(number, fault ? rethrow(fault) : () => parseJson(text)))
  }
}

async function* csvBatches(bytes: Buffer): AsyncGenerator<RowSource[]> {
  for await (const rows of readCsvRows(Readable.from([bytes]), { knownColumns: ROW_COLUMNS })) {
    yield rows.map(({ line, fault, fields }) =>
      ofCells(line, fault ? rethrow(fault) : () => passageOfCells(fields)),
    )
  }
}

/**
 * Rows of an NDJSON or a CSV body.
 *
 * @throws Fault when the header cannot be used, or when there are too many
 */
export async function rowsOfLines(bytes: Buffer, isCsv: boolean): Promise<readonly RowSource[]> {
  const sources: RowSource[] = []
  for await (const batch of isCsv ? csvBatches(bytes) : ndjsonBatches(bytes)) {
    for (const source of batch) sources.push(source)
    refuseTooMany(sources.length)
  }
  return sources
}

export function refuseTooMany(passages: number): void {
  if (passages <= MOST_PASSAGES) return
  throw new Fault('payload-too-large', `A calibration takes at most ${MOST_PASSAGES} passages`, {
    facts: { limit: MOST_PASSAGES },
  })
}

/** Rows that are read before other requests have their turn. */
const ROWS_AT_ONCE = 100

/** Items of a fault of one row; of one that cannot be read, the fault itself. */
function itemsOf(error: unknown): readonly FaultItem[] {
  if (!(error instanceof Fault)) throw error
  return error.parts.errors ?? [{ pointer: '#', code: 'pattern', detail: error.message }]
}

export interface ReadRows<Made> {
  readonly rows: readonly RowWire[]
  readonly made: readonly Made[]
  readonly errors: readonly FaultItem[]
}

/**
 * Every row with what is made of it, and every fault of every row.
 *
 * @param make  may refuse a row by a fault with pointers into it
 */
export async function readRows<Made>(
  sources: readonly RowSource[],
  make: (wire: RowWire, index: number) => Made,
): Promise<ReadRows<Made>> {
  const rows: RowWire[] = []
  const made: Made[] = []
  const errors: FaultItem[] = []
  for (const [index, { read, told }] of sources.entries()) {
    try {
      const wire = parse(PassageRow, read())
      rows.push(wire)
      made.push(make(wire, index))
    } catch (error) {
      errors.push(...itemsOf(error).map(told))
    }
    if (index % ROWS_AT_ONCE === ROWS_AT_ONCE - 1) await turn()
  }
  return { rows, made, errors }
}
