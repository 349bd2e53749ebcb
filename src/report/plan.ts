import type { Advisory } from '../advisory/advise.ts'
import type { BankKind, Receptor } from '../domain/segment.ts'
import type { SegmentRecord } from '../store/registry.ts'
import {
  COLOURS,
  WIDTHS,
  arrowHead,
  curved,
  drawing,
  label,
  polygon,
  straight,
  type Point,
  type Size,
  type Stroke,
  type TextStyle,
} from './chart.ts'
import { chainage, cut, length } from './format.ts'
import { markup, type Markup } from './html.ts'
import { TakenPlaces } from './place.ts'
import { along, aside } from './plan-geometry.ts'
import { namedPoint, northArrow, scaleBar } from './plan-parts.ts'
import { sketchOf, shareOf, type Sketch } from './plan-sketch.ts'
import { BANK_KIND_NAMES, RECEPTOR_KIND_NAMES } from './words.ts'

/** Lines of the banks, told apart without colour. */
const BANK_STROKES: Readonly<Record<BankKind, Stroke>> = {
  unprotected: { colour: '#7a5c2e', width: 1.4 },
  reed: { colour: '#00704f', width: 2, dash: '6 3' },
  riprap: { colour: COLOURS.grey, width: 2.6, dash: '2 2' },
  wall: { colour: COLOURS.ink, width: 3 },
}

function channel({ left, right, line }: Sketch, advisory: Advisory): Markup {
  const { banks } = advisory.decision.situation.segment
  return markup`${polygon([...left, ...[...right].reverse()], { fill: COLOURS.water })}${curved(
    left,
    BANK_STROKES[banks[0].kind],
  )}${curved(right, BANK_STROKES[banks[1].kind])}${curved(line, { colour: COLOURS.blue, width: 1.4, dash: '9 3 2 3' })}`
}

/** An arrow beside the water that shows where it flows. */
function flow({ line, reach, height }: Sketch, width: number): { readonly mark: Markup; readonly at: Point } {
  const { at, course } = along(line, 0.5)
  const side = reach(0.5, 1) + 14
  const spots = [side, -reach(0.5, 0) - 14].map((distance) => aside(at, course, distance))
  const [x, y] = spots.find(([px, py]) => px > 50 && px < width - 50 && py > 20 && py < height - 24) ?? at
  const [cx, cy] = course
  const degrees = (Math.atan2(cx, -cy) * 180) / Math.PI
  const [x1, y1, x2, y2] = [x - cx * 22, y - cy * 22, x + cx * 22, y + cy * 22]
  const mark = markup`<g data-part="flow">${straight(x1, y1, x2, y2, { width: 1.6, colour: COLOURS.blue })}${arrowHead(x2 + cx * 4, y2 + cy * 4, degrees, 10, COLOURS.blue)}</g>`
  return { mark, at: [x, y] }
}

/** Points of the water that names keep off, px. */
function waterPoints({ line, left, right }: Sketch): Point[] {
  const steps = Array.from({ length: 61 }, (_, i) => i / 60)
  return [line, left, right].flatMap((own) => steps.map((share) => along(own, share).at))
}

interface Naming {
  readonly sketch: Sketch
  readonly taken: TakenPlaces
  readonly width: number
}

function name(
  { sketch, taken, width }: Naming,
  point: Point,
  text: string,
  towards: Point,
  style: TextStyle = {},
): Markup | undefined {
  return namedPoint(point, text, style, taken, { width, height: sketch.height - 34, towards })
}

/** From a place on the water to one beside it. */
const outward = ([x, y]: Point, [x0, y0]: Point): Point => [x - x0, y - y0]

/** A line across the water at a share of the length. */
function across({ line, reach }: Sketch, share: number, stroke: Stroke): readonly [Markup, Point, Point] {
  const { at, course } = along(line, share)
  const a = aside(at, course, -reach(share, 0) - 5)
  const b = aside(at, course, reach(share, 1) + 5)
  return [straight(a[0], a[1], b[0], b[1], stroke), a, b]
}

function ends(naming: Naming): Markup[] {
  const { sketch } = naming
  return ([0, 1] as const).map((share) => {
    const [mark, a, b] = across(sketch, share, { width: 1.2 })
    const text = chainage(share === 0 ? sketch.chainageFrom : sketch.chainageTo)
    return markup`${mark}${name(naming, a, text, outward(a, b), { isBold: true })}`
  })
}

/** Stations where something is known, and the one that governs, marked. */
function stations(naming: Naming, advisory: Advisory): Markup[] {
  const { sketch } = naming
  const { segment, station: governs } = advisory.decision.situation
  if (segment.stations.length < 2) return []
  return segment.stations.map((station) => {
    const share = shareOf(sketch, station.chainage)
    if (share === undefined) return markup``
    const isGoverning = station.index === governs.index
    if (station.isBetween && !isGoverning) return markup``
    const [mark, a, b] = across(
      sketch,
      share,
      isGoverning ? { colour: COLOURS.vermilion, width: 3 } : { colour: COLOURS.grey, width: 0.8 },
    )
    if (!isGoverning) return mark
    const text = `governs: ${chainage(station.chainage ?? 0)}, depth ${length(station.depth)}`
    return markup`<g data-part="governing-station">${mark}${name(naming, b, text, outward(b, a), { fill: '#9a3b00', isBold: true })}</g>`
  })
}

