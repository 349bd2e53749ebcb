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
  /** no method is ever in range for this vessel here: those out of range count in place of none */
  readonly isOutOfRange: boolean
  /** speeds within bands at which a law that can be computed steps down, m/s */
  readonly steps?: readonly number[]
}

/** What keeps a method from counting at a speed. */
export interface Outside {
  readonly quantity: string
  readonly value: number | string
  readonly min?: number
  readonly max?: number
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

/** Speeds at which a quantity that rises with speed keeps to a rule; one that levels off at its bound keeps to it. */
function speedsOf({ min, max }: RangeRule, quantity: Quantity, setting: Setting): SpeedInterval {
  const speedAt = (value: number): number => quantity.speedAt?.(setting, value) ?? Infinity
  return {
    from: min === undefined ? 0 : justBelow(speedAt(min)),
    to: max === undefined || quantity.at(setting, Infinity) <= max ? Infinity : speedAt(max),
  }
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
      const bounds = speedsOf(rule, quantity, setting)
      from = Math.max(from, bounds.from)
      to = Math.min(to, bounds.to)
    } else {
      const value = quantity.at(setting, 0)
      if (value < (rule.min ?? -Infinity) || value > (rule.max ?? Infinity)) return undefined
    }
  }
  return from < to ? { from, to } : undefined
}

/** Bits of the methods that can be computed, for want of any in range: those made for the hull and channel, else all. */
function fallback(methods: readonly Candidate[], setting: Setting): number {
  let all = 0
  let fitting = 0
  methods.forEach((method, i) => {
    if (method.hasCoefficients?.(setting) === false) return
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
 * @returns bands in rising order, the first from 0, the last to Infinity, adjacent bands touching
 * @holds any setting
 */
export function bandsOf(methods: readonly Candidate[], setting: Setting, preferred: number): Bands {
  const intervals = methods.map((method) => speedInterval(method, setting))
  const speeds = methods.flatMap((method) => method.stepSpeed?.(setting) ?? [])
  const steps = speeds.length > 0 ? { steps: speeds } : {}
  if (intervals.every((found) => found === undefined)) {
    const list = [{ from: 0, to: Infinity, active: fallback(methods, setting) }]
    return { list, isOutOfRange: true, ...steps }
  }
  const edges = new Set<number>([0, Infinity])
  for (const found of intervals) if (found) edges.add(found.from).add(found.to)
  const rising = [...edges].sort((a, b) => a - b)
  const list = rising.slice(1).map((to, i) => {
    const from = rising[i] as number
    let active = 0
    intervals.forEach((found, k) => {
      if (found && found.from <= from && found.to >= to) active |= 1 << k
    })
    return { from, to, active: (active & preferred) === 0 ? active : active & preferred }
  })
  return { list, isOutOfRange: false, ...steps }
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
    const quantity = QUANTITIES[rule.quantity]
    if (isInside(rule, setting, speed)) continue
    outside.push({
      quantity: rule.quantity,
      value: quantity.at(setting, speed),
      ...(rule.min !== undefined && { min: rule.min }),
      ...(rule.max !== undefined && { max: rule.max }),
    })
  }
  return outside
}

/** A rule at a speed, decided by the same speeds as the bands, so that both agree to the last digit. */
function isInside(rule: RangeRule, setting: Setting, speed: number): boolean {
  const quantity = QUANTITIES[rule.quantity]
  if (!quantity.speedAt) {
    const value = quantity.at(setting, speed)
    return value >= (rule.min ?? -Infinity) && value <= (rule.max ?? Infinity)
  }
  const { from, to } = speedsOf(rule, quantity, setting)
  return speed > from && speed <= to
}
