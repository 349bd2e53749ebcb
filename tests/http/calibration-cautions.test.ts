import { expect, test } from 'vitest'
import type { Fit, MethodFit, Outlier, Trend } from '../../src/calibration/measurement.ts'
import type { Calibration } from '../../src/domain/calibration.ts'
import { calibrationCautions } from '../../src/http/calibration-cautions.ts'

const NO_TREND: Trend = { slope: 0.1, pValue: 0.6, isFlagged: false }

const method = (changes: Partial<MethodFit> = {}): MethodFit => ({
  id: 'blaauw-1984',
  rank: 1,
  passagesInRange: 20,
  factor: 1.2,
  factorMaximumLikelihood: 1.2,
  interval: [1.1, 1.3],
  scatterLogSd: 0.2,
  biasBeforeLog: 0.2,
  scatterBeforeLogSd: 0.2,
  trend: { speed: NO_TREND, distance: NO_TREND, depth: NO_TREND },
  crossValidatedLogError: 0.2,
  byHull: [],
  ...changes,
})

const fit = (changes: Partial<Fit> = {}): Fit => ({
  methods: [method(), method({ id: 'rock-manual-2007', rank: 2 })],
  recommended: 'blaauw-1984',
  isDistinguishable: true,
  outliers: [],
  ...changes,
})

const COVERAGE: Calibration['coverage'] = {
  speed: [2, 3],
  distance: [20, 30],
  depth: [3, 4],
  depthFroudeNumber: [0.3, 0.5],
}

const outliers = (count: number): Outlier[] =>
  Array.from({ length: count }, (_, index) => ({
    index,
    label: undefined,
    logResidual: 1,
    reason: 'far off',
  }))

const told = (found: Fit, used = 20, coverage = COVERAGE): string[] =>
  calibrationCautions(found, used, coverage).map(({ code, severity }) => `${code} ${severity}`)

test('a good calibration has none', () => {
  expect(told(fit())).toEqual([])
})

test.each([
  ['methods alike', fit({ isDistinguishable: false }), 20, ['methods-not-told-apart info']],
  ['one method alone', fit({ methods: [method()], isDistinguishable: false }), 20, []],
  ['14 passages', fit(), 14, ['few-passages caution']],
  ['15 passages', fit(), 15, []],
  ['an outlier in five', fit({ outliers: outliers(5) }), 20, []],
  ['more than that', fit({ outliers: outliers(6) }), 20, ['many-outliers warning']],
  ['wide scatter', fit({ methods: [method({ scatterLogSd: 0.81 })] }), 20, ['scatter-large warning']],
] as const)('%s', (_, found, used, expected) => {
  expect(told(found, used)).toEqual(expected)
})

test('speeds of which the highest is less than 1.3 times the lowest cover little', () => {
  expect(told(fit(), 20, { ...COVERAGE, speed: [2, 2.59] })).toEqual(['speeds-cover-little caution'])
  expect(told(fit(), 20, { ...COVERAGE, speed: [2, 2.61] })).toEqual([])
})

test('each trend of each method is told by its name', () => {
  const flagged: Trend = { slope: -1, pValue: 0.001, isFlagged: true }
  const trend = { speed: flagged, distance: NO_TREND, depth: flagged }
  const cautions = calibrationCautions(fit({ methods: [method({ trend })] }), 20, COVERAGE)
  expect(cautions.map(({ code }) => code)).toEqual(['trend-flagged', 'trend-flagged'])
  expect(cautions[0]?.text).toContain('blaauw-1984 grows or falls with speed')
  expect(cautions[1]?.text).toContain('with depth')
})
