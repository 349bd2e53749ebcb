import { besideTheWaterway } from './beside.ts'
import {
  withDuplicate,
  withGarbledTime,
  withJump,
  withLate,
  withoutCourse,
  withoutPosition,
  withoutSpeed,
  withSwap,
} from './disturb.ts'
import { maximaBy, type Advise } from './maximum.ts'
import { ordinary } from './ordinary.ts'
import { DISTURBED, PLANTED, type Planted } from './planted.ts'
import { randomOf } from './random.ts'
import type { Row } from './row.ts'
import { sail, type Making } from './sail.ts'
import { truthOf, type Truth } from './truth.ts'
import { readWaterway } from './waterway.ts'

export interface InventedLog {
  /** in the order of the log */
  readonly rows: readonly Row[]
  readonly truth: Truth
}

/** When the log begins: s since 1970, a day without a story. */
const START = Date.parse('2026-05-04T06:00:00Z') / 1000

/** Tracks with what is done to them, in turn. */
const DISTURBANCES: readonly (readonly [Planted, ...((rows: readonly Row[]) => Row[])[]])[] = [
  [
    DISTURBED.unordered,
    // the first two reports of the event, and its last two
    (rows) => withSwap(rows, 2),
    (rows) => withSwap(rows, 6),
    (rows) => withDuplicate(rows, 6),
    (rows) => withLate(rows, 7),
    (rows) => withGarbledTime(rows, 0),
  ],
  [DISTURBED.jumping, (rows) => withJump(rows, 2), (rows) => withJump(rows, 5)],
  [
    DISTURBED.silent,
    (rows) => withoutCourse(rows, 3),
    (rows) => withoutPosition(rows, 1),
    (rows) => withoutPosition(rows, 5),
    (rows) => withoutSpeed(rows, 4),
  ],
]

/**
 * An invented log of the Harrowmere Navigation, and what is true of it.
 *
 * @param advise  answers `POST /v1/advisories`
 * @param seed    the same log for the same seed
 * @param vessels how many ordinary vessels pass beside the planted ones
 */
export async function inventLog(advise: Advise, seed: number, vessels: number): Promise<InventedLog> {
  const waterway = readWaterway()
  const random = randomOf(seed)
  const making: Making = { waterway, random, maximaOf: maximaBy(advise) }
  const track = ({ ship, start, legs }: Planted) => sail(ship, legs, START + start, making)
  const rows: Row[] = []
  for (const planted of PLANTED) rows.push(...(await track(planted)))
  for (const [planted, ...disturbances] of DISTURBANCES) {
    const disturbed = disturbances.reduce<readonly Row[]>(
      (done, disturb) => disturb(done),
      await track(planted),
    )
    rows.push(...disturbed)
  }
  rows.push(...besideTheWaterway(waterway, START))
  for (const planted of ordinary(vessels, waterway, random)) rows.push(...(await track(planted)))
  const ordered = rows.toSorted((a, b) => a.arrival - b.arrival)
  return { rows: ordered, truth: truthOf(ordered, { seed, vessels }) }
}
