import { createHash } from 'node:crypto'
import type { FastifyReply, FastifyRequest } from 'fastify'
import { z } from 'zod'
import { advise } from '../advisory/advise.ts'
import { METHOD_VERSION } from '../advisory/catalogue.ts'
import { Fault } from '../domain/fault.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import type { BoundingBox } from '../domain/position.ts'
import { LOADINGS } from '../domain/vessel.ts'
import type { SegmentRecord } from '../store/registry.ts'
import type { AdvisoryParts } from './advisories.ts'
import type { App, Routes } from './app-type.ts'
import { Id } from './fields.ts'
import { inputHash } from './input-hash.ts'
import { SegmentCollection, SegmentFeature, toFeature } from './feature.schema.ts'
import { list } from './list.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { SIGN_UNIT_NAMES, toConditions, toOptions } from './options.schema.ts'
import { PAGE_FIELDS, slice } from './paging.ts'
import { enumParameter, numberParameter } from './parameters.ts'
import { problemResponses } from './problems.ts'
import { toAdvisoryReply } from './reply.ts'
import { AdvisoryReply } from './reply.schema.ts'
import { refuseCalibration, segmentNotFound, segmentOf, type Resolved } from './request.ts'
import { toVessel } from './vessel.schema.ts'

const BBOX = /^-?\d+(?:\.\d+)?(?:,-?\d+(?:\.\d+)?){3}$/

const ListQuery = z.strictObject({
  bbox: z
    .string()
    .regex(BBOX, '')
    .optional()
    .describe('west,south,east,north in degrees; west above east crosses the antimeridian'),
  waterway: z.string().max(2000).optional(),
  gauge_id: z.string().max(2000).optional(),
  ...PAGE_FIELDS,
  format: formatParameter(['geojson', 'json']),
})

const SegmentParams = z.strictObject({ id: Id })

const AdvisoryQuery = z.strictObject({
  vessel_class: Id.describe('id of a vessel class'),
  loading: z.enum(LOADINGS).optional(),
  draught_m: numberParameter(0.05, 30).optional().describe('m; default the draught of the class'),
  direction: enumParameter(DIRECTIONS).optional(),
  water_level_m: numberParameter(-50, 50).optional().describe('above the datum, m; default 0'),
  current_mps: numberParameter(-5, 5).optional().describe('positive downstream, m/s; default 0'),
  sign_unit: enumParameter(SIGN_UNIT_NAMES).optional(),
  sign_step: numberParameter(0.1, 10).optional(),
  format: formatParameter(['json']),
})

function boxOf(text: string): BoundingBox {
  const [west = 0, south = 0, east = 0, north = 0] = text.split(',').map(Number)
  const isInRange =
    [west, east].every((x) => Math.abs(x) <= 180) && south >= -90 && north <= 90 && south <= north
  if (!isInRange) {
    throw new Fault('invalid-request', '1 field was refused: bbox must be west,south,east,north in degrees', {
      errors: [
        {
          parameter: 'bbox',
          code: 'out-of-range',
          detail:
            'must be west,south,east,north: longitudes within 180, latitudes within 90, south below north',
        },
      ],
    })
  }
  return [west, south, east, north]
}

type ListQueryWire = z.output<typeof ListQuery>

function listSegments(query: ListQueryWire, url: string, { registry }: AdvisoryParts) {
  const matching = registry.segments({
    ...(query.bbox !== undefined && { bbox: boxOf(query.bbox) }),
    ...(query.waterway !== undefined && { waterway: query.waterway }),
    ...(query.gauge_id !== undefined && { gaugeId: query.gauge_id }),
  })
  const page = slice(matching, (record) => record.id, query, url)
  return {
    type: 'FeatureCollection',
    features: page.items.map(toFeature),
    links: list(url, [], page.next).links,
    numberReturned: page.items.length,
    numberMatched: matching.length,
  }
}

function recordOf(id: string, { registry }: AdvisoryParts): SegmentRecord {
  const record = registry.findSegment(id)
  if (!record) throw segmentNotFound(id, registry)
  return record
}

