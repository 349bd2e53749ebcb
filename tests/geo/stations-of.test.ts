import fc from 'fast-check'
import { expect, test } from 'vitest'
import type { Station } from '../../src/domain/segment.ts'
import type { BankStation } from '../../src/geo/banks.ts'
import { chainageScale } from '../../src/geo/chainage-scale.ts'
import type { GivenStation, StationSources } from '../../src/geo/station-figures.ts'
import { stationsOf } from '../../src/geo/stations-of.ts'
import { evenly } from '../support/arbitraries.ts'
import { expectClose } from '../support/expect-close.ts'

const TRAPEZOID = { kind: 'trapezoid' } as const

const found = (distance: number) => ({ distance, source: 'normal', found: 'crossing' }) as const

/** Stations of bank lines by place and both distances, m; null: no line. */
const fromLines = (...rows: (readonly [number, number | null, number | null])[]): BankStation[] =>
  rows.map(([along, left, right]) => ({
    along,
    left: left === null ? null : found(left),
    right: right === null ? null : found(right),
    width: left === null || right === null ? null : left + right,
    source: 'normal',
  }))

const given = (chainage: number, depth: number, left: number, right: number): GivenStation => ({
  chainage,
  depth,
  distances: [left, right],
})

const mergeAll = (sources: Partial<StationSources>) =>
  stationsOf({
    given: [],
    single: {},
    banks: [],
    shape: TRAPEZOID,
    scale: chainageScale(sources.length ?? 1000),
    length: 1000,
    ...sources,
  })

/** Without the stations that are put between others. */
function merge(sources: Partial<StationSources>) {
  const { stations, findings } = mergeAll(sources)
  return { stations: stations.filter(({ isBetween }) => !isBetween), findings }
}

const rows = (stations: readonly Station[]) =>
  stations.map(({ chainage, depth, width, distances }) => [chainage, depth, width, ...distances])

test('single figures alone are one station without a chainage', () => {
  const { stations, findings } = merge({ single: { depth: 4, distances: [30, 50] } })
  expect(stations).toEqual([{ index: 0, depth: 4, width: 80, distances: [30, 50], shape: TRAPEZOID }])
  expect(findings).toEqual([])
})

test('bank lines with a single depth give a station at each end and wherever they bend', () => {
  const banks = fromLines(
    [0, 30, 40],
    [100, 30, 40],
    [200, 30, 40],
    [300, 35, 40],
    [400, 40, 40],
    [1000, 40, 40],
  )
  expect(rows(merge({ banks, single: { depth: 4 } }).stations)).toEqual([
    [0, 4, 70, 30, 40],
    [200, 4, 70, 30, 40],
    [400, 4, 80, 40, 40],
    [1000, 4, 80, 40, 40],
  ])
})

test('depth is linear between given stations and held beyond them', () => {
  const banks = fromLines([0, 30, 30], [250, 31, 30], [500, 30, 30], [750, 31, 30], [1000, 30, 30])
  const { stations } = merge({ banks, given: [given(250, 3, 30, 30), given(750, 5, 30, 30)] })
  expect(stations.map(({ chainage, depth }) => [chainage, depth])).toEqual([
    [0, 3],
    [250, 3],
    [500, 4],
    [750, 5],
    [1000, 5],
  ])
})

test('a bank line on one side leaves the other to the stations or the single figures', () => {
  const banks = fromLines([0, 20, null], [1000, 25, null])
  const stations = [given(0, 3, 99, 40), given(1000, 3, 99, 60)]
  expect(rows(merge({ banks, given: stations }).stations)).toEqual([
    [0, 3, 60, 20, 40],
    [1000, 3, 85, 25, 60],
  ])
  const single = { depth: 3, distances: [99, 50] } as const
  expect(rows(merge({ banks, given: stations, single }).stations)).toEqual([
    [0, 3, 70, 20, 50],
    [1000, 3, 75, 25, 50],
  ])
})

test('falling chainages keep the order of the sailing line', () => {
  const scale = chainageScale(1000, 5000, 4000)
  const { stations } = merge({ scale, given: [given(4100, 3, 30, 30), given(4900, 5, 30, 30)] })
  expect(stations.map(({ index, chainage, depth }) => [index, chainage, depth])).toEqual([
    [0, 4900, 5],
    // ln(5/3) / ln 1.02 is 25.8: 25 are put between
    [26, 4100, 3],
  ])
})

test('a station outside the segment only serves to interpolate, with a remark', () => {
  const { stations, findings } = merge({
    given: [given(-1000, 2, 30, 30), given(1000, 4, 30, 30)],
    banks: fromLines([0, 30, 30], [1000, 30, 30]),
  })
  expect(rows(stations)).toEqual([
    [0, 3, 60, 30, 30],
    [1000, 4, 60, 30, 30],
  ])
  expect(findings).toHaveLength(1)
  expect(findings[0]).toMatchObject({
    level: 'remark',
    code: 'station-outside',
    facts: { first_chainage_m: -1000 },
  })
})

