import { expect, test } from 'vitest'
import { Tracks } from '../../src/passages/tracks.ts'
import { expectClose } from '../support/expect-close.ts'
import {
  AFTER,
  BEFORE,
  CANALS,
  fairway,
  lastOf,
  narrow,
  type Place,
  place,
  positionAt,
  report,
  type Sighting,
  told,
} from '../support/sightings.ts'

test('a ferry that crosses a river near a canal is not put on the canal, nor a vessel on the canal on the river', () => {
  const river = fairway(
    'river',
    [
      [0, -1000],
      [0, 1000],
    ],
    { distances: [150, 150] },
  )
  const mouth = fairway('mouth', [
    [100, 0],
    [2000, 0],
  ])
  expect(told([lastOf([river, mouth], report(0, [60, 0], { course: 90, knots: 7 }))])).toEqual([
    'matched mouth',
  ])
  expect(told([lastOf([river, mouth], report(0, [60, 0], { course: 180, knots: 7 }))])).toEqual([
    'matched river',
  ])
  expect(told([lastOf([river, mouth], report(0, [-100, 0], { course: 90, knots: 7 }))])).toEqual([
    'ambiguous crossing river',
  ])
})

test('of parallel canals 60 m apart the nearer one counts, half way between them neither without history', () => {
  expect(told([lastOf(CANALS, report(0, [300, 22]))])).toEqual(['matched north'])
  expect(told([lastOf(CANALS, report(0, [300, 40]))])).toEqual(['matched south'])
  expect(told([lastOf(CANALS, report(0, [300, 31]))])).toEqual(['ambiguous two-fairways south'])
  expect(told([lastOf(CANALS, report(0, [300, 31], { knots: 0 }))])).toEqual([
    'stationary below-half-a-knot south',
  ])
})

test('history decides between parallel canals; it takes three clearly better reports in a row to change over', () => {
  const souths = [0, 31, 44, 44, 31, 44, 44, 44, 31]
  const placements = place(
    CANALS,
    souths.map((south, i) => report(10 * i, [300 + 30 * i, south])),
  )
  expect(placements.map(({ fairway: on }) => on?.id)).toEqual([
    ...Array<string>(7).fill('north'),
    ...Array<string>(2).fill('south'),
  ])
  expect(placements.every(({ status }) => status === 'matched')).toBe(true)
})

test('doubt is no history', () => {
  const doubtful = told(place(CANALS, [report(0, [300, 31]), report(10, [330, 29]), report(20, [360, 31])]))
  expect(doubtful).toEqual([
    'ambiguous two-fairways south',
    'ambiguous two-fairways north',
    'ambiguous two-fairways south',
  ])
})

test('it takes three reports in a row for the same other canal', () => {
  const canals = [
    fairway('middle', [
      [0, 0],
      [5000, 0],
    ]),
    fairway(
      'north',
      [
        [-100, -40],
        [4900, -40],
      ],
      narrow,
    ),
    fairway(
      'south',
      [
        [100, 40],
        [5100, 40],
      ],
      narrow,
    ),
  ]
  const souths = [0, -38, 38, -38, -38, 0, -38, -38, -38]
  const placements = place(
    canals,
    souths.map((south, i) => report(10 * i, [300 + 30 * i, south])),
  )
  expect(placements.map(({ fairway: on }) => on?.id)).toEqual([...Array<string>(8).fill('middle'), 'north'])
})

test('lines a few metres apart are the same water twice: ambiguous, and the first of the list', () => {
  const from = (id: string, east: number, south: number) =>
    fairway(
      id,
      [
        [east, south],
        [east + 4000, south],
      ],
      narrow,
    )
  const [one, other] = [from('one', 0, 0), from('other', 100, 0)]
  expect(told([lastOf([one, from('two', 100, 2)], report(0, [500, 0]))])).toEqual([
    'ambiguous two-fairways one',
  ])
  // with a vertex on both, so that both are equally far to the last digit
  const twins = [one, { ...other, line: [positionAt([100, 0]), ...one.line.slice(1, -1)] }]
  expect(told([lastOf(twins, report(0, [1250, 5]))])).toEqual(['ambiguous two-fairways one'])
  expect(told([lastOf(twins.toReversed(), report(0, [1250, 5]))])).toEqual(['ambiguous two-fairways other'])
})

