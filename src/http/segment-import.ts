import { isDeepStrictEqual } from 'node:util'
import type { FastifyReply, FastifyRequest } from 'fastify'
import { z } from 'zod'
import type { FaultItem } from '../domain/fault.ts'
import type { LonLat } from '../domain/position.ts'
import { typicalPosition } from '../geo/line-positions.ts'
import type { Registry, SegmentContent } from '../store/registry.ts'
import type { App, Routes } from './app-type.ts'
import { acceptGeoJson } from './body.ts'
import { calibrationItems } from './calibration-named.ts'
import { crsItems } from './crs.ts'
import { FeatureIn, readFeature, type FeatureWire, type Remark } from './feature-in.ts'
import { negotiate } from './negotiate.ts'
import { booleanParameter, enumParameter } from './parameters.ts'
import { problemResponses } from './problems.ts'
import { authorOf, refusedFeatures } from './segment-writes.ts'
import { openView, type Service } from './service.ts'
import { turn } from './turns.ts'

const MAX_BODY_BYTES = 64 * 1024 * 1024
const MAX_FEATURES = 20_000
/** Features that are read before other requests have their turn. */
const FEATURES_AT_ONCE = 50
/** Faults and remarks of a reply; more would help no one. */
const MAX_TOLD = 1000

const ImportQuery = z.strictObject({
  dry_run: booleanParameter().optional().describe('read and tell, and write nothing; default false'),
  unknown: enumParameter(['reject', 'keep'])
    .optional()
    .describe('what becomes of foreign properties: refused, or kept as attributes; default reject'),
})

const CollectionIn = z
  .looseObject({
    type: z.literal('FeatureCollection'),
    features: z.array(FeatureIn).min(1).max(MAX_FEATURES),
  })
  .meta({
    id: 'SegmentCollectionInput',
    description:
      'A GeoJSON collection of segments with unique ids. A crs member is refused unless it names CRS84.',
  })

type CollectionWire = z.output<typeof CollectionIn>

const Told = z.object({
  pointer: z.string(),
  feature_id: z.string().optional(),
  code: z.string(),
  detail: z.string(),
  facts: z.record(z.string(), z.unknown()).optional(),
  allowed: z.array(z.string()).optional(),
})

const count = z.int().min(0).max(MAX_FEATURES)

const ImportReply = z
  .object({
    dry_run: z.boolean(),
    features: count,
    created: count,
    updated: count,
    unchanged: count,
    registry_revision: z.int().min(0).max(1e9),
    faults: z.array(Told).describe('of a dry run; otherwise they are a problem'),
    remarks: z.array(Told).describe('what is doubtful and was accepted'),
    faults_truncated: z.literal(true).optional().describe('present when there are more than 1000 faults'),
    remarks_truncated: z.literal(true).optional().describe('present when there are more than 1000 remarks'),
  })
  .meta({ id: 'SegmentImport', description: 'What an import made, or would make.' })

/** A fault with the id of its feature. */
type FeatureFault = FaultItem & { readonly feature_id?: string }

interface ReadAll {
  readonly contents: SegmentContent[]
  readonly faults: FaultItem[]
  readonly remarks: Remark[]
}

function repeatedIds(features: readonly FeatureWire[]): FeatureFault[] {
  const seen = new Map<string, number>()
  const faults: FeatureFault[] = []
  features.forEach(({ id }, i) => {
    if (id === undefined) return
    const first = seen.get(String(id))
    if (first === undefined) seen.set(String(id), i)
    else {
      faults.push({
        pointer: `#/features/${i}/id`,
        feature_id: String(id),
        code: 'clash',
        detail: `is that of feature ${first} too: each segment has an id of its own`,
        facts: { first },
      })
    }
  })
  return faults
}

/** First positions of the features that are lines, to see by the others where one lies wrong. */
function lineStarts(features: readonly FeatureWire[]): LonLat[][] {
  return features.flatMap(({ geometry }) => {
    const { coordinates } = geometry as { coordinates?: unknown }
    const [first] = Array.isArray(coordinates) ? (coordinates as unknown[]) : []
    if (!Array.isArray(first) || typeof first[0] !== 'number' || typeof first[1] !== 'number') return []
    return [[[first[0], first[1]] as const]]
  })
}

async function readAll(
  collection: CollectionWire,
  keepsUnknown: boolean,
  registry: Registry,
): Promise<ReadAll> {
  const { features } = collection
  const faults = [...crsItems(collection, '#'), ...repeatedIds(features)]
  const all: ReadAll = { contents: [], faults, remarks: [] }
  const near = typicalPosition(lineStarts(features)) ?? undefined
  for (const [i, feature] of features.entries()) {
    const { content, faults, remarks } = readFeature(feature, `#/features/${i}`, keepsUnknown, near)
    if (content) all.contents.push(content)
    const naming = content ? calibrationItems(content, registry, `#/features/${i}`) : []
    for (const fault of [...faults, ...naming]) all.faults.push(fault)
    for (const remark of remarks) all.remarks.push(remark)
    if (i % FEATURES_AT_ONCE === FEATURES_AT_ONCE - 1) await turn()
  }
  return all
}

/** What an import would make of a registry. */
function foreseen(contents: readonly SegmentContent[], registry: Registry) {
  const made = { created: 0, updated: 0, unchanged: 0 }
  for (const content of contents) {
    const record = registry.findSegment(content.id)
    if (!record) made.created += 1
    else if (isDeepStrictEqual([record.line, record.properties], [content.line, content.properties])) {
      made.unchanged += 1
    } else made.updated += 1
  }
  return made
}

async function importSegments(
  request: FastifyRequest,
  reply: FastifyReply,
  wire: CollectionWire,
  query: z.output<typeof ImportQuery>,
  service: Service,
) {
  const isDry = query.dry_run ?? false
  const before = await service.store.current()
  const { contents, faults, remarks } = await readAll(wire, query.unknown === 'keep', before)
  if (faults.length > 0 && !isDry) throw refusedFeatures(faults)
  const made = isDry
    ? foreseen(contents, before)
    : await service.store.importSegments(contents, authorOf(request, service))
  const { registry } = await openView(service, reply)
  return {
    dry_run: isDry,
    features: wire.features.length,
    created: made.created,
    updated: made.updated,
    unchanged: made.unchanged,
    registry_revision: registry.revision,
    faults: faults.slice(0, MAX_TOLD),
    remarks: remarks.slice(0, MAX_TOLD),
    ...(faults.length > MAX_TOLD && { faults_truncated: true as const }),
    ...(remarks.length > MAX_TOLD && { remarks_truncated: true as const }),
  }
}

/** Many segments at once, all or nothing. */
export function segmentImportRoutes(service: Service): Routes {
  return (app) => {
    void app.register((scope: App, _options, done) => {
      acceptGeoJson(scope, { timeout: service.bodyTimeout })
      scope.post('/v1/segments/import', {
        bodyLimit: MAX_BODY_BYTES,
        schema: {
          operationId: 'importSegments',
          tags: ['segments'],
          summary: 'Create or replace segments from a GeoJSON collection, all or nothing.',
          description: 'A dry run writes nothing and lists every fault with its feature.',
          querystring: ImportQuery,
          body: CollectionIn,
          response: {
            200: ImportReply,
            ...problemResponses(400, 401, 403, 404, 406, 413, 415, 422, 503),
          },
        },
        handler: (request, reply) => {
          negotiate(request, reply, ['json'])
          return importSegments(request, reply, request.body, request.query, service)
        },
      })
      done()
    })
  }
}