/** Most receptors that are named; the rest are in the table of criteria. */
const NAMED_RECEPTORS = 24

function receptorMark(naming: Naming, receptor: Receptor, index: number, firstSide: string): Markup {
  const { sketch } = naming
  const share = shareOf(sketch, receptor.chainage) ?? 0.5
  const { at, course } = along(sketch.line, share)
  const isFirst = receptor.side === 'left' || receptor.side === firstSide
  const distance = receptor.distance * sketch.pxPerMetreAcross
  const [x, y] = aside(at, course, isFirst ? -distance : distance)
  const text = cut(receptor.name ?? `${RECEPTOR_KIND_NAMES[receptor.kind]} ${index + 1}`, 40)
  const named = index < NAMED_RECEPTORS && name(naming, [x, y], text, outward([x, y], at))
  return markup`<g data-part="receptor"><path d="M${x} ${y - 5}L${x + 5} ${y}L${x} ${y + 5}L${x - 5} ${y}Z" fill="${COLOURS.orange}" stroke="${COLOURS.ink}"/>${named}</g>`
}

function bankKey(advisory: Advisory, size: Size, y: number): Markup {
  const { banks } = advisory.decision.situation.segment
  const step = WIDTHS[size] / 2
  return markup`${banks.map((bank, i) => {
    const x = size === 'wide' ? 250 + 235 * i : 4 + step * i
    return markup`${straight(x, y - 4, x + 24, y - 4, BANK_STROKES[bank.kind])}${label(x + 30, y, `${bank.side} bank: ${BANK_KIND_NAMES[bank.kind]}`, { size: size === 'wide' ? 12 : 11 })}`
  })}`
}

/** Sentences that a reader needs beside the plan. */
export function planNotes(record: SegmentRecord, advisory: Advisory): string[] {
  const { segment } = advisory.decision.situation
  const sketch = sketchOf(record, advisory, 'wide')
  const notes: string[] = ['The dash-dotted line is the sailing line, the arrow shows the flow.']
  if (sketch.exaggeration > 1) {
    notes.push(`Widths are drawn ${sketch.exaggeration} times too large for their length.`)
  }
  if (segment.stations.length < 2) notes.push('One section describes the whole segment.')
  if (segment.receptors.some(({ chainage: at }) => at === undefined)) {
    notes.push('Receptors without a chainage are drawn halfway along.')
  }
  return notes
}

function describe(record: SegmentRecord, advisory: Advisory, sketch: Sketch): string {
  const { segment, station } = advisory.decision.situation
  const governs =
    segment.stations.length > 1 && station.chainage !== undefined
      ? ` The station at ${chainage(station.chainage)} governs.`
      : ''
  return `Plan of the sailing line from ${chainage(sketch.chainageFrom)} to ${chainage(sketch.chainageTo)}, ${length(Math.round(record.length))} long, north up, with both banks and ${segment.receptors.length} receptors.${governs}`
}

/**
 * The segment in plan: sailing line, banks, flow, receptors and the station that governs.
 *
 * @param record    the segment as the registry holds it
 * @param advisory  the answer
 * @param size      the width that it is made for
 * @returns an SVG element
 */
export function planSvg(record: SegmentRecord, advisory: Advisory, size: Size = 'wide'): string {
  const sketch = sketchOf(record, advisory, size)
  const width = WIDTHS[size]
  const naming: Naming = { sketch, taken: new TakenPlaces(), width }
  naming.taken.take({ x: width - 34, y: 0, width: 34, height: 66 })
  const { segment } = advisory.decision.situation
  const arrow = flow(sketch, width)
  naming.taken.take({ x: arrow.at[0] - 26, y: arrow.at[1] - 16, width: 52, height: 32 })
  for (const [x, y] of waterPoints(sketch)) naming.taken.take({ x: x - 3, y: y - 3, width: 6, height: 6 })
  const keyRow = sketch.height + (size === 'wide' ? 0 : 24)
  return drawing(
    {
      width,
      height: keyRow + 8,
      id: `plan-${size}`,
      title: 'Plan of the segment',
      description: describe(record, advisory, sketch),
    },
    [
      channel(sketch, advisory),
      ends(naming),
      stations(naming, advisory),
      segment.receptors.map((receptor, i) => receptorMark(naming, receptor, i, segment.banks[0].side)),
      arrow.mark,
      northArrow(width - 18, 6),
      scaleBar(12, sketch.height - 6, sketch.pxPerMetre, width / (size === 'wide' ? 4 : 2.4)),
      bankKey(advisory, size, keyRow),
    ],
  ).text
}
