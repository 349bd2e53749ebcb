import type { Stretch } from '../limits/plan.ts'
import type { Register } from './evidence-register.ts'
import type { EvidenceView } from './evidence-view.ts'
import {
  directionText,
  groupName,
  lackText,
  marginOfStretch,
  marginText,
  numberOf,
  runsText,
  segmentName,
  signText,
  vesselName,
} from './evidence-words.ts'
import { UNKNOWN, duration, figure, kmh, percent } from './format.ts'
import { markup, type Markup } from './html.ts'
import { CRITERION_NAMES } from './words.ts'

const COLUMNS = 10

/** A speed in a column that has its unit in the head. */
const withoutUnit = (text: string): string => text.replace('\u00a0km/h', '')

const km = (value: number): string => figure(value / 1000, 3)

function governingCell(view: EvidenceView, { governing }: Stretch): Markup {
  if (!governing) return markup`${UNKNOWN}`
  const criterion = governing.criterion === undefined ? 'no answer' : CRITERION_NAMES[governing.criterion]
  return markup`<b>${criterion}</b> <span class="muted">on ${segmentName(view, governing.segmentId)}</span><br>${vesselName(view.study.vessels[governing.vessel])}`
}

function limitCell(stretch: Stretch): Markup {
  const { outcome } = stretch
  if (outcome === 'below-smallest-limit')
    return markup`<b>none</b><br><span class="muted">${lackText(stretch)}</span>`
  const { limit, limitSpeed } = stretch
  const isOther = limit !== undefined && limit.unit !== 'km/h'
  return markup`<b>${limit ? signText(limit) : UNKNOWN}</b>${isOther && markup`<br><span class="muted">${kmh(limitSpeed)}</span>`}${outcome === 'kept' && markup`<br><span class="muted">kept</span>`}`
}

function row(view: EvidenceView, register: Register, index: number): Markup {
  const stretch = view.plan.stretches[index]
  if (!stretch) return markup``
  const { chainageFrom, chainageTo, length, today, travelTime, travelTimeToday, exceedingRatio } = stretch
  const cautions = (register.cautionsOf[index] ?? []).map((i) => i + 1)
  return markup`<tr id="row-${numberOf(index)}"><th scope="row"><a href="#stretch-${numberOf(index)}">${numberOf(index)}</a></th><td class="figure">${km(chainageFrom)}<br>${km(chainageTo)}</td><td class="figure">${km(length)}</td><td>${limitCell(stretch)}</td><td>${governingCell(view, stretch)}</td><td class="figure">${withoutUnit(marginText(marginOfStretch(stretch)))}</td><td class="figure">${withoutUnit(kmh(today))}</td><td class="figure time">${duration(travelTime)}<br><span class="muted">${duration(travelTimeToday)}</span></td><td class="figure">${percent(exceedingRatio)}</td><td>${cautions.length === 0 ? 'none' : runsText(cautions)}</td></tr>`
}

/** Waterway, group and direction, which hold for the rows below. */
const headOf = (view: EvidenceView, { waterway, groupId, direction }: Stretch): string =>
  `${waterway ?? 'Segments without a waterway'} · ${groupName(view, groupId)} · ${directionText(direction)}`

/** Every stretch of the plan as a row. */
export function stretchTable(view: EvidenceView, register: Register): Markup {
  let last = ''
  const rows = view.plan.stretches.map((stretch, index) => {
    const head = headOf(view, stretch)
    const isNew = head !== last
    last = head
    return markup`${isNew && markup`<tr class="part"><th scope="rowgroup" colspan="${String(COLUMNS)}">${head}</th></tr>`}${row(view, register, index)}`
  })
  return markup`<div class="wide-table"><table class="stretches"><caption>Stretches from upstream, numbered from 1; the record counts their index from 0. Chainage in km at the upstream and the downstream end. Margin: lowest maximum less the limit. Times at the limit and, below it, at the limits posted today. Exceeding: share of counted passages faster than the limit. Cautions by their number in Annex A.</caption><thead><tr><th scope="col">No.</th><th scope="col" class="figure">From, to<br>km</th><th scope="col" class="figure">Length<br>km</th><th scope="col">Limit</th><th scope="col">Governed by</th><th scope="col" class="figure">Margin<br>km/h</th><th scope="col" class="figure">Today<br>km/h</th><th scope="col" class="figure">Time<br>(today)</th><th scope="col" class="figure">Exceed.</th><th scope="col">Cautions</th></tr></thead><tbody>${rows}</tbody></table></div>`
}
