import fc from 'fast-check'
import type { Conditions, Options, RequestedLimits } from '../../src/domain/conditions.ts'
import { Fault } from '../../src/domain/fault.ts'
import {
  BANK_KINDS,
  BED_KINDS,
  RECEPTOR_KINDS,
  type Bank,
  type Group,
  type PostedLimit,
  type Receptor,
  type SectionShape,
  type Segment,
  type Side,
  type Station,
} from '../../src/domain/segment.ts'
import { VESSEL_CLASSES } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass, vesselOfDescription, type VesselFigures } from '../../src/domain/vessel-of.ts'
import { HULLS, type Vessel } from '../../src/domain/vessel.ts'

/** Everything that one decision rests on. */
export interface Case {
  readonly segment: Segment
  readonly vessel: Vessel
  readonly conditions: Conditions
  readonly options: Options
}

export const WAVE_METHOD_IDS = [
  'rock-manual-2007',
  'blaauw-1984',
  'weggel-sorensen-1986',
  'kriebel-seelig-2005',
  'gates-herbich-1977',
  'bhowmik-1991',
  'maynord-2005',
] as const

/** Evenly spread over [low, high]; fast-check's own doubles crowd at the ends of their range. */
export const evenly = (low: number, high: number): fc.Arbitrary<number> =>
  fc.integer({ min: 0, max: 1_000_000 }).map((i) => low + ((high - low) * i) / 1_000_000)

/** Evenly spread in the logarithm over [low, high]. */
export const logEvenly = (low: number, high: number): fc.Arbitrary<number> =>
  evenly(Math.log(low), Math.log(high)).map(Math.exp)

/** Undefined `of` times in `of + 1`. */
const rarely = <T>(arbitrary: fc.Arbitrary<T>, of = 2): fc.Arbitrary<T | undefined> =>
  fc.oneof({ weight: of, arbitrary: fc.constant(undefined) }, { weight: 1, arbitrary })

/** Keys whose value is undefined left out, as exact optional properties ask. */
function present<T extends object>(record: T): { [K in keyof T]: Exclude<T[K], undefined> } {
  return Object.fromEntries(Object.entries(record).filter(([, value]) => value !== undefined)) as {
    [K in keyof T]: Exclude<T[K], undefined>
  }
}

const classVessel: fc.Arbitrary<Vessel> = fc
  .record({
    vesselClass: fc.constantFrom(...VESSEL_CLASSES),
    loading: fc.constantFrom('laden' as const, 'empty' as const),
    draughtShare: rarely(evenly(0.4, 1.2)),
    lengthShare: rarely(evenly(0.7, 1.3), 5),
    maxSpeed: rarely(evenly(2, 18), 5),
    minSteerageSpeed: rarely(evenly(0.3, 2.5), 5),
  })
  .map(({ vesselClass, loading, draughtShare, lengthShare, maxSpeed, minSteerageSpeed }) => {
    const own = (loading === 'empty' ? vesselClass.empty : undefined) ?? vesselClass.laden
    return vesselOfClass(
      vesselClass,
      loading,
      present({
        draught: draughtShare === undefined ? undefined : draughtShare * own.draught,
        length: lengthShare === undefined ? undefined : lengthShare * own.length,
        maxSpeed,
        minSteerageSpeed,
      }),
    )
  })

const describedVessel: fc.Arbitrary<Vessel> = fc
  .record({
    hull: fc.constantFrom(...HULLS),
    length: logEvenly(4, 350),
    lengthToBeam: evenly(2.2, 11),
    beamToDraught: logEvenly(1.5, 14),
    blockCoefficient: rarely(evenly(0.35, 1)),
    midshipCoefficient: rarely(evenly(0.5, 1)),
    entranceShare: rarely(evenly(0.05, 0.6)),
    volumeShare: rarely(evenly(0.3, 0.95), 4),
    maxSpeed: rarely(logEvenly(2, 25)),
    minSteerageSpeed: rarely(evenly(0.3, 2.5)),
  })
  .map(({ hull, length, lengthToBeam, beamToDraught, entranceShare, volumeShare, ...given }) => {
    const beam = length / lengthToBeam
    const draught = beam / beamToDraught
    return vesselOfDescription({
      hull,
      length,
      beam,
      draught,
      ...(present({
        ...given,
        entranceLength: entranceShare === undefined ? undefined : entranceShare * length,
        volume: volumeShare === undefined ? undefined : volumeShare * length * beam * draught,
      }) as VesselFigures),
    })
  })

