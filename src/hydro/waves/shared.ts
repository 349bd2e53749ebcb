import type { MethodDescription, RangeRule } from '../method.ts'

/** Hulls that a displacement law covers: all, a planing hull only up to its hump (see `DISPLACEMENT_MODE`). */
export const ALL_HULLS = ['displacement', 'semi-displacement', 'planing'] as const

/** Hulls that leave the displacement mode. */
export const FAST_HULLS = ['semi-displacement', 'planing'] as const

/**
 * Displacement laws count for fast hulls up to F_vol = 3.0, planing laws from 2.0; between, the higher counts (common
 * practice, no published threshold).
 */
export const PLANING_FROM = 2
export const DISPLACEMENT_MODE: RangeRule = { quantity: 'volume_froude_number', max: 3, hulls: FAST_HULLS }
export const PLANING_MODE: RangeRule = { quantity: 'volume_froude_number', min: PLANING_FROM }

export const SUBCRITICAL: RangeRule = { quantity: 'depth_froude_number', max: 0.8 }

type Quantities = MethodDescription['quantities']

const HEIGHT = { symbol: 'H', name: 'highest secondary wave of the passage', unit: 'm' } as const
const SPEED = { symbol: 'V', name: 'speed through the water', unit: 'm/s' } as const
const DEPTH = { symbol: 'h', name: 'undisturbed depth at the sailing line', unit: 'm' } as const

/** Quantities that every law shares, before those of its own. */
export function quantities(...own: Quantities): Quantities {
  return [HEIGHT, SPEED, ...own]
}

export const DEPTH_QUANTITY = DEPTH
export const HULL_SIDE_DISTANCE = { symbol: 's', name: "hull's side to the place", unit: 'm' } as const
export const SAILING_LINE_DISTANCE = { symbol: 'y', name: 'sailing line to the place', unit: 'm' } as const

/**
 * Whether a planing law has a value; the last digits of the threshold speed do not decide.
 *
 * @example isPlaning(2.5) // true
 */
export function isPlaning(volumeFroudeNumber: number): boolean {
  return volumeFroudeNumber >= PLANING_FROM * (1 - 1e-12)
}

/**
 * `WaveMethod.firstSpeed` of a law that falls with speed: it exceeds at once or not at all.
 *
 * @example fallingFirstSpeed(0.4, 0.3, 6) // 6
 */
export function fallingFirstSpeed(heightAtStart: number, height: number, from: number): number {
  return heightAtStart > height ? from : Infinity
}
