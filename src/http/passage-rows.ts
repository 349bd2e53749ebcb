import type { Readable } from 'node:stream'
import type { FastifyRequest } from 'fastify'
import { Fault } from '../domain/fault.ts'
import { detachedText } from '../passages/cells.ts'
import { type Layout, layoutOf } from '../passages/layout.ts'
import type { LogRow } from '../passages/position-report.ts'
import { type Refusal, unreadableRow } from '../passages/rejection.ts'
import { reportOfCells, reportOfObject } from '../passages/row-reader.ts'
import { cellsOfLine, cellsOfLines, type Delimiter, delimiterOf } from './csv-cells.ts'
import { type LineBlock, readLineBlocks } from './line-blocks.ts'
import { type Line, MAX_LINE_BYTES, readLines } from './lines.ts'
import type { Log } from './passage-answer.ts'
import { refused } from './validation.ts'

/** The log in a body, CSV or NDJSON as its content type says. */
export function openLog(request: FastifyRequest, stream: Readable): Log {
  const isCsv = request.headers['content-type']?.toLowerCase().startsWith('text/csv') === true
  return isCsv ? readLogCsv(stream) : readLogNdjson(stream)
}

const TOO_LONG: Refusal = {
  reason: 'line-too-long',
  detail: `The line is longer than ${MAX_LINE_BYTES} bytes`,
}
const NOT_UTF8: Refusal = { reason: 'not-utf-8', detail: 'The line is not UTF-8' }
const NOT_JSON: Refusal = { reason: 'not-json', detail: 'The line is not JSON' }
const BROKEN_QUOTE: Refusal = {
  reason: 'quote-unreadable',
  detail:
    'With its quotes the row does not come to the cells of the header; quote the whole cell and double those inside',
}

const rejected = (line: number, refusal: Refusal): LogRow => ({ rejected: unreadableRow(line, refusal) })

/** Whether a line holds nothing; a usual one is told by its first letter. */
const isBlank = (line: string): boolean => line === '' || (line.charCodeAt(0) <= BLANK && line.trim() === '')
const BLANK = 32

/** Whether cells may be those of a line that holds nothing. */
const isBlankRecord = (cells: readonly string[]): boolean => cells.length <= 1 && isBlank(cells[0] ?? '')

/**
 * Rows of a log in CSV, `,` or `;` as the header shows; every physical line but the header and empty ones is a row.
 * A header that cannot be used is thrown before the first row; a line that cannot be read is a rejected row.
 */
export function readLogCsv(stream: Readable): Log {
  const reader = new CsvLog()
  return { rows: csvRows(stream, reader), ignoredColumns: () => reader.ignoredColumns }
}

async function* csvRows(stream: Readable, reader: CsvLog): AsyncGenerator<LogRow[]> {
  for await (const block of readLineBlocks(stream)) {
    const rows = block ? reader.read(block) : reader.skip()
    if (rows.length > 0) yield rows
  }
  reader.assertHeader()
}

/** A log of which the header comes first. */
class CsvLog {
  #layout: Layout | undefined
  #delimiter: Delimiter = ','
  /** lines read so far */
  #number = 0

  get ignoredColumns(): readonly string[] {
    return this.#layout?.ignoredColumns ?? []
  }

  read(block: LineBlock): LogRow[] {
    const first = this.#layout ? 0 : this.#readHeader(block)
    const rows: LogRow[] = []
    if (!this.#layout || first === block.lines) return rows
    const records = this.#records(block, first)
    for (let i = first; i < block.lines; i += 1) {
      const cells = records[i - first] ?? []
      this.#number += 1
      if (isBlankRecord(cells) && isBlank(block.line(i))) continue
      rows.push(this.#row(cells, this.#layout, () => block.line(i)))
    }
    return rows
  }

  /** A line that is too long to be read. */
  skip(): LogRow[] {
    this.#number += 1
    if (this.#layout) return [rejected(this.#number, TOO_LONG)]
    throw new Fault('line-too-long', TOO_LONG.detail, { facts: { limit: MAX_LINE_BYTES } })
  }

  assertHeader(): void {
    if (!this.#layout) throw new Fault('malformed-csv', 'The body is empty: send a header line and rows')
  }

  /** Reads up to the header. Returns the number of lines that are read by then. */
  #readHeader(block: LineBlock): number {
    for (let i = 0; i < block.lines; i += 1) {
      const line = block.line(i)
      this.#number += 1
      if (isBlank(line)) continue
      this.#delimiter = delimiterOf(line)
      const { layout, errors } = layoutOf(cellsOfLine(line, this.#delimiter), this.#number)
      if (errors) throw refused(errors)
      this.#layout = layout
      return i + 1
    }
    return block.lines
  }

  /** The cells of each line: where a quote reaches beyond its line, those of each by itself. */
  #records(block: LineBlock, first: number): readonly (readonly string[])[] {
    const count = block.lines - first
    const together = cellsOfLines(block.bytes.subarray(block.startOf(first)), this.#delimiter)
    if (together?.length === count) return together
    return Array.from({ length: count }, (_, i) => cellsOfLine(block.line(first + i), this.#delimiter))
  }

  #row(cells: readonly string[], layout: Layout, line: () => string): LogRow {
    const row = reportOfCells(cells, layout, this.#number)
    const reason = row.rejected?.reason
    if (reason !== 'cells-missing' && reason !== 'cells-too-many') return row
    // quotes that closed where they should are not to blame, but for one pair around the whole row
    const isStray = (cells.length === 1 && line().startsWith('"')) || cells.some((cell) => cell.includes('"'))
    return isStray ? this.#plainRow(line(), cells, layout) : row
  }

  /** A row of which the cells do not fit the header: as if its quotes were letters, else refused for them. */
  #plainRow(line: string, cells: readonly string[], layout: Layout): LogRow {
    const plain = line.split(this.#delimiter)
    const isPlain = plain.length === layout.names.length
    const row = reportOfCells(isPlain ? plain : cells, layout, this.#number)
    return row.rejected && !isPlain ? { rejected: { ...row.rejected, ...BROKEN_QUOTE } } : row
  }
}

/** Most names of unknown keys that are kept, and the most letters of one. */
const MAX_UNKNOWN = 100
const MAX_NAME = 64

/** Rows of a log in NDJSON; every physical line but empty ones is a row. A line that cannot be read is a rejected row. */
export function readLogNdjson(stream: Readable): Log {
  const unknown = new Set<string>()
  const onUnknownKey = (key: string): void => {
    if (unknown.size >= MAX_UNKNOWN) return
    const name = key.slice(0, MAX_NAME)
    if (!unknown.has(name)) unknown.add(detachedText(name))
  }
  return { rows: ndjsonRows(stream, onUnknownKey), ignoredColumns: () => [...unknown] }
}

async function* ndjsonRows(stream: Readable, onUnknownKey: (key: string) => void): AsyncGenerator<LogRow[]> {
  for await (const lines of readLines(stream)) {
    const rows: LogRow[] = []
    for (const line of lines) {
      if (line.fault || !isBlank(line.text)) rows.push(ndjsonRow(line, onUnknownKey))
    }
    if (rows.length > 0) yield rows
  }
}

function ndjsonRow(line: Line, onUnknownKey: (key: string) => void): LogRow {
  if (line.fault) return rejected(line.number, line.fault.code === 'line-too-long' ? TOO_LONG : NOT_UTF8)
  let value: unknown
  try {
    value = JSON.parse(line.text)
  } catch {
    return rejected(line.number, NOT_JSON)
  }
  return reportOfObject(value, line.number, onUnknownKey)
}