/** All built-in classes in both loadings, and free descriptions of every hull. */
export const vessels: fc.Arbitrary<Vessel> = fc.oneof(classVessel, describedVessel)

/** Light fast craft that can reach the planing range. */
export const fastCraft: fc.Arbitrary<Vessel> = fc
  .record({
    hull: fc.constantFrom('semi-displacement' as const, 'planing' as const),
    length: logEvenly(4, 30),
    lengthToBeam: evenly(2.2, 4.5),
    beamToDraught: logEvenly(3, 8),
    maxSpeed: evenly(8, 25),
  })
  .map(({ hull, length, lengthToBeam, beamToDraught, maxSpeed }) =>
    vesselOfDescription({
      hull,
      length,
      beam: length / lengthToBeam,
      draught: length / lengthToBeam / beamToDraught,
      maxSpeed,
    }),
  )

type Bankless = Omit<Bank, 'side'>

export const banks: fc.Arbitrary<Bankless> = fc
  .record({
    kind: fc.constantFrom(...BANK_KINDS),
    isKindGiven: fc.boolean(),
    maxWaveHeight: rarely(logEvenly(0.03, 1.2), 3),
    maxDrawdown: rarely(logEvenly(0.02, 0.8), 3),
    maxReturnCurrent: rarely(logEvenly(0.1, 2), 3),
    stoneD50: rarely(logEvenly(0.03, 0.6), 1),
    stoneRelativeDensity: evenly(1.2, 2),
    slope: rarely(evenly(0, 6), 3),
    toeDepth: rarely(evenly(0.2, 3)),
  })
  .map((bank) => present(bank) as Bankless)

interface ShapeSeed {
  readonly form: 'by-kind' | 'slope' | 'bottom' | 'profile'
  readonly share: number
  readonly ends: readonly [boolean, boolean]
  readonly beds: readonly number[]
}

const shapeSeeds: fc.Arbitrary<ShapeSeed> = fc.record({
  form: fc.constantFrom('by-kind', 'slope', 'bottom', 'profile'),
  share: evenly(0, 1),
  ends: fc.tuple(fc.boolean(), fc.boolean()),
  beds: fc.array(evenly(0.35, 1.25), { minLength: 2, maxLength: 8 }),
})

/** A cross-section with the sailing line at the given distances; profiles have every point under water at the datum. */
function shapeOf(seed: ShapeSeed, depth: number, distances: readonly [number, number]): SectionShape {
  switch (seed.form) {
    case 'by-kind':
      return { kind: 'trapezoid' }
    case 'slope':
      return { kind: 'trapezoid', slope: 6 * seed.share }
    case 'bottom':
      return { kind: 'trapezoid', bottomWidth: seed.share * (distances[0] + distances[1]) }
    case 'profile': {
      const half = Math.ceil(seed.beds.length / 2)
      const left = seed.beds.slice(0, half)
      const right = seed.beds.slice(half)
      const points = [
        [-distances[0], seed.ends[0] ? 0 : 0.6 * depth] as const,
        ...left.map((b, i) => [-distances[0] * (1 - (i + 1) / (left.length + 1)), b * depth] as const),
        [0, depth] as const,
        ...right.map((b, i) => [(distances[1] * (i + 1)) / (right.length + 1), b * depth] as const),
        [distances[1], seed.ends[1] ? 0 : 0.6 * depth] as const,
      ]
      return { kind: 'profile', offsets: points.map(([x]) => x), bedDepths: points.map(([, d]) => d) }
    }
  }
}

