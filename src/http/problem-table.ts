import type { FaultCode } from '../domain/fault.ts'

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
  'key-required': {
    status: 401,
    title: 'A key is required',
    description:
      'Send `Authorization: Bearer <key>` with a key that is neither revoked nor expired; whoever runs the service makes keys.',
  },
  'role-too-small': {
    status: 403,
    title: 'The role of the key does not allow this',
    description: 'Use a key with the role in `facts.needed`, or one that includes it.',
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
  'revision-not-found': {
    status: 404,
    title: 'There is no such revision',
    description:
      'List the revisions with `GET /v1/segments/{id}/revisions` and use one of their numbers; a deletion has no content to show.',
  },
  'study-not-found': {
    status: 404,
    title: 'There is no such study',
    description: 'List the studies with `GET /v1/studies` and use one of their ids, or make one.',
  },
  'limit-plan-not-found': {
    status: 404,
    title: 'There is no such limit plan',
    description: 'List the plans with `GET /v1/limit-plans` and use one of their ids, or make one.',
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
  'built-in-class': {
    status: 409,
    title: 'Built-in vessel classes cannot be changed',
    description: 'Write a class of your own under another id.',
  },
  'in-use': {
    status: 409,
    title: 'Something still refers to it',
    description: 'Change or delete what `facts.used_by` names first, then repeat the request.',
  },
  'study-not-finished': {
    status: 409,
    title: 'The study has not succeeded',
    description:
      'Ask for the study until its `state` is `succeeded`, after the seconds in `Retry-After`; one that failed or was cancelled is made again.',
  },
  'limit-plan-published': {
    status: 409,
    title: 'The limit plan is published',
    description:
      'A published plan never changes. Make another, and publish it with `supersedes` naming this one.',
  },
  'number-taken': {
    status: 409,
    title: 'Another limit plan has this number',
    description: 'Publish under a number of its own; `facts.limit_plan_id` is the plan that has this one.',
  },
  'stale-revision': {
    status: 412,
    title: 'The revision in If-Match is not the current one',
    description:
      'Read the resource again, apply your change to what it holds now, and send the new `ETag` in `If-Match`. `facts.current` is the current revision.',
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
  'too-few-passages': {
    status: 422,
    title: 'There are too few measured passages',
    description:
      'Send at least `facts.needed` passages that lie in the range of one method; `facts.in_range` tells how many do.',
  },
  'units-doubtful': {
    status: 422,
    title: 'The units of the measurements are doubtful',
    description:
      'Measured over computed wave heights, `facts.ratio`, look like feet for metres. Send metres, or `confirm_units` when the figures are metres.',
  },
  'revision-required': {
    status: 428,
    title: 'The request must say which revision it changes',
    description:
      'Send `If-Match` with the `ETag` that reading the resource gives, or with `*` to change it whatever it holds.',
  },
  'too-many-requests': {
    status: 429,
    title: 'There were too many requests',
    description: 'Repeat the request after the number of seconds in `Retry-After`.',
    retryAfter: 60,
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
  'store-unavailable': {
    status: 503,
    title: 'The database does not answer',
    description:
      'Repeat the request after the number of seconds in `Retry-After`. A write may have been made before the connection was lost: read the resource first.',
    retryAfter: 5,
  },
  'storage-full': {
    status: 503,
    title: 'The storage of the database is full',
    description:
      'Nothing was written. Reading goes on; writes succeed again when whoever runs the service has made room.',
    retryAfter: 300,
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
