import { decide, decideAlong, type Decision } from './decide.ts'
import { boundsIfPossible } from './if-possible.ts'
import { shifted } from './shifted-inputs.ts'
import { baseValue, type Inputs, type UncertainField } from './uncertainty.ts'

/** How far the answer moves when one input moves by its uncertainty. */
export interface InputSwing {
  readonly field: UncertainField
  readonly low: number
  readonly high: number
  /** the decision at the low value; absent where it is impossible */
  readonly atLow?: Decision
  readonly atHigh?: Decision
  /** difference of the two recommended speeds over ground, m/s; no safe speed counts as 0 */
  readonly swing: number
}

export interface Sensitivity {
  readonly base: Decision
  /** largest swing first */
  readonly inputs: readonly InputSwing[]
}

/** Recommended speed over ground, m/s; 0 without one. */
export function recommended(decision: Decision | undefined): number {
  return decision === undefined || decision.outcome === 'no-safe-speed' ? 0 : decision.overGround
}

/** A decision, or undefined where the shifted figures cannot hold together. */
export function decideIfPossible(inputs: Inputs): Decision | undefined {
  const bounds = boundsIfPossible(inputs)
  return bounds && decideAlong(bounds, inputs.conditions).main
}

function swingOf(inputs: Inputs, field: UncertainField, half: number): InputSwing {
  const base = baseValue(inputs, field)
  const isFactor = field === 'wave_height'
  const atLow = decideIfPossible(shifted(inputs, field, -half))
  const atHigh = decideIfPossible(shifted(inputs, field, half))
  return {
    field,
    low: isFactor ? base * Math.exp(-half) : base - half,
    high: isFactor ? base * Math.exp(half) : base + half,
    ...(atLow && { atLow }),
    ...(atHigh && { atHigh }),
    swing: Math.abs(recommended(atHigh) - recommended(atLow)),
  }
}

/**
 * How much each uncertain input moves the recommendation.
 *
 * @param halves  per input its standard deviation or half range, > 0; of wave height the log standard deviation
 * @throws Fault `impossible-input` when the unshifted figures cannot hold together
 */
export function sensitivityOf(inputs: Inputs, halves: ReadonlyMap<UncertainField, number>): Sensitivity {
  const { segment, vessel, conditions, options } = inputs
  const base = decide(segment, vessel, conditions, options).main
  const swings = [...halves].map(([field, half]) => swingOf(inputs, field, half))
  return { base, inputs: swings.sort((a, b) => b.swing - a.swing) }
}
