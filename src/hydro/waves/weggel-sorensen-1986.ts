import { GRAVITY } from '../constants.ts'
import { heldFor } from '../held.ts'
import { risingFirstSpeed, type WaveMethod } from '../method.ts'
import { DEPTH_CAP_FROUDE } from '../quantity.ts'
import { risingRoot } from '../root.ts'
import {
  ALL_HULLS,
  DEPTH_QUANTITY,
  DISPLACEMENT_MODE,
  quantities,
  SAILING_LINE_DISTANCE,
  SUBCRITICAL,
} from './shared.ts'

/** Depth Froude number at which the coefficients change (Weggel & Sorensen (1986), from memory). */
const CHANGE = 0.55

/** Logarithm by which a height is below a bound whatever rounding does. */
const SURELY_BELOW = 1e-9 // dimensionless

/**
 * Secondary waves by Weggel & Sorensen, with the depth capped where the law would grow without bound.
 *
 *   H* = a x*^n, n = b d*^e, log10 a = A + B log10 d* + C (log10 d*)²
 *   A = -0.6/F, B = 0.75 F^(-1.125), C = 2.653 F - 1.95
 *   F < 0.55: b = -0.225 F^(-0.699), e = -0.118 F^(-0.356); else b = -0.342, e = -0.146
 *   lengths over W^(1/3); d_e = min(h, V²/(0.42² g)) in place of the depth throughout
 *
 * @param speed     V, through the water, m/s, > 0
 * @param depth     h, m, > 0
 * @param volume    W, displaced volume at rest, m³, > 0
 * @param distance  x, from the sailing line, m, > 0
 * @returns H, m
 * @holds see the range of `weggelSorensen1986`
 * @error factor 1.5 to 2; conservative beside other laws and measurements (National Park Service, Glacier Bay EIS)
 * @source Weggel, J.R. & Sorensen, R.M. (1986), Ship wave prediction for port and channel design, Ports '86, ASCE,
 *   pp. 797-814 (from memory); the depth cap is an own choice
 * @example weggelSorensenWaveHeight(3.5, 5, 100, 30) // 0.168144
 */
export function weggelSorensenWaveHeight(
  speed: number,
  depth: number,
  volume: number,
  distance: number,
): number {
  const water = waterOf(depth, volume)
  return heightAt(water, speed, Math.log10(distance / water.scale))
}

/** What the law takes from the water and the vessel at every speed. */
interface Water {
  readonly depth: number
  /** W^(1/3), m */
  readonly scale: number
  /** √(g h), m/s */
  readonly celerity: number
  /** log10 of the whole depth over the scale */
  readonly logDepth: number
}

function waterOf(depth: number, volume: number): Water {
  const scale = Math.cbrt(volume)
  return { depth, scale, celerity: Math.sqrt(GRAVITY * depth), logDepth: Math.log10(depth / scale) }
}

const heldWater = heldFor(({ depth, volume }) => waterOf(depth, volume))

/** Coefficients up to the change, as functions of F. */
const growth = (f: number): number => 0.75 * f ** -1.125
const decay = (f: number): number => -0.225 * f ** -0.699
const depthDecay = (f: number): number => -0.118 * f ** -0.356

/** The same where the depth is capped, at one F. */
const CAPPED_GROWTH = growth(DEPTH_CAP_FROUDE)
const CAPPED_DECAY = decay(DEPTH_CAP_FROUDE)
const CAPPED_DEPTH_DECAY = depthDecay(DEPTH_CAP_FROUDE)

