import { ascending } from 'd3-array'
import type { Hull } from '../domain/vessel.ts'
import {
  measuredHulls,
  type CalibrationPoint,
  type CalibrationView,
  type Standing,
} from './calibration-view.ts'
import type { KeyEntry } from './calibration-key.ts'
import { COLOURS, arrowHead, label, labelBox, type Stroke } from './chart.ts'
import { count, cut } from './format.ts'
import { attributes, markup, type Markup } from './html.ts'
import { TakenPlaces, type Box } from './place.ts'
import { HULL_NAMES } from './words.ts'

/** A passage at its place on a drawing, px. */
export interface Mark {
  readonly point: CalibrationPoint
  readonly standing: Standing
  readonly x: number
  readonly y: number
  /** where its true place lies beyond the edge: degrees clockwise from up */
  readonly beyond?: number | undefined
}

const HULL_COLOURS: Readonly<Record<Hull, string>> = {
  displacement: COLOURS.blue,
  'semi-displacement': COLOURS.purple,
  planing: COLOURS.vermilion,
}

export const hullStroke = (hull: Hull): Stroke =>
  ({
    displacement: { colour: COLOURS.blue, width: 1.4, dash: '7 3' },
    'semi-displacement': { colour: COLOURS.purple, width: 1.4, dash: '2 2' },
    planing: { colour: COLOURS.vermilion, width: 1.4, dash: '7 3 2 3' },
  })[hull]

/** Passages above which marks are small and carry no text of their own. */
const MANY = 500

const at = (value: number): string => String(Math.round(value * 10) / 10 + 0)

/** Circle, square or triangle of about the same area. */
function outline(hull: Hull, x: number, y: number, radius: number): string {
  if (hull === 'displacement') {
    const [r, d] = [at(radius), at(2 * radius)]
    return `M${at(x - radius)} ${at(y)}a${r} ${r} 0 1 0 ${d} 0a${r} ${r} 0 1 0-${d} 0Z`
  }
  const half = hull === 'planing' ? 1.3 * radius : 0.9 * radius
  const side = at(2 * half)
  return hull === 'planing'
    ? `M${at(x)} ${at(y - half)}L${at(x + half)} ${at(y + 0.8 * half)}H${at(x - half)}Z`
    : `M${at(x - half)} ${at(y - half)}h${side}v${side}h-${side}Z`
}

function crossed(x: number, y: number, radius: number): string {
  const [l, r, t, b] = [at(x - radius), at(x + radius), at(y - radius), at(y + radius)]
  return `M${l} ${t}L${r} ${b}M${l} ${b}L${r} ${t}`
}

const STYLES: Readonly<Record<Standing, (colour: string) => Markup>> = {
  counts: (colour) => attributes({ fill: colour, stroke: '#fff', 'stroke-width': 0.8 }),
  outlier: (colour) => attributes({ fill: '#fff', stroke: colour, 'stroke-width': 1.5 }),
  'out-of-range': () => attributes({ fill: '#fff', stroke: '#7d7d7d', 'stroke-width': 1 }),
}

const ORDER: readonly Standing[] = ['out-of-range', 'counts', 'outlier']

function shapeOf(hull: Hull, standing: Standing, x: number, y: number, radius: number): string {
  if (standing === 'out-of-range') return outline(hull, x, y, 0.8 * radius)
  const own = outline(hull, x, y, standing === 'outlier' ? 1.2 * radius : radius)
  return standing === 'outlier' ? own + crossed(x, y, 1.9 * radius) : own
}

/** Every passage as a mark: filled where it counts, open and crossed as an outlier, small and grey out of range. */
export function marksGroup(view: CalibrationView, marks: readonly Mark[]): Markup {
  const isMany = marks.length > MANY
  const radius = isMany ? 2.4 : 4.2
  const groups = ORDER.flatMap((standing) =>
    measuredHulls(view).map((hull) => {
      const own = marks.filter((mark) => mark.standing === standing && mark.point.hull === hull)
      if (own.length === 0) return undefined
      const paths = own.map(({ point, x, y }) => {
        const title = !isMany && markup`<title>${cut(titleOf(point), 80)}</title>`
        return markup`<path data-passage="${String(point.index)}" d="${shapeOf(hull, standing, x, y, radius)}">${title}</path>`
      })
      return markup`<g data-standing="${standing}"${STYLES[standing](HULL_COLOURS[hull])}>${paths}</g>${own.map(beyondArrow)}`
    }),
  )
  return markup`<g>${groups}</g>`
}

