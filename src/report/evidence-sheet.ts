import { governingSentence, SEVERITY_NAMES, CRITERION_NAMES } from './words.ts'
import { item } from './block.ts'
import { evidenceCriteria } from './evidence-criteria.ts'
import type { CellEvidence, StretchCase } from './evidence-case.ts'
import { proposalText, whyText } from './evidence-proposal.ts'
import type { Register } from './evidence-register.ts'
import { tornadoSvg } from './evidence-tornado.ts'
import type { EvidenceView } from './evidence-view.ts'
import {
  counted,
  currentText,
  directionText,
  groupName,
  lackText,
  levelText,
  marginOfStretch,
  marginText,
  numberOf,
  placeOf,
  runsText,
  segmentName,
  vesselName,
} from './evidence-words.ts'
import { UNKNOWN, chainage, duration, kmh, length, percent } from './format.ts'
import { Markup, markup } from './html.ts'
import { fieldName, valueText } from './sheet-tables.ts'
import { speedCurveSvg } from './speed-curve.ts'

function heading(view: EvidenceView, { stretch, index }: StretchCase): Markup {
  const all = view.plan.stretches.length
  const { outcome, limit } = stretch
  const what = outcome === 'kept' ? 'limit kept' : 'limit'
  const box = limit
    ? markup`<b>${String(limit.value)}</b>${limit.unit}`
    : markup`<b>none</b><span>${lackText(stretch)}</span>`
  return markup`<header class="stretch-head"><div><p class="kind">Stretch ${numberOf(index)} of ${String(all)} · ${groupName(view, stretch.groupId)} · ${directionText(stretch.direction)}</p><h2>${placeOf(view, stretch)}</h2><p class="proposal">${proposalText(view, stretch)}</p></div><div class="sign ${outcome}"><span>${what}</span>${box}</div></header>`
}

function figures({ stretch }: StretchCase): Markup {
  const { travelTime, travelTimeToday, exceedingRatio, passages } = stretch
  const exceeding =
    exceedingRatio === undefined
      ? UNKNOWN
      : `${percent(exceedingRatio)} of ${counted(passages ?? 0, 'passage')}`
  return markup`<dl class="block figures">${[
    item('Lowest maximum', kmh(stretch.lowestMaximum)),
    item('Ceiling on the sign', kmh(stretch.ceiling)),
    item('Margin', marginText(marginOfStretch(stretch))),
    item('Posted today', kmh(stretch.today)),
    item('Time at limit', duration(travelTime)),
    item('Time today', duration(travelTimeToday)),
    item('Exceeding', exceeding),
  ]}</dl>`
}

function particulars(
  view: EvidenceView,
  { stretch }: StretchCase,
  width: 'half' | 'whole',
): Markup | undefined {
  const { governing } = stretch
  if (!governing) return undefined
  const { segmentId, stationChainage, criterion } = governing
  const vessel = view.study.vessels[governing.vessel]
  const place = stationChainage === undefined ? '' : `, station at ${chainage(stationChainage)}`
  const size =
    vessel && `${length(vessel.length)} × ${length(vessel.beam)}, draught ${length(vessel.draught)}`
  return markup`<dl class="block cell ${width}">${[
    item('Segment that governs', `${segmentName(view, segmentId)} (${segmentId})${place}`, true),
    item('Vessel', vesselName(vessel), true),
    item('Size', size ?? UNKNOWN, true),
    item('Water level', levelText(governing.waterLevel)),
    item('Current', currentText(governing.current)),
    item('Direction', governing.direction ?? 'either', width === 'whole'),
    item('Criterion', criterion === undefined ? 'no answer' : CRITERION_NAMES[criterion], width === 'whole'),
  ]}</dl>`
}

/** What the samples of the governing cell say. */
function percentiles({ study, rules }: EvidenceView, { sampled }: StretchCase): Markup | undefined {
  const { uncertainty } = study
  if (!uncertainty || !sampled) return undefined
  const shares = Object.entries(sampled.governedBy)
    .filter(([, share]) => share > 0)
    .sort(([, a], [, b]) => b - a)
    .map(([id, share]) => `${CRITERION_NAMES[id as keyof typeof CRITERION_NAMES]} ${percent(share)}`)
  const cells = uncertainty.percentiles.map((percentile, i) => {
    const speed = sampled.percentiles[i]
    const isOwn = percentile === rules.percentile
    const text = speed === null || speed === undefined ? 'no safe speed' : kmh(speed)
    return markup`${i > 0 && ' · '}${isOwn ? markup`<b>p${String(percentile)} ${text}</b>` : `p${percentile} ${text}`}`
  })
  return markup`<p class="sampled"><b>Samples of this cell.</b> ${cells}. Without a safe speed: ${percent(sampled.noSafeRatio)}. Governed by ${shares.length === 0 ? 'nothing: all impossible' : shares.join(', ')}.</p>`
}

