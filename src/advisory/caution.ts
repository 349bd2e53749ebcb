import type { Facts } from '../domain/fault.ts'

export const CAUTION_CODES = [
  'local-rules-apply',
  'elevated',
  'near-critical',
  'transcritical',
  'supercritical',
  'no-steady-flow',
  'outside-method-range',
  'no-method-in-range',
  'faster-window',
  'bank-suction',
  'bank-within-reach',
  'hull-over-slope',
  'depth-change',
  'draught-above-permitted',
  'static-clearance-small',
  'meeting-not-considered',
  'mooring-drawdown',
  'wall-reflection',
  'wall-has-no-criterion',
  'permissible-velocity-exceeded',
  'assumed-value-matters',
  'sign-below-steerage',
  'against-current',
  'below-steerage',
  'below-type-test-steerage',
  'beyond-calibration',
] as const
export type CautionCode = (typeof CAUTION_CODES)[number]

export const SEVERITIES = ['info', 'caution', 'warning'] as const
export type Severity = (typeof SEVERITIES)[number]

/** Something a reader must know before using the figure. */
export interface Caution {
  readonly code: CautionCode
  readonly severity: Severity
  readonly text: string
  readonly facts?: Facts
}

/** A value that was not given, with where it comes from. */
export interface Assumption {
  readonly field: string
  readonly value: string | number | boolean
  readonly text: string
  readonly source: string
}
