import { z } from 'zod'
import { Fault } from '../domain/fault.ts'
import type { Conclude } from '../jobs/jobs.ts'
import { METHOD_VERSION } from '../advisory/catalogue.ts'
import { chunksOf } from '../limits/chunks.ts'
import { cellCount } from '../limits/study.ts'
import type { JobContent, JobRecord, PlanRecord } from '../store/job-records.ts'
import type { App, Routes } from './app-type.ts'
import { markUnfinished, toJobReply } from './job-reply.ts'
import { planOf, PlanParams } from './limit-plans.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { publicationOf } from './plan-reply.ts'
import { problemResponses } from './problems.ts'
import { recordText } from './publication.ts'
import { frozenPlan, type RecordWire } from './record.ts'
import { authorOf } from './segment-writes.ts'
import { openView, type Service } from './service.ts'
import { accepted } from './studies.ts'
import { JobReply } from './studies.schema.ts'
import { cellsOf } from './study-results.ts'
import { Verification, type Stored } from './verification.ts'

const JsonQuery = z.strictObject({ format: formatParameter(['json']) })

const VersionsReply = z.object({ service_version: z.string(), method_version: z.string() })
const count = z.int().min(0).max(1e12)
const leaf = z.unknown()

const VerificationReply = z
  .object({
    job: JobReply,
    verdict: z.enum(['reproduced', 'methods-changed', 'not-reproduced', 'record-altered']).optional(),
    text: z.string().optional(),
    record_hash: z.string().optional().describe('as published'),
    computed_hash: z.string().optional().describe('of the record as it is now'),
    published_with: VersionsReply.optional(),
    recomputed_with: VersionsReply.optional(),
    figures: z.object({ compared: count, equal: count, different: count }).optional(),
    largest_difference_mps: z.number().optional(),
    differences: z
      .array(z.object({ pointer: z.string(), field: z.string(), published: leaf, recomputed: leaf }))
      .optional()
      .describe('the first 100'),
  })
  .meta({
    id: 'Verification',
    description: 'Whether a plan comes out again; without a verdict until the job has succeeded.',
  })

/** Computes a record again, cell by cell. */
async function verificationJob(plan: PlanRecord, service: Service, revision: number): Promise<JobContent> {
  const record = JSON.parse(await recordText(plan, service)) as RecordWire
  const { study } = record.inputs
  return {
    kind: 'verification',
    name: plan.name,
    planId: plan.id,
    request: { limit_plan_id: plan.id },
    inputs: { study },
    cellsTotal: cellCount(study),
    chunksTotal: chunksOf(study).length,
    registryRevision: revision,
    methodVersion: METHOD_VERSION,
    serviceVersion: service.serviceVersion,
  }
}

/** What the database holds of a plan beside its record. */
function storedOf(plan: PlanRecord): Stored {
  const publication = publicationOf(plan)
  const { record_hash: recordHash, ...particulars } = publication ?? { record_hash: undefined }
  return {
    plan: frozenPlan(plan),
    ...(publication && { publication: particulars as NonNullable<Stored['publication']> }),
    ...(recordHash !== undefined && { recordHash }),
  }
}

/** Compares what a verification computed with the record of its plan. */
export function concludeWith(service: () => Service): Conclude {
  return async (job: JobRecord) => {
    const parts = service()
    const plan = await planOf(job.planId ?? '', parts)
    const verification = new Verification(JSON.parse(await recordText(plan, parts)) as RecordWire)
    for await (const cells of cellsOf(job, parts.store)) verification.add(cells)
    return { ...verification.conclude(parts.serviceVersion, storedOf(plan)) }
  }
}

/** Recomputing plans. */
export function planVerifyRoutes(service: Service): Routes {
  return (app) => {
    addVerify(app, service)
    addVerification(app, service)
  }
}

function addVerify(app: App, service: Service): void {
  app.post('/v1/limit-plans/:id/verify', {
    schema: {
      operationId: 'verifyLimitPlan',
      tags: ['limit plans'],
      summary: 'Recompute a plan from its record, in the background.',
      description: 'Ask `GET /v1/limit-plans/{id}/verify` for what was found.',
      params: PlanParams,
      querystring: JsonQuery,
      response: { 202: JobReply, ...problemResponses(400, 401, 403, 404, 406, 413, 503) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const plan = await planOf(request.params.id, service)
      const { registry } = await openView(service, reply)
      const content = await verificationJob(plan, service, registry.revision)
      return accepted(await service.store.addJob(content, authorOf(request, service)), reply, service)
    },
  })
}

function addVerification(app: App, service: Service): void {
  app.get('/v1/limit-plans/:id/verify', {
    schema: {
      operationId: 'getLimitPlanVerification',
      tags: ['limit plans'],
      summary: 'Show what the latest verification of a plan found.',
      params: PlanParams,
      querystring: JsonQuery,
      response: { 200: VerificationReply, ...problemResponses(400, 404, 406, 503) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const { id } = await planOf(request.params.id, service)
      const job = await service.store.findVerification(id)
      if (!job) {
        throw new Fault(
          'study-not-found',
          `The limit plan ${id} was never verified: POST /v1/limit-plans/${id}/verify starts it`,
          { facts: { limit_plan_id: id } },
        )
      }
      markUnfinished(reply, job)
      void reply.header('cache-control', 'private, no-cache')
      return { job: toJobReply(job, service.now()), ...job.result }
    },
  })
}
