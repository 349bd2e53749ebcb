import { createHash } from 'node:crypto'
import type { FastifyReply, FastifyRequest } from 'fastify'
import { LRUCache } from 'lru-cache'
import { z } from 'zod'
import { advise } from '../advisory/advise.ts'
import { METHOD_VERSION } from '../advisory/catalogue.ts'
import { Fault } from '../domain/fault.ts'
import type { App, Routes } from './app-type.ts'
import { advisoryText } from './advisory-text.ts'
import { SegmentCollection, SegmentFeature, toFeature } from './feature.schema.ts'
import { geoJson } from './geo-json.ts'
import { inputHash } from './input-hash.ts'
import { list, listOf } from './list.ts'
import type { Watch } from './metrics.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { PAGE_FIELDS, slice } from './paging.ts'
import { integerParameter } from './parameters.ts'
import { isKnown, notModified } from './preconditions.ts'
import { problemResponses } from './problems.ts'
import { toAdvisoryReply } from './reply.ts'
import { AdvisoryReply } from './reply.schema.ts'
import { segmentNotFound, type Resolved } from './request.ts'
import {
  ADVISORY_FIELDS,
  FILTER_FIELDS,
  recordOf,
  resolveQuery,
  SegmentParams,
  toFilter,
} from './segment-query.ts'
import { openView, viewOf, type Service, type View } from './service.ts'

const ListQuery = z.strictObject({
  ...FILTER_FIELDS,
  ...PAGE_FIELDS,
  format: formatParameter(['geojson', 'json']),
})

const RevisionReply = z
  .object({
    revision: z.int().min(1).max(1e9),
    action: z.enum(['created', 'updated', 'deleted', 'imported']),
    time: z.string(),
    key: z.string().optional().describe('name of the access key it was made with'),
    changed: z.array(z.string()),
    href: z.string(),
  })
  .meta({ id: 'SegmentRevision', description: 'One change of a segment.' })

function listSegments(query: z.output<typeof ListQuery>, url: string, { registry }: View) {
  const matching = registry.segments(toFilter(query))
  const page = slice(matching, (record) => record.id, query, url)
  return {
    type: 'FeatureCollection',
    features: page.items.map(toFeature),
    links: list(url, [], page.next).links,
    numberReturned: page.items.length,
    numberMatched: matching.length,
  }
}

/** Names the answer by everything it follows from, so that a client asks again only for what changed. */
export function etagOf(resolved: Resolved, serviceVersion: string): string {
  const content = [inputHash(resolved), resolved.record?.revision, METHOD_VERSION, serviceVersion].join('|')
  return `"${createHash('sha256').update(content).digest('base64url').slice(0, 27)}"`
}

/** An answer as it went out. */
interface Answered {
  readonly etag: string
  readonly text: string
}

/** Answers that are kept, for boards that ask the same again and again; each is some 15 KB. */
const KEPT_ANSWERS = 1000

type Kept = LRUCache<string, Answered>

/** What a kept answer is found by: the state of the registry, the query, and the form that is asked for. */
const keyOf = (request: FastifyRequest, { registry }: View): string =>
  `${registry.revision} ${request.headers.accept ?? ''} ${request.url}`

function answerTo(resolved: Resolved, view: View, watch: Watch): Answered {
  const { segment, vessel, conditions, options } = resolved
  const context = { serviceVersion: view.serviceVersion, registryRevision: view.registry.revision }
  const begun = performance.now()
  const advisory = advise(segment, vessel, conditions, options)
  watch.advised(advisory, (performance.now() - begun) / 1000)
  const reply = toAdvisoryReply(advisory, resolved, context, {})
  return { etag: etagOf(resolved, view.serviceVersion), text: advisoryText(reply) }
}

function sendAnswer(request: FastifyRequest, reply: FastifyReply, { etag, text }: Answered): FastifyReply {
  void reply.header('etag', etag).header('cache-control', 'private, no-cache')
  return isKnown(request, etag) ? notModified(reply) : reply.send(text)
}

