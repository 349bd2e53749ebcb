/**
 * Lower limit Froude number: above it no steady flow passes the hull and water piles up ahead of it.
 *
 *   F_L = (2 sin(asin(1 - m)/3))^1.5, the subcritical root of 1 - m + F²/2 - (3/2) F^(2/3) = 0
 *
 * @param blockage  m, immersed midship section over waterway section, 0 ≤ m < 1
 * @returns F_L on the mean depth, dimensionless, 0 to 1; 1 at m = 0
 * @holds prismatic section, vertical walls over the drawdown height, no friction, the hull sinks with the water
 * @error exact within rounding for that model; the model: see `meanDrawdown`
 * @source Schijf, J.B. (1949), PIANC XVIIth Int. Navigation Congress Lisbon, Sec. I Q. 2, pp. 61-78 (from memory);
 *   closed form by the substitution F^(2/3) = 2 sin φ
 * @example lowerLimitFroude(0.1) // 0.62281
 */
export function lowerLimitFroude(blockage: number): number {
  return (2 * Math.sin(Math.asin(1 - blockage) / 3)) ** 1.5
}

/**
 * Upper limit Froude number: above it the flow past the hull is steady again, and the level rises beside it.
 *
 *   F_U = (2 sin((π - asin(1 - m))/3))^1.5
 *
 * @param blockage  m, 0 ≤ m < 1
 * @returns F_U on the mean depth, dimensionless, ≥ 1; 1 at m = 0
 * @holds as `lowerLimitFroude`
 * @error exact within rounding for that model
 * @source as `lowerLimitFroude`
 * @example upperLimitFroude(0.1) // 1.39443
 */
export function upperLimitFroude(blockage: number): number {
  return (2 * Math.sin((Math.PI - Math.asin(1 - blockage)) / 3)) ** 1.5
}
