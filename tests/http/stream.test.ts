import { once } from 'node:events'
import { request as httpRequest, type ClientRequest, type IncomingMessage } from 'node:http'
import type { AddressInfo } from 'node:net'
import { setTimeout as wait } from 'node:timers/promises'
import { gunzipSync, gzipSync } from 'node:zlib'
import { parse } from 'csv-parse/sync'
import { pino } from 'pino'
import { afterAll, describe, expect, onTestFinished, test } from 'vitest'
import { buildApp } from '../../src/app.ts'
import { readConfig } from '../../src/config.ts'
import type { App } from '../../src/http/app-type.ts'
import { serviceRoutes } from '../../src/http/service-routes.ts'
import { serviceParts } from '../../src/parts.ts'
import type { Registry } from '../../src/store/registry.ts'
import { PLAIN, REQUESTS } from '../support/requests.ts'
import {
  buildService,
  expectOneSpeed,
  expectProblem,
  faultsOf,
  linesOf,
  nullsIn,
  post,
  speedsIn,
  stream,
  type Json,
} from '../support/service.ts'

const { app, replyTo } = buildService(afterAll)
await app.ready()
const Line = replyTo('POST', '/v1/advisories/stream')

const URL_PATH = '/v1/advisories/stream'
const NDJSON = { 'content-type': 'application/x-ndjson' }
const CSV = { 'content-type': 'text/csv' }
const GOOD = JSON.stringify(PLAIN)

const HEADER = 'segment_id,vessel_class'
const ROW = 'harrow-long-pound,cemt-iv'

const rowsOf = (text: string): Record<string, string>[] => parse(text, { columns: true })

/** Line number and code of each line out. */
const outcomes = (lines: readonly Json[]) =>
  lines.map((line) => [line['line'], (line['problem'] as Json | undefined)?.['code'] ?? line['outcome']])

describe('lines of JSON', () => {
  test('each has a line out of documented fields alone, with units that agree and no null', async () => {
    const lines = await stream(app, '', Object.values(REQUESTS))
    expect(lines).toHaveLength(Object.keys(REQUESTS).length)
    for (const [i, line] of lines.entries()) {
      expect(Line.safeParse(line).error?.issues ?? []).toEqual([])
      expect(line['line']).toBe(i + 1)
      expect(nullsIn(line)).toEqual([])
      for (const speed of speedsIn(line)) expectOneSpeed(speed)
    }
  })

  test('each has a flat row of documented columns alone when it is asked for', async () => {
    for (const line of await stream(app, '?detail=compact', Object.values(REQUESTS))) {
      expect(Line.safeParse(line).error?.issues ?? []).toEqual([])
      expect(Object.keys(line)).toHaveLength(32)
    }
  })

  test('are numbered as they stand in the body: blank ones are counted and skipped', async () => {
    const text = `\n${GOOD}\n\r\n   \n\t\n${GOOD}\r\n\n${GOOD}`
    const reply = await post(app, URL_PATH, text, NDJSON)
    expect(linesOf(reply.body).map(({ line }) => line)).toEqual([2, 6, 8])
  })

  test('that are bad have a problem each, amid good ones, and never end the stream', async () => {
    const bad = [
      '{"segment":',
      'null',
      '[]',
      '7',
      '"text"',
      '{}',
      JSON.stringify({ ...PLAIN, depth: 4 }),
      JSON.stringify({ ...PLAIN, vessel: { class: 'cemt-iv', draught_m: 4 } }),
      JSON.stringify({ ...PLAIN, vessel: { class: 'cemt-9' } }),
      JSON.stringify({ ...PLAIN, segment: { id: 'nowhere' } }),
      JSON.stringify({ ...PLAIN, options: { calibration_id: 'fit-1' } }),
      JSON.stringify({ ...PLAIN, label: 'x'.repeat(70_000) }),
      Buffer.from([0x22, 0xff, 0xfe, 0x22]),
      '['.repeat(10_000),
      `{"segment":${'{"a":'.repeat(5_000)}1${'}'.repeat(5_000)}}`,
    ]
    const text = Buffer.concat(bad.flatMap((line) => [Buffer.from(line), Buffer.from(`\n${GOOD}\n`)]))
    const reply = await post(app, URL_PATH, text, NDJSON)
    expect(reply.statusCode).toBe(200)
    const lines = linesOf(reply.body)
    expect(outcomes(lines.filter((_, i) => i % 2 === 0))).toEqual([
      [1, 'malformed-json'],
      [3, 'invalid-request'],
      [5, 'invalid-request'],
      [7, 'invalid-request'],
      [9, 'invalid-request'],
      [11, 'invalid-request'],
      [13, 'invalid-request'],
      [15, 'impossible-input'],
      [17, 'vessel-class-not-found'],
      [19, 'segment-not-found'],
      [21, 'calibration-not-found'],
      [23, 'line-too-long'],
      [25, 'malformed-json'],
      [27, 'malformed-json'],
      [29, 'invalid-request'],
    ])
    const single = (await post(app, '/v1/advisories', PLAIN)).json<Json>()
    for (const [i, line] of lines.filter((_, j) => j % 2 === 1).entries())
      expect(line).toEqual({ line: 2 * i + 2, ...single })
    for (const line of lines) expect(Line.safeParse(line).error?.issues ?? []).toEqual([])
  })

  test('tell the faults of a line with the request id of the stream', async () => {
    const reply = await post(app, URL_PATH, '{"vessel":{"class":"cemt-iv"}}', {
      ...NDJSON,
      'x-request-id': 'night-run',
    })
    expect(linesOf(reply.body)).toMatchObject([
      {
        line: 1,
        problem: {
          status: 400,
          instance: 'urn:request:night-run',
          errors: [{ pointer: '#/segment', code: 'required' }],
        },
      },
    ])
  })

  test('of the longest length allowed are read, and one byte more is too long', async () => {
    const padded = (length: number): string => {
      const text = JSON.stringify({ ...PLAIN, segment: { ...PLAIN.segment, attributes: {} } })
      return text + ' '.repeat(length - text.length)
    }
    const reply = await post(app, URL_PATH, `${padded(65_536)}\n${padded(65_537)}\n`, NDJSON)
    const [longest, tooLong] = linesOf(reply.body)
    expect(longest).toMatchObject({ line: 1, outcome: 'limited' })
    expect(tooLong).toMatchObject({ line: 2, problem: { status: 413, facts: { limit: 65_536 } } })
  })

  test('that are none at all have none out', async () => {
    const reply = await post(app, URL_PATH, '', NDJSON)
    expect([reply.statusCode, reply.body]).toEqual([200, ''])
  })

  test('echo a label, also of a flat row that is bad', async () => {
    const lines = [
      { ...PLAIN, label: 'a' },
      { label: 'b', segment: 3 },
      { label: 7, segment: 3 },
    ]
    expect((await stream(app, '?detail=compact', lines)).map(({ label }) => label)).toEqual(['a', 'b', null])
  })
})