/** Answers a query that was answered before while the registry is as it was: it needs no second check. */
function answerKept(service: Service, kept: Kept) {
  return async (request: FastifyRequest, reply: FastifyReply): Promise<FastifyReply | undefined> => {
    const view = await viewOf(service)
    const known = kept.get(keyOf(request, view))
    if (!known) return undefined
    negotiate(request, reply, ['json'])
    void reply.header('registry-revision', String(view.registry.revision))
    return sendAnswer(request, reply, known)
  }
}

/** The segments that the service knows, their advisories and their history. */
export function segmentRoutes(service: Service): Routes {
  return (app) => {
    addList(app, service)
    addSegment(app, service)
    addAdvisory(app, service)
    addRevisions(app, service)
  }
}

function addList(app: App, service: Service): void {
  app.get('/v1/segments', {
    schema: {
      operationId: 'listSegments',
      tags: ['segments'],
      summary: 'List the segments of the registry.',
      querystring: ListQuery,
      response: { 200: geoJson(SegmentCollection), ...problemResponses(400, 406) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['geojson', 'json'])
      return listSegments(request.query, request.url, await openView(service, reply))
    },
  })
}

function addSegment(app: App, service: Service): void {
  app.get('/v1/segments/:id', {
    schema: {
      operationId: 'getSegment',
      tags: ['segments'],
      summary: 'Show a segment, as it is or as it was at a revision.',
      params: SegmentParams,
      querystring: z.strictObject({
        revision: integerParameter(1, 1e9).optional(),
        format: formatParameter(['geojson', 'json']),
      }),
      response: { 200: geoJson(SegmentFeature), ...problemResponses(400, 404, 406) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['geojson', 'json'])
      const { id } = request.params
      const { revision } = request.query
      const view = await openView(service, reply)
      const record =
        revision === undefined ? recordOf(id, view) : await service.store.findRevision(id, revision)
      if (!record) {
        throw new Fault('revision-not-found', `There is no revision ${revision ?? ''} of a segment ${id}`, {
          facts: { segment_id: id, revision: revision ?? 0 },
        })
      }
      void reply.header('etag', `"${record.revision}"`)
      return toFeature(record)
    },
  })
}

function addAdvisory(app: App, service: Service): void {
  const kept: Kept = new LRUCache({ max: KEPT_ANSWERS })
  app.get('/v1/segments/:id/advisory', {
    onRequest: answerKept(service, kept),
    schema: {
      operationId: 'getSegmentAdvisory',
      tags: ['segments'],
      summary: 'Recommend a maximum speed for a class of vessels on a registry segment.',
      description:
        'Conditional requests are answered with 304 while nothing that the answer follows from has changed.',
      params: SegmentParams,
      querystring: z.strictObject({ ...ADVISORY_FIELDS, format: formatParameter(['json']) }),
      response: { 200: AdvisoryReply, ...problemResponses(400, 404, 406, 422) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const view = await openView(service, reply)
      const resolved = resolveQuery(recordOf(request.params.id, view), request.query, view)
      const answered = answerTo(resolved, view, service.watch)
      kept.set(keyOf(request, view), answered)
      return sendAnswer(request, reply, answered)
    },
  })
}

function addRevisions(app: App, service: Service): void {
  app.get('/v1/segments/:id/revisions', {
    schema: {
      operationId: 'listSegmentRevisions',
      tags: ['segments'],
      summary: 'List the changes of a segment, newest first; a deleted segment keeps them.',
      params: SegmentParams,
      querystring: z.strictObject({ ...PAGE_FIELDS, format: formatParameter(['json']) }),
      response: { 200: listOf('SegmentRevisionList', RevisionReply), ...problemResponses(400, 404, 406) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const { id } = request.params
      const view = await openView(service, reply)
      const revisions = await service.store.revisions(id)
      if (revisions.length === 0) throw segmentNotFound(id, view.registry)
      // newest first: the cursor counts down
      const keyOf = ({ revision }: { readonly revision: number }): string =>
        String(1e9 - revision).padStart(10, '0')
      const page = slice(revisions, keyOf, request.query, request.url)
      const path = `/v1/segments/${encodeURIComponent(id)}`
      const items = page.items.map((item) => ({ ...item, href: `${path}?revision=${item.revision}` }))
      return list(request.url, items, page.next)
    },
  })
}
