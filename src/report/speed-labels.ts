import { COLOURS, LINE_COLOURS, curved, label, labelBox, plated, type Point, type Stroke } from './chart.ts'
import { markup, type Markup } from './html.ts'
import type { Box, TakenPlaces } from './place.ts'
import type { Layout, Scales } from './speed-axes.ts'
import type { Samples, Series } from './speed-samples.ts'
import { fitted, textWidth } from './text-width.ts'

/** Letters that stand for the methods on their lines, in the order of the methods. */
export const LETTERS = 'abcdefghijklmnopqrstuvwxyz'

export const lineColour = (index: number): string => LINE_COLOURS[index % LINE_COLOURS.length] ?? COLOURS.grey

/** A speed that is marked and named above the field. */
export interface TopMark {
  /** m/s through the water */
  readonly speed: number
  readonly text: string
  readonly stroke: Stroke
  readonly isBold?: boolean
  readonly isMain?: boolean
}

/** Names of the marked speeds, one row each, on the side of their line that has room. */
export function topLabels(marks: readonly TopMark[], scales: Scales, layout: Layout): Markup[] {
  return marks.map((mark, i) => {
    const x = scales.speed(mark.speed)
    const y = layout.top - 6 - 16 * (marks.length - 1 - i)
    const style = { isBold: mark.isBold === true }
    const { width } = labelBox(0, 0, mark.text, style)
    const end = layout.size === 'wide' ? layout.right + 150 : layout.right + 8
    if (x + 6 + width <= end) return plated(x + 5, y, mark.text, style)
    if (x - 6 - width >= 2) return plated(x - 5, y, mark.text, { ...style, anchor: 'end' })
    return plated(Math.max(2, end - width), y, mark.text, style)
  })
}

/** Height of a line at a place across, px; NaN where it has none. */
function heightNear(
  x: number,
  values: readonly number[],
  { speeds }: Samples,
  { speed, height }: Scales,
): number {
  const at = speeds.findIndex((own) => speed(own) >= x)
  return height(values[at] ?? NaN)
}

/** A limit from the axis on. */
function limitPoints(values: readonly number[], samples: Samples, scales: Scales, layout: Layout): Point[] {
  return samples.speeds.map((speed, i) => [
    i === 0 ? layout.left : scales.speed(speed),
    scales.height(values[i] ?? NaN),
  ])
}

/** Whether a line has a point in a box, or steps over it. */
function runsThrough(points: readonly Point[], box: Box): boolean {
  return points.some(([x, y], i) => {
    const [x0, y0] = points[i - 1] ?? [x, y]
    const isBeside = Math.max(x, x0) < box.x || Math.min(x, x0) > box.x + box.width
    return !isBeside && Math.max(y, y0) >= box.y && Math.min(y, y0) <= box.y + box.height
  })
}

const LIMIT_STROKE: Stroke = { colour: COLOURS.vermilion, width: 1.4, dash: '10 3' }

/** Limits as lines with their names on them, at the left where the waves are low. */
export function limitLabels(
  samples: Samples,
  scales: Scales,
  layout: Layout,
  taken: TakenPlaces,
  curves: readonly (readonly Point[])[],
): { readonly lines: Markup[]; readonly labels: Markup[] } {
  const width = layout.right - layout.left - 12
  const style = { size: 11, fill: '#9a3b00', hasHalo: true }
  const lines = samples.limits.map(({ values }) => limitPoints(values, samples, scales, layout))
  const labels = samples.limits.map(({ name, values }, own) => {
    const text = fitted(`Limit ${name}`, width, 11)
    const room = width - textWidth(text, 11)
    const candidates = [-4, 12].flatMap((dy) =>
      [0, 1, 0.25, 0.5, 0.75].map((share) => {
        const x = layout.left + 6 + share * room
        const y = heightNear(x, values, samples, scales) + dy
        return { ...labelBox(x, y, text, style), at: [x, y] as const }
      }),
    )
    const inside = candidates.filter((box) => box.y >= layout.top && box.y + box.height <= layout.bottom)
    const clear = inside.filter(
      (box) => ![...curves, ...lines.filter((_, i) => i !== own)].some((points) => runsThrough(points, box)),
    )
    const found = taken.takeFirst([...clear, ...inside])
    return found ? label(found.at[0], found.at[1], text, style) : markup``
  })
  return { lines: lines.map((points) => curved(points, LIMIT_STROKE)), labels }
}

const TAG = 14

export interface Tag {
  readonly series: Series
  readonly others: readonly Series[]
  readonly samples: Samples
  readonly scales: Scales
  readonly layout: Layout
  readonly letter: string
  readonly colour: string
  readonly taken: TakenPlaces
}

interface Candidate extends Box {
  readonly cx: number
  readonly cy: number
  /** px to the next other line */
  readonly apart: number
}

/** Places for a letter on its line, from the right. */
function candidatesOf({ series, others, samples, scales, layout }: Tag): Candidate[] {
  const found: Candidate[] = []
  samples.speeds.forEach((speed, i) => {
    const cx = scales.speed(speed)
    const cy = scales.height(series.values[i] ?? NaN)
    const isInside =
      cx > layout.left + TAG &&
      cx < layout.right - TAG / 2 &&
      cy > layout.top + TAG / 2 &&
      cy < layout.bottom - TAG / 2
    if (!isInside) return
    const apart = others
      .filter((other) => other !== series)
      .map((other) => Math.abs(scales.height(other.values[i] ?? NaN) - cy))
      .filter(Number.isFinite)
      .reduce((least, distance) => Math.min(least, distance), TAG)
    found.push({ cx, cy, apart, x: cx - TAG / 2, y: cy - TAG / 2, width: TAG, height: TAG })
  })
  return found.reverse()
}

/** The letter of a line, on it, where it is farthest from the others; nothing where no place is free. */
export function tagOf(tag: Tag): Markup | undefined {
  const { letter, colour, taken } = tag
  const candidates = candidatesOf(tag).sort((a, b) => b.apart - a.apart)
  const found = taken.takeFirst(candidates)
  if (!found) return undefined
  return tagMark(found.cx, found.cy, letter, colour)
}

export const tagMark = (x: number, y: number, letter: string, colour: string): Markup =>
  markup`<g data-tag="${letter}"><circle cx="${x}" cy="${y}" r="${TAG / 2 - 0.5}" fill="#fff" stroke="${colour}" stroke-width="1.3"/>${label(x, y + 3.8, letter, { anchor: 'middle', size: 11, isBold: true })}</g>`
