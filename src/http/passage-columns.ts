import { z } from 'zod'
import { COLUMNS, FIELDS } from '../passages/columns.ts'
import type { Routes } from './app-type.ts'
import { formatParameter, negotiate } from './negotiate.ts'
import { problemResponses } from './problems.ts'

const PassageColumn = z
  .object({
    field: z.enum(FIELDS),
    names: z.array(z.string()).describe('accepted in either letter case, in a CSV header or as NDJSON keys'),
    unit: z.string().nullable().describe('null for texts and codes'),
    missing: z.string().describe('what is read as not known'),
    required: z.boolean(),
    one_of: z.array(z.enum(FIELDS)).optional().describe('fields of which a log must have at least one'),
  })
  .meta({
    id: 'PassageColumn',
    description: 'A field of a log of position reports and how it is recognised.',
  })

const PassageColumns = z
  .object({ items: z.array(PassageColumn) })
  .meta({ id: 'PassageColumns', description: 'Fields of a log of position reports.' })

const IDENTITIES = ['mmsi', 'eni'] as const

const ITEMS = COLUMNS.map(({ field, names, unit, missing, required }) => ({
  field,
  names: [...names],
  unit,
  missing,
  required,
  ...(field === 'mmsi' || field === 'eni' ? { one_of: [...IDENTITIES] } : {}),
}))

/** Column names that logs of position reports are recognised by. */
export const passageColumnRoutes: Routes = (app) => {
  app.get('/v1/passages/columns', {
    schema: {
      operationId: 'getPassageColumns',
      tags: ['passages'],
      summary:
        'List the columns that a log of position reports may have, and the names they are recognised by.',
      querystring: z.strictObject({ format: formatParameter(['json']) }),
      response: { 200: PassageColumns, ...problemResponses(400, 406) },
    },
    handler: (request, reply) => {
      negotiate(request, reply, ['json'])
      return { items: ITEMS }
    },
  })
}
