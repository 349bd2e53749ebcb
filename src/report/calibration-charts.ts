import { extent } from 'd3-array'
import { scaleLog, type ScaleLogarithmic } from 'd3-scale'
import { bandSample, key, lineSample, noMethodSvg, type KeyEntry } from './calibration-key.ts'
import { EDGE, markEntries, marksGroup, hullStroke, outlierNames, type Mark } from './calibration-marks.ts'
import {
  chosenMethod,
  computedHeight,
  passageName,
  standingOf,
  type CalibrationView,
  type ChosenMethod,
} from './calibration-view.ts'
import { COLOURS, WIDTHS, drawing, label, polygon, straight, type Size, type Stroke } from './chart.ts'
import { figure } from './format.ts'
import { markup, type Markup } from './html.ts'
import type { Box } from './place.ts'
import { fitted } from './text-width.ts'
import { methodShortName } from './words.ts'

export { calibrationResidualsSvg } from './calibration-residuals.ts'

const ONE: Stroke = { colour: COLOURS.ink, width: 1, dash: '4 3' }
const FACTOR: Stroke = { colour: COLOURS.ink, width: 2 }
const BAND = '#cfcfcf'
/** Width of the strip for passages without a computed height, px. */
const STRIP = 22

interface FitDrawing {
  readonly view: CalibrationView
  readonly method: ChosenMethod
  readonly size: Size
  /** the square of the heights, px */
  readonly field: Box
  readonly hasStrip: boolean
  /** m -> px */
  readonly x: ScaleLogarithmic<number, number>
  readonly y: ScaleLogarithmic<number, number>
}

/** Least and greatest height, m, of what was measured and of what counts, with a margin. */
function heightDomain({ points }: CalibrationView, method: ChosenMethod): [number, number] {
  const { id, fit } = method
  const heights = points.flatMap((point) => {
    const own = standingOf(point, method) !== 'out-of-range' ? computedHeight(point, id) : undefined
    return own === undefined ? [point.measured] : [point.measured, own]
  })
  const isDrawable = (height: number): boolean => Number.isFinite(height) && height > 0
  const [least = 0.1, most = 1] = extent(heights.filter(isDrawable))
  const margin = Math.max(1.18, fit === undefined ? 1.5 : 1, Math.sqrt(2.5 / (most / least)))
  return [least / margin, most * margin]
}

function fitDrawing(view: CalibrationView, method: ChosenMethod, size: Size): FitDrawing {
  const hasStrip = view.points.some((point) => computedHeight(point, method.id) === undefined)
  const left = (size === 'wide' ? 58 : 40) + (hasStrip ? STRIP + 4 : 0)
  const top = size === 'wide' ? 10 : 24
  const side = size === 'wide' ? 484 - left : WIDTHS.narrow - 10 - left
  const domain = heightDomain(view, method)
  return {
    view,
    method,
    size,
    field: { x: left, y: top, width: side, height: side },
    hasStrip,
    x: scaleLog(domain, [left, left + side]),
    y: scaleLog(domain, [top + side, top]),
  }
}

const ROUND = [[1, 1.2, 1.5, 2, 2.5, 3, 4, 5, 6, 8], [1, 1.5, 2, 3, 5, 7], [1, 2, 5], [1, 3], [1]] as const

/** Round heights in a domain, the most that stand apart. */
function roundHeights(scale: ScaleLogarithmic<number, number>, apart: number): number[] {
  const [from = 1, to = 1] = scale.domain()
  const powers: number[] = []
  for (let power = Math.floor(Math.log10(from)); power <= Math.log10(to); power += 1) powers.push(power)
  for (const leads of ROUND) {
    const all = powers
      .flatMap((power) => leads.map((lead) => Number(`${lead}e${power}`)))
      .filter((height) => height >= from && height <= to)
    const isApart = all.every(
      (height, i) => i === 0 || Math.abs(scale(height) - scale(all[i - 1] ?? 0)) >= apart,
    )
    if (isApart) return all
  }
  return []
}

function axes({ method, size, field, hasStrip, x, y }: FitDrawing): Markup {
  const { x: left, y: top, width, height } = field
  const [right, bottom] = [left + width, top + height]
  const start = hasStrip ? left - STRIP - 4 : left
  const across = roundHeights(x, 34)
    .filter((value) => !hasStrip || x(value) > left + 14)
    .map((value) => [
      straight(x(value), top, x(value), bottom, { colour: COLOURS.faint }),
      label(x(value), bottom + 17, String(value), { anchor: 'middle' }),
    ])
  const up = roundHeights(y, 24).map((value) => [
    straight(left, y(value), right, y(value), { colour: COLOURS.faint }),
    label(start - 6, y(value) + 4, String(value), { anchor: 'end' }),
  ])
  const name = `Computed wave height by ${methodShortName(method.id)}, m`
  const own = size === 'wide' ? 12 : 11
  const strip =
    hasStrip &&
    markup`<rect x="${start}" y="${top}" width="${STRIP}" height="${height}" fill="#f1f1f1" stroke="${COLOURS.faint}"/>${label(start + STRIP / 2, bottom + 17, 'none', { anchor: 'middle', size: 11, fill: COLOURS.grey })}`
  const measured =
    size === 'wide'
      ? label(14, top + height / 2, 'Measured wave height, m', { anchor: 'middle', turn: -90 })
      : label(2, 12, 'Measured wave height, m', { size: 11 })
  return markup`<g>${across}${up}${strip}<rect x="${left}" y="${top}" width="${width}" height="${height}" fill="none" stroke="${COLOURS.grey}"/>${measured}${label(
    left + width / 2,
    bottom + 37,
    fitted(name, width + 60, own),
    { anchor: 'middle', size: own },
  )}</g>`
}

