import type { Extent } from '../domain/calibration.ts'
import { toKmh } from '../domain/units.ts'
import { item } from './block.ts'
import { calibrationFitSvg, calibrationResidualsSvg } from './calibration-charts.ts'
import {
  calibrationCautions,
  distinctionText,
  hullTable,
  intervalText,
  outliersTable,
  passagesTable,
  rankingTable,
} from './calibration-tables.ts'
import { chosenMethod, measuredHulls, type CalibrationView } from './calibration-view.ts'
import type { Size } from './chart.ts'
import { UNKNOWN, count, figure } from './format.ts'
import { Markup, markup } from './html.ts'
import { page } from './page.ts'
import { SHEET_STYLE } from './sheet-style.ts'
import { HULL_NAMES, methodName, methodShortName } from './words.ts'

/** What the whole sheet is, in few sentences. */
const STANDING =
  'These are corrections of computed wave heights for one water, found from measurements on it. They hold within what was measured. They are no navigation aid and replace neither local rules nor the judgement of a licensed professional; where they ask for less speed, they hold.'

/** What this sheet has beside the sheet of an advisory. */
const CALIBRATION_STYLE = `
.answer > *, ul.cautions div { min-width: 0; overflow-wrap: anywhere; }
.quote { margin: 0; }
.found { font-size: 16px; margin: 10px 0; }
table.passages td, table.passages th { padding-right: 6px; }
table.ranking td.figure, table.ranking th.figure { padding-right: 10px; }
dl.block + p { margin: 8px 0 0; }
tbody td.figure + th { padding-left: 10px; }
table.passages { font-size: 12px; }
table.passages td:nth-child(3), table.passages td:last-child { white-space: nowrap; }
@media screen and (min-width: 781px) { table.passages tbody th { min-width: 84px; } }
@media screen and (max-width: 780px) {
  table.stack dl.block + p { margin: 8px 0 0; }
tbody td.figure + th { padding-left: 0; order: -1; }
  table.passages { font-size: 13px; }
}
@media print {
  .found { font-size: inherit; }
  table.stack thead { display: table-header-group; }
  table.stack tr { display: table-row; }
  table.stack th, table.stack td { display: table-cell; padding: 3px 8px 3px 0; border-bottom: 1px solid var(--faint); white-space: normal; }
  table.stack thead th { border-bottom: 1.5px solid var(--ink); }
  table.stack tbody th { font-weight: 400; }
  table.stack tr.governs th { font-weight: 700; }
  table.stack .figure { text-align: right; white-space: nowrap; }
  table.stack td.figure + :not(.figure) { padding-left: 10px; }
  table.stack td[data-name]::before { content: none; }
  table.passages { font-size: 7.5pt; }
  table.passages th, table.passages td { padding: 2px 5px 2px 0; }
}
@page { @bottom-left { content: "Calibration of wave heights; no navigation aid"; } }
`

function head(view: CalibrationView): Markup {
  const place = view.segmentId === undefined ? 'no segment named' : `segment ${view.segmentId}`
  return markup`<header><p class="kind">Calibration of wave heights</p><h1>${view.name}</h1><p class="place">${place}</p><dl class="block">${[
    item('Calibration', view.id, true),
    item('Segment', view.segmentId ?? 'none', true),
    item('Created', view.created, true),
    item('Service version', view.serviceVersion),
    item('Method version', view.methodVersion),
    item('Seed of the bootstrap', String(view.seed)),
    item('Passages', count(view.points.length)),
    item('Outliers', count(view.fit.outliers.length)),
    item('Methods with a factor', count(view.fit.methods.length)),
  ]}</dl></header>`
}

/** A range with its unit; one figure where both ends read alike. */
function range([least, most]: Extent, decimals: number, unit = ''): string {
  const [from, to] = [figure(least, decimals), figure(most, decimals)]
  if (from === UNKNOWN || to === UNKNOWN) return UNKNOWN
  const end = unit === '' ? '' : `\u00a0${unit}`
  return from === to ? `${from}${end}` : `${from} to ${to}${end}`
}

function measured(view: CalibrationView): Markup {
  const { coverage, points } = view
  const { speed, distance, depth, depthFroudeNumber } = coverage
  const heights = points.map((point) => point.measured).filter(Number.isFinite)
  const height: Extent = [Math.min(...heights), Math.max(...heights)]
  const hulls = measuredHulls(view).map(
    (hull) => `${count(points.filter((point) => point.hull === hull).length)} of a ${HULL_NAMES[hull]}`,
  )
  return markup`<dl class="block">${[
    item('Passages', `${count(points.length)}${hulls.length > 0 ? `: ${hulls.join(', ')}` : ''}`, true),
    item('Speed through the water', range([toKmh(speed[0]), toKmh(speed[1])], 1, 'km/h')),
    item('Gauge to sailing line', range(distance, 1, 'm')),
    item('Depth', range(depth, 2, 'm')),
    item('Depth Froude number', range(depthFroudeNumber, 2)),
    item('Highest wave of a passage', range(height, 3, 'm'), true),
  ]}</dl><p class="muted">Outside these ranges the factor is a guess, and answers that use it there say so.</p>`
}

