import { expect, test } from 'vitest'
import type { Measurement } from '../../src/calibration/measurement.ts'
import { ratiosOf } from '../../src/calibration/ratio.ts'
import { trendOf } from '../../src/calibration/trend.ts'
import { expectClose } from '../support/expect-close.ts'
import { joined, passagesOf } from './passages.ts'
import { COMPUTED, DEPTHS, DISTANCES, MEASURED, SPEEDS } from './ten-passages.ts'

const trendFor = (passages: readonly Measurement[]) => trendOf(ratiosOf(passages, 0).kept)
const NONE = { slope: NaN, pValue: NaN, isFlagged: false }

const WATER = passagesOf({ passages: 40, seed: 21, factor: 1.2, scatter: 0.1 })
const [PASSAGE] = WATER

test('slopes and probabilities of ten passages are those of another library', () => {
  const trend = trendFor(
    MEASURED.map((height, index) => ({
      ...PASSAGE!,
      index,
      speed: SPEEDS[index]!,
      distance: DISTANCES[index]!,
      depth: DEPTHS[index]!,
      height,
      computed: [COMPUTED[index]!],
      isInRange: [true],
    })),
  )
  // numpy 2.4.6, linalg.lstsq on the natural logarithms; scipy 1.17.1, stats.t
  expectClose(trend.speed.slope, 0.24317037721308304, { rel: 1e-10 })
  expectClose(trend.speed.pValue, 0.004615673167700516, { rel: 1e-9 })
  expectClose(trend.distance.slope, -0.03421920816145517, { rel: 1e-10 })
  expectClose(trend.depth.pValue, 0.23719209780658077, { rel: 1e-9 })
  expect([trend.speed.isFlagged, trend.distance.isFlagged, trend.depth.isFlagged]).toEqual([
    true,
    false,
    false,
  ])
})

test('the power that a method misses comes out as the slope, for each figure', () => {
  const missing = WATER.map((passage) => ({
    ...passage,
    height:
      passage.computed[0]! *
      passage.speed ** 0.7 *
      passage.distance ** -0.4 *
      passage.depth ** 0.3 *
      (1 + 1e-6 * (passage.index % 3)),
  }))
  const trend = trendOf(
    missing.map((passage) => ({
      passage,
      logRatio: Math.log(passage.height / passage.computed[0]!),
      isOutlier: false,
    })),
  )
  expectClose(trend.speed.slope, 0.7, { abs: 1e-5 })
  expectClose(trend.distance.slope, -0.4, { abs: 1e-5 })
  expectClose(trend.depth.slope, 0.3, { abs: 1e-5 })
  expect([trend.speed, trend.distance, trend.depth].every(({ isFlagged }) => isFlagged)).toBe(true)
})

test('a significant slope that changes heights by less than a tenth is not flagged', () => {
  const slight = WATER.map((passage) => ({
    passage,
    logRatio: 0.08 * Math.log(passage.speed) + 1e-4 * (passage.index % 3),
    isOutlier: false,
  }))
  const { speed } = trendOf(slight)
  expect(speed.pValue).toBeLessThan(1e-6)
  expect(speed.isFlagged).toBe(false)
  const twice = trendOf(slight.map((ratio) => ({ ...ratio, logRatio: 2 * ratio.logRatio })))
  expect(twice.speed.isFlagged).toBe(true)
})

test.each([
  [1.09, true],
  [1.12, false],
])('a depth that varies by a factor of %d has no trend: %s', (factor, hasNone) => {
  const passages = WATER.map((passage) => ({ ...passage, depth: passage.index % 2 === 0 ? 4 : 4 * factor }))
  const { depth, speed } = trendFor(passages)
  if (hasNone) expect(depth).toEqual(NONE)
  else expect(depth.slope).not.toBeNaN()
  expect(speed.slope).not.toBeNaN()
})

test('a distance that goes along with the speed has no trend of its own', () => {
  const trend = trendFor(WATER.map((passage) => ({ ...passage, distance: 10 * passage.speed ** 2 })))
  expect(trend.distance).toEqual(NONE)
  expect(trend.speed.slope).not.toBeNaN()
})

test('hulls with other factors at other speeds are no trend', () => {
  const fast = passagesOf({ passages: 40, seed: 22, factor: 2.4, scatter: 0.1, hull: 'planing' }).map(
    (passage) => ({ ...passage, speed: 3 * passage.speed }),
  )
  const passages = joined(WATER, fast)
  expect(trendFor(passages).speed.isFlagged).toBe(false)
  // as one kind they would be
  const alike = passages.map((passage) => ({ ...passage, hull: 'planing' as const }))
  expect(trendFor(alike).speed.isFlagged).toBe(true)
})
