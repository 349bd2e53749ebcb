import { z } from 'zod'
import type { Fault, FaultCode, FaultItemCode } from '../domain/fault.ts'

interface ProblemRow {
  readonly status: number
  /** The same for every occurrence. */
  readonly title: string
  /** What a caller does about it. */
  readonly description: string
  /** Seconds after which the same request may succeed. */
  readonly retryAfter?: number
}

/** What each fault is on the wire. The order is the order of the published list. */
export const PROBLEMS = {
  'invalid-request': {
    status: 400,
    title: 'The request does not match the schema',
    description:
      'Correct every field in `errors`: `pointer` or `parameter` says where, `detail` what to do, `allowed` what is possible.',
  },
  'malformed-json': {
    status: 400,
    title: 'The body is not JSON',
    description:
      'Send UTF-8 text that a JSON parser accepts. `facts` gives the position where reading stopped, if known.',
  },
  'malformed-csv': {
    status: 400,
    title: 'The body is not CSV with a header',
    description:
      'Send RFC 4180 text: a header line with column names, `,` or `;` between cells, as many cells in every row as in the header, quotes doubled inside quotes.',
  },
  'route-not-found': {
    status: 404,
    title: 'There is no such path',
    description: 'Compare the path with `/openapi.json` or `/docs`.',
  },
  'segment-not-found': {
    status: 404,
    title: 'There is no such segment',
    description: 'List the segments with `GET /v1/segments` and use one of their ids.',
  },
  'vessel-class-not-found': {
    status: 404,
    title: 'There is no such vessel class',
    description:
      'List the classes with `GET /v1/vessel-classes` and use one of their ids, or describe the vessel in full.',
  },
  'calibration-not-found': {
    status: 404,
    title: 'There is no such calibration',
    description:
      'List the calibrations with `GET /v1/calibrations` and use one of their ids, or leave `calibration_id` out.',
  },
  'method-not-found': {
    status: 404,
    title: 'There is no such method',
    description: 'List the published methods with `GET /v1/methods` and use one of their ids.',
  },
  'problem-not-found': {
    status: 404,
    title: 'There is no such problem type',
    description: 'List the problem types with `GET /v1/problems`.',
  },
  'method-not-allowed': {
    status: 405,
    title: 'The path does not answer this HTTP method',
    description: 'Use one of the methods in the `Allow` header.',
  },
  'not-acceptable': {
    status: 406,
    title: 'The reply is not available in that form',
    description:
      'Ask in `Accept`, or in the query parameter `format`, for one of the media types in `facts.available`.',
  },
  'request-timeout': {
    status: 408,
    title: 'The request took too long to arrive',
    description:
      'Send the whole request without long pauses; use a streaming endpoint for data that takes time to produce.',
  },
  'payload-too-large': {
    status: 413,
    title: 'The body is too large',
    description:
      'Send at most `facts.limit` bytes, counted after decompression, or use a streaming endpoint.',
  },
  'too-many-cells': {
    status: 413,
    title: 'The request asks for too many combinations',
    description: 'Split the request so that the number of combinations stays within `facts.limit`.',
  },
  'line-too-long': {
    status: 413,
    title: 'A line is too long',
    description: 'Keep every line, and every CSV row, within `facts.limit` bytes.',
  },
  'unsupported-media-type': {
    status: 415,
    title: 'The body is of a type that this path does not read',
    description:
      'Set `Content-Type` to one of the types in `facts.accepted`; leave `Content-Encoding` out or set it to `gzip`.',
  },
  'impossible-input': {
    status: 422,
    title: 'The fields are valid but cannot hold together',
    description:
      'Each entry of `errors` holds in `facts` the figures that contradict each other; correct one of them.',
  },
  internal: {
    status: 500,
    title: 'The service failed',
    description: 'The fault is on our side. Report the value of `instance` to whoever runs the service.',
  },
  overloaded: {
    status: 503,
    title: 'The service is busy',
    description: 'Repeat the request after the number of seconds in `Retry-After`.',
    retryAfter: 2,
  },
  stopping: {
    status: 503,
    title: 'The service is stopping',
    description:
      'Repeat the request after the number of seconds in `Retry-After`; another instance may answer at once.',
    retryAfter: 5,
  },
} as const satisfies Record<FaultCode, ProblemRow>

/** The row of a code as the general type, for readers that do not care which row it is. */
export const problemRow = (code: FaultCode): ProblemRow => PROBLEMS[code]

/** Every code, in the order of the table. */
export const PROBLEM_CODES = Object.keys(PROBLEMS) as FaultCode[]
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
