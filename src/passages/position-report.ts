import type { Loading } from '../domain/vessel.ts'

/** What sent a report. */
export type Mobile = 'vessel' | 'base-station' | 'aid-to-navigation' | 'aircraft' | 'distress-beacon'

/**
 * A position report as it was sent. SI, angles in degrees; a figure that was not sent or is marked as not available
 * is NaN, a text undefined.
 */
export interface PositionReport {
  /** physical line of the log, from 1 */
  readonly line: number
  /** s since 1970-01-01T00:00:00Z */
  readonly time: number
  /** tells vessels apart: `mmsi:` or `eni:` and the number */
  readonly vesselKey: string
  readonly mmsi: string | undefined
  readonly eni: string | undefined
  readonly name: string | undefined
  readonly lon: number
  readonly lat: number
  /** over ground, m/s, ≥ 0 */
  readonly speed: number
  /** over ground, clockwise from north, 0 up to 360 */
  readonly course: number
  /** of the bow, clockwise from north, 0 up to 360 */
  readonly heading: number
  /** navigational status of ITU-R M.1371, 0 to 15 */
  readonly navigationStatus: number
  /** ship type of ITU-R M.1371, 1 to 99 */
  readonly shipType: number
  readonly length: number
  readonly beam: number
  readonly draught: number
  readonly mobile: Mobile
  /** ours, for this row in place of what the query says */
  readonly vesselClass: string | undefined
  readonly loading: Loading | undefined
  readonly convoyLength: number
  readonly convoyBeam: number
  readonly convoyDraught: number
  /** above the datum */
  readonly waterLevel: number
  /** positive downstream */
  readonly current: number
}

/** A row that could not be read as a report, with what could be read of it. */
export interface RejectedRow {
  readonly line: number
  /** kebab-case */
  readonly reason: string
  /** what to do about it, in a sentence */
  readonly detail: string
  readonly time: number
  readonly mmsi: string | undefined
  readonly eni: string | undefined
  readonly name: string | undefined
}

export type LogRow =
  | { readonly report: PositionReport; readonly rejected?: undefined }
  | { readonly rejected: RejectedRow; readonly report?: undefined }

export const STATUSES = [
  'matched',
  'stationary',
  'outside-fairway',
  'ambiguous',
  'no-segment',
  'invalid-position',
  'implausible-jump',
  'duplicate',
  'late',
  'not-a-vessel',
  'rejected',
] as const
/** What became of a report; only matched ones are judged. */
export type Status = (typeof STATUSES)[number]
