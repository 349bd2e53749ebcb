import type { Hull } from './vessel.ts'

/** A factor of a wave-height method on one water: measured over computed height. */
export interface CalibratedMethod {
  readonly id: string
  /** of vessels whose hull is not listed, dimensionless, > 0 */
  readonly factor: number
  /** by hull where several were measured */
  readonly factorByHull: Partial<Readonly<Record<Hull, number>>>
}

/** Lowest and highest value that was measured. */
export type Extent = readonly [least: number, greatest: number]

/** What measurements said of the wave-height methods on one water. Never changes. */
export interface Calibration {
  readonly id: string
  readonly name: string
  /** methods with a factor; the others do not count on this water */
  readonly methods: readonly CalibratedMethod[]
  /** standard deviation of the logarithm of measured over computed height by the recommended method, dimensionless */
  readonly scatter: number
  readonly coverage: {
    /** through the water, m/s */
    readonly speed: Extent
    /** gauge to sailing line, m */
    readonly distance: Extent
    /** m */
    readonly depth: Extent
    readonly depthFroudeNumber: Extent
  }
}
