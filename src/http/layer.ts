import { createHash } from 'node:crypto'
import { z } from 'zod'
import { adviseBriefly, type Brief } from '../advisory/advise.ts'
import { METHOD_VERSION } from '../advisory/catalogue.ts'
import { SEVERITIES } from '../advisory/caution.ts'
import { bindingPostedLimit } from '../advisory/criteria/speed-limits.ts'
import { currentAlong } from '../advisory/direction.ts'
import { Fault } from '../domain/fault.ts'
import { toKmh } from '../domain/units.ts'
import type { Registry, SegmentRecord } from '../store/registry.ts'
import type { Routes } from './app-type.ts'
import { geoJson } from './geo-json.ts'
import { LayerReply } from './layer.schema.ts'
import type { Watch } from './metrics.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { isKnown, notModified } from './preconditions.ts'
import { problemResponses } from './problems.ts'
import { maximumColumns } from './compact.ts'
import { optionsOn, segmentOf } from './request.ts'
import { ADVISORY_FIELDS, askedOf, FILTER_FIELDS, toFilter, type AdvisoryQuery } from './segment-query.ts'
import { openView, type Service, type View } from './service.ts'
import { turn } from './turns.ts'

/** Segments that are answered before other requests have their turn. */
const SEGMENTS_AT_ONCE = 100

type Asked = ReturnType<typeof askedOf>
export type Answer = Brief | Fault

/** The advisory of a record in brief, or why there is none. */
export function answerOf(
  record: SegmentRecord,
  { vessel, conditions, options }: Asked,
  registry: Registry,
): Answer {
  try {
    const own = optionsOn(options, undefined, record.properties, registry)
    return adviseBriefly(segmentOf(record), vessel, conditions, own)
  } catch (error) {
    if (error instanceof Fault) return error
    throw error
  }
}

/** Answers for many records, with turns for other requests between. */
export async function answersOf(
  records: readonly SegmentRecord[],
  asked: Asked,
  registry: Registry,
  watch: Watch,
): Promise<{ record: SegmentRecord; answer: Answer }[]> {
  const answers: { record: SegmentRecord; answer: Answer }[] = []
  for (const [i, record] of records.entries()) {
    const answer = answerOf(record, asked, registry)
    if (!(answer instanceof Fault)) watch.advised(answer)
    answers.push({ record, answer })
    if (i % SEGMENTS_AT_ONCE === SEGMENTS_AT_ONCE - 1) await turn()
  }
  return answers
}

const orNull = (value: number): number | null => (Number.isFinite(value) ? value : null)

/** The posted limit that binds, over ground, km/h; null where none applies. */
function postedKmh({ decision }: Brief): number | null {
  const posted = bindingPostedLimit(decision.situation, decision.direction)
  if (!posted) return null
  const current = currentAlong(decision.situation.conditions, decision.direction)
  return toKmh(posted.reference === 'over-ground' ? posted.speed : posted.speed + current)
}

/** Whether the posted limit is above what the other criteria allow: it must not be the one that governs. */
function exceedsComputed({ decision }: Brief): boolean | null {
  const posted = decision.bounds.find(({ criterion }) => criterion.id === 'posted-limit')
  if (!posted) return null
  return posted.firstSpeed > decision.speed
}

function worstSeverity({ cautions }: Brief): string {
  return SEVERITIES[Math.max(...cautions.map(({ severity }) => SEVERITIES.indexOf(severity)))] ?? 'info'
}

