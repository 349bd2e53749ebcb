import type { Segment } from '../../src/domain/segment.ts'
import { findVesselClass } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass } from '../../src/domain/vessel-of.ts'
import { chunksOf } from '../../src/limits/chunks.ts'
import { cellCount, type Study, type StudySegment } from '../../src/limits/study.ts'
import type { JobContent } from '../../src/store/job-records.ts'
import { NO_OPTIONS, REACH } from './passage-marks.ts'

/** Methods of the jobs of tests. */
export const METHODS = 'methods-of-the-test'

function vessel(id: string) {
  const found = findVesselClass(id)
  if (!found) throw new Error(`no class ${id}`)
  return vesselOfClass(found, 'laden', {})
}

/** Reach i of a row of reaches 500 m long, each a little deeper and wider than the one before. */
function reach(i: number): StudySegment {
  const [first] = REACH.stations
  const id = `reach-${String(i).padStart(4, '0')}`
  const station = { ...first, depth: 3 + (i % 17) / 10, width: 40 + (i % 7) }
  const segment: Segment = { ...REACH, id, stations: [station] }
  return {
    id,
    waterway: 'Harrowmere Navigation',
    chainageFrom: i * 500,
    chainageTo: (i + 1) * 500,
    length: 500,
    segment,
    options: { ...NO_OPTIONS, applyPostedLimit: false },
    waveHeightLogSd: 0.4,
  }
}

/**
 * A study of a row of reaches by two vessels at two levels, up and down in two currents: 16 cells for each reach.
 *
 * @param samples  of each cell; none: without uncertainty
 */
export function studyOf(reaches: number, samples?: number): Study {
  return {
    segments: Array.from({ length: reaches }, (_, i) => reach(i)),
    vessels: [vessel('cemt-iv'), vessel('cemt-ii')],
    waterLevels: [0, 0.3],
    currents: [0, 0.4],
    directions: ['upstream', 'downstream'],
    ...(samples !== undefined && {
      uncertainty: {
        samples,
        seed: 7,
        percentiles: [5, 50, 95],
        spreads: { depth_m: { kind: 'standard-deviation', size: 0.1 } },
      },
    }),
  }
}

/** A study as it is handed to the store. */
export function jobContent(study: Study, changes: Partial<JobContent> = {}): JobContent {
  return {
    kind: 'study',
    name: 'Row of reaches',
    request: { name: 'Row of reaches' },
    inputs: { study },
    cellsTotal: cellCount(study),
    chunksTotal: chunksOf(study).length,
    registryRevision: 3,
    methodVersion: METHODS,
    serviceVersion: '0.0.0',
    ...changes,
  }
}
