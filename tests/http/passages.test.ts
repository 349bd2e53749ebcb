import { once } from 'node:events'
import { request as httpRequest } from 'node:http'
import { connect, type AddressInfo } from 'node:net'
import { setTimeout as wait } from 'node:timers/promises'
import { gunzipSync, gzipSync } from 'node:zlib'
import { parse } from 'csv-parse/sync'
import { describe, expect, onTestFinished, test } from 'vitest'
import { pino } from 'pino'
import { buildApp } from '../../src/app.ts'
import { readConfig } from '../../src/config.ts'
import type { App } from '../../src/http/app-type.ts'
import { serviceRoutes } from '../../src/http/service-routes.ts'
import { serviceParts } from '../../src/parts.ts'
import { JudgeThreads } from '../../src/threads/judge-threads.ts'
import { buildService, linesOf, post, type Json } from '../support/service.ts'

const PATH = '/v1/passages/check'
const CSV = { 'content-type': 'text/csv' }
const NDJSON = { 'content-type': 'application/x-ndjson' }

const HEADER = 'time,mmsi,lat,lon,sog_kn,cog_deg,ship_type,length_m,beam_m,draught_m,vessel_name'

/** A report of an invented vessel on the Long Pound, on its sailing line and going down it. */
const row = (minute: number, knots: number, mmsi = '299000001', name = 'HARROW HEN') => {
  // from (3.535649, 54.089108) to (3.548602, 54.086341), two vertices of its line
  const share = 0.1 + minute * 0.15
  const lon = (3.535649 + share * 0.012953).toFixed(6)
  const lat = (54.089108 - share * 0.002767).toFixed(6)
  const time = `2026-05-04T06:0${minute}:00Z`
  return `${time},${mmsi},${lat},${lon},${knots},110,79,84,9.4,2.4,${name}`
}
/** Four reports of which the middle two are fast: the recommended maximum there is between 3.5 and 4.5 kn. */
const LOG = [HEADER, row(0, 3), row(1, 7), row(2, 8), row(3, 3), ''].join('\n')

async function checked(app: App, log: string, query = ''): Promise<Json[]> {
  const reply = await post(app, `${PATH}${query}`, log, CSV)
  expect(reply.statusCode, reply.body.slice(0, 500)).toBe(200)
  return linesOf(reply.body)
}