describe('rows of CSV', () => {
  const ask = (text: string | Buffer, query = '', headers = {}) =>
    post(app, `${URL_PATH}${query}`, text, { ...CSV, ...headers })

  test('are numbered by the physical line on which they start', async () => {
    const reply = await ask(`${HEADER},label\r\n\r\n${ROW},"two\r\nlines"\r\n${ROW},one\r\n`)
    expect(rowsOf(reply.body).map(({ line, label }) => [line, label])).toEqual([
      ['3', 'two\nlines'],
      ['5', 'one'],
    ])
  })

  test('end in CR and LF, whatever the ends of those in', async () => {
    const reply = await ask(`${HEADER}\n${ROW}\n`)
    expect(reply.body.split('\r\n')).toHaveLength(3)
    expect(reply.body.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/)
    expect(reply.headers['content-type']).toBe('text/csv; charset=utf-8')
  })

  test('may be delimited by semicolons, quoted, and begin with a byte order mark', async () => {
    const reply = await ask(
      `\ufeff"vessel_class";segment_id;label\r\n"cemt-iv";"harrow-long-pound";"a;""b"""\r\n`,
    )
    expect(rowsOf(reply.body)).toMatchObject([{ line: '2', outcome: 'limited', label: 'a;"b"' }])
  })

  test('disarm a label that a spreadsheet would run', async () => {
    const labels = ['=1+1', '+1', '-1', '@SUM(A1)', '\tx', 'a=1']
    const text = labels.map((label) => `${ROW},"${label}"\r\n`).join('')
    const reply = await ask(`${HEADER},label\r\n${text}`)
    // Blanks around a cell are not part of it.
    expect(rowsOf(reply.body).map(({ label }) => label)).toEqual([
      "'=1+1",
      "'+1",
      "'-1",
      "'@SUM(A1)",
      'x',
      'a=1',
    ])
  })

  test('disarm a problem that quotes a formula', async () => {
    const reply = await ask(`${HEADER}\r\n=cmd,cemt-iv\r\n`)
    const [row] = rowsOf(reply.body)
    expect(row).toMatchObject({ problem_code: 'invalid-request' })
    for (const cell of Object.values(row!)) expect(cell).not.toMatch(/^[=+\-@\t\r]/)
  })

  test('negative figures stay figures', async () => {
    const reply = await ask(`${HEADER},current_mps\r\n${ROW},-0.5\r\n`)
    expect(rowsOf(reply.body)).toMatchObject([{ current_mps: '-0.5', outcome: 'limited' }])
  })

  test('that are bad have a problem each that names the column, amid good ones', async () => {
    const rows = [
      'harrow-long-pound,cemt-9,',
      'nowhere,cemt-iv,',
      'harrow-long-pound,cemt-iv,deep',
      'harrow-long-pound,cemt-iv,-1',
      'harrow-long-pound,cemt-iv,NaN',
      'harrow-long-pound,cemt-iv,1e999',
      'harrow-long-pound,cemt-iv,9,9',
      'harrow-long-pound',
      'harrow"long,cemt-iv,',
      `harrow-long-pound,${'x'.repeat(70_000)},`,
      'harrow-long-pound,,',
      'harrow-long-pound,cemt-iv,0.31',
    ]
    const text = rows.map((row) => `${row}\r\n${ROW},\r\n`).join('')
    const found = rowsOf((await ask(`${HEADER},depth_m\r\n${text}`)).body)
    expect(found.map(({ line }) => Number(line))).toEqual(Array.from({ length: 24 }, (_, i) => i + 2))
    expect(found.filter((_, i) => i % 2 === 0).map((row) => row['problem_code'])).toEqual([
      'vessel-class-not-found',
      'segment-not-found',
      'invalid-request',
      'invalid-request',
      'invalid-request',
      'invalid-request',
      'malformed-csv',
      'malformed-csv',
      'malformed-csv',
      'line-too-long',
      'invalid-request',
      'impossible-input',
    ])
    expect(found[4]?.['problem_detail']).toMatch(/^depth_m /)
    expect(found.filter((_, i) => i % 2 === 1).every((row) => row['outcome'] === 'limited')).toBe(true)
  })

  test.each([
    ['', 'malformed-csv', []],
    ['\r\n\r\n', 'malformed-csv', []],
    ['segment_id,vessel\r\n', 'invalid-request', ['vessel unknown-field']],
    ['segment_id,segment_id\r\n', 'invalid-request', ['segment_id clash']],
    ['a,b,label\r\n', 'invalid-request', ['a unknown-field', 'b unknown-field']],
    ['"segment_id,label\r\n', 'malformed-csv', []],
    [`${'x'.repeat(70_000)}\r\n`, 'line-too-long', []],
  ] as const)('with the header %j are refused before the first row', async (header, code, faults) => {
    const status = code === 'line-too-long' ? 413 : 400
    const problem = expectProblem(
      await ask(header.trim() === '' ? header : `${header}${ROW}\r\n`),
      status,
      code,
    )
    expect(faultsOf(problem)).toEqual(faults)
  })

  test('a header fault tells its line and the nearest column', async () => {
    const problem = expectProblem(await ask(`\r\nsegment_id,depth\r\n${ROW}\r\n`), 400, 'invalid-request')
    expect(problem.errors).toMatchObject([{ parameter: 'depth', line: 2, code: 'unknown-field' }])
    expect(problem.errors?.[0]?.allowed?.[0]).toBe('depth_m')
    expect(problem.errors?.[0]?.allowed).toHaveLength(26)
  })

  test('take every column of the contract, in any order', async () => {
    const cells = {
      sign_step: '0.5',
      sign_unit: 'kn',
      direction: 'upstream',
      current_mps: '0.2',
      water_level_m: '0.1',
      max_speed_kmh: '16',
      hull: 'displacement',
      block_coefficient: '0.85',
      draught_m: '2',
      beam_m: '8',
      length_m: '70',
      loading: '',
      vessel_class: '',
      confinement: 'confined',
      min_under_keel_clearance_m: '0.3',
      max_wave_height_m: '0.25',
      slope_h_per_v: '',
      bottom_width_m: '30',
      bank_kind: 'riprap',
      right_distance_m: '30',
      left_distance_m: '25',
      bank_distance_m: '',
      width_m: '',
      depth_m: '4',
      segment_id: '',
      label: 'all',
    }
    const reply = await ask(`${Object.keys(cells).join(',')}\r\n${Object.values(cells).join(',')}\r\n`)
    expect(rowsOf(reply.body)).toMatchObject([
      {
        line: '2',
        label: 'all',
        outcome: 'limited',
        direction: 'upstream',
        sign_unit: 'kn',
        problem_code: '',
      },
    ])
  })
})

