import type { FastifyReply, FastifyRequest } from 'fastify'
import { hashOf } from '../access/hash.ts'
import { ROLES } from '../access/role.ts'
import { Fault } from '../domain/fault.ts'
import type { AccessKey, Role } from '../store/registry.ts'
import type { App } from './app-type.ts'
import type { Service } from './service.ts'

declare module 'fastify' {
  interface FastifyRequest {
    /** the key that the request came with; absent where none is asked for */
    accessKey?: AccessKey
  }
}

/** Paths that need no key: they tell nothing about the caller's water. */
const OPEN_PATHS = /^\/(?:health\/|openapi\.json$|docs(?:\/|$)|v1\/problems(?:\/|$)|v1\/methods(?:\/|$))/

/** Pages that a person opens in a browser, which asks for the key itself. */
const PAGES = /^\/(?:$|v1\/(?:segments|calibrations)\/[^/]+\/sheet$|v1\/limit-plans\/[^/]+\/evidence$)/

/** POST routes that compute and keep nothing. */
const READING_POSTS = /^\/v1\/(?:advisories|effects|passages)(?:\/|$)/

const PUBLISHING = /^\/v1\/limit-plans\/[^/]+\/publish$/

/** The role that a request needs; undefined where none is asked for. */
export function neededRole(method: string, path: string): Role | undefined {
  if (OPEN_PATHS.test(path)) return undefined
  if (method === 'GET' || method === 'HEAD' || method === 'OPTIONS') return 'read'
  if (method === 'POST' && READING_POSTS.test(path)) return 'read'
  return PUBLISHING.test(path) ? 'publish' : 'write'
}

/** The key of a request: Bearer, or on pages the password of Basic. */
function keyOf(authorization: string | undefined, isPage: boolean): string | undefined {
  const [scheme = '', value = ''] = authorization?.split(' ') ?? []
  if (scheme.toLowerCase() === 'bearer') return value
  if (!isPage || scheme.toLowerCase() !== 'basic') return undefined
  const text = Buffer.from(value, 'base64').toString('utf8')
  return text.slice(text.indexOf(':') + 1)
}

const includes = (role: Role, needed: Role): boolean => ROLES.indexOf(role) >= ROLES.indexOf(needed)

const keyRequired = (): Fault =>
  new Fault('key-required', 'Send an access key that is valid: Authorization: Bearer <key>')

/** Finds the key that a request comes with, where one is asked for. */
async function identify(request: FastifyRequest, service: Service): Promise<void> {
  const [path = ''] = request.url.split('?')
  if (neededRole(request.method, path) === undefined) return
  const given = keyOf(request.headers.authorization, PAGES.test(path))
  if (given === undefined) return
  const key = await service.store.findKey(hashOf(given), service.now())
  if (key) request.accessKey = key
}

function check(request: FastifyRequest, reply: FastifyReply): void {
  const [path = ''] = request.url.split('?')
  const needed = neededRole(request.method, path)
  if (needed === undefined) return
  const key = request.accessKey
  if (!key) {
    if (PAGES.test(path)) void reply.header('www-authenticate', 'Basic realm="Washlimit", charset="UTF-8"')
    throw keyRequired()
  }
  if (!includes(key.role, needed)) {
    throw new Fault(
      'role-too-small',
      `The key ${key.name} may ${key.role}; this needs a key that may ${needed}`,
      {
        facts: { needed, role: key.role },
      },
    )
  }
}

/** Tells of every request whose key it comes with. */
export function installKeys(app: App, service: Service): void {
  app.addHook('onRequest', (request) => identify(request, service))
}

/** Asks every request for a key, but for those that tell nothing about the caller's water. */
export function installAccess(app: App): void {
  app.addHook('onRequest', (request, reply, done) => {
    check(request, reply)
    done()
  })
}
