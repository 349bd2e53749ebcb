import type { Direction } from '../../src/domain/segment.ts'
import type { Ship } from './fleet.ts'
import type { Reach } from './waterway.ts'

/** Answers a body of `POST /v1/advisories`. */
export type Advise = (body: object) => Promise<Advisory>

export interface Advisory {
  readonly outcome: string
  readonly governing_criterion: string
  readonly recommended_max_speed?: { readonly over_ground: { readonly kn: number } }
  readonly critical_speed: { readonly over_ground: { readonly kn: number } }
}

/** What an advisory is told from a problem by. */
const OUTCOMES: ReadonlySet<string> = new Set(['limited', 'service-speed', 'no-safe-speed'])

/** Where and how a vessel passes. */
export interface Passing {
  readonly reach: Reach
  /** m, positive to the right looking downstream */
  readonly offset: number
  readonly direction: Direction
  /** m/s, positive downstream */
  readonly current: number | undefined
}

/** Recommended maxima over ground, kn: of the stricter and of the milder loading; NaN where no speed is safe. */
export interface Maxima {
  readonly lower: number
  readonly higher: number
  readonly governing: string
  readonly loading: string
  /** critical speed over ground of the milder loading, kn: no displacement hull passes it */
  readonly critical: number
}

export type MaximaOf = (ship: Ship, passing: Passing) => Promise<Maxima>

/** The segment as it is for a vessel beside the sailing line, by what the interface lets a caller replace. */
function segmentBeside({ id, banks, properties }: Reach, offset: number): object {
  const receptors = properties.receptors?.map((receptor) => ({
    ...receptor,
    distance_m: receptor.distance_m + (receptor.side === 'left' ? offset : -offset),
  }))
  const seen = { id, ...(receptors && { receptors }) }
  const profile = properties.cross_section?.profile
  if (profile) {
    return { ...seen, cross_section: { profile: profile.map(([at, depth]) => [at - offset, depth]) } }
  }
  if (!banks) {
    // which bank is the nearer one is not known: the stricter of the two counts
    const { bank_distance_m: nearer, width_m } = properties
    return nearer === undefined ? seen : { ...seen, width_m, bank_distance_m: nearer - Math.abs(offset) }
  }
  const kind = properties.bank_kind === undefined ? {} : { kind: properties.bank_kind }
  return {
    ...seen,
    banks: {
      left: { ...kind, ...properties.banks?.left, distance_m: banks[0] + offset },
      right: { ...kind, ...properties.banks?.right, distance_m: banks[1] - offset },
    },
  }
}

function vesselOf({ classId, length, beam, draught, convoy }: Ship, loading: string): object {
  const hull = convoy ?? { length, beam, draught }
  return {
    class: classId,
    loading,
    length_m: hull.length,
    beam_m: hull.beam,
    ...(hull.draught !== undefined && { draught_m: hull.draught }),
  }
}

/** Each question once: on the sailing line many rows ask the same. */
function remembered(advise: Advise): Advise {
  const known = new Map<string, Promise<Advisory>>()
  return (body) => {
    const key = JSON.stringify(body)
    const answer = known.get(key) ?? advise(body)
    known.set(key, answer)
    return answer
  }
}

/** Asks for the advisories of single vessels at true distances: another way to the maximum than by a log. */
export function maximaBy(ask: Advise): MaximaOf {
  const advise = remembered(ask)
  return async (ship, { reach, offset, direction, current }) => {
    const found = await Promise.all(
      ship.loadings.map(async (loading) => {
        const body = {
          segment: segmentBeside(reach, offset),
          vessel: vesselOf(ship, loading),
          conditions: { direction, ...(current !== undefined && { current_mps: current }) },
        }
        const advisory = await advise(body)
        const { recommended_max_speed: speed, governing_criterion: governing, outcome } = advisory
        if (!OUTCOMES.has(outcome)) throw new Error(`No advisory: ${JSON.stringify(advisory)}`)
        const critical = advisory.critical_speed.over_ground.kn
        return { value: speed?.over_ground.kn ?? NaN, governing, loading, critical }
      }),
    )
    const sorted = found.toSorted((a, b) => a.value - b.value)
    const [lowest, highest] = [sorted[0]!, sorted.at(-1)!]
    if (Number.isNaN(lowest.value) !== Number.isNaN(highest.value)) {
      throw new Error(`${ship.name} is safe on ${reach.id} in one loading only, which is not planted`)
    }
    return {
      lower: lowest.value,
      higher: highest.value,
      governing: lowest.governing,
      loading: lowest.loading,
      critical: highest.critical,
    }
  }
}
