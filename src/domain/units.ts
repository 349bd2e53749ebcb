/** Metres per second in one international knot: 1852 m in an hour, exactly (BIPM, SI Brochure, table of non-SI units). */
export const KNOT = 1852 / 3600

/** Metres per second in one kilometre per hour. */
export const KILOMETRE_PER_HOUR = 1 / 3.6

/** Metres per second in one statute mile per hour: 1609.344 m in an hour, exactly (international foot of 0.3048 m). */
export const MILE_PER_HOUR = 1609.344 / 3600

/** Units a speed limit sign is written in, in metres per second. */
export const SIGN_UNITS = { 'km/h': KILOMETRE_PER_HOUR, kn: KNOT, mph: MILE_PER_HOUR } as const

export type SignUnit = keyof typeof SIGN_UNITS

export const fromKnots = (knots: number): number => knots * KNOT
export const fromKmh = (kmh: number): number => kmh / 3.6
export const toKnots = (speed: number): number => speed / KNOT
export const toKmh = (speed: number): number => speed * 3.6
