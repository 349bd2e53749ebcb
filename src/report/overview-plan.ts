import {
  COLOURS,
  WIDTHS,
  drawing,
  label,
  pathThrough,
  plated,
  straight,
  type Point,
  type Size,
} from './chart.ts'
import { markup, attributes, type Markup } from './html.ts'
import type { OverviewRow } from './overview-rows.ts'
import { TakenPlaces } from './place.ts'
import { along, extentOf, fitPlane, planeAbout, thinned } from './plan-geometry.ts'
import { northArrow, placesAbout, scaleBar } from './plan-parts.ts'
import { classesOf, type SpeedClass } from './speed-classes.ts'

/** Segments up to which each is a line of its own with its name; more are drawn class by class. */
const NAMED_LINES = 600
/** Width of lines where there are many, as a share. */
const DENSE_SHARE = 0.4
/** Most lines beside which a place for a value is looked for. */
const MOST_TRIED = 800
const KEY_ROW = 20

interface Drawn {
  readonly row: OverviewRow
  readonly points: readonly Point[]
  readonly speedClass: SpeedClass
}

/** Widths of lines: slower is thicker, so that grey print tells it too. */
const strokeOf = ({ colour, width, dash }: SpeedClass, share = 1) =>
  attributes({ stroke: colour, 'stroke-width': width * share, 'stroke-dasharray': dash })

function linesOf(drawn: readonly Drawn[], classes: readonly SpeedClass[]): Markup {
  const base = drawn.map(({ points }) => pathThrough(points)).join('')
  const under = markup`<path d="${base}" fill="none" stroke="#fff" stroke-width="9"/>`
  if (drawn.length <= NAMED_LINES) {
    return markup`${under}${drawn.map(
      ({ row, points, speedClass }) =>
        markup`<path d="${pathThrough(points)}" fill="none"${strokeOf(speedClass)}><title>${`${row.name}: ${row.answerText}`}</title></path>`,
    )}`
  }
  return markup`${classes.map((speedClass) => {
    const d = drawn
      .filter((own) => own.speedClass === speedClass)
      .map(({ points }) => pathThrough(points))
      .join('')
    return markup`${d !== '' && markup`<path d="${d}" fill="none"${strokeOf(speedClass, DENSE_SHARE)}/>`}`
  })}`
}

/** Values beside their lines, as many as fit. */
function labelsOf(drawn: readonly Drawn[], taken: TakenPlaces, width: number, height: number): Markup[] {
  const isDense = drawn.length > NAMED_LINES
  const step = Math.ceil(drawn.length / MOST_TRIED)
  const gap = isDense ? 16 : 2
  const style = { isBold: true, anchor: 'middle', hasHalo: true } as const
  return drawn.flatMap(({ row, points }, i) => {
    if (i % step !== 0) return []
    const { at } = along(points, 0.5)
    const candidates = [...placesAbout(at, row.shortText, style)].filter(
      (box) =>
        box.far <= 16 &&
        box.x >= 2 &&
        box.x + box.width <= width - 2 &&
        box.y >= 2 &&
        box.y + box.height <= height,
    )
    const found = taken.takeFirst(candidates, gap)
    if (!found) return []
    const write = isDense ? label : plated
    return [write(found.lx, found.ly, row.shortText, { ...style, anchor: found.anchor })]
  })
}

function keyOf(classes: readonly SpeedClass[], unit: string, top: number, size: Size): Markup {
  const columns = size === 'wide' ? 3 : 2
  const step = (WIDTHS[size] - 8) / columns
  return markup`<g>${label(4, top, `Recommended maximum over ground, ${unit}`, { isBold: true })}${classes.map(
    (own, i) => {
      const x = 4 + step * (i % columns)
      const y = top + KEY_ROW * (1 + Math.floor(i / columns))
      return markup`<path d="M${x} ${y - 4}h30" fill="none"${strokeOf(own)}/>${label(x + 38, y, own.name)}`
    },
  )}</g>`
}

/**
 * All segments in plan, coloured, thickened and labelled by their recommended speed.
 *
 * @param rows  n segments with their answers, n ≥ 0
 * @param unit  unit of the signs
 * @param size  the width that it is made for
 * @returns an SVG element
 */
export function overviewPlanSvg(rows: readonly OverviewRow[], unit: string, size: Size = 'wide'): string {
  const width = WIDTHS[size]
  const plane = planeAbout(rows[0]?.line[0] ?? [0, 0])
  const extent = extentOf(rows.length === 0 ? [[0, 0]] : rows.flatMap((row) => row.line.map(plane)))
  const bounds: [number, number] = size === 'wide' ? [240, 560] : [200, 430]
  const fitted = fitPlane(extent, width, bounds, 38)
  const classes = classesOf(rows)
  const classFor = (row: OverviewRow): SpeedClass | undefined => classes.find((own) => own.holds(row))
  const drawn = rows.flatMap((row): Drawn[] => {
    const speedClass = classFor(row)
    const points = thinned(
      row.line.map((position) => fitted.toPoint(plane(position))),
      1.5,
    )
    return speedClass ? [{ row, points, speedClass }] : []
  })
  const taken = new TakenPlaces()
  taken.take({ x: width - 34, y: 0, width: 34, height: 60 })
  if (drawn.length <= NAMED_LINES) {
    for (const { points } of drawn) {
      for (let i = 0; i <= 12; i += 1) {
        const { at } = along(points, i / 12)
        taken.take({ x: at[0] - 3, y: at[1] - 3, width: 6, height: 6 })
      }
    }
  }
  const bar = fitted.height + 14
  const key = bar + 28
  const columns = size === 'wide' ? 3 : 2
  const height = key + KEY_ROW * Math.ceil(classes.length / columns) + 10
  const shown =
    rows.length === 0 &&
    label(width / 2, fitted.height / 2, 'There are no segments yet.', { anchor: 'middle' })
  return drawing(
    {
      width,
      height,
      id: `overview-${size}`,
      title: 'Plan of all segments',
      description: `${rows.length} segments, north up, each with the recommended maximum speed over ground for the chosen vessel and water level.`,
    },
    [
      linesOf(drawn, classes),
      ticksBetween(drawn),
      labelsOf(drawn, taken, width, fitted.height),
      shown,
      northArrow(width - 18, 6),
      rows.length > 0 && scaleBar(14, bar - 6, fitted.scale, width / 4),
      keyOf(classes, unit, key, size),
    ],
  ).text
}

/** Short lines across the water where segments begin, so that neighbours of one class are told apart. */
function ticksBetween(drawn: readonly Drawn[]): Markup[] {
  if (drawn.length > NAMED_LINES) return []
  return drawn.flatMap(({ points }) =>
    [0, 1].map((share) => {
      const { at, course } = along(points, share)
      const [dx, dy] = [-course[1] * 6, course[0] * 6]
      return straight(at[0] - dx, at[1] - dy, at[0] + dx, at[1] + dy, { colour: COLOURS.ink, width: 1 })
    }),
  )
}
