import { expect, test } from 'vitest'
import { hullFits } from '../../src/calibration/hulls.ts'
import type { Ratio } from '../../src/calibration/ratio.ts'
import type { Hull } from '../../src/domain/vessel.ts'
import { expectClose } from '../support/expect-close.ts'
import { passagesOf } from './passages.ts'

const [PASSAGE] = passagesOf({ passages: 1, seed: 1, factor: 1, scatter: 0.1 })

const ratios = (hull: Hull, ...logRatios: readonly number[]): Ratio[] =>
  logRatios.map((logRatio) => ({ passage: { ...PASSAGE!, hull }, logRatio, isOutlier: false }))

const SIX = ratios('displacement', 0.05, -0.12, 0.21, 0.1, -0.03, 0.16)
const THREE = ratios('planing', 0.52, 0.31, 0.6)

test('factors, intervals and weights are those of a quadrature by another library', () => {
  // scipy 1.17.1, integrate.quad over the deviation between hulls, common factor exp(0.16)
  const [six, three] = hullFits([...THREE, ...SIX], 0.16)
  expect(six).toMatchObject({ hull: 'displacement', passages: 6 })
  expectClose(six!.pooledWeight, 0.08220714995242168, { rel: 1e-4 })
  expectClose(six!.factor, 1.07224048417782, { rel: 1e-4 })
  expectClose(six!.interval[0], 0.9483391852118523, { rel: 1e-4 })
  expectClose(six!.interval[1], 1.212329590338557, { rel: 1e-4 })
  expect(three).toMatchObject({ hull: 'planing', passages: 3 })
  expectClose(three!.pooledWeight, 0.14503589517374757, { rel: 1e-4 })
  expectClose(three!.factor, 1.5383934124353826, { rel: 1e-4 })
  expectClose(three!.interval[0], 1.279213022365281, { rel: 1e-4 })
  expectClose(three!.interval[1], 1.8500861467534218, { rel: 1e-4 })
})

test('one hull has no factor of its own', () => {
  expect(hullFits(SIX, 0.08)).toEqual([])
})

test('the factor of a hull is the common one and its own by the weight', () => {
  for (const { hull, factor, pooledWeight } of hullFits([...SIX, ...THREE], 0.16)) {
    const own = hull === 'planing' ? (0.52 + 0.31 + 0.6) / 3 : 0.37 / 6
    expectClose(Math.log(factor), pooledWeight * 0.16 + (1 - pooledWeight) * own, { abs: 1e-12 })
  }
})

test('fewer passages of a hull leave more to the common factor', () => {
  const weights = [1, 2, 3, 6].map((count) => {
    const own = ratios('planing', ...Array.from({ length: count }, (_, at) => 0.4 + (at % 2) * 0.1))
    return hullFits([...SIX, ...SIX, ...own], 0.1).find(({ hull }) => hull === 'planing')!.pooledWeight
  })
  expect(weights).toEqual(weights.toSorted((a, b) => b - a))
  expect(new Set(weights).size).toBe(4)
})

test('hulls of one passage each are pooled on their common scatter, with finite intervals', () => {
  const fits = hullFits(
    [...ratios('planing', 0.3), ...ratios('displacement', 0.1), ...ratios('semi-displacement', 0)],
    0.1,
  )
  expect(fits.map(({ hull }) => hull)).toEqual(['displacement', 'planing', 'semi-displacement'])
  for (const { interval, pooledWeight } of fits) {
    expect(pooledWeight).toBeGreaterThan(0.3)
    expect(interval[1] / interval[0]).toBeGreaterThan(1.2)
    expect(interval.every(Number.isFinite)).toBe(true)
  }
})
