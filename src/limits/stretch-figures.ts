import type { Direction } from '../domain/segment.ts'
import { SIGN_UNITS } from '../domain/units.ts'
import type { Vessel } from '../domain/vessel.ts'
import type { Cell } from './cell.ts'
import { criterionOf, type LowestCell } from './ceilings.ts'
import type { PassageShare } from './passage-shares.ts'
import { keptCaution, lackCautions, shortCaution, steerageCaution } from './plan-cautions.ts'
import type { GoverningCell, PlanCaution, PlanRules, PlanTotals, Stretch } from './plan.ts'
import { postedSign, valueIn } from './posted.ts'
import type { Row, Site } from './stretches.ts'
import type { Study, StudySegment } from './study.ts'

/** A plan for one group in one direction, with what its stretches are reported from. */
export interface Outlook {
  readonly study: Study
  readonly rules: PlanRules
  readonly groupId: string
  /** of the group, out of those of the study */
  readonly vessels: readonly Vessel[]
  readonly direction: 'both' | Direction
  /** index of the percentile among those of the study; null takes the inputs as given */
  readonly percentile: number | null
  lowestAt(segment: number): LowestCell
  /** lowest posted limit of today, m/s */
  postedAt(segment: number): number | undefined
  /** absent without a log of passages */
  readonly passages?: (segmentIds: readonly string[], limit: number | undefined) => PassageShare
}

/** Of a comparison with the speed that a limit was rounded from. */
const STEERAGE_SLACK = 1e-9

const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0)

function segmentAt({ segments }: Study, index: number): StudySegment {
  const segment = segments[index]
  if (!segment) throw new RangeError(`The study has no segment ${index}`)
  return segment
}

/** Least of some figures; undefined where one of them is. */
function leastOfAll(values: readonly (number | undefined)[]): number | undefined {
  let least = Infinity
  for (const value of values) {
    if (value === undefined) return undefined
    least = Math.min(least, value)
  }
  return least
}

/** The lowest cell of a stretch; the one farther upstream of equal ones, and one without a maximum before all. */
function lowestOf(lowest: readonly LowestCell[]): LowestCell | undefined {
  return lowest.reduce<LowestCell | undefined>((found, next) => {
    const isLower = !found || (next.maximum ?? -Infinity) < (found.maximum ?? -Infinity)
    return isLower ? next : found
  }, undefined)
}

function governingCell(cell: Cell, { study, percentile }: Outlook): GoverningCell {
  const vessel = study.vessels[cell.vessel]
  const direction = study.directions[cell.direction]
  const criterion = criterionOf(cell, percentile)
  const stationChainage = cell.answer?.stationChainage
  return {
    segmentId: segmentAt(study, cell.segment).id,
    ...(stationChainage !== undefined && { stationChainage }),
    vessel: cell.vessel,
    ...(vessel?.classId !== undefined && { vesselClass: vessel.classId }),
    ...(vessel?.loading && { loading: vessel.loading }),
    waterLevel: study.waterLevels[cell.waterLevel] ?? 0,
    current: study.currents[cell.current] ?? 0,
    ...(direction && { direction }),
    ...(criterion && { criterion }),
  }
}

/** Limit over the ground, m/s: of a kept one as it is posted. */
function speedOf({ outcome, limit, sites }: Row, { signUnit }: PlanRules): number | undefined {
  if (limit === undefined) return undefined
  return outcome === 'kept' ? sites[0]?.kept : limit * SIGN_UNITS[signUnit]
}

function signFields(speed: number | undefined, { outcome, limit }: Row, { signUnit: unit }: PlanRules) {
  if (speed === undefined || limit === undefined) return {}
  const sign = outcome === 'kept' ? postedSign(speed, unit) : { value: limit, unit }
  return { limit: sign, limitSpeed: speed }
}

/** Speed that a site allows, m/s. */
const ceilingSpeed = ({ ceiling }: Site, { signUnit }: PlanRules): number | undefined =>
  ceiling === undefined ? undefined : ceiling * SIGN_UNITS[signUnit]

function keptAbove(row: Row, speed: number, { study, rules }: Outlook): PlanCaution | undefined {
  const limit = valueIn(speed, rules.signUnit)
  const above = row.sites.filter(({ ceiling }) => ceiling === undefined || limit > ceiling)
  const ceiling = leastOfAll(above.map((site) => ceilingSpeed(site, rules)))
  return keptCaution(
    above.map(({ segment }) => segmentAt(study, segment).id),
    speed,
    ceiling,
  )
}

