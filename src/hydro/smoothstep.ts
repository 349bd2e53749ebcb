/**
 * Smooth fade from 0 to 1.
 *
 *   S(t) = t² (3 - 2 t), t held within 0 and 1
 *
 * @param t  dimensionless
 * @returns 0 to 1, with level ends
 * @holds everywhere
 * @error exact within rounding
 * @source common practice (cubic Hermite step)
 * @example smoothstep(0.25) // 0.15625
 */
export function smoothstep(t: number): number {
  const held = Math.min(1, Math.max(0, t))
  return held * held * (3 - 2 * held)
}
