import type { Finding, PassageCheck, PlacedRow } from '../passages/check.ts'
import type { PassageEvent } from '../passages/events.ts'
import type { MatchedReport } from '../passages/judge.ts'
import type { Judgement } from '../passages/judgement.ts'
import type { LogRow } from '../passages/position-report.ts'
import type { JudgeSession } from '../threads/judge-threads.ts'
import { csvRow, type CsvCell } from './csv-write.ts'
import { HeldText } from './held-text.ts'
import { inOrder } from './in-order.ts'
import { toFiniteJson } from './json.ts'
import { summaryParts, toEventRow, toReportRow } from './passage-lines.ts'
import { turn } from './turns.ts'
import {
  EVENT_COLUMN_NAMES,
  GROUP_COLUMN_NAMES,
  REPORT_COLUMN_NAMES,
  type GroupRow,
  type SummaryWire,
} from './passages.schema.ts'

/** A log as it is read. */
export interface Log {
  readonly rows: AsyncIterable<readonly LogRow[]>
  /** columns that no field has the name of; known when the log is read */
  readonly ignoredColumns: () => readonly string[]
}

export interface AnswerSettings {
  readonly format: 'ndjson' | 'csv'
  readonly detail: 'reports' | 'events' | 'summary'
  /** told of each row */
  readonly onRow: (status: Finding['status']) => void
  readonly about: Pick<SummaryWire, 'parameters' | 'reproducibility'>
}

/** Rows that are checked before other requests have their turn: some 10 ms of work. */
const ROWS_AT_ONCE = 250
/** Pieces that are judged at a time: some wait at each thread while one is written. */
const PIECES_AT_ONCE = 12

const jsonLine = (type: string, value: object): string => `${toFiniteJson({ type, ...value })}\n`

function csvLine<Column extends string>(
  columns: readonly Column[],
  row: Readonly<Record<Column, CsvCell>>,
): string {
  return csvRow(columns.map((column) => row[column]))
}

/** A histogram in a cell: its counts, joined as every list is. */
const groupCells = ({ histogram_kn, ...group }: GroupRow): Record<keyof GroupRow, CsvCell> => ({
  ...group,
  histogram_kn: histogram_kn.counts.map(String),
})

const COLUMNS = {
  reports: REPORT_COLUMN_NAMES,
  events: EVENT_COLUMN_NAMES,
  summary: GROUP_COLUMN_NAMES,
} as const

/** How the parts of an answer are written: one table as CSV, or every kind of line. */
interface Writers {
  readonly head: string
  readonly report: (finding: Finding) => string
  readonly event: (event: PassageEvent) => string
}

const NOTHING = (): string => ''

function writersOf({ format, detail }: AnswerSettings): Writers {
  if (format === 'csv') {
    return {
      head: csvRow(COLUMNS[detail]),
      report:
        detail === 'reports' ? (finding) => csvLine(REPORT_COLUMN_NAMES, toReportRow(finding)) : NOTHING,
      event: detail === 'events' ? (event) => csvLine(EVENT_COLUMN_NAMES, toEventRow(event)) : NOTHING,
    }
  }
  return {
    head: '',
    report: detail === 'reports' ? (finding) => jsonLine('report', toReportRow(finding)) : NOTHING,
    event: detail === 'summary' ? NOTHING : (event) => jsonLine('event', toEventRow(event)),
  }
}

function ending(check: PassageCheck, log: Log, { format, detail, about }: AnswerSettings): string {
  const { read, by_status, rejected, ...totals } = summaryParts(check.summary())
  if (format === 'csv') {
    if (detail !== 'summary') return ''
    return totals.groups.map((group) => csvLine(GROUP_COLUMN_NAMES, groupCells(group))).join('')
  }
  const { from, to, ...rest } = totals
  const reports = { read, by_status, rejected, ignored_columns: [...log.ignoredColumns()] }
  return jsonLine('summary', { complete: true, from, to, reports, ...rest, ...about })
}

/** Rows placed, and judged where they are matched. */
async function judged(
  rows: readonly LogRow[],
  check: PassageCheck,
  session: JudgeSession,
): Promise<readonly (readonly [PlacedRow, Judgement | undefined])[]> {
  const placed = rows.map((row) => check.place(row))
  const matched: MatchedReport[] = []
  for (const row of placed) if (row.matched) matched.push(row.matched)
  const judgements = matched.length > 0 ? await session.judge(matched) : []
  let next = 0
  return placed.map((row) => [row, row.matched ? judgements[next++] : undefined])
}

/** Batches of rows cut so that other requests have their turn between them. */
async function* pieces(batches: AsyncIterable<readonly LogRow[]>): AsyncGenerator<readonly LogRow[]> {
  for await (const batch of batches) {
    for (let from = 0; from < batch.length; from += ROWS_AT_ONCE) {
      await turn()
      yield batch.slice(from, from + ROWS_AT_ONCE)
    }
  }
}

/**
 * The answer to a log, piece by piece as it is read; with events or the summary only, nothing before the log has ended.
 * Ending it early ends the reading.
 */
export async function* passageAnswer(
  log: Log,
  check: PassageCheck,
  session: JudgeSession,
  settings: AnswerSettings,
): AsyncGenerator<string> {
  const write = writersOf(settings)
  const held = settings.detail === 'reports' ? undefined : new HeldText()
  const closedEvents = (): string => {
    const events = check.takeEvents()
    return events.length === 0 ? '' : events.map(write.event).join('')
  }
  let text = write.head
  try {
    for await (const rows of inOrder(
      pieces(log.rows),
      (rows) => judged(rows, check, session),
      PIECES_AT_ONCE,
    )) {
      for (const [placed, judgement] of rows) {
        const finding = check.conclude(placed, judgement)
        settings.onRow(finding.status)
        text += write.report(finding)
        text += closedEvents()
      }
      if (held) held.add(text)
      else if (text !== '') yield text
      text = ''
    }
  } finally {
    session.close()
  }
  check.end()
  if (held) yield* held.pieces()
  // the head of a table without rows is still there
  yield text + closedEvents() + ending(check, log, settings)
}
