import { max } from 'd3-array'
import { scaleLinear, type ScaleLinear } from 'd3-scale'
import { currentAlong } from '../advisory/direction.ts'
import type { Decision } from '../advisory/decide.ts'
import { toKmh } from '../domain/units.ts'
import { COLOURS, label, plated, straight, ticksApart, type Size } from './chart.ts'
import { markup, type Markup } from './html.ts'
import type { Samples, Series } from './speed-samples.ts'

/** Where the parts of the speed curve lie, px. */
export interface Layout {
  readonly size: Size
  readonly left: number
  readonly right: number
  readonly top: number
  readonly bottom: number
}

export interface Scales {
  /** m/s through the water -> px */
  readonly speed: ScaleLinear<number, number>
  /** m -> px */
  readonly height: ScaleLinear<number, number>
  /** m/s to add for the speed over ground */
  readonly current: number
  /** last speed shown, m/s */
  readonly topSpeed: number
}

/** The largest figure of a series that counts. */
function largest({ values, counts }: Series): number {
  return max(values.filter((value, i) => Number.isFinite(value) && counts?.[i] !== false)) ?? 0
}

/** Scales that hold every figure that counts and every limit; what lies outside the range of its method may run over. */
export function scalesOf(samples: Samples, decision: Decision, layout: Layout): Scales {
  const topSpeed = samples.speeds.at(-1) ?? 1
  const series: Series[] = [...samples.methods, samples.wave, samples.stern]
  if (samples.governing) series.push(samples.governing)
  const limits = samples.limits.filter(({ isConstant }) => isConstant).map(largest)
  const highest = Math.max(...series.map(largest), ...limits.map((limit) => limit * 1.15), 0.05)
  return {
    speed: scaleLinear([0, topSpeed], [layout.left, layout.right]),
    height: scaleLinear([0, highest], [layout.bottom, layout.top]).nice(5),
    current: currentAlong(decision.situation.conditions, decision.direction),
    topSpeed,
  }
}

/** Height of the wave axis with its lines across the drawing. */
export function heightAxis(scales: Scales, layout: Layout): Markup {
  const { left, right, top, bottom, size } = layout
  const ticks = ticksApart(scales.height, bottom - top, 44)
  const decimals = Math.max(...ticks.map((tick) => String(tick).split('.')[1]?.length ?? 0))
  const title =
    size === 'wide'
      ? label(14, (top + bottom) / 2, 'Wave height at the nearer bank, m', { anchor: 'middle', turn: -90 })
      : label(2, 12, 'Wave height at the nearer bank, m', { size: 11 })
  return markup`<g>${ticks.map((tick) => {
    const y = scales.height(tick)
    return [
      straight(left, y, right, y, { colour: tick === 0 ? COLOURS.ink : COLOURS.faint }),
      label(left - 6, y + 4, tick.toFixed(decimals), { anchor: 'end' }),
    ]
  })}${title}</g>`
}

/** Speed axes below one another: over ground in km/h and, unless left out, through the water in m/s. */
export function speedAxes(scales: Scales, layout: Layout, y: number, hasWater = true): Markup {
  const { left, right, size } = layout
  const { speed, current, topSpeed } = scales
  const ground = scaleLinear([toKmh(current), toKmh(topSpeed + current)], [left, right])
  const water = speed.copy()
  const length = right - left
  const tick = (x: number, text: string, top: number): Markup[] => [
    straight(x, top, x, top + 5),
    plated(x, top + 17, text, { anchor: 'middle' }),
  ]
  const unit = (text: string, top: number): Markup =>
    size === 'wide'
      ? label(right + 14, top + 17, text)
      : label((left + right) / 2, top + 31, text, { anchor: 'middle', size: 11 })
  const second = y + (size === 'wide' ? 26 : 40)
  const inWater =
    hasWater &&
    markup`${straight(left, second, right, second, { colour: COLOURS.grey })}${ticksApart(water, length, 56).map((value) => tick(water(value), String(value), second))}${unit('m/s through the water', second)}`
  return markup`<g>${straight(left, y, right, y)}${ticksApart(ground, length, 56)
    .filter((value) => value >= 0)
    .map((value) => tick(ground(value), String(value), y))}${unit('km/h over ground', y)}${inWater}</g>`
}
