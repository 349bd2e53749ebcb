import type { Mobile, Status } from '../../src/passages/position-report.ts'
import { shipOf, type Ship } from './fleet.ts'
import { NOT_AVAILABLE, rounded, toTenth, type Row, type RowTruth } from './row.ts'
import { chainageAt, measured, placeBeside, sailingLineAt, type Reach } from './waterway.ts'

/** What sends at a place without passing along the waterway. */
interface Standing {
  readonly ship: Ship
  readonly mobile?: Mobile
  readonly position: readonly [lon: number, lat: number]
  readonly navigationStatus?: number
  readonly speed?: number
  readonly course?: number
  readonly truth: RowTruth
}

function rowOf(standing: Standing, time: number): Row {
  const [lon, lat] = standing.position
  const { course = NOT_AVAILABLE.course, speed = 0 } = standing
  return {
    arrival: time,
    time,
    ship: standing.ship,
    mobile: standing.mobile ?? 'vessel',
    lon: rounded(lon),
    lat: rounded(lat),
    speed,
    course,
    heading: NOT_AVAILABLE.heading,
    navigationStatus: standing.navigationStatus,
    current: undefined,
    truth: standing.truth,
  }
}

/** The same thing sent every so many seconds. */
const repeated = (standing: Standing, [from, every, times]: readonly [number, number, number]): Row[] =>
  Array.from({ length: times }, (_, i) => rowOf(standing, from + i * every))

/** The truth of a place beside the sailing line of a segment, where it is told at all. */
function truthAt(reach: Reach, [along, offset]: readonly [number, number], status: Status): RowTruth {
  const [lon, lat] = placeBeside(reach, along, offset).map(rounded) as [number, number]
  const truly = measured(reach, along, [lon, lat])
  return {
    status,
    segmentId: reach.id,
    along: truly.along,
    chainage: chainageAt(reach, truly.along),
    offset: truly.offset,
    banks: reach.banks && [reach.banks[0] + truly.offset, reach.banks[1] - truly.offset],
  }
}

function beside(
  reach: Reach,
  place: readonly [along: number, offset: number],
  status: Status,
  standing: Omit<Standing, 'position' | 'truth'>,
): Standing {
  return { ...standing, position: placeBeside(reach, ...place), truth: truthAt(reach, place, status) }
}

const nobody = (mmsi: string, name: string): Ship => ({
  ...shipOf('ferry', 0, name),
  mmsi,
  type: 0,
  length: 0,
  beam: 0,
  draught: 0,
})

/** Metres a ferry makes good to the side from one report to the next, and s between them: 5.8 kn. */
const CROSSING = { step: 45, interval: 15 } as const

/** A ferry from the left bank to the right one, at right angles to the waterway. */
function crossing(reach: Reach, along: number, start: number): Row[] {
  const course = toTenth((sailingLineAt(reach, along).azimuth + 90) % 360)
  const speed = toTenth((CROSSING.step / CROSSING.interval) * (3600 / 1852))
  return [-67, -22, 23, 68].map((offset, i) => {
    const at = beside(reach, [along, offset], 'ambiguous', {
      ship: shipOf('ferry', 20, 'DOCK FERRY'),
      navigationStatus: 0,
      speed,
      course,
    })
    return rowOf(at, start + i * CROSSING.interval)
  })
}

/** A place in the sea 30 km beside the waterway, and one in a field 100 m beside the Long Pound. */
const FAR_AWAY = [3.6, 54.35] as const
const IN_A_FIELD = [1350, 110] as const

/** Everything in a log that passes nothing: moored and anchored, crossing, elsewhere, and what is no vessel. */
export function besideTheWaterway(waterway: ReadonlyMap<string, Reach>, start: number): Row[] {
  const reachOf = (id: string): Reach => waterway.get(id)!
  const pound = reachOf('harrow-long-pound')
  const docks = reachOf('harrow-docks')
  const moored = { navigationStatus: 5, ship: shipOf('cargo', 21, 'IDLE BITTERN') }
  const anchored = {
    navigationStatus: 1,
    speed: 0.2,
    course: 211.3,
    ship: shipOf('ship', 22, 'ROADS PETREL'),
  }
  const [station, buoy] = [nobody('002990001', 'HARROWMERE TRAFFIC'), nobody('992990001', 'DOCK BEACON')]
  // class B says no status: only its speed tells that it drifts
  const drifting = { ship: shipOf('yacht', 25, 'DRIFTING COOT'), speed: 0.3, course: 77.1 }
  const outside = { ship: shipOf('yacht', 24, 'STRAY EGRET'), speed: 4.2, course: 104.5 }
  return [
    ...repeated(beside(reachOf('harrow-town-reach'), [1000, 18], 'stationary', moored), [start, 360, 6]),
    ...repeated(beside(docks, [1200, 40], 'stationary', anchored), [start + 45, 180, 6]),
    ...repeated(beside(reachOf('harrow-upper-reach'), [2000, 10], 'stationary', drifting), [
      start + 800,
      180,
      4,
    ]),
    ...crossing(docks, 500, start + 1000),
    ...repeated(
      {
        ship: shipOf('smallCargo', 23, 'FAR SHEARWATER'),
        position: FAR_AWAY,
        navigationStatus: 0,
        speed: 7.1,
        course: 88,
        truth: { status: 'no-segment' },
      },
      [start + 500, 70, 4],
    ),
    ...repeated(beside(pound, IN_A_FIELD, 'outside-fairway', outside), [start + 1300, 60, 1]),
    ...repeated(
      { ship: station, mobile: 'base-station', position: [3.7, 54.08], truth: { status: 'not-a-vessel' } },
      [start + 30, 600, 4],
    ),
    ...repeated(
      {
        ship: buoy,
        mobile: 'aid-to-navigation',
        position: placeBeside(docks, 300, 50),
        truth: { status: 'not-a-vessel' },
      },
      [start + 60, 600, 4],
    ),
  ]
}
