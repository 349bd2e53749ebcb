import type { Hull, Loading, Trade, VesselField } from './vessel.ts'

/** Figures of a class in one loading; lengths in m, coefficients dimensionless. */
export interface ClassDimensions {
  readonly length: number
  readonly beam: number
  readonly draught: number
  readonly blockCoefficient: number
  readonly midshipCoefficient: number
  readonly entranceLength: number
  /** a_i of `rock-manual-2007`, where it gives one */
  readonly envelopeCoefficient?: number
  /** A'' of `blaauw-1984`, where it gives one */
  readonly centralCoefficient?: number
}

export interface VesselClass {
  readonly id: string
  readonly name: string
  readonly hull: Hull
  readonly trade: Trade
  /** self-propelled inland vessel to which the type test of steerage applies */
  readonly isInlandMotorVessel: boolean
  readonly laden: ClassDimensions
  /** absent where the class has one draught only */
  readonly empty?: ClassDimensions
  /** top speed through the water, km/h */
  readonly maxSpeedKmh: number
  /** least speed through the water at which the rudder answers, km/h */
  readonly minSteerageSpeedKmh: number
  /** fields whose figures are standard; all others are typical */
  readonly standard: readonly VesselField[]
  readonly source: string
}

const ECMT =
  'Dimensions: ECMT Resolution 92/2 (1992) and Waterway Guidelines of Rijkswaterstaat (2011); coefficients and speeds: common practice, no source'
const BARGES =
  'Draught: nine feet of the standard jumbo barge; convoy size, coefficients and speeds: common practice, no source'
const PRACTICE = 'Common practice, no source'

const SIZE_AND_LADEN_DRAUGHT = ['length', 'beam', 'draught'] as const

type Pair = readonly [laden: number, empty: number]

interface CargoRow {
  readonly id: string
  readonly name: string
  readonly length: number
  readonly beam: number
  readonly draught: Pair
}

/** CEMT motor vessels: laden 1.0 and empty 0.35 in the F^4 law, 0.25 in the F^(8/3) law. */
function motorVessel(row: CargoRow, maxSpeedKmh: number, minSteerageSpeedKmh: number): VesselClass {
  const form = (draught: number, blockCoefficient: number, envelopeCoefficient: number): ClassDimensions => ({
    length: row.length,
    beam: row.beam,
    draught,
    blockCoefficient,
    midshipCoefficient: 1,
    entranceLength: 0.2 * row.length,
    envelopeCoefficient,
    centralCoefficient: 0.25,
  })
  return {
    id: row.id,
    name: row.name,
    hull: 'displacement',
    trade: 'inland-cargo',
    isInlandMotorVessel: true,
    laden: form(row.draught[0], 0.88, 1),
    empty: form(row.draught[1], 0.8, 0.35),
    maxSpeedKmh,
    minSteerageSpeedKmh,
    standard: SIZE_AND_LADEN_DRAUGHT,
    source: ECMT,
  }
}

/** Pushed convoys: the F^4 law has no coefficient for laden ones. */
function convoy(row: CargoRow, maxSpeedKmh: number, isStandardSize: boolean): VesselClass {
  const form = (draught: number, blockCoefficient: number, centralCoefficient: number): ClassDimensions => ({
    length: row.length,
    beam: row.beam,
    draught,
    blockCoefficient,
    midshipCoefficient: 1,
    entranceLength: 0.1 * row.length,
    centralCoefficient,
  })
  return {
    id: row.id,
    name: row.name,
    hull: 'displacement',
    trade: 'inland-cargo',
    isInlandMotorVessel: false,
    laden: form(row.draught[0], 0.92, 0.8),
    empty: { ...form(row.draught[1], 0.88, 0.35), envelopeCoefficient: 0.5 },
    maxSpeedKmh,
    minSteerageSpeedKmh: 6,
    standard: isStandardSize ? SIZE_AND_LADEN_DRAUGHT : ['draught'],
    source: isStandardSize ? ECMT : BARGES,
  }
}

interface CraftRow {
  readonly id: string
  readonly name: string
  readonly hull: Hull
  readonly trade: Trade
  readonly length: number
  readonly beam: number
  readonly draught: number
  readonly blockCoefficient: number
  readonly midshipCoefficient: number
  /** Le/L */
  readonly entrance: number
  readonly maxSpeedKmh: number
  readonly minSteerageSpeedKmh: number
  readonly centralCoefficient?: number
  readonly isInlandMotorVessel?: boolean
  readonly isStandardSize?: boolean
}

