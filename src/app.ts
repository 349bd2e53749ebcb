import { fastify, LogController, type FastifyBaseLogger } from 'fastify'
import type { Config } from './config.ts'
import type { App, Routes, ZodTypes } from './http/app-type.ts'
import { installJsonBodies, installLinger } from './http/body.ts'
import { installCompression } from './http/compression.ts'
import { answerConnectionError, answerFrameworkError, installErrors } from './http/errors.ts'
import { healthRoutes, type Readiness, type Versions } from './http/health.ts'
import { type Answered, installLifecycle } from './http/lifecycle.ts'
import { installOpenApi } from './http/openapi.ts'
import type { Examples } from './http/openapi-examples.ts'
import { problemRoutes } from './http/problem-routes.ts'
import { installRequestId, requestId } from './http/request-id.ts'
import { installSecurityHeaders } from './http/security-headers.ts'
import { installValidation } from './http/validation.ts'

export interface AppParts {
  readonly log: FastifyBaseLogger
  readonly config: Pick<Config, 'bodyLimit' | 'publicUrl' | 'requestTimeout' | 'trustedProxies'>
  /** What the service is for, one function for each file of routes. */
  readonly routes: readonly Routes[]
  readonly versions: Versions
  /** what is put before every route, in this order */
  readonly installs?: readonly ((app: App) => void)[]
  readonly onClose?: () => Promise<void>
  /** told of every request that is over */
  readonly onAnswered?: (answered: Answered) => void
  /** shown in the documentation */
  readonly examples?: Examples
  /** Undefined while the service cannot answer. */
  readonly isReady: () => Readiness | undefined | Promise<Readiness | undefined>
}

const HEADERS_TIMEOUT = 15_000 // ms for the head of a request
const IDLE_TIMEOUT = 120_000 // ms without a byte in either direction
const KEEP_ALIVE_TIMEOUT = 65_000 // ms, more than the 60 s after which common proxies close theirs
const MAX_HEADER_BYTES = 16_384
const MAX_PATH_STEP = 200

/** The whole service, ready to listen or to be asked directly. */
export function buildApp(parts: AppParts): App {
  const { bodyLimit, publicUrl, requestTimeout, trustedProxies } = parts.config
  const app: App = fastify({
    loggerInstance: parts.log,
    // One line for each reply comes from a hook of ours.
    logController: new LogController({ disableRequestLogging: true, requestIdLogLabel: 'request_id' }),
    genReqId: requestId,
    requestIdHeader: false,
    // whom nobody vouches for may say of himself what he likes
    trustProxy: trustedProxies.length > 0 ? [...trustedProxies] : false,
    bodyLimit,
    connectionTimeout: IDLE_TIMEOUT,
    keepAliveTimeout: KEEP_ALIVE_TIMEOUT,
    // Streams may take hours, so no limit for whole requests here: bodies read as a whole have their own.
    requestTimeout: 0,
    http: { headersTimeout: HEADERS_TIMEOUT, maxHeaderSize: MAX_HEADER_BYTES },
    // Requests that arrive while the service stops get a problem from a hook instead.
    return503OnClosing: false,
    routerOptions: { maxParamLength: MAX_PATH_STEP },
    clientErrorHandler: answerConnectionError,
    frameworkErrors: answerFrameworkError,
  }).withTypeProvider<ZodTypes>()

  installRequestId(app)
  installSecurityHeaders(app, publicUrl)
  installLifecycle(app, parts.onAnswered)
  installErrors(app)
  installValidation(app)
  installJsonBodies(app, { timeout: requestTimeout })
  installLinger(app)
  installCompression(app)
  for (const install of parts.installs ?? []) install(app)
  const { onClose } = parts
  if (onClose) app.addHook('onClose', onClose)
  installOpenApi(app, { version: parts.versions.service, publicUrl, examples: parts.examples })
  // After the documentation, which sees only the routes that come later.
  const routes = [healthRoutes(parts.versions, parts.isReady), problemRoutes, ...parts.routes]
  void app.register((scope, _options, done) => {
    for (const add of routes) add(scope.withTypeProvider<ZodTypes>())
    done()
  })
  return app
}
