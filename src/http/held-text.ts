import { deflateRawSync, inflateRawSync } from 'node:zlib'

/** Characters that are compressed together. */
const PIECE = 262_144

/** Text that has to wait, compressed meanwhile: rows of a table take about a twelfth of their length so. */
export class HeldText {
  #open = ''
  readonly #pieces: Buffer[] = []

  add(text: string): void {
    this.#open += text
    if (this.#open.length < PIECE) return
    this.#pieces.push(deflateRawSync(this.#open, { level: 1 }))
    this.#open = ''
  }

  /** All of it, in pieces, in the order in which it was added. */
  *pieces(): Generator<string> {
    for (const piece of this.#pieces) yield inflateRawSync(piece).toString()
    if (this.#open !== '') yield this.#open
  }
}
