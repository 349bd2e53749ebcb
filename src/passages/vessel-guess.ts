import type { VesselClass } from '../domain/vessel-classes.ts'
import { vesselOfClass, type VesselFigures } from '../domain/vessel-of.ts'
import type { Loading, Vessel } from '../domain/vessel.ts'
import { classOf, convoyClass, isTowboat } from './class-of.ts'
import type { PositionReport } from './position-report.ts'

/** Where the hull comes from that a report is judged with. */
export const VESSEL_BASES = [
  'reported',
  'assumed-draught',
  'assumed-dimensions',
  'tow-override',
  'class-column',
  'tow-hull-only',
] as const
export type VesselBasis = (typeof VESSEL_BASES)[number]

/** Size of a convoy; NaN where it is not known, m. */
export interface Convoy {
  readonly length: number
  readonly beam: number
  readonly draught: number
}

/** The vessel that a report is taken for. */
export interface VesselGuess {
  readonly classId: string
  readonly basis: VesselBasis
  /** laden and empty where the draught is not known and matters, else one */
  readonly variants: readonly [Vessel] | readonly [Vessel, Vessel]
}

export type FindClass = (id: string) => VesselClass | undefined

/** What is known of a vessel besides where it is. */
export type Particulars = Pick<
  PositionReport,
  | 'shipType'
  | 'length'
  | 'beam'
  | 'draught'
  | 'vesselClass'
  | 'loading'
  | 'convoyLength'
  | 'convoyBeam'
  | 'convoyDraught'
>

const known = (value: number): number | undefined => (Number.isNaN(value) ? undefined : value)

function figuresOf(length: number, beam: number, draught: number): VesselFigures {
  const given = { length: known(length), beam: known(beam), draught: known(draught) }
  return {
    ...(given.length !== undefined && { length: given.length }),
    ...(given.beam !== undefined && { beam: given.beam }),
    ...(given.draught !== undefined && { draught: given.draught }),
  }
}

/** The loading whose draught is nearer to the one that is known. */
function loadingOf({ laden, empty }: VesselClass, draught: number): Loading {
  if (!empty) return 'laden'
  return Math.abs(draught - empty.draught) < Math.abs(draught - laden.draught) ? 'empty' : 'laden'
}

/** Both loadings where neither loading nor draught is known and the class has two. */
function variantsOf(
  vesselClass: VesselClass,
  figures: VesselFigures,
  loading: Loading | undefined,
): VesselGuess['variants'] {
  const { draught } = figures
  if (loading === undefined && draught === undefined && vesselClass.empty) {
    return [vesselOfClass(vesselClass, 'laden', figures), vesselOfClass(vesselClass, 'empty', figures)]
  }
  const used = loading ?? (draught === undefined ? 'laden' : loadingOf(vesselClass, draught))
  return [vesselOfClass(vesselClass, used, figures)]
}

/** Convoy of the row, else of the call where the vessel is a towboat. */
function convoyOf(particulars: Particulars, convoy: Convoy): Convoy | undefined {
  const { convoyLength, convoyBeam, convoyDraught, shipType } = particulars
  const row = { length: convoyLength, beam: convoyBeam, draught: convoyDraught }
  const isKnown = ({ length, beam, draught }: Convoy) => length > 0 || beam > 0 || draught > 0
  if (isKnown(row)) return row
  return isTowboat(shipType) && isKnown(convoy) ? convoy : undefined
}

function basisOf(particulars: Particulars, hasConvoy: boolean): VesselBasis {
  const { shipType, length, beam, draught, vesselClass } = particulars
  if (vesselClass !== undefined) return 'class-column'
  if (hasConvoy) return 'tow-override'
  if (isTowboat(shipType)) return 'tow-hull-only'
  if (!(length > 0 && beam > 0)) return 'assumed-dimensions'
  return draught > 0 ? 'reported' : 'assumed-draught'
}

/**
 * The vessel behind a report. What it says of itself stands in place of the figures of its class; a towboat's own
 * size is never taken for its convoy's.
 *
 * @param convoy     size of the convoys of towboats that do not say it themselves
 * @param findClass  classes by id
 * @returns undefined when the row names a class that does not exist
 */
export function vesselGuess(
  particulars: Particulars,
  convoy: Convoy,
  findClass: FindClass,
): VesselGuess | undefined {
  const { shipType, length, beam, draught, loading } = particulars
  const pushed = convoyOf(particulars, convoy)
  const basis = basisOf(particulars, pushed !== undefined)
  const classId =
    particulars.vesselClass ?? (pushed ? convoyClass(pushed.length) : classOf(shipType, length, beam))
  const vesselClass = findClass(classId)
  if (!vesselClass) return undefined
  const isOwnHullLeftOut = basis === 'class-column' && isTowboat(shipType)
  const figures = pushed
    ? figuresOf(pushed.length, pushed.beam, pushed.draught)
    : isOwnHullLeftOut
      ? {}
      : figuresOf(length, beam, draught)
  return { classId, basis, variants: variantsOf(vesselClass, figures, loading) }
}

/** Whether a report says what is known already: what it leaves out of type and size counts as said before. */
function saysTheSame(known: Particulars, now: Particulars): boolean {
  return (
    isSameOrUnsaid(known.shipType, now.shipType) &&
    isSameOrUnsaid(known.length, now.length) &&
    isSameOrUnsaid(known.beam, now.beam) &&
    isSameOrUnsaid(known.draught, now.draught) &&
    known.vesselClass === now.vesselClass &&
    known.loading === now.loading &&
    Object.is(known.convoyLength, now.convoyLength) &&
    Object.is(known.convoyBeam, now.convoyBeam) &&
    Object.is(known.convoyDraught, now.convoyDraught)
  )
}

const isSameOrUnsaid = (known: number, now: number): boolean => known === now || Number.isNaN(now)

const later = (before: number, now: number): number => (Number.isNaN(now) ? before : now)

/** What a report says, and what an earlier one said of the vessel's type and size: publications repeat it in some rows only. */
function carriedOver(before: Particulars | undefined, now: Particulars): Particulars {
  return {
    shipType: later(before?.shipType ?? NaN, now.shipType),
    length: later(before?.length ?? NaN, now.length),
    beam: later(before?.beam ?? NaN, now.beam),
    draught: later(before?.draught ?? NaN, now.draught),
    vesselClass: now.vesselClass,
    loading: now.loading,
    convoyLength: now.convoyLength,
    convoyBeam: now.convoyBeam,
    convoyDraught: now.convoyDraught,
  }
}

/** Vessels of a log, made once as long as they say the same of themselves. */
export class Fleet {
  readonly #known = new Map<string, { particulars: Particulars; guess: VesselGuess | undefined }>()
  readonly #convoy: Convoy
  readonly #findClass: FindClass

  constructor(convoy: Convoy, findClass: FindClass) {
    this.#convoy = convoy
    this.#findClass = findClass
  }

  /** As `vesselGuess`, with what earlier reports of the vessel said of its type and size. */
  guess(report: PositionReport): VesselGuess | undefined {
    const before = this.#known.get(report.vesselKey)
    if (before && saysTheSame(before.particulars, report)) return before.guess
    const particulars = carriedOver(before?.particulars, report)
    const guess = vesselGuess(particulars, this.#convoy, this.#findClass)
    this.#known.set(report.vesselKey, { particulars, guess })
    return guess
  }
}
