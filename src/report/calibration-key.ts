import {
  COLOURS,
  WIDTHS,
  curved,
  drawing,
  label,
  straight,
  type Point,
  type Size,
  type Stroke,
} from './chart.ts'
import { markup, type Markup } from './html.ts'
import type { Box } from './place.ts'
import { fitted } from './text-width.ts'

/** A line of the key: a sample, what it is and a note. */
export interface KeyEntry {
  readonly sample: (x: number, y: number) => Markup
  readonly text: string
  readonly note?: string
}

export const lineSample =
  (stroke: Stroke) =>
  (x: number, y: number): Markup =>
    straight(x, y, x + 26, y, stroke)

export const bandSample =
  (fill: string, stroke?: Stroke) =>
  (x: number, y: number): Markup =>
    markup`<rect x="${x}" y="${y - 6}" width="26" height="12" fill="${fill}"/>${stroke && straight(x, y, x + 26, y, stroke)}`

export const trendSample =
  (stroke: Stroke) =>
  (x: number, y: number): Markup => {
    const points: Point[] = [0, 1, 2, 3, 4, 5, 6].map((i) => [
      x + (26 * i) / 6,
      y + 5 - 10 * Math.sqrt(i / 6),
    ])
    return curved(points, stroke)
  }

const ROW = 34

/** Entries below one another, or in columns. */
export function key(
  entries: readonly KeyEntry[],
  { x, y, width }: Omit<Box, 'height'>,
  columns = 1,
): { readonly content: Markup; readonly bottom: number } {
  const own = width / columns
  const rows = Math.ceil(entries.length / columns)
  const content = entries.map(({ sample, text, note }, i) => {
    const left = x + own * Math.floor(i / rows)
    const top = y + ROW * (i % rows)
    const base = note === undefined ? top + 16 : top + 11
    return markup`${sample(left, top + 12)}${label(left + 34, base, fitted(text, own - 34, 12))}${
      note !== undefined &&
      label(left + 34, top + 25, fitted(note, own - 34, 11), { size: 11, fill: COLOURS.grey })
    }`
  })
  return { content: markup`<g>${content}</g>`, bottom: y + ROW * rows }
}

/** A drawing that says why there is none. */
export const noMethodSvg = (id: string, title: string, size: Size): string =>
  drawing(
    { width: WIDTHS[size], height: 56, id, title, description: 'No method could be computed.' },
    label(10, 32, 'No method could be computed for these passages.'),
  ).text
