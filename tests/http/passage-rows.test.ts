import { createReadStream, existsSync } from 'node:fs'
import { Readable } from 'node:stream'
import { parse } from 'csv-parse/sync'
import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { Fault } from '../../src/domain/fault.ts'
import { cellsOfLine, delimiterOf } from '../../src/http/csv-cells.ts'
import type { Log } from '../../src/http/passage-answer.ts'
import { passageColumnRoutes } from '../../src/http/passage-columns.ts'
import { readLogCsv, readLogNdjson } from '../../src/http/passage-rows.ts'
import type { LogRow } from '../../src/passages/position-report.ts'
import { buildTestApp } from '../support/app.ts'

/** The text cut into pieces of a few bytes, as a network may. */
function pieces(text: string | Buffer, size: number): Readable {
  const bytes = Buffer.from(text)
  const cut = Array.from({ length: Math.ceil(bytes.length / size) }, (_, i) =>
    bytes.subarray(i * size, (i + 1) * size),
  )
  return Readable.from(cut, { objectMode: true })
}

async function all(log: Log): Promise<LogRow[]> {
  const rows: LogRow[] = []
  for await (const batch of log.rows) rows.push(...batch)
  return rows
}

const csv = (text: string | Buffer, size = 1000): Promise<LogRow[]> => all(readLogCsv(pieces(text, size)))
const ndjson = (text: string | Buffer, size = 1000): Promise<LogRow[]> =>
  all(readLogNdjson(pieces(text, size)))

/** Line, then name or reason of each row. */
const told = (rows: readonly LogRow[]) =>
  rows.map(({ report, rejected }) =>
    report ? [report.line, report.name] : [rejected.line, `! ${rejected.reason}`],
  )

const HEADER = 'time,mmsi,vessel_name,lat,lon,sog_kn'
const row = (name: string) => `2022-01-03T00:00:03Z,299000001,${name},52.1,5.1,9`

describe('CSV', () => {
  test.each([1, 2, 3, 7, 1000])(
    'is the same in pieces of %i bytes: ends, empty lines, a mark',
    async (size) => {
      const text = `\ufeff${HEADER}\r\n${row('Å')}\r\n\r\n   \n${row('船')}\n${row('B\ufeffC')}`
      expect(told(await csv(text, size))).toEqual([
        [2, 'Å'],
        [5, '船'],
        [6, 'B\ufeffC'],
      ])
    },
  )

  test('empty lines before the header count', async () => {
    expect(told(await csv(`\n\r\n${HEADER}\n${row('A')}\n`))).toEqual([[4, 'A']])
  })

  test('the header says whether cells are divided by semicolons', async () => {
    const rows = await csv(
      `${HEADER}\n${row('A;B')}\n`.replaceAll(',', '|').replaceAll(';', ',').replaceAll('|', ';'),
    )
    expect(told(rows)).toEqual([[2, 'A,B']])
    expect(delimiterOf('"a;b;c",d')).toBe(',')
  })

  // unescaped quotes as in published files
  test.each([
    ['RAY "CHIEF" TONEY', 'RAY "CHIEF" TONEY'],
    ['"CHIEF" TONEY', '"CHIEF" TONEY'],
    ['6" PIPE', '6" PIPE'],
    ['"PIPE', '"PIPE'],
    ['PIPE"', 'PIPE"'],
    ['"SMITH, JOHN"', 'SMITH, JOHN'],
    ['"say ""hi"""', 'say "hi"'],
    ['"a""b', '"a""b'],
    ['""', undefined],
    ['"', '"'],
    ['"A" B" C', '"A" B" C'],
    [`O'HARA`, `O'HARA`],
  ])('a cell %s is read as %s', async (cell, name) => {
    expect(told(await csv(`${HEADER}\n${row(cell)}\n${row('NEXT')}\n`))).toEqual([
      [2, name],
      [3, 'NEXT'],
    ])
  })

  test('quotes that leave no way to the cells of the header are refused, as are cells too many or few', async () => {
    const text = [HEADER, row('RAY "CHIEF, TONEY"'), row('A,B'), '1', row('"A, B",C'), row('"A,B"')].join(
      '\n',
    )
    expect(told(await csv(text))).toEqual([
      [2, '! quote-unreadable'],
      [3, '! cells-too-many'],
      [4, '! cells-missing'],
      [5, '! cells-too-many'],
      [6, 'A,B'],
    ])
    const [first] = await csv(text)
    expect(first!.rejected).toMatchObject({ time: 1641168003, mmsi: '299000001' })
  })

  test('quotes that hide a delimiter by chance give way to the cells of the header', async () => {
    const hidden = 'vessel_name,mmsi,time,lat,lon,sog_kn,imo\n"A,299000001,2022-01-03T00:00:03Z,52.1,5.1,9,B"'
    expect(told(await csv(hidden))).toEqual([[2, '"A']])
  })

  test('a line of 70 KB, bytes that are not UTF-8 and NULs are told, and reading goes on', async () => {
    const text = Buffer.concat([
      Buffer.from(`${HEADER}\n${row('x'.repeat(70_000))}\n${row('A')}\n`),
      Buffer.from(row('B?'), 'latin1').fill(0xff, 32, 33),
      Buffer.from(`\n${row('\0')}\n${row('x').replace('52.1', '5\0')}\n${row('y'.repeat(60_000))}`),
    ])
    for (const size of [997, 65_536, 1_000_000]) {
      const rows = await csv(text, size)
      expect(rows.map(({ report, rejected }) => rejected?.reason ?? report?.line)).toEqual([
        'line-too-long',
        3,
        4,
        5,
        'number-unreadable',
        7,
      ])
      expect(rows[3]!.report?.name).toBe('\0')
      expect(rows[5]!.report?.name).toHaveLength(60_000)
    }
  })

  test('the cap on a line counts bytes', async () => {
    const letters = (count: number) => `${HEADER}\n${row('é'.repeat(count))}\n`
    const other = Buffer.byteLength(row(''))
    const most = Math.floor((65_536 - other) / 2)
    expect((await csv(letters(most)))[0]!.report?.line).toBe(2)
    expect((await csv(letters(most + 1)))[0]!.rejected?.reason).toBe('line-too-long')
  })

  test('columns that are ignored are listed', async () => {
    const log = readLogCsv(pieces(`${HEADER},rot,__proto__,rot\n${row('A')},1,2,3\n`, 10))
    expect(told(await all(log))).toEqual([[2, 'A']])
    expect(log.ignoredColumns()).toEqual(['rot', '__proto__'])
  })

  test.each([
    ['', 'malformed-csv'],
    ['\n\r\n', 'malformed-csv'],
    ['a,b\n1,2\n', 'invalid-request'],
    [`${HEADER},SOG\n`, 'invalid-request'],
    ['x'.repeat(70_000), 'line-too-long'],
    ['\0\0\0', 'invalid-request'],
  ])('a header that cannot be used is a fault before the first row', async (text, code) => {
    const fault: unknown = await readLogCsv(pieces(text, 1000))
      .rows[Symbol.asyncIterator]()
      .next()
      .catch((error: unknown) => error)
    expect(fault).toBeInstanceOf(Fault)
    expect((fault as Fault).code).toBe(code)
  })

  test('the fault of a header names its columns and line', async () => {
    const fault = (await csv('\ntime,lat,latitude,lon,mmsi\n').catch((error: unknown) => error)) as Fault
    expect(fault.parts.errors).toMatchObject([
      { parameter: 'latitude', code: 'clash', line: 2 },
      { parameter: 'sog_kn', code: 'required', line: 2 },
    ])
  })

  test('a body that breaks off is a fault of the request', async () => {
    const broken = Readable.from(
      (function* () {
        yield Buffer.from(`${HEADER}\n`)
        throw new Error('aborted')
      })(),
      { objectMode: true },
    )
    await expect(all(readLogCsv(broken))).rejects.toMatchObject({ code: 'invalid-request' })
  })
})

