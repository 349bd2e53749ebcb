import type { CriterionReport } from '../advisory/advise.ts'
import type { Decision } from '../advisory/decide.ts'
import type { CellEvidence } from './evidence-case.ts'
import { kmh, percent } from './format.ts'
import { markup, type Markup } from './html.ts'
import { SENSES, ownMaximum } from './sheet-tables.ts'
import { ORIGINS, componentName, criterionName, figuresOf, marginOf } from './words.ts'

/** Rows of a table that leaves room for the rest of its page; a segment may have a hundred receptors. */
const MOST = 11

interface Pair {
  readonly own: CriterionReport
  readonly atLimit: CriterionReport | undefined
}

/** Criteria in their order, those reached last left out where there are too many. */
function shownOf(pairs: readonly Pair[]): Pair[] {
  const byFirst = [...pairs].sort(
    (a, b) => Number(b.own.isGoverning) - Number(a.own.isGoverning) || a.own.firstSpeed - b.own.firstSpeed,
  )
  const kept = new Set(byFirst.slice(0, MOST))
  return pairs.filter((pair) => kept.has(pair))
}

function valueCells(report: CriterionReport | undefined): Markup {
  if (!report) return markup``
  const { criterion, evaluation } = report
  const [value] = figuresOf(criterion, evaluation)
  return markup`<td class="figure">${value}</td><td class="figure">${evaluation.isMet ? '' : markup`<b>not met</b> `}${percent(marginOf(criterion, evaluation))}</td>`
}

function row(decision: Decision, { own, atLimit }: Pair): Markup {
  const { criterion, evaluation, firstSpeed, isGoverning } = own
  const part = componentName(evaluation.component)
  const [, limit] = figuresOf(criterion, evaluation)
  return markup`<tr${isGoverning && markup` class="governs"`}><th scope="row">${criterionName(criterion, decision.situation.segment)}${part !== undefined && markup` <span class="muted">(${part})</span>`}</th><td class="figure">${SENSES[criterion.sense]} ${limit}</td>${valueCells(atLimit)}${valueCells(own)}<td class="figure">${ownMaximum(decision, firstSpeed)}</td><td class="from">${ORIGINS[criterion.origin]}</td></tr>`
}

/** Criteria of a cell with values and margins, at the limit as at the recommended maximum. */
export function evidenceCriteria(cell: CellEvidence, tried: string): Markup {
  const { advisory, atLimit, limitWater } = cell
  const { decision } = advisory
  const pairs = advisory.criteria.map((own, i): Pair => ({ own, atLimit: atLimit?.[i] }))
  const shown = shownOf(pairs)
  const isSafe = decision.outcome !== 'no-safe-speed'
  const main = isSafe
    ? `At maximum, ${kmh(decision.overGround)}`
    : `Just steering, ${kmh(decision.situation.vessel.minSteerageSpeed)}`
  const offset = decision.overGround - decision.speed
  const limitHead = limitWater !== undefined && `At ${tried}, ${kmh(limitWater + offset)}`
  const two = markup`<th scope="col" class="figure">Value</th><th scope="col" class="figure">Margin</th>`
  return markup`<table class="criteria"><thead><tr><th scope="col" rowspan="2">Criterion</th><th scope="col" rowspan="2" class="figure">Allowed</th>${
    limitHead !== false && markup`<th scope="colgroup" colspan="2" class="over">${limitHead}</th>`
  }<th scope="colgroup" colspan="2" class="over">${main}</th><th scope="col" rowspan="2" class="figure">Own max.</th><th scope="col" rowspan="2">From</th></tr><tr>${limitHead !== false && two}${two}</tr></thead><tbody>${shown.map((pair) => row(decision, pair))}</tbody></table>${
    pairs.length > shown.length &&
    markup`<p class="muted">And ${String(pairs.length - shown.length)} more criteria, each reached at a higher speed.</p>`
  }`
}
