export const HULLS = ['displacement', 'semi-displacement', 'planing'] as const
export type Hull = (typeof HULLS)[number]

export const LOADINGS = ['laden', 'empty'] as const
export type Loading = (typeof LOADINGS)[number]

/** Which waters and rules a vessel belongs to; decides alpha_s, energy density and some cautions. */
export type Trade = 'inland-cargo' | 'inland-other' | 'sea-going'

/** Where a figure of a vessel comes from. */
export type Basis = 'given' | 'standard' | 'typical' | 'derived'

/** Fields of a vessel that a class or a default can supply. */
export type VesselField =
  | 'length'
  | 'beam'
  | 'draught'
  | 'blockCoefficient'
  | 'midshipCoefficient'
  | 'entranceLength'
  | 'volume'
  | 'maxSpeed'
  | 'minSteerageSpeed'
  | 'envelopeCoefficient'
  | 'centralCoefficient'

/** A vessel as the hydraulics sees it, SI. */
export interface Vessel {
  readonly classId?: string
  readonly className?: string
  readonly loading?: Loading
  readonly hull: Hull
  readonly trade: Trade
  /** self-propelled inland vessel to which the type test of steerage applies */
  readonly isInlandMotorVessel: boolean
  /** L, waterline length, m, > 0 */
  readonly length: number
  /** B, beam, m, > 0 */
  readonly beam: number
  /** T, draught, m, > 0 */
  readonly draught: number
  /** C_B, displaced volume over L B T, 0 to 1 */
  readonly blockCoefficient: number
  /** C_m, immersed midship section over B T, 0 to 1 */
  readonly midshipCoefficient: number
  /** Le, stem to the start of the parallel middle body, m */
  readonly entranceLength: number
  /** displaced volume at rest, m³ */
  readonly volume: number
  /** top speed through the water, m/s */
  readonly maxSpeed: number
  /** least speed through the water at which the rudder answers, m/s */
  readonly minSteerageSpeed: number
  /** a_i of `rock-manual-2007`, dimensionless; absent where the manual gives none */
  readonly envelopeCoefficient?: number
  /** A'' of `blaauw-1984`, dimensionless; absent where the paper gives none */
  readonly centralCoefficient?: number
  readonly basis: Readonly<Record<VesselField, Basis>>
}
