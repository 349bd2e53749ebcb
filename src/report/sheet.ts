import type { Advisory } from '../advisory/advise.ts'
import type { Curve } from '../advisory/curve.ts'
import type { SegmentRecord } from '../store/registry.ts'
import { item } from './block.ts'
import { crossSectionSvg, sectionNotes } from './cross-section.ts'
import { chainage, figure, length, metresPerSecond } from './format.ts'
import { Markup, markup } from './html.ts'
import { page } from './page.ts'
import { planNotes, planSvg } from './plan.ts'
import { sketchOf } from './plan-sketch.ts'
import { answerBox } from './sheet-answer.ts'
import { SHEET_STYLE } from './sheet-style.ts'
import { assumptionsTable, cautionsList, criteriaTable, squatTable, waveTable } from './sheet-tables.ts'
import { speedCurveSvg } from './speed-curve.ts'
import type { Size } from './chart.ts'
import { HULL_NAMES } from './words.ts'

/** What a sheet is made from. */
export interface SheetParts {
  readonly record: SegmentRecord
  readonly advisory: Advisory
  readonly curve: Curve
  readonly serviceVersion: string
  readonly methodVersion: string
  /** `sha256:` and hex */
  readonly inputHash: string
  /** when the sheet was made, RFC 3339 UTC */
  readonly made: string
}

/** What the whole sheet is, in one sentence. */
const STANDING =
  'This is a computed advisory. It is no navigation aid and replaces neither local rules nor the judgement of a licensed professional; where they ask for less speed, they hold.'

const textOf = (record: SegmentRecord, field: string): string | undefined => {
  const value = record.properties[field]
  return typeof value === 'string' && value !== '' ? value : undefined
}

const titleOf = (record: SegmentRecord): string => textOf(record, 'name') ?? record.id

const orNotGiven = (value: string | undefined): string => value ?? 'not given'

/** Water level with its datum and gauge. */
function levelText({ advisory, record }: SheetParts): string {
  const { conditions } = advisory.decision.situation
  const { waterLevel } = conditions
  const sign = waterLevel > 0 ? '+' : ''
  const datum = textOf(record, 'datum') ?? 'the datum'
  const assumed = conditions.isWaterLevelGiven ? '' : ' (assumed)'
  return `${sign}${figure(waterLevel, 2)}\u00a0m on ${datum}${assumed}`
}

function currentText({ advisory }: SheetParts): string {
  const { conditions } = advisory.decision.situation
  if (conditions.current === 0) return conditions.isCurrentGiven ? 'none' : 'none (assumed)'
  const way = conditions.current > 0 ? 'downstream' : 'upstream'
  return `${metresPerSecond(Math.abs(conditions.current))} ${way}`
}

function vesselText({ advisory }: SheetParts): string {
  const { vessel } = advisory.decision.situation
  return `${length(vessel.length)} × ${length(vessel.beam)}, draught ${length(vessel.draught)}, ${HULL_NAMES[vessel.hull]}`
}

/** The block of particulars, as on a drawing. */
function titleBlock(parts: SheetParts): Markup {
  const { record, advisory } = parts
  const { situation, direction } = advisory.decision
  const { vessel, conditions } = situation
  const meeting = conditions.meetingVessel
  return markup`<dl class="block">${[
    item('Vessel class', vessel.className ?? 'described vessel', true),
    item('Loading', vessel.loading ?? 'one draught'),
    item('Meeting vessel', meeting ? (meeting.className ?? 'described vessel') : 'none'),
    item('Vessel', vesselText(parts), true),
    item('Water level', levelText(parts)),
    item('Current', currentText(parts)),
    item('Direction', direction ?? 'either'),
    item('Gauge', orNotGiven(textOf(record, 'gauge_id'))),
    item('Survey', orNotGiven(textOf(record, 'survey_date'))),
    item('Revision of segment', String(record.revision)),
    item('Source of survey', orNotGiven(textOf(record, 'source')), true),
    item('Made', parts.made),
    item('Segment id', record.id),
  ]}</dl>`
}

function head(parts: SheetParts): Markup {
  const { record, advisory } = parts
  const { chainageFrom, chainageTo } = sketchOf(record, advisory, 'wide')
  const waterway = textOf(record, 'waterway')
  return markup`<header><p class="kind">Speed advisory</p><h1>${titleOf(record)}</h1><p class="place">${waterway !== undefined && `${waterway}, `}${chainage(chainageFrom)} to ${chainage(chainageTo)}</p>${titleBlock(parts)}</header>`
}

const CLASSED = /^<svg /

/** A drawing for paper and desk, and one for a phone: the style shows one of them. */
function drawn(make: (size: Size) => string): Markup {
  const sized = (size: Size): string => make(size).replace(CLASSED, `<svg class="${size}" `)
  return new Markup(sized('wide') + sized('narrow'))
}

function figureOf(
  number: number,
  title: string,
  notes: readonly string[],
  make: (size: Size) => string,
): Markup {
  return markup`<figure>${drawn(make)}<figcaption><b>Figure ${String(number)}.</b> ${title}. ${notes.join(' ')}</figcaption></figure>`
}

function curveNotes({ decision }: Advisory): string[] {
  const { current } = decision.situation.conditions
  return [
    'Lines are whole where a method is in range and dashed where it is not; dashed ones may run over the top.',
    'In the grey band no steady flow or no settled pattern exists.',
    ...(current === 0 ? [] : [`Speeds over ground are those going ${decision.direction ?? 'either way'}.`]),
  ]
}

function reproducibility({ record, serviceVersion, methodVersion, inputHash, made }: SheetParts): Markup {
  return markup`<dl class="block">${[
    item('Service version', serviceVersion),
    item('Method version', methodVersion),
    item('Segment', `${record.id}, revision ${record.revision}, updated ${record.updated}`, true),
    item('Hash of the inputs', markup`<span class="hash">${inputHash}</span>`, true),
    item('Made', made, true),
  ]}</dl>`
}

/**
 * The advisory of a segment as a page to read, print and file.
 *
 * @param parts  the segment, its answer with curve, and what reproduces it
 * @returns HTML that fetches nothing
 */
export function segmentSheet(parts: SheetParts): string {
  const { record, advisory, curve } = parts
  const body = markup`<main>${head(parts)}${answerBox(advisory)}<p class="standing">${STANDING}</p><h2>1 Place</h2>${figureOf(
    1,
    'Plan of the segment',
    planNotes(record, advisory),
    (size) => planSvg(record, advisory, size),
  )}${figureOf(2, 'Cross-section with the hull', sectionNotes(advisory), (size) =>
    crossSectionSvg(advisory, size),
  )}<h2>2 Criteria</h2>${criteriaTable(advisory)}<h2>3 Waves and criteria over speed</h2>${figureOf(
    3,
    'Wave height at the nearer bank and criteria over speed',
    curveNotes(advisory),
    (size) => speedCurveSvg(curve, advisory, size),
  )}<h2>4 Cautions</h2>${cautionsList(advisory)}<h2>5 Methods</h2>${waveTable(advisory)}<h3>Squat</h3>${squatTable(advisory)}<h2>6 Assumptions</h2>${assumptionsTable(advisory)}<h2>7 Reproducibility</h2>${reproducibility(parts)}<div class="signature"><span>Checked by</span><span>Approved by</span><span>Date</span></div></main>`
  return page(`${titleOf(record)}: speed advisory`, SHEET_STYLE, body)
}