test('with a station outside the end on its side has its own figures', () => {
  const { stations } = merge({ given: [given(-1000, 2, 30, 30), given(1000, 4, 30, 30)] })
  expect(rows(stations)).toEqual([
    [0, 3, 60, 30, 30],
    [1000, 4, 60, 30, 30],
  ])
})

test('with all stations outside both ends are interpolated', () => {
  const { stations } = merge({ given: [given(-1000, 2, 30, 30), given(3000, 4, 30, 30)] })
  expect(rows(stations)).toEqual([
    [0, 2.5, 60, 30, 30],
    [1000, 3, 60, 30, 30],
  ])
})

test('a cross-section stays at its station, even where nothing else changes', () => {
  const own = { kind: 'trapezoid', bottomWidth: 20 } as const
  const { stations } = merge({
    given: [given(0, 3, 30, 30), { ...given(400, 3, 30, 30), shape: own }, given(1000, 3, 30, 30)],
  })
  expect(stations.map(({ chainage, shape }) => [chainage, shape])).toEqual([
    [0, TRAPEZOID],
    [400, own],
    [1000, TRAPEZOID],
  ])
})

test('a surveyed profile keeps its own waterlines beside bank lines', () => {
  const profile = { kind: 'profile', offsets: [-35, 0, 38], bedDepths: [0, 3.3, 0] } as const
  const { stations } = merge({
    given: [{ ...given(500, 3.3, 35, 38), shape: profile }],
    banks: fromLines([0, 30, 40], [500, 30, 40], [1000, 30, 40]),
  })
  expect(rows(stations)).toEqual([
    [0, 3.3, 70, 30, 40],
    [500, 3.3, 73, 35, 38],
    [1000, 3.3, 70, 30, 40],
  ])
})

test('given distances that differ from the bank lines are a remark with both figures', () => {
  const banks = fromLines([0, 30, 40], [1000, 30, 40])
  const { findings } = merge({ banks, given: [given(500, 3, 55, 42)] })
  expect(findings).toHaveLength(1)
  expect(findings[0]).toMatchObject({
    code: 'widths-differ',
    facts: { given_m: 55, line_m: 30, chainage_m: 500 },
  })
  expect(findings[0]!.detail).toBe(
    'The given distance to the left bank is 55 m at chainage 500 m, its line lies 30 m away: the lines were taken',
  )
  expect(merge({ banks, single: { depth: 3, distances: [33, 42] } }).findings).toEqual([])
})

test('a bottom wider than the water between the bank lines is a fault', () => {
  const { findings } = merge({
    banks: fromLines([0, 30, 40], [1000, 20, 20]),
    single: { depth: 3 },
    shape: { kind: 'trapezoid', bottomWidth: 50 },
  })
  expect(findings).toHaveLength(1)
  expect(findings[0]).toMatchObject({
    level: 'fault',
    code: 'bottom-wider-than-banks',
    facts: { bottom_width_m: 50, width_m: 40 },
  })
})

test('without any source of depth or distance it throws', () => {
  expect(() => merge({ single: { depth: 3 } })).toThrow(RangeError)
  expect(() => merge({ banks: fromLines([0, 30, 40], [1000, 20, 20]) })).toThrow(RangeError)
})

test('every station left out is within 0.01 m in depth and 0.1 m in distance, and no extreme is lost', () => {
  const row = fc.tuple(evenly(-0.3, 0.3), evenly(-0.15, 0.15), evenly(-2, 2), evenly(0, 0.03))
  fc.assert(
    fc.property(fc.array(row, { minLength: 2, maxLength: 60 }), (walk) => {
      let [left, right, depth] = [40, 50, 4]
      const all = walk.map(([l, r, jump, d], i) => {
        left += l + (i % 13 === 7 ? jump : 0)
        right += r
        depth += d - 0.015
        return { along: i * 50, left, right, depth }
      })
      const length = (all.length - 1) * 50
      const { stations } = stationsOf({
        given: all.map((place) => given(place.along, place.depth, place.left, place.right)),
        single: {},
        banks: fromLines(...all.map((place) => [place.along, place.left, place.right] as const)),
        shape: TRAPEZOID,
        scale: chainageScale(length),
        length,
      })
      for (const place of all) {
        const next = stations.findIndex(({ chainage }) => chainage! >= place.along - 1e-6)
        const [b, a] = [stations[next]!, stations[Math.max(0, next - 1)]!]
        const share = a === b ? 0 : (place.along - a.chainage!) / (b.chainage! - a.chainage!)
        const linear = (from: number, to: number) => from + share * (to - from)
        expectClose(linear(a.depth, b.depth), place.depth, { abs: 0.01 + 1e-9 })
        expectClose(linear(a.distances[0], b.distances[0]), place.left, { abs: 0.1 + 1e-9 })
        expectClose(linear(a.distances[1], b.distances[1]), place.right, { abs: 0.1 + 1e-9 })
      }
      const least = (pick: (place: { left: number; right: number; depth: number }) => number) =>
        Math.min(...all.map(pick))
      expect(Math.min(...stations.map(({ depth: d }) => d))).toBeCloseTo(
        least((place) => place.depth),
        9,
      )
      expect(Math.min(...stations.map(({ distances }) => distances[0]))).toBeCloseTo(
        least((place) => place.left),
        9,
      )
      expect(Math.min(...stations.map(({ width }) => width))).toBeCloseTo(
        least((place) => place.left + place.right),
        9,
      )
    }),
  )
})

