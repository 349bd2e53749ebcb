import { scaleLinear, type ScaleLinear } from 'd3-scale'
import { recommended, type InputSwing, type Sensitivity } from '../advisory/sensitivity.ts'
import type { Decision } from '../advisory/decide.ts'
import type { UncertainField } from '../advisory/uncertainty.ts'
import { toKmh } from '../domain/units.ts'
import { COLOURS, drawing, label, straight, ticksApart } from './chart.ts'
import { figure, kmh } from './format.ts'
import { markup, type Markup } from './html.ts'

const WIDTH = 346
/** Where the bars may run, px; labels of their ends stand outside. */
const PLOT = [134, 308] as const
const TOP = 28
const ROW = 26
const BAR = 9
const SMALL = 11

export const FIELD_NAMES: Readonly<Record<UncertainField, string>> = {
  depth_m: 'Depth',
  width_m: 'Width',
  bank_distance_m: 'Bank distance',
  draught_m: 'Draught',
  current_mps: 'Current',
  wave_height: 'Wave height',
}

const UNITS: Readonly<Record<UncertainField, string>> = {
  depth_m: ' m',
  width_m: ' m',
  bank_distance_m: ' m',
  draught_m: ' m',
  current_mps: ' m/s',
  wave_height: '',
}

/** An input at one end of its uncertainty. */
function endText(field: UncertainField, value: number): string {
  return field === 'wave_height' ? `× ${figure(value, 2)}` : figure(value, 2)
}

function spreadText({ field, low, high }: InputSwing): string {
  if (field === 'wave_height') return `÷ or × ${figure(Math.sqrt(high / low), 2)}`
  return `${figure((low + high) / 2, 2)} ± ${figure((high - low) / 2, 2)}${UNITS[field]}`
}

/** Speed that a bar ends at, m/s; undefined where there is no safe speed. */
const speedOf = (decision: Decision | undefined): number | undefined => recommended(decision) || undefined

interface Scale {
  readonly speed: ScaleLinear<number, number>
  readonly base: number
}

function scaleOf({ base, inputs }: Sensitivity, marks: readonly number[]): Scale {
  const all = inputs.flatMap(({ atLow, atHigh }) => [speedOf(atLow), speedOf(atHigh)])
  const found = [...all, speedOf(base), ...marks].filter((speed) => speed !== undefined).map(toKmh)
  // no input may make any speed safe: bars of nothing then stand on an axis all the same
  const [least, most] = found.length > 0 ? [Math.min(...found), Math.max(...found)] : [0, 1]
  const room = Math.max(0.15, 0.08 * (most - least))
  const speed = scaleLinear([Math.max(0, least - room), most + room], [...PLOT])
  return { speed, base: speed(toKmh(recommended(base))) }
}

/** A bar from the answer as given to the answer at one end, with the input there. */
function bar(
  { speed, base }: Scale,
  field: UncertainField,
  end: { readonly value: number; readonly decision: Decision | undefined },
  y: number,
  fill: string,
): Markup {
  const own = speedOf(end.decision)
  const start = Math.max(base, PLOT[0])
  const x = own === undefined ? PLOT[0] : speed(toKmh(own))
  const [left, right] = [Math.min(start, x), Math.max(start, x)]
  const value = endText(field, end.value)
  const text = own === undefined ? `${value}: none` : value
  const isRight = x >= start && own !== undefined
  const place = isRight ? right + 4 : left - 4
  const isInside = !isRight && own === undefined
  return markup`<rect x="${left}" y="${y}" width="${Math.max(right - left, 0.5)}" height="${BAR}" fill="${fill}" stroke="${COLOURS.ink}" stroke-width="0.8"/>${
    isInside
      ? label(right + 4, y + BAR - 1, text, { size: SMALL })
      : label(place, y + BAR - 1, text, { size: SMALL, anchor: isRight ? 'start' : 'end', hasHalo: true })
  }`
}