const groups: fc.Arbitrary<Group> = fc
  .record({
    vesselClasses: rarely(
      fc.subarray(
        VESSEL_CLASSES.map((c) => c.id),
        { minLength: 8 },
      ),
      3,
    ),
    loading: rarely(fc.constantFrom('laden' as const, 'empty' as const), 3),
    minDraught: rarely(evenly(0, 3), 3),
    maxDraught: rarely(evenly(1, 6), 3),
    minLength: rarely(evenly(0, 100), 3),
    hull: rarely(fc.constantFrom(...HULLS), 3),
  })
  .map((group) => present(group) as Group)

export const postedLimits: fc.Arbitrary<PostedLimit> = fc.record({
  speed: logEvenly(0.8, 10),
  reference: fc.constantFrom('over-ground', 'through-water'),
  direction: fc.constantFrom('both', 'upstream', 'downstream'),
  appliesTo: fc.oneof(fc.constant({}), groups),
})

const receptorSeeds = fc.record({
  kind: fc.constantFrom(...RECEPTOR_KINDS),
  bank: fc.nat(1),
  beams: logEvenly(0.6, 20),
  maxWaveHeight: rarely(logEvenly(0.03, 0.8), 1),
})

const LIMITS = {
  maxCriticalRatio: rarely(evenly(0.4, 1.2), 5),
  maxDepthFroudeNumber: rarely(evenly(0.3, 1.3), 5),
  minUnderKeelClearanceRatio: rarely(evenly(0, 0.4), 5),
  maxBankWaveHeight: rarely(logEvenly(0.03, 1), 5),
  maxReceptorWaveHeight: rarely(logEvenly(0.03, 1), 5),
  maxDrawdown: rarely(logEvenly(0.02, 0.6), 5),
  maxReturnCurrent: rarely(logEvenly(0.1, 1.5), 5),
  wakeWash: rarely(fc.constantFrom('when-long' as const, 'always' as const, 'never' as const), 1),
}

export const options: fc.Arbitrary<Options> = fc
  .record({
    waveMethods: rarely(fc.subarray([...WAVE_METHOD_IDS], { minLength: 1 }), 3),
    combine: fc.constantFrom('highest' as const, 'highest' as const, 'median' as const),
    limits: fc.record(LIMITS).map((limits) => present(limits) as RequestedLimits),
    applyPostedLimit: fc.boolean(),
    signUnit: fc.constantFrom('km/h' as const, 'kn' as const, 'mph' as const),
    signStep: fc.constantFrom(0.1, 0.5, 1, 2, 5, 10),
    hasCurve: fc.constant(false),
    waveFactor: rarely(logEvenly(0.1, 10), 5),
  })
  .map((o) => present(o))

export const PLAIN: Options = {
  combine: 'highest',
  limits: {},
  applyPostedLimit: true,
  signUnit: 'km/h',
  signStep: 1,
  hasCurve: false,
}

const conditionSeeds = fc.record({
  levelShare: fc.oneof(fc.constant(0), evenly(-0.25, 0.6)),
  current: fc.oneof(fc.constant(0), evenly(-3, 3)),
  direction: rarely(fc.constantFrom('upstream' as const, 'downstream' as const), 1),
  meetingVessel: rarely(classVessel, 9),
  isWaterLevelGiven: fc.boolean(),
  isCurrentGiven: fc.boolean(),
})

export interface Choice {
  readonly vessel?: fc.Arbitrary<Vessel>
  readonly options?: fc.Arbitrary<Options>
  readonly stations?: number
  readonly shapes?: readonly ShapeSeed['form'][]
  /** depth over draught, from and to */
  readonly depths?: readonly [number, number]
  /** nearer bank in beams, from and to */
  readonly reach?: readonly [number, number]
  /** both banks alike */
  readonly isEven?: boolean
}

