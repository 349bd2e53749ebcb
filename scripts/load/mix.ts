import { readFileSync } from 'node:fs'
import { rawRequest } from './raw-client.ts'

/** A kind of request in the mix, and what it must be answered with. */
export interface Kind {
  readonly name: string
  /** share of the mix */
  readonly weight: number
  readonly request: Buffer
  /** the only status beside 503 */
  readonly status: number
}

const SHORT = JSON.stringify({
  segment: { depth_m: 4, width_m: 55, bank_distance_m: 27.5 },
  vessel: { class: 'cemt-va', draught_m: 2.8 },
})
const AMBITIOUS = JSON.stringify({
  ...(JSON.parse(SHORT) as object),
  speed_kmh: 9,
  speed_reference: 'through-water',
})
const LOG = readFileSync(new URL('../../openapi/examples/harrowmere-passages.csv', import.meta.url), 'utf8')
  .split('\n')
  .slice(0, 60)
  .join('\n')

/** Ordinary requests in ordinary numbers, with some that no one should send. */
export const MIX: readonly Kind[] = [
  { name: 'short advisory', weight: 0.8, request: rawRequest('POST', '/v1/advisories', SHORT), status: 200 },
  { name: 'effects', weight: 0.05, request: rawRequest('POST', '/v1/effects', AMBITIOUS), status: 200 },
  {
    name: 'advisory of a segment',
    weight: 0.06,
    request: rawRequest('GET', '/v1/segments/harrow-long-pound/advisory?vessel_class=cemt-iv'),
    status: 200,
  },
  { name: 'list', weight: 0.02, request: rawRequest('GET', '/v1/segments?limit=5'), status: 200 },
  {
    name: 'layer',
    weight: 0.005,
    request: rawRequest('GET', '/v1/advisories.geojson?vessel_class=cemt-iv'),
    status: 200,
  },
  {
    name: 'junk',
    weight: 0.03,
    request: rawRequest('POST', '/v1/advisories', '{"segment":{"depth'),
    status: 400,
  },
  {
    name: 'nonsense',
    weight: 0.02,
    request: rawRequest('POST', '/v1/advisories', '{"segment":{"depth_m":-4},"vessel":[],"__proto__":{}}'),
    status: 400,
  },
  { name: 'lost', weight: 0.015, request: rawRequest('GET', '/wp-login.php'), status: 404 },
]

/** Kinds whose replies are streams, by path: sent by a client that reads them as they come. */
export const STREAMS = [
  {
    name: 'small stream',
    path: '/v1/advisories/stream?detail=compact',
    type: 'application/x-ndjson',
    body: `${SHORT}\n`.repeat(20),
    lines: 20,
  },
  { name: 'small log', path: '/v1/passages/check', type: 'text/csv', body: LOG, lines: undefined },
] as const

export const SHORT_LINE = `${SHORT}\n`

/** The kind at a place from 0 to 1 of the mix. */
export function kindAt(place: number): Kind {
  let left = place * MIX.reduce((sum, { weight }) => sum + weight, 0)
  for (const kind of MIX) {
    left -= kind.weight
    if (left < 0) return kind
  }
  return MIX[0] as Kind
}
