import {
  isAllowed,
  isLongEnough,
  levelsOf,
  type LengthRule,
  type Levels,
  type Place,
} from './limit-levels.ts'
import { costBetween, keepsOn, restsOf, type Rests } from './limit-search.ts'

/** In what a stretch is after a place, with the least that the rest can cost from there. */
interface State {
  readonly kind: 'long' | 'valley' | 'exempt' | 'lengthening'
  /** of a lengthening stretch the place where it is long enough */
  readonly until: number
  readonly cost: number
  readonly count: number
}

/** Stretches that began apart go on alike: without this their number would double at every start. */
const distinct = (states: readonly State[]): State[] =>
  states.filter(
    ({ kind, until }, i) => states.findIndex((other) => other.kind === kind && other.until === until) === i,
  )

class Chooser {
  readonly #way: Levels
  readonly #rests: Rests

  constructor(way: Levels, rests: Rests) {
    this.#way = way
    this.#rests = rests
  }

  /** Stretches that begin at a place with a level, after a stretch of the level `before`. */
  #begun(i: number, j: number, before: number): { state: State; penalty: number }[] {
    const { isKept, penalty, places, reach, values } = this.#way
    const begun: { state: State; penalty: number }[] = []
    if (this.#rests.canBeLong[i * values.length + j] === 1)
      begun.push({ state: this.#lengthening(i, j, reach[i] ?? places), penalty: 0 })
    if (isKept[i] === 1) begun.push({ state: this.#state('exempt', i, j), penalty: 0 })
    if (j < before) begun.push({ state: this.#state('valley', i, j), penalty: 0 })
    if (penalty < Infinity) begun.push({ state: this.#state('long', i, j), penalty })
    return begun
  }

  #lengthening(i: number, j: number, until: number): State {
    if (i === until) return this.#state('long', i, j)
    const end = this.#state('long', until, j)
    return { ...end, kind: 'lengthening', until, cost: end.cost + costBetween(this.#way, i + 1, until, j) }
  }

  #state(kind: 'long' | 'valley' | 'exempt', i: number, j: number): State {
    const at = kind === 'exempt' ? i : i * this.#way.values.length + j
    const { cost, count } = this.#rests[kind]
    return { kind, until: i, cost: cost[at] ?? Infinity, count: count[at] ?? 0 }
  }

  /** The same stretch one place on. */
  #continued(state: State, i: number, j: number): State | undefined {
    if (state.kind === 'lengthening') return this.#lengthening(i, j, state.until)
    if (state.kind === 'exempt' && !keepsOn(this.#way, i - 1)) return undefined
    return this.#state(state.kind, i, j)
  }

  #canEnd({ kind }: State, i: number, isRise: boolean): boolean {
    if (kind === 'lengthening') return false
    if (kind === 'exempt') return !keepsOn(this.#way, i - 1)
    return kind === 'long' || isRise
  }

  /** States after place i at level j that lose nothing against the least, from a state before it at level `before`. */
  #reached(from: State, i: number, j: number, before: number): State[] {
    const here = costBetween(this.#way, i, i, j)
    if (j === before) {
      const next = this.#continued(from, i, j)
      return next && from.cost === here + next.cost && from.count === next.count ? [next] : []
    }
    if (!this.#canEnd(from, i, j > before)) return []
    return this.#begun(i, j, before)
      .filter(
        ({ state, penalty }) => from.cost === here + penalty + state.cost && from.count === state.count + 1,
      )
      .map(({ state }) => state)
  }

  /** The highest level at each place in turn with which the least is still reached. */
  levels(): number[] {
    const { places, values } = this.#way
    const { cost, count } = this.#rests.whole
    const chosen: number[] = []
    // before the start every level is a fall, and anything may follow
    let before = values.length
    let states: State[] = [{ kind: 'long', until: -1, cost: cost[0] ?? Infinity, count: count[0] ?? 0 }]
    for (let i = 0; i < places; i += 1) {
      let j = this.#way.top[i] ?? -1
      let next: State[] = []
      for (; j >= 0; j -= 1) {
        if (!isAllowed(this.#way, i, j)) continue
        next = distinct(states.flatMap((state) => this.#reached(state, i, j, before)))
        if (next.length > 0) break
      }
      if (j < 0) throw new RangeError('The least cost of a run is not reached by any limit')
      chosen.push(j)
      before = j
      states = next
    }
    return chosen
  }
}

/**
 * The best limits along a run: least sum of length over limit; of those the fewest changes of limit; of those the
 * highest limits from upstream.
 *
 * No limit is above the level of its place. A stretch, the longest row of places with one limit, that is higher than a
 * neighbour is at least `minRunLength` long, unless its places are kept, all of them. Where none is kept lower than
 * every limit that may be proposed, this can always be met: with the lowest level of the run everywhere but on kept
 * places no proposed stretch is higher than another. Where one is, as few stretches as possible break the rule.
 *
 * @param places  n places from upstream, n ≥ 1; of those that are not kept, levels are at least `smallest`
 * @returns n limits in the unit of the sign, limit i for place i
 */
export function bestLimits(places: readonly Place[], rule: LengthRule): number[] {
  const strict = levelsOf(places, rule, false)
  const rests = restsOf(strict)
  if ((rests.whole.cost[0] ?? Infinity) < Infinity) return limitsOf(strict, rests)
  const lenient = levelsOf(places, rule, true)
  return limitsOf(lenient, restsOf(lenient))
}

function limitsOf(way: Levels, rests: Rests): number[] {
  return new Chooser(way, rests).levels().map((j) => way.values[j] ?? NaN)
}

/**
 * Whether each place lies in a proposed stretch that is higher than a neighbour and shorter than it should be.
 *
 * @param limits  n limits, limit i for place i
 */
export function isTooShort(
  places: readonly Place[],
  limits: readonly number[],
  minRunLength: number,
): boolean[] {
  const marks: boolean[] = []
  for (let from = 0; from < places.length;) {
    let to = from
    while (to + 1 < places.length && limits[to + 1] === limits[from]) to += 1
    const stretch = places.slice(from, to + 1)
    const limit = limits[from] ?? 0
    const isHigher = limit > (limits[from - 1] ?? Infinity) || limit > (limits[to + 1] ?? Infinity)
    const length = stretch.reduce((sum, place) => sum + place.length, 0)
    const isBroken = isHigher && !isLongEnough(length, minRunLength) && stretch.some(({ isKept }) => !isKept)
    marks.push(...stretch.map(() => isBroken))
    from = to + 1
  }
  return marks
}