/** An arrow from a mark at the edge to where it belongs. */
function beyondArrow({ x, y, beyond, standing }: Mark): Markup | undefined {
  if (beyond === undefined) return undefined
  const angle = (beyond * Math.PI) / 180
  const fill = standing === 'out-of-range' ? '#7d7d7d' : COLOURS.ink
  return arrowHead(x + (EDGE - 2) * Math.sin(angle), y - (EDGE - 2) * Math.cos(angle), beyond, 6, fill)
}

/** Distance from the edge at which a mark that belongs beyond it is drawn, px. */
export const EDGE = 17

const titleOf = ({ index, label: name }: CalibrationPoint): string =>
  name === undefined ? `index ${index}` : `index ${index}: ${name}`

/** Most outliers that are named on a drawing. */
const MOST_NAMED = 6

/** Names beside the outliers that lie farthest out, where there is room. */
export function outlierNames(
  marks: readonly Mark[],
  field: Box,
  nameOf: (point: CalibrationPoint) => string,
): Markup[] {
  if (marks.length > MANY) return []
  const taken = new TakenPlaces()
  for (const { x, y } of marks) taken.take({ x: x - 5, y: y - 5, width: 10, height: 10 })
  const isInside = ({ x, y, width, height }: Box): boolean =>
    x >= field.x + 2 &&
    y >= field.y + 2 &&
    x + width <= field.x + field.width - 2 &&
    y + height <= field.y + field.height - 2
  return marks
    .filter(({ standing }) => standing === 'outlier')
    .sort((a, b) => ascending(a.point.index, b.point.index))
    .slice(0, MOST_NAMED)
    .flatMap(({ point, x, y }) => {
      const text = nameOf(point)
      const places = (
        [
          [x + 12, y + 4, 'start'],
          [x - 12, y + 4, 'end'],
          [x, y - 12, 'middle'],
          [x, y + 20, 'middle'],
        ] as const
      ).map(([left, base, anchor]) => ({
        ...labelBox(left, base, text, { size: 11, anchor }),
        left,
        base,
        anchor,
      }))
      const place = taken.takeFirst(places.filter(isInside))
      return place
        ? [label(place.left, place.base, text, { size: 11, anchor: place.anchor, hasHalo: true })]
        : []
    })
}

function markSample(hull: Hull, standing: Standing): KeyEntry['sample'] {
  return (x, y) =>
    markup`<path d="${shapeOf(hull, standing, x + 13, y, 4.2)}"${STYLES[standing](HULL_COLOURS[hull])}/>`
}

const passages = (number: number): string => `${count(number)} ${number === 1 ? 'passage' : 'passages'}`

/** What the marks are, with how many there are of each. */
export function markEntries(view: CalibrationView, id: string, marks: readonly Mark[]): KeyEntry[] {
  const hulls = measuredHulls(view)
  const [first = 'displacement'] = hulls
  const number = (standing: Standing, hull?: Hull): number =>
    marks.filter((mark) => mark.standing === standing && (hull === undefined || mark.point.hull === hull))
      .length
  const where = view.fit.methods.some((method) => method.id === id) ? 'in the fit' : 'in range'
  const entries: KeyEntry[] = hulls.map((hull) => ({
    sample: markSample(hull, 'counts'),
    text: HULL_NAMES[hull],
    note: `${passages(number('counts', hull))} ${where}`,
  }))
  const outliers = marks.filter(({ standing }) => standing === 'outlier')
  if (outliers.length > 0) {
    entries.push({
      sample: markSample(outliers[0]?.point.hull ?? first, 'outlier'),
      text: outliers.length === 1 ? 'outlier' : 'outliers',
      note: `${passages(outliers.length)}, left out`,
    })
  }
  const outside = marks.filter(({ standing }) => standing === 'out-of-range')
  if (outside.length > 0) {
    entries.push({
      sample: markSample(outside[0]?.point.hull ?? first, 'out-of-range'),
      text: 'out of range',
      note: `${passages(outside.length)}, left out`,
    })
  }
  return entries
}
