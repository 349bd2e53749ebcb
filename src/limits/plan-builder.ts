import { Fault, impossible, type FaultItem } from '../domain/fault.ts'
import type { Direction } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import type { Cell } from './cell.ts'
import { ceilingOf, LowestCell } from './ceilings.ts'
import { membersOf, type Members } from './groups.ts'
import { PassageShares } from './passage-shares.ts'
import type { Plan, PlanGroup, PlanRules } from './plan.ts'
import { lowestPosted, type Traffic } from './posted.ts'
import { runsOf } from './runs.ts'
import { stretchOf, totalsOf, type Outlook } from './stretch-figures.ts'
import { rowsOf, type Site } from './stretches.ts'
import type { Study, StudySegment } from './study.ts'

/** A group in a direction: what gets one set of limits. */
interface Line extends Traffic {
  readonly group: PlanGroup
  /** indices of the directions of the study that count */
  readonly directions: readonly number[]
  readonly isMember: readonly boolean[]
  /** lowest cell of each segment */
  readonly lowest: readonly LowestCell[]
}

/** Index of the percentile of a plan among those of the study; null for the inputs as given. */
function percentileIndex({ uncertainty }: Study, percentile: number | null): number | null {
  if (percentile === null) return null
  const percentiles = uncertainty?.percentiles ?? []
  const index = percentiles.indexOf(percentile)
  if (index >= 0) return index
  const allowed = [...percentiles.map(String), 'null']
  const detail = uncertainty
    ? `must be one of ${allowed.join(', ')}, as the study has them`
    : 'must be null: the study was made without uncertainty'
  throw new Fault('invalid-request', `percentile ${detail}`, {
    errors: [{ pointer: '#/percentile', code: 'not-in-list', detail, allowed, facts: { percentile } }],
  })
}

/**
 * Which ways get limits of their own. One set serves both where the study answers both alike, even by direction. A study
 * of one direction says nothing of the other, so that its limits are of that one.
 */
function waysOf(
  { directions }: Study,
  isByDirection: boolean,
): { direction: 'both' | Direction; directions: number[] }[] {
  const all = directions.map((_, i) => i)
  const known = directions.filter((direction) => direction !== null)
  if (known.length === 0 || (!isByDirection && known.length > 1))
    return [{ direction: 'both', directions: all }]
  return directions.flatMap((direction, i) => (direction ? [{ direction, directions: [i] }] : []))
}

function linesOf(study: Study, rules: PlanRules, members: Members): Line[] {
  const ways = waysOf(study, rules.isByDirection)
  return rules.groups.flatMap((group, i) => {
    const indices = new Set(members.byGroup[i])
    const isMember = study.vessels.map((_, index) => indices.has(index))
    const vessels = study.vessels.filter((_, index) => isMember[index])
    return ways.map((way) => ({
      ...way,
      group,
      vessels,
      currents: study.currents,
      isMember,
      lowest: study.segments.map(() => new LowestCell()),
    }))
  })
}

/** What is wrong with the list of segments whose posted limit stays. */
function keepItems(study: Study, { keepPosted }: PlanRules, lines: readonly Line[]): FaultItem[] {
  const byId = new Map(study.segments.map((segment) => [segment.id, segment]))
  return keepPosted.flatMap((id, i): FaultItem[] => {
    const pointer = `#/keep_posted/${i}`
    const segment = byId.get(id)
    if (!segment)
      return [
        { pointer, code: 'not-in-list', detail: `the study has no segment ${id}: take it off the list` },
      ]
    const without = lines.filter((line) => lowestPosted(segment.segment, line) === undefined)
    const [first] = without
    if (!first) return []
    const way = first.direction === 'both' ? '' : ` ${first.direction}`
    return [
      {
        pointer,
        code: 'clash',
        detail: `segment ${id} has no posted limit over the ground${way} for the group ${first.group.id}: take it off the list, or post one`,
        facts: { segment_id: id, groups: [...new Set(without.map(({ group }) => group.id))] },
      },
    ]
  })
}

