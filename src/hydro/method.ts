import type { QuantityName } from './quantity.ts'
import type { Setting } from './setting.ts'

/** One bound of a method's range of validity; bounds are inclusive. With `hulls` it binds those hulls only. */
export interface RangeRule {
  readonly quantity: QuantityName
  readonly min?: number
  readonly max?: number
  readonly hulls?: readonly Setting['hull'][]
}

/** A published method as data: what it says, where it holds, where to read it. */
export interface MethodDescription {
  readonly id: string
  readonly kind:
    'wave-height' | 'squat' | 'primary-wave' | 'critical-speed' | 'wake-geometry' | 'bank-stability'
  readonly name: string
  /** the law in words and symbols */
  readonly law: string
  readonly quantities: readonly { readonly symbol: string; readonly name: string; readonly unit: string }[]
  readonly range: readonly RangeRule[]
  readonly hulls: readonly Setting['hull'][]
  /** channel kinds the method was made for; absent: both */
  readonly channels?: readonly ('open' | 'confined')[]
  /** true when the method is meant for hulls of inland waterways alone */
  readonly isInlandOnly?: boolean
  readonly distanceFrom?: 'hull-side' | 'sailing-line'
  readonly nature: 'envelope' | 'central'
  readonly reference: string
  /** true when the coefficients are recalled and the source was not re-read */
  readonly isFromMemory: boolean
  readonly version: string
}

/** A law for the highest secondary wave at a distance. `distance` is always from the sailing line, m, > B/2. */
export interface WaveMethod extends MethodDescription {
  readonly kind: 'wave-height'
  /** whether the law has the coefficients it needs for this vessel */
  hasCoefficients(setting: Setting): boolean
  /** @returns H, m, ≥ 0, at `speed` through the water, m/s, > 0; NaN where the law has no value */
  height(setting: Setting, speed: number, distance: number): number
  /** speed at which the height steps down for a change of coefficients, m/s; absent where it is continuous */
  stepSpeed?(setting: Setting): number
  /**
   * First speed in (from, to] above which the height exceeds `height`: `from` when it does so at once, Infinity when it
   * never does. The law is taken as it stands, whatever its range.
   *
   * @param most  a speed above it need not be told: Infinity may stand for it; default none. What is told is the same to
   *   the last digit whatever `most` is
   */
  firstSpeed(
    setting: Setting,
    height: number,
    distance: number,
    from: number,
    to: number,
    most?: number,
  ): number
  /** whether `firstSpeed` is found by iteration, so that a low `most` spares work */
  readonly isIterated?: boolean
}

/** A law for the greatest sinkage of bow or stern. */
export interface SquatMethod extends MethodDescription {
  readonly kind: 'squat'
  /** @returns squat, m, ≥ 0; NaN where the law has no value (see its `@holds`) */
  squat(setting: Setting, speed: number): number
  /** As `WaveMethod.firstSpeed`, for squat, m, > 0; where the law has no value counts as exceeded. */
  firstSpeed(setting: Setting, squat: number, from: number, to: number): number
}

/**
 * Where a rising law first exceeds its bound within (from, to], given the speed at which it reaches it.
 *
 * @example risingFirstSpeed(2, 1, 3) // 2
 */
export function risingFirstSpeed(reachedAt: number, from: number, to: number): number {
  if (!(reachedAt > from)) return from
  return reachedAt < to ? reachedAt : Infinity
}
