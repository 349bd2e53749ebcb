import { extent, mean } from 'd3-array'
import { bandSample, key, lineSample, noMethodSvg, trendSample, type KeyEntry } from './calibration-key.ts'
import { EDGE, markEntries, marksGroup, outlierNames, type Mark } from './calibration-marks.ts'
import {
  STRIP,
  panelAxes,
  panelsOf,
  type Figure,
  type Panel,
  type ResidualDrawing,
} from './calibration-panels.ts'
import {
  chosenMethod,
  factorOf,
  logResidual,
  measuredHulls,
  passageName,
  standingOf,
  type CalibrationPoint,
  type CalibrationView,
  type ChosenMethod,
} from './calibration-view.ts'
import {
  COLOURS,
  WIDTHS,
  curved,
  drawing,
  label,
  plated,
  straight,
  type Point,
  type Size,
  type Stroke,
} from './chart.ts'
import { figure } from './format.ts'
import { markup, type Markup, type Piece } from './html.ts'
import { fitted, textWidth } from './text-width.ts'
import { methodShortName } from './words.ts'

const BAND = '#e2e2e2'
const ZERO: Stroke = { colour: COLOURS.ink, width: 1.6 }
const TREND: Stroke = { colour: COLOURS.green, width: 2.6, dash: '8 4' }

const probability = (value: number): string =>
  Number.isFinite(value) ? (value < 0.001 ? 'p < 0.001' : `p = ${figure(value, 3)}`) : 'p unknown'

/** What the fit says of the trend, in words. */
function trendText({ trend }: Figure): string {
  if (!trend || !Number.isFinite(trend.slope)) return 'no trend can be told'
  const state = trend.isFlagged ? `trend, exponent ${figure(trend.slope, 2)}` : 'no trend flagged'
  return `${state}, ${probability(trend.pValue)}`
}

/** The trend through the middle of what counts of each hull: it is that within the hulls. */
function trendLines(panel: Panel, { view, method }: ResidualDrawing): Markup[] {
  const { trend, of } = panel.figure
  if (!trend?.isFlagged || !Number.isFinite(trend.slope)) return []
  return measuredHulls(view).flatMap((hull) => {
    const own = view.points.filter(
      (point) => point.hull === hull && standingOf(point, method) === 'counts' && of(point) > 0,
    )
    const middle = mean(own, (point) => Math.log(of(point)))
    const height = mean(own, (point) => logResidual(point, method))
    const [from, to] = extent(own, of)
    if (middle === undefined || height === undefined || from === undefined || from === to) return []
    const points = Array.from({ length: 31 }, (_, i): Point => {
      const value = from + ((to - from) * i) / 30
      return [panel.x(value), panel.y(height + trend.slope * (Math.log(value) - middle))]
    })
    return [markup`<g data-line="trend">${curved(points, TREND)}</g>`]
  })
}

function placed(panel: Panel, { view, method }: ResidualDrawing): Mark[] {
  const { y: top, height } = panel.field
  return view.points
    .filter((point) => Number.isFinite(panel.figure.of(point)))
    .map((point) => {
      const residual = logResidual(point, method)
      const own = residual === undefined ? top - STRIP / 2 - 4 : panel.y(residual)
      const beyond = residual === undefined ? undefined : own < top ? 0 : own > top + height ? 180 : undefined
      const y = beyond === undefined ? own : beyond === 0 ? top + EDGE : top + height - EDGE
      return { point, standing: standingOf(point, method), x: panel.x(panel.figure.of(point)), y, beyond }
    })
}

/** An outlier with how many times higher it is than the factor has it. */
function outlierText(point: CalibrationPoint, method: ChosenMethod): string {
  const residual = logResidual(point, method)
  const ratio = residual === undefined ? '' : ` ×${figure(Math.exp(residual), 2)}`
  return `${fitted(passageName(point), 100, 11)}${ratio}`
}

