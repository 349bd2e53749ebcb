import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { csvOf } from '../../scripts/passage-log/layouts.ts'
import type { InventedLog } from '../../scripts/passage-log/log.ts'
import type { TruthRow } from '../../scripts/passage-log/truth.ts'
import { check, inOrder, invent, passagesOf, percentile, type Checked } from '../support/passage-log.ts'
import { buildService, type Json, type Service } from '../support/service.ts'

/** Truths are measured after positions were rounded: what is left is the service's own arithmetic, m. */
const NEAR = 0.05
/** kn: what centimetres of distance are worth to a maximum, with much to spare. */
const SPEED_NEAR = 0.002

let service: Service
let log: InventedLog
let csv: string
let checked: Checked
const atEnd: (() => Promise<void>)[] = []

beforeAll(async () => {
  service = buildService((close) => atEnd.push(close))
  log = await invent(service.app, 20260504, 36)
  csv = csvOf(log.rows, 'plain')
  checked = await check(service.app, 'reports', csv)
})

afterAll(async () => {
  for (const close of atEnd) await close()
})

const matched = (): (readonly [TruthRow, Json])[] =>
  log.truth.rows.flatMap((truth, i) =>
    truth.status === 'matched' ? [[truth, checked.reports[i]!] as const] : [],
  )

/** Differences of a figure, row by row, where the truth says one. */
const differences = (field: keyof TruthRow): number[] =>
  matched().flatMap(([truth, report]) => {
    const [said, found] = [truth[field], report[field]]
    if (typeof said !== 'number') return []
    return [typeof found === 'number' ? Math.abs(found - said) : Infinity]
  })

describe('rows of a log with known truth', () => {
  test('each has one line in its order, and the status that was planted', () => {
    const found = checked.reports.map(({ line, mmsi, status }) => ({ line, mmsi, status }))
    expect(found).toEqual(log.truth.rows.map(({ line, mmsi, status }) => ({ line, mmsi, status })))
  })

  test('every status is planted', () => {
    expect(Object.entries(log.truth.by_status).filter(([, count]) => count === 0)).toEqual([])
    expect(log.truth.by_status.matched).toBeGreaterThan(1000)
  })

  test('segment, direction and class are true', () => {
    const of = ({ line, segment_id, direction, vessel_class }: Json | TruthRow) =>
      ({ line, segment_id, direction, vessel_class }) as Json
    expect(matched().map(([, report]) => of(report))).toEqual(matched().map(([truth]) => of(truth)))
  })

  test.each(['chainage_m', 'offset_m', 'bank_distance_left_m', 'bank_distance_right_m'] as const)(
    '%s is true within 5 cm',
    (field) => {
      const found = differences(field)
      expect(found.length).toBeGreaterThan(1000)
      expect(Math.max(...found)).toBeLessThan(NEAR)
    },
  )

  test('vessels that lie still are placed as truly', () => {
    const still = log.truth.rows.filter(({ status }) => status === 'stationary')
    expect(still.length).toBeGreaterThan(10)
    for (const truth of still) {
      const report = checked.reports[truth.line - 2]!
      expect(report['segment_id']).toBe(truth.segment_id)
      for (const field of ['chainage_m', 'offset_m'] as const) {
        expect(Math.abs(Number(report[field]) - truth[field]!), field).toBeLessThan(NEAR)
      }
      expect([report['verdict'], report['max_over_ground_kn']]).toEqual([null, null])
    }
  })

  test.each(['max_over_ground_kn', 'sailing_line_max_over_ground_kn'] as const)(
    '%s is that of a single advisory, at the true distances or on the sailing line',
    (field) => {
      const found = differences(field)
      expect(found.length).toBeGreaterThan(1000)
      expect(Math.max(...found)).toBeLessThan(SPEED_NEAR)
    },
  )

  test('the verdict, and what governs, are true', () => {
    const of = ({ line, verdict, governing_criterion, loading }: Json | TruthRow) =>
      ({ line, verdict, governing_criterion, ...(loading === 'empty' && { loading }) }) as Json
    expect(matched().map(([, report]) => of(report))).toEqual(matched().map(([truth]) => of(truth)))
    const verdicts = new Set(matched().map(([truth]) => truth.verdict))
    expect([...verdicts].sort()).toEqual(['depends-on-draught', 'exceeds', 'no-safe-speed', 'within'])
  })
})

/** Limits that are posted in the file of the waterway, kn; in the Docks a lower one for long vessels downstream. */
const POSTED: Readonly<Record<string, number>> = {
  'harrow-upper-reach': 8 / 1.852,
  'harrow-alder-bend': 7 / 1.852,
  'harrow-town-reach': 6 / 1.852,
  'harrow-docks': 6,
}

test('posted limits are told beside the maximum, with what is above them', () => {
  const posted = matched().filter(([{ segment_id }]) => POSTED[segment_id ?? ''] !== undefined)
  expect(posted.length).toBeGreaterThan(300)
  for (const [truth, report] of posted) {
    const isLong = truth.segment_id === 'harrow-docks' && truth.vessel_class === 'handysize'
    const limit = isLong && truth.direction === 'downstream' ? 4 : POSTED[truth.segment_id ?? '']!
    expect(report['posted_limit_kn']).toBeCloseTo(limit, 9)
    expect(report['posted_excess_kn']).toBeCloseTo(truth.over_ground_kn - limit, 9)
  }
  const without = matched().filter(([{ segment_id }]) => segment_id === 'harrow-tideway')
  expect(without.every(([, report]) => report['posted_limit_kn'] === null)).toBe(true)
})

