export const CRITERION_IDS = [
  'critical-ratio',
  'depth-froude-number',
  'bank-wave-height',
  'receptor-wave-height',
  'under-keel-clearance',
  'drawdown',
  'return-current',
  'wake-wash',
  'posted-limit',
  'service-speed',
] as const
export type CriterionId = (typeof CRITERION_IDS)[number]

export type Origin = 'policy' | 'segment' | 'request' | 'vessel'

/** A criterion at a speed. */
export interface Evaluation {
  /** in the criterion's unit; absent where it cannot be evaluated, which counts as reached */
  readonly value?: number
  readonly limit: number
  /** what the value is of, where a criterion has several parts */
  readonly component?: string | undefined
  readonly isMet: boolean
}

/** One bound on the speed. All speeds through the water, m/s. */
export interface Criterion {
  readonly id: CriterionId
  /** what is protected: the vessel, a bank, a receptor */
  readonly place: string
  readonly sense: 'at-most' | 'at-least'
  readonly unit: 'm' | 'm/s' | 'ratio'
  readonly origin: Origin
  /**
   * First speed in [from, to) above which the criterion is reached, or cannot be evaluated: `from` when it is at once,
   * Infinity when it never is up to `to`.
   *
   * @param most  a speed above it need not be told: Infinity may stand for it; default none
   */
  firstSpeed(from: number, to: number, most?: number): number
  evaluate(speed: number): Evaluation
}

/** Slack of a comparison: a recommendation stands on its bound to the last digits. */
const SLACK = 1e-9

export function isAtMost(value: number, limit: number): boolean {
  return value <= limit * (1 + SLACK)
}

/** An evaluation against an upper bound; NaN is unknown and not met. */
export function atMost(value: number, limit: number, component?: string): Evaluation {
  if (Number.isNaN(value)) return { limit, isMet: false }
  return { value, limit, component, isMet: isAtMost(value, limit) }
}

/** First speed of a criterion that rises with speed and is reached at `reachedAt`. */
export function firstOfRising(reachedAt: number, from: number, to: number): number {
  if (!(reachedAt > from)) return from
  return reachedAt < to ? reachedAt : Infinity
}
