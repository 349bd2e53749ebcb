import type { Advisory, CriterionReport } from '../advisory/advise.ts'
import { SEVERITIES } from '../advisory/caution.ts'
import type { Decision } from '../advisory/decide.ts'
import type { WaveReport } from '../advisory/method-report.ts'
import { figure, kmh, metres, percent } from './format.ts'
import { markup, type Markup } from './html.ts'
import {
  ORIGINS,
  SEVERITY_NAMES,
  componentName,
  criterionName,
  figuresOf,
  marginOf,
  methodName,
} from './words.ts'

export const SENSES = { 'at-most': 'at most', 'at-least': 'at least' } as const

/** Speed over ground at which something is first reached, alone, rounded down. */
export function ownMaximum(decision: Decision, firstSpeed: number): string {
  const offset = decision.overGround - decision.speed
  return firstSpeed < Infinity ? kmh(Math.max(0, firstSpeed + offset)) : 'not reached'
}

function criterionRow({ decision }: Advisory, report: CriterionReport): Markup {
  const { criterion, evaluation, firstSpeed, isGoverning } = report
  const { situation } = decision
  const own = ownMaximum(decision, firstSpeed)
  const part = componentName(evaluation.component)
  const [value, limit] = figuresOf(criterion, evaluation)
  return markup`<tr${isGoverning && markup` class="governs"`}><th scope="row">${criterionName(criterion, situation.segment)}${part !== undefined && markup` <span class="muted">(${part})</span>`}</th><td class="figure" data-name="limit">${SENSES[criterion.sense]} ${limit}</td><td class="figure" data-name="value">${value}</td><td class="figure" data-name="margin">${percent(marginOf(criterion, evaluation))}</td><td class="figure" data-name="own maximum">${own}</td><td data-name="limit from">${ORIGINS[criterion.origin]}</td><td data-name="met">${evaluation.isMet ? 'yes' : 'no'}${isGoverning && ', governs'}</td></tr>`
}

export function criteriaTable(advisory: Advisory): Markup {
  const at = advisory.decision.outcome === 'no-safe-speed' ? 'minimum steerage speed' : 'recommended speed'
  return markup`<table class="stack"><caption><b>Table 1.</b> Criteria at the ${at}. The own maximum is the speed over ground at which a criterion, taken alone, is first reached, rounded down; the lowest governs.</caption><thead><tr><th scope="col">Criterion</th><th scope="col" class="figure">Limit</th><th scope="col" class="figure">Value</th><th scope="col" class="figure">Margin</th><th scope="col" class="figure">Own maximum</th><th scope="col">Limit from</th><th scope="col">Met</th></tr></thead><tbody>${advisory.criteria.map((report) => criterionRow(advisory, report))}</tbody></table>`
}

const isNumber = (value: number | undefined): value is number => value !== undefined && Number.isFinite(value)

/** What a method is not made for, where that is a kind and no figure. */
const KIND_TEXTS: Readonly<Record<string, (value: string) => string>> = {
  hull: (value) => `not made for a ${value} hull`,
  confinement: (value) => `not made for ${value} water`,
  trade: (value) => `not made for ${value} vessels`,
  vessel_coefficient: () => 'no coefficient for this vessel',
}

/** What keeps a method out, in words. */
function outsideText(outside: WaveReport['outside']): string {
  return outside
    .map(({ quantity, value, min, max }) => {
      const isLength = quantity.endsWith('_m')
      const unit = isLength ? '\u00a0m' : ''
      const name = quantity.replace(/_m$/, '').replaceAll('_', ' ').replace('froude', 'Froude')
      if (typeof value === 'string') return KIND_TEXTS[quantity]?.(value) ?? `${name} ${value}`
      const bounds = [
        isNumber(min) && `from ${Number(min.toPrecision(3))}${unit}`,
        isNumber(max) && `to ${Number(max.toPrecision(3))}${unit}`,
      ].filter((bound) => bound !== false)
      return `${name} ${figure(value, 2)}${unit}, holds ${bounds.join(' ')}`
    })
    .join('; ')
}

interface MethodRow {
  readonly id: string
  readonly outside: WaveReport['outside']
  readonly value: number
  readonly reference: string
  readonly firstSpeed?: number
  readonly factor?: number | undefined
}

