import { expect } from 'vitest'
import type { z } from 'zod'
import { JobReply } from '../../src/http/studies.schema.ts'
import { canal, collection, type RegistryService, type Reply } from './registry-service.ts'
import { linesOf, type Json } from './service.ts'
import { strict } from './strict.ts'

/** Two canals one after the other on a waterway, the second shallower. */
export const WATERWAY = collection(
  canal('a', { waterway: 'W', chainage_from_m: 0, chainage_to_m: 1300 }),
  canal('b', { waterway: 'W', chainage_from_m: 1300, chainage_to_m: 2600, depth_m: 3.2 }),
)

export const STUDY = {
  name: 'Trial',
  segments: 'all',
  vessels: [
    { class: 'cemt-ii', draught_m: 2 },
    { class: 'cemt-ii', loading: 'empty' },
  ],
} as const

export const UNCERTAIN = {
  ...STUDY,
  uncertainty: { samples: 32, seed: 3, depth_m: { sd: 0.1 } },
} as const

export const PLAN = {
  name: 'Limits',
  groups: [
    { id: 'deep', name: 'Deeper than 1.3 m', applies_to: { min_draught_m: 1.3 } },
    { id: 'light', name: 'Others', applies_to: { max_draught_m: 1.3 } },
  ],
  percentile: null,
} as const

export const PUBLICATION = {
  number: 'W-1',
  title: 'Limits of W',
  authority: 'The authority',
  effective_from: '2027-04-01',
} as const

type Job = z.output<typeof JobReply>

/** A job in the documented form. */
export function job(reply: Reply, status: number): Job {
  expect(reply.statusCode, reply.body.slice(0, 2000)).toBe(status)
  return strict(JobReply).parse(reply.json())
}

/** Asks for a job until it has ended. */
export async function ended({ get }: Pick<RegistryService, 'get'>, id: string): Promise<Job> {
  for (;;) {
    const found = job(await get(`/v1/studies/${id}`), 200)
    if (found.state !== 'queued' && found.state !== 'running') return found
    await new Promise((resolve) => setTimeout(resolve, 20))
  }
}

/** A study that has succeeded, on the waterway. */
export async function studied(service: RegistryService, request: unknown = STUDY): Promise<Job> {
  expect((await service.post('/v1/segments/import', WATERWAY)).statusCode).toBe(200)
  const { id } = job(await service.post('/v1/studies', request), 202)
  const found = await ended(service, id)
  expect(found.problem).toBeUndefined()
  expect(found.state).toBe('succeeded')
  return found
}

export async function rowsOf({ get }: Pick<RegistryService, 'get'>, id: string): Promise<Json[]> {
  const reply = await get(`/v1/studies/${id}/results`)
  expect(reply.statusCode, reply.body.slice(0, 2000)).toBe(200)
  return linesOf(reply.body)
}
