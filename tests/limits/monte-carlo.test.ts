import { expect, test } from 'vitest'
import type { Segment } from '../../src/domain/segment.ts'
import type { Loading, Vessel } from '../../src/domain/vessel.ts'
import { evaluateCells } from '../../src/limits/evaluate.ts'
import { cellCount, type Spread, type Study, type Uncertainty } from '../../src/limits/study.ts'
import { canal, soil } from '../support/places.ts'
import { monteCarlo, type Sampled, type Scatter, type Scatters } from './monte-carlo.ts'
import { OPTIONS, segmentOf, vesselOf } from './studies.ts'

const RANDOM_SAMPLES = 20_000
/** So many that what is left of the difference is the error of the random samples. */
const STUDY_SAMPLES = 4096
const PERCENTILES = [5, 15, 50, 85, 95]

interface Scene {
  readonly name: string
  readonly segment: Segment
  readonly vessel: readonly [string, Loading]
  /** that is used, m */
  readonly draught: number
  readonly waterLevel?: number
  readonly currents?: readonly number[]
  /** m/s */
  readonly maxSpeed?: number
  /** measured over computed wave height */
  readonly waveFactor?: number
  readonly scatters: Scatters
}

const trapezoid = { kind: 'trapezoid' } as const

const SCENES: readonly Scene[] = [
  {
    name: 'a canal with normal spreads of every input, answered for both ways at once',
    segment: canal({ depth: 4, distances: [27.5, 27.5] }),
    vessel: ['cemt-iv', 'laden'],
    draught: 2.5,
    scatters: {
      depth: { sd: 0.25 },
      width: { sd: 4 },
      distance: { sd: 3 },
      draught: { sd: 0.15 },
      current: { sd: 0.1 },
      waveHeight: { sd: 0.3 },
    },
  },
  {
    name: 'a river of three stations, one surveyed, with currents both ways and a permitted draught',
    segment: canal(
      { depth: 5, distances: [45, 55] },
      {
        maxDraught: 2.9,
        stations: [
          { index: 0, depth: 5, width: 100, distances: [45, 55], shape: trapezoid },
          { index: 1, depth: 4.8, width: 90, distances: [52, 38], shape: trapezoid },
          {
            index: 2,
            depth: 4.6,
            width: 90,
            distances: [40, 50],
            shape: {
              kind: 'profile',
              offsets: [-40, -25, -5, 20, 35, 50],
              bedDepths: [0, 3, 4.6, 4.6, 3, 0],
            },
          },
        ],
      },
    ),
    vessel: ['cemt-va', 'laden'],
    draught: 2.9,
    waterLevel: 0.2,
    currents: [0.5],
    scatters: {
      depth: { sd: 0.3 },
      width: { sd: 5 },
      distance: { sd: 4 },
      draught: { sd: 0.15 },
      current: { sd: 0.2 },
      waveHeight: { sd: 0.4 },
    },
  },
  {
    name: 'open water with a receptor and a fast boat',
    segment: canal(
      { depth: 6, distances: [120, 400] },
      {
        confinement: 'open',
        banks: [soil('nearer', { maxWaveHeight: 0.42 }), soil('farther', { kind: 'wall' })],
        receptors: [{ kind: 'moored-small-craft', side: 'farther', distance: 70, maxWaveHeight: 0.5 }],
      },
    ),
    vessel: ['recreational-rb', 'laden'],
    draught: 1,
    maxSpeed: 5.4,
    waveFactor: 0.6,
    scatters: { depth: { sd: 0.5 }, distance: { sd: 15 }, waveHeight: { sd: 0.4 } },
  },
  {
    name: 'half ranges of every input but the wave height',
    segment: canal(
      { depth: 4.2, distances: [25, 35] },
      {
        banks: [
          soil('nearer', { kind: 'wall', maxReturnCurrent: 0.75 }),
          soil('farther', { kind: 'wall', maxDrawdown: 0.24 }),
        ],
      },
    ),
    vessel: ['passenger-vessel', 'laden'],
    draught: 1.6,
    scatters: {
      depth: { half: 0.5 },
      width: { half: 8 },
      distance: { half: 5 },
      draught: { half: 0.2 },
      current: { half: 0.25 },
      waveHeight: { sd: 0.2 },
    },
  },
  {
    name: 'shallow water in which some samples are aground and some too slow to steer',
    segment: canal({ depth: 2.9, distances: [20, 20] }),
    vessel: ['cemt-iv', 'laden'],
    draught: 2.5,
    currents: [0.2],
    scatters: { depth: { sd: 0.3 }, draught: { sd: 0.1 }, current: { sd: 0.1 }, waveHeight: { sd: 0.3 } },
  },
]

