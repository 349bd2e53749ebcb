import { z } from 'zod'
import type { FaultItemCode, Facts } from '../domain/fault.ts'

/** Reports one fault of fields that belong together: where, what kind, and what to do. */
export type Report = (
  path: readonly (string | number)[],
  code: FaultItemCode,
  detail: string,
  more?: { readonly allowed?: readonly string[]; readonly facts?: Facts },
) => void

/**
 * A check of fields that belong together, run even when some of them are wrong by themselves, so that all faults of a
 * request come at once. The value may therefore be incomplete.
 */
export function crossCheck<Value>(check: (value: Partial<Value>, report: Report) => void) {
  const made = z.superRefine<Value>((value, context) => {
    if (typeof value !== 'object' || value === null || Array.isArray(value)) return
    check(value, (path, code, detail, more) => {
      context.addIssue({ code: 'custom', path: [...path], message: detail, params: { code, ...more } })
    })
  })
  made._zod.def.when = () => true
  return made
}
