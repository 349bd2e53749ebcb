import { signOf } from '../advisory/sign.ts'
import { isEnough } from './ceilings.ts'
import { bestLimits, isTooShort } from './limit-choice.ts'
import type { Place } from './limit-levels.ts'
import type { PlanRules, StretchOutcome } from './plan.ts'
import { valueIn } from './posted.ts'

/** What a plan rests on at one segment, for one group in one direction. */
export interface Site {
  /** index in the study */
  readonly segment: number
  /** along the sailing line, m */
  readonly length: number
  /** in the unit of the sign; absent where some cell has no maximum */
  readonly ceiling?: number
  /** posted limit that stays, over the ground, m/s */
  readonly kept?: number
}

/** Consecutive sites with one outcome and one limit. */
export interface Row {
  readonly sites: readonly Site[]
  readonly outcome: StretchOutcome
  /** in the unit of the sign */
  readonly limit?: number
  /** whether it is shorter than the rules ask, which a kept limit lower than all others can force */
  readonly isTooShort: boolean
}

interface Marked {
  readonly site: Site
  readonly outcome: StretchOutcome
  readonly limit?: number
  readonly isTooShort: boolean
}

const canHaveLimit = (site: Site, rules: PlanRules): boolean =>
  site.kept !== undefined || isEnough(site.ceiling, rules)

/** A limit that stays, and one that is proposed, are rows of their own even where they are equal. */
const isSame = (a: Marked, b: Marked): boolean => a.outcome === b.outcome && a.limit === b.limit

/** Parts of a list between changes of something. */
function parts<Item>(items: readonly Item[], isAlike: (a: Item, b: Item) => boolean): Item[][] {
  const found: Item[][] = []
  items.forEach((item, i) => {
    const last = items[i - 1]
    if (last === undefined || !isAlike(last, item)) found.push([])
    found.at(-1)?.push(item)
  })
  return found
}

/**
 * Limits along a run of sites, from upstream. A site that can have none parts the run: what lies on one side of it does
 * not bear on the other.
 */
export function rowsOf(run: readonly Site[], rules: PlanRules): Row[] {
  const blocks = parts(run, (a, b) => canHaveLimit(a, rules) === canHaveLimit(b, rules))
  return blocks.flatMap((block) => {
    const [first] = block
    const marked = first && canHaveLimit(first, rules) ? withLimits(block, rules) : without(block)
    return parts(marked, isSame).map(toRow)
  })
}

function without(sites: readonly Site[]): Marked[] {
  return sites.map((site) => ({ site, outcome: 'below-smallest-limit', isTooShort: false }))
}

function placeOf({ length, ceiling = 0, kept }: Site, { signUnit, signStep }: PlanRules): Place {
  if (kept === undefined) return { length, isKept: false, level: ceiling, proposal: ceiling }
  const proposal = signOf(kept, signUnit, signStep).value
  return { length, isKept: true, level: valueIn(kept, signUnit), proposal }
}

function withLimits(sites: readonly Site[], rules: PlanRules): Marked[] {
  const places = sites.map((site) => placeOf(site, rules))
  const { minRunLength, smallestLimit: smallest = 0, signStep: step } = rules
  const limits = bestLimits(places, { minRunLength, smallest, step })
  const marks = isTooShort(places, limits, minRunLength)
  return sites.map((site, i) => {
    const isKept = site.kept !== undefined
    return {
      site,
      outcome: isKept ? 'kept' : 'limit',
      limit: limits[i] ?? NaN,
      isTooShort: !isKept && marks[i] === true,
    }
  })
}

function toRow(marked: readonly Marked[]): Row {
  const [first] = marked
  if (!first) throw new RangeError('A stretch has at least one segment')
  const { outcome, limit } = first
  return {
    sites: marked.map(({ site }) => site),
    outcome,
    ...(limit !== undefined && { limit }),
    isTooShort: marked.some((mark) => mark.isTooShort),
  }
}