const passages = (number: number): string => `${count(number)} ${number === 1 ? 'passage' : 'passages'}`

/** The finding as a sentence that may be quoted; undefined without a factor. */
function findingText(view: CalibrationView): string | undefined {
  const method = chosenMethod(view)
  const fit = method?.fit
  if (!method || !fit) return undefined
  const left = view.points.filter((point) => method.outliers.has(point.index)).length
  const used = passages(fit.passagesInRange - left)
  const without = left === 0 ? '' : ` (${count(left)} ${left === 1 ? 'outlier' : 'outliers'} left out)`
  const where = view.segmentId === undefined ? '' : `, on ${view.segmentId}`
  return `In “${view.name}”${where}, the median measured wave height is ${figure(fit.factor, 2)} times that by ${methodName(fit.id)} (${fit.id}), 95 % interval ${intervalText(fit.interval)}, from ${used} in range${without}; after the factor single passages scatter by a standard deviation of ${figure(fit.scatterLogSd, 2)} of the natural logarithm.`
}

function byHullLine(view: CalibrationView): string | undefined {
  const hulls = chosenMethod(view)?.fit?.byHull ?? []
  return hulls.length === 0
    ? undefined
    : `Applied by hull: ${hulls.map(({ hull, factor }) => `${HULL_NAMES[hull]} ${figure(factor, 2)}`).join(', ')}.`
}

function finding(view: CalibrationView): Markup {
  const method = chosenMethod(view)
  const fit = method?.fit
  if (!method || !fit) {
    return markup`<section class="answer unsafe" aria-label="Finding"><div><p class="what">Recommended method</p><p class="speed">None</p><p class="also">No method has enough passages in its range for a factor.</p></div></section>`
  }
  const name = view.fit.recommended === undefined ? 'Method of the first rank' : 'Recommended method'
  return markup`<section class="answer" aria-label="Finding"><div><p class="what">${name}: ${methodShortName(fit.id)}</p><p class="speed">${figure(fit.factor, 2)} <small>times the computed height</small></p><p class="also">95 % interval ${intervalText(fit.interval)}. ${byHullLine(view)}</p></div><div class="governs"><p class="quote">${findingText(view)}</p></div></section>`
}

const CLASSED = /^<svg /

/** A drawing for paper and desk, and one for a phone: the style shows one of them. */
function drawn(make: (size: Size) => string): Markup {
  const sized = (size: Size): string => make(size).replace(CLASSED, `<svg class="${size}" `)
  return new Markup(sized('wide') + sized('narrow'))
}

function figureOf(number: number, text: string, make: (size: Size) => string): Markup {
  return markup`<figure>${drawn(make)}<figcaption><b>Figure ${String(number)}.</b> ${text}</figcaption></figure>`
}

function figures(view: CalibrationView): Markup {
  const method = chosenMethod(view)
  const name = method ? methodShortName(method.id) : 'no method'
  const fitted = `Measured against computed wave height, ${name}, both axes logarithmic. Marks above the line 1 : 1 were higher than computed. A mark on the edge lies beyond it; one in the strip has no computed height.`
  const left = `What the common factor leaves over, ${name}: natural logarithm on the left, the same as a ratio on the right. A fit without a fault scatters evenly about zero over every figure. A trend is drawn where one is flagged, within each hull; it holds the other figures as they are.`
  return markup`${figureOf(1, fitted, (size) => calibrationFitSvg(view, undefined, size))}${figureOf(
    2,
    left,
    (size) => calibrationResidualsSvg(view, undefined, size),
  )}`
}

/**
 * A calibration as a page to read, print and file.
 *
 * @param view  the calibration with its passages
 * @returns HTML that fetches nothing
 */
export function calibrationSheet(view: CalibrationView): string {
  const fit = chosenMethod(view)?.fit
  const body = markup`<main>${head(view)}${finding(view)}<p class="standing">${STANDING}</p><h2>1 What was measured</h2>${measured(view)}<h2>2 Methods</h2>${rankingTable(view)}<p class="found">${distinctionText(view)}</p><h2>3 Fit</h2>${figures(view)}<h2>4 Factor by hull</h2>${hullTable(fit)}<h2>5 Outliers</h2>${outliersTable(view)}<h2>6 Cautions</h2>${calibrationCautions(view)}<h2>7 Passages</h2>${passagesTable(view)}<div class="signature"><span>Checked by</span><span>Approved by</span><span>Date</span></div></main>`
  return page(`${view.name}: calibration of wave heights`, `${SHEET_STYLE}${CALIBRATION_STYLE}`, body)
}
