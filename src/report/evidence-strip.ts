import { scaleLinear, type ScaleLinear } from 'd3-scale'
import type { CriterionId } from '../advisory/criteria/criterion.ts'
import { SIGN_UNITS, toKmh } from '../domain/units.ts'
import type { Stretch } from '../limits/plan.ts'
import { COLOURS, WIDTHS, curved, drawing, label, straight, ticksApart, type Point } from './chart.ts'
import { nameRow, stretchRow } from './evidence-strip-labels.ts'
import type { Strip, StripSegment } from './evidence-strip-rows.ts'
import {
  CEILING_STYLES,
  CRITICAL_STYLE,
  LIMIT_STROKE,
  TODAY_STYLE,
  governingOf,
  hatchPattern,
  keptLine,
  type LineStyle,
} from './evidence-strip-style.ts'
import { stripTags } from './evidence-strip-tags.ts'
import type { EvidenceView } from './evidence-view.ts'
import { markup, type Markup, type Piece } from './html.ts'

/** Segments that a panel holds, so that each is wide enough to be read. */
export const MOST_SEGMENTS = 24

/** A part of a strip as it is drawn. */
export interface Panel {
  readonly segments: readonly StripSegment[]
  /** the whole strip at a glance: limits alone */
  readonly isOverview: boolean
}

export interface PanelScales {
  /** m along the waterway -> px, reading downstream */
  readonly along: ScaleLinear<number, number>
  /** m/s over ground -> px */
  readonly speed: (speed: number) => number
  readonly kmh: ScaleLinear<number, number>
  readonly left: number
  readonly right: number
  readonly top: number
  readonly bottom: number
}

/** A line of a panel: a speed for each segment, m/s; undefined where it has none. */
export interface PanelLine {
  readonly style: LineStyle
  readonly id: CriterionId | 'critical' | 'today'
  readonly values: readonly (number | undefined)[]
}

/** Parts of a strip that each hold so many segments at most, after a view of the whole where there are several. */
export function panelsOf({ segments }: Strip): Panel[] {
  const parts = Math.ceil(segments.length / MOST_SEGMENTS)
  const each = Math.ceil(segments.length / Math.max(1, parts))
  const panels = Array.from({ length: parts }, (_, i) => ({
    segments: segments.slice(i * each, (i + 1) * each),
    isOverview: false,
  }))
  return parts > 1 ? [{ segments, isOverview: true }, ...panels] : panels
}

const stretchOf = (view: EvidenceView, { stretch }: StripSegment): Stretch | undefined =>
  view.plan.stretches[stretch]

/** Highest speed that must be seen, m/s: limits, what is posted, and what governs each segment. */
function highestOf(view: EvidenceView, segments: readonly StripSegment[]): number {
  const shown = segments.flatMap((segment) => [
    stretchOf(view, segment)?.limitSpeed ?? 0,
    segment.posted ?? 0,
    segment.governing === undefined ? 0 : (segment.ceilings.get(segment.governing) ?? 0),
  ])
  const critical = Math.max(...segments.map((segment) => segment.critical ?? 0))
  const most = Math.max(...shown, 0.5)
  return Math.max(most, Math.min(critical, 1.6 * most))
}

function scalesOf(view: EvidenceView, panel: Panel, top: number): PanelScales {
  const { segments } = panel
  const hasSignAxis = view.rules.signUnit !== 'km/h'
  const [left, right] = [44, WIDTHS.wide - (hasSignAxis ? 40 : 8)]
  const bottom = top + (panel.isOverview ? 110 : 165)
  const ends = segments.flatMap(({ from, to }) => [from, to])
  const isFalling = segments.reduce((sum, { from, to }) => sum + to - from, 0) < 0
  const [least, most] = [Math.min(...ends), Math.max(...ends)]
  const along = scaleLinear(isFalling ? [most, least] : [least, most], [left, right])
  const kmh = scaleLinear([0, toKmh(highestOf(view, segments)) * 1.08], [bottom, top])
  return { along, kmh, speed: (speed) => kmh(toKmh(speed)), left, right, top, bottom }
}

function speedAxis(view: EvidenceView, { kmh, left, right, top, bottom }: PanelScales): Markup {
  const { signUnit } = view.rules
  const ticks = ticksApart(kmh, bottom - top, 26)
  const sign = scaleLinear(
    kmh.domain().map((value) => value / toKmh(SIGN_UNITS[signUnit])),
    [bottom, top],
  )
  const own =
    signUnit !== 'km/h' &&
    markup`${straight(right, top, right, bottom)}${ticksApart(sign, bottom - top, 26).map((tick) => [
      straight(right, sign(tick), right + 4, sign(tick)),
      label(right + 7, sign(tick) + 4, String(tick), { size: 11 }),
    ])}${label(right + 36, (top + bottom) / 2, signUnit, { anchor: 'middle', turn: -90, size: 11 })}`
  return markup`<g>${ticks.map((tick) => [
    straight(left, kmh(tick), right, kmh(tick), { colour: tick === 0 ? COLOURS.ink : COLOURS.faint }),
    label(left - 5, kmh(tick) + 4, String(tick), { anchor: 'end', size: 11 }),
  ])}${label(12, (top + bottom) / 2, 'km/h over ground', { anchor: 'middle', turn: -90, size: 11 })}${own}</g>`
}

