import { COLOURS, curved, label, straight } from './chart.ts'
import type { StripSegment } from './evidence-strip-rows.ts'
import type { PanelScales } from './evidence-strip.ts'
import type { EvidenceView } from './evidence-view.ts'
import { numberOf } from './evidence-words.ts'
import { markup, type Markup } from './html.ts'
import { spread } from './spread.ts'
import { fitted, textWidth } from './text-width.ts'

const SMALL = 11
/** Longest name that stands upright, px. */
const LONGEST = 96

/** Segments of one stretch that follow one another on a panel, px. */
interface Run {
  readonly stretch: number
  readonly from: number
  readonly to: number
}

function runsOf(segments: readonly StripSegment[], { along }: PanelScales): Run[] {
  const runs: Run[] = []
  for (const { stretch, from, to } of segments) {
    const last = runs.at(-1)
    if (last?.stretch === stretch) runs[runs.length - 1] = { ...last, to: along(to) }
    else runs.push({ stretch, from: along(from), to: along(to) })
  }
  return runs
}

function limitOf(view: EvidenceView, index: number): string {
  const stretch = view.plan.stretches[index]
  if (!stretch?.limit) return 'none'
  const { value, unit } = stretch.limit
  const own = unit === view.rules.signUnit ? String(value) : `${value} ${unit}`
  return stretch.outcome === 'kept' ? `${own} kept` : own
}

/** Numbers of the stretches with their limits above the field, each with a line to its stretch. */
export function stretchRow(
  view: EvidenceView,
  segments: readonly StripSegment[],
  scales: PanelScales,
): Markup {
  const { top, bottom, left, right } = scales
  const runs = runsOf(segments, scales)
  const texts = runs.map(({ stretch }) => [numberOf(stretch), limitOf(view, stretch)] as const)
  const places = spread(
    runs.map(({ from, to }, i) => {
      const [number = '', limit = ''] = texts[i] ?? []
      const width = Math.max(textWidth(number, SMALL), textWidth(limit, 12) * 1.06)
      return { at: (from + to) / 2, width, weight: Math.abs(to - from) }
    }),
    [left + 4, right],
    5,
  )
  const heads = [
    label(0, 12, 'Stretch', { size: SMALL, fill: COLOURS.grey }),
    label(0, 26, view.rules.signUnit, { size: SMALL, isBold: true }),
  ]
  return markup`<g>${heads}${runs.map(({ from, to }, i) => {
    const x = places[i]
    const [number = '', limit = ''] = texts[i] ?? []
    const edges = [from, to].map((edge) =>
      straight(edge, top, edge, bottom, { colour: '#9a9a9a', width: 0.7 }),
    )
    if (x === undefined) return edges
    return [
      edges,
      curved(
        [
          [x, 30],
          [(from + to) / 2, top],
        ],
        { colour: '#9a9a9a', width: 0.7 },
      ),
      label(x, 12, number, { anchor: 'middle', size: SMALL, fill: COLOURS.grey }),
      label(x, 26, limit, { anchor: 'middle', isBold: true }),
    ]
  })}</g>`
}

/** Names of the segments below the field: level where all have room, else upright. */
export function nameRow(
  segments: readonly StripSegment[],
  scales: PanelScales,
): { readonly content: Markup; readonly height: number } {
  const { along, bottom, left, right } = scales
  const places = segments.map(({ name, from, to }) => {
    const ends = [along(from), along(to)]
    return { name, from: Math.min(...ends), to: Math.max(...ends) }
  })
  const edges = places.flatMap(({ from, to }) => [
    straight(from, bottom, from, bottom + 5),
    straight(to, bottom, to, bottom + 5),
  ])
  const isLevel = places.every(({ name, from, to }) => textWidth(name, SMALL) < to - from - 4)
  if (isLevel) {
    const names = places.map(({ name, from, to }) =>
      label((from + to) / 2, bottom + 17, name, { anchor: 'middle', size: SMALL }),
    )
    return { content: markup`<g>${edges}${names}</g>`, height: 26 }
  }
  const texts = places.map(({ name }) => fitted(name, LONGEST, SMALL))
  const middles = spread(
    places.map(({ from, to }) => ({ at: (from + to) / 2, width: 13, weight: to - from })),
    [left, right],
    1,
  )
  const names = places.map(({ from, to }, i) => {
    const x = middles[i]
    if (x === undefined) return undefined
    return [
      curved(
        [
          [(from + to) / 2, bottom + 2],
          [x, bottom + 13],
        ],
        { colour: '#9a9a9a', width: 0.7 },
      ),
      label(x + 4, bottom + 16, texts[i] ?? '', { anchor: 'end', turn: -90, size: SMALL }),
    ]
  })
  const longest = Math.max(...texts.map((text) => textWidth(text, SMALL)))
  return { content: markup`<g>${edges}${names}</g>`, height: 24 + longest }
}
