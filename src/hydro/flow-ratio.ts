import { smoothstep } from './smoothstep.ts'

/** alpha_s at rest and its fall per V/V_L (Rock Manual C683 (2007), 4.3.4, from memory). */
export const CORRECTION_AT_REST = 0.4

/**
 * Flow past the hull over the speed of the hull: w = A_c/A_c*, from continuity and Bernoulli, by the closed solution of
 * w³ - p w + q = 0 with p = 2 (1 - m + F²/2)/(alpha F²), q = 2/(alpha F²).
 *
 * @param froude    F = V/√(g h_m), on the mean depth, > 0
 * @param blockage  m, 0 ≤ m < 1
 * @param alpha     alpha_s, ≥ 1
 * @returns w > 1, the smallest positive root; NaN when there is no steady subcritical flow
 * @holds F up to F_L at alpha = 1
 * @error exact within rounding for the model of Schijf (1949)
 * @source Schijf (1949), see `lowerLimitFroude`; alpha_s: Rock Manual C683 (2007), 4.3.4 (from memory)
 * @example flowRatio(0.5, 0.1, 1) // 1.17186
 */
export function flowRatio(froude: number, blockage: number, alpha: number): number {
  const scale = alpha * froude * froude
  const third = (2 * (1 - blockage) + froude * froude) / (3 * scale)
  const sine = 1 / (scale * third * Math.sqrt(third))
  // the double root at F_L may come out a few units in the last place above 1
  if (sine > 1 + 1e-12) return NaN
  return 2 * Math.sqrt(third) * Math.sin(Math.asin(Math.min(1, sine)) / 3)
}

/**
 * The same ratio above the upper limit, where the level rises beside the hull: the largest root, w < 1.
 *
 * @param froude    F on the mean depth, ≥ F_U
 * @param blockage  m, 0 ≤ m < 1
 * @returns w, 0 to 1; NaN when there is no steady supercritical flow
 * @holds F from F_U up
 * @error exact within rounding for the model of Schijf (1949)
 * @source as `flowRatio`
 * @example supercriticalFlowRatio(1.6, 0.1) // 0.928
 */
export function supercriticalFlowRatio(froude: number, blockage: number): number {
  const square = froude * froude
  const third = (2 * (1 - blockage) + square) / (3 * square)
  const sine = 1 / (square * third * Math.sqrt(third))
  if (sine > 1 + 1e-12) return NaN
  return 2 * Math.sqrt(third) * Math.sin((Math.PI - Math.asin(Math.min(1, sine))) / 3)
}

/**
 * Share of the alpha_s correction that applies: all of it inside its published range, fading to none outside.
 *
 *   r = S((15 - b_w/B)/3) S((m - 0.015)/0.015)
 *
 * @param widthToBeam  b_w/B, > 0
 * @param blockage     m, ≥ 0
 * @returns r, 0 to 1; 1 for b_w/B ≤ 12 and m ≥ 0.03
 * @holds inland hulls
 * @error the fading is an own choice: a hard edge would jump by up to 39 %
 * @source range: Rock Manual C683 (2007), 4.3.4 (from memory); fading: own choice
 * @example correctionShare(13.5, 0.05) // 0.5
 */
export function correctionShare(widthToBeam: number, blockage: number): number {
  return smoothstep((15 - widthToBeam) / 3) * smoothstep((blockage - 0.015) / 0.015)
}

/**
 * Correction of the drawdown for the uneven return flow beside inland hulls.
 *
 *   alpha_s = 1 + r (0.4 - 0.4 V/V_L)
 *
 * @param share          r, 0 to 1
 * @param criticalRatio  V/V_L, 0 to 1
 * @returns alpha_s, 1 to 1.4
 * @holds inland hulls below the critical speed
 * @error not reported
 * @source Rock Manual C683 (2007), 4.3.4 (from memory)
 * @example correctionFactor(1, 0.75) // 1.1
 */
export function correctionFactor(share: number, criticalRatio: number): number {
  return 1 + share * CORRECTION_AT_REST * (1 - criticalRatio)
}
