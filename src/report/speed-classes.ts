import { extent, ticks } from 'd3-array'
import type { OverviewRow } from './overview-rows.ts'

/** Segments that are drawn alike. */
export interface SpeedClass {
  readonly name: string
  readonly colour: string
  readonly width: number
  readonly dash?: string
  readonly holds: (row: OverviewRow) => boolean
}

/** From slow to fast: dark to light in grey as in colour, and thick to thin. */
const RAMP = [
  { colour: '#30123b', width: 8 },
  { colour: '#0b4f8a', width: 7 },
  { colour: '#1f83b4', width: 6 },
  { colour: '#2fa58c', width: 5 },
  { colour: '#8cb93b', width: 4 },
  { colour: '#d9a400', width: 3 },
] as const

const NONE = { colour: '#d55e00', width: 6, dash: '3 3' } as const
const NO_ANSWER = { colour: '#8a8a8a', width: 2, dash: '2 4' } as const

/** Classes of round speeds that hold every row, slowest first. */
export function classesOf(rows: readonly OverviewRow[]): SpeedClass[] {
  const speeds = rows.flatMap(({ speed }) => (speed === undefined ? [] : [speed]))
  const [least = 0, most = 0] = extent(speeds)
  const inner = ticks(least, most, RAMP.length - 1)
    .filter((tick) => tick > least && tick <= most)
    .slice(0, RAMP.length - 1)
  const edges = [-Infinity, ...inner, Infinity]
  const classes: SpeedClass[] =
    speeds.length === 0
      ? []
      : edges.slice(0, -1).map((from, i): SpeedClass => {
          const to = edges[i + 1] ?? Infinity
          const style = RAMP[Math.round((i * (RAMP.length - 1)) / Math.max(1, edges.length - 2))] ?? RAMP[0]
          return {
            name: nameOf(from, to, least),
            ...style,
            holds: ({ speed }) => speed !== undefined && speed >= from && speed < to,
          }
        })
  const has = (kind: OverviewRow['kind']): boolean => rows.some((row) => row.kind === kind)
  if (has('no-safe-speed')) {
    classes.push({ name: 'no safe speed', ...NONE, holds: ({ kind }) => kind === 'no-safe-speed' })
  }
  if (has('no-answer')) {
    classes.push({ name: 'no answer', ...NO_ANSWER, holds: ({ kind }) => kind === 'no-answer' })
  }
  return classes
}

function nameOf(from: number, to: number, least: number): string {
  if (from === -Infinity) return to === Infinity ? `${Math.floor(least)} and more` : `below ${to}`
  return to === Infinity ? `${from} and more` : `${from} to below ${to}`
}