describe('the form of the reply', () => {
  test.each([
    // sent, query, accept, received
    ['ndjson', '', undefined, 'ndjson', 'full'],
    ['ndjson', '', '*/*', 'ndjson', 'full'],
    ['ndjson', '?detail=compact', undefined, 'ndjson', 'compact'],
    ['ndjson', '?detail=full', undefined, 'ndjson', 'full'],
    ['ndjson', '', 'text/csv', 'csv', 'compact'],
    ['ndjson', '?format=csv', 'application/x-ndjson', 'csv', 'compact'],
    ['ndjson', '?format=csv&detail=full', undefined, 'csv', 'compact'],
    ['csv', '', undefined, 'csv', 'compact'],
    ['csv', '', '*/*', 'csv', 'compact'],
    ['csv', '', 'application/x-ndjson', 'ndjson', 'compact'],
    ['csv', '?format=ndjson', undefined, 'ndjson', 'compact'],
    ['csv', '?format=ndjson&detail=full', undefined, 'ndjson', 'compact'],
  ] as const)('%s with %j and accept %j is %s, %s', async (sent, query, accept, received, detail) => {
    const body = sent === 'csv' ? `${HEADER}\r\n${ROW}\r\n` : GOOD
    const headers = { ...(sent === 'csv' ? CSV : NDJSON), ...(accept && { accept }) }
    const reply = await post(app, `${URL_PATH}${query}`, body, headers)
    expect(reply.statusCode).toBe(200)
    expect(reply.headers.vary).toContain('Accept, Authorization')
    if (received === 'csv') {
      expect(reply.headers['content-type']).toBe('text/csv; charset=utf-8')
      expect(rowsOf(reply.body)).toHaveLength(1)
    } else {
      expect(reply.headers['content-type']).toBe('application/x-ndjson')
      const [line] = linesOf(reply.body)
      expect('criteria' in line!).toBe(detail === 'full')
      expect('problem_code' in line!).toBe(detail === 'compact')
    }
  })

  test('that is not offered is 406, and a query that is wrong 400', async () => {
    const refused = await post(app, URL_PATH, GOOD, { ...NDJSON, accept: 'application/json' })
    expect(expectProblem(refused, 406, 'not-acceptable').facts).toEqual({
      available: ['application/x-ndjson', 'text/csv'],
    })
    const wrong = await post(app, `${URL_PATH}?detail=all&format=json&x=1`, GOOD, NDJSON)
    expect(faultsOf(expectProblem(wrong, 400, 'invalid-request')).sort()).toEqual([
      'detail not-in-list',
      'format not-in-list',
      'x unknown-field',
    ])
  })

  test.each(['application/json', 'text/plain', 'application/octet-stream', 'text/csvx'])(
    'a body of type %s is 415',
    async (type) => {
      const reply = await post(app, URL_PATH, GOOD, { 'content-type': type })
      expect(expectProblem(reply, 415, 'unsupported-media-type').facts).toEqual({
        accepted: ['application/x-ndjson', 'text/csv'],
      })
    },
  )

  test('a body in another encoding than gzip is 415, and one that is not gzip 400', async () => {
    const brotli = await post(app, URL_PATH, GOOD, { ...NDJSON, 'content-encoding': 'br' })
    expectProblem(brotli, 415, 'unsupported-media-type')
    const broken = await post(app, URL_PATH, GOOD, { ...NDJSON, 'content-encoding': 'gzip' })
    expectProblem(broken, 400, 'invalid-request')
  })

  test('gzip is read and written', async () => {
    const text = `${GOOD}\n`.repeat(50)
    const headers = { ...NDJSON, 'content-encoding': 'gzip', 'accept-encoding': 'gzip' }
    const reply = await post(app, URL_PATH, gzipSync(text), headers)
    expect(reply.headers['content-encoding']).toBe('gzip')
    const lines = linesOf(gunzipSync(reply.rawPayload).toString())
    expect(lines.map(({ line }) => line)).toEqual(Array.from({ length: 50 }, (_, i) => i + 1))
  })
})

