import type { FastifyReply, FastifyRequest } from 'fastify'
import { z } from 'zod'
import { METHOD_VERSION } from '../advisory/catalogue.ts'
import { Fault } from '../domain/fault.ts'
import { fromKnots } from '../domain/units.ts'
import { PassageCheck, type CheckSettings } from '../passages/check.ts'
import type { Fairway } from '../passages/placement.ts'
import type { Registry, SegmentRecord } from '../store/registry.ts'
import type { App, Routes } from './app-type.ts'
import { keepOpenAtWork } from './idle.ts'
import { acceptLines, bodyStream } from './lines.ts'
import { nearestFirst } from './nearest.ts'
import { negotiate } from './negotiate.ts'
import { passageAnswer } from './passage-answer.ts'
import { openLog } from './passage-rows.ts'
import { DEFAULT_OPTIONS } from './options.schema.ts'
import { PassageLine, PassageQuery, type PassageQueryWire } from './passages.schema.ts'
import { problemResponses } from './problems.ts'
import { optionsOn, segmentOf } from './request.ts'
import { openView, type Service, type View } from './service.ts'
import { sendStream } from './stream.ts'
import { findAnyClass } from './vessel.schema.ts'

/** The query with every default filled in. */
function parametersOf(query: PassageQueryWire) {
  return {
    waterway: query.waterway ?? null,
    water_level_m: query.water_level_m ?? 0,
    current_mps: query.current_mps ?? 0,
    tolerance_kn: query.tolerance_kn ?? 0.5,
    detail: query.detail ?? 'events',
    position: query.position ?? 'actual',
    min_event_reports: query.min_event_reports ?? 2,
    max_gap_s: query.max_gap_s ?? 600,
    tow_length_m: query.tow_length_m ?? null,
    tow_beam_m: query.tow_beam_m ?? null,
    tow_draught_m: query.tow_draught_m ?? null,
  }
}

type Parameters = ReturnType<typeof parametersOf>

function fairwayOf(record: SegmentRecord, registry: Registry): Fairway {
  const { chainage_from_m: from, chainage_to_m: to } = record.properties
  return {
    id: record.id,
    line: record.line,
    segment: segmentOf(record),
    options: optionsOn(DEFAULT_OPTIONS, undefined, record.properties, registry),
    chainageFrom: typeof from === 'number' ? from : undefined,
    chainageTo: typeof to === 'number' ? to : undefined,
  }
}

/** Segments of the waterway that is asked for. A name that none has is a slip: every row would be outside. */
function fairwaysOf(waterway: string | null, { registry }: View): Fairway[] {
  const records = registry.segments(waterway === null ? {} : { waterway })
  if (records.length > 0 || waterway === null) return records.map((record) => fairwayOf(record, registry))
  const names = registry.segments().flatMap(({ properties }) => properties['waterway'] ?? [])
  const allowed = nearestFirst(waterway, [...new Set(names.map(String))]).slice(0, 20)
  const hint = allowed[0] === undefined ? '' : `; the nearest name is ${allowed[0]}`
  throw new Fault('invalid-request', `1 field was refused: no segment is of this waterway${hint}`, {
    errors: [
      { parameter: 'waterway', code: 'not-in-list', detail: 'must be the waterway of a segment', allowed },
    ],
  })
}

function settingsOf(parameters: Parameters, view: View): CheckSettings {
  return {
    fairways: fairwaysOf(parameters.waterway, view),
    findClass: (id) => findAnyClass(id, view.registry),
    judging: {
      waterLevel: parameters.water_level_m,
      current: parameters.current_mps,
      tolerance: fromKnots(parameters.tolerance_kn),
      position: parameters.position,
      isFull: parameters.detail === 'reports',
    },
    convoy: {
      length: parameters.tow_length_m ?? NaN,
      beam: parameters.tow_beam_m ?? NaN,
      draught: parameters.tow_draught_m ?? NaN,
    },
    maxGap: parameters.max_gap_s,
    minEventReports: parameters.min_event_reports,
  }
}

/** Pieces of a log that are read ahead, 16 MiB: more than Linux holds for a connection at both ends, unless told otherwise. */
const READ_AHEAD = 256

/** Position reports against recommended maxima, as they come. */
export function passageRoutes(service: Service): Routes {
  return (app) => {
    void app.register((scope: App, _options, done) => {
      acceptLines(scope, { readAhead: READ_AHEAD })
      addRoute(scope, service)
      done()
    })
  }
}

function addRoute(app: App, service: Service): void {
  app.post('/v1/passages/check', {
    config: { place: 'stream' },
    schema: {
      operationId: 'checkPassages',
      tags: ['passages'],
      summary:
        'Check a log of position reports: who was faster than advisable, where, and what the banks got.',
      description:
        'A log of AIS position reports as CSV or NDJSON, by the column names of open publications. Each report is placed on a segment and held against the recommended maximum there. With `detail=reports` there is a line for each row, in their order; events as they close; the summary last. With `events` and `summary` the reply begins after the last byte of the log. Without a summary line an answer is incomplete. CSV out holds the one table of `detail`.',
      body: {
        description: 'Position reports, a row each; CSV with a header line.',
        content: {
          'text/csv': { schema: z.string() },
          'application/x-ndjson': { schema: z.record(z.string(), z.unknown()) },
        },
      },
      querystring: PassageQuery,
      response: {
        200: {
          description: 'Reports, events and the summary.',
          content: {
            'application/x-ndjson': { schema: PassageLine },
            'text/csv': { schema: z.string() },
          },
        },
        ...problemResponses(400, 406, 413, 415),
      },
    },
    handler: (request, reply) => respond(request, reply, service, request.query),
  })
}

async function respond(
  request: FastifyRequest,
  reply: FastifyReply,
  service: Service,
  query: PassageQueryWire,
): Promise<FastifyReply> {
  const format = negotiate(request, reply, ['ndjson', 'csv'])
  const body = bodyStream(request)
  keepOpenAtWork(request, reply, body)
  const log = openLog(request, body)
  const view = await openView(service, reply)
  const parameters = parametersOf(query)
  const settings = settingsOf(parameters, view)
  const check = new PassageCheck(settings)
  const { judging, fairways } = settings
  const session = service.judges.open({ judging, fairways, judge: check.judge })
  const answer = passageAnswer(log, check, session, {
    format,
    detail: parameters.detail,
    onRow: (status) => {
      service.watch.row('passages', status)
    },
    about: {
      parameters: { ...parameters },
      reproducibility: {
        service_version: view.serviceVersion,
        method_version: METHOD_VERSION,
        registry_revision: view.registry.revision,
      },
    },
  })
  return sendStream(reply, answer)
}
