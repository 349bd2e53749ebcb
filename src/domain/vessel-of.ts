import type { ClassDimensions, VesselClass } from './vessel-classes.ts'
import { dimensionsOf, isStandard } from './vessel-classes.ts'
import { fromKmh } from './units.ts'
import type { Basis, Hull, Loading, Vessel, VesselField } from './vessel.ts'

/** Figures that a caller may give in place of a class's or a default's, SI. */
export interface VesselFigures {
  readonly length?: number
  readonly beam?: number
  readonly draught?: number
  readonly hull?: Hull
  readonly blockCoefficient?: number
  readonly midshipCoefficient?: number
  readonly entranceLength?: number
  readonly volume?: number
  readonly maxSpeed?: number
  readonly minSteerageSpeed?: number
}

/** A vessel described without a class: its size and hull are known. */
export interface DescribedVessel extends VesselFigures {
  readonly length: number
  readonly beam: number
  readonly draught: number
  readonly hull: Hull
}

/** Length from which a described displacement hull is taken for a cargo ship, m (own choice). */
const SHIP_LENGTH = 25

const SHIP_FORM = { blockCoefficient: 0.85, midshipCoefficient: 1, entrance: 0.2 } as const
const BOAT_FORM = { blockCoefficient: 0.4, midshipCoefficient: 0.65, entrance: 0.45 } as const

/** Top and steerage speeds of described vessels, km/h (common practice, no source). */
const DISPLACEMENT_TOP = 20
const FAST_TOP = 45
const SHIP_STEERAGE = 5
const BOAT_STEERAGE = 4

/** C_B that follows from a displaced volume, or the default. */
function blockCoefficientOf(figures: VesselFigures, box: number, standIn: number): number {
  if (figures.blockCoefficient !== undefined) return figures.blockCoefficient
  return figures.volume === undefined ? standIn : figures.volume / box
}

function basisOf(figures: VesselFigures, standIn: (field: VesselField) => Basis): Record<VesselField, Basis> {
  const basis = (field: keyof VesselFigures & VesselField): Basis =>
    figures[field] === undefined ? standIn(field) : 'given'
  const isVolumeGiven = figures.volume !== undefined
  return {
    length: basis('length'),
    beam: basis('beam'),
    draught: basis('draught'),
    blockCoefficient:
      isVolumeGiven && figures.blockCoefficient === undefined ? 'derived' : basis('blockCoefficient'),
    midshipCoefficient: basis('midshipCoefficient'),
    entranceLength: basis('entranceLength'),
    volume: isVolumeGiven ? 'given' : 'derived',
    maxSpeed: basis('maxSpeed'),
    minSteerageSpeed: basis('minSteerageSpeed'),
    envelopeCoefficient: standIn('envelopeCoefficient'),
    centralCoefficient: standIn('centralCoefficient'),
  }
}

/** Le for a length that differs from the class's: in proportion. */
function classEntrance(figures: VesselFigures, dimensions: ClassDimensions, length: number): number {
  return figures.entranceLength ?? (dimensions.entranceLength / dimensions.length) * length
}

/**
 * The vessel of a class in a loading, with what the caller gives in place of the class's figures.
 *
 * @param vesselClass  the class
 * @param loading      laden or empty; a class of one draught takes either
 * @param figures      overrides, SI
 */
export function vesselOfClass(vesselClass: VesselClass, loading: Loading, figures: VesselFigures): Vessel {
  const dimensions = dimensionsOf(vesselClass, loading)
  const { length = dimensions.length, beam = dimensions.beam, draught = dimensions.draught } = figures
  const box = length * beam * draught
  const blockCoefficient = blockCoefficientOf(figures, box, dimensions.blockCoefficient)
  const { envelopeCoefficient, centralCoefficient } = dimensions
  return {
    classId: vesselClass.id,
    className: vesselClass.name,
    ...(vesselClass.empty && { loading }),
    hull: figures.hull ?? vesselClass.hull,
    trade: vesselClass.trade,
    isInlandMotorVessel: vesselClass.isInlandMotorVessel,
    length,
    beam,
    draught,
    blockCoefficient,
    midshipCoefficient: figures.midshipCoefficient ?? dimensions.midshipCoefficient,
    entranceLength: classEntrance(figures, dimensions, length),
    volume: figures.volume ?? blockCoefficient * box,
    maxSpeed: figures.maxSpeed ?? fromKmh(vesselClass.maxSpeedKmh),
    minSteerageSpeed: figures.minSteerageSpeed ?? fromKmh(vesselClass.minSteerageSpeedKmh),
    ...(envelopeCoefficient !== undefined && { envelopeCoefficient }),
    ...(centralCoefficient !== undefined && { centralCoefficient }),
    basis: basisOf(figures, (field) => (isStandard(vesselClass, field, loading) ? 'standard' : 'typical')),
  }
}

/** A vessel described by size and hull; form, speeds and coefficients default by size. */
export function vesselOfDescription(described: DescribedVessel): Vessel {
  const { length, beam, draught, hull } = described
  const isShip = hull === 'displacement' && length >= SHIP_LENGTH
  const form = isShip ? SHIP_FORM : BOAT_FORM
  const box = length * beam * draught
  const blockCoefficient = blockCoefficientOf(described, box, form.blockCoefficient)
  const steerage = length < SHIP_LENGTH ? BOAT_STEERAGE : SHIP_STEERAGE
  return {
    hull,
    trade: 'sea-going',
    isInlandMotorVessel: false,
    length,
    beam,
    draught,
    blockCoefficient,
    midshipCoefficient: described.midshipCoefficient ?? form.midshipCoefficient,
    entranceLength: described.entranceLength ?? form.entrance * length,
    volume: described.volume ?? blockCoefficient * box,
    maxSpeed: described.maxSpeed ?? fromKmh(hull === 'displacement' ? DISPLACEMENT_TOP : FAST_TOP),
    minSteerageSpeed: described.minSteerageSpeed ?? fromKmh(steerage),
    ...(length < SHIP_LENGTH && { envelopeCoefficient: 1 }),
    basis: basisOf(described, () => 'typical'),
  }
}

/** Displaced volume at another draught, m³; a volume that was derived follows. */
export function volumeAt(vessel: Vessel, draught: number): number {
  if (draught === vessel.draught || vessel.basis.volume === 'given') return vessel.volume
  return vessel.blockCoefficient * vessel.length * vessel.beam * draught
}

/** The same vessel at another draught; a volume that was derived follows. */
export function atDraught(vessel: Vessel, draught: number): Vessel {
  if (draught === vessel.draught) return vessel
  return { ...vessel, draught, volume: volumeAt(vessel, draught) }
}
