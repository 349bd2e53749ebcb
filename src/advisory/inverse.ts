import { verdictOf, type SailedSpeed } from './assess.ts'
import type { Decision } from './decide.ts'
import { currentAlong } from './direction.ts'
import { decideIfPossible } from './sensitivity.ts'
import { shifted } from './shifted-inputs.ts'
import { baseValue, type Inputs } from './uncertainty.ts'

export const VARIED = ['depth_m', 'bank_distance_m', 'draught_m'] as const
export type Varied = (typeof VARIED)[number]

/** Values that are tried before halving: the speed may be within in separate ranges of the input. */
const SAMPLES = 200
/** Deepest water that is searched, m, as the deepest that a segment may have. */
const DEEPEST = 100
/** Least draught that is searched, m. */
const SHALLOWEST_DRAUGHT = 0.05
/** Least depth that is searched, m, as the least that a segment may have. */
const LEAST_DEPTH = 0.3

/** What an input would have to be for a speed to be within the recommendation. */
export interface Inverse {
  readonly vary: Varied
  /** least depth or distance, or greatest draught; absent where none will do */
  readonly required?: number
  readonly searched: readonly [number, number]
  /** criterion that governs at the required value, or at the most favourable one */
  readonly governing?: Decision
}

function searchRange(inputs: Inputs, vary: Varied): [number, number] {
  const [station] = inputs.segment.stations
  switch (vary) {
    case 'depth_m':
      return [LEAST_DEPTH, DEEPEST]
    case 'bank_distance_m':
      return [inputs.vessel.beam / 2, station.width / 2]
    case 'draught_m':
      return [SHALLOWEST_DRAUGHT, station.depth + inputs.conditions.waterLevel]
  }
}

/**
 * The least depth or bank distance, or the greatest draught, at which a speed is within the recommendation. The range is
 * sampled from its unfavourable end, so that of several the outermost is found.
 */
export function inverseOf(inputs: Inputs, sailed: SailedSpeed, vary: Varied): Inverse {
  const base = baseValue(inputs, vary)
  const searched = searchRange(inputs, vary)
  const [least, greatest] = searched
  const decisionAt = (value: number): Decision | undefined =>
    decideIfPossible(shifted(inputs, vary, value - base))
  const isWithin = (value: number): boolean => isSpeedWithin(decisionAt(value), sailed)

  const isRising = vary !== 'draught_m'
  const [hard, easy] = isRising ? [least, greatest] : [greatest, least]
  const valueAt = (i: number): number => hard * (easy / hard) ** (i / SAMPLES)
  for (let i = 0; i <= SAMPLES; i += 1) {
    const value = i === SAMPLES ? easy : valueAt(i)
    if (!isWithin(value)) continue
    const required = i === 0 ? value : edge(isWithin, valueAt(i - 1), value)
    const governing = decisionAt(required)
    return { vary, required, searched, ...(governing && { governing }) }
  }
  const governing = decisionAt(easy)
  return { vary, searched, ...(governing && { governing }) }
}

function isSpeedWithin(decision: Decision | undefined, sailed: SailedSpeed): boolean {
  if (!decision) return false
  const current = currentAlong(decision.situation.conditions, decision.direction)
  const speed = sailed.reference === 'through-water' ? sailed.value : sailed.value - current
  return speed > 0 && verdictOf(decision, speed) === 'within'
}

/** The value nearest to `fails` that is found to hold, by halving to a tenth of a millimetre. */
function edge(isWithin: (value: number) => boolean, fails: number, holds: number): number {
  let a = fails
  let b = holds
  while (Math.abs(b - a) > 1e-4) {
    const middle = (a + b) / 2
    if (isWithin(middle)) b = middle
    else a = middle
  }
  return b
}
