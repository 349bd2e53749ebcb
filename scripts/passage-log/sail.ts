import type { Direction } from '../../src/domain/segment.ts'
import { geodesicLength } from '../../tests/support/geodesic.ts'
import type { Ship } from './fleet.ts'
import type { Maxima, MaximaOf, Passing } from './maximum.ts'
import type { Random } from './random.ts'
import { NOT_AVAILABLE, rounded, TOLERANCE, toTenth, type Row, type Verdict } from './row.ts'
import {
  chainageAt,
  isClearOfBends,
  isWithin,
  measured,
  placeBeside,
  sailingLineAt,
  type Reach,
} from './waterway.ts'

/** How a vessel passes one segment. */
export interface Leg {
  readonly segment: string
  readonly direction: Direction
  /** m along the sailing line, of the first report */
  readonly from: number
  /** m, positive to the right looking downstream */
  readonly offset: number
  /** m/s, positive downstream */
  readonly current?: number
  /** what is planted, and for how many reports; Infinity: up to the end of the segment */
  readonly phases: readonly (readonly [Verdict, number])[]
  /** s since the last report of the leg before; by distance and speed when it is not given */
  readonly pause?: number
}

/** What a log is made with. */
export interface Making {
  readonly waterway: ReadonlyMap<string, Reach>
  readonly random: Random
  readonly maximaOf: MaximaOf
}

/** s between two reports: what is left of them in national archives (own choice). */
const INTERVAL = [55, 75] as const
/** Least speed that is planted, kn: below 2 kn a course says little. */
const LEAST_SPEED = 2.1
/** How far planted speeds keep from the bound between two verdicts, kn. */
const CLEARANCE = 0.15
/** Share of the critical speed that planted speeds stay below where they can. */
const BELOW_CRITICAL = 0.97
const METRES_PER_SECOND = 1852 / 3600

/** A speed over ground for a verdict, kn. */
function speedFor(verdict: Verdict, { lower, higher, critical }: Maxima, random: Random): number {
  switch (verdict) {
    case 'within':
      return Math.max(LEAST_SPEED, lower * random.between(0.6, 0.9))
    case 'exceeds':
      return Math.max(
        Math.min(higher * random.between(1.15, 1.4), BELOW_CRITICAL * critical),
        higher + TOLERANCE + 2 * CLEARANCE,
      )
    case 'depends-on-draught':
      return random.between(lower + TOLERANCE + CLEARANCE, higher + TOLERANCE - CLEARANCE)
    case 'no-safe-speed':
      return random.between(LEAST_SPEED, LEAST_SPEED + 1)
  }
}

/** The verdict that a rounded speed gets; one too near to a bound cannot be planted. */
function verdictOf(speed: number, { lower, higher }: Maxima): Verdict {
  if (Number.isNaN(lower)) return 'no-safe-speed'
  const excesses = [speed - lower - TOLERANCE, speed - higher - TOLERANCE]
  if (excesses.some((excess) => Math.abs(excess) < CLEARANCE / 2)) {
    throw new Error(`${speed} kn is too near to ${lower} or ${higher} kn and the tolerance`)
  }
  if (speed - higher > TOLERANCE) return 'exceeds'
  return speed - lower > TOLERANCE ? 'depends-on-draught' : 'within'
}

const known = (figure: number): number | undefined => (Number.isNaN(figure) ? undefined : figure)

/** One report of a vessel under way, its truth measured after its position was rounded. */
async function reportAt(
  ship: Ship,
  { reach, ...passing }: Passing,
  [time, along, speed]: readonly [time: number, along: number, speed: number],
  making: Making,
): Promise<Row> {
  const { random, maximaOf } = making
  const [lon, lat] = placeBeside(reach, along, passing.offset).map(rounded) as [number, number]
  const truly = measured(reach, along, [lon, lat])
  const maxima = await maximaOf(ship, { reach, ...passing, offset: truly.offset })
  const onLine = await maximaOf(ship, { reach, ...passing, offset: 0 })
  const ahead = sailingLineAt(reach, along).azimuth + (passing.direction === 'upstream' ? 180 : 0)
  // yaw and the scatter of courses over ground, degrees
  const course = toTenth((ahead + random.between(-4, 4) + 360) % 360) % 360
  return {
    arrival: time,
    time,
    ship,
    mobile: 'vessel',
    lon,
    lat,
    speed,
    course,
    heading: ship.transceiver === 'B' ? NOT_AVAILABLE.heading : Math.round(ahead + 360) % 360,
    navigationStatus: ship.transceiver === 'B' ? undefined : 0,
    current: passing.current,
    truth: {
      status: 'matched',
      segmentId: reach.id,
      along: truly.along,
      chainage: chainageAt(reach, truly.along),
      offset: truly.offset,
      banks: reach.banks && [reach.banks[0] + truly.offset, reach.banks[1] - truly.offset],
      direction: passing.direction,
      maximum: known(maxima.lower),
      lineMaximum: known(onLine.lower),
      governing: maxima.governing,
      loading: maxima.loading,
      verdict: verdictOf(speed, maxima),
    },
  }
}

/** The verdict planted for each report of a leg, in order; the last one goes on. */
function* planned(phases: Leg['phases']): Generator<Verdict | undefined> {
  for (const [verdict, reports] of phases) for (let i = 0; i < reports; i += 1) yield verdict
}

/** Reports of one leg from a time on: each as far on as the mean of two speeds carries. */
async function sailLeg(ship: Ship, leg: Leg, start: number, making: Making): Promise<Row[]> {
  const { waterway, random, maximaOf } = making
  const reach = waterway.get(leg.segment)
  if (!reach) throw new Error(`There is no segment ${leg.segment}`)
  const passing = { reach, offset: leg.offset, direction: leg.direction, current: leg.current }
  const maxima = await maximaOf(ship, passing)
  const hand = leg.direction === 'downstream' ? 1 : -1
  const rows: Row[] = []
  let [time, along, before] = [start, leg.from, NaN]
  for (const verdict of planned(leg.phases)) {
    if (verdict === undefined) break
    const speed = toTenth(speedFor(verdict, maxima, random))
    if (rows.length > 0) {
      const advance = (hand * METRES_PER_SECOND * (before + speed)) / 2
      let interval = random.whole(...INTERVAL)
      while (!isClearOfBends(reach, along + advance * interval, leg.offset)) interval += 1
      time += interval
      along += advance * interval
    }
    if (!isWithin(reach, along)) {
      if (leg.phases.at(-1)?.[1] === Infinity) break
      throw new Error(`${ship.name} leaves ${reach.id} before all is planted`)
    }
    rows.push(await reportAt(ship, passing, [time, along, speed], making))
    before = speed
  }
  return rows
}

/** s that a vessel needs from its last report to the first of the next leg. */
function pauseBefore(leg: Leg, last: Row, making: Making): number {
  if (leg.pause !== undefined) return leg.pause
  const reach = making.waterway.get(leg.segment)!
  const distance = geodesicLength([last.lon, last.lat], placeBeside(reach, leg.from, leg.offset))
  return Math.round(distance / (last.speed * METRES_PER_SECOND))
}

/** Reports of a vessel under way, leg by leg. */
export async function sail(ship: Ship, legs: readonly Leg[], start: number, making: Making): Promise<Row[]> {
  const rows: Row[] = []
  for (const leg of legs) {
    const last = rows.at(-1)
    const from = last?.time === undefined ? start : last.time + pauseBefore(leg, last, making)
    rows.push(...(await sailLeg(ship, leg, from, making)))
  }
  return rows
}
