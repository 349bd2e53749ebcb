import { quantileSorted, sum } from 'd3-array'
import type { Direction } from '../domain/segment.ts'
import { KNOT } from '../domain/units.ts'
import type { Passage } from './passage.ts'

/** Width of a bin of the histogram of speeds, m/s: half a knot. */
const BIN = KNOT / 2
/** Share of the passages whose part of the energy is told: the worst tenth. */
const WORST = 0.1

/** Passages of one class through one segment in one direction. SI. */
export interface PassageGroup {
  readonly segmentId: string
  readonly classId: string
  readonly direction: Direction | undefined
  readonly passages: number
  /** 50th, 85th and 95th percentile of the speeds of the passages over ground */
  readonly speedPercentiles: readonly [p50: number, p85: number, p95: number]
  /** passages by speed, bins of half a knot from zero */
  readonly histogram: readonly number[]
  /** of the passages with a judged report; NaN without one */
  readonly aboveRecommendedRatio: number
  /** of the passages for which a limit is posted; NaN without one */
  readonly abovePostedRatio: number
  readonly noSafeSpeedPassages: number
  /** sum over the passages where it is known, J per metre of crest; NaN where it is for none */
  readonly energies: readonly [left: number, right: number]
  /** share of the energy to both banks that the tenth of the passages with most of it brings; NaN without energy */
  readonly worstTenthRatio: number
  /** with a report whose waves no method covers, left out of the energies */
  readonly unknownEnergyPassages: number
}

interface Collected {
  readonly segmentId: string
  readonly classId: string
  readonly direction: Direction | undefined
  readonly speeds: number[]
  readonly energySums: number[]
  left: number
  right: number
  judged: number
  above: number
  posted: number
  abovePosted: number
  unsafe: number
  unknown: number
}

const byText = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0)

/** Sums passages up by segment, class and direction. Keeps two numbers for each passage. */
export class Groups {
  readonly #groups = new Map<string, Collected>()
  #passages = 0

  get passages(): number {
    return this.#passages
  }

  add({ fairway, classId, direction, speed, energies, ...passage }: Passage): void {
    this.#passages += 1
    const key = `${fairway.id} ${classId} ${direction ?? ''}`
    let group = this.#groups.get(key)
    if (!group) {
      group = emptyGroup(fairway.id, classId, direction)
      this.#groups.set(key, group)
    }
    group.speeds.push(speed)
    if (passage.hasUnknownEnergy) group.unknown += 1
    const energy = energies[0] + energies[1]
    if (!Number.isNaN(energy)) {
      group.energySums.push(energy)
      group.left += energies[0]
      group.right += energies[1]
    }
    if (passage.isAboveRecommended !== undefined) group.judged += 1
    if (passage.isAboveRecommended) group.above += 1
    if (passage.hasNoSafeSpeed) group.unsafe += 1
    if (passage.isAbovePosted !== undefined) group.posted += 1
    if (passage.isAbovePosted) group.abovePosted += 1
  }

  /** In the order of segment, class and direction. */
  summed(): PassageGroup[] {
    return [...this.#groups.values()]
      .sort(
        (a, b) =>
          byText(a.segmentId, b.segmentId) ||
          byText(a.classId, b.classId) ||
          byText(a.direction ?? '', b.direction ?? ''),
      )
      .map(groupOf)
  }
}

function emptyGroup(segmentId: string, classId: string, direction: Direction | undefined): Collected {
  return {
    segmentId,
    classId,
    direction,
    speeds: [],
    energySums: [],
    left: 0,
    right: 0,
    judged: 0,
    above: 0,
    posted: 0,
    abovePosted: 0,
    unsafe: 0,
    unknown: 0,
  }
}

function groupOf(group: Collected): PassageGroup {
  const passages = group.speeds.length
  const speeds = group.speeds.toSorted((a, b) => a - b)
  const percentile = (share: number): number => quantileSorted(speeds, share) ?? NaN
  return {
    segmentId: group.segmentId,
    classId: group.classId,
    direction: group.direction,
    passages,
    speedPercentiles: [percentile(0.5), percentile(0.85), percentile(0.95)],
    histogram: histogramOf(speeds),
    aboveRecommendedRatio: group.above / group.judged,
    abovePostedRatio: group.abovePosted / group.posted,
    noSafeSpeedPassages: group.unsafe,
    energies: group.energySums.length > 0 ? [group.left, group.right] : [NaN, NaN],
    worstTenthRatio: worstShare(group.energySums),
    unknownEnergyPassages: group.unknown,
  }
}

/** Bin of a speed; one on a bound, but for rounding, is in the bin above it. */
const binOf = (speed: number): number => Math.floor(speed / BIN + 1e-9)

/** Counts up to the highest speed; a speed on a bound belongs to the bin above it. */
function histogramOf(sorted: readonly number[]): number[] {
  const counts = new Array<number>(binOf(sorted.at(-1) ?? 0) + 1).fill(0)
  for (const speed of sorted) {
    const bin = binOf(speed)
    counts[bin] = (counts[bin] ?? 0) + 1
  }
  return counts
}

/** Share of a total that its largest tenth makes up, at least one of them. */
function worstShare(energies: readonly number[]): number {
  const sorted = energies.toSorted((a, b) => b - a)
  const total = sum(sorted)
  return total > 0 ? sum(sorted.slice(0, Math.ceil(WORST * sorted.length))) / total : NaN
}
