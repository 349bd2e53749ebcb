import type { FastifyReply } from 'fastify'
import { Fault, type FaultCode } from '../domain/fault.ts'
import type { JobRecord } from '../store/job-records.ts'
import { problemRow, PROBLEM_CODES } from './problem-table.ts'

/** Seconds after which it is worth to ask again how far a job is. */
const RETRY_AFTER = 1

export const isUnfinished = ({ state }: JobRecord): boolean => state === 'queued' || state === 'running'

/** Tells how long to wait before asking again, where there is something to wait for. */
export function markUnfinished(reply: FastifyReply, job: JobRecord): void {
  if (isUnfinished(job)) void reply.header('retry-after', String(RETRY_AFTER))
}

/** Seconds that a running job still takes at the rate so far. */
function remainingOf({ state, started, cellsDone, cellsTotal }: JobRecord, now: string): number | undefined {
  if (state !== 'running' || started === undefined || cellsDone === 0) return undefined
  const elapsed = (Date.parse(now) - Date.parse(started)) / 1000
  return Math.max(0, (elapsed * (cellsTotal - cellsDone)) / cellsDone)
}

function toJobProblem({ code, detail }: NonNullable<JobRecord['problem']>) {
  const known: FaultCode = PROBLEM_CODES.find((item) => item === code) ?? 'internal'
  const { status, title } = problemRow(known)
  return { type: `/v1/problems/${known}`, title, status, detail, code: known }
}

function linksOf({ id, kind, planId, state }: JobRecord) {
  if (kind === 'verification') {
    const plan = `/v1/limit-plans/${planId ?? ''}`
    return [
      { rel: 'self', href: `/v1/studies/${id}` },
      { rel: 'results', href: `${plan}/verify` },
      { rel: 'limit-plan', href: plan },
    ]
  }
  const self = { rel: 'self', href: `/v1/studies/${id}` }
  return state === 'succeeded' ? [self, { rel: 'results', href: `/v1/studies/${id}/results` }] : [self]
}

/** A job as it goes out. */
export function toJobReply(job: JobRecord, now: string) {
  const remaining = remainingOf(job, now)
  return {
    id: job.id,
    kind: job.kind,
    ...(job.name !== undefined && { name: job.name }),
    state: job.state,
    progress_ratio: job.cellsTotal === 0 ? 1 : job.cellsDone / job.cellsTotal,
    cells_done: job.cellsDone,
    cells_total: job.cellsTotal,
    created: job.created,
    ...(job.started !== undefined && { started: job.started }),
    ...(job.finished !== undefined && { finished: job.finished }),
    ...(remaining !== undefined && { remaining_s: remaining }),
    ...(job.problem && { problem: toJobProblem(job.problem) }),
    request: job.request,
    registry_revision: job.registryRevision,
    method_version: job.methodVersion,
    service_version: job.serviceVersion,
    links: linksOf(job),
  }
}

export function studyNotFound(id: string): Fault {
  return new Fault('study-not-found', `There is no study ${id}`, { facts: { study_id: id } })
}