describe('the answer', () => {
  test('is events and the summary when nothing is said, as the schema has them', async () => {
    const { app, replyTo } = buildService()
    const lines = await checked(app, LOG)
    const schema = replyTo('POST', PATH)
    for (const line of lines) expect(schema.safeParse(line).error?.issues ?? []).toEqual([])
    expect(lines.map(({ type }) => type)).toEqual(['event', 'summary'])
    expect(lines[0]).toMatchObject({
      mmsi: '299000001',
      reports: 2,
      first_line: 3,
      last_line: 4,
      duration_s: 60,
    })
    expect(lines[1]).toMatchObject({
      complete: true,
      from: '2026-05-04T06:00:00Z',
      to: '2026-05-04T06:03:00Z',
      vessels: 1,
      passages: 1,
      events: { certain: 1, depends_on_draught: 0 },
      parameters: { tolerance_kn: 0.5, detail: 'events', waterway: null },
    })
  })

  test('has a line for each row with all columns in their order, when reports are asked for', async () => {
    const { app, replyTo } = buildService()
    const lines = await checked(app, LOG, '?detail=reports')
    const schema = replyTo('POST', PATH)
    for (const line of lines) expect(schema.safeParse(line).error?.issues ?? []).toEqual([])
    const reports = lines.filter(({ type }) => type === 'report')
    expect(reports.map(({ line, verdict }) => [line, verdict])).toEqual([
      [2, 'within'],
      [3, 'exceeds'],
      [4, 'exceeds'],
      [5, 'within'],
    ])
    expect(Object.keys(reports[0] ?? {})).toEqual([
      ...'type line time mmsi eni vessel_name status reason segment_id chainage_m offset_m'.split(' '),
      ...'bank_distance_left_m bank_distance_right_m direction vessel_class loading length_m beam_m'.split(
        ' ',
      ),
      ...'draught_m vessel_basis over_ground_kn through_water_kn water_level_m current_mps outcome'.split(
        ' ',
      ),
      ...'governing_criterion max_over_ground_kn sailing_line_max_over_ground_kn excess_kn verdict'.split(
        ' ',
      ),
      ...'posted_limit_kn posted_excess_kn depth_froude_number critical_ratio wave_height_left_m'.split(' '),
      ...'wave_height_right_m wave_energy_left_j_per_m wave_energy_right_j_per_m cautions'.split(' '),
    ])
  })

  test('is that of a single advisory with the same distances to the banks', async () => {
    const { app } = buildService()
    const [report] = (await checked(app, LOG, '?detail=reports&water_level_m=0.2')) as [Json]
    const advisory = await post(app, '/v1/advisories', {
      segment: {
        id: 'harrow-long-pound',
        // the Long Pound is 55 m wide and its sailing line in the middle
        banks: {
          left: { distance_m: 27.5 + Number(report['offset_m']), kind: 'unprotected' },
          right: { distance_m: 27.5 - Number(report['offset_m']), kind: 'unprotected' },
        },
      },
      vessel: { class: 'cemt-iv', loading: 'laden', length_m: 84, beam_m: 9.4, draught_m: 2.4 },
      conditions: { water_level_m: 0.2, direction: 'downstream' },
    })
    const { recommended_max_speed } = advisory.json<{
      recommended_max_speed: { over_ground: { kn: number } }
    }>()
    expect(report['max_over_ground_kn']).toBeCloseTo(recommended_max_speed.over_ground.kn, 9)
    // natural banks 1:3: a fifth of a metre up is 0.6 m out
    expect(Number(report['bank_distance_left_m'])).toBeCloseTo(28.1 + Number(report['offset_m']), 9)
  })

  test.each([
    ['reports', 4, 'line'],
    ['events', 1, 'event_id'],
    ['summary', 1, 'segment_id'],
  ])('as CSV holds the table of %s', async (detail, rows, first) => {
    const { app } = buildService()
    const reply = await post(app, `${PATH}?detail=${detail}&format=csv`, LOG, CSV)
    expect(reply.headers['content-type']).toBe('text/csv; charset=utf-8')
    const table = parse<Json>(reply.body, { columns: true, record_delimiter: '\r\n' })
    expect(table).toHaveLength(rows)
    expect(Object.keys(table[0] ?? {})[0]).toBe(first)
  })

  test('a name that a spreadsheet would run is disarmed in CSV', async () => {
    const { app } = buildService()
    const log = [HEADER, row(1, 7, '299000001', '=1+1'), row(2, 8, '299000001', '=1+1')].join('\n')
    const reply = await post(app, `${PATH}?format=csv`, log, CSV)
    const [event] = parse<Json>(reply.body, { columns: true })
    expect(event?.['vessel_name']).toBe("'=1+1")
  })

  test('is compressed for callers that take it so, a compressed log being taken too', async () => {
    const { app } = buildService()
    const reply = await app.inject({
      method: 'POST',
      url: `${PATH}?detail=reports`,
      payload: gzipSync(LOG),
      headers: { ...CSV, 'content-encoding': 'gzip', 'accept-encoding': 'gzip' },
    })
    expect(reply.headers['content-encoding']).toBe('gzip')
    expect(linesOf(gunzipSync(reply.rawPayload).toString()).at(-1)).toMatchObject({ type: 'summary' })
  })

  test('to a log of a header only is a summary of nothing', async () => {
    const { app } = buildService()
    const [summary] = await checked(app, `${HEADER}\n`)
    expect(summary).toMatchObject({ from: null, to: null, reports: { read: 0 }, passages: 0, groups: [] })
  })
  test.each(['reports', 'events', 'summary'])(
    'to a log of a header only is the head of the table of %s',
    async (detail) => {
      const { app } = buildService()
      const reply = await post(app, `${PATH}?detail=${detail}&format=csv`, `${HEADER}\n`, CSV)
      expect(reply.body).toMatch(/^[a-z_,0-9]+\r\n$/)
    },
  )
})

