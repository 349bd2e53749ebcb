import type { Group } from '../domain/segment.ts'
import type { Spread, Uncertainty } from '../limits/study.ts'
import { FIELD_NAMES } from './evidence-tornado.ts'
import type { EvidenceView } from './evidence-view.ts'
import { counted, currentText, levelText, ruleText, segmentName, vesselName } from './evidence-words.ts'
import { vesselsOf } from './evidence-strip-rows.ts'
import { count, figure, length, metres } from './format.ts'
import { markup, type Markup, type Piece } from './html.ts'
import { HULL_NAMES } from './words.ts'

const listed = (texts: readonly string[]): string =>
  texts.length < 2 ? (texts[0] ?? 'none') : `${texts.slice(0, -1).join(', ')} and ${texts.at(-1) ?? ''}`

const line = (name: string, text: Piece): Markup => markup`<div><dt>${name}</dt><dd>${text}</dd></div>`

/** Whom a group is for, in words. */
export function groupText(group: Group): string {
  const parts = [
    group.vesselClasses && `classes ${listed(group.vesselClasses)}`,
    group.loading && group.loading,
    group.minDraught !== undefined && `draught from ${length(group.minDraught)}`,
    group.maxDraught !== undefined && `draught below ${length(group.maxDraught)}`,
    group.minLength !== undefined && `length from ${length(group.minLength)}`,
    group.hull && HULL_NAMES[group.hull],
  ].filter((part) => part !== undefined && part !== false)
  return parts.length === 0 ? 'every vessel' : parts.join('; ')
}

function percentileText({ rules, study }: EvidenceView): string {
  if (rules.percentile === null) return 'The inputs as given, without uncertainty.'
  const samples = study.uncertainty?.samples
  const of = samples === undefined ? 'the samples' : `the ${count(samples)} samples of a cell`
  return `Percentile ${rules.percentile}: the speed that ${rules.percentile} % of ${of} do not reach. A sample without a safe speed counts as 0.`
}

function boundsText({ rules }: EvidenceView): string {
  const { smallestLimit, largestLimit } = rules
  const parts = [
    `Ceilings are rounded down to steps of ${ruleText(rules, rules.signStep)}.`,
    largestLimit !== undefined && `No limit is above ${ruleText(rules, largestLimit)}.`,
    smallestLimit !== undefined &&
      `Below ${ruleText(rules, smallestLimit)} no limit is proposed: the stretch is shown as below the smallest limit.`,
  ]
  return parts.filter((part) => part !== false).join(' ')
}

function keptText(view: EvidenceView): string {
  const { keepPosted } = view.rules
  if (keepPosted.length === 0) return 'No posted limit is kept by rule.'
  return `Posted limits stay on ${listed(keepPosted.map((id) => segmentName(view, id)))}.`
}

function studiedText({ study }: EvidenceView): string {
  const { segments, vessels, waterLevels, currents, directions } = study
  const ways =
    directions.length === 1 && directions[0] === null ? 'one answer for both directions' : 'each direction'
  return `${counted(segments.length, 'segment')}, ${counted(vessels.length, 'vessel')}; water level ${listed(waterLevels.map(levelText))}; current ${listed(currents.map(currentText))}; ${ways}.`
}

const spreadText = ({ kind, size }: Spread, unit: string): string =>
  kind === 'standard-deviation'
    ? `normal, standard deviation ${figure(size, 3)}${unit}`
    : `uniform, half range ${figure(size, 3)}${unit}`

function waveText({ study }: EvidenceView): string | undefined {
  const all = study.segments.flatMap(({ waveHeightLogSd }) =>
    waveHeightLogSd === undefined ? [] : [waveHeightLogSd],
  )
  if (all.length === 0) return undefined
  const [least, most] = [Math.min(...all), Math.max(...all)]
  const size = least === most ? figure(least, 3) : `${figure(least, 3)} to ${figure(most, 3)} by segment`
  return `lognormal, standard deviation of the logarithm ${size}`
}

