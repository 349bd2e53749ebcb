import { expect, test } from 'vitest'
import type { LonLat } from '../../src/domain/position.ts'
import type { GeometryFinding } from '../../src/geo/finding.ts'
import { typicalPosition } from '../../src/geo/line-positions.ts'
import { checkLine, type CheckedLine, type LineOptions } from '../../src/geo/line.ts'

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

test.each([
  ['a number', [7, 52]],
  ['null', [null, null]],
  ['texts', [['5', '52']]],
  ['one figure', [[5]]],
])('a position made of %s is refused', (_, coordinates) => {
  const { line, findings } = check([GOOD[0], ...coordinates])
  expect(line).toBeNull()
  expect(findings).toHaveLength(1)
  expect(findings[0]).toMatchObject({ code: 'not-a-position', kind: 'wrong-type', pointer: '/coordinates/1' })
})

test('a figure that is not finite is refused', () => {
  expectFault(check([GOOD[0], [NaN, 52]]), 'not-finite', '/coordinates/1', 'both figures must be finite')
  expectFault(check([GOOD[0], [5, -Infinity]]), 'not-finite', '/coordinates/1', 'both figures must be finite')
})

test('projected coordinates are recognised, once for the whole line', () => {
  const checked = check([
    [155000, 463000],
    [155100, 463200],
    [155150, 463300],
  ])
  expectFault(checked, 'looks-projected', '/coordinates/0', 'looks projected')
  expect(checked.findings[0]?.detail).toContain('(and 2 more)')
})

test('swapped axes are recognised where the latitude exceeds 90', () => {
  expectFault(
    check([
      [29.9, -95.1],
      [29.8, -95.2],
    ]),
    'axes-swapped',
    '/coordinates/0',
    'looks like latitude before longitude',
  )
})

test('a longitude beyond 180 is told what to write instead', () => {
  const checked = check([
    [179.9, 65],
    [180.1, 65],
  ])
  expectFault(checked, 'longitude-beyond-180', '/coordinates/1', 'write the longitude as -179.9')
})

test('latitudes above 85 degrees are refused, 85 is not', () => {
  expectFault(
    check([
      [10, 85],
      [10, 85.01],
    ]),
    'latitude-beyond-85',
    '/coordinates/1',
    'beyond 85 degrees',
  )
  expect(
    check([
      [10, 84.9],
      [10, 85],
    ]).line,
  ).not.toBeNull()
})

test('every kind of fault of the positions is reported, each once', () => {
  const { findings } = check([[155000, 463000], [5, 88], [NaN, 1], [5, 89], 'x'])
  expect(findings.map(({ code, pointer }) => [code, pointer])).toEqual([
    ['looks-projected', '/coordinates/0'],
    ['latitude-beyond-85', '/coordinates/1'],
    ['not-finite', '/coordinates/2'],
    ['not-a-position', '/coordinates/4'],
  ])
})

test('a line that would lie with the others if its axes were swapped gets a hint', () => {
  const others = [
    GOOD,
    GOOD,
    [
      [5.3, 52.4],
      [5.4, 52.4],
    ],
    [
      [52.1, 5.2],
      [52.2, 5.2],
    ],
  ] as LonLat[][]
  const near = typicalPosition(others)!
  expect(near[0]).toBeCloseTo(5.3, 9)
  expect(near[1]).toBe(52.1)
  const checked = check(others[3], { near })
  expect(checked.line).not.toBeNull()
  expect(only(checked)).toMatchObject({ level: 'remark', code: 'axes-doubtful' })
  expect(only(checked).detail).toContain('would lie with them if latitude and longitude were swapped')
  expect(check(others[0], { near }).findings).toEqual([])
  // far away either way: another waterway
  expect(
    check(
      [
        [-90, 29],
        [-91, 29],
      ],
      { near },
    ).findings,
  ).toEqual([])
})

test('two lines do not tell which of them is out of place', () => {
  expect(typicalPosition([GOOD, GOOD])).toBeNull()
})

test('the typical position of lines around the antimeridian lies there', () => {
  const at = (lon: number): LonLat[] => [
    [lon, 10],
    [lon, 11],
  ]
  expect(typicalPosition([at(179.9), at(-179.9), at(-179.8)])![0]).toBeCloseTo(-179.9, 9)
})
