import { toKmh, toKnots } from '../domain/units.ts'

/** Stands where a figure does not apply or cannot be computed. */
export const UNKNOWN = '–'

/** A minus sign in place of a hyphen. */
const signed = (text: string): string => text.replace(/^-(?=[\d.]*[1-9])/, '−').replace(/^-/, '')

/** A figure with a fixed number of decimals. */
export function figure(value: number | undefined, decimals: number): string {
  return value === undefined || !Number.isFinite(value) ? UNKNOWN : signed(value.toFixed(decimals))
}

/** Slack against the last binary digit of a figure that stands on its last decimal. */
const SLACK = 1e-9

/** A greatest value, rounded towards zero so that what is printed is never more than what was found. */
export function atMostFigure(value: number | undefined, decimals: number): string {
  if (value === undefined || !Number.isFinite(value)) return UNKNOWN
  const scale = 10 ** decimals
  return figure(Math.trunc(value * scale + Math.sign(value) * SLACK * scale) / scale, decimals)
}

const withUnit = (text: string, unit: string): string => (text === UNKNOWN ? text : `${text}\u00a0${unit}`)

export const metres = (value: number | undefined, decimals = 2): string =>
  withUnit(figure(value, decimals), 'm')

/** A length as it was given: up to two decimals, none for their own sake. */
export const length = (value: number): string => withUnit(signed(String(Math.round(value * 100) / 100)), 'm')

export const kmh = (speed: number | undefined, decimals = 2): string =>
  withUnit(atMostFigure(speed === undefined ? undefined : toKmh(speed), decimals), 'km/h')

export const knots = (speed: number | undefined): string =>
  withUnit(atMostFigure(speed === undefined ? undefined : toKnots(speed), 2), 'kn')

export const metresPerSecond = (speed: number | undefined, decimals = 2): string =>
  withUnit(figure(speed, decimals), 'm/s')

/** A margin in whole percent, rounded down so that none is printed larger than it is; far below, only that it is. */
export function percent(share: number | undefined): string {
  if (share === undefined || !Number.isFinite(share)) return UNKNOWN
  return share <= -10 ? 'far below' : withUnit(figure(Math.floor(share * 100 + 1e-6), 0), '%')
}

/** A place along a waterway, m, as it is written on the bank: kilometres and metres. */
export const chainage = (value: number): string => `km\u00a0${signed((value / 1000).toFixed(3))}`

/** A length of waterway, m, in kilometres to the metre. */
export const kilometres = (value: number): string => withUnit(figure(value / 1000, 3), 'km')

/** A time, s, in hours and minutes; in minutes and seconds below an hour. */
export function duration(seconds: number | undefined): string {
  if (seconds === undefined || !Number.isFinite(seconds)) return UNKNOWN
  const whole = Math.round(Math.abs(seconds))
  const sign = seconds < 0 && whole > 0 ? '−' : ''
  const [large, small, units] =
    whole < 3600
      ? [Math.floor(whole / 60), whole % 60, ['min', 's'] as const]
      : [Math.floor(Math.round(whole / 60) / 60), Math.round(whole / 60) % 60, ['h', 'min'] as const]
  const first = large > 0 ? `${large}\u00a0${units[0]} ` : ''
  return `${sign}${first}${small}\u00a0${units[1]}`
}

/** A number of things, in groups of three. */
export const count = (value: number): string => String(value).replace(/\B(?=(\d{3})+$)/g, '\u202f')

/** A text cut to a number of characters, with an ellipsis where it was longer. */
export function cut(text: string, characters: number): string {
  const all = Array.from(text)
  return all.length <= characters
    ? text
    : `${all
        .slice(0, characters - 1)
        .join('')
        .trimEnd()}…`
}
