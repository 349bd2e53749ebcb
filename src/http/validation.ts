import type { preValidationHookHandler } from 'fastify'
import { z } from 'zod'
import { Fault, type FaultItem } from '../domain/fault.ts'
import type { App } from './app-type.ts'
import { findings } from './findings.ts'
import { toFiniteJson } from './json.ts'
import { bareRemark, remark } from './sentences.ts'

/** Part of a request that a fault lies in. Bodies are pointed into, the other two have named parameters. */
export type Where = 'body' | 'query' | 'params'

// Sentences cost a search for the nearest name each; a reply shows this many.
const MAX_EXPLAINED = 1001

// An empty message tells our own wording, set in a schema, from the validator's.
const SILENT = { error: () => '' }

/**
 * Everything that a schema refused, each with its place and what to do about it.
 *
 * @param error  as made by a parse with silent messages, as `parse` does; other wording would be passed on
 */
export function faultItems(
  error: { readonly issues: readonly z.core.$ZodIssue[] },
  input: unknown,
  schema: z.ZodType,
  where: Where,
): FaultItem[] {
  return findings(error.issues, { schema, path: [] }).map((finding, index) => {
    const said = index < MAX_EXPLAINED ? remark(finding, input, where !== 'body') : bareRemark(finding.issue)
    return { ...place(finding.path, where), ...said }
  })
}

function place(path: readonly PropertyKey[], where: Where): Pick<FaultItem, 'pointer' | 'parameter'> {
  return where === 'body' ? { pointer: pointer(path) } : { parameter: path.map(String).join('.') }
}

/** JSON Pointer (RFC 6901) as a fragment: the whole body is `#`. */
export function pointer(path: readonly PropertyKey[]): string {
  return ['#', ...path.map((key) => String(key).replaceAll('~', '~0').replaceAll('/', '~1'))].join('/')
}

/** The one refusal that holds all faults of a request. */
export function refused(errors: readonly FaultItem[]): Fault {
  const [only] = errors
  const detail =
    errors.length === 1 && only
      ? `1 field was refused: ${only.pointer ?? only.parameter ?? ''} ${only.detail}`
      : `${errors.length} fields were refused`
  return new Fault('invalid-request', detail, { errors })
}

/** The value as the schema gives it, or a Fault with every fault of it. For lines of a stream as for bodies. */
export function parse<Schema extends z.ZodType>(
  schema: Schema,
  input: unknown,
  where: Where = 'body',
): z.output<Schema> {
  const result = schema.safeParse(input, SILENT)
  if (result.success) return result.data
  throw refused(faultItems(result.error, input, schema, where))
}

const PARTS = [
  { key: 'params', request: 'params', where: 'params' },
  { key: 'querystring', request: 'query', where: 'query' },
  { key: 'body', request: 'body', where: 'body' },
] as const

type Checked = (typeof PARTS)[number] & { readonly schema: z.ZodType }

/**
 * Makes Zod schemas of routes check requests, and JSON of replies refuse figures that are not finite.
 * Path, query and body are checked together, since the framework's own way stops at the first part that fails.
 */
export function installValidation(app: App): void {
  app.setValidatorCompiler(() => () => true)
  app.setSerializerCompiler(() => toFiniteJson)
  app.setReplySerializer(toFiniteJson)
  app.addHook('onRoute', (route) => {
    const schemas: Readonly<Record<string, unknown>> = { ...route.schema }
    const parts = PARTS.flatMap((part) => {
      const schema = schemas[part.key]
      return schema instanceof z.ZodType ? [{ ...part, schema }] : []
    })
    if (parts.length === 0) return
    const before = [route.preValidation ?? []].flat() as preValidationHookHandler[]
    route.preValidation = [...before, checkParts(parts)]
  })
}

function checkParts(parts: readonly Checked[]): preValidationHookHandler {
  return (request, _reply, done) => {
    const errors: FaultItem[] = []
    for (const part of parts) {
      const input: unknown = request[part.request]
      const result = part.schema.safeParse(input, SILENT)
      if (result.success) request[part.request] = result.data
      else for (const item of faultItems(result.error, input, part.schema, part.where)) errors.push(item)
    }
    if (errors.length > 0) done(refused(errors))
    else done()
  }
}
