import { SEVERITIES } from '../advisory/caution.ts'
import type { Stretch } from '../limits/plan.ts'
import { item } from './block.ts'
import type { Register } from './evidence-register.ts'
import type { EvidenceView, PlanState } from './evidence-view.ts'
import { counted, directionText, groupName, signText } from './evidence-words.ts'
import { UNKNOWN, duration, kilometres } from './format.ts'
import { markup, type Markup } from './html.ts'
import { SEVERITY_NAMES } from './words.ts'

/** What the whole document is, in few sentences. */
const STANDING =
  'This plan is a proposal for the competent authority. Its figures are computed; they are no navigation aid. Local rules and licensed professional practice come first: where they ask for less speed, they hold. A limit is in force only once the authority has made it known in the form that its law asks for.'

export const STATE_NAMES: Readonly<Record<PlanState, string>> = {
  draft: 'DRAFT',
  published: 'Published',
  superseded: 'SUPERSEDED',
}

const STATE_NOTES: Readonly<Record<PlanState, string>> = {
  draft: 'not published, not in force',
  published: 'as recorded under the hash below',
  superseded: 'replaced by a later plan, kept for the record',
}

export const titleOf = ({ publication, name }: EvidenceView): string => publication?.title ?? name

/** Names of the waterways of a plan, each once. */
export function waterwaysOf({ plan }: EvidenceView): string {
  const names = [...new Set(plan.stretches.map(({ waterway }) => waterway ?? 'segments without a waterway'))]
  return names.length === 0 ? UNKNOWN : names.join('; ')
}

function particulars(view: EvidenceView): Markup {
  const { publication: own } = view
  return markup`<dl class="block">${[
    item('Authority', own?.authority ?? 'not yet named', true),
    item('Number', own?.number ?? 'none: not published'),
    item('Effective from', own?.effectiveFrom ?? 'not fixed'),
    item('Waterway', waterwaysOf(view), true),
    item('Replaces', own?.supersedes ?? (own ? 'nothing' : UNKNOWN)),
    item(
      'Published',
      own ? `${own.publishedAt}${own.publishedBy === undefined ? '' : ` by ${own.publishedBy}`}` : 'no',
    ),
    item('Plan', `${view.name} (${view.id})`, true),
    item('Study', view.studyName === undefined ? view.studyId : `${view.studyName} (${view.studyId})`, true),
  ]}</dl>`
}

interface Sum {
  readonly stretches: readonly Stretch[]
  readonly groupId: string
  readonly direction: Stretch['direction']
}

/** Stretches of each group and direction, in the order of the plan. */
function sumsOf({ plan }: EvidenceView): Sum[] {
  const byKey = new Map<string, Stretch[]>()
  for (const stretch of plan.stretches) {
    const key = JSON.stringify([stretch.groupId, stretch.direction])
    const known = byKey.get(key)
    if (known) known.push(stretch)
    else byKey.set(key, [stretch])
  }
  return [...byKey.values()].flatMap((stretches) => {
    const [first] = stretches
    return first ? [{ stretches, groupId: first.groupId, direction: first.direction }] : []
  })
}

const lengthOf = (stretches: readonly Stretch[]): number =>
  stretches.reduce((sum, { length }) => sum + length, 0)

/** Lowest and highest limit with their signs. */
function rangeText(stretches: readonly Stretch[]): string {
  const limits = stretches
    .flatMap(({ limit, limitSpeed }) => (limit && limitSpeed !== undefined ? [{ limit, limitSpeed }] : []))
    .sort((a, b) => a.limitSpeed - b.limitSpeed)
  const [first, last] = [limits[0], limits.at(-1)]
  if (!first || !last) return 'none'
  if (first.limitSpeed === last.limitSpeed) return signText(first.limit)
  return first.limit.unit === last.limit.unit
    ? `${first.limit.value} to ${signText(last.limit)}`
    : `${signText(first.limit)} to ${signText(last.limit)}`
}

function sumRow(view: EvidenceView, { stretches, groupId, direction }: Sum): Markup {
  const without = stretches.filter(({ outcome }) => outcome === 'below-smallest-limit')
  const kept = stretches.filter(({ outcome }) => outcome === 'kept')
  const none = without.length === 0 ? 'none' : `${without.length}: ${kilometres(lengthOf(without))}`
  return markup`<tr><th scope="row">${groupName(view, groupId)}</th><td>${directionText(direction)}</td><td class="figure">${String(stretches.length)}</td><td class="figure">${kilometres(lengthOf(stretches))}</td><td class="figure">${rangeText(stretches)}</td><td class="figure">${String(kept.length)}</td><td class="figure">${none}</td></tr>`
}

