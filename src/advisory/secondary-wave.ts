import { activeAt } from '../hydro/bands.ts'
import { heldAtPlaces } from '../hydro/held.ts'
import { WAVE_METHODS } from '../hydro/waves/all.ts'
import { firstExcess, firstUnknownSpeed, type SpeedSpan } from './scan.ts'
import type { Situation } from './situation.ts'

/** Highest secondary wave at a place, with the method it comes from. */
export interface SecondaryWave {
  /** m; NaN where no method counts */
  readonly height: number
  /** index into the list of methods; -1 where none counts */
  readonly method: number
}

/** Methods by number, those whose inverse is an iteration last: they are solved only up to the lowest of the others. */
const SOLVED_IN_ORDER: readonly number[] = [...WAVE_METHODS.keys()].sort(
  (a, b) => Number(WAVE_METHODS[a]?.isIterated ?? false) - Number(WAVE_METHODS[b]?.isIterated ?? false),
)

const UNKNOWN: SecondaryWave = { height: NaN, method: -1 }

const factorAt = (situation: Situation, index: number): number => situation.waveFactors.byMethod[index] ?? 1

/** Height by one method alone with the water's factor, m, whatever its range; NaN where it has no value. */
export function heightByMethod(situation: Situation, index: number, speed: number, distance: number): number {
  const method = WAVE_METHODS[index]
  if (!method?.hasCoefficients(situation.setting)) return NaN
  return factorAt(situation, index) * method.height(situation.setting, speed, distance)
}

/**
 * The secondary wave at a distance by the methods that count at this speed, combined as the caller asks.
 *
 * @param speed     through the water, m/s, > 0
 * @param distance  from the sailing line, m, > B/2
 */
export function waveAt(situation: Situation, speed: number, distance: number): SecondaryWave {
  const active = activeAt(situation.waveBands, speed)
  if (active === 0) return UNKNOWN
  if (situation.options.combine === 'median') return medianWave(situation, active, speed, distance)
  let height = -1
  let method = -1
  for (let i = 0; i < WAVE_METHODS.length; i += 1) {
    if ((active & (1 << i)) === 0) continue
    const own = heightByMethod(situation, i, speed, distance)
    if (own > height) {
      height = own
      method = i
    }
  }
  return method === -1 ? UNKNOWN : { height, method }
}

/** The same, of which the last two are held: effects, criteria and reports of one answer ask for the same waves. */
export const secondaryWave = heldAtPlaces(waveAt)

/** Median of the methods that count; of an even number the mean of the middle two, named by the upper one. */
function medianWave(situation: Situation, active: number, speed: number, distance: number): SecondaryWave {
  const own: SecondaryWave[] = []
  for (let i = 0; i < WAVE_METHODS.length; i += 1) {
    if ((active & (1 << i)) !== 0) {
      own.push({ height: heightByMethod(situation, i, speed, distance), method: i })
    }
  }
  own.sort((a, b) => a.height - b.height)
  const upper = own[Math.floor(own.length / 2)] ?? UNKNOWN
  const lower = own[Math.floor((own.length - 1) / 2)] ?? UNKNOWN
  return { height: (upper.height + lower.height) / 2, method: upper.method }
}

/**
 * First speed in (from, to] above which the secondary wave exceeds a height, or none counts: `from` when at once,
 * Infinity when never.
 */
export function secondaryFirstSpeed(
  situation: Situation,
  height: number,
  distance: number,
  span: SpeedSpan,
): number {
  if (held && isHeld(held, situation, height, distance, span)) return held.found
  const found =
    situation.options.combine === 'median'
      ? firstExcess(situation.waveBands, span, (speed) => waveAt(situation, speed, distance).height - height)
      : highestFirstSpeed(situation, height, distance, span)
  held = { situation, height, distance, span, found }
  return found
}

/** The last one: banks that are alike ask for the same. */
interface HeldFirstSpeed {
  readonly situation: Situation
  readonly height: number
  readonly distance: number
  readonly span: SpeedSpan
  readonly found: number
}

let held: HeldFirstSpeed | undefined

function isHeld(
  last: HeldFirstSpeed,
  situation: Situation,
  height: number,
  distance: number,
  { from, to, most }: SpeedSpan,
): boolean {
  const { span } = last
  return (
    last.situation === situation &&
    last.height === height &&
    last.distance === distance &&
    span.from === from &&
    span.to === to &&
    span.most === most
  )
}

function highestFirstSpeed(
  situation: Situation,
  height: number,
  distance: number,
  { from, to, most }: SpeedSpan,
): number {
  for (const band of situation.waveBands.list) {
    const start = Math.max(band.from, from)
    const end = Math.min(band.to, to)
    if (!(start < end)) continue
    if (band.active === 0) return start
    if (start > most) return Infinity
    let first = Infinity
    for (const i of SOLVED_IN_ORDER) {
      if ((band.active & (1 << i)) === 0) continue
      const span = { from: start, to: end, most: Math.min(most, first) }
      first = Math.min(first, firstSpeedByMethod(situation, i, height, distance, span))
    }
    if (first < Infinity) return first
  }
  return Infinity
}

function firstSpeedByMethod(
  situation: Situation,
  index: number,
  height: number,
  distance: number,
  { from, to, most }: SpeedSpan,
): number {
  const bare = height / factorAt(situation, index)
  return WAVE_METHODS[index]?.firstSpeed(situation.setting, bare, distance, from, to, most) ?? Infinity
}

/**
 * First speed within a span at which one method alone exceeds a height, where it counts by its own range; Infinity when
 * never.
 */
export function firstSpeedOfMethodAlone(
  situation: Situation,
  span: SpeedSpan,
  index: number,
  height: number,
  distance: number,
): number {
  const to = Math.min(span.to, situation.vessel.maxSpeed)
  if (!(span.from < to)) return Infinity
  return firstSpeedByMethod(situation, index, height, distance, { ...span, to })
}

/** First speed from `from` on at which no wave method counts, m/s. */
export function secondaryUnknownFrom(situation: Situation, from: number): number {
  return firstUnknownSpeed(situation.waveBands, from)
}
