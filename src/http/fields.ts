import { z } from 'zod'
import type { Report } from './cross-check.ts'
import { fromKmh, fromKnots, KILOMETRE_PER_HOUR, KNOT } from '../domain/units.ts'

/** Name of a thing: 1 to 64 of letters, digits, dot, underscore, hyphen. */
export const ID_PATTERN = /^[A-Za-z0-9][A-Za-z0-9._-]{0,63}$/

export const Id = z
  .string()
  .regex(ID_PATTERN, '')
  .describe('1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit')

/** Control characters but tab and line ends, and halves of characters: databases, canonical JSON and paper know none. */
const UNWRITABLE = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f\u2028\u2029]|\p{Surrogate}/u

const writable = (text: string): boolean => !UNWRITABLE.test(text)

export const Text = z
  .string()
  .max(2000)
  .refine(writable, {
    error: 'must be text without control characters and without halves of characters',
    params: { code: 'pattern' },
  })

/** Text that says something, on paper too: no spaces around it, and not all of it. */
export const Name = Text.min(1).refine((text) => text === text.trim(), {
  error: 'must be text without spaces at its ends',
  params: { code: 'pattern' },
})

export const Label = z.string().max(200).optional().describe("the caller's own mark, echoed unread")

/** A number with its unit and bounds in the description. */
export function figure(min: number, max: number, what: string) {
  return z.number().min(min).max(max).describe(what)
}

/** Units in which a request may give a speed, by suffix, in m/s, and the conversion that the whole service uses. */
const SPEED_SUFFIXES = [
  ['mps', 1, 'm/s', (speed: number) => speed],
  ['kn', KNOT, 'kn', fromKnots],
  ['kmh', KILOMETRE_PER_HOUR, 'km/h', fromKmh],
] as const

type Suffix = (typeof SPEED_SUFFIXES)[number][0]
type SpeedFields<Name extends string> = Record<`${Name}_${Suffix}`, z.ZodOptional<z.ZodNumber>>

/**
 * The three fields of which exactly one, or at most one, gives a speed.
 *
 * @param min  m/s
 * @param max  m/s
 */
export function speedFields<const Name extends string>(name: Name, min: number, max: number, what: string) {
  const fields = SPEED_SUFFIXES.map(([suffix, unit, symbol]) => [
    `${name}_${suffix}`,
    figure(min / unit, max / unit, `${what}, ${symbol}; give one of the units`).optional(),
  ])
  return Object.fromEntries(fields) as SpeedFields<Name>
}

const namesOf = (name: string): string[] => SPEED_SUFFIXES.map(([suffix]) => `${name}_${suffix}`)

/** Reports a speed that is given twice, or not at all where it must be. */
export function checkSpeed(
  value: Readonly<Record<string, unknown>>,
  name: string,
  isRequired: boolean,
  report: Report,
): void {
  const given = namesOf(name).filter((field) => value[field] !== undefined)
  if (given.length > 1) {
    for (const field of given.slice(1)) {
      report([field], 'one-of', `is the same speed as ${given[0]}: give one of them`, {
        allowed: namesOf(name),
      })
    }
  } else if (given.length === 0 && isRequired) {
    report([], 'one-of', `needs the speed as one of ${namesOf(name).join(', ')}`, { allowed: namesOf(name) })
  }
}

/** The speed that one of the three fields gives, m/s; undefined when none does. */
export function speedOf(value: Readonly<Record<string, unknown>>, name: string): number | undefined {
  for (const [suffix, , , toSpeed] of SPEED_SUFFIXES) {
    const given = value[`${name}_${suffix}`]
    if (typeof given === 'number') return toSpeed(given)
  }
  return undefined
}
