import { scaleLinear, type ScaleLinear } from 'd3-scale'
import type { Advisory } from '../advisory/advise.ts'
import type { Situation } from '../advisory/situation.ts'
import {
  COLOURS,
  WIDTHS,
  drawing,
  label,
  labelBox,
  polygon,
  straight,
  type Point,
  type Size,
} from './chart.ts'
import { levelMark, lengthAcross, lengthDown } from './dimensions.ts'
import { length, metres } from './format.ts'
import { drawnSquat, hullDetail } from './hull-detail.ts'
import { markup, type Markup } from './html.ts'
import { sectionOutline } from './section-outline.ts'
import { fitted } from './text-width.ts'
import { BANK_KIND_NAMES } from './words.ts'

/** Vertical exaggerations a drawing may have. */
const EXAGGERATIONS = [1, 1.5, 2, 3, 4, 5, 8, 10, 15, 20, 25, 40, 50, 80, 100, 200, 400, 1000] as const

/** Height that the water takes at least, px. */
const WATER_HEIGHT: Readonly<Record<Size, number>> = { wide: 84, narrow: 76 }

interface Section {
  readonly situation: Situation
  readonly advisory: Advisory
  readonly x: ScaleLinear<number, number>
  /** depth below the still water level, m -> px */
  readonly y: ScaleLinear<number, number>
  readonly exaggeration: number
  readonly left: number
  readonly right: number
  readonly deepest: number
}

const TOP = 92

/** Scales with the smallest exaggeration at which the water is tall enough to read. */
function sectionAt(advisory: Advisory, size: Size): Section {
  const { situation } = advisory.decision
  const outline = sectionOutline(situation)
  const [from, to] = [outline.left, outline.right]
  const [left, right] = [size === 'wide' ? 26 : 14, WIDTHS[size] - (size === 'wide' ? 26 : 14)]
  const across = (right - left) / (to - from)
  const exaggeration =
    EXAGGERATIONS.find((factor) => factor * across * outline.deepest >= WATER_HEIGHT[size]) ?? 1000
  const x = scaleLinear([from, to], [left, right])
  const y = scaleLinear([0, outline.deepest], [TOP, TOP + across * exaggeration * outline.deepest])
  return { situation, advisory, x, y, exaggeration, left, right, deepest: outline.deepest }
}

/** Names of the banks: sides as they are known. */
function bankTitle(situation: Situation, index: 0 | 1): string {
  const bank = situation.segment.banks[index]
  const side = `${bank.side.charAt(0).toUpperCase()}${bank.side.slice(1)} bank`
  return `${side}: ${BANK_KIND_NAMES[bank.kind]}`
}

function water({ situation, x, y, deepest, left, right }: Section): Markup {
  const outline = sectionOutline(situation)
  const bed = outline.points.map(([offset, depth]): Point => [x(offset), y(depth)])
  const base = y(deepest) + 14
  const wet = outline.wet.map(([offset, depth]): Point => [x(offset), y(depth)])
  return markup`${polygon([[left, base], ...bed, [right, base]], { fill: COLOURS.bed })}${polygon(wet, {
    fill: COLOURS.water,
  })}${straight(left, base, right, base, { colour: COLOURS.faint })}<path d="${`M${bed
    .map(([px, py]) => `${px.toFixed(1)} ${py.toFixed(1)}`)
    .join('L')}`}" fill="none" stroke="${COLOURS.ink}" stroke-width="1.4" stroke-linejoin="round"/>`
}

/** The hull from its bilge to a little above the water, sunk by the squat where it is known. */
function hull({ situation, advisory, x, y, exaggeration }: Section): Markup {
  const { beam, draught } = situation.vessel
  const sunk = drawnSquat(advisory)
  const keel = y(draught + sunk)
  const deck = Math.max(y(sunk) - Math.max(8, Math.min(20, 0.35 * (keel - y(sunk)))), TOP - 24)
  const [l, r] = [x(-beam / 2), x(beam / 2)]
  const bilge = Math.min(0.12 * beam * (x(1) - x(0)), (keel - deck) / 3)
  const rise = Math.min(bilge * exaggeration, (keel - deck) / 3)
  return markup`<path d="M${l} ${deck}L${l} ${keel - rise}Q${l} ${keel} ${l + bilge} ${keel}L${r - bilge} ${keel}Q${r} ${keel} ${r} ${keel - rise}L${r} ${deck}Z" fill="#fff" stroke="${COLOURS.ink}" stroke-width="1.6"/>`
}

/** Still water and the level drawn down between hull and banks. */
function levels({ situation, advisory, x, y }: Section): Markup {
  const { section, vessel } = situation
  const [l, r] = [x(-section.distances[0]), x(section.distances[1])]
  const half = vessel.beam / 2
  const still = straight(l, y(0), r, y(0), { colour: COLOURS.blue, width: 1.3 })
  const down = ([0, 1] as const).map((index) => {
    const { drawdown } = advisory.effects.banks[index]
    if (!Number.isFinite(drawdown) || drawdown <= 0) return undefined
    const [a, b] = index === 0 ? [l, x(-half)] : [x(half), r]
    return straight(a, y(drawdown), b, y(drawdown), { colour: COLOURS.blue, width: 1.3, dash: '5 3' })
  })
  return markup`${still}${down}`
}

