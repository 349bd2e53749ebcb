import type { FaultItem } from '../domain/fault.ts'

/** Names of the reference of GeoJSON, longitude before latitude on WGS 84, as tools write them. */
const CRS84 = 'urn:ogc:def:crs:OGC:1.3:CRS84'
const NAMES: ReadonlySet<string> = new Set(
  [CRS84, 'urn:ogc:def:crs:OGC::CRS84', 'OGC:CRS84', 'http://www.opengis.net/def/crs/OGC/1.3/CRS84'].map(
    (name) => name.toLowerCase(),
  ),
)

/** EPSG:4326 in any of its spellings: the same datum, and no word on which axis comes first. */
const EPSG_4326 =
  /^(?:urn:ogc:def:crs:epsg:[^:]*:|epsg:|https?:\/\/www\.opengis\.net\/def\/crs\/epsg\/[^/]*\/)4326$/i

function nameOf(crs: unknown): string | undefined {
  const { properties } = (crs ?? {}) as { properties?: { name?: unknown } | null }
  const name = properties?.name
  return typeof name === 'string' ? name : undefined
}

function detailOf(name: string | undefined): string {
  if (name === undefined) {
    return 'is no longer part of GeoJSON, and names no reference here: leave it out and give [longitude, latitude] of WGS 84'
  }
  if (EPSG_4326.test(name)) {
    return `names ${name}, in which some tools write latitude first: make sure that positions are [longitude, latitude], then leave it out`
  }
  return `names ${name}: transform the positions to [longitude, latitude] of WGS 84 and leave it out`
}

/**
 * Refuses a `crs` member, which GeoJSON had before RFC 7946, unless it names what GeoJSON means anyway.
 *
 * @param holder  a collection, a feature or a geometry
 * @param at      pointer to it
 */
export function crsItems(holder: object, at: string): FaultItem[] {
  if (!('crs' in holder)) return []
  const name = nameOf(holder.crs)
  if (name !== undefined && NAMES.has(name.toLowerCase())) return []
  return [{ pointer: `${at}/crs`, code: 'not-in-list', detail: detailOf(name), allowed: [CRS84] }]
}
