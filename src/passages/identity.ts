import type { Mobile } from './position-report.ts'
import { type Cell, isMissing } from './cells.ts'

/** Stands for a number that was sent and cannot be read as what it is to be. */
export const UNREADABLE = ''

/** A number as it may be shown: undefined also when it cannot be read. */
export const readOf = (number: string | undefined): string | undefined =>
  number === UNREADABLE ? undefined : number

const MMSI_DIGITS = 9
/** Digits of a coast station whose two leading zeros a program took for superfluous. */
const COAST_STATION_DIGITS = 7
const ENI_DIGITS = 8

function isDigits(text: string, length: number): boolean {
  if (text.length !== length) return false
  for (let at = 0; at < length; at += 1) {
    const code = text.charCodeAt(at)
    if (code < 48 || code > 57) return false
  }
  return true
}

/** Digits as they were meant: without blanks around them and the `.0` of a program that took them for a number. */
function digitsOf(cell: Cell): string {
  const text = typeof cell === 'number' ? String(cell) : cell.trim()
  return text.endsWith('.0') ? text.slice(0, -2) : text
}

/** A zero, or zeros only: "not available". */
function isZero(text: string): boolean {
  for (let at = 0; at < text.length; at += 1) if (text.charCodeAt(at) !== 48) return false
  return text.length <= MMSI_DIGITS
}

/**
 * MMSI, nine digits.
 *
 * @returns undefined when there is none, `UNREADABLE` when it is something else
 * @source ITU-R M.585-9: nine digits; coast stations 00MIDxxxx
 */
export function mmsiOf(cell: Cell): string | undefined {
  if (typeof cell === 'string' && isDigits(cell, MMSI_DIGITS) && cell !== '000000000') return cell
  if (typeof cell === 'string' && isMissing(cell)) return undefined
  const text = digitsOf(cell)
  if (isZero(text)) return undefined
  if (isDigits(text, MMSI_DIGITS)) return text
  return isDigits(text, COAST_STATION_DIGITS) ? `00${text}` : UNREADABLE
}

/**
 * European number of identification, eight digits; a leading zero that was lost is put back.
 *
 * @returns undefined when there is none, `UNREADABLE` when it is something else
 * @source ES-TRIN, annex 1, as Directive (EU) 2016/1629, article 18, refers to it: eight digits, those of the former
 *   Rhine numbers a zero and seven
 */
export function eniOf(cell: Cell): string | undefined {
  if (typeof cell === 'string' && isMissing(cell)) return undefined
  const text = digitsOf(cell)
  if (isZero(text)) return undefined
  if (isDigits(text, ENI_DIGITS)) return text
  return isDigits(text, ENI_DIGITS - 1) ? `0${text}` : UNREADABLE
}

/**
 * What an MMSI says to have sent the report. Craft of a parent ship (98MIDxxxx) and handheld radios (8MIDxxxxx) are
 * taken for vessels.
 *
 * @source ITU-R M.585-9: 00 coast stations, 111 aircraft, 970, 972 and 974 distress beacons, 99 aids to navigation
 */
export function mobileOfMmsi(mmsi: string): Mobile {
  const first = mmsi.charCodeAt(0)
  if (first === 57) {
    if (mmsi.startsWith('99')) return 'aid-to-navigation'
    return mmsi.startsWith('970') || mmsi.startsWith('972') || mmsi.startsWith('974')
      ? 'distress-beacon'
      : 'vessel'
  }
  if (first === 48) return mmsi.charCodeAt(1) === 48 ? 'base-station' : 'vessel'
  return first === 49 && mmsi.startsWith('111') ? 'aircraft' : 'vessel'
}