const stationSeeds = (choice: Choice) =>
  fc.record({
    depthRatio: logEvenly(...(choice.depths ?? [1.08, 12])),
    nearBeams: logEvenly(...(choice.reach ?? [0.55, 14])),
    farTimes: fc.oneof(fc.constant(1), logEvenly(1, 20)),
    isSwapped: fc.boolean(),
    shape: shapeSeeds,
  })

type StationSeed = ReturnType<typeof stationSeeds> extends fc.Arbitrary<infer T> ? T : never

function stationOf(
  seed: StationSeed,
  index: number,
  vessel: Vessel,
  hasSides: boolean,
  choice: Choice,
): Station {
  const depth = Math.min(100, Math.max(0.3, seed.depthRatio * vessel.draught))
  const near = seed.nearBeams * vessel.beam
  const far = Math.min(10_000, near * seed.farTimes)
  const distances: [number, number] = hasSides && seed.isSwapped ? [far, near] : [near, far]
  const forms = choice.shapes
  const form =
    forms && !forms.includes(seed.shape.form)
      ? (forms[Math.floor(seed.shape.share * forms.length * 0.999)] ?? 'by-kind')
      : seed.shape.form
  return {
    index,
    depth,
    width: near + far,
    distances,
    shape: shapeOf({ ...seed.shape, form }, depth, distances),
  }
}

/** The whole input domain, or a part of it. Lengths follow the vessel, so that impossible inputs stay few. */
export function cases(choice: Choice = {}): fc.Arbitrary<Case> {
  return fc
    .record({
      vessel: choice.vessel ?? vessels,
      stations: fc.oneof(
        { weight: 3, arbitrary: fc.array(stationSeeds(choice), { minLength: 1, maxLength: 1 }) },
        {
          weight: 1,
          arbitrary: fc.array(stationSeeds(choice), { minLength: 1, maxLength: choice.stations ?? 3 }),
        },
      ),
      banks: fc.tuple(banks, banks),
      hasSides: fc.boolean(),
      receptors: fc.array(receptorSeeds, { maxLength: 2 }),
      postedLimits: fc.array(postedLimits, { maxLength: 2 }),
      bedKind: rarely(fc.constantFrom(...BED_KINDS), 1),
      minUnderKeelClearance: rarely(evenly(0, 1), 4),
      maxDraughtShare: rarely(evenly(0.6, 1.3), 4),
      confinement: fc.constantFrom('confined' as const, 'confined' as const, 'open' as const),
      conditions: conditionSeeds,
      options: choice.options ?? options,
    })
    .map((seed) => {
      const { vessel, hasSides, conditions } = seed
      const sides: [Side, Side] = hasSides ? ['left', 'right'] : ['nearer', 'farther']
      const all = seed.stations.map((s, i) => stationOf(s, i, vessel, hasSides, choice))
      const [first, ...rest] = all
      if (!first) throw new Error('a case has a station')
      const { levelShare, ...flow } = conditions
      const segment = present({
        stations: [first, ...rest] as [Station, ...Station[]],
        banks: [
          { ...seed.banks[0], side: sides[0] },
          { ...seed.banks[choice.isEven ? 0 : 1], side: sides[1] },
        ] as [Bank, Bank],
        receptors: seed.receptors.map(
          ({ bank, beams, ...receptor }) =>
            present({ ...receptor, side: sides[bank as 0 | 1], distance: beams * vessel.beam }) as Receptor,
        ),
        bedKind: seed.bedKind,
        minUnderKeelClearance: seed.minUnderKeelClearance,
        maxDraught: seed.maxDraughtShare === undefined ? undefined : seed.maxDraughtShare * vessel.draught,
        postedLimits: seed.postedLimits,
        confinement: seed.confinement,
      }) as Segment
      return {
        vessel,
        segment,
        options: seed.options,
        conditions: present({ ...flow, waterLevel: levelShare * first.depth }),
      }
    })
}

/** The answer, or undefined for an input that is impossible; any other exception goes on. */
export function ifPossible<T>(answer: () => T): T | undefined {
  try {
    return answer()
  } catch (error) {
    if (error instanceof Fault && error.code === 'impossible-input') return undefined
    throw error
  }
}
