export type Delimiter = ',' | ';'

/** What a header line is divided by. */
export function delimiterOf(header: string): Delimiter {
  const unquoted = header.replaceAll(/"[^"]*"/g, '')
  return unquoted.split(';').length > unquoted.split(',').length ? ';' : ','
}

/**
 * Cells of a line, quotes taken as RFC 4180 says where they can be: a cell that begins with a quote ends at the next
 * single one, when a delimiter or the line end follows. Any other quote is a letter of its cell, as publications
 * leave names like `RAY "CHIEF" TONEY` as they are.
 */
export function cellsOfLine(line: string, delimiter: Delimiter): string[] {
  return line.includes('"') ? quotedCells(line, delimiter) : line.split(delimiter)
}

function quotedCells(line: string, delimiter: Delimiter): string[] {
  const cells: string[] = []
  let start = 0
  while (start <= line.length) {
    const close = line.charCodeAt(start) === QUOTE ? closingQuote(line, start, delimiter) : -1
    if (close >= 0) {
      cells.push(line.slice(start + 1, close).replaceAll('""', '"'))
      start = close + 2
    } else {
      const next = line.indexOf(delimiter, start)
      const end = next < 0 ? line.length : next
      cells.push(line.slice(start, end))
      start = end + 1
    }
  }
  return cells
}

const QUOTE = 34

/** Index of the quote that ends the cell that one at `start` begins; -1 when none does. */
function closingQuote(line: string, start: number, delimiter: Delimiter): number {
  let at = line.indexOf('"', start + 1)
  while (at >= 0) {
    const after = line[at + 1]
    if (after === undefined || after === delimiter) return at
    // a quote inside that is not doubled: the cell was not quoted, its name begins with one
    if (after !== '"') return -1
    at = line.indexOf('"', at + 2)
  }
  return -1
}
