import { z } from 'zod'
import type { Fault, FaultItemCode } from '../domain/fault.ts'
import { PROBLEM_CODES, PROBLEMS } from './problem-table.ts'

const ITEM_CODES = [
  'required',
  'unknown-field',
  'wrong-type',
  'out-of-range',
  'not-in-list',
  'one-of',
  'pattern',
  'clash',
] as const satisfies readonly FaultItemCode[]

const FactsSchema = z
  .record(z.string(), z.union([z.number(), z.string(), z.boolean(), z.array(z.string())]))
  .describe('figures of this occurrence; names carry the unit')

/** RFC 9457 body of every reply that refuses. Clients ignore members they do not know and decide on `code`. */
export const Problem = z
  .object({
    type: z.string().describe('path that describes this kind of problem'),
    title: z.string().describe('the same for every occurrence'),
    status: z.int().min(400).max(599).describe('repeats the HTTP status'),
    detail: z.string().describe('what to change in this request'),
    instance: z.string().describe('urn:request: and the request id, as in the header x-request-id'),
    code: z.enum(PROBLEM_CODES).describe('last part of type'),
    facts: FactsSchema.optional(),
    errors: z
      .array(
        z.object({
          pointer: z.string().optional().describe('JSON Pointer fragment into the body'),
          parameter: z.string().optional().describe('query parameter, path parameter or CSV column'),
          line: z.int().min(1).max(Number.MAX_SAFE_INTEGER).optional().describe('physical line, from 1'),
          feature_id: z.string().optional().describe('id of the feature of an import'),
          code: z.enum(ITEM_CODES),
          detail: z.string(),
          allowed: z.array(z.string()).optional().describe('possible values or fields, nearest first'),
          facts: FactsSchema.optional(),
        }),
      )
      .max(1000)
      .optional(),
    errors_truncated: z.literal(true).optional().describe('present when there were more than 1000 errors'),
  })
  .meta({ id: 'Problem', description: 'Why a request was refused (RFC 9457).' })

export type ProblemBody = z.input<typeof Problem>

export const PROBLEM_TYPE = 'application/problem+json'
const MAX_ERRORS = 1000

/** The RFC 9457 body of a fault; also one line of a stream, under `problem`. */
export function toProblem(fault: Fault, requestId: string): ProblemBody {
  const { facts, errors } = fault.parts
  const { status, title } = PROBLEMS[fault.code]
  return {
    type: `/v1/problems/${fault.code}`,
    title,
    status,
    detail: fault.message,
    instance: `urn:request:${requestId}`,
    code: fault.code,
    ...(facts && { facts: facts as NonNullable<ProblemBody['facts']> }),
    ...(errors && { errors: errors.slice(0, MAX_ERRORS) as NonNullable<ProblemBody['errors']> }),
    ...(errors && errors.length > MAX_ERRORS && { errors_truncated: true as const }),
  }
}

/** Entries for a route's `response` schema, one for each status it refuses with. */
export function problemResponses(...statuses: readonly number[]): Record<number, unknown> {
  return Object.fromEntries(
    statuses.map((status) => {
      const slugs = PROBLEM_CODES.filter((code) => PROBLEMS[code].status === status)
      const description = slugs.map((code) => `\`${code}\`: ${PROBLEMS[code].title}.`).join(' ')
      return [status, { description, content: { [PROBLEM_TYPE]: { schema: Problem } } }]
    }),
  )
}
