import { isAllowed, type Levels } from './limit-levels.ts'

/** Costs with the number of stretches beside them; less of the first is better, then less of the second. */
export class Scores {
  readonly cost: Float64Array
  readonly count: Int32Array

  constructor(size: number) {
    this.cost = new Float64Array(size).fill(Infinity)
    this.count = new Int32Array(size)
  }

  offer(at: number, cost: number, count: number): void {
    const held = this.cost[at] ?? -Infinity
    if (cost < held || (cost === held && count < (this.count[at] ?? 0))) {
      this.cost[at] = cost
      this.count[at] = count
    }
  }

  /** Offers what another holds, with a cost and stretches on top. */
  offerFrom(at: number, other: Scores, otherAt: number, cost = 0, count = 0): void {
    this.offer(at, cost + (other.cost[otherAt] ?? Infinity), count + (other.count[otherAt] ?? 0))
  }
}

/**
 * What the rest of a run costs at the least, after a place at a level. A stretch is in one of three states: it is long
 * enough, and may end anyhow; it is a valley, whose neighbours are to be higher, so that its length is of no account;
 * or it holds kept places alone, which are exempt. One that is to be long enough passes to the place where it is in one
 * go. So no state has to know where its stretch began.
 */
export interface Rests {
  readonly long: Scores
  readonly valley: Scores
  /** by place: the level is the kept one */
  readonly exempt: Scores
  /** whether a stretch that begins at a place with a level can be long enough, 0 or 1 */
  readonly canBeLong: Uint8Array
  /** of the whole run */
  readonly whole: Scores
}

/** What it costs at the least to begin a stretch at a place, by level. */
interface Starts {
  /** after a lower stretch */
  readonly risen: Scores
  /** after a higher stretch, or at the start of the run */
  readonly fallen: Scores
}

/** Best start above each level, and below it. */
function besides({ risen, fallen }: Starts, levels: number): { above: Scores; below: Scores } {
  const above = new Scores(levels)
  const below = new Scores(levels)
  for (let j = levels - 2; j >= 0; j -= 1) {
    above.offerFrom(j, above, j + 1)
    above.offerFrom(j, risen, j + 1)
  }
  for (let j = 1; j < levels; j += 1) {
    below.offerFrom(j, below, j - 1)
    below.offerFrom(j, fallen, j - 1)
  }
  return { above, below }
}

/** Least costs of ending a stretch at the last place of the run. */
function atTheEnd(levels: number): { above: Scores; below: Scores } {
  const nothing = new Scores(levels)
  nothing.cost.fill(0)
  return { above: nothing, below: nothing }
}

function startsAt(way: Levels, rests: Rests, i: number): Starts {
  const levels = way.values.length
  const starts = { risen: new Scores(levels), fallen: new Scores(levels) }
  const { risen, fallen } = starts
  const end = way.reach[i] ?? way.places
  for (let j = 0; j < levels; j += 1) {
    if (!isAllowed(way, i, j)) continue
    const at = i * levels + j
    const here = costBetween(way, i, i, j)
    if (rests.canBeLong[at] === 1)
      risen.offerFrom(j, rests.long, end * levels + j, costBetween(way, i, end, j), 1)
    if (way.isKept[i] === 1) risen.offerFrom(j, rests.exempt, i, 0, 1)
    if (way.penalty < Infinity) risen.offerFrom(j, rests.long, at, here + way.penalty, 1)
    fallen.offerFrom(j, risen, j)
    fallen.offerFrom(j, rests.valley, at, here, 1)
  }
  return starts
}

/** Cost of the places from one to another, both counted, at a level. */
export function costBetween({ spent, values }: Levels, from: number, to: number, j: number): number {
  return (spent[(to + 1) * values.length + j] ?? 0) - (spent[from * values.length + j] ?? 0)
}

/** Whether a stretch of kept places goes on after a place. */
export function keepsOn({ isKept, top }: Levels, i: number): boolean {
  return isKept[i + 1] === 1 && top[i + 1] === top[i]
}

/** From the last place to the first: what the rest costs after each. Takes time and room in proportion to n × m. */
export function restsOf(way: Levels): Rests {
  const { places, reach, values } = way
  const levels = values.length
  const rests: Rests = {
    long: new Scores(places * levels),
    valley: new Scores(places * levels),
    exempt: new Scores(places),
    canBeLong: new Uint8Array(places * levels),
    whole: new Scores(1),
  }
  const { long, valley, exempt, canBeLong } = rests
  const clearTo = new Int32Array(levels).fill(places - 1)
  let beside = atTheEnd(levels)
  for (let i = places - 1; i >= 0; i -= 1) {
    for (let j = 0; j < levels; j += 1) {
      const at = i * levels + j
      long.offerFrom(at, beside.above, j)
      long.offerFrom(at, beside.below, j)
      valley.offerFrom(at, beside.above, j)
      if (way.isKept[i] === 1 && way.top[i] === j && !keepsOn(way, i)) {
        exempt.offerFrom(i, beside.above, j)
        exempt.offerFrom(i, beside.below, j)
      }
      if (i + 1 < places && isAllowed(way, i + 1, j)) {
        const next = costBetween(way, i + 1, i + 1, j)
        long.offerFrom(at, long, at + levels, next)
        valley.offerFrom(at, valley, at + levels, next)
      }
      if (!isAllowed(way, i, j)) clearTo[j] = i - 1
      else canBeLong[at] = (reach[i] ?? places) <= (clearTo[j] ?? -1) ? 1 : 0
    }
    if (way.isKept[i] === 1 && keepsOn(way, i)) exempt.offerFrom(i, exempt, i + 1)
    const starts = startsAt(way, rests, i)
    beside = besides(starts, levels)
    if (i === 0) for (let j = 0; j < levels; j += 1) rests.whole.offerFrom(0, starts.fallen, j)
  }
  return rests
}
