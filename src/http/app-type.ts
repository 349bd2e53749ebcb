import type {
  FastifyBaseLogger,
  FastifyInstance,
  FastifyTypeProvider,
  RawReplyDefaultExpression,
  RawRequestDefaultExpression,
  RawServerDefault,
} from 'fastify'
import type { z } from 'zod'

/** Lets a handler see `request.body`, `query` and `params` as what the route's schemas give. */
export interface ZodTypes extends FastifyTypeProvider {
  validator: this['schema'] extends z.ZodType ? z.output<this['schema']> : unknown
  serializer: unknown
}

/** The application as route files see it. */
export type App = FastifyInstance<
  RawServerDefault,
  RawRequestDefaultExpression,
  RawReplyDefaultExpression,
  FastifyBaseLogger,
  ZodTypes
>

/** A file of routes is a function of this type, or makes one from the parts it needs. */
export type Routes = (app: App) => void
