import { SEVERITIES, type Assumption, type Severity } from '../advisory/caution.ts'
import type { StretchCase } from './evidence-case.ts'

/** A caution of the document, with the stretches it belongs to. */
export interface RegisteredCaution {
  readonly code: string
  readonly severity: Severity
  readonly text: string
  /** from 0, rising */
  readonly stretches: readonly number[]
}

export interface RegisteredAssumption extends Assumption {
  readonly stretches: readonly number[]
}

/** Cautions and assumptions of a document, numbered in their order; those of one text have one number. */
export interface Register {
  /** worst first */
  readonly cautions: readonly RegisteredCaution[]
  readonly assumptions: readonly RegisteredAssumption[]
  /** indices of the cautions of each stretch, rising */
  readonly cautionsOf: readonly (readonly number[])[]
  readonly assumptionsOf: readonly (readonly number[])[]
}

interface Entry<T> {
  readonly value: T
  readonly stretches: number[]
}

/** Things of every stretch, equal ones once. */
function gathered<T>(
  all: readonly (readonly T[])[],
  keyOf: (value: T) => string,
  order: (a: T, b: T) => number,
): { readonly entries: Entry<T>[]; readonly byStretch: number[][] } {
  const found = new Map<string, Entry<T>>()
  all.forEach((values, stretch) => {
    for (const value of values) {
      const key = keyOf(value)
      const entry = found.get(key) ?? { value, stretches: [] }
      if (entry.stretches.at(-1) !== stretch) entry.stretches.push(stretch)
      found.set(key, entry)
    }
  })
  const entries = [...found.values()].sort((a, b) => order(a.value, b.value))
  const byStretch: number[][] = all.map(() => [])
  entries.forEach(({ stretches }, i) => {
    for (const stretch of stretches) byStretch[stretch]?.push(i)
  })
  return { entries, byStretch }
}

const rank = (severity: Severity): number => SEVERITIES.indexOf(severity)

type Plain = Pick<RegisteredCaution, 'code' | 'severity' | 'text'>

/** Numbers every caution and assumption of the stretches. */
export function registerOf(cases: readonly StretchCase[]): Register {
  const cautions = gathered<Plain>(
    cases.map(({ stretch, cell }) => [...stretch.cautions, ...(cell?.advisory.cautions ?? [])]),
    ({ code, severity, text }) => JSON.stringify([severity, code, text]),
    (a, b) => rank(b.severity) - rank(a.severity),
  )
  const assumptions = gathered<Assumption>(
    cases.map(({ cell }) => cell?.advisory.assumptions ?? []),
    ({ field, value, text, source }) => JSON.stringify([field, value, text, source]),
    (a, b) => a.field.localeCompare(b.field, 'en') || String(a.value).localeCompare(String(b.value), 'en'),
  )
  return {
    cautions: cautions.entries.map(({ value, stretches }) => ({
      code: value.code,
      severity: value.severity,
      text: value.text,
      stretches,
    })),
    assumptions: assumptions.entries.map(({ value, stretches }) => ({ ...value, stretches })),
    cautionsOf: cautions.byStretch,
    assumptionsOf: assumptions.byStretch,
  }
}
