import type { Bands } from '../hydro/bands.ts'
import { risingRoot } from '../hydro/root.ts'

/** Samples per band: the laws are smooth and nearly straight in logarithms, one hump a band at most. */
const SAMPLES = 48

/** Speeds that are searched, m/s. */
export interface SpeedSpan {
  readonly from: number
  readonly to: number
  /** what is found above it need not be told: Infinity may stand for it */
  readonly most: number
  /** nothing is exceeded below it, as is known: it need not be looked for there */
  readonly clearTo?: number
}

/** First speed from `from` on from which no method counts, m/s. */
export function firstUnknownSpeed(bands: Bands, from: number): number {
  for (const band of bands.list) {
    if (band.to > from && band.active === 0) return Math.max(band.from, from)
  }
  return Infinity
}

/**
 * First speed in (from, to] above which a measure of excess is positive, band by band, for measures that have no inverse
 * in closed form. A speed at which no method counts is exceeded.
 *
 * @param bands   within a band the measure is continuous but for the steps, which are in rising order
 * @param excess  positive where the bound is exceeded
 * @returns `from` when exceeded at once; Infinity when never
 */
export function firstExcess(
  bands: Bands,
  { from, to, most, clearTo = 0 }: SpeedSpan,
  excess: (speed: number) => number,
): number {
  for (const band of bands.list) {
    const start = Math.max(band.from, from)
    const end = Math.min(band.to, to)
    if (!(start < end)) continue
    if (band.active === 0) return start
    if (start > most) return Infinity
    const found = firstExcessInBand(bands.steps ?? [], { from: start, to: end, most, clearTo }, excess)
    if (found < Infinity) return found
  }
  return Infinity
}

/** Up to each step of a law by itself: a bound that lies within the step is reached on both sides of it. */
function firstExcessInBand(
  steps: readonly number[],
  { from, to, most, clearTo = 0 }: SpeedSpan,
  excess: (speed: number) => number,
): number {
  let start = from
  for (const end of [...steps.filter((step) => step > from && step < to), to]) {
    const found = firstExcessWithin({ from: start, to: end, most, clearTo }, excess)
    if (found < Infinity) return found
    start = end
  }
  return Infinity
}

function firstExcessWithin(
  { from, to, most, clearTo = 0 }: SpeedSpan,
  excess: (speed: number) => number,
): number {
  let below = from * (1 + 4 * Number.EPSILON)
  if (below > 0 && below >= clearTo && excess(below) > 0) return from
  for (let i = 1; i <= SAMPLES; i += 1) {
    if (below > most) return Infinity
    const above = i === SAMPLES ? to : from + ((to - from) * i) / SAMPLES
    if (above >= clearTo && excess(above) > 0) {
      // the law has no value at rest: start where it is far below any bound
      const low = below > 0 ? below : above * 1e-6
      return low >= clearTo && excess(low) > 0 ? low : risingRoot(excess, low, above)
    }
    below = above
  }
  return Infinity
}
