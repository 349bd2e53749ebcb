import type { Readable } from 'node:stream'
import { parse } from 'csv-parse/sync'
import { Fault, type FaultItem } from '../domain/fault.ts'
import { type Line, MAX_LINE_BYTES, readLines } from './lines.ts'
import { nearestFirst } from './nearest.ts'
import { refused } from './validation.ts'

/** A data row: the physical line that it starts on and its cells by column, or why it cannot be read. */
export type CsvRow =
  | { readonly line: number; readonly fields: Readonly<Record<string, string>>; readonly fault?: undefined }
  | { readonly line: number; readonly fault: Fault; readonly fields?: undefined }

export interface CsvOptions {
  /** Columns that may appear, in any order. Without it every column is taken as it is. */
  readonly knownColumns?: readonly string[]
  readonly requiredColumns?: readonly string[]
}

interface Layout {
  readonly columns: readonly string[]
  readonly delimiter: ',' | ';'
}

/**
 * Rows of CSV (RFC 4180, `,` or `;` as the header shows) as they arrive, in batches, empty lines left out.
 * A header that cannot be used is thrown before the first row; a row that cannot be read is a fault of that row.
 */
export async function* readCsvRows(stream: Readable, options: CsvOptions = {}): AsyncGenerator<CsvRow[]> {
  const records = new RecordJoiner()
  let layout: Layout | undefined
  for await (const lines of readLines(stream, { lenient: true })) {
    let first = 0
    if (!layout) {
      first = lines.findIndex((line) => line.text !== '') + 1
      const header = lines[first - 1]
      if (!header) continue
      layout = readHeader(header, options)
    }
    const rows = readRecords(records.join(lines.slice(first)), layout)
    if (rows.length > 0) yield rows
  }
  if (!layout) throw new Fault('malformed-csv', 'The body is empty: send a header line and rows')
  const rows = readRecords(records.end(), layout)
  if (rows.length > 0) yield rows
}

function readHeader(header: Line, { knownColumns, requiredColumns = [] }: CsvOptions): Layout {
  if (header.fault) throw header.fault
  const unquoted = header.text.replaceAll(/"[^"]*"/g, '')
  const delimiter = unquoted.split(';').length > unquoted.split(',').length ? ';' : ','
  const cells = cellsOf([header.text], delimiter)?.[0]
  if (!cells) throw new Fault('malformed-csv', 'The header line has a quote that does not end')
  const columns = cells.map((cell) => cell.trim())
  const errors = [
    ...columns.flatMap((column, index) => columnFault(column, index, columns, knownColumns) ?? []),
    ...requiredColumns.filter((column) => !columns.includes(column)).map(missingColumn),
  ].map((item) => ({ ...item, line: header.number }))
  if (errors.length > 0) throw refused(errors)
  return { columns, delimiter }
}

function columnFault(
  column: string,
  index: number,
  columns: readonly string[],
  known: readonly string[] | undefined,
): FaultItem | undefined {
  if (columns.indexOf(column) < index) {
    return { parameter: column, code: 'clash', detail: 'is a column twice; keep one of them' }
  }
  if (!known || known.includes(column)) return undefined
  const allowed = nearestFirst(column, known)
  return {
    parameter: column,
    code: 'unknown-field',
    detail: `is not a known column; did you mean ${allowed[0] ?? ''}?`,
    allowed,
  }
}

const missingColumn = (column: string): FaultItem => ({
  parameter: column,
  code: 'required',
  detail: 'is a required column',
})

/** Text of one record and the physical lines it spans, or why it cannot be read. */
type CsvRecord =
  | { readonly line: number; readonly text: string; readonly lines: number }
  | { readonly line: number; readonly fault: Fault }

/** Cells of records; undefined when one of them is not CSV. */
function cellsOf(texts: readonly string[], delimiter: string): string[][] | undefined {
  try {
    return parse(texts.join('\n'), { delimiter, relax_column_count: true, record_delimiter: '\n' })
  } catch {
    return undefined
  }
}

function readRecords(records: readonly CsvRecord[], layout: Layout): CsvRow[] {
  const texts = records.flatMap((record) => ('text' in record ? [record.text] : []))
  // All at once, as a parser costs much to set up; one by one only when one of them is broken.
  const cells =
    cellsOf(texts, layout.delimiter) ?? texts.map((text) => cellsOf([text], layout.delimiter)?.[0])
  let next = 0
  return records.flatMap((record): CsvRow[] => {
    if ('fault' in record) return [record]
    const found = cells[next++]
    if (found) return [toRow(record.line, found, layout.columns)]
    // Lines that a stray quote joined are refused one by one, so that none goes without an answer.
    return Array.from({ length: record.lines }, (_, index) => ({
      line: record.line + index,
      fault: BROKEN_QUOTE,
    }))
  })
}

function toRow(line: number, cells: readonly string[], columns: readonly string[]): CsvRow {
  if (cells.length !== columns.length) {
    const detail = `The row has ${cells.length} cells where the header has ${columns.length}`
    return { line, fault: new Fault('malformed-csv', detail) }
  }
  return { line, fields: Object.fromEntries(columns.map((column, index) => [column, cells[index] ?? ''])) }
}

const BROKEN_QUOTE = new Fault(
  'malformed-csv',
  'A quote in the row does not end, or stands inside an unquoted cell; double it',
)

/** Joins physical lines into records: a line end inside quotes belongs to the cell. Holds one record. */
class RecordJoiner {
  #open: { readonly number: number; readonly text: string }[] = []
  #length = 0

  join(lines: readonly Line[]): CsvRecord[] {
    const records: CsvRecord[] = []
    for (const line of lines) this.#add(line, records)
    return records
  }

  /** Records of what is left at the end of the text, where an open quote cannot close any more. */
  end(): CsvRecord[] {
    const records: CsvRecord[] = []
    while (this.#open.length > 0) this.#giveUp(records)
    return records
  }

  #add(line: Line, records: CsvRecord[]): void {
    if (line.fault) {
      records.push(...this.end(), { line: line.number, fault: line.fault })
      return
    }
    if (line.text === '' && this.#open.length === 0) return
    const hasOddQuotes = countQuotes(line.text) % 2 === 1
    this.#open.push(line)
    this.#length += line.text.length
    // Odd and odd make even: the record is whole when an open one meets an odd line, or a fresh one is even.
    if (hasOddQuotes === this.#open.length > 1) {
      const first = this.#open[0] ?? line
      const text = this.#open.map((part) => part.text).join('\n')
      records.push({ line: first.number, text, lines: this.#open.length })
      this.#clear()
    } else if (this.#length > MAX_LINE_BYTES) this.#giveUp(records)
  }

  /** The quote that opened this record never closes: refuse its line alone and read the others afresh. */
  #giveUp(records: CsvRecord[]): void {
    const [first, ...others] = this.#open
    this.#clear()
    if (first) records.push({ line: first.number, fault: BROKEN_QUOTE })
    for (const line of others) this.#add(line, records)
  }

  #clear(): void {
    this.#open = []
    this.#length = 0
  }
}

function countQuotes(text: string): number {
  let count = 0
  for (let at = text.indexOf('"'); at >= 0; at = text.indexOf('"', at + 1)) count += 1
  return count
}