/** Travel time at the limits against today, where both are known. */
function timeText({ plan }: EvidenceView): string {
  const { travelTime, travelTimeComparable, travelTimeToday } = plan.totals
  const all = `Over everything with a limit, each group and direction counted once, a passage takes ${duration(travelTime)} at the limits.`
  if (travelTimeToday <= 0) return `${all} No stretch has a posted limit throughout to compare with.`
  const change = travelTimeComparable - travelTimeToday
  const by =
    Math.abs(change) < 0.5 ? 'no change' : `${duration(Math.abs(change))} ${change > 0 ? 'more' : 'less'}`
  return `${all} Where limits are posted today: ${duration(travelTimeComparable)} at the limits, ${duration(travelTimeToday)} at those of today (${by}).`
}

function cautionText({ cautions }: Register): string {
  const parts = [...SEVERITIES].reverse().flatMap((severity) => {
    const number = cautions.filter((caution) => caution.severity === severity).length
    return number === 0 ? [] : [counted(number, SEVERITY_NAMES[severity].toLowerCase())]
  })
  return parts.length === 0
    ? 'No cautions.'
    : `Cautions to read before signing (Annex A): ${parts.join(', ')}.`
}

function summary(view: EvidenceView, register: Register): Markup {
  const { totals, stretches } = view.plan
  return markup`<h2>Summary</h2><table class="sums"><thead><tr><th scope="col">Group</th><th scope="col">Direction</th><th scope="col" class="figure">Stretches</th><th scope="col" class="figure">Length</th><th scope="col" class="figure">Limits</th><th scope="col" class="figure">Kept</th><th scope="col" class="figure">Without a limit</th></tr></thead><tbody>${sumsOf(view).map((sum) => sumRow(view, sum))}<tr class="total"><th scope="row" colspan="2">All</th><td class="figure">${String(stretches.length)}</td><td class="figure">${kilometres(totals.length)}</td><td class="figure">${rangeText(stretches)}</td><td class="figure">${String(stretches.filter(({ outcome }) => outcome === 'kept').length)}</td><td class="figure">${totals.lengthBelowSmallest > 0 ? kilometres(totals.lengthBelowSmallest) : 'none'}</td></tr></tbody></table><p class="after-table">${timeText(view)} ${cautionText(register)}</p>`
}

/** What another reader needs to find the same figures again. */
function reproduction(view: EvidenceView): Markup {
  const { publication: own, serviceVersion, methodVersion } = view
  const isOther = own && (own.serviceVersion !== serviceVersion || own.methodVersion !== methodVersion)
  const hash = own
    ? markup`<span class="hash">${own.recordHash}</span>`
    : 'none yet: the record is fixed when the plan is published'
  const how = own
    ? 'The record of this plan holds the study with every segment, vessel and calibration, its results and the versions. Verifying the record computes everything again and compares figure by figure, without a database.'
    : 'A published plan has a record, from which everything can be computed again.'
  return markup`<dl class="block">${[
    item('Hash of the record', hash, true),
    item('Published with', own ? `service ${own.serviceVersion}, methods ${own.methodVersion}` : UNKNOWN),
    item('Document made with', `service ${serviceVersion}, methods ${methodVersion}`),
  ]}</dl><p class="small">${how}${isOther && markup` <b>The sheets of this document were computed with other versions than those the plan was published with.</b>`} Made ${view.made}.</p>`
}

function signature({ publication }: EvidenceView): Markup {
  return markup`<div class="sign-here"><p>For the authority${publication && markup`, <b>${publication.authority}</b>`}:</p><div class="signature"><span>Signature</span><span>Name and office${publication?.signatory !== undefined && markup`: <b>${publication.signatory}</b>`}</span><span>Place</span><span>Date</span></div></div>`
}

/** The first page: what it is, whose, since when, in numbers, and where to sign. */
export function titlePage(view: EvidenceView, register: Register): Markup {
  const { state, publication } = view
  return markup`<section class="paper title" id="title"><header><p class="kind">Evidence of a limit plan</p><h1>${titleOf(view)}</h1></header><p class="state ${state}"><b>${STATE_NAMES[state]}</b> ${STATE_NOTES[state]}</p>${particulars(view)}${publication?.note !== undefined && markup`<p class="note">${publication.note}</p>`}${summary(view, register)}<p class="standing">${STANDING}</p>${signature(view)}${reproduction(view)}</section>`
}
