import { MISSING_MARKS } from './columns.ts'

/** A value of a row: the text of a CSV cell, or a text or number of an object. Empty text stands for none. */
export type Cell = string | number

/** Stands for a figure that was sent and cannot be read, or is out of its range; no log can send it. */
export const REFUSED = Infinity

/** Longest mark of a missing value; a longer text is not looked up. */
const LONGEST_MARK = 16

/** Whether a text, blanks around it aside, says that there is no value. */
export function isMissing(text: string): boolean {
  if (text === '') return true
  if (text.length > LONGEST_MARK) return text.trim() === ''
  const mark = text.trim().toLowerCase()
  return mark === '' || MISSING_MARKS.has(mark)
}

/** A digit, sign or decimal point, with which numbers begin; a comma or slash among them makes none. */
const beginsNumber = (code: number): boolean => code >= 43 && code <= 57

/** `0x`, `0b`, `0o` with the digits of another base, which Number reads. */
const isOtherBase = (text: string): boolean =>
  text.charCodeAt(0) === 48 && text.charCodeAt(1) > 57 && (text.charCodeAt(1) | 32) !== 101

/**
 * The number that a cell holds: decimal, with a point, an exponent allowed.
 *
 * @returns NaN when it is missing, `REFUSED` when it is not a number
 */
export function numberOf(cell: Cell): number {
  if (typeof cell === 'number') return Number.isFinite(cell) ? cell : REFUSED
  if (cell === '') return NaN
  if (!beginsNumber(cell.charCodeAt(0))) {
    const text = cell.trim()
    if (isMissing(text)) return NaN
    return text.length < cell.length ? numberOf(text) : REFUSED
  }
  const value = Number(cell)
  return Number.isFinite(value) && !isOtherBase(cell) ? value : REFUSED
}

/** The text that a cell holds, without blanks around it; undefined when it is missing. */
export function textOf(cell: Cell): string | undefined {
  if (typeof cell === 'number') return String(cell)
  if (cell === '') return undefined
  const text = cell.trim()
  return isMissing(text) ? undefined : text
}

/** A name as it was sent, up to the `@` that AIS fills it with (ITU-R M.1371-5, message 5). */
export function nameOf(cell: Cell): string | undefined {
  const text = textOf(cell)
  if (text === undefined) return undefined
  const end = text.indexOf('@')
  const name = end < 0 ? text : text.slice(0, end).trimEnd()
  return name === '' ? undefined : detachedText(name)
}

/**
 * A copy that does not hold on to what the text was cut from. A text of thirteen letters or more, cut from a line,
 * keeps the whole piece of the log alive as long as it lives.
 */
export function detachedText(text: string): string {
  return text.length < 13 ? text : ` ${text}`.slice(1)
}
