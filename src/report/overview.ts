import type { SignUnit } from '../domain/units.ts'
import { LOADINGS, type Loading } from '../domain/vessel.ts'
import type { Size } from './chart.ts'
import { count, figure } from './format.ts'
import { Markup, markup } from './html.ts'
import { overviewPlanSvg } from './overview-plan.ts'
import { rowsOf, type Answered, type OverviewRow } from './overview-rows.ts'
import { OVERVIEW_STYLE } from './overview-style.ts'
import { page } from './page.ts'

/** A class that may be chosen. */
export interface ClassChoice {
  readonly id: string
  readonly name: string
}

/** What the overview is made from. */
export interface OverviewParts {
  /** n segments, 0 to 10,000 and more, each with an answer in brief or the reason why there is none */
  readonly answered: readonly Answered[]
  readonly chosen: {
    readonly vesselClass: string
    readonly loading: Loading
    /** m above the datum */
    readonly waterLevel: number
    readonly signUnit: SignUnit
  }
  readonly classes: readonly ClassChoice[]
  readonly serviceVersion: string
}

/** Rows of the table; more would be a list and no overview. */
const MOST_ROWS = 200

function option(value: string, text: string, isChosen: boolean): Markup {
  return markup`<option value="${value}"${isChosen && markup` selected`}>${text}</option>`
}

function form({ chosen, classes }: OverviewParts): Markup {
  const options = classes.map(({ id, name }) => option(id, name, id === chosen.vesselClass))
  const loadings = LOADINGS.map((loading) => option(loading, loading, loading === chosen.loading))
  return markup`<form method="get" action="/"><label class="class">Vessel class<select name="vessel_class">${options}</select></label><label class="loading">Loading<select name="loading">${loadings}</select></label><label>Water level, m<input name="water_level_m" type="number" step="0.01" min="-50" max="50" value="${String(chosen.waterLevel)}"></label><button type="submit">Show</button></form>`
}

/** The choice as a query, for the links. */
function queryOf({ chosen }: OverviewParts): string {
  return new URLSearchParams({
    vessel_class: chosen.vesselClass,
    loading: chosen.loading,
    water_level_m: String(chosen.waterLevel),
    sign_unit: chosen.signUnit,
  }).toString()
}

function tableRow(row: OverviewRow, query: string): Markup {
  const href = `/v1/segments/${encodeURIComponent(row.id)}/sheet?${query}`
  const answer = row.kind === 'speed' ? row.answerText : markup`<span class="none">${row.answerText}</span>`
  return markup`<tr><td><a class="name" href="${href}">${row.name}</a></td><td>${answer}<small>${row.governing}</small></td></tr>`
}

/** Rows under the name of their waterway. */
function grouped(rows: readonly OverviewRow[], query: string): Markup[] {
  return rows.flatMap((row, i) => {
    const isFirst = row.waterway !== '' && row.waterway !== rows[i - 1]?.waterway
    const head = markup`<tr class="group"><th scope="rowgroup" colspan="2">${row.waterway}</th></tr>`
    return isFirst ? [head, tableRow(row, query)] : [tableRow(row, query)]
  })
}

function table(rows: readonly OverviewRow[], query: string): Markup {
  const shown = rows.slice(0, MOST_ROWS)
  const rest = rows.length - shown.length
  const note =
    rest > 0 &&
    markup`<p class="note">The first ${count(shown.length)} of ${count(rows.length)} segments are listed; the layer below holds them all.</p>`
  return markup`<div><table><thead><tr><th scope="col">Segment</th><th scope="col">Recommended maximum over ground, and what governs</th></tr></thead><tbody>${grouped(shown, query)}</tbody></table>${note}</div>`
}

const classed = (svg: string, size: Size): string => svg.replace(/^<svg /, `<svg class="${size}" `)

function plan(rows: readonly OverviewRow[], unit: SignUnit): Markup {
  const drawn = (['wide', 'narrow'] as const).map(
    (size) => new Markup(classed(overviewPlanSvg(rows, unit, size), size)),
  )
  return markup`<figure>${drawn}<figcaption>The figure beside a line is the value of the sign in ${unit}: × stands for no safe speed, ? for no answer. Where lines lie close, not every figure has room.</figcaption></figure>`
}

/** How many segments have which answer. */
function summary(rows: readonly OverviewRow[]): string {
  const of = (kind: OverviewRow['kind']): number => rows.filter((row) => row.kind === kind).length
  const parts = [`${count(rows.length)} ${rows.length === 1 ? 'segment' : 'segments'}`]
  if (of('no-safe-speed') > 0) parts.push(`${count(of('no-safe-speed'))} without a safe speed`)
  if (of('no-answer') > 0) parts.push(`${count(of('no-answer'))} without an answer`)
  return parts.join(', ')
}

/**
 * The page at `/`: every segment with the recommended speed of a class at a water level.
 *
 * @param parts  segments with their answers, what is chosen, and what may be
 * @returns HTML that fetches nothing
 */
export function overviewPage(parts: OverviewParts): string {
  const { answered, chosen, classes, serviceVersion } = parts
  const rows = rowsOf(answered, chosen.signUnit)
  const query = queryOf(parts)
  const className = classes.find(({ id }) => id === chosen.vesselClass)?.name ?? chosen.vesselClass
  const lead = `${className}, ${chosen.loading}, water level ${figure(chosen.waterLevel, 2)} m: ${summary(rows)}`
  const body = markup`<main><header><h1>Recommended maximum speeds</h1><p class="lead">${lead}</p></header>${form(parts)}<div class="columns">${plan(rows, chosen.signUnit)}${table(rows, query)}</div><footer><nav><a href="/v1/advisories.geojson?${query}">All segments as a GeoJSON layer</a><a href="/docs">Description of the interface</a></nav><p>Computed advisories, service version ${serviceVersion}. They are no navigation aid and replace neither local rules nor the judgement of a licensed professional.</p></footer></main>`
  return page('Recommended maximum speeds', OVERVIEW_STYLE, body)
}
