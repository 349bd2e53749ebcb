import { expect, test } from 'vitest'
import { decide } from '../../src/advisory/decide.ts'
import type { Cell } from '../../src/limits/cell.ts'
import { evaluateCells } from '../../src/limits/evaluate.ts'
import { cellCount, type Study } from '../../src/limits/study.ts'
import { canal } from '../support/places.ts'
import { MIXED, OPTIONS, segmentOf, UNCERTAINTY, vesselOf } from './studies.ts'

const all = (study: Study): Cell[] => evaluateCells(study, 0, cellCount(study))

function withoutUncertainty({ uncertainty: _, ...study }: Study): Study {
  return study
}

/** One vessel on one segment in still water. */
const single = (more: Partial<Study> = {}): Study => ({
  segments: [segmentOf(canal({ depth: 4, distances: [27.5, 27.5] }), { waveHeightLogSd: 0.4 })],
  vessels: [vesselOf('cemt-iv')],
  waterLevels: [0],
  currents: [0],
  directions: [null],
  uncertainty: UNCERTAINTY,
  ...more,
})

test('cells come in the order segment, vessel, level, current, direction, the last one fastest', () => {
  const expected = [0, 1, 2].flatMap((segment) =>
    [0, 1].flatMap((vessel) =>
      [0, 1].flatMap((waterLevel) =>
        [0, 1].flatMap((current) =>
          [0, 1].map((direction) => ({ segment, vessel, waterLevel, current, direction })),
        ),
      ),
    ),
  )
  const found = all(MIXED).map(({ segment, vessel, waterLevel, current, direction }) => ({
    segment,
    vessel,
    waterLevel,
    current,
    direction,
  }))
  expect(found).toEqual(expected)
})

test('the answer of every cell is that of a single decision, to the last digit', () => {
  const outcomes = new Set<string>()
  for (const cell of all(MIXED)) {
    const { segment, options } = MIXED.segments[cell.segment]!
    const conditions = {
      waterLevel: MIXED.waterLevels[cell.waterLevel]!,
      current: MIXED.currents[cell.current]!,
      direction: MIXED.directions[cell.direction]!,
      isWaterLevelGiven: true,
      isCurrentGiven: true,
    }
    const { main } = decide(segment, MIXED.vessels[cell.vessel]!, conditions, options)
    const isSafe = main.outcome !== 'no-safe-speed'
    expect(cell.answer).toStrictEqual({
      outcome: main.outcome,
      governing: main.governing.criterion.id,
      ...('chainage' in main.situation.station && { stationChainage: main.situation.station.chainage }),
      draught: main.situation.vessel.draught,
      ...(isSafe && { throughWater: main.speed, overGround: main.overGround }),
      criticalSpeed: main.situation.setting.criticalSpeed,
    })
    expect(cell.problem).toBe(undefined)
    outcomes.add(main.outcome)
  }
  expect(outcomes.size).toBeGreaterThan(1)
})

test('the answer names the station that governs and the draught that the segment permits', () => {
  const [cell] = all(withoutUncertainty(MIXED)).filter(({ segment }) => segment === 1)
  // the shallower station of the two; the class draws 3.5 m, the segment permits 2.8 m
  expect(cell!.answer).toMatchObject({ stationChainage: 1400, draught: 2.8 })
})

test('a cell without a safe speed has no speed, and no cell has samples without uncertainty', () => {
  // a current stronger than the vessel may go
  const study = withoutUncertainty(single({ currents: [3.5], directions: ['upstream'] }))
  const [cell] = all(study)
  expect(cell!.answer!.outcome).toBe('no-safe-speed')
  expect(cell!.answer).not.toHaveProperty('overGround')
  expect(cell).not.toHaveProperty('sampled')
  expect(cell).not.toHaveProperty('problem')
})

test('a cell that is impossible at its inputs as given is a problem and has neither answer nor samples', () => {
  const cells = all(single({ vessels: [vesselOf('cemt-va'), vesselOf('cemt-i')], waterLevels: [-1, 0] }))
  // draught 3.5 m in 3 m
  expect(cells[0]).toStrictEqual({
    segment: 0,
    vessel: 0,
    waterLevel: 0,
    current: 0,
    direction: 0,
    problem: {
      code: 'impossible-input',
      detail: 'The draught of the class, 3.5 m, is not below the depth, 3 m: give draught_m',
    },
  })
  expect(cells.slice(1).map(({ answer, sampled }) => [!!answer, !!sampled])).toEqual([
    [true, true],
    [true, true],
    [true, true],
  ])
})