interface Open {
  readonly sender: ClientRequest
  readonly reply: Promise<IncomingMessage>
}

async function open(
  target: App,
  headers: Record<string, string> = NDJSON,
  query = '?detail=compact',
): Promise<Open> {
  if (!target.server.listening) await target.listen({ host: '127.0.0.1', port: 0 })
  const { port } = target.server.address() as AddressInfo
  const sender = httpRequest({
    port,
    host: '127.0.0.1',
    method: 'POST',
    path: `${URL_PATH}${query}`,
    headers,
  })
  sender.on('error', () => undefined)
  onTestFinished(() => void sender.destroy())
  const reply = once(sender, 'response').then(([message]) => message as IncomingMessage)
  return { sender, reply }
}

/** Writes as fast as it is taken; false once nothing was taken for a while. */
async function write(sender: ClientRequest, text: string, patience: number): Promise<boolean> {
  if (sender.write(text)) return true
  return await Promise.race([once(sender, 'drain').then(() => true), wait(patience).then(() => false)])
}

const REGISTRY_LINE = `${JSON.stringify({ segment: { id: 'harrow-long-pound' }, vessel: { class: 'cemt-iv' } })}\n`

/** The service with a registry that counts what it is asked. */
function countingService(): { service: App; read: () => number } {
  const { service: made, ...parts } = serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:' }))
  let count = 0
  const counting = (registry: Registry): Registry => ({
    ...registry,
    findSegment: (id) => {
      count += 1
      return registry.findSegment(id)
    },
  })
  const store = { ...made.store, current: async () => counting(await made.store.current()) }
  const service = buildApp({
    ...parts,
    routes: serviceRoutes({ ...made, store }),
    log: pino({ level: 'silent' }),
  })
  onTestFinished(async () => {
    service.server.closeAllConnections()
    await service.close()
  })
  return { service, read: () => count }
}

