import { kinks, lineIntersect } from '@turf/turf'
import fc from 'fast-check'
import { expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import { crossingsOf, tangleOf } from '../../src/geo/crossings.ts'
import { lineTree } from '../../src/geo/line-tree.ts'
import { evenly } from '../support/arbitraries.ts'

// spread evenly: corner cases such as shared vertices are counted differently, and have their own tests below
const place = fc.tuple(evenly(5, 5.1), evenly(52, 52.1))
const scribble = fc.array(place, { minLength: 4, maxLength: 14 })

const geometry = (line: readonly LonLat[]) => ({
  type: 'LineString' as const,
  coordinates: line.map((position) => [...position]),
})

const sorted = (positions: readonly (readonly number[])[]) =>
  positions.toSorted((a, b) => a[0]! - b[0]! || a[1]! - b[1]!)

function expectSamePlaces(found: readonly LonLat[], expected: readonly (readonly number[])[]): void {
  const [a, b] = [sorted(found), sorted(expected)]
  expect(a).toHaveLength(b.length)
  a.forEach((position, i) => {
    expect(Math.hypot(position[0]! - b[i]![0]!, position[1]! - b[i]![1]!)).toBeLessThan(1e-9)
  })
}

test('a line crosses itself where the kinks of Turf are', () => {
  fc.assert(
    fc.property(scribble, (line) => {
      const { crossings } = tangleOf(lineTree(line))
      const expected = kinks(geometry(line)).features.map((feature) => feature.geometry.coordinates)
      expectSamePlaces(
        crossings.map(({ position }) => position),
        expected,
      )
    }),
  )
})

test('two lines cross where Turf intersects them', () => {
  fc.assert(
    fc.property(scribble, scribble, (a, b) => {
      const expected = lineIntersect(geometry(a), geometry(b)).features.map(
        (feature) => feature.geometry.coordinates,
      )
      expectSamePlaces(
        crossingsOf(lineTree(a), lineTree(b)).map(({ position }) => position),
        expected,
      )
    }),
  )
})

test('a line through a vertex crosses once, one that touches it from one side is even', () => {
  const line: LonLat[] = [
    [5, 52],
    [5.01, 52.01],
    [5.02, 52],
  ]
  expect(
    crossingsOf(
      lineTree(line),
      lineTree([
        [5.01, 52.02],
        [5.01, 52.01],
        [5.01, 52],
      ]),
    ),
  ).toHaveLength(1)
  expect(
    crossingsOf(
      lineTree(line),
      lineTree([
        [5, 52.01],
        [5.02, 52.01],
      ]),
    ).length % 2,
  ).toBe(0)
})

test('lines on both sides of the antimeridian cross each other', () => {
  const a: LonLat[] = [
    [179.9, 10],
    [-179.9, 10.1],
  ]
  const b: LonLat[] = [
    [-179.95, 10.2],
    [-179.95, 9.9],
  ]
  for (const found of [crossingsOf(lineTree(a), lineTree(b)), crossingsOf(lineTree(b), lineTree(a))]) {
    expect(found).toHaveLength(1)
    expect(found[0]!.position[0]).toBeCloseTo(-179.95, 9)
    expect(found[0]!.position[1]).toBeCloseTo(10.075, 9)
  }
})
