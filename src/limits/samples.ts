import type { UncertainField } from '../advisory/uncertainty.ts'
import { randomOf } from '../domain/random.ts'
import { normalQuantile } from './normal-quantile.ts'
import { shiftedSobol } from './sobol.ts'
import type { Spread, Uncertainty } from './study.ts'

/** Inputs whose spread is the same on every segment. */
export type ShiftedField = Exclude<UncertainField, 'wave_height'>

/** What each sample of a study adds to its inputs. */
export interface Draws {
  /** n, of every array */
  readonly count: number
  /** by input that scatters: what sample i adds to it, m or m/s */
  readonly shifts: Partial<Readonly<Record<ShiftedField, Float64Array>>>
  /**
   * standard normal score of the wave height: times the standard deviation of the segment it is the logarithm of the
   * factor on the height
   */
  readonly waveHeight: Float64Array
}

/** Dimension of the sequence that an input has, whichever others scatter: its draws stay when another is left out. */
const DIMENSIONS: Readonly<Record<UncertainField, number>> = {
  depth_m: 0,
  width_m: 1,
  bank_distance_m: 2,
  draught_m: 3,
  current_mps: 4,
  wave_height: 5,
}

export const SHIFTED_FIELDS = ['depth_m', 'width_m', 'bank_distance_m', 'draught_m', 'current_mps'] as const

/** n numbers inside (0, 1) for an input, which follow from the seed and the input alone. */
function uniforms(field: UncertainField, { samples, seed }: Uncertainty): Float64Array {
  const shift = randomOf(seed, `digital shift of ${field}`)() * 2 ** 32
  return shiftedSobol(DIMENSIONS[field], samples, shift)
}

function shiftsOf({ kind, size }: Spread, points: Float64Array): Float64Array {
  return points.map((point) =>
    kind === 'standard-deviation' ? size * normalQuantile(point) : size * (2 * point - 1),
  )
}

/**
 * The samples of a study. Inputs scatter independently: normally with a standard deviation, or uniformly within a half
 * range. The same samples serve every cell, so that two cells differ by what differs between them and not by chance; a
 * percentile of one cell is as uncertain as with samples of its own.
 *
 * @returns arrays of n = `samples` numbers, which follow from seed, number of samples and spreads alone
 */
export function drawsOf(uncertainty: Uncertainty): Draws {
  const shifts: Partial<Record<ShiftedField, Float64Array>> = {}
  for (const field of SHIFTED_FIELDS) {
    const spread = uncertainty.spreads[field]
    if (spread) shifts[field] = shiftsOf(spread, uniforms(field, uncertainty))
  }
  return {
    count: uncertainty.samples,
    shifts,
    waveHeight: uniforms('wave_height', uncertainty).map(normalQuantile),
  }
}
