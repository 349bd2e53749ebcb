import type { PlanRules, Stretch } from '../limits/plan.ts'
import type { Vessel } from '../domain/vessel.ts'
import { SIGN_UNITS, type SignUnit, toKmh } from '../domain/units.ts'
import type { EvidenceView } from './evidence-view.ts'
import { UNKNOWN, chainage, figure, kmh, length, metresPerSecond } from './format.ts'

/** A stretch as people count it: from 1. */
export const numberOf = (index: number): string => String(index + 1)

/** Value and unit of a sign. */
export const signText = ({ value, unit }: { readonly value: number; readonly unit: SignUnit }): string =>
  `${value}\u00a0${unit}`

/** A limit in the unit of its sign, and in km/h where that is another one. */
export function limitText({ limit, limitSpeed }: Stretch): string {
  if (!limit) return 'no limit proposed'
  return limit.unit === 'km/h' ? signText(limit) : `${signText(limit)} (${kmh(limitSpeed)})`
}

/** Why a stretch has no limit, in few words. */
export function lackText({ lowestMaximum, governing }: Stretch): string {
  if (lowestMaximum !== undefined) return 'below smallest'
  return governing?.criterion === undefined ? 'no answer' : 'no safe speed'
}

/** A bound of the rules, which is in the unit of the sign, as a speed, m/s. */
export const ruleSpeed = ({ signUnit }: PlanRules, value: number): number => value * SIGN_UNITS[signUnit]

/** A bound of the rules with its unit. */
export const ruleText = ({ signUnit }: PlanRules, value: number): string =>
  signText({ value, unit: signUnit })

export const directionText = (direction: Stretch['direction']): string =>
  direction === 'both' ? 'both directions' : `going ${direction}`

export const groupName = ({ rules }: EvidenceView, id: string): string =>
  rules.groups.find((group) => group.id === id)?.name ?? id

/** Name of a segment, or its id. */
export function segmentName({ study }: EvidenceView, id: string): string {
  const found = study.segments.find((segment) => segment.id === id)
  return found?.segment.name ?? id
}

/** Where a stretch lies, in words. */
export function placeOf(view: EvidenceView, stretch: Stretch): string {
  const { waterway, chainageFrom, chainageTo, segmentIds } = stretch
  const name = waterway ?? segmentIds.map((id) => segmentName(view, id)).join(', ')
  return `${name}, ${chainage(chainageFrom)} to ${chainage(chainageTo)}`
}

/** A vessel of the study in few words. */
export function vesselName(vessel: Vessel | undefined): string {
  if (!vessel) return UNKNOWN
  const name = vessel.className ?? `described vessel of ${length(vessel.length)} × ${length(vessel.beam)}`
  return vessel.loading === undefined ? name : `${name}, ${vessel.loading}`
}

/** A height of the water about the datum. */
export function levelText(level: number): string {
  return level === 0 ? 'at the datum' : `${level > 0 ? '+' : ''}${figure(level, 2)}\u00a0m`
}

export function currentText(current: number): string {
  if (current === 0) return 'none'
  return `${metresPerSecond(Math.abs(current))} ${current > 0 ? 'downstream' : 'upstream'}`
}

/** A difference of speeds in km/h, rounded down so that no margin is printed larger than it is. */
export function marginText(speed: number | undefined): string {
  if (speed === undefined || !Number.isFinite(speed)) return UNKNOWN
  return `${figure(Math.floor(toKmh(speed) * 100 + 1e-9) / 100, 2)}\u00a0km/h`
}

/** Room between the limit and what governs, m/s; undefined where either is absent. */
export const marginOfStretch = ({ lowestMaximum, limitSpeed }: Stretch): number | undefined =>
  lowestMaximum === undefined || limitSpeed === undefined ? undefined : lowestMaximum - limitSpeed

/** Numbers in rising order, runs of three and more as from and to. */
export function runsText(numbers: readonly number[]): string {
  const runs: [number, number][] = []
  for (const number of numbers) {
    const last = runs.at(-1)
    if (last?.[1] === number - 1) last[1] = number
    else runs.push([number, number])
  }
  return runs
    .flatMap(([from, to]) =>
      to - from < 2 ? (from === to ? [`${from}`] : [`${from}`, `${to}`]) : [`${from}–${to}`],
    )
    .join(', ')
}

/** Number of things with their name. */
export const counted = (number: number, one: string, many = `${one}s`): string =>
  `${number} ${number === 1 ? one : many}`
