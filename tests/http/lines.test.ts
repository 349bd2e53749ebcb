import { once } from 'node:events'
import { request as httpRequest, type IncomingMessage } from 'node:http'
import type { AddressInfo } from 'node:net'
import { PassThrough, Readable } from 'node:stream'
import { setTimeout as wait } from 'node:timers/promises'
import { createGunzip, gzipSync } from 'node:zlib'
import { expect, test } from 'vitest'
import type { App } from '../../src/http/app-type.ts'
import { csvRow, writeCsv } from '../../src/http/csv-write.ts'
import { type CsvOptions, type CsvRow, readCsvRows } from '../../src/http/csv.ts'
import { acceptLines, bodyStream, type Line, type LineOptions, readLines } from '../../src/http/lines.ts'
import { sendStream } from '../../src/http/stream.ts'
import { buildTestApp } from '../support/app.ts'

/** The text cut into pieces of a few bytes, as a network may. */
function pieces(text: string | Buffer, size = 3): Readable {
  const bytes = Buffer.from(text)
  const cut = Array.from({ length: Math.ceil(bytes.length / size) }, (_, i) =>
    bytes.subarray(i * size, (i + 1) * size),
  )
  return Readable.from(cut, { objectMode: true })
}

async function all<Item>(batches: AsyncIterable<Item[]>): Promise<Item[]> {
  const items: Item[] = []
  for await (const batch of batches) items.push(...batch)
  return items
}

const lines = (text: string | Buffer, options?: LineOptions, size?: number): Promise<Line[]> =>
  all(readLines(pieces(text, size), options))
const rows = (text: string, options?: CsvOptions, size?: number): Promise<CsvRow[]> =>
  all(readCsvRows(pieces(text, size), options))

test.each([1, 2, 3, 7, 1000])('lines are cut the same from pieces of %i bytes', async (size) => {
  expect(await lines('\ufeffé\r\n\nb\r\n\r\nlast', {}, size)).toEqual([
    { number: 1, text: 'é' },
    { number: 2, text: '' },
    { number: 3, text: 'b' },
    { number: 4, text: '' },
    { number: 5, text: 'last' },
  ])
})

test('a line end at the end makes no further line, and no text makes none at all', async () => {
  expect(await lines('a\n')).toEqual([{ number: 1, text: 'a' }])
  expect(await lines('')).toEqual([])
})

test('a byte order mark is taken off once only', async () => {
  expect(await lines('\ufeff\ufeffa\n\ufeffb')).toEqual([
    { number: 1, text: '\ufeffa' },
    { number: 2, text: '\ufeffb' },
  ])
})

test('a line of 70 KB amid good ones is a fault of that line alone', async () => {
  const found = await lines(`a\n${'x'.repeat(70_000)}\nb\n${'y'.repeat(65_536)}\r\nc`, {}, 1000)
  expect(found.map((line) => line.fault?.code ?? line.text?.length)).toEqual([
    1,
    'line-too-long',
    1,
    65_536,
    1,
  ])
  expect(found[1]).toMatchObject({ number: 2, fault: { parts: { facts: { limit: 65_536 } } } })
  expect(found[4]).toEqual({ number: 5, text: 'c' })
})

test.each([5, 6, 7, 8, 9, 10, 11])('the cap of a line is exact for %i bytes', async (length) => {
  const [line] = await lines('x'.repeat(length), { maxBytes: 8 })
  expect(line?.fault?.code).toBe(length > 8 ? 'line-too-long' : undefined)
})

test('a line that is not UTF-8 is a fault of that line, or passes with replacement characters', async () => {
  const text = Buffer.from([0x61, 10, 0xff, 0xe9, 10, 0x62])
  const found = await lines(text)
  expect(found.map((line) => line.fault?.code ?? line.text)).toEqual(['a', 'malformed-json', 'b'])
  expect((await lines(text, { lenient: true }))[1]).toEqual({ number: 2, text: '\ufffd\ufffd' })
})

test('an endless line takes no memory', async () => {
  const chunk = Buffer.alloc(1_000_000, 'x')
  const source = Readable.from((function* () { for (let i = 0; i < 500; i += 1) yield chunk })()) // prettier-ignore
  const before = process.memoryUsage().rss
  const found = await all(readLines(source))
  expect(found.map((line) => line.fault?.code)).toEqual(['line-too-long'])
  expect(process.memoryUsage().rss - before).toBeLessThan(100_000_000)
})

