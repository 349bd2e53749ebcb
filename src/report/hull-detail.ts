import type { Advisory } from '../advisory/advise.ts'
import { COLOURS, label, straight, type Size } from './chart.ts'
import { kmh, length, metres } from './format.ts'
import { markup, type Markup } from './html.ts'
import { bedUnder } from './section-outline.ts'
import { levelMark } from './dimensions.ts'
import type { Situation } from '../advisory/situation.ts'

/** One height of the detail: where it is and what is written beside it. */
interface Height {
  /** m below the still water level */
  readonly depth: number
  readonly text: string
}

const WIDE_FIGURE = 300
const TALLEST = 150

/** Squat as it can be drawn, m: none where it is not known, and never deeper than the bed. */
export function drawnSquat({ decision, effects }: Advisory): number {
  const { section, vessel } = decision.situation
  return Number.isFinite(effects.squat) ? Math.min(effects.squat, section.depth - vessel.draught) : 0
}

function heightsOf(advisory: Advisory): Height[] {
  const { situation } = advisory.decision
  const { vessel, section } = situation
  const { squat, underKeelClearance } = advisory.effects
  const isAground = underKeelClearance < 0
  const heights: Height[] = [
    { depth: 0, text: 'still water level' },
    { depth: vessel.draught, text: `keel at rest: draught ${length(vessel.draught)}` },
  ]
  if (Number.isFinite(squat)) {
    const text = isAground ? 'keel under way: on the bed' : `keel under way: squat ${metres(squat)}`
    heights.push({ depth: vessel.draught + drawnSquat(advisory), text })
  }
  const clearance = Number.isFinite(underKeelClearance)
    ? `clearance ${isAground ? 'none' : metres(underKeelClearance)}`
    : 'clearance not known'
  heights.push({ depth: section.depth, text: `bed: depth ${length(section.depth)}, ${clearance}` })
  const { drawdown } = advisory.effects
  if (drawdown > 0) heights.push({ depth: drawdown, text: `drawn-down level: drawdown ${metres(drawdown)}` })
  return heights.sort((a, b) => a.depth - b.depth)
}

/** Heights of the labels, at least a line apart, each as near to its level as that allows. */
function spread(wanted: readonly number[], apart: number): number[] {
  const placed: number[] = []
  wanted.forEach((y, i) => placed.push(Math.max(y, i === 0 ? y : (placed[i - 1] ?? 0) + apart)))
  return placed
}

/** The hull over the bed, widths and heights at the same scale, with every height written beside it. */
export function hullDetail(
  advisory: Advisory,
  size: Size,
  top: number,
): { readonly content: Markup; readonly bottom: number } {
  const { situation } = advisory.decision
  const { vessel, section } = situation
  const heights = heightsOf(advisory)
  const room = size === 'wide' ? WIDE_FIGURE : 118
  const nearest = Math.min(...section.distances)
  const scale = Math.min(room / (2 * Math.min(0.75 * vessel.beam, nearest)), TALLEST / section.depth)
  const half = Math.min(room / (2 * scale), nearest)
  const first = top + 46
  const left = size === 'wide' ? 26 : 4
  const right = left + 2 * half * scale
  const y = (depth: number): number => first + depth * scale
  const x = (offset: number): number => left + (offset + half) * scale
  const figure = { situation, advisory, x, y, left, right, half, scale }
  const labels = spread(
    heights.map(({ depth }) => y(depth)),
    16,
  )
  const leader = right + 26
  const lines = heights.map(({ depth, text }, i) => {
    const at = labels[i] ?? 0
    return markup`<path d="M${right + 2} ${y(depth)}L${right + 8} ${y(depth)}L${leader - 8} ${at}L${leader - 2} ${at}" fill="none" stroke="${COLOURS.grey}" stroke-width="0.8"/>${label(leader, at + 4, text)}`
  })
  const isSafe = advisory.decision.outcome !== 'no-safe-speed'
  const at = isSafe ? 'the recommended maximum' : 'minimum steerage'
  const head = `Hull over the bed at ${at}, ${kmh(advisory.effects.speed)} through the water; one scale`
  const bottom = Math.max(y(section.depth) + 22, (labels.at(-1) ?? 0) + 14)
  return {
    content: markup`<g>${wrapHead(head, size, top)}${hullFigure(figure)}${lines}</g>`,
    bottom,
  }
}

function wrapHead(head: string, size: Size, top: number): Markup {
  if (size === 'wide') return label(4, top + 4, head, { isBold: true })
  const [first = '', second = ''] = head.split(', ', 2)
  return markup`${label(4, top - 4, first, { isBold: true })}${label(4, top + 11, second, { isBold: true })}`
}

interface Figure {
  readonly situation: Situation
  readonly advisory: Advisory
  readonly x: (offset: number) => number
  readonly y: (depth: number) => number
  readonly left: number
  readonly right: number
  readonly half: number
  readonly scale: number
}

function hullFigure({ situation, advisory, x, y, left, right, half, scale }: Figure): Markup {
  const { vessel } = situation
  const { drawdown } = advisory.effects
  const sunk = drawnSquat(advisory)
  const bed = bedUnder(situation, half).map(
    ([offset, depth]) => `${x(offset).toFixed(1)} ${y(depth).toFixed(1)}`,
  )
  const deck = y(0) - Math.min(24, Math.max(10, 0.25 * vessel.draught * scale))
  const outline = (by: number): string => {
    const [l, r, keel] = [x(-vessel.beam / 2), x(vessel.beam / 2), y(vessel.draught + by)]
    const bilge = Math.min(0.1 * vessel.beam * scale, 0.6 * vessel.draught * scale)
    return markup`M${l} ${deck}L${l} ${keel - bilge}Q${l} ${keel} ${l + bilge} ${keel}L${r - bilge} ${keel}Q${r} ${keel} ${r} ${keel - bilge}L${r} ${deck}`
      .text
  }
  const base = y(situation.section.depth) + 12
  return markup`<rect x="${left}" y="${y(0)}" width="${right - left}" height="${base - y(0)}" fill="${COLOURS.water}"/><path d="M${left} ${base}L${bed.join('L')}L${right} ${base}Z" fill="${COLOURS.bed}"/><path d="M${bed.join('L')}" fill="none" stroke="${COLOURS.ink}" stroke-width="1.4"/><path d="${outline(sunk)}Z" fill="#fff" stroke="${COLOURS.ink}" stroke-width="1.6"/>${
    sunk > 0 && markup`<path d="${outline(0)}" fill="none" stroke="${COLOURS.grey}" stroke-dasharray="3 3"/>`
  }${straight(left, y(0), right, y(0), { colour: COLOURS.blue, width: 1.3 })}${
    drawdown > 0 &&
    straight(left, y(drawdown), right, y(drawdown), { colour: COLOURS.blue, width: 1.3, dash: '5 3' })
  }${x(-vessel.beam / 2) - left > 14 && levelMark((left + x(-vessel.beam / 2)) / 2, y(0))}`
}
