import type { FastifyReply, FastifyRequest } from 'fastify'
import { z } from 'zod'
import { advise, type Advisory } from '../advisory/advise.ts'
import { METHOD_VERSION } from '../advisory/catalogue.ts'
import { DEFAULT_POINTS, speedCurve } from '../advisory/curve.ts'
import { segmentSheet } from '../report/sheet.ts'
import { speedCurveSvg } from '../report/speed-curve.ts'
import type { App, Routes } from './app-type.ts'
import { inputHash } from './input-hash.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { integerParameter } from './parameters.ts'
import { isKnown, notModified } from './preconditions.ts'
import { sendPage } from './page.ts'
import { problemResponses } from './problems.ts'
import { SegmentCurveReply } from './reply.schema.ts'
import { toSegmentCurveReply } from './reply.ts'
import type { Resolved } from './request.ts'
import {
  ADVISORY_FIELDS,
  recordOf,
  resolveQuery,
  SegmentParams,
  type AdvisoryQuery,
} from './segment-query.ts'
import { etagOf } from './segments.ts'
import { openView, type Service, type View } from './service.ts'

const adviseAll = ({ segment, vessel, conditions, options }: Resolved): Advisory =>
  advise(segment, vessel, conditions, options)

async function resolved(
  id: string,
  query: AdvisoryQuery,
  reply: FastifyReply,
  service: Service,
): Promise<{ view: View; asked: Resolved }> {
  const view = await openView(service, reply)
  return { view, asked: resolveQuery(recordOf(id, view), query, view) }
}

/** Marks a reply with what it follows from; true when the client holds it already. */
function isHeld(
  request: FastifyRequest,
  reply: FastifyReply,
  asked: Resolved,
  view: View,
  form: string,
): boolean {
  const etag = etagOf(asked, `${view.serviceVersion}|${form}`)
  void reply.header('etag', etag).header('cache-control', 'private, no-cache')
  return isKnown(request, etag)
}

/** A segment's speed curve, as figures and as a drawing, and its sheet. */
export function segmentViewRoutes(service: Service): Routes {
  return (app) => {
    addCurve(app, service)
    addSheet(app, service)
  }
}

function addCurve(app: App, service: Service): void {
  app.get('/v1/segments/:id/speed-curve', {
    schema: {
      operationId: 'getSegmentSpeedCurve',
      tags: ['segments'],
      summary: 'Show what a passage does over its speed, as figures or as a drawing.',
      params: SegmentParams,
      querystring: z.strictObject({
        ...ADVISORY_FIELDS,
        points: integerParameter(2, 500).optional().describe('default 60'),
        format: formatParameter(['json', 'svg']),
      }),
      response: {
        200: {
          description: 'The curve.',
          content: {
            'application/json': { schema: SegmentCurveReply },
            'image/svg+xml': { schema: z.string() },
          },
        },
        ...problemResponses(400, 404, 406, 422),
      },
    },
    handler: async (request, reply) => {
      const format = negotiate(request, reply, ['json', 'svg'])
      const { points = DEFAULT_POINTS, ...query } = request.query
      const { view, asked } = await resolved(request.params.id, query, reply, service)
      if (isHeld(request, reply, asked, view, `${format}${points}`)) return notModified(reply)
      const advisory = adviseAll(asked)
      const curve = speedCurve(advisory.decision, points)
      if (format === 'svg') return speedCurveSvg(curve, advisory)
      const context = { serviceVersion: view.serviceVersion, registryRevision: view.registry.revision }
      return toSegmentCurveReply(advisory, curve, asked, context)
    },
  })
}

function addSheet(app: App, service: Service): void {
  app.get('/v1/segments/:id/sheet', {
    schema: {
      operationId: 'getSegmentSheet',
      tags: ['segments'],
      summary: 'Show the advisory of a segment as a page to read and to print on A4.',
      params: SegmentParams,
      querystring: z.strictObject(ADVISORY_FIELDS),
      response: {
        200: { description: 'The page.', content: { 'text/html': { schema: z.string() } } },
        ...problemResponses(400, 401, 404, 406, 422),
      },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['html'])
      const { view, asked } = await resolved(request.params.id, request.query, reply, service)
      const advisory = adviseAll(asked)
      const page = segmentSheet({
        record: recordOf(request.params.id, view),
        advisory,
        curve: speedCurve(advisory.decision, 120),
        serviceVersion: view.serviceVersion,
        methodVersion: METHOD_VERSION,
        inputHash: inputHash(asked),
        made: service.now(),
      })
      return sendPage(reply, page)
    },
  })
}
