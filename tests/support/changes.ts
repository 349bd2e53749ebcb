import type { Options } from '../../src/domain/conditions.ts'
import type { Bank, PostedLimit, Segment, Station } from '../../src/domain/segment.ts'
import type { Vessel } from '../../src/domain/vessel.ts'
import type { Case } from './arbitraries.ts'

const mapStations = (segment: Segment, change: (station: Station) => Station): Segment => {
  const [first, ...rest] = segment.stations
  return { ...segment, stations: [change(first), ...rest.map(change)] }
}

const moveOffsets = (station: Station, change: (offset: number) => number): Station['shape'] =>
  station.shape.kind === 'profile'
    ? { ...station.shape, offsets: station.shape.offsets.map(change) }
    : station.shape

/** The same place with the bed lower by a length, m. */
export const deeper = (c: Case, by: number): Case => ({
  ...c,
  segment: mapStations(c.segment, (s) => ({
    ...s,
    depth: s.depth + by,
    shape:
      s.shape.kind === 'profile' ? { ...s.shape, bedDepths: s.shape.bedDepths.map((d) => d + by) } : s.shape,
  })),
})

/** The sailing line shifted towards mid-channel by a share of the way, 0 to 1. */
export const towardsMiddle = (c: Case, share: number): Case => ({
  ...c,
  segment: mapStations(c.segment, (s) => {
    const [a, b] = s.distances
    const shift = ((b - a) / 2) * share
    return {
      ...s,
      distances: [a + shift, b - shift],
      shape: moveOffsets(s, (offset) => offset - shift),
    }
  }),
})

/** Both waterlines further out by a length, m; slopes keep n, so bottoms widen as much. */
export const wider = (c: Case, by: number): Case => ({
  ...c,
  segment: mapStations(c.segment, (s) => ({
    ...s,
    width: s.width + 2 * by,
    distances: [s.distances[0] + by, s.distances[1] + by],
    shape:
      s.shape.kind === 'trapezoid' && s.shape.bottomWidth !== undefined
        ? { ...s.shape, bottomWidth: s.shape.bottomWidth + 2 * by }
        : s.shape,
  })),
})

/** Figures of a record multiplied, where they are given. */
function scaled<T extends object>(record: T, factors: { readonly [K in keyof T]?: number }): T {
  const copy = { ...record }
  for (const key of Object.keys(factors) as (keyof T)[]) {
    const value = copy[key]
    if (typeof value === 'number') copy[key] = (value * (factors[key] ?? 1)) as T[keyof T]
  }
  return copy
}

const scaledVessel = (vessel: Vessel, k: number): Vessel =>
  scaled(vessel, {
    length: k,
    beam: k,
    draught: k,
    entranceLength: k,
    volume: k ** 3,
    maxSpeed: Math.sqrt(k),
    minSteerageSpeed: Math.sqrt(k),
  })

const BANK_LENGTHS = ['maxWaveHeight', 'maxDrawdown', 'stoneD50', 'toeDepth'] as const

/** Froude's scale: every length by k, every speed by the root of k. */
export function froudeScaled(c: Case, k: number): Case {
  const root = Math.sqrt(k)
  const bank = (b: Bank): Bank => ({
    ...scaled(b, Object.fromEntries(BANK_LENGTHS.map((key) => [key, k]))),
    ...(b.maxReturnCurrent !== undefined && { maxReturnCurrent: b.maxReturnCurrent * root }),
  })
  const posted = (p: PostedLimit): PostedLimit => ({ ...p, speed: p.speed * root })
  const segment = mapStations(c.segment, (s) => ({
    ...s,
    depth: s.depth * k,
    width: s.width * k,
    distances: [s.distances[0] * k, s.distances[1] * k],
    shape:
      s.shape.kind === 'profile'
        ? {
            ...s.shape,
            offsets: s.shape.offsets.map((x) => x * k),
            bedDepths: s.shape.bedDepths.map((d) => d * k),
          }
        : scaled(s.shape, { bottomWidth: k }),
  }))
  const { meetingVessel } = c.conditions
  return {
    vessel: scaledVessel(c.vessel, k),
    segment: {
      ...scaled(segment, { minUnderKeelClearance: k, maxDraught: k }),
      banks: [bank(segment.banks[0]), bank(segment.banks[1])],
      receptors: segment.receptors.map((r) => scaled(r, { distance: k, maxWaveHeight: k })),
      postedLimits: segment.postedLimits.map(posted),
    },
    conditions: {
      ...scaled(c.conditions, { waterLevel: k, current: root }),
      ...(meetingVessel && { meetingVessel: scaledVessel(meetingVessel, k) }),
    },
    options: {
      ...c.options,
      limits: scaled(c.options.limits, {
        maxBankWaveHeight: k,
        maxReceptorWaveHeight: k,
        maxDrawdown: k,
        maxReturnCurrent: root,
      }),
    },
  }
}

export const ALLOWANCES = [
  'maxCriticalRatio',
  'maxDepthFroudeNumber',
  'minUnderKeelClearanceRatio',
  'maxBankWaveHeight',
  'maxReceptorWaveHeight',
  'maxDrawdown',
  'maxReturnCurrent',
] as const

/** The same with every limit of the request and of the banks, stones, toes and posted limits excepted, freer by a factor. */
export function freer(c: Case, limits: Options['limits'], factor: number): Case {
  const freed = Object.fromEntries(
    ALLOWANCES.map((key) => [key, key === 'minUnderKeelClearanceRatio' ? 1 / factor : factor]),
  )
  const bank = (b: Bank): Bank =>
    scaled(b, { maxWaveHeight: factor, maxDrawdown: factor, maxReturnCurrent: factor, stoneD50: factor })
  return {
    ...c,
    segment: {
      ...scaled(c.segment, { minUnderKeelClearance: 1 / factor }),
      banks: [bank(c.segment.banks[0]), bank(c.segment.banks[1])],
      receptors: c.segment.receptors.map((r) => scaled(r, { maxWaveHeight: factor })),
      postedLimits: c.segment.postedLimits.map((p) => scaled(p, { speed: factor })),
    },
    options: { ...c.options, limits: scaled(limits, freed) },
  }
}
