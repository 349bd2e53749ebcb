import { ascending } from 'd3-array'
import type { Advisory, CriterionReport } from '../advisory/advise.ts'
import { COLOURS, label, plated, straight } from './chart.ts'
import { kmh } from './format.ts'
import { markup, type Markup } from './html.ts'
import type { Layout, Scales } from './speed-axes.ts'
import { fitted } from './text-width.ts'
import { criterionName } from './words.ts'

const ROW = 25
/** Rows that a drawing holds; a segment may have a hundred receptors. */
const MOST = 16

function row(
  report: CriterionReport,
  name: string,
  scales: Scales,
  { left, right }: Layout,
  y: number,
): Markup {
  const isReached = report.firstSpeed <= scales.topSpeed
  const end = isReached ? Math.max(scales.speed(report.firstSpeed), left) : right
  const speed = isReached ? kmh(Math.max(0, report.firstSpeed + scales.current)) : 'not reached'
  const text = `${fitted(name, right - left - 110, 12)}: ${speed}`
  const colour = report.isGoverning ? COLOURS.ink : '#8fa9bd'
  return markup`<g data-criterion="${report.criterion.id}">${straight(left, y + 17.5, right, y + 17.5, { colour: COLOURS.faint })}<rect x="${left}" y="${y + 15}" width="${end - left}" height="5" fill="${colour}"/>${
    isReached && straight(end, y + 12, end, y + 23, { colour, width: 2 })
  }${plated(left + 3, y + 11, text, { isBold: report.isGoverning })}</g>`
}

/** The speed at which each criterion, taken alone, is first reached: the first on the way up governs. */
export function criteriaBars(
  advisory: Advisory,
  scales: Scales,
  layout: Layout,
  top: number,
): { readonly content: Markup; readonly bottom: number } {
  const { segment } = advisory.decision.situation
  const sorted = [...advisory.criteria].sort(
    (a, b) => Number(b.isGoverning) - Number(a.isGoverning) || ascending(a.firstSpeed, b.firstSpeed),
  )
  const shown = sorted.slice(0, MOST)
  const rest = sorted.length - shown.length
  const first = top + 20
  const rows = shown.map((report, i) =>
    row(report, criterionName(report.criterion, segment), scales, layout, first + ROW * i),
  )
  const end = first + ROW * shown.length
  const head =
    layout.size === 'wide'
      ? 'Speed over ground at which each criterion, taken alone, is first reached'
      : 'Each criterion, taken alone, is first reached at'
  const note =
    rest > 0 && label(layout.left + 3, end + 11, `and ${rest} more, each reached later`, { isItalic: true })
  return {
    content: markup`<g>${plated(layout.left, top + 10, head, { size: 11, isBold: true })}${rows}${note}</g>`,
    bottom: end + (rest > 0 ? 18 : 2),
  }
}
