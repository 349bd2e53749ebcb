import { describe, expect, it } from 'vitest'
import type { Segment, Station } from '../../src/domain/segment.ts'
import { waterFrom } from '../../src/passages/at-position.ts'
import { REACH } from '../support/passage-marks.ts'

const [STATION] = REACH.stations

const seen = (segment: Segment, station: Station, offset: number, level = 0, beam = 8) =>
  waterFrom(segment, station, offset, level, beam)

describe('seen from beside the sailing line', () => {
  it('the bank towards which a vessel is off is nearer by the offset, the other one farther', () => {
    // 18 m to the left and 22 m to the right of the sailing line
    const { station, distances, isMoved } = seen(REACH, STATION, 5)
    expect(station.distances).toEqual([23, 17])
    expect(distances).toEqual([23, 17])
    expect(isMoved).toBe(false)
    expect(seen(REACH, STATION, -5).distances).toEqual([13, 27])
  })

  it('a higher water level moves the waterlines out by the slope of the banks', () => {
    // natural banks 1:3, one metre up: three metres to either side
    expect(seen(REACH, STATION, 5, 1).distances).toEqual([26, 20])
  })

  it('a hull that would reach over a waterline is moved until it floats, its reported distance kept', () => {
    const { station, distances, isMoved } = seen(REACH, STATION, 19.5)
    expect(distances).toEqual([37.5, 2.5])
    // half the beam of 8 m and a tenth of a metre
    expect(station.distances[1]).toBeCloseTo(4.1, 12)
    expect(station.distances[0]).toBeCloseTo(35.9, 12)
    expect(isMoved).toBe(true)
  })

  it('a surveyed profile is seen from the vessel', () => {
    const profile: Station = {
      index: 0,
      depth: 5,
      width: 60,
      distances: [25, 35],
      shape: { kind: 'profile', offsets: [-30, -20, 0, 30, 40], bedDepths: [-1, 1, 5, 1, -1] },
    }
    const { station } = seen(REACH, profile, -10)
    expect(station.shape).toMatchObject({ offsets: [-20, -10, 10, 40, 50] })
    expect(station.distances).toEqual([15, 45])
  })

  it('receptors come nearer and go farther with their banks, never under the hull', () => {
    const segment: Segment = {
      ...REACH,
      receptors: [
        { kind: 'reed-bed', side: 'left', distance: 18 },
        { kind: 'other', side: 'right', distance: 20 },
      ],
    }
    const distancesFrom = (offset: number) =>
      seen(segment, STATION, offset).segment.receptors.map(({ distance }) => distance)
    expect(distancesFrom(6)).toEqual([24, 14])
    expect(distancesFrom(17)[1]).toBeCloseTo(4.1, 12)
  })
})

describe('without known sides', () => {
  const [left, right] = REACH.banks
  const segment: Segment = {
    ...REACH,
    banks: [
      { ...left, side: 'nearer' },
      { ...right, side: 'farther' },
    ],
  }

  it.each([5, -5])('a vessel %i m off is nearer to the nearer bank', (offset) => {
    expect(seen(segment, STATION, offset).distances).toEqual([13, 27])
  })

  it('a receptor whose side is known keeps it', () => {
    const receptors = [{ kind: 'other', side: 'left', distance: 15 }] as const
    const distanceFrom = (offset: number) =>
      seen({ ...segment, receptors }, STATION, offset).segment.receptors[0]?.distance
    expect(distanceFrom(5)).toBe(20)
    expect(distanceFrom(-5)).toBe(10)
  })
})
