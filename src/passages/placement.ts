import type { Options } from '../domain/conditions.ts'
import type { LonLat } from '../domain/position.ts'
import type { Direction, Segment } from '../domain/segment.ts'
import type { Status } from './position-report.ts'

/** A segment as reports are placed on it: a line on the map beside what is computed with. */
export interface Fairway {
  readonly id: string
  /** sailing line, drawn downstream, n ≥ 2 */
  readonly line: readonly LonLat[]
  readonly segment: Segment
  /** as of an advisory on this segment without options of its own */
  readonly options: Options
  /** chainage at the first and at the last vertex, m; may fall; absent: 0 and the length */
  readonly chainageFrom: number | undefined
  readonly chainageTo: number | undefined
}

/** Where a report stands. Figures are NaN and the fairway undefined where they do not apply. */
export interface Placement {
  readonly status: Status
  /** why it is not judged, kebab-case; undefined when matched */
  readonly reason: string | undefined
  /** of `matched`, `stationary`, `outside-fairway` and `ambiguous` (the best one) */
  readonly fairway: Fairway | undefined
  /** m from the first vertex along the sailing line */
  readonly along: number
  /** m along the waterway */
  readonly chainage: number
  /** from the sailing line, m, positive to the right looking downstream */
  readonly offset: number
  /** of motion along the fairway; undefined when it cannot be told */
  readonly direction: Direction | undefined
}

/** What of a placement a maximum depends on. */
export type Whereabouts = Pick<Placement, 'fairway' | 'chainage' | 'offset' | 'direction'>
