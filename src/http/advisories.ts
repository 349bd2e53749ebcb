import { z } from 'zod'
import { advise } from '../advisory/advise.ts'
import { assess, type SailedSpeed } from '../advisory/assess.ts'
import { inverseOf, VARIED } from '../advisory/inverse.ts'
import { sensitivityOf, type InputSwing } from '../advisory/sensitivity.ts'
import type { Decision } from '../advisory/decide.ts'
import { Fault } from '../domain/fault.ts'
import type { App, Routes } from './app-type.ts'
import { advisoryText } from './advisory-text.ts'
import { crossCheck } from './cross-check.ts'
import { checkSpeed, speedFields, speedOf } from './fields.ts'
import { inARow } from './in-a-row.ts'
import { negotiate, formatParameter } from './negotiate.ts'
import { problemResponses } from './problems.ts'
import { toPair } from './reply-parts.ts'
import { toAdvisoryReply, toAssessmentReply } from './reply.ts'
import { AdvisoryReply, AssessmentReply, InverseReply, SensitivityReply } from './reply.schema.ts'
import { ADVISORY_FIELDS, AdvisoryRequest, namesRegistry, resolve, type AdvisoryWire } from './request.ts'
import { viewOf, viewWithoutRegistry, type Service, type View } from './service.ts'
import { UncertaintyFields, toHalves } from './uncertainty.schema.ts'

const SAILED_FIELDS = {
  ...speedFields('speed', 0.1, 30, 'speed of the vessel'),
  speed_reference: z.enum(['through-water', 'over-ground']),
} as const

const EffectsRequest = z
  .strictObject({ ...ADVISORY_FIELDS, ...SAILED_FIELDS })
  .check(
    crossCheck((request, report) => {
      checkSpeed(request, 'speed', true, report)
    }),
  )
  .meta({ id: 'EffectsRequest', description: 'An advisory request and the speed that is asked about.' })

const SensitivityRequest = z
  .strictObject({ ...ADVISORY_FIELDS, uncertainty: UncertaintyFields })
  .meta({ id: 'SensitivityRequest', description: 'An advisory request and how uncertain its inputs are.' })

const InverseRequest = z
  .strictObject({ ...ADVISORY_FIELDS, ...SAILED_FIELDS, vary: z.enum(VARIED) })
  .check(
    crossCheck((request, report) => {
      checkSpeed(request, 'speed', true, report)
    }),
  )
  .meta({
    id: 'InverseRequest',
    description: 'An advisory request, a speed, and the input that may give way.',
  })

const JsonQuery = z.strictObject({ format: formatParameter(['json']) })

type SailedWire = Pick<z.output<typeof EffectsRequest>, keyof typeof SAILED_FIELDS>

function toSailed(wire: SailedWire): SailedSpeed {
  return { value: speedOf(wire, 'speed') ?? NaN, reference: wire.speed_reference }
}

const labelled = (label: string | undefined) => (label === undefined ? {} : { label })

function toSwingReply(swing: InputSwing) {
  const pairOf = (name: 'at_low' | 'at_high', decision: Decision | undefined) =>
    decision && decision.outcome !== 'no-safe-speed' ? { [name]: toPair(decision, decision.speed) } : {}
  return {
    field: swing.field,
    low: swing.low,
    high: swing.high,
    ...pairOf('at_low', swing.atLow),
    ...pairOf('at_high', swing.atHigh),
    swing_mps: swing.swing,
  }
}

function notAhead(speedOverGround: number, current: number): Fault {
  return new Fault(
    'impossible-input',
    'At this speed over ground the vessel would not move ahead through the water: the current is the faster of the two',
    {
      errors: [
        {
          pointer: '#/conditions/current_mps',
          code: 'clash',
          detail: 'is as fast as the speed over ground, or faster, in the direction of the course',
          facts: { speed_over_ground_mps: speedOverGround, current_mps: current },
        },
      ],
    },
  )
}

/** Statuses of a route that takes an advisory request. */
const PROBLEMS = problemResponses(400, 404, 406, 413, 415, 422)

/** Advisories one at a time, and the questions that turn them round. */
export function advisoryRoutes(service: Service): Routes {
  return (app) => {
    addAdvisory(app, service)
    addEffects(app, service)
    addSensitivity(app, service)
    addInverse(app, service)
  }
}