test.each([',', ';'])('rows of CSV with %s are read with the line each starts on', async (delimiter) => {
  const text = '\ufefflabel|depth_m\r\n"a|""b""\nsecond"|1\r\n\r\n|-2.5\r\n'.replaceAll('|', delimiter)
  expect(await rows(text)).toEqual([
    { line: 2, fields: { label: `a${delimiter}"b"\nsecond`, depth_m: '1' } },
    { line: 5, fields: { label: '', depth_m: '-2.5' } },
  ])
})

test('a decimal comma survives where the delimiter is a semicolon', async () => {
  expect(await rows('a;"b,c,d"\n1,5;2\n')).toEqual([{ line: 2, fields: { a: '1,5', 'b,c,d': '2' } }])
})

test('rows that are not CSV are faults of those rows, and the rows around them are read', async () => {
  const found = await rows('a,b\n1,2\n1\n1,2,3\nx"y,1\n3,4\n5"6,7\n8,9\n"open,1\n10,11\n')
  expect(found.map((row) => [row.line, row.fault?.code ?? row.fields?.['a']])).toEqual([
    [2, '1'],
    [3, 'malformed-csv'],
    [4, 'malformed-csv'],
    [5, 'malformed-csv'],
    [6, 'malformed-csv'],
    [7, 'malformed-csv'],
    [8, '8'],
    [9, 'malformed-csv'],
    [10, '10'],
  ])
})

test('a quote that never ends costs its own row, not the rest of a long file', async () => {
  const text = `a,b\n"x,1\n${'2,3\n'.repeat(50_000)}`
  const found = await rows(text, {}, 10_000)
  expect(found).toHaveLength(50_001)
  expect(found[0]?.fault?.code).toBe('malformed-csv')
  expect(found.filter((row) => row.fault)).toHaveLength(1)
  expect(found.at(-1)).toEqual({ line: 50_002, fields: { a: '2', b: '3' } })
})

test('unknown, repeated and missing columns are all told before the first row', async () => {
  const options = { knownColumns: ['depth_m', 'width_m', 'label'], requiredColumns: ['width_m'] }
  await expect(rows('depht_m,label,label\n1,2,3\n', options)).rejects.toMatchObject({
    code: 'invalid-request',
    parts: {
      errors: [
        {
          parameter: 'depht_m',
          line: 1,
          code: 'unknown-field',
          detail: 'is not a known column; did you mean depth_m?',
          allowed: ['depth_m', 'width_m', 'label'],
        },
        { parameter: 'label', line: 1, code: 'clash', detail: 'is a column twice; keep one of them' },
        { parameter: 'width_m', line: 1, code: 'required', detail: 'is a required column' },
      ],
    },
  })
})

test.each(['', '\n\n', '"a'])('the text %j has no header', async (text) => {
  await expect(rows(text)).rejects.toMatchObject({ code: 'malformed-csv' })
})

test('CSV out disarms formulas in text and leaves numbers alone', () => {
  expect(csvRow(['=1+1', '+a', '-b', '@c', '\tt', '\rr', -0.5, '-0.5', null, true])).toBe(
    `'=1+1,'+a,'-b,'@c,'\tt,"'\rr",-0.5,'-0.5,,true\r\n`,
  )
  expect(writeCsv(['a', 'b'], [{ a: 'x,"y"', b: ['p', 'q'] }, { b: ' z' }])).toBe(
    'a,b\r\n"x,""y""",p;q\r\n," z"\r\n',
  )
  expect(() => csvRow([NaN])).toThrow(RangeError)
})

interface Watched {
  ended: boolean
  made: number
}

function streamRoutes(watched: Watched = { ended: false, made: 0 }) {
  return (app: App): void => {
    void app.register((scope: App, _options, done) => {
      acceptLines(scope)
      scope.post('/echo', (request, reply) => sendStream(reply.type('application/x-ndjson'), echo(request)))
      scope.post('/table', (request, reply) => sendStream(reply.type('text/csv'), table(request)))
      scope.post('/fail', (request, reply) => sendStream(reply.type('application/x-ndjson'), fail(request)))
      done()
    })
    app.get('/endless', (_request, reply) => sendStream(reply.type('application/x-ndjson'), endless(watched)))
  }
}

