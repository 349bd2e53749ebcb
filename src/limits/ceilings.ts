import { CRITERION_IDS, type CriterionId } from '../advisory/criteria/criterion.ts'
import { signOf } from '../advisory/sign.ts'
import type { Cell, CellPlace } from './cell.ts'
import type { PlanRules } from './plan.ts'

/** Why a vessel has no maximum somewhere. */
export interface Lack {
  readonly vessel: number
  /** of the problem, or `no-safe-speed` */
  readonly code: string
  readonly detail: string
}

/** Speed over the ground that a cell allows, m/s; undefined where it allows none, or has no answer. */
export function maximumOf(cell: Cell, percentile: number | null): number | undefined {
  if (cell.problem) return undefined
  const maximum = percentile === null ? cell.answer?.overGround : cell.sampled?.percentiles[percentile]
  return maximum ?? undefined
}

/** The criterion that a cell rests on: of samples the one that governs most, of equal ones the first in order. */
export function criterionOf({ answer, sampled }: Cell, percentile: number | null): CriterionId | undefined {
  if (percentile === null || !sampled) return answer?.governing
  const { governedBy } = sampled
  const most = Math.max(0, ...Object.values(governedBy))
  const found = most > 0 ? CRITERION_IDS.find((id) => governedBy[id] === most) : undefined
  return found ?? answer?.governing
}

function lackOf({ vessel, problem }: Cell, percentile: number | null): Lack {
  if (problem) return { vessel, ...problem }
  const detail =
    percentile === null ? 'no speed is safe' : 'at the percentile of the plan no speed is safe in the samples'
  return { vessel, code: 'no-safe-speed', detail }
}

/** The lowest of the cells that share a limit: what it must not exceed. */
export class LowestCell {
  /** cells that were looked at */
  count = 0
  cell: Cell | undefined
  /** m/s; undefined when some cell has none */
  maximum: number | undefined
  #lacks: Map<string, Lack> | undefined

  /** @param percentile  index among those of the study; null takes the inputs as given */
  add(cell: Cell, percentile: number | null): void {
    this.count += 1
    const maximum = maximumOf(cell, percentile)
    if (maximum === undefined) this.#addLack(lackOf(cell, percentile))
    const difference = rank(maximum) - rank(this.maximum)
    // two of no rank differ by NaN, which is a tie
    const isTie = difference === 0 || Number.isNaN(difference)
    if (!this.cell || (isTie ? isBefore(cell, this.cell) : difference < 0)) {
      this.cell = cell
      this.maximum = maximum
    }
  }

  /** One for each vessel and reason, in the order of vessels. */
  get lacks(): readonly Lack[] {
    return [...(this.#lacks?.values() ?? [])].sort((a, b) => a.vessel - b.vessel)
  }

  #addLack(lack: Lack): void {
    const key = `${lack.vessel} ${lack.code}`
    this.#lacks ??= new Map()
    if (!this.#lacks.has(key)) this.#lacks.set(key, lack)
  }
}

const rank = (maximum: number | undefined): number => maximum ?? -Infinity

/** Order of cells, so that of equal ones the same is named however they arrive. */
function isBefore(a: CellPlace, b: CellPlace): boolean {
  const axes = ['segment', 'vessel', 'waterLevel', 'current', 'direction'] as const
  const axis = axes.find((name) => a[name] !== b[name])
  return axis !== undefined && a[axis] < b[axis]
}

/** Highest limit for a maximum, in the unit of the sign: rounded down to the step, then cut. */
export function ceilingOf(maximum: number, { signUnit, signStep, largestLimit }: PlanRules): number {
  return Math.min(Math.max(0, signOf(maximum, signUnit, signStep).value), largestLimit ?? Infinity)
}

/** Whether a limit may be proposed: 0 is none. */
export function isEnough(ceiling: number | undefined, { smallestLimit = 0 }: PlanRules): ceiling is number {
  return ceiling !== undefined && ceiling > 0 && ceiling >= smallestLimit
}
