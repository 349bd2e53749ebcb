import { isIPv6 } from 'node:net'
import type { FastifyReply, FastifyRequest } from 'fastify'
import { LRUCache } from 'lru-cache'
import { Fault } from '../domain/fault.ts'
import type { App } from './app-type.ts'

const WINDOW = 60 // s
/** Callers that are remembered; of more, those that were silent longest begin anew. */
const MOST_CALLERS = 20_000
/** What the limit is called in headers. */
const POLICY = 'per-minute'

interface Window {
  /** s on a clock that never jumps */
  readonly start: number
  count: number
}

/** Where a caller stands after a request. */
export interface Standing {
  readonly isWithin: boolean
  /** requests that are left until the reset */
  readonly remaining: number
  /** whole seconds until the count begins anew, 1 to 60 */
  readonly reset: number
}

/**
 * Counts the requests of each caller in windows of a minute that begin with its first one.
 *
 * @param now  s on a clock that only goes forward: with the time of day, a clock that is put back would shut callers out
 */
export class RateLimiter {
  readonly #windows = new LRUCache<string, Window>({ max: MOST_CALLERS })

  constructor(
    readonly perMinute: number,
    readonly now: () => number = () => performance.now() / 1000,
  ) {}

  take(caller: string): Standing {
    const now = this.now()
    const known = this.#windows.get(caller)
    const window = known && now < known.start + WINDOW ? known : { start: now, count: 0 }
    window.count += 1
    this.#windows.set(caller, window)
    return {
      isWithin: window.count <= this.perMinute,
      remaining: Math.max(0, this.perMinute - window.count),
      reset: Math.max(1, Math.ceil(window.start + WINDOW - now)),
    }
  }
}

/** An address as one caller: of IPv6 the network of 64 bits, of which a caller has every address. */
export function networkOf(address: string): string {
  if (!isIPv6(address)) return address
  const mapped = /^::ffff:(\d+\.\d+\.\d+\.\d+)$/i.exec(address)?.[1]
  if (mapped !== undefined) return mapped
  const [head = '', tail] = (address.split('%')[0] ?? '').split('::')
  const groups = head === '' ? [] : head.split(':')
  const after = tail === undefined || tail === '' ? [] : tail.split(':')
  const zeros = tail === undefined ? 0 : Math.max(0, 8 - groups.length - after.length)
  const all = [...groups, ...Array.from({ length: zeros }, () => '0'), ...after]
  return `${all
    .slice(0, 4)
    .map((group) => Number.parseInt(group, 16).toString(16))
    .join(':')}::/64`
}

const callerOf = ({ accessKey, ip }: FastifyRequest): string =>
  accessKey ? `key ${accessKey.name}` : `address ${networkOf(ip)}`

function limit(request: FastifyRequest, reply: FastifyReply, limiter: RateLimiter): void {
  // supervisors and load balancers are always answered
  if (request.routeOptions.config.place === 'none') return
  const { isWithin, remaining, reset } = limiter.take(callerOf(request))
  // the two fields of draft-ietf-httpapi-ratelimit-headers, which are structured ones (RFC 9651)
  void reply
    .header('ratelimit-policy', `"${POLICY}";q=${limiter.perMinute};w=${WINDOW}`)
    .header('ratelimit', `"${POLICY}";r=${remaining};t=${reset}`)
  if (isWithin) return
  void reply.header('retry-after', String(reset))
  throw new Fault(
    'too-many-requests',
    `At most ${limiter.perMinute} requests a minute are answered; repeat this one after ${reset} s`,
    { facts: { limit: limiter.perMinute, retry_after_s: reset } },
  )
}

/** Limits how often each key, or each address without one, may ask. Comes after the key is known and before it is judged. */
export function installRateLimit(app: App, limiter: RateLimiter): void {
  app.addHook('onRequest', (request, reply, done) => {
    limit(request, reply, limiter)
    done()
  })
}
