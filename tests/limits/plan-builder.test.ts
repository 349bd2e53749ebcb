import { describe, expect, test } from 'vitest'
import { Fault } from '../../src/domain/fault.ts'
import { PlanBuilder } from '../../src/limits/plan-builder.ts'
import { expectClose } from '../support/expect-close.ts'
import {
  allows,
  brief,
  cellsOf,
  kmh,
  NO_SAFE_SPEED,
  planAlong,
  planOf,
  posted,
  RULES,
  sketchedStudy,
  studyVessel,
} from '../support/plan-study.ts'

/** Doubles of a few operations. */
const EXACT = { rel: 1e-12 }

const faultOf = (make: () => unknown): Fault => {
  try {
    make()
  } catch (error) {
    if (error instanceof Fault) return error
    throw error
  }
  throw new Error('no fault')
}

const THREE = [
  { id: 'a', from: 0, to: 500 },
  { id: 'b', from: 500, to: 600 },
  { id: 'c', from: 600, to: 1600 },
]

describe('ceilings', () => {
  test('the lowest maximum is rounded down to the step and cut to the largest limit', () => {
    // 8.7 → 8; 11.99 → 11; 25 → 12, the largest
    const plan = planAlong(THREE, [8.7, 11.99, 25], { largestLimit: 12 })
    expect(brief(plan)).toEqual([
      ['limit', 8, 'a'],
      ['limit', 11, 'b'],
      ['limit', 12, 'c'],
    ])
    expectClose(plan.stretches[2]!.ceiling!, 12 / 3.6, EXACT)
    expectClose(plan.stretches[2]!.lowestMaximum!, 25 / 3.6, EXACT)
  })

  test('a whole number of steps that binary puts a little short is not rounded down to the step before', () => {
    for (let tenths = 10; tenths <= 250; tenths += 1) {
      const [stretch] = planAlong([THREE[0]!], [tenths / 10], { signStep: 0.1 }).stretches
      expect(stretch!.limit).toEqual({ value: tenths / 10, unit: 'km/h' })
    }
    // 9.26 km/h is 5 kn exactly
    expect(brief(planAlong([THREE[0]!], [9.26], { signUnit: 'kn' }))).toEqual([['limit', 5, 'a']])
  })

  test('the lowest of all vessels, levels, currents and directions counts, and is named', () => {
    const study = sketchedStudy([THREE[0]!], {
      vessels: [studyVessel('barge'), studyVessel('tug', 'empty')],
      waterLevels: [0, -0.4],
      currents: [0.2, 0.5],
      directions: ['upstream', 'downstream'],
    })
    const cells = cellsOf(study, ({ vessel, waterLevel, current, direction }) =>
      allows(vessel === 1 && waterLevel === 1 && current === 1 && direction === 0 ? 7.5 : 10),
    )
    const [stretch] = planOf(study, {}, cells).stretches
    expect(stretch).toMatchObject({ direction: 'both', limit: { value: 7, unit: 'km/h' } })
    expect(stretch!.governing).toEqual({
      segmentId: 'a',
      stationChainage: 250,
      vessel: 1,
      vesselClass: 'tug',
      loading: 'empty',
      waterLevel: -0.4,
      current: 0.5,
      direction: 'upstream',
      criterion: 'bank-wave-height',
    })
  })

  test('the order and the batches in which cells come make no difference', () => {
    const study = sketchedStudy(THREE, { vessels: [studyVessel('barge'), studyVessel('tug')] })
    const cells = cellsOf(study, ({ segment }) => allows(8 + segment))
    const builder = new PlanBuilder(study, RULES)
    for (const cell of cells.toReversed()) builder.add([cell])
    expect(builder.plan()).toEqual(planOf(study, {}, cells))
  })

  test('a plan from cells that are missing, or came twice, is refused', () => {
    const study = sketchedStudy(THREE)
    const cells = cellsOf(study, () => allows(8))
    expect(() => planOf(study, {}, cells.slice(1))).toThrow(RangeError)
    expect(() => planOf(study, {}, [...cells, cells[0]!])).toThrow(RangeError)
  })
})

