import { monitorEventLoopDelay } from 'node:perf_hooks'
import { Fault } from '../domain/fault.ts'
import type { App } from './app-type.ts'

/** What a route takes a place among: requests that are answered at once, streams that may last, or nothing. */
export type Place = 'request' | 'stream' | 'none'

declare module 'fastify' {
  interface FastifyContextConfig {
    /** default `request` */
    place?: Place
  }
}

export interface AdmissionSettings {
  readonly maxRequests: number
  readonly maxStreams: number
}

/** ms by which the event loop may lag, as a mean of some seconds; what is let in meanwhile would wait longer (own choice) */
const MAX_LAG = 500
/** ms between two looks at the lag */
const LOOK = 1000
/** ms between two samples of the lag */
const RESOLUTION = 20
/** weight of the latest look: one long import alone does not count as too much work */
const WEIGHT = 0.3

const BUSY = {
  request: 'The service has as many requests in hand as it can answer soon; repeat this one shortly',
  stream: 'The service has as many streams open as it works on; repeat the request shortly',
} as const

/**
 * Counts what is in hand and refuses what would make all of it late. A request takes its place when its body has come in, so
 * that slow senders hold none, and gives it back when it is answered, so that slow readers hold none either; a stream holds
 * a place of its own kind until its connection is done with it.
 */
export class Admission {
  readonly inHand = { request: 0, stream: 0 }
  /** requests that were refused before anything was done about them */
  refusedEarly = 0
  readonly #most: Readonly<Record<keyof Admission['inHand'], number>>
  #lag = 0

  constructor({ maxRequests, maxStreams }: AdmissionSettings) {
    this.#most = { request: maxRequests, stream: maxStreams }
  }

  /** @throws Fault `overloaded` when there is no place */
  check(kind: 'request' | 'stream'): void {
    if (this.isFull(kind)) throw new Fault('overloaded', BUSY[kind])
  }

  isFull(kind: 'request' | 'stream'): boolean {
    return this.#lag > MAX_LAG || this.inHand[kind] >= this.#most[kind]
  }

  /**
   * @returns what gives the place back, once however often it is called
   * @throws Fault `overloaded` when there is no place
   */
  take(kind: 'request' | 'stream'): () => void {
    this.check(kind)
    this.inHand[kind] += 1
    let isHeld = true
    return () => {
      if (isHeld) this.inHand[kind] -= 1
      isHeld = false
    }
  }

  /** Looks at the lag of the event loop from now on. @returns what ends it */
  watch(): () => void {
    const delays = monitorEventLoopDelay({ resolution: RESOLUTION })
    delays.enable()
    const timer = setInterval(() => {
      const lag = Number.isFinite(delays.mean) ? delays.mean / 1e6 - RESOLUTION : 0
      this.#lag += WEIGHT * (lag - this.#lag)
      delays.reset()
    }, LOOK)
    timer.unref()
    return () => {
      clearInterval(timer)
      delays.disable()
    }
  }
}

const givers = new WeakMap<object, () => void>()

/** Puts every route under the bounds but those with the place `none`. */
export function installAdmission(app: App, admission: Admission): void {
  app.addHook('onListen', (done) => {
    const end = admission.watch()
    app.server.once('close', end)
    done()
  })
  // before the body is read, and before the database is asked for a key
  app.addHook('onRequest', (request, _reply, done) => {
    const { place = 'request' } = request.routeOptions.config
    if (place !== 'none') admission.check(place)
    done()
  })
  app.addHook('preValidation', (request, reply, done) => {
    const { place = 'request' } = request.routeOptions.config
    if (place !== 'none') {
      const give = admission.take(place)
      reply.raw.once('close', give)
      if (place === 'request') givers.set(reply, give)
    }
    done()
  })
  app.addHook('onSend', (_request, reply, _payload, done) => {
    givers.get(reply)?.()
    done()
  })
}