/** Craft of one draught, all with 1.0 in the F^4 law. */
function craft(row: CraftRow): VesselClass {
  return {
    id: row.id,
    name: row.name,
    hull: row.hull,
    trade: row.trade,
    isInlandMotorVessel: row.isInlandMotorVessel ?? false,
    laden: {
      length: row.length,
      beam: row.beam,
      draught: row.draught,
      blockCoefficient: row.blockCoefficient,
      midshipCoefficient: row.midshipCoefficient,
      entranceLength: row.entrance * row.length,
      envelopeCoefficient: 1,
      ...(row.centralCoefficient !== undefined && { centralCoefficient: row.centralCoefficient }),
    },
    maxSpeedKmh: row.maxSpeedKmh,
    minSteerageSpeedKmh: row.minSteerageSpeedKmh,
    standard: row.isStandardSize === true ? SIZE_AND_LADEN_DRAUGHT : [],
    source: row.isStandardSize === true ? ECMT : PRACTICE,
  }
}

interface SeaRow extends CargoRow {
  readonly blockCoefficient: Pair
  readonly midshipCoefficient: number
  readonly entrance: number
  readonly maxSpeedKmh: number
}

/** Sea-going ships: neither restricted-water law has a coefficient for them. */
function seaGoing(row: SeaRow): VesselClass {
  const form = (draught: number, blockCoefficient: number): ClassDimensions => ({
    length: row.length,
    beam: row.beam,
    draught,
    blockCoefficient,
    midshipCoefficient: row.midshipCoefficient,
    entranceLength: row.entrance * row.length,
  })
  return {
    id: row.id,
    name: row.name,
    hull: 'displacement',
    trade: 'sea-going',
    isInlandMotorVessel: false,
    laden: form(row.draught[0], row.blockCoefficient[0]),
    empty: form(row.draught[1], row.blockCoefficient[1]),
    maxSpeedKmh: row.maxSpeedKmh,
    minSteerageSpeedKmh: 7.4,
    standard: [],
    source: PRACTICE,
  }
}

/** Recreational craft of the ECMT table: dimensions and the one draught are standard. */
function recreational(
  row: Pick<
    CraftRow,
    'id' | 'name' | 'hull' | 'length' | 'beam' | 'draught' | 'blockCoefficient' | 'maxSpeedKmh'
  >,
): VesselClass {
  return craft({
    ...row,
    trade: 'inland-other',
    midshipCoefficient: 0.65,
    entrance: 0.45,
    minSteerageSpeedKmh: 4,
    isStandardSize: true,
  })
}

