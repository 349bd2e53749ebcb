/** Wetted section at a water level. */
export interface WettedSection {
  /** A_c, m², > 0 */
  area: number
  /** b_w, water surface, m, > 0 */
  width: number
  /** from the sailing line to each waterline, m */
  distances: [number, number]
  /** h, depth at the sailing line, m */
  depth: number
}

/** Share of the surface width that a bottom keeps at least, when slopes would meet (own choice). */
export const LEAST_BOTTOM_SHARE = 0.25

/**
 * Factor by which both side slopes shrink so that the bottom keeps a quarter of the surface width.
 *
 *   k = min(1, 0.75 b / ((n_L + n_R) h))
 *
 * @param width     b, surface width, m, > 0
 * @param depth     h, m, > 0
 * @param slopeSum  n_L + n_R, horizontal over vertical, ≥ 0
 * @returns k, 0 to 1
 * @holds assumed trapezoids, at the datum
 * @error own choice; exact within rounding
 * @source own choice
 * @example slopeScale(10, 4, 6) // 0.3125
 */
export function slopeScale(width: number, depth: number, slopeSum: number): number {
  const run = slopeSum * depth
  const available = (1 - LEAST_BOTTOM_SHARE) * width
  return run > available ? available / run : 1
}

/**
 * Wetted area of a trapezoid.
 *
 *   A_c = b h - (n_L + n_R) h²/2
 *
 * @param width     b, water surface, m, > 0
 * @param depth     h, m, > 0
 * @param slopeSum  n_L + n_R, ≥ 0, (n_L + n_R) h ≤ b
 * @returns A_c, m²
 * @holds plane slopes
 * @error exact within rounding
 * @source geometry
 * @example trapezoidArea(55, 4, 6) // 172
 */
export function trapezoidArea(width: number, depth: number, slopeSum: number): number {
  return width * depth - (slopeSum * depth * depth) / 2
}

/**
 * Wetted section of a surveyed profile: the pool that the sailing line lies in, islands and dry parts left out. Where
 * the profile ends under water, a vertical wall is taken there.
 *
 * @param offsets    n offsets from the sailing line, m, strictly rising, n ≥ 3, first ≤ 0 ≤ last
 * @param bedDepths  n bed depths below the datum, m
 * @param level      water level above the datum, m
 * @returns area m², width m, distances m to the left (negative offsets) and right waterline, depth m; all zero when
 *   the sailing line is dry
 * @holds a bed that is straight between the points
 * @error exact within rounding
 * @source geometry
 */
export function profileSection(
  offsets: readonly number[],
  bedDepths: readonly number[],
  level: number,
): WettedSection {
  const depth = depthAt(offsets, bedDepths, 0, level)
  if (!(depth > 0)) return { area: 0, width: 0, distances: [0, 0], depth: 0 }
  const left = poolSide(offsets, bedDepths, level, -1)
  const right = poolSide(offsets, bedDepths, level, 1)
  return {
    area: left.area + right.area,
    width: left.distance + right.distance,
    distances: [left.distance, right.distance],
    depth,
  }
}

/** Water depth at an offset, m, negative where the bed is dry; the end points hold beyond the ends. */
export function depthAt(
  offsets: readonly number[],
  bedDepths: readonly number[],
  offset: number,
  level: number,
): number {
  let next = 0
  while (next < offsets.length && (offsets[next] as number) < offset) next += 1
  if (next === 0) return (bedDepths[0] as number) + level
  if (next === offsets.length) return (bedDepths[next - 1] as number) + level
  const x0 = offsets[next - 1] as number
  const x1 = offsets[next] as number
  const share = (offset - x0) / (x1 - x0)
  return (bedDepths[next - 1] as number) * (1 - share) + (bedDepths[next] as number) * share + level
}

/** Walks from the sailing line outwards until the bed comes dry or the profile ends. */
function poolSide(
  offsets: readonly number[],
  bedDepths: readonly number[],
  level: number,
  direction: -1 | 1,
): { area: number; distance: number } {
  let x0 = 0
  let d0 = depthAt(offsets, bedDepths, 0, level)
  let area = 0
  const n = offsets.length
  for (let i = direction === 1 ? 0 : n - 1; i >= 0 && i < n; i += direction) {
    const x1 = (offsets[i] as number) * direction
    if (x1 <= x0) continue
    const d1 = (bedDepths[i] as number) + level
    if (d1 <= 0) {
      const reach = ((x1 - x0) * d0) / (d0 - d1)
      return { area: area + (reach * d0) / 2, distance: x0 + reach }
    }
    area += ((x1 - x0) * (d0 + d1)) / 2
    x0 = x1
    d0 = d1
  }
  return { area, distance: x0 }
}
