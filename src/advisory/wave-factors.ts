import type { Calibration } from '../domain/calibration.ts'
import type { Options } from '../domain/conditions.ts'
import type { Hull } from '../domain/vessel.ts'
import { WAVE_METHODS } from '../hydro/waves/all.ts'

/** Measured over computed wave height by method, as it applies to a vessel. */
export interface WaveFactors {
  /** in the order of the methods, dimensionless, > 0; 1 where none is known */
  readonly byMethod: readonly number[]
  /** bits of the methods that have none although the water is calibrated: they do not count */
  readonly without: number
  /** whether factors were given or measured */
  readonly isCorrected: boolean
}

const alike = (factor: number): readonly number[] => new Array<number>(WAVE_METHODS.length).fill(factor)

const UNCORRECTED: WaveFactors = { byMethod: alike(1), without: 0, isCorrected: false }

function calibrated({ methods }: Calibration, hull: Hull, scale: number): WaveFactors {
  let without = 0
  const byMethod = WAVE_METHODS.map(({ id }, i) => {
    const found = methods.find((method) => method.id === id)
    if (!found) without |= 1 << i
    return scale * (found ? (found.factorByHull[hull] ?? found.factor) : 1)
  })
  return { byMethod, without, isCorrected: true }
}

/** Factors of a vessel of this hull: the one that was given, else those that were measured, else none. */
export function waveFactorsOf(options: Options, hull: Hull): WaveFactors {
  const { waveFactor, calibration, waveScale = 1 } = options
  if (waveFactor !== undefined)
    return { byMethod: alike(waveFactor * waveScale), without: 0, isCorrected: true }
  if (calibration) return calibrated(calibration, hull, waveScale)
  return waveScale === 1 ? UNCORRECTED : { ...UNCORRECTED, byMethod: alike(waveScale) }
}
