import type { Situation } from '../advisory/situation.ts'

/** Offset from the sailing line and depth below the water level, m; positive to the right. */
export type BedPoint = readonly [offset: number, depth: number]

export interface Outline {
  /** the bed with dry land at both ends */
  readonly points: readonly BedPoint[]
  /** the wetted part, closed by the water level */
  readonly wet: readonly BedPoint[]
  readonly left: number
  readonly right: number
  /** m below the water level */
  readonly deepest: number
}

/** The surveyed profile, cut a little above the water, walls where it ends under water. */
function profileOutline({ section, station, conditions }: Situation): Outline {
  const { shape } = station
  if (shape.kind !== 'profile') throw new RangeError('A profile was looked for before')
  const [a, b] = section.distances
  const bed = shape.offsets.map((offset, i): BedPoint => [
    offset,
    (shape.bedDepths[i] ?? 0) + conditions.waterLevel,
  ])
  const deepest = Math.max(...bed.map(([, depth]) => depth), section.depth)
  const rim = 0.16 * deepest
  const margin = 0.06 * (a + b)
  const kept = bed.filter(([offset]) => offset > -a - margin && offset < b + margin)
  const wetBed = bed.filter(([offset]) => offset > -a && offset < b)
  const above = kept.map(([offset, depth]): BedPoint => [offset, Math.max(depth, -rim)])
  const first: BedPoint = [-a - margin, edgeDepth(bed, -a - margin, rim)]
  const last: BedPoint = [b + margin, edgeDepth(bed, b + margin, rim)]
  const walls = wallsOf(bed, rim)
  const points = [first, ...walls.left, ...above, ...walls.right, last]
  return {
    points,
    wet: [[-a, 0], ...wetBed.map(([offset, depth]): BedPoint => [offset, Math.max(0, depth)]), [b, 0]],
    left: -a - margin,
    right: b + margin,
    deepest,
  }
}

/** A profile that ends under water is closed by walls there. */
function wallsOf(bed: readonly BedPoint[], rim: number): { left: BedPoint[]; right: BedPoint[] } {
  const first = bed[0]
  const last = bed.at(-1)
  return {
    left: first && first[1] > 0 ? [[first[0], -rim]] : [],
    right: last && last[1] > 0 ? [[last[0], -rim]] : [],
  }
}

/** Depth at a place of the profile that lies between points, cut at the rim; beyond its ends the land. */
function edgeDepth(bed: readonly BedPoint[], offset: number, rim: number): number {
  const next = bed.findIndex(([x]) => x >= offset)
  const before = bed[next - 1]
  const after = bed[next]
  if (!before || !after) return -rim
  const share = (offset - before[0]) / (after[0] - before[0])
  return Math.max(-rim, before[1] * (1 - share) + after[1] * share)
}

/** The trapezoid that area and mean depth are taken from. */
function trapezoidOutline({ section }: Situation): Outline {
  const [a, b] = section.distances
  const [left, right] = section.slopes ?? [0, 0]
  const { depth } = section
  const rim = 0.16 * depth
  const margin = 0.06 * (a + b)
  const points: BedPoint[] = [
    [-a - margin, -rim],
    [Math.max(-a - left * rim, -a - margin), -rim],
    [-a + left * depth, depth],
    [b - right * depth, depth],
    [Math.min(b + right * rim, b + margin), -rim],
    [b + margin, -rim],
  ]
  return {
    points,
    wet: [
      [-a, 0],
      [-a + left * depth, depth],
      [b - right * depth, depth],
      [b, 0],
    ],
    left: -a - margin,
    right: b + margin,
    deepest: depth,
  }
}

/** The bed of a situation's section as points to draw. */
export function sectionOutline(situation: Situation): Outline {
  return situation.station.shape.kind === 'profile' ? profileOutline(situation) : trapezoidOutline(situation)
}

/** Depths of the bed right under a hull, left edge to right edge, m below the water level. */
export function bedUnder(situation: Situation, half: number): BedPoint[] {
  const { wet } = sectionOutline(situation)
  const points: BedPoint[] = []
  const depthAt = (offset: number): number => {
    const next = wet.findIndex(([x]) => x >= offset)
    const before = wet[next - 1]
    const after = wet[next]
    if (!before || !after) return 0
    const run = after[0] - before[0]
    return run === 0 ? after[1] : before[1] + ((after[1] - before[1]) * (offset - before[0])) / run
  }
  points.push([-half, depthAt(-half)])
  for (const point of wet) if (Math.abs(point[0]) < half) points.push(point)
  points.push([half, depthAt(half)])
  return points
}
