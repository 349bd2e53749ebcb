import { bindingPostedLimit } from '../advisory/criteria/speed-limits.ts'
import { decide, type Decision } from '../advisory/decide.ts'
import { currentAlong } from '../advisory/direction.ts'
import { situationOf, type Situation } from '../advisory/situation.ts'
import type { Conditions, Options } from '../domain/conditions.ts'
import { Fault } from '../domain/fault.ts'
import type { Segment, Station } from '../domain/segment.ts'
import type { Vessel } from '../domain/vessel.ts'
import { waterAt, waterFrom, type ActualWater } from './at-position.ts'
import { CERTAIN, KnownMaxima } from './known-maxima.ts'
import type { PassageCaution } from './passage-cautions.ts'
import type { Fairway, Placement } from './placement.ts'
import { stationAt } from './station-at.ts'

/** The recommended maximum at a place, and the vessel as it is there. */
export interface Maximum {
  readonly vessel: Vessel
  readonly decision: Decision
  /** at the actual position */
  readonly situation: Situation
  /** to the left and to the right waterline at the level, from the position as reported, m */
  readonly distances: readonly [left: number, right: number]
  /** index of the left bank; without known sides the nearer one is taken to be on the side of the vessel */
  readonly leftBank: 0 | 1
  readonly cautions: readonly PassageCaution[]
}

/** As of an advisory without options of its own. */
const OPTIONS: Options = {
  combine: 'highest',
  limits: {},
  applyPostedLimit: true,
  signUnit: 'km/h',
  signStep: 1,
  hasCurve: false,
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

/** What is known of a maximum by those to either side of it. */
export interface Bound {
  /** below which a report cannot exceed its maximum, m/s over ground; NaN where that is not known */
  readonly speed: number
  readonly before: number
  readonly after: number
  /** over ground, m/s; NaN where none is posted */
  readonly postedLimit: number
}

/** What is kept of a vessel on a segment that is the same all along, in one state of its water. */
interface Known {
  /** undefined while it is not computed, null when the vessel does not fit */
  onLine: Decision | null | undefined
  readonly across: KnownMaxima
  /** over ground, m/s; NaN where none is posted for the vessel */
  postedLimit: number
}

/** States of its water that are kept for a vessel; a log may bring a new level with every row. */
const MOST_KEPT = 1000

/** Recommended maxima of vessels along fairways, by the same decision as every other call. */
export class Maxima {
  readonly #known = new WeakMap<Vessel, Map<string, Known>>()

  /** At the position as reported; where the hull cannot float there, on the sailing line. Undefined when it fits neither. */
  actual(placement: Placement, vessel: Vessel, conditions: Conditions): Maximum | undefined {
    const { water, ...seen } = seenBy(placement, vessel, conditions)
    const decision = fitting(() => decide(water.segment, vessel, conditions, OPTIONS).main)
    if (decision) {
      const known = this.#knownOf(placement, vessel, conditions)
      known?.across.add(placement.offset, maxOf(decision))
      if (known) known.postedLimit = postedOverGround(decision)
      return { vessel, decision, situation: decision.situation, ...seen }
    }
    const onLine = this.#decisionOnLine(placement, vessel, conditions)
    if (!onLine) return undefined
    const cautions = [...seen.cautions, 'judged-on-sailing-line' as const]
    return { vessel, decision: onLine, situation: onLine.situation, ...seen, cautions }
  }

  /** On the sailing line beside the position, which the situation is still that of. */
  onSailingLine(placement: Placement, vessel: Vessel, conditions: Conditions): Maximum | undefined {
    const decision = this.#decisionOnLine(placement, vessel, conditions)
    if (!decision) return undefined
    const { water, ...seen } = seenBy(placement, vessel, conditions)
    const situation = fitting(() => situationOf(water.segment, water.station, vessel, conditions, OPTIONS))
    return { vessel, decision, situation: situation ?? decision.situation, ...seen }
  }

  /** What earlier maxima tell of one that is not computed; undefined where nothing is known. */
  bound(placement: Placement, vessel: Vessel, conditions: Conditions): Bound | undefined {
    const known = this.#knownOf(placement, vessel, conditions)
    if (!known) return undefined
    const [before, after] = known.across.around(placement.offset)
    return { speed: CERTAIN * Math.min(before, after), before, after, postedLimit: known.postedLimit }
  }

  /** The vessel at the position as reported, without a decision; undefined when it cannot float there. */
  seen(
    placement: Placement,
    vessel: Vessel,
    conditions: Conditions,
  ): Pick<Maximum, 'situation' | 'leftBank'> | undefined {
    const { water, leftBank } = seenBy(placement, vessel, conditions)
    const situation = fitting(() => situationOf(water.segment, water.station, vessel, conditions, OPTIONS))
    return situation && { situation, leftBank }
  }

  #decisionOnLine(placement: Placement, vessel: Vessel, conditions: Conditions): Decision | undefined {
    const known = this.#knownOf(placement, vessel, conditions)
    if (known?.onLine !== undefined) return known.onLine ?? undefined
    const { segment, station } = waterOf(placement)
    const found = fitting(() => decide(waterAt(segment, station), vessel, conditions, OPTIONS).main)
    if (known) known.onLine = found ?? null
    return found
  }

  /** Undefined on a segment that is not the same all along. */
  #knownOf(placement: Placement, vessel: Vessel, conditions: Conditions): Known | undefined {
    const { fairway } = placement
    if (!fairway || fairway.segment.stations.length > 1) return undefined
    let ofVessel = this.#known.get(vessel)
    if (!ofVessel || ofVessel.size >= MOST_KEPT)
      this.#known.set(vessel, (ofVessel = new Map<string, Known>()))
    const { waterLevel, current, direction = '' } = conditions
    const key = `${fairway.id} ${waterLevel} ${current} ${direction}`
    const known = ofVessel.get(key)
    if (known) return known
    const fresh: Known = {
      onLine: undefined,
      across: new KnownMaxima(fairway.segment.stations[0].width),
      postedLimit: NaN,
    }
    ofVessel.set(key, fresh)
    return fresh
  }
}

