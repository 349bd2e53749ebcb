import { readdirSync, readFileSync } from 'node:fs'
import { METHOD_VERSION } from './advisory/catalogue.ts'
import type { AppParts } from './app.ts'
import type { Config } from './config.ts'
import type { Examples } from './http/openapi-examples.ts'
import { serviceRoutes } from './http/service-routes.ts'
import { fileRegistry, type SegmentFeature } from './store/file-registry.ts'
import type { Registry } from './store/registry.ts'

/** Examples and the invented waterway that the service shows, found from the sources and from the build alike. */
const EXAMPLES = new URL('../openapi/examples/', import.meta.url)
const DEMO = new URL('harrowmere-navigation.geojson', EXAMPLES)
/** A segment of it on which the class of the example has a recommended speed. */
const EXAMPLE = 'harrow-long-pound'
const DEMO_UPDATED = '2026-12-01T00:00:00Z'

export interface ServiceParts extends Omit<AppParts, 'log'> {
  /** A segment of the registry to show as an example, when it has one. */
  readonly exampleSegment: string | undefined
}

/** Everything the service answers with: the one place where routes and the registry are put together. */
export function serviceParts(config: Config): ServiceParts {
  const registry = demoRegistry()
  const version = serviceVersion()
  return {
    config,
    routes: serviceRoutes({ registry, serviceVersion: version }),
    versions: { service: version, methods: METHOD_VERSION },
    isReady: () => ({ registryRevision: registry.revision, database: 'none' }),
    examples: readExamples(),
    exampleSegment: registry.findSegment(EXAMPLE)?.id,
  }
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

function demoRegistry(): Registry {
  const { features } = JSON.parse(readFileSync(DEMO, 'utf8')) as { features: SegmentFeature[] }
  return fileRegistry(features, DEMO_UPDATED)
}

function serviceVersion(): string {
  // One folder up from src and from dist alike.
  const text = readFileSync(new URL('../package.json', import.meta.url), 'utf8')
  return (JSON.parse(text) as { version: string }).version
}
