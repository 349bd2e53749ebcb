import type { Calibration } from '../../src/domain/calibration.ts'
import type { Conditions, Options, RequestedLimits } from '../../src/domain/conditions.ts'
import {
  BANK_KINDS,
  BED_KINDS,
  DIRECTIONS,
  RECEPTOR_KINDS,
  type Bank,
  type PostedLimit,
  type Receptor,
  type SectionShape,
  type Segment,
  type Side,
  type Station,
} from '../../src/domain/segment.ts'
import { VESSEL_CLASSES } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass, vesselOfDescription } from '../../src/domain/vessel-of.ts'
import { HULLS, LOADINGS, type Vessel } from '../../src/domain/vessel.ts'
import { randomOf } from '../passage-log/random.ts'
import { Draw } from './draw.ts'

/** Inputs of one advisory, and the speeds that are asked about. */
export interface FrozenCase {
  readonly segment: Segment
  readonly vessel: Vessel
  readonly conditions: Conditions
  readonly options: Options
  /** m/s through the water */
  readonly sailed: number
}

const WAVE_METHOD_IDS = [
  'rock-manual-2007',
  'blaauw-1984',
  'weggel-sorensen-1986',
  'kriebel-seelig-2005',
  'gates-herbich-1977',
  'bhowmik-1991',
  'maynord-2005',
]

/** Every class in turn, laden and empty, and a described vessel of any hull after every third. */
function vesselOf(draw: Draw, number: number): Vessel {
  if (number % 4 === 3) {
    const length = draw.logEvenly(4, 250)
    const beam = length / draw.between(2.5, 10)
    return vesselOfDescription({
      hull: draw.of(HULLS),
      length,
      beam,
      draught: beam / draw.logEvenly(2, 10),
      ...draw.sometimes(0.3, () => ({ maxSpeed: draw.logEvenly(3, 22) })),
      ...draw.sometimes(0.3, () => ({ blockCoefficient: draw.between(0.4, 0.95) })),
    })
  }
  const found = VESSEL_CLASSES[number % VESSEL_CLASSES.length]
  if (!found) throw new RangeError('A number stands for no class')
  const loading = draw.of(LOADINGS)
  const { draught } = (loading === 'empty' ? found.empty : undefined) ?? found.laden
  return vesselOfClass(
    found,
    loading,
    draw.sometimes(0.4, () => ({ draught: draught * draw.between(0.5, 1.1) })),
  )
}

function shapeOf(draw: Draw, depth: number, [left, right]: readonly [number, number]): SectionShape {
  const form = draw.of(['by-kind', 'slope', 'bottom', 'profile'])
  if (form === 'by-kind') return { kind: 'trapezoid' }
  if (form === 'slope') return { kind: 'trapezoid', slope: draw.between(0, 5) }
  if (form === 'bottom') return { kind: 'trapezoid', bottomWidth: draw.between(0.2, 1) * (left + right) }
  return {
    kind: 'profile',
    offsets: [-left, -0.6 * left, -0.2 * left, 0, 0.3 * right, 0.7 * right, right],
    bedDepths: [
      draw.of([0, 0.5 * depth]),
      draw.between(0.5, 1.1) * depth,
      draw.between(0.8, 1.1) * depth,
      depth,
      draw.between(0.8, 1.1) * depth,
      draw.between(0.5, 1.1) * depth,
      draw.of([0, 0.5 * depth]),
    ],
  }
}

function stationOf(draw: Draw, index: number, { draught, beam }: Vessel): Station {
  const depth = Math.min(100, Math.max(0.4, draught * draw.logEvenly(1.15, 8)))
  const near = beam * draw.logEvenly(0.8, 10)
  const far = near * draw.of([1, draw.logEvenly(1, 12)])
  const distances: [number, number] = draw.of([true, false]) ? [near, far] : [far, near]
  return { index, depth, width: near + far, distances, shape: shapeOf(draw, depth, distances) }
}

function bankOf(draw: Draw, side: Side): Bank {
  return {
    side,
    kind: draw.of(BANK_KINDS),
    isKindGiven: draw.of([true, false]),
    stoneRelativeDensity: 1.65,
    ...draw.sometimes(0.3, () => ({ maxWaveHeight: draw.logEvenly(0.05, 0.8) })),
    ...draw.sometimes(0.3, () => ({ maxDrawdown: draw.logEvenly(0.05, 0.6) })),
    ...draw.sometimes(0.3, () => ({ maxReturnCurrent: draw.logEvenly(0.15, 1.5) })),
    ...draw.sometimes(0.4, () => ({ stoneD50: draw.logEvenly(0.04, 0.5) })),
    ...draw.sometimes(0.3, () => ({ slope: draw.between(1, 5) })),
    ...draw.sometimes(0.3, () => ({ toeDepth: draw.between(0.3, 2) })),
  }
}

function receptorsOf(
  draw: Draw,
  sides: readonly [Side, Side],
  { beam }: Vessel,
  stations: number,
): Receptor[] {
  return Array.from({ length: draw.whole(0, 2) }, () => ({
    kind: draw.of(RECEPTOR_KINDS),
    side: draw.of(sides),
    distance: beam * draw.logEvenly(0.7, 15),
    ...draw.sometimes(0.4, () => ({ maxWaveHeight: draw.logEvenly(0.05, 0.6) })),
    ...draw.sometimes(0.3, () => ({ station: draw.whole(0, stations - 1) })),
  }))
}

