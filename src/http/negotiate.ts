import type { FastifyReply, FastifyRequest } from 'fastify'
import { z } from 'zod'
import { Fault } from '../domain/fault.ts'

/** Forms a reply can take, by the name that `?format=` uses. */
export const MEDIA_TYPES = {
  json: 'application/json',
  geojson: 'application/geo+json',
  ndjson: 'application/x-ndjson',
  csv: 'text/csv',
  svg: 'image/svg+xml',
  html: 'text/html',
} as const

export type Format = keyof typeof MEDIA_TYPES

/** Query parameter `format` of a route with these forms. */
export const formatParameter = <const Formats extends readonly [Format, ...Format[]]>(formats: Formats) =>
  z.enum(formats).optional().describe('form of the reply; overrides the Accept header, for links')

/** Header `vary` of what a route answers, refusals included. */
export const VARY = 'Accept, Authorization'

/** Chooses the form of a reply, sets its content type, and tells caches what the choice depended on. */
export function negotiate<const Offered extends readonly [Format, ...Format[]]>(
  request: FastifyRequest,
  reply: FastifyReply,
  offered: Offered,
): Offered[number] {
  reply.header('vary', VARY)
  const chosen = chosenByQuery(request.query, offered) ?? chosenByHeader(request.headers.accept, offered)
  if (chosen === undefined) {
    const available = offered.map((format) => MEDIA_TYPES[format])
    throw new Fault('not-acceptable', `The reply is available as ${available.join(', ')}`, {
      facts: { available },
    })
  }
  const type = MEDIA_TYPES[chosen]
  reply.type(type.startsWith('text/') ? `${type}; charset=utf-8` : type)
  return chosen
}

function chosenByQuery<Name extends Format>(query: unknown, offered: readonly Name[]): Name | undefined {
  const wanted = typeof query === 'object' && query !== null && 'format' in query ? query.format : undefined
  return offered.find((format) => format === wanted)
}

/** The offer that the header weighs highest; the first of equals. Undefined when it excludes them all. */
export function chosenByHeader<Name extends Format>(
  accept: string | undefined,
  offered: readonly Name[],
): Name | undefined {
  if (accept === undefined || accept.trim() === '') return offered[0]
  const ranges = accept.split(',').map(mediaRange)
  const weights = offered.map((format) => weight(MEDIA_TYPES[format], ranges))
  const highest = Math.max(...weights)
  return highest > 0 ? offered[weights.indexOf(highest)] : undefined
}

interface MediaRange {
  readonly type: string
  readonly quality: number
}

function mediaRange(text: string): MediaRange {
  const [type = '', ...parameters] = text.split(';').map((part) => part.trim().toLowerCase())
  const quality = parameters.find((parameter) => parameter.startsWith('q='))?.slice(2)
  const value = quality === undefined ? 1 : Number(quality)
  return { type, quality: value >= 0 && value <= 1 ? value : 0 }
}

/** The quality of the most specific range that covers a type: exact, then `text/*`, then any. */
function weight(type: string, ranges: readonly MediaRange[]): number {
  const family = `${type.slice(0, type.indexOf('/'))}/*`
  // GeoJSON is JSON, so a caller that asks for JSON alone is served by it.
  const parent = type.endsWith('+json') ? 'application/json' : type
  for (const covering of [type, parent, family, '*/*']) {
    const found = ranges.find((range) => range.type === covering)
    if (found) return found.quality
  }
  return 0
}
