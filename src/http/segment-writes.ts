import type { FastifyReply, FastifyRequest } from 'fastify'
import { z } from 'zod'
import { Fault } from '../domain/fault.ts'
import type { Author } from '../store/registry.ts'
import type { App, Routes } from './app-type.ts'
import { acceptGeoJson } from './body.ts'
import { calibrationItems } from './calibration-named.ts'
import { FeatureIn, readFeature, type FeatureWire } from './feature-in.ts'
import { SegmentFeature, toFeature } from './feature.schema.ts'
import { geoJson } from './geo-json.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { expectedOf, revisionRequired, writtenOr } from './preconditions.ts'
import { problemResponses } from './problems.ts'
import { segmentNotFound } from './request.ts'
import { recordOf, SegmentParams } from './segment-query.ts'
import { openView, type Service } from './service.ts'
import { refused } from './validation.ts'

/** Who writes, by the key of the request, and when. */
export const authorOf = (request: FastifyRequest, service: Service): Author => ({
  time: service.now(),
  ...(request.accessKey && { key: request.accessKey.name }),
})

/** Faults of a feature as one problem: 400 where a field is wrong by itself, else 422. */
export function refusedFeatures(errors: Parameters<typeof refused>[0]): Fault {
  const isImpossible = errors.every((item) => item.code === 'clash')
  if (!isImpossible) return refused(errors)
  const [first] = errors
  return new Fault('impossible-input', first?.detail ?? 'The features cannot be as they are given', {
    errors,
  })
}

function idOf(feature: FeatureWire, id: string): FeatureWire {
  if (feature.id === undefined || String(feature.id) === id) return { ...feature, id }
  throw refused([
    {
      pointer: '#/id',
      code: 'clash',
      detail: `is ${String(feature.id)}, and the path names ${id}: make them the same, or leave it out`,
    },
  ])
}

async function put(
  request: FastifyRequest,
  reply: FastifyReply,
  id: string,
  wire: FeatureWire,
  service: Service,
) {
  const { content, faults } = readFeature(idOf(wire, id), '#', false)
  if (!content) throw refusedFeatures(faults)
  const expected = expectedOf(request)
  const before = await service.store.current()
  const naming = calibrationItems(content, before, '#')
  if (naming.length > 0) throw refusedFeatures(naming)
  const written = writtenOr(
    await service.store.putSegment(content, expected, authorOf(request, service)),
    expected,
    () => segmentNotFound(id, before),
  )
  const view = await openView(service, reply)
  const created = written.outcome === 'created'
  void reply.header('etag', `"${written.revision}"`)
  if (created) void reply.code(201).header('location', `/v1/segments/${encodeURIComponent(id)}`)
  return toFeature(recordOf(id, view))
}

/** Writing single segments. */
export function segmentWriteRoutes(service: Service): Routes {
  return (app) => {
    void app.register((scope: App, _options, done) => {
      acceptGeoJson(scope, { timeout: service.bodyTimeout })
      addPut(scope, service)
      done()
    })
    addDelete(app, service)
  }
}

function addPut(app: App, service: Service): void {
  app.put('/v1/segments/:id', {
    schema: {
      operationId: 'putSegment',
      tags: ['segments'],
      summary: 'Create a segment, or replace one at the revision that If-Match names.',
      description: 'Unchanged content makes no revision. Without If-Match only a new segment is written.',
      params: SegmentParams,
      querystring: z.strictObject({ format: formatParameter(['geojson', 'json']) }),
      body: FeatureIn,
      response: {
        200: geoJson(SegmentFeature),
        201: geoJson(SegmentFeature),
        ...problemResponses(400, 401, 403, 404, 406, 412, 413, 415, 422, 428, 503),
      },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['geojson', 'json'])
      return put(request, reply, request.params.id, request.body, service)
    },
  })
}

function addDelete(app: App, service: Service): void {
  app.delete('/v1/segments/:id', {
    schema: {
      operationId: 'deleteSegment',
      tags: ['segments'],
      summary: 'Delete the segment at the revision that If-Match names; its revisions stay readable.',
      params: SegmentParams,
      response: {
        204: { description: 'It is deleted.', type: 'null' },
        ...problemResponses(400, 401, 403, 404, 412, 428, 503),
      },
    },
    handler: async (request, reply) => {
      const { id } = request.params
      const expected = expectedOf(request)
      const before = await service.store.current()
      const record = before.findSegment(id)
      if (!record) throw segmentNotFound(id, before)
      if (expected === 'none') throw revisionRequired(record.revision)
      writtenOr(await service.store.deleteSegment(id, expected, authorOf(request, service)), expected, () =>
        segmentNotFound(id, before),
      )
      await openView(service, reply)
      return reply.code(204).send()
    },
  })
}
