import { cellCount, type Study } from './study.ts'

/** Bounds of the water at a station after which a range of cells ends: about half a second. Own choice. */
const CHUNK_BOUNDS = 20_000
/** Decisions, in one current and direction, that take as long as the bounds that they rest on (measured). */
const DECISIONS_PER_BOUNDS = 25
/** Cells after which it ends, so that their rows stay small. Own choice. */
const CHUNK_CELLS = 2000

/** Cells [from, to) of a study. */
export type CellRange = readonly [from: number, to: number]

/** Cells of one segment, vessel and level, which share the bounds of the water. */
export function blockSize({ currents, directions }: Study): number {
  return currents.length * directions.length
}

/** Cells of one segment. */
function segmentSize(study: Study): number {
  return study.vessels.length * study.waterLevels.length * blockSize(study)
}

/**
 * A study in ranges of cells, each to be evaluated by itself: the same ranges for the same study. A range ends between
 * two blocks of one segment, vessel and level, and holds as many as make about half a second of work and at most 2000
 * cells, one block at least.
 *
 * @returns n ranges, n ≥ 1, in order, which cover every cell once
 */
export function chunksOf(study: Study): readonly CellRange[] {
  const block = blockSize(study)
  const blocksOfSegment = segmentSize(study) / block
  const samples = (study.uncertainty?.samples ?? 0) + 1
  const ofStation = samples * (1 + block / DECISIONS_PER_BOUNDS)
  const chunks: CellRange[] = []
  let from = 0
  let to = 0
  let work = 0
  for (const { segment } of study.segments) {
    const ofBlock = segment.stations.length * ofStation
    for (let i = 0; i < blocksOfSegment; i += 1) {
      const isFull = work + ofBlock > CHUNK_BOUNDS || to + block - from > CHUNK_CELLS
      if (isFull && to > from) {
        chunks.push([from, to])
        from = to
        work = 0
      }
      to += block
      work += ofBlock
    }
  }
  chunks.push([from, to])
  return chunks
}

/** What a range of cells needs of a study: plain data, which may be sent to a thread. */
export interface StudyPart {
  /** with the segments of the range alone */
  readonly study: Study
  /** index in the whole study of the first segment here */
  readonly firstSegment: number
  /** cells of the whole study, from inclusive, to exclusive */
  readonly from: number
  readonly to: number
}

/**
 * The part of a study that cells [from, to) need.
 *
 * @throws RangeError when the study does not have these cells
 */
export function partOf(study: Study, from: number, to: number): StudyPart {
  if (!Number.isInteger(from) || !Number.isInteger(to) || from < 0 || from > to || to > cellCount(study))
    throw new RangeError(`The study has ${cellCount(study)} cells, not ${from} to ${to}`)
  const size = segmentSize(study)
  const firstSegment = Math.floor(from / size)
  const segments = study.segments.slice(firstSegment, Math.ceil(to / size))
  return { study: { ...study, segments }, firstSegment, from, to }
}
