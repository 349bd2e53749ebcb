/** A position, degrees on WGS 84, in GeoJSON order. */
export type LonLat = readonly [lon: number, lat: number]

/** West, south, east, north, degrees; west above east crosses the antimeridian. */
export type BoundingBox = readonly [west: number, south: number, east: number, north: number]