describe('parameters', () => {
  test('a tolerance as large as the excess leaves nothing to tell', async () => {
    const { app } = buildService()
    expect(await checked(app, LOG, '?tolerance_kn=6')).toHaveLength(1)
  })

  test('an event needs as many reports as are asked for', async () => {
    const { app } = buildService()
    expect(await checked(app, LOG, '?min_event_reports=3')).toHaveLength(1)
  })

  test('reports farther apart than the gap are no event together', async () => {
    const { app } = buildService()
    expect(await checked(app, LOG, '?max_gap_s=30')).toHaveLength(1)
  })

  test('a waterway leaves the segments of others out', async () => {
    const { app } = buildService()
    const [summary] = (await checked(app, LOG, '?waterway=Harrowmere%20Navigation&detail=summary')) as [Json]
    expect(summary).toMatchObject({ passages: 1 })
  })

  test('a waterway that no segment is of is refused with the nearest name', async () => {
    const { app } = buildService()
    const reply = await post(app, `${PATH}?waterway=Harowmere%20Navigation`, LOG, CSV)
    expect(reply.statusCode).toBe(400)
    expect(reply.json()).toMatchObject({
      code: 'invalid-request',
      errors: [{ parameter: 'waterway', code: 'not-in-list', allowed: ['Harrowmere Navigation'] }],
    })
  })

  test.each([
    'detail=rows',
    'tolerance_kn=-1',
    'max_gap_s=0',
    'min_event_reports=1.5',
    'tow_length_m=0',
    'speed=3',
  ])('%s is refused', async (query) => {
    const { app } = buildService()
    const reply = await post(app, `${PATH}?${query}`, LOG, CSV)
    expect(reply.statusCode).toBe(400)
    expect(reply.json()).toMatchObject({
      code: 'invalid-request',
      errors: [{ parameter: query.split('=')[0] }],
    })
  })

  test('the size of a convoy counts for towboats', async () => {
    const { app } = buildService()
    const log = [HEADER, row(1, 3).replace(',79,84,9.4,2.4,', ',31,23,8,2.6,')].join('\n')
    const [alone] = (await checked(app, log, '?detail=reports')) as [Json]
    expect(alone).toMatchObject({ vessel_basis: 'tow-hull-only', vessel_class: 'tug', length_m: 23 })
    expect(String(alone['cautions'])).toContain('convoy-size-unknown')
    const query = '?detail=reports&tow_length_m=95&tow_beam_m=10.7&tow_draught_m=2.5'
    const [pushed] = (await checked(app, log, query)) as [Json]
    expect(pushed).toMatchObject({
      vessel_basis: 'tow-override',
      vessel_class: 'tow-1-jumbo',
      draught_m: 2.5,
    })
    expect(Number(pushed['max_over_ground_kn'])).toBeLessThan(Number(alone['max_over_ground_kn']))
  })
})

describe('what cannot be read', () => {
  test('a header without the columns that are needed is refused, with what would do', async () => {
    const { app } = buildService()
    const reply = await post(app, PATH, 'time,lat,lon\n2026-05-04T06:00:00Z,54,3\n', CSV)
    expect(reply.statusCode).toBe(400)
    const { errors } = reply.json<{ errors: Json[] }>()
    expect(errors.map(({ parameter, code }) => [parameter, code])).toEqual(
      expect.arrayContaining([['sog_kn', 'required']]),
    )
  })

  test.each([
    ['', 'malformed-csv'],
    ['not a header\n', 'invalid-request'],
  ])('%j is refused', async (log, code) => {
    const { app } = buildService()
    const reply = await post(app, PATH, log, CSV)
    expect(reply.statusCode).toBe(400)
    expect(reply.json()).toMatchObject({ code })
  })

  test('bad rows are told by line and reason, and end nothing', async () => {
    const { app } = buildService()
    const bad = [
      row(1, 7).replace('2026-05-04T06:01:00Z', 'yesterday'),
      row(1, 7).replace('Z,', ','),
      row(1, 7).replace(',7,', ',fast,'),
      `${row(1, 7)},more`,
    ]
    const log = [HEADER, row(0, 3), ...bad, row(1, 7), row(2, 8)].join('\n')
    const lines = await checked(app, log)
    expect(lines.map(({ type }) => type)).toEqual(['event', 'summary'])
    expect(lines[1]).toMatchObject({
      reports: {
        read: 7,
        by_status: { matched: 3, rejected: 4 },
        rejected: [
          { line: 3, reason: 'time-unreadable' },
          { line: 4, reason: 'time-without-zone' },
          { line: 5, reason: 'number-unreadable' },
          { line: 6, reason: 'cells-too-many' },
        ],
      },
    })
  })

  test('a class of vessel that does not exist rejects its row', async () => {
    const { app } = buildService()
    const log = [`${HEADER},vessel_class`, `${row(0, 3)},cemt-ix`, `${row(1, 3)},cemt-iii`].join('\n')
    const lines = await checked(app, log, '?detail=reports')
    expect(lines[0]).toMatchObject({ status: 'rejected', reason: 'vessel-class-unknown' })
    expect(lines[1]).toMatchObject({
      status: 'matched',
      vessel_class: 'cemt-iii',
      vessel_basis: 'class-column',
    })
  })

  test('JSON is not a log', async () => {
    const { app } = buildService()
    const reply = await post(app, PATH, {}, { 'content-type': 'application/json' })
    expect(reply.statusCode).toBe(415)
  })

  test('a line that is not JSON is one rejected row of many', async () => {
    const { app } = buildService()
    const good = { time: '2026-05-04T06:00:00Z', mmsi: 299000001, lat: 54.088, lon: 3.54, sog: 3 }
    const reply = await post(app, PATH, `{"time":\n${JSON.stringify(good)}\n`, NDJSON)
    expect(linesOf(reply.body).at(-1)).toMatchObject({
      reports: { read: 2, rejected: [{ line: 1, reason: 'not-json' }] },
    })
  })
})

