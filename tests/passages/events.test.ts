import { describe, expect, it } from 'vitest'
import { EventFinder, normalDistribution, type PassageEvent } from '../../src/passages/events.ts'
import { Judge } from '../../src/passages/judge.ts'
import type { Mark } from '../../src/passages/timeline.ts'
import { fairway, judgement, mark } from '../support/passage-marks.ts'

const JUDGE = new Judge({
  waterLevel: 0,
  current: 0,
  tolerance: 0.25,
  position: 'sailing-line',
  isFull: false,
})

function eventsOf(marks: readonly Mark[], minReports = 2, maxGap = 600): PassageEvent[] {
  const found: PassageEvent[] = []
  const finder = new EventFinder(JUDGE, maxGap, minReports, (event) => found.push(event))
  for (const each of marks) finder.take(each)
  finder.end()
  return found
}

const REACH_A = fairway('reach-a')
const REACH_B = fairway('reach-b')

/** A report each minute, 180 m apart, with this excess in m/s; undefined: within. */
const sailed = (excesses: readonly (number | undefined)[], line0 = 2): Mark[] =>
  excesses.map((excess, i) =>
    mark({
      report: { time: 60 * i, line: line0 + i, speed: 3 },
      placement: { along: 180 * i, fairway: REACH_A },
      judgement: excess === undefined ? { verdict: 'within', excess: -1 } : { excess },
    }),
  )

describe('consecutive exceedances', () => {
  it('make one event with its figures', () => {
    const [event, ...more] = eventsOf(sailed([undefined, 0.5, 1.25, 0.75, undefined]))
    expect(more).toEqual([])
    expect(event).toMatchObject({
      fairway: REACH_A,
      direction: 'downstream',
      certainty: 'certain',
      reports: 3,
      distance: 360,
      firstLine: 3,
      lastLine: 5,
    })
    expect(event?.first.report.time).toBe(60)
    expect(event?.last.report.time).toBe(180)
    expect(event?.peak.judgement.excess).toBe(1.25)
    // (0.5 + 1.25 + 0.75) / 3
    expect(event?.meanExcess).toBeCloseTo(0.8333333, 6)
  })

  it('are two events with a report within between them', () => {
    expect(
      eventsOf(sailed([1, 1, undefined, 1, 1])).map(({ firstLine, lastLine }) => [firstLine, lastLine]),
    ).toEqual([
      [2, 3],
      [5, 6],
    ])
  })

  it('are no event when they are fewer than asked for', () => {
    expect(eventsOf(sailed([1, undefined, 1]))).toEqual([])
    expect(eventsOf(sailed([1, undefined, 1]), 1)).toHaveLength(2)
  })

  it('are parted by a gap, by another segment and by turning round', () => {
    const [a, b, c, d] = sailed([1, 1, 1, 1]) as [Mark, Mark, Mark, Mark]
    const later = (each: Mark): Mark => ({
      ...each,
      report: { ...each.report, time: each.report.time + 1200 },
    })
    const elsewhere = (each: Mark): Mark => ({ ...each, placement: { ...each.placement, fairway: REACH_B } })
    const back = (each: Mark): Mark => ({ ...each, placement: { ...each.placement, direction: 'upstream' } })
    expect(eventsOf([a, b, later(c), later(d)])).toHaveLength(2)
    expect(eventsOf([a, b, elsewhere(c), elsewhere(d)])).toHaveLength(2)
    expect(eventsOf([a, b, back(c), back(d)])).toHaveLength(2)
    expect(eventsOf([a, b, c, d])).toHaveLength(1)
  })

  it('are parted by a stop, and by a place that is not judged', () => {
    const marks = sailed([1, 1, 1, 1, 1])
    const stopped = mark({ report: { time: 120 }, placement: { status: 'stationary', fairway: REACH_A } })
    marks.splice(2, 1, stopped)
    expect(eventsOf(marks)).toHaveLength(2)
  })
})

describe('certainty', () => {
  const [a, b] = sailed([1, 1]) as [Mark, Mark]
  const doubtful = (each: Mark): Mark => ({
    ...each,
    judgement: judgement({ verdict: 'depends-on-draught' }),
  })

  it('is certain when one report exceeds whatever the draught', () => {
    expect(eventsOf([doubtful(a), b])[0]?.certainty).toBe('certain')
  })

  it('depends on the draught when all reports do', () => {
    expect(eventsOf([doubtful(a), doubtful(b)])[0]?.certainty).toBe('depends-on-draught')
  })

  it('without a safe speed laden has no excess to tell', () => {
    const unsafe = (each: Mark): Mark => ({
      ...each,
      judgement: judgement({ verdict: 'depends-on-draught', excess: NaN, maxOverGround: NaN }),
    })
    const [event] = eventsOf([unsafe(a), unsafe(b)])
    expect(event?.meanExcess).toBeNaN()
    expect(event?.confidence).toBeNaN()
    expect(eventsOf([unsafe(a), b])[0]?.peak.judgement.excess).toBe(1)
  })
})

describe('confidence', () => {
  // Abramowitz and Stegun, Handbook of Mathematical Functions, table 26.1
  it.each([
    [0, 0.5],
    [0.5, 0.691462461],
    [1, 0.841344746],
    [1.96, 0.975002105],
    [3, 0.998650102],
    [-1, 0.158655254],
  ])('at %f standard deviations is %f', (x, expected) => {
    expect(Math.abs(normalDistribution(x) - expected)).toBeLessThan(1e-7)
  })

  it('of an excess of half a knot with the position left out is that of one standard deviation', () => {
    const halfKnot = 926 / 3600
    const [event] = eventsOf(sailed([halfKnot, halfKnot]))
    expect(event?.confidence).toBeCloseTo(0.8413447, 6)
  })
})
