import type { Options } from '../../src/domain/conditions.ts'
import type { Segment } from '../../src/domain/segment.ts'
import { findVesselClass } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass, type VesselFigures } from '../../src/domain/vessel-of.ts'
import type { Loading, Vessel } from '../../src/domain/vessel.ts'
import type { Study, StudySegment, Uncertainty } from '../../src/limits/study.ts'
import { PLAIN } from '../support/arbitraries.ts'
import { canal } from '../support/places.ts'

export const OPTIONS: Options = { ...PLAIN, applyPostedLimit: false }

export function vesselOf(id: string, loading: Loading = 'laden', figures: VesselFigures = {}): Vessel {
  return vesselOfClass(findVesselClass(id)!, loading, figures)
}

export const segmentOf = (segment: Segment, more: Partial<StudySegment> = {}): StudySegment => ({
  id: 'reach',
  chainageFrom: 0,
  chainageTo: 1000,
  length: 1000,
  segment,
  options: OPTIONS,
  ...more,
})

export const UNCERTAINTY: Uncertainty = {
  samples: 32,
  seed: 1,
  percentiles: [5, 50, 95],
  spreads: {
    depth_m: { kind: 'standard-deviation', size: 0.15 },
    width_m: { kind: 'half-range', size: 2 },
    bank_distance_m: { kind: 'standard-deviation', size: 1 },
    draught_m: { kind: 'standard-deviation', size: 0.08 },
    current_mps: { kind: 'standard-deviation', size: 0.1 },
  },
}

/** Three segments, one of them of two stations, with two vessels, two levels and two currents both ways. */
export const MIXED: Study = {
  segments: [
    segmentOf(canal({ depth: 4, distances: [27.5, 27.5], chainage: 120 }), {
      id: 'a-long-pound',
      waveHeightLogSd: 0.4,
    }),
    segmentOf(
      canal(
        { depth: 5.5, distances: [40, 60], chainage: 1000 },
        {
          stations: [
            {
              index: 0,
              chainage: 1000,
              depth: 5.5,
              width: 100,
              distances: [40, 60],
              shape: { kind: 'trapezoid' },
            },
            {
              index: 1,
              chainage: 1400,
              depth: 3.6,
              width: 70,
              distances: [30, 40],
              shape: { kind: 'trapezoid' },
            },
          ],
          maxDraught: 2.8,
        },
      ),
      { id: 'b-bend', waveHeightLogSd: 0.2 },
    ),
    segmentOf(canal({ depth: 8, distances: [300, 700] }, { confinement: 'open' }), {
      id: 'c-mere',
      waveHeightLogSd: 0.4,
    }),
  ],
  vessels: [vesselOf('cemt-va'), vesselOf('recreational-rb')],
  waterLevels: [-0.3, 0],
  currents: [0, 0.4],
  directions: ['upstream', 'downstream'],
  uncertainty: UNCERTAINTY,
}
