import type { Bank } from '../../domain/segment.ts'
import { breakingLimit, mccowanLimit, periodAtBreaking } from '../../hydro/breaking.ts'
import { secondaryWaveForStone, sternWaveForStone } from '../../hydro/stone-stability.ts'
import { cuspPeriodAt, speedAtCuspPeriod } from '../../hydro/wedge.ts'
import { WAVE_METHODS } from '../../hydro/waves/all.ts'
import { bankSternWave, sternWaveFirstSpeed, unsteadyFrom } from '../primary.ts'
import { firstExcess, type SpeedSpan } from '../scan.ts'
import { secondaryFirstSpeed, secondaryUnknownFrom, secondaryWave, waveAt } from '../secondary-wave.ts'
import { NATURAL_SLOPE, slopeOf } from '../section-of.ts'
import type { Situation } from '../situation.ts'
import { atMost, type Criterion, type Evaluation, type Origin } from './criterion.ts'
import { POLICY } from './policy.ts'

/** Heights that a bank withstands. A stone's secondary limit depends on the period of the waves, and so on speed. */
export interface BankLimits {
  /** m; absent where the stone decides */
  readonly secondary?: number
  readonly stone?: { readonly size: number; readonly relativeDensity: number; readonly slope: number }
  /** m */
  readonly stern: number
  readonly origin: Origin
}

/** Limits of a bank: from the request, else the segment, else the policy for its kind; undefined for a plain wall. */
export function bankLimits(situation: Situation, index: 0 | 1): BankLimits | undefined {
  const bank = situation.segment.banks[index]
  const requested = situation.options.limits.maxBankWaveHeight
  if (requested !== undefined) return { secondary: requested, stern: requested, origin: 'request' }
  if (bank.maxWaveHeight !== undefined) {
    return { secondary: bank.maxWaveHeight, stern: bank.maxWaveHeight, origin: 'segment' }
  }
  switch (bank.kind) {
    case 'wall':
      return undefined
    case 'unprotected':
      return { secondary: POLICY.soilWaveHeight, stern: POLICY.soilWaveHeight, origin: 'policy' }
    case 'reed':
      return { secondary: POLICY.reedWaveHeight, stern: POLICY.soilWaveHeight, origin: 'policy' }
    case 'riprap':
      return riprapLimits(situation, bank)
  }
}

function riprapLimits(situation: Situation, bank: Bank): BankLimits {
  if (bank.stoneD50 === undefined) {
    return { secondary: POLICY.riprapWaveHeight, stern: POLICY.riprapWaveHeight, origin: 'policy' }
  }
  const slope = slopeOf(bank, situation.station) || NATURAL_SLOPE
  const relativeDensity = bank.stoneRelativeDensity
  return {
    stone: { size: bank.stoneD50, relativeDensity, slope },
    stern: sternWaveForStone(bank.stoneD50, relativeDensity, slope),
    origin: 'policy',
  }
}

/** Greatest secondary wave that a bank withstands at a speed, m; NaN where the stone decides and no finite period exists. */
export function secondaryLimitAt(situation: Situation, limits: BankLimits, speed: number): number {
  if (!limits.stone) return limits.secondary ?? NaN
  const { size, relativeDensity, slope } = limits.stone
  return secondaryWaveForStone(size, relativeDensity, slope, cuspPeriodAt(speed, situation.section.depth))
}

/** Water depth at the toe of a bank, m; undefined where none is given or the toe is dry. */
function toeDepthOf(situation: Situation, index: 0 | 1): number | undefined {
  const { toeDepth } = situation.segment.banks[index]
  if (toeDepth === undefined) return undefined
  const depth = toeDepth + situation.conditions.waterLevel
  return depth > 0 ? depth : undefined
}

/** Greatest height that reaches a bank unbroken at a speed, m; Infinity without a toe depth. */
function breakingAt(situation: Situation, index: 0 | 1, speed: number): number {
  const toe = toeDepthOf(situation, index)
  return toe === undefined ? Infinity : breakingLimit(toe, cuspPeriodAt(speed, situation.section.depth))
}

/** Speed from which waves of a height reach a bank unbroken, m/s; 0 without a toe depth, Infinity when they never do. */
function unbrokenFrom(situation: Situation, index: 0 | 1, height: number): number {
  const toe = toeDepthOf(situation, index)
  if (toe === undefined) return 0
  if (height >= mccowanLimit(toe)) return Infinity
  return speedAtCuspPeriod(situation.section.depth, periodAtBreaking(toe, height))
}

