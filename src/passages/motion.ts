import type { Direction } from '../domain/segment.ts'
import { fromKnots } from '../domain/units.ts'
import type { PositionReport } from './position-report.ts'

/** Below this over ground a vessel is stationary: own choice, half a knot is what a moored antenna shows. */
const STATIONARY_SPEED = fromKnots(0.5)

/** Up to this over ground a status that says that a vessel lies still is believed: own choice, it is often left on. */
const STATUS_SPEED = fromKnots(2)

/** Navigational status of ITU-R M.1371 of vessels that lie still. */
const LYING_STILL: Readonly<Record<number, string>> = { 1: 'at-anchor', 5: 'moored', 6: 'aground' }

/**
 * Where the course begins to tell and where it fully does, m/s over ground. Measured on a day of an inland waterway: from
 * 5 kn on the course is within 34 degrees of the axis for 95 %, from 2 to 5 kn within 64; below 2 kn it means nothing.
 */
const COURSE_SPEED = fromKnots(2)
const FULL_COURSE_SPEED = fromKnots(5)

/** Farthest from the axis, degrees, that still counts as along it: own choice, beyond what bends and currents bring. */
export const CROSSING_ANGLE = 75

/** Why a vessel counts as stationary, kebab-case; undefined when it does not. An unknown speed does not contradict its status. */
export function stationaryReason({ speed, navigationStatus }: PositionReport): string | undefined {
  if (speed < STATIONARY_SPEED) return 'below-half-a-knot'
  return speed >= STATUS_SPEED ? undefined : LYING_STILL[navigationStatus]
}

/** How much the course tells, 0 to 1; 0 when the speed or the course is not known. */
export function courseWeight(report: PositionReport): number {
  if (Number.isNaN(courseOf(report)) || !(report.speed > COURSE_SPEED)) return 0
  return Math.min(1, (report.speed - COURSE_SPEED) / (FULL_COURSE_SPEED - COURSE_SPEED))
}

/** Over ground, else of the bow, degrees; NaN when neither is known. */
function courseOf({ course, heading }: PositionReport): number {
  return Number.isNaN(course) ? heading : course
}

/** Between the course and the axis either way, degrees, 0 to 90. */
export function axisAngle(report: PositionReport, bearing: number): number {
  const turned = (((courseOf(report) - bearing) % 180) + 180) % 180
  return Math.min(turned, 180 - turned)
}

/** The way a vessel goes along a line drawn downstream, by its course; undefined when the course does not tell. */
export function directionByCourse(report: PositionReport, bearing: number): Direction | undefined {
  if (!(report.speed >= COURSE_SPEED) || !(axisAngle(report, bearing) <= CROSSING_ANGLE)) return undefined
  const turned = (((courseOf(report) - bearing) % 360) + 360) % 360
  return turned < 90 || turned > 270 ? 'downstream' : 'upstream'
}
