import * as turf from '@turf/turf'
import fc from 'fast-check'
import { expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import { axisOf } from '../../src/geo/chainage.ts'
import { feetOf, type LineFoot } from '../../src/geo/feet.ts'
import { networkOf } from '../../src/geo/network.ts'
import { planeAt, toPlane, type Point } from '../../src/geo/plane.ts'
import { evenly } from '../support/arbitraries.ts'
import { expectClose } from '../support/expect-close.ts'
import { geodesicAzimuth, geodesicEnd, geodesicLength } from '../support/geodesic.ts'

const LATITUDES = [0, 30, -45, 52, 70, -70]
const AZIMUTHS = [0, 17, 45, 90, 135, 200, 270, 333]

/** Vertices along one geodesic, a step in m apart. */
function straight(start: LonLat, azimuth: number, steps: number, step: number): LonLat[] {
  return Array.from({ length: steps + 1 }, (_, i) => geodesicEnd(start, azimuth, i * step).position)
}

/** Beside that geodesic: m along it and m to its right. */
function beside(start: LonLat, azimuth: number, along: number, offset: number): LonLat {
  const { position, azimuth: there } = geodesicEnd(start, azimuth, along)
  return geodesicEnd(position, there + 90, offset).position
}

function onlyFoot(line: readonly LonLat[], [lon, lat]: LonLat, reach = 1000): LineFoot {
  const feet = feetOf(networkOf([{ line, reach }]), lon, lat)
  expect(feet).toHaveLength(1)
  return feet[0]!
}

test('offset, along and bearing agree with the geodesic up to 500 m beside, across the antimeridian too', () => {
  const worst = { offset: 0, along: 0, bearing: 0 }
  for (const latitude of LATITUDES) {
    for (const azimuth of AZIMUTHS) {
      const start: LonLat = [179.99, latitude]
      const network = networkOf([{ line: straight(start, azimuth, 3, 950), reach: 600 }])
      for (const along of [30, 400, 1425, 2000, 2820]) {
        for (const offset of [-500, -120, -3, 0, 10, 250, 500]) {
          const [lon, lat] = beside(start, azimuth, along, offset)
          const [foot] = feetOf(network, lon, lat)
          const there = geodesicEnd(start, azimuth, along).azimuth
          worst.offset = Math.max(worst.offset, Math.abs(foot!.offset - offset))
          worst.along = Math.max(worst.along, Math.abs(foot!.along - along))
          worst.bearing = Math.max(worst.bearing, Math.abs(((foot!.bearing - there + 540) % 360) - 180))
          expect(foot!.beyond).toBe(0)
        }
      }
    }
  }
  // measured 0.052 m, 0.119 m, 0.016 degrees
  expect(worst.offset).toBeLessThan(0.1)
  expect(worst.along).toBeLessThan(0.2)
  expect(worst.bearing).toBeLessThan(0.03)
})

test('before the start and past the end the foot tells how far, and the offset from the continued line', () => {
  for (const latitude of LATITUDES) {
    for (const azimuth of AZIMUTHS) {
      const start: LonLat = [-179.999, latitude]
      const line = straight(start, azimuth, 2, 800)
      const before = onlyFoot(line, beside(start, azimuth, -200, 40))
      expectClose(before.beyond, -200, { abs: 0.05 })
      expectClose(before.offset, 40, { abs: 0.05 })
      expect(before.along).toBe(0)
      const past = onlyFoot(line, beside(start, azimuth, 1750, -60))
      expectClose(past.beyond, 150, { abs: 0.05 })
      expectClose(past.offset, -60, { abs: 0.05 })
      expectClose(past.along, 1600, { abs: 0.001 })
    }
  }
})

test('Turf finds the same distances, within 0.6 % for its sphere', () => {
  for (const latitude of LATITUDES) {
    for (const azimuth of AZIMUTHS) {
      const start: LonLat = [4, latitude]
      const line = straight(start, azimuth, 3, 700)
      const position = beside(start, azimuth, 900, 300)
      const { pointDistance, lineDistance } = turf.nearestPointOnLine(
        turf.lineString(line as [number, number][]),
        position as [number, number],
        { units: 'meters' },
      ).properties
      const { offset, along } = onlyFoot(line, position)
      expectClose(offset, pointDistance, { rel: 0.006 })
      // the sphere turns angles a little as well
      expectClose(along, lineDistance, { abs: 0.006 * (900 + 300) })
    }
  }
})

test('along is measured as on the axis, over edges that had to be cut', () => {
  const line: LonLat[] = [
    [4, 52],
    [4.1, 52.02],
    [4.1, 52.02],
    [4.13, 52],
  ]
  const axis = axisOf(line)
  const network = networkOf([{ line, reach: 100 }])
  expect(network.lengths[0]).toBe(axis.length)
  axis.positions.forEach(([lon, lat], i) => {
    const [foot] = feetOf(network, lon, lat)
    expectClose(foot!.along, axis.along[i]!, { abs: 1e-6 })
    expectClose(foot!.offset, 0, { abs: 1e-6 })
  })
  // the straight line in longitude and latitude, not the geodesic, which leaves it by 1.1 m here
  expectClose(feetOf(network, 4.05, 52.01)[0]!.offset, 0, { abs: 1e-6 })
  expect(geodesicLength([4, 52], [4.1, 52.02])).toBeGreaterThan(7000)
})

test('at a kink the side, the distance and the mean bearing are the same from either edge', () => {
  // east, then north: the outer side of the corner is to the south-east, on the right
  const corner: LonLat = [4, 52]
  const line = [geodesicEnd(corner, 270, 500).position, corner, geodesicEnd(corner, 0, 500).position]
  for (const azimuth of [100, 130, 140, 170]) {
    const foot = onlyFoot(line, geodesicEnd(corner, azimuth, 80).position)
    expectClose(foot.offset, 80, { abs: 0.01 })
    expectClose(foot.along, 500, { abs: 0.01 })
    expectClose(foot.bearing, 45, { abs: 0.01 })
    expect(foot.beyond).toBe(0)
  }
  const inner = onlyFoot(line, geodesicEnd(corner, 315, 80).position)
  expectClose(inner.offset, -80 * Math.SQRT1_2, { abs: 0.02 })
})

test('at a joint of two lines one of them is alongside, at a kinked one neither on the outer side', () => {
  const joint: LonLat = [-180, 60]
  const first = { line: [geodesicEnd(joint, 270, 500).position, joint], reach: 300 }
  const east = { line: [joint, geodesicEnd(joint, 90, 500).position], reach: 300 }
  const north = { line: [joint, geodesicEnd(joint, 0, 500).position], reach: 300 }
  const beyonds = (lines: (typeof first)[], position: LonLat) =>
    feetOf(networkOf(lines), ...position)
      .toSorted((a, b) => a.line - b.line)
      .map(({ beyond }) => Math.round(beyond))
  expect(beyonds([first, east], beside(joint, 90, -20, 30))).toEqual([0, -20])
  expect(beyonds([first, east], beside(joint, 90, 20, 30))).toEqual([20, 0])
  expect(beyonds([first, north], geodesicEnd(joint, 135, 50).position)).toEqual([35, -35])
})

test('a line is found up to its reach, each by its own', () => {
  const start: LonLat = [4, 52]
  const line = straight(start, 90, 2, 900)
  const network = networkOf([
    { line, reach: 100 },
    { line, reach: 300 },
  ])
  const linesAt = (along: number, offset: number) =>
    feetOf(network, ...beside(start, 90, along, offset)).map((foot) => foot.line)
  expect(linesAt(900, 99).toSorted()).toEqual([0, 1])
  expect(linesAt(900, -101)).toEqual([1])
  expect(linesAt(900, 299)).toEqual([1])
  expect(linesAt(900, 301)).toEqual([])
  expect(linesAt(-299, 0)).toEqual([1])
  expect(linesAt(-240, 240)).toEqual([]) // 339 m from the start
})

test('nothing is found in a network without lines or edges, near the poles and for positions that are none', () => {
  expect(feetOf(networkOf([]), 4, 52)).toEqual([])
  const point: LonLat[] = [
    [4, 52],
    [4, 52],
  ]
  expect(feetOf(networkOf([{ line: point, reach: 100 }]), 4, 52)).toEqual([])
  const line: LonLat[] = [
    [4, 84.99],
    [4, 85],
  ]
  const network = networkOf([{ line, reach: 10_000 }])
  expect(feetOf(network, 4, 85)).toHaveLength(1)
  for (const [lon, lat] of [
    [4, 85.0001],
    [4, NaN],
    [NaN, 85],
    [Infinity, 85],
  ] as const) {
    expect(feetOf(network, lon, lat)).toEqual([])
  }
  expect(() => networkOf([{ line: [...line, [4, 85.001]], reach: 1 }])).toThrow(RangeError)
  expect(() => networkOf([{ line: [...line, [NaN, 52]], reach: 1 }])).toThrow(RangeError)
})

test('longitudes a turn apart are the same place', () => {
  const line: LonLat[] = [
    [179.99, -17],
    [-179.99, -17],
  ]
  const network = networkOf([{ line, reach: 500 }])
  for (const lon of [180, -180, 540]) {
    const [foot] = feetOf(network, lon, -17.001)
    expectClose(foot!.along, geodesicLength(line[0]!, line[1]!) / 2, { abs: 0.01 })
    expectClose(foot!.offset, geodesicLength([180, -17], [180, -17.001]), { abs: 0.01 })
    expectClose(foot!.bearing, geodesicAzimuth([180, -17], [-179.99, -17]), { abs: 0.01 })
  }
})

/** Around a place on the antimeridian. */
const place = fc
  .tuple(evenly(179.97, 180.03), evenly(59.985, 60.015))
  .map(([lon, lat]): LonLat => [lon > 180 ? lon - 360 : lon, lat])
const networkLine = fc.record({
  line: fc.array(place, { minLength: 2, maxLength: 12 }),
  reach: evenly(0, 1500),
})

/** Least distance to any edge of a line, m, on the plane at the position. */
function bruteDistance(line: readonly LonLat[], position: LonLat): number {
  const plane = planeAt(position)
  const points = line.map((vertex) => toPlane(plane, vertex))
  const distances = points.slice(1).map(([bx, by], i) => {
    const [ax, ay] = points[i] as Point
    const [ux, uy] = [bx - ax, by - ay]
    const share = -(ax * ux + ay * uy) / (ux * ux + uy * uy)
    const held = Math.min(1, Math.max(0, share))
    return Math.hypot(ax + held * ux, ay + held * uy)
  })
  return Math.min(...distances)
}

test('feetOf finds what trying every edge of every line finds', () => {
  fc.assert(
    fc.property(fc.array(networkLine, { maxLength: 8 }), place, (lines, position) => {
      const feet = feetOf(networkOf(lines), ...position)
      const distances = new Map(
        feet.map(({ line, offset, beyond }) => [line, Math.hypot(offset, beyond)] as const),
      )
      expect(distances.size).toBe(feet.length)
      lines.forEach(({ line, reach }, i) => {
        const brute = bruteDistance(line, position)
        const found = distances.get(i)
        // which side of the reach rounding decides does not matter
        if (Math.abs(brute - reach) < 0.001) return
        if (brute > reach) expect(found).toBeUndefined()
        else expectClose(found!, brute, { abs: 0.011 })
      })
    }),
    { numRuns: 1000 },
  )
})
