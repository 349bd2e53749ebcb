import type { Readable } from 'node:stream'
import { Fault } from '../domain/fault.ts'
import { unreadable } from './body.ts'
import { MAX_LINE_BYTES } from './lines.ts'

const LINE_FEED = 10
const CARRIAGE_RETURN = 13
/** Bytes after which a block ends with its line: rows that are alive at a time are few, which is what collecting garbage costs. */
const BLOCK = 16_384
const BYTE_ORDER_MARK = Buffer.from('\ufeff')

/**
 * Whole lines of bytes as they arrive: a block for each piece of the body. A line over the cap is undefined, so that it
 * still counts. For bulk: nothing is decoded, and bytes which are not UTF-8 become replacement characters later on.
 */
export async function* readLineBlocks(stream: Readable): AsyncGenerator<LineBlock | undefined> {
  const cutter = new BlockCutter()
  try {
    for await (const chunk of stream) yield* cutter.cut(chunk as Buffer)
  } catch (error) {
    throw error instanceof Fault ? error : unreadable(error as Error)
  }
  yield* cutter.end()
}

/** Lines that follow each other, the last one with or without its end. */
export class LineBlock {
  readonly bytes: Buffer
  /** where each line ends: the index of its line feed, of the last one the length where it has none; n ≥ 1 */
  readonly #ends: readonly number[]

  constructor(bytes: Buffer, ends: readonly number[]) {
    this.bytes = bytes
    this.#ends = ends
  }

  get lines(): number {
    return this.#ends.length
  }

  /** Index of the first byte of line i. */
  startOf(i: number): number {
    return i === 0 ? 0 : (this.#ends[i - 1] ?? 0) + 1
  }

  /** Line i as text, without its end. */
  line(i: number): string {
    const start = this.startOf(i)
    return this.bytes.toString('utf8', start, contentEnd(this.bytes, start, this.#ends[i] ?? 0))
  }
}

/** Where a line ends but for the carriage return before its line feed. */
const contentEnd = (bytes: Buffer, start: number, end: number): number =>
  end > start && bytes[end - 1] === CARRIAGE_RETURN ? end - 1 : end

/** Cuts pieces of bytes into blocks of whole lines. Holds no more than one line. */
class BlockCutter {
  #held: Buffer[] = []
  #length = 0
  #isTooLong = false
  #isStart = true

  /** Keeps what may be the start of a line. It is not looked at before its end, so that crumbs cost no more than pieces. */
  #hold(bytes: Buffer): void {
    const first = this.#isTooLong ? bytes.indexOf(LINE_FEED) : 0
    if (first < 0) return
    this.#held.push(bytes.subarray(first))
    this.#length += bytes.length - first
    // with a carriage return and what it takes to be over
    if (bytes.indexOf(LINE_FEED, first) >= 0 || this.#length <= MAX_LINE_BYTES + 1) return
    this.#isTooLong = true
    this.#held = []
    this.#length = 0
  }

  *cut(chunk: Buffer): Generator<LineBlock | undefined> {
    const last = chunk.lastIndexOf(LINE_FEED)
    if (last >= 0) {
      this.#hold(chunk.subarray(0, last + 1))
      yield* this.#blocks(this.#take())
    }
    if (last + 1 < chunk.length) this.#hold(chunk.subarray(last + 1))
  }

  /** The last line, when the body does not end with a line end. */
  *end(): Generator<LineBlock | undefined> {
    if (this.#length > 0 || this.#isTooLong) yield* this.#blocks(this.#take())
  }

  #take(): Buffer {
    const [only] = this.#held
    const bytes = this.#held.length === 1 && only ? only : Buffer.concat(this.#held)
    this.#held = []
    this.#length = 0
    const isMarked = this.#isStart && bytes.subarray(0, BYTE_ORDER_MARK.length).equals(BYTE_ORDER_MARK)
    this.#isStart = false
    return isMarked ? bytes.subarray(BYTE_ORDER_MARK.length) : bytes
  }

  /** Blocks between the lines that are too long. */
  *#blocks(bytes: Buffer): Generator<LineBlock | undefined> {
    let from = 0
    if (this.#isTooLong) {
      this.#isTooLong = false
      // what is left of such a line is its end
      from = bytes.length > 0 ? 1 : 0
      yield undefined
    }
    let ends: number[] = []
    let start = from
    while (start < bytes.length) {
      const found = bytes.indexOf(LINE_FEED, start)
      const end = found < 0 ? bytes.length : found
      if (contentEnd(bytes, start, end) - start > MAX_LINE_BYTES) {
        if (ends.length > 0) yield new LineBlock(bytes.subarray(from, start), ends)
        yield undefined
        ends = []
        from = end + 1
      } else {
        ends.push(end - from)
        if (end - from >= BLOCK) {
          yield new LineBlock(bytes.subarray(from, end + 1), ends)
          ends = []
          from = end + 1
        }
      }
      start = end + 1
    }
    if (ends.length > 0) yield new LineBlock(bytes.subarray(from), ends)
  }
}