function postedOf(draw: Draw): PostedLimit[] {
  return Array.from({ length: draw.whole(0, 2) }, () => ({
    speed: draw.logEvenly(1, 8),
    reference: draw.of(['over-ground', 'through-water']),
    direction: draw.of(['both', ...DIRECTIONS]),
    appliesTo: draw.of([{}, { loading: 'laden' }, { minLength: 40 }, { maxDraught: 2 }, { hull: 'planing' }]),
  }))
}

function segmentOf(draw: Draw, vessel: Vessel): Segment {
  const count = draw.of([1, 1, 1, 2, 4])
  const [first, ...rest] = Array.from({ length: count }, (_, i) => stationOf(draw, i, vessel))
  if (!first) throw new RangeError('A segment has at least one station')
  const sides: readonly [Side, Side] = draw.of([true, false]) ? ['left', 'right'] : ['nearer', 'farther']
  return {
    stations: [first, ...rest],
    banks: [bankOf(draw, sides[0]), bankOf(draw, sides[1])],
    receptors: receptorsOf(draw, sides, vessel, count),
    postedLimits: postedOf(draw),
    confinement: draw.of(['confined', 'confined', 'open']),
    ...draw.sometimes(0.4, () => ({ bedKind: draw.of(BED_KINDS) })),
    ...draw.sometimes(0.2, () => ({ minUnderKeelClearance: draw.between(0.1, 0.6) })),
    ...draw.sometimes(0.2, () => ({ maxDraught: vessel.draught * draw.between(0.7, 1.2) })),
  }
}

function conditionsOf(draw: Draw, depth: number): Conditions {
  return {
    waterLevel: draw.of([0, depth * draw.between(-0.1, 0.4)]),
    current: draw.of([0, draw.between(-1.5, 1.5)]),
    isWaterLevelGiven: true,
    isCurrentGiven: true,
    ...draw.sometimes(0.4, () => ({ direction: draw.of(DIRECTIONS) })),
    ...draw.sometimes(0.1, () => ({ meetingVessel: vesselOf(draw, 3) })),
  }
}

function limitsOf(draw: Draw): RequestedLimits {
  return {
    ...draw.sometimes(0.2, () => ({ maxCriticalRatio: draw.between(0.5, 1.1) })),
    ...draw.sometimes(0.2, () => ({ maxDepthFroudeNumber: draw.between(0.4, 1.2) })),
    ...draw.sometimes(0.2, () => ({ minUnderKeelClearanceRatio: draw.between(0, 0.3) })),
    ...draw.sometimes(0.2, () => ({ maxBankWaveHeight: draw.logEvenly(0.05, 0.8) })),
    ...draw.sometimes(0.2, () => ({ maxReceptorWaveHeight: draw.logEvenly(0.05, 0.8) })),
    ...draw.sometimes(0.2, () => ({ maxDrawdown: draw.logEvenly(0.03, 0.5) })),
    ...draw.sometimes(0.2, () => ({ maxReturnCurrent: draw.logEvenly(0.15, 1.2) })),
    ...draw.sometimes(0.5, () => ({ wakeWash: draw.of(['when-long', 'always', 'never'] as const) })),
  }
}

function calibrationOf(draw: Draw): Calibration {
  const methods = WAVE_METHOD_IDS.filter(() => draw.of([true, true, false])).map((id) => ({
    id,
    factor: draw.logEvenly(0.4, 2),
    factorByHull: draw.sometimes(0.3, () => ({ displacement: draw.logEvenly(0.4, 2) })),
  }))
  const coverage = {
    speed: [1, 4],
    distance: [10, 60],
    depth: [2, 6],
    depthFroudeNumber: [0.2, 0.7],
  } as const
  return { id: 'tried', name: 'Tried', methods, scatter: 0.2, coverage }
}

function optionsOf(draw: Draw): Options {
  return {
    combine: draw.of(['highest', 'highest', 'median']),
    limits: draw.of([true, false]) ? limitsOf(draw) : {},
    applyPostedLimit: draw.of([true, true, false]),
    signUnit: draw.of(['km/h', 'kn', 'mph']),
    signStep: draw.of([0.5, 1, 5]),
    hasCurve: false,
    ...draw.sometimes(0.2, () => ({ waveMethods: WAVE_METHOD_IDS.filter(() => draw.of([true, false])) })),
    ...draw.sometimes(0.2, () => ({ waveFactor: draw.logEvenly(0.3, 3) })),
    ...draw.sometimes(0.2, () => ({ calibration: calibrationOf(draw) })),
    ...draw.sometimes(0.1, () => ({ waveScale: draw.logEvenly(0.7, 1.4) })),
  }
}

/**
 * Inputs over all classes, sections, conditions and limits; the same for the same seed.
 *
 * @param count  n ≥ 0
 */
export function frozenCases(seed: number, count: number): FrozenCase[] {
  const draw = new Draw(randomOf(seed))
  return Array.from({ length: count }, (_, number) => {
    const vessel = vesselOf(draw, number)
    const segment = segmentOf(draw, vessel)
    const conditions = conditionsOf(draw, segment.stations[0].depth)
    const options = optionsOf(draw)
    return { vessel, segment, conditions, options, sailed: vessel.maxSpeed * draw.between(0.15, 1.05) }
  })
}