/** Over ground, m/s; NaN without a safe speed. */
export const maxOf = ({ outcome, overGround }: Decision): number =>
  outcome === 'no-safe-speed' ? NaN : overGround

/** The posted limit that binds, over ground, m/s; NaN where none is posted for the vessel. */
export function postedOverGround({ situation, direction }: Decision): number {
  const posted = bindingPostedLimit(situation, direction)
  if (!posted) return NaN
  const current = currentAlong(situation.conditions, direction)
  return posted.reference === 'through-water' ? posted.speed + current : posted.speed
}

/** What a matched report lies on. */
function waterOf({ fairway, chainage }: Placement): { fairway: Fairway; segment: Segment; station: Station } {
  if (!fairway) throw new RangeError('A report without a fairway is not judged')
  return { fairway, segment: fairway.segment, station: stationAt(fairway.segment, chainage) }
}

interface Seen extends Pick<Maximum, 'distances' | 'leftBank' | 'cautions'> {
  readonly water: ActualWater
}

function seenBy(placement: Placement, vessel: Vessel, { waterLevel }: Conditions): Seen {
  const { segment, station } = waterOf(placement)
  const { offset } = placement
  const water = waterFrom(segment, station, offset, waterLevel, vessel.beam)
  const hasSides = segment.banks[1].side === 'right'
  const leftBank = hasSides || offset < 0 ? 0 : 1
  const isAlike = station.distances[0] === station.distances[1]
  const cautions: PassageCaution[] = hasSides || isAlike ? [] : ['bank-sides-unknown']
  if (water.isMoved) cautions.push('position-at-bank')
  const [first, second] = water.distances
  return { water, leftBank, distances: leftBank === 0 ? [first, second] : [second, first], cautions }
}
