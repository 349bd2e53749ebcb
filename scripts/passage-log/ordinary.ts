import { KINDS, shipOf } from './fleet.ts'
import type { Random } from './random.ts'
import type { Leg } from './sail.ts'
import type { Planted } from './planted.ts'
import type { Reach } from './waterway.ts'

/** What vessels without a story do: kinds, the segments they pass downstream, and how far they keep off the line, m. */
const TRADES: readonly {
  readonly kind: keyof typeof KINDS
  readonly route: readonly string[]
  readonly offset: number
}[] = [
  { kind: 'cargo', route: ['harrow-upper-reach', 'harrow-alder-bend', 'harrow-town-reach'], offset: 5 },
  { kind: 'unknownCargo', route: ['harrow-long-pound'], offset: 12 },
  { kind: 'tripBoat', route: ['harrow-town-reach', 'harrow-long-pound'], offset: 6 },
  { kind: 'smallCargo', route: ['harrow-town-reach', 'harrow-long-pound'], offset: 8 },
  { kind: 'cruiser', route: ['harrow-head-cut', 'harrow-upper-reach'], offset: 4 },
  { kind: 'tow', route: ['harrow-tideway', 'harrow-docks'], offset: 25 },
  { kind: 'emptyCargo', route: ['harrow-upper-reach'], offset: 6 },
  { kind: 'yacht', route: ['harrow-tideway', 'harrow-docks'], offset: 40 },
  { kind: 'unknownTanker', route: ['harrow-tideway'], offset: 25 },
]

/** First of their identities and names. */
const FIRST = 1001
/** s from the first departure to the last. */
const SPREAD = 10 * 3600
/** m from the end of a segment at which a vessel is first heard. */
const ENTERED = 90

const hasTwoSides = ({ banks }: Reach): boolean => banks !== undefined

/** What is planted on a leg. Where no side is known a maximum is a matter of reading: nothing is. */
function plantedOn(kind: keyof typeof KINDS, reach: Reach, random: Random): Leg['phases'] {
  if (!hasTwoSides(reach) || random.between(0, 1) < 0.5) return []
  const isDoubtful = KINDS[kind].loadings.length > 1 && random.between(0, 1) < 0.5
  return [[isDoubtful ? 'depends-on-draught' : 'exceeds', random.whole(3, 5)]]
}

function legOf(
  kind: keyof typeof KINDS,
  reach: Reach,
  isDownstream: boolean,
  offset: number,
  random: Random,
): Leg {
  return {
    segment: reach.id,
    direction: isDownstream ? 'downstream' : 'upstream',
    from: isDownstream ? ENTERED : reach.length - ENTERED,
    offset: hasTwoSides(reach) ? offset : 0,
    ...(reach.id === 'harrow-tideway' && { current: 0.3 }),
    phases: [['within', random.whole(2, 4)], ...plantedOn(kind, reach, random), ['within', Infinity]],
  }
}

/** Vessels by chance: trades in turn, each one way or the other. */
export function ordinary(
  vessels: number,
  waterway: ReadonlyMap<string, Reach>,
  random: Random,
): readonly Planted[] {
  return Array.from({ length: vessels }, (_, i) => {
    const { kind, route, offset } = TRADES[i % TRADES.length]!
    const isDownstream = random.between(0, 1) < 0.5
    const way = (isDownstream ? route : route.toReversed()).map((id) => waterway.get(id)!)
    const kept = Math.round(random.between(-offset, offset))
    return {
      ship: shipOf(kind, FIRST + i, `HARROWMERE ${i + 1}`),
      start: random.whole(0, SPREAD),
      legs: way.map((reach) => legOf(kind, reach, isDownstream, kept, random)),
    }
  })
}
