import type { FastifyReply, FastifyRequest } from 'fastify'
import { z } from 'zod'
import { WAVE_METHOD_IDS } from '../advisory/catalogue.ts'
import { Fault } from '../domain/fault.ts'
import { calibrationFitSvg, calibrationResidualsSvg } from '../report/calibration-charts.ts'
import { calibrationSheet } from '../report/calibration-sheet.ts'
import type { CalibrationView } from '../report/calibration-view.ts'
import type { CalibrationRecord, CalibrationRows, Registry } from '../store/registry.ts'
import type { App, Routes } from './app-type.ts'
import { acceptRows, MAX_BODY_BYTES, readCalibrationBody } from './calibration-body.ts'
import { calibrationOf } from './calibration-fit.ts'
import { calibrationNotFound } from './calibration-named.ts'
import { PassageRow } from './calibration-row.schema.ts'
import { calibrationViewOf } from './calibration-view.ts'
import {
  CalibrationList,
  CalibrationQuery,
  CalibrationReply,
  CalibrationRequest,
  FullCalibrationReply,
} from './calibrations.schema.ts'
import { Id } from './fields.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { sendPage } from './page.ts'
import { PAGE_FIELDS, pageOf } from './paging.ts'
import { problemResponses } from './problems.ts'
import { authorOf } from './segment-writes.ts'
import { openView, type Service } from './service.ts'

const Params = z.strictObject({ id: Id })

const toReply = ({ id, created, document }: CalibrationRecord) => ({ id, created, ...document })

function recordOf(id: string, registry: Registry): CalibrationRecord {
  const record = registry.findCalibration(id)
  if (!record) throw calibrationNotFound(id, registry)
  return record
}

/** A calibration with its rows, which may be deleted between two looks at the registry. */
async function fullOf(
  id: string,
  reply: FastifyReply,
  service: Service,
): Promise<{ record: CalibrationRecord; rows: CalibrationRows }> {
  const { registry } = await openView(service, reply)
  const record = recordOf(id, registry)
  const rows = await service.store.findCalibrationRows(id)
  if (!rows) throw calibrationNotFound(id, registry)
  return { record, rows }
}

/** Measured waves, and what they say of the methods on one water. */
export function calibrationRoutes(service: Service): Routes {
  return (app) => {
    void app.register((scope: App, _options, done) => {
      acceptRows(scope, { timeout: service.bodyTimeout })
      addCreate(scope, service)
      done()
    })
    addList(app, service)
    addCalibration(app, service)
    addDrawings(app, service)
    addSheet(app, service)
    addDelete(app, service)
  }
}

function addCreate(app: App, service: Service): void {
  app.post('/v1/calibrations', {
    bodyLimit: MAX_BODY_BYTES,
    schema: {
      operationId: 'createCalibration',
      tags: ['calibrations'],
      summary: 'Correct the wave-height methods of one water by measured waves.',
      description:
        'From 5 to 10,000 passages of vessels with the highest wave at a gauge. Each method gets the factor by which it is off, with how sure that is. On a segment, a passage counts at the station whose depth is nearest, at the water level that gives the depth of the row; a width of the row makes a section of its own. Without a segment, a width makes the water confined, and without one it is open. NDJSON and CSV carry the rows, a passage each, and the query the rest.',
      querystring: CalibrationQuery,
      body: {
        description: 'Measured passages.',
        content: {
          'application/json': { schema: CalibrationRequest },
          'application/x-ndjson': { schema: PassageRow },
          'text/csv': { schema: z.string() },
        },
      },
      response: {
        201: CalibrationReply,
        ...problemResponses(400, 401, 403, 404, 406, 408, 413, 415, 422, 503),
      },
    },
    handler: (request, reply) => create(request, reply, request.query, service),
  })
}

async function create(
  request: FastifyRequest,
  reply: FastifyReply,
  query: z.output<typeof CalibrationQuery>,
  service: Service,
) {
  negotiate(request, reply, ['json'])
  const { order, sources } = await readCalibrationBody(request.body, query)
  const content = await calibrationOf(order, sources, await openView(service, reply))
  const author = authorOf(request, service)
  const id = await service.store.addCalibration(content, author)
  await openView(service, reply)
  void reply.code(201).header('location', `/v1/calibrations/${id}`)
  return { id, created: author.time, ...content.document }
}

