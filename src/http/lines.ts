import { isUtf8 } from 'node:buffer'
import type { IncomingMessage } from 'node:http'
import { PassThrough, type Readable } from 'node:stream'
import type { FastifyRequest } from 'fastify'
import { Fault } from '../domain/fault.ts'
import type { App } from './app-type.ts'
import { decoded, detached, refuseOtherBodies, unreadable } from './body.ts'
import { MEDIA_TYPES } from './negotiate.ts'

/** Bytes that a line may have, its end not counted. */
export const MAX_LINE_BYTES = 65_536

/** A physical line, numbered from 1: its text without the line end, or why it cannot be read. */
export type Line =
  | { readonly number: number; readonly text: string; readonly fault?: undefined }
  | { readonly number: number; readonly fault: Fault; readonly text?: undefined }

interface LineBodies {
  readonly types?: readonly ('ndjson' | 'csv')[]
  /**
   * Pieces, of up to 64 KiB, that are read before they are asked for. When they are more than what the system holds for a
   * connection, a caller that goes away is noticed at once, and not when all that it had sent is worked off.
   */
  readonly readAhead?: number
}

/** Inside `app.register`: makes the routes of this scope take streams of lines, of any length, instead of JSON. */
export function acceptLines(scope: App, { types = ['ndjson', 'csv'], readAhead = 1 }: LineBodies = {}): void {
  const accepted = types.map((type) => MEDIA_TYPES[type])
  scope.removeAllContentTypeParsers()
  scope.addContentTypeParser(accepted, (request: FastifyRequest, payload: IncomingMessage, done) => {
    const body = detached(
      payload,
      new PassThrough({
        // pieces stay pieces: a buffer of bytes would be handed on as one
        readableObjectMode: true,
        readableHighWaterMark: readAhead,
        // more than a piece, so that the connection is not paused after each
        writableHighWaterMark: readAhead * 65_536,
      }),
    )
    try {
      done(null, decoded(request, body))
    } catch (error) {
      body.destroy()
      done(error as Error)
    }
  })
  refuseOtherBodies(scope, accepted)
}

/** The stream that `acceptLines` left as the body; a Fault when the request came without one. */
export function bodyStream(request: FastifyRequest): Readable {
  const { body } = request
  if (typeof body === 'object' && body !== null && 'pipe' in body) return body as Readable
  throw new Fault('invalid-request', 'A body is required: send one item on each line')
}

export interface LineOptions {
  readonly maxBytes?: number
  /** Pass bytes that are not UTF-8 on with replacement characters instead of refusing the line. */
  readonly lenient?: boolean
}

/**
 * Lines as they arrive, in batches: one for each piece of the body that ends a line. Holds no more than one line.
 * A line over the cap or not in UTF-8 is a fault of that line; reading goes on after it.
 */
export async function* readLines(stream: Readable, options: LineOptions = {}): AsyncGenerator<Line[]> {
  const cutter = new LineCutter(options)
  try {
    for await (const chunk of stream) {
      const lines = cutter.cut(chunk as Buffer)
      if (lines.length > 0) yield lines
    }
  } catch (error) {
    throw error instanceof Fault ? error : unreadable(error as Error)
  }
  const last = cutter.end()
  if (last) yield [last]
}

const LINE_FEED = 10
const CARRIAGE_RETURN = 13
const BYTE_ORDER_MARK = Buffer.from([0xef, 0xbb, 0xbf])

/** Cuts pieces of bytes into lines, with memory for one line. */
class LineCutter {
  #pieces: Buffer[] = []
  #held = 0
  #isTooLong = false
  #number = 0
  readonly #maxBytes: number
  readonly #lenient: boolean

  constructor({ maxBytes = MAX_LINE_BYTES, lenient = false }: LineOptions) {
    this.#maxBytes = maxBytes
    this.#lenient = lenient
  }

  cut(chunk: Buffer): Line[] {
    const lines: Line[] = []
    let start = 0
    for (let end = chunk.indexOf(LINE_FEED); end >= 0; end = chunk.indexOf(LINE_FEED, start)) {
      this.#hold(chunk.subarray(start, end))
      lines.push(this.#take())
      start = end + 1
    }
    if (start < chunk.length) this.#hold(chunk.subarray(start))
    return lines
  }

  /** The last line, when the text does not end with a line end. */
  end(): Line | undefined {
    return this.#held > 0 || this.#isTooLong ? this.#take() : undefined
  }

  #hold(piece: Buffer): void {
    // Room for the two bytes that are stripped from a line within the cap: a mark at the start, a return at the end.
    if (this.#isTooLong || this.#held + piece.length > this.#maxBytes + BYTE_ORDER_MARK.length + 1) {
      this.#isTooLong = true
      this.#pieces = []
      this.#held = 0
      return
    }
    this.#pieces.push(piece)
    this.#held += piece.length
  }

  #take(): Line {
    const number = (this.#number += 1)
    const [only] = this.#pieces
    let bytes = this.#pieces.length === 1 && only ? only : Buffer.concat(this.#pieces, this.#held)
    if (number === 1 && bytes.subarray(0, 3).equals(BYTE_ORDER_MARK)) bytes = bytes.subarray(3)
    if (bytes.at(-1) === CARRIAGE_RETURN) bytes = bytes.subarray(0, -1)
    const isTooLong = this.#isTooLong || bytes.length > this.#maxBytes
    this.#pieces = []
    this.#held = 0
    this.#isTooLong = false
    if (isTooLong) return { number, fault: tooLong(this.#maxBytes) }
    if (!this.#lenient && !isUtf8(bytes)) return { number, fault: NOT_UTF8 }
    return { number, text: bytes.toString('utf8') }
  }
}

const NOT_UTF8 = new Fault('malformed-json', 'The line is not UTF-8: convert it and send it again')

const tooLong = (limit: number): Fault =>
  new Fault('line-too-long', `The line is longer than ${limit} bytes`, { facts: { limit } })
