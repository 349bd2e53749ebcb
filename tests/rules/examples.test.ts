import { readdirSync, readFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { pathToFileURL } from 'node:url'
import { describe, expect, it } from 'vitest'

const ROOT = resolve(import.meta.dirname, '../..')

interface Example {
  readonly call: string
  readonly answer: string
}

interface ExportedFunction {
  readonly name: string
  readonly examples: readonly Example[]
  /** takes numbers alone, so that an example is one short line */
  readonly isPlain: boolean
}

/** Exported functions of a source text, each with the examples of its docstring. */
function exportedFunctions(text: string): ExportedFunction[] {
  const found = text.matchAll(
    /(?:\/\*\*((?:(?!\*\/)[\s\S])*)\*\/\s*)?export (?:async )?function (\w+)\(([^)]*)\)/g,
  )
  return [...found].map(([, docstring = '', name = '', parameters = '']) => ({
    name,
    examples: examplesIn(docstring),
    isPlain: parameters.split(',').every((parameter) => /^\s*(?:\w+: number)?\s*$/.test(parameter)),
  }))
}

/** Each `@example call // answer`; a long one may go on over several lines. */
function examplesIn(docstring: string): Example[] {
  const entries = docstring.replaceAll(/\s*\n\s*\* ?/g, ' ').split(/\s(?=@\w)/)
  return entries
    .filter((entry) => entry.startsWith('@example '))
    .map((entry) => {
      const end = entry.lastIndexOf('//')
      return { call: entry.slice('@example '.length, end).trim(), answer: entry.slice(end + 2).trim() }
    })
}

/** Half a unit of the last digit shown; `1.2e-7` counts its digits before the exponent. */
function halfUnit(answer: string): number {
  const [mantissa = '', exponent = '0'] = answer.toLowerCase().split('e')
  const decimals = mantissa.split('.')[1]?.length ?? 0
  return 0.5 * 10 ** (Number(exponent) - decimals)
}

/** Whether a value is the one shown, to the digits shown. */
function shows(answer: string, value: unknown): boolean {
  const shown = Number(answer)
  if (answer === '' || Number.isNaN(shown)) return String(value) === answer
  return value === shown || Math.abs(Number(value) - shown) <= halfUnit(answer) * 1.0001
}

const files = readdirSync(join(ROOT, 'src/hydro'), { recursive: true, encoding: 'utf8' })
  .filter((name) => name.endsWith('.ts'))
  .map((name) => `src/hydro/${name}`)
  .toSorted()

describe('examples of src/hydro', () => {
  it('are found', () => {
    expect(files.length).toBeGreaterThan(10)
  })

  for (const file of files) {
    const functions = exportedFunctions(readFileSync(join(ROOT, file), 'utf8'))
    if (functions.length === 0) continue

    it(`${file} has an example for each function of numbers, and every example gives the digits it shows`, async () => {
      const exports = (await import(pathToFileURL(join(ROOT, file)).href)) as Record<string, unknown>
      const faults: string[] = []
      for (const { name, examples, isPlain } of functions) {
        if (isPlain && examples.length === 0) faults.push(`${name} has no @example`)
        for (const { call, answer } of examples) {
          if (!call.includes(`${name}(`)) faults.push(`an example of ${name} does not call it: ${call}`)
          // eslint-disable-next-line @typescript-eslint/no-implied-eval -- the text is our own source
          const run = new Function(...Object.keys(exports), `return ${call}`) as (
            ...parts: unknown[]
          ) => unknown
          const value = run(...Object.values(exports))
          if (!shows(answer, value)) faults.push(`${call} is ${String(value)}, shown ${answer}`)
        }
      }
      expect(faults).toEqual([])
    })
  }
})