function addList(app: App, service: Service): void {
  app.get('/v1/calibrations', {
    schema: {
      operationId: 'listCalibrations',
      tags: ['calibrations'],
      summary: 'List the calibrations, without their rows.',
      querystring: z.strictObject({ ...PAGE_FIELDS, format: formatParameter(['json']) }),
      response: { 200: CalibrationList, ...problemResponses(400, 406) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const { registry } = await openView(service, reply)
      return pageOf(registry.calibrations(), request.query, request.url, toReply)
    },
  })
}

function addCalibration(app: App, service: Service): void {
  app.get('/v1/calibrations/:id', {
    schema: {
      operationId: 'getCalibration',
      tags: ['calibrations'],
      summary: 'Show a calibration with the passages it was made from.',
      params: Params,
      querystring: z.strictObject({ format: formatParameter(['json']) }),
      response: { 200: FullCalibrationReply, ...problemResponses(400, 404, 406) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const { record, rows } = await fullOf(request.params.id, reply, service)
      return { ...toReply(record), ...rows }
    },
  })
}

const DRAWINGS = [
  {
    name: 'fit',
    operationId: 'getCalibrationFit',
    summary: 'Draw measured over computed wave heights of a method.',
    draw: calibrationFitSvg,
  },
  {
    name: 'residuals',
    operationId: 'getCalibrationResiduals',
    summary: 'Draw what the factor of a method leaves unexplained.',
    draw: calibrationResidualsSvg,
  },
] as const

function addDrawings(app: App, service: Service): void {
  for (const { name, operationId, summary, draw } of DRAWINGS) {
    app.get(`/v1/calibrations/:id/${name}`, {
      schema: {
        operationId,
        tags: ['calibrations'],
        summary,
        params: Params,
        querystring: z.strictObject({
          method_id: z.enum(WAVE_METHOD_IDS).optional().describe('default the recommended one'),
          format: formatParameter(['svg']),
        }),
        response: {
          200: { description: 'The drawing.', content: { 'image/svg+xml': { schema: z.string() } } },
          ...problemResponses(400, 404, 406),
        },
      },
      handler: async (request, reply) => {
        negotiate(request, reply, ['svg'])
        const view = await viewOfCalibration(request.params.id, reply, service)
        return draw(view, request.query.method_id)
      },
    })
  }
}

async function viewOfCalibration(
  id: string,
  reply: FastifyReply,
  service: Service,
): Promise<CalibrationView> {
  const { record, rows } = await fullOf(id, reply, service)
  return calibrationViewOf(record, rows)
}

function addSheet(app: App, service: Service): void {
  app.get('/v1/calibrations/:id/sheet', {
    schema: {
      operationId: 'getCalibrationSheet',
      tags: ['calibrations'],
      summary: 'Show a calibration as a page to read and to print on A4.',
      params: Params,
      querystring: z.strictObject({}),
      response: {
        200: { description: 'The page.', content: { 'text/html': { schema: z.string() } } },
        ...problemResponses(400, 401, 404, 406),
      },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['html'])
      return sendPage(reply, calibrationSheet(await viewOfCalibration(request.params.id, reply, service)))
    },
  })
}

function addDelete(app: App, service: Service): void {
  app.delete('/v1/calibrations/:id', {
    schema: {
      operationId: 'deleteCalibration',
      tags: ['calibrations'],
      summary: 'Delete a calibration that no segment names.',
      params: Params,
      response: {
        204: { description: 'It is deleted.', type: 'null' },
        ...problemResponses(400, 401, 403, 404, 409, 503),
      },
    },
    handler: async (request, reply) => {
      const { id } = request.params
      const before = await service.store.current()
      const deleted = await service.store.deleteCalibration(id, authorOf(request, service))
      if (deleted.outcome === 'missing') throw calibrationNotFound(id, before)
      if (deleted.outcome === 'in-use') throw inUse(id, deleted.usedBy)
      await openView(service, reply)
      return reply.code(204).send()
    },
  })
}

function inUse(id: string, usedBy: readonly string[]): Fault {
  const [first = ''] = usedBy
  const more = usedBy.length > 1 ? ` and ${usedBy.length - 1} more` : ''
  return new Fault('in-use', `The calibration ${id} is named by the segment ${first}${more}`, {
    facts: { used_by: usedBy },
  })
}
