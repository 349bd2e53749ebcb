import { extent } from 'd3-array'
import { scaleLinear, type ScaleLinear } from 'd3-scale'
import type { Trend } from '../calibration/measurement.ts'
import { toKmh } from '../domain/units.ts'
import {
  logResidual,
  standingOf,
  type CalibrationPoint,
  type CalibrationView,
  type ChosenMethod,
  type Standing,
} from './calibration-view.ts'
import { COLOURS, WIDTHS, label, straight, ticksApart, type Size } from './chart.ts'
import { figure } from './format.ts'
import { markup, type Markup } from './html.ts'
import type { Box } from './place.ts'

/** Height of the strip for passages without a computed height, px. */
export const STRIP = 20

/** A figure that residuals are drawn over. */
export interface Figure {
  readonly name: 'speed' | 'distance' | 'depth'
  readonly title: string
  /** in the unit of the title */
  readonly of: (point: CalibrationPoint) => number
  readonly trend: Trend | undefined
}

function figuresOf({ fit }: ChosenMethod): Figure[] {
  const trend = fit?.trend
  const all: Figure[] = [
    {
      name: 'speed',
      title: 'Speed through the water, km/h',
      of: ({ speed }) => toKmh(speed),
      trend: trend?.speed,
    },
    {
      name: 'distance',
      title: 'Gauge to sailing line, m',
      of: ({ distance }) => distance,
      trend: trend?.distance,
    },
    { name: 'depth', title: 'Depth, m', of: ({ depth }) => depth, trend: trend?.depth },
  ]
  return all.filter(({ name, trend: own }) => name !== 'depth' || own?.isFlagged === true)
}

export interface Panel {
  readonly figure: Figure
  readonly field: Box
  readonly id: string
  readonly x: ScaleLinear<number, number>
  readonly y: ScaleLinear<number, number>
  readonly isFirst: boolean
  readonly isLast: boolean
}

export interface ResidualDrawing {
  readonly view: CalibrationView
  readonly method: ChosenMethod
  readonly size: Size
  readonly hasStrip: boolean
}

/** Extent of figures with a margin on both sides; of one alone, some room about it. */
function widened(values: readonly number[], share: number): [number, number] {
  const [least = 0, most = 1] = extent(values.filter(Number.isFinite))
  const margin = most > least ? share * (most - least) : Math.max(0.1 * Math.abs(most), 0.1)
  return [least - margin, most + margin]
}

/** An outlier that would make the axis longer than so many times what the others need lies beyond it. */
const LONGEST = 1.8

/** Residuals that the axis holds: those that count, zero, the band, and outliers that leave the others their room. */
function residualDomain({ view, method }: ResidualDrawing): [number, number] {
  const of = (standing: Standing): number[] =>
    view.points.flatMap((point) => {
      const residual = standingOf(point, method) === standing ? logResidual(point, method) : undefined
      return residual === undefined ? [] : [residual]
    })
  const scatter = method.fit?.scatterLogSd ?? 0
  const least = Math.max(0.12, Number.isFinite(scatter) ? 1.3 * scatter : 0)
  const needed = widened([-least, least, ...of('counts')], 0.12)
  const span = needed[1] - needed[0]
  const outliers = of('outlier')
  const whole = widened([...needed, ...outliers], 0.05)
  if (whole[1] - whole[0] <= LONGEST * span) return whole
  // room for the marks that stand for what lies beyond
  const isBelow = outliers.some((residual) => residual < needed[0])
  const isAbove = outliers.some((residual) => residual > needed[1])
  return [needed[0] - (isBelow ? 0.15 * span : 0), needed[1] + (isAbove ? 0.15 * span : 0)]
}

/** Panels beside one another on a desk, below one another on a phone. */
export function panelsOf(parts: ResidualDrawing): Panel[] {
  const { view, method, size, hasStrip } = parts
  const figures = figuresOf(method)
  const isWide = size === 'wide'
  const [left, end, gap] = isWide ? [62, 48, 18] : [44, 46, 0]
  const total = WIDTHS[size] - left - end
  const width = isWide ? (total - gap * (figures.length - 1)) / figures.length : total
  const height = isWide ? 260 : 190
  const top = (isWide ? 26 : 44) + (hasStrip ? STRIP + 4 : 0)
  const domain = residualDomain(parts)
  return figures.map((own, i) => {
    const field = {
      x: isWide ? left + i * (width + gap) : left,
      y: isWide ? top : top + i * (height + 66 + (hasStrip ? STRIP + 4 : 0)),
      width,
      height,
    }
    return {
      figure: own,
      field,
      id: `calibration-residuals-${size}-${own.name}`,
      x: scaleLinear(widened(view.points.map(own.of), 0.05), [field.x, field.x + width]),
      y: scaleLinear(domain, [field.y + height, field.y]),
      isFirst: i === 0 || !isWide,
      isLast: i === figures.length - 1 || !isWide,
    }
  })
}

/** Decimals that the ticks of an axis need. */
const decimalsOf = (ticks: readonly number[]): number =>
  Math.max(0, ...ticks.map((tick) => String(Number(tick.toPrecision(6))).split('.')[1]?.length ?? 0))

/** Axes, frame and strip of a panel. */
export function panelAxes(panel: Panel, { hasStrip }: ResidualDrawing): Markup {
  const { x: left, y: top, width, height } = panel.field
  const [right, bottom] = [left + width, top + height]
  const up = ticksApart(panel.y, height, 34)
  const across = ticksApart(panel.x, width, 46)
  const [upDecimals, acrossDecimals] = [decimalsOf(up), decimalsOf(across)]
  const rows = up.map((tick) => {
    const y = panel.y(tick)
    return [
      straight(left, y, right, y, { colour: COLOURS.faint }),
      panel.isFirst && label(left - 6, y + 4, figure(tick, upDecimals), { anchor: 'end' }),
      panel.isLast && label(right + 6, y + 4, `×${figure(Math.exp(tick), 2)}`, { fill: COLOURS.grey }),
    ]
  })
  const columns = across.map((tick) => [
    straight(panel.x(tick), bottom, panel.x(tick), bottom + 5),
    label(panel.x(tick), bottom + 18, figure(tick, acrossDecimals), { anchor: 'middle' }),
  ])
  const strip =
    hasStrip &&
    markup`<rect x="${left}" y="${top - STRIP - 4}" width="${width}" height="${STRIP}" fill="#f1f1f1" stroke="${COLOURS.faint}"/>${panel.isFirst && label(left - 6, top - 10, 'none', { anchor: 'end', size: 11, fill: COLOURS.grey })}`
  return markup`<g>${rows}${columns}${strip}<rect x="${left}" y="${top}" width="${width}" height="${height}" fill="none" stroke="${COLOURS.grey}"/>${label(
    left + width / 2,
    bottom + 38,
    panel.figure.title,
    { anchor: 'middle' },
  )}</g>`
}
