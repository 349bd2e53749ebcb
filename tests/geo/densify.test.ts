import fc from 'fast-check'
import { expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import { densify } from '../../src/geo/densify.ts'
import { geodesicLength } from '../support/geodesic.ts'

const place = fc.tuple(
  fc.double({ min: -180, max: 180, noNaN: true }),
  fc.double({ min: -70, max: 70, noNaN: true }),
)
const step = fc.tuple(
  fc.double({ min: -0.5, max: 0.5, noNaN: true }),
  fc.double({ min: -0.5, max: 0.5, noNaN: true }),
)

function lineFrom([lon, lat]: LonLat, steps: readonly (readonly [number, number])[]): LonLat[] {
  const line: LonLat[] = [[lon, lat]]
  for (const [east, north] of steps) {
    const [x, y] = line.at(-1)!
    const next = x + east
    line.push([next > 180 ? next - 360 : next < -180 ? next + 360 : next, y + north])
  }
  return line
}

test('no piece is longer than 1 km, the given positions stay, the new ones lie on the straight line', () => {
  fc.assert(
    fc.property(place, fc.array(step, { minLength: 1, maxLength: 4 }), (start, steps) => {
      const line = lineFrom(start, steps)
      const dense = densify(line)
      expect(dense[0]).toBe(line[0])
      expect(dense.at(-1)).toBe(line.at(-1))
      const kept = dense.filter((position) => line.includes(position))
      expect(kept).toEqual(line)
      let edge = -1
      dense.forEach((position, i) => {
        const before = dense[i - 1]
        // the geodesic is the shortest there is, so this is a lower bound up to 1e-7
        if (before) expect(geodesicLength(before, position)).toBeLessThanOrEqual(1000.0001)
        if (line.includes(position)) {
          edge++
          return
        }
        const [a, [east, north]] = [line[edge]!, steps[edge]!]
        const lon = ((((position[0] - a[0] + 540) % 360) + 360) % 360) - 180
        // off the line by less than a micrometre: 1e-11 degrees
        expect(Math.abs(lon * north - (position[1] - a[1]) * east) / Math.hypot(east, north)).toBeLessThan(
          1e-11,
        )
      })
    }),
    { numRuns: 40 },
  )
})

test('an edge of 1 km or less stays whole', () => {
  const line: LonLat[] = [
    [4, 52],
    [4.014, 52],
  ]
  expect(densify(line)).toEqual(line)
})

test('pieces across the antimeridian are short and keep to -180 and 180', () => {
  const dense = densify([
    [179.95, 65],
    [-179.95, 65.02],
  ])
  expect(dense).toHaveLength(7) // 5.2 km in 6 pieces
  expect(dense.every(([lon]) => Math.abs(lon) > 179.9 && Math.abs(lon) <= 180)).toBe(true)
})

test('after that the geodesic leaves no piece by more than 6 cm at 70 degrees', () => {
  const dense = densify([
    [10, 70],
    [11, 70],
  ])
  dense.slice(1).forEach((b, i) => {
    const a = dense[i]!
    const half = geodesicLength(a, b) / 2
    const middle: LonLat = [(a[0] + b[0]) / 2, 70]
    const [left, right] = [geodesicLength(a, middle), geodesicLength(middle, b)]
    // height of the triangle over the geodesic
    const sagitta = Math.sqrt(Math.max(0, ((left + right) / 2) ** 2 - half ** 2))
    expect(sagitta).toBeLessThan(0.06)
  })
})
