import { readFileSync } from 'node:fs'
import type { LonLat } from '../../src/domain/position.ts'
import { geodesicAzimuth, geodesicEnd, geodesicLength } from '../../tests/support/geodesic.ts'

const FILE = new URL('../../openapi/examples/harrowmere-navigation.geojson', import.meta.url)
const RADIANS = Math.PI / 180

type Profile = readonly (readonly [offset: number, bedDepth: number])[]
type BankOfFile = Readonly<Record<string, unknown>> & { readonly distance_m?: number }

/** What the file of the waterway says of a segment, as far as a truth needs it. */
export interface Properties {
  readonly chainage_from_m: number
  readonly chainage_to_m: number
  readonly width_m?: number
  readonly bank_distance_m?: number
  readonly bank_kind?: string
  readonly banks?: { readonly left: BankOfFile; readonly right: BankOfFile }
  readonly cross_section?: { readonly profile?: Profile }
  readonly receptors?: readonly {
    readonly side: 'left' | 'right'
    readonly distance_m: number
    readonly [more: string]: unknown
  }[]
}

/** A segment and its sailing line, measured by geodesics. */
export interface Reach {
  readonly id: string
  readonly line: readonly LonLat[]
  /** m along the line, of each vertex */
  readonly vertices: readonly number[]
  readonly length: number
  readonly properties: Properties
  /** sailing line to the left and the right waterline at the datum, m; undefined where no side is known */
  readonly banks: readonly [left: number, right: number] | undefined
}

/** Where the bed of a profile meets the datum, seen from offset 0 towards one end, m. */
function waterline(profile: Profile): number {
  for (let i = 1; i < profile.length; i += 1) {
    const [[inner, deep], [outer, shallow]] = [profile[i - 1]!, profile[i]!]
    if (deep > 0 && shallow <= 0) return Math.abs(inner + ((outer - inner) * deep) / (deep - shallow))
  }
  throw new Error('The profile does not reach the waterline')
}

function banksOf({ banks, width_m: width, bank_distance_m: nearer, cross_section: section }: Properties) {
  if (section?.profile) {
    const right = section.profile.filter(([offset]) => offset >= 0)
    const left = section.profile.filter(([offset]) => offset <= 0).toReversed()
    return [waterline(left), waterline(right)] as const
  }
  if (banks?.left.distance_m !== undefined && banks.right.distance_m !== undefined) {
    return [banks.left.distance_m, banks.right.distance_m] as const
  }
  // in mid-channel the nearer bank is either of the two
  return width !== undefined && nearer === width / 2 ? ([nearer, nearer] as const) : undefined
}

/** The segments of the invented waterway by their ids. */
export function readWaterway(): ReadonlyMap<string, Reach> {
  const { features } = JSON.parse(readFileSync(FILE, 'utf8')) as {
    features: { id: string; geometry: { coordinates: LonLat[] }; properties: Properties }[]
  }
  return new Map(
    features.map(({ id, geometry: { coordinates: line }, properties }) => {
      const vertices = [0]
      for (let i = 1; i < line.length; i += 1) {
        vertices.push(vertices[i - 1]! + geodesicLength(line[i - 1]!, line[i]!))
      }
      const length = vertices.at(-1)!
      return [id, { id, line, vertices, length, properties, banks: banksOf(properties) }]
    }),
  )
}

/** Index of the edge at a place, and how far along that edge it is, 0 to 1. */
function edgeAt({ vertices }: Reach, along: number): { edge: number; share: number } {
  const edge = Math.min(
    vertices.length - 2,
    Math.max(
      0,
      vertices.findLastIndex((vertex) => vertex <= along),
    ),
  )
  return { edge, share: (along - vertices[edge]!) / (vertices[edge + 1]! - vertices[edge]!) }
}

const on = ([lon0, lat0]: LonLat, [lon1, lat1]: LonLat, share: number): LonLat => [
  lon0 + (lon1 - lon0) * share,
  lat0 + (lat1 - lat0) * share,
]

/** A place of the sailing line and the azimuth of its edge there, degrees; edges are straight in lon and lat. */
export function sailingLineAt(reach: Reach, along: number): { position: LonLat; azimuth: number } {
  const { edge, share } = edgeAt(reach, along)
  const [from, to] = [reach.line[edge]!, reach.line[edge + 1]!]
  const position = on(from, to, share)
  // over a tenth of the edge its bend against the geodesic turns the azimuth by less than 1e-4 degrees
  return { position, azimuth: geodesicAzimuth(position, on(from, to, share + 0.1)) }
}

/** A position beside the sailing line: `offset` m to the right looking downstream. */
export function placeBeside(reach: Reach, along: number, offset: number): LonLat {
  const { position, azimuth } = sailingLineAt(reach, along)
  return offset === 0 ? position : geodesicEnd(position, azimuth + 90, offset).position
}

/**
 * Where a position truly is, once it was rounded.
 *
 * @param near  m along the sailing line, on the same edge and within some metres of the place
 */
export function measured(reach: Reach, near: number, position: LonLat): { along: number; offset: number } {
  const { position: foot, azimuth } = sailingLineAt(reach, near)
  const distance = geodesicLength(foot, position)
  const turn = (distance === 0 ? 0 : geodesicAzimuth(foot, position) - azimuth) * RADIANS
  return { along: near + distance * Math.cos(turn), offset: distance * Math.sin(turn) }
}

/** Chainage of a place of the sailing line, m: in proportion. */
export function chainageAt({ length, properties }: Reach, along: number): number {
  const { chainage_from_m: from, chainage_to_m: to } = properties
  return from + (along / length) * (to - from)
}

/** Least distance from the ends of a segment, m, and from a bend in offsets and m, where a place has one true foot. */
const FROM_ENDS = 80
const FROM_BENDS = { offsets: 1.5, least: 5 }

export const isWithin = ({ length }: Reach, along: number): boolean =>
  along >= FROM_ENDS && along <= length - FROM_ENDS

export function isClearOfBends({ vertices }: Reach, along: number, offset: number): boolean {
  const least = Math.max(FROM_BENDS.least, FROM_BENDS.offsets * Math.abs(offset))
  return vertices.every((vertex) => Math.abs(vertex - along) >= least)
}
