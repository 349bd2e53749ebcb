/** The overview: plan and table side by side on a desk, one below the other on a phone. */
export const OVERVIEW_STYLE = `
main { max-width: 1240px; margin: 0 auto; padding: 24px; background: #fff; min-height: 100vh; }
h1 { font-size: 27px; }
.lead { margin: 4px 0 16px; color: var(--grey); }
form { display: flex; flex-wrap: wrap; gap: 10px 16px; align-items: end; padding: 12px 14px; background: var(--tint); border: 1px solid var(--rule); margin: 0 0 18px; }
label { display: block; font-size: 12px; color: var(--grey); min-width: 0; }
select, input, button { display: block; font: inherit; font-size: 15px; color: var(--ink); padding: 6px 8px; border: 1px solid #7a7a7a; border-radius: 2px; background: #fff; min-height: 38px; max-width: 100%; margin-top: 2px; }
input { width: 7em; }
button { background: var(--ink); color: #fff; border-color: var(--ink); padding: 6px 18px; cursor: pointer; }
:focus-visible { outline: 3px solid #00558c; outline-offset: 1px; }
.columns { display: grid; grid-template-columns: minmax(0, 720px) minmax(0, 1fr); gap: 28px; align-items: start; }
figure { margin: 0; break-inside: avoid; }
figcaption { font-size: 13px; color: var(--grey); margin-top: 6px; }
svg.narrow { display: none; }
tr.group th { padding-top: 12px; color: var(--grey); font-weight: 400; }
td:first-child { width: 38%; }
td .name { font-weight: 700; }
td small { display: block; color: var(--grey); overflow-wrap: anywhere; }
.none { font-weight: 700; }
.note { font-size: 13px; color: var(--grey); margin: 10px 0 0; }
footer { margin-top: 26px; padding-top: 10px; border-top: 1.5px solid var(--ink); font-size: 13px; }
footer nav { display: flex; flex-wrap: wrap; gap: 4px 18px; margin-bottom: 8px; }
@media (max-width: 1100px) { .columns { grid-template-columns: minmax(0, 1fr); } }
@media (max-width: 780px) {
  main { padding: 16px; }
  form { display: grid; grid-template-columns: 1fr 1fr; }
  form .class { grid-column: 1 / -1; }
  form .class select { width: 100%; }
  form input, form .loading select { width: 100%; }
  button { grid-column: 1 / -1; }
  svg.wide { display: none; }
  svg.narrow { display: block; }
}
@page { size: A4; margin: 15mm; }
@media print {
  main { padding: 0; max-width: none; }
  form { display: none; }
  .columns { display: block; }
  svg.wide { display: block; width: 100%; }
  svg.narrow { display: none; }
  tr { break-inside: avoid; }
  thead { display: table-header-group; }
  * { -webkit-print-color-adjust: exact; print-color-adjust: exact; }
}
`
