import { expect, test } from 'vitest'
import { expectClose } from '../support/expect-close.ts'
import { AFTER, BEFORE, CANALS, EAST, lastOf, place, report, told } from '../support/sightings.ts'

test('history ends with a gap and with more than 2 km between reports', () => {
  const from = report(0, [300, 0])
  expect(lastOf(CANALS, from, report(600, [400, 31])).status).toBe('matched')
  expect(lastOf(CANALS, from, report(601, [400, 31])).status).toBe('ambiguous')
  expect(lastOf(CANALS, from, report(500, [2290, 31])).status).toBe('matched')
  expect(lastOf(CANALS, from, report(500, [2310, 31])).status).toBe('ambiguous')
})

test('one wrong position changes nothing for the following ones', () => {
  const placements = place(
    [EAST],
    [
      report(0, [500, 0]),
      report(10, [530, 5000]),
      report(20, [560, 0], { knots: 1 }),
      report(30, [5000, 9000]),
      report(40, [620, 0]),
      report(40, [620, 0]),
    ],
  )
  expect(told(placements)).toEqual([
    'matched east',
    'implausible-jump over-60-kn',
    'matched east',
    'implausible-jump over-60-kn',
    'matched east',
    'duplicate same-time',
  ])
  // the track goes on: a slow vessel keeps its direction
  expect(placements[2]?.direction).toBe('downstream')
})

test('a second vessel with the same number does not break the track of the first', () => {
  const placements = [0, 10, 20, 30, 40, 50].map((time) => report(time, [500, time % 20 === 0 ? 0 : 20_000]))
  expect(place([EAST], placements).map(({ status }) => status)).toEqual([
    'matched',
    'implausible-jump',
    'matched',
    'implausible-jump',
    'matched',
    'implausible-jump',
  ])
})

test('a copy of a wrong position is a duplicate, and its time counts', () => {
  const wrong = report(601, [0, 30_000])
  expect(told(place([EAST], [report(2, [0, 0]), wrong, wrong, report(0.5, [0, 0])]))).toEqual([
    'matched east',
    'implausible-jump over-60-kn',
    'duplicate same-time',
    'late older-than-the-gap',
  ])
})

test('the limit is 60 kn and 50 m, within the gap only', () => {
  const status = (time: number, east: number) =>
    lastOf([EAST], report(0, [0, 0]), report(time, [east, 0])).status
  // 60 kn are 30.87 m/s
  expect(status(10, 358)).toBe('matched')
  expect(status(10, 359.5)).toBe('implausible-jump')
  expect(status(100, 3136)).toBe('matched')
  expect(status(100, 3138)).toBe('implausible-jump')
  expect(lastOf([EAST], report(0, [0, 50_000]), report(600, [0, 0])).status).toBe('implausible-jump')
  expect(lastOf([EAST], report(0, [0, 50_000]), report(601, [0, 0])).status).toBe('matched')
})

test('two reports that agree with each other but not with the track begin a new one', () => {
  expect(
    told(
      place(
        [EAST],
        [
          report(0, [500, 30_000]),
          report(10, [530, 0]),
          report(20, [560, 0]),
          report(30, [590, 0]),
          report(40, [620, 30_000]),
          report(50, [620, 0]),
        ],
      ),
    ),
  ).toEqual([
    'no-segment no-fairway-within-reach',
    'implausible-jump over-60-kn',
    'matched east',
    'matched east',
    'implausible-jump over-60-kn',
    'matched east',
  ])
})

test('a report out of order is placed beside the track, which it does not turn back', () => {
  const placements = place(
    [BEFORE, AFTER],
    [
      report(0, [900, 0]),
      report(100, [1200, 0], { knots: 1 }),
      report(50, [980, 0], { knots: 1 }),
      report(110, [1210, 0], { knots: 1 }),
      report(120, [1235, 0], { knots: 1 }),
      report(60, [1000, 4000]),
      report(50, [980, 0]),
    ],
  )
  expect(told(placements)).toEqual([
    'matched before',
    'matched after',
    'matched before',
    'matched after',
    'matched after',
    'implausible-jump over-60-kn',
    'duplicate same-time',
  ])
  expect(placements.map(({ direction }) => direction).slice(0, 5)).toEqual([
    'downstream',
    undefined,
    undefined,
    undefined,
    'downstream',
  ])
  expectClose(placements[2]!.along, 980, { abs: 0.1 })
  const slow = report(50, [950, 0], { knots: 1 })
  expect(lastOf([EAST], report(0, [900, 0]), report(100, [1000, 0]), slow).direction).toBe('downstream')
})

