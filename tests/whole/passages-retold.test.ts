import { gzipSync } from 'node:zlib'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { csvOf, ndjsonOf } from '../../scripts/passage-log/layouts.ts'
import type { InventedLog } from '../../scripts/passage-log/log.ts'
import { randomOf } from '../../scripts/passage-log/random.ts'
import { byVessel, check, invent, withColumns, withoutLines, type Checked } from '../support/passage-log.ts'
import { buildService, type Service } from '../support/service.ts'

let service: Service
let log: InventedLog
let csv: string
let checked: Checked
const atEnd: (() => Promise<void>)[] = []

beforeAll(async () => {
  service = buildService((close) => atEnd.push(close))
  log = await invent(service.app, 7, 18)
  csv = csvOf(log.rows, 'plain')
  checked = await check(service.app, 'reports', csv)
  // what the others are held against is itself what was planted
  expect(checked.events.length).toBe(log.truth.events.length)
})

afterAll(async () => {
  for (const close of atEnd) await close()
})

/** Groups of a summary without the last digits of sums, which depend on the order of what is added up. */
const groupsOf = ({ summary }: Checked): unknown =>
  JSON.parse(
    JSON.stringify(summary['groups'], (key, value: unknown) =>
      typeof value === 'number' && key.includes('energy') ? value.toPrecision(12) : value,
    ),
  )

test('on the sailing line each row is held against the maximum there', async () => {
  const other = await check(service.app, 'reports', csv, {}, '&position=sailing-line')
  const judged = log.truth.rows.filter((row) => row.sailing_line_max_over_ground_kn !== null)
  expect(judged.length).toBeGreaterThan(500)
  for (const { line, over_ground_kn: speed, sailing_line_max_over_ground_kn: most } of judged) {
    const report = other.reports[line - 2]!
    expect(report['max_over_ground_kn'], String(line)).toBeCloseTo(most!, 6)
    expect(report['excess_kn'], String(line)).toBeCloseTo(speed - most!, 6)
    if (speed - most! <= log.truth.tolerance_kn) expect(report['verdict'], String(line)).toBe('within')
  }
})

describe('the same log told otherwise', () => {
  test.each(['events', 'summary'] as const)('detail=%s says the same of it', async (detail) => {
    const other = await check(service.app, detail, csv)
    expect(other.reports).toEqual([])
    expect(other.events).toEqual(detail === 'events' ? checked.events : [])
    const { reproducibility: _own, parameters: _how, ...summary } = checked.summary
    expect(other.summary).toMatchObject(summary)
  })

  test.each(['us-legacy', 'us-newer', 'danish'] as const)(
    'the layout %s gives the same events',
    async (layout) => {
      const other = await check(service.app, 'events', csvOf(log.rows, layout))
      expect(other.events).toEqual(checked.events)
      expect(other.summary['groups']).toEqual(checked.summary['groups'])
    },
  )

  test('columns in another order give the same events', async () => {
    const random = randomOf(7)
    const shuffled = withColumns(csv, (columns) =>
      Array.from({ length: columns }, (_, column) => ({ column, at: random.between(0, 1) }))
        .sort((a, b) => a.at - b.at)
        .map(({ column }) => column),
    )
    expect(shuffled.split('\n')[0]).not.toBe(csv.split('\n')[0])
    expect((await check(service.app, 'events', shuffled)).events).toEqual(checked.events)
  })

  test('vessels one after the other give the same events', async () => {
    const other = await check(service.app, 'events', byVessel(csv))
    expect(withoutLines(other.events)).toEqual(withoutLines(checked.events))
    expect(groupsOf(other)).toEqual(groupsOf(checked))
  })

  test('compressed it gives the same events', async () => {
    const other = await check(service.app, 'events', gzipSync(csv), { 'content-encoding': 'gzip' })
    expect(other.events).toEqual(checked.events)
  })

  test('as lines of JSON it gives the same events, a line earlier', async () => {
    const other = await check(service.app, 'events', ndjsonOf(log.rows), {
      'content-type': 'application/x-ndjson',
    })
    expect(withoutLines(other.events)).toEqual(withoutLines(checked.events))
    expect(other.events.map((event) => Number(event['first_line']) + 1)).toEqual(
      checked.events.map((event) => event['first_line']),
    )
    expect(other.summary['groups']).toEqual(checked.summary['groups'])
  })
})
