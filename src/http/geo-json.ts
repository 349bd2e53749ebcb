import type { z } from 'zod'

/** A reply that is GeoJSON, and goes by the name of JSON where a caller asks for that. */
export const geoJson = (schema: z.ZodType) => ({
  description: schema.description ?? 'The answer.',
  content: { 'application/geo+json': { schema }, 'application/json': { schema } },
})
