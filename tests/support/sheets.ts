import { readFileSync } from 'node:fs'
import { advise, type Advisory } from '../../src/advisory/advise.ts'
import { speedCurve } from '../../src/advisory/curve.ts'
import type { Conditions, Options } from '../../src/domain/conditions.ts'
import { Fault } from '../../src/domain/fault.ts'
import { VESSEL_CLASSES, findVesselClass } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass, type VesselFigures } from '../../src/domain/vessel-of.ts'
import { LOADINGS, type Loading } from '../../src/domain/vessel.ts'
import { segmentOf } from '../../src/http/request.ts'
import type { SheetParts } from '../../src/report/sheet.ts'
import { fileRegistry, type SegmentFeature } from '../../src/store/file-registry.ts'
import type { SegmentRecord } from '../../src/store/registry.ts'
import { atRest } from './places.ts'

const FILE = new URL('../../openapi/examples/harrowmere-navigation.geojson', import.meta.url)
const { features } = JSON.parse(readFileSync(FILE, 'utf8')) as { features: SegmentFeature[] }

export const demo = fileRegistry(features, '2026-12-01T00:00:00Z')

export const plainOptions: Options = {
  combine: 'highest',
  limits: {},
  applyPostedLimit: true,
  signUnit: 'km/h',
  signStep: 1,
  hasCurve: false,
}

export interface Asked {
  readonly segment: SegmentRecord | string
  readonly vesselClass: string
  readonly loading?: Loading
  readonly figures?: VesselFigures
  readonly conditions?: Partial<Conditions>
  readonly options?: Partial<Options>
}

export function recordOf(segment: SegmentRecord | string): SegmentRecord {
  return typeof segment === 'string' ? demo.findSegment(segment)! : segment
}

export function advisoryOf({ segment, vesselClass, loading, figures, conditions, options }: Asked): Advisory {
  const vessel = vesselOfClass(findVesselClass(vesselClass)!, loading ?? 'laden', figures ?? {})
  const water = segmentOf(recordOf(segment))
  return advise(water, vessel, { ...atRest, ...conditions }, { ...plainOptions, ...options })
}

/** Everything that a sheet is made from. */
export function sheetParts(asked: Asked): SheetParts {
  const advisory = advisoryOf(asked)
  return {
    record: recordOf(asked.segment),
    advisory,
    curve: speedCurve(advisory.decision),
    serviceVersion: '1.2.3',
    methodVersion: '4',
    inputHash: `sha256:${'0123456789abcdef'.repeat(4)}`,
    made: '2026-12-01T09:30:00Z',
  }
}

/** The same, or undefined where the vessel does not fit the water. */
export function sheetPartsIfAny(asked: Asked): SheetParts | undefined {
  try {
    return sheetParts(asked)
  } catch (error) {
    if (error instanceof Fault && error.code === 'impossible-input') return undefined
    throw error
  }
}

/** A segment of the demo waterway with other properties. */
export const changed = (id: string, properties: Record<string, unknown>): SegmentRecord => {
  const record = recordOf(id)
  return { ...record, properties: { ...record.properties, ...properties } }
}

/** Every class in both loadings on every segment, still and in a current, by what is asked. */
export function wideSet(): Asked[] {
  const conditions: Partial<Conditions>[] = [
    {},
    { waterLevel: 0.7, current: 0.6 },
    { waterLevel: -0.2, current: -1.1, direction: 'downstream' },
  ]
  return demo.segments().flatMap(({ id }) =>
    VESSEL_CLASSES.flatMap((vesselClass, k) =>
      LOADINGS.map((loading, i) => ({
        segment: id,
        vesselClass: vesselClass.id,
        loading,
        conditions: conditions[(k + i) % conditions.length]!,
      })),
    ),
  )
}

/** Cases that look different from one another, by name. */
export const CASES: Readonly<Record<string, Asked>> = {
  'a canal section': { segment: 'harrow-long-pound', vesselClass: 'cemt-va' },
  'no safe speed': { segment: 'harrow-town-reach', vesselClass: 'cemt-iv' },
  'a current': {
    segment: 'harrow-docks',
    vesselClass: 'coaster',
    conditions: { waterLevel: 0.6, current: 0.5 },
  },
  'a surveyed profile': { segment: 'harrow-tideway', vesselClass: 'cemt-via' },
  'open water': { segment: 'harrow-mere-open', vesselClass: 'planing-boat' },
  stations: { segment: 'harrow-lower-cut', vesselClass: 'cemt-iv' },
  'a receptor that governs': { segment: 'harrow-mere-channel', vesselClass: 'patrol-boat' },
  'the farther bank': {
    segment: 'harrow-upper-reach',
    vesselClass: 'recreational-rc',
    conditions: { waterLevel: -0.3, current: 0.8 },
    options: { applyPostedLimit: false },
  },
}
