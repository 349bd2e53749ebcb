import type { Advisory } from '../advisory/advise.ts'
import type { LonLat } from '../domain/position.ts'
import type { SegmentRecord } from '../store/registry.ts'
import { WIDTHS, type Point, type Size } from './chart.ts'
import { extentOf, fitPlane, offsetLine, planeAbout, thinned } from './plan-geometry.ts'

/** The plan as points on the drawing. */
export interface Sketch {
  readonly line: readonly Point[]
  readonly left: readonly Point[]
  readonly right: readonly Point[]
  readonly height: number
  readonly pxPerMetre: number
  /** across the sailing line, where widths are drawn too large to be seen at all */
  readonly pxPerMetreAcross: number
  readonly exaggeration: number
  readonly chainageFrom: number
  readonly chainageTo: number
  /** px from the sailing line to bank 0 or 1 at a share of the length */
  readonly reach: (share: number, bank: 0 | 1) => number
}

/** Times that widths may be drawn too large. */
const EXAGGERATIONS = [1, 2, 3, 5, 10, 20, 50, 100, 200, 500, 1000] as const

/** Width that the water takes at least, px. */
const LEAST_WIDTH = 9

const numberAt = (record: SegmentRecord, name: string): number | undefined => {
  const value = record.properties[name]
  return typeof value === 'number' ? value : undefined
}

/** Where a chainage lies on the sailing line, 0 to 1; undefined without one. */
export function shareOf(
  { chainageFrom, chainageTo }: Pick<Sketch, 'chainageFrom' | 'chainageTo'>,
  chainage: number | undefined,
): number | undefined {
  if (chainage === undefined || chainageFrom === chainageTo) return undefined
  return Math.min(1, Math.max(0, (chainage - chainageFrom) / (chainageTo - chainageFrom)))
}

const isPosition = (value: unknown): value is LonLat =>
  Array.isArray(value) && value.length >= 2 && value.slice(0, 2).every(Number.isFinite)

/** The line of a bank, where the registry holds one: a list of positions or a LineString. */
function bankLine(record: SegmentRecord, side: 'left' | 'right'): readonly LonLat[] | undefined {
  const banks = record.properties.banks as Partial<Record<string, { line?: unknown }>> | undefined
  const given = banks?.[side]?.line
  const list =
    typeof given === 'object' && given !== null && 'coordinates' in given ? given.coordinates : given
  return Array.isArray(list) && list.length >= 2 && list.every(isPosition) ? list : undefined
}

/** Distances of the banks along the segment, m, straight between the stations. */
function distancesAlong(
  advisory: Advisory,
  ends: Pick<Sketch, 'chainageFrom' | 'chainageTo'>,
): (share: number, bank: 0 | 1) => number {
  const { segment } = advisory.decision.situation
  const known = segment.stations
    .map((station) => ({ share: shareOf(ends, station.chainage) ?? 0, distances: station.distances }))
    .sort((a, b) => a.share - b.share)
  return (share, bank) => {
    const next = known.findIndex((station) => station.share >= share)
    const after = known[next] ?? known.at(-1)
    const before = known[next - 1] ?? after
    if (!before || !after) return 0
    const run = after.share - before.share
    const t = run === 0 ? 0 : (share - before.share) / run
    return before.distances[bank] * (1 - t) + after.distances[bank] * t
  }
}

/** The sailing line with its banks, fitted into a drawing of a size. */
export function sketchOf(record: SegmentRecord, advisory: Advisory, size: Size): Sketch {
  const plane = planeAbout(record.line[0] ?? [0, 0])
  const given = [bankLine(record, 'left'), bankLine(record, 'right')] as const
  const places = [...record.line, ...(given[0] ?? []), ...(given[1] ?? [])].map(plane)
  const ends = {
    chainageFrom: numberAt(record, 'chainage_from_m') ?? 0,
    chainageTo: numberAt(record, 'chainage_to_m') ?? record.length,
  }
  const distance = distancesAlong(advisory, ends)
  const widest = distance(0.5, 0) + distance(0.5, 1)
  const around = Math.max(...advisory.decision.situation.segment.stations.map(({ width }) => width))
  const extent = extentOf(places)
  const room = Math.min(around, Math.max(extent.east - extent.west, extent.north - extent.south))
  const wide = {
    west: extent.west - room / 2,
    east: extent.east + room / 2,
    south: extent.south - room / 2,
    north: extent.north + room / 2,
  }
  const bounds: [number, number] = size === 'wide' ? [170, 320] : [190, 330]
  const fitted = fitPlane(wide, WIDTHS[size], bounds, size === 'wide' ? 54 : 44)
  const line = thinned(
    record.line.map((position) => fitted.toPoint(plane(position))),
    1,
  )
  const hasBoth = given[0] !== undefined && given[1] !== undefined
  const exaggeration = hasBoth
    ? 1
    : (EXAGGERATIONS.find((factor) => factor * widest * fitted.scale >= LEAST_WIDTH) ?? 1000)
  const pxPerMetreAcross = fitted.scale * exaggeration
  const reach = (share: number, bank: 0 | 1): number => distance(share, bank) * pxPerMetreAcross
  const bank = (index: 0 | 1): Point[] => {
    const own = given[index]
    if (own && hasBoth)
      return thinned(
        own.map((position) => fitted.toPoint(plane(position))),
        1,
      )
    return offsetLine(line, (share) => (index === 0 ? -1 : 1) * reach(share, index))
  }
  return {
    line,
    left: bank(0),
    right: bank(1),
    height: fitted.height,
    pxPerMetre: fitted.scale,
    pxPerMetreAcross,
    exaggeration,
    ...ends,
    reach,
  }
}
