import type { IncomingMessage, RequestListener, ServerResponse } from 'node:http'
import { Fault } from '../domain/fault.ts'
import type { Admission } from './admission.ts'
import type { App } from './app-type.ts'
import { VARY } from './negotiate.ts'
import { problemRow } from './problem-table.ts'
import { PROBLEM_TYPE, toProblem } from './problems.ts'
import { requestId } from './request-id.ts'
import { BROWSER_HEADERS } from './security-headers.ts'

/** ms between two lines of the log about refusals: a line for each would take the time that is short */
const TELLING = 1000

/** Paths with bounds of their own, or none. */
const OTHERS = /^\/(?:health\/|metrics(?:\?|$)|v1\/(?:advisories\/(?:stream|matrix)|passages\/check)(?:\?|$))/

const BUSY = new Fault(
  'overloaded',
  'The service has as many requests in hand as it can answer soon; repeat this one shortly',
)
const { status: STATUS, retryAfter: RETRY_AFTER } = problemRow('overloaded')

/**
 * Refuses what there is no place for before anything else is done about it. Under load most of the time would otherwise go
 * into refusals, which then cost half as much as answers.
 */
export function installEarlyRefusal(app: App, admission: Admission, origins: readonly string[]): void {
  const refuse = (request: IncomingMessage, reply: ServerResponse): void => {
    const id = requestId(request)
    const body = JSON.stringify(toProblem(BUSY, id))
    const { origin } = request.headers
    reply.writeHead(STATUS, {
      ...BROWSER_HEADERS,
      'content-type': `${PROBLEM_TYPE}; charset=utf-8`,
      'content-length': Buffer.byteLength(body),
      'retry-after': String(RETRY_AFTER),
      'x-request-id': id,
      vary: origins.length > 0 ? `${VARY}, Origin` : VARY,
      ...(origin !== undefined &&
        origins.includes(origin) && {
          'access-control-allow-origin': origin,
          'access-control-expose-headers': 'retry-after, x-request-id',
        }),
    })
    reply.end(body)
    // the caller may still be sending
    request.resume()
    admission.refusedEarly += 1
  }
  app.addHook('onListen', (done) => {
    const [answer] = app.server.listeners('request') as RequestListener[]
    if (answer) {
      app.server.removeListener('request', answer)
      app.server.on('request', (request: IncomingMessage, reply: ServerResponse) => {
        if (admission.isFull('request') && !OTHERS.test(request.url ?? '')) refuse(request, reply)
        else answer.call(app.server, request, reply)
      })
    }
    tell(app, admission)
    done()
  })
}

function tell(app: App, admission: Admission): void {
  let told = 0
  const timer = setInterval(() => {
    const count = admission.refusedEarly - told
    told = admission.refusedEarly
    if (count > 0) app.log.warn({ count, code: BUSY.code }, 'refused without a look')
  }, TELLING)
  timer.unref()
  app.server.once('close', () => {
    clearInterval(timer)
  })
}
