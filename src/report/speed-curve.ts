import type { Advisory } from '../advisory/advise.ts'
import type { Curve } from '../advisory/curve.ts'
import { COLOURS, WIDTHS, curved, drawing, straight, type Point, type Size } from './chart.ts'
import { criteriaBars } from './criteria-bars.ts'
import { kmh } from './format.ts'
import { markup, type Markup } from './html.ts'
import { TakenPlaces } from './place.ts'
import { heightAxis, scalesOf, speedAxes, type Layout, type Scales } from './speed-axes.ts'
import { keyHeight, speedKey } from './speed-key.ts'
import { LETTERS, lineColour, limitLabels, tagOf, topLabels, type TopMark } from './speed-labels.ts'
import { criticalBand, samplesOf, type Samples, type Series } from './speed-samples.ts'

/** Height of the field of the curves, px. */
const FIELD: Readonly<Record<Size, number>> = { wide: 290, narrow: 250 }

/** How a curve stands on its page. */
export interface CurvePlace {
  /** sets it apart from the other curves of a page */
  readonly id?: string
  /** a low field with the key in single lines and no bars of criteria, for pages that have a table of them, and speeds over ground alone; wide only */
  readonly isBrief?: boolean
  /** a speed through the water to mark beside the recommended one, m/s */
  readonly marked?: { readonly speed: number; readonly text: string } | undefined
}

/** Height of the field of a brief curve, px. */
const BRIEF_FIELD = 150

function layoutOf(size: Size, marks: number, samples: Samples, isBrief: boolean): Layout {
  const top = (size === 'wide' ? 10 : 26) + 16 * marks
  const least = isBrief ? BRIEF_FIELD : FIELD.wide
  return size === 'wide'
    ? { size, left: 52, right: 512, top, bottom: top + Math.max(least, keyHeight(samples, isBrief)) }
    : { size, left: 34, right: WIDTHS.narrow - 10, top, bottom: top + FIELD.narrow }
}

const pointsOf = (samples: Samples, scales: Scales, values: readonly number[]): Point[] =>
  samples.speeds.map((speed, i) => [scales.speed(speed), scales.height(values[i] ?? NaN)])

/** A jump of a line at an edge between methods, px. */
const JUMP = 0.5

/** The same, broken where it jumps. */
function brokenPoints(samples: Samples, scales: Scales, values: readonly number[]): Point[] {
  return pointsOf(samples, scales, values).flatMap((point, i, all): Point[] => {
    const before = all[i - 1]
    const isJump = before && point[0] - before[0] < 1e-3 && Math.abs(point[1] - before[1]) > JUMP
    return isJump ? [[NaN, NaN], point] : [point]
  })
}

/** A series that counts in part: whole where it does, dashed elsewhere, meeting at the edges. */
function inTwoParts(samples: Samples, scales: Scales, series: Series, colour: string): Markup[] {
  const all = pointsOf(samples, scales, series.values)
  const isIn = (i: number): boolean => series.counts?.[i] === true
  const inside = all.map((point, i): Point => (isIn(i) ? point : [NaN, NaN]))
  const outside = all.map((point, i): Point => (isIn(i) ? [NaN, NaN] : point))
  return [curved(outside, { colour, width: 1.2, dash: '4 3' }), curved(inside, { colour, width: 1.8 })]
}

/** Speeds that are marked by a line through the whole drawing. */
function marksOf({ decision }: Advisory, scales: Scales, marked: CurvePlace['marked']): TopMark[] {
  const { situation, outcome, speed, overGround } = decision
  const { criticalSpeed } = situation.setting
  const critical: TopMark = {
    speed: criticalSpeed,
    text: `Critical speed ${kmh(criticalSpeed + scales.current)}`,
    stroke: { colour: COLOURS.grey, dash: '2 2' },
  }
  const main: TopMark[] =
    outcome === 'no-safe-speed'
      ? [
          {
            speed: situation.vessel.minSteerageSpeed,
            text: `No safe speed: steers from ${kmh(situation.vessel.minSteerageSpeed + scales.current)}`,
            stroke: { width: 2, dash: '7 3' },
            isBold: true,
          },
        ]
      : [
          {
            speed,
            text: `Recommended maximum ${kmh(overGround)}`,
            stroke: { colour: COLOURS.ink, width: 2 },
            isBold: true,
            isMain: true,
          },
        ]
  const own: TopMark[] = marked ? [{ ...marked, stroke: { width: 2, dash: '7 3' }, isBold: true }] : []
  return [...own, ...main, critical].filter((mark) => mark.speed <= scales.topSpeed)
}

/** Through the field, and again through the bars: the axes between them stay clear. */
function markLines(
  marks: readonly TopMark[],
  scales: Scales,
  layout: Layout,
  [from, to]: readonly [number, number],
): Markup[] {
  return marks.map((mark, i) => {
    const x = scales.speed(mark.speed)
    const top = layout.top - 15 - 16 * (marks.length - 1 - i)
    const at = mark.isMain === true ? 'recommended' : 'mark'
    return markup`<g data-mark="${at}">${straight(x, top, x, layout.bottom, mark.stroke)}${to > from && straight(x, from, x, to, mark.stroke)}</g>`
  })
}

