import { angleOf, latitudeOf, longitudeOf, sizeWithin, speedOf, wrappedCourseOf } from './ais-values.ts'
import { type Cell, numberOf, REFUSED } from './cells.ts'
import type { Field } from './columns.ts'

/** A figure of a row: the values that are no mistake of the log, and what they mean. */
export interface Figure {
  readonly least: number
  readonly most: number
  /** 0 is missing, although it is out of the range */
  readonly isZeroMissing?: boolean
  /** SI, angles in degrees; NaN where the value is a mark of "not available" */
  readonly of: (value: number) => number
}

const asItIs = (value: number): number => value

const convoy = (least: number, most: number): Figure => ({ least, most, isZeroMissing: true, of: asItIs })

const from0 = (of: Figure['of']): Figure => ({ least: 0, most: Infinity, of })

/**
 * Figures of a row by field.
 *
 * @source marks of "not available": ITU-R M.1371-5, messages 1 and 5; ranges: those of vessels and conditions in
 *   requests, own choice
 */
export const FIGURES = {
  lat: { least: -Infinity, most: Infinity, of: latitudeOf },
  lon: { least: -Infinity, most: Infinity, of: longitudeOf },
  sog_kn: from0(speedOf),
  cog_deg: from0(angleOf),
  heading_deg: from0(angleOf),
  length_m: from0(sizeWithin(1, 500)),
  beam_m: from0(sizeWithin(0.3, 100)),
  draught_m: from0(sizeWithin(0.05, 30)),
  convoy_length_m: convoy(1, 500),
  convoy_beam_m: convoy(0.3, 100),
  convoy_draught_m: convoy(0.05, 30),
  water_level_m: { least: -50, most: 50, of: asItIs },
  current_mps: { least: -5, most: 5, of: asItIs },
} as const satisfies Partial<Record<Field, Figure>>

export type FigureField = keyof typeof FIGURES

/** Course in publications of which some rows took the highest of its 12 bits for a sign: down to -2^11 steps of 0.1. */
export const WRAPPED_COURSE: Figure = { least: -204.8, most: Infinity, of: wrappedCourseOf }

/** The figure of a cell; NaN when it is not available, `REFUSED` when it is no number or out of its range. */
export function figureOf(cell: Cell, figure: Figure): number {
  const value = numberOf(cell)
  if (value === REFUSED) return REFUSED
  if (value >= figure.least && value <= figure.most) return figure.of(value)
  const isMissing = Number.isNaN(value) || (value === 0 && figure.isZeroMissing === true)
  return isMissing ? NaN : REFUSED
}