const isFactor = (value: number): boolean => Number.isFinite(value) && value > 0

function lines({ method, size, field, x, y }: FitDrawing): Markup {
  const [from = 1, to = 1] = x.domain()
  const through = (factor: number, stroke: Stroke): Markup | undefined =>
    isFactor(factor) ? straight(x(from), y(from * factor), x(to), y(to * factor), stroke) : undefined
  const { fit } = method
  const [low, high] = fit?.interval ?? [NaN, NaN]
  const band =
    isFactor(low) &&
    isFactor(high) &&
    polygon(
      [
        [x(from), y(from * low)],
        [x(to), y(to * low)],
        [x(to), y(to * high)],
        [x(from), y(from * high)],
      ],
      { fill: BAND },
    )
  const id = `calibration-fit-${size}-field`
  return markup`<clipPath id="${id}"><rect x="${field.x}" y="${field.y}" width="${field.width}" height="${field.height}"/></clipPath><g clip-path="url(#${id})"><g data-line="band">${band}</g><g data-line="one-to-one">${through(1, ONE)}</g>${(
    fit?.byHull ?? []
  ).map((own) =>
    through(own.factor, hullStroke(own.hull)),
  )}<g data-line="factor">${fit && through(fit.factor, FACTOR)}</g></g>`
}

/** Passages at their places; what has no computed height lies in the strip, what runs over lies on the edge. */
function placed({ view, method, field, x, y }: FitDrawing): Mark[] {
  return view.points
    .filter(({ measured }) => measured > 0 && Number.isFinite(measured))
    .map((point) => {
      const height = computedHeight(point, method.id)
      const own = height === undefined ? field.x - STRIP / 2 - 4 : x(height)
      const [from, to] = [field.x, field.x + field.width]
      const beyond = height === undefined ? undefined : own < from ? 270 : own > to ? 90 : undefined
      const across = beyond === undefined ? own : beyond === 90 ? to - EDGE : from + EDGE
      return { point, standing: standingOf(point, method), x: across, y: y(point.measured), beyond }
    })
}

const intervalNote = ([low, high]: readonly [number, number]): { readonly note?: string } =>
  isFactor(low) && isFactor(high) ? { note: `95 %: ${figure(low, 2)} to ${figure(high, 2)}` } : {}

function lineEntries({ method }: FitDrawing): KeyEntry[] {
  const { fit } = method
  const entries: KeyEntry[] = [{ sample: lineSample(ONE), text: 'as published, 1 : 1' }]
  if (!fit || !isFactor(fit.factor))
    return [...entries, { sample: () => markup``, text: 'no factor was found' }]
  const [low, high] = fit.interval
  entries.unshift({
    sample: isFactor(low) && isFactor(high) ? bandSample(BAND, FACTOR) : lineSample(FACTOR),
    text: `common factor ${figure(fit.factor, 2)}`,
    ...intervalNote(fit.interval),
  })
  const hulls = fit.byHull.filter(({ factor }) => isFactor(factor))
  return [
    ...entries,
    ...hulls.map(({ hull, factor, interval }): KeyEntry => ({
      sample: lineSample(hullStroke(hull)),
      text: `${hull} ${figure(factor, 2)}`,
      ...intervalNote(interval),
    })),
  ]
}

function describe({ view, method }: FitDrawing): string {
  const { fit } = method
  const factor = fit
    ? `The common factor is ${figure(fit.factor, 2)}, 95 % interval ${figure(fit.interval[0], 2)} to ${figure(fit.interval[1], 2)}.`
    : 'The method has no factor.'
  return `${view.points.length} measured passages against the height by ${methodShortName(method.id)}, both axes logarithmic. ${factor} Shapes stand for hulls, open crossed marks for outliers.`
}

/**
 * Measured against computed wave height of a method, both logarithmic, with the line 1 : 1, that of the factor and its
 * 95 % band.
 *
 * @param view      the calibration
 * @param methodId  a method; the recommended one when left out
 * @param size      the width that it is made for
 * @returns an SVG element
 */
export function calibrationFitSvg(view: CalibrationView, methodId?: string, size: Size = 'wide'): string {
  const method = chosenMethod(view, methodId)
  if (!method) return noMethodSvg(`calibration-fit-${size}`, 'Measured against computed wave height', size)
  const own = fitDrawing(view, method, size)
  const { field } = own
  const bottom = field.y + field.height + 44
  const marks = placed(own)
  const entries = [...lineEntries(own), ...markEntries(view, method.id, marks)]
  const beside = { x: 506, y: field.y, width: WIDTHS.wide - 510 }
  const below = { x: 4, y: bottom + 6, width: WIDTHS.narrow - 6 }
  const legend = size === 'wide' ? key(entries, beside) : key(entries, below, 2)
  return drawing(
    {
      width: WIDTHS[size],
      height: Math.max(bottom, legend.bottom + 4),
      id: `calibration-fit-${size}`,
      title: `Measured against computed wave height, ${methodShortName(method.id)}`,
      description: describe(own),
    },
    [
      axes(own),
      lines(own),
      marksGroup(view, marks),
      outlierNames(marks, field, (point) => fitted(passageName(point), 130, 11)),
      legend.content,
    ],
  ).text
}