/** Vessels of the group that are too slow to steer at a limit in some current of the study, each in its worst one. */
function tooSlow(speed: number, { study, vessels, direction }: Outlook) {
  const helping = study.currents.flatMap((current) => {
    if (direction === 'both') return [current, -current]
    return [direction === 'downstream' ? current : -current]
  })
  const throughWater = speed - Math.max(...helping)
  return vessels.flatMap((vessel) => {
    if (throughWater >= vessel.minSteerageSpeed * (1 - STEERAGE_SLACK)) return []
    return [{ vessel, index: study.vessels.indexOf(vessel), throughWater }]
  })
}

function cautionsOf(row: Row, speed: number | undefined, outlook: Outlook): PlanCaution[] {
  const { study, rules } = outlook
  const lacks = row.sites.flatMap(({ segment }) =>
    outlook.lowestAt(segment).lacks.map((lack) => ({ lack, segmentId: segmentAt(study, segment).id })),
  )
  const length = sum(row.sites.map((site) => site.length))
  const kept = row.outcome === 'kept' && speed !== undefined ? keptAbove(row, speed, outlook) : undefined
  const slow = speed === undefined ? undefined : steerageCaution(speed, tooSlow(speed, outlook))
  return [
    ...lackCautions(lacks, study),
    ...(kept ? [kept] : []),
    ...(slow ? [slow] : []),
    ...(row.isTooShort ? [shortCaution(length, rules.minRunLength)] : []),
  ]
}

/** Fields that are there. */
function present<Name extends string>(name: Name, value: number | undefined): { [Key in Name]?: number } {
  return value === undefined ? {} : ({ [name]: value } as { [Key in Name]?: number })
}

/** A row of segments with all that is reported of it. */
export function stretchOf(row: Row, outlook: Outlook): Stretch {
  const { study, rules, groupId, direction } = outlook
  const segments = row.sites.map(({ segment }) => segmentAt(study, segment))
  const [first, last] = [segments[0], segments.at(-1)]
  if (!first || !last) throw new RangeError('A stretch has at least one segment')
  const speed = speedOf(row, rules)
  const length = sum(segments.map((segment) => segment.length))
  const segmentIds = segments.map(({ id }) => id)
  const lowest = lowestOf(row.sites.map(({ segment }) => outlook.lowestAt(segment)))
  const posted = row.sites.map(({ segment }) => outlook.postedAt(segment))
  const todays = posted.filter((limit) => limit !== undefined)
  const hasAll = todays.length === posted.length
  const timeToday = sum(segments.map((segment, i) => segment.length / (posted[i] ?? NaN)))
  return {
    groupId,
    direction,
    ...(first.waterway !== undefined && { waterway: first.waterway }),
    chainageFrom: first.chainageFrom,
    chainageTo: last.chainageTo,
    length,
    segmentIds,
    outcome: row.outcome,
    ...signFields(speed, row, rules),
    ...present('ceiling', leastOfAll(row.sites.map((site) => ceilingSpeed(site, rules)))),
    ...present('lowestMaximum', lowest?.maximum),
    ...(lowest?.cell && { governing: governingCell(lowest.cell, outlook) }),
    ...present('today', todays.length > 0 ? leastOfAll(todays) : undefined),
    ...present('travelTime', speed === undefined ? undefined : length / speed),
    ...present('travelTimeToday', hasAll ? timeToday : undefined),
    ...outlook.passages?.(segmentIds, speed),
    cautions: cautionsOf(row, speed, outlook),
  }
}

/** Sums over stretches of every group and direction. */
export function totalsOf(stretches: readonly Stretch[]): PlanTotals {
  const isBelow = ({ outcome }: Stretch): boolean => outcome === 'below-smallest-limit'
  const lengthOf = (some: readonly Stretch[]): number => sum(some.map(({ length }) => length))
  const comparable = stretches.filter(
    ({ travelTime, travelTimeToday }) => travelTime !== undefined && travelTimeToday !== undefined,
  )
  return {
    length: lengthOf(stretches),
    lengthWithLimit: lengthOf(stretches.filter((stretch) => !isBelow(stretch))),
    lengthBelowSmallest: lengthOf(stretches.filter(isBelow)),
    travelTime: sum(stretches.map(({ travelTime = 0 }) => travelTime)),
    travelTimeComparable: sum(comparable.map(({ travelTime = 0 }) => travelTime)),
    travelTimeToday: sum(comparable.map(({ travelTimeToday = 0 }) => travelTimeToday)),
  }
}
