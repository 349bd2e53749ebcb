import { expect, test } from 'vitest'
import { boundingBox, boxesMeet, lineLength } from '../../src/geo/measure.ts'
import { expectClose } from '../support/expect-close.ts'
import { geodesicLength } from '../support/geodesic.ts'

test('lineLength of an edge of 60 km is that of the straight longitude/latitude line', () => {
  // along a parallel: N cos(lat) times the angle, from the radius of the parallel at 52 N, 3935.9 km
  const radius =
    (6378137 * Math.cos(0.907571211037051)) /
    Math.sqrt(1 - 0.0066943799901413 * Math.sin(0.907571211037051) ** 2)
  const parallel = (radius * Math.PI) / 180
  expectClose(
    lineLength([
      [4, 52],
      [5, 52],
    ]),
    parallel,
    { rel: 1e-9 },
  )
  // the geodesic cuts the corner
  expect(geodesicLength([4, 52], [5, 52])).toBeLessThan(parallel)
})

test('lineLength goes the short way across the antimeridian', () => {
  expectClose(
    lineLength([
      [179.99, 60],
      [-179.99, 60],
    ]),
    geodesicLength([179.99, 60], [-179.99, 60]),
    { rel: 1e-6 },
  )
})

test('boundingBox has west above east for a line across the antimeridian', () => {
  expect(
    boundingBox([
      [179.9, 1],
      [-179.8, 2],
      [-179.95, 0],
    ]),
  ).toEqual([179.9, 0, -179.8, 2])
  expect(
    boundingBox([
      [-179.9, 1],
      [179.8, 2],
    ]),
  ).toEqual([179.8, 1, -179.9, 2])
})

test('boundingBox keeps the digits of a line that crosses nothing and may end on 180', () => {
  expect(
    boundingBox([
      [4.1, 52.3],
      [4.7, 51.9],
    ]),
  ).toEqual([4.1, 51.9, 4.7, 52.3])
  expect(
    boundingBox([
      [179.5, 0],
      [180, 1],
    ]),
  ).toEqual([179.5, 0, 180, 1])
})

test('boundingBox takes a line of 100,000 positions', () => {
  const line = Array.from({ length: 100_000 }, (_, i) => [i / 1e4, i / 1e5] as const)
  expect(boundingBox(line)).toEqual([0, 0, 9.9999, 0.99999])
})

test('boxes meet across the antimeridian and not around the world', () => {
  expect(boxesMeet([179, 0, -179, 1], [-180, 0, -179.5, 1])).toBe(true)
  expect(boxesMeet([179, 0, -179, 1], [-10, 0, 10, 1])).toBe(false)
  expect(boxesMeet([0, 0, 1, 1], [0, 2, 1, 3])).toBe(false)
})
