import { z } from 'zod'

type Schema = z.core.$ZodType
type Concrete = z.core.$ZodTypes

const inner = (schema: Schema): Schema => strict(schema as z.ZodType)

/** What a schema is made of, with every object closed. */
function closed({ _zod: { def } }: Concrete): Concrete['_zod']['def'] {
  // eslint-disable-next-line @typescript-eslint/switch-exhaustiveness-check -- all other kinds hold no objects
  switch (def.type) {
    case 'object': {
      const shape = Object.fromEntries(Object.entries(def.shape).map(([name, field]) => [name, inner(field)]))
      return { ...def, shape, catchall: z.never() }
    }
    case 'array':
      return { ...def, element: inner(def.element) }
    case 'record':
      return { ...def, valueType: inner(def.valueType) }
    case 'union':
      return { ...def, options: def.options.map(inner) }
    case 'tuple':
      return { ...def, items: def.items.map(inner) }
    case 'optional':
      return { ...def, innerType: inner(def.innerType) }
    case 'nullable':
      return { ...def, innerType: inner(def.innerType) }
    default:
      return def
  }
}

/** The same schema, checks included, that refuses every field it does not name, however deep. */
export function strict<Type extends z.ZodType>(schema: Type): Type {
  return z.core.clone(schema, closed(schema as unknown as Concrete))
}
