import geographiclib from 'geographiclib-geodesic'
import type { LonLat } from '../../src/domain/position.ts'

const { WGS84 } = geographiclib.Geodesic

/** Length of the geodesic, m, by Karney's algorithms: independent of the code under test. */
export function geodesicLength(a: LonLat, b: LonLat): number {
  return WGS84.Inverse(a[1], a[0], b[1], b[0]).s12!
}

/** Azimuth of the geodesic at its start, degrees clockwise from north. */
export function geodesicAzimuth(a: LonLat, b: LonLat): number {
  return WGS84.Inverse(a[1], a[0], b[1], b[0]).azi1!
}

/** Where a geodesic leads: the position and the azimuth there. */
export function geodesicEnd(
  from: LonLat,
  azimuth: number,
  distance: number,
): { position: LonLat; azimuth: number } {
  const { lat2, lon2, azi2 } = WGS84.Direct(from[1], from[0], azimuth, distance)
  return { position: [lon2!, lat2!], azimuth: azi2! }
}

/** A stretch of a made-up channel: m, and the radius of its axis, m, positive to the right; none: straight. */
export interface Stretch {
  readonly length: number
  readonly radius?: number
}

/** A channel whose banks are known exactly: each triple lies on one true normal of the axis. */
export interface Channel {
  readonly axis: LonLat[]
  readonly left: LonLat[]
  readonly right: LonLat[]
  /** distance of each triple along the axis, m */
  readonly along: number[]
}

/** Distances to the banks at a place along the axis, m. */
export type Offsets = (along: number) => readonly [left: number, right: number]

/**
 * Makes a channel of straight reaches and circular arcs by geodesics only.
 *
 * @param step  most between two triples, m; at bends a share of the radius keeps the chords close
 */
export function makeChannel(
  start: LonLat,
  heading: number,
  stretches: readonly Stretch[],
  offsets: Offsets,
  step = { length: 50, shareOfRadius: 1 / 40 },
): Channel {
  const channel: Channel = { axis: [], left: [], right: [], along: [] }
  const add = (position: LonLat, azimuth: number, along: number) => {
    const [left, right] = offsets(along)
    channel.axis.push(position)
    channel.left.push(geodesicEnd(position, azimuth - 90, left).position)
    channel.right.push(geodesicEnd(position, azimuth + 90, right).position)
    channel.along.push(along)
  }
  let [position, azimuth, along] = [start, heading, 0]
  add(position, azimuth, along)
  for (const { length, radius } of stretches) {
    const most = radius === undefined ? step.length : Math.abs(radius) * step.shareOfRadius
    const pieces = Math.ceil(length / most)
    const hand = Math.sign(radius ?? 1)
    const centre =
      radius === undefined ? null : geodesicEnd(position, azimuth + 90 * hand, Math.abs(radius)).position
    const outward = centre && geodesicAzimuth(centre, position)
    const [from, fromAzimuth] = [position, azimuth]
    for (let i = 1; i <= pieces; i++) {
      const done = (i / pieces) * length
      if (centre && outward !== null && radius !== undefined) {
        const turned = (done / radius) * (180 / Math.PI)
        const end = geodesicEnd(centre, outward + turned, Math.abs(radius))
        position = end.position
        azimuth = end.azimuth + 90 * hand
      } else {
        const end = geodesicEnd(from, fromAzimuth, done)
        position = end.position
        azimuth = end.azimuth
      }
      add(position, azimuth, along + done)
    }
    along += length
  }
  return channel
}