test('what a vessel says of itself is said to be where its hull comes from', () => {
  const bases = matched().map(([truth, report]) => [truth.vessel_basis, report['vessel_basis']])
  expect(bases.filter(([said, found]) => said !== found)).toEqual([])
  expect(new Set(bases.map(([said]) => said)).size).toBe(4)
})

describe('planted exceedances', () => {
  test('every one is found and none is invented', () => {
    const told = ({ mmsi, segment_id, direction, certainty, start, end, ...rest }: Json) => ({
      ...{ mmsi, segment_id, direction, certainty, start, end },
      ...{ reports: rest['reports'], first_line: rest['first_line'], last_line: rest['last_line'] },
      ...{ duration_s: rest['duration_s'], vessel_class: rest['vessel_class'] },
    })
    const planted = inOrder(log.truth.events.map((event) => ({ ...event })))
    expect(inOrder(checked.events).map(told)).toEqual(planted.map(told))
    expect(planted.length).toBeGreaterThan(30)
  })

  test('figures are those of the planted ones', () => {
    const planted = inOrder(log.truth.events.map((event) => ({ ...event })))
    for (const [i, event] of inOrder(checked.events).entries()) {
      const truth = planted[i] as unknown as InventedLog['truth']['events'][number]
      const about = `${truth.mmsi} ${truth.start}`
      const near = (field: string, value: number, tolerance: number) => {
        expect(Math.abs(Number(event[field]) - value), `${about} ${field}`).toBeLessThan(tolerance)
      }
      near('peak_excess_kn', truth.peak_excess_kn, 0.01)
      near('mean_excess_kn', truth.mean_excess_kn, 0.01)
      near('distance_m', truth.distance_m, 0.01 * truth.distance_m)
      near(
        'peak_excess_kn',
        Number(event['peak_over_ground_kn']) - Number(event['peak_max_over_ground_kn']),
        1e-9,
      )
      expect(Number(event['confidence']), about).toBeGreaterThan(0.5)
      const peak = log.truth.rows.find(({ mmsi, time }) => mmsi === truth.mmsi && time === event['peak_time'])
      expect(peak?.over_ground_kn, about).toBeCloseTo(Number(event['peak_over_ground_kn']), 9)
    }
  })
})

describe('the summary', () => {
  test('counts each row once, by what became of it', () => {
    const reports = checked.summary['reports'] as Record<string, unknown>
    expect(reports['by_status']).toEqual(log.truth.by_status)
    expect(reports['read']).toBe(log.rows.length)
    const refused = log.truth.rows.filter(({ status }) => status === 'rejected')
    expect((reports['rejected'] as Json[]).map(({ line }) => line)).toEqual(refused.map(({ line }) => line))
  })

  test('counts vessels, passages and events', () => {
    const certain = log.truth.events.filter(({ certainty }) => certainty === 'certain').length
    expect(checked.summary).toMatchObject({
      vessels: new Set(matched().map(([{ mmsi }]) => mmsi)).size,
      passages: passagesOf(log.truth.rows).length,
      events: { certain, depends_on_draught: log.truth.events.length - certain },
    })
  })

  test('percentiles, histograms and shares of its groups are those of the true passages', () => {
    const passages = passagesOf(log.truth.rows)
    const groups = checked.summary['groups'] as (Json & {
      histogram_kn: { step: number; counts: number[] }
    })[]
    const keyOf = (group: Json) =>
      [group['segment_id'], group['vessel_class'], group['direction']].map(String).join(' ')
    expect(groups.map(keyOf).sort()).toEqual([...new Set(passages.map(({ key }) => key))].sort())
    for (const group of groups) {
      const own = passages.filter(({ key }) => key === keyOf(group))
      const speeds = own.map(({ speed }) => speed)
      const has = (verdict: string) =>
        own.filter(({ rows }) => rows.some((row) => row.verdict === verdict)).length
      expect(group['passages']).toBe(own.length)
      for (const share of [50, 85, 95]) {
        expect(group[`speed_p${share}_kn`]).toBeCloseTo(percentile(speeds, share / 100), 9)
      }
      const bins = new Map<number, number>()
      for (const speed of speeds)
        bins.set(Math.floor(speed / 0.5), (bins.get(Math.floor(speed / 0.5)) ?? 0) + 1)
      const { step, counts } = group.histogram_kn
      expect(step).toBe(0.5)
      expect(new Map([...counts.entries()].filter(([, count]) => count > 0))).toEqual(
        new Map([...bins].sort(([a], [b]) => a - b)),
      )
      expect(group['above_recommended_ratio']).toBeCloseTo(has('exceeds') / own.length, 12)
      expect(group['no_safe_speed_passages']).toBe(has('no-safe-speed'))
    }
  })
})
