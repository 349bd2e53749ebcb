import type { z } from 'zod'
import type { FaultItem, FaultItemCode } from '../domain/fault.ts'
import { type Finding, type Issue, valueAt } from './findings.ts'
import { nearestFirst } from './nearest.ts'
import { alternatives, knownFields, schemasAt } from './schema-walk.ts'

/** What is wrong and what to do, still without the place. */
export type Remark = Pick<FaultItem, 'code' | 'detail' | 'allowed' | 'facts'>

const NOUNS: Readonly<Record<string, string>> = {
  number: 'a finite number',
  int: 'a whole number',
  string: 'text',
  boolean: 'true or false',
  object: 'an object',
  record: 'an object',
  array: 'a list',
  tuple: 'a list',
  null: 'null',
}
const noun = (kind: string): string => NOUNS[kind] ?? 'of another type'

function kindOf(value: unknown): string {
  if (value === null) return 'null'
  if (Array.isArray(value)) return 'a list'
  if (typeof value === 'boolean') return String(value)
  return typeof value === 'number' ? 'a number' : noun(typeof value)
}

/** Our own sentence for one finding; nothing of the validator's wording. `text` marks input that is text by nature. */
export function remark(finding: Finding, input: unknown, text: boolean): Remark {
  const { issue, path } = finding
  if (issue.code === 'custom') return customRemark(issue)
  if (issue.code === 'unrecognized_keys') return unknownField(finding, text)
  const value = valueAt(input, path)
  const whole = isWhole(finding)
  if (value === undefined) return required(issue, path, text, whole)
  return describe(issue, value, text, whole)
}

/** Whether whole numbers are wanted at the place of a finding; an issue says so only of numbers. */
function isWhole({ schema, base, path }: Finding): boolean {
  const wanted = schemasAt(schema, path.slice(base)).flatMap(alternatives)
  return wanted.some(({ _zod: { def } }) => def.type === 'number' && 'format' in def)
}

function describe(issue: Issue, value: unknown, text: boolean, whole: boolean): Remark {
  // a parameter given twice comes as a list
  if (text && Array.isArray(value)) return { code: 'wrong-type', detail: 'must be given once only' }
  if (issue.message !== '') return { code: 'pattern', detail: issue.message }
  if (issue.code === 'invalid_type') return wrongType(whole ? 'int' : issue.expected, value, text)
  if (issue.code === 'invalid_value') return notInList(issue.values, value)
  if (issue.code === 'invalid_union') return noBranch(issue, value, text)
  if (issue.code === 'too_small')
    return { code: 'out-of-range', detail: bound(issue, Number(issue.minimum), 'least') }
  if (issue.code === 'too_big')
    return { code: 'out-of-range', detail: bound(issue, Number(issue.maximum), 'most') }
  if (issue.code === 'not_multiple_of')
    return { code: 'out-of-range', detail: `must be a multiple of ${issue.divisor}` }
  if (issue.code === 'invalid_format') return { code: 'pattern', detail: format(issue) }
  return { code: 'pattern', detail: 'must have the form that the documentation gives' }
}

function customRemark(issue: z.core.$ZodIssueCustom): Remark {
  const { code = 'clash', allowed, facts } = (issue.params ?? {}) as Partial<Remark>
  const detail = issue.message === '' ? 'does not go with the other fields' : issue.message
  return { code, detail, ...(allowed && { allowed }), ...(facts && { facts }) }
}

function unknownField({ schema, base, path }: Finding, text: boolean): Remark {
  const allowed = nearestFirst(String(path.at(-1)), knownFields(schema, path.slice(base, -1)))
  const kind = text ? 'a known parameter' : 'a known field'
  const [nearest] = allowed
  if (nearest === undefined) return { code: 'unknown-field', detail: `is not ${kind}; leave it out`, allowed }
  return { code: 'unknown-field', detail: `is not ${kind}; did you mean ${nearest}?`, allowed }
}

function required(issue: Issue, path: readonly PropertyKey[], text: boolean, whole: boolean): Remark {
  if (path.length === 0) return { code: 'required', detail: 'is required: send a JSON body' }
  const values = optionsOf(issue)
  if (values) {
    const allowed = values.map(String)
    return { code: 'required', detail: `is required: one of ${allowed.join(', ')}`, allowed }
  }
  const what = issue.code === 'invalid_type' && !text ? `: ${noun(whole ? 'int' : issue.expected)}` : ''
  return { code: 'required', detail: `is required${what}` }
}