/** The law at log10 of the distance over the scale. */
function heightAt({ depth, scale, celerity, logDepth }: Water, speed: number, logDistance: number): number {
  const capped = (speed * speed) / (DEPTH_CAP_FROUDE * DEPTH_CAP_FROUDE * GRAVITY)
  if (capped < depth) {
    const log = Math.log10(capped / scale)
    const n = CAPPED_DECAY * 10 ** (CAPPED_DEPTH_DECAY * log)
    const logA = -0.6 / DEPTH_CAP_FROUDE + CAPPED_GROWTH * log + (2.653 * DEPTH_CAP_FROUDE - 1.95) * log * log
    return scale * 10 ** (logA + n * logDistance)
  }
  const f = speed / celerity
  const b = f < CHANGE ? decay(f) : -0.342
  const e = f < CHANGE ? depthDecay(f) : -0.146
  const n = b * 10 ** (e * logDepth)
  const logA = -0.6 / f + growth(f) * logDepth + (2.653 * f - 1.95) * logDepth * logDepth
  return scale * 10 ** (logA + n * logDistance)
}

/** Where the law exceeds a height, found piece by piece. */
class Search {
  readonly #water: Water
  readonly #height: number
  readonly #logDistance: number
  readonly #most: number

  constructor(water: Water, height: number, distance: number, most: number) {
    this.#water = water
    this.#height = height
    this.#logDistance = Math.log10(distance / water.scale)
    this.#most = most
  }

  readonly #excess = (speed: number): number =>
    Math.log(heightAt(this.#water, speed, this.#logDistance) / this.#height)

  /** Within one of the pieces, in which the law rises. */
  inPiece(from: number, to: number): number {
    if (!(from < to && from <= this.#most)) return Infinity
    // clearly below the height where it need no longer be told
    if (this.#most < to && this.#excess(this.#most) < -SURELY_BELOW) return Infinity
    const justAbove = from * (1 + 4 * Number.EPSILON)
    if (justAbove > 0 && this.#excess(justAbove) > 0) return from
    if (!(this.#excess(to) > 0)) return Infinity
    // far below any height of interest, and above zero, where the logarithm has no value
    const low = Math.max(justAbove, Math.min(0.1 * DEPTH_CAP_FROUDE * this.#water.celerity, to / 2))
    return risingFirstSpeed(this.#excess(low) > 0 ? low : risingRoot(this.#excess, low, to), from, to)
  }
}

export const weggelSorensen1986: WaveMethod = {
  id: 'weggel-sorensen-1986',
  kind: 'wave-height',
  name: 'Weggel & Sorensen, secondary waves',
  law: 'H* = a x*^n with lengths over the cube root of the displaced volume, a and n functions of depth and depth Froude number; effective depth min(h, V²/(0.42² g))',
  quantities: quantities(DEPTH_QUANTITY, SAILING_LINE_DISTANCE, {
    symbol: 'W',
    name: 'displaced volume at rest',
    unit: 'm3',
  }),
  range: [SUBCRITICAL, { quantity: 'effective_relative_depth', min: 0.4, max: 8 }, DISPLACEMENT_MODE],
  hulls: ALL_HULLS,
  distanceFrom: 'sailing-line',
  nature: 'central',
  reference:
    "Weggel & Sorensen (1986), Ship wave prediction for port and channel design, Ports '86, ASCE, pp. 797-814; cap of the depth: own choice",
  isFromMemory: true,
  version: '1',
  hasCoefficients: () => true,
  height(setting, speed, distance) {
    const water = heldWater(setting)
    return heightAt(water, speed, Math.log10(distance / water.scale))
  },
  stepSpeed: (setting) => CHANGE * Math.sqrt(GRAVITY * setting.depth) * (1 - 4 * Number.EPSILON),
  isIterated: true,
  firstSpeed(setting, height, distance, from, to, most = Infinity) {
    // three pieces: depth capped, first and second set of coefficients (the law falls by up to 0.3 % at the change)
    const water = heldWater(setting)
    const { celerity } = water
    const search = new Search(water, height, distance, most)
    let start = from
    for (const end of [DEPTH_CAP_FROUDE * celerity, CHANGE * celerity * (1 - Number.EPSILON), to]) {
      const stop = Math.min(end, to)
      const speed = search.inPiece(start, stop)
      if (speed < Infinity) return speed
      start = Math.max(start, stop)
    }
    return Infinity
  },
}