function panelContent(panel: Panel, parts: ResidualDrawing): Piece {
  const { x: left, y: top, width, height } = panel.field
  const scatter = parts.method.fit?.scatterLogSd ?? NaN
  const band =
    Number.isFinite(scatter) &&
    markup`<rect data-band="scatter" x="${left}" y="${panel.y(scatter)}" width="${width}" height="${panel.y(-scatter) - panel.y(scatter)}" fill="${BAND}"/>`
  const marks = placed(panel, parts)
  const words = trendText(panel.figure)
  const head = textWidth(words, 12.7) > width ? words.replace('trend, ', '') : words
  const headTop = parts.hasStrip ? top - STRIP - 10 : top - 8
  return markup`<g data-panel="${panel.figure.name}">${band}${panelAxes(panel, parts)}<clipPath id="${panel.id}"><rect x="${left}" y="${top}" width="${width}" height="${height}"/></clipPath><g clip-path="url(#${panel.id})">${straight(left, panel.y(0), left + width, panel.y(0), ZERO)}${trendLines(panel, parts)}</g>${marksGroup(parts.view, marks)}${plated(
    left,
    headTop,
    head,
    { isBold: panel.figure.trend?.isFlagged === true },
  )}${outlierNames(marks, panel.field, (point) => outlierText(point, parts.method))}</g>`
}

function entriesOf({ view, method }: ResidualDrawing, marks: readonly Mark[], hasTrend: boolean): KeyEntry[] {
  const { fit } = method
  const entries: KeyEntry[] = [
    {
      sample: lineSample(ZERO),
      text: fit ? `factor ${figure(factorOf(fit), 2)}` : 'no factor',
      note: 'above: higher waves',
    },
  ]
  if (fit && Number.isFinite(fit.scatterLogSd)) {
    entries.push({
      sample: bandSample(BAND),
      text: '± one scatter',
      note: `${figure(fit.scatterLogSd, 3)} of the logarithm`,
    })
  }
  if (hasTrend) {
    entries.push({ sample: trendSample(TREND), text: 'flagged trend', note: 'within each hull' })
  }
  return [...entries, ...markEntries(view, method.id, marks)]
}

function yTitle({ method, size }: ResidualDrawing, [first]: readonly Panel[]): Markup | undefined {
  if (!first) return undefined
  const { fit } = method
  const computed = fit ? `(${figure(factorOf(fit), 2)} × computed)` : 'computed'
  const text = `ln (measured / ${computed})`
  const { y, height } = first.field
  return size === 'wide'
    ? label(14, y + height / 2, text, { anchor: 'middle', turn: -90 })
    : label(2, 12, `${text}; ×: as a ratio`, { size: 11 })
}

/**
 * Logarithms of measured over computed height by a method with its factor: over the speed in km/h and over the distance
 * in m, and over the depth where a trend with it is flagged.
 *
 * @param view      the calibration
 * @param methodId  a method; the recommended one when left out
 * @param size      the width that it is made for
 * @returns an SVG element
 */
export function calibrationResidualsSvg(
  view: CalibrationView,
  methodId?: string,
  size: Size = 'wide',
): string {
  const method = chosenMethod(view, methodId)
  if (!method) return noMethodSvg(`calibration-residuals-${size}`, 'Residuals', size)
  const hasStrip = view.points.some((point) => logResidual(point, method) === undefined)
  const parts: ResidualDrawing = { view, method, size, hasStrip }
  const panels = panelsOf(parts)
  const last = panels.at(-1)
  const bottom = last ? last.field.y + last.field.height + 46 : 46
  const hasTrend = panels.some((panel) => trendLines(panel, parts).length > 0)
  const entries = entriesOf(parts, panels[0] ? placed(panels[0], parts) : [], hasTrend)
  const legend = key(entries, { x: 4, y: bottom + 6, width: WIDTHS[size] - 6 }, size === 'wide' ? 3 : 2)
  return drawing(
    {
      width: WIDTHS[size],
      height: legend.bottom + 4,
      id: `calibration-residuals-${size}`,
      title: `Residuals of ${methodShortName(method.id)}`,
      description: `What the factor leaves over: ${panels.map((panel) => `over ${panel.figure.name}, ${trendText(panel.figure)}`).join('; ')}.`,
    },
    [yTitle(parts, panels), panels.map((panel) => panelContent(panel, parts)), legend.content],
  ).text
}
