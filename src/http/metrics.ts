import { collectDefaultMetrics, Counter, Gauge, Histogram, Registry } from 'prom-client'
import type { Brief } from '../advisory/advise.ts'
import type { Admission } from './admission.ts'
import type { App, Routes } from './app-type.ts'
import type { Versions } from './health.ts'
import type { Answered } from './lifecycle.ts'
import { problemResponses } from './problems.ts'

/** What handlers tell about their work; it never fails and costs next to nothing. */
export interface Watch {
  /** @param seconds  that it took to compute, where it was one by itself */
  advised(brief: Pick<Brief, 'decision' | 'cautions'>, seconds?: number): void
  /** A row of a stream: of advisories `answered` or `refused`, of a log its status. */
  row(stream: 'advisories' | 'passages', result: string): void
}

/** What is looked at when the figures are asked for. */
export interface Sources {
  readonly versions: Versions
  readonly admission: Admission
  /** Revision of the registry; rejected while the database does not answer. */
  readonly revision: () => Promise<number>
  /** Jobs by state. */
  readonly jobs?: () => Promise<Readonly<Record<string, number>>>
}

/** ms after which a database that says nothing counts as down: figures are due whatever happens */
const PATIENCE = 1000
const REQUEST_BUCKETS = [0.001, 0.0025, 0.005, 0.01, 0.025, 0.05, 0.1, 0.25, 0.5, 1, 2.5, 5, 10, 60, 600] // s
const ADVISORY_BUCKETS = [0.0001, 0.00025, 0.0005, 0.001, 0.0025, 0.005, 0.01, 0.05, 0.25] // s

type Counts = Map<string, number>

const raise = (counts: Counts, name: string): void => void counts.set(name, (counts.get(name) ?? 0) + 1)

async function within<T>(promise: Promise<T>, milliseconds: number): Promise<T | undefined> {
  let timer: NodeJS.Timeout | undefined
  const late = new Promise<undefined>((resolve) => {
    timer = setTimeout(resolve, milliseconds, undefined)
  })
  try {
    return await Promise.race([promise, late])
  } catch {
    return undefined
  } finally {
    clearTimeout(timer)
  }
}

/**
 * Figures of this process for Prometheus. Labels are routes, statuses and codes of the contract, never paths, ids or
 * keys, so that their number has a bound.
 */
