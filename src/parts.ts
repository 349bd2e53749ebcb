import { readdirSync, readFileSync } from 'node:fs'
import { METHOD_VERSION } from './advisory/catalogue.ts'
import type { AppParts } from './app.ts'
import type { Config } from './config.ts'
import { Admission, installAdmission } from './http/admission.ts'
import { installAccess, installKeys } from './http/access.ts'
import type { App } from './http/app-type.ts'
import { installCors } from './http/cors.ts'
import { installEarlyRefusal } from './http/early-refusal.ts'
import { readFeature, type FeatureWire } from './http/feature-in.ts'
import { installMetrics, Metrics, metricsRoutes } from './http/metrics.ts'
import type { Examples } from './http/openapi-examples.ts'
import { concludeWith } from './http/plan-verify.ts'
import { installRateLimit, RateLimiter } from './http/rate-limit.ts'
import type { Service } from './http/service.ts'
import { serviceRoutes } from './http/service-routes.ts'
import type { Jobs } from './jobs/jobs.ts'
import { localJobs } from './jobs/local-jobs.ts'
import type { RunnerParts } from './jobs/runner.ts'
import { sharedJobs } from './jobs/shared-jobs.ts'
import { deferredStore } from './store/deferred.ts'
import { openStore } from './store/open.ts'
import { openQueueDatabase } from './store/queue-database.ts'
import type { Store } from './store/registry.ts'
import { JudgeThreads } from './threads/judge-threads.ts'

/** Examples and the invented waterway that the service shows, found from the sources and from the build alike. */
const EXAMPLES = new URL('../openapi/examples/', import.meta.url)
const DEMO = new URL('harrowmere-navigation.geojson', EXAMPLES)
/** A segment of it on which the class of the example has a recommended speed. */
const EXAMPLE = 'harrow-long-pound'

export interface ServiceParts extends Omit<AppParts, 'log'> {
  readonly service: Service
  /** Fulfilled when the registry is open; rejected when it cannot be. */
  readonly opened: Promise<void>
  /** A segment of the registry to show as an example, when it has one. */
  readonly findExample: () => Promise<string | undefined>
}

/** What goes on without a request, told to the log. */
export interface Listeners {
  /** a connection to the database broke */
  readonly onLostConnection?: (error: Error) => void
  /** a job in the background met an error, and goes on or fails */
  readonly onJobError?: (error: unknown) => void
}

/** Everything the service answers with: the one place where routes and the registry are put together. */
export function serviceParts(config: Config, listeners: Listeners = {}): ServiceParts {
  const version = serviceVersion()
  const now = () => new Date().toISOString()
  const opening = openRegistry(config, now, listeners.onLostConnection)
  const store = deferredStore(config.databaseUrl.startsWith('sqlite:') ? 'sqlite' : 'postgres', opening)
  const judges = new JudgeThreads()
  const jobs = jobsOn(config, listeners, {
    store,
    workers: config.workers,
    conclude: concludeWith(() => service),
    now,
    methodVersion: METHOD_VERSION,
  })
  const versions = { service: version, methods: METHOD_VERSION }
  const admission = new Admission(config)
  const revision = async () => (await store.current()).revision
  const metrics = new Metrics({ versions, admission, revision, jobs: () => unfinished(store) })
  const service: Service = {
    store,
    jobs,
    serviceVersion: version,
    now,
    bodyTimeout: config.requestTimeout,
    judges,
    watch: metrics,
  }
  return {
    config,
    service,
    opened: opening.then(() => jobs.start()),
    installs: [
      (app) => {
        guard(app, config, service, admission)
        installMetrics(app, metrics)
      },
    ],
    routes: [...serviceRoutes(service), metricsRoutes(metrics)],
    versions,
    onAnswered: (answered) => {
      metrics.answered(answered)
    },
    isReady: async () => ({ registryRevision: await revision(), database: store.kind }),
    onClose: async () => {
      await Promise.all([judges.end(), jobs.close()])
      await store.close()
    },
    examples: readExamples(),
    findExample: async () => {
      const registry = await store.current()
      return registry.findSegment(EXAMPLE)?.id ?? registry.segments()[0]?.id
    },
  }
}

/** Unfinished jobs by state. */
async function unfinished(store: Store): Promise<Record<string, number>> {
  const counts = { queued: 0, running: 0 }
  for (const { state } of await store.unfinishedJobs()) if (state in counts) counts[state as 'queued'] += 1
  return counts
}

/** Jobs of this process, or shared by the replicas on one database. */
function jobsOn(
  { databaseUrl }: Config,
  { onLostConnection, onJobError = () => undefined }: Listeners,
  parts: Omit<RunnerParts, 'onError'>,
): Jobs {
  const running = { ...parts, onError: onJobError }
  if (databaseUrl.startsWith('sqlite:')) return localJobs(running)
  return sharedJobs({ ...running, database: openQueueDatabase(databaseUrl, onLostConnection) })
}

/** What stands before every route: the cheapest refusal first, and readable by pages of other origins. */
function guard(app: App, config: Config, service: Service, admission: Admission): void {
  installCors(app, config.corsOrigins)
  installAdmission(app, admission)
  installEarlyRefusal(app, admission, config.corsOrigins)
  if (config.access === 'keys') installKeys(app, service)
  if (config.rateLimit > 0) installRateLimit(app, new RateLimiter(config.rateLimit))
  if (config.access === 'keys') installAccess(app)
}

async function openRegistry(
  config: Config,
  now: () => string,
  onLostConnection: ((error: Error) => void) | undefined,
): Promise<Store> {
  const store = await openStore(config.databaseUrl, onLostConnection ? { onLostConnection } : {})
  const registry = await store.current()
  // a registry that was ever written belongs to someone, even when it is empty by now
  const isNew = registry.revision === 0
  if (isNew && (config.demo ?? store.kind === 'sqlite')) await importDemo(store, now())
  return store
}

async function importDemo(store: Store, time: string): Promise<void> {
  const { features } = JSON.parse(readFileSync(DEMO, 'utf8')) as { features: FeatureWire[] }
  const contents = features.map((feature) => {
    const { content, faults } = readFeature(feature, '#', false)
    if (!content) throw new Error(`The demo waterway cannot be read: ${faults[0]?.detail ?? ''}`)
    return content
  })
  await store.importSegments(contents, { time })
}

const EXAMPLE_NAME = /^(\w+)\.(request|reply)\.json$/

/** Requests and replies by the operation that they show: `<operationId>.request.json`, `<operationId>.reply.json`. */
function readExamples(): Examples {
  const examples: Record<string, { request?: unknown; reply?: unknown }> = {}
  for (const name of readdirSync(EXAMPLES)) {
    const [, operation, part] = EXAMPLE_NAME.exec(name) ?? []
    if (operation === undefined || part === undefined) continue
    const value: unknown = JSON.parse(readFileSync(new URL(name, EXAMPLES), 'utf8'))
    examples[operation] = { ...examples[operation], [part]: value }
  }
  return examples
}

export function serviceVersion(): string {
  // One folder up from src and from dist alike.
  const text = readFileSync(new URL('../package.json', import.meta.url), 'utf8')
  return (JSON.parse(text) as { version: string }).version
}
