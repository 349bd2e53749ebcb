import { expect, test } from 'vitest'
import { PROBLEM_CODES, PROBLEMS } from '../../src/http/problem-table.ts'
import { sources } from '../support/sources.ts'
import { buildTestApp } from '../support/app.ts'

/** The codes as written in the domain, read as text so that the table cannot vouch for itself. */
function declaredCodes(): string[] {
  const text = sources().find(({ path }) => path === 'domain/fault.ts')?.text ?? ''
  const union = /type FaultCode =([^=]*?)\n\n/.exec(text)?.[1] ?? ''
  return [...union.matchAll(/'([a-z-]+)'/g)].map(([, code = '']) => code)
}

test('every fault code has a row, and every row a code', () => {
  expect(declaredCodes().length).toBeGreaterThan(10)
  expect([...PROBLEM_CODES].sort()).toEqual(declaredCodes().sort())
})

test('every row answers under its own path', async () => {
  const { app } = buildTestApp()
  for (const code of PROBLEM_CODES) {
    const reply = await app.inject(`/v1/problems/${code}`)
    expect(reply.statusCode, code).toBe(200)
    const { title, status, description } = PROBLEMS[code]
    expect(reply.json()).toEqual({ slug: code, title, status, description })
  }
})

test('titles are told apart, and descriptions are sentences', () => {
  const titles = PROBLEM_CODES.map((code) => PROBLEMS[code].title)
  expect(new Set(titles).size).toBe(titles.length)
  for (const code of PROBLEM_CODES) expect(PROBLEMS[code].description, code).toMatch(/^[A-Z].*\.$/)
})