function wrongType(expected: string, value: unknown, text: boolean): Remark {
  if (text) return { code: 'wrong-type', detail: `must be ${textForm(expected)}` }
  if (expected === 'int' && typeof value === 'number')
    return { code: 'wrong-type', detail: 'must be a whole number' }
  // JSON can write a number that no double holds, such as 1e999.
  if (typeof value === 'number' && expected === 'number')
    return { code: 'out-of-range', detail: 'must be a finite number' }
  return { code: 'wrong-type', detail: `must be ${noun(expected)}, not ${kindOf(value)}` }
}

const textForm = (expected: string): string =>
  expected === 'number'
    ? 'a decimal number such as 2.5'
    : expected === 'int'
      ? 'a whole number such as 2'
      : noun(expected)

function notInList(values: readonly unknown[], value: unknown): Remark {
  const allowed = nearestFirst(typeof value === 'string' ? value : '', values.map(String))
  const [nearest = ''] = allowed
  if (allowed.length === 1) return { code: 'not-in-list', detail: `must be ${nearest}`, allowed }
  const guess = typeof value === 'string' && value !== '' ? `; did you mean ${nearest}?` : ''
  return { code: 'not-in-list', detail: `must be one of ${values.map(String).join(', ')}${guess}`, allowed }
}

/** A union of which no branch even has the right kind of value: say all kinds that it takes. */
function noBranch(issue: z.core.$ZodIssueInvalidUnion, value: unknown, text: boolean): Remark {
  const options = optionsOf(issue)
  if (options) return notInList(options, value)
  const roots = issue.errors.flatMap((branch) => branch.filter((inner) => inner.path.length === 0))
  const values = roots.flatMap((inner) => (inner.code === 'invalid_value' ? inner.values : []))
  const kinds = roots.flatMap((inner) => (inner.code === 'invalid_type' ? [noun(inner.expected)] : []))
  if (kinds.length === 0) return notInList(values, value)
  const allowed = nearestFirst(typeof value === 'string' ? value : '', values.map(String))
  const choices = [...values.map((choice) => JSON.stringify(choice)), ...new Set(kinds)]
  const detail = `must be ${choices.join(' or ')}${text ? '' : `, not ${kindOf(value)}`}`
  return { code: 'wrong-type', detail, ...(allowed.length > 0 && { allowed }) }
}

/** The values that an enum, a literal or the discriminator of a union may have. */
function optionsOf(issue: Issue): readonly unknown[] | undefined {
  if (issue.code === 'invalid_value') return issue.values
  return issue.code === 'invalid_union' && 'options' in issue ? issue.options : undefined
}

type Bound = z.core.$ZodIssueTooSmall | z.core.$ZodIssueTooBig

function bound(issue: Bound, limit: number, side: 'least' | 'most'): string {
  const length = issue.exact ? `exactly ${limit}` : `at ${side} ${limit}`
  if (issue.origin === 'string') return `must have ${length} ${limit === 1 ? 'character' : 'characters'}`
  if (issue.origin === 'array' || issue.origin === 'set')
    return `must have ${length} ${limit === 1 ? 'item' : 'items'}`
  if (issue.inclusive === false) return `must be ${side === 'least' ? 'more' : 'less'} than ${limit}`
  return `must be at ${side} ${limit}`
}

const FORMATS: Readonly<Record<string, string>> = {
  datetime: 'must be a date and time with a zone, such as 2026-03-01T12:00:00Z',
  date: 'must be a date such as 2026-03-01',
  url: 'must be an absolute URL',
  uuid: 'must be a UUID',
}

function format(issue: z.core.$ZodIssueInvalidStringFormat): string {
  return (
    FORMATS[issue.format] ??
    (issue.pattern ? `must match ${issue.pattern}` : 'must have the form that the documentation gives')
  )
}

/** The fewest words about an issue past the number that is reported in full. */
export const bareRemark = (issue: Issue): Remark => ({ code: bareCode(issue), detail: 'is refused' })

const bareCode = (issue: Issue): FaultItemCode =>
  issue.code === 'unrecognized_keys' ? 'unknown-field' : 'wrong-type'