// prettier-ignore
export const VESSEL_CLASSES: readonly VesselClass[] = [
  motorVessel({ id: 'cemt-i', name: 'CEMT I motor vessel', length: 38.5, beam: 5.05, draught: [2.2, 0.8] }, 14, 4),
  motorVessel({ id: 'cemt-ii', name: 'CEMT II motor vessel', length: 55, beam: 6.6, draught: [2.5, 1.0] }, 15, 4),
  motorVessel({ id: 'cemt-iii', name: 'CEMT III motor vessel', length: 80, beam: 8.2, draught: [2.5, 1.1] }, 17, 5),
  motorVessel({ id: 'cemt-iv', name: 'CEMT IV motor vessel', length: 85, beam: 9.5, draught: [2.5, 1.1] }, 18, 5),
  motorVessel({ id: 'cemt-va', name: 'CEMT Va large motor vessel', length: 110, beam: 11.4, draught: [3.5, 1.3] }, 20, 5),
  convoy({ id: 'cemt-vb', name: 'CEMT Vb pushed convoy, two barges in line', length: 185, beam: 11.4, draught: [3.5, 0.8] }, 16, true),
  convoy({ id: 'cemt-via', name: 'CEMT VIa pushed convoy, two barges abreast', length: 110, beam: 22.8, draught: [3.5, 0.8] }, 15, true),
  convoy({ id: 'cemt-vib', name: 'CEMT VIb pushed convoy, four barges', length: 190, beam: 22.8, draught: [3.5, 0.8] }, 15, true),
  convoy({ id: 'cemt-vic', name: 'CEMT VIc pushed convoy, six barges long', length: 280, beam: 22.8, draught: [3.5, 0.8] }, 15, true),
  convoy({ id: 'cemt-vii', name: 'CEMT VII pushed convoy, nine barges', length: 285, beam: 34.2, draught: [3.5, 0.8] }, 14, true),
  convoy({ id: 'tow-1-jumbo', name: 'Tow of one jumbo barge with towboat', length: 95, beam: 10.7, draught: [2.74, 0.6] }, 16, false),
  convoy({ id: 'tow-4-jumbo', name: 'Tow of four jumbo barges with towboat', length: 160, beam: 21.4, draught: [2.74, 0.6] }, 15, false),
  convoy({ id: 'tow-15-jumbo', name: 'Tow of fifteen jumbo barges with towboat', length: 350, beam: 32.1, draught: [2.74, 0.6] }, 14, false),
  recreational({ id: 'recreational-ra', name: 'Recreational RA open boat', hull: 'semi-displacement', length: 5.5, beam: 2, draught: 0.5, blockCoefficient: 0.4, maxSpeedKmh: 25 }),
  recreational({ id: 'recreational-rb', name: 'Recreational RB cabin cruiser', hull: 'semi-displacement', length: 9.5, beam: 3, draught: 1, blockCoefficient: 0.4, maxSpeedKmh: 25 }),
  recreational({ id: 'recreational-rc', name: 'Recreational RC motor yacht', hull: 'semi-displacement', length: 15, beam: 4, draught: 1.5, blockCoefficient: 0.4, maxSpeedKmh: 30 }),
  recreational({ id: 'recreational-rd', name: 'Recreational RD sailing boat', hull: 'displacement', length: 15, beam: 4, draught: 2.1, blockCoefficient: 0.38, maxSpeedKmh: 15 }),
  craft({ id: 'planing-boat', name: 'Planing boat', hull: 'planing', trade: 'sea-going', length: 6, beam: 2.2, draught: 0.35, blockCoefficient: 0.4, midshipCoefficient: 0.65, entrance: 0.45, maxSpeedKmh: 60, minSteerageSpeedKmh: 4 }),
  craft({ id: 'patrol-boat', name: 'Patrol boat', hull: 'semi-displacement', trade: 'sea-going', length: 18, beam: 4.8, draught: 1.1, blockCoefficient: 0.4, midshipCoefficient: 0.7, entrance: 0.4, maxSpeedKmh: 45, minSteerageSpeedKmh: 5 }),
  craft({ id: 'tug', name: 'Tug running free', hull: 'displacement', trade: 'inland-other', length: 28, beam: 9, draught: 3.5, blockCoefficient: 0.55, midshipCoefficient: 0.85, entrance: 0.4, maxSpeedKmh: 22, minSteerageSpeedKmh: 5, centralCoefficient: 0.25 }),
  craft({ id: 'passenger-vessel', name: 'Inland passenger vessel', hull: 'displacement', trade: 'inland-other', length: 85, beam: 11.4, draught: 1.6, blockCoefficient: 0.75, midshipCoefficient: 0.97, entrance: 0.3, maxSpeedKmh: 22, minSteerageSpeedKmh: 5, centralCoefficient: 0.25, isInlandMotorVessel: true }),
  seaGoing({ id: 'coaster', name: 'Coaster', length: 90, beam: 13, draught: [5, 3], blockCoefficient: [0.72, 0.66], midshipCoefficient: 0.98, entrance: 0.2, maxSpeedKmh: 24 }),
  seaGoing({ id: 'handysize', name: 'Handysize bulk carrier', length: 160, beam: 25, draught: [9, 5.5], blockCoefficient: [0.78, 0.72], midshipCoefficient: 0.98, entrance: 0.2, maxSpeedKmh: 26 }),
  seaGoing({ id: 'panamax', name: 'Panamax bulk carrier', length: 225, beam: 32.26, draught: [12, 7.5], blockCoefficient: [0.85, 0.8], midshipCoefficient: 0.99, entrance: 0.18, maxSpeedKmh: 27 }),
]

const BY_ID: ReadonlyMap<string, VesselClass> = new Map(VESSEL_CLASSES.map((item) => [item.id, item]))

export function findVesselClass(id: string): VesselClass | undefined {
  return BY_ID.get(id)
}

export function dimensionsOf(vesselClass: VesselClass, loading: Loading): ClassDimensions {
  return loading === 'empty' ? (vesselClass.empty ?? vesselClass.laden) : vesselClass.laden
}

/** Whether a figure of a class is a standard one; of the draughts only the laden one can be. */
export function isStandard(vesselClass: VesselClass, field: VesselField, loading: Loading): boolean {
  if (!vesselClass.standard.includes(field)) return false
  return field !== 'draught' || loading === 'laden' || vesselClass.empty === undefined
}
