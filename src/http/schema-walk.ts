import type { z } from 'zod'

type Schema = z.core.$ZodType
type Concrete = z.core.$ZodTypes

/** What a schema that has no fields or items itself stands for: optional, default, lazy, union and the like. */
function wrapped(schema: Schema): readonly Schema[] | undefined {
  const { def } = (schema as Concrete)._zod
  if ('innerType' in def) return [def.innerType]
  if (def.type === 'lazy') return [def.getter()]
  if (def.type === 'union') return def.options
  if (def.type === 'intersection') return [def.left, def.right]
  // A preprocess step has no fields of its own: what it feeds has.
  if (def.type === 'pipe') return [def.in._zod.def.type === 'transform' ? def.out : def.in]
  return undefined
}

/** The schemas behind every wrapper and branch: the ones that have fields or items. */
export function alternatives(schema: Schema): Concrete[] {
  return wrapped(schema)?.flatMap(alternatives) ?? [schema as Concrete]
}

function children(schema: Concrete, key: PropertyKey): Schema[] {
  const { def } = schema._zod
  if (def.type === 'object') {
    const field = Object.hasOwn(def.shape, key) ? def.shape[String(key)] : def.catchall
    return field ? [field] : []
  }
  if (def.type === 'record') return [def.valueType]
  if (def.type === 'array') return [def.element]
  if (def.type !== 'tuple') return []
  const item = def.items[Number(key)] ?? def.rest
  return item ? [item] : []
}

/** Every schema that may stand at a path, through each branch of a union on the way. */
export function schemasAt(schema: Schema, path: readonly PropertyKey[]): Schema[] {
  return path.reduce<Schema[]>(
    (schemas, key) => schemas.flatMap(alternatives).flatMap((concrete) => children(concrete, key)),
    [schema],
  )
}

/** Names of the fields that objects at a path may have, in the order of the schema. */
export function knownFields(schema: Schema, path: readonly PropertyKey[]): string[] {
  const names = schemasAt(schema, path)
    .flatMap(alternatives)
    .flatMap((concrete) => (concrete._zod.def.type === 'object' ? Object.keys(concrete._zod.def.shape) : []))
  return [...new Set(names)]
}

/** The branches of the union at a path that was refused with this many lists of issues. */
export function branchesAt(schema: Schema, path: readonly PropertyKey[], count: number): readonly Schema[] {
  for (const found of schemasAt(schema, path).flatMap(unions)) if (found.length === count) return found
  return []
}

function unions(schema: Schema): (readonly Schema[])[] {
  const { def } = (schema as Concrete)._zod
  const inner = wrapped(schema)?.flatMap(unions) ?? []
  return def.type === 'union' ? [def.options, ...inner] : inner
}