const classesOf = (vessels: readonly Vessel[]): ReadonlySet<string> =>
  new Set(vessels.flatMap(({ classId }) => classId ?? []))

/** Draws limits from the cells of a study, which may come in any number of batches. */
export class PlanBuilder {
  readonly #study: Study
  readonly #rules: PlanRules
  readonly #percentile: number | null
  readonly #lines: readonly Line[]
  readonly #unassigned: readonly number[]
  readonly #kept: ReadonlySet<string>
  readonly #passages: PassageShares | undefined

  /**
   * @throws Fault `invalid-request` when the study has no such percentile
   * @throws Fault `impossible-input` when a vessel is in two groups, a group has none, or a limit that is to stay is not
   *   posted
   */
  constructor(study: Study, rules: PlanRules) {
    this.#percentile = percentileIndex(study, rules.percentile)
    const members = membersOf(rules.groups, study.vessels)
    const lines = linesOf(study, rules, members)
    const errors = keepItems(study, rules, lines)
    if (errors.length > 0) throw impossible(errors)
    this.#study = study
    this.#rules = rules
    this.#lines = lines
    this.#unassigned = members.unassigned
    this.#kept = new Set(rules.keepPosted)
    this.#passages = rules.passages && new PassageShares(rules.passages)
  }

  /** Takes cells of the study, each once over all calls; holds one for each segment, group and direction. */
  add(cells: Iterable<Cell>): void {
    for (const cell of cells) {
      for (const line of this.#lines) {
        if (line.isMember[cell.vessel] !== true || !line.directions.includes(cell.direction)) continue
        line.lowest[cell.segment]?.add(cell, this.#percentile)
      }
    }
  }

  /**
   * The plan, once every cell is in.
   *
   * @throws RangeError when cells are missing, or were added twice: what was not looked at is not safe
   */
  plan(): Plan {
    const { segments } = this.#study
    this.#assertComplete()
    const runs = runsOf(segments)
    const stretches = this.#lines.flatMap((line) => {
      const outlook = this.#outlook(line)
      return runs.flatMap((run) => {
        const sites = run.flatMap((index) => {
          const segment = segments[index]
          return segment ? [this.#site(segment, index, outlook)] : []
        })
        return rowsOf(sites, this.#rules).map((row) => stretchOf(row, outlook))
      })
    })
    return { stretches, totals: totalsOf(stretches), unassignedVessels: this.#unassigned }
  }

  #assertComplete(): void {
    const { waterLevels, currents } = this.#study
    for (const { group, vessels, directions, lowest } of this.#lines) {
      const due = vessels.length * waterLevels.length * currents.length * directions.length
      const wrong = lowest.findIndex(({ count }) => count !== due)
      if (wrong < 0) continue
      const count = lowest[wrong]?.count ?? 0
      throw new RangeError(
        `Segment ${wrong} has ${count} cells for the group ${group.id}; a plan rests on all ${due}`,
      )
    }
  }

  #site(segment: StudySegment, index: number, outlook: Outlook): Site {
    const { maximum } = outlook.lowestAt(index)
    const kept = this.#kept.has(segment.id) ? outlook.postedAt(index) : undefined
    return {
      segment: index,
      length: segment.length,
      ...(maximum !== undefined && { ceiling: ceilingOf(maximum, this.#rules) }),
      ...(kept !== undefined && { kept }),
    }
  }

  #outlook(line: Line): Outlook {
    const { segments } = this.#study
    const posted = segments.map(({ segment }) => lowestPosted(segment, line))
    const empty = new LowestCell()
    const classes = classesOf(line.vessels)
    const shares = this.#passages
    return {
      study: this.#study,
      rules: this.#rules,
      groupId: line.group.id,
      vessels: line.vessels,
      direction: line.direction,
      percentile: this.#percentile,
      lowestAt: (segment) => line.lowest[segment] ?? empty,
      postedAt: (segment) => posted[segment],
      ...(shares && {
        passages: (ids: readonly string[], limit: number | undefined) =>
          shares.share(ids, classes, line.direction, limit),
      }),
    }
  }
}
