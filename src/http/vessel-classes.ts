import { z } from 'zod'
import {
  findVesselClass,
  VESSEL_CLASSES,
  type ClassDimensions,
  type VesselClass,
} from '../domain/vessel-classes.ts'
import { fromKmh } from '../domain/units.ts'
import { HULLS } from '../domain/vessel.ts'
import { Fault } from '../domain/fault.ts'
import type { ClassRecord } from '../store/registry.ts'
import type { App, Routes } from './app-type.ts'
import { Id } from './fields.ts'
import { FIELD_NAMES, toVesselClass, VesselClassIn } from './own-class.ts'
import { listOf } from './list.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { PAGE_FIELDS, pageOf } from './paging.ts'
import { expectedOf, revisionRequired, writtenOr } from './preconditions.ts'
import { problemResponses } from './problems.ts'
import { authorOf } from './segment-writes.ts'
import { openView, type Service, type View } from './service.ts'
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

/** A class with its revision; built-in ones have one revision for ever. */
interface Shown {
  readonly id: string
  readonly vesselClass: VesselClass
  readonly revision: number
  readonly isBuiltIn: boolean
}

const builtIn = (vesselClass: VesselClass): Shown => ({
  id: vesselClass.id,
  vesselClass,
  revision: 1,
  isBuiltIn: true,
})

const own = ({ id, vesselClass, revision }: ClassRecord): Shown => ({
  id,
  vesselClass,
  revision,
  isBuiltIn: false,
})

export function toVesselClassReply({ vesselClass, revision, isBuiltIn }: Shown) {
  return {
    id: vesselClass.id,
    name: vesselClass.name,
    built_in: isBuiltIn,
    revision,
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

export function shownOf(id: string, { registry }: Pick<View, 'registry'>): Shown {
  const known = findVesselClass(id)
  if (known) return builtIn(known)
  const record = registry.findClass(id)
  if (!record) throw unknownClass(id, registry)
  return own(record)
}

function refuseBuiltIn(id: string): void {
  if (!findVesselClass(id)) return
  throw new Fault('built-in-class', `The class ${id} is built in: write one of your own under another id`, {
    facts: { vessel_class: id },
  })
}

const Params = z.strictObject({ id: Id })
const JsonQuery = z.strictObject({ format: formatParameter(['json']) })

/** The classes of vessels that a request can name, and writing those of the caller's own. */
export function vesselClassRoutes(service: Service): Routes {
  return (app) => {
    addList(app, service)
    addClass(app, service)
    addPut(app, service)
    addDelete(app, service)
  }
}

function addList(app: App, service: Service): void {
  app.get('/v1/vessel-classes', {
    schema: {
      operationId: 'listVesselClasses',
      tags: ['vessels'],
      summary: 'List the classes of vessels.',
      querystring: z.strictObject({ ...PAGE_FIELDS, format: formatParameter(['json']) }),
      response: { 200: listOf('VesselClassList', VesselClassReply), ...problemResponses(400, 406) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const { registry } = await openView(service, reply)
      const all = [...VESSEL_CLASSES.map(builtIn), ...registry.classes().map(own)]
      return pageOf(all, request.query, request.url, toVesselClassReply)
    },
  })
}

function addClass(app: App, service: Service): void {
  app.get('/v1/vessel-classes/:id', {
    schema: {
      operationId: 'getVesselClass',
      tags: ['vessels'],
      summary: 'Show a class of vessels.',
      params: Params,
      querystring: JsonQuery,
      response: { 200: VesselClassReply, ...problemResponses(400, 404, 406) },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const shown = shownOf(request.params.id, await openView(service, reply))
      void reply.header('etag', `"${shown.revision}"`)
      return toVesselClassReply(shown)
    },
  })
}

function addPut(app: App, service: Service): void {
  app.put('/v1/vessel-classes/:id', {
    schema: {
      operationId: 'putVesselClass',
      tags: ['vessels'],
      summary: 'Create a class of your own, or replace one at the revision that If-Match names.',
      params: Params,
      querystring: JsonQuery,
      body: VesselClassIn,
      response: {
        200: VesselClassReply,
        201: VesselClassReply,
        ...problemResponses(400, 401, 403, 404, 406, 409, 412, 413, 415, 428, 503),
      },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const { id } = request.params
      refuseBuiltIn(id)
      const expected = expectedOf(request)
      const before = await service.store.current()
      const content = toVesselClass(id, request.body)
      const written = writtenOr(
        await service.store.putClass(content, expected, authorOf(request, service)),
        expected,
        () => unknownClass(id, before),
      )
      if (written.outcome === 'created') void reply.code(201).header('location', `/v1/vessel-classes/${id}`)
      void reply.header('etag', `"${written.revision}"`)
      return toVesselClassReply(shownOf(id, await openView(service, reply)))
    },
  })
}

function addDelete(app: App, service: Service): void {
  app.delete('/v1/vessel-classes/:id', {
    schema: {
      operationId: 'deleteVesselClass',
      tags: ['vessels'],
      summary: 'Delete the class of your own at the revision that If-Match names.',
      params: Params,
      response: {
        204: { description: 'It is deleted.', type: 'null' },
        ...problemResponses(400, 401, 403, 404, 409, 412, 428, 503),
      },
    },
    handler: async (request, reply) => {
      const { id } = request.params
      refuseBuiltIn(id)
      const expected = expectedOf(request)
      const before = await service.store.current()
      const record = before.findClass(id)
      if (!record) throw unknownClass(id, before)
      if (expected === 'none') throw revisionRequired(record.revision)
      const written = await service.store.deleteClass(id, expected, authorOf(request, service))
      writtenOr(written, expected, () => unknownClass(id, before))
      await openView(service, reply)
      return reply.code(204).send()
    },
  })
}
