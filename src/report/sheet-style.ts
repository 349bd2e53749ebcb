/** The sheet: an A4 page on a desk, one column on a phone, whole pages in print. */
export const SHEET_STYLE = `
main { max-width: 800px; margin: 24px auto; padding: 40px; background: #fff; border: 1px solid #cfcdc6; }
.kind { font-size: 13px; letter-spacing: .08em; text-transform: uppercase; color: var(--grey); margin: 0 0 4px; }
h1 { font-size: 30px; }
.place { font-size: 16px; margin: 4px 0 16px; overflow-wrap: anywhere; }
h2 { font-size: 19px; margin: 30px 0 10px; padding-top: 8px; border-top: 1.5px solid var(--ink); }
h3 { font-size: 15px; margin: 14px 0 6px; }
dl.block { display: grid; grid-template-columns: repeat(4, 1fr); margin: 0; border: 1px solid var(--ink); border-width: 1px 0 0 1px; }
dl.block > div { border: 1px solid var(--ink); border-width: 0 1px 1px 0; padding: 4px 8px 5px; min-width: 0; }
dl.block .double { grid-column: span 2; }
dl.block dt { font-size: 11px; color: var(--grey); }
dl.block dd { margin: 0; overflow-wrap: anywhere; }
.answer { display: grid; grid-template-columns: 1fr auto; gap: 8px 28px; align-items: center; border: 2.5px solid var(--ink); padding: 16px 20px; margin: 18px 0 0; }
.answer .what { margin: 0; font-weight: 700; }
.answer .speed { font: 700 46px/1.1 Georgia, "Liberation Serif", serif; margin: 2px 0; font-variant-numeric: lining-nums; }
.answer .speed small { font-size: 24px; font-weight: 400; }
.answer .also { margin: 0; }
.answer .governs { grid-column: 1 / -1; margin: 6px 0 0; padding-top: 10px; border-top: 1px solid var(--rule); }
.answer.unsafe { border-style: double; border-width: 6px; }
.answer ul { margin: 6px 0 0; padding-left: 18px; }
.sign { border: 2px solid var(--ink); border-radius: 4px; padding: 8px 16px; text-align: center; min-width: 116px; }
.sign b { display: block; font: 700 34px/1.1 Georgia, "Liberation Serif", serif; }
.sign span { display: block; font-size: 12px; color: var(--grey); }
figure { margin: 0 0 8px; break-inside: avoid; }
figcaption { font-size: 13px; color: var(--grey); margin-top: 6px; }
figcaption b { color: var(--ink); }
svg.narrow { display: none; }
caption { text-align: left; font-size: 13px; color: var(--grey); padding: 0 0 6px; caption-side: top; }
caption b { color: var(--ink); }
td.figure + td:not(.figure), th.figure + th:not(.figure) { padding-left: 10px; }
tr.governs td, tr.governs th { font-weight: 700; }
tr { break-inside: avoid; }
tbody tr:nth-child(-n+2) { break-before: avoid; }
thead, thead tr { break-after: avoid; }
thead { display: table-header-group; }
h2, h3, caption { break-after: avoid; }
tbody th { font-weight: 400; }
table.assumptions { table-layout: fixed; }
table.assumptions th:nth-child(1) { width: 25%; }
table.assumptions th:nth-child(2) { width: 14%; }
table.assumptions th:nth-child(3) { width: 35%; }
thead th { white-space: nowrap; }
.method span { display: block; color: var(--grey); font-size: 12px; }
ul.cautions { list-style: none; margin: 0; padding: 0; }
ul.cautions li { display: grid; grid-template-columns: 86px 1fr; gap: 10px; padding: 6px 0; border-bottom: 1px solid var(--faint); break-inside: avoid; }
ul.cautions b { align-self: start; text-align: center; font-size: 12px; border: 1px solid var(--ink); padding: 1px 4px; }
.warning b { background: var(--ink); color: #fff; }
.caution b { background: #e3e3df; }
.info b { border-color: var(--rule); font-weight: 400; }
ul.cautions small { color: var(--grey); display: block; }
.standing { border-left: 4px solid var(--ink); padding: 4px 0 4px 14px; margin: 18px 0 0; break-inside: avoid; }
.hash { font-family: "Liberation Mono", Menlo, Consolas, monospace; font-size: 12px; overflow-wrap: anywhere; }
.signature { display: grid; grid-template-columns: 1fr 1fr 1fr; gap: 28px; margin-top: 46px; break-inside: avoid; }
.signature span { border-top: 1px solid var(--ink); padding-top: 3px; font-size: 12px; color: var(--grey); }
@media (max-width: 780px) {
  main { margin: 0; padding: 18px 16px 28px; border: 0; }
  h1 { font-size: 25px; }
  dl.block { grid-template-columns: repeat(2, 1fr); }
  .answer { grid-template-columns: 1fr; padding: 14px 16px; }
  .answer .speed { font-size: 40px; }
  .sign { justify-self: start; }
  svg.wide { display: none; }
  svg.narrow { display: block; }
  .signature { gap: 14px; }
  table.stack thead { display: none; }
  table.assumptions { table-layout: auto; }
  table.assumptions th { width: auto !important; }
  table.stack tr { display: grid; grid-template-columns: 1fr 1fr; gap: 0 12px; padding: 7px 0; border-bottom: 1px solid var(--rule); }
  table.stack th, table.stack td { display: block; border: 0; padding: 1px 0; text-align: left; white-space: normal; }
  table.stack th, table.stack td.whole { grid-column: 1 / -1; }
  table.stack tbody th { font-weight: 700; }
  table.stack td.figure + td:not(.figure) { padding-left: 0; }
  .method span { font-weight: 400; }
  table.stack td[data-name]::before { content: attr(data-name) ": "; color: var(--grey); font-weight: 400; }
}
@page { size: A4; margin: 16mm 15mm 18mm;
  @bottom-left { content: "Computed speed advisory; no navigation aid"; font: 8pt Helvetica, Arial, sans-serif; color: #5a5a5a; }
  @bottom-right { content: "Page " counter(page) " of " counter(pages); font: 8pt Helvetica, Arial, sans-serif; color: #5a5a5a; } }
@media print {
  main { max-width: none; margin: 0; padding: 0; border: 0; }
  h2 { margin-top: 16pt; }
  table { font-size: 8.5pt; }
  .method span { font-size: 7.5pt; }
  h2 + * { break-before: avoid; }
  svg.wide { display: block; width: 100%; }
  svg.narrow { display: none; }
  dl.block { grid-template-columns: repeat(4, 1fr); }
  .answer { grid-template-columns: 1fr auto; break-inside: avoid; }
  * { -webkit-print-color-adjust: exact; print-color-adjust: exact; }
}
`
