import { z } from 'zod'
import { Fault, type FaultCode } from '../domain/fault.ts'
import type { App } from './app-type.ts'
import { list, listOf } from './list.ts'
import { nearestFirst } from './nearest.ts'
import { PROBLEM_CODES, PROBLEMS } from './problem-table.ts'
import { problemResponses } from './problems.ts'

const ProblemType = z
  .object({
    slug: z.enum(PROBLEM_CODES),
    title: z.string(),
    status: z.int().min(400).max(599).describe('HTTP status it comes with'),
    description: z.string().describe('what a caller does about it'),
  })
  .meta({ id: 'ProblemType', description: 'A kind of problem and what to do about it.' })

const ProblemParams = z.strictObject({ slug: z.string().describe('code of the problem') })

const problemType = (slug: FaultCode): z.input<typeof ProblemType> => {
  const { title, status, description } = PROBLEMS[slug]
  return { slug, title, status, description }
}

/** The table of problems, so that the `type` of every refusal can be opened. */
export function problemRoutes(app: App): void {
  app.get('/v1/problems', {
    schema: {
      operationId: 'listProblems',
      tags: ['service'],
      summary: 'List every kind of problem that the service answers with.',
      response: { 200: listOf('ProblemTypeList', ProblemType) },
    },
    handler: () => list('/v1/problems', PROBLEM_CODES.map(problemType)),
  })

  app.get('/v1/problems/:slug', {
    schema: {
      operationId: 'getProblem',
      tags: ['service'],
      summary: 'Describe one kind of problem and what to do about it.',
      params: ProblemParams,
      response: { 200: ProblemType, ...problemResponses(404) },
    },
    handler: (request) => problemType(knownProblem(request.params.slug)),
  })
}

function knownProblem(slug: string): FaultCode {
  const known = PROBLEM_CODES.find((code) => code === slug)
  if (known) return known
  const [nearest = ''] = nearestFirst(slug, PROBLEM_CODES)
  throw new Fault('problem-not-found', `There is no problem type of this name; the nearest is ${nearest}`, {
    facts: { nearest },
  })
}