test('where two fairways cross the course decides, unless it slants across both', () => {
  const slope = (50 * Math.PI) / 180
  const end: Place = [1500 * Math.cos(slope), 1500 * Math.sin(slope)]
  const crossing = [
    fairway('along', [
      [-2000, 0],
      [2000, 0],
    ]),
    fairway('slanting', [[-end[0], -end[1]], end]),
  ]
  const at = (where: Place, sighting: Sighting) => told([lastOf(crossing, report(0, where, sighting))])[0]
  expect(at([0, 0], { course: 92, knots: 8 })).toBe('matched along')
  expect(at([0, 0], { course: 318, knots: 8 })).toBe('matched slanting')
  expect(at([0, 0], { course: 115, knots: 8 })).toMatch(/^ambiguous two-fairways/)
  expect(at([0, 0], { course: 92, knots: 1.9 })).toMatch(/^ambiguous two-fairways/)
  // 20 m from one and 10 m from the other, 20 and 30 degrees off: within 30 the course does not count
  expect(at([3.73, 20], { course: 110, knots: 8 })).toBe('matched slanting')
})

test('a canal that no longer holds the vessel is left at once', () => {
  expect(told(place(CANALS, [report(0, [300, 0]), report(10, [330, 60])]))).toEqual([
    'matched north',
    'matched south',
  ])
})

test('at a joint the segment alongside counts, whichever is wider, in either direction', () => {
  const lake = fairway(
    'lake',
    [
      [1000, 10],
      [3000, 10],
    ],
    { distances: [400, 400] },
  )
  for (const next of [AFTER, lake]) {
    for (const fairways of [
      [BEFORE, next],
      [next, BEFORE],
    ]) {
      const easts = [960, 990, 1010, 1040]
      const there = easts.map((east, i) => report(20 * i, [east, 15]))
      const back = easts.map((_, i) => report(200 + 20 * i, [easts.at(-1 - i)!, 15], { course: 270 }))
      expect(told(place(fairways, [...there, ...back]))).toEqual([
        ...Array<string>(2).fill('matched before'),
        ...Array<string>(4).fill(`matched ${next.id}`),
        ...Array<string>(2).fill('matched before'),
      ])
      expect(told(easts.map((east) => lastOf(fairways, report(0, [east, 15]))))).toEqual([
        ...Array<string>(2).fill('matched before'),
        ...Array<string>(2).fill(`matched ${next.id}`),
      ])
    }
  }
})

test('a segment that has ended is left at once, also when reports skip the short one after it', () => {
  const wide = { distances: [400, 400] as const }
  const river = [
    fairway(
      'upper',
      [
        [0, 0],
        [2000, 0],
      ],
      wide,
    ),
    fairway(
      'lock',
      [
        [2000, 0],
        [2200, 0],
      ],
      wide,
    ),
    fairway(
      'lower',
      [
        [2200, 0],
        [4000, 0],
      ],
      wide,
    ),
  ]
  expect(told(place(river, [report(0, [1950, 50]), report(70, [2300, 50])]))).toEqual([
    'matched upper',
    'matched lower',
  ])
})

test('ends up to 50 m apart touch', () => {
  const next = (east: number) =>
    fairway('next', [
      [east, 0],
      [3000, 0],
    ])
  expect(lastOf([BEFORE, next(1048)], report(0, [1024, 0])).status).toBe('matched')
  expect(lastOf([BEFORE, next(1052)], report(0, [1026, 0])).status).toBe('ambiguous')
})

