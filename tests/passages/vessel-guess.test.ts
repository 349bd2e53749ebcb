import { describe, expect, it } from 'vitest'
import { findVesselClass } from '../../src/domain/vessel-classes.ts'
import { classOf, convoyClass } from '../../src/passages/class-of.ts'
import { Fleet, vesselGuess } from '../../src/passages/vessel-guess.ts'
import { guessOf, NO_CONVOY, positionReport } from '../support/passage-marks.ts'

describe('the class', () => {
  // ship types of ITU-R M.1371-5, table 53; sizes of ECMT Resolution 92/2 as the middle of each range
  it.each([
    [79, 38.5, 5.05, 'cemt-i'],
    [79, 55, 6.6, 'cemt-ii'],
    [70, 80, 8.2, 'cemt-iii'],
    [89, 85, 9.5, 'cemt-iv'],
    [80, 110, 11.4, 'cemt-va'],
    [79, 135, 11.4, 'cemt-va'],
    [79, 185, 11.4, 'cemt-vb'],
    [70, 90, 13, 'coaster'],
    [71, 160, 25, 'handysize'],
    [70, 225, 32.26, 'panamax'],
    [69, 85, 11.4, 'passenger-vessel'],
    [37, 5.5, 2, 'recreational-ra'],
    [37, 9.5, 3, 'recreational-rb'],
    [37, 15, 4, 'recreational-rc'],
    [36, 15, 4, 'recreational-rd'],
    [40, 6, 2.2, 'planing-boat'],
    [49, 30, 8, 'patrol-boat'],
    [55, 18, 4.8, 'patrol-boat'],
    [52, 28, 9, 'tug'],
    [30, 20, 6, 'tug'],
    [NaN, 9, 3, 'recreational-rb'],
    [NaN, 85, 9.5, 'cemt-iv'],
    [NaN, NaN, NaN, 'recreational-rb'],
    [79, NaN, NaN, 'cemt-iv'],
  ])('of ship type %f, %f m by %f m is %s', (shipType, length, beam, expected) => {
    expect(classOf(shipType, length, beam)).toBe(expected)
    expect(findVesselClass(expected)).toBeDefined()
  })

  it.each([
    [95, 'tow-1-jumbo'],
    [160, 'tow-4-jumbo'],
    [350, 'tow-15-jumbo'],
    [NaN, 'tow-4-jumbo'],
  ])('of a convoy of %f m is %s', (length, expected) => {
    expect(convoyClass(length)).toBe(expected)
  })
})

const BARGE = { shipType: 79, length: 84, beam: 9.4 }

describe('the vessel of a report', () => {
  it('is as reported where it says its draught, in the loading whose draught is nearer', () => {
    const guess = guessOf({ ...BARGE, draught: 1.4 })
    expect(guess).toMatchObject({ classId: 'cemt-iv', basis: 'reported' })
    expect(guess.variants).toMatchObject([{ length: 84, beam: 9.4, draught: 1.4, loading: 'empty' }])
    expect(guessOf({ ...BARGE, draught: 2.2 }).variants).toMatchObject([{ draught: 2.2, loading: 'laden' }])
  })

  it('is both laden and empty where the draught is not known', () => {
    const guess = guessOf(BARGE)
    expect(guess.basis).toBe('assumed-draught')
    expect(guess.variants).toMatchObject([
      { loading: 'laden', draught: 2.5, length: 84 },
      { loading: 'empty', draught: 1.1, length: 84 },
    ])
  })

  it('is in one loading where a column says which, or its class has one draught', () => {
    expect(guessOf({ ...BARGE, loading: 'empty' }).variants).toMatchObject([{ draught: 1.1 }])
    expect(guessOf({ shipType: 37, length: 9, beam: 3 }).variants).toHaveLength(1)
  })

  it('has the dimensions of its class where it does not say them', () => {
    expect(guessOf({ shipType: 60, length: 40, beam: NaN, draught: 1.2 })).toMatchObject({
      basis: 'assumed-dimensions',
      variants: [{ length: 40, beam: 11.4, draught: 1.2 }],
    })
  })

  it('is a towboat alone where nothing is said of its convoy, and says so', () => {
    expect(guessOf({ shipType: 31, length: 23, beam: 8, draught: 2.6 })).toMatchObject({
      classId: 'tug',
      basis: 'tow-hull-only',
      variants: [{ length: 23, beam: 8, draught: 2.6 }],
    })
  })

  it('is the convoy of the call for towboats, and that of the row before it', () => {
    const convoy = { length: 160, beam: 21.4, draught: 2.7 }
    const ofCall = vesselGuess(positionReport({ shipType: 52, length: 23, beam: 8 }), convoy, findVesselClass)
    expect(ofCall).toMatchObject({
      classId: 'tow-4-jumbo',
      basis: 'tow-override',
      variants: [{ length: 160, beam: 21.4, draught: 2.7 }],
    })
    const row = positionReport({ shipType: 31, convoyLength: 95, convoyBeam: 10.7, convoyDraught: 0.6 })
    expect(vesselGuess(row, convoy, findVesselClass)).toMatchObject({
      classId: 'tow-1-jumbo',
      variants: [{ length: 95, beam: 10.7, draught: 0.6, loading: 'empty' }],
    })
    expect(vesselGuess(positionReport(BARGE), convoy, findVesselClass)?.basis).toBe('assumed-draught')
  })

  it('is that of its class column, without the hull of a towboat', () => {
    expect(
      guessOf({ shipType: 31, length: 23, beam: 8, draught: 2.6, vesselClass: 'tow-15-jumbo' }),
    ).toMatchObject({
      basis: 'class-column',
      variants: [{ length: 350, draught: 2.74 }, { draught: 0.6 }],
    })
    expect(guessOf({ ...BARGE, draught: 2, vesselClass: 'cemt-va' }).variants).toMatchObject([
      { length: 84, draught: 2 },
    ])
  })

  it('is none where the class does not exist', () => {
    const row = positionReport({ vesselClass: 'cemt-ix' })
    expect(vesselGuess(row, NO_CONVOY, findVesselClass)).toBeUndefined()
  })
})

describe('a fleet', () => {
  it('remembers what a vessel said of itself in rows that do not say it', () => {
    const fleet = new Fleet(NO_CONVOY, findVesselClass)
    const first = fleet.guess(positionReport({ ...BARGE, draught: 1.4 }))
    expect(fleet.guess(positionReport({}))).toBe(first)
    expect(fleet.guess(positionReport({ draught: 2.4 }))).toMatchObject({
      variants: [{ length: 84, draught: 2.4 }],
    })
    expect(fleet.guess(positionReport({ vesselKey: 'mmsi:000000102' }))?.basis).toBe('assumed-dimensions')
  })
})
