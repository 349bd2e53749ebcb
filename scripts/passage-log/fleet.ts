import type { Loading } from '../../src/domain/vessel.ts'

/** An invented vessel. Sizes in m; whole length and beam, as AIS has them. */
export interface Ship {
  readonly mmsi: string
  readonly name: string
  /** ship type of ITU-R M.1371 */
  readonly type: number
  readonly transceiver: 'A' | 'B'
  readonly length: number
  readonly beam: number
  /** as reported; undefined where it is missing */
  readonly draught?: number
  readonly convoy?: { readonly length: number; readonly beam: number; readonly draught: number }
  /** class that ship type and size tell */
  readonly classId: string
  /** loading of the reported draught; both where it is missing and the class has two */
  readonly loadings: readonly Loading[]
}

/**
 * Identities begin with 299, which the ITU has allocated to no administration, so that none of them is a real vessel's;
 * 00299 and 99299 are the base stations and the aids to navigation of the same.
 */
export const identity = (number: number): string => `299${String(number).padStart(6, '0')}`

type Kind = Omit<Ship, 'mmsi' | 'name'>

/** Kinds of vessels; every size lies well inside the range of its class. */
// prettier-ignore
export const KINDS = {
  smallCargo: { type: 79, transceiver: 'A', length: 38, beam: 5, draught: 2, classId: 'cemt-i', loadings: ['laden'] },
  emptySmallCargo: { type: 79, transceiver: 'A', length: 38, beam: 5, draught: 0.8, classId: 'cemt-i', loadings: ['empty'] },
  cargo: { type: 70, transceiver: 'A', length: 55, beam: 7, draught: 2, classId: 'cemt-ii', loadings: ['laden'] },
  emptyCargo: { type: 70, transceiver: 'A', length: 55, beam: 7, draught: 1, classId: 'cemt-ii', loadings: ['empty'] },
  unknownTanker: { type: 80, transceiver: 'A', length: 85, beam: 9, classId: 'cemt-iv', loadings: ['laden', 'empty'] },
  unknownCargo: { type: 70, transceiver: 'A', length: 85, beam: 9, classId: 'cemt-iv', loadings: ['laden', 'empty'] },
  deepTanker: { type: 80, transceiver: 'A', length: 85, beam: 9, draught: 2.4, classId: 'cemt-iv', loadings: ['laden'] },
  towboat: { type: 31, transceiver: 'A', length: 24, beam: 8, draught: 2.6, classId: 'tug', loadings: ['laden'] },
  tow: { type: 52, transceiver: 'A', length: 24, beam: 8, draught: 2.6, convoy: { length: 95, beam: 10.7, draught: 2.74 }, classId: 'tow-1-jumbo', loadings: ['laden'] },
  cruiser: { type: 37, transceiver: 'B', length: 10, beam: 3, classId: 'recreational-rb', loadings: ['laden'] },
  yacht: { type: 37, transceiver: 'B', length: 15, beam: 4, classId: 'recreational-rc', loadings: ['laden'] },
  tripBoat: { type: 60, transceiver: 'A', length: 40, beam: 8, draught: 1.3, classId: 'passenger-vessel', loadings: ['laden'] },
  ferry: { type: 60, transceiver: 'A', length: 18, beam: 6, draught: 1.2, classId: 'passenger-vessel', loadings: ['laden'] },
  ship: { type: 70, transceiver: 'A', length: 160, beam: 25, draught: 5.5, classId: 'handysize', loadings: ['empty'] },
} as const satisfies Readonly<Record<string, Kind>>

export function shipOf(kind: keyof typeof KINDS, number: number, name: string): Ship {
  return { ...KINDS[kind], mmsi: identity(number), name }
}