describe('percentiles', () => {
  const uncertain = sketchedStudy(THREE, {
    uncertainty: { samples: 16, seed: 1, percentiles: [5, 50], spreads: {} },
  })
  const cells = cellsOf(uncertain, ({ segment }) => ({
    ...allows(12),
    sampled: {
      noSafeRatio: 0,
      percentiles: [segment === 1 ? null : kmh(6.2), kmh(9.9)],
      governedBy: { 'critical-ratio': 0.25, 'bank-wave-height': 0.25, drawdown: 0.5 },
    },
  }))

  test('the speed at the percentile counts, with the criterion that governs most samples', () => {
    const plan = planOf(uncertain, { percentile: 50 }, cells)
    expect(brief(plan)).toEqual([['limit', 9, 'a b c']])
    expect(plan.stretches[0]!.governing!.criterion).toBe('drawdown')
  })

  test('without a percentile the inputs as given count', () => {
    const plan = planOf(uncertain, {}, cells)
    expect(brief(plan)).toEqual([['limit', 12, 'a b c']])
    expect(plan.stretches[0]!.governing!.criterion).toBe('bank-wave-height')
  })

  test('a percentile without a safe speed gives no limit, and says for which vessel', () => {
    const plan = planOf(uncertain, { percentile: 5 }, cells)
    expect(brief(plan)).toEqual([
      ['limit', 6, 'a'],
      ['below', null, 'b'],
      ['limit', 6, 'c'],
    ])
    const [, below] = plan.stretches
    expect(below!.cautions.map(({ code }) => code)).toEqual(['no-safe-speed'])
    expect(below!.cautions[0]!.facts).toMatchObject({ vessel_index: 0, vessel_class: 'barge', segments: 1 })
    expect(below!.lowestMaximum).toBeUndefined()
    expect(below!.ceiling).toBeUndefined()
  })

  test('a percentile that the study has not is refused with those that it has', () => {
    const fault = faultOf(() => new PlanBuilder(uncertain, { ...RULES, percentile: 10 }))
    expect(fault.code).toBe('invalid-request')
    expect(fault.parts.errors).toMatchObject([
      { pointer: '#/percentile', code: 'not-in-list', allowed: ['5', '50', 'null'] },
    ])
    const certain = faultOf(() => new PlanBuilder(sketchedStudy(THREE), { ...RULES, percentile: 5 }))
    expect(certain.parts.errors).toMatchObject([{ pointer: '#/percentile', allowed: ['null'] }])
  })
})

describe('limits', () => {
  test('a short peak is lowered to the higher neighbour', () => {
    // b, 100 m at 12 between 8 and 10, under 300 m: at 10 it joins c
    expect(brief(planAlong(THREE, [8, 12, 10], { minRunLength: 300 }))).toEqual([
      ['limit', 8, 'a'],
      ['limit', 10, 'b c'],
    ])
  })

  test('below the smallest limit there is none, and what lies beyond does not bear on what lies before', () => {
    // 100 m of b at 12 would be too short between a and c; with a below the smallest, c alone is its neighbour
    const rules = { minRunLength: 300, smallestLimit: 6 }
    expect(brief(planAlong(THREE, [5.9, 12, 5.9], rules))).toEqual([
      ['below', null, 'a'],
      ['limit', 12, 'b'],
      ['below', null, 'c'],
    ])
    expect(brief(planAlong(THREE, [6, 12, 6], rules))).toEqual([['limit', 6, 'a b c']])
  })

  test('a maximum under one step allows no limit, though no smallest one is given', () => {
    expect(brief(planAlong(THREE, [0.9, 0.5, 5]))).toEqual([
      ['below', null, 'a b'],
      ['limit', 5, 'c'],
    ])
  })

  test('a cell without an answer allows none, and the caution tells vessel and problem', () => {
    const study = sketchedStudy(THREE, { vessels: [studyVessel('barge'), studyVessel('tug')] })
    const problem = { code: 'impossible-input', detail: 'The draught is above the depth.' }
    const plan = planOf(
      study,
      {},
      cellsOf(study, ({ segment, vessel }) => (segment < 2 && vessel === 1 ? { problem } : allows(9))),
    )
    expect(brief(plan)).toEqual([
      ['below', null, 'a b'],
      ['limit', 9, 'c'],
    ])
    const [caution] = plan.stretches[0]!.cautions
    expect(caution).toMatchObject({ code: 'no-answer', severity: 'warning' })
    expect(caution!.text).toContain('vessel 1 (tug, laden)')
    expect(caution!.text).toContain('The draught is above the depth.')
    expect(caution!.facts).toEqual({
      vessel_index: 1,
      vessel_class: 'tug',
      loading: 'laden',
      problem_code: 'impossible-input',
      segment_ids: ['a', 'b'],
      segments: 2,
    })
    expect(plan.stretches[0]!.governing).toMatchObject({ segmentId: 'a', vessel: 1 })
    expect(plan.stretches[1]!.cautions).toEqual([])
  })

  test('a gap of 99 m of chainage is none, one of 101 m ends the run', () => {
    const apart = (gap: number) => [
      { id: 'a', from: 0, to: 100 },
      { id: 'b', from: 100 + gap, to: 1000 },
    ]
    // a alone is a run without neighbours and keeps its 12; beside b it is too short for 12
    expect(brief(planAlong(apart(99), [12, 8], { minRunLength: 300 }))).toEqual([['limit', 8, 'a b']])
    expect(brief(planAlong(apart(101), [12, 8], { minRunLength: 300 }))).toEqual([
      ['limit', 12, 'a'],
      ['limit', 8, 'b'],
    ])
    expect(brief(planAlong(apart(-101), [12, 8], { minRunLength: 300 }))).toHaveLength(2)
  })

  test('where chainage falls downstream, stretches still run from upstream', () => {
    const falling = [
      { id: 'a', from: 500, to: 0 },
      { id: 'b', from: 1500, to: 500 },
    ]
    const plan = planAlong(falling, [9, 9])
    expect(plan.stretches).toMatchObject([
      { segmentIds: ['b', 'a'], chainageFrom: 1500, chainageTo: 0, length: 1500 },
    ])
  })

  test('segments without a waterway stand alone, after the waterways in the order of their names', () => {
    const plan = planAlong(
      [
        { id: 'a', from: 0, to: 100, waterway: null },
        { id: 'b', from: 100, to: 200, waterway: null },
        { id: 'c', from: 0, to: 100, waterway: 'Wendle Cut' },
        { id: 'd', from: 0, to: 100 },
      ],
      [9, 9, 9, 9],
    )
    expect(plan.stretches.map(({ waterway, segmentIds }) => [waterway, ...segmentIds])).toEqual([
      ['Harrowmere Navigation', 'd'],
      ['Wendle Cut', 'c'],
      [undefined, 'a'],
      [undefined, 'b'],
    ])
  })
})