test('which lines touch is kept for each pair', () => {
  const twin = fairway('twin', [
    [1200, 2],
    [2500, 2],
  ])
  const tracks = new Tracks([BEFORE, twin, AFTER], { maxGap: 600 })
  expect(told([tracks.place(report(0, [1010, 0]))])).toEqual(['matched after'])
  const other = report(0, [1500, 1], { vesselKey: 'mmsi:2' })
  expect(tracks.place(other).status).toBe('ambiguous')
})

test('a vessel that turns in front of a side canal is not on it', () => {
  const side = fairway('side', [
    [1000, 0],
    [1000, -1000],
  ])
  expect(
    told(place([BEFORE, AFTER, side], [report(0, [950, 10]), report(30, [985, 20], { course: 0 })])),
  ).toEqual(['matched before', 'ambiguous crossing before'])
})

test('a side canal that the vessel is across does not end the fairway at a kink', () => {
  const south = fairway('south', [
    [1000, 0],
    [1000, 1000],
  ])
  const side = fairway('side', [
    [1000, 0],
    [1700, -700],
  ])
  expect(
    told(place([BEFORE, south, side], [report(0, [950, 0]), report(20, [1009, -13], { course: 135 })])),
  ).toEqual(['matched before', 'matched before'])
})

test('from a fairway that is left the vessel does not go on to one that it is across', () => {
  const side = fairway(
    'side',
    [
      [1000, 0],
      [1000, -1000],
    ],
    { distances: [50, 50] },
  )
  const apart = fairway('apart', [
    [1060, -30],
    [3000, -30],
  ])
  expect(told(place([BEFORE, side, apart], [report(0, [950, 0]), report(40, [1075, -30])]))).toEqual([
    'matched before',
    'matched apart',
  ])
})

test('on the outer side of a kink between two segments the vessel stays on the first until it is alongside the second', () => {
  const south = fairway('south', [
    [1000, 0],
    [1000, 1000],
  ])
  const placements = place(
    [BEFORE, south],
    [
      report(0, [980, -10], { course: 90 }),
      report(10, [1015, -12], { course: 120 }),
      report(20, [1018, -5], { course: 140 }),
      report(30, [1010, 20], { course: 170 }),
    ],
  )
  expect(told(placements)).toEqual(['matched before', 'matched before', 'matched before', 'matched south'])
  expect(placements.map(({ direction }) => direction)).toEqual(Array(4).fill('downstream'))
  expectClose(placements[1]!.along, 1000, { abs: 0.1 })
})

test('at a fork of three segments a vessel goes from the trunk to the branch it sails along', () => {
  const branch = (id: string, south: number) =>
    fairway(id, [
      [1000, 0],
      [3000, south],
    ])
  const fork = [BEFORE, branch('left', -500), branch('right', 500)]
  const sail = (course: number, souths: readonly number[]) =>
    place(
      fork,
      souths.map((south, i) => report(20 * i, [960 + 60 * i, south], { course })),
    ).map(({ fairway: on }) => on?.id)
  expect(sail(76, [0, -5, -20, -35, -50, -65])).toEqual(['before', ...Array<string>(5).fill('left')])
  expect(sail(104, [0, 5, 20, 35, 50, 65])).toEqual(['before', ...Array<string>(5).fill('right')])
})

test('at a narrow fork the branch taken first is left as soon as the other is clearly nearer', () => {
  const fork = [
    fairway('left', [
      [1000, 0],
      [3000, -200],
    ]),
    fairway('right', [
      [1000, 0],
      [3000, 200],
    ]),
  ]
  expect(told(place(fork, [report(0, [1100, -12]), report(20, [1150, 2]), report(60, [1300, 30])]))).toEqual([
    'matched left',
    'matched left',
    'matched right',
  ])
  // without history too, since they touch
  expect(lastOf(fork, report(0, [1150, 0])).status).toBe('matched')
})

test('a ferry that has only been seen across a fairway has no history on it', () => {
  const ferry = [report(0, [300, 0], { course: 0 }), report(10, [300, 31], { knots: 1 })]
  expect(lastOf(CANALS, ...ferry).status).toBe('ambiguous')
})