/** Wave height at a bank: the higher of secondary and stern wave, limited by breaking where a toe depth is given. */
export interface BankWave {
  /** m; NaN where a part is unknown */
  readonly height: number
  readonly secondary: number
  readonly stern: number
  /** index of the method behind the secondary wave; -1 where none counts */
  readonly method: number
}

export function bankWave(situation: Situation, index: 0 | 1, speed: number): BankWave {
  const secondary = secondaryWave(situation, speed, situation.section.distances[index])
  const stern = bankSternWave(situation, index, speed)
  const cap = breakingAt(situation, index, speed)
  return {
    height: Math.min(cap, Math.max(secondary.height, stern)),
    secondary: Math.min(cap, secondary.height),
    stern: Math.min(cap, stern),
    method: secondary.method,
  }
}

/** Evaluates the part of the wave that is nearer to its own limit. */
function evaluateBank(situation: Situation, index: 0 | 1, limits: BankLimits, speed: number): Evaluation {
  const wave = bankWave(situation, index, speed)
  const limit = secondaryLimitAt(situation, limits, speed)
  if (Number.isNaN(wave.height) || Number.isNaN(limit)) return { limit: limits.stern, isMet: false }
  return wave.stern / limits.stern >= wave.secondary / limit
    ? atMost(wave.stern, limits.stern, 'stern-wave')
    : atMost(wave.secondary, limit, WAVE_METHODS[wave.method]?.id)
}

/** Share by which a speed or height is below another whatever rounding does. */
const SURELY_BELOW = 1e-9

/**
 * Speed below which the secondary wave does not exceed what a stone withstands: what it withstands falls with speed, so
 * that up to a speed it is never less than there. 0 where that cannot be told.
 */
function clearOfStone(situation: Situation, limits: BankLimits, distance: number, span: SpeedSpan): number {
  const end = Math.min(span.to, span.most)
  const least = secondaryLimitAt(situation, limits, end) * (1 - SURELY_BELOW)
  if (!(least > 0) || situation.options.combine === 'median') return 0
  return secondaryFirstSpeed(situation, least, distance, { ...span, to: end }) * (1 - SURELY_BELOW)
}

/** First speed at which the secondary wave that reaches a bank exceeds what it withstands. */
function secondaryFirst(situation: Situation, index: 0 | 1, limits: BankLimits, span: SpeedSpan): number {
  const distance = situation.section.distances[index]
  if (limits.stone) {
    const clearTo = clearOfStone(situation, limits, distance, span)
    return firstExcess(situation.waveBands, { ...span, clearTo }, (speed) => {
      const height = Math.min(breakingAt(situation, index, speed), waveAt(situation, speed, distance).height)
      const excess = height - secondaryLimitAt(situation, limits, speed)
      // no finite period: unknown, so exceeded
      return Number.isNaN(excess) ? 1 : excess
    })
  }
  const limit = limits.secondary ?? Infinity
  const unbroken = unbrokenFrom(situation, index, limit)
  const from = Math.max(span.from, unbroken)
  const exceeded = secondaryFirstSpeed(situation, limit, distance, { ...span, from })
  return Math.min(exceeded, secondaryUnknownFrom(situation, span.from))
}

/** First speed at which the stern wave at a bank exceeds what it withstands, or cannot be evaluated. */
function sternFirst(situation: Situation, index: 0 | 1, limits: BankLimits, from: number): number {
  const unbroken = unbrokenFrom(situation, index, limits.stern)
  if (unbroken <= from) return sternWaveFirstSpeed(situation, index, limits.stern, from)
  const exceeded =
    unbroken === Infinity ? Infinity : sternWaveFirstSpeed(situation, index, limits.stern, unbroken)
  return Math.min(exceeded, unsteadyFrom(situation, from))
}

/** Wave height at one bank; undefined for a wall without a limit of its own. */
export function bankWaveCriterion(situation: Situation, index: 0 | 1): Criterion | undefined {
  const limits = bankLimits(situation, index)
  if (!limits) return undefined
  return {
    id: 'bank-wave-height',
    place: `${situation.segment.banks[index].side}-bank`,
    sense: 'at-most',
    unit: 'm',
    origin: limits.origin,
    firstSpeed: (from, to, most = Infinity) => {
      const stern = sternFirst(situation, index, limits, from)
      const span = { from, to, most: Math.min(most, stern) }
      const first = Math.min(stern, secondaryFirst(situation, index, limits, span))
      return first < to ? first : Infinity
    },
    evaluate: (speed) => evaluateBank(situation, index, limits, speed),
  }
}
