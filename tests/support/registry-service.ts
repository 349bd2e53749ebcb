import type { LightMyRequestResponse } from 'fastify'
import { pino } from 'pino'
import { onTestFinished } from 'vitest'
import { hashOf, newKey } from '../../src/access/hash.ts'
import { buildApp } from '../../src/app.ts'
import { readConfig } from '../../src/config.ts'
import type { App } from '../../src/http/app-type.ts'
import type { Service } from '../../src/http/service.ts'
import { serviceParts } from '../../src/parts.ts'
import type { AccessKey } from '../../src/store/registry.ts'
import type { Json } from './service.ts'

export type Headers = Record<string, string>
export type Reply = LightMyRequestResponse

/** The service on a registry of its own. */
export interface RegistryService {
  readonly app: App
  /** What the routes answer from, to reach past them. */
  readonly service: Service
  /** Every line that was logged, as text. */
  readonly logged: readonly string[]
  readonly get: (url: string, headers?: Headers) => Promise<Reply>
  readonly put: (url: string, body: unknown, headers?: Headers) => Promise<Reply>
  readonly post: (url: string, body: unknown, headers?: Headers) => Promise<Reply>
  readonly remove: (url: string, headers?: Headers) => Promise<Reply>
}

/**
 * The service on an empty registry, unless the environment says otherwise.
 *
 * @param whenDone  takes what closes it: the end of a test, or of a file with `afterAll`
 */
export function registryService(
  environment: Readonly<Record<string, string>> = {},
  whenDone: (close: () => Promise<void>) => void = onTestFinished,
): RegistryService {
  const logged: string[] = []
  const parts = serviceParts(readConfig({ DATABASE_URL: 'sqlite::memory:', DEMO: 'false', ...environment }))
  // a registry that cannot be opened is told by the replies
  parts.opened.catch(() => undefined)
  const log = pino({ level: 'trace' }, { write: (line: string) => void logged.push(line) })
  const app = buildApp({ ...parts, log })
  whenDone(async () => {
    app.server.closeAllConnections()
    await app.close()
  })
  const send =
    (method: 'PUT' | 'POST') =>
    (url: string, body: unknown, headers: Headers = {}): Promise<Reply> =>
      app.inject({
        method,
        url,
        payload: typeof body === 'string' ? body : JSON.stringify(body),
        headers: { 'content-type': 'application/json', ...headers },
      })
  return {
    app,
    service: parts.service,
    logged,
    get: (url, headers = {}) => app.inject({ url, headers }),
    put: send('PUT'),
    post: send('POST'),
    remove: (url, headers = {}) => app.inject({ method: 'DELETE', url, headers }),
  }
}

/** Adds a key past the command that makes them, and returns what a caller sends. */
export async function addKey(
  { store }: Service,
  key: Pick<AccessKey, 'name' | 'role'> & Partial<AccessKey>,
): Promise<string> {
  const secret = newKey()
  await store.addKey({ created: '2026-03-01T08:00:00Z', ...key }, hashOf(secret))
  return secret
}

/** A canal 60 m wide and 4 m deep, 1.4 km due east at 54 degrees north. */
export const CANAL_FEATURE = {
  type: 'Feature',
  geometry: {
    type: 'LineString',
    coordinates: [
      [3, 54],
      [3.01, 54],
      [3.02, 54.001],
    ],
  },
  properties: { name: 'Canal', depth_m: 4, width_m: 60, bank_distance_m: 30 },
} as const

/** The canal under an id, with these properties on top. */
export const canal = (id: string, properties: Json = {}) => ({
  ...CANAL_FEATURE,
  id,
  properties: { ...CANAL_FEATURE.properties, ...properties },
})

export const collection = (...features: readonly unknown[]) => ({ type: 'FeatureCollection', features })
