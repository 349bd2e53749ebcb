import type { Cell } from '../../src/limits/cell.ts'
import { PlanBuilder } from '../../src/limits/plan-builder.ts'
import type { Plan, PlanRules, Stretch } from '../../src/limits/plan.ts'
import type { Study, StudySegment } from '../../src/limits/study.ts'
import type { PostedLimit } from '../../src/domain/segment.ts'
import type { Loading, Vessel } from '../../src/domain/vessel.ts'

/** km/h as m/s; restated. */
export const kmh = (value: number): number => value / 3.6

export interface SketchedSegment {
  readonly id: string
  readonly from: number
  readonly to: number
  readonly waterway?: string | null
  readonly length?: number
  readonly posted?: readonly PostedLimit[]
}

/** A limit for everyone over the ground, km/h. */
export const posted = (value: number, more: Partial<PostedLimit> = {}): PostedLimit => ({
  speed: kmh(value),
  reference: 'over-ground',
  direction: 'both',
  appliesTo: {},
  ...more,
})

export function studySegment(sketch: SketchedSegment): StudySegment {
  const { id, from, to, waterway = 'Harrowmere Navigation', posted: postedLimits = [] } = sketch
  const bank = { kind: 'reed', isKindGiven: true, stoneRelativeDensity: 1.65 } as const
  return {
    id,
    ...(waterway !== null && { waterway }),
    chainageFrom: from,
    chainageTo: to,
    length: sketch.length ?? Math.abs(to - from),
    segment: {
      id,
      stations: [
        { index: 0, depth: 3, width: 40, distances: [20, 20], shape: { kind: 'trapezoid', slope: 3 } },
      ],
      banks: [
        { ...bank, side: 'left' },
        { ...bank, side: 'right' },
      ],
      receptors: [],
      postedLimits,
      confinement: 'confined',
    },
    options: {
      combine: 'highest',
      limits: {},
      applyPostedLimit: false,
      signUnit: 'km/h',
      signStep: 1,
      hasCurve: false,
    },
  }
}

export function studyVessel(classId: string, loading: Loading = 'laden'): Vessel {
  return { ...VESSEL, classId, className: classId, loading }
}

const VESSEL: Vessel = {
  hull: 'displacement',
  trade: 'inland-cargo',
  isInlandMotorVessel: true,
  length: 80,
  beam: 9.5,
  draught: 2.5,
  blockCoefficient: 0.85,
  midshipCoefficient: 0.99,
  entranceLength: 10,
  volume: 1615,
  maxSpeed: 5,
  minSteerageSpeed: 0.8,
  basis: {
    length: 'given',
    beam: 'given',
    draught: 'given',
    blockCoefficient: 'given',
    midshipCoefficient: 'given',
    entranceLength: 'given',
    volume: 'given',
    maxSpeed: 'given',
    minSteerageSpeed: 'given',
    envelopeCoefficient: 'given',
    centralCoefficient: 'given',
  },
}

export const sketchedStudy = (
  segments: readonly SketchedSegment[],
  more: Partial<Omit<Study, 'segments'>> = {},
): Study => ({
  segments: segments.map(studySegment),
  vessels: [studyVessel('barge')],
  waterLevels: [0],
  currents: [0],
  directions: [null],
  ...more,
})

export const RULES: PlanRules = {
  groups: [{ id: 'all', name: 'All vessels', appliesTo: {} }],
  percentile: null,
  signUnit: 'km/h',
  signStep: 1,
  minRunLength: 0,
  isByDirection: false,
  keepPosted: [],
}

/** Every cell of a study, with what a test says of it. */
export function cellsOf(study: Study, say: (place: Cell) => Omit<Cell, keyof Place>): Cell[] {
  const { segments, vessels, waterLevels, currents, directions } = study
  return segments.flatMap((_, segment) =>
    vessels.flatMap((_, vessel) =>
      waterLevels.flatMap((_, waterLevel) =>
        currents.flatMap((_, current) =>
          directions.map((_, direction) => {
            const place = { segment, vessel, waterLevel, current, direction }
            return { ...place, ...say(place) }
          }),
        ),
      ),
    ),
  )
}

type Place = Pick<Cell, 'segment' | 'vessel' | 'waterLevel' | 'current' | 'direction'>

/** An answer of so many km/h over the ground. */
export const allows = (value: number): Pick<Cell, 'answer'> => ({
  answer: {
    outcome: 'limited',
    governing: 'bank-wave-height',
    stationChainage: 250,
    draught: 2.5,
    throughWater: kmh(value),
    overGround: kmh(value),
    criticalSpeed: 4,
  },
})

export const NO_SAFE_SPEED: Pick<Cell, 'answer'> = {
  answer: { outcome: 'no-safe-speed', governing: 'under-keel-clearance', draught: 2.5, criticalSpeed: 4 },
}

export function planOf(study: Study, rules: Partial<PlanRules>, cells: Iterable<Cell>): Plan {
  const builder = new PlanBuilder(study, { ...RULES, ...rules })
  builder.add(cells)
  return builder.plan()
}

/** A plan for one vessel in still water, where segment i allows value i, km/h. */
export function planAlong(
  segments: readonly SketchedSegment[],
  allowed: readonly number[],
  rules: Partial<PlanRules> = {},
): Plan {
  const study = sketchedStudy(segments)
  return planOf(
    study,
    rules,
    cellsOf(study, ({ segment }) => allows(allowed[segment]!)),
  )
}

/** Stretches in short: outcome, limit, segments. */
export const brief = ({ stretches }: { readonly stretches: readonly Stretch[] }): unknown[] =>
  stretches.map(({ outcome, limit, segmentIds }) => [
    outcome === 'below-smallest-limit' ? 'below' : outcome,
    limit?.value ?? null,
    segmentIds.join(' '),
  ])
