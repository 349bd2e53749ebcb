import { z } from 'zod'
import { VESSEL_CLASSES } from '../domain/vessel-classes.ts'
import { LOADINGS } from '../domain/vessel.ts'
import { Fault } from '../domain/fault.ts'
import { overviewPage } from '../report/overview.ts'
import type { Routes } from './app-type.ts'
import { Id } from './fields.ts'
import { answersOf } from './layer.ts'
import { SIGN_UNIT_NAMES } from './options.schema.ts'
import { enumParameter, numberParameter } from './parameters.ts'
import { sendPage } from './page.ts'
import { problemResponses } from './problems.ts'
import { askedOf } from './segment-query.ts'
import { openView, type Service } from './service.ts'

/** What the page shows before anyone chooses. */
const FIRST_CLASS = 'cemt-iv'

const OverviewQuery = z.strictObject({
  vessel_class: Id.optional(),
  loading: z.enum(LOADINGS).optional(),
  water_level_m: numberParameter(-50, 50).optional(),
  sign_unit: enumParameter(SIGN_UNIT_NAMES).optional(),
})

/** The page that a person sees first: all segments on a plan, by recommended speed. */
export function overviewRoutes(service: Service): Routes {
  return (app) => {
    app.get('/', {
      schema: {
        operationId: 'getOverview',
        tags: ['segments'],
        summary: 'Show all segments on a plan, coloured and labelled by recommended speed.',
        querystring: OverviewQuery,
        response: {
          200: { description: 'The page.', content: { 'text/html': { schema: z.string() } } },
          ...problemResponses(400, 401, 404),
        },
      },
      handler: async (request, reply) => {
        const view = await openView(service, reply)
        const {
          vessel_class = FIRST_CLASS,
          loading = 'laden',
          water_level_m = 0,
          sign_unit = 'km/h',
        } = request.query
        const asked = askedOf({ vessel_class, loading, water_level_m, sign_unit }, view)
        const answers = await answersOf(view.registry.segments(), asked, view.registry, service.watch)
        const own = view.registry.classes().map(({ vesselClass }) => vesselClass)
        const page = overviewPage({
          answered: answers.map(({ record, answer }) => ({
            record,
            answer: answer instanceof Fault ? { problem: answer.message } : answer,
          })),
          chosen: { vesselClass: vessel_class, loading, waterLevel: water_level_m, signUnit: sign_unit },
          classes: [...VESSEL_CLASSES, ...own].map(({ id, name }) => ({ id, name })),
          serviceVersion: view.serviceVersion,
        })
        return sendPage(reply, page)
      },
    })
  }
}