function bankLabels({ situation }: Section, size: Size): Markup {
  const width = WIDTHS[size]
  const most = width / 2 - 20
  return markup`${label(4, 14, fitted(bankTitle(situation, 0), most, 12), { isBold: true })}${label(
    width - 4,
    14,
    fitted(bankTitle(situation, 1), most, 12),
    { isBold: true, anchor: 'end' },
  )}`
}

/** Width and distances above the water, written between their ends. */
function acrossDimensions({ situation, x }: Section): Markup {
  const [a, b] = situation.section.distances
  const { beam } = situation.vessel
  const [l, m, r] = [x(-a), x(0), x(b)]
  return markup`${lengthAcross(l, r, 30, `width ${length(a + b)}`)}${straight(m, 42, m, TOP + 6, {
    dash: '8 2 2 2',
    colour: COLOURS.grey,
  })}${lengthAcross(l, m, 50, length(a))}${lengthAcross(m, r, 50, length(b))}${x(beam) - x(0) > 70 && lengthAcross(x(-beam / 2), x(beam / 2), 68, `beam ${length(beam)}`)}`
}

function depthDimension({ situation, x, y, deepest }: Section): Markup {
  const { section, vessel } = situation
  const side = section.distances[0] >= section.distances[1] ? -1 : 1
  const at = x(side * (vessel.beam / 2 + 0.3 * (section.distances[side === -1 ? 0 : 1] - vessel.beam / 2)))
  const mark = levelMark(at, y(0))
  const text = `depth at the sailing line ${length(section.depth)}`
  const isRight = side === -1
  const box = labelBox(0, 0, text)
  const room = isRight ? x(-vessel.beam / 2) - at : at - x(vessel.beam / 2)
  const shown = room > box.width + 10 ? text : length(section.depth)
  return markup`${mark}${lengthDown(at, y(0), y(Math.min(section.depth, deepest)), shown, isRight ? 'start' : 'end')}`
}

function describe({ situation, advisory, exaggeration }: Section): string {
  const { section, vessel } = situation
  const { effects } = advisory
  const [a, b] = situation.segment.banks
  const clearance = effects.underKeelClearance < 0 ? 'none' : metres(effects.underKeelClearance)
  return `Water ${length(section.width)} wide and ${length(section.depth)} deep at the sailing line, seen downstream. ${a.side} bank at ${length(section.distances[0])}, ${b.side} bank at ${length(section.distances[1])}. Hull ${length(vessel.beam)} wide with a draught of ${length(vessel.draught)}, squat ${metres(effects.squat)}, clearance ${clearance}, drawdown ${metres(effects.drawdown)}. Heights are drawn ${exaggeration} times as large as widths.`
}

/** Sentences that a reader needs beside the drawing. */
export function sectionNotes(advisory: Advisory): string[] {
  const { situation } = advisory.decision
  const notes: string[] = []
  const { section, segment, station } = situation
  notes.push(
    station.shape.kind === 'profile'
      ? 'The bed is the surveyed profile.'
      : `The section is a trapezoid${section.isSlopeReduced ? ' with side slopes reduced so that the bottom keeps a quarter of the width' : ''}; it gives the area and the mean depth, and never lowers the depth at the sailing line.`,
  )
  const isSided = segment.banks[0].side === 'left'
  if (!isSided && section.distances[0] !== section.distances[1]) {
    notes.push('On which side the nearer bank lies is not recorded: it is drawn on the left.')
  } else if (isSided) notes.push('Left and right are seen looking downstream.')
  if (segment.confinement === 'open') notes.push('Taken as open water: no return current and no drawdown.')
  return notes
}

/**
 * The wetted section with the hull in it, and the hull over the bed at an equal scale.
 *
 * @param advisory  the answer; squat and drawdown are those of its speed
 * @param size      the width that it is made for
 * @returns an SVG element
 */
export function crossSectionSvg(advisory: Advisory, size: Size = 'wide'): string {
  const section = sectionAt(advisory, size)
  const base = section.y(section.deepest) + 14
  const scale =
    section.exaggeration === 1
      ? 'Heights and widths at the same scale'
      : `Heights drawn ${section.exaggeration} times as large as widths`
  const detail = hullDetail(advisory, size, base + 40)
  return drawing(
    {
      width: WIDTHS[size],
      height: detail.bottom,
      id: `section-${size}`,
      title: 'Cross-section with the hull',
      description: describe(section),
    },
    [
      water(section),
      levels(section),
      hull(section),
      acrossDimensions(section),
      depthDimension(section),
      bankLabels(section, size),
      label(4, base + 16, scale, { size: 11, fill: COLOURS.grey }),
      detail.content,
    ],
  ).text
}