function alongAxis({ waterway }: Strip, { along, left, right }: PanelScales, y: number): Markup {
  const km = along.copy().domain(along.domain().map((value) => value / 1000))
  const title =
    waterway === undefined
      ? 'km, segments side by side; downstream to the right'
      : 'chainage, km; downstream to the right'
  return markup`<g>${straight(left, y, right, y)}${ticksApart(km, right - left, 62).map((tick) => [
    straight(km(tick), y, km(tick), y + 5),
    label(km(tick), y + 16, String(tick).replace('-', '−'), { anchor: 'middle', size: 11 }),
  ])}${label(right, y + 31, `${title} →`, { anchor: 'end', size: 11 })}</g>`
}

/** Lines over the segments, with steps where two that touch both have a value. */
function stepped({ values }: PanelLine, segments: readonly StripSegment[], scales: PanelScales): Point[] {
  return segments.flatMap(({ from, to }, i): Point[] => {
    const value = values[i]
    const before = segments[i - 1]
    const touches = before !== undefined && Math.abs(before.to - from) < 1 && values[i - 1] !== undefined
    const gap: Point[] = touches ? [] : [[NaN, NaN]]
    if (value === undefined) return [[NaN, NaN]]
    const y = scales.speed(value)
    return [...gap, [scales.along(from), y], [scales.along(to), y]]
  })
}

function linesOf(strip: Strip, { segments, isOverview }: Panel): PanelLine[] {
  const today: PanelLine = {
    style: TODAY_STYLE,
    id: 'today',
    values: segments.map(({ posted }) => posted),
  }
  if (isOverview) return [today]
  return [
    { style: CRITICAL_STYLE, id: 'critical', values: segments.map(({ critical }) => critical) },
    ...governingOf(strip).map((id) => ({
      style: CEILING_STYLES[id],
      id,
      values: segments.map(({ ceilings }) => ceilings.get(id)),
    })),
    today,
  ]
}

/** The limit of each segment, with steps between neighbours. */
function limitLine(view: EvidenceView, segments: readonly StripSegment[], scales: PanelScales): Markup {
  const parts = segments.map((segment, i) => {
    const stretch = stretchOf(view, segment)
    if (stretch?.limitSpeed === undefined) return undefined
    const y = scales.speed(stretch.limitSpeed)
    const [x1, x2] = [scales.along(segment.from), scales.along(segment.to)]
    const before = segments[i - 1]
    const last = before && stretchOf(view, before)?.limitSpeed
    const step =
      before && last !== undefined && Math.abs(before.to - segment.from) < 1 && last !== stretch.limitSpeed
        ? straight(x1, scales.speed(last), x1, y, { width: 1.4 })
        : undefined
    const own = stretch.outcome === 'kept' ? keptLine(x1, y, x2) : straight(x1, y, x2, y, LIMIT_STROKE)
    return markup`${step}${own}`
  })
  return markup`<g data-line="limit">${parts}</g>`
}

function hatched(
  view: EvidenceView,
  segments: readonly StripSegment[],
  scales: PanelScales,
  hatch: string,
): Piece {
  return segments.map((segment) => {
    if (stretchOf(view, segment)?.outcome !== 'below-smallest-limit') return undefined
    const ends = [scales.along(segment.from), scales.along(segment.to)]
    const x = Math.min(...ends)
    return markup`<rect data-none="${String(segment.stretch)}" x="${x}" y="${scales.top}" width="${Math.max(...ends) - x}" height="${scales.bottom - scales.top}" fill="url(#${hatch})"/>`
  })
}

function describe(view: EvidenceView, { segments }: Panel): string {
  const numbers = [...new Set(segments.map(({ stretch }) => stretch))]
  const texts = numbers.map((index) => {
    const limit = view.plan.stretches[index]?.limit
    return `${index + 1}: ${limit ? `${limit.value} ${limit.unit}` : 'none'}`
  })
  return `Limits by stretch, from upstream. ${texts.join('; ')}.`
}

/**
 * A part of the plan along a waterway: limit, what is posted today, critical speed and the ceilings of the criteria that
 * govern.
 *
 * @param id  sets it apart from the other drawings of a page
 * @returns an SVG element
 */
export function stripPanelSvg(view: EvidenceView, strip: Strip, panel: Panel, id: string): string {
  const { segments, isOverview } = panel
  const scales = scalesOf(view, panel, 42)
  const lines = linesOf(strip, panel)
  const names = isOverview ? { content: markup``, height: 4 } : nameRow(segments, scales)
  const axis = scales.bottom + names.height
  const { left, right, top, bottom } = scales
  const content = [
    hatchPattern(`${id}-hatch`),
    markup`<clipPath id="${id}-field"><rect x="${left}" y="${top}" width="${right - left}" height="${bottom - top}"/></clipPath>`,
    hatched(view, segments, scales, `${id}-hatch`),
    speedAxis(view, scales),
    stretchRow(view, segments, scales),
    names.content,
    alongAxis(strip, scales, axis),
    markup`<g clip-path="url(#${id}-field)">${limitLine(view, segments, scales)}${lines.map((line) => markup`<g data-line="${line.id}">${curved(stepped(line, segments, scales), line.style.stroke)}</g>`)}</g>`,
    stripTags(view, lines, segments, scales),
  ]
  const title = isOverview ? 'The whole strip' : 'The plan along the waterway'
  const frame = { width: WIDTHS.wide, height: axis + 36, id, title, description: describe(view, panel) }
  return drawing(frame, content).text
}
