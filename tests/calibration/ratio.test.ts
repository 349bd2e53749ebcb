import { expect, test } from 'vitest'
import { canonical, ratiosOf } from '../../src/calibration/ratio.ts'
import { outlierRuleOf } from '../../src/calibration/robust.ts'
import type { Hull } from '../../src/domain/vessel.ts'
import { expectClose } from '../support/expect-close.ts'
import { joined, passagesOf } from './passages.ts'
import { COMPUTED, MEASURED } from './ten-passages.ts'

const of = (hull: Hull, ...logRatios: readonly number[]) => logRatios.map((logRatio) => ({ hull, logRatio }))

test('the bound is 3.5 scaled median deviations, as of another library', () => {
  const logRatios = MEASURED.map((height, at) => Math.log(height / COMPUTED[at]!))
  const rule = outlierRuleOf(of('displacement', ...logRatios))
  // scipy 1.17.1: 3.5 * 1.4826 * stats.median_abs_deviation; numpy 2.4.6, median
  expectClose(rule.bound, 3.5 * 0.0756665052749848, { rel: 1e-12 })
  expectClose(rule.centreOf('displacement'), Math.log(1.1372235096604228), { rel: 1e-12 })
})

test('tiny scatter makes no outliers: the scale is 0.05 at least', () => {
  const rule = outlierRuleOf(of('displacement', 0.1, 0.1, 0.1, 0.1, 0.1, 0.12))
  expectClose(rule.bound, 0.175, { rel: 1e-12 })
})

test('a hull of three passages counts from its own median, one of two from the common one', () => {
  const many = of('displacement', -0.1, -0.05, 0, 0.05, 0.1, -0.1, -0.05, 0, 0.05, 0.1)
  const three = outlierRuleOf([...many, ...of('planing', 0.9, 1, 1.1)])
  expect(three.centreOf('planing')).toBe(1)
  expect(three.centreOf('displacement')).toBe(0)
  const two = outlierRuleOf([...many, ...of('planing', 0.9, 1)])
  expect(two.centreOf('planing')).toBe(0.025)
})

test('two hulls of their own factors do not widen the bound', () => {
  const spread = [-0.2, -0.1, 0, 0.1, 0.2]
  const one = outlierRuleOf(of('displacement', ...spread, ...spread))
  const two = outlierRuleOf([
    ...of('displacement', ...spread),
    ...of('planing', ...spread.map((value) => value + 2)),
  ])
  expectClose(two.bound, one.bound, { rel: 1e-12 })
})

test('only passages in range with a computed height count', () => {
  const passages = passagesOf({ passages: 8, seed: 3, factor: 1, scatter: 0.1 }).map((passage) => ({
    ...passage,
    computed: [passage.index === 1 ? NaN : passage.index === 2 ? 0 : 0.5],
    isInRange: [passage.index !== 3],
  }))
  const places = ratiosOf(passages, 0).all.map(({ passage }) => passage.index)
  expect(places).toEqual([0, 4, 5, 6, 7])
  expect(ratiosOf(passages, 1).all).toEqual([])
})

test('the canonical order is the same for every order of the request', () => {
  const passages = passagesOf({ passages: 12, seed: 4, factor: 1, scatter: 0.1 })
  // alike but for one figure each
  const alike = [
    { ...passages[0]!, speed: 9 },
    { ...passages[0]!, distance: 9 },
    { ...passages[0]!, depth: 9 },
    { ...passages[0]!, hull: 'planing' as const },
    { ...passages[0]!, computed: [NaN, 1] },
    { ...passages[0]!, computed: [0.1, 1] },
    { ...passages[0]!, isInRange: [false, true] },
  ]
  const all = joined(passages, alike)
  const figures = (order: typeof all) => canonical(order).map(({ index: _, ...rest }) => rest)
  expect(figures(all.toReversed())).toEqual(figures(all))
  expect(figures([...all.slice(7), ...all.slice(0, 7)])).toEqual(figures(all))
})
