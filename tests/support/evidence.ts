import { METHODS } from '../../src/advisory/catalogue.ts'
import { findVesselClass } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass } from '../../src/domain/vessel-of.ts'
import type { Vessel } from '../../src/domain/vessel.ts'
import type { Loading } from '../../src/domain/vessel.ts'
import type { Segment } from '../../src/domain/segment.ts'
import { segmentOf } from '../../src/http/request.ts'
import type { Cell } from '../../src/limits/cell.ts'
import { evaluateCells } from '../../src/limits/evaluate.ts'
import { PlanBuilder } from '../../src/limits/plan-builder.ts'
import type { Plan, PlanRules, Stretch } from '../../src/limits/plan.ts'
import { cellCount, type Study, type StudySegment, type Uncertainty } from '../../src/limits/study.ts'
import type { EvidencePublication, EvidenceView } from '../../src/report/evidence-view.ts'
import type { SegmentRecord } from '../../src/store/registry.ts'
import { canal } from './places.ts'
import { changed, demo, plainOptions } from './sheets.ts'

const options = { ...plainOptions, applyPostedLimit: false }

export const vessel = (id: string, loading: Loading = 'laden'): Vessel =>
  vesselOfClass(findVesselClass(id)!, loading, {})

export const uncertain: Uncertainty = {
  samples: 16,
  seed: 7,
  percentiles: [5, 50, 95],
  spreads: {
    depth_m: { kind: 'standard-deviation', size: 0.1 },
    width_m: { kind: 'standard-deviation', size: 0.8 },
    bank_distance_m: { kind: 'half-range', size: 1 },
    draught_m: { kind: 'standard-deviation', size: 0.05 },
    current_mps: { kind: 'standard-deviation', size: 0.05 },
  },
}

export function studySegment(record: SegmentRecord, hasUncertainty = false): StudySegment {
  const { waterway, chainage_from_m: from, chainage_to_m: to } = record.properties
  return {
    id: record.id,
    ...(typeof waterway === 'string' && { waterway }),
    chainageFrom: typeof from === 'number' ? from : 0,
    chainageTo: typeof to === 'number' ? to : record.length,
    length: record.length,
    segment: segmentOf(record),
    options,
    ...(hasUncertainty && { waveHeightLogSd: 0.4 }),
  }
}

const plainRules: PlanRules = {
  groups: [{ id: 'all', name: 'All vessels', appliesTo: {} }],
  percentile: null,
  signUnit: 'km/h',
  signStep: 1,
  smallestLimit: 4,
  largestLimit: 18,
  minRunLength: 0,
  isByDirection: false,
  keepPosted: [],
}

export const publication: EvidencePublication = {
  number: 'HNC 2026/14',
  title: 'Limits of speed on the Harrowmere Navigation',
  authority: 'Harrowmere Navigation Commission (invented)',
  signatory: 'E. Alderley, Navigation Engineer',
  effectiveFrom: '2027-04-01',
  supersedes: 'HNC 2019/3',
  note: 'Drawn after the soundings of March 2026.',
  publishedAt: '2026-12-01T09:30:00Z',
  publishedBy: 'planning desk',
  serviceVersion: '1.2.3',
  methodVersion: '4',
  recordHash: `sha256:${'0123456789abcdef'.repeat(4)}`,
}

/** Where the governing cell of a stretch stands among the cells. */
function cellOf({ governing }: Stretch, study: Study, cells: readonly Cell[]): Cell | undefined {
  return cells.find(
    (cell) =>
      governing !== undefined &&
      study.segments[cell.segment]?.id === governing.segmentId &&
      cell.vessel === governing.vessel &&
      study.waterLevels[cell.waterLevel] === governing.waterLevel &&
      study.currents[cell.current] === governing.current &&
      (study.directions[cell.direction] ?? undefined) === governing.direction,
  )
}

/** A plan drawn from a study, as the service shows it. */
export function viewOf(
  study: Study,
  rules: Partial<PlanRules> = {},
  more: Partial<EvidenceView> = {},
): EvidenceView {
  const all = { ...plainRules, ...rules }
  const cells = evaluateCells(study, 0, cellCount(study))
  const builder = new PlanBuilder(study, all)
  builder.add(cells)
  const plan: Plan = builder.plan()
  return {
    id: '0b7e1c52-7d0a-4f0e-9a55-4c9d1f3f9a01',
    name: 'Harrowmere limits, first draft',
    state: 'draft',
    studyId: '5f2a9f1e-2f0c-4d29-8f0b-8b6a0a1c7e11',
    studyName: 'Harrowmere, soundings of 2026',
    study,
    rules: all,
    plan,
    ...(study.uncertainty && { sampled: plan.stretches.map((own) => cellOf(own, study, cells)?.sampled) }),
    methods: METHODS.map(({ id, name, reference, isFromMemory }) => ({ id, name, reference, isFromMemory })),
    serviceVersion: '1.2.3',
    methodVersion: '4',
    made: '2026-12-01T09:45:00Z',
    ...more,
  }
}

