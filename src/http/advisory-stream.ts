import type { FastifyReply, FastifyRequest } from 'fastify'
import type { Readable } from 'node:stream'
import { z } from 'zod'
import { advise, adviseBriefly } from '../advisory/advise.ts'
import { Fault } from '../domain/fault.ts'
import type { App, Routes } from './app-type.ts'
import { advisoryText } from './advisory-text.ts'
import { StreamLine } from './compact.schema.ts'
import { COMPACT_COLUMNS, toCompactRow, toProblemRow, type CompactRow } from './compact.ts'
import { readCsvRows } from './csv.ts'
import { csvRow } from './csv-write.ts'
import { parseJson, toFiniteJson } from './json.ts'
import { acceptLines, bodyStream, readLines } from './lines.ts'
import type { Watch } from './metrics.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { problemResponses, toProblem } from './problems.ts'
import { toAdvisoryReply } from './reply.ts'
import { AdvisoryRequest, resolve } from './request.ts'
import { viewOf, type Service, type View } from './service.ts'
import { sendStream } from './stream.ts'
import { turn } from './turns.ts'
import { columnOfPointer, CSV_COLUMNS, requestOfRow } from './stream-csv.ts'
import { parse } from './validation.ts'

const StreamQuery = z.strictObject({
  detail: z.enum(['full', 'compact']).optional().describe('of NDJSON; CSV is always compact'),
  format: formatParameter(['ndjson', 'csv']),
})

/** One item of the body: a request to read, or why it cannot be read. */
interface Item {
  readonly line: number
  readonly read: () => unknown
}

/** Items in batches, as the body brings them. */
type Items = AsyncIterable<readonly Item[]>

const rethrow = (fault: Fault) => (): never => {
  throw fault
}

async function* ndjsonItems(stream: Readable): AsyncGenerator<Item[]> {
  for await (const lines of readLines(stream)) {
    yield lines
      .filter((line) => line.fault !== undefined || line.text.trim() !== '')
      .map((line) => ({
        line: line.number,
        read: line.fault ? rethrow(line.fault) : () => parseJson(line.text),
      }))
  }
}

async function* csvItems(stream: Readable): AsyncGenerator<Item[]> {
  for await (const rows of readCsvRows(stream, { knownColumns: CSV_COLUMNS })) {
    yield rows.map((row) => ({
      line: row.line,
      read: row.fault ? rethrow(row.fault) : () => requestOfRow(row.fields),
    }))
  }
}

function toFault(error: unknown): Fault {
  if (error instanceof Fault) return error
  throw error
}

/** The label of an item that may be wrong in every other way. */
function labelOf(input: unknown): string | null {
  if (typeof input !== 'object' || input === null || !('label' in input)) return null
  return typeof input.label === 'string' && input.label.length <= 200 ? input.label : null
}

/** A fault of a CSV row, told by columns. */
function byColumn(fault: Fault): Fault {
  const errors = fault.parts.errors?.map(({ pointer, ...item }) => ({
    ...item,
    ...(pointer !== undefined && { parameter: columnOfPointer(pointer) }),
  }))
  return errors ? new Fault(fault.code, fault.message, { ...fault.parts, errors }) : fault
}

function compactLine(item: Item, { registry }: View, isCsv: boolean, watch: Watch): CompactRow {
  let input: unknown
  try {
    input = item.read()
    const wire = parse(AdvisoryRequest, input)
    const resolved = resolve(wire, registry)
    const { segment, vessel, conditions, options } = resolved
    const brief = adviseBriefly(segment, vessel, conditions, options)
    watch.advised(brief)
    watch.row('advisories', 'answered')
    return { ...toCompactRow(brief, resolved, wire.label ?? null), line: item.line }
  } catch (error) {
    const fault = toFault(error)
    watch.row('advisories', 'refused')
    return { ...toProblemRow(isCsv ? byColumn(fault) : fault, labelOf(input)), line: item.line }
  }
}

