import fc from 'fast-check'
import { expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import { lineTree } from '../../src/geo/line-tree.ts'
import { nearestOf } from '../../src/geo/nearest.ts'
import { firstCrossing } from '../../src/geo/normal.ts'
import { planeAt, toPlane, type Point } from '../../src/geo/plane.ts'
import { evenly } from '../support/arbitraries.ts'

const ORIGIN: LonLat = [179.99, 60]
const PLANE = planeAt(ORIGIN)

/** Around the origin, on both sides of the antimeridian. */
const place = fc
  .tuple(evenly(179.95, 180.05), evenly(59.98, 60.02))
  .map(([lon, lat]): LonLat => [lon > 180 ? lon - 360 : lon, lat])
const line = fc.array(place, { minLength: 2, maxLength: 60 })

/** Points of a line on the plane, 2000 to an edge: within 3 m of any point of it. */
function samples(positions: readonly LonLat[]): Point[] {
  const points = positions.map((position) => toPlane(PLANE, position))
  return points.slice(1).flatMap(([bx, by], i) => {
    const [ax, ay] = points[i]!
    return Array.from({ length: 2001 }, (_, k): Point => [
      ax + (k / 2000) * (bx - ax),
      ay + (k / 2000) * (by - ay),
    ])
  })
}

test('nearestOf finds what trying every place of the line finds', () => {
  fc.assert(
    fc.property(line, (positions) => {
      const brute = Math.min(...samples(positions).map(([x, y]) => Math.hypot(x, y)))
      const { distance, x, y } = nearestOf(lineTree(positions), PLANE)!
      expect(distance).toBeLessThanOrEqual(brute + 1e-6)
      expect(distance).toBeGreaterThan(brute - 3)
      expect(Math.hypot(x, y)).toBeCloseTo(distance, 9)
    }),
    { numRuns: 40 },
  )
})

test('nearestOf finds nothing outside a sector', () => {
  fc.assert(
    fc.property(line, evenly(0, 2 * Math.PI), evenly(0.1, 1.4), (positions, direction, halfAngle) => {
      const sector = { x: Math.cos(direction), y: Math.sin(direction), halfAngle }
      const inside = samples(positions).filter(
        ([x, y]) => x * sector.x + y * sector.y >= Math.cos(halfAngle) * Math.hypot(x, y),
      )
      const found = nearestOf(lineTree(positions), PLANE, sector)
      if (found === null) {
        expect(inside).toHaveLength(0)
        return
      }
      const { x, y, distance } = found
      expect(x * sector.x + y * sector.y).toBeGreaterThanOrEqual(Math.cos(halfAngle) * distance - 1e-6)
      const brute = Math.min(Infinity, ...inside.map((point) => Math.hypot(...point)))
      expect(distance).toBeLessThanOrEqual(brute + 1e-6)
    }),
    { numRuns: 40 },
  )
})

test('nearestOf keeps to a distance', () => {
  const tree = lineTree([
    [179.99, 60.01],
    [-179.99, 60.01],
  ])
  expect(nearestOf(tree, PLANE, null, 1000)).toBeNull() // 1114 m to the north
  expect(nearestOf(tree, PLANE, null, 1200)?.distance).toBeCloseTo(1114.13, 1)
})

test('firstCrossing lies on the ray and on the line, and nothing of the line lies on the ray before it', () => {
  fc.assert(
    fc.property(line, evenly(0, 2 * Math.PI), (positions, direction) => {
      const [ux, uy] = [Math.cos(direction), Math.sin(direction)]
      // along and across the ray
      const turned = positions.map((position) => {
        const [x, y] = toPlane(PLANE, position)
        return [x * ux + y * uy, y * ux - x * uy] as const
      })
      const hits = turned.slice(1).flatMap(([b, bAcross], i) => {
        const [a, aAcross] = turned[i]!
        const at = a + (aAcross / (aAcross - bAcross)) * (b - a)
        return aAcross > 0 !== bAcross > 0 && at >= 0 ? [at] : []
      })
      const found = firstCrossing(lineTree(positions), PLANE, [ux, uy], 10_000)
      if (hits.length === 0) expect(found).toBeNull()
      else expect(Math.hypot(...found!)).toBeCloseTo(Math.min(...hits), 5)
    }),
  )
})
