import type { MethodDescription, RangeRule } from './method.ts'
import { QUANTITIES, type Quantity } from './quantity.ts'
import type { Setting } from './setting.ts'

/** Speeds (from, to], m/s, over which the same methods count; bit i of `active` stands for method i of the list. */
export interface Band {
  readonly from: number
  readonly to: number
  readonly active: number
}

/** Which methods of a family count at which speeds, from rest to Infinity without a hole. */
export interface Bands {
  readonly list: readonly Band[]
  /** speeds at which each method is in range; undefined where it never is for this vessel here */
  readonly intervals: readonly (SpeedInterval | undefined)[]
  /** no method is ever in range for this vessel here: those out of range count in place of none */
  readonly isOutOfRange: boolean
  /** speeds within bands at which a law that can be computed steps down, m/s */
  readonly steps?: readonly number[]
}

/** What keeps a method from counting at a speed. */
export interface Outside {
  readonly quantity: string
  readonly value: number | string
  readonly min?: number | undefined
  readonly max?: number | undefined
}

/** A method of a family, with whether it can be computed for this vessel at all. */
interface Candidate extends MethodDescription {
  hasCoefficients?(setting: Setting): boolean
  stepSpeed?(setting: Setting): number
}

const binds = (rule: RangeRule, setting: Setting): boolean => rule.hulls?.includes(setting.hull) ?? true

function fits(method: Candidate, setting: Setting): boolean {
  return (
    method.hulls.includes(setting.hull) &&
    (method.channels?.includes(setting.isConfined ? 'confined' : 'open') ?? true) &&
    (setting.isInland || method.isInlandOnly !== true)
  )
}

/** The largest double below a positive one: a bound that is inclusive from below becomes exclusive. */
const justBelow = (x: number): number => x * (1 - Number.EPSILON / 2)

/** Speeds (from, to], m/s. */
export interface SpeedInterval {
  readonly from: number
  readonly to: number
}

/** Speed above which a quantity that rises with speed keeps to the lower bound of a rule. */
function lowerSpeed({ min }: RangeRule, quantity: Quantity, setting: Setting): number {
  return min === undefined ? 0 : justBelow(quantity.speedAt?.(setting, min) ?? Infinity)
}

/** Speed up to which it keeps to the upper bound; one that levels off at its bound keeps to it. */
function upperSpeed({ max }: RangeRule, quantity: Quantity, setting: Setting): number {
  if (max === undefined || quantity.at(setting, Infinity) <= max) return Infinity
  return quantity.speedAt?.(setting, max) ?? Infinity
}

/** Speeds at which a method is in range by its own bounds; undefined when it never is for this vessel here. */
export function speedInterval(method: Candidate, setting: Setting): SpeedInterval | undefined {
  if (!fits(method, setting) || method.hasCoefficients?.(setting) === false) return undefined
  let from = 0
  let to = Infinity
  for (const rule of method.range) {
    if (!binds(rule, setting)) continue
    const quantity = QUANTITIES[rule.quantity]
    if (quantity.speedAt) {
      from = Math.max(from, lowerSpeed(rule, quantity, setting))
      to = Math.min(to, upperSpeed(rule, quantity, setting))
    } else {
      const value = quantity.at(setting, 0)
      if (value < (rule.min ?? -Infinity) || value > (rule.max ?? Infinity)) return undefined
    }
  }
  return from < to ? { from, to } : undefined
}

/** Bits of the methods that can be computed, for want of any in range: those made for the hull and channel, else all. */
function fallback(methods: readonly Candidate[], setting: Setting, excluded: number): number {
  let all = 0
  let fitting = 0
  methods.forEach((method, i) => {
    if (method.hasCoefficients?.(setting) === false || (excluded & (1 << i)) !== 0) return
    all |= 1 << i
    if (fits(method, setting)) fitting |= 1 << i
  })
  return fitting || all
}

/**
 * Speeds at which each method of a family counts.
 *
 * @param methods    n methods, n ≤ 31
 * @param setting    the vessel in its section
 * @param preferred  bits of the methods asked for: where one of them is in range, only they count; 0 asks for none
 * @param excluded   bits of the methods that do not count at any speed; default none
 * @returns bands in rising order, the first from 0, the last to Infinity, adjacent bands touching
 * @holds any setting
 */