test('a smooth widening of 2000 stations leaves a few', () => {
  const banks = fromLines(
    ...Array.from({ length: 2001 }, (_, i) => [i * 10, 40 + i / 100, 50 + Math.sin(i / 300)] as const),
  )
  const { stations } = merge({ banks, single: { depth: 4 }, length: 20_000, scale: chainageScale(20_000) })
  expect(stations.length).toBeLessThan(20)
})

test('between stations whose figures differ there are others, straight between them and marked', () => {
  const { stations } = mergeAll({ given: [given(0, 4, 30, 30), given(1000, 3.85, 31, 30)] })
  expect(stations.map(({ index, isBetween }) => [index, isBetween])).toEqual([
    [0, undefined],
    [1, true],
    [2, undefined],
  ])
  // the depth, 4 m less 0.15 m in 1000 m, is the first to change by a fiftieth: at 4 m / 1.02
  const [, second] = rows(stations)
  expectClose(second![0]!, 522.87581699, { abs: 1e-6 })
  expectClose(second![1]!, 3.92156862745, { abs: 1e-9 })
  expectClose(second![3]!, 30.52287581699, { abs: 1e-9 })
})

test('bank lines have stations put between too, where they run apart', () => {
  const { stations } = mergeAll({
    banks: fromLines([0, 20, 30], [1000, 30, 30]),
    single: { depth: 4 },
  })
  // ln 1.5 / ln 1.02 is 20.5: 20 between the two
  expect(stations).toHaveLength(22)
  expect(stations.every(({ depth, width, distances }) => depth === 4 && width === distances[0] + 30)).toBe(
    true,
  )
})

test('a bottom width or a slope is straight between stations that have it, else that of the segment', () => {
  const bottom = (bottomWidth: number) => ({ kind: 'trapezoid', bottomWidth }) as const
  const slope = (n: number) => ({ kind: 'trapezoid', slope: n }) as const
  const shapeAt500 = (a: GivenStation['shape'], b: GivenStation['shape']) =>
    mergeAll({
      given: [
        { ...given(0, 3, 30, 30), ...(a && { shape: a }) },
        { ...given(1000, 3, 30, 30), ...(b && { shape: b }) },
      ],
      wanted: [500],
      shape: slope(3),
    }).stations[1]!.shape
  expect(shapeAt500(bottom(20), bottom(30))).toEqual(bottom(25))
  expect(shapeAt500(slope(1), slope(2))).toEqual(slope(1.5))
  expect(shapeAt500(slope(1), undefined)).toEqual(slope(2))
  expect(shapeAt500(bottom(20), slope(2))).toEqual(slope(3))
})

test('beside a surveyed profile nothing is put between and no wanted place is made', () => {
  const profile = { kind: 'profile', offsets: [-20, 0, 20], bedDepths: [0, 6, 0] } as const
  const { stations } = mergeAll({
    given: [given(0, 3, 30, 30), { ...given(500, 6, 20, 20), shape: profile }, given(1000, 3, 30, 30)],
    wanted: [250, 750],
  })
  expect(rows(stations)).toEqual([
    [0, 3, 60, 30, 30],
    [500, 6, 40, 20, 20],
    [1000, 3, 60, 30, 30],
  ])
})

test('a wanted place is a station even where nothing changes, but not where one section holds all along', () => {
  const banks = fromLines([0, 30, 40], [1000, 30, 40])
  const alongs = (sources: Partial<StationSources>) => mergeAll(sources).stations.map((s) => s.chainage)
  expect(alongs({ banks, single: { depth: 4 }, wanted: [620, 0, 1000] })).toEqual([0, 620, 1000])
  expect(alongs({ single: { depth: 4, distances: [30, 30] }, wanted: [620] })).toEqual([undefined])
})

test('a distance whose side is not known is held against the line that it fits', () => {
  const banks = fromLines([0, 40, 20], [1000, 40, 20])
  const found = (first: number, second: number) =>
    merge({ banks, given: [{ ...given(500, 3, first, second), hasSides: false }] }).findings
  expect(found(20, 40)).toEqual([])
  expect(found(20, 70)).toMatchObject([{ code: 'widths-differ', facts: { given_m: 20, line_m: 40 } }])
  expect(merge({ banks, given: [given(500, 3, 20, 40)] }).findings).toHaveLength(1)
})
