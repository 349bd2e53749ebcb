import { NOT_AVAILABLE, rounded, type Row } from './row.ts'

/** The row after which something is put in, and the one before which. */
function around(rows: readonly Row[], index: number): readonly [Row, Row] {
  const [before, after] = [rows[index], rows[index + 1]]
  if (!before || !after) throw new Error(`The track has no row ${index + 1}`)
  return [before, after]
}

/** A row half-way between two, on the straight way, to be changed into what it should be. */
function between([before, after]: readonly [Row, Row]): Row {
  const time = Math.floor(((before.time ?? 0) + (after.time ?? 0)) / 2)
  return {
    ...before,
    arrival: time,
    time,
    lon: rounded((before.lon + after.lon) / 2),
    lat: rounded((before.lat + after.lat) / 2),
  }
}

/** Degrees of longitude to the east of a track, 7.8 km there: no vessel covers them in a minute. */
const JUMP = 0.12

/** One position that the vessel cannot have reached; the next is where it should be. */
export function withJump(rows: readonly Row[], index: number): Row[] {
  const row = between(around(rows, index))
  return [...rows, { ...row, lon: rounded(row.lon + JUMP), truth: { status: 'implausible-jump' } }]
}

/** A row that says no position, in the sentinels of AIS. */
export function withoutPosition(rows: readonly Row[], index: number): Row[] {
  const row = between(around(rows, index))
  const { lon, lat } = NOT_AVAILABLE
  return [...rows, { ...row, lon, lat, truth: { status: 'invalid-position' } }]
}

/** A row without course and heading, in the sentinels of AIS; where it is and goes is as true as before. */
export function withoutCourse(rows: readonly Row[], index: number): Row[] {
  const { course, heading } = NOT_AVAILABLE
  return rows.map((row, i) => (i === index ? { ...row, course, heading } : row))
}

/** A row without a speed, in the sentinel of AIS: nothing can be held against a maximum. */
export function withoutSpeed(rows: readonly Row[], index: number): Row[] {
  const row = between(around(rows, index))
  return [...rows, { ...row, speed: NOT_AVAILABLE.speed, truth: { status: 'rejected' } }]
}

/** A row that is sent twice, the second time two seconds later. */
export function withDuplicate(rows: readonly Row[], index: number): Row[] {
  const row = rows[index]!
  return [...rows, { ...row, arrival: row.arrival + 2, truth: { status: 'duplicate' } }]
}

/** Two rows of a track that arrive the wrong way round. */
export function withSwap(rows: readonly Row[], index: number): Row[] {
  const [before, after] = around(rows, index)
  return rows.map((row) => (row === before ? { ...row, arrival: after.arrival + 1 } : row))
}

/** Older than the newest row of its vessel by more than the service waits, s. */
const TOO_LATE = 900

/** A row that arrives long after its time. */
export function withLate(rows: readonly Row[], index: number): Row[] {
  const [before, after] = around(rows, index)
  const row = between([before, after])
  return [...rows, { ...row, time: row.arrival - TOO_LATE, truth: { status: 'late' } }]
}

/** A row whose time nobody can read. */
export function withGarbledTime(rows: readonly Row[], index: number): Row[] {
  const row = between(around(rows, index))
  return [...rows, { ...row, time: undefined, truth: { status: 'rejected' } }]
}
