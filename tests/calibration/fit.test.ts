import { expect, test } from 'vitest'
import { fitOf } from '../../src/calibration/fit.ts'
import type { Measurement } from '../../src/calibration/measurement.ts'
import { expectClose } from '../support/expect-close.ts'
import { joined, passagesOf, uniformOf } from './passages.ts'
import { COMPUTED, MEASURED } from './ten-passages.ts'

const METHODS = ['first', 'second']
const SEED = { seed: 1 }
const WATER = passagesOf({ passages: 30, seed: 8, factor: 1.4, scatter: 0.2, blunders: 0.1 })
const [PASSAGE] = WATER

const TEN: readonly Measurement[] = MEASURED.map((height, index) => ({
  ...PASSAGE!,
  index,
  height,
  computed: [COMPUTED[index]!],
  isInRange: [true],
}))

test('figures of ten passages are those of another library', () => {
  const [method] = fitOf(TEN, ['only'], SEED).methods
  // numpy 2.4.6: exp(median), exp(mean), std(ddof=1) of log ratios
  expect(method).toMatchObject({ id: 'only', rank: 1, passagesInRange: 10, byHull: [] })
  expectClose(method!.factor, 1.1372235096604228, { rel: 1e-12 })
  expectClose(method!.factorMaximumLikelihood, 1.1294150252030712, { rel: 1e-12 })
  expectClose(method!.scatterLogSd, 0.10870348730730878, { rel: 1e-12 })
  expectClose(method!.biasBeforeLog, 0.12169982187190535, { rel: 1e-12 })
  expectClose(method!.scatterBeforeLogSd, 0.10870348730730878, { rel: 1e-12 })
  expectClose(method!.crossValidatedLogError, 0.11775602249523083, { rel: 1e-12 })
  // scipy 1.17.1, stats.bootstrap with 200,000 resamples, at expanded percentiles; next medians of resamples are 1.291
  expectClose(method!.interval[0], 1.041976, { abs: 0.012 })
  expectClose(method!.interval[1], 1.246968, { abs: 0.045 })
})

test('outliers leave the factor alone, count before it, and are listed with a reason', () => {
  const wild = { ...TEN[0]!, index: 10, label: 'wild', height: 0.9, computed: [0.3] }
  const fit = fitOf([...TEN, wild], ['only'], SEED)
  const [method] = fit.methods
  expect(method!.passagesInRange).toBe(11)
  expectClose(method!.factor, 1.1372235096604228, { rel: 1e-12 })
  expectClose(method!.scatterLogSd, 0.10870348730730878, { rel: 1e-12 })
  // numpy 2.4.6, of all eleven
  expectClose(method!.biasBeforeLog, 0.21051004612610577, { rel: 1e-12 })
  expectClose(method!.scatterBeforeLogSd, 0.3120811089931402, { rel: 1e-12 })
  expect(fit.outliers).toHaveLength(1)
  const [outlier] = fit.outliers
  expect(outlier).toMatchObject({ index: 10, label: 'wild' })
  expectClose(outlier!.logResidual, Math.log(3 / 1.1372235096604228), { rel: 1e-12 })
  // 3 over the median of all eleven, 1.15714; bounds exp(-0.330628) and exp(0.330628)
  expect(outlier!.reason).toBe(
    'measured 2.59 times what comparable passages lead to expect; 0.718 to 1.39 times counts as scatter',
  )
})

test('planted blunders are found', () => {
  expect(fitOf(WATER, METHODS, SEED).outliers.map(({ index }) => index)).toEqual([0, 1, 2])
})

test('fewer than five passages in range have no fit', () => {
  expect(fitOf(TEN.slice(0, 4), ['only'], SEED)).toEqual({
    methods: [],
    recommended: undefined,
    isDistinguishable: false,
    outliers: [],
  })
  expect(fitOf(TEN.slice(0, 5), ['only'], SEED).methods).toHaveLength(1)
  const partly = WATER.map((passage) => ({ ...passage, isInRange: [passage.index < 4, true] }))
  const fit = fitOf(partly, METHODS, SEED)
  expect(fit.methods.map(({ id, rank }) => [id, rank])).toEqual([['second', 1]])
  expect(fit.recommended).toBe('second')
  expect(fit.isDistinguishable).toBe(false)
})

test('the interval of fewer than eight passages goes from the lowest to the highest ratio', () => {
  const [method] = fitOf(TEN.slice(0, 7), ['only'], SEED).methods
  expect(method!.interval[0]).toBeCloseTo(0.11 / 0.12, 12)
  expect(method!.interval[1]).toBeCloseTo(0.92 / 0.71, 12)
})

test('the better method ranks first, and is told apart from a much worse one', () => {
  const fit = fitOf(passagesOf({ passages: 40, seed: 9, factor: 1.4, scatter: 0.15 }), METHODS, SEED)
  expect(fit.methods.map(({ id, rank }) => [id, rank])).toEqual([
    ['first', 1],
    ['second', 2],
  ])
  expect(fit.recommended).toBe('first')
  expect(fit.isDistinguishable).toBe(true)
})