export function bandsOf(
  methods: readonly Candidate[],
  setting: Setting,
  preferred: number,
  excluded = 0,
): Bands {
  const intervals: (SpeedInterval | undefined)[] = []
  const edges = [0, Infinity]
  const speeds: number[] = []
  for (let i = 0; i < methods.length; i += 1) {
    const method = methods[i] as Candidate
    const found = (excluded & (1 << i)) === 0 ? speedInterval(method, setting) : undefined
    intervals.push(found)
    if (found) edges.push(found.from, found.to)
    const step = method.stepSpeed?.(setting)
    if (step !== undefined) speeds.push(step)
  }
  const isOutOfRange = edges.length === 2
  const list = isOutOfRange
    ? [{ from: 0, to: Infinity, active: fallback(methods, setting, excluded) }]
    : bandsBetween(edges, intervals, preferred)
  return speeds.length > 0
    ? { list, intervals, isOutOfRange, steps: speeds }
    : { list, intervals, isOutOfRange }
}

/** Puts a few numbers in rising order, where they are: a general sort costs more than all the rest of the bands. */
function sortFew(numbers: number[]): void {
  for (let i = 1; i < numbers.length; i += 1) {
    const number = numbers[i] as number
    let at = i
    for (; at > 0 && (numbers[at - 1] as number) > number; at -= 1) numbers[at] = numbers[at - 1] as number
    numbers[at] = number
  }
}

/** Bands between edges in any order, repeated ones among them. */
function bandsBetween(
  edges: number[],
  intervals: readonly (SpeedInterval | undefined)[],
  preferred: number,
): Band[] {
  sortFew(edges)
  const list: Band[] = []
  let from = 0
  for (const to of edges) {
    if (to === from) continue
    let active = 0
    for (let i = 0; i < intervals.length; i += 1) {
      const found = intervals[i]
      if (found && found.from <= from && found.to >= to) active |= 1 << i
    }
    list.push({ from, to, active: (active & preferred) === 0 ? active : active & preferred })
    from = to
  }
  return list
}

/** Whether a method is in range at a speed, > 0. */
export function isInRange(bands: Bands, index: number, speed: number): boolean {
  const found = bands.intervals[index]
  return found !== undefined && speed > found.from && speed <= found.to
}

/** Bits of the methods that count at a speed, > 0. */
export function activeAt(bands: Bands, speed: number): number {
  for (const band of bands.list) if (speed <= band.to) return band.active
  return 0
}

/** What keeps a method out of its range at a speed, rule by rule; empty when it is in range. */
export function outsideAt(method: Candidate, setting: Setting, speed: number): Outside[] {
  const outside: Outside[] = []
  if (!method.hulls.includes(setting.hull)) outside.push({ quantity: 'hull', value: setting.hull })
  const channel = setting.isConfined ? 'confined' : 'open'
  if (method.channels && !method.channels.includes(channel))
    outside.push({ quantity: 'confinement', value: channel })
  if (method.isInlandOnly && !setting.isInland) outside.push({ quantity: 'trade', value: 'sea-going' })
  if (method.hasCoefficients?.(setting) === false)
    outside.push({ quantity: 'vessel_coefficient', value: 'none' })
  for (const rule of method.range) {
    if (!binds(rule, setting)) continue
    const value = valueOutside(rule, setting, speed)
    if (value !== undefined) outside.push({ quantity: rule.quantity, value, min: rule.min, max: rule.max })
  }
  return outside
}

/**
 * The quantity of a rule at a speed that is not within it, undefined where it is: decided by the same speeds as the bands,
 * so that both agree to the last digit.
 */
function valueOutside(rule: RangeRule, setting: Setting, speed: number): number | undefined {
  const quantity = QUANTITIES[rule.quantity]
  if (quantity.speedAt) {
    const isInside =
      speed > lowerSpeed(rule, quantity, setting) && speed <= upperSpeed(rule, quantity, setting)
    return isInside ? undefined : quantity.at(setting, speed)
  }
  const value = quantity.at(setting, speed)
  return value >= (rule.min ?? -Infinity) && value <= (rule.max ?? Infinity) ? undefined : value
}