function uncertainRows(view: EvidenceView, { spreads }: Uncertainty): Markup[] {
  const rows = Object.entries(spreads).map(([field, spread]) => [
    FIELD_NAMES[field as keyof typeof spreads],
    spreadText(spread, field === 'current_mps' ? '\u00a0m/s' : '\u00a0m'),
  ])
  const waves = waveText(view)
  if (waves !== undefined) rows.push([FIELD_NAMES.wave_height, waves])
  return rows.map(([name, text]) => markup`<tr><th scope="row">${name}</th><td>${text}</td></tr>`)
}

function uncertainty(view: EvidenceView): Markup {
  const { uncertainty: own } = view.study
  if (!own)
    return markup`<p>The study has no uncertain inputs: each cell is one answer at the inputs as given.</p>`
  return markup`<table class="uncertain"><caption>Inputs that are not known exactly: ${count(own.samples)} samples of each cell, seed ${String(own.seed)}, percentiles ${own.percentiles.join(', ')}.</caption><thead><tr><th scope="col">Input</th><th scope="col">How it scatters about its value</th></tr></thead><tbody>${uncertainRows(view, own)}</tbody></table>`
}

function groupRow(view: EvidenceView, index: number): Markup {
  const group = view.rules.groups[index]
  if (!group) return markup``
  const vessels = vesselsOf(view, group.id)
  const names = vessels.map((vessel) => vesselName(view.study.vessels[vessel]))
  return markup`<tr><th scope="row">${group.name}<span class="muted"> ${group.id}</span></th><td>${groupText(group.appliesTo)}</td><td>${vessels.length === 0 ? 'no vessel of the study' : names.join('; ')}</td></tr>`
}

function passagesText({ rules, plan }: EvidenceView): string | undefined {
  if (!rules.passages) return undefined
  const counted0 = plan.stretches.reduce((sum, { passages }) => sum + (passages ?? 0), 0)
  return `Passages of a log of position reports, by mean speed over ground: ${count(counted0)} counted on the stretches. The share exceeding is linear inside a bin.`
}

/** What the drawings and tables of the sheets mean. */
const READING = [
  'Limits and maxima are rounded down; speeds are over ground unless they say otherwise.',
  'A sheet shows the cell that allows least on its stretch, computed at the inputs as given. The bars beside its particulars show what one input alone does when it is lower or higher by its standard deviation or half range, the strongest first.',
  'The curve shows wave heights at the nearer bank over speed: whole lines where a method is in its range, dashed ones where it is not and does not count. In the grey band no steady flow exists.',
  'The criteria stand with their value and the margin to what is allowed, at the limit as at the recommended maximum of the cell. The own maximum is where a criterion, taken alone, is first reached; the lowest governs.',
]

/** How the limits were drawn, in words. */
export function rulesPart(view: EvidenceView): Markup {
  const { rules } = view
  const passages = passagesText(view)
  return markup`<dl class="rules">${[
    line('What was studied', studiedText(view)),
    line(
      'Ceiling of a segment',
      'The lowest recommended maximum over ground of every vessel of the group, at every water level and in every current' +
        (rules.isByDirection ? ', for each direction by itself.' : ' and direction.'),
    ),
    line('Taken at', percentileText(view)),
    line('Sign', boundsText(view)),
    line(
      'Stretches',
      `Constant limits over consecutive segments of one waterway; a gap of more than 100\u00a0m ends a stretch.${
        rules.minRunLength > 0
          ? ` A stretch that allows more than a neighbour is at least ${metres(rules.minRunLength, 0)} long; one that allows less may be short.`
          : ''
      } Among all plans that keep every ceiling, the one with the least travel time, then the fewest stretches.`,
    ),
    line('Kept', keptText(view)),
    passages !== undefined && line('Traffic', passages),
  ]}</dl><h3>Groups</h3><table class="groups"><thead><tr><th scope="col">Group</th><th scope="col">For</th><th scope="col">Vessels of the study</th></tr></thead><tbody>${rules.groups.map((_, i) => groupRow(view, i))}</tbody></table><h3>Uncertainty</h3>${uncertainty(view)}<h3>Reading the sheets</h3>${READING.map((text) => markup`<p>${text}</p>`)}`
}
