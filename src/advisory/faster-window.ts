import type { Bands } from '../hydro/bands.ts'
import { WAVE_METHODS } from '../hydro/waves/all.ts'
import type { Decision } from './decide.ts'

/** Samples over the speeds that may hold a second window; windows narrower than this share are of no use to anyone. */
const SAMPLES = 240

/** Criteria that no higher speed can satisfy again. */
const CEILINGS: readonly string[] = ['critical-ratio', 'depth-froude-number', 'posted-limit', 'service-speed']

/** Speeds above the recommendation at which every criterion holds again, m/s. */
export interface FasterWindow {
  readonly from: number
  readonly to: number
}

/**
 * Whether a method leaves its range, or one that falls with speed counts, between two speeds. A median can also fall where
 * a method enters its range below it.
 */
function canFall(bands: Bands, fallingBits: number, from: number, to: number, isMedian: boolean): boolean {
  let before = 0
  for (const band of bands.list) {
    const isWithin = band.to > from && band.from < to
    const lost = isMedian ? before ^ band.active : before & ~band.active
    if (isWithin && (lost !== 0 || (band.active & fallingBits) !== 0)) return true
    before = band.active
  }
  return false
}

const FALLING_BITS = WAVE_METHODS.reduce(
  (bits, method, i) =>
    method.range.some((rule) => rule.quantity === 'volume_froude_number' && rule.min !== undefined)
      ? bits | (1 << i)
      : bits,
  0,
)

/** Whether no method counts somewhere between two speeds: beyond it what was unknown may hold. */
function hasHole({ list }: Bands, from: number, to: number): boolean {
  return list.some((band) => band.active === 0 && band.to > from && band.from < to)
}

const OF_WAVES: readonly string[] = ['bank-wave-height', 'receptor-wave-height', 'wake-wash']

/** Whether what governs may hold again between two speeds: a criterion whose figure only rises never does. */
function mayHoldAgain({ situation, governing }: Decision, from: number, to: number): boolean {
  const { waveBands, squatBands, setting, options } = situation
  const { id } = governing.criterion
  if (id === 'under-keel-clearance') {
    return hasHole(squatBands, from, to) || canFall(squatBands, 0, from, to, false)
  }
  if (!OF_WAVES.includes(id)) return true
  const hasStep = waveBands.steps?.some((step) => step >= from && step <= to) ?? false
  // above the upper limit the stern wave falls
  const isBeyondLimits = setting.isConfined && to > setting.supercriticalOnset
  if (hasStep || isBeyondLimits || hasHole(waveBands, from, to)) return true
  return canFall(waveBands, FALLING_BITS, from, to, options.combine === 'median')
}

/** A second, faster window beyond a wave hump or the edge of a method's range; undefined when there is none. */
export function fasterWindow(decision: Decision): FasterWindow | undefined {
  const { situation, bounds, speed } = decision
  const ceiling = bounds
    .filter(({ criterion }) => CEILINGS.includes(criterion.id))
    .reduce((least, bound) => Math.min(least, bound.firstSpeed), situation.vessel.maxSpeed)
  const mayFall =
    canFall(situation.waveBands, FALLING_BITS, speed, ceiling, situation.options.combine === 'median') ||
    canFall(situation.squatBands, 0, speed, ceiling, false)
  if (!(speed < ceiling) || !mayFall || !mayHoldAgain(decision, speed, ceiling)) return undefined
  const { criterion: limiting } = decision.governing
  // what governs is asked first: nearly everywhere it is what does not hold
  const holdsAt = (v: number): boolean =>
    limiting.evaluate(v).isMet && bounds.every(({ criterion }) => criterion.evaluate(v).isMet)
  let fails = speed * (1 + 1e-6)
  for (let i = 1; i <= SAMPLES; i += 1) {
    const v = speed + ((ceiling - speed) * i) / SAMPLES
    if (holdsAt(v)) {
      const from = edgeBetween(holdsAt, fails, v)
      const to = bounds.reduce(
        (least, bound) => Math.min(least, bound.criterion.firstSpeed(from, ceiling)),
        ceiling,
      )
      return to > from ? { from, to } : undefined
    }
    fails = v
  }
  return undefined
}

/** Lowest speed found to hold, by halving down to a thousandth of a millimetre per second. */
function edgeBetween(holdsAt: (v: number) => boolean, fails: number, holds: number): number {
  let low = fails
  let high = holds
  while (high - low > 1e-6) {
    const middle = (low + high) / 2
    if (holdsAt(middle)) high = middle
    else low = middle
  }
  return high
}
