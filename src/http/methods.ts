import { z } from 'zod'
import { METHOD_KINDS, METHODS } from '../advisory/catalogue.ts'
import { Fault } from '../domain/fault.ts'
import { HULLS } from '../domain/vessel.ts'
import type { Routes } from './app-type.ts'
import { Id } from './fields.ts'
import { listOf } from './list.ts'
import { nearestFirst } from './nearest.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { PAGE_FIELDS, pageOf } from './paging.ts'
import { enumParameter } from './parameters.ts'
import { problemResponses } from './problems.ts'

const MethodReply = z
  .object({
    id: z.string(),
    kind: z.enum(METHOD_KINDS),
    name: z.string(),
    law: z.string().describe('in words and symbols'),
    quantities: z.array(z.object({ symbol: z.string(), name: z.string(), unit: z.string() })),
    range: z.array(
      z.object({
        quantity: z.string(),
        min: z.number().optional(),
        max: z.number().optional(),
        hulls: z.array(z.enum(HULLS)).optional().describe('hulls that it binds; all where left out'),
      }),
    ),
    hulls: z.array(z.enum(HULLS)),
    channels: z
      .array(z.enum(['open', 'confined']))
      .optional()
      .describe('both where left out'),
    inland_only: z.boolean(),
    distance_from: z.enum(['hull-side', 'sailing-line']).optional(),
    nature: z.enum(['envelope', 'central']),
    reference: z.string(),
    from_memory: z.boolean().describe('true where the source was recalled and not read again'),
    version: z.string(),
  })
  .meta({ id: 'Method', description: 'A published method: what it says, where it holds, where to read it.' })

type Method = (typeof METHODS)[number]

export function toMethodReply(method: Method) {
  return {
    id: method.id,
    kind: method.kind,
    name: method.name,
    law: method.law,
    quantities: method.quantities,
    range: method.range,
    hulls: method.hulls,
    ...(method.channels && { channels: method.channels }),
    inland_only: method.isInlandOnly ?? false,
    ...(method.distanceFrom && { distance_from: method.distanceFrom }),
    nature: method.nature,
    reference: method.reference,
    from_memory: method.isFromMemory,
    version: method.version,
  }
}

function methodOf(id: string): Method {
  const method = METHODS.find((item) => item.id === id)
  if (method) return method
  const [nearest = ''] = nearestFirst(
    id,
    METHODS.map((item) => item.id),
  )
  throw new Fault('method-not-found', `There is no method ${id}; the nearest is ${nearest}`, {
    facts: { method_id: id, nearest },
  })
}

/** The published methods behind the figures. */
export const methodRoutes: Routes = (app) => {
  app.get('/v1/methods', {
    schema: {
      operationId: 'listMethods',
      tags: ['methods'],
      summary: 'List the published methods behind the figures, with their ranges.',
      querystring: z.strictObject({
        kind: enumParameter(METHOD_KINDS).optional(),
        ...PAGE_FIELDS,
        format: formatParameter(['json']),
      }),
      response: { 200: listOf('MethodList', MethodReply), ...problemResponses(400, 406) },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['json'])
      const { kind } = request.query
      const chosen = METHODS.filter((method) => kind === undefined || method.kind === kind)
      return pageOf(chosen, request.query, request.url, toMethodReply)
    },
  })

  app.get('/v1/methods/:id', {
    schema: {
      operationId: 'getMethod',
      tags: ['methods'],
      summary: 'Show a published method.',
      params: z.strictObject({ id: Id }),
      querystring: z.strictObject({ format: formatParameter(['json']) }),
      response: { 200: MethodReply, ...problemResponses(400, 404, 406) },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['json'])
      return toMethodReply(methodOf(request.params.id))
    },
  })
}
