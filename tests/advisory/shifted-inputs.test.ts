import { expect, test } from 'vitest'
import { shifted, ShiftedInputs } from '../../src/advisory/shifted-inputs.ts'
import type { Inputs } from '../../src/advisory/uncertainty.ts'
import { findVesselClass } from '../../src/domain/vessel-classes.ts'
import { vesselOfClass } from '../../src/domain/vessel-of.ts'
import { PLAIN } from '../support/arbitraries.ts'
import { atRest, canal } from '../support/places.ts'

const profile = { kind: 'profile', offsets: [-30, -20, 10, 20], bedDepths: [0, 4, 4, 0] } as const

/** Two stations, the first nearer to its left bank, the second a profile nearer to its right; 2.8 m are permitted. */
const base: Inputs = {
  segment: canal(
    { depth: 4, distances: [20, 40] },
    {
      stations: [
        { index: 0, depth: 4, width: 60, distances: [20, 40], shape: { kind: 'trapezoid' } },
        { index: 1, depth: 4, width: 50, distances: [30, 20], shape: profile },
      ],
      maxDraught: 2.8,
    },
  ),
  // draws 3.5 m; block coefficient 0.88 in the class
  vessel: vesselOfClass(findVesselClass('cemt-va')!, 'laden', { blockCoefficient: 0.9 }),
  conditions: { ...atRest, current: 0.3 },
  options: { ...PLAIN, waveScale: 2 },
}

test('a deeper bed is deeper at every point of a profile', () => {
  const [first, second] = shifted(base, 'depth_m', 0.5).segment.stations
  expect(first).toMatchObject({ depth: 4.5, width: 60, distances: [20, 40] })
  expect(second!.depth).toBe(4.5)
  expect(second!.shape).toEqual({ ...profile, bedDepths: [0.5, 4.5, 4.5, 0.5] })
})

test('a wider water recedes by half on each side and stretches a profile', () => {
  const [first, second] = shifted(base, 'width_m', 5).segment.stations
  expect(first).toMatchObject({ depth: 4, width: 65, distances: [22.5, 42.5] })
  expect(second).toMatchObject({ width: 55, distances: [32.5, 22.5] })
  // times 55/50
  const { offsets } = second!.shape as typeof profile
  offsets.forEach((offset, i) => {
    expect(offset).toBeCloseTo([-33, -22, 11, 22][i]!, 12)
  })
})

test('a greater distance moves the sailing line away from the nearer bank at each station', () => {
  const [first, second] = shifted(base, 'bank_distance_m', 3).segment.stations
  expect(first).toMatchObject({ width: 60, distances: [23, 37] })
  // to the left, so that everything lies farther to the right
  expect(second).toMatchObject({ width: 50, distances: [27, 23] })
  expect(second!.shape).toEqual({ ...profile, offsets: [-27, -17, 13, 23] })
})

test('a draught is shifted from the permitted one, counts as given, and the volume follows', () => {
  const { vessel } = shifted(base, 'draught_m', 0.2)
  expect(vessel.draught).toBe(3)
  expect(vessel.basis.draught).toBe('given')
  // 0.9 × 110 × 11.4 × 3
  expect(vessel.volume).toBeCloseTo(3385.8, 9)
  expect(base.vessel.basis.draught).not.toBe('given')
})

test('a current is added to, and a wave height is a factor on the one there is', () => {
  expect(shifted(base, 'current_mps', -0.5).conditions.current).toBeCloseTo(-0.2, 15)
  // e^0.5 twice
  expect(shifted(base, 'wave_height', 0.5).options.waveScale).toBeCloseTo(3.297442541400256, 14)
})

test('each shift starts from the base again and leaves the base as it was', () => {
  const before = structuredClone(base)
  const inputs = new ShiftedInputs(base)
  const all = {
    depth_m: 0.5,
    width_m: 5,
    bank_distance_m: 3,
    draught_m: 0.2,
    current_mps: 1,
    wave_height: 1,
  }
  const first = structuredClone(inputs.by(all))
  expect(inputs.by({})).toEqual(base)
  expect(inputs.by(all)).toEqual(first)
  expect(base).toEqual(before)
})