test('shares of criteria and of impossible samples make one, and the latter have no safe speed', () => {
  // impossible below 3.5 m: one decimetre, a third of the standard deviation, under the depth
  const [cell] = all(
    single({
      segments: [segmentOf(canal({ depth: 3.6, distances: [40, 40] }))],
      vessels: [vesselOf('cemt-va')],
      uncertainty: {
        ...UNCERTAINTY,
        samples: 4096,
        spreads: { depth_m: { kind: 'standard-deviation', size: 0.3 } },
      },
    }),
  )
  const { governedBy, noSafeRatio, percentiles } = cell!.sampled!
  const impossible = 1 - Object.values(governedBy).reduce((sum, share) => sum + share, 0)
  // Φ(−1/3), from tables; 4096 points are even to a 4096th
  expect(Math.abs(impossible - 0.3694)).toBeLessThan(0.001)
  expect(noSafeRatio).toBeGreaterThanOrEqual(impossible)
  expect(percentiles[0]).toBe(null)
  expect(percentiles[2]).toBeGreaterThan(0)
})

test('a sample whose draught falls to nothing is impossible', () => {
  const [cell] = all(
    single({
      segments: [segmentOf(canal({ depth: 8, distances: [40, 40] }))],
      // draws 1 m
      vessels: [vesselOf('recreational-rb')],
      uncertainty: {
        ...UNCERTAINTY,
        samples: 4096,
        spreads: { draught_m: { kind: 'standard-deviation', size: 2 } },
      },
    }),
  )
  const possible = Object.values(cell!.sampled!.governedBy).reduce((sum, share) => sum + share, 0)
  // Φ(−1/2) below none and Φ(−7/2) on the bed, from tables
  expect(Math.abs(1 - possible - 0.3085 - 0.0002)).toBeLessThan(0.001)
})

test('samples that all are as given give the answer itself at every percentile', () => {
  const still = { ...UNCERTAINTY, spreads: {} }
  const segments = MIXED.segments.map(({ waveHeightLogSd: _, ...segment }) => segment)
  for (const { answer, sampled } of all({ ...MIXED, segments, uncertainty: still })) {
    const speed = answer!.overGround ?? null
    expect(sampled).toStrictEqual({
      noSafeRatio: speed === null ? 1 : 0,
      percentiles: [speed, speed, speed],
      governedBy: { [answer!.governing]: 1 },
    })
  }
})

test('without a direction a sample with a current is answered for the harder way', () => {
  const spread = { kind: 'half-range', size: 0.5 } as const
  const [cell] = all(
    single({
      segments: [segmentOf(canal({ depth: 4, distances: [27.5, 27.5] }))],
      uncertainty: { samples: 1024, seed: 1, percentiles: [0, 50, 100], spreads: { current_mps: spread } },
    }),
  )
  const speed = cell!.answer!.overGround!
  // the current takes its size from the speed in one direction: evenly from 0 to 0.5 m/s
  const [low, middle, high] = cell!.sampled!.percentiles
  expect(Math.abs(low! - (speed - 0.5))).toBeLessThan(0.001)
  expect(Math.abs(middle! - (speed - 0.25))).toBeLessThan(0.001)
  expect(high).toBeLessThan(speed)
  expect(high).toBeGreaterThan(speed - 0.001)
})

test('a posted limit counts in its direction alone, also with a current that scatters', () => {
  const posted = {
    speed: 0.9,
    reference: 'over-ground',
    direction: 'upstream',
    appliesTo: {},
  } as const
  const options = { ...OPTIONS, applyPostedLimit: true }
  const segment = canal({ depth: 4, distances: [27.5, 27.5] }, { postedLimits: [posted] })
  const [up, down] = all(
    single({
      segments: [segmentOf(segment, { options })],
      vessels: [vesselOf('recreational-rb', 'laden', { minSteerageSpeed: 0.5 })],
      directions: ['upstream', 'downstream'],
      uncertainty: {
        ...UNCERTAINTY,
        spreads: { current_mps: { kind: 'half-range', size: 0.2 } },
      },
    }),
  )
  expect(up!.sampled!.governedBy).toEqual({ 'posted-limit': 1 })
  // through the water it is the limit less the current: over ground 0.9 m/s but for rounding
  for (const speed of up!.sampled!.percentiles) expect(Math.abs(speed! - 0.9)).toBeLessThan(1e-12)
  expect(down!.sampled!.governedBy).not.toHaveProperty('posted-limit')
})

test('the seed changes the samples of a cell, and the same seed repeats them', () => {
  const ofSeed = (seed: number): string =>
    JSON.stringify(all({ ...MIXED, uncertainty: { ...UNCERTAINTY, seed } }))
  expect(ofSeed(1)).toBe(ofSeed(1))
  expect(ofSeed(2)).not.toBe(ofSeed(1))
})

test('a cell rests on its own inputs alone, whatever else is in the study', () => {
  const whole = all(MIXED)
  const { segments, vessels } = MIXED
  const [, second] = segments
  const alone = all({ ...MIXED, segments: [second!], vessels: [vessels[1]!], waterLevels: [0] })
  const same = whole.filter((cell) => cell.segment === 1 && cell.vessel === 1 && cell.waterLevel === 1)
  expect(alone.map(({ answer, sampled }) => ({ answer, sampled }))).toEqual(
    same.map(({ answer, sampled }) => ({ answer, sampled })),
  )
})

test('a study leaves its inputs as they were', () => {
  const before = JSON.stringify(MIXED)
  all(MIXED)
  expect(JSON.stringify(MIXED)).toBe(before)
})
