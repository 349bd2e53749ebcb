import type { FaultItem } from '../domain/fault.ts'
import { impossible } from '../domain/fault.ts'
import type { Bank, PostedLimit, Receptor, Segment, Side, Station } from '../domain/segment.ts'
import { speedOf } from './fields.ts'
import { toGroup } from './group.schema.ts'
import type { RegistrySegmentWire, SegmentWire } from './segment.schema.ts'
import { isProfile } from './section-shape.ts'
import { toStations } from './to-stations.ts'

/** Delta of common quarry stone in fresh water (Rock Manual, from memory). */
const STONE_RELATIVE_DENSITY = 1.65

type BankWire = NonNullable<SegmentWire['banks']>['left']
export type AnySegmentWire = Omit<SegmentWire, 'id' | 'label'> & Pick<RegistrySegmentWire, 'stations'>

/** What a registry segment adds to its description. */
export interface Identity {
  readonly id: string
  readonly revision: number
}

function toBank(wire: BankWire, side: Side, kindOfBoth: Bank['kind'] | undefined): Bank {
  const kind = wire.kind ?? kindOfBoth
  return {
    side,
    kind: kind ?? 'unprotected',
    isKindGiven: kind !== undefined,
    stoneRelativeDensity: wire.stone_relative_density ?? STONE_RELATIVE_DENSITY,
    ...(wire.max_wave_height_m !== undefined && { maxWaveHeight: wire.max_wave_height_m }),
    ...(wire.max_drawdown_m !== undefined && { maxDrawdown: wire.max_drawdown_m }),
    ...(wire.max_return_current_mps !== undefined && { maxReturnCurrent: wire.max_return_current_mps }),
    ...(wire.stone_d50_m !== undefined && { stoneD50: wire.stone_d50_m }),
    ...(wire.slope_h_per_v !== undefined && { slope: wire.slope_h_per_v }),
    ...(wire.toe_depth_m !== undefined && { toeDepth: wire.toe_depth_m }),
  }
}

/** Banks of a segment: left and right where sides are known, else nearer and farther. */
function toBanks(wire: AnySegmentWire): readonly [Bank, Bank] {
  const { banks, bank_kind: kind } = wire
  const hasSides =
    banks !== undefined ||
    isProfile(wire.cross_section) ||
    wire.stations?.some(
      (station) => station.left_distance_m !== undefined || isProfile(station.cross_section),
    ) === true
  return hasSides
    ? [toBank(banks?.left ?? {}, 'left', kind), toBank(banks?.right ?? {}, 'right', kind)]
    : [toBank({}, 'nearer', kind), toBank({}, 'farther', kind)]
}

/** Index of the station nearest to a chainage; undefined where one section describes the whole segment. */
function stationAt(stations: readonly Station[], chainage: number | undefined): number | undefined {
  if (chainage === undefined || stations.length < 2) return undefined
  const away = ({ chainage: at = chainage }: Station) => Math.abs(at - chainage)
  return stations.reduce((found, next) => (away(next) < away(found) ? next : found)).index
}

function toReceptor(
  wire: NonNullable<AnySegmentWire['receptors']>[number],
  stations: readonly Station[],
): Receptor {
  const station = stationAt(stations, wire.chainage_m)
  return {
    kind: wire.kind,
    side: wire.side,
    distance: wire.distance_m,
    ...(wire.name !== undefined && { name: wire.name }),
    ...(wire.chainage_m !== undefined && { chainage: wire.chainage_m }),
    ...(station !== undefined && { station }),
    ...(wire.max_wave_height_m !== undefined && { maxWaveHeight: wire.max_wave_height_m }),
  }
}

function toPostedLimit(wire: NonNullable<AnySegmentWire['posted_limits']>[number]): PostedLimit {
  return {
    speed: speedOf(wire, 'speed') ?? Infinity,
    reference: wire.reference ?? 'over-ground',
    direction: wire.direction ?? 'both',
    appliesTo: toGroup(wire.applies_to ?? {}),
  }
}

export function stoneItems(wire: AnySegmentWire): FaultItem[] {
  return (['left', 'right'] as const).flatMap((side): FaultItem[] => {
    const bank = wire.banks?.[side]
    if (bank?.stone_d50_m === undefined || bank.slope_h_per_v !== 0) return []
    return [
      {
        pointer: `#/segment/banks/${side}/slope_h_per_v`,
        code: 'clash',
        detail: 'Stones do not lie on an upright wall: give the slope of the riprap',
        facts: { slope_h_per_v: 0, stone_d50_m: bank.stone_d50_m },
      },
    ]
  })
}

/** A segment from its parts. */
export function assembled(wire: AnySegmentWire, stations: Segment['stations'], identity?: Identity): Segment {
  return {
    ...(identity && { id: identity.id, revision: identity.revision }),
    ...(wire.name !== undefined && { name: wire.name }),
    ...(wire.waterway !== undefined && { waterway: wire.waterway }),
    stations,
    banks: toBanks(wire),
    receptors: (wire.receptors ?? []).map((receptor) => toReceptor(receptor, stations)),
    postedLimits: (wire.posted_limits ?? []).map(toPostedLimit),
    confinement: wire.confinement ?? 'confined',
    ...(wire.bed_kind && { bedKind: wire.bed_kind }),
    ...(wire.min_under_keel_clearance_m !== undefined && {
      minUnderKeelClearance: wire.min_under_keel_clearance_m,
    }),
    ...(wire.max_draught_m !== undefined && { maxDraught: wire.max_draught_m }),
  }
}

/**
 * The segment of a request.
 *
 * @throws Fault `impossible-input` with every pair of figures that clash
 */
export function toSegment(wire: AnySegmentWire): Segment {
  const { stations, items } = toStations(wire)
  const errors = [...items, ...stoneItems(wire)]
  const [first, ...rest] = stations
  if (errors.length > 0 || !first) throw impossible(errors)
  return assembled(wire, [first, ...rest])
}