const viewFor = (body: AdvisoryWire, service: Service): View | Promise<View> =>
  namesRegistry(body) ? viewOf(service) : viewWithoutRegistry(service)

const contextOf = ({ registry, serviceVersion }: View) => ({
  serviceVersion,
  registryRevision: registry.revision,
})

function addAdvisory(app: App, service: Service): void {
  app.post('/v1/advisories', {
    schema: {
      operationId: 'createAdvisory',
      tags: ['advisories'],
      summary: 'Recommend a maximum speed for a vessel on a segment.',
      description:
        'The largest speed at which every criterion holds on the whole way up from rest. Every default that was used is in `assumptions`; `cautions` always defers to local rules and licensed practice.',
      querystring: JsonQuery,
      body: AdvisoryRequest,
      response: { 200: AdvisoryReply, ...PROBLEMS },
    },
    preValidation: inARow,
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const { body } = request
      const view = await viewFor(body, service)
      const resolved = resolve(body, view.registry)
      const { segment, vessel, conditions, options } = resolved
      const begun = performance.now()
      const advisory = advise(segment, vessel, conditions, options)
      service.watch.advised(advisory, (performance.now() - begun) / 1000)
      return advisoryText(toAdvisoryReply(advisory, resolved, contextOf(view), body))
    },
  })
}

function addEffects(app: App, service: Service): void {
  app.post('/v1/effects', {
    schema: {
      operationId: 'createEffects',
      tags: ['advisories'],
      summary: 'Tell what a passage at a given speed does, and whether it is faster than advised.',
      querystring: JsonQuery,
      body: EffectsRequest,
      response: { 200: AssessmentReply, ...PROBLEMS },
    },
    preValidation: inARow,
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const { body } = request
      const view = await viewFor(body, service)
      const resolved = resolve(body, view.registry)
      const { segment, vessel, conditions, options } = resolved
      const assessment = assess(segment, vessel, conditions, options, toSailed(body))
      if (!assessment) throw notAhead(toSailed(body).value, conditions.current)
      return toAssessmentReply(assessment, resolved, contextOf(view), body)
    },
  })
}

function addSensitivity(app: App, service: Service): void {
  app.post('/v1/advisories/sensitivity', {
    schema: {
      operationId: 'createSensitivity',
      tags: ['advisories'],
      summary: 'Tell which uncertain input moves a recommendation most.',
      querystring: JsonQuery,
      body: SensitivityRequest,
      response: { 200: SensitivityReply, ...PROBLEMS },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const { body } = request
      const view = await viewFor(body, service)
      const { base, inputs } = sensitivityOf(resolve(body, view.registry), toHalves(body.uncertainty))
      return {
        ...labelled(body.label),
        ...(base.outcome !== 'no-safe-speed' && { base: toPair(base, base.speed) }),
        inputs: inputs.map(toSwingReply),
      }
    },
  })
}

function addInverse(app: App, service: Service): void {
  app.post('/v1/advisories/inverse', {
    schema: {
      operationId: 'createInverse',
      tags: ['advisories'],
      summary: 'Tell the least depth or bank distance, or the greatest draught, that a speed needs.',
      querystring: JsonQuery,
      body: InverseRequest,
      response: { 200: InverseReply, ...PROBLEMS },
    },
    handler: async (request, reply) => {
      negotiate(request, reply, ['json'])
      const { body } = request
      const view = await viewFor(body, service)
      const inverse = inverseOf(resolve(body, view.registry), toSailed(body), body.vary)
      return { ...labelled(body.label), ...toInverseReply(inverse) }
    },
  })
}

function toInverseReply(inverse: ReturnType<typeof inverseOf>) {
  const { vary, required, searched, governing } = inverse
  const least = vary === 'draught_m' ? 'greatest' : 'least'
  const name = { depth_m: 'depth', bank_distance_m: 'bank distance', draught_m: 'draught' }[vary]
  const [from, to] = searched
  const range = `between ${from} and ${to} m`
  return {
    vary,
    attainable: required !== undefined,
    ...(required !== undefined && { required }),
    unit: 'm',
    searched,
    ...(governing && { governing_criterion: governing.governing.criterion.id }),
    text:
      required === undefined
        ? `No ${name} ${range} makes this speed one that is advised.`
        : `The ${least} ${name} ${range} at which this speed is advised is ${required.toFixed(2)} m, with everything else as it is.`,
  }
}