describe('found by trying it (2026-12-01)', () => {
  const columns = 'time,mmsi,lat,lon,sog_kn,cog_deg,ship_type,length_m,beam_m,draught_m'
  const reportsOf = async (...rows: string[]) => {
    const { app } = buildService()
    const lines = await checked(app, [columns, ...rows].join('\n'), '?detail=reports')
    return lines.filter(({ type }) => type === 'report')
  }

  test('a position beside a narrow cut is not taken for the end of the wide water behind it', async () => {
    // 90 m off the lower cut, some 950 m from the mere; 60 m off the aqueduct; 690 m past the sea reach
    const reports = await reportsOf(
      '2026-05-04T06:00:00Z,299000003,54.080276,3.662133,9,105,70,55,7,2.0',
      '2026-05-04T06:00:00Z,299000006,54.078804,3.577933,9,112,70,55,7,2.0',
      '2026-05-04T06:00:00Z,299000007,54.08210,3.8400,9,80,70,55,7,2.0',
    )
    expect(reports.map(({ status }) => status)).toEqual([
      'outside-fairway',
      'outside-fairway',
      'outside-fairway',
    ])
  })

  test('a draught of the class that the permitted one caps is told as it was computed with', async () => {
    const [report] = await reportsOf('2026-05-04T06:00:00Z,299000002,54.09130,3.52547,5,112,70,110,11.4,')
    // the permitted draught of the Long Pound; the class has 3.5 m
    expect(report).toMatchObject({ vessel_class: 'cemt-va', loading: 'laden', draught_m: 2.8 })
  })

  test('a stop that is told late ends an event as one told in time does', async () => {
    const { app } = buildService()
    const stop = '2026-05-04T06:01:00Z,299000001,54.09201,3.44075,0,131,70,55,7,2.0'
    const fast = [
      '2026-05-04T06:00:00Z,299000001,54.09267,3.43946,8,131,70,55,7,2.0',
      '2026-05-04T06:02:00Z,299000001,54.09135,3.44200,8,131,70,55,7,2.0',
    ]
    const eventsOf = async (...rows: string[]) =>
      (await checked(app, [columns, ...rows].join('\n'))).filter(({ type }) => type === 'event').length
    expect(await eventsOf(...fast)).toBe(1)
    expect(await eventsOf(stop, ...fast)).toBe(0)
  })

  test('a row that lacks a cell is not mended at the comma of its quoted name', async () => {
    const { app } = buildService()
    const header =
      'MMSI,BaseDateTime,LAT,LON,SOG,COG,Heading,VesselName,IMO,CallSign,VesselType,Status,Length,Width,Draft,Cargo,TransceiverClass'
    const cut = '299000002,2026-05-04T06:00:00,54.09267,3.43946,5,131,130,"WREN, HARROW",,,70,0,55,7,2.0,70'
    const [report] = await checked(app, `${header}\n${cut}\n`, '?detail=reports')
    expect(report).toMatchObject({ status: 'rejected', reason: 'cells-missing' })
  })

  test('a reply that has begun is broken off, not ended with a problem, when the rest is not HTTP', async () => {
    const { app } = buildService()
    await app.listen({ host: '127.0.0.1', port: 0 })
    const socket = connect((app.server.address() as AddressInfo).port, '127.0.0.1')
    onTestFinished(() => void socket.destroy())
    const chunk = LOG
    socket.write(
      `POST ${PATH}?detail=reports HTTP/1.1\r\nhost: x\r\ncontent-type: text/csv\r\ntransfer-encoding: chunked\r\n\r\n${Buffer.byteLength(chunk).toString(16)}\r\n${chunk}\r\n`,
    )
    let text = ''
    socket.on('data', (data) => (text += String(data)))
    await once(socket, 'data')
    socket.write('zz\r\n')
    await once(socket, 'close')
    expect(text.match(/HTTP\/1\.1/g)).toHaveLength(1)
    // the last chunk, which would make it look whole, never comes
    expect(text).not.toContain('\r\n0\r\n')
  })

  test('a long check is not cut off for want of traffic while it works', async () => {
    const { service, ...parts } = serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' }))
    class Slow extends JudgeThreads {
      override open(...given: Parameters<JudgeThreads['open']>) {
        const session = super.open(...given)
        return {
          judge: async (reports: Parameters<typeof session.judge>[0]) => {
            await wait(900)
            return session.judge(reports)
          },
          close: () => {
            session.close()
          },
        }
      }
    }
    const app = buildApp({
      ...parts,
      routes: serviceRoutes({ ...service, judges: new Slow({ threads: 0 }) }),
      log: pino({ level: 'silent' }),
    })
    onTestFinished(async () => {
      app.server.closeAllConnections()
      await app.close()
    })
    const url = await app.listen({ host: '127.0.0.1', port: 0 })
    app.server.setTimeout(200)
    const reply = await fetch(`${url}${PATH}`, { method: 'POST', headers: CSV, body: LOG })
    expect(linesOf(await reply.text()).at(-1)).toMatchObject({ type: 'summary' })
  })
})