describe('kept limits', () => {
  const segments = [
    { id: 'a', from: 0, to: 500, posted: [posted(12)] },
    { id: 'b', from: 500, to: 550, posted: [posted(15), posted(10)] },
    { id: 'c', from: 550, to: 1600 },
  ]

  test('a kept limit stays, short or not, with a caution where the study allows less', () => {
    const plan = planAlong(segments, [8, 9, 8], { keepPosted: ['b'], minRunLength: 300 })
    expect(brief(plan)).toEqual([
      ['limit', 8, 'a'],
      ['kept', 10, 'b'],
      ['limit', 8, 'c'],
    ])
    const [, kept] = plan.stretches
    expect(kept!.cautions.map(({ code }) => code)).toEqual(['kept-above-ceiling'])
    expectClose(kept!.cautions[0]!.facts!['limit_mps'] as number, 10 / 3.6, EXACT)
    expectClose(kept!.cautions[0]!.facts!['ceiling_mps'] as number, 9 / 3.6, EXACT)
  })

  test('a kept limit at its ceiling has no caution, and is a stretch of its own beside an equal one', () => {
    // together 550 m at 10, long enough for 520 m beside the 8
    const plan = planAlong(segments, [10, 10, 8], { keepPosted: ['b'], minRunLength: 520 })
    expect(brief(plan)).toEqual([
      ['limit', 10, 'a'],
      ['kept', 10, 'b'],
      ['limit', 8, 'c'],
    ])
    expect(plan.stretches[1]!.cautions).toEqual([])
  })

  test('a kept limit stays where no speed is safe, and says so', () => {
    const study = sketchedStudy(segments)
    const cells = cellsOf(study, ({ segment }) => (segment === 1 ? NO_SAFE_SPEED : allows(8)))
    const plan = planOf(study, { keepPosted: ['b'] }, cells)
    expect(plan.stretches[1]).toMatchObject({ outcome: 'kept', limit: { value: 10, unit: 'km/h' } })
    expect(plan.stretches[1]!.cautions.map(({ code }) => code)).toEqual([
      'no-safe-speed',
      'kept-above-ceiling',
    ])
  })

  test('a kept limit in knots is given in knots', () => {
    const knots = [{ ...segments[0]!, posted: [{ ...posted(0), speed: (6 * 1852) / 3600 }] }]
    const [stretch] = planAlong(knots, [20], { keepPosted: ['a'] }).stretches
    expect(stretch!.limit).toEqual({ value: 6, unit: 'kn' })
    expectClose(stretch!.limitSpeed!, 3.0866666666666667, EXACT)
  })

  test('a stretch above a kept limit lower than the smallest is too short, and says so', () => {
    const low = [
      { id: 'a', from: 0, to: 500, posted: [posted(4)] },
      { id: 'b', from: 500, to: 600 },
    ]
    const plan = planAlong(low, [8, 8], { keepPosted: ['a'], minRunLength: 300, smallestLimit: 6 })
    expect(brief(plan)).toEqual([
      ['kept', 4, 'a'],
      ['limit', 8, 'b'],
    ])
    expect(plan.stretches[1]!.cautions).toMatchObject([
      { code: 'shorter-than-run-length', facts: { length_m: 100, min_run_length_m: 300 } },
    ])
  })

  test('a segment to keep that has no limit, or is not in the study, is refused', () => {
    const fault = faultOf(
      () => new PlanBuilder(sketchedStudy(segments), { ...RULES, keepPosted: ['b', 'c', 'z'] }),
    )
    expect(fault.code).toBe('impossible-input')
    expect(fault.parts.errors).toMatchObject([
      { pointer: '#/keep_posted/1', code: 'clash', facts: { segment_id: 'c', groups: ['all'] } },
      { pointer: '#/keep_posted/2', code: 'not-in-list' },
    ])
  })
})

