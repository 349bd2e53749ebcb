import type { SectionShape } from '../domain/segment.ts'
import type { BankStation } from './banks.ts'
import type { ChainageScale } from './chainage-scale.ts'
import { interpolate, type Sample } from './interpolate.ts'
import type { Tolerances } from './thin.ts'

/** A station as it is given, its figures complete: m at the datum. */
export interface GivenStation {
  /** m along the waterway */
  readonly chainage: number
  readonly depth: number
  /** to the waterlines, in the order of the segment's banks */
  readonly distances: readonly [number, number]
  /** whether it is known which distance is on which side; default true */
  readonly hasSides?: boolean
  /** its own cross-section, if it has one */
  readonly shape?: SectionShape
}

/** Figures that hold all along a segment, m; each takes the place of those of the stations. */
export interface SingleFigures {
  readonly depth?: number
  /** undefined for a bank whose distance is known otherwise */
  readonly distances?: readonly [number | undefined, number | undefined]
}

export interface StationSources {
  /** n ≥ 0, in any order of chainage */
  readonly given: readonly GivenStation[]
  readonly single: SingleFigures
  /** n ≥ 0, along rising */
  readonly banks: readonly BankStation[]
  /** of stations without their own */
  readonly shape: SectionShape
  readonly scale: Pick<ChainageScale, 'chainageAt' | 'distanceAt'>
  /** of the sailing line, m */
  readonly length: number
  /** places where a station is wanted, m along the line; none is made where the whole segment is one section */
  readonly wanted?: readonly number[]
  /** what may be lost by leaving a station out, m; default 0.01 in depth and 0.1 in each distance */
  readonly tolerances?: Tolerances
}

/** Places closer than this, m, are one station. */
export const SAME_STATION = 0.01

/** A given station by its place along the sailing line. */
export interface Placed extends GivenStation {
  readonly along: number
}

export type Figures = readonly [depth: number, first: number, second: number]

/** One station where several are given at a place: the last, as in the order of the request. */
export function placedStations({ given, scale }: StationSources): Placed[] {
  const placed = given.map((station): Placed => ({ ...station, along: scale.distanceAt(station.chainage) }))
  const sorted = placed.toSorted((a, b) => a.along - b.along)
  return sorted.filter((station, i) => (sorted[i + 1]?.along ?? Infinity) - station.along > SAME_STATION)
}

/** Distances at a place: from the bank lines where there are any, else single figures, else the stations. */
function distanceSamples(sources: StationSources, placed: readonly Placed[], bank: 0 | 1): Sample[] {
  const side = bank === 0 ? 'left' : 'right'
  const ofLines = sources.banks.flatMap(({ along, ...station }) => {
    const found = station[side]
    return found ? [{ along, value: found.distance }] : []
  })
  if (ofLines.length > 0) return ofLines
  const single = sources.single.distances?.[bank]
  if (single !== undefined) return [{ along: 0, value: single }]
  return placed.map(({ along, distances }) => ({ along, value: distances[bank] }))
}

function depthSamples({ single }: StationSources, placed: readonly Placed[]): Sample[] {
  if (single.depth !== undefined) return [{ along: 0, value: single.depth }]
  return placed.map(({ along, depth }) => ({ along, value: depth }))
}

/** Depth and distances anywhere along the line, straight between what is known. */
export function figuresAlong(sources: StationSources, placed: readonly Placed[]): (along: number) => Figures {
  const samples = [
    depthSamples(sources, placed),
    distanceSamples(sources, placed, 0),
    distanceSamples(sources, placed, 1),
  ] as const
  if (samples.some(({ length }) => length === 0)) {
    throw new RangeError('Depth and both distances need a station, a bank line or a single figure each')
  }
  const [depth, first, second] = samples
  return (along) => [interpolate(depth, along), interpolate(first, along), interpolate(second, along)]
}

/** Straight between two trapezoids that are described in the same way; undefined for others. */
function between(a: SectionShape, b: SectionShape, share: number): SectionShape | undefined {
  if (a.kind === 'profile' || b.kind === 'profile') return undefined
  const mixed = (from: number, to: number) => from + share * (to - from)
  if (a.bottomWidth !== undefined && b.bottomWidth !== undefined) {
    return { kind: 'trapezoid', bottomWidth: mixed(a.bottomWidth, b.bottomWidth) }
  }
  if (a.slope !== undefined && b.slope !== undefined) {
    return { kind: 'trapezoid', slope: mixed(a.slope, b.slope) }
  }
  return undefined
}

/** The given stations before and after a place, where there are any. */
function neighbours(
  placed: readonly Placed[],
  along: number,
): readonly [Placed | undefined, Placed | undefined] {
  const next = placed.findIndex((station) => station.along > along)
  return next < 0 ? [placed.at(-1), undefined] : [placed[next - 1], placed[next]]
}

/** The cross-section between given stations: straight between theirs where they are alike, else the segment's. */
export function shapeBetween(
  sources: StationSources,
  placed: readonly Placed[],
  along: number,
): SectionShape {
  const [a, b] = neighbours(placed, along)
  if (!a || !b) return sources.shape
  const share = (along - a.along) / (b.along - a.along)
  return between(a.shape ?? sources.shape, b.shape ?? sources.shape, share) ?? sources.shape
}

/** Whether a surveyed profile is next to a place: it is a whole section, and nothing is straight beside it. */
export const isBesideProfile = (placed: readonly Placed[], along: number): boolean =>
  neighbours(placed, along).some((station) => station?.shape?.kind === 'profile')
