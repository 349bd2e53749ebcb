import cors from '@fastify/cors'
import type { App } from './app-type.ts'

const EXPOSED = [
  'etag',
  'location',
  'ratelimit',
  'ratelimit-policy',
  'registry-revision',
  'retry-after',
  'x-request-id',
]

/** Lets pages of these origins call the service; without any, browsers keep other origins out. */
export function installCors(app: App, origins: readonly string[]): void {
  if (origins.length === 0) return
  void app.register(cors, {
    origin: [...origins],
    methods: ['GET', 'HEAD', 'POST', 'PUT', 'DELETE'],
    exposedHeaders: EXPOSED,
    maxAge: 600,
  })
  // after the routes, which say what else their replies depend on
  app.addHook('onSend', (_request, reply, _payload, done) => {
    const vary = [reply.getHeader('vary') ?? []].flat().map(String)
    if (!vary.some((names) => names.includes('Origin')))
      void reply.header('vary', [...vary, 'Origin'].join(', '))
    done()
  })
}
