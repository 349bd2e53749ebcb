import type { z } from 'zod'
import { branchesAt } from './schema-walk.ts'

export type Issue = z.core.$ZodIssue
type Schema = z.core.$ZodType

/** One thing the schema refused, with the path from the root and the schema that the path is read by. */
export interface Finding {
  readonly path: readonly PropertyKey[]
  readonly issue: Issue
  /** Schema that `path` past `base` leads through: the whole one, or the branch of a union that came closest. */
  readonly schema: Schema
  readonly base: number
}

interface Place {
  readonly schema: Schema
  readonly path: readonly PropertyKey[]
}

/**
 * Issues as a flat list with paths from the root: one for each unknown field, and for a union only those of the
 * branch that came closest, since a caller meant one of them.
 */
export function findings(issues: readonly Issue[], place: Place): Finding[] {
  return issues.flatMap((issue) => {
    const path = [...place.path, ...issue.path]
    const finding: Finding = { path, issue, schema: place.schema, base: place.path.length }
    if (issue.code === 'unrecognized_keys')
      return issue.keys.map((key) => ({ ...finding, path: [...path, key] }))
    if ('issues' in issue) return findings(issue.issues, { schema: place.schema, path })
    if (issue.code !== 'invalid_union' || issue.errors.length === 0) return [finding]
    return closestBranch(finding, issue.errors)
  })
}

const MISSES_WHOLE_BRANCH = 1000

function closestBranch(union: Finding, errors: readonly (readonly Issue[])[]): Finding[] {
  const scores = errors.map((issues) => issues.reduce((sum, issue) => sum + missedBy(issue), 0))
  const least = Math.min(...scores)
  if (least >= MISSES_WHOLE_BRANCH) return [union]
  const index = scores.indexOf(least)
  const branches = branchesAt(union.schema, union.path.slice(union.base), errors.length)
  return findings(errors[index] ?? [], { schema: branches[index] ?? union.schema, path: union.path })
}

/** How far one issue puts a value from a branch. A wrong literal weighs much: it is what tells branches apart. */
function missedBy(issue: Issue): number {
  if (issue.path.length === 0 && (issue.code === 'invalid_type' || issue.code === 'invalid_value')) {
    return MISSES_WHOLE_BRANCH
  }
  if (issue.code === 'invalid_value' && issue.values.length === 1) return 100
  if (issue.code === 'unrecognized_keys') return 3 * issue.keys.length
  if (issue.code === 'invalid_type') return 2
  return 1
}

/** The value at a path, or undefined where there is none. */
export function valueAt(input: unknown, path: readonly PropertyKey[]): unknown {
  return path.reduce<unknown>(
    (value, key) =>
      typeof value === 'object' && value !== null && Object.hasOwn(value, key)
        ? (value as Record<PropertyKey, unknown>)[key]
        : undefined,
    input,
  )
}
