import type { Readable } from 'node:stream'
import { StringDecoder } from 'node:string_decoder'
import { Fault } from '../domain/fault.ts'
import { unreadable } from './body.ts'
import { MAX_LINE_BYTES } from './lines.ts'

const BYTE_ORDER_MARK = '\ufeff'
const CARRIAGE_RETURN = 13
/** Most bytes that UTF-8 takes for one unit of a string. */
const BYTES_PER_UNIT = 3

/**
 * Lines of text as they arrive, in batches: one for each piece of the body. A line over the cap is undefined, so that it
 * still counts. For bulk: a piece is decoded as a whole and lines are cut from it, twice as fast as to decode line by
 * line, at the price that bytes which are not UTF-8 become replacement characters.
 */
export async function* readTextLines(stream: Readable): AsyncGenerator<(string | undefined)[]> {
  const lines = new TextLines()
  try {
    for await (const chunk of stream) yield lines.cut(chunk as Buffer)
  } catch (error) {
    throw error instanceof Fault ? error : unreadable(error as Error)
  }
  yield lines.end()
}

/** Cuts pieces of bytes into lines of text. Holds no more than one line. */
class TextLines {
  readonly #decoder = new StringDecoder('utf8')
  #held = ''
  #isTooLong = false
  #isStart = true

  cut(chunk: Buffer): (string | undefined)[] {
    return this.#lines(this.#withoutMark(this.#decoder.write(chunk)))
  }

  /** The last line, when the text does not end with a line end; none or one. */
  end(): (string | undefined)[] {
    const lines = this.#lines(this.#withoutMark(this.#decoder.end()))
    return this.#held !== '' || this.#isTooLong ? [...lines, this.#take('')] : lines
  }

  #withoutMark(text: string): string {
    if (!this.#isStart || text === '') return text
    this.#isStart = false
    return text.startsWith(BYTE_ORDER_MARK) ? text.slice(1) : text
  }

  #lines(text: string): (string | undefined)[] {
    const lines: (string | undefined)[] = []
    let start = 0
    for (let end = text.indexOf('\n'); end >= 0; end = text.indexOf('\n', start)) {
      lines.push(this.#take(text.slice(start, end)))
      start = end + 1
    }
    this.#hold(text.slice(start))
    return lines
  }

  /** Keeps what may be the start of a line. It is not looked at before its end, so that crumbs cost no more than pieces. */
  #hold(text: string): void {
    if (this.#isTooLong || text === '') return
    this.#held += text
    if (this.#held.length <= MAX_LINE_BYTES + 1) return
    this.#isTooLong = true
    this.#held = ''
  }

  #take(end: string): string | undefined {
    const isTooLong = this.#isTooLong
    const whole = this.#held === '' ? end : this.#held + end
    this.#held = ''
    this.#isTooLong = false
    if (isTooLong) return undefined
    const line = whole.charCodeAt(whole.length - 1) === CARRIAGE_RETURN ? whole.slice(0, -1) : whole
    return isWithinCap(line) ? line : undefined
  }
}

function isWithinCap(line: string): boolean {
  if (line.length * BYTES_PER_UNIT <= MAX_LINE_BYTES) return true
  return line.length <= MAX_LINE_BYTES && Buffer.byteLength(line) <= MAX_LINE_BYTES
}
