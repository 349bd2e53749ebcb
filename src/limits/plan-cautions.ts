import type { Lack } from './ceilings.ts'
import { vesselName } from './groups.ts'
import type { PlanCaution } from './plan.ts'
import type { Vessel } from '../domain/vessel.ts'
import type { Study } from './study.ts'

/** Segments that a caution names at most; their number is given beside them. */
const MAX_NAMED = 10

/** Why a vessel has no maximum on some segments of a stretch. */
export interface LackThere {
  readonly lack: Lack
  readonly segmentId: string
}

const segmentFacts = (ids: readonly string[]) => ({
  segment_ids: ids.slice(0, MAX_NAMED),
  segments: ids.length,
})

/** A caution for each vessel and reason for which some segment has no maximum. */
export function lackCautions(found: readonly LackThere[], { vessels }: Study): PlanCaution[] {
  const groups = new Map<string, LackThere[]>()
  for (const there of found) {
    const key = `${there.lack.vessel} ${there.lack.code}`
    const alike = groups.get(key) ?? []
    alike.push(there)
    groups.set(key, alike)
  }
  return [...groups.values()].flatMap((alike): PlanCaution[] => {
    const [first] = alike
    const vessel = vessels[first?.lack.vessel ?? -1]
    if (!first || !vessel) return []
    const { vessel: index, code, detail } = first.lack
    const name = vesselName(vessel, index)
    const isUnsafe = code === 'no-safe-speed'
    return [
      {
        code: isUnsafe ? 'no-safe-speed' : 'no-answer',
        severity: 'warning',
        text: isUnsafe
          ? `No limit can be derived for ${name}: ${detail}.`
          : `No limit can be derived for ${name}, since the study has no answer: ${detail}`,
        facts: {
          vessel_index: index,
          ...(vessel.classId !== undefined && { vessel_class: vessel.classId }),
          ...(vessel.loading && { loading: vessel.loading }),
          ...(!isUnsafe && { problem_code: code }),
          ...segmentFacts(alike.map(({ segmentId }) => segmentId)),
        },
      },
    ]
  })
}

/** A posted limit that stays though the study allows less, or nothing. */
export function keptCaution(
  ids: readonly string[],
  limit: number,
  ceiling: number | undefined,
): PlanCaution | undefined {
  if (ids.length === 0) return undefined
  return {
    code: 'kept-above-ceiling',
    severity: 'warning',
    text:
      ceiling === undefined
        ? 'The posted limit is kept where the study finds no speed that is safe for every vessel of the group.'
        : 'The posted limit is kept though it is above what the study allows.',
    facts: {
      limit_mps: limit,
      ...(ceiling !== undefined && { ceiling_mps: ceiling }),
      ...segmentFacts(ids),
    },
  }
}

/** A limit at which a vessel of the group, against the stream or with it, is too slow for its rudder. */
export function steerageCaution(
  limit: number,
  slow: readonly { readonly vessel: Vessel; readonly index: number; readonly throughWater: number }[],
): PlanCaution | undefined {
  const [first] = slow
  if (!first) return undefined
  const worst = slow.reduce((found, next) =>
    next.throughWater - next.vessel.minSteerageSpeed < found.throughWater - found.vessel.minSteerageSpeed
      ? next
      : found,
  )
  return {
    code: 'sign-below-steerage',
    severity: 'warning',
    text: `At the limit ${vesselName(worst.vessel, worst.index)} is slower through the water than it needs to steer.`,
    facts: {
      limit_mps: limit,
      through_water_mps: worst.throughWater,
      min_steerage_mps: worst.vessel.minSteerageSpeed,
      vessel_indices: slow.map(({ index }) => String(index)),
    },
  }
}

export function shortCaution(length: number, minRunLength: number): PlanCaution {
  return {
    code: 'shorter-than-run-length',
    severity: 'caution',
    text: 'The stretch is higher than a neighbour and shorter than the plan asks: a kept limit beside it is lower than every limit that may be proposed.',
    facts: { length_m: length, min_run_length_m: minRunLength },
  }
}
