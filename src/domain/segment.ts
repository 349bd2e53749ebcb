import type { Hull, Loading } from './vessel.ts'

export const BANK_KINDS = ['unprotected', 'reed', 'riprap', 'wall'] as const
export type BankKind = (typeof BANK_KINDS)[number]

export const BED_KINDS = [
  'fine-sand',
  'medium-sand',
  'coarse-sand',
  'very-coarse-sand',
  'very-fine-gravel',
  'fine-gravel',
  'medium-gravel',
  'coarse-gravel',
  'very-coarse-gravel',
  'small-cobbles',
  'sandy-loam',
  'loess',
] as const
export type BedKind = (typeof BED_KINDS)[number]

export const RECEPTOR_KINDS = ['moored-small-craft', 'bathing-place', 'reed-bed', 'other'] as const
export type ReceptorKind = (typeof RECEPTOR_KINDS)[number]

export const DIRECTIONS = ['upstream', 'downstream'] as const
export type Direction = (typeof DIRECTIONS)[number]

/** Left and right are seen looking downstream; nearer and farther where no side is known. */
export type Side = 'left' | 'right' | 'nearer' | 'farther'

/** One bank of a segment. Index 0 of a pair is left or nearer, index 1 right or farther. */
export interface Bank {
  readonly side: Side
  readonly kind: BankKind
  /** false when the kind is the default and not a statement of the caller */
  readonly isKindGiven: boolean
  readonly maxWaveHeight?: number
  readonly maxDrawdown?: number
  readonly maxReturnCurrent?: number
  /** D50 of the riprap, m */
  readonly stoneD50?: number
  /** Delta, (rho_s - rho)/rho of the riprap, dimensionless */
  readonly stoneRelativeDensity: number
  /** n, horizontal over vertical; absent: by kind */
  readonly slope?: number
  /** water depth at the toe of the bank below the datum, m */
  readonly toeDepth?: number
}

/** Shape of the cross-section at a station. */
export type SectionShape =
  /** slope: n of both banks, horizontal over vertical; bottomWidth in m; neither: n by bank kind */
  | { readonly kind: 'trapezoid'; readonly bottomWidth?: number; readonly slope?: number }
  /** offsets from the sailing line, positive to the right looking downstream, strictly rising; bed depth positive below the datum, m */
  | { readonly kind: 'profile'; readonly offsets: readonly number[]; readonly bedDepths: readonly number[] }

/** The water at one place along the sailing line, at the datum. */
export interface Station {
  readonly index: number
  /** whether it was put between two others, where figures change much from one to the other */
  readonly isBetween?: true
  /** m along the waterway; absent for a segment described in a request */
  readonly chainage?: number
  /** bed below the datum at the sailing line, m */
  readonly depth: number
  /** water surface at the datum, m */
  readonly width: number
  /** sailing line to each waterline at the datum, m, in the order of the banks */
  readonly distances: readonly [number, number]
  readonly shape: SectionShape
}

/** Something on the bank or at a berth that the waves must not harm. */
export interface Receptor {
  readonly name?: string
  readonly kind: ReceptorKind
  readonly side: Side
  /** from the sailing line, m */
  readonly distance: number
  /** m along the waterway */
  readonly chainage?: number
  /** index of the station that it lies at; absent: it counts at every one */
  readonly station?: number
  readonly maxWaveHeight?: number
}

/** Vessels that a rule applies to: every condition that is given holds. */
export interface Group {
  readonly vesselClasses?: readonly string[]
  readonly loading?: Loading
  /** inclusive, m */
  readonly minDraught?: number
  /** exclusive, m */
  readonly maxDraught?: number
  /** inclusive, m */
  readonly minLength?: number
  readonly hull?: Hull
}

export interface PostedLimit {
  /** m/s */
  readonly speed: number
  readonly reference: 'over-ground' | 'through-water'
  readonly direction: 'both' | Direction
  readonly appliesTo: Group
}

export interface Segment {
  readonly id?: string
  readonly name?: string
  readonly waterway?: string
  readonly revision?: number
  readonly stations: readonly [Station, ...Station[]]
  readonly banks: readonly [Bank, Bank]
  readonly receptors: readonly Receptor[]
  readonly bedKind?: BedKind
  readonly minUnderKeelClearance?: number
  /** permitted draught, m */
  readonly maxDraught?: number
  readonly postedLimits: readonly PostedLimit[]
  readonly confinement: 'confined' | 'open'
}
