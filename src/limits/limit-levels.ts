/** A place along a run, with what may stand there. */
export interface Place {
  /** m, > 0 */
  readonly length: number
  /** whether a posted limit stays here, which is then the only one */
  readonly isKept: boolean
  /** highest limit, or the one that stays; in the unit of the sign, > 0 */
  readonly level: number
  /** highest limit on a step of the sign that is not above `level` */
  readonly proposal: number
}

/** What limits are chosen by. */
export interface LengthRule {
  /** m that a stretch higher than a neighbour is long at least */
  readonly minRunLength: number
  /** lowest limit that may be proposed, in the unit of the sign */
  readonly smallest: number
  /** of the sign, in its unit */
  readonly step: number
}

/** Sums of lengths end a few units in the last place off, m. */
const LENGTH_SLACK = 1e-6

/** Whether a stretch is as long as a stretch higher than a neighbour is to be; both in m. */
export const isLongEnough = (length: number, minRunLength: number): boolean =>
  length >= minRunLength - LENGTH_SLACK

/** Largest sum of costs: doubles hold whole numbers to 2⁵³, and a product before it is rounded is off by a few ulp. */
const MOST_COST = 2 ** 50

/** A run as numbers: n places by m levels, value (i, j) at index i × m + j. */
export interface Levels {
  readonly places: number
  /** m limits in the unit of the sign, rising */
  readonly values: readonly number[]
  /** index of the highest level at a place, of the only one where a limit is kept */
  readonly top: Int32Array
  readonly isKept: Uint8Array
  /** whether a level may be proposed, 0 or 1 */
  readonly isProposable: Uint8Array
  /** first place at whose end a stretch that begins here is long enough; n where none is */
  readonly reach: Int32Array
  /** cost from the start of the run to a place at one level throughout, kept places free; n + 1 by m */
  readonly spent: Float64Array
  /** more than any plan without it costs */
  readonly penalty: number
}

function greatestDivisor(a: number, b: number): number {
  return b === 0 ? a : greatestDivisor(b, a % b)
}

/** Least common multiple of those that are whole; Infinity above 2⁵⁰. */
function leastMultiple(numbers: readonly number[]): number {
  return numbers
    .filter((number) => Number.isInteger(number))
    .reduce((multiple, number) => {
      if (multiple === Infinity) return Infinity
      const next = multiple * (number / greatestDivisor(multiple, number))
      return next <= MOST_COST ? next : Infinity
    }, 1)
}

/**
 * Cost of one metre at a limit of one step. Costs are whole numbers, so that plans that take the same time compare
 * equal in whatever order they are summed. Where there is room the scale is a multiple of all numbers of steps, and of
 * the millimetres in a metre: lengths of whole millimetres then lose nothing at all, others 1e-12 of the sum.
 */
function scaleOf(steps: readonly number[], length: number, most: number): number {
  const room = (most * Math.min(...steps)) / length
  const multiple = leastMultiple(steps)
  const unit = [1000 * multiple, multiple].find((candidate) => candidate <= room)
  return unit === undefined ? room : Math.floor(room / unit) * unit
}

/**
 * Limits that can occur in the best plan: every ceiling, and the steps at and below every limit that stays.
 *
 * No other is needed. Raise a proposed stretch by a step: it takes less time, and breaks no rule until it meets a
 * ceiling of its own or a neighbour. A proposed neighbour it joins. A kept one it joins, or stays a step below, where
 * joined they would be higher than what lies beyond and too short.
 */
function valuesOf(places: readonly Place[], rule: LengthRule): { values: number[]; proposable: Set<number> } {
  const candidates = places.flatMap((place) => proposalsAt(place, rule.step))
  const proposable = new Set(candidates.filter((value) => value > 0 && value >= rule.smallest))
  const values = [...new Set([...proposable, ...places.map(({ level }) => level)])]
  return { values: values.sort((a, b) => a - b), proposable }
}

function proposalsAt({ isKept, level, proposal }: Place, step: number): number[] {
  return isKept && proposal === level ? [proposal, Number((proposal - step).toFixed(9))] : [proposal]
}

function reachOf(places: readonly Place[], minRunLength: number): Int32Array {
  const ends = [0]
  for (const { length } of places) ends.push((ends.at(-1) ?? 0) + length)
  let end = 0
  return Int32Array.from(places, (_, i) => {
    end = Math.max(end, i)
    while (end < places.length && (ends[end + 1] ?? 0) - (ends[i] ?? 0) < minRunLength - LENGTH_SLACK)
      end += 1
    return end
  })
}

/**
 * A run as the search wants it.
 *
 * @param places       n places from upstream, n ≥ 1; levels of places that are not kept are at least `smallest`
 * @param hasPenalty   whether costs leave room for a penalty at every place
 */
export function levelsOf(places: readonly Place[], rule: LengthRule, hasPenalty: boolean): Levels {
  const { values, proposable } = valuesOf(places, rule)
  const indices = new Map(values.map((value, j) => [value, j]))
  const isProposable = Uint8Array.from(values, (value) => (proposable.has(value) ? 1 : 0))
  const steps = values.map((value) => Number((value / rule.step).toPrecision(12)))
  const used = steps.filter((_, j) => isProposable[j] === 1)
  const length = places.reduce((sum, place) => sum + (place.isKept ? 0 : place.length), 0)
  const most = hasPenalty ? MOST_COST / (places.length + 2) : MOST_COST
  const scale = used.length > 0 && length > 0 ? scaleOf(used, length, most) : 0
  const spent = new Float64Array((places.length + 1) * values.length)
  places.forEach((place, i) => {
    steps.forEach((step, j) => {
      const at = i * values.length + j
      const isFree = place.isKept || isProposable[j] === 0
      spent[at + values.length] = (spent[at] ?? 0) + (isFree ? 0 : Math.round((place.length * scale) / step))
    })
  })
  return {
    places: places.length,
    values,
    top: Int32Array.from(places, ({ level }) => indices.get(level) ?? 0),
    isKept: Uint8Array.from(places, (place) => (place.isKept ? 1 : 0)),
    isProposable,
    reach: reachOf(places, rule.minRunLength),
    spent,
    penalty: hasPenalty ? Math.ceil(most) + places.length : Infinity,
  }
}

export function isAllowed({ top, isKept, isProposable }: Levels, i: number, j: number): boolean {
  const highest = top[i] ?? -1
  return isKept[i] === 1 ? j === highest : j <= highest && isProposable[j] === 1
}
