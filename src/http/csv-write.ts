export type CsvCell = string | number | boolean | null | undefined | readonly string[]

const NEEDS_QUOTES = /[",\r\n]|^\s|\s$/
// Spreadsheets run a text that starts so as a formula.
const STARTS_FORMULA = /^[=+\-@\t\r]/

/** One CSV row with its line end: empty for null, lists joined by `;`, text that looks like a formula disarmed. */
export const csvRow = (cells: readonly CsvCell[]): string => `${cells.map(csvCell).join(',')}\r\n`

/** A header and rows by column name. */
export function writeCsv(
  columns: readonly string[],
  rows: readonly Readonly<Record<string, CsvCell>>[],
): string {
  return csvRow(columns) + rows.map((row) => csvRow(columns.map((column) => row[column]))).join('')
}

function csvCell(cell: CsvCell): string {
  if (cell === null || cell === undefined) return ''
  if (typeof cell === 'number') {
    if (!Number.isFinite(cell)) throw new RangeError('a figure of the reply is not finite')
    return String(cell)
  }
  if (typeof cell === 'boolean') return String(cell)
  const text = typeof cell === 'string' ? cell : cell.join(';')
  const safe = STARTS_FORMULA.test(text) ? `'${text}` : text
  return NEEDS_QUOTES.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe
}
