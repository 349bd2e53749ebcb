const HEIGHT_AT_REFERENCE = 0.5 // m, Danish Maritime Authority order (1997), from memory
const REFERENCE_PERIOD = 4.5 // s, the same

/**
 * Greatest height of long-period wash under the Danish rule for high-speed craft.
 *
 *   H = 0.5 √(4.5 / T)
 *
 * @param period  T, mean period of the long-period waves, s, > 0
 * @returns H, at 3 m depth, m, > 0
 * @holds T of about 4.5 s and longer, at 3 m depth
 * @error a rule, not a measurement
 * @source Parnell & Kofoed-Hansen (2001), Coastal Management 29, of the Danish Maritime Authority's order (1997), from memory
 * @example allowedWakeWashHeight(9) // 0.35355
 */
export function allowedWakeWashHeight(period: number): number {
  return HEIGHT_AT_REFERENCE * Math.sqrt(REFERENCE_PERIOD / period)
}
