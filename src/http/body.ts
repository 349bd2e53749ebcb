import type { IncomingMessage } from 'node:http'
import type { Duplex, Readable } from 'node:stream'
import { createGunzip } from 'node:zlib'
import type { FastifyRequest } from 'fastify'
import { Fault } from '../domain/fault.ts'
import type { App } from './app-type.ts'
import { parseJsonBytes } from './json.ts'

export const JSON_TYPE = 'application/json'

/** Makes JSON the one type of body, read up to the route's limit in decoded bytes. */
export function installJsonBodies(app: App, settings: { readonly timeout: number }): void {
  app.removeAllContentTypeParsers()
  app.addContentTypeParser(JSON_TYPE, async (request: FastifyRequest, payload: IncomingMessage) =>
    parseJsonBytes(await readBody(request, payload, settings.timeout)),
  )
  refuseOtherBodies(app, [JSON_TYPE])
}

const GEOJSON_TYPE = 'application/geo+json'

/** Inside `app.register`: makes the routes of this scope take GeoJSON under its own name too. */
export function acceptGeoJson(scope: App, settings: { readonly timeout: number }): void {
  scope.addContentTypeParser(GEOJSON_TYPE, async (request: FastifyRequest, payload: IncomingMessage) =>
    parseJsonBytes(await readBody(request, payload, settings.timeout)),
  )
}

/** Answers 415 for bodies that no parser of this scope reads. */
export function refuseOtherBodies(app: App, accepted: readonly string[]): void {
  app.addContentTypeParser('*', (_request, _payload, done) => {
    done(unsupportedType(accepted))
  })
}

export const unsupportedType = (accepted: readonly string[]): Fault =>
  new Fault('unsupported-media-type', `Send the body as ${accepted.join(' or ')}`, { facts: { accepted } })

/** The body as it was before compression. Nothing but gzip is read. */
export function decoded(request: FastifyRequest, payload: Readable): Readable {
  const encoding = request.headers['content-encoding']?.trim().toLowerCase() ?? 'identity'
  if (encoding === 'identity') return payload
  if (encoding !== 'gzip' && encoding !== 'x-gzip') {
    throw new Fault('unsupported-media-type', 'Send the body uncompressed or with content-encoding gzip', {
      facts: { accepted: ['gzip', 'identity'] },
    })
  }
  return detached(payload, createGunzip())
}

/**
 * The body through another stream, which may fail or be given up without harm to the connection: destroying the
 * body itself would close the socket before a reply could be written.
 */
export function detached<Through extends Duplex>(payload: Readable, through: Through): Through {
  // Nobody may be reading when it fails, if the request was refused meanwhile; whoever reads is told all the same.
  through.on('error', () => undefined)
  payload.pipe(through)
  payload.once('error', (error) => through.destroy(error))
  through.once('close', () => {
    payload.unpipe(through)
    payload.resume()
  })
  return through
}

/** Bytes of bodies that are held while they come in, all together: four of the largest (own choice). */
const MAX_HELD = 268_435_456
let held = 0

/**
 * All bytes of a body. Stops, without holding more, at the limit of the route, when they come too slowly, or when the bodies
 * that are coming in take too much memory together.
 */
export async function readBody(
  request: FastifyRequest,
  payload: IncomingMessage,
  timeout: number,
): Promise<Buffer> {
  const limit = request.routeOptions.bodyLimit
  if (Number(request.headers['content-length']) > limit) throw tooLarge(limit)
  const source = decoded(request, payload)
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = []
    let length = 0
    const timer = setTimeout(() => {
      stop(new Fault('request-timeout', `The body did not arrive within ${timeout / 1000} s`))
    }, timeout)
    const release = (): void => {
      clearTimeout(timer)
      held -= length
      length = 0
    }
    const stop = (fault: Error): void => {
      release()
      source.removeAllListeners('data')
      if (source !== payload) source.destroy()
      else source.resume()
      reject(fault)
    }
    source.on('data', (chunk: Buffer) => {
      length += chunk.length
      held += chunk.length
      if (length > limit) stop(tooLarge(limit))
      else if (held > MAX_HELD) stop(TOO_MUCH_AT_ONCE)
      else chunks.push(chunk)
    })
    source.once('error', (error) => {
      stop(unreadable(error))
    })
    source.once('end', () => {
      const body = Buffer.concat(chunks, length)
      release()
      resolve(body)
    })
  })
}

const TOO_MUCH_AT_ONCE = new Fault(
  'overloaded',
  'The bodies that are coming in are too large together; repeat the request shortly',
)

const tooLarge = (limit: number): Fault =>
  new Fault('payload-too-large', `The body is larger than ${limit} bytes, counted after decompression`, {
    facts: { limit },
  })

/** What went wrong while bytes of a body were read: broken compression, or a caller that went away. */
export function unreadable(error: Error): Fault {
  const code = 'code' in error ? String(error.code) : ''
  const zipped = code.startsWith('Z_')
  return new Fault(
    'invalid-request',
    zipped ? 'The body is not whole gzip data' : 'The body ended before it was complete',
  )
}

const LINGER = 10_000 // ms

/**
 * Reads on for a while when a reply went out before its request was all in, so that the caller can read the reply
 * instead of meeting a closed connection; then closes.
 */
export function installLinger(app: App): void {
  app.addHook('onSend', (request, reply, _payload, done) => {
    const { raw } = request
    // Otherwise the connection of a caller that asked for `close` is cut while it still sends, and the reply with it.
    if (reply.statusCode >= 400 && !raw.complete && raw.httpVersion === '1.1')
      reply.raw.shouldKeepAlive = true
    done()
  })
  app.addHook('onResponse', (request, _reply, done) => {
    const { raw } = request
    if (!raw.complete && !raw.destroyed) {
      const timer = setTimeout(() => raw.destroy(), LINGER)
      timer.unref()
      raw.once('close', () => {
        clearTimeout(timer)
      })
      raw.resume()
    }
    done()
  })
}
