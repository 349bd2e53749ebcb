import type { StudySegment } from './study.ts'

/** m of chainage between two segments up to which they count as one run */
const MAX_GAP = 100

/** Chainages are written to the centimetre at best. */
const GAP_SLACK = 1e-6

/** +1 where chainage rises downstream, −1 where it falls. */
const senseOf = ({ chainageFrom, chainageTo }: StudySegment): 1 | -1 => (chainageTo < chainageFrom ? -1 : 1)

const byText = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0)

/**
 * Rows of segments that follow each other downstream.
 *
 * Segments of one waterway are ordered by chainage from upstream. A gap or an overlap of more than 100 m ends a run, and
 * so does a change of the sense of chainage, as at the summit of a canal, where downstream turns round. A segment
 * without a waterway is a run of its own, since nothing says what it lies next to.
 *
 * @returns indices of segments, from upstream in each run; runs by name of the waterway and from upstream, those
 *   without one last
 */
export function runsOf(segments: readonly StudySegment[]): number[][] {
  const rows = new Map<string, number[]>()
  const alone: number[][] = []
  segments.forEach((segment, i) => {
    if (segment.waterway === undefined) {
      alone.push([i])
      return
    }
    const key = `${segment.waterway}\n${senseOf(segment) === 1 ? 'rising' : 'falling'}`
    const row = rows.get(key) ?? []
    row.push(i)
    rows.set(key, row)
  })
  const sorted = [...rows].sort(([a], [b]) => byText(a, b))
  return [...sorted.flatMap(([, row]) => split(segments, ordered(segments, row))), ...alone]
}

function ordered(segments: readonly StudySegment[], row: readonly number[]): StudySegment[] {
  return row
    .flatMap((i) => segments[i] ?? [])
    .sort(
      (a, b) =>
        senseOf(a) * (a.chainageFrom - b.chainageFrom || a.chainageTo - b.chainageTo) || byText(a.id, b.id),
    )
}

function split(all: readonly StudySegment[], row: readonly StudySegment[]): number[][] {
  const indices = new Map(all.map((segment, i) => [segment, i]))
  const runs: number[][] = []
  let last: StudySegment | undefined
  for (const segment of row) {
    const gap = last ? Math.abs(segment.chainageFrom - last.chainageTo) : Infinity
    if (gap > MAX_GAP + GAP_SLACK) runs.push([])
    runs.at(-1)?.push(indices.get(segment) ?? -1)
    last = segment
  }
  return runs
}