const still = { waterLevels: [0], currents: [0], directions: [null] }

const madeHarrowmere = (): EvidenceView =>
  viewOf(
    {
      ...still,
      waterLevels: [0, 0.4],
      segments: demo.segments().map((record) => studySegment(record, true)),
      vessels: [
        vessel('cemt-i'),
        vessel('cemt-ii'),
        vessel('cemt-ii', 'empty'),
        vessel('recreational-rc'),
        vessel('coaster'),
      ],
      uncertainty: uncertain,
    },
    {
      groups: [
        { id: 'freight', name: 'Freight', appliesTo: { vesselClasses: ['cemt-i', 'cemt-ii'] } },
        { id: 'pleasure', name: 'Pleasure craft', appliesTo: { vesselClasses: ['recreational-rc'] } },
      ],
      percentile: 5,
      minRunLength: 2000,
      keepPosted: ['harrow-town-reach'],
    },
  )

let kept: EvidenceView | undefined

/** The demo waterway with samples: freight and pleasure craft, a kept limit, stretches that get none. */
export const harrowmere = (): EvidenceView => (kept ??= madeHarrowmere())

/** By direction in a current, in knots, published and without samples. */
export const byDirection = (): EvidenceView =>
  viewOf(
    {
      segments: demo.segments().map((record) => studySegment(record)),
      vessels: [vessel('patrol-boat'), vessel('recreational-rc')],
      waterLevels: [-0.1, 0.5],
      currents: [0.3, 0.6],
      directions: ['upstream', 'downstream'],
    },
    {
      isByDirection: true,
      signUnit: 'kn',
      signStep: 0.5,
      smallestLimit: 3,
      largestLimit: 12,
      keepPosted: ['harrow-docks'],
    },
    { state: 'published', publication },
  )

const LONG = 'Oberwasserstraßenschifffahrtsamtsbezirksgrenzabschnitt'

/** One segment, names as long and as hostile as callers may give them, superseded. */
export const hostileNames = (): EvidenceView => {
  const name = `${LONG} <script>alert("1")</script> & </style>'\\`
  const receptors = Array.from({ length: 14 }, (_, i) => ({
    name: `${LONG} <b>${i}</b>`,
    kind: 'other',
    side: i % 2 === 0 ? 'left' : 'right',
    distance_m: 17,
    max_wave_height_m: 0.15 + 0.002 * i,
  }))
  const record = changed('harrow-town-reach', { name, waterway: name, receptors })
  return viewOf(
    { ...still, segments: [studySegment(record)], vessels: [vessel('recreational-rc')] },
    { groups: [{ id: 'all', name: `Everyone <&> ${LONG}`, appliesTo: { minLength: 2 } }] },
    {
      name,
      state: 'superseded',
      publication: {
        ...publication,
        title: name,
        authority: name,
        signatory: name,
        note: `${name}\n${name}`,
      },
    },
  )
}

const water = (i: number): Segment =>
  canal(
    { depth: 2.6 + 0.6 * Math.sin(i / 7), distances: [11 + 4 * Math.sin(i / 3), 14 + (i % 5)] },
    {
      name: `Section ${i + 1}`,
      postedLimits:
        i % 4 === 0 ? [{ speed: 8 / 3.6, reference: 'over-ground', direction: 'both', appliesTo: {} }] : [],
    },
  )

/** A waterway whose chainage falls downstream, of so many segments of uneven length. */
export const longWaterway = (count: number): EvidenceView => {
  let chainage = 400_000
  const segments = Array.from({ length: count }, (_, i): StudySegment => {
    const length = i % 6 < 3 ? 120 : 2500
    const chainageFrom = chainage
    chainage -= length
    const id = `section-${String(i + 1).padStart(3, '0')}`
    return {
      id,
      waterway: 'Long Canal',
      chainageFrom,
      chainageTo: chainage,
      length,
      segment: water(i),
      options,
    }
  })
  return viewOf(
    { ...still, segments, vessels: [vessel('cemt-i'), vessel('recreational-rc')] },
    { minRunLength: 1500 },
  )
}

/** Segments of no waterway, on one of which a vessel does not fit. */
export const apart = (): EvidenceView =>
  viewOf({
    ...still,
    segments: ['harrow-head-cut', 'harrow-tideway', 'harrow-upper-reach'].map((id) => {
      const { waterway: _waterway, ...segment } = studySegment(demo.findSegment(id)!)
      return { ...segment, chainageFrom: 0, chainageTo: segment.length }
    }),
    vessels: [vessel('coaster')],
  })

export const VIEWS: Readonly<Record<string, () => EvidenceView>> = {
  'a draft with samples': harrowmere,
  'a published plan by direction': byDirection,
  'long and hostile names, superseded': hostileNames,
  'segments of no waterway': apart,
  'forty segments': () => longWaterway(40),
}
