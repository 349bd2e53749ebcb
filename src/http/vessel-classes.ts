import { z } from 'zod'
import {
  findVesselClass,
  VESSEL_CLASSES,
  type ClassDimensions,
  type VesselClass,
} from '../domain/vessel-classes.ts'
import { fromKmh } from '../domain/units.ts'
import { HULLS } from '../domain/vessel.ts'
import type { Routes } from './app-type.ts'
import { Id } from './fields.ts'
import { listOf } from './list.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { PAGE_FIELDS, pageOf } from './paging.ts'
import { problemResponses } from './problems.ts'
import { Speed } from './reply-parts.schema.ts'
import { toSpeed } from './reply-parts.ts'
import { unknownClass } from './vessel.schema.ts'

const Dimensions = z.object({
  length_m: z.number(),
  beam_m: z.number(),
  draught_m: z.number(),
  block_coefficient: z.number(),
  midship_coefficient: z.number(),
  entrance_length_m: z.number(),
  rock_manual_coefficient: z.number().optional().describe('a_i, where the manual gives one'),
  blaauw_coefficient: z.number().optional().describe("A'', where the paper gives one"),
})

const VesselClassReply = z
  .object({
    id: z.string(),
    name: z.string(),
    built_in: z.boolean(),
    revision: z.int().min(1).max(1e9),
    loadings: z.array(z.enum(['laden', 'empty'])).describe('empty for a class of one draught'),
    hull: z.enum(HULLS),
    trade: z.enum(['inland-cargo', 'inland-other', 'sea-going']),
    dimensions: z.object({ laden: Dimensions, empty: Dimensions.optional() }),
    max_speed: Speed,
    min_steerage_speed: Speed,
    basis: z.record(z.string(), z.enum(['standard', 'typical'])),
    source: z.string(),
  })
  .meta({ id: 'VesselClass', description: 'A class of vessels with its figures and where they come from.' })

/** Fields of a class at the edge, by the name they have inside. */
const FIELD_NAMES = {
  length: 'length_m',
  beam: 'beam_m',
  draught: 'draught_m',
  blockCoefficient: 'block_coefficient',
  midshipCoefficient: 'midship_coefficient',
  entranceLength: 'entrance_length_m',
  envelopeCoefficient: 'rock_manual_coefficient',
  centralCoefficient: 'blaauw_coefficient',
} as const satisfies Record<keyof ClassDimensions, string>

function toDimensions(dimensions: ClassDimensions) {
  const entries = Object.entries(FIELD_NAMES) as [keyof ClassDimensions, string][]
  return Object.fromEntries(
    entries.flatMap(([field, name]) => (dimensions[field] === undefined ? [] : [[name, dimensions[field]]])),
  )
}

function toBasis(vesselClass: VesselClass) {
  const present = (Object.keys(FIELD_NAMES) as (keyof ClassDimensions)[]).filter(
    (field) => vesselClass.laden[field] !== undefined || vesselClass.empty?.[field] !== undefined,
  )
  const basis: Record<string, 'standard' | 'typical'> = {}
  for (const field of present) {
    basis[FIELD_NAMES[field]] = vesselClass.standard.includes(field) ? 'standard' : 'typical'
  }
  // of two draughts only the laden one is standard
  if (vesselClass.empty && basis['draught_m'] === 'standard') basis['empty.draught_m'] = 'typical'
  return { ...basis, max_speed: 'typical', min_steerage_speed: 'typical' }
}

function toVesselClassReply(vesselClass: VesselClass) {
  return {
    id: vesselClass.id,
    name: vesselClass.name,
    built_in: true,
    revision: 1,
    loadings: vesselClass.empty ? ['laden', 'empty'] : [],
    hull: vesselClass.hull,
    trade: vesselClass.trade,
    dimensions: {
      laden: toDimensions(vesselClass.laden),
      ...(vesselClass.empty && { empty: toDimensions(vesselClass.empty) }),
    },
    max_speed: toSpeed(fromKmh(vesselClass.maxSpeedKmh)),
    min_steerage_speed: toSpeed(fromKmh(vesselClass.minSteerageSpeedKmh)),
    basis: toBasis(vesselClass),
    source: vesselClass.source,
  }
}

/** The classes of vessels that a request can name. */
export const vesselClassRoutes: Routes = (app) => {
  app.get('/v1/vessel-classes', {
    schema: {
      operationId: 'listVesselClasses',
      tags: ['vessels'],
      summary: 'List the classes of vessels.',
      querystring: z.strictObject({ ...PAGE_FIELDS, format: formatParameter(['json']) }),
      response: { 200: listOf('VesselClassList', VesselClassReply), ...problemResponses(400, 406) },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['json'])
      return pageOf(VESSEL_CLASSES, request.query, request.url, toVesselClassReply)
    },
  })

  app.get('/v1/vessel-classes/:id', {
    schema: {
      operationId: 'getVesselClass',
      tags: ['vessels'],
      summary: 'Show a class of vessels.',
      params: z.strictObject({ id: Id }),
      querystring: z.strictObject({ format: formatParameter(['json']) }),
      response: { 200: VesselClassReply, ...problemResponses(400, 404, 406) },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['json'])
      const vesselClass = findVesselClass(request.params.id)
      if (!vesselClass) throw unknownClass(request.params.id)
      void reply.header('etag', '"1"')
      return toVesselClassReply(vesselClass)
    },
  })
}
