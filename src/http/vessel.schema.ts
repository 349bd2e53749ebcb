import { z } from 'zod'
import { HULLS, LOADINGS } from '../domain/vessel.ts'
import { findVesselClass, VESSEL_CLASSES, type VesselClass } from '../domain/vessel-classes.ts'
import { Fault } from '../domain/fault.ts'
import type { Vessel } from '../domain/vessel.ts'
import { vesselOfClass, vesselOfDescription, type VesselFigures } from '../domain/vessel-of.ts'
import type { Registry } from '../store/registry.ts'
import { crossCheck } from './cross-check.ts'
import { checkSpeed, figure, Id, Label, speedFields, speedOf } from './fields.ts'
import { nearestFirst } from './nearest.ts'

const CLASS_IDS = VESSEL_CLASSES.map((item) => item.id)

/** Fields without which a vessel that names no class is not known. */
const DESCRIPTION = ['length_m', 'beam_m', 'draught_m', 'hull'] as const

export const VesselFields = z
  .strictObject({
    label: Label,
    class: Id.optional().describe('id of a vessel class; its figures count where none is given here'),
    loading: z.enum(LOADINGS).optional().describe('of a class; default laden'),
    length_m: figure(1, 500, 'waterline length, m').optional(),
    beam_m: figure(0.3, 100, 'm').optional(),
    draught_m: figure(0.05, 30, 'm').optional(),
    hull: z.enum(HULLS).optional(),
    block_coefficient: figure(0.2, 1, 'displaced volume over length, beam and draught').optional(),
    midship_coefficient: figure(0.3, 1, 'immersed midship section over beam and draught').optional(),
    entrance_length_m: figure(0.1, 500, 'stem to the start of the parallel middle body, m').optional(),
    displacement_m3: figure(0.01, 1e6, 'displaced volume at rest, m3').optional(),
    ...speedFields('max_speed', 0.5, 40, 'top speed through the water'),
    ...speedFields(
      'min_steerage_speed',
      0.1,
      20,
      'least speed through the water at which the rudder answers',
    ),
  })
  .check(
    crossCheck((vessel, report) => {
      checkSpeed(vessel, 'max_speed', false, report)
      checkSpeed(vessel, 'min_steerage_speed', false, report)
      if (vessel.class !== undefined) return
      for (const field of DESCRIPTION) {
        if (vessel[field] === undefined) report([field], 'required', 'is required without a class')
      }
      if (vessel.loading !== undefined)
        report(['loading'], 'clash', 'belongs to a class: give a class or leave it out')
    }),
  )
  .meta({
    id: 'Vessel',
    description: 'A vessel by class, by description, or a class with figures of its own.',
  })

export type VesselWire = z.output<typeof VesselFields>

function figuresOf(wire: VesselWire): VesselFigures {
  const maxSpeed = speedOf(wire, 'max_speed')
  const minSteerageSpeed = speedOf(wire, 'min_steerage_speed')
  return {
    ...(wire.length_m !== undefined && { length: wire.length_m }),
    ...(wire.beam_m !== undefined && { beam: wire.beam_m }),
    ...(wire.draught_m !== undefined && { draught: wire.draught_m }),
    ...(wire.hull !== undefined && { hull: wire.hull }),
    ...(wire.block_coefficient !== undefined && { blockCoefficient: wire.block_coefficient }),
    ...(wire.midship_coefficient !== undefined && { midshipCoefficient: wire.midship_coefficient }),
    ...(wire.entrance_length_m !== undefined && { entranceLength: wire.entrance_length_m }),
    ...(wire.displacement_m3 !== undefined && { volume: wire.displacement_m3 }),
    ...(maxSpeed !== undefined && { maxSpeed }),
    ...(minSteerageSpeed !== undefined && { minSteerageSpeed }),
  }
}

/** Where classes of the caller's own are found. */
export type Classes = Pick<Registry, 'findClass' | 'classes'>

/** A built-in class, or one of the caller's own. */
export function findAnyClass(id: string, registry: Classes): VesselClass | undefined {
  return findVesselClass(id) ?? registry.findClass(id)?.vesselClass
}

/** Ids of every class there is, the nearest to a given one first. */
export function nearestClasses(id: string, registry: Classes): string[] {
  const own = registry.classes().map((record) => record.id)
  return nearestFirst(id, [...CLASS_IDS, ...own])
}

/** Fault for a class that does not exist, with the nearest that does. */
export function unknownClass(id: string, registry: Classes): Fault {
  const [nearest = ''] = nearestClasses(id, registry)
  return new Fault('vessel-class-not-found', `There is no vessel class ${id}; the nearest is ${nearest}`, {
    facts: { vessel_class: id, nearest },
  })
}

/**
 * The vessel of a request.
 *
 * @throws Fault `vessel-class-not-found`
 */
export function toVessel(wire: VesselWire, registry: Classes): Vessel {
  const figures = figuresOf(wire)
  if (wire.class === undefined) {
    const { length, beam, draught, hull } = figures
    if (length === undefined || beam === undefined || draught === undefined || hull === undefined) {
      throw new RangeError('A description without a class has its size and hull checked before')
    }
    return vesselOfDescription({ ...figures, length, beam, draught, hull })
  }
  const vesselClass = findAnyClass(wire.class, registry)
  if (!vesselClass) throw unknownClass(wire.class, registry)
  return vesselOfClass(vesselClass, wire.loading ?? 'laden', figures)
}
