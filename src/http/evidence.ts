import { z } from 'zod'
import { METHOD_VERSION, METHODS } from '../advisory/catalogue.ts'
import type { Cell, Sampled } from '../limits/cell.ts'
import type { GoverningCell, Plan } from '../limits/plan.ts'
import type { Study } from '../limits/study.ts'
import { evidenceSteps } from '../report/evidence.ts'
import type { EvidencePublication, EvidenceView } from '../report/evidence-view.ts'
import type { PlanRecord } from '../store/job-records.ts'
import type { App, Routes } from './app-type.ts'
import type { LimitPlanWire } from './limit-plans.schema.ts'
import { planOf, PlanParams } from './limit-plans.ts'
import { negotiate } from './negotiate.ts'
import { sendPage } from './page.ts'
import { contentOf, fromPlanContent, publicationOf, toPlanRules } from './plan-reply.ts'
import { problemResponses } from './problems.ts'
import { basisOf, type PlanBasis } from './record.ts'
import type { Service } from './service.ts'
import { cellsOf } from './study-results.ts'
import { turn } from './turns.ts'

/** Where a cell of a study is, as text. */
const keyOf = (place: Pick<Cell, 'segment' | 'vessel' | 'waterLevel' | 'current' | 'direction'>): string =>
  [place.segment, place.vessel, place.waterLevel, place.current, place.direction].join(' ')

function placeOf(governing: GoverningCell, study: Study): string {
  return keyOf({
    segment: study.segments.findIndex(({ id }) => id === governing.segmentId),
    vessel: governing.vessel,
    waterLevel: study.waterLevels.indexOf(governing.waterLevel),
    current: study.currents.indexOf(governing.current),
    direction: study.directions.indexOf(governing.direction ?? null),
  })
}

/** What the samples of the governing cell of each stretch say. */
async function sampledOf(
  plan: Plan,
  { study: job, inputs }: PlanBasis,
  { store }: Service,
): Promise<(Sampled | undefined)[] | undefined> {
  const { study } = inputs
  if (!study.uncertainty) return undefined
  const places = plan.stretches.map(({ governing }) => governing && placeOf(governing, study))
  const wanted = new Set(places)
  const found = new Map<string, Sampled>()
  for await (const cells of cellsOf(job, store)) {
    for (const cell of cells) {
      const key = keyOf(cell)
      if (cell.sampled && wanted.has(key)) found.set(key, cell.sampled)
    }
  }
  return places.map((place) => (place === undefined ? undefined : found.get(place)))
}

/** Number under which the plan that is superseded was published. */
async function numberOf(id: string | undefined, { store }: Service): Promise<string | undefined> {
  if (id === undefined) return undefined
  const plan = await store.findPlan(id)
  return plan && publicationOf(plan)?.number
}

async function publicationView(plan: PlanRecord, service: Service): Promise<EvidencePublication | undefined> {
  const publication = publicationOf(plan)
  if (!publication) return undefined
  return {
    number: publication.number,
    title: publication.title,
    authority: publication.authority,
    signatory: publication.signatory,
    effectiveFrom: publication.effective_from,
    supersedes: await numberOf(publication.supersedes, service),
    note: publication.note,
    publishedAt: publication.published_at,
    publishedBy: publication.published_by,
    serviceVersion: publication.service_version,
    methodVersion: publication.method_version,
    recordHash: publication.record_hash,
  }
}

async function evidenceView(record: PlanRecord, service: Service): Promise<EvidenceView> {
  const basis = await basisOf(record, service.store)
  const plan = fromPlanContent(contentOf(record))
  return {
    id: record.id,
    name: record.name,
    state: record.state,
    studyId: basis.study.id,
    studyName: basis.study.name,
    study: basis.inputs.study,
    rules: toPlanRules(record.request as unknown as LimitPlanWire),
    plan,
    publication: await publicationView(record, service),
    sampled: await sampledOf(plan, basis, service),
    methods: METHODS.map(({ id, name, reference, isFromMemory }) => ({ id, name, reference, isFromMemory })),
    serviceVersion: service.serviceVersion,
    methodVersion: METHOD_VERSION,
    made: service.now(),
  }
}

/** Goes through the steps so that other requests have their turn between them. */
async function inTurns<Result>(steps: Generator<undefined, Result>): Promise<Result> {
  for (;;) {
    const step = steps.next()
    if (step.done === true) return step.value
    await turn()
  }
}

/** The evidence of a plan as pages to sign. */
export function evidenceRoutes(service: Service): Routes {
  return (app: App) => {
    app.get('/v1/limit-plans/:id/evidence', {
      schema: {
        operationId: 'getLimitPlanEvidence',
        tags: ['limit plans'],
        summary: 'Show the evidence of a plan as pages to read and to print on A4.',
        params: PlanParams,
        querystring: z.strictObject({}),
        response: {
          200: { description: 'The pages.', content: { 'text/html': { schema: z.string() } } },
          ...problemResponses(400, 401, 404, 406, 503),
        },
      },
      handler: async (request, reply) => {
        negotiate(request, reply, ['html'])
        const plan = await planOf(request.params.id, service)
        return sendPage(reply, await inTurns(evidenceSteps(await evidenceView(plan, service))))
      },
    })
  }
}
