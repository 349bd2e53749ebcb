import { z } from 'zod'
import { Fault } from '../domain/fault.ts'
import type { Routes } from './app-type.ts'
import { problemResponses } from './problems.ts'

export interface Versions {
  readonly service: string
  /** Rises whenever a change of methods moves figures. */
  readonly methods: string
}

/** What the service has ready to answer from. */
export interface Readiness {
  readonly registryRevision: number
  readonly database: string
}

const Live = z.object({ status: z.literal('live') }).meta({ id: 'Live', description: 'The process answers.' })

const Ready = z
  .object({
    status: z.literal('ready'),
    service_version: z.string(),
    method_version: z.string(),
    registry_revision: z.int().min(0).max(Number.MAX_SAFE_INTEGER).describe('rises by one with each write'),
    database: z.string().describe('kind of store behind the registry'),
  })
  .meta({ id: 'Ready', description: 'The service can answer, and from which versions.' })

/** Liveness for a supervisor and readiness for a load balancer. */
export function healthRoutes(
  versions: Versions,
  isReady: () => Readiness | undefined | Promise<Readiness | undefined>,
): Routes {
  return (app) => {
    app.get('/health/live', {
      config: { place: 'none' },
      schema: {
        operationId: 'getLive',
        tags: ['service'],
        summary: 'Tell whether the process answers.',
        response: { 200: Live },
      },
      handler: () => ({ status: 'live' }),
    })
    app.get('/health/ready', {
      config: { place: 'none' },
      schema: {
        operationId: 'getReady',
        tags: ['service'],
        summary: 'Tell whether the service can answer, and from which versions.',
        response: { 200: Ready, ...problemResponses(503) },
      },
      handler: async () => {
        const state = await isReady()
        if (!state) throw new Fault('overloaded', 'The service is not ready to answer yet')
        return {
          status: 'ready',
          service_version: versions.service,
          method_version: versions.methods,
          registry_revision: state.registryRevision,
          database: state.database,
        }
      },
    })
  }
}
