import { setMaxListeners } from 'node:events'
import type { ServerResponse } from 'node:http'
import type { Socket } from 'node:net'
import type { FastifyReply, FastifyRequest } from 'fastify'
import { Fault } from '../domain/fault.ts'
import type { App } from './app-type.ts'

declare module 'fastify' {
  interface FastifyInstance {
    /** aborted when streams of a service that stops have had their time: what still runs then is broken off */
    grace: AbortController
  }
}

/** The latest reply on each connection. */
const replies = new WeakMap<Socket, ServerResponse>()

/** Whether a reply on this connection is under way: its head is sent, its end is not. */
export function hasBegunReply(socket: Socket): boolean {
  const reply = replies.get(socket)
  return reply !== undefined && reply.headersSent && !reply.writableEnded
}

/** A request that is over. */
export interface Answered {
  readonly method: string
  /** pattern of its path, or `unknown` */
  readonly route: string
  /** of the reply, or `cut-off` */
  readonly status: string
  readonly seconds: number
}

/** One log line for each reply, and a problem for requests that arrive while the service stops. */
export function installLifecycle(app: App, onAnswered: (answered: Answered) => void = () => undefined): void {
  const grace = new AbortController()
  // every open stream listens
  setMaxListeners(0, grace.signal)
  app.decorate('grace', grace)
  let isStopping = false
  app.addHook('preClose', (done) => {
    isStopping = true
    done()
  })
  app.addHook('onRequest', (_request, _reply, done) => {
    if (isStopping) done(new Fault('stopping', 'The service is stopping; repeat the request shortly'))
    else done()
  })
  app.addHook('onRequest', (request, reply, done) => {
    replies.set(request.raw.socket, reply.raw)
    reply.raw.once('close', () => {
      // A reply that did not finish never reaches the hook below.
      if (!reply.raw.writableEnded) onAnswered(log(request, reply, 'cut off'))
    })
    done()
  })
  app.addHook('onResponse', (request, reply, done) => {
    onAnswered(log(request, reply, 'answered'))
    // A connection that idles from now on would be waited for.
    if (isStopping)
      setImmediate(() => {
        app.server.closeIdleConnections()
      })
    done()
  })
}

function log(request: FastifyRequest, reply: FastifyReply, message: 'answered' | 'cut off'): Answered {
  const { method, routeOptions } = request
  const duration = Math.round(reply.elapsedTime * 10) / 10
  const route = routeOptions.url ?? 'unknown'
  const key = request.accessKey?.name
  request.log.info(
    {
      method,
      route,
      status: reply.statusCode,
      duration_ms: duration,
      ...(key !== undefined && { key }),
    },
    message,
  )
  const status = message === 'cut off' ? 'cut-off' : String(reply.statusCode)
  return { method, route, status, seconds: reply.elapsedTime / 1000 }
}
