import type { EvidenceView } from './evidence-view.ts'
import { numberOf, placeOf, limitText } from './evidence-words.ts'
import { STATE_NAMES, titleOf } from './evidence-title.ts'
import { cut } from './format.ts'

const SMALL_PRINT = 'font: 8pt Helvetica, Arial, sans-serif; color: #3a3a3a;'

/** A text as a string of a style sheet: whatever could end it is written by its number. */
export function cssText(text: string): string {
  return `"${text.replace(/[^A-Za-z0-9 .,:;()+·–-]/gu, (character) => `\\${(character.codePointAt(0) ?? 0xfffd).toString(16)} `)}"`
}

/** Longest text of the head of a page, in characters. */
const LONGEST = 78

/** Marks of a plan that is not in force, on every page of paper. */
function headOf({ state, publication }: EvidenceView): string {
  if (state === 'published') return `No. ${publication?.number ?? ''}`
  const number = publication ? ` · No. ${publication.number}` : ''
  return `${STATE_NAMES[state]}${state === 'draft' ? ' – not in force' : ''}${number}`
}

/** The heads of the sheets, each with its own stretch. */
function sheetPages(view: EvidenceView): string {
  return view.plan.stretches
    .map((stretch, index) => {
      const text = `Stretch ${numberOf(index)} · ${placeOf(view, stretch)} · ${limitText(stretch)}`
      return `@page stretch-${numberOf(index)} { @top-left { content: ${cssText(cut(text, LONGEST))}; ${SMALL_PRINT} } }`
    })
    .join('\n')
}

function pages(view: EvidenceView): string {
  const { state } = view
  const weight = state === 'published' ? '' : 'font-weight: 700; color: #000;'
  return `
@page { size: A4; margin: 15mm 12mm 14mm;
  @top-left { content: ${cssText(cut(titleOf(view), LONGEST))}; ${SMALL_PRINT} }
  @top-right { content: ${cssText(cut(headOf(view), 40))}; ${SMALL_PRINT} ${weight} }
  @bottom-left { content: "Evidence of a limit plan: a proposal for the competent authority; no navigation aid"; ${SMALL_PRINT} }
  @bottom-right { content: "Page " counter(page) " of " counter(pages); ${SMALL_PRINT} } }
${sheetPages(view)}
@page title { @top-left { content: none; } }
`
}