test('cells written as RFC 4180 says are read as a parser of it reads them', () => {
  const cell = fc.string({ unit: fc.constantFrom('a', '"', ',', ';', ' ', '5') })
  const write = (text: string) => (/[",;]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text)
  fc.assert(
    fc.property(fc.array(cell, { minLength: 1 }), (cells) => {
      const line = cells.map(write).join(',')
      fc.pre(line.trim() !== '')
      const records: string[][] = parse(line)
      expect(cellsOfLine(line, ',')).toEqual(records[0])
    }),
  )
})

test('any line has one cell more than it has delimiters at most, and all its other letters', () => {
  fc.assert(
    fc.property(fc.string({ unit: fc.constantFrom('a', '"', ',') }), (line) => {
      const cells = cellsOfLine(line, ',')
      expect(cells.length).toBeLessThanOrEqual(line.split(',').length)
      expect(cells.join('').replaceAll(/[",]/g, '')).toBe(line.replaceAll(/[",]/g, ''))
    }),
  )
})

describe('NDJSON', () => {
  const item = (changes: object = {}) =>
    JSON.stringify({
      time: '2022-01-03T00:00:03Z',
      mmsi: '299000001',
      lat: 52.1,
      lon: 5.1,
      sog_kn: 9,
      ...changes,
    })

  test.each([1, 7, 1000])('lines in pieces of %i bytes, one row each', async (size) => {
    const text = `\ufeff${item({ name: 'Å' })}\r\n\n \t\n${item({ NAME: '船' })}\n{"time":\n[]\n"a"\n${item({ sog_kn: '0x10' })}`
    expect(told(await ndjson(text, size))).toEqual([
      [1, 'Å'],
      [4, '船'],
      [5, '! not-json'],
      [6, '! not-json'],
      [7, '! not-json'],
      [8, '! number-unreadable'],
    ])
  })

  test('a long line and one that is not UTF-8 are rejected rows', async () => {
    const text = Buffer.concat([
      Buffer.from(`${item({ name: 'x'.repeat(70_000) })}\n`),
      Buffer.from([0x22, 0xff, 0x22, 0x0a]),
      Buffer.from(`{"a":NaN}\n{"a":1e400}\n${item()}`),
    ])
    expect((await ndjson(text)).map(({ report, rejected }) => rejected?.reason ?? report?.line)).toEqual([
      'line-too-long',
      'not-utf-8',
      'not-json',
      'time-missing',
      5,
    ])
  })

  test('unknown keys are listed once, a hundred at most and cut short', async () => {
    const many = Array.from({ length: 150 }, (_, i) => item({ [`key ${i}`]: i, 'rate of turn': 1 }))
    const log = readLogNdjson(pieces([item({ ['k'.repeat(1000)]: 1 }), ...many].join('\n'), 1000))
    expect(await all(log)).toHaveLength(151)
    const names = log.ignoredColumns()
    expect(names).toHaveLength(100)
    expect(names.slice(0, 4)).toEqual(['k'.repeat(64), 'key 0', 'rate of turn', 'key 1'])
  })

  test('no rows are no fault', async () => {
    expect(await ndjson('')).toEqual([])
  })
})

/** Open data beside the repository; absent elsewhere. */
const FOLDER = new URL('../../../shared/data/', import.meta.url)

interface Totals {
  rejected: Record<string, number>
  mobiles: Record<string, number>
  /** rows without the figure */
  without: Record<string, number>
  reports: number
  seconds: number
  knots: number
}

async function totals(name: string): Promise<Totals & { ignored: string }> {
  const log = readLogCsv(createReadStream(new URL(name, FOLDER)))
  const sum: Totals = { rejected: {}, mobiles: {}, without: {}, reports: 0, seconds: 0, knots: 0 }
  const count = (into: Record<string, number>, key: string) => (into[key] = (into[key] ?? 0) + 1)
  for (const { report, rejected } of await all(log)) {
    if (rejected) {
      count(sum.rejected, rejected.reason)
      continue
    }
    sum.reports += 1
    sum.seconds += report.time
    sum.knots += Number.isNaN(report.speed) ? 0 : report.speed / (1852 / 3600)
    count(sum.mobiles, report.mobile)
    for (const [key, value] of Object.entries(report)) {
      if (Number.isNaN(value) && !/^(convoy|water|current)/.test(key)) count(sum.without, key)
    }
  }
  return { ...sum, knots: Math.round(sum.knots * 10) / 10, ignored: log.ignoredColumns().join() }
}

// counted with a csv module and a calendar of another language
describe.skipIf(!existsSync(FOLDER))('logs of open publications are read to the last row', () => {
  test('4,095 rows of a US day on a canal', async () => {
    expect(await totals('ais_us_2022-01-03_giww_west.csv')).toEqual({
      rejected: {},
      mobiles: { vessel: 4095 },
      without: {
        course: 325,
        heading: 1965,
        length: 302,
        beam: 889,
        draught: 3099,
        shipType: 125,
        navigationStatus: 45,
      },
      reports: 4095,
      seconds: 6720585621429,
      knots: 4021.7,
      ignored: 'IMO,CallSign,Cargo',
    })
  })

  test('1,000 raw rows with marks of what is not available, and an MMSI of eight digits', async () => {
    expect(await totals('ais_us_2023-01-11_raw_sentinels.csv')).toEqual({
      rejected: { 'speed-not-available': 4, 'mmsi-unreadable': 1 },
      mobiles: { vessel: 994, 'base-station': 1 },
      without: {
        course: 86,
        heading: 425,
        length: 63,
        beam: 169,
        draught: 607,
        shipType: 15,
        navigationStatus: 46,
      },
      reports: 995,
      seconds: 1665028487344,
      knots: 2797.5,
      ignored: 'IMO,CallSign,Cargo',
    })
  })

  test('138 rows of a Danish second, base stations and buoys among them', async () => {
    expect(await totals('ais_dk_2018-06-01_head.csv')).toEqual({
      rejected: { 'speed-not-available': 10 },
      mobiles: { vessel: 116, 'base-station': 8, 'aid-to-navigation': 4 },
      without: {
        speed: 12,
        course: 14,
        heading: 34,
        length: 123,
        beam: 123,
        draught: 128,
        shipType: 126,
        navigationStatus: 28,
      },
      reports: 128,
      seconds: 195559833600,
      knots: 640.9,
      ignored: 'ROT,IMO,Callsign,Cargo type,Type of position fixing device,Destination,ETA,Data source type',
    })
  })
})

test('the columns are told to callers', async () => {
  const { app } = buildTestApp([passageColumnRoutes])
  const response = await app.inject('/v1/passages/columns')
  expect(response.statusCode).toBe(200)
  const { items } = response.json<{ items: Record<string, unknown>[] }>()
  expect(items).toHaveLength(22)
  expect(items[1]).toMatchObject({ field: 'mmsi', required: false, one_of: ['mmsi', 'eni'] })
  expect(items[6]).toEqual({
    field: 'sog_kn',
    names: ['sog_kn', 'sog', 'sog_knots', 'speed_kn', 'speed_knots', 'speed_over_ground_kn'],
    unit: 'kn',
    missing: 'empty, Unknown, Undefined, Unknown value, null, None, NaN, NA, N/A, 102.2 or more',
    required: true,
  })
})
