import type { Bank, Segment, Station } from '../domain/segment.ts'
import { profileSection, slopeScale, trapezoidArea, type WettedSection } from '../hydro/section.ts'

/** n of natural banks and riprap where nothing else is known, horizontal over vertical (common practice). */
export const NATURAL_SLOPE = 3

/** A station's wetted section at a water level, with the slopes it was made from. */
export interface StationSection extends WettedSection {
  /** n by bank; null with a surveyed profile */
  readonly slopes: readonly [number, number] | null
  /** whether the slopes were reduced so that the bottom keeps a quarter of the width */
  readonly isSlopeReduced: boolean
}

/** n of a bank before any reduction. */
export function slopeOf(bank: Bank, station: Station): number {
  const ofShape = station.shape.kind === 'trapezoid' ? station.shape.slope : undefined
  return bank.slope ?? ofShape ?? (bank.kind === 'wall' ? 0 : NATURAL_SLOPE)
}

/** n of both banks that give a bottom width, in proportion to what the banks would have otherwise. */
function slopesOfBottom(slopes: readonly [number, number], run: number, depth: number): [number, number] {
  const sum = slopes[0] + slopes[1]
  const share = sum > 0 ? slopes[0] / sum : 0.5
  return [(share * run) / depth, ((1 - share) * run) / depth]
}

/**
 * The wetted section at a station.
 *
 * @param segment  its banks give the slopes of an assumed trapezoid
 * @param level    water level above the datum, m
 * @returns area m², width m, distances m, depth m; depth ≤ 0 when the sailing line is dry
 */
export function sectionOf(segment: Segment, station: Station, level: number): StationSection {
  const { shape } = station
  if (shape.kind === 'profile') {
    return { ...profileSection(shape.offsets, shape.bedDepths, level), slopes: null, isSlopeReduced: false }
  }
  const own: [number, number] = [slopeOf(segment.banks[0], station), slopeOf(segment.banks[1], station)]
  const scale =
    shape.bottomWidth === undefined ? slopeScale(station.width, station.depth, own[0] + own[1]) : 1
  const slopes: [number, number] =
    shape.bottomWidth === undefined
      ? [own[0] * scale, own[1] * scale]
      : slopesOfBottom(own, station.width - shape.bottomWidth, station.depth)
  const depth = station.depth + level
  const sum = slopes[0] + slopes[1]
  const width = station.width + sum * level
  return {
    area: trapezoidArea(width, depth, sum),
    width,
    distances: [station.distances[0] + slopes[0] * level, station.distances[1] + slopes[1] * level],
    depth,
    slopes,
    isSlopeReduced: scale < 1,
  }
}

/** Depth at the sailing line, width and distances of a surveyed profile at the datum, m; all zero when it is dry. */
export function profileExtent(
  offsets: readonly number[],
  bedDepths: readonly number[],
): Pick<Station, 'depth' | 'width' | 'distances'> {
  const { depth, width, distances } = profileSection(offsets, bedDepths, 0)
  return { depth, width, distances }
}