type AdvisoryQueryWire = z.output<typeof AdvisoryQuery>

function resolveQuery(record: SegmentRecord, query: AdvisoryQueryWire): Resolved {
  refuseCalibration(record.properties, undefined)
  const { vessel_class, loading, draught_m, direction, water_level_m, current_mps, sign_unit, sign_step } =
    query
  return {
    record,
    segment: segmentOf(record),
    vessel: toVessel({
      class: vessel_class,
      ...(loading && { loading }),
      ...(draught_m !== undefined && { draught_m }),
    }),
    conditions: toConditions({
      ...(water_level_m !== undefined && { water_level_m }),
      ...(current_mps !== undefined && { current_mps }),
      ...(direction && { direction }),
    }),
    options: toOptions({
      ...(sign_unit && { sign_unit }),
      ...(sign_step !== undefined && { sign_step }),
    }),
  }
}

/** Names the answer by everything it follows from, so that a client asks again only for what changed. */
function etagOf(resolved: Resolved, serviceVersion: string): string {
  const content = [inputHash(resolved), resolved.record?.revision, METHOD_VERSION, serviceVersion].join('|')
  return `"${createHash('sha256').update(content).digest('base64url').slice(0, 27)}"`
}

/** Whether the client holds this answer already. */
function isKnown(request: FastifyRequest, etag: string): boolean {
  const held = request.headers['if-none-match']
  return held === '*' || held?.split(',').some((tag) => tag.trim().replace(/^W\//, '') === etag) === true
}

function adviseSegment(
  request: FastifyRequest,
  reply: FastifyReply,
  resolved: Resolved,
  parts: AdvisoryParts,
): unknown {
  const etag = etagOf(resolved, parts.serviceVersion)
  void reply.header('etag', etag).header('cache-control', 'private, no-cache')
  if (isKnown(request, etag)) return reply.code(304).send()
  const { segment, vessel, conditions, options } = resolved
  const context = { serviceVersion: parts.serviceVersion, registryRevision: parts.registry.revision }
  return toAdvisoryReply(advise(segment, vessel, conditions, options), resolved, context, {})
}

/** The segments that the service knows, and their advisories. */
export function segmentRoutes(parts: AdvisoryParts): Routes {
  return (app) => {
    app.addHook('onSend', (_request, reply, _payload, done) => {
      void reply.header('registry-revision', String(parts.registry.revision))
      done()
    })
    addReadRoutes(app, parts)
    app.get('/v1/segments/:id/advisory', {
      schema: {
        operationId: 'getSegmentAdvisory',
        tags: ['segments'],
        summary: 'Recommend a maximum speed for a class of vessels on a registry segment.',
        description:
          'Conditional requests are answered with 304 while nothing that the answer follows from has changed.',
        params: SegmentParams,
        querystring: AdvisoryQuery,
        response: { 200: AdvisoryReply, ...problemResponses(400, 404, 406, 422) },
      },
      handler: (request, reply) => {
        negotiate(request, reply, ['json'])
        const record = recordOf(request.params.id, parts)
        return adviseSegment(request, reply, resolveQuery(record, request.query), parts)
      },
    })
  }
}

function addReadRoutes(app: App, parts: AdvisoryParts): void {
  app.get('/v1/segments', {
    schema: {
      operationId: 'listSegments',
      tags: ['segments'],
      summary: 'List the segments of the registry.',
      querystring: ListQuery,
      response: { 200: SegmentCollection, ...problemResponses(400, 406) },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['geojson', 'json'])
      return listSegments(request.query, request.url, parts)
    },
  })

  app.get('/v1/segments/:id', {
    schema: {
      operationId: 'getSegment',
      tags: ['segments'],
      summary: 'Show a segment.',
      params: SegmentParams,
      querystring: z.strictObject({ format: formatParameter(['geojson', 'json']) }),
      response: { 200: SegmentFeature, ...problemResponses(400, 404, 406) },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['geojson', 'json'])
      const record = recordOf(request.params.id, parts)
      void reply.header('etag', `"${record.revision}"`)
      return toFeature(record)
    },
  })
}
