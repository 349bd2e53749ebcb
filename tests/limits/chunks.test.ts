import { expect, test } from 'vitest'
import { chunksOf, partOf, type StudyPart } from '../../src/limits/chunks.ts'
import { evaluateCells, evaluatePart } from '../../src/limits/evaluate.ts'
import { cellCount, type Study } from '../../src/limits/study.ts'
import { canal } from '../support/places.ts'
import { MIXED, segmentOf, UNCERTAINTY, vesselOf } from './studies.ts'

const WHOLE = evaluateCells(MIXED, 0, cellCount(MIXED))

test.each([1, 2, 3, 4, 7, 16, 31, 48])(
  'cells in ranges of %i are those of the whole, to the last digit',
  (size) => {
    const cells = []
    for (let from = 0; from < cellCount(MIXED); from += size) {
      cells.push(...evaluateCells(MIXED, from, Math.min(from + size, cellCount(MIXED))))
    }
    expect(JSON.stringify(cells)).toBe(JSON.stringify(WHOLE))
  },
)

test('parts that went as text give the cells of the whole, to the last digit', () => {
  const cells = [[0, 5] as const, [5, 33] as const, [33, 48] as const].flatMap(([from, to]) =>
    evaluatePart(JSON.parse(JSON.stringify(partOf(MIXED, from, to))) as StudyPart),
  )
  expect(JSON.stringify(cells)).toBe(JSON.stringify(WHOLE))
})

test('a part has the segments of its cells and no other', () => {
  const idsOf = (from: number, to: number): string[] =>
    partOf(MIXED, from, to).study.segments.map(({ id }) => id)
  // sixteen cells a segment
  expect(idsOf(0, 1)).toEqual(['a-long-pound'])
  expect(idsOf(15, 17)).toEqual(['a-long-pound', 'b-bend'])
  expect(idsOf(16, 32)).toEqual(['b-bend'])
  expect(idsOf(47, 48)).toEqual(['c-mere'])
})

test('cells that the study does not have are refused', () => {
  for (const [from, to] of [
    [-1, 2],
    [0, 49],
    [3, 2],
    [0.5, 2],
    [0, NaN],
  ] as const) {
    expect(() => evaluateCells(MIXED, from, to)).toThrow(RangeError)
  }
})

const segments = (count: number, stations: number): Study['segments'] =>
  Array.from({ length: count }, (_, i) => {
    const own = { depth: 4, width: 60, distances: [30, 30], shape: { kind: 'trapezoid' } } as const
    const [first, ...rest] = Array.from({ length: stations }, (_, index) => ({ ...own, index }))
    return segmentOf(canal({ depth: 4, distances: [30, 30] }, { stations: [first!, ...rest] }), {
      id: `segment-${i}`,
    })
  })

const levels = (count: number): number[] => Array.from({ length: count }, (_, i) => i / 100)

/** Checks what holds for every division, and returns the number of cells of each range. */
function sizesOf(study: Study): number[] {
  const chunks = chunksOf(study)
  const block = study.currents.length * study.directions.length
  expect(chunks).toEqual(chunksOf(JSON.parse(JSON.stringify(study)) as Study))
  expect(chunks[0]![0]).toBe(0)
  expect(chunks.at(-1)![1]).toBe(cellCount(study))
  chunks.forEach(([from, to], i) => {
    expect(to).toBeGreaterThan(from)
    expect(from % block).toBe(0)
    if (i > 0) expect(from).toBe(chunks[i - 1]![1])
  })
  return chunks.map(([from, to]) => to - from)
}

const plain: Study = {
  segments: segments(30, 1),
  vessels: [vesselOf('cemt-iv')],
  waterLevels: levels(100),
  currents: [0],
  directions: [null],
}

test('ranges without samples hold two thousand cells', () => {
  expect(sizesOf(plain)).toEqual([2000, 1000])
})

test('ranges with samples hold some twenty thousand bounds of the water', () => {
  const uncertainty = { ...UNCERTAINTY, samples: 199 }
  // 200 × 1.04 a cell: 96 of them are 19,968
  expect(sizesOf({ ...plain, uncertainty }).slice(0, -1)).toEqual(Array.from({ length: 31 }, () => 96))
})

test('each station of a segment counts', () => {
  const uncertainty = { ...UNCERTAINTY, samples: 199 }
  const sizes = sizesOf({ ...plain, segments: segments(1, 12), uncertainty })
  // 12 × 208 a cell: eight of them are 19,968
  expect(sizes).toEqual([...Array.from({ length: 12 }, () => 8), 4])
})

test('currents and directions of one level stay together and count little', () => {
  const uncertainty = { ...UNCERTAINTY, samples: 199 }
  const currents = [-0.2, -0.1, 0, 0.1, 0.2]
  const study = {
    ...plain,
    segments: segments(1, 1),
    currents,
    directions: ['upstream', 'downstream'],
  } as const
  // 200 × 1.4 a level: 71 of them are 19,880
  expect(sizesOf({ ...study, uncertainty })).toEqual([710, 290])
})

test('a level that is more than a range is a range by itself', () => {
  const uncertainty = { ...UNCERTAINTY, samples: 10_000 }
  const study = { ...plain, segments: segments(2, 20), waterLevels: [0, 0.1], uncertainty }
  expect(sizesOf(study)).toEqual([1, 1, 1, 1])
})
