import { COLOURS, arrowHead, label, labelBox, plated, straight, type Anchor } from './chart.ts'
import { markup, type Markup } from './html.ts'

const THIN = { colour: COLOURS.grey, width: 0.8 }

/** A length between two ends on one height, with its figure in the line where there is room for it. */
export function lengthAcross(x1: number, x2: number, y: number, text: string): Markup {
  const ends = markup`${straight(x1, y - 5, x1, y + 5, THIN)}${straight(x2, y - 5, x2, y + 5, THIN)}`
  const room = Math.abs(x2 - x1)
  const middle = (x1 + x2) / 2
  const { width } = labelBox(0, 0, text)
  const heads = room > 16 && [arrowHead(x1, y, -90, 6, COLOURS.grey), arrowHead(x2, y, 90, 6, COLOURS.grey)]
  if (room <= width + 22) return markup`${straight(x1, y, x2, y, THIN)}${ends}${heads}`
  const half = width / 2 + 4
  return markup`${straight(x1, y, middle - half, y, THIN)}${straight(middle + half, y, x2, y, THIN)}${ends}${heads}${plated(middle, y + 4, text, { anchor: 'middle' })}`
}

/** A length between two heights at one place, with its figure beside it. */
export function lengthDown(x: number, y1: number, y2: number, text: string, anchor: Anchor): Markup {
  const middle = (y1 + y2) / 2 + 4
  const heads = Math.abs(y2 - y1) > 14 && [
    arrowHead(x, y1, 0, 6, COLOURS.grey),
    arrowHead(x, y2, 180, 6, COLOURS.grey),
  ]
  const side = anchor === 'start' ? 6 : -6
  return markup`${straight(x, y1, x, y2, THIN)}${heads}${label(x + side, middle, text, { anchor, hasHalo: true })}`
}

/** The sign of a water level: a triangle that stands on it. */
export const levelMark = (x: number, y: number): Markup =>
  markup`<path d="M${x} ${y}l-5 -8h10Z" fill="#fff" stroke="${COLOURS.blue}" stroke-width="1.2"/>`
