import { STATUS_CODES } from 'node:http'
import type { Socket } from 'node:net'
import { randomUUID } from 'node:crypto'
import type { FastifyReply, FastifyRequest } from 'fastify'
import { Fault, type FaultCode } from '../domain/fault.ts'
import type { App } from './app-type.ts'
import { JSON_TYPE, unsupportedType } from './body.ts'
import { VARY } from './negotiate.ts'
import { problemRow } from './problem-table.ts'
import { PROBLEM_TYPE, toProblem } from './problems.ts'
import { allowedMethods, type KnownRoute } from './known-routes.ts'
import { hasBegunReply } from './lifecycle.ts'
import { BROWSER_HEADERS, DATA_POLICY } from './security-headers.ts'

const INTERNAL = new Fault(
  'internal',
  'The service failed while answering; nothing in the request needs to change',
)

/** Framework errors that a caller causes, by the framework's code. Everything else from there is our own error. */
const FRAMEWORK_FAULTS: Readonly<Record<string, () => Fault>> = {
  FST_ERR_CTP_INVALID_MEDIA_TYPE: () => unsupportedType([JSON_TYPE]),
  FST_ERR_CTP_EMPTY_TYPE: () => unsupportedType([JSON_TYPE]),
  FST_ERR_ROUTE_MISSING_CONTENT_TYPE: () => unsupportedType([JSON_TYPE]),
  FST_ERR_CTP_BODY_TOO_LARGE: () => new Fault('payload-too-large', 'The body is too large'),
  FST_ERR_CTP_INVALID_CONTENT_LENGTH: () =>
    new Fault('invalid-request', 'The body is not as long as Content-Length says'),
  FST_ERR_BAD_URL: () =>
    new Fault(
      'invalid-request',
      'The path is not valid: write % as %25, and other characters as UTF-8 after %',
    ),
  FST_ERR_MAX_PARAM_LENGTH: () =>
    new Fault('route-not-found', 'The path is longer than any path of this service'),
}

/** The refusal that an error stands for; unknown errors become one with fixed text. */
export function toFault(error: unknown): Fault {
  if (error instanceof Fault) return error
  const code = error instanceof Error && 'code' in error ? String(error.code) : ''
  return FRAMEWORK_FAULTS[code]?.() ?? INTERNAL
}

/** Answers any error as a problem. Details of our own errors go to the log only. */
function answerError(error: unknown, request: FastifyRequest, reply: FastifyReply): void {
  const fault = toFault(error)
  const { status, retryAfter } = problemRow(fault.code)
  if (status >= 500 && !(error instanceof Fault)) request.log.error({ err: error }, 'failed')
  else request.log.info({ code: fault.code, detail: fault.message }, 'refused')
  // the limit of a caller knows better
  if (retryAfter !== undefined && !reply.hasHeader('retry-after'))
    reply.header('retry-after', String(retryAfter))
  // The framework closes the connection after a refused body; reading on lets the caller see the reply.
  reply.removeHeader('connection').removeHeader('content-encoding').removeHeader('content-length')
  if (fault.code === 'stopping') reply.header('connection', 'close')
  reply.removeHeader('etag').removeHeader('cache-control')
  void reply
    .header('x-request-id', request.id)
    .header('vary', VARY)
    .code(status)
    .type(PROBLEM_TYPE)
    .send(toProblem(fault, request.id))
}

/** Errors, unknown paths and unknown methods of known paths, all as problems. */
export function installErrors(app: App): void {
  const routes: KnownRoute[] = []
  app.addHook('onRoute', ({ method, url }) => {
    routes.push({ methods: [method].flat(), url })
  })
  app.setErrorHandler(answerError)
  // Here and not in the handler below, which runs only after the body was read.
  app.addHook('onRequest', (request, reply, done) => {
    if (!request.is404) done()
    else answerUnknown(request, reply, routes)
  })
  app.setNotFoundHandler((request, reply) => {
    answerUnknown(request, reply, routes)
  })
}

function answerUnknown(request: FastifyRequest, reply: FastifyReply, routes: readonly KnownRoute[]): void {
  const path = request.url.split('?', 1)[0] ?? request.url
  const allowed = allowedMethods(routes, path)
  // A path below which files are served may have the method and not the file.
  if (allowed.length === 0 || (allowed.includes(request.method) && request.method !== 'OPTIONS')) {
    answerError(new Fault('route-not-found', 'There is no such path; /docs lists them all'), request, reply)
    return
  }
  reply.header('allow', allowed.join(', '))
  if (request.method === 'OPTIONS') {
    void reply.code(204).send()
    return
  }
  const detail = `This path answers ${allowed.join(', ')}, not ${request.method}`
  answerError(new Fault('method-not-allowed', detail, { facts: { allowed } }), request, reply)
}

/** Answers errors that come up before there is a route, such as a path with broken percent signs. */
export function answerFrameworkError(error: unknown, request: FastifyRequest, reply: FastifyReply): void {
  // no hook runs for it
  void reply.headers(BROWSER_HEADERS).header('content-security-policy', DATA_POLICY)
  answerError(error, request, reply)
}

const CONNECTION_FAULTS: Readonly<Record<string, readonly [FaultCode, string]>> = {
  ERR_HTTP_REQUEST_TIMEOUT: ['request-timeout', 'The request did not arrive in time'],
  HPE_HEADER_OVERFLOW: [
    'invalid-request',
    'The header lines and the path are longer than this service reads',
  ],
}

/** Answers bytes that are not an HTTP request, where a reply can still be written. */
export function answerConnectionError(error: NodeJS.ErrnoException, socket: Socket): void {
  // a reply that has begun is broken off: a problem in the middle of it would make it look whole
  if (error.code === 'ECONNRESET' || !socket.writable || hasBegunReply(socket)) {
    socket.destroy()
    return
  }
  const [code, detail] = CONNECTION_FAULTS[error.code ?? ''] ?? [
    'invalid-request',
    'This is not an HTTP/1.1 request',
  ]
  const id = randomUUID()
  const { status } = problemRow(code)
  const body = JSON.stringify(toProblem(new Fault(code, detail), id))
  const head = [
    `HTTP/1.1 ${status} ${STATUS_CODES[status] ?? ''}`,
    `content-type: ${PROBLEM_TYPE}; charset=utf-8`,
    `content-length: ${Buffer.byteLength(body)}`,
    `x-request-id: ${id}`,
    'x-content-type-options: nosniff',
    'connection: close',
  ]
  socket.end(`${head.join('\r\n')}\r\n\r\n${body}`)
}
