import { ascending } from 'd3-array'
import type { Measurement } from './measurement.ts'
import { outlierRuleOf, type OutlierRule } from './robust.ts'

/** A passage against one method. */
export interface Ratio {
  readonly passage: Measurement
  /** natural logarithm of measured over computed height */
  readonly logRatio: number
  readonly isOutlier: boolean
}

/** What one method has of the passages. */
export interface Ratios {
  /** passages in range with a computed height, in canonical order */
  readonly all: readonly Ratio[]
  /** those without the outliers */
  readonly kept: readonly Ratio[]
  readonly rule: OutlierRule
}

/** Passages against the method at a place of the list. */
export function ratiosOf(passages: readonly Measurement[], method: number): Ratios {
  const found = passages.flatMap((passage) => {
    const computed = passage.computed[method] ?? NaN
    if (passage.isInRange[method] !== true || !(computed > 0)) return []
    return [{ passage, hull: passage.hull, logRatio: Math.log(passage.height / computed) }]
  })
  const rule = outlierRuleOf(found)
  const all = found.map(({ passage, hull, logRatio }) => ({
    passage,
    logRatio,
    isOutlier: Math.abs(logRatio - rule.centreOf(hull)) > rule.bound,
  }))
  return { all, kept: all.filter(({ isOutlier }) => !isOutlier), rule }
}

/** Passages in an order that follows from their figures alone, whatever the order of the request. */
export function canonical(passages: readonly Measurement[]): Measurement[] {
  return passages.toSorted((a, b) => {
    for (const figure of FIGURES) {
      const order = ascending(figure(a), figure(b))
      if (order !== 0) return order
    }
    return differing(a.computed, b.computed) || differing(a.isInRange, b.isInRange)
  })
}

const FIGURES: readonly ((passage: Measurement) => number | string)[] = [
  ({ height }) => height,
  ({ speed }) => speed,
  ({ distance }) => distance,
  ({ depth }) => depth,
  ({ hull }) => hull,
]

/** Order by the first entry that differs; NaN after every number. */
function differing(a: readonly (number | boolean)[], b: readonly (number | boolean)[]): number {
  const sortable = (value: number | boolean | undefined): number => {
    const number = Number(value)
    return Number.isNaN(number) ? Infinity : number
  }
  const at = a.findIndex((value, place) => sortable(value) !== sortable(b[place]))
  return at < 0 ? 0 : ascending(sortable(a[at]), sortable(b[at]))
}
