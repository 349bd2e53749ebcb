import { parse } from 'csv-parse/sync'

export type Delimiter = ',' | ';'

/** What a header line is divided by. */
export function delimiterOf(header: string): Delimiter {
  const unquoted = header.replaceAll(/"[^"]*"/g, '')
  return unquoted.split(';').length > unquoted.split(',').length ? ';' : ','
}

const CARRIAGE_RETURN = 13
const LINE_FEED = ['\n']
const EITHER_END = ['\r\n', '\n']

/**
 * Cells of lines, quotes taken as RFC 4180 says where they can be; any other quote is a letter of its cell, as
 * publications leave names like `RAY "CHIEF" TONEY` as they are.
 *
 * @param bytes  whole lines, UTF-8
 * @returns undefined when a quote is opened and not closed; fewer than there are lines when one is closed on a later line
 */
export function cellsOfLines(bytes: Buffer, delimiter: Delimiter): string[][] | undefined {
  try {
    return parse(bytes, {
      delimiter,
      record_delimiter: bytes.includes(CARRIAGE_RETURN) ? EITHER_END : LINE_FEED,
      relax_quotes: true,
      relax_column_count: true,
    })
  } catch {
    return undefined
  }
}

/** Cells of a line by itself. Where a quote is opened and not closed, all its quotes are letters. */
export function cellsOfLine(line: string, delimiter: Delimiter): string[] {
  const cells = line.includes('"') ? cellsOfLines(Buffer.from(line), delimiter)?.[0] : undefined
  return cells ?? line.split(delimiter)
}