function answerColumns(brief: Brief) {
  const { decision, effects, sign } = brief
  const maximum = maximumColumns(decision)
  return {
    direction: decision.direction ?? null,
    outcome: decision.outcome,
    governing_criterion: decision.governing.criterion.id,
    max_over_ground_kmh: maximum.max_over_ground_kmh,
    max_over_ground_kn: maximum.max_over_ground_kn,
    max_through_water_mps: maximum.max_through_water_mps,
    sign_value: sign?.value ?? null,
    sign_unit: sign?.unit ?? null,
    critical_ratio: effects.criticalRatio,
    depth_froude_number: effects.depthFroudeNumber,
    bank_wave_height_m: orNull(effects.bankWaveHeight),
    under_keel_clearance_m: orNull(effects.underKeelClearance),
    posted_limit_kmh: postedKmh(brief),
    posted_limit_exceeds_computed: exceedsComputed(brief),
    worst_severity: worstSeverity(brief),
    cautions: brief.cautions.map(({ code }) => code).join(';'),
    problem_code: null,
    problem_detail: null,
  }
}

const NO_ANSWER = {
  direction: null,
  outcome: null,
  governing_criterion: null,
  max_over_ground_kmh: null,
  max_over_ground_kn: null,
  max_through_water_mps: null,
  sign_value: null,
  sign_unit: null,
  critical_ratio: null,
  depth_froude_number: null,
  bank_wave_height_m: null,
  under_keel_clearance_m: null,
  posted_limit_kmh: null,
  posted_limit_exceeds_computed: null,
  worst_severity: null,
  cautions: null,
} as const

function problemColumns(fault: Fault) {
  const details = (fault.parts.errors ?? []).map(({ detail }) => detail)
  return { ...NO_ANSWER, problem_code: fault.code, problem_detail: details.join('; ') || fault.message }
}

const textOrNull = (value: unknown): string | null => (typeof value === 'string' ? value : null)

function toFeature({ record, answer }: { record: SegmentRecord; answer: Answer }, { vessel }: Asked) {
  const { name, waterway, gauge_id } = record.properties
  const isFault = answer instanceof Fault
  return {
    type: 'Feature',
    id: record.id,
    geometry: { type: 'LineString', coordinates: record.line },
    properties: {
      name: textOrNull(name),
      waterway: textOrNull(waterway),
      gauge_id: textOrNull(gauge_id),
      revision: record.revision,
      station_chainage_m: isFault ? null : (answer.decision.situation.station.chainage ?? null),
      vessel_class: vessel.classId ?? null,
      loading: vessel.loading ?? null,
      ...(isFault ? problemColumns(answer) : answerColumns(answer)),
    },
  }
}

const LayerQuery = z.strictObject({
  ...ADVISORY_FIELDS,
  ...FILTER_FIELDS,
  format: formatParameter(['geojson', 'json']),
})

/** Names a layer by its query and the state of the registry. */
function layerTag(url: string, { registry, serviceVersion }: View): string {
  const content = [url, registry.revision, METHOD_VERSION, serviceVersion].join('|')
  return `"${createHash('sha256').update(content).digest('base64url').slice(0, 27)}"`
}

/** The advisories of all segments as a map layer. */
export function layerRoutes(service: Service): Routes {
  return (app) => {
    app.get('/v1/advisories.geojson', {
      schema: {
        operationId: 'getAdvisoryLayer',
        tags: ['segments'],
        summary: 'Show the advisories of all segments for a class of vessels as a map layer.',
        description:
          'A segment that cannot be answered is a feature with `problem_code`, never a failed layer.',
        querystring: LayerQuery,
        response: { 200: geoJson(LayerReply), ...problemResponses(400, 404, 406) },
      },
      handler: async (request, reply) => {
        negotiate(request, reply, ['geojson', 'json'])
        const view = await openView(service, reply)
        const etag = layerTag(request.url, view)
        void reply.header('etag', etag).header('cache-control', 'private, no-cache')
        if (isKnown(request, etag)) return notModified(reply)
        const { bbox, waterway, gauge_id, format: _, ...query } = request.query
        const asked = askedOf(query satisfies AdvisoryQuery, view)
        const records = view.registry.segments(toFilter({ bbox, waterway, gauge_id }))
        const answers = await answersOf(records, asked, view.registry, service.watch)
        return { type: 'FeatureCollection', features: answers.map((item) => toFeature(item, asked)) }
      },
    })
  }
}
