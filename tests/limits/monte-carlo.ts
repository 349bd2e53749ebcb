import { decide, type Decision } from '../../src/advisory/decide.ts'
import { DIRECTIONS, type Direction, type Segment, type Station } from '../../src/domain/segment.ts'
import type { Vessel } from '../../src/domain/vessel.ts'
import { ifPossible } from '../support/arbitraries.ts'
import { OPTIONS } from './studies.ts'

/**
 * Samples of a cell by plain random numbers and single decisions, with nothing of the sampling of a study: another
 * generator, normal numbers by another law, shifts written out, the wave height as a factor that a caller gives.
 */

/** xoshiro128** of Blackman & Vigna (2018), on [0, 1). */
function xoshiro(seed: number): () => number {
  const state = Uint32Array.from([seed, 0x243f6a88, 0x85a308d3, 0x13198a2e])
  const rotated = (x: number, by: number): number => (x << by) | (x >>> (32 - by))
  return () => {
    const result = Math.imul(rotated(Math.imul(state[1]!, 5), 7), 9) >>> 0
    const shifted = state[1]! << 9
    state[2]! ^= state[0]!
    state[3]! ^= state[1]!
    state[1]! ^= state[2]!
    state[0]! ^= state[3]!
    state[2]! ^= shifted
    state[3] = rotated(state[3]!, 11)
    return result / 2 ** 32
  }
}

/** A number with mean 0: normal with a standard deviation by Box & Muller (1958), or even within a half range. */
export type Scatter = { readonly sd: number } | { readonly half: number }

export interface Scatters {
  readonly depth?: Scatter
  readonly width?: Scatter
  readonly distance?: Scatter
  readonly draught?: Scatter
  readonly current?: Scatter
  readonly waveHeight?: Scatter
}

export interface Sampled {
  /** rising, m/s over the ground; 0 without a safe speed */
  readonly speeds: readonly number[]
  /** samples by governing criterion */
  readonly governed: ReadonlyMap<string, number>
}

interface Given {
  readonly segment: Segment
  /** the vessel of the cell at a draught */
  readonly vesselAt: (draught: number) => Vessel
  /** that is used without uncertainty, m */
  readonly draught: number
  readonly waterLevel: number
  readonly current: number
  /** null: one answer for both */
  readonly directions: readonly (Direction | null)[]
  readonly waveFactor: number
}

function stationWith(station: Station, deeper: number, wider: number, farther: number): Station {
  const { distances, shape, width } = station
  const [left, right] = [distances[0] + wider / 2, distances[1] + wider / 2]
  const isLeftNearer = distances[0] <= distances[1]
  // offsets are positive to the right of the sailing line: away from the left bank, all of them fall
  const moved = isLeftNearer ? farther : -farther
  return {
    ...station,
    depth: station.depth + deeper,
    width: width + wider,
    distances: isLeftNearer ? [left + farther, right - farther] : [left - farther, right + farther],
    shape:
      shape.kind === 'trapezoid'
        ? shape
        : {
            kind: 'profile',
            offsets: shape.offsets.map((offset) => (offset * (width + wider)) / width - moved),
            bedDepths: shape.bedDepths.map((bedDepth) => bedDepth + deeper),
          },
  }
}

const isPossible = ({ depth, width, distances }: Station, draught: number): boolean =>
  Math.min(depth, width, distances[0], distances[1], draught) > 0

/** The lower speed over ground of some decisions, 0 without a safe one, and what governs it. */
function lowestOf(decisions: readonly Decision[]): readonly [number, string] {
  const speeds = decisions.map(({ outcome, overGround }) => (outcome === 'no-safe-speed' ? 0 : overGround))
  const speed = Math.min(...speeds)
  return [speed, decisions[speeds.indexOf(speed)]!.governing.criterion.id]
}

/** n samples of one cell in each direction. */
export function monteCarlo(
  given: Given,
  scatters: Scatters,
  count: number,
  seed: number,
): readonly Sampled[] {
  const random = xoshiro(seed)
  const drawn = (scatter: Scatter | undefined): number => {
    if (!scatter) return 0
    if ('half' in scatter) return scatter.half * (2 * random() - 1)
    return scatter.sd * Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random())
  }
  const sampled = given.directions.map(() => ({
    speeds: [] as number[],
    governed: new Map<string, number>(),
  }))
  for (let i = 0; i < count; i += 1) {
    const [deeper, wider, farther] = [scatters.depth, scatters.width, scatters.distance].map(drawn)
    const draught = given.draught + drawn(scatters.draught)
    const current = given.current + drawn(scatters.current)
    const waveFactor = given.waveFactor * Math.exp(drawn(scatters.waveHeight))
    const [first, ...rest] = given.segment.stations.map((station) =>
      stationWith(station, deeper!, wider!, farther!),
    )
    const found = [first!, ...rest].every((station) => isPossible(station, draught))
      ? ifPossible(() =>
          decide(
            { ...given.segment, stations: [first!, ...rest] },
            given.vesselAt(draught),
            { waterLevel: given.waterLevel, current, isWaterLevelGiven: true, isCurrentGiven: true },
            { ...OPTIONS, waveFactor },
          ),
        )
      : undefined
    given.directions.forEach((direction, k) => {
      const { speeds, governed } = sampled[k]!
      if (!found) {
        speeds.push(0)
        return
      }
      const { main, byDirection } = found
      const asked = direction ? [direction] : DIRECTIONS
      const [speed, id] = lowestOf(asked.map((way) => byDirection?.[way] ?? main))
      speeds.push(speed)
      governed.set(id, (governed.get(id) ?? 0) + 1)
    })
  }
  for (const { speeds } of sampled) speeds.sort((a, b) => a - b)
  return sampled
}