function methodRow({ decision }: Advisory, row: MethodRow): Markup {
  const isIn = row.outside.length === 0
  const own = row.firstSpeed === undefined ? '' : ownMaximum(decision, row.firstSpeed)
  return markup`<tr><th scope="row" class="method">${methodName(row.id)}<span>${row.reference}</span></th><td class="figure" data-name="value">${metres(row.value)}</td>${
    row.firstSpeed !== undefined && markup`<td class="figure" data-name="own maximum">${own}</td>`
  }<td class="whole" data-name="range">${isIn ? 'in range' : `out: ${outsideText(row.outside)}`}${
    row.factor !== undefined && `, times ${figure(row.factor, 2)}`
  }</td></tr>`
}

/** Where heights are corrected: by what, and what the answer would be without. */
function correctionText({ decision, uncalibrated }: Advisory): string {
  if (!uncalibrated) return ''
  const { calibration, waveFactor } = decision.situation.options
  const by =
    waveFactor === undefined && calibration ? `calibration ${calibration.id}` : 'a factor that was given'
  const without =
    uncalibrated.decision.outcome === 'no-safe-speed'
      ? 'no speed would be safe'
      : `the recommended maximum would be ${kmh(uncalibrated.decision.overGround)}`
  return ` Heights are corrected by ${by}, and methods without a factor do not count; without it ${without}.`
}

export function waveTable(advisory: Advisory): Markup {
  const rows = advisory.waveMethods.map((report) => methodRow(advisory, { ...report, value: report.height }))
  return markup`<table class="stack methods"><caption><b>Table 2.</b> Secondary wave height at the nearer bank by each method. A value out of range is shown and does not count.${correctionText(advisory)}</caption><thead><tr><th scope="col">Method and reference</th><th scope="col" class="figure">Height</th><th scope="col" class="figure">Own maximum</th><th scope="col">Range</th></tr></thead><tbody>${rows}</tbody></table>`
}

export function squatTable(advisory: Advisory): Markup {
  const rows = advisory.squatMethods.map((report) => methodRow(advisory, { ...report, value: report.squat }))
  return markup`<table class="stack methods"><caption><b>Table 3.</b> Squat by each method; the largest that counts is used.</caption><thead><tr><th scope="col">Method and reference</th><th scope="col" class="figure">Squat</th><th scope="col">Range</th></tr></thead><tbody>${rows}</tbody></table>`
}

/** Names as they go over the wire, in words with their unit. */
const UNITS: readonly (readonly [RegExp, string])[] = [
  [/_mps$/, ' (m/s)'],
  [/_m3$/, ' (m³)'],
  [/_m$/, ' (m)'],
  [/_h_per_v$/, ' (h/v)'],
]

export function fieldName(field: string): string {
  const [pattern, unit] = UNITS.find(([end]) => end.test(field)) ?? [/$^/, '']
  const bare = field.replace(pattern, '').split('.')
  return bare.map((part) => part.replaceAll('_', ' ')).join(', ') + unit
}

export const valueText = (value: string | number | boolean): string =>
  typeof value === 'number' ? figure(value, 3).replace(/\.?0+$/, '') : String(value)

export function assumptionsTable({ assumptions }: Advisory): Markup {
  return markup`<table class="stack assumptions"><caption><b>Table 4.</b> Values that were not given and that the answer rests on.</caption><thead><tr><th scope="col">Field</th><th scope="col">Value</th><th scope="col">Meaning</th><th scope="col">Source</th></tr></thead><tbody>${assumptions.map(
    ({ field, value, text, source }) =>
      markup`<tr><th scope="row">${fieldName(field)}</th><td data-name="value">${valueText(value)}</td><td class="whole">${text}</td><td class="whole" data-name="source">${source}</td></tr>`,
  )}</tbody></table>`
}

export function cautionsList({ cautions }: Advisory): Markup {
  const worstFirst = [...SEVERITIES].reverse()
  return markup`<ul class="cautions">${worstFirst.flatMap((severity) =>
    cautions
      .filter((caution) => caution.severity === severity)
      .map(
        ({ code, text }) =>
          markup`<li class="${severity}"><b>${SEVERITY_NAMES[severity]}</b><div>${text} <small>${code}</small></div></li>`,
      ),
  )}</ul>`
}
