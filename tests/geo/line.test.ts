import { expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import type { GeometryFinding } from '../../src/geo/finding.ts'
import { checkLine, type CheckedLine, type LineOptions } from '../../src/geo/line.ts'
import { boundingBox } from '../../src/geo/measure.ts'

const check = (coordinates: unknown, options?: LineOptions): CheckedLine =>
  checkLine({ type: 'LineString', coordinates }, options)

const GOOD: LonLat[] = [
  [5.1, 52.1],
  [5.11, 52.12],
  [5.13, 52.13],
]

/** The only finding there is. */
function only({ findings }: CheckedLine): GeometryFinding {
  expect(findings.map(({ code }) => code)).toHaveLength(1)
  return findings[0]!
}

function expectFault(checked: CheckedLine, code: string, pointer: string, words: string): void {
  expect(checked.line).toBeNull()
  const finding = only(checked)
  expect(finding).toMatchObject({ level: 'fault', code, pointer })
  expect(finding.detail).toContain(words)
}

test('a good line passes as it is', () => {
  expect(check(GOOD)).toEqual({ line: GOOD, findings: [] })
})

test.each([
  ['Polygon', 'LineString, not the area it bounds'],
  ['MultiLineString', 'join its parts, or make a feature of each'],
  ['Point', 'give at least two positions'],
  ['GeometryCollection', 'give a LineString'],
])('a %s is refused with what to give instead', (type, words) => {
  expectFault(checkLine({ type, coordinates: [] }), 'not-a-line', '/type', words)
})

test('an unclosed polygon as a bank says that the waterline is wanted', () => {
  const polygon = { type: 'Polygon', coordinates: [GOOD] }
  expect(checkLine(polygon, { name: 'left bank' }).findings[0]?.detail).toBe(
    'The left bank is a Polygon where a LineString is needed: give the waterline as a LineString, not the area it bounds',
  )
})

test('coordinates that are no list are refused', () => {
  expectFault(check({ lon: 5, lat: 52 }), 'not-a-line', '/coordinates', 'not a list of positions')
  expectFault(checkLine({ type: 'LineString' }), 'not-a-line', '/coordinates', 'not a list of positions')
})

test('fewer than two positions are refused', () => {
  expectFault(check([]), 'too-few-positions', '/coordinates', 'has 0 of the two positions')
  expectFault(check([GOOD[0]]), 'too-few-positions', '/coordinates', 'has 1 of the two positions')
})

test('more than 100,000 vertices are refused before they are looked at, 100,000 are not', () => {
  const line = (n: number) => Array.from({ length: n }, (_, i) => [5 + i * 1e-5, 52])
  expectFault(check(line(100_001)), 'too-many-positions', '/coordinates', 'simplify it or cut it')
  expect(check(line(100_000)).line).toHaveLength(100_000)
})

test('heights are dropped with a remark', () => {
  const checked = check(GOOD.map(([lon, lat]) => [lon, lat, 1.5]))
  expect(checked.line).toEqual(GOOD)
  expect(only(checked)).toMatchObject({ level: 'remark', code: 'height-dropped', facts: { positions: 3 } })
})

test('repeated vertices are dropped with a remark, and the ends stay', () => {
  const [a, b, c] = GOOD as [LonLat, LonLat, LonLat]
  const almost: LonLat = [c[0] + 5e-9, c[1]]
  const checked = check([a, a, b, b, b, c, almost])
  expect(checked.line).toEqual([a, b, almost])
  expect(only(checked)).toMatchObject({ code: 'positions-dropped', facts: { dropped: 4, kept: 3 } })
})

test('a vertex on either side of the antimeridian is one place', () => {
  expect(
    check([
      [179.9, 0],
      [180, 0],
      [-180, 0],
      [-179.9, 0],
    ]).line,
  ).toEqual([
    [179.9, 0],
    [180, 0],
    [-179.9, 0],
  ])
})

test('a line without length is refused', () => {
  const { line, findings } = check([GOOD[0], GOOD[0], GOOD[0]])
  expect(line).toBeNull()
  expect(findings.at(-1)).toMatchObject({ level: 'fault', code: 'without-length' })
  expect(findings.at(-1)?.detail).toContain('all its positions are one place')
})

test('a line around half the world is refused before it is cut into pieces', () => {
  expectFault(
    check([
      [-90, 0],
      [0, 10],
      [89, 0],
    ]),
    'too-long',
    '/coordinates',
    'is a position misplaced?',
  )
})

test('a line across the antimeridian is accepted without a remark and has west above east', () => {
  const { line, findings } = check([
    [179.98, 66],
    [-179.97, 66.01],
  ])
  expect(findings).toEqual([])
  expect(boundingBox(line!)).toEqual([179.98, 66, -179.97, 66.01])
})

const LOOP = [
  [5, 52],
  [5.02, 52],
  [5.02, 52.01],
  [5.01, 52.01],
  [5.01, 51.99],
]

test('a line that crosses itself is accepted with a remark that says where', () => {
  const checked = check(LOOP)
  expect(checked.line).toEqual(LOOP)
  expect(only(checked)).toMatchObject({ level: 'remark', code: 'crosses-itself', facts: { crossings: 1 } })
  expect(only(checked).detail).toContain('crosses itself once at 5.01000, 52.00000')
})

test('a crossing across the antimeridian is found at its place', () => {
  const shifted = LOOP.map(([lon = 0, lat = 0]) => [
    lon + 174.985 > 180 ? lon + 174.985 - 360 : lon + 174.985,
    lat,
  ])
  expect(only(check(shifted)).detail).toContain('at 179.99500, 52.00000')
})

test('a closed ring does not cross itself', () => {
  expect(
    check([
      [5, 52],
      [5.02, 52],
      [5.02, 52.01],
      [5, 52],
    ]).findings,
  ).toEqual([])
})

test('a line that runs back on itself is refused, since its places would have two chainages', () => {
  expectFault(
    check([
      [5, 52],
      [5.02, 52],
      [5.01, 52],
    ]),
    'runs-back-on-itself',
    '/coordinates/1',
    'two chainages',
  )
  const there = Array.from({ length: 50 }, (_, i) => [5 + i * 1e-5, 52 + i * 2e-5])
  expect(check([...there, ...there.toReversed().slice(1)]).findings[0]?.code).toBe('runs-back-on-itself')
})

test('a bank may run out and back along a mole', () => {
  expect(
    check(
      [
        [5, 52],
        [5.02, 52],
        [5.01, 52],
      ],
      { mayCross: true },
    ).findings,
  ).toEqual([])
})

test('a hatching that would take minutes to check is refused in about a second', () => {
  // parallel strokes: all boxes overlap and nothing crosses
  const strokes = Array.from({ length: 20_000 }, (_, i) =>
    i % 2 ? [5.002 + i * 4e-7, 52] : [5 + i * 4e-7, 52.001],
  )
  const started = performance.now()
  const { findings } = check(strokes)
  expect(findings.map(({ code }) => code)).toEqual(['too-tangled'])
  expect(performance.now() - started).toBeLessThan(10_000)
})
