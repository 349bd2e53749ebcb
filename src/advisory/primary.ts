import {
  drawdownOfSternWave,
  isSteady,
  meanDrawdown,
  returnCurrent,
  speedAtDrawdown,
  speedAtReturnCurrent,
  sternWaveHeight,
} from '../hydro/primary-wave.ts'
import type { Situation } from './situation.ts'

/** Greatest drawdown at a bank, magnitude, m; NaN where no steady flow exists, 0 in open water. */
export function bankDrawdown(situation: Situation, bank: 0 | 1, speed: number): number {
  if (!situation.setting.isConfined) return 0
  return Math.abs(meanDrawdown(situation.setting, speed)) * situation.sideFactors[bank].drawdown
}

/** Greatest return current at a bank, magnitude, m/s; NaN where no steady flow exists, 0 in open water. */
export function bankReturnCurrent(situation: Situation, bank: 0 | 1, speed: number): number {
  if (!situation.setting.isConfined) return 0
  return Math.abs(returnCurrent(situation.setting, speed)) * situation.sideFactors[bank].returnCurrent
}

/** Transversal stern wave at a bank, m; NaN where no steady flow exists, 0 in open water. */
export function bankSternWave(situation: Situation, bank: 0 | 1, speed: number): number {
  return sternWaveHeight(bankDrawdown(situation, bank, speed))
}

/**
 * First speed from `from` on above which a figure of the primary wave exceeds its bound. It rises up to the critical
 * speed, cannot be evaluated from there to the upper limit, which counts as exceeded, and falls above.
 *
 * @param reachedAt  speed at which the bound is reached below the critical speed, or the critical speed, m/s
 * @param exceeds    whether the bound is exceeded at a speed
 */
function primaryFirstSpeed(
  situation: Situation,
  reachedAt: number,
  from: number,
  exceeds: (speed: number) => boolean,
): number {
  const { criticalSpeed } = situation.setting
  if (from < criticalSpeed) return Math.max(reachedAt, from)
  const justAbove = from * (1 + 4 * Number.EPSILON)
  if (!isSteady(situation.setting, justAbove)) return from
  return exceeds(justAbove) ? from : Infinity
}

/** First speed from `from` on above which no steady flow exists, m/s; Infinity when it always does. */
export function unsteadyFrom(situation: Situation, from: number): number {
  const { criticalSpeed, supercriticalOnset, isConfined } = situation.setting
  if (!isConfined || from >= supercriticalOnset) return Infinity
  return Math.max(criticalSpeed, from)
}

/** First speed from `from` on above which the drawdown at a bank exceeds a value, m. */
export function drawdownFirstSpeed(
  situation: Situation,
  bank: 0 | 1,
  drawdown: number,
  from: number,
): number {
  if (!situation.setting.isConfined) return Infinity
  const mean = drawdown / situation.sideFactors[bank].drawdown
  return primaryFirstSpeed(
    situation,
    speedAtDrawdown(situation.setting, mean),
    from,
    (speed) => bankDrawdown(situation, bank, speed) > drawdown,
  )
}

/** First speed from `from` on above which the return current at a bank exceeds a value, m/s. */
export function returnCurrentFirstSpeed(
  situation: Situation,
  bank: 0 | 1,
  current: number,
  from: number,
): number {
  if (!situation.setting.isConfined) return Infinity
  const mean = current / situation.sideFactors[bank].returnCurrent
  return primaryFirstSpeed(
    situation,
    speedAtReturnCurrent(situation.setting, mean),
    from,
    (speed) => bankReturnCurrent(situation, bank, speed) > current,
  )
}

/** First speed from `from` on above which the stern wave at a bank exceeds a height, m. */
export function sternWaveFirstSpeed(situation: Situation, bank: 0 | 1, height: number, from: number): number {
  return drawdownFirstSpeed(situation, bank, drawdownOfSternWave(height), from)
}
