import type { IncomingMessage } from 'node:http'
import type { FastifyRequest } from 'fastify'
import { Fault, type FaultItem } from '../domain/fault.ts'
import type { App } from './app-type.ts'
import { JSON_TYPE, readBody, refuseOtherBodies } from './body.ts'
import { readRows, refuseTooMany, rowsOfLines, rowsOfList, type RowSource } from './calibration-rows.ts'
import {
  CalibrationEnvelope,
  type CalibrationOrder,
  type CalibrationQuery,
  toOrder,
} from './calibrations.schema.ts'
import { MEDIA_TYPES } from './negotiate.ts'
import { faultItems, refused } from './validation.ts'
import type { z } from 'zod'

// sentences are ours, as in `parse`
const SILENT = { error: () => '' }

export const MAX_BODY_BYTES = 16 * 1024 * 1024

/** Rows as lines, still to be cut. */
class LineBody {
  readonly bytes: Buffer
  readonly isCsv: boolean

  constructor(bytes: Buffer, isCsv: boolean) {
    this.bytes = bytes
    this.isCsv = isCsv
  }
}

/** Inside `app.register`: makes the routes of this scope take rows as lines beside JSON. */
export function acceptRows(scope: App, settings: { readonly timeout: number }): void {
  scope.removeContentTypeParser('*')
  for (const type of [MEDIA_TYPES.ndjson, MEDIA_TYPES.csv]) {
    scope.addContentTypeParser(
      type,
      async (request: FastifyRequest, payload: IncomingMessage) =>
        new LineBody(await readBody(request, payload, settings.timeout), type === MEDIA_TYPES.csv),
    )
  }
  refuseOtherBodies(scope, [JSON_TYPE, MEDIA_TYPES.ndjson, MEDIA_TYPES.csv])
}

/** What is asked for and the rows that it is asked of. */
export interface CalibrationBody {
  readonly order: CalibrationOrder
  readonly sources: readonly RowSource[]
}

type QueryWire = z.output<typeof CalibrationQuery>

/** A field is given where the rows leave room for it: in the body beside a list, else in the query. */
const itemsBesideBody = ({ format: _format, ...given }: QueryWire): FaultItem[] =>
  Object.entries(given)
    .filter(([, value]) => value !== undefined)
    .map(([parameter]) => ({
      parameter,
      code: 'clash',
      detail: 'belongs in the JSON body: the query holds it beside rows as NDJSON or CSV',
    }))

const NAME_REQUIRED: FaultItem = {
  parameter: 'name',
  code: 'required',
  detail: 'is required beside rows as NDJSON or CSV',
}

function listIn(body: unknown): readonly unknown[] {
  if (typeof body !== 'object' || body === null || !('passages' in body)) return []
  return Array.isArray(body.passages) ? body.passages : []
}

/** What is wrong beside the rows, with what is wrong with them. */
async function refusedWithRows(items: readonly FaultItem[], sources: readonly RowSource[]): Promise<Fault> {
  const { errors } = await readRows(sources, () => undefined)
  return refused([...items, ...errors])
}

async function readListBody(body: unknown, query: QueryWire): Promise<CalibrationBody> {
  const passages = listIn(body)
  refuseTooMany(passages.length)
  const sources = rowsOfList(passages)
  const result = CalibrationEnvelope.safeParse(body, SILENT)
  const items = [
    ...itemsBesideBody(query),
    ...(result.success ? [] : faultItems(result.error, body, CalibrationEnvelope, 'body')),
  ]
  if (!result.success || items.length > 0) throw await refusedWithRows(items, sources)
  return { order: toOrder(result.data), sources }
}

/**
 * Reads the body of a request and the query beside it.
 *
 * @throws Fault `invalid-request`, `payload-too-large`, `malformed-csv`
 */
export async function readCalibrationBody(body: unknown, query: QueryWire): Promise<CalibrationBody> {
  if (!(body instanceof LineBody)) return readListBody(body, query)
  const { name } = query
  const sources = await rowsOfLines(body.bytes, body.isCsv)
  if (name === undefined) throw await refusedWithRows([NAME_REQUIRED], sources)
  if (sources.length === 0 && !body.isCsv)
    throw new Fault('invalid-request', 'The body is empty: send a passage on each line')
  return { order: toOrder({ ...query, name }), sources }
}
