import { describe, expect, test } from 'vitest'
import type { Direction } from '../../src/domain/segment.ts'
import type { PassageCounts } from '../../src/limits/plan.ts'
import { expectClose } from '../support/expect-close.ts'
import {
  allows,
  cellsOf,
  planAlong,
  planOf,
  posted,
  sketchedStudy,
  studyVessel,
} from '../support/plan-study.ts'

/** Doubles of a few operations. */
const EXACT = { rel: 1e-12 }

describe('travel times', () => {
  const segments = [
    { id: 'a', from: 0, to: 900, length: 1000, posted: [posted(12), posted(9)] },
    { id: 'b', from: 900, to: 1400, posted: [posted(18)] },
    { id: 'c', from: 1400, to: 2000 },
    { id: 'd', from: 2000, to: 2300, posted: [posted(6, { appliesTo: { vesselClasses: ['yacht'] } })] },
  ]

  test('are lengths along the sailing line over limits, today over the lowest that applies', () => {
    const plan = planAlong(segments, [10, 10, 5, 3], { smallestLimit: 4 })
    const [ab, c, d] = plan.stretches
    // 1500 m at 10 km/h: 540 s. Today 1000 m at 9 and 500 m at 18: 400 + 100 s
    expectClose(ab!.travelTime!, 540, EXACT)
    expectClose(ab!.travelTimeToday!, 500, EXACT)
    expectClose(ab!.today!, 2.5, EXACT)
    // 600 m at 5 km/h: 432 s; none is posted
    expectClose(c!.travelTime!, 432, EXACT)
    expect(c!.travelTimeToday).toBeUndefined()
    expect(c!.today).toBeUndefined()
    // the limit of d is for others, and 3 is below the smallest
    expect(d).toMatchObject({ outcome: 'below-smallest-limit', length: 300 })
    expect(d!.travelTime).toBeUndefined()
    expect(d!.today).toBeUndefined()
    expectClose(plan.totals.travelTime, 972, EXACT)
    expectClose(plan.totals.travelTimeComparable, 540, EXACT)
    expectClose(plan.totals.travelTimeToday, 500, EXACT)
    expect(plan.totals).toMatchObject({ length: 2400, lengthWithLimit: 2100, lengthBelowSmallest: 300 })
  })

  test('a limit through the water is what the strongest current against it leaves over the ground', () => {
    const through = posted(14.4, { reference: 'through-water' })
    const study = sketchedStudy(
      [
        { id: 'a', from: 0, to: 900, posted: [through] },
        {
          id: 'b',
          from: 0,
          to: 900,
          waterway: 'Wendle Cut',
          posted: [{ ...through, direction: 'downstream' }],
        },
      ],
      { currents: [0.5, 1], directions: ['upstream', 'downstream'] },
    )
    const plan = planOf(
      study,
      {},
      cellsOf(study, () => allows(9)),
    )
    // 14.4 km/h = 4 m/s: 4 − 1 upstream in the stronger current; 4 + 0.5 downstream in the weaker one
    expectClose(plan.stretches[0]!.today!, 3, EXACT)
    expectClose(plan.stretches[1]!.today!, 4.5, EXACT)
  })
})

describe('passages', () => {
  const segments = [
    { id: 'a', from: 0, to: 500 },
    { id: 'b', from: 500, to: 900 },
    { id: 'c', from: 900, to: 1400 },
  ]
  const counts = (segmentId: string, more: Partial<PassageCounts> = {}): PassageCounts => ({
    segmentId,
    vesselClass: 'barge',
    direction: 'upstream',
    step: 0.5,
    counts: [],
    ...more,
  })

  test('above the limit are those of higher bins, and of its own bin the part above it', () => {
    // 5.2 kn: of the bin from 5 to 5.5 kn the share 0.3 / 0.5 = 0.6
    const ten = [0, 0, 0, 0, 0, 0, 0, 0, 0, 4, 10, 6]
    const passages = [
      counts('a', { counts: ten }),
      // 3 more from 5.5 kn on, the other way
      counts('b', { direction: 'downstream', counts: [...Array<number>(11).fill(0), 3] }),
      counts('b', { vesselClass: 'yacht', counts: [100] }),
      counts('elsewhere', { counts: [100] }),
    ]
    const plan = planAlong(segments, [9.7, 9.7, 4], {
      signUnit: 'kn',
      signStep: 0.1,
      passages,
    })
    const [ab, c] = plan.stretches
    expect(ab!.limit).toEqual({ value: 5.2, unit: 'kn' })
    expect(ab!.passages).toBe(23)
    // 10 × 0.6 + 6 + 3 = 15 of 23
    expectClose(ab!.exceedingRatio!, 15 / 23, { rel: 1e-9 })
    expect(c!.passages).toBe(0)
    expect(c!.exceedingRatio).toBeUndefined()
  })

  test('in a direction only passages in it count', () => {
    const study = sketchedStudy([segments[0]!], {
      vessels: [studyVessel('barge')],
      currents: [0.3],
      directions: ['upstream', 'downstream'],
    })
    const passages = [counts('a', { counts: [2] }), counts('a', { direction: 'downstream', counts: [5] })]
    const plan = planOf(
      study,
      { isByDirection: true, passages },
      cellsOf(study, () => allows(9)),
    )
    expect(
      plan.stretches.map(({ direction, passages, exceedingRatio }) => [direction, passages, exceedingRatio]),
    ).toEqual([
      ['upstream', 2, 0],
      ['downstream', 5, 0],
    ])
  })

  test('without a log there are neither passages nor a share', () => {
    const [stretch] = planAlong(segments, [9, 9, 9]).stretches
    expect(stretch).not.toHaveProperty('passages')
    expect(stretch).not.toHaveProperty('exceedingRatio')
  })

  test('where there is no limit passages are counted, and no share is', () => {
    const [stretch] = planAlong(segments, [0, 0, 0], { passages: [counts('a', { counts: [7] })] }).stretches
    expect(stretch).toMatchObject({ outcome: 'below-smallest-limit', passages: 7 })
    expect(stretch).not.toHaveProperty('exceedingRatio')
  })
})

describe('a limit below steerage', () => {
  const segments = [{ id: 'a', from: 0, to: 900 }]
  // the vessel needs 0.8 m/s through the water: 2.88 km/h
  const cautionsAt = (
    value: number,
    currents: readonly number[],
    directions: readonly (Direction | null)[],
  ) => {
    const study = sketchedStudy(segments, { currents, directions })
    const [stretch] = planOf(
      study,
      { isByDirection: directions.length === 1 },
      cellsOf(study, () => allows(value)),
    ).stretches
    return stretch!.cautions.map(({ code, facts }) => [code, facts?.['through_water_mps']])
  }

  test('in still water is told, and one that is not is left alone', () => {
    expect(cautionsAt(2, [0], [null])).toEqual([['sign-below-steerage', 2 / 3.6]])
    expect(cautionsAt(3, [0], [null])).toEqual([])
  })

  test('is told of a vessel with the stream, which is slower through the water than over the ground', () => {
    // 5 km/h less 0.7 m/s are 0.689 m/s through the water
    const found = cautionsAt(5, [0.7], ['upstream', 'downstream'])
    expect(found.map(([code]) => code)).toEqual(['sign-below-steerage'])
    expectClose(found[0]![1] as number, 5 / 3.6 - 0.7, EXACT)
    expect(cautionsAt(5, [0.7], ['upstream'])).toEqual([])
  })
})
