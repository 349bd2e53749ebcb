import { expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import { measureBanks, type BankOptions, type MeasuredBanks } from '../../src/geo/banks.ts'
import { axisOf } from '../../src/geo/chainage.ts'
import { expectClose } from '../support/expect-close.ts'
import { geodesicEnd, makeChannel, type Channel } from '../support/geodesic.ts'

const line = (coordinates: unknown) => ({ type: 'LineString', coordinates })

type Lines = Partial<Record<'left' | 'right', readonly LonLat[]>>

function measure(axis: readonly LonLat[], lines: Lines, options?: BankOptions): MeasuredBanks {
  const geometries = Object.fromEntries(Object.entries(lines).map(([side, bank]) => [side, line(bank)]))
  return measureBanks(axisOf(axis), geometries, options)
}

const START: LonLat = [5, 52]

/** East for 2 km, 40 m to the left bank and 60 m to the right. */
const straight = (start = START): Channel => makeChannel(start, 90, [{ length: 2000 }], () => [40, 60])

/** A position by distances along and across that channel, m, positive to the right. */
function at(along: number, across: number): LonLat {
  const { position, azimuth } = geodesicEnd(START, 90, along)
  return geodesicEnd(position, azimuth + 90, across).position
}

/** The left bank with a harbour: mouth from 950 m to 1050 m, a basin 300 m deep. */
const HARBOUR = [
  at(0, -40),
  at(950, -40),
  at(950, -90),
  at(850, -90),
  at(850, -340),
  at(1150, -340),
  at(1150, -90),
  at(1050, -90),
  at(1050, -40),
  at(2000, -40),
]

test('in a harbour mouth the corners of the mouth count, not the far end of the basin', () => {
  const { axis, right } = straight()
  const { stations, findings } = measure(axis, { left: HARBOUR, right })
  expect(findings).toHaveLength(1)
  expect(findings[0]).toMatchObject({ level: 'remark', code: 'bank-opens', pointer: '/left/line' })
  expect(findings[0]!.detail).toBe(
    'At 1000 m along it the normal of the sailing line runs into an opening of the left bank: the distance to the nearest point of the bank was taken',
  )
  const mouth = stations.find(({ along }) => Math.abs(along - 1000) < 1)!
  expect(mouth).toMatchObject({ source: 'nearest', left: { source: 'nearest', found: 'opening' } })
  expectClose(mouth.left!.distance, Math.hypot(50, 40), { abs: 0.05 })
  for (const { along, left } of stations) {
    // an edge of 950 m lies 2 cm beside the geodesic in its middle
    if (Math.abs(along - 1000) > 55) expectClose(left!.distance, 40, { abs: 0.03 })
  }
})

test('the basin of a harbour behind the bank does not count beside the mouth', () => {
  const { axis, right } = straight()
  const { stations } = measure(axis, { left: HARBOUR, right }, { spacing: 7 })
  for (const { left } of stations) expect(left!.distance).toBeLessThanOrEqual(Math.hypot(50, 40) + 0.1)
})

test('a mouth where the bank line is left open is missed, and the ends count', () => {
  const { axis, right } = straight()
  // the bank follows the arms of a river that joins: 3 km up and back beyond the reach
  const left = [at(0, -40), at(950, -40), at(950, -4000), at(1050, -4000), at(1050, -40), at(2000, -40)]
  const { stations, findings } = measure(axis, { left, right }, { reach: 1000 })
  expect(findings.map(({ code }) => code)).toEqual(['bank-missed'])
  const mouth = stations.find(({ along }) => Math.abs(along - 1000) < 1)!
  expectClose(mouth.left!.distance, Math.hypot(50, 40), { abs: 0.05 })
})

test('a lasting widening is taken as drawn, with a remark', () => {
  const { axis, right } = straight()
  const left = [at(0, -40), at(1010, -40), at(1010, -150), at(2000, -150)]
  const { stations, findings } = measure(axis, { left, right })
  expect(findings.map(({ code }) => code)).toContain('bank-widens')
  expect(findings.at(-1)!.detail).toContain('steps between')
  expectClose(stations.at(-1)!.left!.distance, 150, { abs: 0.05 })
})

test('around a tongue of land the near limb counts, not the far one', () => {
  // a hairpin of 180 degrees around a spit: the inner bank runs out along one limb and back along the other
  const channel = makeChannel(
    START,
    0,
    [{ length: 1500 }, { length: Math.PI * 150, radius: 150 }, { length: 1500 }],
    () => [60, 40],
  )
  const [out, back] = [channel.right[0]!, channel.right.at(-1)!]
  const tip = channel.right[Math.floor(channel.right.length / 2)]!
  // without the rounded head: the spit is cut to a line that the normals of the bend can miss
  const spit = [out, geodesicEnd(out, 0, 1450).position, tip, geodesicEnd(back, 0, 1450).position, back]
  const { stations } = measure(channel.axis, { left: channel.left, right: spit })
  for (const { right } of stations) expect(right!.distance).toBeLessThan(110)
  for (const { along, right } of stations) if (along < 1400) expectClose(right!.distance, 40, { abs: 0.2 })
})

test('where the inner bank is missing the normal does not take the far limb for it', () => {
  const channel = makeChannel(
    START,
    0,
    [{ length: 1500 }, { length: Math.PI * 300, radius: 300 }, { length: 1500 }],
    () => [60, 40],
  )
  // the right bank is drawn along the second limb only
  const right = channel.right.slice(-20)
  const { stations, findings } = measure(channel.axis, { left: channel.left, right })
  expect(findings.map(({ code }) => code)).toContain('bank-too-short')
  for (const station of stations) expectClose(station.right!.distance, 40, { abs: 0.5 })
})

test('a bank that runs on around the head of a basin keeps its side', () => {
  const { axis } = straight()
  // past the end of the sailing line and 4 km away to its right
  const left = [at(0, -40), at(2050, -40), at(2050, 4000)]
  const { stations, findings } = measure(axis, { left })
  expect(findings).toEqual([])
  // an edge of 2 km lies 0.1 m beside the geodesic in its middle
  for (const station of stations) expectClose(station.left!.distance, 40, { abs: 0.12 })
})

test('in a wide water the direction is smoothed over 50 m at most', () => {
  const kink = geodesicEnd(START, 90, 1000)
  const end = geodesicEnd(kink.position, kink.azimuth + 30, 1000)
  const left = [0, 1000, 2000, 3000].map((along) => at(along, -2000))
  const { stations } = measure([START, kink.position, end.position], { left }, { spacing: 50 })
  // 100 m before the kink straight across, 100 m after it 30 degrees off
  const distanceAt = (along: number) =>
    stations.find((station) => Math.abs(station.along - along) < 1)!.left!.distance
  expectClose(distanceAt(900), 2000, { abs: 1 })
  expectClose(distanceAt(1100), 2050 / Math.cos(Math.PI / 6), { abs: 2 })
})
