import type { StripSegment } from './evidence-strip-rows.ts'
import type { PanelLine, PanelScales } from './evidence-strip.ts'
import type { EvidenceView } from './evidence-view.ts'
import type { Markup } from './html.ts'
import { TakenPlaces, type Box } from './place.ts'
import { tagMark } from './speed-labels.ts'

const TAG = 14

interface Candidate extends Box {
  readonly cx: number
  readonly cy: number
  /** px to the next other line, up to the size of a tag */
  readonly apart: number
  /** px of the segment */
  readonly room: number
}

/** Places for the letter of a line: along each segment that it runs over. */
function candidatesOf(
  line: PanelLine,
  others: readonly (readonly (number | undefined)[])[],
  segments: readonly StripSegment[],
  { along, speed, left, right, top, bottom }: PanelScales,
): Candidate[] {
  return segments.flatMap(({ from, to }, i): Candidate[] => {
    const value = line.values[i]
    if (value === undefined) return []
    const cy = speed(value)
    if (cy < top + TAG / 2 || cy > bottom - TAG / 2) return []
    const apart = others.reduce((least, values) => {
      const other = values[i]
      return other === undefined ? least : Math.min(least, Math.abs(speed(other) - cy))
    }, TAG)
    return [0.5, 0.3, 0.7].flatMap((share): Candidate[] => {
      const cx = along(from + share * (to - from))
      if (cx < left + TAG / 2 || cx > right - TAG / 2) return []
      const room = Math.abs(along(to) - along(from))
      return [{ cx, cy, apart, room, x: cx - TAG / 2, y: cy - TAG / 2, width: TAG, height: TAG }]
    })
  })
}

/** How clearly a letter would stand: far from other lines, on a wide segment. */
const clearness = ({ apart, room }: Candidate): number => 3 * apart + Math.min(room, 3 * TAG)

/** A letter on each line of a panel, where it is farthest from the others and its segment is wide. */
export function stripTags(
  { plan }: EvidenceView,
  lines: readonly PanelLine[],
  segments: readonly StripSegment[],
  scales: PanelScales,
): (Markup | undefined)[] {
  const taken = new TakenPlaces()
  const limits = segments.map(({ stretch }) => plan.stretches[stretch]?.limitSpeed)
  return lines.map((line) => {
    const others = [limits, ...lines.filter((other) => other !== line).map(({ values }) => values)]
    const candidates = candidatesOf(line, others, segments, scales).sort(
      (a, b) => clearness(b) - clearness(a),
    )
    const found = taken.takeFirst(candidates)
    return found && tagMark(found.cx, found.cy, line.style.letter, line.style.stroke.colour)
  })
}
