import { expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import type { Station } from '../../src/domain/segment.ts'
import type { Fairway } from '../../src/passages/placement.ts'
import { expectClose } from '../support/expect-close.ts'
import {
  EAST,
  fairway,
  lastOf,
  type Place,
  place,
  report,
  type Sighting,
  told,
} from '../support/sightings.ts'

test('a report on a fairway is matched, with where it is and which way the vessel goes', () => {
  const reversed = fairway(
    'reversed',
    [
      [5000, 400],
      [0, 400],
    ],
    { chainages: [90_000, 80_000] },
  )
  const matched = lastOf([EAST, reversed], report(0, [1234, -12]))
  expect(matched).toMatchObject({ status: 'matched', reason: undefined, direction: 'downstream' })
  expect(matched.fairway).toBe(EAST)
  expectClose(matched.along, 1234, { abs: 0.1 })
  expectClose(matched.chainage, 1234, { abs: 0.1 })
  expectClose(matched.offset, -12, { abs: 0.01 })
  // drawn to the west: its right is the north, the chainage falls along it and counts double
  const other = lastOf([EAST, reversed], report(0, [1000, 390]))
  expect(other).toMatchObject({ status: 'matched', direction: 'upstream', fairway: { id: 'reversed' } })
  expectClose(other.along, 4000, { abs: 0.2 })
  expectClose(other.chainage, 82_000, { abs: 0.4 })
  expectClose(other.offset, 10, { abs: 0.02 })
})

test.each<[string, Place, Sighting]>([
  ['not-a-vessel base-station', [100, 0], { mobile: 'base-station', lon: NaN }],
  ['not-a-vessel aid-to-navigation', [100, 0], { mobile: 'aid-to-navigation' }],
  ['invalid-position position-missing', [100, 0], { lon: NaN }],
  ['invalid-position position-missing', [100, 0], { lat: NaN }],
  ['invalid-position latitude-beyond-85', [100, 0], { lat: -85.1 }],
  ['invalid-position longitude-beyond-180', [100, 0], { lon: -180.1 }],
  ['stationary below-half-a-knot east', [100, 0], { knots: 0.49 }],
  ['matched east', [100, 0], { knots: 0.51 }],
  ['stationary at-anchor east', [100, 0], { knots: 1.9, navigationStatus: 1 }],
  ['stationary moored east', [100, 0], { knots: NaN, navigationStatus: 5 }],
  ['stationary aground east', [100, 0], { knots: 0.6, navigationStatus: 6 }],
  ['matched east', [100, 0], { knots: 2, navigationStatus: 5 }],
  ['matched east', [100, 0], { knots: 1, navigationStatus: 0 }],
  ['stationary below-half-a-knot east', [100, 0], { knots: 0, course: 0 }],
  ['outside-fairway beyond-the-bank east', [100, 200], { knots: 0 }],
  ['no-segment no-fairway-within-reach', [100, 2000], { knots: 0 }],
  ['matched east', [100, 69.9], {}],
  ['outside-fairway beyond-the-bank east', [100, 70.1], {}],
  ['outside-fairway beyond-the-bank east', [100, -529], {}],
  ['no-segment no-fairway-within-reach', [100, -531], {}],
  ['matched east', [5069, 0], {}],
  ['outside-fairway beyond-the-end east', [-71, 0], {}],
  ['no-segment no-fairway-within-reach', [5531, 0], {}],
])('%s: a report at %j with %j', (expected, at, sighting) => {
  expect(told([lastOf([EAST], report(0, at, sighting))])).toEqual([expected])
})

test('figures are those of the nearest fairway outside, and none where no fairway is near', () => {
  const north = fairway('north', [
    [0, -300],
    [5000, -300],
  ])
  const outside = lastOf([EAST, north], report(0, [800, -190]))
  expect(outside).toMatchObject({
    status: 'outside-fairway',
    fairway: { id: 'north' },
    direction: 'downstream',
  })
  expectClose(outside.offset, 110, { abs: 0.1 })
  expectClose(outside.along, 800, { abs: 0.1 })
  const nowhere = { fairway: undefined, along: NaN, chainage: NaN, offset: NaN, direction: undefined }
  expect(lastOf([EAST], report(0, [0, 9000]))).toMatchObject(nowhere)
  expect(lastOf([], report(0, [0, 0]))).toMatchObject({ ...nowhere, status: 'no-segment' })
})

test('inside is 1.5 times the distance to the bank on that side and 25 m; the larger one where sides are not known', () => {
  const lopsided = { distances: [10, 60] as const }
  const line: Place[] = [
    [0, 0],
    [3000, 0],
  ]
  const status = (fairways: Fairway, south: number) => lastOf([fairways], report(0, [500, south])).status
  const known = fairway('known', line, lopsided)
  expect([-39.9, -40.1, 114.9, 115.1].map((south) => status(known, south))).toEqual([
    'matched',
    'outside-fairway',
    'matched',
    'outside-fairway',
  ])
  const unknown = fairway('unknown', line, { ...lopsided, hasSides: false })
  expect([-115.1, -114.9, 114.9, 115.1].map((south) => status(unknown, south))).toEqual([
    'outside-fairway',
    'matched',
    'matched',
    'outside-fairway',
  ])
})

test('on very wide water inside reaches farther than near, past the end and aside at once too', () => {
  const sound = fairway(
    'sound',
    [
      [0, 0],
      [5000, 0],
    ],
    { distances: [1200, 1200] },
  )
  expect(told([lastOf([sound], report(0, [900, 1820]))])).toEqual(['matched sound'])
  expect(told([lastOf([sound], report(0, [900, 1830]))])).toEqual(['no-segment no-fairway-within-reach'])
  expect(told([lastOf([sound], report(0, [-1800, -1800]))])).toEqual(['matched sound'])
})

test('distances to the banks are those at the chainage', () => {
  const station = (index: number, chainage: number, distance: number): Station => ({
    index,
    chainage,
    depth: 4,
    width: 2 * distance,
    distances: [distance, distance],
    shape: { kind: 'trapezoid' },
  })
  const widening = fairway(
    'widening',
    [
      [0, 0],
      [4000, 0],
    ],
    { stations: [station(0, 5000, 20), station(1, 9000, 100)], chainages: [5000, 9000] },
  )
  // 55 m at the start, 115 m half way, 175 m at the end
  const statuses = [
    [2000, 114],
    [2000, 116],
    [1000, 84],
    [1000, 86],
    [4000, 174],
  ].map(([east = 0, south = 0]) => lastOf([widening], report(0, [east, south])).status)
  expect(statuses).toEqual(['matched', 'outside-fairway', 'matched', 'outside-fairway', 'matched'])
})

test('a vessel across the only fairway is ambiguous above 5 kn, one that is slow or slants is matched', () => {
  const across = (sighting: Sighting) => told([lastOf([EAST], report(0, [900, 10], sighting))])[0]
  expect(across({ course: 0, knots: 8 })).toBe('ambiguous crossing east')
  expect(across({ course: 166, knots: 5.01 })).toBe('ambiguous crossing east')
  expect(across({ course: NaN, heading: 180, knots: 8 })).toBe('ambiguous crossing east')
  expect(across({ course: 164, knots: 8 })).toBe('matched east')
  expect(across({ course: 0, knots: 4.9 })).toBe('matched east')
  expect(across({ course: NaN, knots: 8 })).toBe('matched east')
})

test('a vessel that turns round is on its fairway all the time, and its direction changes', () => {
  const placements = place(
    [EAST],
    [
      report(0, [1000, 5]),
      report(60, [1180, 5], { course: 130, knots: 3 }),
      report(80, [1190, 15], { course: 180, knots: 5.5 }),
      report(100, [1185, 10], { course: 250, knots: 1.5 }),
      report(120, [1150, 0], { course: 20, knots: 1.5 }),
      report(180, [980, -5], { course: 275 }),
    ],
  )
  expect(placements.map(({ status, direction }) => `${status} ${direction}`)).toEqual([
    'matched downstream',
    'matched downstream',
    'ambiguous downstream',
    'matched downstream',
    'matched upstream',
    'matched upstream',
  ])
})

test('a slow vessel shows its direction after 30 m along the fairway, and keeps it', () => {
  const directions = (...easts: number[]) =>
    place(
      [EAST],
      easts.map((east, i) => report(60 * i, [east, 0], { knots: 1, course: 0 })),
    ).map(({ direction }) => direction)
  expect(directions(100, 129, 131, 140, 103, 100)).toEqual([
    undefined,
    undefined,
    'downstream',
    'downstream',
    'downstream',
    'upstream',
  ])
  // 200 m back over a gap tell nothing
  const [first, , after] = place(
    [EAST],
    [
      report(0, [500, 0]),
      report(60, [600, 0], { knots: 1 }),
      report(700, [400, 0], { knots: 1 }),
      report(760, [360, 0], { knots: 1 }),
    ],
  )
  expect(first?.direction).toBe('downstream')
  expect(after?.direction).toBeUndefined()
})

test('the course tells the direction within 75 degrees of either way, the heading where it is missing', () => {
  const direction = (sighting: Sighting) => lastOf([EAST], report(0, [500, 0], sighting)).direction
  expect(direction({ course: 16, knots: 3 })).toBe('downstream')
  expect(direction({ course: 14, knots: 3 })).toBeUndefined()
  expect(direction({ course: 196, knots: 3 })).toBe('upstream')
  expect(direction({ course: 344, knots: 3 })).toBe('upstream')
  expect(direction({ course: 270, knots: 1.9 })).toBeUndefined()
  expect(direction({ course: NaN, heading: 270 })).toBe('upstream')
  expect(direction({ course: 90, heading: 270 })).toBe('downstream')
})

test('fairways are found across the antimeridian', () => {
  const line: LonLat[] = [
    [179.99, -17],
    [-179.99, -17],
  ]
  const placements = place(
    [{ ...EAST, line }],
    [
      report(0, [0, 0], { lon: 179.999, lat: -17.0001 }),
      report(60, [0, 0], { lon: -179.999, lat: -17.0001 }),
    ],
  )
  expect(placements.map(({ status, direction }) => `${status} ${direction}`)).toEqual(
    Array(2).fill('matched downstream'),
  )
  // geodesics of 212.9 m along the parallel and 11.1 m along the meridian
  expectClose(placements[1]!.along - placements[0]!.along, 212.9, { abs: 0.1 })
  expectClose(placements[0]!.offset, 11.07, { abs: 0.01 })
})