const toSpread = (scatter: Scatter, scale: number): Spread =>
  'sd' in scatter
    ? { kind: 'standard-deviation', size: scatter.sd * scale }
    : { kind: 'half-range', size: scatter.half * scale }

const vesselAt = ({ vessel: [id, loading], maxSpeed }: Scene, draught?: number): Vessel =>
  vesselOf(id, loading, { ...(maxSpeed && { maxSpeed }), ...(draught && { draught }) })

/** The study of a scene, all of its spreads times `scale`. */
function studyOf(scene: Scene, scale: number): Study {
  const { segment, waterLevel, currents, waveFactor = 1, scatters } = scene
  const { depth, width, distance, draught, current, waveHeight } = scatters
  const spreads: Uncertainty['spreads'] = {
    ...(depth && { depth_m: toSpread(depth, scale) }),
    ...(width && { width_m: toSpread(width, scale) }),
    ...(distance && { bank_distance_m: toSpread(distance, scale) }),
    ...(draught && { draught_m: toSpread(draught, scale) }),
    ...(current && { current_mps: toSpread(current, scale) }),
  }
  const waveHeightLogSd = waveHeight && 'sd' in waveHeight ? waveHeight.sd * scale : 0
  return {
    segments: [segmentOf(segment, { options: { ...OPTIONS, waveFactor }, waveHeightLogSd })],
    vessels: [vesselAt(scene)],
    waterLevels: [waterLevel ?? 0],
    currents: currents ?? [0],
    directions: currents ? ['upstream', 'downstream'] : [null],
    uncertainty: { samples: STUDY_SAMPLES, seed: 7, percentiles: PERCENTILES, spreads },
  }
}

function randomly(scene: Scene, { directions }: Study): readonly Sampled[] {
  const { segment, draught, waterLevel = 0, currents: [current = 0] = [], waveFactor = 1 } = scene
  const place = { segment, draught, waterLevel, current, directions, waveFactor }
  const given = { ...place, vesselAt: (tried: number) => vesselAt(scene, tried) }
  return monteCarlo(given, scene.scatters, RANDOM_SAMPLES, 11)
}

/** Three and a half standard errors of a share of the random samples, and a thousandth for the study's own. */
const allowed = (share: number): number => 3.5 * Math.sqrt((share * (1 - share)) / RANDOM_SAMPLES) + 0.001

/** What of a cell differs from random samples by more than their error, as sentences. */
function differences(
  cell: ReturnType<typeof evaluateCells>[number],
  { speeds, governed }: Sampled,
): string[] {
  const { noSafeRatio, percentiles, governedBy } = cell.sampled!
  const found: string[] = []
  const below = (speed: number): number => speeds.filter((other) => other < speed).length / RANDOM_SAMPLES
  const upTo = (speed: number): number => speeds.filter((other) => other <= speed).length / RANDOM_SAMPLES
  PERCENTILES.forEach((percent, i) => {
    const share = percent / 100
    const speed = percentiles[i] ?? 0
    // the share of slower random samples is the percentile; samples at the top speed are all alike
    const isRight = below(speed) <= share + allowed(share) && upTo(speed) >= share - allowed(share)
    if (!isRight) found.push(`p${percent} ${speed}: ${below(speed)} to ${upTo(speed)} are slower`)
  })
  const shares: [string, number, number][] = [['no safe speed', noSafeRatio, upTo(0)]]
  for (const id of new Set([...governed.keys(), ...Object.keys(governedBy)])) {
    const ratio = governedBy[id as keyof typeof governedBy] ?? 0
    shares.push([id, ratio, (governed.get(id) ?? 0) / RANDOM_SAMPLES])
  }
  for (const [what, share, expected] of shares)
    if (Math.abs(share - expected) > allowed(expected)) found.push(`${what} ${share}, not ${expected}`)
  return found
}

const cellsOf = (study: Study) => evaluateCells(study, 0, cellCount(study))

test.each(SCENES)('percentiles and shares agree with random samples: $name', (scene) => {
  const study = studyOf(scene, 1)
  const sampled = randomly(scene, study)
  const cells = cellsOf(study)
  console.info(
    scene.name,
    cells.map(({ sampled: own }) => JSON.stringify(own)),
  )
  expect(cells.map((cell, i) => differences(cell, sampled[i]!))).toEqual(cells.map(() => []))
  // the comparison is sharp enough to see spreads that are a twentieth too large or too small
  for (const scale of [0.95, 1.05]) {
    const wrong = cellsOf(studyOf(scene, scale))
    expect(
      wrong.flatMap((cell, i) => differences(cell, sampled[i]!)),
      `spreads times ${scale}`,
    ).not.toEqual([])
  }
})
