import { ascending } from 'd3-array'
import type { Advisory } from '../advisory/advise.ts'
import { bankLimits, bankWave, secondaryLimitAt } from '../advisory/criteria/bank-wave.ts'
import type { Criterion } from '../advisory/criteria/criterion.ts'
import type { Curve } from '../advisory/curve.ts'
import { regimeAt } from '../advisory/regime.ts'
import { heightByMethod } from '../advisory/secondary-wave.ts'
import type { Situation } from '../advisory/situation.ts'
import { metres } from './format.ts'
import { placeName } from './words.ts'

/** A figure over speed; NaN where it has no value. */
export interface Series {
  readonly values: readonly number[]
  /** whether it counts at each speed; absent: it always does */
  readonly counts?: readonly boolean[]
}

/** What the speed curve shows, at speeds that hold every edge between methods. */
export interface Samples {
  /** m/s through the water, rising */
  readonly speeds: readonly number[]
  readonly methods: readonly (Series & { readonly id: string })[]
  /** highest wave that counts at the nearer bank, m */
  readonly wave: Series
  readonly stern: Series
  /** the wave where the governing criterion holds, when that is not the nearer bank */
  readonly governing?: Series & { readonly name: string }
  readonly limits: readonly Limit[]
}

/** A greatest wave height, m; over speed where stones decide. */
export interface Limit {
  readonly name: string
  readonly values: readonly number[]
  readonly isConstant: boolean
}

const EDGE = 1e-9

/** Speeds of the curve, with both sides of every edge between methods and the speeds that the advisory names. */
function speedsOf({ decision, points }: Curve): number[] {
  const { situation, speed } = decision
  const { criticalSpeed, supercriticalOnset } = situation.setting
  const top = points.at(-1)?.effects.speed ?? 0
  const edges = situation.waveBands.list.map(({ to }) => to)
  const extra = [...edges, criticalSpeed, supercriticalOnset].flatMap((edge) => [edge, edge * (1 + EDGE)])
  const all = [...points.map(({ effects }) => effects.speed), ...extra, speed]
  return [...new Set(all.filter((v) => v > 0 && v <= top))].sort(ascending)
}

/** Places, the two banks as one where they have the same limit. */
function bothBanks({ segment: { banks } }: Situation, places: readonly string[]): string[] {
  const [first, second] = [`${banks[0].side} bank`, `${banks[1].side} bank`]
  return places.flatMap((place) => {
    if (place.startsWith(second) && places.includes(place.replace(second, first))) return []
    const isShared = place.startsWith(first) && places.includes(place.replace(first, second))
    return [isShared ? place.replace(first, 'both banks') : place]
  })
}

/** Limits on waves at the banks and receptors, those that are equal in one. */
function limitsOf(situation: Situation, advisory: Advisory, speeds: readonly number[]): Limit[] {
  const found: { value: number; places: string[] }[] = []
  const { isConfined } = situation.setting
  const add = (value: number, place: string): void => {
    const known = found.find((limit) => Math.abs(limit.value - value) < 5e-4)
    if (!known) found.push({ value, places: [place] })
    else if (!known.places.includes(place)) known.places.push(place)
  }
  const curves: Limit[] = []
  for (const index of [0, 1] as const) {
    const limits = bankLimits(situation, index)
    if (!limits) continue
    const bank = `${situation.segment.banks[index].side} bank`
    if (limits.stone) {
      const values = speeds.map((speed) => secondaryLimitAt(situation, limits, speed))
      curves.push({ name: `stones of the ${bank}`, values, isConstant: false })
      if (isConfined) add(limits.stern, `${bank}, stern wave`)
    } else if (limits.secondary === limits.stern || !isConfined) add(limits.secondary ?? NaN, bank)
    else {
      add(limits.secondary ?? NaN, `${bank}, secondary waves`)
      add(limits.stern, `${bank}, stern wave`)
    }
  }
  for (const { criterion, evaluation } of advisory.criteria) {
    if (criterion.id !== 'receptor-wave-height') continue
    add(evaluation.limit, placeName(criterion.place, situation.segment))
  }
  return [
    ...found.map(({ value, places }) => ({
      name: `${metres(value)} ${bothBanks(situation, places).join('; ')}`,
      values: speeds.map(() => value),
      isConstant: true,
    })),
    ...curves,
  ]
}

const WAVE_CRITERIA: readonly Criterion['id'][] = ['bank-wave-height', 'receptor-wave-height']

/** The wave that governs, where it is not the one at the nearer bank. */
function governingSeries(advisory: Advisory, speeds: readonly number[]): Samples['governing'] {
  const { situation, governing } = advisory.decision
  const { criterion } = governing
  const nearer = `${situation.segment.banks[situation.nearer].side}-bank`
  if (!WAVE_CRITERIA.includes(criterion.id) || criterion.place === nearer) return undefined
  return {
    name: `Wave at ${placeName(criterion.place, situation.segment)}`,
    values: speeds.map((speed) => criterion.evaluate(speed).value ?? NaN),
  }
}

/** Samples of a curve for its drawing. */
export function samplesOf(curve: Curve, advisory: Advisory): Samples {
  const { situation } = advisory.decision
  const { nearer, section, waveBands } = situation
  const speeds = speedsOf(curve)
  const waves = speeds.map((speed) => bankWave(situation, nearer, speed))
  const governing = governingSeries(advisory, speeds)
  return {
    speeds,
    methods: advisory.waveMethods.map(({ id }, i) => {
      const interval = waveBands.intervals[i]
      return {
        id,
        values: speeds.map((speed) => heightByMethod(situation, i, speed, section.distances[nearer])),
        counts: speeds.map(
          (speed) => interval !== undefined && speed > interval.from && speed <= interval.to,
        ),
      }
    }),
    wave: { values: waves.map(({ height }) => height) },
    stern: { values: waves.map(({ stern }) => (situation.setting.isConfined ? stern : NaN)) },
    ...(governing && { governing }),
    limits: limitsOf(situation, advisory, speeds),
  }
}

/** Speeds between which the flow is transcritical: from, to, m/s; undefined when that is above the last speed. */
export function criticalBand(situation: Situation, top: number): readonly [number, number] | undefined {
  const steps = 600
  let from: number | undefined
  let to = 0
  for (let i = 1; i <= steps; i += 1) {
    const speed = (top * i) / steps
    if (regimeAt(situation, speed) !== 'transcritical') continue
    from ??= speed
    to = speed
  }
  return from === undefined ? undefined : [from, to]
}
