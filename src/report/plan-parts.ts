import { COLOURS, arrowHead, label, labelBox, straight, type Point, type TextStyle } from './chart.ts'
import { count } from './format.ts'
import { markup, type Markup } from './html.ts'
import type { TakenPlaces } from './place.ts'
import { roundLength } from './plan-geometry.ts'

/** An arrow to the north in the upper right corner. */
export function northArrow(x: number, y: number): Markup {
  return markup`<g>${straight(x, y + 34, x, y + 6, { width: 1.2 })}${arrowHead(x, y, 0, 12)}${label(x, y + 48, 'N', { anchor: 'middle', isBold: true })}</g>`
}

/** A bar of a round length. */
export function scaleBar(x: number, y: number, pxPerMetre: number, longest: number): Markup {
  const metres = roundLength(longest / pxPerMetre)
  const end = x + metres * pxPerMetre
  const text = metres >= 1000 ? `${count(metres / 1000)} km` : `${metres} m`
  return markup`<g><rect x="${x}" y="${y}" width="${(end - x) / 2}" height="4" fill="${COLOURS.ink}"/><rect x="${x}" y="${y}" width="${end - x}" height="4" fill="none" stroke="${COLOURS.ink}"/>${label(x, y - 4, '0', { size: 11, anchor: 'middle' })}${label(end, y - 4, text, { size: 11, anchor: 'middle' })}</g>`
}

/** Where a name may stand about a point: to the sides first, then above and below. */
export function* placesAbout([x, y]: Point, text: string, style: TextStyle, reach = 8) {
  for (const far of [reach, 2 * reach, 4 * reach, 7 * reach]) {
    const spots = [
      [x + far, y + 4, 'start'],
      [x - far, y + 4, 'end'],
      [x, y - far, 'middle'],
      [x, y + far + 9, 'middle'],
      [x + far, y - far, 'start'],
      [x + far, y + far + 9, 'start'],
      [x - far, y - far, 'end'],
      [x - far, y + far + 9, 'end'],
    ] as const
    for (const [lx, ly, anchor] of spots) {
      yield { ...labelBox(lx, ly, text, { ...style, anchor }), lx, ly, anchor, far }
    }
  }
}

/** The drawing that a name must stay within, and the side on which it belongs. */
export interface Room {
  readonly width: number
  readonly height: number
  readonly towards?: Point
}

/** A name near a point where nothing else stands, with a line to the point when it is far off. */
export function namedPoint(
  point: Point,
  text: string,
  style: TextStyle,
  taken: TakenPlaces,
  { width, height, towards = [0, 0] }: Room,
): Markup | undefined {
  const isTowards = (box: { x: number; y: number; width: number; height: number }): boolean =>
    (box.x + box.width / 2 - point[0]) * towards[0] + (box.y + box.height / 2 - point[1]) * towards[1] >= 0
  const inside = [...placesAbout(point, text, style)].filter(
    (box) => box.x >= 2 && box.x + box.width <= width - 2 && box.y >= 1 && box.y + box.height <= height - 1,
  )
  const found = taken.takeFirst([...inside.filter(isTowards), ...inside])
  if (!found) return undefined
  const isFar = found.far > 12
  return markup`${isFar && straight(point[0], point[1], found.lx, found.ly - 4, { colour: COLOURS.grey, width: 0.7 })}${label(found.lx, found.ly, text, { ...style, anchor: found.anchor, hasHalo: true })}`
}
