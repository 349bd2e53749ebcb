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

/** Most digits of a plain decimal that is read here: both it without its point and the power of ten are exact doubles. */
const PLAIN_DIGITS = 15
const POWERS_OF_TEN = Array.from({ length: PLAIN_DIGITS + 1 }, (_, power) => 10 ** power)

const MINUS = 45
const POINT = 46

/**
 * A plain decimal of few digits, which nearly every cell of a log is: a quotient of two exact doubles is the double that
 * is nearest, as of `Number`, in a fifth of its time. NaN for any other text.
 */
function plainDecimal(text: string): number {
  const start = text.charCodeAt(0) === MINUS ? 1 : 0
  let whole = 0
  let point = -1
  for (let at = start; at < text.length; at += 1) {
    const code = text.charCodeAt(at)
    if (code >= 48 && code <= 57) whole = whole * 10 + (code - 48)
    else if (code === POINT && point < 0) point = at
    else return NaN
  }
  const digits = text.length - start - (point < 0 ? 0 : 1)
  if (digits < 1 || digits > PLAIN_DIGITS) return NaN
  const value = point < 0 ? whole : whole / (POWERS_OF_TEN[text.length - point - 1] ?? NaN)
  return start === 1 ? -value : value
}

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
  const plain = plainDecimal(cell)
  if (!Number.isNaN(plain)) return plain
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
