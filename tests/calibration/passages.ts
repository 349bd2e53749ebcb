import type { Measurement } from '../../src/calibration/measurement.ts'
import type { Hull } from '../../src/domain/vessel.ts'

/** On (0, 1), by splitmix32 (after Steele, Lea and Flood 2014): another generator than the service draws from. */
export function uniformOf(seed: number): () => number {
  let state = seed | 0
  return () => {
    state = (state + 0x9e3779b9) | 0
    let mixed = Math.imul(state ^ (state >>> 16), 0x21f0aaad)
    mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97)
    return (((mixed ^ (mixed >>> 15)) >>> 0) + 0.5) / 2 ** 32
  }
}

/** Normal of mean 0 and standard deviation 1, by Box and Muller (1958). */
export function normalFrom(uniform: () => number): number {
  return Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform())
}

export interface Water {
  readonly passages: number
  readonly seed: number
  /** measured over computed */
  readonly factor: number
  /** of the logarithm */
  readonly scatter: number
  /** power of the speed that the method misses */
  readonly missedPower?: number
  /** share of passages that read five times too high */
  readonly blunders?: number
  readonly hull?: Hull
  /** scatter that the second method adds to that of the first */
  readonly secondScatter?: number
}

/** Passages of one kind with two methods, the first of them as told. */
export function passagesOf(water: Water): Measurement[] {
  const uniform = uniformOf(water.seed)
  return Array.from({ length: water.passages }, (_, index) => {
    const speed = 2 + 4 * uniform()
    const distance = 20 + 60 * uniform()
    const depth = 3 + 3 * uniform()
    const computed = 0.02 * speed ** 2.67 * (distance / 30) ** -0.33
    const noise = Math.exp(water.scatter * normalFrom(uniform))
    const second = computed * Math.exp((water.secondScatter ?? 0.3) * normalFrom(uniform))
    const missed = (speed / 4) ** (water.missedPower ?? 0)
    const blunder = index < Math.round((water.blunders ?? 0) * water.passages) ? 5 : 1
    return {
      index,
      label: `passage ${index}`,
      hull: water.hull ?? 'displacement',
      speed,
      distance,
      depth,
      depthFroudeNumber: speed / Math.sqrt(9.80665 * depth),
      height: computed * water.factor * missed * noise * blunder,
      computed: [computed, second],
      isInRange: [true, true],
    }
  })
}

/** Lists of passages as one request. */
export function joined(...lists: readonly (readonly Measurement[])[]): Measurement[] {
  return lists.flat().map((passage, index) => ({ ...passage, index }))
}