function drawn(svg: string): Markup {
  return new Markup(`<div class="wide-drawing">${svg}</div>`)
}

/** Particulars of the cell, with what each uncertain input does beside them. */
function cellHead(view: EvidenceView, own: StretchCase): Markup {
  const { stretch, index, cell } = own
  const sensitivity = cell?.sensitivity
  if (!sensitivity || sensitivity.inputs.length === 0) {
    return markup`${particulars(view, own, 'whole')}${percentiles(view, own)}`
  }
  const svg = tornadoSvg(sensitivity, stretch.limitSpeed, `tornado-${numberOf(index)}`)
  return markup`<div class="halves"><div>${particulars(view, own, 'half')}${percentiles(view, own)}</div><figure>${new Markup(svg)}</figure></div>`
}

function curveFigure(view: EvidenceView, cell: CellEvidence, { stretch, index }: StretchCase): Markup {
  const { advisory, curve, limitWater } = cell
  const { decision } = advisory
  const report = advisory.criteria.find(({ isGoverning }) => isGoverning)
  const text = stretch.limitSpeed === undefined ? 'Smallest limit' : 'Limit'
  const over = limitWater === undefined ? 0 : limitWater + decision.overGround - decision.speed
  const marked = limitWater === undefined ? undefined : { speed: limitWater, text: `${text} ${kmh(over)}` }
  const svg = speedCurveSvg(curve, advisory, 'wide', {
    id: `curve-${numberOf(index)}`,
    isBrief: true,
    marked,
  })
  const isSampled = view.rules.percentile !== null
  return markup`<figure>${drawn(svg)}<figcaption>The governing cell${isSampled && ' at the inputs as given'}: ${governingSentence(decision, report)}.</figcaption></figure>`
}

/** Warnings and cautions in full, notes by their numbers. */
function cautionItems(register: Register, index: number): Markup {
  const own = (register.cautionsOf[index] ?? []).flatMap((number) => {
    const caution = register.cautions[number]
    return caution ? [{ ...caution, number: number + 1 }] : []
  })
  const notes = own.filter(({ severity }) => severity === 'info').map(({ number }) => number)
  const worse = own.filter(({ severity }) => severity !== 'info')
  return markup`<h3>Cautions</h3><ul class="notes">${worse.map(
    ({ severity, number, text }) =>
      markup`<li class="${severity}"><b>${String(number)} ${SEVERITY_NAMES[severity]}</b> ${text}</li>`,
  )}${worse.length + notes.length === 0 && markup`<li>None.</li>`}${
    notes.length > 0 &&
    markup`<li>${notes.length === 1 ? 'Note' : 'Notes'} ${runsText(notes)}: see Annex A.</li>`
  }</ul>`
}

/** Assumptions with their numbers; the figures of the vessel together. */
function assumptionText(register: Register, index: number): Markup {
  const own = (register.assumptionsOf[index] ?? []).flatMap((number) => {
    const assumption = register.assumptions[number]
    return assumption ? [{ ...assumption, number: number + 1 }] : []
  })
  if (own.length === 0) return markup`<p class="small"><b class="run-in">Assumptions</b> none.</p>`
  const ofVessel = own.filter(({ field }) => field.startsWith('vessel.'))
  const others = own.filter((assumption) => !ofVessel.includes(assumption))
  const texts = others.map(
    ({ field, value, number }) => `${fieldName(field)}: ${valueText(value)} [${number}]`,
  )
  if (ofVessel.length > 0) {
    texts.unshift(
      `figures of the vessel that its class gives [${runsText(ofVessel.map(({ number }) => number))}]`,
    )
  }
  return markup`<p class="small"><b class="run-in">Assumptions</b> by their number in Annex B, with meaning and source there: ${texts.join('; ')}.</p>`
}

const triedName = ({ stretch }: StretchCase): string =>
  stretch.limitSpeed === undefined ? 'smallest limit' : 'limit'

function cellParts(view: EvidenceView, own: StretchCase): Markup {
  const { cell, problem } = own
  if (!cell) {
    return markup`${cellHead(view, own)}<p>${problem === undefined ? 'No cell of the study governs this stretch.' : `The governing cell has no answer at the inputs as given: ${problem}`}</p>`
  }
  return markup`${cellHead(view, own)}${curveFigure(view, cell, own)}${evidenceCriteria(cell, triedName(own))}`
}

/** The sheet of a stretch: one page of paper where its criteria and cautions leave room. */
export function stretchSheet(view: EvidenceView, register: Register, own: StretchCase): Markup {
  const { index } = own
  return markup`<section class="paper sheet" id="stretch-${numberOf(index)}" style="page: stretch-${numberOf(index)}">${heading(view, own)}<p class="why">${whyText(view, own)}</p>${figures(own)}${cellParts(view, own)}<div class="tail">${cautionItems(register, index)}${assumptionText(register, index)}</div></section>`
}
