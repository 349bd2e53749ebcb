import type { FastifyReply, FastifyRequest } from 'fastify'
import { Fault, impossible } from '../domain/fault.ts'
import type { PlanPublished, PlanRecord } from '../store/job-records.ts'
import type { App, Routes } from './app-type.ts'
import { LimitPlanReply, PublicationReply, PublishRequest, type PublishWire } from './limit-plans.schema.ts'
import { planNotFound, planOf, PlanParams } from './limit-plans.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { publicationOf } from './plan-reply.ts'
import { problemResponses } from './problems.ts'
import { basisOf, canonicalText, recordOf, type PlanBasis, type RecordWire } from './record.ts'
import { authorOf } from './segment-writes.ts'
import type { Service } from './service.ts'
import { z } from 'zod'

const JsonQuery = z.strictObject({ format: formatParameter(['json']) })

const FIELDS = ['number', 'title', 'authority', 'signatory', 'effective_from', 'supersedes', 'note'] as const

const publishedAlready = (id: string): Fault =>
  new Fault(
    'limit-plan-published',
    `The limit plan ${id} is published with other particulars, which cannot be changed: make another plan that supersedes it`,
    { facts: { limit_plan_id: id } },
  )

/** A repeated request gives what the first one made; any other is refused. */
function repeated(plan: PlanRecord, wire: PublishWire) {
  const published = publicationOf(plan)
  if (published && FIELDS.every((field) => published[field] === wire[field])) return published
  throw publishedAlready(plan.id)
}

function refusal(
  published: Exclude<PlanPublished, { outcome: 'published' | 'already-published' }>,
  id: string,
  wire: PublishWire,
): Fault {
  if (published.outcome === 'missing') return planNotFound(id)
  if (published.outcome === 'number-taken') {
    return new Fault('number-taken', `The limit plan ${published.by} is published as ${wire.number}`, {
      facts: { limit_plan_id: published.by },
    })
  }
  const isMissing = published.state === 'missing'
  return impossible([
    {
      pointer: '#/supersedes',
      code: 'clash',
      detail: isMissing
        ? `names the plan ${wire.supersedes ?? ''}, which does not exist`
        : `names a plan that is ${published.state}: only a published one is superseded`,
      facts: { limit_plan_id: wire.supersedes ?? '', state: published.state },
    },
  ])
}

function publicationFor(
  wire: PublishWire,
  { study }: PlanBasis,
  request: FastifyRequest,
  service: Service,
): NonNullable<RecordWire['publication']> {
  const { label: _label, ...particulars } = wire
  const { time, key } = authorOf(request, service)
  return {
    ...particulars,
    published_at: time,
    ...(key !== undefined && { published_by: key }),
    service_version: service.serviceVersion,
    // of the figures, which are the study's
    method_version: study.methodVersion,
  }
}

async function publish(
  request: FastifyRequest,
  reply: FastifyReply,
  id: string,
  wire: PublishWire,
  service: Service,
) {
  const plan = await planOf(id, service)
  if (plan.state !== 'draft') return repeated(plan, wire)
  if (wire.supersedes === id) {
    throw impossible([{ pointer: '#/supersedes', code: 'clash', detail: 'names the plan itself' }])
  }
  const basis = await basisOf(plan, service.store)
  const particulars = publicationFor(wire, basis, request, service)
  const record = await recordOf(basis, particulars, service.store)
  const publication = { ...particulars, record_hash: record.record_hash }
  const published = await service.store.publishPlan(id, {
    number: wire.number,
    ...(wire.supersedes !== undefined && { supersedes: wire.supersedes }),
    publication,
    record: canonicalText(record),
  })
  if (published.outcome === 'already-published') return repeated(published.plan, wire)
  if (published.outcome !== 'published') throw refusal(published, id, wire)
  void reply.code(201).header('location', `/v1/limit-plans/${id}`)
  return publication
}

/** The record of a plan: of a published one as it was frozen, of a draft as it would be. */
export async function recordText(plan: PlanRecord, service: Service): Promise<string> {
  const stored = await service.store.findRecord(plan.id)
  return stored ?? canonicalText(await recordOf(await basisOf(plan, service.store), undefined, service.store))
}

/** Freezing a plan, and everything it rests on. */
export function publicationRoutes(service: Service): Routes {
  return (app) => {
    addPublish(app, service)
    addRecord(app, service)
  }
}

function addPublish(app: App, service: Service): void {
  app.post('/v1/limit-plans/:id/publish', {
    schema: {
      operationId: 'publishLimitPlan',
      tags: ['limit plans'],
      summary: 'Publish a plan: it is numbered, dated and frozen with everything it rests on.',
      description:
        'Needs a key that may publish. Nothing changes a published plan but another that supersedes it. The same request again gives the same answer.',
      params: PlanParams,
      querystring: JsonQuery,
      body: PublishRequest,
      response: {
        200: PublicationReply,
        201: PublicationReply,
        ...problemResponses(400, 401, 403, 404, 406, 409, 413, 415, 422, 503),
      },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['json'])
      return publish(request, reply, request.params.id, request.body, service)
    },
  })
}

const RecordReply = z
  .looseObject({
    record_version: z.int().min(1).max(1000),
    statement: z.string(),
    plan: LimitPlanReply.omit({ state: true, publication: true }),
    publication: PublicationReply.omit({ record_hash: true }).optional(),
    study: z.record(z.string(), z.unknown()),
    inputs: z
      .looseObject({ units: z.string(), study: z.record(z.string(), z.unknown()) })
      .describe('as the methods read them'),
    segments: z.array(z.record(z.string(), z.unknown())).describe('features as they were in the registry'),
    vessel_classes: z.array(z.record(z.string(), z.unknown())),
    calibrations: z.array(z.record(z.string(), z.unknown())),
    results: z.object({
      columns: z.array(z.string()),
      rows: z.array(z.array(z.union([z.string(), z.number(), z.null()]))),
    }),
    sources: z.array(z.record(z.string(), z.unknown())).describe('the methods with their references'),
    record_hash: z.string().describe('sha256 over the RFC 8785 form without this field'),
  })
  .meta({ id: 'LimitPlanRecord', description: 'Everything a plan rests on, as one document.' })

function addRecord(app: App, service: Service): void {
  app.get('/v1/limit-plans/:id/record', {
    schema: {
      operationId: 'getLimitPlanRecord',
      tags: ['limit plans'],
      summary: 'Give a plan with everything it rests on as one document.',
      description:
        'Of a published plan, as it was frozen. `npm run verify -- record.json` recomputes it without a database.',
      params: PlanParams,
      querystring: JsonQuery,
      response: { 200: RecordReply, ...problemResponses(400, 404, 406, 413, 503) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const plan = await planOf(request.params.id, service)
      return reply.send(await recordText(plan, service))
    },
  })
}
