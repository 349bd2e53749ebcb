import type { Segment, Station } from '../domain/segment.ts'

/** Index of the last station at or before a chainage, seen in their order, which may fall; -1 before all of them. */
function indexAt(stations: readonly Station[], chainage: number): number {
  const sign = (stations.at(-1)?.chainage ?? 0) < (stations[0]?.chainage ?? 0) ? -1 : 1
  let [low, high] = [-1, stations.length]
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (sign * (stations[middle]?.chainage ?? Infinity) <= sign * chainage) low = middle
    else high = middle
  }
  return low
}

/**
 * The water at a chainage: depth and both distances linear between the stations of a segment, the shape that of the
 * nearer one. Before the first, after the last and with a single station that one as it is.
 *
 * @param stations  n ≥ 1, chainage rising or falling strictly; only a single one may be without
 * @param chainage  m
 */
export function stationAt({ stations }: Pick<Segment, 'stations'>, chainage: number): Station {
  if (stations.length === 1) return stations[0]
  const i = indexAt(stations, chainage)
  if (i < 0) return stations[0]
  const a = stations[i] as Station
  const b = stations[i + 1]
  if (!b) return a
  const [from = 0, to = 0] = [a.chainage, b.chainage]
  const share = (chainage - from) / (to - from)
  const at = (start: number, end: number) => start + share * (end - start)
  const first = at(a.distances[0], b.distances[0])
  const second = at(a.distances[1], b.distances[1])
  const nearer = share < 0.5 ? a : b
  return {
    index: nearer.index,
    chainage,
    depth: at(a.depth, b.depth),
    width: first + second,
    distances: [first, second],
    shape: nearer.shape,
  }
}
