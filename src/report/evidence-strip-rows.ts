import type { CriterionId } from '../advisory/criteria/criterion.ts'
import { decideInDirection, inCurrent, type SegmentBounds } from '../advisory/decide.ts'
import { currentAlong } from '../advisory/direction.ts'
import { boundsIfPossible } from '../advisory/if-possible.ts'
import { appliesTo } from '../domain/group.ts'
import type { Direction } from '../domain/segment.ts'
import type { Stretch } from '../limits/plan.ts'
import { lowestPosted } from '../limits/posted.ts'
import type { Study, StudySegment } from '../limits/study.ts'
import { inputsOf } from './evidence-case.ts'
import type { EvidenceView } from './evidence-view.ts'

/** Stations times vessels and levels up to which every cell of a group is computed again for a strip. */
const MOST_CELLS = 2500

/** A segment as a strip shows it. Speeds over ground, m/s, at the inputs as given. */
export interface StripSegment {
  readonly id: string
  readonly name: string
  /** m along the waterway, upstream end first; along the row of segments where there is no waterway */
  readonly from: number
  readonly to: number
  /** index of the stretch in the plan */
  readonly stretch: number
  /** lowest speed at which each criterion is first reached */
  readonly ceilings: ReadonlyMap<CriterionId, number>
  /** the criterion reached first of all */
  readonly governing?: CriterionId
  /** of the cell that allows least */
  readonly critical?: number
  /** lowest posted limit of today */
  readonly posted?: number
}

/** The plan along one waterway for one group and direction. */
export interface Strip {
  readonly groupId: string
  readonly direction: Stretch['direction']
  readonly waterway?: string
  /** n stretches by index in the plan, from upstream */
  readonly stretches: readonly number[]
  /** from upstream */
  readonly segments: readonly StripSegment[]
  /** whether every vessel and level of the group was computed, or the governing one of each stretch */
  readonly isWhole: boolean
}

const stationsTimes = (study: Study, ids: readonly string[], vessels: number): number =>
  study.segments
    .filter(({ id }) => ids.includes(id))
    .reduce((sum, { segment }) => sum + segment.stations.length, 0) *
  vessels *
  study.waterLevels.length

/** Lowest figures of a segment while its cells are gone through. */
class Lowest {
  readonly ceilings = new Map<CriterionId, number>()
  governing: CriterionId | undefined
  critical: number | undefined
  #least = Infinity

  add(bounds: SegmentBounds, direction: Direction | undefined): void {
    const { situation, bounds: all } = decideInDirection(bounds, direction)
    const along = currentAlong(situation.conditions, direction)
    const critical = situation.setting.criticalSpeed + along
    for (const { criterion, firstSpeed } of all) {
      if (Number.isFinite(firstSpeed)) this.#take(criterion.id, Math.max(0, firstSpeed + along), critical)
    }
  }

  #take(id: CriterionId, speed: number, critical: number): void {
    this.ceilings.set(id, Math.min(this.ceilings.get(id) ?? Infinity, speed))
    if (speed >= this.#least) return
    this.#least = speed
    this.governing = id
    this.critical = critical
  }
}

interface Tried {
  readonly vessel: number
  readonly waterLevel: number
  readonly currents: readonly number[]
  readonly directions: readonly (Direction | undefined)[]
}

/** Cells that a strip goes through on a segment. */
function cellsOf(view: EvidenceView, stretch: Stretch, isWhole: boolean): Tried[] {
  const { study } = view
  const own = study.directions.map((direction) => direction ?? undefined)
  const directions = stretch.direction === 'both' ? own : [stretch.direction]
  if (!isWhole) {
    const { governing } = stretch
    if (!governing) return []
    const { vessel, waterLevel, current, direction } = governing
    return [{ vessel, waterLevel, currents: [current], directions: [direction] }]
  }
  return vesselsOf(view, stretch.groupId).flatMap((vessel) =>
    study.waterLevels.map((waterLevel) => ({ vessel, waterLevel, currents: study.currents, directions })),
  )
}

/** Indices of the study's vessels that a group is for. */
export function vesselsOf({ study, rules }: EvidenceView, groupId: string): number[] {
  const group = rules.groups.find(({ id }) => id === groupId)
  if (!group) return []
  return study.vessels.flatMap((vessel, i) => (appliesTo(group.appliesTo, vessel) ? [i] : []))
}

function lowestOf(study: Study, segmentId: string, tried: readonly Tried[]): Lowest {
  const lowest = new Lowest()
  for (const { vessel, waterLevel, currents, directions } of tried) {
    const inputs = inputsOf(study, { segmentId, vessel, waterLevel, current: currents[0] ?? 0 })
    // a vessel that does not fit the segment has no speed on it
    const bounds = inputs && boundsIfPossible(inputs)
    if (!bounds) continue
    for (const current of currents) {
      const own = inCurrent(bounds, current)
      for (const direction of directions) lowest.add(own, direction)
    }
  }
  return lowest
}

/** Posted limit of today for a group, m/s. */
function postedOn(view: EvidenceView, { segment }: StudySegment, stretch: Stretch): number | undefined {
  const { study } = view
  const vessels = vesselsOf(view, stretch.groupId).flatMap((index) => study.vessels[index] ?? [])
  return lowestPosted(segment, { vessels, direction: stretch.direction, currents: study.currents })
}

const keyOf = ({ groupId, direction, waterway }: Stretch): string =>
  JSON.stringify([groupId, direction, waterway])

function segmentsOf(view: EvidenceView, stretches: readonly number[], isWhole: boolean): StripSegment[] {
  let along = 0
  return stretches.flatMap((index) => {
    const stretch = view.plan.stretches[index]
    if (!stretch) return []
    const tried = cellsOf(view, stretch, isWhole)
    return stretch.segmentIds.flatMap((id): StripSegment[] => {
      const found = view.study.segments.find((segment) => segment.id === id)
      if (!found) return []
      const { ceilings, governing, critical } = lowestOf(view.study, id, tried)
      const posted = postedOn(view, found, stretch)
      const isAlong = stretch.waterway !== undefined
      const from = isAlong ? found.chainageFrom : along
      along += found.length
      return [
        {
          id,
          name: found.segment.name ?? id,
          from,
          to: isAlong ? found.chainageTo : along,
          stretch: index,
          ceilings,
          ...(governing && { governing }),
          ...(critical !== undefined && { critical }),
          ...(posted !== undefined && { posted }),
        },
      ]
    })
  })
}

/** The plan as strips, one by waterway, group and direction, in the order of the plan. */
export function stripsOf(view: EvidenceView): Strip[] {
  const byKey = new Map<string, number[]>()
  view.plan.stretches.forEach((stretch, index) => {
    const key = keyOf(stretch)
    byKey.set(key, [...(byKey.get(key) ?? []), index])
  })
  return [...byKey.values()].flatMap((stretches): Strip[] => {
    const [first] = stretches.map((index) => view.plan.stretches[index])
    if (!first) return []
    const { groupId, direction, waterway } = first
    const ids = stretches.flatMap((index) => view.plan.stretches[index]?.segmentIds ?? [])
    const isWhole = stationsTimes(view.study, ids, vesselsOf(view, groupId).length) <= MOST_CELLS
    const segments = segmentsOf(view, stretches, isWhole)
    return [{ groupId, direction, ...(waterway !== undefined && { waterway }), stretches, segments, isWhole }]
  })
}