async function* echo(request: Parameters<typeof bodyStream>[0]): AsyncGenerator<string> {
  for await (const batch of readLines(bodyStream(request))) {
    for (const line of batch)
      yield `${JSON.stringify({ line: line.number, text: line.text ?? line.fault.code })}\n`
  }
}

async function* table(request: Parameters<typeof bodyStream>[0]): AsyncGenerator<string> {
  for await (const batch of readCsvRows(bodyStream(request), { knownColumns: ['depth_m'] })) {
    yield batch.map((row) => csvRow([row.line, row.fields?.['depth_m']])).join('')
  }
}

async function* fail(request: Parameters<typeof bodyStream>[0]): AsyncGenerator<string> {
  for await (const text of echo(request)) {
    if (text.includes('"bad"')) throw new Error('secret of the cellar')
    yield text
  }
}

async function* endless(watched: Watched): AsyncGenerator<string> {
  try {
    for (;;) {
      watched.made += 1
      yield `${'x'.repeat(9999)}\n`
      await wait(0)
    }
  } finally {
    watched.ended = true
  }
}

async function open(app: App, path: string, headers: Record<string, string> = {}, method = 'POST') {
  if (!app.server.listening) await app.listen({ host: '127.0.0.1', port: 0 })
  const { port } = app.server.address() as AddressInfo
  const sent = httpRequest({ port, host: '127.0.0.1', path, method, headers, agent: false })
  // a reset that a test brings about may reach the socket after the test has seen what it waits for
  sent.on('error', () => undefined)
  return sent
}

const ndjson = { 'content-type': 'application/x-ndjson' }

test('lines are answered while later ones are still to be sent', async () => {
  const { app } = buildTestApp([streamRoutes()])
  const sent = await open(app, '/echo', ndjson)
  sent.write('a\n')
  const [reply] = (await once(sent, 'response')) as [IncomingMessage]
  expect(String((await once(reply, 'data'))[0])).toBe('{"line":1,"text":"a"}\n')
  sent.end('b')
  expect(String((await once(reply, 'data'))[0])).toBe('{"line":2,"text":"b"}\n')
  await expect.poll(() => reply.complete).toBe(true)
})

test('gzip goes both ways line by line, nothing held back', async () => {
  const { app } = buildTestApp([streamRoutes()])
  const sent = await open(app, '/echo', { ...ndjson, 'content-encoding': 'gzip', 'accept-encoding': 'gzip' })
  // Two members make one gzip body: the first can be answered before the second is there.
  sent.write(gzipSync('a\n'))
  const [reply] = (await once(sent, 'response')) as [IncomingMessage]
  expect(reply.headers['content-encoding']).toBe('gzip')
  const decoded = reply.pipe(createGunzip())
  expect(String((await once(decoded, 'data'))[0])).toBe('{"line":1,"text":"a"}\n')
  sent.end(gzipSync('b\n'))
  expect(String((await once(decoded, 'data'))[0])).toBe('{"line":2,"text":"b"}\n')
})

test('a stream may be larger than any body limit', async () => {
  const { app } = buildTestApp([streamRoutes()], { bodyLimit: 1024 })
  const payload = `${'x'.repeat(999)}\n`.repeat(5000)
  const reply = await app.inject({ method: 'POST', url: '/echo', payload, headers: ndjson })
  expect(reply.body.trimEnd().split('\n')).toHaveLength(5000)
})

test('a stream route refuses other types, and JSON routes refuse streams', async () => {
  const { app } = buildTestApp([streamRoutes()])
  const reply = await app.inject({ method: 'POST', url: '/echo', payload: {} })
  expect(reply.json()).toMatchObject({
    status: 415,
    facts: { accepted: ['application/x-ndjson', 'text/csv'] },
  })
})

test('a request without a body is refused', async () => {
  const { app } = buildTestApp([streamRoutes()])
  const reply = await app.inject({ method: 'POST', url: '/echo' })
  expect(reply.json()).toMatchObject({
    code: 'invalid-request',
    detail: 'A body is required: send one item on each line',
  })
})

