/**
 * Everything a wave-height or squat law may read, as one flat record of numbers: made once for a vessel at a station,
 * then only read, so that no law allocates. SI; NaN marks a coefficient that the publication does not give.
 */
export interface Setting {
  /** h, undisturbed depth at the sailing line, m, > 0 */
  readonly depth: number
  /** h_m = A_c/b_w, m, > 0 */
  readonly meanDepth: number
  /** m = A_m/A_e, dimensionless, 0 in open water, < 1 */
  readonly blockage: number
  /** b_e, effective strip, m; Infinity in open water */
  readonly effectiveWidth: number
  readonly isConfined: boolean
  /** V_L, m/s */
  readonly criticalSpeed: number
  /** F_U √(g h_m), m/s; criticalSpeed in open water */
  readonly supercriticalOnset: number
  /** r, share of the alpha_s correction that applies, 0 to 1 */
  readonly correctionShare: number
  readonly hull: 'displacement' | 'semi-displacement' | 'planing'
  readonly isInland: boolean
  /** L, m */
  readonly length: number
  /** B, m */
  readonly beam: number
  /** T, m */
  readonly draught: number
  /** C_B */
  readonly blockCoefficient: number
  /** displaced volume at rest, m³ */
  readonly volume: number
  /** Le, m */
  readonly entranceLength: number
  /** a_i of the Rock Manual, NaN where it gives none */
  readonly envelopeCoefficient: number
  /** A'' of Blaauw et al., NaN where they give none */
  readonly centralCoefficient: number
}
