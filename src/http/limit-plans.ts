import type { FastifyReply } from 'fastify'
import { z } from 'zod'
import { Fault } from '../domain/fault.ts'
import { PlanBuilder } from '../limits/plan-builder.ts'
import type { PlanContent, PlanRecord } from '../store/job-records.ts'
import type { App, Routes } from './app-type.ts'
import { Id } from './fields.ts'
import { markUnfinished, studyNotFound } from './job-reply.ts'
import { LimitPlanList, LimitPlanReply, LimitPlanRequest, type LimitPlanWire } from './limit-plans.schema.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { NoticeReply, toNotice } from './notice.ts'
import { PAGE_FIELDS, storedPage } from './paging.ts'
import { LimitPlanCollection, planCsv, planGeoJson } from './plan-exports.ts'
import { toPlanContent, toPlanReply, toPlanRules } from './plan-reply.ts'
import { problemResponses } from './problems.ts'
import { authorOf } from './segment-writes.ts'
import type { Service } from './service.ts'
import { jobOf } from './studies.ts'
import { assertSucceeded, cellsOf, inputsOf } from './study-results.ts'

const MAX_BODY_BYTES = 16 * 1024 * 1024

export const PlanParams = z.strictObject({ id: Id })
const JsonQuery = z.strictObject({ format: formatParameter(['json']) })

export function planNotFound(id: string): Fault {
  return new Fault('limit-plan-not-found', `There is no limit plan ${id}`, { facts: { limit_plan_id: id } })
}

/** @throws Fault `limit-plan-not-found` */
export async function planOf(id: string, { store }: Service): Promise<PlanRecord> {
  const plan = await store.findPlan(id)
  if (!plan) throw planNotFound(id)
  return plan
}

/** Draws limits from the results of a study. */
async function contentOf(wire: LimitPlanWire, reply: FastifyReply, service: Service): Promise<PlanContent> {
  const job = await jobOf(wire.study_id, service)
  if (job.kind !== 'study') throw studyNotFound(job.id)
  markUnfinished(reply, job)
  assertSucceeded(job)
  const { study } = await inputsOf(job.id, service.store)
  const builder = new PlanBuilder(study, toPlanRules(wire))
  for await (const cells of cellsOf(job, service.store)) builder.add(cells)
  const content = toPlanContent(builder.plan(), study)
  return { name: wire.name, studyId: job.id, request: wire, content: { ...content } }
}

/** Limit plans: what a study proposes for the signs. */
export function limitPlanRoutes(service: Service): Routes {
  return (app) => {
    addCreate(app, service)
    addList(app, service)
    addPlan(app, service)
    addNotice(app, service)
    addDelete(app, service)
  }
}

function addCreate(app: App, service: Service): void {
  app.post('/v1/limit-plans', {
    bodyLimit: MAX_BODY_BYTES,
    schema: {
      operationId: 'createLimitPlan',
      tags: ['limit plans'],
      summary: 'Draw limits for groups of vessels from a study that has succeeded.',
      description:
        'The ceiling of a segment is the lowest maximum over the vessels of a group, levels, currents and directions, rounded down to the step of the sign. Limits are constant over stretches of consecutive segments; of all limits that exceed no ceiling and keep the run length, those with the least travel time are taken, then those with the fewest stretches, then the highest from upstream. A cell that cannot be, or has no safe speed, leaves its segment without a limit.',
      querystring: JsonQuery,
      body: LimitPlanRequest,
      response: {
        201: LimitPlanReply,
        ...problemResponses(400, 401, 403, 404, 406, 408, 409, 413, 415, 422, 503),
      },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const content = await contentOf(request.body, reply, service)
      const plan = await service.store.addPlan(content, authorOf(request, service))
      if (!plan) throw studyNotFound(request.body.study_id)
      void reply.code(201).header('location', `/v1/limit-plans/${plan.id}`)
      return toPlanReply(plan)
    },
  })
}

function addList(app: App, service: Service): void {
  app.get('/v1/limit-plans', {
    schema: {
      operationId: 'listLimitPlans',
      tags: ['limit plans'],
      summary: 'List the limit plans.',
      querystring: z.strictObject({ ...PAGE_FIELDS, format: formatParameter(['json']) }),
      response: { 200: LimitPlanList, ...problemResponses(400, 406, 503) },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['json'])
      return storedPage((page) => service.store.plans(page), request.query, request.url, toPlanReply)
    },
  })
}

function addPlan(app: App, service: Service): void {
  app.get('/v1/limit-plans/:id', {
    schema: {
      operationId: 'getLimitPlan',
      tags: ['limit plans'],
      summary: 'Show a limit plan, as JSON, on the map, or as a table.',
      params: PlanParams,
      querystring: z.strictObject({ format: formatParameter(['json', 'geojson', 'csv']) }),
      response: {
        200: {
          description: 'The plan.',
          content: {
            'application/json': { schema: LimitPlanReply },
            'application/geo+json': { schema: LimitPlanCollection },
            'text/csv': { schema: z.string() },
          },
        },
        ...problemResponses(400, 404, 406, 503),
      },
    },
    handler: async (request, reply) => {
      const format = negotiate(request, reply, ['json', 'geojson', 'csv'])
      const plan = await planOf(request.params.id, service)
      if (format === 'json') return toPlanReply(plan)
      if (format === 'csv') return reply.send(planCsv(plan))
      return planGeoJson(plan, await inputsOf(plan.studyId, service.store), request.url)
    },
  })
}

function addNotice(app: App, service: Service): void {
  app.get('/v1/limit-plans/:id/notice', {
    schema: {
      operationId: 'getLimitPlanNotice',
      tags: ['limit plans'],
      summary: 'Give the limits of a plan in code words of notices, as a proposal.',
      params: PlanParams,
      querystring: JsonQuery,
      response: { 200: NoticeReply, ...problemResponses(400, 404, 406, 503) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const plan = await planOf(request.params.id, service)
      return toNotice(plan, toPlanRules(plan.request as unknown as LimitPlanWire))
    },
  })
}

function addDelete(app: App, service: Service): void {
  app.delete('/v1/limit-plans/:id', {
    schema: {
      operationId: 'deleteLimitPlan',
      tags: ['limit plans'],
      summary: 'Delete a draft; published plans stay.',
      params: PlanParams,
      response: {
        204: { description: 'It is deleted.', type: 'null' },
        ...problemResponses(400, 401, 403, 404, 409, 503),
      },
    },
    handler: async (request, reply) => {
      const { id } = request.params
      const outcome = await service.store.deletePlan(id)
      if (outcome === 'missing') throw planNotFound(id)
      if (outcome === 'published') {
        throw new Fault('limit-plan-published', `The limit plan ${id} is published: it cannot be deleted`, {
          facts: { limit_plan_id: id },
        })
      }
      return reply.code(204).send()
    },
  })
}
