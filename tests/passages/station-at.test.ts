import { expect, test } from 'vitest'
import type { Station } from '../../src/domain/segment.ts'
import { stationAt } from '../../src/passages/station-at.ts'

const at = (
  index: number,
  chainage: number,
  depth: number,
  distances: readonly [number, number],
): Station => ({
  index,
  chainage,
  depth,
  width: distances[0] + distances[1],
  distances,
  shape: { kind: 'trapezoid', slope: index },
})

const RISING = [at(0, 1000, 4, [20, 30]), at(1, 2000, 6, [40, 30]), at(2, 2400, 2, [10, 70])] as const
const FALLING = [at(0, 500, 3, [20, 20]), at(1, 100, 5, [30, 40])] as const

test('depth and both distances are linear in between, the width is their sum', () => {
  expect(stationAt({ stations: RISING }, 1250)).toEqual({
    index: 0,
    chainage: 1250,
    depth: 4.5,
    width: 55,
    distances: [25, 30],
    shape: { kind: 'trapezoid', slope: 0 },
  })
  expect(stationAt({ stations: RISING }, 2300)).toEqual({
    index: 2,
    chainage: 2300,
    depth: 3,
    width: 77.5,
    distances: [17.5, 60],
    shape: { kind: 'trapezoid', slope: 2 },
  })
})

test('a falling chainage is followed as well', () => {
  expect(stationAt({ stations: FALLING }, 200)).toMatchObject({
    index: 1,
    depth: 4.5,
    width: 62.5,
    distances: [27.5, 35],
  })
  expect(stationAt({ stations: FALLING }, 501)).toBe(FALLING[0])
  expect(stationAt({ stations: FALLING }, 99)).toBe(FALLING[1])
})

test('the shape is that of the nearer station, the second one half way', () => {
  expect(stationAt({ stations: RISING }, 1499).shape).toBe(RISING[0].shape)
  expect(stationAt({ stations: RISING }, 1500).shape).toBe(RISING[1].shape)
})

test('at a station its own figures, beyond the ends those of the last one', () => {
  expect(stationAt({ stations: RISING }, 2000)).toEqual(RISING[1])
  expect(stationAt({ stations: RISING }, 0)).toBe(RISING[0])
  expect(stationAt({ stations: RISING }, 2400)).toBe(RISING[2])
  expect(stationAt({ stations: RISING }, 9999)).toBe(RISING[2])
})

test('a single station is returned as it is, with a chainage or without', () => {
  const { chainage: _, ...plain } = RISING[0]
  expect(stationAt({ stations: [plain] }, 123)).toBe(plain)
  expect(stationAt({ stations: [RISING[0]] }, 123)).toBe(RISING[0])
})