describe('a caller that goes away', () => {
  /** The service with a count of what is judged. */
  async function countingService(): Promise<{ port: number; judged: () => number; open: () => number }> {
    const { service, ...parts } = serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' }))
    let judged = 0
    let open = 0
    class Counting extends JudgeThreads {
      override open(...given: Parameters<JudgeThreads['open']>) {
        const session = super.open(...given)
        open += 1
        return {
          judge: (reports: Parameters<typeof session.judge>[0]) => {
            judged += reports.length
            return session.judge(reports)
          },
          close: () => {
            open -= 1
            session.close()
          },
        }
      }
    }
    const routes = serviceRoutes({ ...service, judges: new Counting({ threads: 0 }) })
    const app = buildApp({ ...parts, routes, log: pino({ level: 'silent' }) })
    onTestFinished(async () => {
      app.server.closeAllConnections()
      await app.close()
    })
    await app.listen({ host: '127.0.0.1', port: 0 })
    return { port: (app.server.address() as AddressInfo).port, judged: () => judged, open: () => open }
  }

  test.each(['reports', 'events'])(
    'ends the work on %s within a second, and nothing is left open',
    async (detail) => {
      const { port, judged, open } = await countingService()
      const sender = httpRequest({
        port,
        host: '127.0.0.1',
        method: 'POST',
        path: `${PATH}?detail=${detail}`,
        headers: CSV,
      })
      sender.on('error', () => undefined)
      sender.write(`${HEADER}\n`)
      const rows = 50_000
      for (let i = 0; i < rows; i += 1) {
        if (!sender.write(`${row(i % 6, 7, String(299000000 + i))}\n`)) {
          await Promise.race([once(sender, 'drain'), wait(50)])
        }
        if (judged() > 2000) break
      }
      expect(open()).toBe(1)
      sender.destroy()
      await wait(1000)
      const soon = judged()
      expect(open()).toBe(0)
      await wait(300)
      expect(judged()).toBe(soon)
      expect(soon).toBeGreaterThan(0)
      expect(soon).toBeLessThan(rows)
    },
  )
})
