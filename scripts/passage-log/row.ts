import type { Direction } from '../../src/domain/segment.ts'
import type { Mobile, Status } from '../../src/passages/position-report.ts'
import type { Ship } from './fleet.ts'

export type Verdict = 'within' | 'exceeds' | 'depends-on-draught' | 'no-safe-speed'

/** What is true of a row. Lengths in m, speeds in kn; undefined where nothing is said. */
export interface RowTruth {
  readonly status: Status
  readonly segmentId?: string | undefined
  readonly chainage?: number
  /** positive to the right looking downstream */
  readonly offset?: number
  /** along the sailing line from its first vertex */
  readonly along?: number
  /** to the left and the right bank */
  readonly banks?: readonly [number, number] | undefined
  readonly direction?: Direction
  /** recommended maximum over ground, of the stricter loading; undefined without a safe speed */
  readonly maximum?: number | undefined
  /** the same for a vessel on the sailing line */
  readonly lineMaximum?: number | undefined
  readonly governing?: string
  /** that the maximum is for */
  readonly loading?: string
  readonly verdict?: Verdict
}

/** A row of the log as it is sent, before it is written in a layout. */
export interface Row {
  /** s since 1970: rows stand in this order in the log */
  readonly arrival: number
  /** s since 1970, as written; undefined is written as a text that is no time */
  readonly time: number | undefined
  readonly ship: Ship
  readonly mobile: Mobile
  readonly lon: number
  readonly lat: number
  /** kn */
  readonly speed: number
  /** degrees */
  readonly course: number
  readonly heading: number
  /** of ITU-R M.1371; undefined for class B and what is no vessel */
  readonly navigationStatus: number | undefined
  /** m/s, positive downstream */
  readonly current: number | undefined
  readonly truth: RowTruth
}

/** What AIS sends for what it does not know (ITU-R M.1371-5). */
export const NOT_AVAILABLE = { lat: 91, lon: 181, speed: 102.3, course: 360, heading: 511 } as const

/** Excess over the recommended maximum that is let pass, kn: the service's default. */
export const TOLERANCE = 0.5

/** Five decimals of a degree, as published logs have them: about a metre. */
export const rounded = (degrees: number): number => Number(degrees.toFixed(5))
export const toTenth = (value: number): number => Number(value.toFixed(1))
