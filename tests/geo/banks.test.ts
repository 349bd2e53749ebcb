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

const codes = ({ findings }: MeasuredBanks) => findings.map(({ code }) => code)

test('stations stand at each vertex, at most 100 m apart, and at further places', () => {
  const { stations } = measure([at(0, 0), at(250, 0), at(252, 0), at(2000, 0)], straight(), {
    at: [333.3, 9999],
  })
  const along = stations.map((station) => station.along)
  expect(along[0]).toBe(0)
  expectClose(along.at(-1)!, 2000, { abs: 0.001 })
  const gaps = along.slice(1).map((place, i) => place - along[i]!)
  expect(Math.max(...gaps)).toBeLessThan(100.001)
  for (const place of [250, 333.3]) expect(along.some((other) => Math.abs(other - place) < 0.01)).toBe(true)
  // 2 m after the one before: not worth its own
  expect(along.some((other) => Math.abs(other - 252) < 0.01)).toBe(false)
})

test('the spacing can be set', () => {
  const { stations } = measure([at(0, 0), at(2000, 0)], straight(), { spacing: 500 })
  expect(stations).toHaveLength(5)
})

test('the width is the sum of both distances, and unknown with one bank', () => {
  const { axis, left, right } = straight()
  const both = measure(axis, { left, right }).stations[3]!
  expect(both.width).toBe(both.left!.distance + both.right!.distance)
  expectClose(both.width!, 100, { abs: 0.01 })
  const one = measure(axis, { right })
  expect(one.findings).toEqual([])
  expect(one.stations[3]).toMatchObject({ left: null, width: null, source: 'normal' })
  expectClose(one.stations[3]!.right!.distance, 60, { abs: 0.01 })
})

test('without lines there are no stations', () => {
  expect(measure(straight().axis, {})).toEqual({ stations: [], findings: [] })
})

test('the vertex order of a bank does not matter', () => {
  const { axis, left, right } = makeChannel(
    [179.99, 66],
    90,
    [{ length: 900 }, { length: 900, radius: 300 }],
    () => [40, 60],
  )
  const forth = measure(axis, { left, right })
  const back = measure(axis, { left: left.toReversed(), right: right.toReversed() })
  expect(back.findings).toEqual([])
  forth.stations.forEach((station, i) => {
    expectClose(back.stations[i]!.left!.distance, station.left!.distance, { abs: 1e-6 })
    expectClose(back.stations[i]!.right!.distance, station.right!.distance, { abs: 1e-6 })
  })
})

test('swapped banks are swapped back with a remark', () => {
  const { axis, left, right } = straight()
  const swapped = measure(axis, { left: right, right: left })
  expect(codes(swapped)).toEqual(['banks-swapped'])
  expect(swapped.findings[0]).toMatchObject({ level: 'remark' })
  expect(swapped.findings[0]!.detail).toContain('their lines were swapped')
  expect(swapped.stations).toEqual(measure(axis, { left, right }).stations)
})

test('a single bank on the wrong side is a fault', () => {
  const { axis, left } = straight()
  const { stations, findings } = measure(axis, { right: left })
  expect(stations).toEqual([])
  expect(findings).toHaveLength(1)
  expect(findings[0]).toMatchObject({ level: 'fault', code: 'bank-on-wrong-side', pointer: '/right/line' })
  expect(findings[0]!.detail).toContain('lies to the left of the sailing line')
})

test('two banks on one side are a fault that names the wrong one', () => {
  const { axis, left } = straight()
  const outer = Array.from({ length: 21 }, (_, i) => at(i * 100, -90))
  const { findings } = measure(axis, { left, right: outer })
  expect(findings[0]).toMatchObject({ level: 'fault', code: 'banks-on-one-side', pointer: '/right/line' })
  expect(findings[0]!.detail).toContain(
    'Both banks lie to the left of the sailing line, the right one as well',
  )
})

test('a bank across the sailing line is a fault that says where', () => {
  const { axis, right } = straight()
  const left = [at(0, -40), at(700, -40), at(900, 20), at(1200, -40), at(2000, -40)]
  const { stations, findings } = measure(axis, { left, right })
  expect(stations).toEqual([])
  expect(findings).toHaveLength(1)
  expect(findings[0]).toMatchObject({
    code: 'bank-crosses-line',
    pointer: '/left/line/coordinates/1',
    facts: { crossings: 2 },
  })
  expect(findings[0]!.detail).toContain(
    'crosses the sailing line 2 times, first at 5.01213, 52.00000, 833 m along it',
  )
})

test('a bank of another waterway is a fault', () => {
  const { axis, right } = straight()
  const far = [at(0, -15_000), at(2000, -15_000)]
  expect(measure(axis, { left: far, right }).findings[0]).toMatchObject({
    code: 'bank-out-of-reach',
    pointer: '/left/line',
  })
})

test('faults of the shape of a bank carry its name and its place', () => {
  const polygon = { type: 'Polygon', coordinates: [straight().left] }
  const { findings } = measureBanks(axisOf(straight().axis), {
    left: polygon,
    right: line([
      [500000, 6e6],
      [1, 2],
    ]),
  })
  expect(findings.map(({ code, pointer }) => [code, pointer])).toEqual([
    ['not-a-line', '/left/line/type'],
    ['looks-projected', '/right/line/coordinates/0'],
  ])
  expect(findings[0]!.detail).toContain('The left bank is a Polygon')
})

test('beyond the end of a bank its last distance is held, with a remark of the missing length', () => {
  const { axis, right } = straight()
  const left = [at(600, -40), at(1000, -40), at(1500, -45)]
  const { stations, findings } = measure(axis, { left, right })
  expect(findings).toHaveLength(1)
  expect(findings[0]).toMatchObject({ level: 'remark', code: 'bank-too-short', pointer: '/left/line' })
  expect(findings[0]!.detail).toContain('the first 600 m and the last 500 m')
  for (const { along, left: found, source } of stations) {
    if (along < 590) expectClose(found!.distance, 40, { abs: 0.01 })
    if (along > 1510) expectClose(found!.distance, 45, { abs: 0.05 })
    if (along < 590 || along > 1510) expect(found).toMatchObject({ source: 'nearest', found: 'beyond-end' })
    else if (along > 610 && along < 1490) expect(source).toBe('normal')
  }
})

test('banks across the antimeridian at 70 degrees are measured like any others', () => {
  const { axis, left, right } = straight([179.98, 70])
  const { stations, findings } = measure(axis, { left, right: right.toReversed() })
  expect(findings).toEqual([])
  for (const station of stations) {
    expectClose(station.left!.distance, 40, { abs: 0.01 })
    expectClose(station.right!.distance, 60, { abs: 0.01 })
  }
})
