import { expect, test } from 'vitest'
import { axisOf, bearingAt, footOf, positionAt, smoothBearingAt } from '../../src/geo/chainage.ts'
import { expectClose } from '../support/expect-close.ts'
import { geodesicAzimuth, geodesicEnd, geodesicLength, makeChannel } from '../support/geodesic.ts'

const LATITUDES = [0, 35, 52, 70, -70]

const bends = (latitude: number) =>
  makeChannel(
    [179.99, latitude],
    30,
    [{ length: 4000 }, { length: 2000, radius: 900 }, { length: 2500, radius: -1200 }, { length: 1500 }],
    () => [30, 30],
  )

test('the distance of each vertex is within 1e-6 of the sum of geodesics up to 70 degrees', () => {
  let worst = 0
  for (const latitude of LATITUDES) {
    const line = bends(latitude).axis
    const { vertices, length } = axisOf(line)
    expect(vertices).toHaveLength(line.length)
    expect(vertices.at(-1)).toBe(length)
    let sum = 0
    line.forEach((position, i) => {
      if (i === 0) return
      sum += geodesicLength(line[i - 1]!, position)
      worst = Math.max(worst, Math.abs(vertices[i]! / sum - 1))
    })
  }
  // measured 2e-10: the edges are 50 m
  expect(worst).toBeLessThan(1e-8)
})

test('positionAt and footOf undo one another', () => {
  for (const latitude of LATITUDES) {
    const axis = axisOf(bends(latitude).axis)
    for (let along = 0; along <= axis.length; along += 123.4) {
      const foot = footOf(axis, positionAt(axis, along))
      expectClose(foot.along, along, { abs: 1e-5 })
      expectClose(foot.offset, 0, { abs: 1e-5 })
      expect(foot.isBeyond).toBe(false)
    }
  }
})

test('positionAt gives the ends as they are, and holds them beyond', () => {
  const line = bends(52).axis
  const axis = axisOf(line)
  expect(positionAt(axis, 0)).toBe(line[0])
  expect(positionAt(axis, axis.length)).toBe(line.at(-1))
  expect(positionAt(axis, -5)).toBe(line[0])
  expect(positionAt(axis, axis.length + 5)).toBe(line.at(-1))
})

test('bearingAt is the azimuth of the edge within 0.01 degrees', () => {
  for (const latitude of LATITUDES) {
    const { axis: line, along } = bends(latitude)
    const axis = axisOf(line)
    line.slice(1).forEach((b, i) => {
      const a = line[i]!
      const difference = bearingAt(axis, (along[i]! + along[i + 1]!) / 2) - geodesicAzimuth(a, b)
      expectClose(((difference + 540) % 360) - 180, 0, { abs: 0.01 })
    })
  }
})

test('smoothBearingAt is the bisector at a kink and the edge away from it', () => {
  const start = [5, 52] as const
  const { position: kink } = geodesicEnd(start, 90, 500)
  const { position: end } = geodesicEnd(kink, 150, 500)
  const axis = axisOf([start, kink, end])
  expectClose(smoothBearingAt(axis, 500, 20), 120, { abs: 0.02 })
  expectClose(smoothBearingAt(axis, 400, 20), 90, { abs: 0.02 })
  expectClose(smoothBearingAt(axis, 600, 20), 150, { abs: 0.02 })
})

test('smoothBearingAt does not follow a jag of a metre', () => {
  const start = [5, 52] as const
  const middle = geodesicEnd(start, 90, 500).position
  const jag = geodesicEnd(middle, 0, 1).position
  const axis = axisOf([
    start,
    geodesicEnd(start, 90, 499).position,
    jag,
    geodesicEnd(start, 90, 501).position,
    geodesicEnd(start, 90, 1000).position,
  ])
  expect(Math.abs(bearingAt(axis, 499.5) - 90)).toBeGreaterThan(40)
  expectClose(smoothBearingAt(axis, 499.5, 20), 90, { abs: 0.5 })
})

test('smoothBearingAt is the tangent at the ends of a bend', () => {
  const channel = makeChannel([5, 60], 40, [{ length: 1000, radius: 750 }], () => [100, 100])
  const axis = axisOf(channel.axis)
  expectClose(smoothBearingAt(axis, 0, 40), 40, { abs: 0.1 })
  expectClose(smoothBearingAt(axis, axis.length, 40), 40 + (1000 / 750) * (180 / Math.PI), { abs: 0.1 })
})

test('footOf finds offsets within 0.1 m of the geodesic at 500 m, right positive', () => {
  let worst = 0
  for (const latitude of LATITUDES) {
    const channel = makeChannel(
      [-179.99, latitude],
      300,
      [{ length: 3000 }, { length: 2000, radius: 1200 }],
      () => [500, 300],
    )
    const axis = axisOf(channel.axis)
    channel.along.forEach((along, i) => {
      const [left, right] = [footOf(axis, channel.left[i]!), footOf(axis, channel.right[i]!)]
      worst = Math.max(worst, Math.abs(left.offset + 500), Math.abs(right.offset - 300))
      expectClose(right.along, along, { abs: 12 }) // half a chord of 30 m and its turn
    })
  }
  expect(worst).toBeLessThan(0.15)
})

test('footOf tells positions before the start and after the end', () => {
  const start = [5, 52] as const
  const axis = axisOf([start, geodesicEnd(start, 90, 800).position])
  expect(footOf(axis, geodesicEnd(start, 270, 10).position)).toMatchObject({ along: 0, isBeyond: true })
  expect(footOf(axis, geodesicEnd(start, 90, 900).position).isBeyond).toBe(true)
  expect(footOf(axis, geodesicEnd(start, 0, 10).position).isBeyond).toBe(false)
})

test('the side of a position beyond a sharp vertex is the same from either edge', () => {
  const start = [5, 52] as const
  const { position: tip } = geodesicEnd(start, 0, 500)
  const { position: end } = geodesicEnd(tip, 170, 500)
  const axis = axisOf([start, tip, end])
  for (const azimuth of [300, 330, 350, 10, 60]) {
    expect(footOf(axis, geodesicEnd(tip, azimuth, 40).position).offset).toBeLessThan(0)
  }
})

test('footOf looks 259 vertices up in microseconds', () => {
  const channel = makeChannel([5, 52], 0, [{ length: 12900 }], () => [30, 30])
  const axis = axisOf(channel.axis)
  const started = performance.now()
  for (let i = 0; i < 2000; i++) footOf(axis, channel.left[i % channel.left.length]!)
  // Turf's nearestPointOnLine takes about 1150 us here; 100 leaves room for a busy machine
  expect((performance.now() - started) / 2000).toBeLessThan(0.1)
})