describe('directions', () => {
  const study = sketchedStudy(THREE, { currents: [0.5], directions: ['upstream', 'downstream'] })
  const cells = cellsOf(study, ({ segment, direction }) => allows(direction === 0 ? 7 : 10 + segment))

  test('by direction each has limits of its own', () => {
    const plan = planOf(study, { isByDirection: true }, cells)
    expect(
      plan.stretches.map(({ direction, limit, segmentIds }) => [direction, limit!.value, ...segmentIds]),
    ).toEqual([
      ['upstream', 7, 'a', 'b', 'c'],
      ['downstream', 10, 'a'],
      ['downstream', 11, 'b'],
      ['downstream', 12, 'c'],
    ])
    expect(plan.totals.length).toBe(3200)
  })

  test('otherwise the lower of both holds for both', () => {
    const plan = planOf(study, {}, cells)
    expect(plan.stretches).toMatchObject([{ direction: 'both', limit: { value: 7 } }])
  })

  test('by direction one set serves both where the study answers both alike', () => {
    const plan = planAlong(THREE, [8, 8, 8], { isByDirection: true })
    expect(plan.stretches.map(({ direction }) => direction)).toEqual(['both'])
  })

  test('limits of a study of one direction are of that one', () => {
    const up = sketchedStudy(THREE, { currents: [0.5], directions: ['upstream'] })
    const plan = planOf(
      up,
      {},
      cellsOf(up, () => allows(8)),
    )
    expect(plan.stretches.map(({ direction }) => direction)).toEqual(['upstream'])
  })
})

describe('groups', () => {
  const vessels = [
    studyVessel('barge'),
    studyVessel('barge', 'empty'),
    studyVessel('tug'),
    studyVessel('yacht'),
  ]
  const study = sketchedStudy([THREE[0]!], { vessels })
  const group = (id: string, appliesTo: object) => ({ id, name: id, appliesTo })

  test('each group has limits of its own vessels, and vessels in none are listed', () => {
    const groups = [group('barges', { vesselClasses: ['barge'] }), group('tugs', { vesselClasses: ['tug'] })]
    const plan = planOf(
      study,
      { groups },
      cellsOf(study, ({ vessel }) => allows([9, 8, 11, 1][vessel]!)),
    )
    expect(plan.stretches.map(({ groupId, limit }) => [groupId, limit!.value])).toEqual([
      ['barges', 8],
      ['tugs', 11],
    ])
    expect(plan.unassignedVessels).toEqual([3])
  })

  test('every vessel in two groups is named with both', () => {
    const groups = [group('barges', { vesselClasses: ['barge'] }), group('laden', { loading: 'laden' })]
    const fault = faultOf(() => new PlanBuilder(study, { ...RULES, groups }))
    expect(fault.code).toBe('impossible-input')
    // vessel 0 alone is a barge and laden
    expect(fault.parts.errors).toHaveLength(1)
    const [item] = fault.parts.errors!
    expect(item).toMatchObject({
      pointer: '#/groups/1/applies_to',
      code: 'clash',
      facts: { vessel_index: 0, vessel_class: 'barge', groups: ['barges', 'laden'] },
    })
    expect(item!.detail).toContain('vessel 0 (barge, laden)')
    expect(item!.detail).toContain('barges and laden')
  })

  test('a group without a vessel is refused', () => {
    const groups = [group('barges', { vesselClasses: ['barge'] }), group('tows', { vesselClasses: ['tow'] })]
    const fault = faultOf(() => new PlanBuilder(study, { ...RULES, groups }))
    expect(fault.parts.errors).toMatchObject([
      { pointer: '#/groups/1/applies_to', code: 'clash', facts: { group: 'tows' } },
    ])
  })
})
