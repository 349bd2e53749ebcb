import type { FastifyReply, FastifyRequest } from 'fastify'
import { Fault } from '../domain/fault.ts'
import type { Expected, Written } from '../store/registry.ts'

const TAG = /^(?:W\/)?"(\d{1,9})"$/

/** Which revision a write expects: by If-Match, or that there is none yet. */
export function expectedOf(request: FastifyRequest): Expected {
  const { 'if-match': match } = request.headers
  if (match === undefined) return 'none'
  if (match.trim() === '*') return 'any'
  const [, revision] = TAG.exec(match.trim()) ?? []
  if (revision !== undefined) return Number(revision)
  throw new Fault('invalid-request', '1 field was refused: if-match must be one ETag, such as "3", or *', {
    errors: [{ parameter: 'if-match', code: 'pattern', detail: 'must be one ETag, such as "3", or *' }],
  })
}

/** Refusal of a write that does not say which revision it replaces. */
export const revisionRequired = (current: number): Fault =>
  new Fault('revision-required', `It is at revision ${current}: send If-Match with that ETag`, {
    facts: { current },
  })

/**
 * What was written, or the fault that kept it from being written.
 *
 * @param missing  the fault for a thing that does not exist
 */
export function writtenOr(
  written: Written,
  expected: Expected,
  missing: () => Fault,
): Exclude<Written, { outcome: 'stale' | 'missing' }> {
  if (written.outcome === 'missing') throw missing()
  if (written.outcome !== 'stale') return written
  const facts = { current: written.current }
  if (expected === 'none') throw revisionRequired(written.current)
  throw new Fault('stale-revision', `It is at revision ${written.current} by now: read it again`, { facts })
}

/** Tells the client to use what it holds. */
export const notModified = (reply: FastifyReply): FastifyReply => reply.code(304).send()

/** Whether the client holds this answer already. */
export function isKnown(request: FastifyRequest, etag: string): boolean {
  const held = request.headers['if-none-match']
  return held === '*' || held?.split(',').some((tag) => tag.trim().replace(/^W\//, '') === etag) === true
}
