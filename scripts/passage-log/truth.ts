import { STATUSES, type Status } from '../../src/passages/position-report.ts'
import type { Ship } from './fleet.ts'
import { TOLERANCE, type Row } from './row.ts'

/** Line of the first row in a log with a header. */
const FIRST_LINE = 2

/** What is true of a row, as it is written: `null` where nothing is said. */
export interface TruthRow {
  readonly line: number
  readonly time: string | null
  readonly mmsi: string
  readonly vessel_class: string
  /** where the hull that the maximum is for comes from */
  readonly vessel_basis: string
  readonly status: Status
  readonly segment_id: string | null
  readonly chainage_m: number | null
  readonly along_m: number | null
  readonly offset_m: number | null
  readonly bank_distance_left_m: number | null
  readonly bank_distance_right_m: number | null
  readonly direction: string | null
  readonly over_ground_kn: number
  readonly max_over_ground_kn: number | null
  readonly sailing_line_max_over_ground_kn: number | null
  readonly governing_criterion: string | null
  readonly loading: string | null
  readonly verdict: string | null
  readonly is_over: boolean
}

/** A planted exceedance. */
export interface TruthEvent {
  readonly mmsi: string
  readonly vessel_class: string
  readonly segment_id: string
  readonly direction: string
  readonly certainty: 'certain' | 'depends-on-draught'
  readonly start: string
  readonly end: string
  readonly duration_s: number
  readonly distance_m: number
  readonly reports: number
  readonly peak_excess_kn: number
  readonly mean_excess_kn: number
  readonly first_line: number
  readonly last_line: number
}

export interface Truth {
  readonly seed: number
  readonly vessels: number
  readonly tolerance_kn: number
  readonly by_status: Readonly<Record<Status, number>>
  readonly rows: readonly TruthRow[]
  readonly events: readonly TruthEvent[]
}

/** What an event is made of: the service's defaults, restated. */
const MAX_GAP = 600
const LEAST_REPORTS = 2

const iso = (time: number): string => new Date(time * 1000).toISOString().replace('.000Z', 'Z')

function basisOf({ convoy, type, draught }: Ship): string {
  if (convoy) return 'tow-override'
  if (type === 31 || type === 52) return 'tow-hull-only'
  return draught === undefined ? 'assumed-draught' : 'reported'
}

function rowTruth(row: Row, line: number): TruthRow {
  const { truth } = row
  const isOver = truth.verdict === 'exceeds' || truth.verdict === 'depends-on-draught'
  return {
    line,
    time: row.time === undefined ? null : iso(row.time),
    mmsi: row.ship.mmsi,
    vessel_class: row.ship.classId,
    vessel_basis: basisOf(row.ship),
    status: truth.status,
    segment_id: truth.segmentId ?? null,
    chainage_m: truth.chainage ?? null,
    along_m: truth.along ?? null,
    offset_m: truth.offset ?? null,
    bank_distance_left_m: truth.banks?.[0] ?? null,
    bank_distance_right_m: truth.banks?.[1] ?? null,
    direction: truth.direction ?? null,
    over_ground_kn: row.speed,
    max_over_ground_kn: truth.maximum ?? null,
    sailing_line_max_over_ground_kn: truth.lineMaximum ?? null,
    governing_criterion: truth.governing ?? null,
    loading: truth.loading ?? null,
    verdict: truth.verdict ?? null,
    is_over: isOver,
  }
}

/** A judged row with its time as a number, in its place among those of its vessel. */
interface Judged {
  readonly time: number
  readonly row: TruthRow
}

/** Whether a row goes on with what the one before it was part of. */
export function continues(before: Judged | undefined, { time, row }: Judged): boolean {
  if (before?.row.segment_id !== row.segment_id || before.row.direction !== row.direction) return false
  return time - before.time <= MAX_GAP
}

function eventOf(run: readonly Judged[]): TruthEvent {
  const [first, last] = [run[0]!, run.at(-1)!]
  const excesses = run.map(({ row }) => row.over_ground_kn - (row.max_over_ground_kn ?? 0))
  return {
    mmsi: first.row.mmsi,
    vessel_class: first.row.vessel_class,
    segment_id: first.row.segment_id!,
    direction: first.row.direction!,
    certainty: run.some(({ row }) => row.verdict === 'exceeds') ? 'certain' : 'depends-on-draught',
    start: iso(first.time),
    end: iso(last.time),
    duration_s: last.time - first.time,
    distance_m: Math.abs(last.row.along_m! - first.row.along_m!),
    reports: run.length,
    peak_excess_kn: Math.max(...excesses),
    mean_excess_kn: excesses.reduce((sum, excess) => sum + excess, 0) / run.length,
    first_line: Math.min(...run.map(({ row }) => row.line)),
    last_line: Math.max(...run.map(({ row }) => row.line)),
  }
}

/** Matched rows of each vessel in the order of time. */
export function tracksOf(rows: readonly TruthRow[]): readonly (readonly Judged[])[] {
  const tracks = new Map<string, Judged[]>()
  for (const row of rows) {
    if (row.status !== 'matched' || row.time === null) continue
    const track = tracks.get(row.mmsi) ?? []
    track.push({ time: Date.parse(row.time) / 1000, row })
    tracks.set(row.mmsi, track)
  }
  return [...tracks.values()].map((track) => track.toSorted((a, b) => a.time - b.time))
}

/** Runs of rows above the recommended maximum, of two at least. */
function eventsOf(rows: readonly TruthRow[]): TruthEvent[] {
  return tracksOf(rows).flatMap((track) => {
    const runs: Judged[][] = []
    let before: Judged | undefined
    for (const judged of track) {
      if (judged.row.is_over) {
        if (before?.row.is_over && continues(before, judged)) runs.at(-1)!.push(judged)
        else runs.push([judged])
      }
      before = judged
    }
    return runs.filter((run) => run.length >= LEAST_REPORTS).map(eventOf)
  })
}

export function truthOf(
  rows: readonly Row[],
  made: { readonly seed: number; readonly vessels: number },
): Truth {
  const truths = rows.map((row, i) => rowTruth(row, i + FIRST_LINE))
  const counts = STATUSES.map((status) => [status, truths.filter((row) => row.status === status).length])
  return {
    ...made,
    tolerance_kn: TOLERANCE,
    by_status: Object.fromEntries(counts) as Record<Status, number>,
    rows: truths,
    events: eventsOf(truths),
  }
}
