import type { CriterionReport } from '../advisory/advise.ts'
import type { Severity } from '../advisory/caution.ts'
import { METHODS } from '../advisory/catalogue.ts'
import type { Criterion, CriterionId, Evaluation, Origin } from '../advisory/criteria/criterion.ts'
import type { Decision } from '../advisory/decide.ts'
import type { BankKind, ReceptorKind, Segment } from '../domain/segment.ts'
import type { Hull } from '../domain/vessel.ts'
import { figure, kmh, metres, metresPerSecond } from './format.ts'

export const CRITERION_NAMES: Readonly<Record<CriterionId, string>> = {
  'critical-ratio': 'Nearness to the critical speed',
  'depth-froude-number': 'Depth Froude number',
  'bank-wave-height': 'Wave height',
  'receptor-wave-height': 'Wave height',
  'under-keel-clearance': 'Under-keel clearance',
  drawdown: 'Drawdown',
  'return-current': 'Return current',
  'wake-wash': 'Long wake wash',
  'posted-limit': 'Posted limit',
  'service-speed': 'Top speed of the vessel',
}

export const ORIGINS: Readonly<Record<Origin, string>> = {
  policy: 'default',
  segment: 'registry',
  request: 'request',
  vessel: 'vessel',
}

export const BANK_KIND_NAMES: Readonly<Record<BankKind, string>> = {
  unprotected: 'unprotected soil',
  reed: 'reed',
  riprap: 'riprap',
  wall: 'wall',
}

export const RECEPTOR_KIND_NAMES: Readonly<Record<ReceptorKind, string>> = {
  'moored-small-craft': 'moored small craft',
  'bathing-place': 'bathing place',
  'reed-bed': 'reed bed',
  other: 'other place',
}

export const HULL_NAMES: Readonly<Record<Hull, string>> = {
  displacement: 'displacement hull',
  'semi-displacement': 'semi-displacement hull',
  planing: 'planing hull',
}

export const SEVERITY_NAMES: Readonly<Record<Severity, string>> = {
  warning: 'Warning',
  caution: 'Caution',
  info: 'Note',
}

const METHOD_NAMES: ReadonlyMap<string, string> = new Map(METHODS.map(({ id, name }) => [id, name]))

/** Name of a method; of an id that is not known, the id. */
export const methodName = (id: string): string => METHOD_NAMES.get(id) ?? id

/** Authors and year of a method. */
export function methodShortName(id: string): string {
  const authors = methodName(id).split(',')[0] ?? id
  const year = /\d{4}$/.exec(id)?.[0]
  return year === undefined || authors.includes(year) ? authors : `${authors} ${year}`
}

const RECEPTOR = /^receptor-(\d+)$/

/** Where a criterion holds, in words: a bank, or a receptor by its name. */
export function placeName(place: string, segment: Segment): string {
  const index = RECEPTOR.exec(place)?.[1]
  if (index === undefined) return place.replace('-', ' ')
  const receptor = segment.receptors[Number(index)]
  if (!receptor) return place
  return receptor.name ?? `${RECEPTOR_KIND_NAMES[receptor.kind]} ${Number(index) + 1}`
}

/** A criterion with where it holds. */
export function criterionName({ id, place }: Criterion, segment: Segment): string {
  const name = CRITERION_NAMES[id]
  return place === 'vessel' ? name : `${name}, ${placeName(place, segment)}`
}

/** The part of a criterion that stands nearest to its limit. */
export function componentName(component: string | undefined): string | undefined {
  if (component === undefined) return undefined
  return component === 'stern-wave' ? 'stern wave' : `secondary wave by ${methodShortName(component)}`
}

/** A figure of a criterion in its unit; limits on the speed of a vessel as speeds. */
export function criterionFigure(criterion: Criterion, value: number | undefined, decimals = 2): string {
  // a law of squat that runs away near the critical speed gives depths below the bed, which mean only one thing
  if (criterion.id === 'under-keel-clearance' && value !== undefined && value < 0) return 'none'
  if (criterion.unit === 'm') return metres(value, decimals)
  if (criterion.unit === 'ratio') return figure(value, decimals)
  return criterion.id === 'return-current' ? metresPerSecond(value, decimals) : kmh(value, decimals)
}

/** Value and limit of a criterion, with so many decimals that one that is not met does not look met. */
export function figuresOf(
  criterion: Criterion,
  { value, limit, isMet }: Evaluation,
): readonly [string, string] {
  const at = (decimals: number): readonly [string, string] => [
    criterionFigure(criterion, value, decimals),
    criterionFigure(criterion, limit, decimals),
  ]
  for (let decimals = 2; decimals < 5; decimals += 1) {
    const [own, bound] = at(decimals)
    if (isMet || own !== bound) return [own, bound]
  }
  return at(5)
}

/** Room that a criterion leaves, as a share of its limit; undefined where it cannot be evaluated. */
export function marginOf(criterion: Criterion, { value, limit }: Evaluation): number | undefined {
  if (value === undefined) return undefined
  return criterion.sense === 'at-most' ? 1 - value / limit : value / limit - 1
}

/** What governs, as a sentence without a full stop. */
export function governingSentence(decision: Decision, report: CriterionReport | undefined): string {
  const { criterion } = decision.governing
  const name = criterionName(criterion, decision.situation.segment)
  if (criterion.id === 'service-speed') return 'Top speed of the vessel: no limit is reached up to it'
  if (!report || report.evaluation.value === undefined) return name
  if (criterion.id === 'posted-limit')
    return `${name} of ${criterionFigure(criterion, report.evaluation.limit)}`
  const { component } = report.evaluation
  const part = componentName(component)
  const [own, bound] = figuresOf(criterion, report.evaluation)
  const of = part === undefined ? '' : ` (${part})`
  return `${name}: ${own}${of}, limit ${criterion.sense === 'at-most' ? '' : 'at least '}${bound}`
}
