import { z } from 'zod'
import type { ClassDimensions, VesselClass } from '../domain/vessel-classes.ts'
import { toKmh } from '../domain/units.ts'
import { HULLS, type VesselField } from '../domain/vessel.ts'
import { crossCheck } from './cross-check.ts'
import { checkSpeed, figure, Label, speedFields, speedOf, Text } from './fields.ts'

const DimensionsIn = z.strictObject({
  length_m: figure(1, 500, 'm'),
  beam_m: figure(0.3, 100, 'm'),
  draught_m: figure(0.05, 30, 'm'),
  block_coefficient: figure(0.2, 1, 'displaced volume over length, beam and draught'),
  midship_coefficient: figure(0.3, 1, 'immersed midship section over beam and draught'),
  entrance_length_m: figure(0.1, 500, 'stem to the start of the parallel middle body, m'),
  rock_manual_coefficient: figure(0.05, 5, 'a_i of rock-manual-2007').optional(),
  blaauw_coefficient: figure(0.05, 5, "A'' of blaauw-1984").optional(),
})

/** A speed as replies have it, so that a class that was read can be written back; of its figures one counts. */
const ReplySpeed = z.strictObject({
  mps: z.number().optional(),
  kn: z.number().optional(),
  kmh: figure(0.36, 144, 'km/h, which counts'),
})

/** Fields of a class at the edge, by the name they have inside. */
export const FIELD_NAMES = {
  length: 'length_m',
  beam: 'beam_m',
  draught: 'draught_m',
  blockCoefficient: 'block_coefficient',
  midshipCoefficient: 'midship_coefficient',
  entranceLength: 'entrance_length_m',
  envelopeCoefficient: 'rock_manual_coefficient',
  centralCoefficient: 'blaauw_coefficient',
} as const satisfies Record<keyof ClassDimensions, string>

/** A class of the caller's own, as it comes; what replies add is accepted. */
export const VesselClassIn = z
  .strictObject({
    label: Label,
    id: z.string().optional(),
    name: Text.min(1),
    built_in: z.boolean().optional(),
    revision: z.number().optional(),
    loadings: z.array(z.string()).optional(),
    hull: z.enum(HULLS),
    trade: z.enum(['inland-cargo', 'inland-other', 'sea-going']).optional().describe('default sea-going'),
    dimensions: z.strictObject({ laden: DimensionsIn, empty: DimensionsIn.optional() }),
    ...speedFields('max_speed', 0.5, 40, 'top speed through the water'),
    ...speedFields(
      'min_steerage_speed',
      0.1,
      20,
      'least speed through the water at which the rudder answers',
    ),
    max_speed: ReplySpeed.optional().describe('of a reply; counts where max_speed_* is left out'),
    min_steerage_speed: ReplySpeed.optional().describe('of a reply, likewise'),
    basis: z.record(z.string().max(100), z.enum(['standard', 'typical'])).optional(),
    source: Text.optional(),
  })
  .check(
    crossCheck((value, report) => {
      checkSpeed(value, 'max_speed', value.max_speed === undefined, report)
      checkSpeed(value, 'min_steerage_speed', value.min_steerage_speed === undefined, report)
    }),
  )
  .meta({ id: 'VesselClassInput', description: "A class of vessels of the caller's own." })

type DimensionsWire = z.output<typeof DimensionsIn>

function toDimensions(wire: DimensionsWire): ClassDimensions {
  return {
    length: wire.length_m,
    beam: wire.beam_m,
    draught: wire.draught_m,
    blockCoefficient: wire.block_coefficient,
    midshipCoefficient: wire.midship_coefficient,
    entranceLength: wire.entrance_length_m,
    ...(wire.rock_manual_coefficient !== undefined && { envelopeCoefficient: wire.rock_manual_coefficient }),
    ...(wire.blaauw_coefficient !== undefined && { centralCoefficient: wire.blaauw_coefficient }),
  }
}

/** The speed that was given, else that of a reply, km/h. */
const kmhOf = (given: number | undefined, replied: { readonly kmh: number } | undefined): number =>
  given === undefined ? (replied?.kmh ?? NaN) : toKmh(given)

/** The class that a caller writes under an id. */
export function toVesselClass(id: string, wire: z.output<typeof VesselClassIn>): VesselClass {
  const names = Object.entries(FIELD_NAMES) as [VesselField & keyof ClassDimensions, string][]
  const { laden, empty } = wire.dimensions
  return {
    id,
    name: wire.name,
    hull: wire.hull,
    trade: wire.trade ?? 'sea-going',
    isInlandMotorVessel: false,
    laden: toDimensions(laden),
    ...(empty && { empty: toDimensions(empty) }),
    maxSpeedKmh: kmhOf(speedOf(wire, 'max_speed'), wire.max_speed),
    minSteerageSpeedKmh: kmhOf(speedOf(wire, 'min_steerage_speed'), wire.min_steerage_speed),
    standard: names.filter(([, name]) => wire.basis?.[name] === 'standard').map(([field]) => field),
    source: wire.source ?? 'given by the caller',
  }
}