export class Metrics implements Watch {
  readonly #registry = new Registry()
  readonly #requests: Histogram<'method' | 'route' | 'status'>
  readonly #advisory: Histogram
  readonly #governing: Counts = new Map()
  readonly #outcomes: Counts = new Map()
  readonly #cautions: Counts = new Map()
  readonly #rows: Readonly<Record<'advisories' | 'passages', Counts>> = {
    advisories: new Map(),
    passages: new Map(),
  }

  constructor(sources: Sources) {
    const registers = [this.#registry]
    this.#requests = new Histogram({
      name: 'washlimit_request_duration_seconds',
      help: 'requests by route and status; cut-off is one whose connection broke before the reply was whole',
      labelNames: ['method', 'route', 'status'],
      buckets: REQUEST_BUCKETS,
      registers,
    })
    this.#advisory = new Histogram({
      name: 'washlimit_advisory_duration_seconds',
      help: 'computing of one advisory that was asked for by itself',
      buckets: ADVISORY_BUCKETS,
      registers,
    })
    this.#count('washlimit_governing_criteria_total', 'advisories by governing criterion', 'criterion', [
      [{}, this.#governing],
    ])
    this.#count('washlimit_outcomes_total', 'advisories by outcome', 'outcome', [[{}, this.#outcomes]])
    this.#count('washlimit_cautions_total', 'cautions of advisories', 'code', [[{}, this.#cautions]])
    this.#count('washlimit_rows_total', 'rows of streams by what became of them', 'result', [
      [{ stream: 'advisories' }, this.#rows.advisories],
      [{ stream: 'passages' }, this.#rows.passages],
    ])
    this.#gauges(sources)
  }

  advised({ decision, cautions }: Pick<Brief, 'decision' | 'cautions'>, seconds?: number): void {
    raise(this.#governing, decision.governing.criterion.id)
    raise(this.#outcomes, decision.outcome)
    for (const { code } of cautions) raise(this.#cautions, code)
    if (seconds !== undefined) this.#advisory.observe(seconds)
  }

  row(stream: 'advisories' | 'passages', result: string): void {
    raise(this.#rows[stream], result)
  }

  answered({ method, route, status, seconds }: Answered): void {
    this.#requests.observe({ method, route, status }, seconds)
  }

  /** Adds what the process itself uses: memory, processor, lag of the event loop, collections of garbage. */
  addProcess(): void {
    collectDefaultMetrics({ register: this.#registry })
  }

  text(): Promise<string> {
    return this.#registry.metrics()
  }

  /** A counter whose values are kept in maps, since its own bookkeeping would cost more than a row of a stream. */
  #count(
    name: string,
    help: string,
    label: string,
    kept: readonly (readonly [labels: Readonly<Record<string, string>>, counts: Counts])[],
  ): void {
    new Counter({
      name,
      help,
      labelNames: [label, ...Object.keys(kept[0]?.[0] ?? {})],
      registers: [this.#registry],
      collect() {
        this.reset()
        for (const [labels, counts] of kept)
          for (const [value, count] of counts) this.inc({ ...labels, [label]: value }, count)
      },
    })
  }

  #gauges({ versions, admission, revision, jobs }: Sources): void {
    const registers = [this.#registry]
    new Gauge({
      name: 'washlimit_build_info',
      help: 'versions of the service and of its methods',
      labelNames: ['service_version', 'method_version'],
      registers,
    }).set({ service_version: versions.service, method_version: versions.methods }, 1)
    new Gauge({
      name: 'washlimit_in_hand',
      help: 'requests that are worked on, and streams that are open',
      labelNames: ['kind'],
      registers,
      collect() {
        for (const [kind, count] of Object.entries(admission.inHand)) this.set({ kind }, count)
      },
    })
    new Counter({
      name: 'washlimit_refused_early_total',
      help: 'requests refused as overloaded before anything was done about them; they are in no other figure',
      registers,
      collect() {
        this.reset()
        this.inc(admission.refusedEarly)
      },
    })
    new Gauge({
      name: 'washlimit_registry_revision',
      help: 'last known one',
      registers,
      async collect() {
        const current = await within(revision(), PATIENCE)
        if (current !== undefined) this.set(current)
      },
    })
    new Gauge({
      name: 'washlimit_database_up',
      help: '1 when the database answers',
      registers,
      async collect() {
        this.set((await within(revision(), PATIENCE)) === undefined ? 0 : 1)
      },
    })
    if (!jobs) return
    new Gauge({
      name: 'washlimit_jobs',
      help: 'jobs by state',
      labelNames: ['state'],
      registers,
      async collect() {
        const counts = await within(jobs(), PATIENCE)
        for (const [state, count] of Object.entries(counts ?? {})) this.set({ state }, count)
      },
    })
  }
}

/** Once the service listens, the figures are of a process. */
export function installMetrics(app: App, metrics: Metrics): void {
  app.addHook('onListen', (done) => {
    metrics.addProcess()
    done()
  })
}

/** Figures for a monitor. */
export function metricsRoutes(metrics: Metrics): Routes {
  return (app) => {
    app.get('/metrics', {
      config: { place: 'none' },
      schema: {
        operationId: 'getMetrics',
        tags: ['service'],
        summary: 'Give the figures of this process in the text form of Prometheus.',
        response: {
          200: { description: 'Figures.', content: { 'text/plain': { schema: { type: 'string' } } } },
          ...problemResponses(401, 403),
        },
      },
      handler: async (_request, reply) =>
        reply.type('text/plain; version=0.0.4; charset=utf-8').send(await metrics.text()),
    })
  }
}
