import { randomUUID } from 'node:crypto'
import type { IncomingMessage } from 'node:http'
import type { App } from './app-type.ts'

const ACCEPTED = /^[A-Za-z0-9._-]{1,64}$/

/** The caller's `x-request-id` when it is safe to log and to send back, else a new one. */
export function requestId(request: Pick<IncomingMessage, 'headers'>): string {
  const given = request.headers['x-request-id']
  return typeof given === 'string' && ACCEPTED.test(given) ? given : randomUUID()
}

/** Sends the id back in every reply, so that a caller can quote it. */
export function installRequestId(app: App): void {
  app.addHook('onRequest', (request, reply, done) => {
    reply.header('x-request-id', request.id)
    done()
  })
}
