import fc from 'fast-check'
import { expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import {
  between,
  edgeLength,
  fromPlane,
  longitudeDifference,
  planeAt,
  toPlane,
  wrapLongitude,
} from '../../src/geo/plane.ts'
import { expectClose } from '../support/expect-close.ts'
import { geodesicEnd, geodesicLength } from '../support/geodesic.ts'

const LATITUDES = [0, 30, -45, 52, 60, 70, -70]
const AZIMUTHS = [0, 17, 45, 90, 135, 200, 270, 333]

test('edgeLength is within 1e-6 of the geodesic for edges of 1 m to 1 km up to 70 degrees', () => {
  let worst = 0
  for (const latitude of LATITUDES) {
    for (const longitude of [4, 179.999, -179.999]) {
      for (const azimuth of AZIMUTHS) {
        for (const length of [1, 100, 1000]) {
          const a: LonLat = [longitude, latitude]
          const { position: b } = geodesicEnd(a, azimuth, length)
          worst = Math.max(worst, Math.abs(edgeLength(a, b) / length - 1))
        }
      }
    }
  }
  // measured 9e-9
  expect(worst).toBeLessThan(2e-8)
})

test('edgeLength stays within 1e-6 at 85 degrees, the end of its range', () => {
  for (const azimuth of AZIMUTHS) {
    const { position } = geodesicEnd([12, 84.99], azimuth, 1000)
    expectClose(edgeLength([12, 84.99], position), 1000, { rel: 1e-6 })
  }
})

test('toPlane puts a position where the geodesic leads, within d² tan(lat) / R', () => {
  for (const latitude of LATITUDES) {
    for (const azimuth of AZIMUTHS) {
      const origin: LonLat = [-179.998, latitude]
      const [x, y] = toPlane(planeAt(origin), geodesicEnd(origin, azimuth, 500).position)
      const radians = (azimuth * Math.PI) / 180
      const off = Math.hypot(x - 500 * Math.sin(radians), y - 500 * Math.cos(radians))
      expect(off).toBeLessThan(0.002 + (500 ** 2 * Math.abs(Math.tan((latitude * Math.PI) / 180))) / 6.35e6)
    }
  }
})

test('fromPlane undoes toPlane, across the antimeridian too', () => {
  fc.assert(
    fc.property(
      fc.double({ min: -180, max: 180, noNaN: true }),
      fc.double({ min: -85, max: 85, noNaN: true }),
      fc.double({ min: -5000, max: 5000, noNaN: true }),
      fc.double({ min: -5000, max: 5000, noNaN: true }),
      (lon, lat, x, y) => {
        const plane = planeAt([lon, lat])
        const position = fromPlane(plane, [x, y])
        expect(Math.abs(position[0])).toBeLessThanOrEqual(180)
        const [x2, y2] = toPlane(plane, position)
        // a double of degrees resolves 1e-9 m at best
        expectClose(x2, x, { abs: 1e-7 })
        expectClose(y2, y, { abs: 1e-7 })
      },
    ),
  )
})

test('longitudes differ by the shorter way round', () => {
  expectClose(longitudeDifference(179.9, -179.9), 0.2, { abs: 1e-12 })
  expectClose(longitudeDifference(-179.9, 179.9), -0.2, { abs: 1e-12 })
  expect(longitudeDifference(10, 10)).toBe(0)
  expect(wrapLongitude(180)).toBe(180)
  expect(wrapLongitude(180.5)).toBe(-179.5)
  expect(wrapLongitude(-180.5)).toBe(179.5)
})

test('between gives the ends as they are and the middle on the straight line', () => {
  const [a, b]: LonLat[] = [
    [179.9, 10],
    [-179.7, 11],
  ]
  expect(between(a!, b!, 0)).toBe(a)
  expect(between(a!, b!, 1)).toBe(b)
  const [lon, lat] = between(a!, b!, 0.5)
  expectClose(lon, -179.9, { abs: 1e-12 })
  expect(lat).toBe(10.5)
  // the geodesic through the same ends is as long as its parts only where the two do not part: here 0.3 mm of 122 km
  expectClose(geodesicLength(a!, [lon, lat]) + geodesicLength([lon, lat], b!), geodesicLength(a!, b!), {
    rel: 1e-6,
  })
})
