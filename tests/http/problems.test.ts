import { expect, test } from 'vitest'
import { Fault, type FaultItem } from '../../src/domain/fault.ts'
import { Problem, problemResponses, toProblem } from '../../src/http/problems.ts'
import { buildTestApp } from '../support/app.ts'

test('toProblem carries code, facts, errors and the request id', () => {
  const item: FaultItem = {
    pointer: '#/depth_m',
    code: 'clash',
    detail: 'is less than the draught',
    facts: { draught_m: 3 },
  }
  expect(
    toProblem(new Fault('impossible-input', 'Too deep', { errors: [item], facts: { depth_m: 2 } }), 'abc'),
  ).toEqual({
    type: '/v1/problems/impossible-input',
    title: 'The fields are valid but cannot hold together',
    status: 422,
    detail: 'Too deep',
    instance: 'urn:request:abc',
    code: 'impossible-input',
    facts: { depth_m: 2 },
    errors: [item],
  })
})

test('toProblem shows the first 1000 errors and says that there were more', () => {
  const items = (count: number): FaultItem[] =>
    Array.from({ length: count }, (_, index) => ({
      pointer: `#/${index}`,
      code: 'required',
      detail: 'is required',
    }))
  const whole = toProblem(new Fault('invalid-request', 'x', { errors: items(1000) }), 'a')
  expect(whole.errors).toHaveLength(1000)
  expect(whole).not.toHaveProperty('errors_truncated')
  const cut = toProblem(new Fault('invalid-request', 'x', { errors: items(1001) }), 'a')
  expect(cut.errors).toHaveLength(1000)
  expect(cut.errors_truncated).toBe(true)
  expect(cut.errors?.[999]?.pointer).toBe('#/999')
})

test('problemResponses names every code of a status under the problem media type', () => {
  const responses = problemResponses(404, 413)
  expect(Object.keys(responses)).toEqual(['404', '413'])
  expect(responses[413]).toMatchObject({ content: { 'application/problem+json': { schema: Problem } } })
  expect(JSON.stringify(responses[413])).toContain('`line-too-long`: A line is too long.')
})

test('the list of problems has one item for each code, with a link to itself', async () => {
  const { app } = buildTestApp()
  const reply = await app.inject('/v1/problems')
  const body = reply.json<{ items: { slug: string }[]; links: unknown }>()
  expect(body.items.find(({ slug }) => slug === 'stopping')).toEqual({
    slug: 'stopping',
    title: 'The service is stopping',
    status: 503,
    description:
      'Repeat the request after the number of seconds in `Retry-After`; another instance may answer at once.',
  })
  expect(body.links).toEqual([{ rel: 'self', href: '/v1/problems' }])
})

test('an unknown problem type is a problem itself and names the nearest', async () => {
  const { app } = buildTestApp()
  const reply = await app.inject('/v1/problems/malformed-jsn')
  expect(reply.statusCode).toBe(404)
  expect(reply.json()).toMatchObject({ code: 'problem-not-found', facts: { nearest: 'malformed-json' } })
  expect(Problem.safeParse(reply.json()).success).toBe(true)
})