test('a method with a smaller error on less than 80 % of the passages does not win by it', () => {
  const narrowTo = (count: number) =>
    passagesOf({ passages: 40, seed: 9, factor: 1.4, scatter: 0.15 }).map((passage) => ({
      ...passage,
      isInRange: [passage.index < count, true],
    }))
  expect(fitOf(narrowTo(31), METHODS, SEED).recommended).toBe('second')
  expect(fitOf(narrowTo(32), METHODS, SEED).recommended).toBe('first')
})

test('the same seed gives the same digits, another seed another interval alone', () => {
  // an even number, whose medians are between two values: of an odd one the interval may end at the same values
  const water = passagesOf({ passages: 24, seed: 12, factor: 1.4, scatter: 0.2 })
  const fit = fitOf(water, METHODS, SEED)
  expect(fitOf(water, METHODS, SEED)).toEqual(fit)
  const [other] = fitOf(water, METHODS, { seed: 2 }).methods
  expect(other!.interval).not.toEqual(fit.methods[0]!.interval)
  expect({ ...other, interval: fit.methods[0]!.interval }).toEqual(fit.methods[0])
})

test('the order of the rows changes nothing but the places of outliers', () => {
  const planing = passagesOf({ passages: 12, seed: 10, factor: 2, scatter: 0.2, hull: 'planing' })
  const all = joined(WATER, planing)
  const fit = fitOf(all, METHODS, SEED)
  expect(fit.methods[0]!.byHull).toHaveLength(2)
  const uniform = uniformOf(5)
  for (let shuffle = 0; shuffle < 5; shuffle += 1) {
    const keys = new Map(all.map((passage) => [passage, uniform()]))
    const shuffled = joined(all.toSorted((a, b) => keys.get(a)! - keys.get(b)!))
    const again = fitOf(shuffled, METHODS, SEED)
    expect({ ...again, outliers: [] }).toEqual({ ...fit, outliers: [] })
    const named = (outliers: typeof fit.outliers) => outliers.map(({ label }) => label).toSorted()
    expect(named(again.outliers)).toEqual(named(fit.outliers))
    for (const { index, label } of again.outliers) expect(shuffled[index]!.label).toBe(label)
  }
})

test('the fit of a method does not depend on which others are asked', () => {
  const second = WATER.map((passage) => ({
    ...passage,
    computed: passage.computed.slice(1),
    isInRange: [true],
  }))
  const [alone] = fitOf(second, ['second'], SEED).methods
  const [, together] = fitOf(WATER, METHODS, SEED).methods
  expect({ ...together, rank: 1 }).toEqual(alone)
})

test('three passages of another kind move neither the common factor nor the other hull by 5 %', () => {
  const many = passagesOf({ passages: 40, seed: 14, factor: 1.4, scatter: 0.2 })
  const three = passagesOf({ passages: 3, seed: 15, factor: 4, scatter: 0.2, hull: 'planing' })
  const [before] = fitOf(many, METHODS, SEED).methods
  const fit = fitOf(joined(many, three), METHODS, SEED)
  const [after] = fit.methods
  const [displacement, planing] = after!.byHull
  expectClose(after!.factor, before!.factor, { rel: 0.05 })
  expectClose(displacement!.factor, before!.factor, { rel: 0.05 })
  expect(planing).toMatchObject({ hull: 'planing', passages: 3 })
  // consistent with each other, they are no blunders
  expect(fit.outliers).toEqual([])
})

test('twice the heights are twice the factor, with the same scatter', () => {
  const [one] = fitOf(WATER, METHODS, SEED).methods
  const [two] = fitOf(
    WATER.map((passage) => ({ ...passage, height: 2 * passage.height })),
    METHODS,
    SEED,
  ).methods
  expectClose(two!.factor, 2 * one!.factor, { rel: 1e-12 })
  expectClose(two!.interval[1], 2 * one!.interval[1], { rel: 1e-12 })
  expectClose(two!.scatterLogSd, one!.scatterLogSd, { rel: 1e-9 })
  expectClose(two!.crossValidatedLogError, one!.crossValidatedLogError, { rel: 1e-9 })
})

test('10,000 passages by seven methods are fitted in seconds', () => {
  const many = passagesOf({ passages: 10_000, seed: 11, factor: 1.2, scatter: 0.3 }).map((passage) => ({
    ...passage,
    computed: Array.from({ length: 7 }, (_, method) => passage.computed[0]! * (1 + 0.01 * method)),
    isInRange: new Array<boolean>(7).fill(true),
  }))
  const started = performance.now()
  const fit = fitOf(many, ['a', 'b', 'c', 'd', 'e', 'f', 'g'], SEED)
  const seconds = (performance.now() - started) / 1000
  console.info(`10,000 passages by seven methods: ${seconds.toFixed(2)} s`)
  expect(seconds).toBeLessThan(5)
  expect(fit.recommended).toBe('a')
  expect(fit.isDistinguishable).toBe(false)
})
