import type { FastifyReply, FastifyRequest } from 'fastify'
import type { Socket } from 'node:net'
import type { Readable } from 'node:stream'

/**
 * Keeps a connection without traffic open as long as the service has work in hand: the log has come in, or some of it
 * waits to be read, and no reply was begun. A caller that stops sending, or stops reading, is cut off as usual.
 */
export function keepOpenAtWork(request: FastifyRequest, reply: FastifyReply, body: Readable): void {
  reply.raw.on('timeout', (socket: Socket) => {
    const isAtWork = !reply.raw.headersSent && (request.raw.complete || body.readableLength > 0)
    if (isAtWork) socket.setTimeout(socket.timeout ?? 0)
    else socket.destroy()
  })
}
