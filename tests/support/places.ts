import type { Conditions } from '../../src/domain/conditions.ts'
import type { Bank, Segment, Side, Station } from '../../src/domain/segment.ts'

export const atRest: Conditions = {
  waterLevel: 0,
  current: 0,
  isWaterLevelGiven: true,
  isCurrentGiven: true,
}

export const soil = (side: Side, more: Partial<Bank> = {}): Bank => ({
  side,
  kind: 'unprotected',
  isKindGiven: true,
  stoneRelativeDensity: 1.65,
  ...more,
})

/** A confined segment of one station with soil banks, nearer bank first. */
export function canal(
  station: Pick<Station, 'depth' | 'distances'> & Partial<Station>,
  more: Partial<Segment> = {},
): Segment {
  const [a, b] = station.distances
  return {
    stations: [{ index: 0, width: a + b, shape: { kind: 'trapezoid' }, ...station }],
    banks: [soil('nearer'), soil('farther')],
    receptors: [],
    postedLimits: [],
    confinement: 'confined',
    ...more,
  }
}
