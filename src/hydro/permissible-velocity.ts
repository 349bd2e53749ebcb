/** Mean depths of the columns of the table, m (1.3, 3.3, 6.6 and 9.8 ft in print). */
const DEPTHS = [0.4, 1, 2, 3] as const

/** Permissible velocities at those depths, m/s: Keown et al. (1977), printed in ft/s, rounded to 0.01 m/s here. */
const VELOCITIES = {
  'fine-sand': [0.3, 0.4, 0.49, 0.55], // 0.125 to 0.25 mm
  'medium-sand': [0.37, 0.46, 0.55, 0.61], // 0.25 to 0.5 mm
  'coarse-sand': [0.46, 0.55, 0.64, 0.7], // 0.5 to 1 mm
  'very-coarse-sand': [0.55, 0.64, 0.73, 0.82], // 1 to 2 mm
  'very-fine-gravel': [0.67, 0.76, 0.85, 0.94], // 2 to 4 mm
  'fine-gravel': [0.79, 0.91, 1.01, 1.16], // 4 to 8 mm
  'medium-gravel': [1.01, 1.13, 1.25, 1.4], // 8 to 16 mm
  'coarse-gravel': [1.25, 1.43, 1.65, 1.86], // 16 to 32 mm
  'very-coarse-gravel': [1.58, 1.89, 2.19, 2.5], // 32 to 64 mm
  'small-cobbles': [2.29, 2.71, 3.11, 3.41], // 64 to 128 mm
  'sandy-loam': [0.94, 1.19, 1.4, 1.49], // light (compact); the heavy one is 1.01 at 0.4 m and alike elsewhere
  loess: [0.79, 1.01, 1.19, 1.31], // settled
} as const satisfies Record<string, readonly [number, number, number, number]>

/** Bed material that the table knows. */
export type BedMaterial = keyof typeof VELOCITIES

/**
 * Mean velocity that a bed bears for long without being moved.
 *
 *   table by material, linear in depth between 0.4, 1, 2 and 3 m
 *
 * @param material  kind of bed
 * @param depth  mean depth, m, > 0
 * @returns velocity, m/s, > 0; below 0.4 m and above 3 m the value of that end of the table
 * @holds 0.4 to 3 m; steady, depth-mean flow of long duration, against which a ship's return current is short. Interpolation
 *   between the columns and the constant ends are our own choice
 * @error the print has two digits, 0.005 m/s after conversion
 * @source Keown et al. (1977), reprinted as Table 3.5 of a river-engineering manual of the US Federal Highway Administration
 * @example permissibleVelocity('fine-sand', 1.5) // 0.445
 */
export function permissibleVelocity(material: BedMaterial, depth: number): number {
  const [v0, v1, v2, v3] = VELOCITIES[material]
  const [d0, d1, d2, d3] = DEPTHS
  if (depth < d1) return between(Math.max(depth, d0), d0, d1, v0, v1)
  if (depth < d2) return between(depth, d1, d2, v1, v2)
  return between(Math.min(depth, d3), d2, d3, v2, v3)
}

/** Straight line through (x0, y0) and (x1, y1) at x. */
function between(x: number, x0: number, x1: number, y0: number, y1: number): number {
  return y0 + ((x - x0) / (x1 - x0)) * (y1 - y0)
}