function shading(advisory: Advisory, scales: Scales, layout: Layout): Markup | undefined {
  const band = criticalBand(advisory.decision.situation, scales.topSpeed)
  if (!band) return undefined
  const x = scales.speed(band[0])
  return markup`<rect data-band="critical" x="${x}" y="${layout.top}" width="${scales.speed(band[1]) - x}" height="${layout.bottom - layout.top}" fill="#000" fill-opacity="0.09"/>`
}

function fieldOf(samples: Samples, scales: Scales, layout: Layout, id: string): Markup {
  const { left, right, top, bottom } = layout
  const wave = brokenPoints(samples, scales, samples.wave.values)
  const stern = brokenPoints(samples, scales, samples.stern.values)
  const taken = new TakenPlaces()
  const lines = [wave, stern, ...samples.methods.map(({ values }) => pointsOf(samples, scales, values))]
  const limits = limitLabels(samples, scales, layout, taken, lines)
  const tagged: [Series, string, string][] = [
    [samples.stern, 'S', COLOURS.ink],
    [samples.wave, 'W', COLOURS.ink],
    ...samples.methods.map((method, i): [Series, string, string] => [
      method,
      LETTERS[i] ?? '',
      lineColour(i),
    ]),
  ]
  if (samples.governing) tagged.push([samples.governing, 'G', COLOURS.ink])
  const others = tagged.map(([series]) => series)
  return markup`<clipPath id="${id}-field"><rect x="${left}" y="${top}" width="${right - left}" height="${bottom - top}"/></clipPath><g clip-path="url(#${id}-field)">${[
    curved(wave, { colour: '#c9c9c9', width: 9 }),
    samples.methods.map((method, i) => inTwoParts(samples, scales, method, lineColour(i))),
    curved(stern, { width: 3.4 }),
    curved(stern, { colour: '#fff', width: 1.4 }),
    samples.governing &&
      curved(brokenPoints(samples, scales, samples.governing.values), { width: 2, dash: '9 3 2 3' }),
    limits.lines,
  ]}</g>${limits.labels}${tagged.map(([series, letter, colour]) =>
    tagOf({ series, others, samples, scales, layout, letter, colour, taken }),
  )}`
}

function describe(advisory: Advisory): string {
  const { decision } = advisory
  const { setting, conditions } = decision.situation
  const answer =
    decision.outcome === 'no-safe-speed'
      ? 'No speed is safe.'
      : `The recommended maximum is ${kmh(decision.overGround)} over ground.`
  const current = conditions.current === 0 ? '' : ' Speeds over ground are those in the current.'
  return `Wave height at the nearer bank over the speed of the vessel by ${advisory.waveMethods.length} methods, with the limits on waves, and the speed at which each criterion is first reached. ${answer} The critical speed is ${kmh(setting.criticalSpeed)} through the water.${current}`
}

/**
 * Wave heights over speed with every limit, and below them the speed at which each criterion is first reached.
 *
 * @param curve     points of the decision of the advisory
 * @param advisory  the answer that it belongs to
 * @param size      the width that it is made for
 * @param place     how it stands on its page
 * @returns an SVG element
 */
export function speedCurveSvg(
  curve: Curve,
  advisory: Advisory,
  size: Size = 'wide',
  place: CurvePlace = {},
): string {
  const { isBrief = false, marked } = place
  const samples = samplesOf(curve, advisory)
  const id = `${place.id ?? 'speed-curve'}-${size}`
  const provisional = layoutOf(size, 2, samples, isBrief)
  const marks = marksOf(advisory, scalesOf(samples, advisory.decision, provisional), marked)
  const layout = layoutOf(size, marks.length, samples, isBrief)
  const scales = scalesOf(samples, advisory.decision, layout)
  const axes = layout.bottom + (isBrief ? 26 : size === 'wide' ? 54 : 82)
  const bars = isBrief
    ? { content: markup``, bottom: axes - 8 }
    : criteriaBars(advisory, scales, layout, axes + 8)
  const key = speedKey(samples, advisory, layout, bars.bottom + 14, isBrief)
  const height = size === 'wide' ? bars.bottom + 6 : key.bottom + 4
  const content = [
    shading(advisory, scales, layout),
    heightAxis(scales, layout),
    markLines(marks, scales, layout, isBrief ? [0, 0] : [axes + 24, bars.bottom]),
    fieldOf(samples, scales, layout, id),
    topLabels(marks, scales, layout),
    speedAxes(scales, layout, layout.bottom, !isBrief),
    bars.content,
    key.content,
  ]
  return drawing(
    {
      width: WIDTHS[size],
      height,
      id,
      title: isBrief ? 'Wave height over speed' : 'Wave height and criteria over speed',
      description: describe(advisory),
    },
    content,
  ).text
}
