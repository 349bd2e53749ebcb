import type { FastifyReply } from 'fastify'
import { z } from 'zod'
import { Fault } from '../domain/fault.ts'
import type { JobRecord } from '../store/job-records.ts'
import type { App, Routes } from './app-type.ts'
import { Id } from './fields.ts'
import { markUnfinished, studyNotFound, toJobReply } from './job-reply.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { PAGE_FIELDS, storedPage } from './paging.ts'
import { problemResponses } from './problems.ts'
import { authorOf } from './segment-writes.ts'
import { openView, type Service } from './service.ts'
import { sendStream } from './stream.ts'
import { JobList, JobReply, StudyRequest, StudyRow } from './studies.schema.ts'
import { studyJob } from './study-of.ts'
import { assertSucceeded, resultLines } from './study-results.ts'

const MAX_BODY_BYTES = 16 * 1024 * 1024

const Params = z.strictObject({ id: Id })
const JsonQuery = z.strictObject({ format: formatParameter(['json']) })

/** @throws Fault `study-not-found` */
export async function jobOf(id: string, { store }: Service): Promise<JobRecord> {
  const job = await store.findJob(id)
  if (!job) throw studyNotFound(id)
  return job
}

/** Stores a job, has it taken up, and says where to ask for it. */
export async function accepted(job: JobRecord, reply: FastifyReply, service: Service) {
  await service.jobs.submit(job)
  markUnfinished(reply, job)
  void reply.code(202).header('location', `/v1/studies/${job.id}`)
  return toJobReply(job, service.now())
}

/** Studies: many segments by many vessels, computed in the background. */
export function studyRoutes(service: Service): Routes {
  return (app) => {
    addCreate(app, service)
    addList(app, service)
    addStudy(app, service)
    addResults(app, service)
    addDelete(app, service)
  }
}

function addCreate(app: App, service: Service): void {
  app.post('/v1/studies', {
    bodyLimit: MAX_BODY_BYTES,
    schema: {
      operationId: 'createStudy',
      tags: ['studies'],
      summary: 'Compute the maximum speeds of many segments and vessels, with what is uncertain about them.',
      description:
        'The registry is read once, now: later changes of it do not reach the study. It goes on in the background, also over a restart of the service; ask for it until its state is `succeeded`, then for its results. With `uncertainty` each cell is sampled: quasi-random draws that follow from the seed, the same for every cell, so that neighbours are compared under the same surprises; normal about the value for `sd`, uniform for `half_range`; the wave height is multiplied by a log-normal factor of median 1. A draw that cannot be counts as without a safe speed.',
      querystring: JsonQuery,
      body: StudyRequest,
      response: { 202: JobReply, ...problemResponses(400, 401, 403, 404, 406, 408, 413, 415, 422, 503) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const content = studyJob(request.body, await openView(service, reply))
      const job = await service.store.addJob(content, authorOf(request, service))
      return accepted(job, reply, service)
    },
  })
}

function addList(app: App, service: Service): void {
  app.get('/v1/studies', {
    schema: {
      operationId: 'listStudies',
      tags: ['studies'],
      summary: 'List the studies.',
      querystring: z.strictObject({ ...PAGE_FIELDS, format: formatParameter(['json']) }),
      response: { 200: JobList, ...problemResponses(400, 406, 503) },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['json'])
      return storedPage(
        (page) => service.store.jobs('study', page),
        request.query,
        request.url,
        (job) => toJobReply(job, service.now()),
      )
    },
  })
}

function addStudy(app: App, service: Service): void {
  app.get('/v1/studies/:id', {
    schema: {
      operationId: 'getStudy',
      tags: ['studies'],
      summary: 'Show a study and how far it is.',
      params: Params,
      querystring: JsonQuery,
      response: { 200: JobReply, ...problemResponses(400, 404, 406, 503) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const job = await jobOf(request.params.id, service)
      markUnfinished(reply, job)
      void reply.header('cache-control', 'private, no-cache')
      return toJobReply(job, service.now())
    },
  })
}

function addResults(app: App, service: Service): void {
  app.get('/v1/studies/:id/results', {
    config: { place: 'stream' },
    schema: {
      operationId: 'getStudyResults',
      tags: ['studies'],
      summary: 'Give the results of a study that has succeeded, a row for each cell.',
      description:
        'Ordered by segment, vessel, level, current and direction. A cell that cannot be is a row with `problem_code`. A percentile is interpolated between the two samples beside it; it is null where one of them has no safe speed.',
      params: Params,
      querystring: z.strictObject({ format: formatParameter(['ndjson', 'csv']) }),
      response: {
        200: {
          description: 'One row for each cell.',
          content: {
            'application/x-ndjson': { schema: StudyRow },
            'text/csv': { schema: z.string() },
          },
        },
        ...problemResponses(400, 404, 406, 409, 503),
      },
    },
    handler: async (request, reply) => {
      const format = negotiate(request, reply, ['ndjson', 'csv'])
      const job = await jobOf(request.params.id, service)
      if (job.kind !== 'study') throw studyNotFound(job.id)
      markUnfinished(reply, job)
      assertSucceeded(job)
      return sendStream(reply, resultLines(job, format, service.store))
    },
  })
}

function addDelete(app: App, service: Service): void {
  app.delete('/v1/studies/:id', {
    schema: {
      operationId: 'deleteStudy',
      tags: ['studies'],
      summary: 'Cancel a study that is queued or running, or delete one that has ended.',
      params: Params,
      response: {
        200: JobReply,
        204: { description: 'It is deleted.', type: 'null' },
        ...problemResponses(400, 401, 403, 404, 409, 503),
      },
    },
    handler: async (request, reply) => {
      const { id } = request.params
      const removed = await service.store.removeJob(id, service.now())
      if (removed.outcome === 'missing') throw studyNotFound(id)
      if (removed.outcome === 'in-use') throw restedOn(id, removed.usedBy)
      if (removed.outcome === 'deleted') return reply.code(204).send()
      return toJobReply(removed.job, service.now())
    },
  })
}

function restedOn(id: string, usedBy: readonly string[]): Fault {
  const [first = ''] = usedBy
  const more = usedBy.length > 1 ? ` and ${usedBy.length - 1} more` : ''
  return new Fault('in-use', `The limit plan ${first}${more} rests on the study ${id}`, {
    facts: { used_by: usedBy },
  })
}