test('a report out of order on another fairway is no history', () => {
  const reports = [report(0, [300, 0]), report(100, [800, 0]), report(50, [550, 60]), report(110, [830, 31])]
  expect(told(place(CANALS, reports))).toEqual([
    'matched north',
    'matched north',
    'matched south',
    'matched north',
  ])
})

test('out of order both neighbours in time count; between two tracks either', () => {
  const here = [report(0, [0, 0]), report(100, [1000, 0])]
  expect(lastOf([EAST], ...here, report(98, [950, 0])).status).toBe('matched')
  expect(lastOf([EAST], ...here, report(98, [100, 0])).status).toBe('implausible-jump')
  expect(lastOf([EAST], ...here, report(2, [950, 0])).status).toBe('implausible-jump')
  const jump = [report(0, [0, 0]), report(20, [0, 60_000]), report(30, [0, 60_000])]
  expect(lastOf([EAST], ...jump, report(10, [0, 0])).status).toBe('matched')
  expect(lastOf([EAST], ...jump, report(25, [0, 60_000])).status).toBe('no-segment')
  expect(lastOf([EAST], ...jump, report(25, [0, 30_000])).status).toBe('implausible-jump')
})

test('a copy counts once, also when it comes later; older than the gap is late', () => {
  const reports = [0, 10, 610, 10, 9, 10.5, 611, 10.5].map((time) => report(time, [500 + time, 0]))
  expect(told(place([EAST], reports))).toEqual([
    'matched east',
    'matched east',
    'matched east',
    'duplicate same-time',
    'late older-than-the-gap',
    'matched east',
    'matched east',
    'late older-than-the-gap',
  ])
  const other = report(10, [500, 0], { vesselKey: 'mmsi:299000002' })
  expect(lastOf([EAST], ...reports, other).status).toBe('matched')
  expect(told(place([EAST], [report(0, [0, 0]), report(31, [0, 0]), report(0, [0, 0])], 30))).toEqual([
    'matched east',
    'matched east',
    'late older-than-the-gap',
  ])
})

test('reports without a position or of other mobiles leave no trace', () => {
  const placements = place(
    [EAST],
    [
      report(0, [0, 0]),
      report(5000, [0, 0], { lon: NaN }),
      report(5000, [0, 0], { mobile: 'base-station' }),
      report(10, [50, 0]),
    ],
  )
  expect(placements.at(-1)?.status).toBe('matched')
})

test('vessels do not disturb each other, in whatever order their reports are mixed', () => {
  const sail = (vesselKey: string, south: number, drift: number) =>
    Array.from({ length: 40 }, (_, i) =>
      report(15 * i, [200 + 45 * i, south + drift * Math.sin(i)], {
        vesselKey,
        course: 90 + 20 * Math.cos(i),
        knots: i % 7,
      }),
    )
  const vessels = [sail('mmsi:1', 10, 20), sail('mmsi:2', 31, 25), sail('eni:1', 60, 40)]
  const one = place(CANALS, vessels.flat())
  // a fixed shuffle that keeps each vessel's own order
  const queues = vessels.map((reports, i) => reports.map((_, k) => 40 * i + k))
  const order: number[] = []
  for (let step = 0; order.length < 120; step++) {
    const next = queues[(step * step + (step >> 2)) % 3]?.shift()
    if (next !== undefined) order.push(next)
  }
  const mixed = place(
    CANALS,
    order.map((i) => vessels.flat()[i]!),
  )
  expect(new Set(told(one)).size).toBeGreaterThan(3)
  order.forEach((i, k) => {
    expect(mixed[k]).toEqual(one[i])
  })
})
