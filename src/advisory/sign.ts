import { SIGN_UNITS, type SignUnit } from '../domain/units.ts'
import { currentAlong } from './direction.ts'
import type { Decision } from './decide.ts'

/** What a sign on the bank would read. */
export interface Sign {
  readonly value: number
  readonly unit: SignUnit
}

/** A whole number of steps may come out a few units in the last place short. */
const WHOLE_STEP_SLACK = 1e-9

/** Digits of a sign's value: steps are tenths at the finest, the rest is binary noise. */
const SIGN_DIGITS = 9

/**
 * A speed over ground, rounded down to the step of the sign.
 *
 * @param overGround  m/s, ≥ 0
 * @param unit        unit of the sign
 * @param step        in that unit, > 0
 */
export function signOf(overGround: number, unit: SignUnit, step: number): Sign {
  const steps = Math.floor(overGround / SIGN_UNITS[unit] / step + WHOLE_STEP_SLACK)
  const value = steps * step
  return { value: Number.isInteger(value) ? value : Number(value.toFixed(SIGN_DIGITS)), unit }
}

/** The sign of a decision; undefined when a vessel that obeys it would be below steerage. */
export function signOfDecision(decision: Decision): Sign | undefined {
  const { situation, overGround, direction } = decision
  const { signUnit, signStep } = situation.options
  const sign = signOf(overGround, signUnit, signStep)
  const signOverGround = sign.value * SIGN_UNITS[signUnit]
  const throughWater = signOverGround - currentAlong(situation.conditions, direction)
  const isSteerable = throughWater >= situation.vessel.minSteerageSpeed * (1 - WHOLE_STEP_SLACK)
  return isSteerable && signOverGround > 0 ? sign : undefined
}