function row(scale: Scale, input: InputSwing, y: number, hatch: string): Markup {
  const { field, low, high, atLow, atHigh } = input
  return markup`<g data-input="${field}">${label(0, y + 9, FIELD_NAMES[field], { size: SMALL, isBold: true })}${label(0, y + 21, spreadText(input), { size: SMALL })}${bar(scale, field, { value: low, decision: atLow }, y, `url(#${hatch})`)}${bar(scale, field, { value: high, decision: atHigh }, y + BAR + 1.5, '#8fa9bd')}</g>`
}

function axis({ speed }: Scale, bottom: number): Markup {
  return markup`<g>${straight(PLOT[0], bottom, PLOT[1], bottom)}${ticksApart(
    speed,
    PLOT[1] - PLOT[0],
    44,
  ).map((tick) => {
    const x = speed(tick)
    return [
      straight(x, TOP - 4, x, bottom, { colour: COLOURS.faint }),
      straight(x, bottom, x, bottom + 4),
      x < PLOT[1] - 4 && label(x, bottom + 15, String(tick), { anchor: 'middle', size: SMALL }),
    ]
  })}${label(WIDTH, bottom + 15, 'km/h', { anchor: 'end', size: SMALL })}</g>`
}

/** The limit and the answer as given, as lines through all rows. */
function marksThrough(scale: Scale, limit: number | undefined, bottom: number): Markup {
  const at = limit === undefined ? undefined : scale.speed(toKmh(limit))
  return markup`${straight(scale.base, TOP - 6, scale.base, bottom, { width: 1.6 })}${
    at !== undefined && straight(at, TOP - 6, at, bottom, { width: 1.6, dash: '7 3' })
  }`
}

/**
 * How far each uncertain input, alone, moves the answer of a cell: largest first.
 *
 * @param sensitivity  n ≥ 1 inputs
 * @param limit        over ground, m/s
 * @param id           sets it apart from the other drawings of a page
 * @returns an SVG element
 */
export function tornadoSvg(sensitivity: Sensitivity, limit: number | undefined, id: string): string {
  const { base, inputs } = sensitivity
  const scale = scaleOf(sensitivity, limit === undefined ? [] : [limit])
  const bottom = TOP + ROW * inputs.length
  const hatch = `${id}-low`
  const isSafe = base.outcome !== 'no-safe-speed'
  const answer = isSafe ? kmh(base.overGround) : 'no safe speed'
  const [first] = inputs
  const most = first ? `${FIELD_NAMES[first.field]} moves it most.` : ''
  const description = `The recommended maximum is ${answer} at the inputs as given. ${most}`
  const pattern = markup`<pattern id="${hatch}" width="4" height="4" patternUnits="userSpaceOnUse" patternTransform="rotate(45)"><rect width="4" height="4" fill="#fff"/><rect width="1.5" height="4" fill="${COLOURS.ink}"/></pattern>`
  const key = [
    markup`<rect x="0" y="2" width="16" height="9" fill="url(#${hatch})" stroke="${COLOURS.ink}" stroke-width="0.8"/>`,
    label(20, 11, 'input low', { size: SMALL }),
    markup`<rect x="78" y="2" width="16" height="9" fill="#8fa9bd" stroke="${COLOURS.ink}" stroke-width="0.8"/>`,
    label(98, 11, 'high', { size: SMALL }),
    straight(134, 7, 152, 7, { width: 1.6 }),
    label(156, 11, `as given${isSafe ? `, ${answer}` : ''}`, { size: SMALL }),
    limit !== undefined && straight(276, 7, 296, 7, { width: 1.6, dash: '7 3' }),
    limit !== undefined && label(300, 11, 'limit', { size: SMALL }),
  ]
  const content = [
    pattern,
    key,
    axis(scale, bottom),
    marksThrough(scale, limit, bottom),
    inputs.map((input, i) => row(scale, input, TOP + ROW * i, hatch)),
  ]
  const frame = { width: WIDTH, height: bottom + 20, id, title: 'Sensitivity of the answer', description }
  return drawing(frame, content).text
}
