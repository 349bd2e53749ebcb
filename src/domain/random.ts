/** Uniform on [0, 1). */
export type Random = () => number

/**
 * Uniform numbers that follow from a seed and a name alone: mulberry32, started at the seed xor the FNV-1a hash of the
 * name, so that each use has its own sequence and none shifts when another is left out.
 *
 * @param seed  integer, 0 to 2³² − 1; more bits are cut off
 * @param name  of the use, any text
 * @returns numbers in steps of 2⁻³²; period 2³²
 * @source Ettinger, T. (2017), mulberry32, public domain; Fowler, Noll & Vo, FNV-1a (RFC 9923)
 */
export function randomOf(seed: number, name: string): Random {
  let state = (seed ^ hashOf(name)) >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), state | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32
  }
}

function hashOf(text: string): number {
  let hash = 0x811c9dc5
  for (const byte of new TextEncoder().encode(text)) hash = Math.imul(hash ^ byte, 0x01000193)
  return hash >>> 0
}
