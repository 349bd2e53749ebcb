import { deflateSync } from 'node:zlib'
import type { StudyPart } from '../limits/chunks.ts'
import { evaluatePart } from '../limits/evaluate.ts'

/** What a thread made of a part of a study. */
export interface ComputedChunk {
  readonly cells: number
  /** JSON of the cells in order, deflated (RFC 1950) */
  readonly content: Uint8Array
}

/** The thread itself: evaluates a part, and packs it so that the thread that stores it has nothing to do but that. */
export function computeChunk(part: StudyPart): ComputedChunk {
  const cells = evaluatePart(part)
  // a copy, as the buffer may be a piece of a larger one, which would be sent whole
  return { cells: cells.length, content: new Uint8Array(deflateSync(JSON.stringify(cells))) }
}
