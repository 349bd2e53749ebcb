const DAY = 86_400
const LAST_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]
/** 0000-01-01T00:00:00Z and 9999-12-31T23:59:59.999Z, the years that RFC 3339 can write, s. */
const FIRST_TIME = -62_167_219_200
const LAST_TIME = 253_402_300_799.999

/** How times of a log are written beside RFC 3339. */
export interface TimeForm {
  /** without a zone they are UTC */
  readonly isZoneless: boolean
  /** they may be DD/MM/YYYY HH:MM:SS */
  readonly isDayFirst: boolean
}

/** Number of the digits from `start` up to `end`; NaN when one of them is not a digit. */
function digits(text: string, start: number, end: number): number {
  let value = 0
  for (let at = start; at < end; at += 1) {
    const digit = text.charCodeAt(at) - 48
    if (!(digit >= 0 && digit <= 9)) return NaN
    value = value * 10 + digit
  }
  return value
}

const isLeap = (year: number): boolean => (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0

const lastDay = (year: number, month: number): number =>
  month === 2 && isLeap(year) ? 29 : (LAST_DAYS[month - 1] ?? NaN)

/**
 * Days from 1970-01-01 to a date of the Gregorian calendar; NaN when the date does not exist.
 *
 * @param month  1 to 12
 * @param day    1 to 31
 */
function dayNumber(year: number, month: number, day: number): number {
  if (!(day >= 1 && day <= lastDay(year, month))) return NaN
  // years from March, so that the leap day is the last one: 153 days in any five months from there
  const marchYear = month > 2 ? year : year - 1
  const marchMonth = month > 2 ? month - 3 : month + 9
  const leapDays = Math.floor(marchYear / 4) - Math.floor(marchYear / 100) + Math.floor(marchYear / 400)
  return 365 * marchYear + leapDays + Math.floor((153 * marchMonth + 2) / 5) + day - 719_469
}

/** HH:MM:SS from `start`, s into the day; NaN when it is no time of day. A leap second is none. */
function clock(text: string, start: number): number {
  if (text.charCodeAt(start + 2) !== 58 || text.charCodeAt(start + 5) !== 58) return NaN
  const hour = digits(text, start, start + 2)
  const minute = digits(text, start + 3, start + 5)
  const second = digits(text, start + 6, start + 8)
  return hour < 24 && minute < 60 && second < 60 ? hour * 3600 + minute * 60 + second : NaN
}

/** YYYY-MM-DD, a T or a blank, HH:MM:SS; NaN when the text does not begin so. */
function yearFirst(text: string): number {
  if (text.charCodeAt(4) !== 45 || text.charCodeAt(7) !== 45) return NaN
  const separator = text.charCodeAt(10)
  if (separator !== 84 && separator !== 32 && separator !== 116) return NaN
  const day = dayNumber(digits(text, 0, 4), digits(text, 5, 7), digits(text, 8, 10))
  return day * DAY + clock(text, 11)
}

/** DD/MM/YYYY HH:MM:SS; NaN when the text does not begin so. */
function dayFirst(text: string): number {
  if (text.charCodeAt(2) !== 47 || text.charCodeAt(5) !== 47 || text.charCodeAt(10) !== 32) return NaN
  const day = dayNumber(digits(text, 6, 10), digits(text, 3, 5), digits(text, 0, 2))
  return day * DAY + clock(text, 11)
}

/** `Z`, `+HH:MM`, `-HH:MM`, `+HHMM` or `+HH` from `start` to the end, s east of UTC; NaN when it is none of them. */
function zone(text: string, start: number): number {
  const sign = text.charCodeAt(start)
  const length = text.length - start
  if (length === 1 && (sign === 90 || sign === 122)) return 0
  if (sign !== 43 && sign !== 45) return NaN
  const hasColon = text.charCodeAt(start + 3) === 58
  if (length !== 3 && length !== (hasColon ? 6 : 5)) return NaN
  const hour = digits(text, start + 1, start + 3)
  const minute = length === 3 ? 0 : digits(text, text.length - 2, text.length)
  if (!(hour < 24 && minute < 60)) return NaN
  return (sign === 45 ? -1 : 1) * (hour * 3600 + minute * 60)
}

/** Index after the fraction of a second that may stand at 19; -1 when there is a dot without a digit. */
function fractionEnd(text: string): number {
  if (text.charCodeAt(19) !== 46) return 19
  let end = 20
  while (text.charCodeAt(end) >= 48 && text.charCodeAt(end) <= 57) end += 1
  return end > 20 ? end : -1
}

/** Whole seconds and a fraction as one quotient, which is the nearest double; figures after the sixth are cut off. */
function withFraction(whole: number, text: string, end: number): number {
  const last = Math.min(end, 26)
  const scale = 10 ** (last - 20)
  return (whole * scale + digits(text, 20, last)) / scale
}

const inYears = (time: number): number => (time >= FIRST_TIME && time <= LAST_TIME ? time : NaN)

/** The time of a text that goes on after its seconds. */
function laterParts(text: string, whole: number, { isZoneless }: TimeForm): number {
  const end = fractionEnd(text)
  if (end < 0) return NaN
  const time = end > 19 ? withFraction(whole, text, end) : whole
  if (end === text.length) return isZoneless ? inYears(time) : NaN
  return inYears(time - zone(text, end))
}

/**
 * The instant that a text of a log states.
 *
 * @param text  without blanks around it
 * @returns s since 1970-01-01T00:00:00Z; NaN when it is not a time, not a date of the calendar, or in no known zone
 * @source RFC 3339, section 5.6; DD/MM/YYYY: Danish Maritime Authority AIS data. A blank in place of the T and zones
 *   of +HHMM and +HH, which databases write: own choice
 */
export function epochOf(text: string, form: TimeForm): number {
  const isDayFirst = form.isDayFirst && text.charCodeAt(2) === 47
  const whole = isDayFirst ? dayFirst(text) : yearFirst(text)
  if (text.length === 19) return form.isZoneless ? whole : NaN
  return laterParts(text, whole, form)
}

/** Whether a text that `epochOf` refused is a time that lacks nothing but its zone. */
export function lacksZone(text: string): boolean {
  return !Number.isNaN(epochOf(text, { isZoneless: true, isDayFirst: false }))
}

/** RFC 3339 in UTC: to the second, with up to three decimals where there are any. */
export function timeText(time: number): string {
  const text = new Date(Math.round(time * 1000)).toISOString()
  if (text.endsWith('.000Z')) return `${text.slice(0, -5)}Z`
  let end = text.length - 1
  while (text.charCodeAt(end - 1) === 48) end -= 1
  return `${text.slice(0, end)}Z`
}