describe('on a socket', () => {
  test.each([{}, { 'accept-encoding': 'gzip' }])(
    'with headers %j the answer begins before the request ends',
    async (more) => {
      const service = buildService()
      const { sender, reply } = await open(service.app, { ...NDJSON, ...more })
      sender.write(`${GOOD}\n`)
      const message = await reply
      expect(message.statusCode).toBe(200)
      await once(message, 'data')
      sender.write(`${GOOD}\n`)
      await once(message, 'data')
      sender.end()
      await once(message.resume(), 'end')
      expect(message.complete).toBe(true)
    },
  )

  test('a caller that reads nothing stops what it sends, and 100,000 lines take little memory', async () => {
    const service = buildService()
    const { sender, reply } = await open(service.app)
    // Not JSON from the second character on, which costs next to nothing to find out.
    const block = `0 ${'x'.repeat(180)}\n`.repeat(1000)
    let blocks = 0
    while (blocks < 100 && (await write(sender, block, 400))) blocks += 1
    // What was sent by then lies in the buffers of two sockets and of the service.
    expect(blocks).toBeLessThan(90)
    const before = process.memoryUsage().rss
    let highest = before
    let lines = 0
    const message = await reply
    message.on('data', (chunk: Buffer) => {
      for (let at = chunk.indexOf(10); at >= 0; at = chunk.indexOf(10, at + 1)) lines += 1
      highest = Math.max(highest, process.memoryUsage().rss)
    })
    const ended = once(message, 'end')
    // The block on which patience ended is in the buffer too.
    for (blocks += 1; blocks < 100; blocks += 1) await write(sender, block, 60_000)
    sender.end()
    await ended
    expect(lines).toBe(100_000)
    expect((highest - before) / 1e6).toBeLessThan(150)
  })

  test('lines that came in one piece are answered a few at a time', async () => {
    const { service, read } = countingService()
    const { sender, reply } = await open(service, NDJSON, '?detail=full')
    const text = REGISTRY_LINE.repeat(400)
    // As much as the service takes off a socket at once.
    expect(text.length).toBeLessThan(65_536)
    sender.end(text)
    const message = await reply
    expect(read()).toBeLessThan(200)
    await once(message.resume(), 'end')
    expect(read()).toBe(400)
  })

  test('a caller that goes away half-way ends the work', async () => {
    const { service, read } = countingService()
    const { sender, reply } = await open(service)
    sender.end(REGISTRY_LINE.repeat(50_000))
    const message = await reply
    await once(message, 'data')
    message.on('error', () => undefined)
    message.destroy()
    await wait(300)
    const soon = read()
    await wait(300)
    expect(read()).toBe(soon)
    expect(soon).toBeGreaterThan(0)
    expect(soon).toBeLessThan(50_000)
  })

  test('a stream far above the limit of other bodies is read to its end', async () => {
    const service = buildService()
    const { sender, reply } = await open(service.app)
    sender.end(`{"label":"${'x'.repeat(60_000)}"}\n`.repeat(50))
    const message = await reply
    expect(message.statusCode).toBe(200)
    const text = String(Buffer.concat(await message.toArray()))
    expect(linesOf(text)).toHaveLength(50)
  })
})