function fullLine(item: Item, { registry, serviceVersion }: View, requestId: string, watch: Watch): string {
  try {
    const wire = parse(AdvisoryRequest, item.read())
    const resolved = resolve(wire, registry)
    const { segment, vessel, conditions, options } = resolved
    const context = { serviceVersion, registryRevision: registry.revision }
    const advisory = advise(segment, vessel, conditions, options)
    watch.advised(advisory)
    watch.row('advisories', 'answered')
    return advisoryText(toAdvisoryReply(advisory, resolved, context, { line: item.line, label: wire.label }))
  } catch (error) {
    const fault = toFault(error)
    watch.row('advisories', 'refused')
    return toFiniteJson({ line: item.line, problem: toProblem(fault, requestId) })
  }
}

/** Lines that are answered before the caller is given what there is: some 5 ms of work (own choice). */
const LINES_AT_ONCE = 20

const csvOf = (row: CompactRow): string => csvRow(COMPACT_COLUMNS.map((column) => row[column]))

async function* answered(
  items: Items,
  head: string,
  service: Service,
  toText: (item: Item, view: View) => string,
): AsyncGenerator<string> {
  let text = head
  let made = 0
  for await (const batch of items) {
    await turn()
    // a stream may run for hours: each piece of it sees the registry as it is then
    const view = await viewOf(service)
    for (const item of batch) {
      text += toText(item, view)
      made += 1
      if (made % LINES_AT_ONCE !== 0) continue
      yield text
      text = ''
      // other requests have their turn: a piece of the body may hold a thousand lines
      await turn()
    }
    yield text
    text = ''
  }
  if (text !== '') yield text
}

const isCsvType = (request: FastifyRequest): boolean =>
  request.headers['content-type']?.toLowerCase().startsWith('text/csv') === true

/** Advisories line by line, as they come. */
export function advisoryStreamRoutes(service: Service): Routes {
  return (app) => {
    void app.register((scope: App, _options, done) => {
      acceptLines(scope)
      addRoute(scope, service)
      done()
    })
  }
}

function addRoute(app: App, service: Service): void {
  app.post('/v1/advisories/stream', {
    config: { place: 'stream' },
    schema: {
      operationId: 'streamAdvisories',
      tags: ['batches'],
      summary: 'Answer a stream of advisory requests, line by line, in their order.',
      description:
        'NDJSON or CSV in, NDJSON or CSV out. Each line in has one line out: an advisory or a problem with its line number. One bad line never ends the stream.',
      body: {
        description: 'Advisory requests, one a line, or a CSV with a header.',
        content: {
          'application/x-ndjson': { schema: AdvisoryRequest },
          'text/csv': { schema: z.string() },
        },
      },
      querystring: StreamQuery,
      response: {
        200: {
          description: 'One line for each line in.',
          content: {
            'application/x-ndjson': { schema: StreamLine },
            'text/csv': { schema: z.string() },
          },
        },
        ...problemResponses(400, 406, 413, 415),
      },
    },
    handler: (request, reply) => respond(request, reply, service, request.query.detail),
  })
}

async function respond(
  request: FastifyRequest,
  reply: FastifyReply,
  service: Service,
  detail: 'full' | 'compact' | undefined,
): Promise<FastifyReply> {
  const isCsvIn = isCsvType(request)
  const format = negotiate(request, reply, isCsvIn ? ['csv', 'ndjson'] : ['ndjson', 'csv'])
  const { watch } = service
  const stream = bodyStream(request)
  const items = isCsvIn ? csvItems(stream) : ndjsonItems(stream)
  if (format === 'csv') {
    const head = csvRow(COMPACT_COLUMNS)
    return sendStream(
      reply,
      answered(items, head, service, (item, view) => csvOf(compactLine(item, view, isCsvIn, watch))),
    )
  }
  const isCompact = isCsvIn || detail === 'compact'
  const toLine = isCompact
    ? (item: Item, view: View) => `${toFiniteJson(compactLine(item, view, isCsvIn, watch))}\n`
    : (item: Item, view: View) => `${fullLine(item, view, request.id, watch)}\n`
  return sendStream(reply, answered(items, '', service, toLine))
}