test('a broken stream is reset, never ended as if it were whole', async () => {
  for (const encoding of ['identity', 'gzip']) {
    const { app, logged } = buildTestApp([streamRoutes()])
    const sent = await open(app, '/fail', { ...ndjson, 'accept-encoding': encoding })
    sent.on('error', () => undefined)
    sent.write('good\n')
    const [reply] = (await once(sent, 'response')) as [IncomingMessage]
    await once(reply, 'data')
    sent.write('bad\n')
    await expect(once(reply.resume(), 'end')).rejects.toMatchObject({ code: 'ECONNRESET' })
    expect(reply.complete).toBe(false)
    await expect.poll(() => logged.map(({ msg }) => msg)).toContain('cut off')
    expect(logged.find(({ msg }) => msg === 'stream failed')).toMatchObject({
      level: 50,
      err: { message: 'secret of the cellar' },
    })
  }
})

test('a stream that fails before its first piece is a problem', async () => {
  const { app } = buildTestApp([streamRoutes()])
  const reply = await app.inject({ method: 'POST', url: '/fail', payload: 'bad\n', headers: ndjson })
  expect(reply.json()).toMatchObject({ status: 500, code: 'internal' })
})

test('a header that cannot be used is told on a real connection, with megabytes still to come', async () => {
  const { app } = buildTestApp([streamRoutes()])
  for (const encoding of ['identity', 'gzip']) {
    const text = `depht_m\n${'1.5\n'.repeat(2_000_000)}`
    const sent = await open(app, '/table', { 'content-type': 'text/csv', 'content-encoding': encoding })
    sent.end(encoding === 'gzip' ? gzipSync(text) : text)
    const [reply] = (await once(sent, 'response')) as [IncomingMessage]
    expect(reply.statusCode).toBe(400)
    expect(JSON.parse(String(Buffer.concat(await reply.toArray())))).toMatchObject({
      detail: '1 field was refused: depht_m is not a known column; did you mean depth_m?',
    })
  }
})

test('gzip that breaks off in a stream is told', async () => {
  const { app } = buildTestApp([streamRoutes()])
  const payload = gzipSync('a line\n').subarray(0, 12)
  const headers = { ...ndjson, 'content-encoding': 'gzip' }
  const reply = await app.inject({ method: 'POST', url: '/echo', payload, headers })
  expect(reply.json()).toMatchObject({ status: 400, detail: 'The body is not whole gzip data' })
})

test('work stops when the caller goes away', async () => {
  for (const encoding of ['identity', 'gzip']) {
    const watched = { ended: false, made: 0 }
    const { app } = buildTestApp([streamRoutes(watched)])
    const sent = await open(app, '/endless', { 'accept-encoding': encoding }, 'GET')
    sent.end()
    const [reply] = (await once(sent, 'response')) as [IncomingMessage]
    await once(reply, 'data')
    reply.destroy()
    await expect.poll(() => watched.ended, { timeout: 5000 }).toBe(true)
  }
})

test('work waits for a caller that does not read', async () => {
  const watched = { ended: false, made: 0 }
  const { app } = buildTestApp([streamRoutes(watched)])
  const sent = await open(app, '/endless', {}, 'GET')
  sent.end()
  const [reply] = (await once(sent, 'response')) as [IncomingMessage]
  reply.pause()
  // Ten thousand pieces would be 100 MB; buffers of both ends hold a few.
  await expect.poll(async () => { const before = watched.made; await wait(200); return watched.made - before }, { timeout: 20_000 }).toBe(0) // prettier-ignore
  expect(watched.made).toBeLessThan(3000)
  expect(watched.ended).toBe(false)
})

test('a caller that goes away while sending ends the work too', async () => {
  const { app, logged } = buildTestApp([streamRoutes()])
  const sent = await open(app, '/echo', ndjson)
  sent.on('error', () => undefined)
  sent.write('a\n')
  await once(sent, 'response')
  sent.destroy()
  await expect.poll(() => logged.some(({ msg }) => msg === 'cut off'), { timeout: 5000 }).toBe(true)
  expect(logged.filter(({ level }) => Number(level) >= 50)).toEqual([])
})

test('reading ends with a fault when the source breaks', async () => {
  const source = new PassThrough()
  source.write('a\n')
  setTimeout(() => source.destroy(new Error('gone')), 10)
  await expect(all(readLines(source))).rejects.toMatchObject({
    message: 'The body ended before it was complete',
  })
})
