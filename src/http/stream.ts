import { Readable } from 'node:stream'
import type { FastifyReply } from 'fastify'
import { Fault } from '../domain/fault.ts'

/**
 * Sends text as it is made. The first piece is awaited before the head goes out, so that a request refused by then
 * gets a problem. Later pieces are made as fast as the caller reads; the generator is ended when the caller goes
 * away, and when it throws the connection is reset, so that half an answer never looks whole. Neither outlasts the grace of
 * a service that stops: without a head the caller is told so, after it the connection is reset.
 */
export async function sendStream(reply: FastifyReply, pieces: AsyncIterable<string>): Promise<FastifyReply> {
  const iterator = pieces[Symbol.asyncIterator]()
  const { signal } = reply.server.grace
  const first = await beforeAbort(iterator.next(), signal).catch((error: unknown) => {
    void iterator.return?.()
    throw error
  })
  const stream = Readable.from(continued(first, iterator), { objectMode: false, highWaterMark: 65_536 })
  // The stream itself cannot be ended while it waits for what the caller sends next.
  const breakOff = (): void => {
    reply.log.info({ code: STOPPING.code, detail: STOPPING.message }, 'stream broken off')
    reply.raw.destroy()
  }
  signal.addEventListener('abort', breakOff)
  stream.once('close', () => {
    signal.removeEventListener('abort', breakOff)
  })
  // Also when the caller is gone before the first read, which would leave the generator waiting for ever.
  stream.once('close', () => void iterator.return?.())
  stream.once('error', (error) => {
    if ('code' in error && error.code === 'ERR_STREAM_PREMATURE_CLOSE') reply.log.info('caller is gone')
    else if (error instanceof Fault)
      reply.log.info({ code: error.code, detail: error.message }, 'stream broken off')
    else reply.log.error({ err: error }, 'stream failed')
  })
  return reply.send(stream)
}

const STOPPING = new Fault('stopping', 'The service is stopping; repeat the request shortly')

async function beforeAbort<T>(promise: Promise<T>, signal: AbortSignal): Promise<T> {
  let abort = (): void => undefined
  const aborted = new Promise<never>((_resolve, reject) => {
    abort = () => {
      reject(STOPPING)
    }
    signal.addEventListener('abort', abort)
  })
  try {
    return await Promise.race([promise, aborted])
  } finally {
    signal.removeEventListener('abort', abort)
  }
}

async function* continued(
  first: IteratorResult<string, unknown>,
  rest: AsyncIterator<string, unknown>,
): AsyncGenerator<string> {
  for (let piece = first; piece.done !== true; piece = await rest.next())
    if (piece.value !== '') yield piece.value
}
