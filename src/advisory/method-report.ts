import { isInRange, outsideAt, type Bands, type Outside } from '../hydro/bands.ts'
import { SQUAT_METHODS } from '../hydro/squat/all.ts'
import { WAVE_METHODS } from '../hydro/waves/all.ts'
import { bankLimits, secondaryLimitAt, type BankLimits } from './criteria/bank-wave.ts'
import { firstExcess, type SpeedSpan } from './scan.ts'
import { firstSpeedOfMethodAlone, heightByMethod } from './secondary-wave.ts'
import type { Situation } from './situation.ts'

/** One wave method at a speed. NaN where it has no value. */
export interface WaveReport {
  readonly id: string
  readonly outside: readonly Outside[]
  /** at the nearer bank, m */
  readonly height: number
  /** measured over computed height that the figures are corrected by; undefined without one */
  readonly factor: number | undefined
  /** first speed at which this method alone, in its range, reaches the limit of a bank, m/s; Infinity when never */
  readonly firstSpeed: number
  readonly reference: string
}

/** One squat method at a speed. NaN where it has no value. */
export interface SquatReport {
  readonly id: string
  readonly outside: readonly Outside[]
  readonly squat: number
  readonly reference: string
}

const BANKS = [0, 1] as const

/** What keeps a method out that has no factor on a calibrated water. */
const NOT_CALIBRATED: readonly Outside[] = [{ quantity: 'calibration', value: 'none' }]

/** Nothing keeps a method out. */
const INSIDE: readonly Outside[] = []

/** First speed at which a method alone reaches what a bank withstands. */
function firstSpeedAtBank(
  situation: Situation,
  method: number,
  span: SpeedSpan,
  bank: 0 | 1,
  limits: BankLimits,
): number {
  const distance = situation.section.distances[bank]
  if (limits.secondary !== undefined) {
    return firstSpeedOfMethodAlone(situation, span, method, limits.secondary, distance)
  }
  const { steps } = situation.waveBands
  const list = [{ from: span.from, to: span.to, active: 1 << method }]
  const own: Bands = { list, intervals: [], isOutOfRange: false, ...(steps && { steps }) }
  return firstExcess(
    own,
    { from: 0, to: situation.vessel.maxSpeed, most: span.most },
    (speed) =>
      heightByMethod(situation, method, speed, distance) - secondaryLimitAt(situation, limits, speed),
  )
}

/** What keeps a wave method out at a speed. */
function waveOutside(
  { waveBands, waveFactors, setting }: Situation,
  index: number,
  speed: number,
): readonly Outside[] {
  const method = WAVE_METHODS[index]
  if (!method || isInRange(waveBands, index, speed)) return INSIDE
  const outside = outsideAt(method, setting, speed)
  return (waveFactors.without & (1 << index)) === 0 ? outside : [...outside, ...NOT_CALIBRATED]
}

/** Every wave method at a speed, in range or not. */
export function waveReports(situation: Situation, speed: number): WaveReport[] {
  const limits = BANKS.map((bank) => bankLimits(situation, bank))
  const distance = situation.section.distances[situation.nearer]
  const { byMethod, without, isCorrected } = situation.waveFactors
  return WAVE_METHODS.map((method, i) => {
    const isWithout = (without & (1 << i)) !== 0
    const interval = situation.waveBands.intervals[i]
    let firstSpeed = Infinity
    for (const bank of BANKS) {
      const own = limits[bank]
      if (!interval || !own) continue
      // the second bank only up to what the first one allows
      const span = { from: interval.from, to: interval.to, most: firstSpeed }
      firstSpeed = Math.min(firstSpeed, firstSpeedAtBank(situation, i, span, bank, own))
    }
    return {
      id: method.id,
      outside: waveOutside(situation, i, speed),
      height: heightByMethod(situation, i, speed, distance),
      factor: isCorrected && !isWithout ? byMethod[i] : undefined,
      firstSpeed,
      reference: method.reference,
    }
  })
}

/** Every squat method at a speed, in range or not. */
export function squatReports(situation: Situation, speed: number): SquatReport[] {
  return SQUAT_METHODS.map((method, i) => ({
    id: method.id,
    outside: isInRange(situation.squatBands, i, speed) ? INSIDE : outsideAt(method, situation.setting, speed),
    squat: method.squat(situation.setting, speed),
    reference: method.reference,
  }))
}
