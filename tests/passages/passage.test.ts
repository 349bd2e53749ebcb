import { describe, expect, it } from 'vitest'
import { Groups } from '../../src/passages/groups.ts'
import { PassageFinder, type Passage } from '../../src/passages/passage.ts'
import type { Mark } from '../../src/passages/timeline.ts'
import { fairway, mark } from '../support/passage-marks.ts'

function passagesOf(marks: readonly Mark[]): Passage[] {
  const found: Passage[] = []
  const finder = new PassageFinder(600, 0.25, (passage) => found.push(passage))
  for (const each of marks) finder.take(each, 'cemt-iii')
  finder.end()
  return found
}

const REACH_A = fairway('reach-a')
const at = (time: number, speed: number, rest: Parameters<typeof mark>[0] = {}): Mark =>
  mark({
    ...rest,
    report: { time, speed, ...rest.report },
    placement: { fairway: REACH_A, ...rest.placement },
    judgement: { ...rest.judgement },
  })

describe('a passage', () => {
  it('has the mean speed over time, not over its reports', () => {
    // 2 m/s for a minute, from 2 to 4 in ten seconds, 4 m/s for thirty: (120 + 30 + 120) m in 100 s
    const [passage] = passagesOf([at(0, 2), at(60, 2), at(70, 4), at(100, 4)])
    expect(passage?.speed).toBe(2.7)
  })

  it('of one report has its speed', () => {
    expect(passagesOf([at(0, 3.5)])[0]?.speed).toBe(3.5)
  })

  it('has the energy of the report with most to both banks together', () => {
    const energies = (left: number, right: number) => ({
      judgement: { waveEnergies: [left, right] as const },
    })
    const marks = [at(0, 3, energies(90, 20)), at(60, 3, energies(60, 70)), at(120, 3, energies(NaN, 100))]
    expect(passagesOf(marks)).toMatchObject([{ energies: [60, 70], hasUnknownEnergy: true }])
    expect(passagesOf(marks.slice(0, 2))).toMatchObject([{ hasUnknownEnergy: false }])
    expect(passagesOf(marks.slice(2))[0]?.energies).toEqual([NaN, 100])
  })

  it('goes on over a stop, and ends at a gap, in another segment and with the direction', () => {
    const stop = mark({ report: { time: 30 }, placement: { status: 'stationary', fairway: REACH_A } })
    expect(passagesOf([at(0, 3), stop, at(60, 3)])).toHaveLength(1)
    expect(passagesOf([at(0, 3), at(601, 3)])).toHaveLength(2)
    expect(passagesOf([at(0, 3), at(60, 3, { placement: { fairway: fairway('reach-b') } })])).toHaveLength(2)
    expect(passagesOf([at(0, 3), at(60, 3, { placement: { direction: 'upstream' } })])).toHaveLength(2)
    expect(passagesOf([at(0, 3, { placement: { direction: undefined } }), at(60, 3)])).toMatchObject([
      { direction: 'downstream' },
    ])
  })

  it('is above the posted limit by more than the tolerance only', () => {
    const posted = (excess: number) => at(0, 3, { judgement: { postedExcess: excess } })
    expect(passagesOf([posted(0.2)])[0]?.isAbovePosted).toBe(false)
    expect(passagesOf([posted(0.3)])[0]?.isAbovePosted).toBe(true)
    expect(passagesOf([posted(NaN)])[0]?.isAbovePosted).toBeUndefined()
  })
})

describe('groups', () => {
  const KNOT = 1852 / 3600
  const passage = (knots: number, rest: Partial<Passage> = {}): Passage => ({
    fairway: REACH_A,
    classId: 'cemt-iii',
    direction: 'downstream',
    speed: knots * KNOT,
    energies: [10, 0],
    hasUnknownEnergy: false,
    isAboveRecommended: false,
    isAbovePosted: undefined,
    hasNoSafeSpeed: false,
    ...rest,
  })
  const summed = (passages: readonly Passage[]) => {
    const groups = new Groups()
    for (const each of passages) groups.add(each)
    return groups.summed()
  }

  it('have percentiles by linear interpolation of order statistics', () => {
    const speeds = [6, 7, 7.5, 8, 8.2, 8.4, 9, 9.1, 9.9, 12]
    const [group] = summed(speeds.map((speed) => passage(speed)))
    // numpy.percentile(speeds, [50, 85, 95]), method linear
    const expected = [8.3, 9.62, 11.055]
    group?.speedPercentiles.forEach((speed, i) => {
      expect(speed / KNOT).toBeCloseTo(expected[i] ?? NaN, 9)
    })
  })

  it('have a histogram of half knots whose counts are the passages', () => {
    const [group] = summed([0.2, 0.7, 0.9, 2.4].map((speed) => passage(speed)))
    expect(group?.histogram).toEqual([1, 2, 0, 0, 1])
  })

  it('tell what the worst tenth brings', () => {
    const quiet = Array.from({ length: 19 }, () => passage(6, { energies: [1, 1] }))
    // the worst two of twenty: 60 and 2 of 98 together
    const [group] = summed([...quiet, passage(9, { energies: [20, 40] })])
    expect(group?.worstTenthRatio).toBeCloseTo(62 / 98, 12)
    expect(group?.energies).toEqual([39, 59])
  })

  it('are one for each segment, class and direction, in that order', () => {
    const groups = summed([
      passage(6, { fairway: fairway('reach-b') }),
      passage(6, { direction: 'upstream' }),
      passage(6, { classId: 'cemt-ii' }),
      passage(6),
      passage(6, { direction: undefined }),
    ])
    expect(groups.map(({ segmentId, classId, direction }) => [segmentId, classId, direction])).toEqual([
      ['reach-a', 'cemt-ii', 'downstream'],
      ['reach-a', 'cemt-iii', undefined],
      ['reach-a', 'cemt-iii', 'downstream'],
      ['reach-a', 'cemt-iii', 'upstream'],
      ['reach-b', 'cemt-iii', 'downstream'],
    ])
  })

  it('count what exceeds', () => {
    const [group] = summed([
      passage(6, { isAboveRecommended: true, isAbovePosted: true }),
      passage(6, { isAbovePosted: false, hasNoSafeSpeed: true }),
      passage(6, { isAbovePosted: false }),
      passage(6, { isAboveRecommended: true, isAbovePosted: false }),
    ])
    expect(group).toMatchObject({
      aboveRecommendedRatio: 0.5,
      abovePostedRatio: 0.25,
      noSafeSpeedPassages: 1,
    })
    expect(summed([passage(6)])[0]?.abovePostedRatio).toBeNaN()
  })

  it('tell shares of those that could be judged only', () => {
    const [group] = summed([
      passage(6, { isAboveRecommended: true, isAbovePosted: true }),
      passage(6, { isAboveRecommended: undefined }),
      passage(6, { isAboveRecommended: undefined }),
    ])
    expect(group).toMatchObject({ passages: 3, aboveRecommendedRatio: 1, abovePostedRatio: 1 })
    expect(summed([passage(6, { isAboveRecommended: undefined })])[0]?.aboveRecommendedRatio).toBeNaN()
  })

  it('sum the energies that are known, and count the passages with others', () => {
    const unknown = { energies: [NaN, NaN], hasUnknownEnergy: true } as const
    expect(summed([passage(6), passage(9, unknown)])[0]).toMatchObject({
      energies: [10, 0],
      unknownEnergyPassages: 1,
    })
    expect(summed([passage(9, unknown)])[0]?.energies).toEqual([NaN, NaN])
  })
})
