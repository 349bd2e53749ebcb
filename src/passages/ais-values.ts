import { fromKnots } from '../domain/units.ts'
import type { Mobile } from './position-report.ts'
import { type Cell, numberOf, textOf } from './cells.ts'

/** Speed over ground of "102.2 kn or more" and, at 102.3, "not available" (ITU-R M.1371-5, message 1), kn. */
const FAST = 102.2
/** Courses from here on are "not available" or not used (ITU-R M.1371-5, message 1: 3600 and above), degrees. */
const FULL_CIRCLE = 360
/** 2^12 steps of 0.1 degrees. Some rows of 2020 hold the course as if its 12 bits had a sign (own reading of such rows). */
const COURSE_WRAP = 409.6

/** m/s from kn; NaN when it is not available. */
export const speedOf = (knots: number): number => (knots >= FAST ? NaN : fromKnots(knots))

/** Course or heading, degrees; NaN when it is not available. */
export const angleOf = (degrees: number): number => (degrees >= FULL_CIRCLE ? NaN : degrees)

/** Course, degrees, where a negative one is a course of which the highest bit was taken for a sign. */
export const wrappedCourseOf = (degrees: number): number =>
  angleOf(degrees < 0 ? degrees + COURSE_WRAP : degrees)

/** Latitude, degrees; NaN beyond the pole, which is how "not available" (91) is told. */
export const latitudeOf = (degrees: number): number => (Math.abs(degrees) > 90 ? NaN : degrees)

/** Longitude, degrees; NaN beyond the antimeridian, which is how "not available" (181) is told. */
export const longitudeOf = (degrees: number): number => (Math.abs(degrees) > 180 ? NaN : degrees)

/**
 * A size as ships key it in: NaN when it is 0, not available, or one that no vessel has (own choice: the range of
 * vessels in requests).
 */
export const sizeWithin =
  (least: number, most: number) =>
  (size: number): number =>
    size < least || size > most ? NaN : size

/** Ship types in words, Danish Maritime Authority AIS data; numbers of ITU-R M.1371-5, table 53. */
const SHIP_TYPES: ReadonlyMap<string, number> = new Map([
  ['wig', 20],
  ['fishing', 30],
  ['towing', 31],
  ['towing long/wide', 32],
  ['dredging', 33],
  ['diving', 34],
  ['military', 35],
  ['sailing', 36],
  ['pleasure', 37],
  ['hsc', 40],
  ['pilot', 50],
  ['sar', 51],
  ['tug', 52],
  ['port tender', 53],
  ['anti-pollution', 54],
  ['law enforcement', 55],
  ['spare 1', 56],
  ['spare 2', 57],
  ['medical', 58],
  ['not party to conflict', 59],
  ['passenger', 60],
  ['cargo', 70],
  ['tanker', 80],
  ['other', 90],
])

/**
 * Types of the US vessel file, which stand in place of the transmitted ones until 2017, as the ship type of the group
 * that the publication puts them in. Those of groups without one ship type are left out.
 *
 * @source MarineCadastre.gov, vessel type and group codes of 2018, recalled and compared with published users of them
 */
const US_TYPES: ReadonlyMap<number, number> = new Map([
  [1001, 30],
  [1002, 30],
  [1003, 70],
  [1004, 70],
  [1012, 60],
  [1013, 60],
  [1014, 60],
  [1015, 60],
  [1016, 70],
  [1017, 80],
  [1019, 37],
  [1023, 31],
  [1024, 80],
  [1025, 31],
])

/** Navigational status in words, as the US and the Danish publication write it; numbers of ITU-R M.1371-5, message 1. */
const STATUSES: ReadonlyMap<string, number> = new Map([
  ['under way using engine', 0],
  ['at anchor', 1],
  ['not under command', 2],
  ['restricted maneuverability', 3],
  ['restricted manoeuvrability', 3],
  ['constrained by her draught', 4],
  ['constrained by her draft', 4],
  ['moored', 5],
  ['aground', 6],
  ['engaged in fishing', 7],
  ['under way sailing', 8],
  ['reserved for future amendment [hsc]', 9],
  ['reserved for future amendment [wig]', 10],
  ['power-driven vessel towing astern', 11],
  ['power-driven vessel pushing ahead or towing alongside', 12],
  ['ais-sart', 14],
])

/** Longest of the words above and more; a longer text is not looked up. */
const LONGEST_WORDS = 64

const codeInWords = (cell: Cell, codes: ReadonlyMap<string, number>): number => {
  const text = textOf(cell)
  if (text === undefined || text.length > LONGEST_WORDS) return NaN
  return codes.get(text.toLowerCase()) ?? NaN
}

const isCode = (value: number, least: number, most: number): boolean =>
  Number.isInteger(value) && value >= least && value <= most

/** Ship type, 1 to 99; NaN when it is not known, whatever stands in its place. */
export function shipTypeOf(cell: Cell): number {
  const value = numberOf(cell)
  if (isCode(value, 1, 99)) return value
  return Number.isFinite(value) ? (US_TYPES.get(value) ?? NaN) : codeInWords(cell, SHIP_TYPES)
}

/** Navigational status, 0 to 15; NaN when it is not known, whatever stands in its place. */
export function navigationStatusOf(cell: Cell): number {
  const value = numberOf(cell)
  if (isCode(value, 0, 15)) return value
  return Number.isFinite(value) ? NaN : codeInWords(cell, STATUSES)
}

/** Types of mobile of the Danish Maritime Authority that are not vessels. */
const MOBILES: ReadonlyMap<string, Mobile> = new Map([
  ['base station', 'base-station'],
  ['aton', 'aid-to-navigation'],
  ['sar airborne', 'aircraft'],
  ['search and rescue transponder', 'distress-beacon'],
  ['man overboard device', 'distress-beacon'],
])

/** What a text says to have sent the report; class A and B, and anything not listed, are vessels. */
export function mobileInWords(cell: Cell): Mobile {
  if (cell === '' || cell === 'A' || cell === 'B' || cell === 'Class A') return 'vessel'
  const text = textOf(cell)
  if (text === undefined || text.length > LONGEST_WORDS) return 'vessel'
  return MOBILES.get(text.toLowerCase()) ?? 'vessel'
}
