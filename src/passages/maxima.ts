import { bindingPostedLimit } from '../advisory/criteria/speed-limits.ts'
import { govern, type Governed } from '../advisory/govern.ts'
import { currentAlong } from '../advisory/direction.ts'
import { situationOf, type Situation } from '../advisory/situation.ts'
import type { Conditions, Options } from '../domain/conditions.ts'
import { Fault } from '../domain/fault.ts'
import type { Segment, Station } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import { waterAt, waterFrom, type ActualWater } from './at-position.ts'
import type { PassageCaution } from './passage-cautions.ts'
import type { Fairway, Whereabouts } from './placement.ts'
import { stationAt } from './station-at.ts'

/** The recommended maximum at a place, and the vessel as it is there. */
export interface Maximum {
  readonly vessel: Vessel
  readonly decision: Governed
  /** at the actual position */
  readonly situation: Situation
  /** to the left and to the right waterline at the level, from the position as reported, m */
  readonly distances: readonly [left: number, right: number]
  /** index of the left bank; without known sides the nearer one is taken to be on the side of the vessel */
  readonly leftBank: 0 | 1
  readonly cautions: readonly PassageCaution[]
}

/** What a computation yields; undefined when the vessel does not fit the water. */
function fitting<Value>(compute: () => Value): Value | undefined {
  try {
    return compute()
  } catch (error) {
    if (error instanceof Fault && error.code === 'impossible-input') return undefined
    throw error
  }
}

/** Decisions that are kept for a vessel; a log may bring a new level with every row. */
const MOST_KEPT = 1000

/** Recommended maxima of vessels along fairways, by the same decision as every other call. */
export class Maxima {
  /** on the sailing line of segments that are the same all along; null where the vessel does not fit */
  readonly #onLine = new WeakMap<Vessel, Map<string, Governed | null>>()

  /**
   * At the position as reported; where the hull cannot float there, on the sailing line.
   *
   * @param most  as of `govern`
   * @returns undefined when the vessel fits neither
   */
  actual(
    placement: Whereabouts,
    vessel: Vessel,
    conditions: Conditions,
    most = Infinity,
  ): Maximum | undefined {
    const seen = seenBy(placement, vessel, conditions)
    const { water, distances, leftBank } = seen
    const decision = fitting(() =>
      govern(water.segment, water.station, vessel, conditions, optionsOf(placement), most),
    )
    if (decision) {
      const { situation } = decision
      return { vessel, decision, situation, distances, leftBank, cautions: seen.cautions }
    }
    const onLine = this.#decisionOnLine(placement, vessel, conditions)
    if (!onLine) return undefined
    const cautions = [...seen.cautions, 'judged-on-sailing-line' as const]
    return { vessel, decision: onLine, situation: onLine.situation, distances, leftBank, cautions }
  }

  /** On the sailing line beside the position, which the situation is still that of. */
  onSailingLine(placement: Whereabouts, vessel: Vessel, conditions: Conditions): Maximum | undefined {
    const decision = this.#decisionOnLine(placement, vessel, conditions)
    if (!decision) return undefined
    const { water, ...seen } = seenBy(placement, vessel, conditions)
    const situation = situationIn(water, placement, vessel, conditions) ?? decision.situation
    return { vessel, decision, situation, ...seen }
  }

  /** The vessel as it is where it has a maximum, whichever is asked for; undefined when it has none. */
  situation(
    placement: Whereabouts,
    vessel: Vessel,
    conditions: Conditions,
  ): Pick<Maximum, 'situation' | 'leftBank'> | undefined {
    const { water, leftBank } = seenBy(placement, vessel, conditions)
    const situation =
      situationIn(water, placement, vessel, conditions) ??
      this.#decisionOnLine(placement, vessel, conditions)?.situation
    return situation && { situation, leftBank }
  }

  #decisionOnLine(placement: Whereabouts, vessel: Vessel, conditions: Conditions): Governed | undefined {
    const { segment, station, fairway } = waterOf(placement)
    const compute = () =>
      fitting(() => govern(waterAt(segment, station), station, vessel, conditions, fairway.options))
    if (segment.stations.length > 1) return compute()
    let known = this.#onLine.get(vessel)
    if (!known || known.size >= MOST_KEPT) {
      this.#onLine.set(vessel, (known = new Map<string, Governed | null>()))
    }
    const { waterLevel, current, direction = '' } = conditions
    const key = `${fairway.id} ${waterLevel} ${current} ${direction}`
    const held = known.get(key)
    if (held !== undefined) return held ?? undefined
    const found = compute()
    known.set(key, found ?? null)
    return found
  }
}

function situationIn(
  { segment, station }: ActualWater,
  placement: Whereabouts,
  vessel: Vessel,
  conditions: Conditions,
): Situation | undefined {
  return fitting(() => situationOf(segment, station, vessel, conditions, optionsOf(placement)))
}

/** Over ground, m/s; NaN without a safe speed. */
export const maxOf = ({ outcome, overGround }: Governed): number =>
  outcome === 'no-safe-speed' ? NaN : overGround

/** The posted limit that binds, over ground, m/s; NaN where none is posted for the vessel. */
export function postedOverGround({ situation, direction }: Governed): number {
  const posted = bindingPostedLimit(situation, direction)
  if (!posted) return NaN
  const current = currentAlong(situation.conditions, direction)
  return posted.reference === 'through-water' ? posted.speed + current : posted.speed
}

const optionsOf = ({ fairway }: Whereabouts): Options => fairwayOf(fairway).options

function fairwayOf(fairway: Fairway | undefined): Fairway {
  if (!fairway) throw new RangeError('A report without a fairway is not judged')
  return fairway
}

/** What a matched report lies on. */
function waterOf({ fairway: known, chainage }: Whereabouts): {
  fairway: Fairway
  segment: Segment
  station: Station
} {
  const fairway = fairwayOf(known)
  return { fairway, segment: fairway.segment, station: stationAt(fairway.segment, chainage) }
}

interface Seen extends Pick<Maximum, 'distances' | 'leftBank' | 'cautions'> {
  readonly water: ActualWater
}

/** To the left and to the right waterline at a water level, from the position as reported, m. */
export const bankDistances = (placement: Whereabouts, waterLevel: number): readonly [number, number] =>
  seenBy(placement, { beam: 0 }, { waterLevel }).distances

function seenBy(
  placement: Whereabouts,
  { beam }: Pick<Vessel, 'beam'>,
  { waterLevel }: Pick<Conditions, 'waterLevel'>,
): Seen {
  const { segment, station } = waterOf(placement)
  const { offset } = placement
  const water = waterFrom(segment, station, offset, waterLevel, beam)
  const hasSides = segment.banks[1].side === 'right'
  const leftBank = hasSides || offset < 0 ? 0 : 1
  const isAlike = station.distances[0] === station.distances[1]
  const cautions: PassageCaution[] = hasSides || isAlike ? [] : ['bank-sides-unknown']
  if (water.isMoved) cautions.push('position-at-bank')
  const [first, second] = water.distances
  return { water, leftBank, distances: leftBank === 0 ? [first, second] : [second, first], cautions }
}