const LOOK = `
main { max-width: 800px; margin: 0 auto; overflow-wrap: anywhere; }
.paper { margin: 24px 0; padding: 40px; background: #fff; border: 1px solid #cfcdc6; min-width: 0; }
.recipe { margin: 18px 0 0; padding: 10px 14px; background: #fff; border: 1px solid #cfcdc6; font-size: 14px; }
.kind { font-size: 13px; letter-spacing: .08em; text-transform: uppercase; color: var(--grey); margin: 0 0 4px; }
h1 { font-size: 32px; margin: 6px 0 12px; }
h2 { font-size: 20px; margin: 26px 0 10px; break-after: avoid; }
h3 { font-size: 15px; margin: 18px 0 6px; break-after: avoid; }
p { orphans: 3; widows: 3; }
.small { font-size: 12px; }
.muted { font-weight: 400; }
.state { border: 2px solid var(--ink); padding: 6px 12px; margin: 0 0 14px; }
.state.draft, .state.superseded { background: var(--ink); color: #fff; }
.state b { letter-spacing: .06em; margin-right: 8px; }
.note { white-space: pre-line; overflow-wrap: anywhere; margin: 12px 0 0; }
.standing { border-left: 4px solid var(--ink); padding: 4px 0 4px 14px; margin: 18px 0; break-inside: avoid; }
.hash { font-family: "Liberation Mono", Menlo, Consolas, monospace; font-size: 12px; overflow-wrap: anywhere; }
.sign-here { break-inside: avoid; margin: 26px 0 22px; }
.signature { display: grid; grid-template-columns: 1.4fr 1.8fr 1fr .8fr; gap: 22px; margin-top: 44px; }
.signature span { border-top: 1px solid var(--ink); padding-top: 3px; font-size: 12px; color: var(--grey); overflow-wrap: anywhere; }
.signature b { color: var(--ink); }
dl.block { display: grid; grid-template-columns: repeat(4, 1fr); margin: 0 0 10px; border: 1px solid var(--ink); border-width: 1px 0 0 1px; break-inside: avoid; }
dl.block > div { border: 1px solid var(--ink); border-width: 0 1px 1px 0; padding: 3px 7px 4px; min-width: 0; }
dl.block .double { grid-column: span 2; }
dl.block dt { font-size: 11px; color: var(--grey); }
dl.block dd { margin: 0; overflow-wrap: anywhere; }
dl.block.cell.half { grid-template-columns: repeat(2, 1fr); }
dl.rules { margin: 0; }
dl.rules > div { display: grid; grid-template-columns: 150px 1fr; gap: 12px; padding: 5px 0; border-bottom: 1px solid var(--faint); break-inside: avoid; }
dl.rules dt { font-weight: 700; }
dl.rules dd { margin: 0; min-width: 0; overflow-wrap: anywhere; }
caption { text-align: left; font-size: 13px; color: var(--grey); padding: 0 0 6px; caption-side: top; break-after: avoid; }
thead { display: table-header-group; }
tr { break-inside: avoid; }
tbody th { font-weight: 400; }
td.figure + td:not(.figure), th.figure + th:not(.figure), th.figure + td:not(.figure) { padding-left: 10px; }
tr.part th { font-weight: 700; background: var(--tint); padding: 5px 6px; break-after: avoid; }
tr.part { break-after: avoid; }
tr.total th, tr.total td { border-top: 1.5px solid var(--ink); font-weight: 700; }
.after-table { margin: 10px 0 0; }
tr.governs th, tr.governs td { font-weight: 700; }
th.over { text-align: center; border-bottom: 1px solid var(--rule); }
table.criteria td.figure, table.criteria th.figure { padding-left: 4px; }
table.stretches td { font-size: 12px; }
table.stretches .figure { padding-right: 10px; }
thead th, td.from, td.severity { white-space: nowrap; }
th.over { padding: 0 8px; }
table.assumed td:nth-child(2) { min-width: 120px; }
table.assumed td:nth-child(3) { min-width: 84px; }
table.assumed td:last-child, table.cautions td:last-child { min-width: 70px; }
table.stretches td:last-child { min-width: 52px; }
table.criteria tbody td { white-space: nowrap; }
dl.block.figures { grid-template-columns: repeat(7, auto); }
table.stretches { table-layout: fixed; min-width: 700px; }
table.stretches th:nth-child(1) { width: 27px; }
table.stretches th:nth-child(2) { width: 60px; }
table.stretches th:nth-child(3), table.stretches th:nth-child(6), table.stretches th:nth-child(7) { width: 53px; }
table.stretches th:nth-child(4) { width: 84px; }
table.stretches th:nth-child(8) { width: 80px; }
table.stretches th:nth-child(9) { width: 56px; }
table.stretches th:nth-child(10) { width: 78px; }
table.groups td:nth-child(2) { width: 32%; }
table.uncertain th:first-child { width: 150px; }
td.warning b { background: var(--ink); color: #fff; padding: 1px 5px; }
td.caution b { border: 1px solid var(--ink); padding: 0 5px; }
td.info b { font-weight: 400; }
.stretch-head { display: grid; grid-template-columns: 1fr auto; gap: 16px; align-items: start; border-bottom: 1.5px solid var(--ink); padding-bottom: 8px; }
.stretch-head > div { min-width: 0; }
.stretch-head h2 { margin: 0 0 4px; }
.proposal { font-weight: 700; margin: 0; overflow-wrap: anywhere; }
.sign { border: 2.5px solid var(--ink); border-radius: 4px; padding: 4px 14px 6px; text-align: center; min-width: 104px; }
.sign b { display: block; font: 700 34px/1.1 Georgia, "Liberation Serif", serif; }
.sign span { display: block; font-size: 12px; color: var(--grey); }
.sign.kept { border-style: double; border-width: 5px; }
.sign.below-smallest-limit { border-style: dashed; }
.why { margin: 8px 0; overflow-wrap: anywhere; }
.halves { display: grid; grid-template-columns: 1fr 346px; gap: 14px; align-items: start; }
.halves > * { min-width: 0; }
figure { margin: 0 0 8px; break-inside: avoid; }
figcaption { font-size: 12px; color: var(--grey); margin-top: 3px; overflow-wrap: anywhere; }
.strips figure { margin-bottom: 16px; }
ul.notes { list-style: none; margin: 0 0 6px; padding: 0; font-size: 12px; }
ul.notes li { break-inside: avoid; margin: 0 0 3px; overflow-wrap: anywhere; }
ul.notes li.info b { font-weight: 400; text-decoration: underline; }
.tail h3 { margin: 8px 0 3px; }
.run-in { font-family: Georgia, "Liberation Serif", serif; }
nav ol { margin: 0; padding-left: 20px; }
.watermark { display: none; }
.wide-table, .wide-drawing { overflow-x: auto; }
@media screen {
  main.draft .paper::before, main.superseded .paper::before { display: block; text-align: right; font-size: 13px; font-weight: 700; }
  main.draft .paper::before { content: "DRAFT – not in force"; }
  main.superseded .paper::before { content: "SUPERSEDED"; }
  table.criteria { font-size: 12px; }
}
@media screen and (max-width: 780px) {
  table.criteria th:first-child { min-width: 130px; }
  .paper { padding: 18px 14px 24px; margin: 10px 0; border-width: 1px 0; }
  .recipe { margin: 0; border-width: 0 0 1px; }
  h1 { font-size: 26px; }
  dl.block { grid-template-columns: repeat(2, 1fr); }
  dl.block.figures, dl.block.cell.half { grid-template-columns: repeat(2, 1fr); }
  dl.rules > div { grid-template-columns: 1fr; gap: 0; }
  .halves, .stretch-head { grid-template-columns: 1fr; }
  .sign { justify-self: start; }
  .signature { grid-template-columns: 1fr 1fr; row-gap: 40px; }
  .wide-drawing svg { width: 720px; max-width: none; }
  table { display: block; overflow-x: auto; }
}
@media print {
  main { max-width: none; margin: 0; }
  .paper { margin: 0; padding: 0; border: 0; }
  .recipe { display: none; }
  .title { page: title; }
  .paper + .paper { break-before: page; }
  .paper + .paper.follows { break-before: auto; }
  .kind { font-size: 8.5pt; }
  h1 { font-size: 22pt; }
  h2 { font-size: 13.5pt; margin: 12pt 0 6pt; }
  h3 { font-size: 10.5pt; margin: 9pt 0 4pt; }
  table { font-size: 8.5pt; line-height: 1.3; }
  table.stretches td, caption, figcaption, .small, ul.notes, .hash, .signature span, dl.block dt, .sign span { font-size: 8pt; }
  th, td { padding: 2px 7px 2px 0; }
  .sheet { font-size: 9pt; line-height: 1.3; }
  .sheet table, .sheet .sampled { font-size: 8pt; }
  .title { display: flex; flex-direction: column; min-height: 262mm; }
  .title .standing { margin-top: auto; }
  .sheet h2 { font-size: 13pt; margin: 0 0 2pt; }
  .sheet .stretch-head { padding-bottom: 4pt; }
  .sheet .why { margin: 5pt 0; }
  .sheet dl.block { margin-bottom: 6pt; }
  .sheet dl.block > div { padding: 1pt 5pt 2pt; }
  .sheet dl.block dd { line-height: 1.2; font-size: 8.5pt; }
  .sheet table { line-height: 1.2; }
  .sheet th, .sheet td { padding-top: 1.2px; padding-bottom: 1.2px; }
  .sheet .tail h3 { margin: 3pt 0 1pt; font-size: 9pt; }
  .sheet figure { margin-bottom: 4pt; }
  .sheet p { margin-bottom: 0; }
  .sheet ul.notes { line-height: 1.25; margin-bottom: 0; }
  .sheet ul.notes li { margin-bottom: 1.5pt; }
  .sheet .small { line-height: 1.25; }
  .sheet .sampled { margin: 0 0 4pt; }
  .sign b { font-size: 24pt; }
  .wide-table, .wide-drawing { overflow: visible; }
  svg { max-width: 100%; }
  .watermark { display: block; position: fixed; left: 0; right: 0; top: 36%; text-align: center; font: 700 88pt/1 Helvetica, Arial, sans-serif; letter-spacing: .06em; color: #000; opacity: .07; transform: rotate(-38deg); z-index: 9; pointer-events: none; }
  .watermark.superseded { font-size: 62pt; }
  * { -webkit-print-color-adjust: exact; print-color-adjust: exact; }
}
`

/** Style of the evidence, with a head for the pages of each sheet. */
export const evidenceStyle = (view: EvidenceView): string => `${LOOK}${pages(view)}`
